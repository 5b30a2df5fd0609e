#!/usr/bin/env python3
"""Random balanced reactions at random temperatures, worked by Cantera.

Prints one JSON document: for each of three forms (nine coefficients, seven coefficients, Shomate)
the equations, their temperatures, the heats in J/mol of the equation as written, and for the two
latter the source file whose functions both sides are to use.

How a reaction is made: a handful of substances is drawn, and a combination of them that balances
in every element is taken from the null space of their compositions, in exact fractions.
Temperatures lie anywhere in the ranges that the participants share, two decimals of a kelvin.

How a heat is worked: H(T) = H + f(T) - f(298.15 K), where H is the enthalpy printed for 298.15 K
and f is Cantera's. Where nothing is printed for 298.15 K (forms of a solid that begin above it,
liquids, the compounds of the seven coefficients' source), f(T) stands alone: its integration constant puts it
on the same scale. Of a condensed substance the form is taken whose range holds the temperature.

- nasa-9: the records of NASA's thermo.inp, read by ../glenn/parse_thermo.py. The functions were
  fitted with R = 8.31451 J/(mol K), Cantera works with R of CODATA 2018: scaled by their ratio.
- nasa-7: functions in the files nasa_gas.yaml and nasa_condensed.yaml of Cantera, with its R.
- shomate: invented functions, two ranges each, not continuous where they meet: the difference
  between the two sides would show if a range were left out.

Run: python3 tests/outside/cantera/random_heats.py
Exit status: 0; 1 when Cantera is missing or a record is not found.
"""

import json
import random
import sys
from fractions import Fraction
from pathlib import Path

import cantera

sys.path.insert(0, str(Path(__file__).resolve().parent.parent / "glenn"))
import parse_thermo  # noqa: E402

T0, P0 = 298.15, 100_000.0
SCALE = parse_thermo.R * 1000.0 / cantera.gas_constant
COUNT = {"nasa-9": 360, "nasa-7": 150, "shomate": 150}

# The gases of NASA's file, with the notation of a case.
GASES = {
    "H2(g)": "H2", "O2(g)": "O2", "N2(g)": "N2", "H2O(g)": "H2O", "CO(g)": "CO", "CO2(g)": "CO2",
    "CH4(g)": "CH4", "NH3(g)": "NH3", "NO(g)": "NO", "NO2(g)": "NO2", "N2O(g)": "N2O",
    "HCl(g)": "HCL", "Cl2(g)": "CL2", "SO2(g)": "SO2", "SO3(g)": "SO3", "H2S(g)": "H2S",
    "CS2(g)": "CS2", "HF(g)": "HF", "F2(g)": "F2", "S2(g)": "S2", "OH(g)": "OH", "H(g)": "H",
    "O(g)": "O", "SiO(g)": "SiO", "SiCl4(g)": "SiCL4", "AlCl3(g)": "ALCL3", "TiCl4(g)": "TiCL4",
    "NaCl(g)": "NaCL", "Mg(g)": "Mg", "Ar(g)": "Ar",
}  # fmt: skip

# Condensed substances, in whatever form holds: the composition is the key of parse_thermo.
CONDENSED = (
    "Fe Al Si Ti Mg Ca Na C S Cu Pb Fe2O3 Fe3O4 Al2O3 O2Si O2Ti MgO CaO CuO H2O ClNa Cl2Mg CaCl2"
).split()
WRITTEN = {"Al2O3": "Al2O3", "O2Si": "SiO2", "O2Ti": "TiO2", "ClNa": "NaCl", "Cl2Mg": "MgCl2"}


# Zero at 298.15 K by convention, whatever their functions leave of it there (some 1e-5 J/mol).
REFERENCE = ["H2(g)", "O2(g)", "N2(g)", "F2(g)", "Cl2(g)", "Ar(g)", "C(cr, graphite)"]


class Function:
    """Cantera's enthalpy of one form, J/mol, in a range of temperatures, and its printed H."""

    def __init__(self, label, elements, low, high, enthalpy, printed):
        self.label, self.elements, self.low, self.high = label, elements, low, high
        self.enthalpy, self.printed = enthalpy, printed

    def at(self, kelvin):
        if self.printed is None:
            return self.enthalpy(kelvin)
        return self.printed + self.enthalpy(kelvin) - self.enthalpy(T0)


def joule(thermo, scale=1.0):
    return lambda kelvin: thermo.h(kelvin) / 1000.0 * scale


def forms_of(label, records):
    """The forms of NASA's file under one name: a form may go on in the record after its own, and
    the name may stand for another form later. Ranges that are upside down hold nowhere."""
    forms = []
    for record in records:
        for low, high, coefficients in record.ranges:
            span = (float(low), float(high), coefficients)
            if forms and forms[-1][1][-1][1] == span[0]:
                forms[-1][1].append(span)
            elif span[0] < span[1]:
                forms.append((record, [span]))
    return [of_ranges(label, record, ranges) for record, ranges in forms]


def of_ranges(label, record, ranges):
    low, high = ranges[0][0], ranges[-1][1]
    regions = [x for a, b, c in ranges for x in (a, b, *c)]
    thermo = cantera.Nasa9PolyMultiTempRegion(low, high, P0, [float(len(ranges)), *regions])
    printed = float(record.printed) if low - parse_thermo.NEAR <= T0 <= high else None
    elements = {symbol.capitalize(): Fraction(n.strip()) for symbol, n in record.elements}
    return Function(label, elements, low, high, joule(thermo, SCALE), printed)


def nasa_nine():
    """For each substance the list of its forms."""
    products = [r for r in parse_thermo.records() if r.ranges]
    gases = {r.name: r for r in products if r.phase == 0}
    substances = [forms_of(label, [gases[name]]) for label, name in GASES.items()]
    for key in CONDENSED:
        forms = {}
        for record in products:
            if record.phase > 0 and record.key() == key:
                forms.setdefault(record.name, []).append(record)
        label = f"{WRITTEN.get(key, key)}(stable)"
        substances.append([f for records in forms.values() for f in forms_of(label, records)])
    return substances


def nasa_seven():
    substances, entries = [], []
    gases = cantera.Species.list_from_file("nasa_gas.yaml")
    solids = cantera.Species.list_from_file("nasa_condensed.yaml")
    wanted = {label[:-3]: label for label in GASES}
    wanted |= {"C(gr)": "C(cr, graphite)", "MgO(s)": "MgO(cr)", "CaO(s)": "CaO(cr)"}
    wanted |= {"C2H4": "C2H4(g)", "C2H6": "C2H6(g)", "C2H2": "C2H2(g)", "COS": "COS(g)"}
    for species in gases + solids:
        label = wanted.get(species.name.replace("CL", "Cl").replace("AL", "Al"))
        if label is None or not isinstance(species.thermo, cantera.NasaPoly2):
            continue
        c = [float(x) for x in species.thermo.coeffs]
        middle, low, high = c[0], species.thermo.min_temp, species.thermo.max_temp
        halves = [half for half in halves_of(c, low, middle, high) if half[0] < half[1]]
        entries.append(entry(label, "nasa-7", halves))
        elements = {e: Fraction(n) for e, n in species.composition.items()}
        printed = 0.0 if label in REFERENCE else None
        made = Function(label, elements, low, high, joule(species.thermo), printed)
        substances.append([made])
    return substances, source("seven", f'gas-constant = "{cantera.gas_constant / 1000.0!r}"', entries)


def halves_of(coefficients, low, middle, high):
    return [(low, middle, coefficients[8:15]), (middle, high, coefficients[1:8])]


SHOMATE = ["H2(g)", "O2(g)", "N2(g)", "H2O(g)", "CO(g)", "CO2(g)", "CH4(g)", "NH3(g)", "NO(g)"]
COMPOSED = {"H2": "HH", "O2": "OO", "N2": "NN", "H2O": "HHO", "CO": "CO", "CO2": "COO"}
COMPOSED |= {"CH4": "CHHHH", "NH3": "NHHH", "NO": "NO"}


def shomate(rng):
    substances, entries = [], []
    for label in SHOMATE:
        drawn = f"{rng.uniform(-400, 100):.3f}"
        formation = "0.000" if label in REFERENCE else drawn
        low, middle, high = 298.0, float(rng.randrange(800, 1300, 50)), 3000.0

        def draw():
            spans = [(25, 40), (0, 20), (-4, 0), (0, 0.6), (-0.5, 0.5), (-400, 0), (150, 250)]
            return [float(f"{rng.uniform(*span):.6f}") for span in spans]

        lower, upper = draw(), draw()
        thermo = cantera.ShomatePoly2(low, high, P0, [middle, *lower, *upper])
        halves = [(low, middle, [*lower, formation]), (middle, high, [*upper, formation])]
        entries.append(entry(label, "shomate", halves, formation))
        letters = COMPOSED[label[:-3]]
        elements = {e: Fraction(letters.count(e)) for e in set(letters)}
        enthalpy = joule(thermo)
        substances.append([Function(label, elements, low, high, enthalpy, float(formation) * 1000)])
    head = 'energy-unit = "kJ/mol"\ntemperature = "298.15 K"\npressure = "1 bar"'
    return substances, source("shomate", head, entries)


def entry(label, form, halves, formation=None):
    lines = ["[[entry]]", f'substance = "{label}"', f'locator = "row {label}"']
    if formation is not None:
        lines.append(f'formation-enthalpy = "{formation}"')
    functions = []
    for low, high, coefficients in halves:
        printed = ", ".join(f'"{c}"' for c in coefficients)
        functions.append(
            f'  {{ form = "{form}", range = ["{low} K", "{high} K"], coefficients = [{printed}] }},'
        )
    return "\n".join([*lines, "heat-capacity = [", *functions, "]", ""])


def source(name, head, entries):
    return f'[source]\nid = "{name}"\ntitle = "Functions given by a test"\n{head}\n\n' + "\n".join(entries)


def null_space(columns):
    """Combinations of columns (element counts) that sum to zero, as a basis in fractions."""
    elements = sorted({e for column in columns for e in column})
    rows = [[column.get(e, Fraction(0)) for column in columns] for e in elements]
    pivots = []
    for at in range(len(columns)):
        done = len(pivots)
        row = next((i for i in range(done, len(rows)) if rows[i][at]), None)
        if row is None:
            continue
        rows[done], rows[row] = rows[row], rows[done]
        rows[done] = [x / rows[done][at] for x in rows[done]]
        for i, other in enumerate(rows):
            if i != done and other[at]:
                rows[i] = [x - other[at] * y for x, y in zip(other, rows[done])]
        pivots.append(at)
    basis = []
    for free in (at for at in range(len(columns)) if at not in pivots):
        vector = [Fraction(0)] * len(columns)
        vector[free] = Fraction(1)
        for row, at in enumerate(pivots):
            vector[at] = -rows[row][free]
        basis.append(vector)
    return basis


def form_at(forms, kelvin):
    """The form that holds, each up to its upper bound; none where none or several do."""
    holding = [f for f in forms if f.low < kelvin <= f.high]
    return holding[0] if len(holding) == 1 else None


def draw(rng, substances):
    """One balanced reaction at a temperature, or none where the draw does not make one."""
    drawn = rng.sample(substances, rng.randrange(3, 8))
    basis = null_space([forms[0].elements for forms in drawn])
    if not basis:
        return None
    numbers = [Fraction(0)] * len(drawn)
    for vector in basis:
        factor = Fraction(rng.choice([-2, -1, 1, 2, 3]), rng.choice([1, 1, 2]))
        numbers = [n + factor * v for n, v in zip(numbers, vector)]
    taking_part = [(forms, n) for forms, n in zip(drawn, numbers) if n]
    low = max(min(f.low for f in forms) for forms, _ in taking_part) if taking_part else 0.0
    high = min((max(f.high for f in forms) for forms, _ in taking_part), default=0.0)
    high = min(high, 4000.0)
    if not taking_part or max(n.numerator for _, n in taking_part) > 60 or high - low < 10.0:
        return None
    kelvin = f"{rng.uniform(low + 0.01, high - 0.01):.2f}"
    parts = [(form_at(forms, float(kelvin)), n) for forms, n in taking_part]
    return None if any(form is None for form, _ in parts) else worked(kelvin, parts)


def worked(kelvin, parts):
    def side(sign):
        terms = [f"{abs(n)} {form.label}" for form, n in parts if n * sign > 0]
        return " + ".join(terms)

    if not side(1) or not side(-1):
        return None
    heats = [float(n) * form.at(float(kelvin)) for form, n in parts]
    return {
        "equation": f"{side(-1)} -> {side(1)}",
        "kelvin": kelvin,
        "heat": sum(heats),
        "magnitude": sum(map(abs, heats)),
        "condensed": sum("stable" in form.label for form, _ in parts),
        "transformed": sum(form.printed is None for form, _ in parts),
    }


def reactions(rng, substances, count):
    found = {}
    while len(found) < count:
        made = draw(rng, substances)
        if made:
            found[made["equation"]] = made
    return list(found.values())


def main():
    rng = random.Random(20261201)
    seven, seven_source = nasa_seven()
    invented, invented_source = shomate(rng)
    sets = {"nasa-9": (nasa_nine(), None), "nasa-7": (seven, seven_source)}
    sets["shomate"] = (invented, invented_source)
    document = {
        form: {"source": text, "reactions": reactions(rng, substances, COUNT[form])}
        for form, (substances, text) in sets.items()
    }
    json.dump(document, sys.stdout, indent=1)


if __name__ == "__main__":
    main()
