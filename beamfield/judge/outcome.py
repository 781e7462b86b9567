"""A case evaluated and judged: what the pages print and the exit code is made from."""

from dataclasses import dataclass

from beamfield.beam.bunch import Bunch
from beamfield.estimate.finding import Finding
from beamfield.judge.limit import Verdict


@dataclass(frozen=True, slots=True)
class Outcome:
    """title and file of the case; findings by name, in the order of the catalogue; verdicts in the order of the limits;
    warnings about the case as a whole; checks, the tool's self-checks as (sentence, passed); the bunch itself."""

    title: str
    file: str
    findings: dict[str, Finding]
    verdicts: tuple[Verdict, ...] = ()
    warnings: tuple[str, ...] = ()
    checks: tuple[tuple[str, bool], ...] = ()
    bunch: Bunch | None = None

    def __getitem__(self, name):
        return self.findings[name]

    def __contains__(self, name):
        return name in self.findings

    @property
    def met(self):
        return all(verdict.met for verdict in self.verdicts)
