"""Emphasis on a page: with colour on a terminal that wants it, else the words alone, which say everything."""

from dataclasses import dataclass

STRONG, FAINT, CALM, ALARM = "1", "2", "36", "1;35"  # bold, dim, cyan, bold magenta: apart for every kind of eye


@dataclass(frozen=True, slots=True)
class Ink:
    """Wraps text that has its final width already."""

    colour: bool = False

    def strong(self, text):
        return self._in(STRONG, text)

    def faint(self, text):
        return self._in(FAINT, text)

    def calm(self, text):
        return self._in(CALM, text)

    def alarm(self, text):
        return self._in(ALARM, text)

    def _in(self, code, text):
        return f"\x1b[{code}m{text}\x1b[0m" if self.colour and text.strip() else text
