"""Makes names.tsv: which records of thermo.inp are served, and under which species and names.

    python3 make_names.py            (needs the packages chemicals 1.5.2 and periodictable 2.1.0)

How it decides.

Served: every record except those that reason() names a reason for (LEFT_OUT below, the
`Inert…` doubles, a printed molar mass that is not that of the printed composition, and
records without a usable range). Consecutive condensed records with one species are one entry.

Species: the file's name with `AL` and `CL` in normal case and without what follows a comma;
its composition must be that of the element fields. The form of a solid is, in this order: the
word of FORMS for that record; a mineral's name or a Greek letter in the comment; the label
(a, b, c, d as Greek letters, Roman numerals as they are); nothing for `(cr)`.

Name and CAS number: names_by_hand.tsv first; then names built from the formula (sodium chloride,
titanium dichloride, calcium hydroxide). Either counts only if the identifiers of `chemicals`
(or a table of values beside them) know the name for a
substance of the same composition. A built name that they do not know is
not used. Where they know several substances under the name, the one whose first name it is
is taken, or none. An element takes the number of the periodic table of `chemicals`.
Nothing else is found by formula alone.

Enthalpy: `298.15` where the function of this form gives the printed value at 298.15 K within
1 J/mol, or where the record has no function and says 298.15 K; a temperature where the record
has no function and says another one; `other form` where the form is not that of 298.15 K.
"""

import csv
import math
import pathlib
import re
from collections import defaultdict

import chemicals
import periodictable

import parse_thermo

HERE = pathlib.Path(__file__).resolve().parent
TARGET = HERE.parents[2] / "src/source/data/nasa-glenn-2021/names.tsv"

LEFT_OUT = {
    "Air": "mixture", "IRFNA": "mixture", "LMP-103S": "mixture",
    "JP-4": "fuel without a formula", "JP-5": "fuel without a formula",
    "JP-7": "fuel without a formula", "RP-1": "fuel without a formula",
    "Jet-A(L)": "fuel without a formula", "Jet-A(g)": "fuel without a formula",
    "Biodiesel": "fuel without a formula", "Paraffin": "fuel without a formula",
    "(CH2)x(cr)": "polymer",
    "ALN(L)": "its first range, 1800 K to 2700 K, continues the crystal",
    "n-Butanol": "values agree with no other compilation",
}  # fmt: skip

# Forms that neither the comment nor the label spells out in our words.
FORMS = {
    "S(a)": "rhombic", "S(b)": "monoclinic", "B(b)": "beta-rhombohedral", "C(gr)": "graphite",
    "SiO2(a-qz)": "alpha-quartz", "SiO2(b-qz)": "beta-quartz", "SiO2(b-crt)": "beta-cristobalite",
    "AL2SiO5(an)": "andalusite", "PbO(II-r)": "red", "PbO(I-y)": "yellow",
    "AL2O3(a)": "alpha", "Sn(cr)": "white", "CaCO3(cr)": "calcite", "KOH(a)": "alpha-beta",
    "WO3(III,II)": "III-II",
}  # fmt: skip

MINERALS = "Gibbsite Hematite Magnetite Pyrite Rutile,tetragonal White Wustite".split()
GREEK = "alpha beta gamma delta".split()
LABELS = dict(zip("abcd", GREEK)) | {"a'": "alpha'", "crI": "I", "crII": "II", "cr": ""}

# Charge of the usual ion: where it accounts for the formula, the name needs no prefix.
VALENCE = dict.fromkeys("Li Na K Rb Cs H D Ag".split(), 1)
VALENCE |= dict.fromkeys("Be Mg Ca Sr Ba Zn Cd".split(), 2)
VALENCE |= dict.fromkeys("Al Sc Ga B In".split(), 3)
ANIONS = {
    "F": ("fluoride", 1), "Cl": ("chloride", 1), "Br": ("bromide", 1), "I": ("iodide", 1),
    "H": ("hydride", 1), "O": ("oxide", 2), "S": ("sulfide", 2), "N": ("nitride", 3),
    "C": ("carbide", 4), "B": ("boride", 3), "P": ("phosphide", 3),
    "OH": ("hydroxide", 1), "NO3": ("nitrate", 1), "NO2": ("nitrite", 1), "CN": ("cyanide", 1),
    "BO2": ("metaborate", 1), "CO3": ("carbonate", 2), "SO4": ("sulfate", 2),
}  # fmt: skip
PREFIXES = " mono di tri tetra penta hexa hepta octa nona deca".split(" ")

ITEM = re.compile(r"([A-Z][a-z]?|\(|\))(\d*\.?\d*)")


def composition(formula):
    """Counts of the elements of a formula without charge; None where it is none."""
    if "".join(m.group(0) for m in ITEM.finditer(formula)) != formula or not formula:
        return None
    stack = [defaultdict(float)]
    for symbol, count in ITEM.findall(formula):
        if symbol == "(":
            stack.append(defaultdict(float))
            continue
        group = {symbol: 1.0}
        if symbol == ")":
            if len(stack) < 2:
                return None
            group = stack.pop()
        for element, n in group.items():
            stack[-1][element] += n * float(count or 1)
    return dict(stack[0]) if len(stack) == 1 else None


def stated(record):
    """The counts and the charge in the element fields."""
    counts = {s.capitalize(): float(n) for s, n in record.elements if s != "E"}
    if record.name.startswith("Fe.947O"):
        counts["Fe"] = 0.947  # the field has two decimals
    return counts, -sum(int(float(n)) for s, n in record.elements if s == "E")


def formula_of(record):
    """The formula without phase and charge, checked against the element fields."""
    text = re.sub(r"^(.*?)(\([^()]*\))?(,.*)?$", r"\1", record.name) if record.phase else record.name
    text = text.split(",")[0].rstrip("+-").replace("AL", "Al").replace("CL", "Cl")
    text = {"e": "e"}.get(text, re.sub(r"\.9", "0.9", text.replace("-", "")))
    text = {"JP10(g)": "C10H16", "JP10": "C10H16", "K(HF2)": "KHF2"}.get(text, text)
    counts, charge = stated(record)
    if text != "e" and composition(text) != counts:
        raise ValueError(f"{record.name}: {text} is not {counts}")
    return text, charge


def with_charge(formula, charge):
    if not charge:
        return formula
    sign = "+" if charge > 0 else "-"
    if abs(charge) > 1:
        return f"{formula}^{abs(charge)}{sign}"
    # Fe2-, O2-: a count that could be read as a charge number.
    caret = "^" if re.fullmatch(r"[A-Z][a-z]?\d*[2-9]", formula) else ""
    return f"{formula}{caret}{sign}"


def form_of(record):
    """The word for the form of a solid; empty for the one that needs none."""
    if record.name in FORMS:
        return FORMS[record.name]
    if record.name == "SnS(cr)":
        return record.comment.split(".")[0].lower()
    for mineral in MINERALS:
        if record.comment.startswith(mineral):
            return mineral.split(",")[0].lower()
    label = re.search(r"\(([^()]*)\)[^()]*$", record.name).group(1)
    if label in "abcd":
        words = re.split(r"[^a-z]+", record.comment.split("Gurvich")[0].lower())
        return next((w for w in words if w in GREEK), LABELS[label])
    return LABELS.get(label, label)


def species_of(record):
    formula, charge = formula_of(record)
    if formula == "e":
        return "e-"
    text = with_charge(formula, charge)
    if record.phase == 0:
        return f"{text}(g)"
    if re.search(r"\(L\)", record.name):
        return f"{text}(l)"
    form = form_of(record)
    return f"{text}(cr, {form})" if form else f"{text}(cr)"


def mass_fits(record):
    mass = 0.0
    for symbol, count in record.elements:
        known = 0.000548579903 if symbol == "E" else periodictable.elements.symbol(symbol.capitalize()).mass
        mass += known * float(count)
    return abs(mass - float(record.mass)) < 2e-4 * float(record.mass) + 1e-9


def reason(record):
    """Why a record is not served; None where it is."""
    if record.name.startswith("Inert"):
        return "inert double"
    if record.name in LEFT_OUT:
        return LEFT_OUT[record.name]
    if not mass_fits(record):
        return "molar mass is not that of the composition"
    if record.ranges and not any(float(low) < float(high) for low, high, _ in record.ranges):
        return "no usable range"
    return None


def holds_at(record):
    if not record.ranges:
        return "298.15" if float(record.temperature) == 298.15 else record.temperature
    worked = record.at_298()
    if worked == "":
        return "other form"
    if abs(float(worked) - float(record.printed)) > 1.0:
        raise ValueError(f"{record.name}: {record.printed} printed, {worked} worked")
    return "298.15"


class Identifiers:
    """The names and CAS numbers in the data files of `chemicals`."""

    FILES = (
        "chemical identifiers pubchem small.tsv", "Inorganic db.tsv", "Cation db.tsv",
        "Anion db.tsv", "chemical identifiers example user db.tsv",
        "chemical identifiers pubchem large.tsv",
    )  # fmt: skip

    TABLES = (
        "Reactions/JANAF_1998.tsv", "Misc/Physical Constants of Inorganic Compounds.csv",
        "Heat Capacity/CRC Standard Thermodynamic Properties of Chemical Substances.tsv",
        "Phase Change/CRC Handbook Heat of Fusion.tsv",
        "Phase Change/CRC Handbook Heat of Vaporization.tsv",
    )  # fmt: skip

    def __init__(self):
        self.rows, self.made_of = defaultdict(list), defaultdict(list)
        self.folder = pathlib.Path(chemicals.__file__).parent
        for order, file in enumerate(self.FILES):
            with (self.folder / "Identifiers" / file).open(encoding="utf-8") as lines:
                for line in csv.reader(lines, delimiter="\t", quoting=csv.QUOTE_NONE):
                    self.add(order, line)
        for file in self.TABLES:
            self.add_table(file)

    def add(self, order, line):
        cas, formula, names = line[1], line[2], [n.strip().lower() for n in line[7:] if n.strip()]
        match = re.fullmatch(r"(.*?)([+-]\d*)?", formula)
        charge = {"": 0, "+": 1, "-": -1}.get(match.group(2) or "")
        charge = int(match.group(2)) if charge is None else charge
        made_of = composition(match.group(1))
        self.made_of[cas].append((made_of, charge))
        for place, name in enumerate(names):
            self.rows[name].append((place < 2, order, cas, made_of, charge))

    def add_table(self, file):
        """Names of a table of values; compositions from it or, by CAS number, from the rest."""
        with (self.folder / file).open(encoding="utf-8") as lines:
            for row in csv.DictReader(lines, delimiter="\t", quoting=csv.QUOTE_NONE):
                formula = row.get("formula") or row.get("Formula")
                known = [(composition(formula), 0)] if formula else self.made_of.get(row["CAS"], [])
                if known and all(k == known[0] for k in known):
                    self.rows[row["Chemical"].strip().lower()].append((True, 9, row["CAS"], *known[0]))

    def cas(self, name, counts, charge):
        """The CAS number of the substance of this name and composition, if there is one."""
        fits = [r for r in self.rows.get(name.lower(), ()) if r[3:] == (counts, charge)]
        for choice in ([r for r in fits if r[0]], fits):
            numbers = {r[2] for r in choice}
            if len(numbers) == 1:
                return numbers.pop()
        return None


def plain_deuterium(counts):
    """Identifiers count deuterium either as D or as H."""
    if "D" not in counts:
        return [counts]
    merged = {k: v for k, v in counts.items() if k != "D"}
    merged["H"] = merged.get("H", 0) + counts["D"]
    return [counts, merged]


def element_name(symbol):
    return periodictable.elements.symbol(symbol).name.replace("aluminium", "aluminum").replace("caesium", "cesium")


def anion_of(rest):
    """The anion that the rest of a formula consists of, and how many of it."""
    group = re.fullmatch(r"\(([A-Za-z0-9]+)\)(\d+)", rest)
    if group and group.group(1) in ANIONS:
        return group.group(1), int(group.group(2))
    if rest in ANIONS:
        return rest, 1
    simple = re.fullmatch(r"([A-Z][a-z]?)(\d+)", rest)
    return (simple.group(1), int(simple.group(2))) if simple and simple.group(1) in ANIONS else None


def atoms_and_ions(name, n, charge):
    if charge:
        sign = f"{abs(charge)}{'+' if charge > 0 else '-'}"
        return [(known, f"{name} ion({sign})") for known in (f"{name} ion({sign})", f"{name}({sign})")]
    return [(f"{PREFIXES[n]}{name}",) * 2] if n < 11 else []


def built_names(formula, charge):
    """Pairs (name to look for, name to show) after the rules of simple inorganic nomenclature.

    `sodium chloride` is looked for under any composition, and shown only for NaCl: Na2Cl2 is
    shown as its dimer, and a metal of several valences with its prefixes.
    """
    metal, n, rest = re.fullmatch(r"([A-Z][a-z]?|\()(\d*)(.*)", formula).groups()
    if metal in ("D", "(") or (metal == "O" and rest):
        return []
    name, n = element_name(metal), int(n or 1)
    if not rest:
        return atoms_and_ions(name, n, charge)
    anion = anion_of(rest)
    if not anion or charge or max(n, anion[1]) > 10:
        return []
    (word, valence), count = ANIONS[anion[0]], anion[1]
    head = name if n == 1 else f"{PREFIXES[n]}{name}"
    prefixed = f"{head} {PREFIXES[count]}{word}"
    elided = re.sub(r"[ao]oxide", "oxide", prefixed)
    full = [elided, prefixed] + ([f"{name} mono{word}"] if n == count == 1 else [])
    plain = [f"{name} {word}", f"{name} {word} ({formula})"]
    times = math.gcd(n, count)
    if VALENCE.get(metal, 0) * n != valence * count:
        shown = re.sub(r"[ao]oxide", "oxide", f"{head} mono{word}") if count == 1 else elided
        return [(known, shown) for known in full + plain]
    if times == 1 or (word, n) == ("peroxide", 2):
        return [(known, plain[0]) for known in plain + full]
    shown = f"{plain[0]} {('', 'dimer', 'trimer', 'tetramer')[times - 1]}" if times < 5 else elided
    return [(known, shown) for known in plain + full]


def to_iupac(name):
    return name.replace("aluminum", "aluminium").replace("cesium", "caesium").replace("tetraoxide", "tetroxide")


def identity(record, hand, identifiers):
    """Name and CAS number, each empty where it is not established."""
    formula, charge = formula_of(record)
    counts = {} if formula == "e" else composition(formula)
    written = with_charge(formula, charge).replace("^", "")
    by_hand = hand.get(record.name) or hand.get(written)
    if by_hand:
        shown, *also = by_hand
        if also == ["-"]:
            return shown, ""
        for name in [shown, *also]:
            for candidate in plain_deuterium(counts):
                cas = identifiers.cas(name, candidate, charge)
                if cas:
                    return shown, cas
        if formula != "D" and sum(counts.values()) == 1 and not charge:
            return shown, chemicals.elements.periodic_table[formula].CAS
        print(f"no CAS number: {record.name}\t{shown}")
        return shown, ""
    if formula != "D" and sum(counts.values()) == 1 and not charge:
        element = chemicals.elements.periodic_table[formula]
        return to_iupac(element.name.lower()), element.CAS
    for known, shown in built_names(formula, charge):
        cas = identifiers.cas(known, counts, charge)
        if cas:
            return to_iupac(shown), cas
    return "", ""


def read_hand():
    rows = (HERE / "names_by_hand.tsv").read_text().splitlines()
    cells = (row.split("\t") for row in rows if not row.startswith("#"))
    return {key: rest for key, *rest in cells}


def entries():
    """Records of one form together, left-out ones aside."""
    groups = []
    for record in parse_thermo.records():
        why = reason(record)
        if why:
            print(f"left out: {record.line}\t{record.name}\t{why}")
            continue
        species = species_of(record)
        last = groups[-1] if groups else None
        joined = last and record.phase > 1 and last[0] == species and last[1][-1].name == record.name
        if joined:
            last[1].append(record)
        else:
            groups.append((species, [record]))
    return groups


def main():
    hand, identifiers = read_hand(), Identifiers()
    rows = ["glenn-name\tspecies\tname\tcas\ttemperature-note\tlines"]
    for species, members in entries():
        first = members[0]
        name, cas = identity(first, hand, identifiers)
        if cas and not chemicals.identifiers.check_CAS(cas):
            raise ValueError(f"{first.name}: check digit of {cas}")
        lines = ",".join(str(m.line) for m in members)
        rows.append("\t".join([first.name, species, name, cas, holds_at(first), lines]))
    TARGET.write_text("\n".join(rows) + "\n")
    print(f"{len(rows) - 1} entries")


if __name__ == "__main__":
    main()
