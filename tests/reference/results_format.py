"""JSON Schema of a report as data: what the interface promises to programs that read it.

Written from the promise to users (names, units and meaning of each field), not from the catalogue of the package.
"""

_XY, _XYZ = "xy", "xyz"
UNITS = {
    **dict.fromkeys(("gamma", "beta", "particles", "bunching_factor", "perveance"), "1"),
    "momentum": "eV/c",
    "rigidity": "T m",
    "bunch_charge": "C",
    "peak_current": "A",
    "peak_line_density": "1/m",
    **{f"field_gradient_{i}": "V/m2" for i in _XYZ},
    **{f"defocusing_{i}": "1/m2" for i in _XYZ},
    **{f"peak_field_{i}": "V/m" for i in _XYZ},
    **{f"peak_kick_{i}": "rad/m" for i in _XY},
    "peak_energy_change_z": "eV/m",
    "plasma_wavelength": "m",
    **{f"space_charge_ratio_{i}": "1" for i in _XY},
    **dict.fromkeys(("memory_length_transverse", "memory_length_longitudinal"), "m"),
    **{f"tune_shift_{i}": "1" for i in _XY},
    "train_field_z": "V/m",
    **{f"train_defocusing_{i}": "1/m2" for i in _XYZ},
    **{f"encounter_gradient_{i}": "V/m2" for i in _XY},
    **{f"encounter_kick_{i}": "rad" for i in _XY},
    **{f"encounter_focusing_{i}": "1/m" for i in _XY},
    **{f"beam_beam_tune_shift_{i}": "1" for i in _XY},
    **{f"tune_shift_image_{i}": "1" for i in _XY},
    **{f"coherent_tune_shift_{i}": "1" for i in _XY},
    **{f"tune_spread_{i}": "1" for i in _XY},
    "potential_depression": "V",
    "geometry_factor": "1",
    "longitudinal_impedance_over_n": "ohm",
    "synchrotron_tune_shift": "1",
    **dict.fromkeys(("synchrotron_tune", "bunch_lengthening", "impedance_threshold_ratio"), "1"),
    "impedance_threshold": "ohm",
    "energy_change_per_turn": "eV",
    "limiting_current": "A",
    "cathode_charge_limit": "C",
    **{f"envelope_end_{i}": "m" for i in _XYZ},
    **{f"envelope_max_{i}": "m" for i in _XY},
    **{f"phase_advance_{i}": "deg" for i in _XY},
    **{f"phase_advance_zero_{i}": "deg" for i in _XY},
    **{f"matched_{i}": "m" for i in _XY},
    **{f"emittance_growth_{i}": "1" for i in _XYZ},
}
_TEXT = {"type": "string", "minLength": 1}
_LINES = {"type": "array", "items": _TEXT}
_RESULT = {
    "value": {"type": ["number", "null"]},
    "unit": _TEXT,
    "doubt": {"type": ["number", "null"], "minimum": 0},
    "method": _TEXT,
    "closed_form": {"type": ["number", "null"]},
    "source": _TEXT,
    "valid": {"type": "boolean"},
    "remarks": _LINES,
}


def _object(properties, **more):
    return {
        "type": "object",
        "properties": properties,
        "required": list(properties),
        "additionalProperties": False,
    } | more


def _result(unit):
    """A valid result is a number; one that is not valid has a remark."""
    fits = {
        "if": {"properties": {"valid": {"const": False}}},
        "then": {"properties": {"remarks": {"minItems": 1}}},
        "else": {"properties": {"value": {"type": "number"}, "doubt": {"type": "number"}}},
    }
    return _object(_RESULT | {"unit": {"const": unit}}, **fits)


CASE = _object(
    {
        "beamfield": {"type": "string", "pattern": r"^\d+\.\d+\.\d+$"},
        "case": _TEXT,
        "file": _TEXT,
        "results": {
            "type": "object",
            "properties": {name: _result(unit) for name, unit in UNITS.items()},
            "required": ["gamma", "beta", "momentum", "rigidity", "peak_current", "perveance", "plasma_wavelength"],
            "additionalProperties": False,
        },
        "limits": {
            "type": "array",
            "items": _object({"limit": _TEXT, "value": {"type": ["number", "null"]}, "met": {"type": "boolean"}}),
        },
        "met": {"type": "boolean"},
        "warnings": _LINES,
    }
)
CASES = {"type": "array", "items": CASE, "minItems": 2}
