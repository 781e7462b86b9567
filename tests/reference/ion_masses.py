"""Masses of ions as others state them; all from memory of the source named."""

# T. Beier et al., Phys. Rev. Lett. 88 (2002) 011603, and later weighings of the electron against the ion [u]
CARBON_IONS = {("C-12", 5): 11.9972576802917, ("C-12", 6): 11.9967096264139}

# Rest energies [GeV] that collider design reports and hydrogen-beam papers work with, to the digits they give
BEAM_IONS = {("Pb-208", 82): 193.687, ("Au-197", 79): 183.433, ("H-1", -1): 0.939294}


def binding_of_all_electrons(atomic_number):
    """Energy [eV] that strips an atom bare, a fit to 0.2 % or so from tin up.

    Source: D. Lunney, J. M. Pearson, C. Thibault, Rev. Mod. Phys. 75 (2003) 1021, eq. A4.
    """
    return 14.4381 * atomic_number**2.39 + 1.55468e-6 * atomic_number**5.35
