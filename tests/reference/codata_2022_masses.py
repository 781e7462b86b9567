"""Rest energies [MeV] and relative atomic masses [u] of bare particles, as printed.

Source: E. Tiesinga, P. J. Mohr, D. B. Newell, B. N. Taylor, CODATA recommended values of the fundamental physical
constants: 2022.
"""

REST_ENERGIES = {
    "electron": 0.51099895069,
    "muon-": 105.6583755,
    "proton": 938.27208943,
    "deuteron": 1875.61294500,
    "triton": 2808.92113668,
    "helion": 2808.39161112,
    "alpha": 3727.3794118,
}
RELATIVE_MASSES = {
    ("H-1", 1): 1.0072764665789,
    ("H-2", 1): 2.013553212544,
    ("H-3", 1): 3.01550071597,
    ("He-3", 2): 3.014932246932,
    ("He-4", 2): 4.001506179129,
}
