"""The outline of a plate: where a line from a hole reaches its edge.

Lengths are plain numbers in one unit, in or mm.
"""

import math
from dataclasses import dataclass
from itertools import combinations

from calclib.errors import CalcError
from calclib.holes import SAME, name


@dataclass(frozen=True)
class Outline:
    """A closed polygon. Edge i runs from point i to the next; `held` names the edges welded to a support.

    points : corners (x, y) in order [in or mm]; the edges do not cross
    held : indices of edges through which no block can leave
    """
    points: tuple
    held: frozenset = frozenset()

    def __post_init__(self):
        object.__setattr__(self, "points", tuple((float(x), float(y)) for x, y in self.points))
        object.__setattr__(self, "held", frozenset(self.held))
        if len(self.points) < 3 or not all(math.isfinite(v) for point in self.points for v in point):
            raise CalcError("an outline needs at least three corners, each with two numbers.")
        unknown = sorted(self.held - set(range(len(self.points))))
        if unknown:
            raise CalcError(f"edge {unknown[0]} of the outline is said to be held; its edges are 0 to "
                            f"{len(self.points) - 1}.")
        for i, (a, b) in enumerate(self.edges):
            if a == b:
                raise CalcError(f"corner {i + 1} of the outline at x = {a[0]:g}, y = {a[1]:g} is given twice.")
        for (i, one), (j, two) in combinations(enumerate(self.edges), 2):
            beside = j - i in (1, len(self.points) - 1)
            if _cross(*one, *two) or (not beside and _distance(*one, *two) == 0):
                raise CalcError(f"edges {i + 1} and {j + 1} of the outline cross or touch; give its corners in order "
                                "around the plate.")

    @property
    def edges(self):
        """The two ends of each edge."""
        return tuple(zip(self.points, self.points[1:] + self.points[:1], strict=True))

    def contains(self, x, y):
        """Return whether a point lies inside."""
        return sum(at < x for at, _ in self._crossings(x, y, 0)) % 2 == 1

    def ray(self, x, y, axis, sign):
        """Return (coordinate, edge) where the line from a point inside along `axis`, up or down, first leaves."""
        k = "xy".index(axis)
        start = (x, y)[k]
        return min(((at, i) for at, i in self._crossings(x, y, k) if (at - start) * sign > 0),
                   key=lambda hit: (hit[0] - start) * sign)

    def _crossings(self, x, y, k):
        """Return (coordinate along axis k, edge) of every edge that the line through a point along axis k meets."""
        level = (x, y)[1 - k]
        found = []
        for i, (a, b) in enumerate(self.edges):
            if (a[1 - k] <= level) != (b[1 - k] <= level):
                found.append((a[k] + (b[k] - a[k]) * (level - a[1 - k]) / (b[1 - k] - a[1 - k]), i))
        return found

    def crossed_by(self, a, b):
        """Return whether the line between two points inside leaves the plate."""
        return any(_cross(a, b, *edge) for edge in self.edges)

    def check_inside(self, holes):
        """Refuse a hole that lies outside or breaks an edge."""
        for i, hole in enumerate(holes):
            if not self.contains(hole.x, hole.y):
                raise CalcError(f"{name(i, hole)} lies outside the plate.")
            radius = min(hole.width, hole.along) / 2
            half_x, half_y = hole.along / 2 - radius, hole.width / 2 - radius
            ends = (hole.x - half_x, hole.y - half_y), (hole.x + half_x, hole.y + half_y)
            for a, b in self.edges:
                clear = _distance(*ends, a, b) - radius
                if clear <= SAME * hole.width:
                    raise CalcError(f"{name(i, hole)} breaks the edge from ({a[0]:g}, {a[1]:g}) to ({b[0]:g}, {b[1]:g})"
                                    f": the clear distance is {clear:g}.")


def strip(width, length):
    """Return the outline of the end of a member: free end at x = 0, edges at y = 0 and y = `width` [in or mm].

    length : how far the plate reaches; it must reach beyond the holes, where the member goes on and is held
    """
    if not (math.isfinite(width) and width > 0 and math.isfinite(length) and length > 0):
        raise CalcError(f"a strip of width {width:g} and length {length:g} is not possible; both must be positive.")
    return Outline(((0, 0), (length, 0), (length, width), (0, width)), held={1})


def _side(a, b, p):
    return (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0])


def _cross(a, b, c, d):
    """Return whether two lines between points cross at a point inside both."""
    return _side(a, b, c) * _side(a, b, d) < 0 and _side(c, d, a) * _side(c, d, b) < 0


def _distance(a, b, c, d):
    """Return the distance of two lines between points."""
    if _cross(a, b, c, d):
        return 0.0
    return min(_to_line(a, c, d), _to_line(b, c, d), _to_line(c, a, b), _to_line(d, a, b))


def _to_line(p, a, b):
    dx, dy = b[0] - a[0], b[1] - a[1]
    length = dx * dx + dy * dy
    along = max(0.0, min(1.0, ((p[0] - a[0]) * dx + (p[1] - a[1]) * dy) / length)) if length else 0.0
    return math.hypot(p[0] - a[0] - along * dx, p[1] - a[1] - along * dy)
