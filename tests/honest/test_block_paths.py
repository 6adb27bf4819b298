"""Block shear paths: by hand, against the formulas of a regular group, and what is refused."""

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from calclib.block_paths import Attached, block_paths, weld_block
from calclib.errors import CalcError
from calclib.holes import Hole
from calclib.outline import Outline, strip


def hole(x, y, size=15 / 16, **more):
    return Hole(x, y, size, 1 / 16, **more)


def group(rows, lines, pitch=3.0, gage=3.0, end=2.0, edge=2.0, stagger=0.0, size=15 / 16):
    return [hole(end + pitch * row + stagger * (line % 2), edge + gage * line, size)
            for line in range(lines) for row in range(rows)]


def named(paths):
    return {path.name: path for path in paths}


def strength(path, F_y, F_u):
    """Return R_n of J4-5 with uniform tension."""
    return (min(0.6 * F_u * path.net_shear_area, 0.6 * F_y * path.gross_shear_area) + F_u * path.net_tension_area)


def test_two_angles_by_one_leg():
    """2L6x6x5/8 A36, nine 7/8 in fasteners at 3 in, end distance 2.125 in, toe distance 3.75 in: by hand."""
    row = [hole(2.125 + 3 * i, 3.75) for i in range(9)]
    path = named(block_paths(strip(6, 40), 2 * 0.625, row))["line 1 to the lower edge"]
    assert path.gross_shear_area == pytest.approx(32.656, abs=0.0005)
    assert path.net_shear_area == pytest.approx(22.031, abs=0.0005)
    assert path.net_tension_area == 4.0625
    assert 0.75 * strength(path, 36, 58) == pytest.approx(705.7, abs=0.05)


def tee():
    """WT8x25 A992 by its flange: two lines of three 1 in fasteners, gage 3.5 in, end distance 2 in."""
    b_f, t_f, d, t_w, k_des, A_g = 7.07, 0.630, 8.13, 0.380, 1.03, 7.37
    stem = Attached("stem", b_f / 2, t_w, A_g - b_f * t_f, torn_off=(d - k_des) * t_w)
    holes = group(3, 2, gage=3.5, edge=(b_f - 3.5) / 2, size=1.125)
    return named(block_paths(strip(b_f, 20), t_f, holes, [stem]))


@pytest.mark.parametrize("path, available", [
    ("whole width, stem sheared off", 223.2),
    ("line 1 to the lower edge and line 2 to the upper edge", 258.6),
    ("lines 1 to 2, stem torn across", 398.6),
])
def test_tee_by_its_flange(path, available):
    """Available strength of each path, 0.75 R_n in kips, by hand."""
    assert 0.75 * strength(tee()[path], 50, 65) == pytest.approx(available, abs=0.05)


def test_all_paths_of_a_tee():
    assert list(tee()) == [
        "line 2 to the lower edge, stem torn across", "line 2 to the lower edge, stem sheared off",
        "whole width, stem sheared off",
        "lines 1 to 2, stem torn across", "lines 1 to 2, stem sheared off",
        "line 1 to the upper edge, stem torn across", "line 1 to the upper edge, stem sheared off",
        "line 1 to the lower edge and line 2 to the upper edge"]


def test_the_outstanding_leg_goes_with_the_block_or_stays():
    """L6x4x1/2 by its long leg, gage 3.5 from the back: toe, heel with the leg torn or sheared, whole leg."""
    leg = Attached("outstanding leg", 5.75, 0.5, 1.75)
    paths = named(block_paths(strip(6, 12), 0.5, [hole(2, 2.5), hole(5, 2.5)], [leg]))
    assert {name: (path.gross_shear_area, path.net_shear_area, path.net_tension_area)
            for name, path in paths.items()} == {
        "line 1 to the lower edge": (2.5, 1.75, 1.0),
        "line 1 to the upper edge, outstanding leg torn across": (2.5, 1.75, 1.5 + 1.75),
        "line 1 to the upper edge, outstanding leg sheared off": (5.0, 4.25, 1.5),
        "whole width, outstanding leg sheared off": (2.5, 2.5, 2.5)}


def test_a_gusset_with_a_sloping_end_and_a_held_edge():
    """The end slopes 1 to 4; the lower edge is welded to a beam."""
    gusset = Outline(((0, 0), (20, 0), (20, 12), (3, 12)), held={0, 1})
    paths = named(block_paths(gusset, 0.5, [hole(x, y) for y in (4, 8) for x in (5, 8)]))
    assert list(paths) == ["lines 1 to 2", "line 1 to the upper edge"]
    u = paths["lines 1 to 2"]
    assert u.gross_shear_area == 0.5 * ((8 - 1) + (8 - 2))
    assert u.net_shear_area == 0.5 * ((8 - 1) + (8 - 2) - 2 * 1.5)
    assert u.net_tension_area == 0.5 * (4 - 1)
    assert u.cuts[0].points == ((8, 4), (1, 4))
    assert paths["line 1 to the upper edge"].net_tension_area == 0.5 * (8 - 1.5)


@settings(max_examples=60, deadline=None)
@given(st.integers(1, 6), st.integers(1, 5), st.floats(2.5, 4), st.floats(2.5, 4), st.floats(1, 3), st.floats(1, 3),
       st.sampled_from([0.0, 0.0, 1.25]), st.floats(0.25, 1))
def test_a_regular_group(rows, lines, pitch, gage, end, edge, stagger, t):
    """U and L by their formulas; each fastener's line loses one hole at its innermost fastener in every path."""
    width = 2 * edge + (lines - 1) * gage
    holes = group(rows, lines, pitch, gage, end, edge, stagger)
    paths = block_paths(strip(width, 60), t, holes)
    fibonacci = [1, 1]
    while len(fibonacci) < lines + 4:
        fibonacci.append(sum(fibonacci[-2:]))
    assert len(paths) == len({path.name for path in paths}) == fibonacci[lines + 2] - 1
    lengths = [end + (rows - 1) * pitch + stagger * (line % 2) for line in range(lines)]
    gone = (rows - 0.5) * 1.0
    for path in paths:
        corner = {}
        for cut in path.cuts:
            assert cut.net == pytest.approx(cut.gross - sum(part for _, part in cut.holes))
            for i, part in cut.holes:
                corner[i] = corner.get(i, 0) + part
        innermost = [line * rows + rows - 1 for line in range(lines)]
        assert [corner[i] for i in innermost] == [1] * lines
        assert not path.staggered or (stagger and lines > 1)
    by_name = named(paths)
    if lines > 1:
        u = by_name[f"lines 1 to {lines}"]
        assert u.gross_shear_area == pytest.approx(t * (lengths[0] + lengths[-1]))
        assert u.net_shear_area == pytest.approx(t * (lengths[0] + lengths[-1] - 2 * gone))
        assert u.net_tension_area == pytest.approx(t * (lines - 1) * (gage - 1))
        assert u.staggered == bool(stagger)
    for line, name in ((lines, f"line {lines} to the lower edge"), (1, "line 1 to the upper edge")):
        path = by_name[name]
        assert path.gross_shear_area == pytest.approx(t * lengths[line - 1])
        assert path.net_shear_area == pytest.approx(t * (lengths[line - 1] - gone))
        assert path.net_tension_area == pytest.approx(t * ((lines - 1) * gage + edge - (lines - 0.5)))


@settings(max_examples=40, deadline=None)
@given(st.lists(st.tuples(st.integers(0, 4), st.integers(0, 3)), min_size=1, max_size=10, unique=True),
       st.randoms())
def test_mirrored_blocks_are_the_same(cells, random):
    holes = [hole(2 + 3 * row + 0.5 * (line % 2), 2 + 2.75 * line, fastener=i % 4 != 3)
             for i, (row, line) in enumerate(cells)]
    mirrored = [Hole(h.x, 12 - h.y, h.width, h.allowance, fastener=h.fastener) for h in holes]
    random.shuffle(mirrored)

    def areas(holes):
        return sorted((round(p.gross_shear_area, 9), round(p.net_shear_area, 9), round(p.net_tension_area, 9))
                      for p in block_paths(strip(12, 30), 0.5, holes))

    assert areas(holes) == areas(mirrored)


def test_slots_lose_their_length_in_shear_and_their_width_in_tension():
    row = [hole(x, 3, 13 / 16, length=1.0) for x in (2, 5)]
    path = named(block_paths(strip(6, 12), 1, row))["line 1 to the lower edge"]
    assert path.net_shear_area == 5 - 1.5 * 1.0625
    assert path.net_tension_area == 3 - 0.5 * 0.875


def test_an_open_hole_is_deducted_where_a_cut_runs_over_it():
    """One hole beside the shear line of the first line, one in the tension line, one behind the block."""
    holes = [*group(2, 2), hole(3.5, 2.3, fastener=False), hole(4.8, 3.5, fastener=False),
             hole(8, 2, fastener=False)]
    u = named(block_paths(strip(7, 12), 1, holes))["lines 1 to 2"]
    assert u.net_shear_area == 2 * 5 - 2 * 1.5 - 1
    assert u.net_tension_area == 3 - 1 - 1


def test_a_slightly_misplaced_fastener_stays_in_its_line():
    holes = [hole(2, 2), hole(5, 2.25), hole(2, 5), hole(5, 5)]
    u = named(block_paths(strip(7, 12), 1, holes))["lines 1 to 2"]
    assert (u.net_shear_area, u.net_tension_area) == (2 * 5 - 3, 2.75 - 1)


def test_within_two_welds():
    path = weld_block(y_1=0, l_1=6, y_2=4, l_2=9, thickness=0.375)
    assert path.gross_shear_area == path.net_shear_area == 15 * 0.375
    assert path.net_tension_area == 1.5
    assert path.staggered
    assert not weld_block(y_1=0, l_1=6, y_2=4, l_2=6, thickness=0.375).staggered


def test_the_strip_of_a_member_has_a_free_end_at_zero():
    assert strip(6, 12).ray(3, 2, "x", -1) == (0, 3)
    assert strip(6, 12).ray(3, 2, "y", 1) == (6, 2)


STEM = Attached("stem", 3.5, 0.5, 2.0)


@pytest.mark.parametrize("call, message", [
    (lambda: block_paths(strip(6, 12), 0.5, [hole(0.4, 3)]),
     "hole 1 at x = 0.4, y = 3 breaks the edge from (0, 6) to (0, 0): the clear distance is -0.06875."),
    (lambda: block_paths(strip(6, 12), 0.5, [hole(2, 7)]), "hole 1 at x = 2, y = 7 lies outside the plate."),
    (lambda: block_paths(strip(6, 12), 0.5, [hole(2, 0.49)]),
     "the tension line from hole 1 at x = 2, y = 0.49 to the edge at y = 0 has no net length: 0.49 less 0.5 for holes "
     "is -0.01."),
    (lambda: block_paths(strip(6, 12), 0.5, [hole(3, 2), hole(5, 2.9)]),
     "the tension line from hole 1 at x = 3, y = 2 to hole 2 at x = 5, y = 2.9 has no net length: 0.9 less 1 for holes "
     "is -0.1."),
    (lambda: block_paths(strip(6, 12), 0.5, [Hole(0.55, 3, 1, 0.125), Hole(1.6, 3, 1, 0.125)]),
     "the shear line from hole 2 at x = 1.6, y = 3 to the end at x = 0 has no net length: 1.6 less 1.6875 for holes is "
     "-0.0875."),
    (lambda: block_paths(strip(6, 12), 0.5, []), "block shear needs at least one hole with a fastener."),
    (lambda: block_paths(strip(6, 12), 0.5, [hole(2, 3, fastener=False)]),
     "block shear needs at least one hole with a fastener."),
    (lambda: block_paths(strip(6, 12), 0, [hole(2, 3)]), "the thickness of the plate is 0; it must be a positive "
                                                         "number."),
    (lambda: block_paths(strip(40, 12), 0.5, group(1, 13, gage=2.5)),
     "the fasteners lie on 13 gage lines; up to 12 are covered."),
    (lambda: block_paths(strip(6, 12), 0.5, [hole(x, 2 + x / 8) for x in (2, 5, 8)]),
     "hole 1 at x = 2, y = 2.25 strays by 0.75, more than half its width, from the gage line of hole 3 at x = 8, "
     "y = 3; block shear is covered for fasteners in lines along the force."),
    (lambda: block_paths(Outline(((0, 0), (9, 0), (9, 6), (0, 6)), held={3}), 0.5, [hole(2, 3)]),
     "the shear line from hole 1 at x = 2, y = 3 to the end at x = 0 meets an edge that is held; no block can leave "
     "there."),
    (lambda: block_paths(Outline(((0, 0), (9, 0), (9, 6), (0, 6)), held={0, 2}), 0.5, [hole(2, 3)]),
     "no block can tear out: both sides of the single gage line are held."),
    (lambda: block_paths(Outline(((0, 0), (3, 0), (3, 4), (5, 4), (5, 0), (9, 0), (9, 6), (0, 6))), 0.5,
                         [hole(2, 2), hole(7, 2)]),
     "the shear line from hole 2 at x = 7, y = 2 to the end at x = 5 leaves the plate before it reaches hole 1 at "
     "x = 2, y = 2; block shear is covered for plates without a gap in the line."),
    (lambda: block_paths(Outline(((0, 0), (9, 0), (9, 3), (7, 3), (7, 4), (9, 4), (9, 7), (0, 7))), 0.5,
                         [hole(8, 2), hole(8, 5)]),
     "the tension line from hole 1 at x = 8, y = 2 to hole 2 at x = 8, y = 5 leaves the plate; block shear is covered "
     "for plates without a gap in the line."),
    (lambda: block_paths(strip(7, 12), 0.5, [hole(2, 2)], [STEM, STEM]),
     "two attached parts have the same name: stem, stem; give each its own."),
    (lambda: block_paths(strip(7, 12), 0.5, [hole(2, 3)], [STEM]),
     "hole 1 at x = 2, y = 3 cuts into the stem at y = 3.5: the clear distance is -0.21875."),
    (lambda: block_paths(strip(7, 12), 0.5, [hole(2, 2)], [Attached("stem", 8, 0.5, 2)]),
     "the stem at y = 8 does not stand on the plate, which there reaches from y = 2 to 7."),
    (lambda: block_paths(strip(7, 12), 0.5, [hole(2, 2)], [Attached("stem", 4, 0.5, 2, 3)]),
     "the area of the stem that shears off is 3; it must lie above 0 and not above its whole area of 2."),
    (lambda: block_paths(strip(7, 12), 0.5, [hole(2, 2)], [Attached("stem", 4, 0, 2)]),
     "the thickness of the stem is 0; it must be a positive number."),
    (lambda: block_paths(Outline(((0, 0), (9, 0), (9, 6), (0, 6)), held={2}), 0.5, [hole(2, 2)],
                         [Attached("stem", 4, 0.5, 2)]),
     "the stem at y = 4 stands beside an edge that is held."),
    (lambda: block_paths(Outline(((0, 0), (9, 0), (9, 6), (0, 6), (0, 3)), held={3}), 0.5, [hole(2, 2)],
                         [Attached("stem", 4, 0.5, 2)]),
     "the root of the stem at y = 4 ends at an edge that is held."),
    (lambda: weld_block(4, 6, 4, 6, 0.5), "the distance between the welds is 0; it must be a positive number."),
    (lambda: weld_block(0, math.nan, 4, 6, 0.5), "the length of weld 1 is nan; it must be a positive number."),
    (lambda: Outline(((0, 0), (4, 4), (4, 0), (0, 4))),
     "edges 1 and 3 of the outline cross or touch; give its corners in order around the plate."),
    (lambda: Outline(((0, 0), (4, 0))), "an outline needs at least three corners, each with two numbers."),
    (lambda: Outline(((0, 0), (4, 0), (4, 0), (0, 4))), "corner 2 of the outline at x = 4, y = 0 is given twice."),
    (lambda: Outline(((0, 0), (4, 0), (0, 4)), held={3}),
     "edge 3 of the outline is said to be held; its edges are 0 to 2."),
    (lambda: strip(0, 4), "a strip of width 0 and length 4 is not possible; both must be positive."),
])
def test_refused(call, message):
    with pytest.raises(CalcError) as caught:
        call()
    assert str(caught.value) == message
