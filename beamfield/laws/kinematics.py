"""Energy, momentum and rigidity of one particle, by way of beta gamma = p / (m c), which keeps its digits at any speed.

Every law takes floats or arrays. Source of all of them: E^2 = (p c)^2 + (m c^2)^2, special relativity, any text.
"""

import numpy as np

from beamfield.constants import SPEED_OF_LIGHT


def beta_gamma_from_kinetic(kinetic, rest_energy):
    """Momentum of a particle of given kinetic energy.

        beta gamma = sqrt(t (t + 2)),  t = T / (m c^2)

    kinetic      T                                       [J]
    rest_energy  m c^2                                   [J]

    returns      momentum in units of m c                [1]
    Domain: T >= 0; no difference of near equals from rest upwards.
    """
    t = kinetic / rest_energy
    return np.sqrt(t * (t + 2.0))


def beta_gamma_from_total(total, rest_energy):
    """Momentum of a particle of given total energy.

        beta gamma = sqrt((E - m c^2) (E + m c^2)) / (m c^2)

    total        E, rest energy included                 [J]
    rest_energy  m c^2                                   [J]

    returns      momentum in units of m c                [1]
    Domain: E >= m c^2; near rest E itself holds few digits of the motion.
    """
    return np.sqrt((total - rest_energy) * (total + rest_energy)) / rest_energy


def beta_gamma_from_gamma(gamma):
    """Momentum of a particle of given Lorentz factor.

        beta gamma = sqrt((gamma - 1) (gamma + 1))

    gamma        total energy over rest energy           [1]

    returns      momentum in units of m c                [1]
    Domain: gamma >= 1.
    """
    return np.sqrt((gamma - 1.0) * (gamma + 1.0))


def beta_gamma_from_momentum(momentum_times_c, rest_energy):
    """Momentum in units of m c.

        beta gamma = p c / (m c^2)

    momentum_times_c  p c                                [J]
    rest_energy       m c^2                              [J]

    returns           momentum in units of m c           [1]
    Domain: always.
    """
    return momentum_times_c / rest_energy


def beta_gamma_from_rigidity(rigidity, charge, mass):
    """Momentum of a particle of given magnetic rigidity.

        beta gamma = (B rho) |q| / (m c)

    rigidity     B rho, positive                         [T m]
    charge       q, either sign                          [C]
    mass         m                                       [kg]

    returns      momentum in units of m c                [1]
    Domain: always.
    """
    return rigidity * abs(charge) / (mass * SPEED_OF_LIGHT)


def momentum(beta_gamma, mass):
    """Momentum.

        p = beta gamma m c

    beta_gamma   momentum in units of m c                [1]
    mass         m                                       [kg]

    returns      p                                       [kg m/s]
    Domain: always.
    """
    return beta_gamma * mass * SPEED_OF_LIGHT


def rigidity(beta_gamma, mass, charge):
    """Magnetic rigidity: field times bending radius.

        B rho = p / |q|

    beta_gamma   momentum in units of m c                [1]
    mass         m                                       [kg]
    charge       q, either sign                          [C]

    returns      B rho, positive                         [T m]
    Domain: charged particles.
    """
    return momentum(beta_gamma, mass) / abs(charge)


def kinetic_energy(beta_gamma, rest_energy):
    """Kinetic energy.

        T = (gamma - 1) m c^2 = m c^2 (beta gamma)^2 / (gamma + 1),  gamma = sqrt(1 + (beta gamma)^2)

    beta_gamma   momentum in units of m c                [1]
    rest_energy  m c^2                                   [J]

    returns      T                                       [J]
    Domain: always; the second form loses no digits near rest.
    """
    return rest_energy * beta_gamma**2 / (np.hypot(1.0, beta_gamma) + 1.0)
