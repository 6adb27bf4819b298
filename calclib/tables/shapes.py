"""Rolled shapes and hollow sections of the AISC Shapes Database v16.0 (16th-edition Manual), in inches.

Where each number was read stands in the TOML beside each CSV. The files are read here without the checks of
`calclib.tables.table`, and a Shape is made when it is asked for, so that a form with all names opens at once; a test
makes those checks on the same files.
"""

import csv
import re
from dataclasses import dataclass
from difflib import get_close_matches
from fractions import Fraction
from functools import cache
from importlib.resources import files

from calclib.tables import TableError, table

SOURCE = "AISC Shapes Database v16.0 (16th-edition Manual)"
FAMILIES = ("W", "M", "S", "HP", "C", "MC", "L", "WT", "MT", "ST", "2L",
            "HSS rectangular", "HSS square", "HSS round", "PIPE")
HOLLOW = ("HSS rectangular", "HSS square", "HSS round", "PIPE")
# AISC 360-22 and 360-16 B4.2: the wall by which a hollow section is designed, over its nominal wall. The tabulated
# t_design and properties are those of 0.93.
WALLS = {"A500": 0.93, "A847": 0.93, "A618": 0.93, "A53": 0.93, "A1065": 1.0, "A1085": 1.0}

_FILES = ("shapes_i", "shapes_channel", "shapes_angle", "shapes_tee", "shapes_double_angle", "shapes_hss",
          "shapes_round")
_TEXT = ("name", "parent", "backs")
_SIZE = r"\d{1,3}-\d{1,2}/\d{1,2}|\d{1,2}/\d{1,2}|\d{0,4}\.?\d{1,4}"
_NAME = re.compile(rf"(2L|HSS|HP|MC|MT|ST|WT|W|M|S|C|L)((?:{_SIZE})(?:X(?:{_SIZE})){{1,3}})(LLBB|SLBB)?", re.ASCII)
_PREFIX = re.compile("2L|[A-Za-z]+")
_PIPE = re.compile(rf"PIPE({_SIZE})(STD|XS|XXS)\.?", re.ASCII)


@dataclass(frozen=True, slots=True)
class Shape:
    """One shape. What a family does not have, or the database leaves blank, is None. Lengths in inches.

    The centroid: for channels, `x` is the distance from the back of the web; for tees, `y` from the outer face of the
    flange; for angles, `x` from the back of the longer leg and `y` from the back of the shorter leg; for double angles,
    `x` from the back of the legs that lie back to back and `y` from the back of the outstanding legs.
    """

    name: str
    family: str
    W: float                             # nominal weight [lb/ft]
    A: float                             # gross area [in**2]; of hollow sections with the design wall
    d: float | None = None               # overall depth; of double angles, the legs back to back
    b_f: float | None = None
    t_f: float | None = None             # of channels and S-shapes, the mean thickness
    t_w: float | None = None             # web or stem
    k_des: float | None = None           # to the toe of the fillet
    k_1: float | None = None             # from the middle of the web to the toe of the fillet
    T: float | None = None               # flat depth of the web
    gage: float | None = None            # workable gage in the flange
    gage_outer: float | None = None      # from the outer to the inner line of bolts in a wide flange
    H: float | None = None               # overall height of a rectangular hollow section, the longer side
    B: float | None = None               # its overall width
    h_flat: float | None = None          # flat part of the height
    b_flat: float | None = None          # flat part of the width
    D: float | None = None               # outside diameter
    t_nominal: float | None = None       # wall by which a hollow section is ordered
    t_design: float | None = None        # 0.93 t_nominal, rounded; the tabulated properties go with it
    leg_long: float | None = None
    leg_short: float | None = None
    b: float | None = None               # outstanding legs of double angles
    t: float | None = None               # thickness of angles
    x: float | None = None
    y: float | None = None
    x_p: float | None = None             # plastic neutral axis, from where x and y are measured
    y_p: float | None = None
    e_o: float | None = None             # from the middle of a channel's web to the shear centre
    r_x: float | None = None
    r_y: float | None = None
    r_z: float | None = None             # least radius of an angle; of double angles, that of one angle
    Z_x: float | None = None             # [in**3]
    Z_y: float | None = None             # [in**3]
    tan_alpha: float | None = None       # between the y-axis and the z-axis of an angle
    parent: str | None = None            # the shape a tee is cut from; the angle of a double angle
    parent_depth: float | None = None    # depth of the shape a tee is cut from
    backs: str | None = None             # which legs lie back to back: equal legs, long legs, short legs
    s: float | None = None               # separation of the backs of double angles
    doubt: str = ""                      # why the tabulated area calls for care; blank for nearly all

    @property
    def is_hollow(self):
        """Whether the section is closed: HSS or pipe."""
        return self.family in HOLLOW

    @property
    def is_open(self):
        """Whether the lower bound on U of AISC 360-22 D3 may be used: open sections only."""
        return not self.is_hollow

    def wall(self, standard):
        """Return the wall thickness [in] for design if the section is made to one of WALLS.

        Source: AISC 360-22 and 360-16 B4.2.

        >>> shape("HSS6x6x3/8").wall("A500"), shape("HSS6x6x3/8").wall("A1085")
        (0.349, 0.375)
        """
        if not self.is_hollow:
            raise TableError(f"{self.name} has no wall; only HSS and pipe have a design wall thickness.")
        if standard not in WALLS:
            raise TableError(f'standard: "{standard}" has no design wall here; there are {", ".join(WALLS)} '
                             "(AISC 360 B4.2).")
        return self.t_nominal if WALLS[standard] == 1 else self.t_design

    def gross_area(self, standard):
        """Return the gross area [in**2]; refuse a hollow section whose `standard`, one of WALLS, has the full wall."""
        if self.is_hollow and self.wall(standard) == self.t_nominal:
            raise TableError(f"{self.name} to {standard} is designed with its full wall of {self.t_nominal:g} in "
                             f"(AISC 360 B4.2), but the table's area of {self.A:g} in2 goes with {self.t_design:g} in. "
                             "Take the area from the producer's table and enter it.")
        return self.A


def family(name):
    """Return which of FAMILIES a designation belongs to.

    >>> family("HSS6x4x3/8"), family("HSS6.000x0.500"), family("Pipe4STD")
    ('HSS rectangular', 'HSS round', 'PIPE')
    """
    prefix = _PREFIX.match(name)[0].upper()
    if prefix != "HSS":
        return prefix
    height, width, *wall = name[3:].split("x")
    return "HSS round" if not wall else "HSS square" if height == width else "HSS rectangular"


@cache
def _lines():
    """Return the header and the cells of each shape by its designation, in the order of FAMILIES."""
    found = {}
    for file in _FILES:
        header, *lines = csv.reader((files("calclib.tables") / f"{file}.csv").read_text(encoding="utf-8").splitlines(),
                                    strict=True)
        found.update((line[0], (header, line)) for line in lines)
    order = {name: place for place, name in enumerate(FAMILIES)}
    return {name: found[name] for name in sorted(found, key=lambda name: order[family(name)])}


@cache
def _shape(name):
    """Return the Shape of a designation spelled as in the table."""
    header, line = _lines()[name]
    row = {column: text if column in _TEXT else _float(text)
           for column, text in zip(header, line, strict=True) if text}
    kind = family(name)
    if kind == "2L":
        angle = _shape(row["parent"])
        row.update(x=angle.y if row["backs"] == "short legs" else angle.x, leg_long=angle.leg_long,
                   leg_short=angle.leg_short, r_z=angle.r_z)
    elif kind in ("WT", "MT", "ST"):
        row["parent_depth"] = _shape(row["parent"]).d
    elif kind in ("HSS round", "PIPE"):
        row.update(r_y=row["r_x"], Z_y=row["Z_x"], doubt=_doubts().get(name, ""))
        if kind == "HSS round":
            # The table prints three digits, 12.8 for 12.750.
            row["D"] = float(name[3:].split("x")[0])
    return Shape(family=kind, **row)


@cache
def _doubts():
    return {row["name"]: f"the tabulated area is {row['printed']['A']} in2, but diameter and design wall give "
                         f"{row['printed']['A_from_dimensions']} in2" for row in table("shapes_doubtful").rows}


@cache                               # the same few thousand texts come again and again
def _float(text):
    return float(sum(map(Fraction, text.split("-")))) if "/" in text else float(text)


def shapes(family_name=None):
    """Return the Shapes of one of FAMILIES, or all of them.

    >>> len(shapes()), shapes("HP")[-1].name
    (2299, 'HP8x36')
    """
    if family_name not in (None, *FAMILIES):
        raise TableError(f'there is no family of shapes "{family_name}"; there are {", ".join(FAMILIES)}.')
    return tuple(_shape(name) for name in names() if family_name in (None, family(name)))


@cache
def names():
    """Return the designations of all shapes, for a search while typing."""
    return tuple(_lines())


def shape(name):
    """Return the Shape with this designation, typed as in the trade, in large or small letters.

    >>> shape("wt8x25").parent, shape("WT8X25").parent_depth
    ('W16x50', 16.3)
    >>> shape("HSS 6 x 0.500").name
    'HSS6.000x0.500'
    """
    if name in _lines():
        return _shape(name)
    if spelled := _by_capitals().get(name.upper()):
        return _shape(spelled)
    key = _key(name)
    if key in _by_key():
        return _shape(_by_key()[key])
    raise TableError(f'shape: "{name}" is not in the {SOURCE}; the nearest are {", ".join(_nearest(name, key))}.')


@cache
def _by_capitals():
    return {name.upper(): name for name in names()}


@cache
def _by_key():
    return {_key(name): name for name in names()}


def _key(name):
    """Return (prefix, sizes, suffix) of a designation with its sizes as exact numbers, or None if it cannot be read."""
    text = re.sub(r"(?<=\d)[ -]+(?=\d+/)", "-", name.strip().upper())
    text = re.sub(r"\s+", "", text).replace("×", "X")  # noqa: RUF001  the multiplication sign is meant
    if pipe := _PIPE.fullmatch(text):
        sizes, prefix, suffix = (pipe[1],), "PIPE", pipe[2]
    elif bar := _NAME.fullmatch(text):
        prefix, sizes, suffix = bar[1], bar[2].split("X"), bar[3] or ""
    else:
        return None
    try:
        return prefix, tuple(_exact(size) for size in sizes), suffix
    except ZeroDivisionError:
        return None


def _exact(size):
    whole, _, rest = size.rpartition("-")
    value = Fraction(rest)
    # "21/2" is no size: it may be meant as 2-1/2.
    return value + int(whole or 0) if value < 1 or "/" not in rest else None


def _nearest(typed, key):
    """Return the three designations nearest in size, or in spelling where no size can be read."""
    if key and None not in key[1]:
        prefix, sizes, suffix = key
        alike = [(sum(abs(float(a - b)) / float(max(a, b, 1)) for a, b in zip(sizes, other[1], strict=True)),
                  other[2] != suffix, name)
                 for other, name in _by_key().items() if other[0] == prefix and len(other[1]) == len(sizes)]
        if alike:
            return [name for *_, name in sorted(alike)[:3]]
    spelled = _by_capitals()
    begin = [name for upper, name in spelled.items() if upper.startswith(typed.strip().upper() + "X")]
    return begin[:3] or [spelled[close] for close in get_close_matches(typed.upper()[:40], list(spelled), 3, 0)]
