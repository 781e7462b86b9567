"""Results of the longitudinal plane, and how much current or charge there could be."""

from beamfield.estimate.catalogue_entry import Entry

_WALL = (
    "Green's function of a conducting cylinder, J. D. Jackson, Classical Electrodynamics, 3rd ed., sec. 3.11 (from "
    "memory of it); other sections by their conformal radius"
)
_AVERAGES = "R. Baartman, arXiv:1508.00153 (averages over uniform, parabolic and Gaussian beams)"
_HOFMANN = "from memory of A. Hofmann, Landau damping, CERN 77-13, 1977"
_PHASE_FOCUSING = (
    "from memory of D. A. Edwards and M. J. Syphers, An Introduction to the Physics of High Energy Accelerators, 1993, "
    "ch. 2"
)
_STABILITY = (
    "E. Keil and W. Schnell, CERN-ISR-TH-RF/69-48, 1969; D. Boussard, CERN-LabII/RF/Int./75-2, 1975 (peak current of a "
    "bunch); both from memory"
)

LONGITUDINAL_STRENGTH = (
    Entry(
        "potential_depression",
        "V",
        "strength",
        "Scalar potential of the bunch centre against the chamber wall, against far away without one; lab frame, "
        "without its sign.",
        "gamma times the potential in the frame of the bunch; long uniform beam in a round pipe: Z0/(4 pi) (I/beta) "
        "(1 + 2 ln(b/a)), b the chamber, a the beam",
        "bunch on the axis of the chamber; a chamber that is not round is exact for a long beam only; a coasting beam "
        "needs a chamber; a density",
        _WALL,
        ("density", "chamber or ends"),
    ),
    Entry(
        "geometry_factor",
        "1",
        "strength",
        "The g that ties E_z on the axis to the slope of the line density, at the bunch centre, chamber included.",
        "E_z = -g q / (4 pi eps0 gamma^2) dlambda/dz; long beam in a round pipe: 1 + 2 ln(b/a) uniform, 3/2 + "
        "2 ln(b/a) parabolic, 0.5772 + 2 ln(b/(sqrt2 sigma)) Gaussian; averaged over the beam, a = 2 rms: 0.5, 0.5112 "
        "and 0.5772 + 2 ln(b/a)",
        "bunch long against b / gamma, which is tested: invalid where g at the centre is more than a tenth from the "
        "long beam's; a level line density takes the long beam's",
        f"{_AVERAGES}; {_WALL}",
        ("density", "chamber or slopes"),
    ),
    Entry(
        "longitudinal_impedance_over_n",
        "ohm",
        "strength",
        "Space-charge impedance over the harmonic of the revolution frequency, absolute; it is capacitive.",
        "abs(Z/n) = g Z0 / (2 beta gamma^2)",
        "wavelengths long against b / gamma; as geometry_factor",
        _HOFMANN,
        ("density", "ring", "chamber or slopes"),
    ),
    Entry(
        "limiting_current",
        "A",
        "strength",
        "Largest steady current that the chamber lets through before the beam's own potential stops it.",
        "I_0 (gamma^(2/3) - 1)^(3/2) / (1 + 2 ln(b/a)), I_0 = 4 pi eps0 m c^3 / abs(q); gamma and 1 + 2 ln(b/a) those "
        "of the bunch and its profile",
        "beam long against b / gamma, kept straight by a strong field along, not neutralised; an interpolation, good "
        "to some per cent",
        "L. S. Bogdankevich and A. A. Rukhadze, Sov. Phys. Usp. 14, 163, 1971, from memory of it",
        ("density", "chamber"),
    ),
    Entry(
        "cathode_charge_limit",
        "C",
        "strength",
        "Largest charge that a short pulse of this section draws from a cathode, without its sign.",
        "eps0 E A, A the charge over its largest density per area: pi a b uniform, 2 pi sigma_x sigma_y Gaussian",
        "pulse short against the flight through the gap; section as the case describes it",
        "A. Valfells et al., Phys. Plasmas 9, 2377, 2002, from memory of it",
        ("bunch", "density", "cathode"),
    ),
)
LONGITUDINAL_EFFECT = (
    Entry(
        "energy_change_per_turn",
        "eV",
        "effect",
        "Kinetic energy that one particle gains in a turn where E_z on the axis is strongest, ahead of the centre, "
        "chamber included.",
        "abs(q E_z) C; long beam: g abs(q) C / (4 pi eps0 gamma^2) times the steepest slope of the charge per metre",
        "the same bunch, in the same chamber, all round the ring",
        f"work of a force; common practice, no source; {_WALL}",
        ("bunch", "density", "ring"),
    ),
    Entry(
        "synchrotron_tune",
        "1",
        "effect",
        "Synchrotron oscillations a turn, small amplitude, without space charge.",
        "Q_s = sqrt(h abs(eta q V) / (2 pi beta^2 E)), eta = 1/gamma_t^2 - 1/gamma^2",
        "stationary bucket; not at transition",
        _PHASE_FOCUSING,
        ("bunch", "ring", "rf"),
    ),
    Entry(
        "synchrotron_tune_shift",
        "1",
        "effect",
        "Relative shift of the synchrotron tune by the self-field at the bunch centre: negative below transition, "
        "positive above.",
        "Delta Q_s / Q_s = sqrt(1 + sign(eta) r) - 1, r = abs(dE_z/dz) C^2 / (2 pi h V)",
        "small amplitude; stationary bucket, the bunch as the case describes it; invalid where r > 1 below transition; "
        "chamber on both sides the same all round",
        f"Hill's equation with two slopes (own derivation); first order {_HOFMANN}",
        ("bunch", "density", "ring", "rf"),
    ),
    Entry(
        "bunch_lengthening",
        "1",
        "effect",
        "Relative change that space charge makes in the rms length of the matched bunch at one longitudinal emittance: "
        "positive below transition, negative above.",
        "(1 + sign(eta) r)^(-1/4) - 1, r as in synchrotron_tune_shift with <z E_z> / sigma_z^2 for the slope",
        "the length of the case is the one with space charge, and matched; linear bucket; field on the axis",
        "envelope equation at rest, F. J. Sacherer, IEEE Trans. Nucl. Sci. NS-18, 1105, 1971, from memory of it",
        ("bunch", "density", "ring", "rf"),
    ),
    Entry(
        "impedance_threshold",
        "ohm",
        "effect",
        "Largest abs(Z/n) that keeps the beam free of microwave instability (Keil-Schnell, Boussard for a bunch).",
        "F beta^2 E abs(eta) (dp/p)_fwhm^2 / (abs(q) I_peak), F = 1, (dp/p)_fwhm = 2.3548 rms",
        "spread near a Gaussian, for which F is close to 1; waves short against the bunch; not at transition",
        _STABILITY,
        ("ring", "momentum_spread", "rf"),
    ),
    Entry(
        "impedance_threshold_ratio",
        "1",
        "effect",
        "The beam's own space-charge impedance over that threshold: above 1 it is unstable above transition, and has "
        "nothing to spare below.",
        "longitudinal_impedance_over_n / impedance_threshold",
        "as both; below transition space charge alone is stable, and the criterion a cautious bound",
        _STABILITY,
        ("density", "ring", "momentum_spread", "rf", "chamber or slopes"),
    ),
)
