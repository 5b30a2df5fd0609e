#!/usr/bin/env python3
"""Works the reactions of reactions.toml from NASA's thermo.inp without any of the program's code.

The file is read by ../glenn/parse_thermo.py. Two heats come out for each reaction, in J/mol of
the equation as written, at 298.15 K and 1 bar:

- `printed`: Σ ν·H of the enthalpies printed in the second line of each record, in exact fractions;
- `cantera`: standard enthalpy of reaction by Cantera from the nine-coefficient functions. Cantera
  also refuses a reaction that does not balance in elements and charge.

Cantera works with R of CODATA 2018, the functions were fitted with 8.31451 J/(mol K) (the
program's notes on the file say where that is from); H(T)/(R T) is what the coefficients mean, so
the heat is scaled by the ratio of the two. Functions that begin at 300 K are evaluated 1.85 K
below their range: the coefficients are those of the edition in which they began at 200 K.

Run: python3 tests/outside/cantera/reference_heats.py     prints one JSON document
Exit status: 0; 1 when Cantera is missing, refuses a reaction or a record is not found.
"""

import json
import re
import sys
import tomllib
from fractions import Fraction
from pathlib import Path

import cantera

HERE = Path(__file__).resolve().parent
sys.path.insert(0, str(HERE.parent / "glenn"))
import parse_thermo  # noqa: E402

T0, P0 = 298.15, 100_000.0
SCALE = parse_thermo.R * 1000.0 / cantera.gas_constant
COEFFICIENT = re.compile(r"(\d+(?:/\d+|\.\d+)?) +(.+)")


def participants(equation):
    """Stoichiometric numbers in the order of the equation, reactants negative."""
    numbers = []
    for sign, side in zip((-1, 1), equation.split(" -> "), strict=True):
        for term in side.split(" + "):
            match = COEFFICIENT.fullmatch(term)
            numbers.append(sign * Fraction(match[1] if match else 1))
    return numbers


def by_name():
    """The record of each name that holds at 298.15 K."""
    found = {}
    for record in parse_thermo.records():
        without = record.count == 0 and float(record.temperature) == T0
        if without or record.near() is not None:
            if record.name in found:
                found[record.name] = None  # a name of two forms decides nothing
            else:
                found[record.name] = record
    return found


def composition(record):
    """Counts of the elements; the element field of wustite prints 0.95 for the 0.947 of its name."""
    counts = {symbol.capitalize(): float(count) for symbol, count in record.elements}
    if record.name == "Fe.947O(cr)":
        counts["Fe"] = 0.947
    return counts


def species(label, record):
    """A record as a species of Cantera, with the range that holds at 298.15 K."""
    low, high, _ = next(r for r in record.ranges if r[2] is record.near())
    made = cantera.Species(label, composition(record))
    coefficients = [1.0, float(low), float(high), *record.near()]
    made.thermo = cantera.Nasa9PolyMultiTempRegion(float(low), float(high), P0, coefficients)
    return made


def worked_by_cantera(numbers, records):
    """Standard enthalpy of reaction, J/mol; condensed phases enter by their functions alone."""
    labels = [f"s{i}" for i in range(len(records))]
    sides = ({}, {})
    for label, nu in zip(labels, numbers):
        sides[nu > 0][label] = float(abs(nu))
    made = [species(label, record) for label, record in zip(labels, records)]
    rate = cantera.ArrheniusRate(1.0, 0.0, 0.0)
    reaction = cantera.Reaction(*sides, rate)
    phase = cantera.Solution(thermo="ideal-gas", kinetics="gas", species=made, reactions=[reaction])
    phase.TP = T0, P0
    return float(phase.delta_standard_enthalpy[0]) / 1000.0 * SCALE


def heats(reaction, found):
    numbers = participants(reaction["equation"])
    records = [found.get(name) for name in reaction["records"]]
    if len(numbers) != len(records) or None in records:
        raise ValueError(f"{reaction['equation']}: the records do not go with the participants")
    printed = sum(nu * Fraction(record.printed) for nu, record in zip(numbers, records))
    worked = None
    if reaction.get("function", True):
        worked = worked_by_cantera(numbers, records)
    return {
        "equation": reaction["equation"],
        "printed": str(printed),
        "cantera": worked,
        "moles": float(sum(map(abs, numbers))),
    }


def main():
    with (HERE / "reactions.toml").open("rb") as file:
        reactions = tomllib.load(file)["reaction"]
    found = by_name()
    document = {"cantera": cantera.__version__, "reactions": [heats(r, found) for r in reactions]}
    json.dump(document, sys.stdout, indent=1)


if __name__ == "__main__":
    main()
