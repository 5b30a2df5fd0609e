#!/usr/bin/env python3
"""Compare the built-in source codata-1989 with the table that it was entered from.

The table (codata-1989-selection.tsv, beside this script) keeps species, phase, value,
uncertainty and how far each row was verified. Every row must appear in the source file
with the same digits, in the same order, and no entry may be there without a row.

Run: python3 tests/outside/sources/check_codata.py
Exit status: 0 when every row agrees, 1 when any does not.
"""

import re
import sys
import tomllib
from pathlib import Path

HERE = Path(__file__).resolve().parent
TABLE = HERE / "codata-1989-selection.tsv"
SOURCE = HERE.parents[2] / "src" / "source" / "data" / "codata-1989.toml"

STANDING = {
    "zero by definition": "by definition",
    "value and uncertainty seen": "entered once",
    "value seen, uncertainty from memory": "from memory",
    "from memory, agrees with another table": "from memory",
    "from memory": "from memory",
}


def rows():
    """The rows of the table as lists of five fields, without comments and heading."""
    lines = TABLE.read_text(encoding="utf-8").splitlines()
    data = [line.split("\t") for line in lines if line and not line.startswith("#")]
    return data[1:]


def notation(species, phase):
    """`SO4-2` and `aq` as the source file writes them: `SO4^2-(aq)`."""
    ion = re.fullmatch(r"(.+?)([+-])(\d*)", species)
    if ion is None:
        return f"{species}({phase})"
    formula, sign, number = ion.groups()
    charge = f"^{number}{sign}" if number else sign
    return f"{formula}{charge}({phase})"


def expected(row):
    """What the source file has to say of one row of the table."""
    species, phase, value, uncertainty, verified = row
    zero = verified == "zero by definition"
    return {
        "substance": notation(species, phase),
        "formation-enthalpy": "exact 0" if zero else f"{value} ± {uncertainty}",
        "standing": STANDING[verified],
    }


def main():
    table = [expected(row) for row in rows()]
    with SOURCE.open("rb") as file:
        entries = tomllib.load(file)["entry"]
    faults = []
    if len(table) != len(entries):
        faults.append(f"the table has {len(table)} rows, the source {len(entries)} entries")
    for want, entry in zip(table, entries):
        for key, value in want.items():
            if entry.get(key) != value:
                faults.append(f"{want['substance']}: {key} is {entry.get(key)!r}, the table has {value!r}")
    for fault in faults:
        print(fault, file=sys.stderr)
    print(f"codata-1989: {len(table)} rows compared, {len(faults)} differences")
    return 1 if faults or not table else 0


if __name__ == "__main__":
    sys.exit(main())
