"""Results that say where the estimate holds."""

from beamfield.estimate.catalogue_entry import Entry

_RETARDED = (
    "geometry of the retarded time, A. Lienard, L'Eclairage electrique 16, 1898, E. Wiechert, Arch. neerl. 5, 1900 "
    "(from "
    "memory of L. D. Landau and E. M. Lifshitz, The Classical Theory of Fields, 1975, sec. 63)"
)

DOMAIN = (
    Entry(
        "memory_length_transverse",
        "m",
        "domain",
        "Distance over which the past motion must have been uniform for the self-field across the bunch to be the "
        "co-moving one.",
        "beta gamma a, a the transverse half extent (2 rms where there is no edge), the larger of x and y",
        "straight uniform motion before; the field abeam at a left its source beta gamma a behind",
        _RETARDED,
    ),
    Entry(
        "memory_length_longitudinal",
        "m",
        "domain",
        "Distance over which the past motion must have been uniform for the tail's field at the head to be the "
        "co-moving "
        "one.",
        "beta l / (1 - beta), l the bunch length edge to edge (4 rms where there is no edge)",
        "straight uniform motion before; light from the tail gains on the head by c (1 - beta)",
        _RETARDED,
        ("bunch",),
    ),
)
