"""All answers to one case, in the order of the catalogue, and the checks that the tool makes of itself."""

import numpy as np

from beamfield.constants import VACUUM_PERMITTIVITY
from beamfield.estimate.catalogue import CATALOGUE
from beamfield.estimate.density_source import central_density
from beamfield.estimate.frame import frame
from beamfield.estimate.image_shift import image_shift
from beamfield.estimate.past_length import memory
from beamfield.estimate.rms_average import space_charge_ratio
from beamfield.estimate.self_force import self_force
from beamfield.estimate.tune_shift import tune_shift
from beamfield.laws import intensity

QUESTIONS = (frame, self_force, space_charge_ratio, tune_shift, image_shift, memory)


def answer(bunch, surroundings, ring, numerics):
    """Findings {name: Finding} of every result that applies to the case."""
    found = {finding.name: finding for ask in QUESTIONS for finding in ask(bunch, surroundings, ring, numerics)}
    return {name: found[name] for name in CATALOGUE if name in found}


def checks(bunch, findings):
    """Self-checks ((sentence, passed), ...): Gauss's law ties the three defocusing strengths to the density of the
    centre.
    """
    if bunch.shape is None:
        return ()
    kappas = [findings[name] for name in ("defocusing_x", "defocusing_y", "defocusing_z") if name in findings]
    density = central_density(bunch) * bunch.gamma
    bend = intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    wanted = bend * density / VACUUM_PERMITTIVITY
    total, doubt = sum(k.value for k in kappas), float(np.linalg.norm([k.doubt for k in kappas]))
    off = abs(total / wanted - 1.0)
    names = " + ".join(f"kappa_{finding.name[-1]}" for finding in kappas)
    sentence = f"{names} = (2 pi / lambda_p)^2 of the density at the centre to {off:.1e}, doubt {doubt / wanted:.1e}"
    return ((sentence, off <= doubt / wanted + 1e-12),)
