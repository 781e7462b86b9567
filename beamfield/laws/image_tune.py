"""Focusing of the images in chamber and poles: what Laslett's coefficients do to one particle and to the whole beam.

h half height of the chamber, g half gap of the poles [m]; lambda line density at its peak, mean round the ring [1/m];
f charge of a background at rest over that of the beam, of the same shape [1]; kappa of y'' = kappa y [1/m^2]. What
alternates in the magnetic field does not go through the chamber, what is steady does and ends on the poles. Source: L.
J. Laslett, BNL-7534, 1963; C. Bovet et al., CERN/MPS-SI/Int. DL/70/4, 1970 (both from memory of them).
"""

from math import inf


def incoherent(radius, beta, gamma, peak, mean, wall, poles=(0.0, inf), neutralisation=0.0):
    """kappa_y of one particle near the axis [1/m^2]; kappa_x = -kappa_y.

        kappa_y = 4 r_0/(beta^2 gamma) [eps_1/h^2 (mean + (peak - mean)/gamma^2 - f peak) + beta^2 eps_2/g^2 mean]

    radius r_0 = q^2/(4 pi eps_0 m c^2) [m]; wall (eps_1 [1], h [m]), poles (eps_2, g). Domain: long bunch, on the axis.
    """
    (eps_1, h), (eps_2, g) = wall, poles
    seen = mean + (peak - mean) / gamma**2 - neutralisation * peak
    return _strength(radius, beta, gamma) * (eps_1 / h**2 * seen + beta**2 * eps_2 / g**2 * mean)


def coherent_behind_wall(radius, beta, gamma, peak, mean, wall, poles=(0.0, 0.0, inf)):
    """kappa of the beam's centre in one plane [1/m^2]; the field of its oscillation does not go through the wall.

        kappa = 4 r_0/(beta^2 gamma) [xi_1/h^2 peak/gamma^2 + beta^2 (eps_1/h^2 + eps_2/g^2) mean]

    wall (eps_1, xi_1, h), poles (eps_2, xi_2, g) with the coefficients of that plane (eps_x = -eps_y).
    """
    (eps_1, xi_1, h), (eps_2, _, g) = wall, poles
    steady = beta**2 * (eps_1 / h**2 + eps_2 / g**2) * mean
    return _strength(radius, beta, gamma) * (xi_1 / h**2 * peak / gamma**2 + steady)


def coherent_through_wall(radius, beta, gamma, peak, mean, wall, poles=(0.0, 0.0, inf)):
    """The same where the field of the oscillation does go through the wall, slow as it is, and ends on the poles.

    kappa = 4 r_0/(beta^2 gamma) [xi_1/h^2 (mean + (peak - mean)/gamma^2) + beta^2 xi_2/g^2 mean]
    """
    (_, xi_1, h), (_, xi_2, g) = wall, poles
    seen = mean + (peak - mean) / gamma**2
    return _strength(radius, beta, gamma) * (xi_1 / h**2 * seen + beta**2 * xi_2 / g**2 * mean)


def _strength(radius, beta, gamma):
    return 4.0 * radius / (beta**2 * gamma)
