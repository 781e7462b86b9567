"""Emittance words -> geometric rms emittance, by way of the shape.

A word other than rms names the ellipse in the projected phase space x, x' that holds a share F of the beam; with A its
area over pi and eps the rms emittance:

    gaussian    F = 1 - exp(-A / (2 eps))       95 %: A = 2 ln 20 eps = 5.991 eps; no ellipse holds all
    kv          F = A / (4 eps)                 95 %: A = 3.8 eps; all: 4 eps
    parabolic   F = 1 - (1 - A / (6 eps))^2     95 %: A = 6 (1 - sqrt 0.05) eps = 4.658 eps; all: 6 eps

Parabolic across is a ball in the four transverse dimensions, uniformly filled. Ellipsoids do not fix their phase space.
Source: integration of the distributions; the factors 4, 6 and 5.991 are common practice.
"""

from math import log, sqrt

from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError

_OVER_RMS = {  # profile across -> what a word says, in rms emittances
    "gaussian": {"95%": 2.0 * log(20.0)},
    "kv": {"95%": 3.8, "full": 4.0},
    "parabolic": {"95%": 6.0 * (1.0 - sqrt(0.05)), "full": 6.0},
}


def geometric_rms(quantity, shape, beta_gamma):
    """Geometric rms emittance [m rad]; `shape` is None for a bunch of macro-particles."""
    emittance = quantity.si / (beta_gamma if "normalised" in quantity.words else 1.0)
    return emittance / _over_rms(quantity, shape)


def _over_rms(quantity, shape):
    word = next(word for word in quantity.words if word in ("rms", "95%", "full"))
    if word == "rms":
        return 1.0
    factors = {} if shape is None or shape.ellipsoid else _OVER_RMS[shape.transverse]
    if word not in factors:
        raise InputError(f"{excerpt(quantity.text)}: {_reason(shape, word)}; write the rms emittance")
    return factors[word]


def _reason(shape, word):
    if shape is None:
        return f"a particle file does not say what '{word}' holds"
    if shape.ellipsoid:
        return f"an ellipsoid does not fix its phase space, so '{word}' has no one meaning"
    return f"a {shape.transverse} beam has no edge, so no ellipse holds all of it"
