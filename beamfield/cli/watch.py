"""A line on the terminal that says how far a long piece of work has come and how long it will still take."""

import sys
import time

PATIENCE = 2.0  # seconds before anything is shown
PAUSE = 0.25  # seconds between two lines


class Watch:
    """Called with what is done and the fraction of it; writes to standard error, over the last line, and wipes it at
    the end.
    """

    def __init__(self, clock=time.monotonic):
        """`clock` gives seconds."""
        self.clock, self.what, self.since, self.shown = clock, None, 0.0, None

    def __call__(self, what, fraction):
        now = self.clock()
        if what != self.what:
            self.what, self.since, self.shown = what, now, None
        if fraction >= 1.0:
            self._write("" if self.shown is not None else None)
            self.what = None
        elif now - self.since >= PATIENCE and (self.shown is None or now - self.shown >= PAUSE):
            self.shown = now
            left = (now - self.since) * (1.0 / fraction - 1.0) if fraction > 0.0 else None
            self._write(f"beamfield: {what}: {fraction:4.0%}{'' if left is None else f', {_span(left)} left'}")

    def _write(self, text):
        if text is not None:
            print(f"\r\x1b[K{text}", end="", file=sys.stderr, flush=True)


def _span(seconds):
    return f"{seconds:.0f} s" if seconds < 120.0 else f"{seconds / 60.0:.0f} min"
