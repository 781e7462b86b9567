"""Results that say what the field does to the beam."""

from beamfield.estimate.catalogue_entry import Entry, along

_NEWTON = (
    "Newton's second law with the magnetic force of the co-moving field, q E / gamma^2 (common practice, no source); "
    "from memory of M. Reiser, Theory and Design of Charged Particle Beams, 1994, ch. 4"
)
_GRADIENT_TUNE = (
    "from memory of E. D. Courant and H. S. Snyder, Theory of the alternating-gradient synchrotron, Ann. Phys. 3, 1, "
    "1958, "
    "sec. 4; round Gaussian formula from memory of K. Schindl, Space charge, CERN/PS 99-012 (DI), 1999"
)

EFFECT = (
    *along(
        "xyz",
        Entry(
            "defocusing_{i}",
            "1/m2",
            "effect",
            "Strength of the self-field as a lens for small {i}: the kappa in {i}'' = kappa {i}; positive, it "
            "defocuses.",
            "kappa_{i} = q (dE_{i}/d{i}) / (gamma^3 m beta^2 c^2); across, a background "
            "at rest leaves 1 - gamma^2 f of it",
            "small amplitudes; free space; slopes small against 1",
            _NEWTON,
        ),
    ),
    *along(
        "xy",
        Entry(
            "peak_kick_{i}",
            "rad/m",
            "effect",
            "Slope {i}' gained per metre where the field on the {i} axis is strongest.",
            "abs(q E_{i}) / (gamma^3 m beta^2 c^2)",
            "free space; slopes small against 1",
            _NEWTON,
        ),
    ),
    *along(
        "z",
        Entry(
            "peak_energy_change_{i}",
            "eV/m",
            "effect",
            "Kinetic energy that one particle gains per metre where E_z on the axis is strongest, ahead of the centre.",
            "abs(q E_z)",
            "free space: a chamber narrower than gamma times the bunch length weakens it",
            "work of a force; common practice, no source",
        ),
    ),
    Entry(
        "plasma_wavelength",
        "m",
        "effect",
        "Distance that the bunch travels in one plasma oscillation at the density of its centre.",
        "2 pi / sqrt(kappa_x + kappa_y + kappa_z)",
        "free space; by Gauss's law the sum is q^2 n / (eps0 gamma^3 m beta^2 c^2), n the density of the centre",
        "from memory of M. Reiser, Theory and Design of Charged Particle Beams, 1994, sec. 4.1",
    ),
    *along(
        "xy",
        Entry(
            "space_charge_ratio_{i}",
            "1",
            "effect",
            "Space charge over emittance in the rms envelope equation of {i}: far below 1 the emittance rules, far "
            "above it "
            "space charge.",
            "sigma_{i}^2 <{i} {i}''_sc> / emittance_{i}^2; long beam: K sigma_{i}^3 / (2 (sigma_x + sigma_y) "
            "emittance_{i}^2), K averaged",
            "density of elliptic symmetry; rms emittance, geometric",
            "F. J. Sacherer, RMS envelope equations with space charge, IEEE Trans. Nucl. Sci. NS-18, 1105, 1971",
            ("emittance",),
        ),
    ),
    *along(
        "xy",
        Entry(
            "tune_shift_{i}",
            "1",
            "effect",
            "Direct incoherent shift of the {i} tune of a particle of small amplitude at the peak line density; "
            "negative "
            "when defocusing.",
            "-1/(4 pi) integral of beta_{i} kappa_{i} ds round the ring; long round Gaussian of normalised rms "
            "emittance e_n: "
            "-r_0 N / (4 pi e_n beta gamma^2 B_f)",
            "shift small against the tune; free space, without images",
            _GRADIENT_TUNE,
            ("ring",),
        ),
    ),
)
