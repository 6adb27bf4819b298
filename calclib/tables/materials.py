"""Structural steels, rods and filler metals: specified minimum strengths, with the range of sizes each holds for."""

import math
import re
from dataclasses import dataclass
from difflib import get_close_matches
from fractions import Fraction
from functools import cache

from calclib.tables import TableError, table

_TABLES = {"steel_us": ("in", "ksi"), "steel_si": ("mm", "MPa")}


@dataclass(frozen=True)
class Material:
    """A grade of steel in one range of sizes: ksi with sizes in inches, MPa with sizes in mm."""

    name: str
    product: str                   # plates and shapes, HSS, pipe, rods ...
    F_y: float                     # specified minimum yield stress
    F_u: float                     # specified minimum tensile strength
    F_y_max: float | None          # None where the standard gives no upper limit
    F_u_max: float | None
    over: float                    # thickness, or diameter of a rod, above which the values hold
    to: float | None               # and up to which; None where no limit was read
    edition: str                   # of AISC 360, where its Manual has the value; blank: any
    size_unit: str                 # in or mm
    stress_unit: str               # ksi or MPa
    read: str                      # "printed", or "from memory, verify"
    source: str


@dataclass(frozen=True)
class Electrode:
    """A class of filler metal."""

    name: str
    F_EXX: float                   # minimum tensile strength of the weld metal [ksi]
    read: str
    source: str


def _plain(name):
    """Return a name without blanks, stops and hyphens, so that A572-50, a572 gr50 and A572 Grade 50 are one."""
    return re.sub(r"ASTM|GRADE|GR|[\s.\-]", "", name.upper())


@cache
def _grades():
    """Return the rows of each grade by its plain name."""
    found = {}
    for name, (size_unit, stress_unit) in _TABLES.items():
        for row in table(name).rows:
            found.setdefault(_plain(row["grade"]), []).append(Material(
                row["grade"], row["product"], row["F_y"], row["F_u"], row["F_y_max"], row["F_u_max"],
                row["over"] or 0.0, row["to"], row["edition"], size_unit, stress_unit, row["read"], row["source"]))
    return found


def materials(stress_unit=None):
    """Return the names of all grades, or of those stated in "ksi" or in "MPa".

    >>> materials("MPa")
    ('S235', 'S275', 'S355', 'CSA 300W', 'CSA 350W')
    """
    return tuple(rows[0].name for rows in _grades().values() if stress_unit in (None, rows[0].stress_unit))


def material(name, thickness, edition=None):
    """Return the Material of this grade for one thickness.

    name : grade, as "A572 Gr. 50", "A572-50" or "A992"
    thickness : of the part, or diameter of a rod [in, or mm for a grade stated in MPa]
    edition : of AISC 360, "22" or "16"; needed where the Manuals of the two differ

    Raises TableError for an unknown grade and for a thickness outside its ranges.

    >>> material("A588", 4.5).F_y, material("A500 Gr. C round", 0.465, "22").F_y
    (46.0, 50.0)
    """
    rows = _grades().get(_plain(name))
    if rows is None:
        close = get_close_matches(_plain(name)[:40], list(_grades()), 3, 0)
        raise TableError(f'material: "{name}" is not in the tables; the nearest are '
                         f'{", ".join(_grades()[key][0].name for key in close)}.')
    grade, unit = rows[0].name, rows[0].size_unit
    if not (math.isfinite(thickness) and thickness > 0):
        raise TableError(f"{grade}: the thickness is {thickness:g} {unit}; it must be above 0.")
    # A part exactly at a limit belongs to the smaller range, whatever its last binary digit.
    fits = [row for row in rows if thickness > row.over * (1 + 1e-9)
            and (row.to is None or thickness <= row.to * (1 + 1e-9))]
    if not fits:
        raise TableError(f"{grade}: a thickness of {_size(thickness, unit)} is outside the grade, which reaches to "
                         f"{_size(max(row.to for row in rows), unit)}. Choose another grade.")
    if not any(row.edition for row in fits):
        return fits[0]
    for row in fits:
        if row.edition == edition:
            return row
    raise TableError(f"{grade}: F_y is " + " and ".join(f"{row.F_y:g} {row.stress_unit} with AISC 360-{row.edition}"
                                                       for row in fits) + "; state the edition.")


def _size(value, unit):
    """Return a size as the shop writes it: "2-1/2 in", "40 mm"."""
    sixteenths = round(value * 16)
    if unit == "mm" or abs(value * 16 - sixteenths) > 1e-6:
        return f"{value:g} {unit}"
    whole, rest = divmod(Fraction(sixteenths, 16), 1)
    return "-".join(str(part) for part in (whole, rest) if part) + f" {unit}"


def electrodes():
    """Return the names of all classes of filler metal."""
    return tuple(row["electrode"] for row in table("electrodes").rows)


def electrode(name):
    """Return the Electrode of a class, with or without its process: E70, E70XX, E7018, E71T-1, ER70S-6.

    >>> electrode("E7018").F_EXX, electrode("E71T-1").F_EXX, electrode("E110XX").F_EXX
    (70.0, 70.0, 110.0)
    """
    text = re.sub(r"\s", "", name.upper())
    # Flux-cored wire writes the tens of the strength and then the position, 0 or 1: E71T is an E70.
    cored = re.fullmatch(r"E(1[01]|[6-9])[01]T(-?\w*)", text, re.ASCII)
    other = re.fullmatch(r"ER?(1[01]|[6-9])0(XX|\d\d|S-?\w*)?", text, re.ASCII)
    for row in table("electrodes").rows:
        if (cored or other) and row["electrode"] == f"E{(cored or other)[1]}0":
            return Electrode(row["electrode"], row["F_EXX"], row["read"], row["source"])
    raise TableError(f'electrode: "{name}" is not in the table; there are {", ".join(electrodes())}.')
