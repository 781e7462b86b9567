"""Results that say what the bunch is."""

from beamfield.estimate.catalogue_entry import Entry

_MECHANICS = (
    "special relativity: L. D. Landau and E. M. Lifshitz, The Classical Theory of Fields, 1975, sec. 9 (from memory "
    "of it)"
)
_CURRENT = "definition of current and line density; common practice, no source"

BUNCH = (
    Entry(
        "gamma",
        "1",
        "bunch",
        "Total energy over rest energy.",
        "gamma = E / (m c^2) = sqrt(1 + (p / m c)^2)",
        "always",
        _MECHANICS,
    ),
    Entry(
        "beta",
        "1",
        "bunch",
        "Velocity over the velocity of light.",
        "beta = p c / E = sqrt(1 - 1 / gamma^2)",
        "always",
        _MECHANICS,
    ),
    Entry(
        "momentum",
        "eV/c",
        "bunch",
        "Momentum of one particle (of the whole ion, not of a nucleon).",
        "p = beta gamma m c",
        "always",
        _MECHANICS,
    ),
    Entry(
        "rigidity",
        "T m",
        "bunch",
        "Bending field times bending radius at this momentum; positive whatever the sign of the charge.",
        "B rho = p / abs(q)",
        "always",
        "circular motion in a magnetic field: L. D. Landau and E. M. Lifshitz, The Classical Theory of Fields, 1975, "
        "sec. 21 (from memory of it)",
    ),
    Entry(
        "particles",
        "1",
        "bunch",
        "Real particles in the bunch; round the whole ring for a coasting beam.",
        "N = abs(Q / q)",
        "absent for a coasting beam whose length is not known",
        "definition",
    ),
    Entry(
        "bunch_charge",
        "C",
        "bunch",
        "Charge of the bunch, signed: negative for electrons; round the whole ring for a coasting beam.",
        "Q = q N",
        "absent for a coasting beam whose length is not known",
        "definition",
    ),
    Entry(
        "peak_current",
        "A",
        "bunch",
        "Largest current that passes a fixed place as the bunch goes by, taken positive.",
        "I = abs(q) lambda_peak beta c",
        "always; a particle file gives a smoothed line density",
        _CURRENT,
    ),
    Entry(
        "peak_line_density",
        "1/m",
        "bunch",
        "Largest number of particles per metre along the beam, lab frame.",
        "lambda_peak = N h / sigma_z, h = 1/sqrt(2 pi) Gaussian, 1/(2 sqrt 3) uniform, 3/(4 sqrt 5) parabolic",
        "always; a particle file gives a smoothed line density",
        _CURRENT,
    ),
    Entry(
        "bunching_factor",
        "1",
        "bunch",
        "Mean over peak line density round the ring: at most 1, which is a coasting beam (some texts invert it).",
        "B_f = n_b N / (C lambda_peak)",
        "equal bunches that do not overlap",
        "from memory of L. J. Laslett, On intensity limitations imposed by transverse space-charge effects, "
        "BNL-7534, 1963",
        ("ring",),
    ),
)
