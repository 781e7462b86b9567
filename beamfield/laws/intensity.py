"""How intense a beam is: currents, line densities, perveance, and what a field does to a particle of the beam."""

from math import pi, sqrt

from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT


def peak_line_density(particles, sigma_z, peak):
    """Largest number of particles per metre [1/m]: N h / sigma_z.

    particles [1], rms length sigma_z [m], peak the height h of the line density of one particle times its rms length
    [1].
    """
    return particles * peak / sigma_z


def current(charge, line_density, velocity):
    """Current past a fixed place, taken positive [A]: abs(q) lambda v; charge [C], line_density [1/m], velocity
    [m/s]."""
    return abs(charge) * line_density * velocity


def bunching_factor(particles, bunches, circumference, peak_line_density):
    """Mean over peak line density [1]: n_b N / (C lambda_peak), 1 for a coasting beam.

    Source: from memory of L. J. Laslett, BNL-7534, 1963; some texts invert it.
    """
    return bunches * particles / (circumference * peak_line_density)


def perveance(current, beta_gamma, characteristic_current, neutralisation=0.0):
    """Dimensionless strength of self-defocusing in a long beam.

        K = 2 I / (I_0 (beta gamma)^3) (1 - gamma^2 f)

    current                 peak, absolute                                        [A]
    beta_gamma              momentum in units of m c                              [1]
    characteristic_current  4 pi eps0 m c^3 / abs(q)                              [A]
    neutralisation          charge of a background at rest over that of the beam  [1]

    Domain: beam long against its width in its own frame.
    Source: J. D. Lawson, Perveance and the Bennett pinch relation in partially neutralized electron beams, J. Electron.
    Control 5, 146, 1958 (its abstract read); from memory of M. Reiser, Theory and Design of Charged Particle Beams,
    1994.
    """
    return 2.0 * current / (characteristic_current * beta_gamma**3) * neutralised(beta_gamma, neutralisation)


def neutralised(beta_gamma, neutralisation):
    """Part of the force across that a background at rest leaves [1]: 1 - gamma^2 f, nought at f = 1/gamma^2.

    The bunch's own force is q E / gamma^2; the background, with f of its charge and of the same section, takes q f E.
    Source and domain: as for perveance.
    """
    return 1.0 - (1.0 + beta_gamma**2) * neutralisation


def acceleration(field, charge, mass, beta_gamma):
    """Second derivative along the path, q E / (gamma^3 m beta^2 c^2), of a co-moving particle: signed.

    A field in V/m gives x'' [1/m], a slope of the field in V/m^2 gives kappa of x'' = kappa x [1/m^2]; the lab electric
    field across is weakened by gamma^-2 by its own magnetic field, along the mass is gamma^3 m.
    charge [C], mass [kg].
    """
    return charge * field / (mass * SPEED_OF_LIGHT**2 * beta_gamma**2 * sqrt(1.0 + beta_gamma**2))


def energy_change(field, charge):
    """Kinetic energy gained per metre, taken positive [eV/m]: abs(q E) / e; field [V/m], charge [C]."""
    return abs(charge * field) / ELEMENTARY_CHARGE


def plasma_wavelength(kappa_x, kappa_y, kappa_z):
    """Distance travelled in one plasma oscillation [m]: 2 pi / sqrt(kappa_x + kappa_y + kappa_z), kappas in 1/m^2.

    Source: Gauss's law; from memory of M. Reiser, Theory and Design of Charged Particle Beams, 1994, sec. 4.1.
    """
    return 2.0 * pi / sqrt(kappa_x + kappa_y + kappa_z)
