"""Results that say what other bunches do to this one."""

from beamfield.estimate.catalogue_entry import Entry, along

_MOVING = (
    "superposition of moving charges, each with its own momentum, O. Heaviside, On the electromagnetic effects due to "
    "the motion of electrification through a dielectric, 1889 (from memory of it)"
)
_PASSAGE = (
    "M. Bassetti and G. A. Erskine, Closed expression for the electrical field of a two-dimensional Gaussian charge, "
    "CERN-ISR-TH/80-06, 1980; W. Herr, Beam-beam interactions, CERN-2006-002, p. 379 (both from memory of them)"
)
_TRAIN = (
    "free space: a chamber narrower than gamma times the spacing screens the neighbours; straight path; equal bunches"
)

COMPANY = (
    Entry(
        "train_field_z",
        "V/m",
        "company",
        "Field along z of the other bunches of the train at the centre of this one; positive towards the head.",
        "sum over neighbours of E_z; far apart: q N / (4 pi eps0 gamma^2) sum of sign / distance^2",
        _TRAIN,
        _MOVING,
        ("train", "bunch"),
    ),
    *along(
        "xyz",
        Entry(
            "train_defocusing_{i}",
            "1/m2",
            "company",
            "What the other bunches of the train add to the kappa of {i}'' = kappa {i} at the centre of this one; "
            "negative where they focus.",
            "q sum of dE_{i}/d{i} / (gamma^3 m beta^2 c^2) over the neighbours",
            _TRAIN,
            _MOVING,
            ("train",),
        ),
    ),
    *along(
        "xy",
        Entry(
            "encounter_gradient_{i}",
            "V/m2",
            "company",
            "Slope along {i} of the other bunch's force per charge, magnetic part included, at the centre of this one, "
            "now.",
            "(1 - beta_1 beta_2) dE_{i}/d{i}, signed betas: 1 + beta^2 for equal opposing bunches, 1 / gamma^2 for "
            "equal co-moving ones",
            "free space; both move along z",
            _MOVING,
            ("encounter",),
        ),
    ),
    *along(
        "xy",
        Entry(
            "encounter_kick_{i}",
            "rad",
            "company",
            "Slope {i}' that a particle at the centre gains in one passage of an opposing bunch whose centre passes "
            "aside.",
            "q (1 + beta_1 beta_2) / ((beta_1 + beta_2) gamma_1 beta_1 m c^2) integral of E_{i} dz",
            "kick so small that paths stay straight; both move along z",
            _PASSAGE,
            ("opposing", "aside"),
        ),
    ),
    *along(
        "xy",
        Entry(
            "encounter_focusing_{i}",
            "1/m",
            "company",
            "Inverse focal length of one passage of an opposing bunch for small {i} about the centre; negative where "
            "it defocuses.",
            "-d{i}'/d{i} of encounter_kick_{i}; head-on Gaussian, fast: 2 N r_0 / (gamma sigma_{i} (sigma_x + "
            "sigma_y))",
            "the other bunch much shorter than the focal length; both move along z",
            _PASSAGE,
            ("opposing",),
        ),
    ),
    *along(
        "xy",
        Entry(
            "beam_beam_tune_shift_{i}",
            "1",
            "company",
            "Linear beam-beam tune shift of {i} by one encounter a turn, at small amplitude; positive where it focuses "
            "(unlike charges).",
            "beta_{i} encounter_focusing_{i} / (4 pi); head-on Gaussian, fast: N r_0 beta_{i} / (2 pi gamma sigma_{i} "
            "(sigma_x + sigma_y))",
            "bunches short against beta where they meet, no crossing angle; shift small",
            _PASSAGE,
            ("opposing", "beta"),
        ),
    ),
)
