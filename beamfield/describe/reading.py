"""What has been read of a case so far: the nodes and values by key, and every fault found on the way."""

from beamfield.describe import checked_quantity
from beamfield.describe.kinds import CONVERTED
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.number_text import whole_number
from beamfield.describe.tree import Scalar
from beamfield.describe.vocabulary import key as entry
from beamfield.errors import Fault, InputError

_MOST_FAULTS = 100


class Reading:
    """Nodes by key, quantities of the keys that have been read as such, faults and warnings.

    A key whose text was refused has a node and no value, and one that was misspelt or stood in an unreadable section is
    among `unread`: whoever needs it then stays silent, for its fault is said.
    """

    def __init__(self, file, nodes):
        self.file, self.nodes = file, nodes
        self.quantities, self.words, self.faults, self.warnings = {}, {}, [], []
        self.unread = set()

    def __contains__(self, key):
        """Whether the case has the key, readable or not."""
        return key in self.nodes or any(f"{key}.".startswith(f"{lost}." if lost else "") for lost in self.unread)

    def written(self, *keys):
        """Those of some keys that stand in the case as they should be written."""
        return [key for key in keys if key in self.nodes]

    def place(self, key):
        """Line and column of a key, or of the nearest section above it that the case has."""
        while key and key not in self.nodes:
            key = key.rpartition(".")[0]
        node = self.nodes.get(key)
        return (node.line, node.column) if node else (1, 1)

    def fault(self, key, message, place=None):
        """Complain about a key, at its own place unless another is given."""
        self.faults.append(Fault(message, key, *(place or self.place(key)), self.file))

    def warn(self, key, message):
        self.warnings.append(f"{key}: {message}")

    def attempt(self, key, function, *arguments, **options):
        """function(*arguments, **options), or None where an argument is None; what it refuses is a fault of the key."""
        if any(argument is None for argument in arguments):
            return None
        try:
            return function(*arguments, **options)
        except InputError as error:
            self.faults.extend(self._placed(fault, key) for fault in error.faults)
        return None

    def _placed(self, fault, key):
        """A fault of another file stays where it is; one without a place is put at the key."""
        return fault if fault.line else Fault(fault.message, key, *self.place(key), self.file)

    def text(self, key):
        """The text of a scalar, or None."""
        node = self.nodes.get(key)
        return node.text if isinstance(node, Scalar) and not node.empty else None

    def quantity(self, key):
        """The quantity that stands at a key, or None."""
        return self.quantities.get(key)

    def si(self, key, absent=None):
        """The SI value of a quantity whose kind has but one meaning; `absent` where the case lacks it."""
        if key not in self:
            return absent
        return self.quantities[key].si if key in self.quantities else None

    def word(self, key, absent=None):
        """A word, text, file name or whole number that has been read; `absent` where the case lacks it."""
        return self.words.get(key) if key in self else absent

    def within(self, key, value):
        """The value that a key came to, or None with a fault where the vocabulary does not allow it."""
        return self.attempt(key, entry(key).check, value, self.text(key) or "")

    def read_all(self):
        """Read every scalar as the vocabulary says."""
        for key, node in self.nodes.items():
            if isinstance(node, Scalar) and not node.empty:
                self._read(key, entry(key), node.text)

    def _read(self, key, said, text):
        if said.quantity:
            self._read_quantity(key, said, text)
        else:
            value = self.attempt(key, _READERS.get(said.kind, _text), text, said)
            self.words.update({} if value is None else {key: value})

    def _read_quantity(self, key, said, text):
        quantity = self.attempt(key, checked_quantity.read, text, said.kind)
        if quantity and said.kind not in CONVERTED:
            quantity = quantity if self.within(key, quantity.si) is not None else None
        if quantity:
            self.quantities[key] = quantity

    def finish(self):
        """Raise InputError with all faults, in the order of their places, where there are any."""
        if self.faults:
            faults = sorted(
                dict.fromkeys(self.faults), key=lambda fault: (fault.file != self.file, fault.line, fault.column)
            )
            raise InputError(*faults[:_MOST_FAULTS], *_rest(faults[_MOST_FAULTS:]))


def _rest(faults):
    return [Fault(f"and {len(faults)} more faults", "", *_at(faults[0]))] if faults else []


def _at(fault):
    return fault.line, fault.column, fault.file


def _text(text, _):
    return text


def _whole(text, said):
    return said.check(whole_number(text), text)


def _word(text, said):
    if text in said.choices:
        return text
    way = hint(text, said.choices) or f"; choose from {', '.join(said.choices)}"
    raise InputError(f"{excerpt(text)} is not known here{way}")


_READERS = {"whole": _whole, "word": _word}
