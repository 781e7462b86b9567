"""Two bunches that pass: forces between charges of different speed, the kick of a passage, the shift of the tune."""

from math import hypot, pi

from beamfield.constants import SPEED_OF_LIGHT


def force_over_electric(own, other):
    """Transverse force on a moving charge over that of the electric field alone [1].

        1 - beta_1 beta_2 = (1 + u_1^2 + u_2^2) / (gamma_1 gamma_2 (gamma_1 gamma_2 + u_1 u_2)),  u = gamma beta

    own    u_1 along z of the charge that is pushed                     [1]
    other  u_2 along z of the charges that push, negative when opposing [1]

    The second form keeps its digits where the speeds are nearly equal: 1 / gamma^2 when they are. Opposing: 1 + beta_1
    beta_2. Source: v x B with B = v_2 x E / c^2, special relativity, any text. Domain: both move along z.
    """
    energies, momenta = hypot(1.0, own) * hypot(1.0, other), own * other
    if momenta <= 0.0:
        return 1.0 - momenta / energies
    return (1.0 + own**2 + other**2) / (energies * (energies + momenta))


def passage_kick(integral, charge, mass, own, other):
    """Slope gained as an opposing bunch passes [rad].

        Delta x' = q (1 + beta_1 beta_2) / ((beta_1 + beta_2) gamma_1 beta_1 m c^2) integral E_x dz

    integral  of the other bunch's transverse electric field along z, lab frame, at one instant [V]
    charge, mass  of the particle that is kicked [C], [kg];  own, other  gamma beta of both, positive [1]

    Source: Newton's second law, dt = dz / ((beta_1 + beta_2) c). Domain: kick so small that the path stays straight.
    """
    own_energy, other_energy = hypot(1.0, own), hypot(1.0, other)
    closing = own / own_energy + other / other_energy
    return charge * force_over_electric(own, -other) * integral / (closing * own * mass * SPEED_OF_LIGHT**2)


def linear_tune_shift(focusing, beta):
    """Shift of the tune by one thin lens in a ring [1]: Delta Q = beta / (4 pi f), positive when it focuses.

    focusing  1 / f, the slope lost per place [1/m];  beta  beta function at the lens [m]

    Source: from memory of E. D. Courant and H. S. Snyder, Ann. Phys. 3, 1, 1958, sec. 4. Domain: small shifts, tune
    away from the half integers.
    """
    return beta * focusing / (4.0 * pi)


def beam_beam_parameter(particles, classical_radius, beta, gamma, sigma, sigma_other):
    """Linear beam-beam parameter of a plane, ultra-relativistic opposing Gaussian bunches [1].

        xi = N r beta / (2 pi gamma sigma (sigma + sigma_other))

    particles         N in the other bunch [1];   classical_radius  q_1 q_2 / (4 pi eps0 m_1 c^2), its magnitude [m]
    beta              beta function of the plane where the bunches meet [m];   gamma  of the particle kicked [1]
    sigma             rms size of the other bunch in the plane [m];   sigma_other  in the other plane [m]

    Source: from memory of W. Herr, Beam-beam interactions, CERN-2006-002, p. 379. Domain: head-on; bunch short against
    beta; no disruption.
    """
    return particles * classical_radius * beta / (2.0 * pi * gamma * sigma * (sigma + sigma_other))
