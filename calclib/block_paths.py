"""Block shear: every block that the fasteners can tear out of a plate or of the connected part of a section.

The force acts along x. The block leaves toward small x: for a member that is its free end; for a gusset, whose
coordinates then run the other way, it is the side where the member comes in. Gage lines run along x, counted from 1 in
the order of y; the "lower" edge is at small y, the "upper" one at large y. Lengths are plain numbers, in or mm.

**Blocks.** Gage lines and edges divide the width into strips. A block path says which strips tear in tension, square to
the force, at the innermost fastener of each line. A line with torn strips on both sides loses its whole hole there; a
line with one torn strip is a shear line from its innermost hole to the end of the plate; a line with none would be left
behind, so every line borders a torn strip and every fastener is in a block. That gives the U between the outer lines,
the L to either edge, the blocks to both edges, and for more lines all their mixtures. A shear line of n fasteners loses
n - 1/2 holes, a tension line half a hole at each end that is a shear line. Source: AISC 360-22 and 360-16 J4.3 with
B4.3b; that half holes stand at the corners is common practice.

**Attached parts.** The stem of a tee, the outstanding leg of an angle or the flange of a web either tears across
together with the strip it stands on, or shears off along its root. Where all strips tear, only the latter is a block;
the other is the net section. Source: common practice.

**Staggered ends.** Where the innermost fasteners of neighbouring lines do not lie level, s**2/4g is not counted, since
J4.3 does not speak of it; the path says so. Whether the tension is uniform (U_bs) is not decided here.
"""

import math
from dataclasses import dataclass
from itertools import pairwise, product

from calclib.errors import CalcError
from calclib.holes import SAME, check_holes, name
from calclib.outline import Outline, strip

__all__ = ["Attached", "BlockPath", "Cut", "Outline", "block_paths", "strip", "weld_block"]

MOST_LINES = 12     # the paths grow as the Fibonacci numbers; no connection has more gage lines


@dataclass(frozen=True)
class Attached:
    """A part that stands on the plate along the force: stem, outstanding leg, flange.

    y : where its middle meets the plate [in or mm]
    thickness : of the part at its root [in or mm]
    area : gross area of the part beyond the plate, fillets included [in2 or mm2]
    torn_off : area that leaves with it when it shears off [in2 or mm2]; less than `area` where the fillets stay; None:
        all of it
    """
    name: str
    y: float
    thickness: float
    area: float
    torn_off: float | None = None


@dataclass(frozen=True)
class Cut:
    """One straight cut of a block path.

    kind : "shear" or "tension"
    part : "plate", or the name of the attached part that is cut
    points : the line to draw
    gross, net : length before and after the holes [in or mm]
    holes : (index, part of the hole that is deducted)
    thickness : [in or mm]
    """
    kind: str
    part: str
    points: tuple
    gross: float
    net: float
    holes: tuple
    thickness: float


@dataclass(frozen=True)
class BlockPath:
    """One block path.

    name : in words
    blocks : (from, to) of each run of torn strips; 0 is the lower edge, 1, 2, ... the gage lines, the last number the
        upper edge
    sheared_off : names of the attached parts that shear off along their roots
    cuts : each `Cut`
    staggered : whether s**2/4g was left out
    """
    name: str
    blocks: tuple
    sheared_off: tuple
    cuts: tuple
    staggered: bool

    def _area(self, kind, length):
        return math.fsum(getattr(cut, length) * cut.thickness for cut in self.cuts if cut.kind == kind)

    @property
    def gross_shear_area(self):
        """A_gv [in2 or mm2]."""
        return self._area("shear", "gross")

    @property
    def net_shear_area(self):
        """A_nv [in2 or mm2]."""
        return self._area("shear", "net")

    @property
    def net_tension_area(self):
        """A_nt [in2 or mm2]."""
        return self._area("tension", "net")


def block_paths(outline, thickness, holes, attached=()):
    """Return every block path of the fasteners in `holes`, as a tuple of `BlockPath`.

    Parameters
    ----------
    outline : the plate, an `Outline`; `strip(width, length)` makes that of a member
    thickness : of the plate [in or mm]; 1 gives lengths in place of areas
    holes : each a `Hole`; one without a fastener is deducted where a cut runs over it
    attached : each an `Attached`

    Errors: a hole that overlaps another, breaks an edge or strays from its gage line; a net length below zero; a plate
    held where its block would leave.

    >>> from calclib.holes import Hole
    >>> row = [Hole(x=x, y=3.75, width=15/16, allowance=1/16) for x in (2, 5, 8)]
    >>> [(path.name, path.gross_shear_area, path.net_shear_area, path.net_tension_area)
    ...  for path in block_paths(strip(width=6, length=12), 0.5, row)]
    [('line 1 to the lower edge', 4.0, 2.75, 1.625), ('line 1 to the upper edge', 4.0, 2.75, 0.875)]
    """
    _positive("thickness of the plate", thickness)
    check_holes(holes)
    outline.check_inside(holes)
    lines = _gage_lines(holes)
    count = len(lines)
    shear = [_shear_cut(outline, thickness, holes, line) for line in lines]
    torn = [_tension_cut(outline, thickness, holes, lines, i) for i in range(count + 1)]
    staggered = [0 < i < count and not _level(holes, lines[i - 1][0], lines[i][0]) for i in range(count + 1)]
    parts = [[] for _ in torn]
    if len({part.name for part in attached}) < len(attached):
        raise CalcError("two attached parts have the same name: "
                        f"{', '.join(part.name for part in attached)}; give each its own.")
    for part in attached:
        i, cuts = _attached_cuts(outline, holes, lines, torn, part)
        parts[i].append(cuts)

    paths = []
    for chosen in product((False, True), repeat=count + 1):
        strips = [i for i in range(count + 1) if chosen[i]]
        if any(torn[i] is None for i in strips) or not all(a or b for a, b in pairwise(chosen)):
            continue
        edges = [shear[i] for i in range(count) if chosen[i] != chosen[i + 1]]
        for extra in product(*(cuts for i in strips for cuts in parts[i])):
            cuts = (*edges, *(torn[i] for i in strips), *(cut for choice in extra for cut in choice))
            if any(cut.kind == "shear" for cut in cuts):
                paths.append(_path(strips, count, cuts, attached, any(staggered[i] for i in strips)))
    if not paths:
        raise CalcError("no block can tear out: both sides of the single gage line are held.")
    return tuple(sorted(paths, key=lambda path: (len(path.blocks), path.blocks, path.sheared_off)))


def weld_block(y_1, l_1, y_2, l_2, thickness):
    """Return the block within two longitudinal welds: shear along each, tension across between their inner ends.

    Parameters
    ----------
    y_1, y_2 : where the welds lie across the force [in or mm], y_1 below y_2
    l_1, l_2 : lengths of the welds [in or mm], positive; both start at x = 0
    thickness : of the plate [in or mm]

    Without holes the gross and net areas are the same. Source: AISC 360-22 Commentary J4.3, which asks for block shear
    around the periphery of welded connections.

    >>> path = weld_block(y_1=0, l_1=8, y_2=4, l_2=8, thickness=0.5)
    >>> path.gross_shear_area, path.net_shear_area, path.net_tension_area
    (8.0, 8.0, 2.0)
    """
    for what, value in (("length of weld 1", l_1), ("length of weld 2", l_2), ("distance between the welds", y_2 - y_1),
                        ("thickness of the plate", thickness)):
        _positive(what, value)
    cuts = (Cut("shear", "plate", ((0.0, y_1), (l_1, y_1)), l_1, l_1, (), thickness),
            Cut("shear", "plate", ((0.0, y_2), (l_2, y_2)), l_2, l_2, (), thickness),
            Cut("tension", "plate", ((l_1, y_1), (l_2, y_2)), y_2 - y_1, y_2 - y_1, (), thickness))
    return BlockPath("within the welds", ((1, 2),), (), cuts, not math.isclose(l_1, l_2, rel_tol=SAME))


def _positive(what, value):
    if not (math.isfinite(value) and value > 0):
        raise CalcError(f"the {what} is {value:g}; it must be a positive number.")


def _level(holes, i, j):
    return math.isclose(holes[i].x, holes[j].x, rel_tol=SAME, abs_tol=SAME * holes[i].width)


def _gage_lines(holes):
    """Return the fasteners of each gage line, in the order of y, each line from its innermost fastener outward."""
    lines, before = [], None
    for i in sorted((i for i, hole in enumerate(holes) if hole.fastener), key=lambda i: (holes[i].y, holes[i].x)):
        hole = holes[i]
        if before and hole.y - before.y <= min(hole.width, before.width) / 2:
            lines[-1].append(i)
        else:
            lines.append([i])
        before = hole
    if not lines:
        raise CalcError("block shear needs at least one hole with a fastener.")
    if len(lines) > MOST_LINES:
        raise CalcError(f"the fasteners lie on {len(lines)} gage lines; up to {MOST_LINES} are covered.")
    for line in lines:
        line.sort(key=lambda i: -holes[i].x)
        for i in line[1:]:
            off = abs(holes[i].y - holes[line[0]].y)
            if off > holes[i].width / 2:
                raise CalcError(f"{name(i, holes[i])} strays by {off:g}, more than half its width, from the gage line "
                                f"of {name(line[0], holes[line[0]])}; block shear is covered for fasteners in lines "
                                "along the force.")
    return lines


def _cut(kind, thickness, points, gross, deducted, holes, where):
    """Return a cut of the plate; `deducted` holds (index, part of the hole)."""
    sizes = [holes[i].shear_deduction if kind == "shear" else holes[i].deduction for i, _ in deducted]
    net = math.fsum([gross, *(-part * size for (_, part), size in zip(deducted, sizes, strict=True))])
    if net <= SAME * gross:
        raise CalcError(f"the {kind} line {where} has no net length: {gross:g} less {gross - net:g} for holes is "
                        f"{0.0 if abs(net) <= SAME * gross else net:g}.")
    return Cut(kind, "plate", points, gross, net, tuple(deducted), thickness)


def _shear_cut(outline, thickness, holes, line):
    """Return the shear cut from the innermost fastener of a line to the end of the plate."""
    innermost = holes[line[0]]
    end, edge = outline.ray(innermost.x, innermost.y, "x", -1)
    where = f"from {name(line[0], innermost)} to the end at x = {end:g}"
    if edge in outline.held:
        raise CalcError(f"the shear line {where} meets an edge that is held; no block can leave there.")
    behind = [i for i in line if holes[i].x < end]
    if behind:
        raise CalcError(f"the shear line {where} leaves the plate before it reaches {name(behind[0], holes[behind[0]])}"
                        "; block shear is covered for plates without a gap in the line.")
    deducted = [(line[0], 0.5)]
    for i, hole in enumerate(holes):
        over = abs(hole.y - innermost.y) < hole.width / 2 and end < hole.x < innermost.x + hole.along / 2
        if i != line[0] and (i in line or over):
            deducted.append((i, 1.0))
    points = (innermost.x, innermost.y), (end, innermost.y)
    return _cut("shear", thickness, points, innermost.x - end, deducted, holes, where)


def _tension_cut(outline, thickness, holes, lines, i):
    """Return the tension cut of strip `i`, between gage lines i and i + 1 or to an edge; None where that is held."""
    ends = [lines[k][0] for k in (i - 1, i) if 0 <= k < len(lines)]
    points = [(holes[k].x, holes[k].y) for k in ends]
    if len(ends) == 1:
        x, y = points[0]
        reach, edge = outline.ray(x, y, "y", -1 if i == 0 else 1)
        if edge in outline.held:
            return None
        points.insert(0 if i == 0 else 1, (x, reach))
        where = f"from {name(ends[0], holes[ends[0]])} to the edge at y = {reach:g}"
    else:
        where = f"from {name(ends[0], holes[ends[0]])} to {name(ends[1], holes[ends[1]])}"
        if outline.crossed_by(*points):
            raise CalcError(f"the tension line {where} leaves the plate; block shear is covered for plates without a "
                            "gap in the line.")
    (x_1, y_1), (x_2, y_2) = points
    slope = (x_2 - x_1) / (y_2 - y_1)
    deducted = [(k, 0.5) for k in ends]
    for k, hole in enumerate(holes):
        off = hole.x - x_1 - slope * (hole.y - y_1)
        over = y_1 < hole.y < y_2 and off**2 < (hole.along / 2) ** 2 + (slope * hole.width / 2) ** 2
        if k not in ends and over:
            deducted.append((k, 1.0))
    return _cut("tension", thickness, tuple(points), y_2 - y_1, deducted, holes, where)


def _attached_cuts(outline, holes, lines, torn, part):
    """Return the strip that an attached part stands on, and its two ways to be cut: torn across, or sheared off."""
    for what, value in (("thickness", part.thickness), ("area", part.area)):
        _positive(f"{what} of the {part.name}", value)
    torn_off = part.area if part.torn_off is None else part.torn_off
    if not 0 < torn_off <= part.area:
        raise CalcError(f"the area of the {part.name} that shears off is {torn_off:g}; it must lie above 0 and not "
                        f"above its whole area of {part.area:g}.")
    for k, hole in enumerate(holes):
        clear = abs(hole.y - part.y) - (hole.width + part.thickness) / 2
        if clear < 0:
            raise CalcError(f"{name(k, hole)} cuts into the {part.name} at y = {part.y:g}: the clear distance is "
                            f"{clear:g}.")
    i = sum(holes[line[0]].y < part.y for line in lines)
    if torn[i] is None:
        raise CalcError(f"the {part.name} at y = {part.y:g} stands beside an edge that is held.")
    (x_1, y_1), (x_2, y_2) = torn[i].points
    if not y_1 - SAME * abs(y_2 - y_1) <= part.y <= y_2 + SAME * abs(y_2 - y_1):
        raise CalcError(f"the {part.name} at y = {part.y:g} does not stand on the plate, which there reaches from "
                        f"y = {y_1:g} to {y_2:g}.")
    inside = min(max(part.y, y_1 + SAME * (y_2 - y_1)), y_2 - SAME * (y_2 - y_1))
    x = x_1 + (x_2 - x_1) * (inside - y_1) / (y_2 - y_1)
    end, edge = outline.ray(x, inside, "x", -1)
    if edge in outline.held:
        raise CalcError(f"the root of the {part.name} at y = {part.y:g} ends at an edge that is held.")

    def tension(area):
        return Cut("tension", part.name, ((x, part.y),), area / part.thickness, area / part.thickness, (),
                   part.thickness)

    root = Cut("shear", part.name, ((x, part.y), (end, part.y)), x - end, x - end, (), part.thickness)
    stays = (tension(part.area - torn_off),) if torn_off < part.area else ()
    return i, ((tension(part.area),), (root, *stays))


def _path(strips, count, cuts, attached, staggered):
    """Return the path in which `strips` tear, with its name in words."""
    runs = []
    for i in strips:
        if runs and runs[-1][1] == i:
            runs[-1][1] = i + 1
        else:
            runs.append([i, i + 1])
    words = []
    for low, high in runs:
        if low == 0 and high == count + 1:
            words.append("whole width")
        elif low == 0:
            words.append(f"line {high} to the lower edge")
        elif high == count + 1:
            words.append(f"line {low} to the upper edge")
        else:
            words.append(f"lines {low} to {high}")
    sheared = {cut.part for cut in cuts if cut.kind == "shear"}
    torn = {cut.part for cut in cuts if cut.kind == "tension"} - sheared
    off = tuple(part.name for part in attached if part.name in sheared)
    across = [part.name for part in attached if part.name in torn]
    text = " and ".join(words)
    text += "".join(f", {part} torn across" for part in across) + "".join(f", {part} sheared off" for part in off)
    return BlockPath(text, tuple(map(tuple, runs)), off, cuts, staggered)
