"""`python -m beamfield` is the command `beamfield`."""

from beamfield.cli.entry import main

if __name__ == "__main__":
    raise SystemExit(main())
