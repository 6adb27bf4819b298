"""The search for the governing chain against a plain enumeration of all chains, and what it refuses."""

import math
from itertools import combinations, pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from calclib.errors import CalcError
from calclib.holes import FlatAngle
from calclib.paths import Hole, chains, stagger_term

WIDTH = 18.0


def hole(x, y, **more):
    return Hole(x, y, 13 / 16, 1 / 16, **more)


def grid(rows, lines, stagger=0.0):
    return [hole(3 * row + stagger * (line % 2), 1.5 + 3 * line) for line in range(lines) for row in range(rows)]


# The enumeration: every subset of holes, its net area and its load share from first principles.

def net_area(holes, chain, gross):
    area = gross - sum(holes[i].deduction * holes[i].thickness for i in chain)
    for i, j in pairwise(chain):
        a, b = holes[i], holes[j]
        area += (a.x - b.x) ** 2 / (4 * (b.y - a.y)) * min(a.thickness, b.thickness)
    return area


def line_at(holes, chain, y):
    """Return x of the polyline of a chain at y; beyond the first and last hole it runs square to the edge."""
    if y <= holes[chain[0]].y:
        return holes[chain[0]].x
    for i, j in pairwise(chain):
        a, b = holes[i], holes[j]
        if y <= b.y:
            return a.x + (b.x - a.x) * (y - a.y) / (b.y - a.y)
    return holes[chain[-1]].x


def shed(holes, chain):
    return sum(h.fastener and i not in chain and h.x > line_at(holes, chain, h.y) + 1e-7 for i, h in enumerate(holes))


def all_chains(holes):
    order = sorted(range(len(holes)), key=lambda i: holes[i].y)
    for size in range(1, len(holes) + 1):
        for chain in combinations(order, size):
            if all(holes[i].y < holes[j].y for i, j in pairwise(chain)):
                yield chain


def equivalent(holes, chain, gross):
    count = sum(h.fastener for h in holes)
    carried = (count - shed(holes, chain)) / count if count else 1.0
    return net_area(holes, chain, gross) / carried if carried else math.inf


def runs_over_to_no_avail(holes, chain, gross):
    """Whether the chain runs over a hole that could be put into it without gain of area or shed fasteners."""
    for i, h in enumerate(holes):
        if i in chain or any(holes[j].y == h.y for j in chain):
            continue
        through = [(a, b) for a, b in pairwise(chain) if holes[a].y < h.y < holes[b].y]
        slope = 0.0
        if through:
            a, b = (holes[j] for j in through[0])
            slope = (b.x - a.x) / (b.y - a.y)
        if (h.x - line_at(holes, chain, h.y)) ** 2 < (h.along / 2) ** 2 + (slope * h.width / 2) ** 2:
            longer = tuple(sorted((*chain, i), key=lambda j: holes[j].y))
            if net_area(holes, longer, gross) <= net_area(holes, chain, gross) + 1e-9 * gross \
                    and shed(holes, longer) <= shed(holes, chain):
                return True
    return False


@st.composite
def layouts(draw):
    """Up to 9 holes, no two closer than 0.2 in, many level with each other or in line with the force."""
    cells = draw(st.lists(st.tuples(st.integers(0, 6), st.integers(0, 5)), min_size=1, max_size=9, unique=True))
    off = st.sampled_from([0.0, 0.0, 0.0, 0.25, -0.375, 0.5, 0.11])
    free = st.integers(-500, 500).map(lambda thousandths: thousandths / 1000)
    rough = draw(st.booleans())
    holes = []
    for column, line in cells:
        dx, dy = (draw(free), draw(free)) if rough else (draw(off), draw(off))
        width = draw(st.sampled_from([0.8125, 0.9375, 1.0625]))
        length = draw(st.sampled_from([None, None, 1.0, 0.75]))
        holes.append(Hole(2.2 * column + dx, 2.0 + 2.4 * line + dy, width, 0.0625, length, draw(st.booleans()),
                          draw(st.sampled_from([0.5, 0.5, 0.375]))))
    return holes


@settings(max_examples=120, deadline=None)
@given(layouts(), st.booleans())
def test_the_search_finds_what_enumeration_finds(holes, share):
    gross = WIDTH * 0.5
    if not share:
        holes = [Hole(h.x, h.y, h.width, h.allowance, h.length, False, h.thickness) for h in holes]
    found = chains(WIDTH, holes, k=4, gross_area=gross)
    every = sorted((equivalent(holes, chain, gross), chain) for chain in all_chains(holes))
    assert found[0].equivalent == pytest.approx(every[0][0], rel=1e-8)
    for chain in found:
        assert chain.net_area == pytest.approx(net_area(holes, chain.holes, gross), rel=1e-9)
        assert chain.shed == shed(holes, chain.holes)
        assert chain.equivalent == pytest.approx(equivalent(holes, chain.holes, gross), rel=1e-9)
    assert len({chain.holes for chain in found}) == len(found)
    # the runners-up, among the chains that do not run over a hole for nothing
    listed = []
    for value, chain in every:
        if math.isfinite(value) and not runs_over_to_no_avail(holes, chain, gross):
            listed.append(value)
        if len(listed) == 4:
            break
    assert [chain.equivalent for chain in found] == pytest.approx(listed, rel=1e-8)


@settings(max_examples=40, deadline=None)
@given(layouts(), st.floats(0.01, 100), st.randoms())
def test_neither_the_order_of_the_holes_nor_the_unit_changes_the_result(holes, factor, random):
    gross = WIDTH * 0.5
    other = [Hole(h.x * factor, h.y * factor, h.width * factor, h.allowance * factor, h.along * factor, h.fastener,
                  h.thickness * factor) for h in holes]
    random.shuffle(other)
    a = chains(WIDTH, holes, k=3, gross_area=gross)
    b = chains(WIDTH * factor, other, k=3, gross_area=gross * factor**2)
    assert [c.equivalent * factor**2 for c in a] == pytest.approx([c.equivalent for c in b], rel=1e-8)


def test_load_share_by_hand():
    """Three rows of two: behind m fasteners the chain carries (6 - m) / 6."""
    found = chains(6, grid(3, 2), k=3)
    assert [(c.holes, c.shed) for c in found] == [((2, 5), 0), ((1, 5), 1), ((2, 4), 1)]
    straight = [c for c in chains(6, grid(3, 2), k=20) if not c.stagger]
    assert [(c.shed, c.share, c.equivalent) for c in straight] == [
        (0, 1, 4.25), (2, pytest.approx(4 / 6), pytest.approx(4.25 * 6 / 4)),
        (4, pytest.approx(2 / 6), pytest.approx(4.25 * 6 / 2))]


def test_the_full_load_on_every_chain():
    assert {c.share for c in chains(6, grid(3, 2), k=20, load_share=False)} == {1.0}


def test_a_wide_inner_row_governs_over_the_first_row_only_by_its_load_share():
    """One fastener in the first row, three behind it: 12 - 3 x 7/8 = 9.375, carrying 3/4, is 12.5 of 11.125."""
    holes = [hole(2, 3), hole(2, 6), hole(2, 9), hole(8, 6)]
    assert chains(12, holes)[0].holes == (3,)
    assert chains(12, holes)[0].equivalent == 11.125
    assert chains(12, holes, load_share=False)[0].net_width == 9.375


def test_a_chain_steps_back_around_a_hole_in_line_with_the_force():
    found = chains(6, [hole(2, 3), hole(5, 3)], k=9)
    assert [(c.holes, c.shed) for c in found] == [((1,), 0), ((0,), 1)]


def test_an_open_hole_weakens_and_takes_no_load():
    """A misplaced hole, 1 in beside the first row, opens a chain of three holes that carries the full load."""
    found = chains(9, [hole(4, 1.5), hole(4, 7.5), hole(5, 4.5, fastener=False)])
    assert found[0].holes == (0, 2, 1)
    assert found[0].net_width == pytest.approx(9 - 3 * 0.875 + 2 / 12)
    assert (found[0].shed, found[0].share) == (0, 1)


def test_an_open_hole_beyond_the_last_fastener_carries_nothing():
    assert [c.holes for c in chains(6, [hole(5, 3), hole(2, 3, fastener=False)], k=9)] == [(0,)]


def test_holes_without_any_fastener_carry_the_full_load():
    found = chains(6, [hole(5, 3, fastener=False), hole(2, 1.5, fastener=False)], k=9)
    assert {(c.holes, c.share) for c in found} == {((0,), 1.0), ((1,), 1.0), ((1, 0), 1.0)}


def test_no_hole_is_the_gross_section():
    only, = chains(6, [])
    assert (only.holes, only.net_width, only.net_area, only.equivalent, only.points) == (
        (), 6, 6, 6, ((0, 0), (0, 6)))


def test_the_smaller_thickness_counts_on_an_inclined_hop():
    found = chains(6, [hole(4, 1.5, thickness=0.5), hole(2, 4.5, thickness=0.25)], k=9, gross_area=2.5)
    both, = (c for c in found if len(c.holes) == 2)
    assert both.stagger == ((2, 3, pytest.approx(1 / 3), 0.25),)
    assert both.net_area == pytest.approx(2.5 - 0.875 * 0.75 + 0.25 / 3)
    assert both.net_width == pytest.approx(6 - 1.75 + 1 / 3)


def test_the_line_to_draw_starts_and_ends_square_to_the_edges():
    found = chains(6, [hole(4, 1.5), hole(2.5, 4.5)])[0]
    assert found.points == ((4, 0.0), (4, 1.5), (2.5, 4.5), (2.5, 6))


def test_gages_that_differ_by_rounding_are_one_gage():
    """0.1 + 0.2 is not 0.3 in binary; such holes are in line with the force, not a gage space."""
    a, b = hole(2, 3 * (0.1 + 0.2)), hole(5, 3 * 0.3)
    assert a.y != b.y
    assert [c.holes for c in chains(6, [a, b], k=9)] == [(1,), (0,)]


def test_no_runner_up_skips_a_hole_on_its_way():
    """In one row of four the only chain is the whole row."""
    assert [c.holes for c in chains(12, grid(1, 4), k=99)] == [(0, 1, 2, 3)]


def test_a_runner_up_may_run_over_a_hole_that_would_make_it_stronger():
    """A steep hop over the second hole: by way of it, s**2/4g adds 1.40 where the hole takes 0.875."""
    listed = {c.holes for c in chains(6, [hole(0, 2), hole(1.5, 2.2), hole(3.2, 3.2)], k=99)}
    assert (0, 2) in listed


def test_a_runner_up_may_run_over_a_hole_where_the_way_round_sheds_a_fastener():
    """The straight hop runs over the slot; by way of the slot the last fastener would have shed its load."""
    holes = [hole(5, 2), hole(3.6, 7, length=3, fastener=False), hole(5, 12), hole(4.4, 5)]
    listed = {c.holes: c.shed for c in chains(14, holes, k=99)}
    assert listed[0, 2] == 0


def test_seventy_two_staggered_holes():
    found = chains(WIDTH, grid(12, 6, stagger=1.5))
    assert found[0].net_width == WIDTH - 6 * 0.875 + 5 * 1.5**2 / 12
    assert found[0].shed == 0
    assert len({c.holes for c in found}) == 5


def test_an_angle_laid_flat():
    angle = FlatAngle(b_1=6, b_2=4, t=0.375)
    for leg, gage in ((1, 2.25), (1, 5), (2, 2.5), (2, 3.25)):
        assert angle.place(angle.y(leg, gage)) == (leg, pytest.approx(gage))
    assert angle.y(2, 2.5) - angle.y(1, 2.25) == pytest.approx(2.25 + 2.5 - 0.375)


@pytest.mark.parametrize("call, message", [
    (lambda: chains(6, [hole(2, 0.4)]),
     "hole 1 at x = 2, y = 0.4 breaks the edge y = 0: its centre is 0.4 from the edge, half its width is 0.40625."),
    (lambda: chains(6, [hole(2, 3), hole(2, 5.8)]),
     "hole 2 at x = 2, y = 5.8 breaks the edge y = 6: its centre is 0.2 from the edge, half its width is 0.40625."),
    (lambda: chains(6, [hole(2, 3), hole(2.5, 3.5)]),
     "hole 1 at x = 2, y = 3 and hole 2 at x = 2.5, y = 3.5 overlap: their centres are 0.707107 apart, the clear "
     "distance is -0.105393."),
    (lambda: chains(6, [hole(2, 3), hole(2, 3)]),
     "hole 1 at x = 2, y = 3 and hole 2 at x = 2, y = 3 overlap: their centres are 0 apart, the clear distance is "
     "-0.8125."),
    (lambda: chains(6, [hole(2, 3), hole(3.5, 3, length=2.5)]),
     "hole 1 at x = 2, y = 3 and hole 2 at x = 3.5, y = 3 overlap: their centres are 1.5 apart, the clear distance "
     "is -0.15625."),
    (lambda: chains(3.3, [Hole(2, y, 1, 0.125) for y in (0.55, 1.65, 2.75)]),
     "no net section is left on the chain through hole 1 at x = 2, y = 0.55; hole 2 at x = 2, y = 1.65; hole 3 at "
     "x = 2, y = 2.75: the holes deduct 3.375 from a width of 3.3 (B4.3b); use fewer holes in line or a wider "
     "element."),
    (lambda: chains(0, []), "the width is 0; it must be a positive number."),
    (lambda: chains(math.nan, []), "the width is nan; it must be a positive number."),
    (lambda: chains(6, [hole(math.nan, 3)]),
     "hole 1: x is nan; coordinates must be numbers, dimensions positive, the allowance 0 or more."),
    (lambda: chains(6, [Hole(2, 3, 0, 0)]),
     "hole 1: width is 0; coordinates must be numbers, dimensions positive, the allowance 0 or more."),
    (lambda: chains(6, [Hole(2, 3, 1, -0.1)]),
     "hole 1: allowance is -0.1; coordinates must be numbers, dimensions positive, the allowance 0 or more."),
    (lambda: chains(6, [hole(2, 3, length=-1)]),
     "hole 1: length is -1; coordinates must be numbers, dimensions positive, the allowance 0 or more."),
    (lambda: chains(6, [hole(2, 3, thickness=0.5), hole(2, 5)]),
     "the holes lie in parts of unequal thickness (0.5, 1); give the gross area."),
    (lambda: chains(6, [hole(2, 3)], gross_area=0), "the gross area is 0; it must be a positive number."),
    (lambda: chains(6, [hole(2, 3)], k=0), "the number of chains to list is 0; it must be a whole number from 1."),
    (lambda: stagger_term(2, 0),
     "the gage g of a hop is 0; two holes in line with the force are not a gage space (B4.3b)."),
    (lambda: stagger_term(-2, 3), "the pitch s of a hop is -2; it must be 0 or more (B4.3b)."),
    (lambda: FlatAngle(6, 4, 4), "an angle with legs 6 and 4 and thickness 4 is not possible; the thickness must be "
                                 "positive and smaller than each leg."),
    (lambda: FlatAngle(6, 4, 0.5).y(1, 6.5),
     "a gage of 6.5 does not lie on leg 1, which reaches from 0.5 to 6 from the back of the heel."),
    (lambda: FlatAngle(6, 4, 0.5).y(3, 2), "an angle has leg 1 and leg 2, not leg 3."),
])
def test_refused(call, message):
    with pytest.raises(CalcError) as caught:
        call()
    assert str(caught.value) == message


def test_two_slots_side_by_side_do_not_overlap():
    assert len(chains(6, [hole(2, 2, length=2.5), hole(4, 4, length=2.5)], k=9)) == 3
