"""Synchrotron oscillations in a stationary bucket, and what the longitudinal self-field does to them."""

from math import copysign, pi, sqrt


def slip_factor(gamma, transition_gamma):
    """eta [1] = 1/gamma_t^2 - 1/gamma^2, negative below transition (some texts turn the sign)."""
    return transition_gamma**-2 - gamma**-2


def synchrotron_tune(slip, harmonic, voltage, charge, energy, beta):
    """Q_s [1] = sqrt(h abs(eta q V) / (2 pi beta^2 E)), small amplitude, no acceleration, no space charge.

    voltage V [V], charge q [C], total energy E [J].
    Source: from memory of D. A. Edwards and M. J. Syphers, An Introduction to the Physics of High Energy
    Accelerators, 1993, ch. 2.
    """
    return sqrt(harmonic * abs(slip * charge * voltage) / (2.0 * pi * beta**2 * energy))


def share_of_rf(slope, circumference, harmonic, voltage):
    """r [1]: the slope of the self-field over that of the cavity, abs(dE_z/dz) C^2 / (2 pi h V).

    slope dE_z/dz at the centre [V/m^2], circumference C [m]. Over a turn the self-field gives q dE_z/dz C per metre
    ahead, the cavity q V 2 pi h / C.
    """
    return abs(slope) * circumference**2 / (2.0 * pi * harmonic * abs(voltage))


def tune_shift(slip, share):
    """Delta Q_s / Q_s [1] = sqrt(1 + sign(eta) r) - 1; -1 where space charge leaves no bucket.

    Below transition a particle ahead must lose energy, and space charge gives it some; above both pull one way.
    Source: own derivation from Hill's equation; first order from memory of A. Hofmann, CERN 77-13, 1977.
    """
    return sqrt(max(0.0, 1.0 + copysign(share, slip))) - 1.0


def lengthening(slip, share):
    """sigma_z / sigma_z0 - 1 [1] = (1 + sign(eta) r)^(-1/4) - 1 at one longitudinal emittance.

    share r, taken at the length with space charge. The envelope equation at rest:
    (1 + sign(eta) r) sigma^4 = sigma_0^4, sigma_0 that of no charge; infinite where space charge leaves no bucket.
    """
    left = 1.0 + copysign(share, slip)
    return left**-0.25 - 1.0 if left > 0.0 else float("inf")


def threshold_impedance(current, charge, energy, beta, slip, spread, form_factor=1.0):
    """Largest abs(Z/n) [ohm] that lets a beam be: F beta^2 E abs(eta) (dp/p)_fwhm^2 / (q I).

    current I, peak for a bunch (Boussard) [A]; charge q [C]; total energy E [J]; spread (dp/p)_fwhm [1];
    form_factor F [1]: near 1 for a circle in the stability diagram, less for a profile with sharp edges.
    Sources: E. Keil and W. Schnell, CERN-ISR-TH-RF/69-48, 1969; D. Boussard, CERN-LabII/RF/Int./75-2, 1975; both from
    memory.
    """
    return form_factor * beta**2 * energy * abs(slip) * spread**2 / (abs(charge) * current)
