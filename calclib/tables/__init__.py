"""Published tables: a CSV with the digits as printed, and a TOML beside it that says where they were read.

The CSV keeps what the page shows, so that a reader can compare it digit by digit (fractions of an inch are written
"1-1/8"). The TOML must name the source, how it was read, what is missing, the key column, and each column; a column
with a unit holds numbers, the others hold text.
"""

import csv
import re
import tomllib
from dataclasses import dataclass
from difflib import get_close_matches
from fractions import Fraction
from functools import cache
from importlib.resources import files
from types import MappingProxyType

from calclib.errors import CalcError

PRINTED, FROM_MEMORY = "printed", "from memory, verify"
COMPULSORY = ("source", "read", "gaps", "key", "columns")
_READ = {"from the printed table": PRINTED, FROM_MEMORY: FROM_MEMORY, "by row": None}
_FRACTION = re.compile(r"(?:(\d+)-)?(\d+)/([1-9]\d*)", re.ASCII)
_DECIMAL = re.compile(r"\d+(?:\.\d+)?", re.ASCII)


class TableError(CalcError):
    """A table has no such row, or its files contradict each other."""


@dataclass(frozen=True)
class Table:
    """A published table.

    `rows` holds one read-only mapping a row: numbers as floats, blank cells as None, text as text; `row["printed"]`
    maps each column to the text of the page; `row["source"]` and `row["read"]` are there for every row.
    """

    name: str
    source: str
    gaps: str
    key: str
    columns: MappingProxyType      # name -> {"unit": ..., "doc": ...}; no unit means text
    rows: tuple

    def row(self, key):
        """Return the row whose key column reads `key`; otherwise raise TableError with the nearest names."""
        for row in self.rows:
            if row[self.key] == key:
                return row
        close = get_close_matches(str(key), [row[self.key] for row in self.rows], 3, 0)
        raise TableError(f'{self.key}: "{key}" is not in table {self.name}; the nearest are {", ".join(close)}.')


def table_names():
    """Return the names of all tables, sorted."""
    return sorted(entry.name[:-4] for entry in files(__name__).iterdir() if entry.name.endswith(".csv"))


@cache
def table(name):
    """Return the table `name`, e.g. table("threads_unc").

    >>> table("threads_unc").row("1-1/8-7 UNC")["d"]
    1.125
    """
    if name not in table_names():
        raise TableError(f'there is no table "{name}"; there are {", ".join(table_names())}.')
    folder = files(__name__)
    return parse(name, (folder / f"{name}.csv").read_text(encoding="utf-8"),
                 (folder / f"{name}.toml").read_text(encoding="utf-8"))


def parse(name, csv_text, toml_text):
    """Return the Table that the two files describe; raise TableError where they are incomplete or disagree."""
    about = tomllib.loads(toml_text)
    missing = [key for key in COMPULSORY if not about.get(key)]
    if missing:
        raise TableError(f"{name}.toml: {', '.join(missing)} must be given.")
    if about["read"] not in _READ:
        raise TableError(f'{name}.toml: read is "{about["read"]}"; write one of {", ".join(_READ)}.')
    columns = about["columns"]
    undescribed = [column for column, entry in columns.items() if not entry.get("doc")]
    if undescribed:
        raise TableError(f"{name}.toml: column {', '.join(undescribed)} has no doc.")
    header, *lines = csv.reader(csv_text.splitlines(), strict=True)
    if header != list(columns):
        raise TableError(f"{name}: the CSV has columns {', '.join(header)}; the TOML describes {', '.join(columns)}.")
    if about["key"] not in columns:
        raise TableError(f"{name}.toml: the key column {about['key']} is not a column.")
    rows, keys = [], set()
    for number, cells in enumerate(lines, start=2):
        place = f"{name}.csv, line {number}"
        if len(cells) != len(header):
            raise TableError(f"{place}: {len(cells)} cells, but {len(header)} columns.")
        row = _row(place, dict(zip(header, cells, strict=True)), about)
        if not row[about["key"]] or row[about["key"]] in keys:
            raise TableError(f'{place}: {about["key"]} "{row[about["key"]]}" is blank or stands there twice.')
        keys.add(row[about["key"]])
        rows.append(row)
    return Table(name, about["source"], about["gaps"], about["key"], MappingProxyType(columns), tuple(rows))


def _row(place, printed, about):
    row = {column: _number(f"{place}, {column}", text) if "unit" in about["columns"][column] else text
           for column, text in printed.items()}
    row.setdefault("read", _READ[about["read"]])
    if row["read"] not in (PRINTED, FROM_MEMORY):
        raise TableError(f'{place}: read is "{row["read"]}"; write "{PRINTED}" or "{FROM_MEMORY}".')
    if "source" in row:
        if row["source"] not in about.get("sources", {}):
            raise TableError(f'{place}: source "{row["source"]}" is not among the sources of the TOML.')
        row["source"] = about["sources"][row["source"]]
    else:
        row["source"] = about["source"]
    row["printed"] = MappingProxyType(printed)
    return MappingProxyType(row)


def _number(place, text):
    """Return the float of "0.182", "13/16" or "1-1/8" (one and an eighth), or None for a blank cell."""
    if not text:
        return None
    if fraction := _FRACTION.fullmatch(text):
        whole, numerator, denominator = fraction.groups()
        return float(int(whole or 0) + Fraction(int(numerator), int(denominator)))
    if not _DECIMAL.fullmatch(text):
        raise TableError(f'{place}: "{text}" is not a number; write 0.182, 13/16 or 1-1/8.')
    return float(text)


# Screw threads

SERIES = {"UNC": "threads_unc", "UNF": "threads_unf", "8UN": "threads_8un",
          "ISO coarse": "threads_iso_coarse", "ISO fine": "threads_iso_fine"}
# The diameter a thread's name begins with; a few digits at most, for the text may be anything.
_SIZE = re.compile(r"M?((?:\d{1,3}-)?\d{1,3}/[1-9]\d?|\d{1,3}(?:\.\d{1,4})?)", re.ASCII)


@dataclass(frozen=True)
class Thread:
    """One standard thread: `d` [in] and `n` [1/in] in the inch series, `d` [mm] and `P` [mm] in the ISO series."""

    name: str                      # as the trade writes it: 1-1/8-7 UNC, M20, M10x1.25
    series: str
    size: str                      # diameter as printed: 1-1/8, 20
    d: float
    n: float | None                # None in the ISO series
    P: float | None                # None in the inch series
    A_s_printed: str | None        # [in**2] or [mm**2], digits as printed; None where no value is known
    read: str                      # "printed", or "from memory, verify"
    source: str


@cache
def threads(series):
    """Return the Threads of one of SERIES, by diameter and then from the coarser pitch to the finer.

    >>> [t.name for t in threads("ISO fine") if t.d == 10]
    ['M10x1.25', 'M10x1']
    """
    if series not in SERIES:
        raise TableError(f'there is no thread series "{series}"; there are {", ".join(SERIES)}.')
    return tuple(Thread(row["thread"], series, row["printed"]["d"], row["d"], row.get("n"), row.get("P"),
                        row["printed"]["A_s"] or None, row["read"], row["source"])
                 for row in table(SERIES[series]).rows)


def thread(series, size):
    """Return the Thread of `series` by its name, or in an inch series by its size alone ("1-1/8").

    A metric size alone means the coarse thread, so the fine series takes names only.

    >>> thread("UNC", "1-1/8").n
    7.0
    """
    wanted = re.sub(r"\s*[x×]\s*", "x", size.strip())  # noqa: RUF001  the multiplication sign is meant
    inch = not series.startswith("ISO")
    for candidate in threads(series):
        if candidate.name == wanted or (inch and candidate.size == wanted):
            return candidate
    raise TableError(f'thread: "{size}" is not in the series {series}; the nearest are {_nearest(series, wanted)}.')


def _nearest(series, wanted):
    """Return the three names nearest in diameter, or in spelling where no diameter can be read."""
    if begin := _SIZE.match(wanted):
        d = _number("thread", begin[1])
        return ", ".join(t.name for t in sorted(threads(series), key=lambda t: abs(t.d - d))[:3])
    return ", ".join(get_close_matches(wanted, [t.name for t in threads(series)], 3, 0))
