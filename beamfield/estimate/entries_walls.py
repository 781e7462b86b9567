"""Results that say what the images in chamber and poles do to the beam."""

from beamfield.estimate.catalogue_entry import Entry, along

_LASLETT = (
    "from memory of L. J. Laslett, On intensity limitations imposed by transverse space-charge effects, BNL-7534, "
    "1963, and C. Bovet et al., CERN/MPS-SI/Int. DL/70/4, 1970; coefficients by conformal maps, derived here"
)
_LONG = (
    "small amplitudes; gamma sigma_z at least 3 times the half gap; beam clear of the wall and centred in it; the "
    "same chamber and poles all round the ring; bunch peak"
)

WALLS = (
    *along(
        "xy",
        Entry(
            "tune_shift_image_{i}",
            "1",
            "effect",
            "Shift of the {i} tune of one particle by the images in chamber and poles, at the peak line density; adds "
            "to tune_shift_{i}.",
            "-1/(4 pi) integral of beta_{i} kappa_{i} ds; kappa_y = -kappa_x = 4 r_0/(beta^2 gamma) [eps_1/h^2 (m + "
            "(p - m)/gamma^2 - f p) + beta^2 eps_2/g^2 m], p, m peak and mean line density, h, g half heights of "
            "chamber and poles, f neutralisation, eps_2 = pi^2/24",
            _LONG,
            _LASLETT,
            ("ring", "walls"),
        ),
    ),
    *along(
        "xy",
        Entry(
            "coherent_tune_shift_{i}",
            "1",
            "effect",
            "Shift of the {i} tune of the beam moving as a whole, by the images in chamber and poles, at the peak line "
            "density.",
            "-1/(4 pi) integral of beta_{i} kappa ds; kappa = 4 r_0/(beta^2 gamma) [xi_1/h^2 p/gamma^2 + beta^2 "
            "(eps_1/h^2 + eps_2/g^2) m], coefficients of the plane {i}; where the field of the oscillation goes "
            "through the chamber [xi_1/h^2 (m + (p - m)/gamma^2) + beta^2 xi_2/g^2 m]",
            _LONG + "; perfectly conducting chamber",
            _LASLETT,
            ("ring", "walls"),
        ),
    ),
)
