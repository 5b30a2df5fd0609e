#!/usr/bin/env python3
"""The heating values of one mixture by the arithmetic of ISO 6976, in exact fractions.

The formulas are those of the standard (from memory): molar gross value as the sum of mole fraction
times component value, net by half the hydrogen atoms times the heat of vaporisation, molar mass
from atomic weights, molar volume R T/p, and Z = 1 - (p/p0) (sum x s)^2 from summation factors.
Nothing of the program is used: the combustion equations are written out below. The composition
is invented; the enthalpies of formation are those of CODATA 1989 and of NASA's file as the
program's built-in sources print them; the summation factors are given to show the arithmetic.

Prints one JSON document; every number is a fraction "p/q", in kJ/mol, kJ/kg and kJ/m3.
"""

import json
import sys
from fractions import Fraction as F

CO2, LIQUID, VAPOUR = F("-393.51"), F("-285.830"), F("-241.826")
WEIGHTS = {"C": F("12.011"), "H": F("1.008"), "O": F("15.999"), "N": F("14.007")}
R, T, P, P0 = F("8.31446261815324"), F("288.15"), F("101325"), F("101325")

# Component: mole fraction, formation enthalpy, atoms, moles of CO2 and of H2O formed, summation factor.
MIXTURE = {
    "CH4": (F("0.9000"), F("-74.600"), {"C": 1, "H": 4}, 1, 2, F("0.04452")),
    "C2H6": (F("0.0550"), F("-83.851544"), {"C": 2, "H": 6}, 2, 3, F("0.0919")),
    "CO2": (F("0.0120"), None, {"C": 1, "O": 2}, 0, 0, F("0.0752")),
    "H2O": (F("0.0030"), VAPOUR, {"H": 2, "O": 1}, 0, 1, F("0.2562")),
    "N2": (F("0.0300"), None, {"N": 2}, 0, 0, F("0.0170")),
}


def gross(formation, carbon, water):
    """Heat given off by one mole: reactants less products."""
    return F(0) if formation is None else formation - carbon * CO2 - water * LIQUID


def mass(atoms):
    return sum(WEIGHTS[element] * number for element, number in atoms.items())


total = sum(x for x, *_ in MIXTURE.values())
assert total == 1, total
molar = sum(x * gross(h, c, w) for x, h, _, c, w, _ in MIXTURE.values())
water = sum(x * w for x, _, _, _, w, _ in MIXTURE.values())
net = molar - water * (VAPOUR - LIQUID)
kilograms = sum(x * mass(atoms) for x, _, atoms, *_ in MIXTURE.values()) / 1000
volume = R * T / P
factor = 1 - P / P0 * sum(x * s for x, *_, s in MIXTURE.values()) ** 2

results = {
    "gross": molar,
    "net": net,
    "gross-per-mass": molar / kilograms,
    "net-per-mass": net / kilograms,
    "gross-per-volume": molar / volume,
    "net-per-volume": net / volume,
    "gross-per-volume-real": molar / volume / factor,
    "net-per-volume-real": net / volume / factor,
}
json.dump({name: str(value) for name, value in results.items()}, sys.stdout)
