"""Charts of strength against one input, and against the sizes of a series; black ink, every line named where it ends.

Both are drawn on `calclib.paper`, in points, for a page 6.5 in wide and for a notebook. A text is a `str`, which prints
as itself, or `Named("P_u", "24.00 kip", "required")`, which prints a symbol.

NaN means that no number exists there. A member one of whose limit states has no number has no strength, so the
governing line stops where any curve is NaN. A limit state that does not limit is infinite: named, but never drawn.
"""

import math
from dataclasses import dataclass

import numpy as np

from calclib import units
from calclib.errors import nearest
from calclib.paper import HEAVY, OBJECT, THIN, Named, Paper, Spot, png, svg, words_size, wrapped

__all__ = ["Handover", "Named", "handover_points", "png", "sensitivity_figure", "series_figure", "svg"]

_SMALL = 8.0            # height of numbers on an axis and of names at the lines [pt]
_CURVE = 1.0            # pen of one limit state [pt]
_DASHES = ((), (6, 2.5), (1.2, 2), (9, 2, 1.2, 2), (3, 1.5), (9, 2, 1.2, 2, 1.2, 2), (15, 3), (5, 2, 5, 2, 1.2, 2))
_MARKS = ("disc", "ring", "square", "diamond", "box", "triangle")
_INCH_STEPS = (1 / 64, 1 / 32, 1 / 16, 1 / 8, 1 / 4, 1 / 2, 1, 2, 4, 8, 12, 24, 48, 96)
_SAMPLE = 16            # length of the piece of line in front of a name [pt]
_NAME = 96              # a name at a line is broken into lines of this width [pt]
_NOTHING = "no strength exists"


@dataclass(frozen=True)
class Handover:
    """Where one limit state stops governing and another starts."""

    x: float
    y: float
    before: str
    after: str


def sensitivity_figure(x_label, x, curves, required=None, present=None, *, beside=None, envelope=True, ticks=None,
                       handovers=True, y_label="Available strength (kip)", unusable=(), x_format=None,
                       required_label=None, present_label=None, size=(6.5, 3.2)):
    """Return a Figure of strengths against one input, the governing one drawn heavy.

    Parameters
    ----------
    x : rising values of the input, one or more
    curves : name of a limit state -> available strength at each x; NaN: none exists, inf: it does not limit
    beside : curves drawn for comparison, which never govern
    required, required_label : the required strength, and how it is written
    present, present_label : the input as it is; one of `x`, so that the dot on the governing line was computed
    envelope, handovers : draw the least strength; mark and name where another limit state starts to govern
    ticks : list of (x, text), standard sizes in place of a number scale; as many are written as fit
    unusable : list of (low, high, reason): ranges in which no number exists
    x_format : "inch" for fractions of an inch, "mm" or None for decimals
    size : width and height [in]

    Raises
    ------
    ValueError : the arrays do not match, `present` is not one of `x`, or a strength stands inside an unusable range.
    """
    x, values = _checked(x, curves)
    drawn = values | (_checked(x, beside)[1] if beside else {})
    if len(drawn) < len(values) + len(beside or ()):
        raise ValueError("A curve for comparison has the name of a limit state.")
    at = _index(x, present)
    found = handover_points(x, values)
    line_x = np.union1d(x, [handover.x for handover in found])
    least = _least(line_x, x, values.values())
    regions = _regions(x, np.isnan(list(values.values())).any(axis=0), unusable)
    matters = [*least[np.isfinite(least)], *([] if required is None else [required])]
    chart = _Chart(x_label, y_label, x, drawn, matters, ticks, x_format, size, present)
    for low, high, _ in regions:
        chart.region(low, high)
    for (name, y), dash in zip(drawn.items(), _dashes(len(drawn)), strict=True):
        chart.curve(name, x, y, dash)
    governs = envelope and chart.line(line_x, least, HEAVY) is not None
    chart.name_curves()
    chart.required(required, required_label)
    if at is not None:
        strength = _least(x[at], x, values.values()) if envelope else math.nan
        chart.present((x[at], strength), present_label or f"present {_number(x[at], x_format)}")
    for handover in found if governs and handovers else ():
        chart.handover(handover)
    for region in regions:
        chart.reason(*region)
    if governs:
        chart.key("governs (least of all)")
    return chart.figure()


def series_figure(x_label, series, required=None, present=None, *, ticks=None, y_label="Available strength (kip)",
                  x_format=None, required_label=None, present_label=None, size=(6.5, 3.2)):
    """Return a Figure of strengths at the sizes of several series, such as threads: a mark for each size.

    `series`: name -> (sizes, strengths); a NaN strength has no mark. `present`: (name, size), one of those given.
    The rest is as in `sensitivity_figure`. The lines only join marks: between two sizes there is nothing.
    """
    checked = {}
    for name, (x, y) in series.items():
        x, values = _checked(x, {name: y})
        checked[name] = x, values[name]
    if not checked:
        raise ValueError("There is no series to draw.")
    every = np.unique(np.concatenate([x for x, _ in checked.values()]))
    strengths = {name: y for name, (_, y) in checked.items()}
    matters = [v for y in strengths.values() for v in y[np.isfinite(y)]] + ([] if required is None else [required])
    chart = _Chart(x_label, y_label, every, strengths, matters, ticks, x_format, size, present and present[1])
    for number, ((name, (x, y)), dash) in enumerate(zip(checked.items(), _dashes(len(checked)), strict=True)):
        chart.curve(name, x, y, dash, _MARKS[number % len(_MARKS)])
    chart.name_curves()
    chart.required(required, required_label)
    if present is not None:
        name, value = present
        if name not in checked:
            raise ValueError(f'There is no series "{name}"{nearest(name, checked)}')
        x, y = checked[name]
        at = _index(x, value)
        chart.present((x[at], y[at]), present_label or f"present {_number(x[at], x_format)}", circled=True)
    return chart.figure()


def handover_points(x, curves):
    """Return the list of `Handover` along x, where the least of `curves` (name -> array) changes its name.

    The place is where straight lines between the computed points cross. Equal curves do not hand over to each other.

    >>> handover_points(np.array([0.0, 2.0]), {"yield": np.array([1.0, 5.0]), "rupture": np.array([3.0, 3.0])})
    [Handover(x=1.0, y=3.0, before='yield', after='rupture')]
    """
    names, y = list(curves), np.array(list(curves.values()), float)
    found, governing = [], None
    for i in range(len(x)):
        least = int(np.argmin(y[:, i]))                     # NaN comes before every number
        if not np.isfinite(y[least, i]):
            least = None
        elif governing is not None:
            if y[least, i] < y[governing, i] * (1 - 1e-9):
                apart = y[least, i - 1] - y[governing, i - 1], y[governing, i] - y[least, i]
                part = apart[0] / sum(apart) if np.isfinite(apart).all() else 1.0
                here = float(x[i - 1] + part * (x[i] - x[i - 1]))
                found.append(Handover(here, _least(here, x, y), names[governing], names[least]))
            else:
                least = governing
        governing = least
    return found


def _least(at, x, curves):
    """Return the least of the curves at `at`, on straight lines between the computed points; NaN wins."""
    lowest = np.min([np.interp(at, x, y) for y in curves], axis=0)
    return lowest if np.ndim(at) else float(lowest)


def _checked(x, curves):
    """Return x and the curves as arrays of floats that belong together."""
    x = np.asarray(x, float)
    if x.ndim != 1 or not len(x) or not np.isfinite(x).all() or (np.diff(x) <= 0).any():
        raise ValueError("x must be one or more finite values that rise.")
    if not curves:
        raise ValueError("There is no curve to draw.")
    values = {name: np.asarray(y, float) for name, y in curves.items()}
    for name, y in values.items():
        if y.shape != x.shape:
            raise ValueError(f"{name}: {y.size} strengths for {x.size} values of x.")
        if np.isneginf(y).any():
            raise ValueError(f"{name}: a strength is minus infinity.")
    return x, values


def _index(x, present):
    """Return where `present` stands in x; None for None."""
    if present is None:
        return None
    at = int(np.argmin(np.abs(x - present)))
    if not math.isclose(x[at], present, rel_tol=1e-9):
        raise ValueError(f"present = {present:g} is not one of x; add it, so that the dot on the line is a computed "
                         "strength.")
    return at


def _regions(x, missing, unusable):
    """Return the (low, high, reason) to shade: those given, and what is missing besides."""
    regions = [(max(low, x[0]), min(high, x[-1]), reason) for low, high, reason in unusable
               if low <= x[-1] and high >= x[0]]
    inside = np.zeros(len(x), bool)
    for low, high, reason in regions:
        if (~missing & (x > low) & (x < high)).any():
            raise ValueError(f'A strength is given inside the range {low:g} to {high:g}, where none is said to exist: '
                             f'"{reason}".')
        inside |= (x >= low) & (x <= high)
    start = None
    for i, bare in enumerate([*(missing & ~inside), False]):
        if bare and start is None:
            start = i
        elif not bare and start is not None:
            regions.append((x[max(start - 1, 0)], x[min(i, len(x) - 1)], _NOTHING))
            start = None
    return regions


def _dashes(count):
    """Return a dash pattern for each of `count` curves."""
    if count > len(_DASHES):
        raise ValueError(f"{count} curves cannot be told apart in black and white; draw at most {len(_DASHES)}.")
    return _DASHES[:count]


def _steps(low, high, most):
    """Return round numbers from at or below `low` to at or above `high`, about `most` of them at the most."""
    rough = (high - low) / most
    scale = 10.0 ** math.floor(math.log10(rough))
    step = next(m * scale for m in (1, 2, 2.5, 5, 10) if m * scale >= rough * (1 - 1e-9))
    return step * np.arange(math.floor(low / step + 1e-9), math.ceil(high / step - 1e-9) + 1)


def _number(value, x_format):
    """Return how a value on the x axis is written."""
    return units.text(value, units.LENGTH, units.US).removesuffix(" in") if x_format == "inch" else f"{value:.10g}"


def _y_numbers(values, matters):
    """Return the numbers on the y axis. Curves far above what `matters` are cut off, so that it stays clear."""
    finite = np.concatenate([[v for v in y if np.isfinite(v)] for y in values] + [matters])
    if not len(finite):
        return np.array([0.0, 1.0])
    high = min(finite.max(), 2.2 * max(matters, default=math.inf))
    low = finite.min()
    low = 0.0 if 0 <= low < 0.6 * high or low == high else low - 0.15 * (high - low)
    return _steps(low, high + 0.06 * (high - low) or 1.0, 6)


class _Chart:
    """Axes laid out in points: `frame` is (left, bottom, right, top) of the area for the lines."""

    def __init__(self, x_label, y_label, x, curves, matters, ticks, x_format, size, present=None):
        self.paper, self.size, self.ends = Paper(), (size[0] * 72, size[1] * 72), []
        pad = 0 if len(x) > 1 else abs(x[0]) * 0.1 or 1.0
        self.low, self.high = x[0] - pad, x[-1] + pad
        y = _y_numbers(curves.values(), matters)
        self.bottom, self.top = y[0], y[-1]
        self.names = {name: wrapped(self._named(name, values), _NAME, _SMALL) for name, values in curves.items()}
        name_width = max(words_size(name, _SMALL)[0] for name in self.names.values())
        numbers = [f"{v:.10g}" for v in y]
        number_width = max(words_size(text, _SMALL)[0] for text in numbers)
        self.frame = (number_width + 26, 33, self.size[0] - name_width - _SAMPLE - 20, self.size[1] - 18)
        left, bottom, right, top = self.frame
        for value, text in zip(y, numbers, strict=True):
            at = self.on_paper(self.low, value)
            self.paper.line([at, (right, at[1])], THIN, grey=0.8, level=-1, cost=0)
            self.paper.line([at, (left - 3.5, at[1])])
            self.paper.words(text, (left - 6, at[1]), (1, 0.5), _SMALL, backed=False)
        self.paper.line([(left, top), (left, bottom), (right, bottom)])
        self._x_axis(x_format, ticks, present)
        x_label, y_label = wrapped(x_label, right - left), wrapped(y_label, top - bottom + 20)
        self.paper.words(x_label, ((left + right) / 2, 3), (0.5, 0), backed=False)
        self.paper.words(y_label, (4, (bottom + top) / 2), (0.5, 1), angle=90, backed=False)

    def _named(self, name, values):
        """Return the name of a curve, with the reason where its end is not to be seen."""
        numbers = values[~np.isnan(values)]
        if not len(numbers):
            return f"{name} ({_NOTHING})"
        if np.isposinf(numbers).all():
            return f"{name} (does not limit)"
        return f"{name} (above {self.top:.10g})" if numbers[-1] > self.top else name

    def _x_axis(self, x_format, ticks, present):
        span = self.high - self.low
        if ticks is None and x_format == "inch":
            step = next((s for s in _INCH_STEPS if span / s <= 9), span / 8)
            ticks = [(v, None) for v in step * np.arange(math.ceil(self.low / step), self.high / step + 1e-9)]
        elif ticks is None:
            ticks = [(v, None) for v in _steps(self.low, self.high, 8)]
        inside = [tick for tick in ticks if self.low - span * 1e-9 <= tick[0] <= self.high + span * 1e-9]
        taken = []
        # The size in use is written first, the others from left to right where they still fit.
        for value, text in sorted(inside, key=lambda tick: (tick[0] != present, tick[0])):
            text = _number(value, x_format) if text is None else text
            at, half = self.on_paper(value, self.bottom), words_size(text, _SMALL)[0] / 2
            low, high = at[0] - half, at[0] + half
            room = low > 2 and high < self.size[0] - 2 and all(high + 5 <= a or b + 5 <= low for a, b in taken)
            self.paper.line([at, (at[0], at[1] - (5 if room else 2.5))])
            if room:
                self.paper.words(text, (at[0], at[1] - 7), (0.5, 1), _SMALL, backed=False)
                taken.append((low, high))

    def on_paper(self, x, y):
        left, bottom, right, top = self.frame
        return np.array((left + (x - self.low) / (self.high - self.low) * (right - left),
                         bottom + (y - self.bottom) / (self.top - self.bottom) * (top - bottom)))

    def line(self, x, y, pen, dash=(), level=2):
        """Draw the pieces of a line that have numbers and lie below the top; return the last point drawn, or None."""
        pieces, piece, points = [], [], list(zip(x, y, strict=True))
        for i, point in enumerate(points):
            for end in self._cut(points[i - 1], point) if i else ():
                piece.append(end)
            if np.isfinite(point[1]) and point[1] <= self.top:
                piece.append(point)
            elif piece:
                pieces.append(piece)
                piece = []
        ends = [[self.on_paper(*point) for point in piece] for piece in (*pieces, piece) if piece]
        for piece in ends:
            if len(piece) > 1:
                self.paper.line(piece, pen, dash, level=level, cost=3)
            else:
                self.mark(piece[0], "disc", 1.2 + pen / 2)
        return ends[-1][-1] if ends else None

    def _cut(self, a, b):
        """Return where the straight line from a to b leaves or enters through the top, if it does."""
        if not np.isfinite([a[1], b[1]]).all() or (a[1] <= self.top) == (b[1] <= self.top):
            return []
        return [(a[0] + (self.top - a[1]) / (b[1] - a[1]) * (b[0] - a[0]), self.top)]

    def curve(self, name, x, y, dash, mark=None):
        """Draw a limit state or a series, and keep its end for its name."""
        end = self.line(x, y, _CURVE, dash)
        for point in zip(x, y, strict=True) if mark else ():
            if np.isfinite(point[1]) and point[1] <= self.top:
                self.mark(self.on_paper(*point), mark)
        self.ends.append((self.names[name], end, dash, mark))

    def mark(self, at, kind, r=2.6):
        """Draw a mark of half width r [pt] at a point."""
        corners = {"square": 4, "box": 4, "diamond": 4, "triangle": 3}.get(kind, 24)
        turn = {"square": 45, "box": 45, "triangle": 90}.get(kind, 0)
        angle = np.radians(turn + np.linspace(0, 360, corners + 1))
        ring = np.asarray(at) + r * (1.25 if corners < 5 else 1) * np.column_stack([np.cos(angle), np.sin(angle)])
        if kind != "circle":
            self.paper.area(ring, 1.0 if kind in ("ring", "box") else 0.0, level=5)
        self.paper.line(ring, OBJECT * 0.8, level=5)

    def name_curves(self):
        """Write the names right of the frame, each by its line's end, moved apart where they would touch."""
        rows = sorted(self.ends, key=lambda row: self.frame[3] if row[1] is None else row[1][1])
        wanted = [self.frame[3] if end is None else end[1] for _, end, _, _ in rows]
        heights = [words_size(name, _SMALL)[1] + 3 for name, *_ in rows]
        if sum(heights) > self.size[1] - 4:
            raise ValueError("The names of the curves need more than the height of the figure; shorten them.")
        right, start = self.frame[2], self.frame[2] + 12
        for y, (name, end, dash, mark) in zip(_apart(wanted, heights, 2, self.size[1] - 2), rows, strict=True):
            if end is not None:
                self.paper.line([end, (right + 2, end[1]), (start, y)], grey=0.45)
            self.paper.line([(start, y), (start + _SAMPLE, y)], _CURVE, dash)
            if mark:
                self.mark((start + _SAMPLE / 2, y), mark)
            self.paper.words(name, (start + _SAMPLE + 3, y), (0, 0.5), _SMALL)

    def required(self, value, label):
        """Draw the required strength across the frame and write it along its line."""
        if value is None:
            return
        a, b = self.on_paper(self.low, value), self.on_paper(self.high, value)
        self.paper.line([a, b], OBJECT, (10, 3), level=3)
        label = f"required {value:g}" if label is None else label
        spots = [Spot(a + (b - a) * along + np.array((0, gap)), (along, up)) for along in (0.02, 0.98, 0.25, 0.5, 0.75)
                 for gap, up in ((2.5, 0), (-2.5, 1))]
        self.paper.place(label, spots, frame=self.frame)

    def present(self, point, label, circled=False):
        """Draw the input as it is: a line, its name over the frame, and a dot on the strength if there is one."""
        low, high = self.on_paper(point[0], self.bottom), self.on_paper(point[0], self.top)
        self.paper.line([low, high], OBJECT, (2, 2), level=3)
        width = words_size(label, bold=True)[0]
        centre = min(max(low[0], 2 + width / 2), self.size[0] - 2 - width / 2)
        self.paper.words(label, (centre, high[1] + 4), (0.5, 0), bold=True)
        if np.isfinite(point[1]) and circled:
            self.mark(self.on_paper(*point), "circle", 6)
        elif np.isfinite(point[1]):
            self.mark(self.on_paper(*point), "disc", 3.4)

    def key(self, text):
        """Say what the heavy line means, over the frame where there is room."""
        left, _, right, top = self.frame
        width = words_size(text, _SMALL)[0]
        for x in (left + 24, right - width, (left + right) / 2):
            if not self.paper.crowding((x - 24, top + 6, x + width, top + 13)):
                self.paper.line([(x - 24, top + 9), (x - 4, top + 9)], HEAVY)
                self.paper.words(text, (x, top + 9), (0, 0.5), _SMALL)
                return

    def handover(self, handover):
        """Mark where another limit state starts to govern, and name both."""
        at = self.on_paper(handover.x, handover.y)
        self.mark(at, "ring", 2.8)
        label = wrapped(f"{handover.before} → {handover.after}", 150, _SMALL)
        spots = []
        for reach in (7, 16, 28, 42, 60):
            for right, up in ((0, -1), (0, 1), (1, -1), (-1, -1), (1, 1), (-1, 1), (1, 0), (-1, 0)):
                way = np.array((right, up)) * reach
                tail = (at + way * (3 / reach), at + way) if reach > 7 else ()
                spots.append(Spot(at + way, (0.5 - right / 2, 0.5 - up / 2), tail=tail, cost=reach / 20))
        self.paper.place(label, spots, _SMALL, frame=self.frame)

    def region(self, low, high):
        """Hatch a range of x in which no number exists."""
        (left, bottom), (right, top) = self.on_paper(low, self.bottom), self.on_paper(high, self.top)
        if low == high:
            left, right = max(left - 3, self.frame[0]), min(right + 3, self.frame[2])
        self.paper.hatch([(left, bottom), (right, bottom), (right, top), (left, top)], 6, grey=0.55, level=-1)
        for x in (left, right):
            self.paper.line([(x, bottom), (x, top)], THIN, grey=0.35)

    def reason(self, low, high, text):
        """Write why a range of x has no number: level if it is wide enough, else upright."""
        (left, bottom), (right, top) = self.on_paper(low, self.bottom), self.on_paper(high, self.top)
        angle = 0 if right - left > 90 else 90
        text = wrapped(text, min(right - left - 10, 170) if not angle else top - bottom - 10, _SMALL)
        across = words_size(text, _SMALL)[angle // 90]
        slack = max(right - left - across - 10, 0) / 2
        middle = min(max((left + right) / 2, self.frame[0] + across / 2 + 2), self.frame[2] - across / 2 - 2)
        spots = [Spot((middle + slack * aside, bottom + (top - bottom) * up), angle=angle)
                 for up in (0.5, 0.7, 0.3, 0.85, 0.15) for aside in (0, 0.7, -0.7)]
        self.paper.place(text, spots, _SMALL, frame=self.frame)

    def figure(self):
        return self.paper.figure(*self.size)


def _apart(wanted, heights, low, high):
    """Return places near the rising `wanted` for boxes of these heights, so that none overlap, from low to high."""
    groups = []                                             # [first, last + 1, place of its lower end]
    for i in range(len(wanted)):
        group = [i, i + 1, 0.0]
        while True:
            members = range(group[0], group[1])
            total = sum(heights[k] for k in members)
            below = [sum(heights[group[0]:k]) + heights[k] / 2 for k in members]
            group[2] = sum(wanted[k] - b for k, b in zip(members, below, strict=True)) / len(below)
            group[2] = max(low, min(group[2], high - total))
            if not groups or groups[-1][2] + sum(heights[groups[-1][0]:groups[-1][1]]) <= group[2] + 1e-9:
                break
            group[0] = groups.pop()[0]
        groups.append(group)
    return [bottom + sum(heights[first:k]) + heights[k] / 2
            for first, last, bottom in groups for k in range(first, last)]
