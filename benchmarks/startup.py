"""How long one waits: help, an import of numpy, a first report that compiles, and warm reports of every demo case.

Prints a table of medians and their ratios, and writes the same as JSON. Usage:

    python benchmarks/startup.py [RESULTS.json]
"""

import json
import os
import subprocess
import sys
import tempfile
from pathlib import Path
from statistics import median
from time import perf_counter

ROOT = Path(__file__).parents[1]
CONFIGS = sorted((ROOT / "configs").glob("*.yaml"))
SHORT, LONG = 9, 3  # repetitions of what takes a moment and of what takes seconds


def seconds(*words, **environment):
    """Wall clock of a fresh interpreter [s]; a limit that is broken is no failure here."""
    start = perf_counter()
    done = subprocess.run(
        [sys.executable, *words], cwd=ROOT, env=os.environ | environment, stdout=subprocess.DEVNULL, check=False
    )
    taken = perf_counter() - start
    if done.returncode not in (0, 3):
        raise SystemExit(f"{' '.join(words)}: ended with {done.returncode}")
    return taken


def medians(repetitions, **commands):
    """Median of each command by name, the commands taken in turn so that a busy moment meets all of them."""
    rounds = [{name: seconds(*words) for name, words in commands.items()} for _ in range(repetitions)]
    return {name: median(each[name] for each in rounds) for name in commands}


def first_report():
    """A report with nothing compiled yet [s]."""
    with tempfile.TemporaryDirectory() as cache:
        return seconds("-m", "beamfield", "report", str(CONFIGS[0]), NUMBA_CACHE_DIR=cache)


def measured():
    """Seconds by what was waited for."""
    found = medians(SHORT, numpy=("-c", "import numpy"), help=("-m", "beamfield", "--help"))
    found["first report, compiling"] = first_report()
    for path in CONFIGS:
        words = ("-m", "beamfield", "report", str(path))
        seconds(*words)
        found |= medians(
            LONG, **{f"report {path.stem}": words, f"closed form {path.stem}": (*words, "--method", "closed-form")}
        )
    return found


def table(found):
    rows = [f"{name:36}{taken:8.2f} s{taken / found['numpy']:8.1f} x numpy" for name, taken in found.items()]
    return "\n".join([f"{os.cpu_count()} cores, medians of wall clock", *rows])


if __name__ == "__main__":
    found = measured()
    print(table(found))
    target = Path(sys.argv[1] if len(sys.argv) > 1 else "startup.json")
    target.write_text(json.dumps({"cores": os.cpu_count(), "seconds": found}, indent=2) + "\n", encoding="utf-8")
