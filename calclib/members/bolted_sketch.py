"""Drawing of a bolted member on its gusset: the connected element to scale, with chain and block, and the section."""

from itertools import pairwise
from math import pi, tan

from calclib import units
from calclib.block_paths import block_paths, strip
from calclib.drawing import (
    Arrow,
    BreakLine,
    Circle,
    Dimension,
    Drawing,
    FailurePath,
    Leader,
    Named,
    Outline,
    Text,
)
from calclib.members.bolt_layout import lay_out
from calclib.members.bolted_profile import section_view
from calclib.members.bolted_section import FLAT, WEB, section_block
from calclib.members.gusset import SPREAD_45, gusset_edges
from calclib.paths import chains


def sketch(x, calc):
    """Return the connected element on its gusset; the member pulls to the right."""
    run = type(calc.run)(x, silent=True)
    section = section_block(x, run)
    layout = lay_out(x, run, section)

    def named(symbol, value):
        return Named(symbol, units.text(value, units.LENGTH, x.units))

    first, last = min(a for a, _ in layout.bolts), max(a for a, _ in layout.bolts)
    w = section.width
    base, top = -section.offset, w + (section.offset if section.way == WEB else 0.0)     # of the member
    low = min(y for _, y in layout.bolts) - gusset_edges(x, layout.width)[0]
    high = low + x.gusset_width
    edge = last + x.gusset_end                       # of the gusset, toward the member
    right, left = edge + max(0.8 * w, 0.25 * edge), -max(0.35 * edge, 0.3 * w)
    parts = [
        Outline([(edge, low), (left, low), (left, high), (edge, high)], closed=False),
        BreakLine((left, low), (left, high)),
        *_gusset_edge(edge, low, high, base, top),
        Outline([(right, top), (0, top), (0, base), (right, base)], closed=False),
        BreakLine((right, base), (right, top)), *_lengthwise(section, right),
        *_spread(x, layout, low, high),
    ]
    for hole in layout.member:
        parts.append(Circle((hole.x, hole.y), min(hole.width, hole.along), cross=True,
                            weight="object" if hole.fastener else "hidden"))
    parts += _paths(x, section, layout)
    force = Named(calc.run.required_symbol.replace("{", "").replace("}", ""),
                  units.text(calc.run.required, units.FORCE, x.units))
    parts += [Arrow((right, w / 2), (2.2, 0)), Text((right, w / 2), force, (2.5, 0.9))]
    parts += _dimensions(x, section, layout, named, first, last, edge, (low, high), (base, top))
    parts += section_view(x, calc, section, right + 0.62 * (right - left))
    return Drawing(parts, title=_title(section), unit="in" if x.units == "US" else "mm", note=_note(section, layout))


def _title(section):
    return "Plate on gusset" if section.way == FLAT else f"{section.shape.name}, {section.way}, on gusset"


def _note(section, layout):
    same = {2: "both flanges alike", 1: ""}[section.patterns] if section.patterns > 1 else \
        "both angles alike, the gusset between them" if section.plies > 1 else ""
    open_holes = len(layout.member) - len(layout.bolts)
    more = f"{open_holes} hole{'s' if open_holes > 1 else ''} without bolt broken" if open_holes else ""
    text = "; ".join(filter(None, (same, more)))
    return text[:1].upper() + text[1:]


def _lengthwise(section, right):
    """Return the edges of what stands on the element: faces of the flanges beside a web, else a stem or leg behind."""
    if section.offset:
        return [Outline([(0, part.y), (right, part.y)], closed=False) for part in section.attached]
    return [Outline([(0, y), (right, y)], closed=False, weight="hidden") for part in section.attached
            for y in (part.y - part.thickness / 2, part.y + part.thickness / 2) if 0 < y < section.width]


def _gusset_edge(edge, low, high, base, top):
    """Return the edge of the gusset where the member comes in, hidden behind the member."""
    shown = [Outline([(edge, max(low, base)), (edge, min(high, top))], closed=False, weight="hidden")]
    if low < base:
        shown.append(Outline([(edge, low), (edge, base)], closed=False))
    if high > top:
        shown.append(Outline([(edge, top), (edge, high)], closed=False))
    return shown


def _spread(x, layout, low, high):
    """Return the lines at which the force spreads in the gusset, and its width at the last bolts."""
    reach = layout.reach
    if not reach:
        return []
    first, last = min(a for a, _ in layout.bolts), max(a for a, _ in layout.bolts)
    y_1, y_2 = min(y for _, y in layout.bolts), max(y for _, y in layout.bolts)
    out = reach * tan(pi / 4 if x.spread_angle == SPREAD_45 else pi / 6)
    below, above = max(y_1 - out, low), min(y_2 + out, high)
    return [Outline([(last, y), (first, end)], closed=False, weight="centre")
            for y, end in ((y_1, below), (y_2, above))]


def _paths(x, section, layout):
    """Return the governing chain and the governing block of the member."""
    chain = chains(section.width, list(layout.member), k=1, gross_area=section.A_g / section.count)[0]
    U_bs = 1.0 if x.member_U_bs.startswith("1") else 0.5
    length = 2 * max(hole.x for hole in layout.member) + section.width
    path = min(block_paths(strip(section.width, length), section.t, list(layout.member), section.attached),
               key=lambda p: min(0.60 * x.F_u * p.net_shear_area, 0.60 * x.F_y * p.gross_shear_area)
               + U_bs * x.F_u * p.net_tension_area)
    lines = [FailurePath(list(chain.points), "net section")]
    cuts = [cut for cut in path.cuts if len(cut.points) > 1]
    named = next((cut for cut in cuts if cut.kind == "tension"), cuts[0])
    return lines + [FailurePath(list(cut.points), "block shear" if cut is named else "", kind=1) for cut in cuts]


def _dimensions(x, section, layout, named, first, last, edge, gusset, member):
    (low, high), (base, w) = gusset, member
    top, length = max(high, w), max(0.8 * section.width, 0.25 * edge)
    parts = [
        Dimension((0, w), (first, w), 1.2, named("L_e", first), "horizontal", beyond=(0, top)),
        Dimension((last, w), (edge, w), 1.2, named("L_eg", edge - last), "horizontal", beyond=(0, top)),
        Dimension((edge, base), (edge, w), 0, named("d" if section.offset else "w", w - base), "vertical",
                  beyond=(edge + 0.6 * length, 0)),
        Dimension((0, low), (0, high), -2, named("w_g", x.gusset_width), "vertical",
                  beyond=(-max(0.35 * edge, 0.3 * section.width), 0)),
    ]
    line = max(layout.lines, key=len)
    along = [layout.bolts[i][0] for i in line]
    if len(along) > 1:
        pitches = {round(b - a, 9) for a, b in pairwise(along)}
        text = named("s", pitches.pop()) if len(pitches) == 1 else named("l", along[-1] - along[0])
        if len(along) > 2 and not pitches:
            text = Named("s", f"{len(along) - 1} at " + units.text(along[1] - along[0], units.LENGTH, x.units))
        parts.append(Dimension((along[0], w), (along[-1], w), 1.2, text, "horizontal", beyond=(0, top)))
    ys = sorted({round(layout.bolts[line[0]][1], 9) for line in layout.lines})
    marks = [(base, ys[0], "g_1")] + [(a, b, "g") for a, b in pairwise(ys)]
    for a, b, symbol in marks:
        rows = -2.4 if symbol == "g_1" and len(marks) > 1 else -1
        parts.append(Dimension((0, a), (0, b), rows, named(symbol, b - a), "vertical"))
    hole = layout.member[0]
    parts.append(Leader((hole.x, hole.y), (-2.5, -2.5), named("d_h", hole.width)))
    return parts
