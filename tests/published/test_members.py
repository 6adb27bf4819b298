"""Net area, effective net area and rupture of tension members against published examples.

Where an example goes on with its rounded number, the test puts that number in and says so.
"""

import pytest
from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, design, members

V16 = "AISC Design Examples v16.0"
QUIMBY = "T. B. Quimby, A Beginner's Guide to the Steel Construction Manual, failure paths"


def straight(w, n_h, d_e):
    return members.net_width_of_straight_chain(w=w, n_h=n_h, d_e=d_e)


@published(f"{V16}, Ex. D.1 and D.6", members.width_of_hole_deducted, members.net_area_after_holes)
@pytest.mark.parametrize("A_0, n_h, t, digits", [(6.16, 4, 0.400, "4.76"), (7.50, 1, 1.0, "6.63")])
def test_net_area_of_a_section_with_holes(A_0, n_h, t, digits):
    """3/4-in. bolts; the two legs of D.6 are 1/2 in. each."""
    d_e = members.width_of_hole_deducted(d_h=13 / 16, Delta_h=members.HOLE_ALLOWANCE["US"])
    assert Printed(digits, "in2").agrees(members.net_area_after_holes(A_0=A_0, n_h=n_h, d_e=d_e, t=t))


@published(f"{V16}, Ex. D.1", members.effective_net_area, members.tensile_rupture_of_member, design.design_strength)
def test_d1_rupture():
    A_e = members.effective_net_area(A_n=4.76, U=1 - 0.831 / 9)
    P_n = members.tensile_rupture_of_member(F_u=65, A_e=A_e)
    assert Printed("4.32", "in2").agrees(A_e)
    assert Printed("281", "kip").agrees(P_n)
    assert Printed("211", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=P_n))


@published(f"{V16}, Ex. D.1, D.5 and D.6", members.tensile_rupture_of_member, design.allowable_strength)
@pytest.mark.parametrize("F_u, A_e, digits, asd", [
    (65, "4.32", None, "141"),     # D.1: 281 is carried on
    (62, "7.50", "465", "233"),    # D.5
    (65, "6.26", "407", "204"),    # D.6: from A_n 6.63 and U 0.944, both rounded
])
def test_rupture_from_the_rounded_effective_net_area(F_u, A_e, digits, asd):
    P_n = members.tensile_rupture_of_member(F_u=F_u, A_e=Printed(A_e, "in2").value)
    rounded = Printed(digits or "281", "kip")
    assert rounded.agrees(P_n)
    assert Printed(asd, "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=rounded.value))


@published(f"{V16}, Ex. D.6", members.effective_net_area)
def test_d6_effective_net_area_from_rounded_steps():
    A_e = members.effective_net_area(A_n=Printed("6.63", "in2").value, U=Printed("0.944").value)
    assert Printed("6.26", "in2").agrees(A_e)


@published(f"{V16}, Ex. D.1, D.3, D.5 and D.6; Segui, Ex. 3.10", members.slenderness)
@pytest.mark.parametrize("L, r, digits", [(300, 1.26, "238"), (360, 1.57, "229"), (360, 1.96, "184"),
                                          (300, 1.21, "248"), (69, 0.2887, "239")])
def test_slenderness(L, r, digits):
    assert Printed(digits).agrees(members.slenderness(L=L, r=r))


@published(f"{V16}, Ex. D.9", members.net_width_of_straight_chain, members.net_width_with_stagger)
def test_d9_staggered_plate():
    """PL 1/2 x 14, 7/8 in. a hole; s 2.5 in., g 3 in. at the outer lines and 7 in. over one line."""
    def chain(n_h, *hops):
        w = straight(14, n_h, 0.875)
        for n_g, g in hops:
            w = members.net_width_with_stagger(w_0=w, n_g=n_g, s=2.5, g=g)
        return w

    assert Printed("12.3", "in").agrees(chain(2))
    assert Printed("11.5", "in").agrees(chain(4, (2, 3)))
    assert Printed("11.9", "in").agrees(chain(3, (1, 3)))
    assert Printed("12.1", "in").agrees(chain(3, (1, 7), (1, 3)))


@published(f"{V16}, Ex. D.9", members.net_area_of_plate)
def test_d9_net_area_from_the_rounded_width():
    assert Printed("5.75", "in2").agrees(members.net_area_of_plate(w_n=Printed("11.5", "in").value, t=0.5))


@published(QUIMBY + ", Ex01", members.net_width_of_straight_chain, members.net_width_with_stagger,
           members.net_area_of_plate)
def test_staggered_plate():
    w_n = members.net_width_with_stagger(w_0=straight(12, 4, 0.875), n_g=2, s=3, g=3)
    assert Printed("10.00", "in").agrees(w_n)
    assert Printed("3.75", "in2").agrees(members.net_area_of_plate(w_n=w_n, t=0.375))


@published(QUIMBY + ", Ex02 and Ex03", members.net_area_after_holes, members.net_area_with_stagger)
def test_web_and_flanges_of_a_w_shape():
    A_0 = members.net_area_after_holes(A_0=20.0, n_h=3, d_e=1.0, t=0.415)
    assert Printed("19.38", "in2").agrees(members.net_area_with_stagger(A_0=A_0, n_g=2, s=3, g=3, t=0.415))
    assert Printed("17.12", "in2").agrees(members.net_area_after_holes(A_0=20.0, n_h=4, d_e=1.0, t=0.720))


@published(QUIMBY + ", Ex04", members.gage_across_heel, members.net_width_with_stagger, members.net_area_of_plate,
           members.net_area_after_holes)
def test_angle_laid_flat():
    """Width 9.625 in., 7/8-in. bolts: three holes, s 2 in. with g 2.5 in. and with the gage across the heel."""
    g = members.gage_across_heel(g_1=2.25, g_2=2.25, t=0.375)
    assert Printed("4.125", "in").agrees(g)
    w = members.net_width_with_stagger(w_0=straight(9.625, 3, 1.0), n_g=1, s=2, g=2.5)
    w = members.net_width_with_stagger(w_0=w, n_g=1, s=2, g=g)
    assert Printed("7.27", "in").agrees(w)
    assert Printed("2.73", "in2").agrees(members.net_area_of_plate(w_n=w, t=0.375))
    w = straight(9.625, 2, 1.0)
    assert Printed("7.625", "in").agrees(w)
    assert Printed("2.86", "in2").agrees(members.net_area_of_plate(w_n=w, t=0.375))
    assert Printed("2.83", "in2").agrees(members.net_area_after_holes(A_0=3.58, n_h=2, d_e=1.0, t=0.375))


@published("N. Holtz, Introduction to Steel Design, Ex. T01 (CSA S16, the same rule)", members.width_of_hole_deducted,
           members.width_gained_by_stagger, members.net_width_with_stagger)
def test_staggered_plate_in_si():
    """w 210 mm, M20 in holes of 22 mm."""
    d_e = members.width_of_hole_deducted(d_h=22, Delta_h=members.HOLE_ALLOWANCE["SI"])
    outer = members.net_width_with_stagger(w_0=straight(210, 2, d_e), n_g=1, s=50, g=45)
    assert Printed("175.9", "mm").agrees(outer)
    outer = members.net_width_with_stagger(w_0=straight(210, 3, d_e), n_g=1, s=50, g=45)
    assert Printed("167.0", "mm").agrees(members.net_width_with_stagger(w_0=outer, n_g=1, s=55, g=50))
    inner = members.net_width_with_stagger(w_0=straight(210, 2, d_e), n_g=1, s=50, g=50)
    assert Printed("174.5", "mm").agrees(inner)
    inner = members.net_width_with_stagger(w_0=straight(210, 3, d_e), n_g=1, s=50, g=50)
    assert Printed("157.1", "mm").agrees(members.net_width_with_stagger(w_0=inner, n_g=1, s=50, g=95))
    assert Printed("55.1", "mm").agrees(members.width_gained_by_stagger(s=105, g=50))


@published("NSCP 2015 lecture notes, Ex. 2.1 and 2.2", members.width_of_hole_deducted, members.net_area_after_holes,
           members.effective_net_area, members.tensile_rupture_of_member, design.design_strength,
           design.allowable_strength)
def test_rupture_in_si():
    def rupture(A_e):
        P_n = members.tensile_rupture_of_member(F_u=400, A_e=A_e)
        return P_n, design.design_strength(phi=0.75, R_n=P_n), design.allowable_strength(Omega=2.0, R_n=P_n)

    d_e = members.width_of_hole_deducted(d_h=18, Delta_h=2.0)
    P_n, lrfd, asd = rupture(members.net_area_after_holes(A_0=1651, n_h=2, d_e=d_e, t=13))
    assert Printed("452.4", "kN").agrees(P_n, "N")
    assert Printed("339.30", "kN").agrees(lrfd, "N")
    assert Printed("226.2", "kN").agrees(asd, "N")
    A_n = members.net_area_after_holes(A_0=1612.9, n_h=1, d_e=26, t=9.525)
    A_e = members.effective_net_area(A_n=A_n, U=0.85)
    P_n, lrfd, asd = rupture(A_e)
    assert Printed("1365.25", "mm2").agrees(A_n)
    assert Printed("1160.4625", "mm2").agrees(A_e)
    assert Printed("464.185", "kN").agrees(P_n, "N")
    assert Printed("348.13875", "kN").agrees(lrfd, "N")
    assert Printed("232.0925", "kN").agrees(asd, "N")
