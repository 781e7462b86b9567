"""Published numbers of intensity and tune shift; machine examples are soft."""

# M. Reiser, Theory and Design of Charged Particle Beams, 1994, from memory of it: 4 pi eps0 m c^3 / e, "about 17 kA".
ELECTRON_CURRENT, PROTON_CURRENT = 17.045e3, 31.30e6  # A

# The same, sec. 4.2, from memory of it: K = 1.515e4 I / V^1.5 of slow electrons, 6.49e5 sqrt(A/Z) I / V^1.5 of slow
# ions, A counted in proton masses.
SLOW_ELECTRONS, SLOW_IONS = 1.515e4, 6.49e5  # V^1.5 / A

# Gain in intensity at equal tune shift and brightness, the ratio of beta gamma^2; kinetic energies of protons [eV].
GAINS = {
    (50e6, 160e6): 2.0439,  # "a factor 2": CERN-AB-2006-084, abstract
    (1.0e9, 1.4e9): 1.5234,  # from memory of laboratory upgrade reports, 1993-2020, as the two that follow
    (200e6, 400e6): 1.741,
    (400e6, 800e6): 1.992,
}
