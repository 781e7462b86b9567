"""How far does the field of the bunch shift the tunes of a ring?"""

from dataclasses import replace

import numpy as np

from beamfield.estimate.background import left_across, weakened
from beamfield.estimate.finding import Finding
from beamfield.estimate.self_force import gradients
from beamfield.laws import intensity
from beamfield.laws.tune import direct_tune_shift

GREAT = 0.1  # shift over tune beyond which the first-order formula is strained
ALONG_TABLE = 16384  # charges a probe where the sizes change from row to row


def tune_shift(bunch, surroundings, ring, numerics):
    """Findings on the direct tune shift."""
    if ring is None:
        return
    *columns, method = focusing_round_the_ring(bunch, ring, numerics)
    for axis, name in enumerate("xy"):
        shifts = [_shift(ring, axis, kappa) for kappa in columns]
        free = _finding(f"tune_shift_{name}", shifts, method)
        yield _small(weakened(free, *left_across(bunch, surroundings)), ring.tune[axis])


def _finding(name, shifts, method):
    value, varied, closed = shifts
    return Finding(name, value, abs(varied - value), closed, method)


def _small(finding, tune):
    if abs(finding.value) <= GREAT * tune:
        return finding
    remark = f"more than {GREAT:.0%} of the tune: first order in the shift no longer holds"
    return replace(finding, remarks=(*finding.remarks, remark), valid=False)


def local_sizes(bunch, optics):
    """rms sizes (x, y) [m] at each row of the optics: from the emittances where a table says how beta runs, else
    constant.
    """
    if bunch.emittance is None or not optics.tabulated:
        return np.tile(np.array(bunch.sigma[:2])[:, None], len(optics.s))
    spread = bunch.momentum_spread or 0.0
    x = np.sqrt(bunch.emittance[0] * optics.beta_x + np.square(optics.dispersion_x * spread))
    return np.stack([x, np.sqrt(bunch.emittance[1] * optics.beta_y)])


def focusing_round_the_ring(bunch, ring, numerics):
    """kappa_x, kappa_y (2, K) at the rows of the optics, the same varied by the doubt, by closed form or None, and
    the method.
    """
    sizes = local_sizes(bunch, ring.optics)
    if ring.optics.tabulated:
        numerics = replace(numerics, charges_per_probe=min(ALONG_TABLE, numerics.charges_per_probe))
    bend = intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    rows = {}
    for size in map(tuple, sizes.T):
        if size not in rows:
            rows[size] = gradients(replace(bunch, sigma=(*size, bunch.sigma[2])), numerics)
    found = [rows[size] for size in map(tuple, sizes.T)]
    value, doubt = (bend * np.array([row[part][:2] for row in found]).T for part in (0, 1))
    closed = None if found[0][2] is None else bend * np.array([row[2][:2] for row in found]).T
    return value, value + np.abs(doubt), closed, found[0][3]


def _shift(ring, axis, kappa):
    if kappa is None:
        return None
    beta = (ring.optics.beta_x, ring.optics.beta_y)[axis]
    return direct_tune_shift(beta, kappa[axis], ring.optics.weights, ring.circumference)
