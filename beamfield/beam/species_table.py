"""The species a case may name, and any ion of a known isotope."""

from beamfield.beam.isotopes import ion_mass, split_name
from beamfield.beam.species import Species
from beamfield.constants import (
    ALPHA_MASS,
    DEUTERON_MASS,
    ELECTRON_MASS,
    ELEMENTARY_CHARGE,
    HELION_MASS,
    MUON_MASS,
    PROTON_MASS,
    SPEED_OF_LIGHT,
    TRITON_MASS,
)

# Energy that frees both electrons of a negative ion [eV]: electron affinity and ionisation energy.
# Affinities: from memory of K. R. Lykke, K. K. Murray, W. C. Lineberger, Phys. Rev. A 43 (1991) 6104, abstract.
# Ionisation: NIST Atomic Spectra Database, hydrogen; deuterium by its reduced mass.
_BINDING_H = 0.754195 + 13.598434
_BINDING_D = 0.754593 + 13.602134


def _negative_ion(nucleus, binding):
    """Mass of a nucleus of charge e with two electrons bound to it by `binding` [eV]."""
    return nucleus + 2.0 * ELECTRON_MASS - binding * ELEMENTARY_CHARGE / SPEED_OF_LIGHT**2


_KINDS = {  # name: mass [kg], charge state, nucleons
    "electron": (ELECTRON_MASS, -1, None),
    "positron": (ELECTRON_MASS, 1, None),
    "proton": (PROTON_MASS, 1, 1),
    "antiproton": (PROTON_MASS, -1, 1),
    "muon+": (MUON_MASS, 1, None),
    "muon-": (MUON_MASS, -1, None),
    "deuteron": (DEUTERON_MASS, 1, 2),
    "triton": (TRITON_MASS, 1, 3),
    "helion": (HELION_MASS, 2, 3),
    "alpha": (ALPHA_MASS, 2, 4),
    "H-": (_negative_ion(PROTON_MASS, _BINDING_H), -1, 1),
    "D-": (_negative_ion(DEUTERON_MASS, _BINDING_D), -1, 2),
}
_OTHER_NAMES = {
    "e-": "electron",
    "e+": "positron",
    "p": "proton",
    "H+": "proton",
    "antimuon": "muon+",
    "mu+": "muon+",
    "mu-": "muon-",
}

NAMES = tuple(_KINDS)


def named(word):
    """Species of a name in NAMES or of a symbol such as 'p' and 'e-'; KeyError for any other word."""
    name = _OTHER_NAMES.get(word, word)
    mass, charge_state, nucleons = _KINDS[name]
    return Species(name, mass, charge_state * ELEMENTARY_CHARGE, nucleons)


def isotope(word, charge_state):
    """Ion of an isotope such as 'Ar-40' or '40Ar' with charge_state electrons taken off (all of them: bare), or -1.

    Raises NonsenseError, with a way out, for an unknown element or isotope and for a charge state it cannot have.
    """
    element, mass_number = split_name(word)
    mass = ion_mass(element, mass_number, charge_state)
    charge_state = int(charge_state)
    sign = "+" if charge_state > 0 else "-"
    return Species(
        f"{element}-{mass_number} {abs(charge_state)}{sign}", mass, charge_state * ELEMENTARY_CHARGE, mass_number
    )
