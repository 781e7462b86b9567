"""A background at rest that neutralises part of the bunch: what it leaves of the force across the motion."""

from dataclasses import replace

from beamfield.laws.intensity import neutralised

LONG = 10.0  # rest-frame aspect from which a background of the same section acts as on a long beam
ALONE = "of the bunch alone: the background at rest acts in defocusing, kick and tune shift"
ACROSS_ONLY = "the background at rest is taken to have no field along the motion"


def left_across(bunch, surroundings):
    """Factor on the force across [1], remarks about it, and whether it holds for this bunch."""
    part = surroundings.neutralisation
    if not part:
        return 1.0, (), True
    factor = neutralised(bunch.beta_gamma, part)
    told = f"1 - gamma^2 f = {factor:.6g} of the force is left; it is nought at f = 1/gamma^2 = {bunch.gamma**-2:.6g}"
    if bunch.coasting or bunch.aspect >= LONG:
        return factor, (told,), True
    short = f"only {bunch.aspect:.3g} times longer than wide in its own frame: a background at rest acts otherwise"
    return factor, (told, short), False


def weakened(finding, factor, told, valid):
    """The finding with the background in it, all numbers times the factor that left_across gave."""
    if factor == 1.0 and not told:
        return finding
    closed = None if finding.closed_form is None else factor * finding.closed_form
    remarks, good = (*finding.remarks, *told), finding.valid and valid
    value, doubt = factor * finding.value, abs(factor) * finding.doubt
    return replace(finding, value=value, doubt=doubt, closed_form=closed, remarks=remarks, valid=good)
