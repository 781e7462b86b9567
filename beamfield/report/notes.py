"""What a reader should know before using a number: collected once, numbered in the order of the page."""

from beamfield.report.human import share

ROUNDING = 1e-9  # relative: below it, superposed and textbook values count as equal whatever the doubt


def difference(finding):
    """Relative difference of superposed and textbook value where it is more than the doubt explains, else None."""
    if finding.closed_form is None:
        return None
    apart = abs(finding.value - finding.closed_form)
    if apart <= max(finding.doubt, ROUNDING * abs(finding.closed_form)):
        return None
    return apart / (abs(finding.closed_form) or abs(finding.value))


class Notes:
    """Notes by text, each with the results it speaks of; a text said twice is one note."""

    def __init__(self, findings):
        self._about = {}
        for finding in findings:
            for text in _texts(finding):
                self._about.setdefault(text, []).append(finding.name)

    def numbers(self, finding):
        """Numbers of the notes on one finding, from 1."""
        return [1 + list(self._about).index(text) for text in _texts(finding)]

    def __iter__(self):
        """Pairs of a text and the names it speaks of."""
        return iter(self._about.items())


def _texts(finding):
    apart = difference(finding)
    if apart is not None:
        yield f"superposed and textbook values differ by {share(apart)}, more than the doubt explains"
    yield from finding.remarks
