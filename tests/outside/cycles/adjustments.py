#!/usr/bin/env python3
"""Redundant cycles made by chance, with the answers of numpy and scipy, as one JSON document.

The answers take another way than the program. The unknowns are an enthalpy for each species, not
multipliers of steps: with A the steps by species, q their heats and V the covariance,

    h = (Aᵀ V⁻¹ A)⁺ Aᵀ V⁻¹ q,    heat of the target = tᵀh,    u² = tᵀ(Aᵀ V⁻¹ A)⁺ t,

in floating point, whitened by a Cholesky factor and solved with the singular values. The enthalpies
themselves are not determined by heats of reactions; what the target makes of them is. χ² and its
probability are scipy's. The normalised residuals are those of Baarda for correlated observations,
(V⁻¹v)_j / √(V⁻¹ Q_v V⁻¹)_jj.

Species are formulas of one element, C(g) to C6(g), so that any reaction
can be balanced. The numbers are Python's own random ones of a fixed seed.
"""

import json
import random
import sys
from fractions import Fraction

import numpy
from scipy import stats

SPECIES = ["C(g)", "C2(g)", "C3(g)", "C4(g)", "C5(g)", "C6(g)"]
ATOMS = [1, 2, 3, 4, 5, 6]
CYCLES = 60
RANDOM = random.Random(20261201)


def reaction():
    """Stoichiometric numbers that keep the atoms, three species at the most."""
    while True:
        numbers = [Fraction(0)] * len(SPECIES)
        chosen = RANDOM.sample(range(len(SPECIES)), RANDOM.choice([2, 3]))
        for species in chosen[1:]:
            numbers[species] = Fraction(RANDOM.choice([-3, -2, -1, 1, 2, 3]), RANDOM.choice([1, 1, 2]))
        atoms = sum(n * a for n, a in zip(numbers, ATOMS))
        numbers[chosen[0]] = -atoms / ATOMS[chosen[0]]
        if all(numbers[species] for species in chosen):
            return numbers


def written(numbers):
    def side(sign):
        terms = [(sign * n, s) for n, s in zip(numbers, SPECIES) if sign * n > 0]
        return " + ".join(f"{n} {s}" for n, s in terms)

    return f"{side(-1)} -> {side(1)}"


def decimal(number):
    return f"{number:.2f}"


def cycle():
    """Four to nine steps that leave redundancy, and a target among their sums."""
    while True:
        steps = [reaction() for _ in range(RANDOM.randint(4, 9))]
        matrix = numpy.array([[float(n) for n in step] for step in steps])
        rank = numpy.linalg.matrix_rank(matrix)
        if rank == len(steps):
            continue
        by = [Fraction(RANDOM.randint(-2, 2)) for _ in steps]
        target = [sum(b * s[i] for b, s in zip(by, steps)) for i in range(len(SPECIES))]
        if any(n > 0 for n in target) and any(n < 0 for n in target):
            return steps, target, matrix, rank


def adjusted():
    steps, target, matrix, rank = cycle()
    truth = [RANDOM.uniform(-500, 500) for _ in SPECIES]
    expanded = [RANDOM.choice([0.2, 0.5, 0.8, 1.2, 2.0, 3.5]) for _ in steps]
    heats = []
    for step, width in zip(steps, expanded):
        error = RANDOM.gauss(0, width / 2) * RANDOM.choice([1, 1, 1, 3])
        heats.append(float(decimal(sum(float(n) * h for n, h in zip(step, truth)) + error)))
    # All pairs of some steps share one coefficient, which is possible for any from 0 to 1.
    together = RANDOM.sample(range(len(steps)), RANDOM.randint(0, 3))
    r = RANDOM.choice([0.2, 0.5, 0.7])
    pairs = [(a, b) for a in together for b in together if a < b]
    u = numpy.array(expanded) / 2
    correlation = numpy.eye(len(steps))
    for a, b in pairs:
        correlation[a, b] = correlation[b, a] = r
    covariance = correlation * numpy.outer(u, u)

    factor = numpy.linalg.cholesky(covariance)
    white = numpy.linalg.solve(factor, matrix)
    inverse = numpy.linalg.pinv(white.T @ white, rcond=1e-10)
    observed = numpy.array(heats)
    h = inverse @ white.T @ numpy.linalg.solve(factor, observed)
    t = numpy.array([float(n) for n in target])
    residual = observed - matrix @ h
    weight = numpy.linalg.inv(covariance)
    chi_square = float(residual @ weight @ residual)
    freedom = len(steps) - int(rank)
    scatter = weight @ (covariance - matrix @ inverse @ matrix.T) @ weight
    normalised = [
        None if d < 1e-8 * w else float(n) / float(numpy.sqrt(d))
        for n, d, w in zip(weight @ residual, numpy.diag(scatter), numpy.diag(weight))
    ]
    lines = ["[cycles.c]", f'target = "{written(target)}"', "correlations = ["]
    for a, b in pairs:
        lines.append(f'  {{ between = ["s{a}", "s{b}"], coefficient = "{r}" }},')
    lines += ["]", "steps = ["]
    for index, (step, heat, width) in enumerate(zip(steps, heats, expanded)):
        lines.append(
            f'  {{ id = "s{index}", equation = "{written(step)}", measured = "enthalpy", '
            f'heat = "{decimal(heat)} ± {width} kJ/mol", source = "made by chance" }},'
        )
    lines.append("]")
    return {
        "tables": "\n".join(lines) + "\n",
        "value": float(t @ h),
        "standard": float(numpy.sqrt(t @ inverse @ t)),
        "chi-square": chi_square,
        "degrees-of-freedom": freedom,
        "probability": float(stats.chi2.sf(chi_square, freedom)),
        "residuals": [float(v) for v in residual],
        "normalised": normalised,
    }


json.dump([adjusted() for _ in range(CYCLES)], sys.stdout)
