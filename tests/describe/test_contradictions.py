"""Parts of a case that cannot be true together, each with its place and its way out."""

import pytest

from tests.describe.ring_case import BUNCH, FILE, case, fault, faults

COASTING = ("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}")
OUTSIDE = "is outside what is allowed"
EMITTANCE = "  emittance: {x: 2.5 um normalised rms, y: 2.5 um normalised rms}\n"
SIZES = "size: {x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}"


def warnings(*changes, **source):
    return [line for line in case(*changes, **source).warnings if "read and checked" not in line]


ONE_LINE = [  # what is changed; the key, its place, what is said
    (
        [COASTING],
        "bunch.size.z",
        "7:43",
        "a coasting beam has no length; leave it out, or choose another longitudinal shape",
    ),
    (
        [(", z: 120 ns rms", "")],
        "bunch.size.z",
        "7:9",
        "is missing; write 'z: 120 ns rms', or 'z: 0.3 m rms' (or semi, full, fwhm)",
    ),
    (
        [(EMITTANCE, ""), ("x: 6.1 mm rms, ", "")],
        "bunch.size.x",
        "7:9",
        "is missing; write 'x: 6.1 mm rms', or an emittance where optics are known",
    ),
    (
        [("{x: 2.5 um normalised rms, ", "{")],
        "bunch.emittance.x",
        "8:14",
        "is missing; the emittances x and y come together",
    ),
    ([("tune: {x: 4.2,", "tune: {x: 0,")], "ring.tune.x", "16:13", f"'0' {OUTSIDE}: at least 0.001, at most 10000"),
    ([("bunches: 1", "bunches: 1.5")], "ring.bunches", "17:12", "'1.5' is not a whole number"),
    ([("bunches: 1", "bunches: 0")], "ring.bunches", "17:12", f"'0' {OUTSIDE}: at least 1, at most 1000000"),
    (
        [("120 ns", "300 ns")],
        "bunch.size.z",
        "7:43",
        "bunches overlap: one is 187 m long (twice 2 rms), and 1 in 158 m leave 158 m for each",
    ),
    (
        [("radius: 60 mm", "radius: 15 mm")],
        "surroundings.chamber",
        "11:12",
        "the beam does not fit: horizontally 3 rms is 18.3 mm from the axis, the wall 15 mm",
    ),
    (
        [("radius: 60 mm", "half_gap: 14 mm"), ("shape: round", "shape: plates")],
        "surroundings.chamber",
        "11:12",
        "the beam does not fit: vertically 3 rms is 14.7 mm from the axis, the wall 14 mm",
    ),
    (
        [("neutralisation: 0", "neutralisation: 1.5")],
        "surroundings.neutralisation",
        "13:19",
        f"'1.5' {OUTSIDE}: at least 0, at most 1",
    ),
    (
        [("poles: {half_gap: 70 mm}", "cathode: {at: 0 m}")],
        "surroundings.cathode.at",
        "12:17",
        f"'0 m' {OUTSIDE}: at least 1e-09 m, at most 1000 m",
    ),
    (
        [("x: 6.1 mm rms", "x: 6.1 mm full")],
        "bunch.size.x",
        "7:13",
        "'6.1 mm full': a gaussian profile has no edge; write its rms or fwhm size",
    ),
    (
        [("160 MeV kinetic", "160 MeV total")],
        "bunch.energy",
        "4:11",
        "'160 MeV total' is not above the rest energy of proton, 938.272 MeV; "
        "write a larger total energy, or the kinetic one",
    ),
]


@pytest.mark.parametrize(("changes", "key", "place", "said"), ONE_LINE)
def test_one_line(changes, key, place, said):
    assert fault(*changes) == f"{FILE}:{place}: {key}: {said}"


def test_an_emittance_without_optics():
    emittance = "emittance: {x: 1 um geometric rms, y: 1 um geometric rms}"
    lines = faults(("size: {x: 1 mm rms, y: 1 mm rms, z", f"{emittance}\n  size: {{z"), text=BUNCH)
    assert [line.split(": ")[1] for line in lines] == ["bunch.size.x", "bunch.size.y"]
    assert all("an emittance says a size only with ring or beamline.start.beta" in line for line in lines)


def test_an_edge_counts_where_there_is_one():
    """A KV ellipse reaches 2 rms: 12.2 mm fit in 13 mm."""
    assert case(("shape: gaussian", "shape: uniform-cylinder"), ("radius: 60 mm", "radius: 13 mm")).surroundings.chamber
    assert "its edge is 12.2 mm" in fault(
        ("shape: gaussian", "shape: uniform-cylinder"), ("radius: 60 mm", "radius: 12 mm")
    )


@pytest.mark.parametrize(
    ("shape", "keys", "missing", "unwanted"),
    [
        ("round", "half_width: 60 mm, half_height: 60 mm", ["radius"], ["half_width", "half_height"]),
        ("elliptic", "radius: 60 mm", ["half_width", "half_height"], ["radius"]),
        ("rectangular", "half_gap: 60 mm", ["half_width", "half_height"], ["half_gap"]),
        ("plates", "half_gap: 60 mm, radius: 1 m", [], ["radius"]),
    ],
)
def test_a_chamber_has_the_keys_of_its_shape(shape, keys, missing, unwanted):
    lines = faults(("shape: round, radius: 60 mm", f"shape: {shape}, {keys}"))
    assert [line.split(": ")[1].split(".")[-1] for line in lines if "is missing" in line] == missing
    assert [line.split(": ")[1].split(".")[-1] for line in lines if "instead" in line] == unwanted


def test_a_coasting_beam_is_in_one_piece():
    assert "not bunched" in fault(COASTING, (", z: 120 ns rms", ""), ("bunches: 1", "bunches: 2"))


def test_cathode():
    behind = BUNCH + "surroundings: {cathode: {at: 1.5 mm}}\n"
    assert warnings(text=behind) == [
        "surroundings.cathode.at: the bunch reaches through the cathode: 2 rms is 0.002 m behind its centre"
    ]
    assert "reaches through the cathode: its edge" in fault(
        ("gaussian", "uniform-cylinder"), ("z: 1", "z: 2"), text=behind
    )
    coasting = (
        ("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}"),
        (", z: 1 mm rms", ""),
        ("1 nC", "1 A mean"),
    )
    assert "no centre for a cathode" in fault(*coasting, text=behind)


def test_matched_needs_an_emittance():
    matched = BUNCH + "beamline: {start: matched, elements: [drift: {length: 1 m}]}\n"
    assert fault(text=matched).endswith("the matched beam follows from its emittance; add bunch.emittance")


@pytest.mark.parametrize(("tune", "kind"), [("4", "integer"), ("4.5", "half-integer"), ("3.9999", "integer")])
def test_resonant_tunes_are_a_warning(tune, kind):
    assert warnings(("y: 4.3", f"y: {tune}")) == [f"ring.tune.y: {tune} is {kind}: no beam is stable on this resonance"]


def test_dispersion_without_spread_is_a_warning():
    assert warnings(("  momentum_spread: 1.5e-3 rms\n", "")) == [
        "ring.optics.dispersion_x: the dispersion is ignored: without bunch.momentum_spread it widens nothing"
    ]


def test_poles_inside_the_chamber_are_a_warning():
    assert warnings(("half_gap: 70 mm", "half_gap: 50 mm")) == [
        "surroundings.poles.half_gap: the poles stand inside the chamber"
    ]


def test_particle_file_and_sizes(tmp_path):
    (tmp_path / "macro.csv").write_text("x,y,z\n1e-3,0,0\n-1e-3,0,0\n0,2e-3,0\n0,-2e-3,0\n0,0,3\n0,0,-3\n")
    lines = faults(("shape: gaussian", "shape: {particles: macro.csv, transverse: kv}"), folder=tmp_path)
    assert [line.split(": ", 1)[1] for line in lines] == [
        "bunch.shape.transverse: a particle file already says how the charges are spread; keep one of the two",
        *(f"bunch.size.{axis}: the sizes are those of the particle file; leave it out" for axis in "xyz"),
    ]


def test_particle_file_and_energy(tmp_path):
    (tmp_path / "macro.csv").write_text("x,y,z,ux,uy,uz\n1,1,1,0,0,5\n-1,-1,-1,0,0,5\n")
    sizes = "  size: {x: 1 mm rms, y: 1 mm rms, z: 1 mm rms}\n"
    file = ("shape: gaussian", "shape: {particles: macro.csv}"), (sizes, "")
    said = "bunch.energy: comes to gamma beta = 19.975, while the mean uz of the particle file is 5"
    assert warnings(*file, text=BUNCH, folder=tmp_path) == [said]
    assert warnings(*file, ("gamma 20", "gamma 5.1"), text=BUNCH, folder=tmp_path) == []


def test_a_fault_without_a_line_in_a_named_file_is_put_at_its_key(tmp_path):
    path = tmp_path / "macro.csv"
    path.write_text("x,y,z\n1,2,3\n")
    (line,) = faults(("shape: gaussian", "shape: {particles: macro.csv}"), (f"  {SIZES}\n", ""), folder=tmp_path)
    assert line.startswith(f"ring.yaml:6:22: bunch.shape.particles: {path}: ")


def test_a_missing_file_and_the_name_beside_it(tmp_path):
    (tmp_path / "macro.csv").write_text("x,y,z\n")
    line = fault(("shape: gaussian", "shape: {particles: marco.csv}"), folder=tmp_path)
    assert line == (
        "ring.yaml:6:22: bunch.shape.particles: the file 'marco.csv' is not there; did you mean 'macro.csv'?; "
        "names are relative to the case's folder"
    )
    assert "is not a regular file" in fault(("shape: gaussian", "shape: {particles: .}"), folder=tmp_path)


def test_faults_of_a_named_file_keep_their_place(tmp_path):
    path = tmp_path / "macro.csv"
    path.write_text("x,y,z\n1,2,three\n1,2,3\n")
    (line,) = faults(("shape: gaussian", "shape: {particles: macro.csv}"), (f"  {SIZES}\n", ""), folder=tmp_path)
    assert line.startswith(f"{path}:2:")


def test_no_beam_is_a_sheet():
    line = fault(("x: 6.1 mm rms", "x: 6.1 nm rms"))
    assert line == (
        f"{FILE}:7:9: bunch.size: one of x and y is 8.03e+05 times the other; at most 1000, far flatter than any beam"
    )
    assert case(("y: 4.9 mm rms", "y: 6.2 um rms"))
