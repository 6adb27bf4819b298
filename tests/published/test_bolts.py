"""Bolts against AISC Design Examples and a published guide.

Where an example goes on with its rounded number, the test puts that number in and says so.
"""

import pytest
from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, SLIP, SLIP_LONG_SLOT, bearing, bolts, design, rods

V16 = "AISC Design Examples v16.0"
QUIMBY = "T. B. Quimby, A Beginner's Guide to the Steel Construction Manual, Ex. 4.1"


@published(f"{V16}, Ex. II.A-2 and II.C-1 (Manual Table 7-1, Group 120-N)", bolts.bolt_shear, design.design_strength,
           design.allowable_strength)
@pytest.mark.parametrize("A_b, lrfd, asd", [
    (rods.body_area(d=0.75), "17.9", "11.9"),
    (0.601, "24.3", "16.2"),                     # 7/8 in.: 24.3 comes from the rounded area, 24.35 from the full one
])
def test_single_shear(A_b, lrfd, asd):
    R_n = bolts.bolt_shear(F_nv=54, A_b=A_b, n_s=1)
    assert Printed(lrfd, "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))
    assert Printed(asd, "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))


@published(QUIMBY, bolts.bolt_shear, design.design_strength, design.allowable_strength)
def test_single_shear_of_a_group():
    """Eleven 3/4-in. A325-X bolts, 60 ksi by the 2005 edition."""
    R_n = bolts.bolt_shear(F_nv=60, A_b=rods.body_area(d=0.75), n_s=1)
    assert Printed("26.5", "kip").agrees(R_n)
    assert Printed("292", "kip").agrees(11 * R_n)
    assert Printed("219", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=11 * R_n))
    assert Printed("146", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=11 * R_n))


@published(f"{V16}, Ex. J.3", bolts.required_shear_stress, bolts.tension_with_shear_lrfd)
def test_j3_tension_with_shear_by_lrfd():
    f_rv = bolts.required_shear_stress(V_r=8.00, A_b=rods.body_area(d=0.75))
    assert Printed("18.1", "ksi").agrees(f_rv)
    assert Printed("76.8", "ksi").agrees(bolts.tension_with_shear_lrfd(F_nt=90, F_nv=54, phi=0.75, f_rv=f_rv))


@published(f"{V16}, Ex. J.3", bolts.required_shear_stress, bolts.tension_with_shear_asd, bolts.bolt_tension,
           design.allowable_strength)
def test_j3_tension_with_shear_by_asd():
    """The stress comes from the rounded 12.1 ksi; the strength is printed from full figures."""
    f_rv = bolts.required_shear_stress(V_r=5.33, A_b=rods.body_area(d=0.75))
    assert Printed("12.1", "ksi").agrees(f_rv)
    assert Printed("76.7", "ksi").agrees(bolts.tension_with_shear_asd(F_nt=90, F_nv=54, Omega=2.0,
                                                                     f_rv=Printed("12.1").value))
    F_nt = bolts.tension_with_shear_asd(F_nt=90, F_nv=54, Omega=2.0, f_rv=f_rv)
    R_n = bolts.bolt_tension(F_nt=F_nt, A_b=rods.body_area(d=0.75))
    assert Printed("17.0", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))


@published(f"{V16}, Ex. J.3", bolts.bolt_tension, design.design_strength)
def test_j3_tension_from_the_rounded_stress():
    R_n = bolts.bolt_tension(F_nt=Printed("76.8", "ksi").value, A_b=Printed("0.442", "in2").value)
    assert Printed("25.5", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))


@published(f"{V16}, Ex. J.4A and J.4B", bolts.slip, design.design_strength, design.allowable_strength)
def test_j4_slip():
    """3/4-in. bolts, Class A, two slip planes. 8.88 kip comes from the rounded 19.0 kip."""
    R_n = bolts.slip(mu=0.30, D_u=bolts.MEAN_PRETENSION, h_f=1.0, T_b=28, n_s=2)
    assert Printed("19.0", "kip").agrees(R_n)
    assert Printed("12.7", "kip").agrees(design.allowable_strength(Omega=SLIP.omega, R_n=R_n))
    assert Printed("13.3", "kip").agrees(design.design_strength(phi=SLIP_LONG_SLOT.phi, R_n=R_n))
    assert Printed("8.88", "kip").agrees(design.allowable_strength(Omega=SLIP_LONG_SLOT.omega,
                                                                   R_n=Printed("19.0", "kip").value))


@published(QUIMBY, bolts.slip, design.allowable_strength)
def test_slip_of_a_group():
    R_n = bolts.slip(mu=0.35, D_u=1.13, h_f=1.0, T_b=28, n_s=1)
    assert Printed("11.1", "kip").agrees(R_n)
    assert Printed("122", "kip").agrees(11 * R_n)
    assert Printed("81.2", "kip").agrees(design.allowable_strength(Omega=SLIP.omega, R_n=11 * R_n))


@published(f"{V16}, Ex. II.A-2 (Manual Tables 7-4 and 7-5)", bearing.bearing, bearing.tearout,
           bearing.clear_distance_to_edge, bearing.clear_distance_to_next_hole, design.design_strength,
           design.allowable_strength)
def test_bearing_and_tearout_for_an_inch_of_thickness():
    """3/4-in. bolts in standard holes; at 3 in. bearing governs, at an edge distance of 1-1/4 in. tearout."""
    def strength(l_c):
        least = min(bearing.bearing(d=0.75, t=1.0, F_u=65), bearing.tearout(l_c=l_c, t=1.0, F_u=65))
        return (design.design_strength(phi=RUPTURE.phi, R_n=least),
                design.allowable_strength(Omega=RUPTURE.omega, R_n=least))

    lrfd, asd = strength(bearing.clear_distance_to_next_hole(s=3.0, d_h=13 / 16))
    assert Printed("87.8", "kip").agrees(lrfd)
    assert Printed("58.5", "kip").agrees(asd)
    lrfd, asd = strength(bearing.clear_distance_to_edge(L_e=1.25, d_h=13 / 16))
    assert Printed("49.4", "kip").agrees(lrfd)
    assert Printed("32.9", "kip").agrees(asd)


@published(f"{V16}, Ex. II.C-1", bearing.bearing, bearing.clear_distance_to_edge, bearing.clear_distance_to_next_hole,
           design.allowable_strength)
def test_bearing_and_clear_distances():
    """7/8-in. bolts in 5/8 in. of 65 ksi."""
    R_n = bearing.bearing(d=0.875, t=0.625, F_u=65)
    assert Printed("85.3", "kip").agrees(R_n)
    assert Printed("42.7", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))
    assert Printed("1.03", "in").agrees(bearing.clear_distance_to_edge(L_e=1.5, d_h=15 / 16))
    assert Printed("2.06", "in").agrees(bearing.clear_distance_to_next_hole(s=3.0, d_h=15 / 16))


@published(f"{V16}, Ex. II.C-1", bearing.tearout, design.design_strength, design.allowable_strength)
@pytest.mark.parametrize("l_c, nominal, lrfd, asd", [("1.03", "50.2", "37.7", "25.1"), ("2.06", "100", "75.0", "50.0")])
def test_tearout_from_the_rounded_clear_distance(l_c, nominal, lrfd, asd):
    rounded = Printed(nominal, "kip")
    assert rounded.agrees(bearing.tearout(l_c=Printed(l_c, "in").value, t=0.625, F_u=65))
    assert Printed(lrfd, "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=rounded.value))
    assert Printed(asd, "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=rounded.value))
