"""Numbers for people: a prefix that fits, as many digits as the doubt allows, points one below the other."""

from dataclasses import dataclass
from math import floor, isfinite, log10

PREFIXES = {-15: "f", -12: "p", -9: "n", -6: "µ", -3: "m", 0: "", 3: "k", 6: "M", 9: "G", 12: "T"}
PREFIXED = {"C", "A", "V", "V/m", "V/m2", "eV", "eV/c", "eV/m", "m", "rad", "rad/m", "T m", "ohm", "J", "s"}
LARGEST = {"m": 3}  # nobody says megametre
MOST_DIGITS = 6
ROUNDING = 1e-12  # relative: below it, what is printed is the value itself
BEFORE, AFTER = 6, 10  # characters left and right of a column's decimal point


@dataclass(frozen=True, slots=True)
class Scale:
    """How one row is written: value / factor, then the unit; `power` is a power of ten left in the number."""

    factor: float
    unit: str
    power: int = 0


def scale(value, unit):
    """The scale at which a value reads best: an engineering prefix, or a power of ten where no prefix is customary."""
    exponent = magnitude(value)
    if unit in PREFIXED:
        step = min(max(3 * (exponent // 3), min(PREFIXES)), LARGEST.get(unit, max(PREFIXES)))
        power = 0 if -1 <= exponent - step < 5 else exponent - step
        return Scale(10.0**step, PREFIXES[step] + pretty(unit), power)
    return Scale(1.0, pretty(unit), 0 if -3 <= exponent < 5 else exponent)


def magnitude(value):
    """Power of ten of a value, 0 for zero and for what is no number."""
    return floor(log10(abs(value))) if value and isfinite(value) else 0


def digits(value, doubt, most=MOST_DIGITS):
    """Significant digits worth printing: down to the first digit of the doubt, never fewer than two."""
    if not (value and isfinite(value) and doubt and isfinite(doubt)):
        return most
    return min(most, max(2, magnitude(value) - magnitude(doubt) + 1))


def number(value, scale, digits):
    """The value on a scale: '-0.2431', '412.350', '3.412e-9'."""
    if not isfinite(value):
        return "none"
    mantissa = value / scale.factor / 10.0**scale.power
    behind = min(digits, 5 if scale.power else digits) - 1
    decimals = max(0, behind - magnitude(float(f"{mantissa:.{behind}e}")))
    return f"{mantissa:.{decimals}f}" + (f"e{scale.power}" if scale.power else "")


def shown(value, scale, digits):
    """The same without the zeros that tell nothing: those behind a number that is all there."""
    text = number(value, scale, digits)
    whole = isfinite(value) and abs(float(text) * scale.factor - value) <= ROUNDING * abs(value)
    return tidy(text) if whole else text


def tidy(text):
    """A number without zeros at the end of its decimals."""
    mantissa, e, power = text.partition("e")
    return (mantissa.rstrip("0").rstrip(".") if "." in mantissa else mantissa) + e + power


def on_the_point(text):
    """A number in a column of fixed width whose decimal points stand one below the other."""
    whole = text.partition("." if "." in text else "e")[0]
    return f"{whole:>{BEFORE}}{text[len(whole) :]:<{AFTER}}"


def pretty(unit):
    """The unit as it is written by hand; nothing for a plain number."""
    return "" if unit == "1" else unit.replace("2", "²")


def brief(value, unit="1", most=4):
    """One quantity in a sentence, without idle zeros: '1.2 nC', '6.1 mm', '3.5e12'."""
    at = scale(value, unit)
    return f"{tidy(number(value, at, most))} {at.unit}".rstrip()


def share(ratio):
    """A ratio as a person says it: '2.8 %', '0.3 %', '4e-7'."""
    size = abs(ratio)
    if not isfinite(size):
        return "none"
    return f"{100.0 * size:.2g} %" if 1e-3 <= size < 1.0 else f"{100.0 * size:.0f} %" if size >= 1.0 else order(size)


def order(size):
    """A small number by its order: '4e-7'; '0' for none."""
    return f"{size:.0e}".replace("e-0", "e-").replace("e+0", "e") if size else "0"
