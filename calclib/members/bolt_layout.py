"""Where the bolts are: by rows and gage lines, or by coordinates; the holes in member and gusset that follow.

Member: x from its end along the force, y across the strip of the connected element. Gusset: x from the edge where the
member comes in, y from its lower edge. Both have their body at large x, as `calclib.paths` wants it.
"""

from dataclasses import dataclass

from calclib import units
from calclib.equations.aisc360.members import HOLE_ALLOWANCE
from calclib.errors import EntryError
from calclib.holes import Hole
from calclib.members.fields import Field
from calclib.members.gusset import gusset_edges
from calclib.tables import TableError, fasteners

STANDARD, OVERSIZE, SHORT_SLOT, LONG_SLOT = fasteners.HOLE_KINDS
ACROSS, ALONG = "across the force", "along the force"
IN_MEMBER, IN_GUSSET, IN_BOTH = "member", "gusset", "member and gusset"
MOST_BOLTS = 120

LAYOUT = (
    Field("rows", "Bolts in a line", "Bolt layout", "Number of bolts in each line along the force.", "n_r",
          units.NUMBER, optional=True, least=1),
    Field("lines", "Bolt lines", "Bolt layout", "Number of bolt lines along the force, in one connected element.",
          "n_l", units.NUMBER, default="1", least=1),
    Field("pitch", "Pitch", "Bolt layout", "Spacing of the bolts in a line, along the force.", "s", units.LENGTH,
          optional=True, above=0),
    Field("gage", "Gage", "Bolt layout", "Spacing of the bolt lines across the force; blank for two lines in a flange: "
          "the workable gage of the table.", "g", units.LENGTH, optional=True, above=0),
    Field("gages", "Unequal gages", "Bolt layout",
          'Spacings of the lines one after the other where they differ, such as "3 in, 4 in, 3 in".', optional=True),
    Field("stagger", "Stagger", "Bolt layout", "How far every second line is moved along the force, away from the end.",
          "s_0", units.LENGTH, default={units.US: "0 in", units.SI: "0 mm"}, least=0),
    Field("end_distance", "End distance", "Bolt layout", "From the end of the member to the first bolts.", "L_e",
          units.LENGTH, optional=True, above=0),
    Field("first_line", "First line", "Bolt layout", "From the lower edge, the back of the angle, or the outer face of "
          "the flange beside a web or stem, to the first line; blank: lines centred on the element.", "g_1",
          units.LENGTH, optional=True, above=0),
    Field("bolt_places", "Bolt places", "Bolt layout", "In place of rows and lines, each bolt by its distance from the "
          'end of the member and across the force, such as "2 in, 1.5 in; 5 in, 1.5 in".', optional=True),
    Field("open_holes", "Holes without bolt", "Bolt layout", "Extra or misplaced holes in the member, each by its "
          "distance from the end of the member and across the force, as for bolt places.", optional=True),
    Field("gusset_end", "Gusset end distance", "Bolt layout",
          "From the edge of the gusset where the member comes in to the nearest bolts.", "L_eg", units.LENGTH, above=0),
    Field("hole_kind", "Holes", "Bolt holes", "Kind of the bolt holes by Table J3.3.", choices=fasteners.HOLE_KINDS,
          default=STANDARD),
    Field("slot_direction", "Long axis of slots", "Bolt holes", "Direction of slots, if any.", choices=(ACROSS, ALONG),
          default=ACROSS),
    Field("hole_ply", "Such holes in", "Bolt holes", "Where holes are not standard, in which parts; the others have "
          "standard holes.", choices=(IN_GUSSET, IN_MEMBER, IN_BOTH), default=IN_GUSSET),
    Field("hole_diameter", "Hole width as made", "Bolt holes", "Diameter of the holes, or width of the slots across "
          "the force, in member and gusset; blank: by Table J3.3.", "d_h", units.LENGTH, optional=True, above=0),
)


@dataclass(frozen=True)
class Layout:
    """Bolts and holes of one bolt pattern.

    bolts : (x, y) of each bolt on the strip of the member
    member : each `Hole` of the member, the bolts first and then the open ones
    gusset : each `Hole` of the gusset, in the order of the bolts
    lines : indices of the bolts of each line, along x
    member_kind, gusset_kind : kind of the holes
    """
    bolts: tuple
    member: tuple
    gusset: tuple
    lines: tuple
    member_kind: str
    gusset_kind: str

    @property
    def length(self):
        """Length of the connection: out to out of lines with equal bolts, or the line with the most bolts."""
        if self.equal_lines:
            return max(x for x, _ in self.bolts) - min(x for x, _ in self.bolts)
        longest = max(self.lines, key=len)
        return self.bolts[longest[-1]][0] - self.bolts[longest[0]][0]

    @property
    def equal_lines(self):
        return len({len(line) for line in self.lines}) == 1

    @property
    def fewest(self):
        """Bolts in the shortest line."""
        return min(len(line) for line in self.lines)

    @property
    def width(self):
        """Distance between the outer lines."""
        return max(y for _, y in self.bolts) - min(y for _, y in self.bolts)

    @property
    def reach(self):
        """Distance along the force from the first bolt to the last."""
        return max(x for x, _ in self.bolts) - min(x for x, _ in self.bolts)


def standard_hole(x):
    """Return the width of the hole of the table for the kind chosen [in or mm], the present value of the sweep."""
    return fasteners.hole(x.bolt_diameter, x.hole_kind, x.standard[-2:], x.units).width


def lay_out(x, run, section):
    """Return the Layout; refuse what cannot be laid out."""
    if x.bolt_places is not None:
        for name in ("rows", "pitch", "gage", "gages", "end_distance", "first_line"):
            if getattr(x, name) is not None:
                raise EntryError(name, "is given and the bolts are given by their places; leave one of them blank")
        bolts = _places(x, "bolt_places", section)
        run.note("The bolts are placed by coordinates: x from the end of the member, y from "
                 f"{section.origin}.")
    else:
        bolts = _pattern(x, run, section)
    member_kind = x.hole_kind if x.hole_ply in (IN_MEMBER, IN_BOTH) else STANDARD
    gusset_kind = x.hole_kind if x.hole_ply in (IN_GUSSET, IN_BOTH) else STANDARD
    allowance = HOLE_ALLOWANCE[x.units]
    width, length = _size(x, run, member_kind)
    member = [Hole(at, y, width, allowance, length, True, section.t) for at, y in bolts]
    if x.open_holes is not None:
        open_holes = _places(x, "open_holes", section)
        member += [Hole(at, y, width, allowance, length, False, section.t) for at, y in open_holes]
        run.caution(f"{len(open_holes)} hole{'s' if len(open_holes) > 1 else ''} without bolt in the member: deducted "
                    "from every chain as a bolted hole is.", "B4.3b")
    last, low = max(at for at, _ in bolts), min(y for _, y in bolts)
    e_1, _ = gusset_edges(x, max(y for _, y in bolts) - low)
    width, length = _size(x, run, gusset_kind)
    gusset = [Hole(x.gusset_end + last - at, e_1 + y - low, width, allowance, length, True, x.gusset_thickness)
              for at, y in bolts]
    return Layout(tuple(bolts), tuple(member), tuple(gusset), _lines(bolts, width), member_kind, gusset_kind)


def _size(x, run, kind):
    """Return (width across, length along the force) of the holes of one kind; length None for round holes."""
    try:
        size = fasteners.hole(x.bolt_diameter, kind, run.edition, run.units)
    except TableError as error:
        raise EntryError("bolt_diameter", str(error)) from error
    width = size.width if x.hole_diameter is None else x.hole_diameter
    if width < x.bolt_diameter * (1 - 1e-9):
        raise EntryError("hole_diameter", f"{units.text(width, units.LENGTH, x.units)} is smaller than the bolt of "
                                          f"{units.text(x.bolt_diameter, units.LENGTH, x.units)}; enlarge the hole or "
                                          "use a smaller bolt")
    if size.length is None:
        return width, None
    return (width, size.length) if x.slot_direction == ALONG else (size.length, width)


def _whole(x, name):
    value = getattr(x, name)
    if value != round(value):
        raise EntryError(name, f"{value:g} is not a whole number; give the number of bolts or lines")
    return round(value)


def _pattern(x, run, section):
    for name, words in (("rows", "the number of bolts in a line, or the places of the bolts"),
                        ("end_distance", "the distance from the end of the member to the first bolts")):
        if getattr(x, name) is None:
            raise EntryError(name, f"is empty; give {words}")
    rows, lines = _whole(x, "rows"), _whole(x, "lines")
    if rows * lines > MOST_BOLTS:
        raise EntryError("rows", f"{rows} bolts in {lines} lines are more than the {MOST_BOLTS} bolts covered here; "
                                 "check the entry")
    if rows > 1 and x.pitch is None:
        raise EntryError("pitch", f"is empty and there are {rows} bolts in a line; give their spacing")
    gages = _gages(x, run, section, lines)
    if x.first_line is not None:
        first = x.first_line - section.offset
    elif section.is_symmetric:
        first = (section.width - sum(gages)) / 2
    else:
        raise EntryError("first_line", f"is empty; give the distance from {section.origin} to the first line of bolts")
    ys = [first]
    for gage in gages:
        ys.append(ys[-1] + gage)
    return [(x.end_distance + i * (x.pitch or 0.0) + (x.stagger if j % 2 else 0.0), y)
            for j, y in enumerate(ys) for i in range(rows)]


def _gages(x, run, section, lines):
    if x.gages is not None:
        if x.gage is not None:
            raise EntryError("gages", "is given beside one gage; give one of the two")
        gages = [units.read(text.strip(), units.LENGTH, x.units, "gages") for text in x.gages.split(",")]
        if len(gages) != lines - 1 or min(gages) <= 0:
            raise EntryError("gages", f"{len(gages)} gages do not go with {lines} bolt lines; give {lines - 1}, each "
                                      "above 0")
        return gages
    if lines == 1:
        return []
    if x.gage is not None:
        return [x.gage] * (lines - 1)
    if lines == 2 and section.shape is not None and section.shape.gage and section.attached and \
            section.way in ("both flanges", "flange"):
        gage = section.shape.gage * section.k
        run.assume(f"Gage: {units.text(gage, units.LENGTH, x.units)}, the workable gage of the table of shapes.")
        return [gage]
    raise EntryError("gage", f"is empty and there are {lines} bolt lines; give their spacing")


def _places(x, name, section):
    """Return the (x, y) that a text of places states, y on the strip."""
    found = []
    for pair in getattr(x, name).split(";"):
        if not pair.strip():
            continue
        parts = pair.split(",")
        if len(parts) != 2:
            raise EntryError(name, f'"{pair.strip()}" is not a place; write distance from the end, distance across, '
                                   'such as "2 in, 1.5 in", and a semicolon between places')
        along, across = (units.read(part.strip(), units.LENGTH, x.units, name) for part in parts)
        if along <= 0:
            raise EntryError(name, f'"{pair.strip()}" lies beyond the end of the member; give a distance above 0')
        found.append((along, across - section.offset))
    if not found or len(found) > MOST_BOLTS:
        raise EntryError(name, f"states {len(found)} places; give 1 to {MOST_BOLTS}")
    return found


def _lines(bolts, width):
    """Return the indices of each line along the force, from the end of the member inward."""
    lines, before = [], None
    for i in sorted(range(len(bolts)), key=lambda i: (bolts[i][1], bolts[i][0])):
        if before is not None and bolts[i][1] - before <= width / 2:
            lines[-1].append(i)
        else:
            lines.append([i])
        before = bolts[i][1]
    return tuple(tuple(sorted(line, key=lambda i: bolts[i][0])) for line in lines)


def clear_distances(holes, bolts):
    """Return, for each of the first `bolts` holes, (distance to the end or next hole, whether the end) along x."""
    found = []
    for hole in holes[:bolts]:
        ahead = [other.x for other in holes
                 if other.x < hole.x and abs(other.y - hole.y) < hole.width * (1 - 1e-9)]
        found.append((hole.x - max(ahead), False) if ahead else (hole.x, True))
    return found
