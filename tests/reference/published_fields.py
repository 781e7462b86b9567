"""Published numbers of fields of ellipsoids and long beams, each from memory of its source and recomputed by hand."""

# J. A. Osborn, Demagnetizing factors of the general ellipsoid, Phys. Rev. 67, 351 (1945), from memory of it:
# ratio -> polar factor.
PROLATE = {2.0: 0.173564, 5.0: 0.055821, 10.0: 0.020286, 20.0: 0.006749}
OBLATE = {2.0: 0.5272, 5.0: 0.7505, 10.0: 0.8608, 20.0: 0.9262}

# Closed form (incomplete elliptic integrals): semi-axes 3 : 2 : 1.
THREE_TWO_ONE = (0.1563007, 0.2671540, 0.5765453)

# F. J. Sacherer, IEEE Trans. Nucl. Sci. NS-18, 1105 (1971), from memory of it: <x E_x> of a sphere of unit rms size.
SPHERE_UNIFORM, SPHERE_GAUSSIAN = 0.0894, 0.0940

# Lectures on beam-beam effects, CERN-2006-002, from memory of them: a round Gaussian beam, peak of the field in
# units of lambda / (2 pi eps0 sigma).
ROUND_PEAK_AT, ROUND_PEAK = 1.5852011, 0.45126

# M. Bassetti and G. A. Erskine, CERN-ISR-TH/80-06 (1980), their closed form: sigma 2 and 1 at (1, 1), in units of
# lambda / (2 pi eps0).
BASSETTI_ERSKINE = (0.1334814506, 0.2494327592)
