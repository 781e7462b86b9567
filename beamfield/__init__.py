"""How strongly a bunch of charged particles pushes on itself: the sum of moving charges beside the textbook."""

__version__ = "0.1.0"

__all__ = ["BeamfieldError", "evaluate", "field_of_others", "force_of_others", "load", "self_field", "superpose"]


def __getattr__(name):
    if name not in __all__:
        raise AttributeError(f"beamfield has no {name!r}; it offers {', '.join(__all__)}")
    from beamfield import api

    return getattr(api, name)


def __dir__():
    return sorted([*__all__, "__version__"])
