"""How long a bunch must have moved uniformly for its self-field to be the one that moves with it.

Source: geometry of the retarded time (from memory of L. D. Landau and E. M. Lifshitz, The Classical Theory of Fields,
1975, sec. 63).
"""


def transverse_memory(beta_gamma, half_extent):
    """Distance [m] behind at which the field now abeam at `half_extent` [m] was left: beta gamma a.

    Light needs the time t for which (c t)^2 = a^2 + (beta c t)^2; the source went beta c t = beta gamma a meanwhile.
    """
    return beta_gamma * half_extent


def longitudinal_memory(beta_gamma, length):
    """Distance [m] that the bunch goes while light from its tail reaches its head, `length` [m] ahead: beta l / (1 -
    beta).

    Written beta gamma (gamma + beta gamma) l, since 1 - beta has no digits left at high energy.
    """
    gamma = (1.0 + beta_gamma**2) ** 0.5
    return beta_gamma * (gamma + beta_gamma) * length
