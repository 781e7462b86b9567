"""Mean of place times force over a bunch, <x E_x>: what the rms envelope equation asks of a density.

Over q / (4 pi eps0), in the rest frame; [1/m] for a bunch of unit charge, [1] for a long beam of unit line density.
Source: F. J. Sacherer, RMS envelope equations with space charge, IEEE Trans. Nucl. Sci. NS-18, 1105, 1971 (its
summary read).
"""

from math import pi, sqrt

import numpy as np

from beamfield.laws.ellipsoid import carlson_slopes

# <x E_x> sigma of a sphere. Found from (1/3) integral r E(r) dq, with E = q(r) / r^2.
SPHERE = {
    "uniform": 1.0 / (5.0 * sqrt(5.0)),
    "parabolic": 5.0 / (21.0 * sqrt(7.0)),
    "gaussian": 1.0 / (6.0 * sqrt(pi)),
}

# Mean over the particles of the line density of one particle, times the rms length.
MEAN_LINE_DENSITY = {
    "uniform": 0.5 / sqrt(3.0),
    "parabolic": 0.6 / sqrt(5.0),
    "gaussian": 0.5 / sqrt(pi),
}


def ellipsoid_rms_force(profile, sigma):
    """<x_i E_i> (3,) [1/m] of a bunch whose density is constant on similar ellipsoids; sigma (3,) [m] in the rest
    frame.

        <x_i E_i> = C sigma_i^2 R_D(.., .., sigma_i^2)

    profile  "uniform", "parabolic" or "gaussian" sets C alone; the geometry is the same for all of them.
    """
    squares = np.asarray(sigma, dtype=float) ** 2
    return SPHERE[profile] * squares * carlson_slopes(squares)


def long_beam_rms_force(sigma):
    """<x E_x>, <y E_y> (2,) [1] of an infinitely long beam of any density constant on similar ellipses; sigma (2,) [m].

    <x E_x> = sigma_x / (sigma_x + sigma_y)
    """
    sigma = np.asarray(sigma, dtype=float)
    return sigma / sigma.sum()


def long_bunch_rms_force(longitudinal, sigma):
    """<x E_x>, <y E_y> (2,) [1/m] of a bunch long against its width; longitudinal, its line density; sigma (3,) [m]."""
    return long_beam_rms_force(sigma[:2]) * MEAN_LINE_DENSITY[longitudinal] / sigma[2]


def space_charge_ratio(sigma, rms_force, particles, classical_radius, beta_gamma, emittance):
    """Space charge over emittance in the rms envelope equation [1].

        sigma^2 <x x''> / emittance^2, <x x''> = r N <x E_x> / (beta gamma)^2

    sigma, emittance  rms size [m] and geometric rms emittance [m rad] of the plane
    rms_force         <x E_x> of unit charge in the rest frame [1/m]
    particles, classical_radius   N [1] and q^2 / (4 pi eps0 m c^2) [m]
    """
    return sigma**2 * classical_radius * particles * rms_force / (beta_gamma * emittance) ** 2


def long_beam_ratio(sigma, rms_force, perveance, emittance):
    """The same for a constant line density [1]: sigma^2 K <x E_x> / (2 emittance^2), <x E_x> of unit line density."""
    return sigma**2 * perveance * rms_force / (2.0 * emittance**2)
