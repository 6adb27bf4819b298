"""Bolts of AISC 360 Section J3: nominal stresses, pretension, holes, edge distances.

A diameter is a plain number [in in the US set, mm in the SI set]; an edition is "22" or "16". Each answer carries where
its row was read. A size or kind that the table does not have is refused; nothing is interpolated.
"""

import math
import re
from dataclasses import dataclass
from fractions import Fraction
from functools import cache

from calclib.tables import TableError, table

EDITIONS = ("22", "16")
HOLE_KINDS = ("standard", "oversize", "short slot", "long slot")
PERPENDICULAR, PARALLEL = "perpendicular", "parallel"     # of the long axis of a slot to the edge
_SUFFIX = {"US": "inch", "SI": "metric"}
_UNIT = {"US": "in", "SI": "mm"}
# The largest thread in the tables of threads; a table's last row, "and over", is not read beyond.
_LARGEST = {"US": 4.0, "SI": 100.0}
# Table number in each edition.
_PRETENSION, _STRESS, _HOLES, _EDGES, _INCREMENTS = "J3.1", "J3.2", "J3.3", "J3.4", "J3.5"


@dataclass(frozen=True)
class Tabulated:
    """A number from a table [in or mm for a distance, kip or kN for a force]."""

    value: float
    unit: str
    read: str                      # "printed", or "from memory, verify"
    source: str


@dataclass(frozen=True)
class HoleSize:
    """Nominal dimensions of a hole [in or mm]; unpacks as width, length."""

    width: float                   # diameter of a round hole
    length: float | None           # None for a round hole
    kind: str
    read: str
    source: str

    def __iter__(self):
        return iter((self.width, self.length))


@dataclass(frozen=True)
class BoltGroup:
    """Nominal stresses of bolts or threaded parts [ksi or MPa]."""

    name: str
    edition: str
    members: tuple                 # ASTM standards and grades, as printed
    F_nt: float                    # tension
    F_nv_N: float                  # shear, threads in the shear plane
    F_nv_X: float                  # shear, threads excluded from the shear plane
    unit: str                      # ksi or MPa
    read: str
    source: str


# Nominal stresses and pretension

def bolt_groups(edition):
    """Return the names of the groups of bolts of an edition.

    >>> bolt_groups("16")
    ('A307', 'Group A', 'Group B', 'Group C')
    """
    return tuple(row["group"] for row in _rows("bolt_groups", edition))


def bolt_group(edition, name, unit_set="US"):
    """Return the BoltGroup by the name of the group or of one of its members ("Group 120", "120", "A325").

    Source: AISC 360-22 and 360-16 Table J3.2.

    >>> bolt_group("22", "A490").F_nv_X, bolt_group("16", "Group B").F_nv_X
    (84.0, 84.0)
    """
    row = _group_row(edition, name)
    _known("unit set", unit_set, _UNIT)
    suffix, unit = ("", "ksi") if unit_set == "US" else ("_MPa", "MPa")
    if row[f"F_nt{suffix}"] is None:
        raise TableError(f"{row['group']}: AISC 360-{edition} Table {_STRESS} was not read in MPa. Work in US units, "
                         "or with AISC 360-22.")
    return BoltGroup(row["group"], edition, tuple(row["members"].split(", ")), row[f"F_nt{suffix}"],
                     row[f"F_nv_N{suffix}"], row[f"F_nv_X{suffix}"], unit, row["read"], row["source"])


def threaded_part(edition, F_u, unit_set="US"):
    """Return the BoltGroup of a threaded part to A3.4 with tensile strength `F_u` [ksi or MPa].

    Source: AISC 360-22 and 360-16 Table J3.2.

    >>> threaded_part("22", 58).F_nt
    43.5
    """
    _known("unit set", unit_set, _UNIT)
    row, = _rows("threaded_parts", edition)
    return BoltGroup("threaded part", edition, (), *(row[column] * F_u for column in ("F_nt", "F_nv_N", "F_nv_X")),
                     "ksi" if unit_set == "US" else "MPa", row["read"], row["source"])


def pretension(d, group, edition, unit_set="US"):
    """Return the minimum pretension T_b [kip or kN] of a bolt of diameter `d` of a group, or of one of its members.

    Group 200 and Group C: Grade 2 assemblies only. Source: AISC 360-22 and 360-16 Table J3.1, J3.1M.

    >>> pretension(0.75, "Group 120", "22").value
    28.0
    """
    name = _group_row(edition, group)["group"]
    rows = [row for row in _rows("pretension", edition, unit_set) if row["group"] == name]
    if not rows:
        raise TableError(f"{name} has no minimum pretension in {_title(_PRETENSION, edition, unit_set)}.")
    row = _row_of(d, rows, f"{_title(_PRETENSION, edition, unit_set)} for {name}", unit_set)
    return Tabulated(row["T_b"], "kip" if unit_set == "US" else "kN", row["read"], row["source"])


# Holes and edges

def hole_sizes(edition, unit_set="US"):
    """Return the diameters that the table of holes lists one by one; its last row holds for all larger ones too.

    >>> hole_sizes("22", "SI")
    (12.0, 16.0, 20.0, 22.0, 24.0, 27.0, 30.0, 36.0)
    """
    return tuple(row["d"] for row in _rows("holes", edition, unit_set) if row["kind"] == HOLE_KINDS[0])


def hole(d, kind, edition, unit_set="US"):
    """Return the nominal HoleSize for a bolt of diameter `d`; `kind` is one of HOLE_KINDS.

    Source: AISC 360-22 and 360-16 Table J3.3, J3.3M.

    >>> hole(0.75, "standard", "22").width
    0.8125
    >>> width, length = hole(1.25, "long slot", "22")
    >>> width, length
    (1.375, 3.125)
    """
    _known("kind of hole", kind, HOLE_KINDS)
    rows = [row for row in _rows("holes", edition, unit_set) if row["kind"] == kind]
    row = _row_of(d, rows, _title(_HOLES, edition, unit_set), unit_set)
    width = row["width"] if row["width"] is not None else d + row["width_over_d"]
    length = row["length"]
    if row["length_over_d"] is not None:
        length = d + row["length_over_d"]
    elif row["length_per_d"] is not None:
        length = d * row["length_per_d"]
    return HoleSize(width, length, kind, row["read"], row["source"])


def minimum_edge(d, edition, unit_set="US"):
    """Return the minimum distance [in or mm] from the centre of a standard hole to an edge.

    Source: AISC 360-22 and 360-16 Table J3.4, J3.4M.

    >>> minimum_edge(0.75, "22").value, minimum_edge(20, "22", "SI").value
    (1.0, 26.0)
    """
    row = _row_of(d, _rows("edges", edition, unit_set), _title(_EDGES, edition, unit_set), unit_set)
    value = row["edge"] if row["edge"] is not None else d * row["edge_per_d"]
    return Tabulated(value, _UNIT[unit_set], row["read"], row["source"])


def edge_increment(d, kind, direction, edition, unit_set="US"):
    """Return C_2 [in or mm], what an oversize hole or a slot adds to the minimum edge distance.

    kind : one of HOLE_KINDS; a standard hole adds nothing
    direction : PERPENDICULAR or PARALLEL, of the long axis of a slot to the edge; not looked at for round holes

    Source: AISC 360-22 and 360-16 Table J3.5, J3.5M.

    >>> edge_increment(0.75, "short slot", PERPENDICULAR, "22").value
    0.125
    """
    _known("kind of hole", kind, HOLE_KINDS)
    _known("direction of the slot", direction, (PERPENDICULAR, PARALLEL))
    title = _title(_INCREMENTS, edition, unit_set)
    rows = [row for row in _rows("edge_increments", edition, unit_set) if row["kind"] == kind]
    sizes = _rows("edges", edition, unit_set)
    _row_of(d, sizes, title, unit_set)          # the sizes are those of the table of edge distances
    if kind == "standard" or ("slot" in kind and direction == PARALLEL):
        return Tabulated(0.0, _UNIT[unit_set], sizes[0]["read"], sizes[0]["source"])
    row, = (row for row in rows if _at_least(d, row["from"] or 0) and _at_least(row["to"] or math.inf, d))
    value = row["C_2"] if row["C_2"] is not None else d * row["C_2_per_d"]
    return Tabulated(value, _UNIT[unit_set], row["read"], row["source"])


# Reading

@cache
def _rows(name, edition, unit_set=None):
    """Return the rows of one edition of a table."""
    _known("edition", edition, EDITIONS)
    if unit_set is not None:
        _known("unit set", unit_set, _UNIT)
        name = f"{name}_{_SUFFIX[unit_set]}"
    return tuple(row for row in table(name).rows if row["edition"] == edition)


def _known(what, given, allowed):
    if given not in allowed:
        raise TableError(f'{what}: "{given}" is not one of {", ".join(allowed)}.')


def _plain(name):
    return re.sub(r"ASTM|F3125|GROUP|GRADE|GR|[\s./\-]", "", name.upper())


def _group_row(edition, name):
    rows = _rows("bolt_groups", edition)
    for row in rows:
        if _plain(name) in (_plain(known) for known in (row["group"], *row["members"].split(", "))):
            return row
    raise TableError(f'bolt group: "{name}" is not in AISC 360-{edition} Table {_STRESS}; there are '
                     + ", ".join(row["group"] for row in rows) + ".")


def _title(number, edition, unit_set):
    _known("unit set", unit_set, _UNIT)
    return f"AISC 360-{edition} Table {number}{'M' if unit_set == 'SI' else ''}"


def _at_least(a, b):
    """Return whether a >= b, where a last binary digit does not count."""
    return a >= b * (1 - 1e-9)


def _row_of(d, rows, title, unit_set):
    """Return the row for diameter `d`: the one of that size, or the last, "and over"; refuse what has no row."""
    for row in rows:
        if math.isclose(d, row["d"], rel_tol=1e-9):
            return row
    last = rows[-1]
    open_ended = last.get("and_over") == "yes"
    if open_ended and last["d"] < d <= _LARGEST[unit_set]:
        return last
    sizes = ", ".join(_size(row["d"], unit_set) for row in rows if not row.get("and_over"))
    more = f", and from {_size(last['d'], unit_set)} to {_size(_LARGEST[unit_set], unit_set)}" if open_ended else ""
    raise TableError(f"bolt diameter: {d:g} {_UNIT[unit_set]} is not in {title}; the sizes are {sizes}{more} "
                     f"{_UNIT[unit_set]}.")


def _size(value, unit_set):
    """Return a size as the table prints it: 1-1/8, 20."""
    if unit_set == "SI":
        return f"{value:g}"
    whole, rest = divmod(Fraction(value), 1)
    return "-".join(str(part) for part in (whole, rest) if part)
