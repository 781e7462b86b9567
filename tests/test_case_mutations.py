"""Whatever is done to a case, it is evaluated or refused, every fault at its place: no crash, no warning, no traceback.

Evaluated by the textbook road, for speed; the warnings of a number that overflows would be errors here.
"""

import json
import re
from math import isfinite

import pytest
from hypothesis import HealthCheck, example, given, settings
from hypothesis import strategies as st

from beamfield import api
from beamfield.cli.entry import main
from beamfield.describe.case import parse
from tests.describe.ring_case import TEXT, complaints
from tests.mutated_cases import FOLDER, mutated_cases

pytestmark = pytest.mark.large
FILE = "case.yaml"
PLACED = re.compile(r"\S+:[1-9]\d*:[1-9]\d*: \S.+")
unhurried = settings(
    derandomize=True, database=None, deadline=None, suppress_health_check=[HealthCheck.function_scoped_fixture]
)


def refused_or_evaluated(text):
    """Outcome of a text, or None where it is refused with every fault located."""
    faults = complaints(parse, text, FILE, FOLDER)
    for fault in faults:
        assert fault.file
        assert fault.message.strip()
        assert (fault.line >= 1 and fault.column >= 1) or fault.file != FILE
    return None if faults else api.evaluate(parse(text, FILE, FOLDER), "closed-form")


@settings(unhurried, max_examples=250)
@given(mutated_cases())
def test_any_mutation_is_evaluated_or_refused(text):
    outcome = refused_or_evaluated(text)
    if outcome is None:
        return
    for finding in outcome.findings.values():
        assert isfinite(finding.value) or not finding.valid, finding
        assert finding.doubt >= 0.0 or not finding.valid, finding
        assert finding.valid or finding.remarks, finding
    assert max(map(len, api.report_page([outcome]).splitlines())) <= 110
    assert json.loads(api.report_page([outcome], "json"))["results"].keys() == outcome.findings.keys()


@settings(unhurried, max_examples=60)
@given(st.one_of(mutated_cases().map(lambda text: text.encode("utf-8", "surrogatepass")), st.binary(max_size=200)))
@example(b"")
@example(b"\x00")
@example(b"\xff\xfe\x00b")
def test_through_the_command_line_it_ends_well(tmp_path, capsys, data):
    (tmp_path / FILE).write_bytes(data)
    page = tmp_path / "page.txt"
    page.unlink(missing_ok=True)
    code = main(["report", str(tmp_path / FILE), "--method", "closed-form", "-o", str(page)])
    out, err = capsys.readouterr()
    assert code in (0, 2, 3)
    assert not out
    assert page.exists() == (code != 2)
    assert bool(err) == (code == 2)
    assert all(line.startswith(str(tmp_path)) for line in err.splitlines())


BAD = {  # what is done to the case: what is replaced by what, where the fault stands, what the way out says
    "a size without its word": ("6.1 mm rms", "6.1 mm", "7:13", "write '6.1 mm rms' (or semi, full, fwhm)"),
    "the edge of what has none": ("6.1 mm rms", "6.1 mm full", "7:13", "write its rms or fwhm"),
    "an emittance half said": ("x: 2.5 um normalised rms", "x: 2.5 um rms", "8:18", "normalised rms' (or geometric)"),
    "a pi": ("x: 2.5 um", "x: 2.5 pi mm mrad", "8:18", "write the emittance as '2.5 mm mrad"),
    "a decimal comma": ("3.5e12", "3,5e12", "5:14", "decimals begin with a point"),
    "a thousands comma": ("3.5e12", "3,500,000", "5:14", "write '3500000'"),
    "mev": ("160 MeV", "160 mev", "4:11", "did you mean 'MeV'?"),
    "meV": ("160 MeV", "160 meV", "4:11", "did you mean 'MeV'?"),
    "too little in all": ("160 MeV kinetic", "900 MeV total", "4:11", "write a larger total energy, or the kinetic"),
    "gamma below one": ("160 MeV kinetic", "gamma 0.9", "4:11", "gamma is above 1"),
    "no size": ("6.1 mm rms", "0 mm rms", "7:13", "at least 1e-12 m"),
    "a negative size": ("6.1 mm rms", "-6.1 mm rms", "7:13", "at least 1e-12 m"),
    "a size that is none": ("6.1 mm rms", "nan mm rms", "7:13", "write a finite one"),
    "too small a size": ("6.1 mm rms", "1e-300 m rms", "7:13", "at least 1e-12 m"),
    "too large a size": ("6.1 mm rms", "1e300 m rms", "7:13", "at most 10000 m"),
    "no number at all": ("6.1 mm rms", "1e400 m rms", "7:13", "check the exponent"),
    "a key twice": ("  shape: gaussian\n", "  shape: gaussian\n  shape: kv\n", "7:3", "first in line 6"),
    "a tab": ("  energy", "\tenergy", "4:1", "spaces"),
    "a limit on nothing": ("|tune_shift_y| <", "|tune_shift_w| <", "28:5", "did you mean 'tune_shift_y'?"),
    "code": ("|tune_shift_y| < 0.25", "__import__('os').getcwd() < 1", "28:5", "a limit is RESULT < NUMBER"),
    "more code": ("|tune_shift_y| < 0.25", "tune_shift_y < (1).real", "28:5", "does not begin with a number"),
    "a limit without unit": ("< 0.02 1/m2", "< 0.02", "29:5", "write 'defocusing_x < 0.02 1/m2'"),
    "1e15 charges": ("3.5e12", "1e15", "5:14", "below 1e+15 particles"),
    "a file that is not there": ("shape: gaussian", "shape: {particles: gone.csv}", "6:22", "relative to the case's"),
    "a tune of zero": ("x: 4.2,", "x: 0,", "16:13", "at least 0.001"),
    "a chamber inside the beam": ("radius: 60 mm", "radius: 16 mm", "11:12", "the beam does not fit"),
    "a species with no charge": ("proton", "{isotope: Fe-56, charge_state: 0}", "3:22", "from 1 to 26"),
    "a tag": ("title: ", "title: !!python/name:os.system ", "1:8", "write the value alone"),
    "an anchor": ("title: ", "title: &a ", "1:8", "write the value where it is needed"),
    "a sheet": ("y: 4.9 mm", "y: 4.9 nm", "7:9", "far flatter than any beam"),
}


def complaint(tmp_path, capsys, data):
    """The one line that a case of some bytes is refused with, without its folder."""
    (tmp_path / FILE).write_bytes(data)
    assert main(["report", str(tmp_path / FILE), "-o", str(tmp_path / "page.txt")]) == 2
    out, err = capsys.readouterr()
    assert not out
    assert [path.name for path in tmp_path.iterdir()] == [FILE]
    (line,) = err.splitlines()
    assert PLACED.fullmatch(line), line
    return line.removeprefix(f"{tmp_path}/{FILE}:")


@pytest.mark.parametrize(("old", "new", "place", "way_out"), BAD.values(), ids=BAD)
def test_a_bad_case_is_one_line_with_its_place_and_a_way_out(tmp_path, capsys, old, new, place, way_out):
    assert old in TEXT
    line = complaint(tmp_path, capsys, TEXT.replace(old, new, 1).encode())
    assert line.startswith(f"{place}: ")
    assert way_out in line


@pytest.mark.parametrize(
    ("data", "said"),
    [
        (b"", "is empty; 'beamfield new' prints a case"),
        (b"# only words\n", "is empty"),
        (bytes(range(256)), "this is not UTF-8 text"),
        (b"PK\x03\x04" + bytes(64), "U+0003 has no place in a case"),
        (b"\xff\xfeb\x00", "this is UTF-16"),
        (b"bunch: " + b"[" * 5000, "deeper than any case is"),
        (b"bunch: " + b"{a: " * 5000, "deeper than any case is"),
        (b"a: " * 5000, "not YAML"),
        (b"- bunch\n", "a list cannot stand here"),
        (b"42\n", "cannot stand here"),
        (b"#" * 2_000_000, "1000000 bytes"),
        ("\u202ebunch: 1\n".encode(), r"\u202e"),
        (b"---\ntitle: a\n---\ntitle: b\n", "a second document"),
    ],
)
def test_what_is_no_case_at_all_is_one_line(tmp_path, capsys, data, said):
    assert said in complaint(tmp_path, capsys, data)


FAR = {  # as far as the door lets a case go, and beyond: each is refused at its place, or a number
    "slowest": ("160 MeV kinetic", "1e-5 eV kinetic"),
    "fastest": ("160 MeV kinetic", "gamma 1e9"),
    "beyond": ("160 MeV kinetic", "1e300 GeV kinetic"),
    "gamma a hair above one": ("160 MeV kinetic", "gamma 1.0000000000000002"),
    "one particle": ("3.5e12 particles", "1 particles"),
    "least charge": ("3.5e12 particles", "1e-300 nC"),
    "a needle": ("z: 120 ns rms", "z: 30 m rms"),
    "a pancake": ("z: 120 ns rms", "z: 1e-12 m rms"),
    "a point": ("{x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}", "{x: 1 pm rms, y: 1 pm rms, z: 1 pm rms}"),
    "a mist": ("{x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}", "{x: 10 mm rms, y: 10 mm rms, z: 1e4 m rms}"),
    "a sharp beam": ("x: 2.5 um normalised", "x: 1e-18 m geometric"),
    "a large tune": ("x: 4.2,", "x: 1e4,"),
    "a small tune": ("x: 4.2,", "x: 1e-300,"),
    "heavy": ("proton", "{mass: 1e-18 kg, charge_state: 1}"),
    "light": ("proton", "{mass: 1e-36 kg, charge_state: 1000}"),
    "neutralised": ("neutralisation: 0", "neutralisation: 1"),
    "hardly neutralised": ("neutralisation: 0", "neutralisation: 1e-300"),
    "a limit of all": ("< 0.25", "< 1e308"),
}


@pytest.mark.parametrize(("old", "new"), FAR.values(), ids=FAR)
@pytest.mark.parametrize("shape", ["gaussian", "uniform-ellipsoid", "{transverse: kv, longitudinal: parabolic}"])
def test_far_out_it_is_refused_or_a_number(old, new, shape):
    assert old in TEXT
    outcome = refused_or_evaluated(TEXT.replace(old, new).replace("shape: gaussian", f"shape: {shape}"))
    for finding in outcome.findings.values() if outcome else ():
        assert isfinite(finding.value) or not finding.valid, finding


@pytest.mark.parametrize("kind", ["optics", "particles"])
@settings(unhurried, max_examples=60)
@given(data=st.data())
def test_tables_with_anything_in_them(tmp_path, kind, data):
    tables = {
        "optics": ("s,beta_x,beta_y,dispersion_x\n" + "".join(f"{8 * i}.0,16.1,15.9,2.7\n" for i in range(20))),
        "particles": ("x,y,z,weight\n" + "".join(f"{i % 3}e-3,{i % 5}e-3,{i % 7}e-1,1.5\n" for i in range(30))),
    }
    text = tables[kind]
    for _ in range(data.draw(st.integers(1, 3))):
        place = data.draw(st.integers(0, len(text)))
        sign = data.draw(
            st.sampled_from(["", ",", "e", "-", "9", "nan", "inf", "\n", "#", '"', "1e300", "\0"]) | st.text(max_size=2)
        )
        text = text[:place] + sign + text[place + data.draw(st.integers(0, 3)) :]
    (tmp_path / "table.csv").write_bytes(text.encode("utf-8", "surrogatepass"))
    case = {
        "optics": TEXT.replace("{beta_x: 16 m, beta_y: 16 m, dispersion_x: 2.7 m}", "table.csv"),
        "particles": TEXT.replace("shape: gaussian", "shape: {particles: table.csv}").replace(
            "  size: {x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}\n", ""
        ),
    }[kind]
    for fault in complaints(parse, case, FILE, tmp_path):
        assert fault.file
        assert fault.message.strip()
