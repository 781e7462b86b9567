"""How much current a pipe, a diode or a cathode lets go."""

from math import pi, sqrt

import numpy as np

from beamfield.constants import SPEED_OF_LIGHT, VACUUM_PERMITTIVITY

_NODES, _WEIGHTS = np.polynomial.legendre.leggauss(40)


def pipe_limit(gamma, characteristic_current, factor):
    """Largest steady current through a pipe [A]: I_0 (gamma^(2/3) - 1)^(3/2) / (1 + 2 ln(b/a)).

    gamma                   at the wall's potential, before the depression            [1]
    characteristic_current  I_0 = 4 pi eps0 m c^3 / abs(q)                            [A]
    factor                  1 + 2 ln(b/a) of a uniform round beam; that of its profile otherwise  [1]

    Domain: long beam, kept straight by a strong field along; exact for a thin hollow beam without the 1, an
    interpolation good to some per cent for a solid one; b not much larger than a.
    Source: L. S. Bogdankevich and A. A. Rukhadze, Sov. Phys. Usp. 14, 163, 1971, from memory of it.
    """
    return characteristic_current * (gamma ** (2.0 / 3.0) - 1.0) ** 1.5 / factor


def diode_limit(voltage, gap, charge, mass):
    """Largest current density across a plane gap, slow particles [A/m^2]: (4 eps0 / 9) sqrt(2 q / m) V^1.5 / d^2.

    voltage V [V], gap d [m], charge [C], mass [kg].
    Sources: C. D. Child, Phys. Rev. 32, 492, 1911; I. Langmuir, Phys. Rev. 2, 450, 1913; from memory of them.
    """
    return 4.0 / 9.0 * VACUUM_PERMITTIVITY * sqrt(2.0 * abs(charge) / mass) * voltage**1.5 / gap**2


def fast_diode_limit(voltage, gap, charge, mass):
    """The same for any speed [A/m^2]: eps0 m c^3 / (2 q d^2) [integral_1^gamma du / (u^2 - 1)^(1/4)]^2.

    Source: H. R. Jory and A. W. Trivelpiece, J. Appl. Phys. 40, 3924, 1969, from memory of it; with u - 1 = t^4 the
    integrand 4 t^2 / (t^4 + 2)^(1/4) is smooth.
    """
    end = (abs(charge) * voltage / (mass * SPEED_OF_LIGHT**2)) ** 0.25
    t = 0.5 * end * (_NODES + 1.0)
    total = 0.5 * end * float(_WEIGHTS @ (4.0 * t * t / (t**4 + 2.0) ** 0.25))
    return VACUUM_PERMITTIVITY * mass * SPEED_OF_LIGHT**3 / (2.0 * abs(charge) * gap**2) * total**2


def short_pulse_limit(field, area):
    """Largest charge that a short pulse draws from a cathode [C]: eps0 E A; field at the surface [V/m], area [m^2].

    Domain: pulse short against the flight through the gap, its sheet wide against its thickness.
    Source: A. Valfells et al., Phys. Plasmas 9, 2377, 2002, from memory of it.
    """
    return VACUUM_PERMITTIVITY * field * area


def emitting_area(profile, ellipsoid, sizes):
    """Charge over its largest density per area of the cathode [m^2]: pi a b of a uniform ellipse.

    profile of the section, sizes (2,) half axes or rms sizes of a Gaussian [m]; an ellipsoid is seen along its axis.
    """
    return _AREAS[profile, ellipsoid] * pi * sizes[0] * sizes[1]


_AREAS = {
    ("gaussian", False): 2.0,
    ("kv", False): 1.0,
    ("parabolic", False): 1.0 / 2.0,
    ("uniform", True): 2.0 / 3.0,
    ("parabolic", True): 2.0 / 5.0,
}
