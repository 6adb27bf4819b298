"""The cross section of a bolted member at its gusset, with the distance to the centroid that shear lag counts."""

from calclib import units
from calclib.drawing import Dimension, Named, Outline
from calclib.members.bolted_section import BACKS, CHANNELS, FLANGE, FLANGES, FLAT, LONG_LEG, SHORT_LEG, STEM


def section_view(x, calc, section, at):
    """Return the parts of the cross section, with the face of the gusset at `at`; its height is that of the strip."""
    rings, gussets = _outlines(x, section)
    t_g, w = x.gusset_thickness, section.width
    parts = [Outline([(at + z, y) for z, y in ring], hatch=True) for ring in rings]
    low, high = (min(y for ring in rings for _, y in ring), max(y for ring in rings for _, y in ring))
    between = section.offset and section.family not in CHANNELS        # a gusset inside the flanges
    bottom, top = (0.0, w) if between else (low - 0.15 * w, high + 0.15 * w)
    parts += [Outline([(at + z, y) for z, y in _rectangle(z, bottom, z + t_g, top)]) for z in gussets]
    x_bar = _x_bar(calc)
    if x_bar is not None:
        plane = section.t / 2 if section.x_bar is None and section.way not in (FLANGES, FLAT) else 0.0
        parts.append(Dimension((at + plane, low), (at + plane + x_bar, low), -2,
                               Named("x̄", units.text(x_bar, units.LENGTH, x.units)), "horizontal",
                               beyond=(at, min(low, bottom))))
    return parts


def _x_bar(calc):
    for step in calc["shear lag"].steps:
        if (step.equation and "x_bar" in step.equation.results) or (step.chosen and step.chosen[0] == r"\bar{x}"):
            return step.result
    return None


def _rectangle(z_1, y_1, z_2, y_2):
    return (z_1, y_1), (z_2, y_1), (z_2, y_2), (z_1, y_2)


def _outlines(x, section):
    """Return the rings of the member and where its gussets begin; z counts from the face of the gusset."""
    s, k, w, t, t_g = section.shape, section.k, section.width, section.t, x.gusset_thickness
    both = (-t_g, t) if x.gussets != "one" else (-t_g,)
    if section.way == FLAT:
        return (_rectangle(0, 0, t, w),), both
    if section.way in (LONG_LEG, SHORT_LEG, BACKS):
        other = (s.b if section.way == BACKS else s.leg_short if section.way == LONG_LEG else s.leg_long) * k
        ring = ((0, 0), (other, 0), (other, t), (t, t), (t, w), (0, w))
        mirrored = tuple((-t_g - z, y) for z, y in ring)
        return ((ring, mirrored), (-t_g,)) if section.way == BACKS else ((ring,), both)
    half, t_f, d, b_f = s.t_w * k / 2, s.t_f * k, s.d * k, s.b_f * k
    low, high = w / 2 - half, w / 2 + half
    if section.way == FLANGE:
        return (((0, 0), (t, 0), (t, low), (d, low), (d, high), (t, high), (t, w), (0, w)),), (-t_g,)
    if section.way == FLANGES:
        ring = ((0, 0), (t, 0), (t, low), (d - t, low), (d - t, 0), (d, 0), (d, w), (d - t, w), (d - t, high),
                (t, high), (t, w), (0, w))
        return (ring,), (-t_g, d)
    near, far = (0, b_f) if section.family in CHANNELS else (half - b_f / 2, half + b_f / 2)
    flanges = [_rectangle(near, -t_f, far, 0)] + ([] if section.way == STEM else [_rectangle(near, w, far, w + t_f)])
    return (_rectangle(0, 0, t, w), *flanges), both
