#!/usr/bin/env python3
"""Benchmarks as whole processes, interleaved, medians of pairs.

    cargo build --release --locked && cargo bench --no-run --locked
    python3 benches/pairs.py [PAIRS]

In one process the typesetter remembers what it has set, which flatters; so every run here is a
process of its own, and the two programs of a comparison take turns.
"""

import json
import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

ROOT = Path(__file__).resolve().parent.parent
PROGRAM = ROOT / "target" / "release" / "hesswright"
CASE = ROOT / "cases" / "nitrobenzene-hydrogenation.toml"


def bare_program():
    """The newest build of benches/bare.rs."""
    built = [p for p in (ROOT / "target" / "release" / "deps").glob("bare-*") if p.suffix == ""]
    if not built:
        sys.exit("benches/bare.rs is not built: cargo bench --no-run --locked")
    return max(built, key=lambda path: path.stat().st_mtime)


def seconds(command):
    start = time.perf_counter()
    done = subprocess.run(command, stdout=subprocess.DEVNULL, stderr=subprocess.PIPE, text=True)
    elapsed = time.perf_counter() - start
    if done.returncode != 0:
        sys.exit(f"{command} ended with {done.returncode}: {done.stderr}")
    return elapsed


def in_turn(first, second, pairs):
    """Medians of two commands and of their ratio, run A B A B …, after one warm-up each."""
    seconds(first), seconds(second)
    times = [(seconds(first), seconds(second)) for _ in range(pairs)]
    ratio = statistics.median(a / b for a, b in times)
    return statistics.median(a for a, _ in times), statistics.median(b for _, b in times), ratio


def many_reactions(count):
    """A case of `count` reactions over some thirty substances of the built-in sources."""
    equations = [
        "CH4(g) + 2 O2(g) -> CO2(g) + 2 H2O(l)",
        "2 H2(g) + O2(g) -> 2 H2O(g)",
        "N2(g) + 3 H2(g) -> 2 NH3(g)",
        "CO(g) + H2O(g) -> CO2(g) + H2(g)",
        "H+(aq) + OH-(aq) -> H2O(l)",
        "C(cr, graphite) + CO2(g) -> 2 CO(g)",
        "H2(g) + Cl2(g) -> 2 HCl(g)",
        "4 Al(cr) + 3 O2(g) -> 2 Al2O3(cr, corundum)",
    ]
    head = f"""[record]
number = "BENCH-{count}"
revision = "A"
title = "{count} reactions"
date = 2026-01-01
preparer = "Nobody (invented)"
status = "preliminary"
[sources]
consult = ["codata-1989", "nasa-glenn-2021"]
"""
    bodies = (
        f'[reactions.r{i}]\nequation = "{equations[i % len(equations)]}"\n' for i in range(count)
    )
    return head + "".join(bodies)


def many_temperatures(count):
    """The same, each reaction at a temperature of its own: 300 K to 370 K, so that water is liquid,
    and by the functions of one source. Without ions and with the alumina of that source."""
    text = many_reactions(count).replace('"codata-1989", ', "").replace("corundum", "alpha")
    text = text.replace("H+(aq) + OH-(aq) -> H2O(l)", "H2O(g) -> H2O(l)")
    blocks = text.split("[reactions.")
    heats = (
        f'{block}temperature = "{300 + (i * 7 % 10007) * 0.007:.3f} K"\n'
        for i, block in enumerate(blocks[1:])
    )
    return "[reactions.".join([blocks[0], *heats])


def microseconds_per_reaction(case_of, folder, runs):
    """How long `compute` takes for one reaction of a case of 10, 100, 1000 and 10,000."""
    cost = {}
    for count in (10, 100, 1000, 10000):
        case = folder / f"{count}.toml"
        case.write_text(case_of(count))
        times = [seconds([PROGRAM, "compute", "--json", case]) for _ in range(runs)]
        cost[count] = round(statistics.median(times) / count * 1e6, 1)
    return cost


def main():
    pairs = int(sys.argv[1]) if len(sys.argv) > 1 else 30
    with tempfile.TemporaryDirectory() as folder:
        folder = Path(folder)
        bare = bare_program()
        subprocess.run([bare, "prepare", CASE, folder / "prepared"], check=True)
        issue = [PROGRAM, "issue", CASE, "--out", folder / "out"]
        typeset = [bare, "typeset", folder / "prepared", folder / "bare.pdf"]
        a, b, ratio = in_turn(issue, typeset, pairs)
        same = (folder / "out" / "LA-0412-A.pdf").read_bytes() == (folder / "bare.pdf").read_bytes()
        report = {
            "pairs": pairs,
            "issue, ms": round(a * 1e3, 2),
            "bare program, ms": round(b * 1e3, 2),
            "issue / bare, median of ratios": round(ratio, 3),
            "same bytes": same,
        }
        compute, nothing, _ = in_turn([PROGRAM, "compute", CASE], [PROGRAM, "--version"], pairs)
        report["compute, ms"] = round(compute * 1e3, 2)
        report["--version, ms"] = round(nothing * 1e3, 2)
        runs = max(5, pairs // 3)
        report["compute per reaction, µs"] = microseconds_per_reaction(many_reactions, folder, runs)
        heats = microseconds_per_reaction(many_temperatures, folder, runs)
        report["compute per heat at temperature, µs"] = heats
        # The start of the program is shared by ten heats or by ten thousand: without it.
        start = report["--version, ms"] * 1e3
        net = {count: cost - start / count for count, cost in heats.items()}
        report["10,000 heats at temperature / 10, each"] = round(heats[10000] / heats[10], 3)
        report["the same without the start"] = round(net[10000] / net[10], 3)
        print(json.dumps(report, indent=2, ensure_ascii=False))


if __name__ == "__main__":
    main()
