"""An answer: what it is, how it was got, how far to trust it."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Finding:
    """One result of one case.

    name         as in the catalogue
    value        SI, or the unit that the catalogue names
    doubt        estimated numerical error of value, same unit
    closed_form  the textbook value where the shape has one, else None
    method       how value was got
    remarks      what a reader should know before using it
    valid        False outside the domain of the formula; a remark says why
    """

    name: str
    value: float
    doubt: float
    closed_form: float | None
    method: str
    remarks: tuple[str, ...] = ()
    valid: bool = True
