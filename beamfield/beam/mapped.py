"""What can be mapped: name, meaning, unit."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Mapped:
    """name in files; title; SI unit; components, 3 for a vector; powers of m, kg, s, A, K, mol, cd in the unit."""

    name: str
    title: str
    unit: str
    components: int
    powers: tuple[int, ...]

    @property
    def columns(self):
        """One name a component: E_x, E_y, E_z; a scalar keeps its own."""
        return tuple(f"{self.name}_{axis}" for axis in "xyz") if self.components == 3 else (self.name,)


MAPPED = {
    mapped.name: mapped
    for mapped in (
        Mapped("E", "electric field", "V/m", 3, (1, 1, -3, -1, 0, 0, 0)),
        Mapped("B", "magnetic field", "T", 3, (0, 1, -2, -1, 0, 0, 0)),
        Mapped("force", "force on a co-moving particle", "N", 3, (1, 1, -2, 0, 0, 0, 0)),
        Mapped("phi", "scalar potential, Lorenz gauge", "V", 1, (2, 1, -3, -1, 0, 0, 0)),
        Mapped("A", "vector potential, Lorenz gauge", "T m", 3, (1, 1, -2, -1, 0, 0, 0)),
    )
}
