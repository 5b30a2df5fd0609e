#!/usr/bin/env python3
"""Compare the built-in source atomic-weights-2021 with the package it was entered from.

The package `periodictable` (2.1.0) carries the standard atomic weights of 2021 as text,
`value(uncertainty)` with the digits of the report. This script reads that text, not the
package's floating-point numbers, so that every digit is compared.

Run:  python3 tests/outside/sources/check_atomic_weights.py           compare
      python3 tests/outside/sources/check_atomic_weights.py --write   write the file anew
Exit status: 0 when every element agrees, 1 when any does not or when the package is not
installed: a comparison that could not be made is not a comparison that was passed.
"""

import re
import sys
import tomllib
from decimal import Decimal
from pathlib import Path

SOURCE = Path(__file__).resolve().parents[3] / "src" / "source" / "data" / "atomic-weights-2021.toml"

HEADER = """\
# Standard atomic weights 2021 of IUPAC's Commission on Isotopic Abundances and Atomic
# Weights (CIAAW).
#
# Entered from the text table in the Python package periodictable 2.1.0, which names the
# report and the CIAAW's table (read there 2023-07-06) as its origin. Not compared with
# the report. Elements whose atomic weight is an interval (H, Li, B, C, N, O, Mg, Si, S,
# Cl, Ar, Br, Tl, Pb) carry the report's abridged value; the others the full value.
#
# The uncertainty is a bound: the atomic weight in any normal material is expected within
# it (coverage "bounds", read as a rectangular half-width, u = a/sqrt(3); after Possolo,
# van der Veen, Meija, Hibbert, Pure Appl. Chem. 90 (2018) 395, from memory).
#
# Notes of the report: g, geological materials are known outside the bounds; m, modified
# isotopic composition may be met in commercial material; r, the range in normal
# material keeps the value from being given more exactly.
#
# Some elements were revised later (Gd, Lu and Zr in 2024, from memory); the table of
# 2021 is kept as it stood.

[source]
id = "atomic-weights-2021"
title = "Standard atomic weights of the elements 2021 (IUPAC Technical Report)"
authors = "T. Prohaska, J. Irrgeher, J. Benefield, et al.; IUPAC Commission on Isotopic Abundances and Atomic Weights"
year = 2022
publisher = "Pure and Applied Chemistry 94 (2022) 573-600 (volume and pages from memory)"
edition = "2021"
doi = "10.1515/pac-2019-0603"
coverage = "bounds"
digits = "significant"
standing = "entered once"
"""


def read_package():
    """One (symbol, name, "value ± bound", notes) for each element with a value."""
    from periodictable.mass import element_mass

    elements = []
    for line in element_mass.strip().splitlines():
        _, symbol, name, printed, *rest = line.split()
        if printed != "-":
            notes = [word for word in rest if not word.startswith("[")]
            elements.append((symbol, name, printed_value(printed), notes))
    return elements


def printed_value(printed):
    """`12.011(2)` as `12.011 ± 0.002`; `207.2(1.1)` as `207.2 ± 1.1`."""
    value, bound = re.fullmatch(r"([0-9.]+)\(([0-9.]+)\)", printed).groups()
    decimals = len(value.partition(".")[2])
    if "." not in bound:
        bound = f"{Decimal(bound).scaleb(-decimals):f}"
    return f"{value} ± {bound}"


def expected_entry(symbol, name, value, notes):
    entry = {
        "substance": symbol,
        "name": name,
        "locator": f"table of standard atomic weights, {name} row; page not recorded",
    }
    if notes:
        entry["note"] = "notes of the report: " + ", ".join(notes)
    entry["atomic-weight"] = value
    return entry


def write(entries):
    parts = [HEADER]
    for entry in entries:
        lines = [f'{key} = "{value}"' for key, value in entry.items()]
        parts.append("\n[[entry]]\n" + "\n".join(lines) + "\n")
    SOURCE.write_text("".join(parts), encoding="utf-8")


def compare(entries):
    """What differs between the package and the source file, one line per fault."""
    with SOURCE.open("rb") as file:
        found = tomllib.load(file)["entry"]
    faults = []
    if len(found) != len(entries):
        faults.append(f"the package has {len(entries)} elements, the source {len(found)}")
    for want, entry in zip(entries, found):
        if want != entry:
            faults.append(f"{want['substance']}: the source has {entry}, the package {want}")
    return faults


def main():
    try:
        entries = [expected_entry(*element) for element in read_package()]
    except ImportError:
        print("periodictable is not installed: nothing was compared", file=sys.stderr)
        return 1
    if sys.argv[1:] == ["--write"]:
        write(entries)
    faults = compare(entries)
    for fault in faults:
        print(fault, file=sys.stderr)
    print(f"atomic-weights-2021: {len(entries)} elements compared, {len(faults)} differences")
    return 1 if faults or not entries else 0


if __name__ == "__main__":
    sys.exit(main())
