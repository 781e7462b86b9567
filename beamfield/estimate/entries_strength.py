"""Results that say how strong the field of the bunch is."""

from beamfield.estimate.catalogue_entry import Entry, along

_COULOMB = (
    "superposition of moving charges, O. Heaviside, On the electromagnetic effects due to the motion of "
    "electrification "
    "through a dielectric, 1889 (from memory of it)"
)
_CLOSED = (
    "; closed forms: NIST Digital Library of Mathematical Functions, eqs. 19.33.7-8 (ellipsoids); O. D. Kellogg, "
    "Foundations of Potential Theory, 1929, ch. VII (from memory of it)"
)

STRENGTH = (
    Entry(
        "perveance",
        "1",
        "strength",
        "Self-defocusing of a long beam without its size: a uniform ellipse of semi-axes a, b gives x'' = 2 K x / (a "
        "(a + b)).",
        "K = 2 I_peak / (I_0 (beta gamma)^3) (1 - gamma^2 f), I_0 = 4 pi eps0 m c^3 / abs(q), f neutralisation",
        "bunch long against its width in its own frame; background at rest, of the same section as the beam",
        "J. D. Lawson, Perveance and the Bennett pinch relation in partially neutralized electron beams, J. "
        "Electron. "
        "Control 5, 146, 1958 (its abstract read); from memory of M. Reiser, Theory and Design of Charged Particle "
        "Beams, "
        "1994, sec. 4.2",
    ),
    *along(
        "xyz",
        Entry(
            "field_gradient_{i}",
            "V/m2",
            "strength",
            "Slope of the electric field along {i} at the centre of the bunch, lab frame; negative for electrons.",
            "dE_{i}/d{i}; uniform ellipsoid: L_{i} rho / eps0, L_{i} the depolarisation factor of semi-axes a, b, "
            "gamma c; the "
            "three slopes sum to rho / eps0",
            "free space; momentum shared by all particles",
            _COULOMB + _CLOSED,
        ),
    ),
    *along(
        "xyz",
        Entry(
            "peak_field_{i}",
            "V/m",
            "strength",
            "Largest electric field along {i} on the {i} axis through the centre, lab frame, without its sign.",
            "max over {i} > 0 of abs(E_{i}(0, .., {i}, .., 0)); round long Gaussian: 0.4513 q lambda / (2 pi eps0 "
            "sigma) at 1.585 sigma",
            "free space; momentum shared by all particles",
            _COULOMB + _CLOSED,
        ),
    ),
)
