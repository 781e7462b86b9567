"""Short waves along a round uniform beam: their space-charge impedance and how they oscillate in a drift."""

from math import pi

import numpy as np

from beamfield.constants import VACUUM_IMPEDANCE

_SMALL = 1e-3


def missing_part(x):
    """1 - x K_1(x) [1] for x >= 0, without cancellation; x = k r / gamma."""
    from scipy.special import k1

    x = np.asarray(x, dtype=float)
    near = np.maximum(x, 1e-300)
    series = -0.5 * x * x * (np.log(0.5 * near) + 0.5772156649015329 - 0.5)
    return np.where(x < _SMALL, series, 1.0 - np.maximum(x, _SMALL) * k1(np.maximum(x, _SMALL)))


def axis_impedance(wave_number, radius, beta, gamma):
    """abs(Z) per metre on the axis [ohm/m]: Z0 / (pi beta k r^2) (1 - x K_1(x)), x = k r / gamma; Z itself is i abs(Z).

    wave_number k in the lab, of the beam [1/m]; radius r [m]. Domain: free space, or a wall beyond gamma / k.
    Source: from memory of J. Rosenzweig et al., Space-charge oscillations in a self-modulated electron beam, 1996, and
    Z. Huang et al., Phys. Rev. ST Accel. Beams 7, 074401, 2004, where beta = 1.
    """
    k = np.asarray(wave_number, dtype=float)
    return VACUUM_IMPEDANCE / (pi * beta * k * radius**2) * missing_part(k * radius / gamma)


def oscillation_wave_number(wave_number, radius, current, beta, gamma, characteristic_current):
    """K [1/m] of cos(K s), in which the density wave of a cold beam goes over into one of energy and back.

        K^2 = k I abs(Z) 4 pi / (Z0 I_0 gamma^3 beta^2)

    current I [A]; characteristic_current I_0 = 4 pi eps0 m c^3 / abs(q) [A]. Short waves oscillate at the plasma
    frequency, long ones more slowly; pi / (2 K) turns a density wave wholly into one of energy.
    Source: energy and continuity equations of a cold beam (own derivation).
    """
    impedance = axis_impedance(wave_number, radius, beta, gamma)
    pull = 4.0 * pi / VACUUM_IMPEDANCE * current / characteristic_current * impedance
    return np.sqrt(wave_number * pull / (gamma**3 * beta**2))
