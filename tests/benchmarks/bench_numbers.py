"""How long the numbers of a calc take, as ratios: run `python tests/benchmarks/bench_numbers.py`.

The yardsticks are the same equations on quantities of pint, and a sweep made of single evaluations.
"""

import sys
from pathlib import Path
from statistics import median
from time import perf_counter

import numpy as np

sys.path.insert(0, str(Path(__file__).resolve().parents[2]))

from calclib import case, units
from calclib.calc import evaluate, sweep

HANGER = Path(__file__).resolve().parents[2] / "workbooks" / "cases" / "hanger_plate.yaml"


def seconds(call, times):
    """Return the median of several runs."""
    took = []
    for _ in range(times):
        start = perf_counter()
        call()
        took.append(perf_counter() - start)
    return median(took)


def in_pint(calc):
    """Return a function that computes every equation of a calc once more, on quantities."""
    registry = units.registry()
    unit_set = calc.x.units
    calls = []
    for block in calc.blocks:
        for step in block.steps:
            if step.equation is None:
                continue
            quantities = {name: registry.Quantity(step.values[name], argument.dimension.base[unit_set])
                          if argument.dimension.base[unit_set] else step.values[name]
                          for name, argument in step.equation.arguments.items()}
            calls.append((step.equation.function, quantities))
    return lambda: [function(**quantities) for function, quantities in calls], len(calls)


def main():
    hanger = case.load(HANGER)
    calc = evaluate(hanger)
    quantities, count = in_pint(calc)
    pint = seconds(quantities, 50)
    one = seconds(lambda: evaluate(hanger), 200)
    print(f"one evaluation of a pin plate, entries read, {count} equations: {1e3 * one:.2f} ms, "
          f"{one / pint:.3f} of the equations alone in pint ({1e3 * pint:.2f} ms)")
    widths = np.linspace(0.5, 2.0, 200)
    swept = seconds(lambda: sweep(hanger, plate_thickness=widths), 50)
    singles = seconds(lambda: [evaluate(hanger.with_texts(plate_thickness=f"{w} in")) for w in widths], 3)
    print(f"a sweep of 200 points, every limit state: {1e3 * swept:.2f} ms, "
          f"{swept / singles:.4f} of 200 evaluations ({1e3 * singles:.0f} ms)")


if __name__ == "__main__":
    main()
