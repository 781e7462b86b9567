"""A beam long against its chamber: potential, geometry factor, longitudinal field and impedance.

The mean of ln r over a density that depends on x^2/a^2 + y^2/b^2 alone is ln((a + b)/2) plus a number of the profile
(a uniform ellipse: -1/2), so that flat sections need no formula of their own. Sources: common textbook results; from
memory of A. Hofmann, Landau damping, CERN 77-13, 1977, and R. Baartman, arXiv:1508.00153, for the averages.
"""

from math import log

from beamfield.constants import COULOMB, VACUUM_IMPEDANCE

EULER = 0.5772156649015329

# -2 <ln t> of the profile about its centre, and -2 <<ln t>> between two of its particles, t = r over the mean scale:
# (a + b)/2 of the half axes, of the rms sizes for a Gaussian.
ON_AXIS = {"kv": 1.0, "parabolic": 1.5, "gaussian": EULER - log(2.0)}
AVERAGED = {"kv": 0.5, "parabolic": 11.0 / 12.0, "gaussian": EULER - 2.0 * log(2.0)}
# An ellipsoid narrows towards its ends, which takes from the slope of its potential: d(w^n (g - ln w)) at w = 1.
OF_ELLIPSOID = {"uniform": 0.0, "parabolic": 1.0}


def geometry_factor(constant, wall, scale):
    """g [1] = constant + 2 ln(b / scale): with a uniform round beam of radius a, 1 + 2 ln(b/a) on its axis.

    constant  of the profile, from ON_AXIS, AVERAGED or OF_ELLIPSOID;   wall  radius b of the pipe [m]
    scale     mean of the two half axes, or of the two rms sizes of a Gaussian [m]
    Domain: beam on the axis of a conducting pipe; wavelengths long against b / gamma.
    """
    return constant + 2.0 * log(wall / scale)


def depression(line_charge, factor):
    """Potential [V] of the axis against the wall: lambda (1 + 2 ln(b/a)) / (4 pi eps0); line_charge [C/m], lab."""
    return COULOMB * line_charge * factor


def axis_field(slope, factor, gamma):
    """E_z [V/m] = -g / (4 pi eps0 gamma^2) d(q lambda)/dz; slope of the charge per metre [C/m^2], lab."""
    return -factor * COULOMB * slope / gamma**2


def impedance_over_n(factor, beta, gamma):
    """abs(Z/n) [ohm] = g Z0 / (2 beta gamma^2), capacitive, n the harmonic of the revolution frequency.

    Domain: wavelengths long against b / gamma.
    Source: from memory of A. Hofmann, Landau damping, CERN 77-13, 1977.
    """
    return factor * VACUUM_IMPEDANCE / (2.0 * beta * gamma**2)
