"""How far back must the motion have been uniform?"""

from beamfield.estimate.frame import exact
from beamfield.laws.memory import longitudinal_memory, transverse_memory


def memory(bunch, surroundings, ring, numerics):
    """Findings on the distance over which the past of the bunch matters."""
    across = max((bunch.extent(axis) or 2.0 * bunch.sigma[axis]) for axis in (0, 1))
    remarks = ()
    if ring is not None:
        length = transverse_memory(bunch.beta_gamma, across)
        if length > ring.circumference / 6.283185307179586:
            remarks = ("longer than the bending radius of the ring could be: the past was not straight",)
    yield exact("memory_length_transverse", transverse_memory(bunch.beta_gamma, across), remarks)
    if not bunch.coasting:
        half = bunch.extent(2) or 2.0 * bunch.sigma[2]
        yield exact("memory_length_longitudinal", longitudinal_memory(bunch.beta_gamma, 2.0 * half))
