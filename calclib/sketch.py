"""A drawing to scale from the plain data of `calclib.drawing`. Words never change size.

`draw` chooses the largest usual scale at which everything fits, and says so; `png` and `svg` turn it into a file.
"""

import math
from itertools import pairwise

import numpy as np

from calclib.drawing import (
    Arc,
    Arrow,
    Break,
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
from calclib.paper import HEAVY, OBJECT, POINTS, TEXT, THIN, Paper, Spot, png, svg, words_size, wrapped

__all__ = ["Arc", "Arrow", "Break", "BreakLine", "Circle", "Dimension", "Drawing", "FailurePath", "Leader", "Named",
           "Outline", "Text", "draw", "png", "svg"]

ROW = 18.0          # a quarter inch on paper [pt]
_HEAD = 6.5         # length of an arrowhead [pt]
_GAP, _OVER = 2.5, 3.0   # extension lines: clear of the object, past the dimension line [pt]
_MARGIN = 4.0       # free rim of a figure [pt]
_BREAK = 9.0        # what is left on paper of a length cut out [pt]
_TALLEST = 0.78     # height of a figure over its width, unless the height is given
_RIGHT, _UP = np.array((1.0, 0.0)), np.array((0.0, 1.0))
_STYLES = {"object": (OBJECT, ()), "thin": (THIN, ()), "hidden": (THIN, (4, 2)), "centre": (THIN, (12, 2.5, 2.5, 2.5))}
_PATHS = ((11, 3, 2, 3), (11, 3, 2, 3, 2, 3), (6, 3))   # dashes of the first, second and third failure path [pt]
# Paper length over true length. Inches: those of the engineer's and architect's scale; millimetres: those of ISO 5455
# and the ones between that are in use.
_RATIOS = {"in": (1, 2, 3, 4, 6, 8, 12, 16, 24, 32, 48, 64, 96), "mm": (1, 2, 2.5, 4, 5, 10, 15, 20, 25, 40, 50, 100)}


def draw(drawing, size=(6.5, None)):
    """Return a matplotlib Figure of the drawing, to true scale, `size` = (width, height) [in]; None: as high as needed.

    Raises
    ------
    ValueError : nothing to draw, a coordinate that is not finite, more than one break, or too many words to fit.
    """
    width, height = size[0] * 72, None if size[1] is None else size[1] * 72
    room = (width - 2 * _MARGIN, (height or width * _TALLEST) - 2 * _MARGIN)
    for scale in _scales(drawing, room):
        paper, footer = _Sheet(drawing, scale).paper, _Footer(drawing, scale, width)
        x0, y0, x1, y1 = paper.extent()
        if x1 - x0 <= room[0] and y1 - y0 + footer.height <= room[1]:
            break
    else:
        raise ValueError(f"The drawing's words and dimensions need more than {size[0]:g} in of width; "
                         "take a larger figure or fewer of them.")
    if height is None:
        height = math.ceil((y1 - y0 + footer.height + 2 * _MARGIN) / 7.2) * 7.2   # tenths of an inch: whole pixels
    shift = ((width - x0 - x1) / 2, (height + footer.height - y0 - y1) / 2)
    footer.write(paper, shift)
    return paper.figure(width, height, shift)


def scale_text(scale, unit):
    """Return e.g. "1 : 2" for a scale [pt per unit]."""
    ratio = scale / POINTS[unit]
    return f"{ratio:g} : 1" if ratio > 1 else f"1 : {1 / ratio:g}"


def _scales(drawing, room):
    """Yield the usual scales [pt per unit], the largest at which the bare geometry fits first, 25 of them."""
    points = np.concatenate([np.reshape(_geometry(part), (-1, 2)) for part in drawing.parts] or [np.empty((0, 2))])
    if not len(points):
        raise ValueError("The drawing has no parts.")
    if not np.isfinite(points).all():
        raise ValueError("A coordinate of the drawing is not a finite number.")
    shorten = _shortening(drawing)
    points[:, 0] = shorten(points[:, 0], math.inf)
    extent = np.ptp(points, axis=0)
    most = min(space / length for space, length in zip(room, extent, strict=True) if length > 0) if extent.any() else 1
    usual = [*(1 / r for r in _RATIOS[drawing.unit]), *(1 / (r * 10.0 ** k) for k in range(2, 9) for r in (1, 2, 5)),
             2, 3, 4, *(r * 10.0 ** k for k in range(4) for r in (5, 10, 20))]
    fitting = [r for r in sorted(set(usual), reverse=True) if r * POINTS[drawing.unit] <= most * (1 + 1e-9)]
    yield from (r * POINTS[drawing.unit] for r in fitting[:25])


def _geometry(part):
    """Return the model points that a part takes up."""
    match part:
        case Outline() | FailurePath():
            return part.points
        case Circle() | Arc():
            return [np.add(part.center, reach) for reach in (-part.diameter / 2, part.diameter / 2)]
        case Dimension() | BreakLine():
            return [part.p1, part.p2]
        case Break():
            return [(part.x1, part.y1), (part.x2, part.y2)]
        case Arrow():
            return [part.start]
        case Leader():
            return [part.point]
        case Text():
            return [part.at]
    raise TypeError(f"{type(part).__name__} is no part of a drawing.")


def _shortening(drawing):
    """Return the function (x, scale) -> x with the broken length left out, but for a strip of the paper."""
    breaks = [part for part in drawing.parts if isinstance(part, Break)]
    if len(breaks) > 1:
        raise ValueError("A drawing has at most one break.")
    if not breaks:
        return lambda x, scale: x
    x1, x2 = breaks[0].x1, breaks[0].x2
    if not x1 < x2:
        raise ValueError("A break runs from x1 to a larger x2.")
    return lambda x, scale: np.interp(x, [x1, x2], [0, _BREAK / scale]) + np.minimum(x, x1) + np.maximum(x - x2, 0)


class _Sheet:
    """The drawing laid out at one scale: lines first, then words where they are least in the way."""

    def __init__(self, drawing, scale):
        self.paper, self.scale, self.shorten = Paper(), scale, _shortening(drawing)
        self.words = []    # (label, spots, bold)
        for part in drawing.parts:
            getattr(self, f"_{type(part).__name__.lower()}")(part)
        for label, spots, bold in self.words:
            self.paper.place(label, spots, bold=bold)

    def on_paper(self, points):
        points = np.array(points, float)
        points[..., 0] = self.shorten(points[..., 0], self.scale)
        return points * self.scale

    def _line(self, points, weight):
        pen, dash = _STYLES[weight]
        self.paper.line(points, pen, dash, level=2 if weight == "object" else 1)

    def _say(self, label, spots, bold=False):
        if str(label):
            self.words.append((label, spots, bold))

    def _outline(self, part):
        points = self.on_paper(part.points)
        if part.hatch:
            self.paper.hatch(points)
        self._line(np.vstack([points, points[:1]]) if part.closed else points, part.weight)

    def _circle(self, part):
        self._arc(Arc(part.center, part.diameter, 0, 360, part.weight))
        if part.cross:
            middle, reach = self.on_paper(part.center), part.diameter / 2 * self.scale + 5
            for way in (_RIGHT, _UP):
                self.paper.line([middle - reach * way, middle + reach * way], THIN, _cross_dash(reach))

    def _arc(self, part):
        count = max(2, math.ceil(abs(part.end - part.start) / 2) + 1)
        angle = np.radians(np.linspace(part.start, part.end, count))
        ring = np.column_stack([np.cos(angle), np.sin(angle)]) * part.diameter / 2 * self.scale
        self._line(self.on_paper(part.center) + ring, part.weight)

    def _arrow(self, part):
        tail, step = self.on_paper(part.start), np.multiply(part.reach, ROW)
        tip, u = tail + step, step / math.hypot(*step)
        self.paper.line([tail, tip - u * 8], HEAVY, level=3)
        self.paper.arrowhead(tip, u, 12, 7)
        ahead, middle = Spot(tip + u * 4, 0.5 - u / 2), tail + step / 2
        if abs(u[1]) > abs(u[0]):
            self._say(part.text, [*(_beside(middle, side, 7) for side in (1, -1)), ahead])
        else:
            self._say(part.text, [ahead, Spot(middle + 6 * _UP, (0.5, 0)), Spot(middle - 6 * _UP, (0.5, 1))])

    def _dimension(self, part):
        a, b = self.on_paper(part.p1), self.on_paper(part.p2)
        u = {"horizontal": _RIGHT, "vertical": _UP, "aligned": b - a}[part.direction]
        if not u.any():
            raise ValueError(f"The dimension {part.text} has no length and so no direction.")
        u = u / math.hypot(*u)
        n = _RIGHT if part.direction == "vertical" else np.array((-u[1], u[0]))
        if (b - a) @ u < 0:
            a, b = b, a
        side = math.copysign(1, part.offset)
        base = side * max(side * (a @ n), side * (b @ n)) if part.beyond is None else self.on_paper(part.beyond) @ n
        level = base + part.offset * ROW
        ends = []
        for point in (a, b):
            away = level - point @ n
            ends.append(point + n * away)
            if abs(away) > _GAP:
                out = n * math.copysign(1, away)
                # Words between another dimension's extension lines would be read as that dimension's.
                self.paper.line([point + out * _GAP, ends[-1] + out * _OVER], cost=2)
        self._dimension_line(part.text, *ends, u, n, side)

    def _dimension_line(self, text, a, b, u, n, outward):
        length, (w, h) = math.hypot(*(b - a)), words_size(text)
        angle = math.degrees(math.atan2(u[1], u[0]))
        angle = angle - 180 if angle > 90.01 else angle + 180 if angle <= -89.99 else angle
        inside = length >= 2 * _HEAD + 2
        reach = 0 if inside else _HEAD + 6          # arrows that do not fit point at the extension lines from outside
        for end, out in ((a, -u), (b, u)):
            self.paper.arrowhead(end, out if inside else -out, _HEAD)
            if not inside:
                self.paper.line([end, end + out * reach])
        self.paper.line([a, b])
        middle = (a + b) / 2
        if length >= w + 2 * _HEAD + 8:
            slack = (length - w) / 2 - _HEAD - 3
            self._say(text, [Spot(middle + u * slack * along, angle=angle) for along in (0, 0.6, -0.6)])
            return
        past = reach + 3                            # the words stand past one end, where the line leads to them
        ends = [(b, u), (a, -u)]
        spots = [Spot(end + out * (past + w / 2), angle=angle, tail=(end, end + out * past)) for end, out in ends]
        above = Spot(middle + n * (h / 2 + 1.5), angle=angle)
        spots = [above, *spots] if inside and length >= w else [*spots, above]
        if abs(u[0]) < 0.01:                        # or level, beside a line that stands upright
            spots = [_beside(middle, outward), *spots, _beside(middle, -outward)]
            spots += [_beside(end + out * past, side, 2, (end, end + out * past))
                      for end, out in ends for side in (outward, -outward)]
        self._say(text, spots)

    def _leader(self, part):
        point, step = self.on_paper(part.point), np.multiply(part.reach, ROW)
        self.paper.arrowhead(point, -step, _HEAD)
        spots, side = [], math.copysign(1, step[0])
        for way in (1, 1.4, 1.8, 2.2):
            elbow = point + step * way
            shoulder = elbow + side * 7 * _RIGHT
            spots.append(_beside(shoulder, side, 2, (point, elbow, shoulder)))
        self._say(part.text, spots)

    def _failurepath(self, part):
        points = self.on_paper(part.points)
        length = np.hypot(*np.diff(points, axis=0).T).sum()
        dash = np.array(_PATHS[part.kind]) * min(1, max(0.35, length / 32))   # a short path shows its dots too
        self.paper.line(points, HEAVY, dash, level=4)
        ahead, beside, led = [], [], []
        for end, inner in ((points[-1], points[-2]), (points[0], points[1])):
            u = (end - inner) / math.hypot(*(end - inner))
            ahead.append(Spot(end + u * 4, 0.5 - u / 2))
            for way in (0.6, 0.9, 1.2, 1.6):
                for side in (1, -1):
                    elbow = end + (u + side * _RIGHT) * ROW * way
                    led.append(_beside(elbow, side, 2, (end, elbow), cost=2))
        pieces = sorted(pairwise(points), key=lambda piece: -math.dist(*piece))[:6]    # a curve has many alike
        for a, b in pieces:
            n = np.array((a[1] - b[1], b[0] - a[0])) / math.hypot(*(b - a))
            beside += [Spot((a + b) / 2 + n * side * 4, 0.5 - n * side / 2) for side in (1, -1)]
        self._say(part.label, ahead + beside + led, bold=True)

    def _text(self, part):
        self.paper.words(part.text, self.on_paper(part.at) + np.multiply(part.shift, ROW), bold=part.bold)

    def _breakline(self, part, place=0.7):
        a, b = self.on_paper(part.p1), self.on_paper(part.p2)
        length = math.hypot(*(b - a))
        u = (b - a) / length
        n, middle, size = np.array((-u[1], u[0])), a + (b - a) * place, min(1.0, length / 16)
        zigzag = [middle + (u * along + n * across) * size for along, across in ((-3, 0), (-1.5, 5), (1.5, -5), (3, 0))]
        self.paper.line([a - u * 5, *zigzag, b + u * 5], THIN, level=5, cost=3)

    def _break(self, part):
        (x1, y1), (x2, y2) = self.on_paper([(part.x1, part.y1), (part.x2, part.y2)])
        self.paper.area([(x1, y1 - 3), (x2, y1 - 3), (x2, y2 + 3), (x1, y2 + 3)], grey=1.0, level=4)
        for x in (part.x1, part.x2):
            self._breakline(BreakLine((x, part.y1), (x, part.y2)), 0.5)


def _beside(point, side, gap=4, tail=(), cost=0):
    """Return the spot of words level with `point`, `gap` [pt] to the right (side 1) or left (side -1) of it."""
    return Spot(point + side * gap * _RIGHT, (0.5 - side / 2, 0.5), tail=tail, cost=cost)


def _cross_dash(reach):
    """Return the dashes of a centre line 2 x `reach` long [pt], set out so that a stroke lies in its middle."""
    if reach < 12:
        return ()
    middle, gap, dot = max(4.0, reach * 0.25), 2.0, 2.0
    end = reach - middle / 2 - 2 * gap - dot
    return (end, gap, dot, gap, middle, gap, dot, gap, end, 1)


class _Footer:
    """Title, scale and a bar that stays true however the page is copied."""

    def __init__(self, drawing, scale, width):
        self.scale, self.width, self.unit, self.bar = scale, width, drawing.unit, drawing.scale_note
        rows = [(drawing.title, True), (self._scale_note(drawing) if self.bar else "", False), (drawing.note, False)]
        self.rows = [(wrapped(text, width * 0.68, TEXT, bold), bold) for text, bold in rows if str(text)]
        self.height = sum(words_size(text)[1] + 1.5 for text, _ in self.rows)
        self.height = max(self.height, 22 if self.bar else 0) + (8 if self.rows else 0)

    def _scale_note(self, drawing):
        inches = self.width / 72
        width = f"{inches:g} in" if self.unit == "in" else f"{inches * 25.4:.0f} mm"
        cut = "; length left out at the break" if any(isinstance(part, Break) for part in drawing.parts) else ""
        return f"Scale {scale_text(self.scale, self.unit)} in a figure {width} wide{cut}"

    def write(self, paper, shift):
        """Write the footer at the foot of the page whose contents move by `shift`."""
        x, y = _MARGIN - shift[0], _MARGIN + self.height - 8 - shift[1]
        for text, bold in self.rows:
            paper.words(text, (x, y), (0, 1), bold=bold, backed=False)
            y -= words_size(text)[1] + 1.5
        if self.bar:
            self._draw_bar(paper, self.width - _MARGIN - shift[0], _MARGIN - shift[1])

    def _draw_bar(self, paper, right, y):
        """Draw a scale bar of two fields, each of a round length, its lower right corner at (right, y)."""
        step = max(m * 10.0 ** k for k in range(-6, 10) for m in (1, 2, 5) if m * 10.0 ** k * self.scale <= 54)
        end, w = f"{2 * step:g} {self.unit}", step * self.scale
        x = right - words_size(end)[0] / 2 - 2 * w
        paper.line([(x, y), (x + 2 * w, y), (x + 2 * w, y + 4), (x, y + 4), (x, y)])
        paper.area([(x, y), (x + w, y), (x + w, y + 4), (x, y + 4)], level=2)
        for place, text in enumerate(("0", f"{step:g}", end)):
            paper.words(text, (x + place * w, y + 5), (0.5, 0), backed=False)
