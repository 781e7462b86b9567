"""Image coefficients as printed, from memory of L. J. Laslett, BNL-7534 (1963) and C. Bovet et al., CERN/MPS-SI/Int.
DL/70/4 (1970).
"""

from math import inf

PRINTED = {  # shape, half width over half height -> eps_1, xi_1 vertical
    ("round", 1.0): (0.0, 0.500),
    ("elliptic", 4.0 / 3.0): (0.107, 0.559),
    ("elliptic", 1.5): (0.134, 0.575),
    ("elliptic", 2.0): (0.172, 0.599),
    ("plates", inf): (0.206, 0.617),
}
POLES = (0.411, 0.617)
