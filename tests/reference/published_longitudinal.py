"""Published numbers of the longitudinal plane and of intensity limits."""

# Axis-to-wall depression of a uniform beam, V for 1 A at beta = 1 without the logarithm: Z0 / (4 pi), closed form.
DEPRESSION = 29.97925

# R. Baartman, arXiv:1508.00153, read there: constant of g averaged over the beam, a twice the rms size.
AVERAGED = {"kv": 0.5, "parabolic": 0.5112, "gaussian": 0.5772}
ON_AXIS_UNIFORM = 1.0  # the same

# From memory of M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions, 1964, table 9.8: K_1(1).
K1_OF_1 = 0.6019072302

# From memory of any text on diodes: A / V^1.5 of electrons and of protons.
CHILD_LANGMUIR = {"electron": 2.334e-6, "proton": 5.447e-8}

# From memory of A. Valfells et al., Phys. Plasmas 9, 2377, 2002: eps0 E at 1 MV/m [C/m^2].
SHORT_PULSE = 8.854e-6
