"""The one way to compile: strict, without the lock, and still there where machine code cannot be kept."""

import pytest

from beamfield.kernels import compiled as module
from beamfield.kernels.moving_charge import one_charge, superpose
from beamfield.kernels.probe_charges import probe_field


@pytest.mark.large
@pytest.mark.parametrize("kernel", [one_charge, superpose, probe_field])
def test_strict_arithmetic(kernel):
    """fastmath would make isnan(nan) False and the sum depend on the processor."""
    options = kernel.targetoptions
    assert not options.get("fastmath")
    assert options["error_model"] == "numpy"
    assert options["nogil"]


def test_no_folder_to_keep_code_in(monkeypatch):
    """Where numba finds no folder for its cache it raises while it decorates; the kernel is then compiled unkept."""
    asked = []

    def njit(cache=False, **options):
        asked.append(cache)
        if cache:
            raise RuntimeError("cannot cache function: no locator available")
        return lambda function: ("compiled", function)

    monkeypatch.setattr(module, "njit", njit)
    assert module.compiled()(len) == ("compiled", len)
    assert asked == [True, False]
