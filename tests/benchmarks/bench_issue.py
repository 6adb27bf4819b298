"""How long an issued calc takes, as ratios: run `python tests/benchmarks/bench_issue.py`.

The yardsticks are a bare kernel that runs an empty notebook by nbclient, and nbconvert's own export of the same
executed notebook by a browser: webpdf, with the browser of this machine.
"""

import os
import re
import subprocess
import sys
import tempfile
import threading
from pathlib import Path
from statistics import median
from time import perf_counter, sleep

sys.path.insert(0, str(Path(__file__).resolve().parents[1] / "browser"))

from lab import CHROMIUM, FLAGS, ROOT

CASE = ROOT / "workbooks" / "cases" / "hanger_plate.yaml"
EMPTY = """
import nbformat
from nbclient import NotebookClient
NotebookClient(nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell("")]), kernel_name="python3").execute()
"""
OURS = """
import sys, time, nbformat
notebook = nbformat.read(sys.argv[1], as_version=4)
from calclib.issuing.pdf import CalcPDFExporter
start = time.perf_counter()
made, _ = CalcPDFExporter().from_notebook_node(notebook)
first = time.perf_counter() - start
start = time.perf_counter()
CalcPDFExporter().from_notebook_node(notebook)
print(first, time.perf_counter() - start, len(made))
"""
# The exporter starts the browser that playwright downloads; here it is given the one of this machine.
STOCK = """
import sys, time, nbformat
from playwright.async_api import BrowserType
launch = BrowserType.launch
async def with_chromium(self, **options):
    return await launch(self, executable_path=sys.argv[2], args=sys.argv[3:], **{k: v for k, v in options.items()
                                                                                   if k not in ("args", "channel")})
BrowserType.launch = with_chromium
notebook = nbformat.read(sys.argv[1], as_version=4)
from nbconvert.exporters import WebPDFExporter
start = time.perf_counter()
made, _ = WebPDFExporter(allow_chromium_download=False).from_notebook_node(notebook)
print(time.perf_counter() - start, len(made))
"""
QUIET = {**os.environ, "PYTHONPATH": str(ROOT), "PYTHONWARNINGS": "ignore"}


def python(*arguments):
    """Run Python in a folder of its own; return (seconds, peak memory of it and its children [MB], what it printed)."""
    with tempfile.TemporaryDirectory() as folder, tempfile.TemporaryFile("w+", encoding="utf-8") as printed:
        start = perf_counter()
        process = subprocess.Popen([sys.executable, *map(str, arguments)], cwd=folder, env=QUIET, stdout=printed,
                                   stderr=subprocess.DEVNULL)
        peak = [0]
        watch = threading.Thread(target=_watch, args=(process, peak))
        watch.start()
        assert process.wait() == 0, arguments
        took = perf_counter() - start
        watch.join()
        printed.seek(0)
        return took, peak[0], printed.read()


def _watch(process, peak):
    """Keep the greatest memory of a process and all below it together, what they share counted once (Linux)."""
    while process.poll() is None:
        peak[0] = max(peak[0], sum(map(_resident, _family(process.pid))))
        sleep(0.05)


def _family(pid):
    found = [pid]
    for each in found:
        for children in Path(f"/proc/{each}/task").glob("*/children"):
            try:
                found += map(int, children.read_text().split())
            except OSError:  # ended meanwhile
                continue
    return found


def _resident(pid):
    try:
        return int(re.search(r"^Pss:\s+(\d+)", Path(f"/proc/{pid}/smaps_rollup").read_text(), re.MULTILINE)[1]) / 1024
    except (OSError, TypeError):  # ended meanwhile
        return 0


def copies(folder, count):
    """Write the demo case under several calc numbers."""
    text = CASE.read_text(encoding="utf-8")
    paths = [folder / f"case-{i}.yaml" for i in range(count)]
    for i, path in enumerate(paths):
        path.write_text(text.replace("TC-101", f"BM-{i}"), encoding="utf-8", newline="\n")
    return paths


def main():
    with tempfile.TemporaryDirectory() as made:
        folder = Path(made)
        cases = copies(folder, 6)
        python("-c", EMPTY)  # files of the first run of all are read from the disk
        bare, cold, peaks, further = [], [], [], []
        for i in range(3):
            bare.append(python("-c", EMPTY)[0])
            took, peak, _ = python("-m", "calclib", "issue", cases[0], "--to", folder / f"one-{i}")
            cold.append(took)
            peaks.append(peak)
            several = python("-m", "calclib", "issue", *cases, "--to", folder / f"six-{i}")
            further.append((several[0] - took) / 5)
            peaks.append(several[1])
        print(f"issuing one calc cold: {median(cold):.2f} s, {median(cold) / median(bare):.2f} of a bare kernel with "
              f"an empty notebook ({median(bare):.2f} s)")
        print(f"each further calc in the same run: {median(further):.2f} s, {median(further) / median(bare):.2f} of it")
        print(f"greatest memory of all its processes together: {max(peaks):.0f} MB")
        notebook = next(folder.glob("one-0/**/*.ipynb"))
        first, again, size = map(float, python("-c", OURS, notebook)[2].split())
        stock, stock_size = map(float, python("-c", STOCK, notebook, CHROMIUM, *FLAGS)[2].split())
        print(f"PDF of an executed notebook: {first:.2f} s, the second time {again:.2f} s ({size / 1024:.0f} kB); "
              f"webpdf of nbconvert {stock:.2f} s ({stock_size / 1024:.0f} kB): {stock / first:.1f} and "
              f"{stock / again:.1f} times as long")


if __name__ == "__main__":
    main()
