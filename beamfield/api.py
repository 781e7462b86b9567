"""The Python door: load a case, evaluate it, ask for fields."""

from beamfield.estimate.superposition import Field, superpose

__all__ = ["Field", "superpose"]
