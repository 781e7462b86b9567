"""How to compute: which road, how many charges, which seed."""

from dataclasses import dataclass

METHODS = ("superposition", "closed-form")


@dataclass(frozen=True, slots=True)
class Numerics:
    """charges_per_probe for a bunch known as a density; macro_particles and seed where a sample is drawn."""

    charges_per_probe: int = 32768
    macro_particles: int = 131072
    seed: int = 1
    method: str = "superposition"
