"""An independent reading of NASA's thermo.inp, with the standard library only.

It shares no code with the Rust reader and takes another way: it cuts the whole file into
lines first and recognises records by their second line. It knows nothing of names.tsv.

    python3 parse_thermo.py          writes summary.tsv beside this script
    python3 parse_thermo.py --check  compares it with what it would write

Columns of summary.tsv, one row per record of the file (also those that are not served):
line, section (product, reactant), phase index, name, enthalpy as printed, number of ranges, lowest
lower bound, highest upper bound, composition in Hill order, H(298.15 K) in J/mol worked from
the nine coefficients (blank where no range comes within 2 K of 298.15 K).
"""

import math
import pathlib
import re
import sys
from fractions import Fraction

HERE = pathlib.Path(__file__).resolve().parent
THERMO = HERE.parents[2] / "src/source/data/nasa-glenn-2021/thermo.inp"
R = 8.31451  # J/(mol K), with which the functions were fitted
T0 = 298.15
NEAR = 2.0  # K; many ranges begin at 300 K

# Second line of a record: count of ranges, date code, five element fields, phase, mass, enthalpy.
SECOND = re.compile(r"^( ?\d)\s(.{6})\s(.{40}) (\d)(.{13})(.{15})")


def number(text):
    return float(text.replace("D", "E"))


def shortest(value):
    """A count without trailing zeros; nothing for 1."""
    value = Fraction(value.strip())
    if value == 1:
        return ""
    return str(value) if value.denominator == 1 else repr(float(value))


def hill(elements):
    counts = {symbol.capitalize(): count for symbol, count in elements if symbol != "E"}
    first = [s for s in ("C", "H") if s in counts] if "C" in counts else []
    rest = sorted(s for s in counts if s not in first)
    key = "".join(s + shortest(counts[s]) for s in first + rest)
    charge = -sum(int(float(count)) for symbol, count in elements if symbol == "E")
    if charge:
        key += "^" + (str(abs(charge)) if abs(charge) > 1 else "") + "-+"[charge > 0]
    return key


def elements_of(fields):
    cells = [fields[i : i + 8] for i in range(0, 40, 8)]
    return [(c[:2].strip(), c[2:]) for c in cells if c[:2].strip() and float(c[2:]) != 0]


def enthalpy(coefficients, t):
    a1, a2, a3, a4, a5, a6, a7, b1, _ = coefficients
    powers = a4 * t / 2 + a5 * t**2 / 3 + a6 * t**3 / 4 + a7 * t**4 / 5
    return R * t * (-a1 / t**2 + a2 * math.log(t) / t + a3 + powers + b1 / t)


class Record:
    """One record: where it is, what it is and its ranges."""

    def __init__(self, lines, at, section):
        self.line, self.section = at + 1, section
        self.name, self.comment = lines[at][:18].strip(), lines[at][18:].strip()
        count, self.code, fields, phase, mass, printed = SECOND.match(lines[at + 1]).groups()
        self.count, self.phase = int(count), int(phase)
        self.elements = elements_of(fields)
        self.mass, self.printed = mass.strip(), printed.strip()
        self.ranges = [self.range(lines, at + 2 + 3 * i) for i in range(self.count)]
        self.length = 2 + max(1, 3 * self.count)
        self.temperature = None if self.count else lines[at + 2].split()[0]

    @staticmethod
    def range(lines, at):
        low, high = lines[at][:11].strip(), lines[at][11:22].strip()
        cells = re.findall(r".{16}", lines[at + 1][:80] + lines[at + 2][:80])
        kept = cells[:7] + cells[8:10]  # the eighth is not used
        return low, high, [number(c) for c in kept]

    def key(self):
        return hill(self.elements)

    def near(self):
        """The range that holds or nearly holds at 298.15 K, if there is one."""
        for low, high, coefficients in self.ranges:
            usable = float(low) < float(high)  # eleven are upside down
            if usable and float(low) - NEAR <= T0 <= float(high) + NEAR:
                return coefficients
        return None

    def at_298(self):
        near = self.near()
        return "" if near is None else f"{round(enthalpy(near, T0), 1) + 0.0:.1f}"

    def row(self):
        low = min((r[0] for r in self.ranges), key=float, default="")
        high = max((r[1] for r in self.ranges), key=float, default="")
        cells = (self.line, self.section, self.phase, self.name, self.printed)
        return "\t".join(map(str, cells + (self.count, low, high, self.key(), self.at_298())))


def records(path=THERMO):
    lines = path.read_bytes().decode("ascii").split("\r\n")
    at, section = lines.index("thermo") + 2, "product"
    while lines[at] != "END REACTANTS":
        if lines[at] == "END PRODUCTS":
            section, at = "reactant", at + 1
            continue
        record = Record(lines, at, section)
        yield record
        at += record.length


def main():
    target = HERE / "summary.tsv"
    heading = "line\tsection\tphase\tname\tenthalpy\tranges\tlow\thigh\thill\th298\n"
    text = heading + "".join(r.row() + "\n" for r in records())
    if "--check" in sys.argv:
        sys.exit(0 if target.read_text() == text else "summary.tsv differs")
    target.write_text(text)


if __name__ == "__main__":
    main()
