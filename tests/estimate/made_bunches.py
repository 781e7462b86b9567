"""Bunches of every shape, aspect and section, places in them, and how far the sum of charges is from the textbook."""

from functools import cache
from math import inf, sqrt

import numpy as np

from beamfield.beam.bunch import Bunch
from beamfield.beam.numerics import Numerics
from beamfield.beam.shape import SHAPES, Shape
from beamfield.beam.species_table import named
from beamfield.estimate.self_force import gradients
from beamfield.estimate.source import self_field
from beamfield.estimate.textbook import closed_field, closed_gradient

GAMMA, WIDTH = 3.0, 1e-3
ASPECTS = (1e-4, 1e-2, 0.3, 1.0, 10.0, 1e3, 1e5)
SECTIONS = (1.0, 3.0, 10.0)
PRODUCTS = {
    f"{across} x {along}": Shape(across, along)
    for across, along in [
        ("gaussian", "uniform"),
        ("gaussian", "parabolic"),
        ("kv", "gaussian"),
        ("kv", "parabolic"),
        ("parabolic", "gaussian"),
        ("parabolic", "uniform"),
        ("parabolic", "parabolic"),
    ]
}
BUNCHES = {**SHAPES, **PRODUCTS}
BEAMS = {f"{across} beam": Shape(across, "coasting") for across in ("gaussian", "kv", "parabolic")}
WITH_FIELD_LAW = (*SHAPES, "gaussian x uniform", "gaussian x parabolic")
DEFAULT = Numerics()
NOTHING = 1e-13  # relative: an error so small counts as covered by any doubt


def made(name, aspect=1.0, section=1.0, gamma=GAMMA, species="proton", **changes):
    """A bunch, or a coasting beam, of rest-frame aspect gamma sigma_z / sqrt(sigma_x sigma_y) and sigma_x / sigma_y."""
    shape = {**BUNCHES, **BEAMS}[name]
    across = WIDTH * sqrt(section), WIDTH / sqrt(section)
    along, number, density = (inf, None, 1e11) if shape.coasting else (aspect * WIDTH / gamma, 1e10, 0.0)
    momentum = sqrt((gamma - 1.0) * (gamma + 1.0))
    return Bunch(named(species), momentum, number, (*across, along), shape, line_density=density, **changes)


def places(bunch, count=20, seed=7, reach=3.0):
    """Points (3, count), even in the ellipsoid of `reach` rms sizes."""
    chance = np.random.default_rng(seed)
    way = chance.normal(size=(3, count))
    unit = reach * way / np.linalg.norm(way, axis=0) * chance.uniform(size=count) ** (1.0 / 3.0)
    return unit * np.where(np.isfinite(bunch.sigma), bunch.sigma, 1.0)[:, None]


def rms_error(found, truth):
    """Length of the differences over length of the true vectors, both rms."""
    return np.linalg.norm(found - truth) / np.linalg.norm(truth)


@cache
def field_error(name, aspect, section):
    """Error of the superposed field against the closed form, and the doubt it admits; relative, rms over the bunch."""
    bunch = made(name, aspect, section)
    points = places(bunch)
    field = self_field(bunch, DEFAULT, points)
    return rms_error(field.E, closed_field(bunch, points)), field.doubt


@cache
def slope_errors(name, aspect, section):
    """Errors (A,) of the superposed slopes at the centre against the closed form, and their doubts (A,); relative."""
    bunch = made(name, aspect, section)
    value, doubt, _, _ = gradients(bunch, DEFAULT)
    truth = closed_gradient(bunch)[: len(value)]
    return np.abs(value / truth - 1.0), np.abs(doubt / truth)


def honest(errors, doubts):
    """Share of the errors that their doubts cover, and share of the doubts that are at most a hundred errors."""
    errors, doubts = np.ravel(errors), np.ravel(doubts)
    return np.mean(errors <= np.maximum(doubts, NOTHING)), np.mean(doubts <= 100.0 * np.maximum(errors, NOTHING))
