"""Drawing of a welded member on its gusset: elevation to scale, and the section with the distance to its centroid."""

from dataclasses import dataclass
from math import pi, tan

from calclib import units
from calclib.drawing import Arrow, BreakLine, Dimension, Drawing, FailurePath, Leader, Named, Outline, Text
from calclib.members.gusset import SPREAD_45


def named(x, symbol, value):
    return Named(symbol, units.text(value, units.LENGTH, x.units))


def force(x, calc):
    return Named(calc.run.required_symbol.replace("{", "").replace("}", ""),
                 units.text(calc.run.required, units.FORCE, x.units))


def rectangle(x1, y1, x2, y2):
    return (x1, y1), (x2, y1), (x2, y2), (x1, y2)


def weld(x1, y1, x2, y2):
    """Return a fillet as it is seen from above."""
    return Outline(list(rectangle(x1, y1, x2, y2)), hatch=True)


def spread_lines(x, w, length, low, high):
    """Return the lines at which the force spreads in the gusset, from the start of the welds at x = `length`
    to x = 0, and the ends of its width there, cut off at the edges of the gusset."""
    out = w / 2 + length * tan(pi / 4 if x.spread_angle == SPREAD_45 else pi / 6)
    below, above = max(-out, low), min(out, high)
    return [Outline([(length, s * w / 2), (0, end)], closed=False, weight="centre")
            for s, end in ((-1, below), (1, above))], below, above


def draw_welded(x, calc, m, seen, lap, straight=True, across=0):
    """Return the drawing. The member ends at x = 0 and pulls to the right; the gusset ends at x = lap.

    `m`: the member, with its welds `l_1` and `l_2`, the width `w` between them and `x_bar`; `seen`: its Profile;
    `straight`: whether it has longitudinal welds; `across`: transverse welds, 0 to 2.
    """
    w, b, a = m.w, seen.depth, x.weld_size
    low = -w / 2 - ((x.gusset_width - w) / 2 if x.gusset_edge is None else x.gusset_edge)
    high = low + x.gusset_width
    lines, below, above = spread_lines(x, w, min(m.l_1, m.l_2), low, high)
    left, right = -0.4 * lap, lap + max(0.8 * b, 0.5 * lap)
    parts = [
        Outline([(left, high), (lap, high), (lap, low), (left, low)], closed=False),
        BreakLine((left, low), (left, high)),
        Outline([(right, b / 2), (0, b / 2), (0, -b / 2), (right, -b / 2)], closed=False),
        BreakLine((right, -b / 2), (right, b / 2)),
        *(Outline([(0, y), (right, y)], closed=False, weight=weight) for y, weight in seen.edges),
        *(lines if straight or across == 2 else []),
        Arrow((right, 0), (2.2, 0)), Text((right, 0), force(x, calc), (2.5, 0.9)),
    ]
    if straight:
        parts += [weld(0, s * w / 2, length, s * (w / 2 + a)) for s, length in ((-1, m.l_1), (1, m.l_2))]
        parts += [Dimension((0, -w / 2), (m.l_1, -w / 2), -2, named(x, "l_1", m.l_1), "horizontal",
                            beyond=(0, min(low, -b / 2))),
                  Dimension((0, w / 2), (m.l_2, w / 2), 1.2, named(x, "l_2", m.l_2), "horizontal",
                            beyond=(0, max(high, b / 2)))]
    else:
        parts.append(Dimension((0, -w / 2), (m.l_1, -w / 2), -2, named(x, "l_lap", m.l_1), "horizontal",
                               beyond=(0, min(low, -b / 2))))
    parts += [weld(at - a / 2, -w / 2, at + a / 2, w / 2) for at in (0, lap)[:across]]
    where = (0.7 * m.l_2, w / 2 + a / 2) if straight else (0, 0.3 * w)
    parts.append(Leader(where, (2.2, 3.2) if straight else (-2.6, 2.4), named(x, "w_f", a)))
    parts.append(Dimension((0, -w / 2), (0, w / 2), -1.2, named(x, "w", w), "vertical", beyond=(left, 0)))
    parts += _failure(calc, m, seen, lap, right, (below, above), straight, across)
    wide = -min(z for ring in seen.rings for z, _ in ring) + x.gusset_thickness
    parts += section(x, m, seen, right + wide + 0.42 * max(right - left, 0.8 * (high - low)))
    note = f"Heavy broken line: {calc.governing.title.lower()}."
    return Drawing(parts, title="Elevation and section", unit="in" if x.units == "US" else "mm", note=note)


def _failure(calc, m, seen, lap, right, spread, straight, across):
    """Return the path along which the governing limit state gives way."""
    key, w, b = calc.governing.key, m.w, seen.depth
    shears = [[(0, -w / 2), (m.l_1, -w / 2)], [(0, w / 2), (m.l_2, w / 2)]]
    if key == "gusset block shear":
        lines = [[(m.l_1, -w / 2), (0, -w / 2), (0, w / 2), (m.l_2, w / 2)]]
    elif key == "member block shear":
        wide = w if m.inside else b
        lines = [[(max(m.l_1, m.l_2), -wide / 2), (max(m.l_1, m.l_2), wide / 2)],
                 *(shears if m.inside else [[(0, y), (m.l_1, y)] for y in seen.roots])]
    elif key in ("gusset yielding", "gusset rupture"):
        lines = [[(0, y) for y in spread]]
    elif key in ("gross yielding", "fatigue"):
        lines = [[((lap + right) / 2, -b / 2), ((lap + right) / 2, b / 2)]]
    elif key == "net rupture":
        lines = [[(lap, -b / 2), (lap, b / 2)]]
    else:
        lines = (shears if straight else []) + [[(at, -w / 2), (at, w / 2)] for at in (0, lap)[:across]]
    return [FailurePath(line) for line in lines]


@dataclass(frozen=True)
class Profile:
    """The section as drawn: z out of the plane, from the face of the gusset; y across the force, 0 in the middle."""

    rings: tuple                  # closed lines of (z, y)
    gusset_at: tuple              # z of the near face of each gusset
    edges: tuple                  # (y, weight) of lines along the member in the elevation
    roots: tuple = ()             # y where what stands on the welded element meets it
    plane: float = 0.0            # z from where the distance to the centroid is measured

    @property
    def depth(self):
        """Height of the section across the force."""
        levels = [y for ring in self.rings for _, y in ring]
        return max(levels) - min(levels)


def profile(x, m):
    """Return the Profile of a plate or open shape by its welded element."""
    s, t_g, b, t = x.section, x.gusset_thickness, m.b / 2, m.t
    if s is None:
        return Profile((rectangle(0, -b, t, b),), (-t_g, t)[:m.gussets], ())
    k = 1.0 if x.units == units.US else 25.4
    if s.family in ("L", "2L"):
        other = (s.leg_short if x.welded_element == "long leg" else s.leg_long) * k
        ring = ((0, -b), (other, -b), (other, -b + t), (t, -b + t), (t, b), (0, b))
        mirrored = tuple((-t_g - z, y) for z, y in ring)
        return Profile((ring, mirrored)[:m.elements], (-t_g,), ((-b + t, "object"),), (-b,))
    t_w, t_f, d = s.t_w * k / 2, s.t_f * k, s.d * k
    if x.welded_element == "flange":
        ring = ((0, -b), (t, -b), (t, -t_w), (d, -t_w), (d, t_w), (t, t_w), (t, b), (0, b))
        return Profile((ring,), (-t_g,), ((-t_w, "object"), (t_w, "object")), (0.0,))
    if x.welded_element == "both flanges":
        ring = ((0, -b), (t, -b), (t, -t_w), (d - t, -t_w), (d - t, -b), (d, -b), (d, b), (d - t, b), (d - t, t_w),
                (t, t_w), (t, b), (0, b))
        return Profile((ring,), (-t_g, d), ((-t_w, "hidden"), (t_w, "hidden")), (0.0,))
    half, inner, b_f = d / 2, d / 2 - t_f, s.b_f * k
    lines = ((-inner, "object"), (inner, "object"))
    if s.family in ("C", "MC"):
        ring = ((0, -half), (b_f, -half), (b_f, -inner), (t, -inner), (t, inner), (b_f, inner), (b_f, half), (0, half))
        return Profile((ring,), (-t_g,), lines, (-half, half))
    near, far = t_w - b_f / 2, t_w + b_f / 2
    ring = ((near, -half), (far, -half), (far, -inner), (t, -inner), (t, inner), (far, inner), (far, half),
            (near, half), (near, inner), (0, inner), (0, -inner), (near, -inner))
    return Profile((ring,), (-t_g,), lines, (), t_w)


def section(x, m, seen, at):
    """Return the parts of the section, with the face of the gusset at x = `at`."""
    half = m.w / 2 if m.inside else seen.depth / 2 * 1.12
    parts = [Outline([(at + z, y) for z, y in ring], hatch=True) for ring in seen.rings]
    parts += [Outline([(at + z, y) for z, y in rectangle(z, -half, z + x.gusset_thickness, half)])
              for z in seen.gusset_at]
    low = -max(half, seen.depth / 2)
    if m.x_bar:
        parts.append(Dimension((at + seen.plane, -seen.depth / 2), (at + seen.plane + m.x_bar, -seen.depth / 2), -2,
                               named(x, "x̄", m.x_bar), "horizontal", beyond=(at, low)))
    return parts
