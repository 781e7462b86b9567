"""The word that was probably meant."""

from difflib import get_close_matches

_LONGEST = 40  # a longer word is no misspelling, and comparing it would take long


def nearest(word, choices):
    """The choice that a word is but for capitals, or that it is near to; None where there is none."""
    choices, word = list(choices), word[:_LONGEST]
    same = [choice for choice in choices if choice.casefold() == word.casefold()]
    return next(iter(same or get_close_matches(word, choices, n=1)), None)


def hint(word, choices):
    """'; did you mean ...?' for the nearest choice, or nothing."""
    near = nearest(word, choices)
    return f"; did you mean {near!r}?" if near else ""


def excerpt(text):
    """A text in quotes, short enough for a line."""
    text = text if len(text) <= _LONGEST + 20 else text[:_LONGEST] + "…"
    return f"'{text}'"
