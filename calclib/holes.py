"""Holes in a flat element, and an angle laid flat, on which holes are placed by their gages.

The force acts along x. Lengths are plain numbers in one unit, in or mm. Messages count the holes from 1.
"""

import math
from dataclasses import dataclass

import numpy as np

from calclib.errors import CalcError

SAME = 1e-9     # of the size of the layout: closer coordinates are one coordinate, given with rounding


@dataclass(frozen=True)
class Hole:
    """A hole: centre, nominal dimensions, and what is added to them for damage [in or mm].

    width : nominal dimension across the force
    allowance : added to both dimensions in a net area (AISC: 1/16 in or 2 mm; EN: 0)
    length : nominal dimension along the force; None for a round hole
    fastener : whether a fastener in it takes load
    thickness : of the element at the hole; 1 gives results per unit of thickness
    """
    x: float
    y: float
    width: float
    allowance: float
    length: float | None = None
    fastener: bool = True
    thickness: float = 1.0

    @property
    def along(self):
        """Nominal dimension along the force."""
        return self.width if self.length is None else self.length

    @property
    def deduction(self):
        """What the hole takes from a net width."""
        return self.width + self.allowance

    @property
    def shear_deduction(self):
        """What the hole takes from a net length along the force."""
        return self.along + self.allowance


def name(i, hole):
    """Return how a message names the hole with index `i`."""
    return f"hole {i + 1} at x = {hole.x:g}, y = {hole.y:g}"


def check_holes(holes):
    """Refuse holes with impossible dimensions and holes that overlap."""
    for i, hole in enumerate(holes):
        for what in ("x", "y", "width", "along", "allowance", "thickness"):
            value = getattr(hole, what)
            low = {"x": -math.inf, "y": -math.inf, "allowance": 0.0}.get(what, math.ulp(0.0))
            if not (math.isfinite(value) and value >= low):
                raise CalcError(f"hole {i + 1}: {'length' if what == 'along' else what} is {value:g}; coordinates must "
                                "be numbers, dimensions positive, the allowance 0 or more.")
    if len(holes) > 1:
        clear = _clear_distances(holes)
        for i, j in np.argwhere(np.triu(clear <= 0, 1)).tolist():
            a, b = holes[i], holes[j]
            raise CalcError(f"{name(i, a)} and {name(j, b)} overlap: their centres are "
                            f"{math.hypot(a.x - b.x, a.y - b.y):g} apart, the clear distance is {clear[i, j]:g}.")


def _clear_distances(holes):
    """Return the clear distance of each pair of holes: slots have round ends and lie along or across the force."""
    x, y, along, width = (np.array([getattr(hole, what) for hole in holes], float)
                          for what in ("x", "y", "along", "width"))
    radius = np.minimum(along, width) / 2

    def gap(centre, size):
        half = size / 2 - radius
        return np.maximum(0.0, np.abs(centre[:, None] - centre) - (half[:, None] + half))

    return np.hypot(gap(x, along), gap(y, width)) - (radius[:, None] + radius)


@dataclass(frozen=True)
class FlatAngle:
    """An angle laid flat: y runs from the toe of leg 1 over the heel to the toe of leg 2 [in or mm].

    Gages count from the back of the heel, so that the gage between holes in the two legs is g_1 + g_2 - t and the width
    is b_1 + b_2 - t. Source: AISC 360-22 and 360-16 B4.3b; the width from older editions, from memory, verify.

    >>> angle = FlatAngle(b_1=6, b_2=4, t=0.375)
    >>> angle.width, angle.y(2, 2.5) - angle.y(1, 2.25)
    (9.625, 4.375)
    >>> angle.place(angle.y(1, 2.25)), angle.place(angle.y(2, 2.5))
    ((1, 2.25), (2, 2.5))
    """
    b_1: float
    b_2: float
    t: float

    def __post_init__(self):
        if not all(math.isfinite(v) and v > 0 for v in (self.b_1, self.b_2, self.t)) or self.t >= min(self.b_1,
                                                                                                     self.b_2):
            raise CalcError(f"an angle with legs {self.b_1:g} and {self.b_2:g} and thickness {self.t:g} is not "
                            "possible; the thickness must be positive and smaller than each leg.")

    @property
    def width(self):
        """Width of the angle laid flat."""
        return self.b_1 + self.b_2 - self.t

    def y(self, leg, gage):
        """Return where a gage in leg 1 or 2 lies on the flat strip."""
        if leg not in (1, 2):
            raise CalcError(f"an angle has leg 1 and leg 2, not leg {leg}.")
        b = self.b_1 if leg == 1 else self.b_2
        if not self.t < gage < b:
            raise CalcError(f"a gage of {gage:g} does not lie on leg {leg}, which reaches from {self.t:g} to {b:g} "
                            "from the back of the heel.")
        return self.b_1 - gage if leg == 1 else self.b_1 + gage - self.t

    def place(self, y):
        """Return (leg, gage) of a place on the flat strip; the legs meet at half the thickness."""
        return (1, self.b_1 - y) if y <= self.b_1 - self.t / 2 else (2, y - self.b_1 + self.t)
