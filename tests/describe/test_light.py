"""Reading words is quick: nothing heavy is imported, and a case is built in a few milliseconds."""

import subprocess
import sys
from time import perf_counter

from tests.describe.ring_case import case

WHOLE_ROOM = (
    "import sys; from beamfield.describe import case, schema, starter; starter.starter(); schema.schema(); "
    "heavy = {'scipy', 'numba', 'yaml', 'matplotlib'} & set(sys.modules); assert not heavy, heavy"
)


def test_imports():
    subprocess.run([sys.executable, "-c", WHOLE_ROOM], check=True)


def test_ten_thousand_variants_are_feasible():
    """A bound, not a benchmark: a variant took 0.7 ms; 20 ms would make 10 000 of them 200 s."""
    whole = case()
    start = perf_counter()
    for number in range(1, 51):
        whole.varied({"bunch.intensity": f"{number}e10 particles"})
    assert (perf_counter() - start) / 50 < 0.02
