"""The one way to compile a kernel: strict IEEE arithmetic, no lock held, kept on disk where a disk can be written."""

from contextlib import suppress
from pathlib import Path

from numba import njit
from numba.core import event

from beamfield.kernels import notice


def compiled(parallel=False, inline="never"):
    """Decorator: njit with error_model="numpy", cached where a cache folder is writable; never fastmath."""
    options = {"parallel": parallel, "nogil": True, "inline": inline, "error_model": "numpy"}

    def decorate(function):
        try:
            return njit(cache=True, **options)(function)
        except RuntimeError:  # no folder to keep the machine code in
            return njit(**options)(function)

    return decorate


def inner(function):
    """Decorator for kernels that only kernels call: no door from Python is compiled, and nothing is kept on disk."""
    return njit(nogil=True, error_model="numpy", no_cpython_wrapper=True, no_cfunc_wrapper=True)(function)


class _Tell(event.Listener):
    """Calls notice.tell once, when the first kernel is compiled because no kept machine code fits."""

    def on_start(self, event):
        told, notice.tell = notice.tell, None
        if told is not None:
            told()

    def on_end(self, event):
        pass


event.register("numba:compile", _Tell())


def _forget_stale():
    """Drop machine code older than the newest kernel source: numba watches one file, and a kernel may inline
    another.
    """
    folder = Path(__file__).parent
    newest = max(path.stat().st_mtime for path in folder.glob("*.py"))
    for index in (folder / "__pycache__").glob("*.nbi"):
        if index.stat().st_mtime < newest:
            index.unlink(missing_ok=True)


with suppress(OSError):  # a folder that cannot be written cannot be stale either
    _forget_stale()
