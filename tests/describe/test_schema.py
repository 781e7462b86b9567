"""The JSON Schema against the specification of its draft, and against cases that load."""

import json

import pytest
import yaml
from jsonschema import Draft7Validator

from beamfield.describe.schema import schema
from beamfield.describe.starter import KINDS_OF_CASE, starter
from beamfield.describe.vocabulary import KEYS
from tests.describe.ring_case import BUNCH, TEXT, changed

VALIDATOR = Draft7Validator(schema())


def complaints(text):
    return ["/".join(map(str, error.path)) for error in VALIDATOR.iter_errors(yaml.safe_load(text))]


def test_it_is_a_schema():
    Draft7Validator.check_schema(schema())
    assert json.loads(json.dumps(schema())) == schema()


@pytest.mark.parametrize("text", [TEXT, BUNCH, *map(starter, KINDS_OF_CASE)])
def test_cases_that_load_are_valid(text):
    assert complaints(text) == []


@pytest.mark.parametrize(
    ("change", "where"),
    [
        (("x: 6.1 mm rms", "x: 6.1 mm"), "bunch/size/x"),
        (("x: 6.1 mm rms", "x: 6.1"), "bunch/size/x"),
        (("160 MeV kinetic", "160 MeV"), "bunch/energy"),
        (("2.5 um normalised rms, y", "2.5 um rms, y"), "bunch/emittance/x"),
        (("  species", "  specis"), "bunch"),
        (("circumference: 158 m", "circumference: 158"), "ring/circumference"),
        (("  circumference: 158 m\n", ""), "ring"),
        (("seed: 1", "seed: 1.5"), "numerics/seed"),
        (("seed: 1", "seed: -1"), "numerics/seed"),
        (("method: superposition", "method: guess"), "numerics/method"),
        (("shape: round", "shape: oval"), "surroundings/chamber/shape"),
        (("    - drift: {length: 0.5 m}", "    - drift: {length: 0.5 m}\n      gap: {}"), "beamline/elements/0"),
    ],
)
def test_editors_complain(change, where):
    assert where in complaints(changed(change))


def test_every_key_says_what_it_is():
    for key in KEYS.values():
        assert key.says.endswith("."), key.path
        assert key.example or not key.scalar, key.path


@pytest.mark.parametrize("shape", ["gaussian", "{transverse: kv, longitudinal: uniform}", "{particles: macro.csv}"])
def test_a_word_or_a_section(shape):
    assert complaints(changed(("shape: gaussian", f"shape: {shape}"))) == []
