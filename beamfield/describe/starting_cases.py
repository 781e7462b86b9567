"""Cases to start from, each of another kind of beam, at a facility that does not exist."""

STARTING_CASES = {  # kind -> (what it shows, the case as nested texts)
    "ring": (
        "A bunch in a synchrotron at injection, where the direct tune shift decides.",
        {
            "title": "Quillmoor ring, injection plateau",
            "bunch": {
                "species": "proton",
                "energy": "120 MeV kinetic",
                "intensity": "6e11 ± 0.3e11 particles",
                "shape": "gaussian",
                "size": {"x": "6.1 mm rms", "y": "5.5 mm rms", "z": "95 ns rms"},
                "emittance": {"x": "2.6 um normalised rms", "y": "2.4 um normalised rms"},
                "momentum_spread": "1.2e-3 rms",
            },
            "surroundings": {"chamber": {"shape": "elliptic", "half_width": "64 mm", "half_height": "38 mm"}},
            "ring": {
                "circumference": "142 m",
                "tune": {"x": "4.17", "y": "4.23"},
                "bunches": "1",
                "optics": {"beta_x": "6.8 m", "beta_y": "6.6 m", "dispersion_x": "1.4 m"},
            },
            "limits": ['"|tune_shift_y| < 0.25"', '"|tune_shift_x| < 0.25"'],
            "numerics": {"method": "superposition", "charges_per_probe": "32768"},
        },
    ),
    "linac": (
        "A short ion bunch in one periodic cell of a linac.",
        {
            "title": "Quillmoor ion linac, second tank",
            "bunch": {
                "species": {"isotope": "Ar-40", "charge_state": "9"},
                "energy": "1.4 MeV/u kinetic",
                "intensity": "3 mA mean",
                "repetition": "108.5 MHz",
                "shape": "parabolic-ellipsoid",
                "size": {"x": "5.5 mm semi", "y": "4.0 mm semi", "z": "9 mm semi"},
                "emittance": {"x": "0.25 um normalised rms", "y": "0.25 um normalised rms"},
            },
            "surroundings": {"chamber": {"shape": "round", "radius": "15 mm"}},
            "beamline": {
                "start": "matched",
                "elements": [
                    ("quadrupole", {"length": "80 mm", "gradient": "42 T/m"}),
                    ("drift", {"length": "40 mm"}),
                    ("gap", {"voltage": "350 kV", "frequency": "108.5 MHz", "phase": "-30 deg"}),
                    ("drift", {"length": "40 mm"}),
                    ("quadrupole", {"length": "80 mm", "gradient": "-42 T/m"}),
                    ("drift", {"length": "80 mm"}),
                ],
                "repeat": "12",
            },
            "limits": ['"space_charge_ratio_x < 20"', '"defocusing_x < 2 1/m2"'],
        },
    ),
    "coasting": (
        "An unbunched beam that fills a ring.",
        {
            "title": "Quillmoor storage ring, coasting carbon",
            "bunch": {
                "species": {"isotope": "C-12", "charge_state": "6"},
                "energy": "50 MeV/u kinetic",
                "intensity": "60 mA mean",
                "shape": {"transverse": "kv", "longitudinal": "coasting"},
                "emittance": {"x": "12 um geometric full", "y": "8 um geometric full"},
                "momentum_spread": "0.05 % rms",
            },
            "surroundings": {"neutralisation": "0"},
            "ring": {"circumference": "96 m", "tune": {"x": "2.41", "y": "2.31"}},
            "limits": ['"|tune_shift_y| < 0.1"'],
        },
    ),
    "gun": (
        "A short electron bunch just behind its cathode.",
        {
            "title": "Quillmoor photoinjector, 30 ps after emission",
            "bunch": {
                "species": "electron",
                "energy": "gamma 1.6",
                "intensity": "250 pC",
                "shape": "uniform-cylinder",
                "size": {"x": "0.9 mm semi", "y": "0.9 mm semi", "z": "8 ps full"},
            },
            "surroundings": {"cathode": {"at": "4 mm"}},
            "limits": ['"peak_field_x < 5 MV/m"'],
            "numerics": {"charges_per_probe": "131072"},
        },
    ),
    "particles": (
        "A bunch known particle by particle, from a file that you put beside the case:\n"
        "x,y,z,ux,uy,uz in the first line, then a particle a line, in m and in units of m c.",
        {
            "title": "Quillmoor transfer line, tracked bunch",
            "bunch": {
                "species": "H-",
                "energy": "0.57 GeV/c",
                "intensity": "0.9 nC",
                "shape": {"particles": "macro.csv"},
            },
            "limits": ['"peak_field_x < 5 MV/m"'],
            "numerics": {"seed": "1"},
        },
    ),
    "collider": (
        "Two bunches that meet, and what the encounter does to the tune.",
        {
            "title": "Quillmoor collision point",
            "bunch": {
                "species": "positron",
                "energy": "1.15 GeV total",
                "intensity": "2.4e10 particles",
                "shape": "gaussian",
                "size": {"x": "200 um rms", "y": "20 um rms", "z": "9 mm rms"},
            },
            "other_bunch": {
                "species": "electron",
                "energy": "1.15 GeV total",
                "intensity": "2.1e10 particles",
                "shape": "gaussian",
                "size": {"x": "200 um rms", "y": "20 um rms", "z": "9 mm rms"},
                "direction": "opposing",
                "offset": {"y": "1.5 um"},
                "beta": {"x": "0.4 m", "y": "42 mm"},
            },
            "limits": ['"|beam_beam_tune_shift_y| < 0.05"'],
        },
    ),
}
