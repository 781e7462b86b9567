"""What a map of a bunch holds at its points: field, force and potentials, from the bunch however it is known."""

import numpy as np

from beamfield.constants import COULOMB
from beamfield.errors import InputError
from beamfield.estimate.density_source import density_map
from beamfield.estimate.field_map import co_moving
from beamfield.estimate.particle_source import ROD
from beamfield.estimate.source import source_of
from beamfield.estimate.textbook import closed_field


def bunch_map(bunch, numerics):
    """The evaluate(points (3, K)) -> {name: values} of a field map of a bunch.

    By closed form there are no potentials; a coasting beam has none that vanish far away. InputError where the shape
    has no closed form.
    """
    if numerics.method == "closed-form":
        return lambda points: _values(bunch, _closed(bunch, points), None)
    source = source_of(bunch, numerics)
    if bunch.macro is not None:
        return lambda points: _values(bunch, source.fields[0](points), cloud_potential(source, points))
    return lambda points: _values(bunch, *_density(bunch, source.rule, points))


def cloud_potential(source, points):
    """phi (K,) [V] at lab points (3, K) of a bunch known as particles."""
    from beamfield.kernels import cloud_potential

    bunch, macro = source.bunch, source.bunch.macro
    weights, positions = COULOMB * bunch.charge * macro.weights, np.ascontiguousarray(macro.positions)
    if source.rods:
        out, length = np.empty(points.shape[1]), ROD * bunch.gamma * bunch.sigma[2]
        cloud_potential.potential_of_rods(points, positions, weights, bunch.gamma, length, source.size**2, out)
        return bunch.gamma * out
    momenta = macro.momenta if source.own_momenta else np.array([[0.0], [0.0], [bunch.beta_gamma]])
    momenta = np.ascontiguousarray(np.broadcast_to(momenta, positions.shape))
    both = np.empty((4, points.shape[1]))
    cloud_potential.potential_of_clouds(points, positions, weights, momenta, source.size**2, both)
    return both[0]


def _values(bunch, electric, phi):
    return co_moving(electric, bunch.species.charge, bunch.beta_gamma, phi)


def _density(bunch, rule, points):
    both = density_map(bunch, rule, points)
    return both[:3], None if bunch.coasting else both[3]


def _closed(bunch, points):
    field = closed_field(bunch, points)
    if field is None:
        raise InputError("this bunch has no closed form for its field everywhere; use the superposition")
    return field
