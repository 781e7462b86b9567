"""Whom to tell when machine code has to be made; kept apart from numba, so that asking for it loads nothing."""

tell = None  # called once, without arguments
