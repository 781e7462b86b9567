"""Direct shift of the betatron tune by a weak defocusing round a ring."""

from math import pi

import numpy as np


def direct_tune_shift(beta, kappa, weights, circumference):
    """Incoherent shift of the tune at small amplitude [1], negative when defocusing.

        Delta Q = -1/(4 pi) closed integral of beta kappa ds = -C/(4 pi) sum of w beta kappa

    beta (K,) beta function [m], kappa (K,) or float of x'' = kappa x [1/m^2], weights (K,) of the ring average, sum 1,
    circumference C [m].
    Source: from memory of E. D. Courant and H. S. Snyder, Ann. Phys. 3, 1, 1958, sec. 4. Domain: shift small against Q.
    """
    return -circumference / (4.0 * pi) * float(np.sum(weights * beta * kappa))


def long_beam_tune_shift(
    particles, classical_radius, emittance, bunching_factor, beta, gamma, ratio=1.0, axis_density=2.0
):
    """The same shift of a beam long against its width, without dispersion [1].

        Delta Q = -n r_0 N / (4 pi emittance_n beta gamma^2 B_f (1 + sigma_other / sigma)); round Gaussian, n = 2:
        Delta Q = -r_0 N / (4 pi emittance_n beta gamma^2 B_f)

    particles         all in the ring [1];   classical_radius  r_0 = q^2 / (4 pi eps0 m c^2) [m]
    emittance         normalised rms of the plane [m rad];   bunching_factor  mean over peak [1]
    ratio             sigma of the other plane over sigma of this one, the same round the ring [1]
    axis_density      n, density of the axis over that of a uniform ellipse of equal rms: Gaussian 2, uniform 1 [1]

    Source: from memory of K. Schindl, Space charge, CERN/PS 99-012 (DI), 1999.
    """
    strength = axis_density * classical_radius * particles / (4.0 * pi * beta * gamma**2 * bunching_factor)
    return -strength / (emittance * (1.0 + ratio))
