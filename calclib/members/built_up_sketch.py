"""The sketch of a built-up tension member: its section, and the face of one open side or of the plates."""

from calclib import units
from calclib.drawing import Arrow, Break, BreakLine, Circle, Dimension, Drawing, FailurePath, Leader, Named, Outline
from calclib.members.built_up_parts import ANGLES, COVERS, PLATES, TIES, TOES, WELDS, parts


def sketch(x, calc):
    """Return the section and, beside or below it, the member seen on its open side, web, leg or plate, to scale."""
    p = parts(x)
    draw = _plates if x.arrangement == PLATES else _angles if x.arrangement in ANGLES else _channels
    section, width, depth, lines = draw(x, p)
    start = width / 2 + 0.7 * max(width, depth)
    if x.held_by in (TIES, COVERS):
        below = depth / 2 + 1.7 * width
        start, lines = -width / 2, [y - below for y in lines]
    notes = ["Fillets and slopes of flanges are not drawn."] * p.is_shape
    if x.held_by == COVERS:
        notes += ["Perforations whose length or spacing is not given are drawn as an assumption."] * (
            x.perforation_length is None or x.perforation_clear is None)
    return Drawing(section + _seen(x, calc, start, lines), title="Section and view along the member",
                   unit="in" if x.units == units.US else "mm", note=" ".join(notes))


def _named(x, symbol, value):
    return Named(symbol, units.text(value, units.LENGTH, x.units))


def _channels(x, p):
    """Return the section of two channels, its width and depth, and the lines seen on the open side or the web."""
    d, b, t_w, t_f, B = p.d, p.b_f, p.t_w, p.t_f, x.back_to_back
    back = B / 2
    inward = -1 if x.arrangement == TOES else 1
    drawn = []
    for side in (-1, 1):
        points = [(0, -d / 2), (b, -d / 2), (b, -d / 2 + t_f), (t_w, -d / 2 + t_f), (t_w, d / 2 - t_f),
                  (b, d / 2 - t_f), (b, d / 2), (0, d / 2)]
        drawn.append(Outline([(side * (back + inward * u), v) for u, v in points], hatch=True))
    width = B if x.arrangement == TOES else B + 2 * b
    high = d / 2
    if x.held_by in (TIES, COVERS):
        t = x.plate_thickness
        w = x.plate_width if x.held_by == COVERS else _tie_width(x, width)
        for v in (d / 2, -d / 2 - t):
            pieces = [(-w / 2, w / 2)]
            if x.held_by == COVERS:
                pieces = [(-w / 2, -x.perforation_width / 2), (x.perforation_width / 2, w / 2)]
            drawn += [Outline([(left, v), (right, v), (right, v + t), (left, v + t)])
                      for left, right in pieces]
        high += t
        drawn.append(Leader((-w / 2 + 0.1 * w, high), (-1.0, 1.6), _named(x, "t", t)))
    if B:
        offset = -1.2
        drawn.append(Dimension((-back, -d / 2), (back, -d / 2), offset, _named(x, "B", B), "horizontal",
                               beyond=(0, -high)))
    drawn.append(Leader((back + inward * t_w / 2, d / 4), (2.2, 1.6), f"2 {p.name}"))
    edges = ([d / 2, d / 2 - t_f] if x.held_by not in (TIES, COVERS) else
             [back, back - b] if x.arrangement == TOES else [back, back + b])
    return drawn, width, 2 * high, sorted({s * e for s in (-1, 1) for e in edges})


def _tie_width(x, width):
    """Return a width of the tie plates for the drawing: their lines, and half as much beyond as there is room."""
    return (x.line_distance + width) / 2


def _angles(x, p):
    """Return the section of two angles back to back, its width and depth, and the lines seen on a leg."""
    leg, t, s = p.leg, p.t_w, x.back_to_back
    inch = 1.0 if x.units == units.US else 25.4
    other = (x.section.leg_short if p.leg == x.section.leg_long * inch else x.section.leg_long) * inch
    points = [(0, 0), (other, 0), (other, t), (t, t), (t, leg), (0, leg)]
    drawn = [Outline([(side * (s / 2 + u), v - leg / 2) for u, v in points], hatch=True) for side in (-1, 1)]
    if s:
        drawn.append(Dimension((-s / 2, leg / 2), (s / 2, leg / 2), 1, _named(x, "B", s), "horizontal"))
    drawn.append(Leader((s / 2 + 0.7 * other, -leg / 2 + t), (1.0, 2.5), f"2 {p.name}"))
    return drawn, s + 2 * other, leg, [-leg / 2, -leg / 2 + t, leg / 2]


def _plates(x, p):
    """Return the section of plates in contact, its width and depth, and the lines seen on a face."""
    w, t = x.plate_width, x.plate_thickness
    drawn = [Outline([(i * t - p.n * t / 2, -w / 2), ((i + 1) * t - p.n * t / 2, -w / 2),
                      ((i + 1) * t - p.n * t / 2, w / 2), (i * t - p.n * t / 2, w / 2)], hatch=True)
             for i in range(p.n)]
    drawn.append(Leader((p.n * t / 2, 0.3 * w), (1.0, 1.6), Named("t", units.text(t, units.LENGTH, x.units),
                                                                 f"{p.n} plates,")))
    return drawn, p.n * t, w, [-w / 2, w / 2]


def _seen(x, calc, end, lines):
    """Return the member seen along its length, from its end at the left to a cut."""
    low, high = min(lines), max(lines)
    across = high - low
    critical = end + x.connection_length
    first = critical + 0.15 * across
    size = _size(x)
    pitch = size + (x.perforation_clear or x.line_distance) if x.held_by == COVERS else x.connector_spacing
    second = first + pitch
    cut = second + size + 0.5 * across
    force = Named(calc.run.required_symbol.replace("{", "").replace("}", ""),
                  units.text(calc.run.required, units.FORCE, x.units))
    governs = {"gross yielding": cut - 0.15 * across, "rupture between the ends": first + size / 2}
    where = governs.get(calc.governing.key, critical)
    drawn = [Outline([(end, y), (cut, y)], closed=False, weight="object" if y in (low, high) else "hidden")
             for y in lines]
    drawn += [
        Outline([(end, low), (end, high)], closed=False), BreakLine((cut, low), (cut, high)),
        Outline([(end - 0.2 * across, (low + high) / 2), (cut + 0.2 * across, (low + high) / 2)], closed=False,
                weight="centre"),
        Dimension((end, low), (critical, low), -1.2, _named(x, "l", x.connection_length), "horizontal"),
        FailurePath([(where, low), (where, high)]),
        Leader((where, high), (0.8, 2.6), calc.governing.title.lower()),
        Arrow((cut + 0.2 * across, (low + high) / 2), (2.4, 0), force),
        *_connectors(x, first, second, size, low, high),
    ]
    if pitch - size > 0.8 * across:
        drawn.append(Break(first + size + 0.2 * across, second - 0.2 * across, low, high))
    return drawn


def _size(x):
    """Return the length along the member of one connector or perforation."""
    if x.held_by == TIES:
        return x.tie_length
    if x.held_by == COVERS:
        return x.perforation_length or 2 * x.perforation_width
    return x.connector_hole or 0.2 * x.connector_spacing


def _connectors(x, first, second, size, low, high):
    """Return tie plates, perforations, bolts or welds at two places along the member."""
    middle, drawn = (low + high) / 2, []
    if x.held_by == TIES:
        half = _tie_width(x, high - low) / 2
        b = x.line_distance / 2
        for at in (first, second):
            drawn.append(Outline([(at, middle - half), (at + size, middle - half), (at + size, middle + half),
                                  (at, middle + half)]))
            drawn += [Outline([(at, middle + y), (at + size, middle + y)], closed=False, weight="thin")
                      for y in (-b, b)]
        return [*drawn, Dimension((first, high), (first + size, high), 1.2, _named(x, "l_t", size), "horizontal"),
                Dimension((first + size / 2, low), (second + size / 2, low), -2.4,
                          _named(x, "a", x.connector_spacing), "horizontal"),
                Dimension((second + size, middle - b), (second + size, middle + b), 0.6,
                          _named(x, "b", x.line_distance), "vertical")]
    if x.held_by == COVERS:
        half = x.perforation_width / 2
        for at in (first, second):
            drawn.append(Outline([(at, middle - half), (at + size, middle - half), (at + size, middle + half),
                                  (at, middle + half)]))
        return [*drawn, Dimension((second + size, middle - half), (second + size, middle + half), 0.6,
                                  _named(x, "w_p", x.perforation_width), "vertical")]
    spacing = Dimension((first, high), (second, high), 1.2, _named(x, "a", x.connector_spacing), "horizontal")
    if x.held_by == WELDS:
        return [spacing, *(Outline([(at - size / 2, y), (at + size / 2, y)], weight="thin", closed=False)
                           for at in (first, second) for y in (low + 0.02 * (high - low), high - 0.02 * (high - low)))]
    count = int(x.connector_holes)
    return [spacing, *(Circle((at, low + (high - low) * (i + 1) / (count + 1)), x.connector_hole)
                       for at in (first, second) for i in range(count))]
