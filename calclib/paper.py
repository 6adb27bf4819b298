"""Ink on paper: lines, areas, hatching and words placed in points, made into one picture.

The sketch and the charts stand on it. Every measure is a point (1/72 in) from an origin of the caller's choice, so a
drawing is true to scale and its words keep their size. Pens are black or grey: the picture must survive a copier.

Words are drawn as outlines of the DejaVu Sans that comes with matplotlib. So a picture is the same on every machine,
a box around words is exact, and matplotlib never reads them as a formula: text from people prints as itself.
A symbol such as d_h is asked for by name, with `Named`.

Nothing here touches pyplot or leaves a setting changed, so pictures may be made in several threads at once.
"""

import io
import math
from dataclasses import dataclass
from functools import lru_cache
from threading import RLock

import matplotlib
import numpy as np
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.backends.backend_svg import FigureCanvasSVG
from matplotlib.collections import LineCollection, PolyCollection
from matplotlib.figure import Figure
from matplotlib.font_manager import FontProperties, findfont, get_font
from matplotlib.patches import PathPatch
from matplotlib.path import Path
from matplotlib.textpath import text_to_path
from matplotlib.transforms import Affine2D
from PIL import Image

from calclib.drawing import Named

THIN, OBJECT, HEAVY = 0.5, 1.1, 2.2          # the three pens [pt]
POINTS = {"in": 72.0, "mm": 72.0 / 25.4}     # points in a unit of length
TEXT = 8.5                                   # height of ordinary words [pt]
_ASCENT, _DESCENT, _PITCH = 0.78, 0.24, 1.22  # of the text height: above and below the base line, and line to line
_RENDERING = RLock()                         # matplotlib's fonts and the figure's resolution serve one thread at a time


@dataclass(frozen=True)
class Spot:
    """A place a label may take: the point `anchor` of its box (0 to 1 across, up) at `at` [pt], turned by `angle`.

    `tail`: the line that leads to it there; `cost`: how many crossed lines it must save to be worth taking.
    """

    at: tuple
    anchor: tuple = (0.5, 0.5)
    angle: float = 0
    tail: tuple = ()
    cost: float = 0


class Words(PathPatch):
    """The outlines of one label; `text` is what it says and `box` the upright box around it [pt on the page]."""

    def __init__(self, path, text, box, transform):
        super().__init__(path, facecolor="black", edgecolor="none", linewidth=0, transform=transform)
        self.text, self.box = text, box


@lru_cache(8)
def _font(italic, bold):
    return FontProperties(family="DejaVu Sans", style="oblique" if italic else "normal",
                          weight="bold" if bold else "normal", size=10)


@lru_cache(1024)
def _outline(string, italic, bold):
    """Return (vertices, codes, advance) of a string of text height 1. Cached: a redraw repeats most of its words."""
    font = _font(italic, bold)
    with _RENDERING:
        glyphs = get_font(findfont(font))
        string = "".join(c if glyphs.get_char_index(ord(c)) else f"[U+{ord(c):04X}]" for c in string)
        stop = np.asarray(text_to_path.get_text_path(font, ".", ismath=False)[0])
        vertices, codes = text_to_path.get_text_path(font, string + ".", ismath=False)
    # The full stop measures the advance, which counts spaces at the end; its own outline is then dropped.
    vertices = np.asarray(vertices) / text_to_path.FONT_SCALE
    advance = vertices[:, 0].max() - stop[:, 0].max() / text_to_path.FONT_SCALE
    return vertices[:-len(stop)], np.asarray(codes)[:-len(stop)], advance


def _lines(label):
    """Return the lines of a label, each a list of (string, italic, size, rise)."""
    if not isinstance(label, Named):
        return [[(line, False, 1, 0)] for line in str(label).split("\n")]
    runs = [(label.before + " ", False, 1, 0)] if label.before else []
    for word in label.symbol.split():
        letter, _, below = word.partition("_")
        runs += [(letter, True, 1, 0)] + ([(below.strip("{}"), True, 0.72, -0.2)] if below else [])
    return [[*runs, (f" = {label.value}", False, 1, 0)] if label.value else runs]


@lru_cache(256)
def _compose(label, size, bold):
    """Return (vertices, codes, width, height) of a label whose box has its lower left corner at the origin [pt]."""
    vertices, codes, width = [np.empty((0, 2))], [np.empty(0, Path.code_type)], 0
    lines = _lines(label)
    for row, runs in enumerate(lines):
        x, base = 0.0, (_DESCENT + _PITCH * (len(lines) - 1 - row)) * size
        for string, italic, part, rise in runs:
            glyphs, code, advance = _outline(string, italic, bold)
            vertices.append(glyphs * size * part + (x, base + rise * size))
            codes.append(code)
            x += advance * size * part
        width = max(width, x)
    height = (_PITCH * (len(lines) - 1) + _ASCENT + _DESCENT) * size
    return np.concatenate(vertices), np.concatenate(codes), width, height


def words_size(label, size=TEXT, bold=False):
    """Return (width, height) of a label [pt]."""
    return _compose(label, size, bold)[2:]


def wrapped(label, width, size=TEXT, bold=False):
    """Return a label broken into lines of at most `width` [pt]; a word longer than that is cut. Symbols stay whole."""
    if isinstance(label, Named):
        return label
    def wide(text):
        return words_size(text, size, bold)[0]

    lines = []
    for paragraph in str(label).split("\n"):
        line, used = "", 0.0
        for word in paragraph.split(" "):
            length = wide(word)
            if line and used + wide(" ") + length <= width:
                line, used = f"{line} {word}", used + wide(" ") + length
                continue
            if line:
                lines.append(line)
            line, used = (word, length) if length <= width else ("", 0.0)
            for letter in word if length > width else "":
                if line and used + wide(letter) > width:
                    lines.append(line)
                    line, used = "", 0.0
                line, used = line + letter, used + wide(letter)
        lines.append(line)
    return "\n".join(lines)


def _turned(points, angle, at):
    if angle:
        c, s = math.cos(math.radians(angle)), math.sin(math.radians(angle))
        points = points @ np.array([(c, s), (-s, c)])
    return points + at


class Paper:
    """What is to be drawn, in points. Levels lie on top of one another; words lie on top of all."""

    def __init__(self):
        self._strokes, self._areas, self._words = {}, {}, []
        self._segments, self._boxes = [], []
        self._walls = None

    def line(self, points, pen=THIN, dash=(), grey=0.0, level=1, cost=None):
        """Draw a polyline. `dash`: strokes and gaps [pt]. `cost` of words across it: 1 for a thin pen, 3 for others."""
        points = np.asarray(points, float)
        self._strokes.setdefault((level, pen, tuple(dash), grey), []).append(points)
        cost = (1 if pen == THIN else 3) if cost is None else cost
        if cost:
            self._segments.append((points, cost))
            self._walls = None

    def area(self, points, grey=0.0, level=1):
        """Fill a polygon."""
        self._areas.setdefault((level, grey), []).append(np.asarray(points, float))

    def hatch(self, points, spacing=4.5, rising=True, grey=0.0, level=0):
        """Hatch a polygon at 45 degrees, lines `spacing` apart."""
        angle = -45 if rising else 45
        ring = _turned(np.asarray(points, float), angle, (0, 0))
        a, b = ring, np.roll(ring, -1, axis=0)
        for y in spacing * np.arange(math.ceil(ring[:, 1].min() / spacing), ring[:, 1].max() / spacing):
            crossed = (a[:, 1] <= y) != (b[:, 1] <= y)
            p, q = a[crossed], b[crossed]
            ends = np.sort(p[:, 0] + (y - p[:, 1]) / (q[:, 1] - p[:, 1]) * (q[:, 0] - p[:, 0]))
            for pair in zip(ends[::2], ends[1::2], strict=True):
                self.line(_turned(np.array([(x, y) for x in pair]), -angle, (0, 0)), THIN, (), grey, level, cost=0)

    def arrowhead(self, tip, toward, length=6.5, width=2.2):
        """Draw a slender filled head whose point is at `tip`, pointing along `toward`."""
        u = np.asarray(toward, float) / math.hypot(*toward)
        n = np.array((-u[1], u[0])) * width / 2
        back = np.asarray(tip, float) - u * length
        self.area([tip, back + n, back - n], level=3)

    def words(self, label, at, anchor=(0.5, 0.5), size=TEXT, angle=0, bold=False, backed=True):
        """Write a label with the point `anchor` of its box (0 to 1 across, up) at `at`; `backed`: on a white ground."""
        vertices, codes, w, h = _compose(label, size, bold)
        origin = -np.array(anchor) * (w, h)
        corners = _turned(np.array([(0, 0), (w, 0), (w, h), (0, h)]) + origin, angle, at)
        if backed:
            rim = _turned(np.array([(-1.5, 0), (w + 1.5, 0), (w + 1.5, h), (-1.5, h)]) + origin, angle, at)
            self.area(rim, grey=1.0, level=8)
        box = (*corners.min(axis=0), *corners.max(axis=0))
        self._words.append((_turned(vertices + origin, angle, at), codes, str(label), box))
        self._boxes.append(box)

    def crowding(self, box, margin=1.0):
        """Return how badly a box [pt] sits on what is drawn: 100 for each label under it, and the cost of each line."""
        x0, y0, x1, y1 = np.add(box, (-margin, -margin, margin, margin))
        score = sum(100 for a0, b0, a1, b1 in self._boxes if x0 < a1 and a0 < x1 and y0 < b1 and b0 < y1)
        if self._walls is None and self._segments:
            owner = np.repeat(np.arange(len(self._segments)), [len(line) - 1 for line, _ in self._segments])
            a, b = (np.concatenate([line[cut] for line, _ in self._segments]) for cut in (slice(-1), slice(1, None)))
            self._walls = *((a + b) / 2).T, *((b - a) / 2).T, owner
        if self._walls is None:
            return score
        mx, my, dx, dy, owner = self._walls   # middle and half length of every straight piece
        hx, hy, mx, my = (x1 - x0) / 2, (y1 - y0) / 2, mx - (x0 + x1) / 2, my - (y0 + y1) / 2
        # A piece meets the box unless their shadows part along x, along y or square to the piece.
        hit = ((np.abs(mx) <= hx + np.abs(dx)) & (np.abs(my) <= hy + np.abs(dy))
               & (np.abs(dx * my - dy * mx) <= hx * np.abs(dy) + hy * np.abs(dx)))
        return score + sum(self._segments[line][1] for line in set(owner[hit].tolist()))

    def place(self, label, spots, size=TEXT, bold=False, frame=None):
        """Write a label at the least crowded of `spots`, the first of equals, with its tail.

        `frame`: box [pt] to stay inside.
        """
        best = None
        w, h = words_size(label, size, bold)
        for spot in spots:
            origin = -np.array(spot.anchor) * (w, h)
            corners = _turned(np.array([(0, 0), (w, 0), (w, h), (0, h)]) + origin, spot.angle, spot.at)
            box = (*corners.min(axis=0), *corners.max(axis=0))
            out = frame and (box[0] < frame[0] or box[1] < frame[1] or box[2] > frame[2] or box[3] > frame[3])
            if out and best:
                continue
            score = 1000 if out else spot.cost + self.crowding(box)
            if best is None or score < best[0]:
                best = score, spot
            if score == 0:
                break
        spot = best[1]
        self.words(label, spot.at, spot.anchor, size, spot.angle, bold)
        if len(spot.tail):
            self.line(spot.tail, level=2)

    def extent(self):
        """Return the box (x0, y0, x1, y1) around everything drawn [pt]."""
        points = [np.reshape(box, (2, 2)) for box in self._boxes]
        points += [p for group in (*self._strokes.values(), *self._areas.values()) for p in group]
        every = np.concatenate(points)
        return (*every.min(axis=0), *every.max(axis=0))

    def figure(self, width, height, shift=(0, 0)):
        """Return the matplotlib Figure of width x height [pt], everything moved by `shift` [pt]."""
        figure = Figure((width / 72, height / 72), dpi=110, facecolor="white", edgecolor="none", linewidth=0,
                        layout="none")
        page = Affine2D().translate(*shift).scale(1 / 72) + figure.dpi_scale_trans

        def add(artist, level):
            # A user's style may shake lines or add effects to every artist; a drawing must not follow it.
            artist.set(zorder=level, sketch_params=None, path_effects=[], antialiased=True, snap=False)
            artist.set_clip_on(False)
            figure.add_artist(artist)

        for (level, grey), polygons in self._areas.items():
            add(PolyCollection(polygons, facecolors=[str(grey)], edgecolors="none", transform=page), level)
        for (level, pen, dash, grey), lines in self._strokes.items():
            style = (0, [d / pen for d in dash]) if dash else "solid"   # matplotlib counts dashes in line widths
            cap = "butt" if dash or pen == HEAVY else "projecting"      # so that the corners of an outline close
            add(LineCollection(lines, linewidths=pen, colors=[str(grey)], linestyles=[style], transform=page,
                               capstyle=cap, joinstyle="miter"), level + 0.5)
        for vertices, codes, text, box in self._words:
            add(Words(Path(vertices, codes), text, tuple(np.add(box, (*shift, *shift))), page), 9)
        return figure


def png(figure, dpi=110):
    """Return a grey PNG of the figure as bytes: the same bytes for the same drawing, with its true size inside."""
    with _RENDERING:
        kept = figure.dpi
        figure.dpi = dpi
        try:
            canvas = FigureCanvasAgg(figure)
            canvas.draw()
            grey = np.ascontiguousarray(np.asarray(canvas.buffer_rgba())[:, :, 0])   # red, green and blue are equal
        finally:
            figure.dpi = kept
    out = io.BytesIO()
    Image.fromarray(grey).save(out, format="png", dpi=(dpi, dpi), compress_level=4)
    return out.getvalue()


def svg(figure):
    """Return the figure as SVG text: the same text for the same drawing, words as outlines, no date and no author."""
    out = io.StringIO()
    with _RENDERING, matplotlib.rc_context({"svg.hashsalt": "calclib", "svg.fonttype": "path"}):
        FigureCanvasSVG(figure).print_svg(out, metadata={"Date": None, "Creator": None, "Type": None, "Format": None})
    return out.getvalue()
