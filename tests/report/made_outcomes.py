"""Outcomes put together by hand, so that pages can be read without computing anything. No number here is physics."""

from dataclasses import replace

from beamfield.beam.bunch import Bunch
from beamfield.beam.shape import SHAPES
from beamfield.beam.species import Species
from beamfield.constants import ELEMENTARY_CHARGE, PROTON_MASS
from beamfield.estimate.finding import Finding
from beamfield.judge.limit import Limit, judge
from beamfield.judge.outcome import Outcome

SUMMED = "superposition, 32768 charges a probe"
PROTON = Species("proton", PROTON_MASS, ELEMENTARY_CHARGE)
BUNCH = Bunch(
    PROTON,
    0.6083,
    3.5e12,
    (6.1e-3, 4.9e-3, 18.7),
    SHAPES["gaussian"],
    emittance=(4.11e-6, 4.11e-6),
    momentum_spread=1.5e-3,
)

_FINDINGS = (
    Finding("gamma", 1.1705261, 0.0, None, "kinematics"),
    Finding("momentum", 570.8e6, 0.0, None, "kinematics"),
    Finding("particles", 3.5e12, 0.0, None, "kinematics"),
    Finding("bunch_charge", 5.6076e-7, 0.0, None, "kinematics"),
    Finding("perveance", 3.4123e-9, 0.0, 3.4123e-9, "closed form"),
    Finding("field_gradient_x", 412345.678, 0.08, 412345.7, SUMMED),
    Finding("field_gradient_y", 512345.678, 51.0, 514345.7, SUMMED, ("the chamber is near: images change it",)),
    Finding("peak_field_x", 2512.345, 0.5, None, SUMMED, ("no textbook value for this shape",)),
    Finding("peak_field_y", 2712.345, 0.5, None, SUMMED, ("no textbook value for this shape",)),
    Finding("tune_shift_x", -0.2013456, 2e-7, -0.2013455, SUMMED),
    Finding("tune_shift_y", -0.2430518, 2e-7, -0.2430517, SUMMED),
    Finding(
        "memory_length_longitudinal",
        78.8,
        0.0,
        None,
        "closed form",
        ("longer than the ring has straights",),
        valid=False,
    ),
)
FINDINGS = {finding.name: finding for finding in _FINDINGS}


def limit(text, result, comparison, bound, absolute=True):
    return Limit(text, result, absolute, comparison, bound)


MET = judge(limit("|tune_shift_y| < 0.25", "tune_shift_y", "<", 0.25), -0.2430518)
BROKEN = judge(limit("|tune_shift_x| < 0.2", "tune_shift_x", "<", 0.2), -0.2013456)
CLOSE = judge(limit("|field_gradient_x| > 412345.7 V/m2", "field_gradient_x", ">", 412345.7), 412345.678)

RING = Outcome(
    title="Injection plateau, nominal fill",
    file="ring.yaml",
    findings=FINDINGS,
    verdicts=(MET,),
    warnings=("the footprint reaches the half integer",),
    checks=(("kappa_x + kappa_y + kappa_z = (2 pi / lambda_p)^2 to 3e-9", True),),
    bunch=BUNCH,
)
OVERFULL = replace(RING, title="Injection plateau, twice the fill", file="overfull.yaml", verdicts=(MET, BROKEN, CLOSE))
BARE = Outcome("A case without limits", "bare.yaml", {})
