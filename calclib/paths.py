"""Net section of a bolted tension element: every chain of holes from edge to edge, and the one that governs.

The element is a flat strip: a plate, or an angle laid flat. The force acts along x. The strip lies between y = 0 and
y = `width`; its free end is at small x and its body, which brings the load, at large x. Lengths are plain numbers in
one unit, in or mm; indices count the holes from 0 as they were given, messages count them from 1.

**Chain.** A chain visits holes in the order of y, never two with the same y: two holes in line with the force are not a
gage space. Its net width is width - sum of deductions + sum of s**2 / (4 g) over the hops between neighbours, with s
along and g across the force. From the first and the last hole it runs square to the edges. Source: AISC 360-22 and
360-16 B4.3b.

**Load share.** Cut the strip along a chain: what crosses the cut is what the fasteners on the free-end side take out.
A fastener on the body side has shed its load before the chain; one on the chain bears on the free-end side of its hole
and has not. So with N fasteners of equal load, of which m lie strictly on the body side, a chain carries (N - m) / N of
the load, and its equivalent area is its net area times N / (N - m). Source: common practice. A hole without a fastener
weakens a chain and takes no load. A chain that carries nothing is not a chain of the net section; with no fastener at
all (a misplaced hole in a welded member) every chain carries the full load.
"""

import math
from dataclasses import dataclass
from itertools import pairwise
from typing import NamedTuple

import numpy as np

from calclib.errors import CalcError
from calclib.holes import SAME, Hole, check_holes, name

__all__ = ["Chain", "Hole", "Stagger", "chains", "stagger_term"]


class Stagger(NamedTuple):
    """One inclined hop: pitch along the force, gage across it, s**2 / (4 g), and the smaller thickness of its ends."""
    s: float
    g: float
    term: float
    thickness: float


@dataclass(frozen=True)
class Chain:
    """One chain of holes.

    holes : indices in the order of y
    deduction : sum of what its holes take from the width
    stagger : its inclined hops; a hop square to the force adds nothing and is left out
    net_width : width - deduction + stagger terms
    net_area : the same with thicknesses
    shed : fasteners on the body side, whose load does not cross the chain
    share : part of the load that crosses the chain
    equivalent : net_area / share; the smallest governs
    points : the line to draw, (x, y) from edge to edge
    """
    holes: tuple
    deduction: float
    stagger: tuple
    net_width: float
    net_area: float
    shed: int
    share: float
    equivalent: float
    points: tuple


def stagger_term(s, g):
    """Return s**2 / (4 g) of one inclined hop, what the net width gains by it [in or mm].

    Parameters
    ----------
    s : pitch between the two holes along the force [in or mm], 0 or more
    g : gage between them across the force [in or mm], above 0

    Errors: s < 0; g not above 0, since two holes in line with the force are not a gage space.

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> stagger_term(s=3, g=3)
    0.75
    """
    if not s >= 0:
        raise CalcError(f"the pitch s of a hop is {s:g}; it must be 0 or more (B4.3b).")
    if not g > 0:
        raise CalcError(f"the gage g of a hop is {g:g}; two holes in line with the force are not a gage space (B4.3b).")
    return s**2 / (4 * g)


def chains(width, holes, k=5, gross_area=None, load_share=True):
    """Return the `k` chains of holes with the smallest equivalent area, the governing one first.

    Parameters
    ----------
    width : width of the strip, laid flat [in or mm], positive
    holes : the holes, each a `Hole`; without any, the one chain is the gross section
    k : how many chains to return; fewer if there are not so many
    gross_area : where the holes lie in parts of unequal thickness, the gross area [in2 or mm2]; None: width times the
        one thickness
    load_share : False lets every chain carry the full load

    The search is exact over all chains. A chain that runs over a hole without counting it is listed only where counting
    that hole would make the chain stronger.

    Errors: a dimension that is not a positive number, a hole that breaks an edge, holes that overlap, a chain that
    leaves no net area.

    >>> row = [Hole(x=2, y=y, width=13/16, allowance=1/16) for y in (1.5, 4.5)]
    >>> chains(6, row)[0].net_width
    4.25
    """
    _check_strip(width, holes)
    if not (isinstance(k, int) and k >= 1):
        raise CalcError(f"the number of chains to list is {k}; it must be a whole number from 1.")
    area = _gross_area(width, holes, gross_area)
    if not holes:
        return [Chain((), 0.0, (), width, area, 0, 1.0, area, ((0.0, 0.0), (0.0, width)))]
    layout = _Layout(width, holes)
    count = sum(hole.fastener for hole in holes) if load_share else 0
    found = [layout.chain(nodes, shed, count, area) for nodes, shed in _k_best(*_links(layout, area, count), count, k)]
    found.sort(key=lambda chain: (float(f"{chain.equivalent:.12g}"), chain.shed, len(chain.holes), chain.holes))
    for chain in found:
        if chain.net_area <= SAME * area or chain.net_width <= SAME * width:
            raise CalcError(f"no net section is left on the chain through {_names(chain.holes, holes)}: the holes "
                            f"deduct {chain.deduction:g} from a width of {width:g} (B4.3b); use fewer holes in line "
                            "or a wider element.")
    return found


class _Layout:
    """The holes in the order of y, between a first node for the edge y = 0 and a last node for the other edge."""

    def __init__(self, width, holes):
        self.width, self.holes = width, holes
        tolerance = SAME * max(width, *(abs(hole.x) for hole in holes))
        x, y = (_snapped([getattr(hole, name) for hole in holes], tolerance) for name in "xy")
        self.order = sorted(range(len(holes)), key=lambda i: (y[i], x[i]))
        self.x, self.y = (np.array([0.0, *(v[i] for i in self.order), 0.0]) for v in (x, y))
        self.y[0], self.y[-1] = -np.inf, np.inf
        self.tolerance = tolerance

    def column(self, name, at_edges=0.0):
        """Return one attribute of the holes, in the order of the nodes."""
        return np.array([at_edges, *(getattr(self.holes[i], name) for i in self.order), at_edges], float)

    def chain(self, nodes, shed, count, gross_area):
        """Return the chain through `nodes`, computed term by term."""
        indices = tuple(self.order[node - 1] for node in nodes)
        holes = [self.holes[i] for i in indices]
        hops = []
        for a, b in pairwise(zip(nodes, holes, strict=True)):
            s, g = abs(float(self.x[b[0]] - self.x[a[0]])), float(self.y[b[0]] - self.y[a[0]])
            if s > 0:
                hops.append(Stagger(s, g, stagger_term(s, g), min(a[1].thickness, b[1].thickness)))
        deduction = math.fsum(hole.deduction for hole in holes)
        net_width = math.fsum([self.width, -deduction, *(hop.term for hop in hops)])
        net_area = math.fsum([gross_area, *(-hole.deduction * hole.thickness for hole in holes),
                              *(hop.term * hop.thickness for hop in hops)])
        share = (count - shed) / count if count else 1.0
        ends = (holes[0].x, 0.0), (holes[-1].x, self.width)
        points = (ends[0], *((hole.x, hole.y) for hole in holes), ends[1])
        return Chain(indices, deduction, tuple(hops), net_width, net_area, shed, share, net_area / share, points)


def _links(layout, area, count):
    """Return, for each pair of nodes, the net area and the shed fasteners that the hop from one to the other adds.

    Both are sums over the hops of a chain, which is what makes the search exact: the fasteners that a hop sheds are
    those between its ends and those level with its far end. A pair that is no hop costs infinity.
    """
    x, y = layout.x, layout.y
    last = len(x) - 1
    hop = y[:, None] < y[None, :]
    hop[0, last] = False                            # a chain passes through at least one hole
    tail, head = np.nonzero(hop)
    inner = (tail > 0) & (head < last)
    start = np.where(tail == 0, head, tail)         # the ends of a chain are square to the edge
    with np.errstate(invalid="ignore"):
        slope = np.where(inner, (x[head] - x[tail]) / (y[head] - y[tail]), 0.0)
    thickness = layout.column("thickness")
    cost = np.full((last + 1, last + 1), np.inf)
    cost[tail, head] = (np.where(tail == 0, area, 0.0) - (layout.column("deduction") * thickness)[head]
                        + np.minimum(thickness[tail], thickness[head]) * slope * np.where(inner, x[head] - x[tail], 0)
                        / 4)

    # Of every node b, for every hop: whether it lies between the ends, and how far on the body side of the hop
    b = np.arange(1, last)
    between = (y[tail][:, None] < y[b]) & (y[b] < y[head][:, None])
    beyond = x[b] - (x[start][:, None] + slope[:, None] * (y[b] - y[start][:, None]))
    level = (y[:, None] == y[None, b]) & (x[None, b] > x[:, None])
    fastener = layout.column("fastener")[b].astype(bool) & (count > 0)
    shed = np.zeros(cost.shape, int)
    shed[tail, head] = (((between & (beyond > layout.tolerance)) & fastener).sum(axis=1)
                        + (level & fastener).sum(axis=1)[head])

    over = between & (beyond**2 < (layout.column("along")[b] / 2) ** 2      # a hole, taken as an ellipse
                      + (slope[:, None] * layout.column("width")[b] / 2) ** 2)
    run, by = np.nonzero(over)
    _leave_out(cost, shed, tail[run], head[run], b[by], SAME * area)
    return cost, shed, y


def _leave_out(cost, shed, a, c, b, tolerance):
    """Drop each hop from a to c that runs over hole b where going by way of b neither gains area nor sheds more.

    The chain by way of b then governs over the chain without it, whatever the rest of the chain, so nothing is lost.
    """
    worse = (cost[a, b] + cost[b, c] <= cost[a, c] + tolerance) & (shed[a, b] + shed[b, c] <= shed[a, c])
    cost[a[worse], c[worse]] = np.inf


def _k_best(cost, shed, y, count, k):
    """Return [(nodes, shed)] of the k chains with the smallest net area times N / (N - m).

    Dynamic programming over (node, fasteners shed so far), each with its k smallest net areas: for one number of shed
    fasteners the share is the same, so a chain among the k best overall has only such chains as its beginnings.
    Ties go to the first in order, on every machine alike.
    """
    last, columns = len(y) - 1, max(count, 1)       # a chain that has shed all the fasteners carries nothing
    best = np.full((last + 1, columns + 1, k), np.inf)      # the extra column stands for "not possible"
    back = np.zeros((last + 1, columns, k), int)
    best[0, 0, 0] = 0.0
    edges = [*(np.nonzero(np.diff(y))[0] + 1), last + 1]
    for first, end in pairwise(edges):
        before = np.arange(first)[:, None, None]
        column = np.arange(columns) - shed[:first, first:end, None]
        candidates = best[before, np.where(column < 0, columns, column)] + cost[:first, first:end, None, None]
        candidates = candidates.transpose(1, 2, 0, 3).reshape(end - first, columns, first * k)
        for rank in range(k):
            choice = candidates.argmin(axis=2)[..., None]
            best[first:end, :columns, rank] = np.take_along_axis(candidates, choice, 2)[..., 0]
            back[first:end, :, rank] = choice[..., 0]
            np.put_along_axis(candidates, choice, np.inf, 2)
    factor = columns / (columns - np.arange(columns))
    equivalent = (best[last, :columns] * factor[:, None]).ravel()
    found = []
    for at in np.argsort(equivalent, kind="stable")[:k]:
        if np.isfinite(equivalent[at]):
            found.append((_walk_back(back, shed, last, *divmod(int(at), k)), int(at) // k))
    return found


def _walk_back(back, shed, node, column, rank):
    nodes = []
    while True:
        before, before_rank = divmod(int(back[node, column, rank]), back.shape[2])
        if before == 0:
            return nodes[::-1]
        nodes.append(before)
        node, column, rank = before, column - int(shed[before, node]), before_rank


def _snapped(values, tolerance):
    """Return `values` with those that differ only by rounding made equal."""
    snapped = dict.fromkeys(values)
    base = -math.inf
    for value in sorted(snapped):
        base = value if value - base > tolerance else base
        snapped[value] = base
    return [snapped[value] for value in values]


def _gross_area(width, holes, gross_area):
    thicknesses = {hole.thickness for hole in holes} or {1.0}
    if gross_area is None:
        if len(thicknesses) > 1:
            raise CalcError("the holes lie in parts of unequal thickness "
                            f"({', '.join(f'{t:g}' for t in sorted(thicknesses))}); give the gross area.")
        return width * thicknesses.pop()
    if not (math.isfinite(gross_area) and gross_area > 0):
        raise CalcError(f"the gross area is {gross_area:g}; it must be a positive number.")
    return gross_area


def _check_strip(width, holes):
    if not (math.isfinite(width) and width > 0):
        raise CalcError(f"the width is {width:g}; it must be a positive number.")
    check_holes(holes)
    for i, hole in enumerate(holes):
        for edge, clear in ((0.0, hole.y), (width, width - hole.y)):
            if clear - hole.width / 2 <= SAME * width:
                raise CalcError(f"{name(i, hole)} breaks the edge y = {edge:g}: its centre is {clear:g} from the edge, "
                                f"half its width is {hole.width / 2:g}.")


def _names(indices, holes):
    return "; ".join(name(i, holes[i]) for i in indices)
