"""All answers to one case, in the order of the catalogue, and the checks that the tool makes of itself."""

from dataclasses import replace

import numpy as np

from beamfield.constants import VACUUM_PERMITTIVITY
from beamfield.estimate.catalogue import CATALOGUE
from beamfield.estimate.density_source import central_density
from beamfield.estimate.encounter_force import encounter_force
from beamfield.estimate.frame import frame
from beamfield.estimate.image_shift import image_shift
from beamfield.estimate.intensity_limit import intensity_limit
from beamfield.estimate.longitudinal import longitudinal
from beamfield.estimate.past_length import memory
from beamfield.estimate.rms_average import space_charge_ratio
from beamfield.estimate.self_force import self_force
from beamfield.estimate.synchrotron_motion import synchrotron_motion
from beamfield.estimate.train_force import train_force
from beamfield.estimate.tune_shift import tune_shift
from beamfield.laws import intensity

QUESTIONS = (
    *(frame, self_force, space_charge_ratio, tune_shift, image_shift, train_force, encounter_force, memory),
    *(longitudinal, synchrotron_motion, intensity_limit),
)
ASTRAY = 1e-3  # of the density at the centre: a sum that misses it by more is not to be used


def answer(bunch, surroundings, ring, numerics):
    """Findings {name: Finding} of every result that applies to the case; those of a sum that misses Gauss's law are
    not valid.
    """
    found = {finding.name: finding for ask in QUESTIONS for finding in ask(bunch, surroundings, ring, numerics)}
    found = {name: found[name] for name in CATALOGUE if name in found}
    off = 0.0 if bunch.shape is None else _gauss(bunch, found)[0]
    return found if off <= ASTRAY else {name: _astray(finding, off) for name, finding in found.items()}


def checks(bunch, findings):
    """Self-checks ((sentence, passed), ...): Gauss's law ties the three defocusing strengths to the density of the
    centre.
    """
    if bunch.shape is None:
        return ()
    off, doubt = _gauss(bunch, findings)
    names = " + ".join(f"kappa_{finding.name[-1]}" for finding in _kappas(findings))
    sentence = f"{names} = (2 pi / lambda_p)^2 of the density at the centre to {off:.1e}, doubt {doubt:.1e}"
    return ((sentence, off <= doubt + 1e-12),)


def _kappas(findings):
    """The slopes of the field: as strengths they are those of the bunch alone, without background."""
    return [findings[name] for name in ("field_gradient_x", "field_gradient_y", "field_gradient_z") if name in findings]


def _gauss(bunch, findings):
    """How far the strengths are from what the density asks for, and their doubt, both as a part of it."""
    kappas = _kappas(findings)
    bend = intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    wanted = bend * central_density(bunch) * bunch.gamma / VACUUM_PERMITTIVITY
    total, doubt = bend * sum(k.value for k in kappas), bend * float(np.linalg.norm([k.doubt for k in kappas]))
    return abs(total / wanted - 1.0), abs(doubt / wanted)


def _astray(finding, off):
    """The same finding, no longer valid where it is a sum over charges."""
    if not finding.method.startswith("superposition"):
        return finding
    remark = f"the sum misses Gauss's law at the centre by {off:.0e}: more charges_per_probe, or --method closed-form"
    return replace(finding, valid=False, remarks=(*finding.remarks, remark))
