"""Field laws against tables of 30-digit superpositions; tests/reference/make_field_tables.py says by which formulas."""

import csv
from pathlib import Path

import numpy as np
import pytest

from beamfield.laws.cylinder import uniform_cylinder_field
from beamfield.laws.ellipsoid import uniform_ellipsoid_field
from beamfield.laws.flat_beam import gaussian_beam_field, gaussian_beam_integral, kv_field, parabolic_field
from beamfield.laws.gaussian import gaussian_field
from beamfield.laws.parabolic import parabolic_ellipsoid_field
from beamfield.laws.product import gaussian_section_field

REFERENCE = Path(__file__).parents[1] / "reference"
QUADRATURE = 1e-12  # of the field's length: shapes from 1e-4 to 1e5, sections to 10, in, on and out of the surface
RIM = 2e-12  # cylinders: the edge of a flat one is a thousand times nearer than it is wide


def rows(table):
    with (REFERENCE / table).open() as text:
        return list(csv.reader(text))[1:]


def worst(table, law, field):
    """Largest error of a law over its rows, relative to the length of the field."""
    numbers = np.array([row[1:] for row in rows(table) if row[0] == law], dtype=float)
    size = numbers.shape[1] // 3
    axes, points, expected = numbers[:, :size], numbers[:, size : 2 * size], numbers[:, 2 * size :]
    found = np.array([field(p[:, None], a)[:, 0] for p, a in zip(points, axes, strict=True)])
    assert len(found) > 40
    return np.max(np.linalg.norm(found - expected, axis=1) / np.linalg.norm(expected, axis=1))


@pytest.mark.parametrize(
    ("law", "field"),
    [
        ("uniform", uniform_ellipsoid_field),
        ("parabolic", parabolic_ellipsoid_field),
        ("gaussian", gaussian_field),
        ("gaussian", lambda p, s: gaussian_section_field(p, s[:2], "gaussian", s[2])),
    ],
)
def test_bunches(law, field):
    """Closed form: superposition in mpmath."""
    assert worst("bunch_fields.csv", law, field) < QUADRATURE


@pytest.mark.parametrize(
    ("law", "field"),
    [
        ("kv", kv_field),
        ("parabolic-beam", parabolic_field),
        ("gaussian-beam", gaussian_beam_field),
        ("gaussian-beam", gaussian_beam_integral),
    ],
)
def test_long_beams(law, field):
    """Closed form: superposition in mpmath."""
    assert worst("beam_fields.csv", law, field) < QUADRATURE


def test_cylinders():
    """Closed form: superposition of rectangular sheets in mpmath."""
    assert worst("cylinder_fields.csv", "cylinder", uniform_cylinder_field) < RIM
