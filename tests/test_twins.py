"""The two witnesses of the moving charge against each other, before either judges the product."""

import pytest

from tests.naive import field_of_one
from tests.retarded import retarded_field

CHARGE = -3.0e-9
PLACES = [(1.0e-3, 2.0e-3, -1.5e-3), (-4.0e-3, 1.0e-3, 3.0e-3), (0.5e-3, -0.2e-3, 0.1e-3)]
MOMENTA = [(0.0, 0.0, 0.0), (1.0e-4, -2.0e-4, 4.0e-4), (0.3, 0.4, -1.2), (-2.0, 5.0, 11.0), (3.0e4, -5.0e4, 8.0e4)]


@pytest.mark.parametrize("u", MOMENTA)
@pytest.mark.parametrize("d", PLACES)
def test_boost_and_retardation_agree(d, u):
    """Closed form against closed form: present place seen from the rest frame, past place seen from the lab."""
    electric, magnetic = field_of_one(d, CHARGE, u)
    witness = retarded_field(d, CHARGE, u)
    rounding = 2e-14
    for mine, theirs in ((electric, witness[:3]), (magnetic, witness[3:])):
        size = max(abs(component) for component in theirs)
        assert all(abs(a - b) <= rounding * size for a, b in zip(mine, theirs, strict=True))
