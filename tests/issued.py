"""Issued calcs for the tests of issue and check: issued once, kept in memory, altered in copies."""

import random
import re
from pathlib import Path

from calclib.case import load
from calclib.issuing.issue import Issuer

ROOT = Path(__file__).parent.parent
DEMO = ROOT / "workbooks" / "cases" / "hanger_plate.yaml"
RANDOM = 20261120      # the seed of every choice of a place to alter


class RememberingIssuer(Issuer):
    """An issuer that runs the workbook once for each case."""

    def __init__(self):
        super().__init__()
        self.built = {}

    def build(self, case):
        """Return the files of a case, from memory where they were made before."""
        key = case.yaml()
        if key not in self.built:
            self.built[key] = super().build(case)
        return dict(self.built[key])

    def run_in_kernel(self, source):
        """Run lines where the workbooks run, as if the library there were another."""
        import nbformat
        self._start()
        self._execute(nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell(source)]))


class Issued:
    """The files of one issued revision: by suffix, and written where a test wants them."""

    def __init__(self, files):
        self.files = files

    def name(self, suffix):
        """Return the name of the file with a suffix."""
        return next(name for name in self.files if name.endswith(suffix))

    def __getitem__(self, suffix):
        return self.files[self.name(suffix)]

    def write(self, folder, **changed):
        """Write all files to a folder, those of `changed` (pdf=..., json=...) with other content."""
        folder.mkdir(parents=True, exist_ok=True)
        for name, content in self.files.items():
            (folder / name).write_bytes(changed.get(name.rpartition(".")[2], content))
        return folder


def demo(issuer):
    """Return the demo pin plate as issued."""
    return Issued(issuer.build(load(DEMO)))


def digits(content, pattern=rb"(?s).*"):
    """Return the places of all digits in the first part of a content that a pattern finds."""
    found = re.search(pattern, content)
    return [found.start() + m.start() for m in re.finditer(rb"\d", found[0])]


def chosen(places, count):
    """Return some of the places, the same every time."""
    return random.Random(RANDOM).sample(places, min(count, len(places)))


def with_digit(content, place):
    """Return the content with the digit at a place replaced by another."""
    digit = content[place:place + 1]
    assert digit.isdigit()
    return content[:place] + str((int(digit) + 1 + place % 9) % 10).encode() + content[place + 1:]
