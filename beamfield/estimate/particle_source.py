"""A bunch known as particles: its field as clouds, one for each, and the same from half of them and from wider
clouds.
"""

from dataclasses import dataclass
from functools import partial

import numpy as np

from beamfield.beam.particles import MacroParticles
from beamfield.constants import COULOMB, SPEED_OF_LIGHT

NEEDLE = 2.0  # rest-frame aspect beyond which clouds are drawn out to rods
ROD = 0.4  # half length of a rod over the rms length
WIDER = 2.0**0.25  # clouds this much wider double the bias of fourth order
RUN, RUNS, GOLDEN = 64, 32, 0.5 * (5.0**0.5 - 1.0)  # particles kept together in a half, runs at least
TILT = 0.01  # spread of momenta, in units of m c, beyond which each particle keeps its own


@dataclass(frozen=True, slots=True)
class ParticleSource:
    """fields: functions of lab points (3, M) that give lab E (3, M); the first is the answer, the others its
    variants.
    """

    bunch: object

    @property
    def method(self):
        form = f"rods of half length {ROD} rms and" if self.rods else "clouds of"
        size = self.size / self.width
        return f"superposition, {self.bunch.macro.count} {form} fourth order, size {size:.2g} rms"

    @property
    def rods(self):
        return self.bunch.aspect > NEEDLE and not self.own_momenta

    @property
    def own_momenta(self):
        macro = self.bunch.macro
        return macro.momenta is not None and bool(np.any(spread_of(macro) > TILT))

    @property
    def width(self):
        sx, sy, sz = self.bunch.sigma
        across = (sx * sy) ** 0.5
        return across if self.bunch.aspect > NEEDLE else (across**2 * self.bunch.gamma * sz) ** (1.0 / 3.0)

    @property
    def size(self):
        """Softening length [m]: least error for 10^3 ... 10^5 charges drawn from a Gaussian bunch, at random or
        evenly.
        """
        return 0.13 * self.width * (131072.0 / self.bunch.macro.count) ** 0.2

    @property
    def fields(self):
        sum_of = partial(cloud_field, self.bunch)
        whole, half = self.bunch.macro, half_of(self.bunch.macro)
        return (
            partial(sum_of, whole, self.size, self.rods, self.own_momenta),
            partial(sum_of, half, self.size, self.rods, self.own_momenta),
            partial(sum_of, whole, WIDER * self.size, self.rods, self.own_momenta),
        )

    def magnetic(self, points):
        """Lab B (3, M) [T] at lab points (3, M) where particles keep their own momenta; else None."""
        if not self.own_momenta:
            return None
        macro = self.bunch.macro
        return cloud_fields(self.bunch, macro, self.size, macro.momenta, points)[3:] / SPEED_OF_LIGHT


def half_of(macro):
    """Half of the particles: its spread against the whole is the shot noise of the whole.

    Runs of neighbours in the file, taken where the multiples of the golden ratio fall: they cut neither a sorted file
    in two nor one of quasi-random points, of which every other may lie on one side.
    """
    run = min(RUN, max(1, macro.count // RUNS))
    chosen = np.arange(macro.count) // run * GOLDEN % 1.0 < 0.5
    weights = macro.weights[chosen]
    momenta = None if macro.momenta is None else macro.momenta[:, chosen]
    return MacroParticles(macro.positions[:, chosen], weights / weights.sum(), momenta, macro.source)


def spread_of(macro):
    """rms spread of the momenta (3,), the last over gamma as a spread of velocity would show it."""
    mean = macro.momenta @ macro.weights
    spread = np.sqrt(np.square(macro.momenta - mean[:, None]) @ macro.weights)
    return spread / np.array([1.0, 1.0, np.sqrt(1.0 + mean @ mean)])


def cloud_field(bunch, macro, size, rods, own_momenta, points):
    """Lab E (3, M) [V/m] at lab points (3, M) about the centre of a bunch known as particles."""
    from beamfield.kernels import clouds

    points = np.ascontiguousarray(points, float)
    positions = np.ascontiguousarray(macro.positions)
    weights = COULOMB * bunch.charge * macro.weights
    if rods:
        out = np.empty_like(points)
        length = ROD * bunch.gamma * bunch.sigma[2]
        clouds.superpose_rods(points, positions, weights, bunch.gamma, length, size**2, out)
        return bunch.gamma * out
    momenta = macro.momenta if own_momenta else np.array([[0.0], [0.0], [bunch.beta_gamma]])
    return cloud_fields(bunch, macro, size, momenta, points)[:3]


def cloud_fields(bunch, macro, size, momenta, points):
    """Lab E [V/m] and c B [V/m], (6, M), of round clouds, each with its momentum (3, N) or all with one (3, 1)."""
    from beamfield.kernels import clouds

    points, positions = np.ascontiguousarray(points, float), np.ascontiguousarray(macro.positions)
    weights = COULOMB * bunch.charge * macro.weights
    momenta = np.ascontiguousarray(np.broadcast_to(momenta, (3, macro.count)))
    both = np.empty((6, points.shape[1]))
    clouds.superpose_clouds(points, positions, weights, momenta, size**2, both)
    return both
