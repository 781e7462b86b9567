"""A case as a whole: what becomes of each word, and where it stood."""

import pickle
from dataclasses import FrozenInstanceError
from math import hypot, inf, sqrt

import numpy as np
import pytest

from beamfield.beam.beamline import Drift, Gap, Quadrupole, Solenoid
from beamfield.beam.shape import SHAPES
from beamfield.beam.species_table import isotope, named
from beamfield.beam.surroundings import Chamber, Surroundings
from beamfield.constants import ATOMIC_MASS, ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.describe.case import build, load, parse
from beamfield.describe.located import read
from beamfield.errors import InputError
from tests.describe.ring_case import BUNCH, TEXT, case, fault

ROUNDING = 4e-16
COASTING = {"transverse": "kv", "longitudinal": "coasting"}


def test_everything_is_read():
    whole = case()
    assert whole.title == "Injection plateau, nominal fill"
    assert whole.file == "ring.yaml"
    assert whole.bunch.species == named("proton")
    assert whole.bunch.particles == 3.5e12
    assert whole.bunch.shape == SHAPES["gaussian"]
    assert whole.bunch.sigma[:2] == (0.0061, 0.0049)
    assert whole.bunch.sigma[2] == pytest.approx(120e-9 * whole.bunch.beta * SPEED_OF_LIGHT, rel=ROUNDING)
    assert whole.bunch.emittance == pytest.approx((2.5e-6 / whole.bunch.beta_gamma,) * 2, rel=ROUNDING)
    assert whole.bunch.momentum_spread == 1.5e-3
    assert whole.surroundings == Surroundings(Chamber("round", 0.06, 0.06), 0.07, None, 0.0)
    assert (whole.ring.circumference, whole.ring.tune, whole.ring.bunches) == (158.0, (4.2, 4.3), 1)
    assert (whole.ring.optics.beta_x, whole.ring.optics.dispersion_x) == (16.0, 2.7)
    assert [limit.text for limit in whole.limits] == ["|tune_shift_y| < 0.25", "defocusing_x < 0.02 1/m2"]
    assert (whole.limits[1].line, whole.limits[1].column) == (29, 5)
    assert whole.numerics.method == "superposition"


def test_beamline():
    line = case().beamline
    assert line.elements == (Drift(0.5), Quadrupole(0.1, 12.0), Solenoid(0.2, 0.15), Gap(120e3, 200e6, -np.pi / 2))
    assert (line.start.beta, line.start.alpha, line.repeat) == ((8.0, 6.0), (0.0, 0.0), 20)
    assert line.length == pytest.approx(16.0, rel=ROUNDING)
    assert case(("start: {beta_x: 8 m, alpha_x: 0, beta_y: 6 m, alpha_y: 0}", "start: matched")).beamline.start is None


def test_beta_left_out_of_a_start_is_that_of_size_and_emittance():
    whole = case(("{beta_x: 8 m, alpha_x: 0, ", "{"))
    assert whole.beamline.start.beta == (whole.bunch.sigma[0] ** 2 / whole.bunch.emittance[0], 6.0)


def test_places_and_tolerances():
    whole = case(("3.5e12 particles", "1.2 ± 0.1 nC"), ("4.9 mm rms", "4.9 ± 0.2 mm rms"))
    assert whole.places["bunch.size.x"] == (7, 13)
    assert whole.places["beamline.elements[1].quadrupole.gradient"] == (23, 45)
    assert whole.tolerances == {"bunch.intensity": 1e-10, "bunch.size.y": 2e-4}
    assert whole.quantities["bunch.intensity"].number == 1.2


def test_a_case_is_immutable_and_travels():
    whole = case()
    with pytest.raises(FrozenInstanceError):
        whole.title = "another"
    assert pickle.loads(pickle.dumps(whole)).bunch == whole.bunch  # noqa: S301, a worker's own case


def test_a_short_case():
    whole = parse(BUNCH)
    assert (whole.ring, whole.beamline, whole.limits, whole.warnings) == (None, None, (), ())
    assert (whole.title, whole.file) == ("<text>", "<text>")
    assert whole.surroundings == Surroundings()
    assert whole.bunch.charge == pytest.approx(-1e-9, rel=ROUNDING)


def test_load(tmp_path):
    path = tmp_path / "plateau.yaml"
    path.write_text(BUNCH, encoding="utf-8")
    assert load(path).title == "plateau"
    assert load(str(path)).file == str(path)


@pytest.mark.parametrize("name", ["missing.yaml", ".", "nul\x00"])
def test_no_such_file(tmp_path, name):
    with pytest.raises(InputError, match="cannot be read"):
        load(tmp_path / name)


def test_a_file_too_large(tmp_path):
    path = tmp_path / "large.yaml"
    path.write_bytes(b"#" * 1_000_001)
    with pytest.raises(InputError, match="larger than 1000000 bytes"):
        load(path)


def test_varied():
    whole = case()
    other = whole.varied({"bunch.intensity": "2e11 particles", "numerics.method": "closed-form"})
    assert (other.bunch.particles, other.numerics.method) == (2e11, "closed-form")
    assert whole.bunch.particles == 3.5e12
    with pytest.raises(InputError, match=r"ring\.yaml:5:14: bunch\.intensity: '2e11' has no unit"):
        whole.varied({"bunch.intensity": "2e11"})


def test_build_takes_a_tree():
    assert build(read(TEXT), "ring.yaml").bunch == case().bunch


@pytest.mark.parametrize(
    ("words", "species"),
    [("electron", named("electron")), ("H-", named("H-")), ("{isotope: Ar-40, charge_state: 8}", isotope("Ar-40", 8))],
)
def test_species(words, species):
    assert case(("proton", words)).bunch.species == species


@pytest.mark.parametrize(
    ("mass", "kilograms"), [("938.272 MeV/c2", None), ("2 u", 2 * ATOMIC_MASS), ("3e-27 kg", 3e-27)]
)
def test_mass(mass, kilograms):
    species = case(("proton", f"{{mass: {mass}, charge_state: -2}}")).bunch.species
    expected = kilograms or 938.272e6 * ELEMENTARY_CHARGE / SPEED_OF_LIGHT**2
    assert species.mass == pytest.approx(expected, rel=ROUNDING)
    assert species.charge == -2 * ELEMENTARY_CHARGE
    assert species.nucleons is None


@pytest.mark.parametrize(
    ("words", "message"),
    [
        ("protn", "3:12: bunch.species: 'protn' is no species here; did you mean 'proton'?"),
        ("{isotope: Ar-40}", "3:12: bunch.species.charge_state: is missing"),
        ("{charge_state: 1}", "3:12: bunch.species: takes either an isotope or a mass"),
        ("{mass: 1 u, isotope: H-1, charge_state: 1}", "3:12: bunch.species: takes either an isotope or a mass"),
        ("{mass: 1 u, charge_state: 0}", "3:38: bunch.species.charge_state: '0': a neutral particle has no field"),
        (
            "{mass: 1 mg, charge_state: 1}",
            "3:19: bunch.species.mass: '1 mg' is outside what is allowed: at least 1e-36 kg",
        ),
        ("{isotope: Ar-40, charge_state: 19}", "3:22: bunch.species.isotope: no ion of Ar has charge state 19"),
        ("{isotope: Ar-400, charge_state: 8}", "3:22: bunch.species.isotope: no Ar-400"),
    ],
)
def test_no_species(words, message):
    assert fault(("proton", words)).startswith(f"ring.yaml:{message}")


def test_size_from_emittance_and_ring():
    """sigma^2 = beta eps + (D dp/p)^2: from memory of any text on linear optics."""
    whole = case(("x: 6.1 mm rms, y: 4.9 mm rms, ", ""))
    eps = 2.5e-6 / whole.bunch.beta_gamma
    assert whole.bunch.sigma[0] == pytest.approx(hypot(sqrt(16.0 * eps), 2.7 * 1.5e-3), rel=ROUNDING)
    assert whole.bunch.sigma[1] == pytest.approx(sqrt(16.0 * eps), rel=ROUNDING)


def test_size_from_emittance_and_smooth_ring():
    whole = case(
        ("x: 6.1 mm rms, y: 4.9 mm rms, ", ""), ("  optics: {beta_x: 16 m, beta_y: 16 m, dispersion_x: 2.7 m}\n", "")
    )
    beta = 158.0 / (2 * np.pi * 4.3)
    assert whole.bunch.sigma[1] == pytest.approx(sqrt(beta * 2.5e-6 / whole.bunch.beta_gamma), rel=ROUNDING)


def test_size_from_emittance_and_start():
    ring = TEXT[TEXT.index("ring:\n") : TEXT.index("beamline:\n")]
    whole = case((ring, ""), ("x: 6.1 mm rms, y: 4.9 mm rms, ", ""), ('  - "|tune_shift_y| < 0.25"\n', ""))
    assert whole.bunch.sigma[0] == pytest.approx(sqrt(8.0 * 2.5e-6 / whole.bunch.beta_gamma), rel=ROUNDING)


def test_size_from_emittance_and_table(tmp_path):
    """The mean of beta is that of the trapezoidal rule round the ring: (10 + 20) / 2 for two places opposite."""
    (tmp_path / "optics.csv").write_text(
        "s,beta_x,beta_y,dispersion_x\n0,10,20,1\n39.5,15,15,1\n79,20,10,1\n118.5,15,15,1\n"
    )
    optics = ("{beta_x: 16 m, beta_y: 16 m, dispersion_x: 2.7 m}", "optics.csv")
    whole = case(optics, ("x: 6.1 mm rms, y: 4.9 mm rms, ", ""), folder=tmp_path)
    assert whole.ring.optics.tabulated
    assert whole.bunch.sigma[1] == pytest.approx(sqrt(15.0 * 2.5e-6 / whole.bunch.beta_gamma), rel=ROUNDING)


def test_coasting():
    whole = case(("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}"), (", z: 120 ns rms", ""))
    assert whole.bunch.coasting
    assert whole.bunch.sigma[2] == inf
    assert whole.bunch.line_density == pytest.approx(3.5e12 / 158.0, rel=ROUNDING)
    assert whole.bunch.particles == pytest.approx(3.5e12, rel=ROUNDING)


def test_macro_particles(tmp_path):
    (tmp_path / "macro.csv").write_text("x,y,z\n1e-3,0,0\n-1e-3,0,0\n0,2e-3,0\n0,-2e-3,0\n0,0,3\n0,0,-3\n")
    words = (
        ("shape: gaussian", "shape: {particles: macro.csv}"),
        ("  size: {x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}\n", ""),
    )
    whole = case(*words, folder=tmp_path)
    assert whole.bunch.shape is None
    assert whole.bunch.sigma == pytest.approx((1e-3 / sqrt(3), 2e-3 / sqrt(3), sqrt(3)), rel=ROUNDING)
    assert whole.bunch.emittance == case().bunch.emittance
    assert "a particle file does not say what '95%' holds" in fault(
        ("y: 2.5 um normalised rms", "y: 2.5 um normalised 95%"), *words, folder=tmp_path
    )
    assert whole.bunch.macro is case(*words, folder=tmp_path).bunch.macro, "a file that did not change is read once"


def test_warnings_of_what_is_read_and_not_used():
    assert [warning.split(":")[0] for warning in case().warnings] == ["beamline"]
    assert not parse(BUNCH + "surroundings: {cathode: {at: 20 mm}}\n").warnings
    whole = parse(BUNCH + "surroundings: {chamber: {shape: round, radius: 60 mm}, poles: {half_gap: 70 mm}}\n")
    assert [warning.split(":")[0] for warning in whole.warnings] == ["surroundings.chamber", "surroundings.poles"]
