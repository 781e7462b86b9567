"""CODATA 2022 values in SI, kept here because a library's data set moves under one's feet.

Source: E. Tiesinga, P. J. Mohr, D. B. Newell, B. N. Taylor, CODATA 2022 recommended values; tested against
scipy.constants.
"""

from math import pi

DATA_SET = "CODATA 2022"

SPEED_OF_LIGHT = 299792458.0  # m/s, exact
ELEMENTARY_CHARGE = 1.602176634e-19  # C, exact
VACUUM_PERMITTIVITY = 8.8541878188e-12  # F/m
VACUUM_PERMEABILITY = 1.25663706127e-6  # N/A^2
VACUUM_IMPEDANCE = 376.730313412  # ohm
ATOMIC_MASS = 1.66053906892e-27  # kg
ELECTRON_MASS = 9.1093837139e-31  # kg
PROTON_MASS = 1.67262192595e-27  # kg
MUON_MASS = 1.883531627e-28  # kg
DEUTERON_MASS = 3.3435837768e-27  # kg
TRITON_MASS = 5.0073567512e-27  # kg
HELION_MASS = 5.0064127862e-27  # kg
ALPHA_MASS = 6.6446573450e-27  # kg

COULOMB = 1.0 / (4.0 * pi * VACUUM_PERMITTIVITY)  # V m/C, field of a unit charge at a unit distance
