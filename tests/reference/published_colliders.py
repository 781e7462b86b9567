"""Beam-beam parameters of colliders as their tables print them, each one's own encounter at nominal values.

From memory of the sources named; sizes, beta functions and parameters to the digits that the tables give.
"""

from dataclasses import dataclass


@dataclass(frozen=True)
class Published:
    """One beam of a collider and the bunch it meets.

    species and energy [eV, total] of the beam whose tune moves; species, particles, rms sizes (x, y, z) [m] and energy
    of the bunch it meets; beta (x, y) where they meet [m]; xi (x, y), None where the table has none; digit, relative
    worth of half the last digit printed.
    """

    species: str
    energy: float
    other: str
    particles: float
    sigma: tuple
    beta: tuple
    xi: tuple
    digit: float
    other_energy: float


B_FACTORY_SIZES = (155e-6, 6.2e-6, 10e-3)

COLLIDERS = {
    # PEP-II: An Asymmetric B Factory, Conceptual Design Report, SLAC-418, 1993, main parameters: 0.03 in both beams and
    # both planes.
    "PEP-II electrons": Published(
        "electron", 9.0e9, "positron", 5.91e10, B_FACTORY_SIZES, (0.50, 0.02), (0.03, 0.03), 0.02, 3.1e9
    ),
    "PEP-II positrons": Published(
        "positron", 3.1e9, "electron", 2.73e10, B_FACTORY_SIZES, (0.375, 0.015), (0.03, 0.03), 0.02, 9.0e9
    ),
    # U. Schneekloth (ed.), The HERA Luminosity Upgrade, DESY HERA 98-05, 1998: 140 mA of protons in 180 bunches.
    "HERA leptons": Published(
        "positron", 27.5e9, "proton", 1.03e11, (112e-6, 30e-6, 0.19), (0.63, 0.26), (-0.034, -0.052), 0.015, 920e9
    ),
    # W. Fischer on RHIC with polarised protons: 2e11 in 20 mm mrad (95 %, normalised, with pi), 0.0073 an encounter;
    # the size is that of beta = 1 m at 250 GeV.
    "RHIC protons": Published(
        "proton", 250e9, "proton", 2.0e11, (1.119e-4, 1.119e-4, 0.5), (1.0, 1.0), (-0.0073, -0.0073), 0.01, 250e9
    ),
    # W. Herr, T. Pieloni, Beam-beam effects, CERN-2014-004, p. 431, table: 0.0034 of the nominal LHC. The crossing of
    # 285 urad, in the plane x, widens the other bunch to sqrt(16.7^2 + (75.5 mm x 142.5 urad)^2) um as seen by y.
    "LHC protons": Published(
        "proton", 7.0e12, "proton", 1.15e11, (19.9e-6, 16.7e-6, 75.5e-3), (0.55, 0.55), (None, -0.0034), 0.015, 7.0e12
    ),
}
