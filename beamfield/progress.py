"""How far a long piece of work has come, for whoever watches; nobody does unless asked."""

watcher = None  # called with what is done and the fraction of it, 0 to 1


def told(what, fraction):
    """Tell the watcher, if there is one."""
    if watcher is not None:
        watcher(what, fraction)
