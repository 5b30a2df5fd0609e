#!/usr/bin/env python3
"""FeCl3(g) in the 2004 edition of NASA's file, as the package pyglenn carries it, in J/mol.

Prints one JSON document: the enthalpy as printed there and the version of the package.
"""

import importlib.metadata
import json
import sys
from pathlib import Path

import pyglenn


def printed_enthalpy():
    """Columns 66 to 80 of the line after the record's name."""
    path = Path(pyglenn.__file__).parent / "data" / "thermo.inp"
    lines = path.read_text(encoding="latin-1").splitlines()
    names = [at for at, line in enumerate(lines) if line.split()[:1] == ["FeCL3"]]
    (at,) = names  # the gas alone; the condensed forms have a phase in their names
    return lines[at + 1][65:80].strip()


json.dump({"pyglenn": importlib.metadata.version("pyglenn"), "printed": printed_enthalpy()}, sys.stdout)
