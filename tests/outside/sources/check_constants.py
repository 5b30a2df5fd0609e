#!/usr/bin/env python3
"""Compare the built-in source constants-2022 with the CODATA table that scipy carries.

Exact constants are compared as decimals with the table's text, where the table prints
them in full; R, which it cuts off, is worked out here from its exact factors.

Run: python3 tests/outside/sources/check_constants.py   (needs scipy with CODATA 2022)
Exit status: 0 when every constant agrees, 1 when any does not or scipy is missing.
"""

import sys
import tomllib
from decimal import Decimal, getcontext
from pathlib import Path

SOURCE = Path(__file__).resolve().parents[3] / "src" / "source" / "data" / "constants-2022.toml"

ROWS = {
    "N_A": "Avogadro constant",
    "k": "Boltzmann constant",
    "c": "speed of light in vacuum",
    "h": "Planck constant",
    "atm": "standard atmosphere",
    "p0": "standard-state pressure",
}

# Exact by definition and not in the table; scipy.constants.calorie_th has it as a float.
CALORIE_TH = Decimal("4.184")


def table():
    """Every row of the table that is printed in full and marked exact."""
    from scipy.constants import _codata

    exact = {}
    for line in _codata.txt2022.splitlines():
        name, value, mark = line[:60].strip(), line[60:85].replace(" ", ""), line[85:110].strip()
        if mark == "(exact)" and "..." not in value:
            exact[name] = Decimal(value)
    return exact


def main():
    getcontext().prec = 50
    try:
        exact = table()
    except (ImportError, AttributeError) as error:
        print(f"no CODATA 2022 table to compare with: {error}", file=sys.stderr)
        return 1
    want = {symbol: exact[name] for symbol, name in ROWS.items()}
    want["R"] = want["N_A"] * want["k"]
    want["cal_th"] = CALORIE_TH
    with SOURCE.open("rb") as file:
        entries = {entry["substance"]: entry["value"] for entry in tomllib.load(file)["entry"]}
    faults = [f"{symbol}: in one only" for symbol in sorted(want.keys() ^ entries.keys())]
    for symbol in sorted(want.keys() & entries.keys()):
        word, number = entries[symbol].split()[:2]
        if word != "exact" or Decimal(number) != want[symbol]:
            faults.append(f"{symbol}: the source has {entries[symbol]!r}, the table {want[symbol]}")
    for fault in faults:
        print(fault, file=sys.stderr)
    print(f"constants-2022: {len(want)} constants compared, {len(faults)} differences")
    return 1 if faults else 0


if __name__ == "__main__":
    sys.exit(main())
