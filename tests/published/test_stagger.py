"""Net widths on staggered chains against published examples."""

from fractions import Fraction

import pytest

from calclib.holes import FlatAngle, Hole
from calclib.paths import chains, stagger_term

MM = 2       # damage allowance, AISC B4.3b and CSA S16


def agrees(value, printed):
    """Whether a value rounds to the printed digits."""
    digits = len(printed.partition(".")[2])
    return abs(Fraction(value) - Fraction(printed)) <= Fraction(1, 2 * 10**digits)


def paths(width, holes, **more):
    """Return the chains by their letters, all carrying the full load as in the examples."""
    letters = list(holes)
    found = chains(width, list(holes.values()), k=10**3, load_share=False, **more)
    return {"".join(letters[i] for i in chain.holes): chain for chain in found}


def inch(x, y, size):
    return Hole(x, y, size, 1 / 16)


D9 = {"B": inch(2.5, 2, 13 / 16), "C": inch(0, 5, 13 / 16), "D": inch(0, 9, 13 / 16), "E": inch(2.5, 12, 13 / 16)}


@pytest.mark.parametrize("path, printed", [("BE", "12.3"), ("BCDE", "11.5"), ("BCD", "11.9"), ("BDE", "12.1")])
def test_aisc_design_examples_v16_d9(path, printed):
    """PL 1/2 x 14, 3/4-in. bolts: gages 3, 4 (7 from B to D) and 3 in., s = 2.5 in. 12.3 is printed for 12.25."""
    assert agrees(paths(14, D9)[path].net_width, printed)


def test_aisc_design_examples_v16_d9_governing_path():
    """5.75 in.2 is printed from the rounded width: 11.5 x 1/2."""
    governing = chains(14, list(D9.values()), load_share=False)[0]
    assert governing.holes == (0, 1, 2, 3)
    assert governing.deduction == 3.5
    assert [(hop.s, hop.g) for hop in governing.stagger] == [(2.5, 3), (2.5, 3)]
    assert round(governing.net_width, 1) * 0.5 == 5.75


def test_quimby_ex01():
    """PL 12 x 3/8, 3/4-in. bolts: four holes, two hops with s 3 and g 3."""
    holes = {"A": inch(3, 1.5, 13 / 16), "B": inch(0, 4.5, 13 / 16), "C": inch(0, 7.5, 13 / 16),
             "D": inch(3, 10.5, 13 / 16)}
    governing = chains(12, list(holes.values()), load_share=False)[0]
    assert len(governing.holes) == 4
    assert agrees(governing.net_width, "10.00")
    assert agrees(governing.net_width * 0.375, "3.75")


def test_quimby_ex02():
    """W-shape, web 0.415 thick, A_g 20.0: three 7/8-in. bolts in the web, two hops with s 3 and g 3."""
    holes = [Hole(x, y, 15 / 16, 1 / 16, thickness=0.415) for x, y in ((3, 3), (0, 6), (3, 9))]
    chain, = (c for c in chains(12, holes, k=99, gross_area=20.0, load_share=False) if len(c.holes) == 3)
    assert agrees(chain.net_area, "19.38")
    assert agrees(chain.stagger[0].term * chain.stagger[0].thickness, "0.311")


def test_quimby_ex04():
    """Angle laid flat, 9.625 wide, t 3/8, 7/8-in. bolts: D and L level, G staggered by 2; the hop over the heel has
    g = 4.125 = g1 + g2 - t."""
    angle = FlatAngle(6, 4, 0.375)
    y_d, y_g, y_l = angle.y(1, 4.75), angle.y(1, 2.25), angle.y(2, 2.25)
    assert angle.width == 9.625
    assert (y_g - y_d, y_l - y_g) == (2.5, 4.125)
    found = paths(angle.width, {"D": inch(2, y_d, 15 / 16), "G": inch(0, y_g, 15 / 16), "L": inch(2, y_l, 15 / 16)})
    assert agrees(found["DGL"].net_width, "7.27")
    assert agrees(found["DGL"].net_width * 0.375, "2.73")
    assert agrees(found["DL"].net_width, "7.625")
    assert agrees(found["DL"].net_width * 0.375, "2.86")
    assert min(found, key=lambda path: found[path].net_width) == "DGL"


def metric(x, y):
    return Hole(x, y, 22, MM)


def test_holtz_t01_outer_plates():
    """210 mm wide, M20, 24 mm a hole: s 50 with g 45, then s 55 with g 50; two plates of 10 mm."""
    found = paths(210, {"a": metric(50, 50), "b": metric(0, 95), "c": metric(-55, 145)})
    assert agrees(found["a"].net_width, "186")
    assert agrees(found["ab"].net_width, "175.9")
    assert agrees(found["abc"].net_width, "167.0")
    assert agrees(round(found["abc"].net_width) * 20, "3340")
    assert min(found, key=lambda path: found[path].net_width) == "abc"


def test_holtz_t01_inner_plate():
    """s 50 with g 50, then s 50 with g 95; one plate of 20 mm."""
    found = paths(210, {"a": metric(50, 35), "b": metric(0, 85), "c": metric(50, 180)})
    assert agrees(found["ab"].net_width, "174.5")
    assert agrees(found["abc"].net_width, "157.1")
    assert agrees(stagger_term(105, 50), "55.1")
    assert min(found, key=lambda path: found[path].net_width) == "abc"
