"""How long the search for the governing chain takes, as ratios: run `python tests/benchmarks/bench_paths.py`.

The yardstick is a plain Python loop of 100 000 multiplications, so that ratios compare across machines.
"""

import sys
from pathlib import Path
from time import perf_counter

sys.path.insert(0, str(Path(__file__).resolve().parents[2]))

from calclib.block_paths import block_paths, strip
from calclib.holes import Hole
from calclib.paths import chains


def seconds(call, times=9):
    """Return the shortest of several runs."""
    took = []
    for _ in range(times):
        start = perf_counter()
        call()
        took.append(perf_counter() - start)
    return min(took)


def yardstick():
    value = 1.0
    for _ in range(100_000):
        value *= 1.0000001
    return value


def staggered(lines, rows, skew=0.0):
    """Return a fully staggered group; `skew` gives every hole a y of its own."""
    return [Hole(3 * row + 1.5 * (line % 2) + 2, 1.5 + 3 * line + skew * row, 13 / 16, 1 / 16)
            for line in range(lines) for row in range(rows)]


def main():
    unit = seconds(yardstick)
    print(f"yardstick: {1e3 * unit:.2f} ms")
    for words, call in (
        ("6 x 12 staggered, governing chain", lambda: chains(18, staggered(6, 12), k=1)),
        ("6 x 12 staggered, 5 chains", lambda: chains(18, staggered(6, 12))),
        ("6 x 12 staggered, each hole its own gage, 5 chains", lambda: chains(18, staggered(6, 12, 0.05))),
        ("4 x 6 staggered, 5 chains", lambda: chains(12, staggered(4, 6))),
        ("2 x 4 staggered, 5 chains", lambda: chains(6, staggered(2, 4))),
        ("6 x 12 staggered, block paths", lambda: block_paths(strip(18, 60), 0.5, staggered(6, 12))),
        ("12 lines of 3, block paths", lambda: block_paths(strip(36, 60), 0.5, staggered(12, 3))),
    ):
        took = seconds(call)
        print(f"{words}: {took / unit:.2f} of the yardstick ({1e3 * took:.1f} ms)")


if __name__ == "__main__":
    main()
