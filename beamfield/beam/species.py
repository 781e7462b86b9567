"""What the bunch is made of."""

from dataclasses import dataclass
from math import pi

from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT, VACUUM_PERMITTIVITY
from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class Species:
    """One kind of particle: mass [kg], charge [C, signed], and nucleons where energies per nucleon make sense."""

    name: str
    mass: float
    charge: float
    nucleons: int | None = None

    def __post_init__(self):
        if not self.mass > 0.0:
            raise NonsenseError(f"a particle of mass {self.mass:g} kg does not exist")
        if not abs(self.charge) > 0.0:
            raise NonsenseError(f"{self.name}: a neutral particle has no field; give a charge state")

    @property
    def charge_state(self):
        """Charge in units of e, signed."""
        return self.charge / ELEMENTARY_CHARGE

    @property
    def rest_energy(self):
        """m c^2 [J]."""
        return self.mass * SPEED_OF_LIGHT**2

    @property
    def characteristic_current(self):
        """4 pi eps0 m c^3 / |q| [A]."""
        return 4.0 * pi * VACUUM_PERMITTIVITY * self.mass * SPEED_OF_LIGHT**3 / abs(self.charge)

    @property
    def classical_radius(self):
        """q^2 / (4 pi eps0 m c^2) [m]."""
        return self.charge**2 / (4.0 * pi * VACUUM_PERMITTIVITY * self.rest_energy)
