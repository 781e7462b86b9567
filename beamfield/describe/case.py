"""A case: text -> located tree -> checked, immutable nouns in SI; or every fault of it at once."""

from dataclasses import dataclass, field, replace
from pathlib import Path

from beamfield.beam.beamline import Beamline
from beamfield.beam.bunch import Bunch
from beamfield.beam.numerics import Numerics
from beamfield.beam.ring import Ring
from beamfield.beam.surroundings import Surroundings
from beamfield.describe import located
from beamfield.describe.beamline_section import beamline as read_beamline
from beamfield.describe.bunch_section import bunch as read_bunch
from beamfield.describe.company_section import encounter as read_encounter
from beamfield.describe.company_section import train as read_train
from beamfield.describe.contradictions import contradictions
from beamfield.describe.limits_section import check_needs
from beamfield.describe.limits_section import limits as read_limits
from beamfield.describe.quantity import Quantity
from beamfield.describe.ring_section import ring as read_ring
from beamfield.describe.structure import check
from beamfield.describe.surroundings_section import surroundings as read_surroundings
from beamfield.describe.tree import Mapping, with_value
from beamfield.errors import Fault, InputError
from beamfield.judge.limit import Limit

TEXT = "<text>"  # the file of a case that came as text


@dataclass(frozen=True, slots=True, eq=False)
class Case:
    """One checked case.

    title        as written, else the name of the file
    file         as given to `load`
    warnings     what a reader should know before using the results
    places       key -> (line, column) of its value, from 1
    quantities   key -> Quantity, as written
    tree, folder what the case was built from; `varied` builds it anew
    """

    title: str
    file: str
    bunch: Bunch
    surroundings: Surroundings
    ring: Ring | None
    beamline: Beamline | None
    limits: tuple[Limit, ...]
    numerics: Numerics
    warnings: tuple[str, ...] = ()
    places: dict[str, tuple[int, int]] = field(default_factory=dict, repr=False)
    quantities: dict[str, Quantity] = field(default_factory=dict, repr=False)
    tree: Mapping | None = field(default=None, repr=False)
    folder: Path = field(default=Path(), repr=False)

    @property
    def tolerances(self):
        """Key -> tolerance in SI (radians, particles), for each quantity that was written with one."""
        found = {key: quantity.si_tolerance for key, quantity in self.quantities.items()}
        return {key: tolerance for key, tolerance in found.items() if tolerance is not None}

    def varied(self, values):
        """The same case with other texts at some keys, {'bunch.intensity': '2e11 particles'}; InputError as `load`."""
        tree = self.tree
        for key, text in values.items():
            tree = with_value(tree, key, text)
        return build(tree, self.file, self.folder)


def load(path):
    """Case of a file; InputError with every fault found in it, each with its line and column."""
    path = Path(path)
    try:
        with path.open("rb") as opened:
            data = opened.read(located.MOST_BYTES + 1)
    except (OSError, ValueError) as error:
        raise InputError(Fault(f"cannot be read: {_reason(error)}", file=str(path))) from None
    return parse(located.decode(data, str(path)), str(path), path.parent)


def parse(text, file=TEXT, folder=Path()):
    """Case of a text, the files that it names being relative to a folder; InputError as `load`."""
    return build(located.read(text, file), file, folder)


def build(tree, file=TEXT, folder=Path()):
    """Case of a located tree; InputError as `load`."""
    reading = check(tree, file)
    reading.read_all()
    ring, beamline, surroundings = read_ring(reading, folder), read_beamline(reading), read_surroundings(reading)
    bunch = read_bunch(reading, ring, beamline, folder)
    company = {"train": read_train(reading, bunch), "encounter": read_encounter(reading, folder)}
    surroundings = replace(surroundings, **company)
    limits = read_limits(reading)
    if bunch:
        beamline = beamline and _started(beamline, bunch)
        contradictions(reading, bunch, surroundings, ring, beamline)
        check_needs(reading, limits, bunch, ring, surroundings)
    numerics = _numerics(reading)
    reading.finish()
    return Case(
        title=reading.text("title") or (file if file == TEXT else Path(file).stem),
        file=file,
        bunch=bunch,
        surroundings=surroundings,
        ring=ring,
        beamline=beamline,
        limits=tuple(limits.values()),
        numerics=numerics,
        warnings=tuple(reading.warnings),
        places={key: (node.line, node.column) for key, node in reading.nodes.items() if key},
        quantities=reading.quantities,
        tree=tree,
        folder=folder,
    )


def _reason(error):
    return getattr(error, "strerror", None) or str(error)


def _numerics(reading):
    names = Numerics.__dataclass_fields__
    return Numerics(**{name: reading.word(f"numerics.{name}") for name in names if f"numerics.{name}" in reading})


def _started(beamline, bunch):
    """The beamline, the beta functions left out of its start being those of the sizes and emittances."""
    if beamline.start is None or bunch.emittance is None:
        return beamline
    own_beta = (size**2 / emittance for size, emittance in zip(bunch.sigma, bunch.emittance))
    beta = tuple(given or own for given, own in zip(beamline.start.beta, own_beta))
    return replace(beamline, start=replace(beamline.start, beta=beta))
