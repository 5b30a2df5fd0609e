#!/usr/bin/env python3
"""Turns the printed heat capacities of janaf-4.toml into polynomials that bend between the points.

Straight lines between points 100 K apart run below a curve that bends down and above one that bends
up, by up to h²·ΔCp'/12 of the integral. A cubic spline through the same points (not-a-knot, by
scipy) takes the bend from the points themselves, so nothing but the printed heat capacities of the
edition enters. Each piece becomes a function of form `polynomial` over its own range, in powers of T.

Prints the source file as TOML.

Run: python3 tests/outside/janaf_spline.py
Exit status: 0; 1 when scipy is missing.
"""

import json
import tomllib
from fractions import Fraction
from math import comb
from pathlib import Path

from scipy.interpolate import CubicSpline

HERE = Path(__file__).resolve().parent


def about_zero(piece, start):
    """Coefficients of Σ piece[i]·(T - start)^i in powers of T, as decimals."""
    exact = [Fraction(float(c)) for c in piece]
    powers = range(len(exact))
    sums = [sum(exact[i] * comb(i, j) * (-start) ** (i - j) for i in powers[j:]) for j in powers]
    return [f"{float(s):.17g}" for s in sums]


def pieces(points):
    kelvin = [float(t) for t, _ in points]
    spline = CubicSpline(kelvin, [float(cp) for _, cp in points])
    for i, (low, high) in enumerate(zip(points, points[1:])):
        # scipy has the highest power first.
        coefficients = about_zero(spline.c[::-1, i], Fraction(low[0]))
        printed = ", ".join(f'"{c}"' for c in coefficients)
        span = f'"{low[0]} K", "{high[0]} K"'
        yield f'  {{ form = "polynomial", range = [{span}], coefficients = [{printed}] }},'


def entry(read):
    """The entry with its points replaced."""
    lines = ["[[entry]]"]
    for key, value in read.items():
        if key != "heat-capacity":
            lines.append(f"{key} = {json.dumps(value)}")
    [table] = read["heat-capacity"]
    return "\n".join([*lines, "heat-capacity = [", *pieces(table["points"]), "]", ""])


def main():
    with (HERE / "janaf-4.toml").open("rb") as file:
        read = tomllib.load(file)
    head = read["source"] | {"id": "janaf-4-spline"}
    lines = ["[source]", *(f"{key} = {json.dumps(value)}" for key, value in head.items()), ""]
    text = "\n".join(lines + [entry(e) for e in read["entry"]])
    print(json.dumps({"source": text}))


if __name__ == "__main__":
    main()
