"""The same words under another section: what reads 'bunch' can read 'other_bunch' as well."""


class Renamed:
    """A Reading in which the section `new` goes by the name `old`, and nothing else is there."""

    def __init__(self, reading, old, new):
        self._reading, self._old, self._new = reading, old, new

    def _there(self, key):
        return self._new + key.removeprefix(self._old)

    def _within(self, key):
        return key == self._old or key.startswith(f"{self._old}.")

    def __contains__(self, key):
        return self._within(key) and self._there(key) in self._reading

    @property
    def nodes(self):
        """Nodes of the section by their keys under the old name."""
        place = len(self._new)
        nodes = self._reading.nodes.items()
        return {self._old + key[place:]: node for key, node in nodes if f"{key}.".startswith(f"{self._new}.")}

    def written(self, *keys):
        """Those of some keys that stand in the case, under the old name."""
        return [key for key in keys if self._within(key) and self._there(key) in self._reading.nodes]

    def fault(self, key, message):
        return self._reading.fault(self._there(key), message)

    def warn(self, key, message):
        return self._reading.warn(self._there(key), message)

    def attempt(self, key, function, *arguments, **options):
        return self._reading.attempt(self._there(key), function, *arguments, **options)

    def quantity(self, key):
        return self._reading.quantity(self._there(key))

    def text(self, key):
        return self._reading.text(self._there(key))

    def si(self, key, absent=None):
        return self._reading.si(self._there(key), absent)

    def word(self, key, absent=None):
        return self._reading.word(self._there(key), absent)

    def within(self, key, value):
        return self._reading.within(self._there(key), value)
