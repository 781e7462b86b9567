"""Asking for help costs less than importing numpy; reading words loads nothing heavy."""

import subprocess
import sys
from statistics import median
from time import perf_counter

import pytest

HELP = "from beamfield.cli.entry import main; main(['--help'])"
HEAVY = {"numba", "scipy", "matplotlib", "h5py", "distributed"}


def seconds(code):
    start = perf_counter()
    subprocess.run([sys.executable, "-c", code], check=True, stdout=subprocess.DEVNULL)
    return perf_counter() - start


def test_help_is_no_slower_than_one_and_a_half_imports_of_numpy():
    pairs = [(seconds(HELP), seconds("import numpy")) for _ in range(7)]
    ours, theirs = (median(times) for times in zip(*pairs))
    assert ours < 1.5 * theirs


def loaded_by(code):
    away = "import io, sys; out, sys.stdout = sys.stdout, io.TextIOWrapper(io.BytesIO())"
    listing = f"{away}\n{code}\nprint(*sys.modules, file=out)"
    run = subprocess.run([sys.executable, "-c", listing], check=True, capture_output=True, text=True)
    return {name.split(".")[0] for name in run.stdout.split()}


def command(words, code):
    return f"from beamfield.cli.entry import main; assert main({words.split()}) == {code}"


@pytest.mark.parametrize(("words", "code"), [("--help", 0), ("--version", 0), ("report --help", 0), ("reprot", 2)])
def test_words_load_not_even_numpy(words, code):
    assert not loaded_by(command(words, code)) & (HEAVY | {"numpy", "yaml"})


@pytest.mark.parametrize(("words", "code"), [("explain", 0), ("schema", 0), ("new", 0), ("report missing.yaml", 2)])
def test_pages_about_words_load_nothing_heavier_than_numpy(words, code):
    assert not loaded_by(command(words, code)) & HEAVY


def test_the_package_itself_is_light_and_offers_the_door():
    assert not loaded_by("import beamfield; beamfield.__version__") & (HEAVY | {"numpy", "yaml"})
    assert not loaded_by("import beamfield; beamfield.load; beamfield.superpose") & HEAVY
