"""Paragraphs of a text page."""

from textwrap import wrap

from beamfield.errors import one_line

COLUMNS = 100


def hanging(label, text):
    """Lines of a paragraph that hangs from its label."""
    return wrap(
        one_line(text),
        COLUMNS,
        initial_indent=label,
        subsequent_indent=" " * len(label),
        break_on_hyphens=False,
    )
