"""Short waves along a beam, what a pipe, a diode and a cathode let go, synchrotron motion under space charge."""

from math import pi, sqrt

import numpy as np
import pytest
from scipy.integrate import quad, solve_ivp
from scipy.special import k0

from beamfield.beam.species_table import named
from beamfield.constants import SPEED_OF_LIGHT, VACUUM_IMPEDANCE, VACUUM_PERMITTIVITY
from beamfield.laws import current_limit, modulation, synchrotron
from tests.reference import published_longitudinal as published

exact, PRINTED = 1e-12, 5e-11


def test_table_value():
    """From memory of Abramowitz and Stegun, table 9.8: 1 - x K_1(x) at x = 1."""
    assert abs(modulation.missing_part(1.0) - (1.0 - published.K1_OF_1)) < PRINTED


def test_series_meets_the_function():
    """Ours and the library's: the two branches at their border."""
    below, above = modulation.missing_part(np.array([0.999999e-3, 1.000001e-3]))
    assert below == pytest.approx(above, rel=1e-5)


def test_wave_on_the_axis():
    """General library: field of a round uniform wave from its discs, 2 pi integral of r K_0(k r / gamma) dr."""
    wave, radius, gamma = 3e3, 2e-3, 4.0
    beta = sqrt(1.0 - gamma**-2)
    rest = quad(lambda r: r * k0(wave / gamma * r), 0.0, radius, epsabs=0.0)[0]
    line = 1.0 / (beta * SPEED_OF_LIGHT * pi * radius**2)  # charge per volume for 1 A
    potential = line * rest / VACUUM_PERMITTIVITY  # lab potential; E_z = k phi / gamma^2
    found = modulation.axis_impedance(wave, radius, beta, gamma)
    assert found == pytest.approx(wave * potential / gamma**2, rel=1e-6)


def test_short_waves_oscillate_at_the_plasma_frequency():
    """Closed form: K^2 = 4 I / (I_0 r^2 (beta gamma)^3), the plasma wave number of a round uniform beam."""
    gamma, radius, current, strong = 3.0, 1e-3, 20.0, 17045.0
    beta = sqrt(1.0 - gamma**-2)
    wave = 60.0 * gamma / radius
    found = modulation.oscillation_wave_number(wave, radius, current, beta, gamma, strong)
    assert found == pytest.approx(sqrt(4.0 * current / (strong * (beta * gamma) ** 3)) / radius, rel=exact)
    longer = modulation.oscillation_wave_number(wave / 1e3, radius, current, beta, gamma, strong)
    assert 0.0 < longer < 0.1 * found


@pytest.mark.parametrize("name", published.CHILD_LANGMUIR)
def test_diodes(name):
    """From memory of any text on diodes; the fast law meets the slow one at low voltage."""
    species = named(name)
    slow = current_limit.diode_limit(1.0, 1.0, species.charge, species.mass)
    assert abs(slow / published.CHILD_LANGMUIR[name] - 1.0) < 2.5e-4
    fast = current_limit.fast_diode_limit(1e3, 1e-2, species.charge, species.mass)
    assert fast == pytest.approx(current_limit.diode_limit(1e3, 1e-2, species.charge, species.mass), rel=2e-3)


def test_fast_diode_solves_poisson():
    """General library: gamma'' = J q / (eps0 m c^3) gamma / sqrt(gamma^2 - 1) from a cathode without field."""
    electron, voltage, gap = named("electron"), 2e6, 0.05
    density = current_limit.fast_diode_limit(voltage, gap, electron.charge, electron.mass)
    pull = density * abs(electron.charge) / (VACUUM_PERMITTIVITY * electron.mass * SPEED_OF_LIGHT**3)
    start = 1e-5  # z there from the slow law: gamma - 1 = (9 pull / (4 sqrt 2))^(2/3) z^(4/3)
    above = (9.0 * pull / (4.0 * sqrt(2.0))) ** (2.0 / 3.0) * start ** (4.0 / 3.0)
    motion = solve_ivp(
        lambda z, y: (y[1], pull * (1.0 + y[0]) / sqrt(y[0] * (y[0] + 2.0))),
        (start, gap),
        (above, 4.0 / 3.0 * above / start),
        rtol=1e-10,
        atol=1e-12,
    )
    wanted = voltage * abs(electron.charge) / (electron.mass * SPEED_OF_LIGHT**2)
    assert motion.y[0, -1] == pytest.approx(wanted, rel=1e-5)


def test_short_pulse():
    """From memory of Valfells 2002: 8.854 pC/mm^2 at 1 MV/m."""
    assert abs(current_limit.short_pulse_limit(1e6, 1.0) / published.SHORT_PULSE - 1.0) < 6e-5
    assert current_limit.emitting_area("kv", False, (2e-3, 1e-3)) == pytest.approx(pi * 2e-6, rel=exact)


def test_pipe_limit():
    """Closed form: the largest current for which gamma_0 = gamma + depression has a solution (thin hollow beam)."""
    gamma_0, strong = 2.5, 17045.0
    inner = np.linspace(1.0001, gamma_0, 200001)
    current = strong * (gamma_0 - inner) * np.sqrt(1.0 - inner**-2)  # for 2 ln(b/a) = 1
    assert current_limit.pipe_limit(gamma_0, strong, 1.0) == pytest.approx(current.max(), rel=1e-8)


def test_synchrotron_tune_by_the_map():
    """General library: the trace of one turn, kick then slip, is 2 cos(2 pi Q_s)."""
    gamma, transition, harmonic, voltage, proton = 1.128, 4.1, 2, 500.0, named("proton")
    beta, slip = sqrt(1.0 - gamma**-2), synchrotron.slip_factor(1.128, 4.1)
    assert slip < 0.0 < synchrotron.slip_factor(2.0 * transition, transition)
    energy = gamma * proton.rest_energy
    kick = proton.charge * voltage / (beta**2 * energy)
    trace = 2.0 - 2.0 * pi * harmonic * abs(slip) * kick
    found = synchrotron.synchrotron_tune(slip, harmonic, voltage, proton.charge, energy, beta)
    assert found == pytest.approx(np.arccos(0.5 * trace) / (2.0 * pi), rel=1e-4)


def test_shift_and_length():
    """Limits: to first order -r/2 and r/4; opposite above transition; nothing left at r = 1."""
    for slip, sign in ((-0.5, -1.0), (0.02, 1.0)):
        assert synchrotron.tune_shift(slip, 1e-4) == pytest.approx(sign * 0.5e-4, rel=1e-4)
        assert synchrotron.lengthening(slip, 1e-4) == pytest.approx(-sign * 0.25e-4, rel=1e-3)
    assert synchrotron.tune_shift(-0.5, 1.0) == -1.0
    assert synchrotron.lengthening(-0.5, 1.0) == np.inf


def test_length_balances_the_envelope():
    """Closed form: (1 - r) sigma = emittance^2 / sigma^3 at rest, r falling as sigma^-3 of a parabolic bunch."""
    share = 0.3
    grown = 1.0 + synchrotron.lengthening(-1.0, share)
    free = 1.0 / grown  # length without space charge, of the unit length with it
    assert (1.0 - share) * 1.0 == pytest.approx(free**4, rel=exact)


def test_share_of_rf():
    """Closed form: slope of V sin(2 pi h z / C) against E_z' C."""
    cavity = 2.0 * pi * 3 * 5e3 / 100.0
    assert synchrotron.share_of_rf(-2.0, 100.0, 3, 5e3) == pytest.approx(2.0 * 100.0 / cavity, rel=exact)


def test_threshold():
    """Scaling: with the square of the spread, inversely with current; form factor as stated."""
    one = synchrotron.threshold_impedance(1.0, 1e-19, 1e-10, 0.9, 0.01, 1e-3)
    assert synchrotron.threshold_impedance(2.0, -1e-19, 1e-10, 0.9, -0.01, 4e-3, 0.65) == pytest.approx(5.2 * one)
    assert one == pytest.approx(0.81e-10 * 0.01 * 1e-6 / 1e-19)


def test_impedance_unit():
    """Limit: short waves on the axis, Z0 / (pi k r^2) at the velocity of light."""
    assert modulation.axis_impedance(1e9, 1e-3, 1.0, 10.0) == pytest.approx(VACUUM_IMPEDANCE / (pi * 1e3), rel=exact)
