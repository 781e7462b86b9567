"""The house keeps its own rules: a room imports only lower rooms, and every library has its passport.

Read from the source, imports inside functions included, so that a door opened late is seen too.
"""

import ast
from pathlib import Path
from statistics import median

import pytest

HOUSE = Path(__file__).parents[1] / "beamfield"
LEVEL = {"__init__": 7, "__main__": 9, "constants": 0, "errors": 0, "progress": 0, "kernels": 1, "laws": 1}
LEVEL |= {"beam": 2, "estimate": 3, "judge": 4, "describe": 5, "report": 5, "study": 6, "api": 7, "cli": 8}
PASSPORTS = {  # library -> where it may be imported
    "numba": {"kernels"},
    "yaml": {"describe"},
    "argparse": {"cli"},
    "sys": {"cli"},
}
LATE = {
    "scipy",
    "matplotlib",
    "h5py",
    "distributed",
    "numba",
}  # only inside functions, so that help and misreadings are quick
FILES = sorted(HOUSE.rglob("*.py"))


def room(path):
    return path.relative_to(HOUSE).parts[0].removesuffix(".py")


def imports(tree):
    """Dotted names that a tree imports; `from beamfield import api` counts as beamfield.api."""
    for node in ast.walk(tree):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, "imports are absolute"
            yield from (f"{node.module}.{alias.name}" for alias in node.names)


def outside_functions(tree):
    """Nodes that are run when a file is imported."""
    for node in ast.iter_child_nodes(tree):
        if not isinstance(node, ast.FunctionDef | ast.Lambda):
            yield node
            yield from outside_functions(node)


def trees():
    return [
        pytest.param(path, ast.parse(path.read_text(encoding="utf-8")), id=str(path.relative_to(HOUSE)))
        for path in FILES
    ]


@pytest.mark.parametrize(("path", "tree"), trees())
def test_directions(path, tree):
    here = room(path)
    for name in imports(tree):
        parts = name.split(".")
        there = parts[1] if parts[0] == "beamfield" and parts[1] in LEVEL else None
        if there and there != here:
            assert LEVEL[there] < LEVEL[here] or here == "__init__", f"{here} looks up to {name}"
            assert here != "cli" or there in ("api", "errors"), f"cli goes round the door: {name}"


@pytest.mark.parametrize(("path", "tree"), trees())
def test_passports(path, tree):
    for name in imports(tree):
        library = name.split(".")[0]
        assert room(path) in PASSPORTS.get(library, {room(path)}), f"{room(path)} may not import {library}"


@pytest.mark.parametrize(("path", "tree"), trees())
def test_slow_libraries_wait_for_the_call(path, tree):
    at_once = {name.split(".")[0] for name in imports(ast.Module(list(outside_functions(tree)), []))}
    assert not at_once & (LATE - ({"numba"} if room(path) == "kernels" else set()))


@pytest.mark.parametrize(("path", "tree"), trees())
def test_only_the_command_line_prints(path, tree):
    calls = {getattr(node.func, "id", "") for node in ast.walk(tree) if isinstance(node, ast.Call)}
    assert not calls & ({"eval", "exec", "compile", "input"} | ({"print"} if room(path) != "cli" else set()))


@pytest.mark.parametrize(("path", "tree"), trees())
def test_chance_is_drawn_in_sampling_alone(path, tree):
    used = {ast.unparse(node) for node in ast.walk(tree) if isinstance(node, ast.Attribute)} | set(imports(tree))
    assert "sampl" in path.stem or not {"np.random", "numpy.random", "random", "scipy.stats.qmc"} & used


def test_no_two_files_share_a_name_and_none_has_a_vague_one():
    names = [path.stem for path in FILES if path.stem != "__init__"]
    assert len(set(names)) == len(names)
    assert not {"utils", "util", "core", "helpers", "helper", "common", "base", "misc"} & set(names)


def test_files_stay_small():
    lengths = {
        path.name: len(path.read_text(encoding="utf-8").splitlines()) for path in FILES if path.stem != "__init__"
    }
    assert max(lengths.values()) <= 250, max(lengths, key=lengths.get)
    assert median(lengths.values()) <= 100
