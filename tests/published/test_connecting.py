"""Connecting elements against AISC Design Examples.

Where an example goes on with its rounded number, the test puts that number in and says so.
"""

from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, SHEAR_YIELDING, YIELDING, connecting, design, members

C1 = "AISC Design Examples v16.0, Ex. II.C-1"


@published(C1, connecting.gross_area_of_cuts, connecting.net_area_of_cuts)
def test_areas_of_the_clip_angles():
    """Two legs 15 x 5/8, five 7/8-in. bolts, 1.00 in. deducted for each; 1-1/2 in. to the end, 2 in. to the edge."""
    def areas(length, holes):
        gross = connecting.gross_area_of_cuts(n_c=2, L_c=length, t=0.625)
        return gross, connecting.net_area_of_cuts(A_gv=gross, n_h=2 * holes, d_e=1.0, t=0.625)

    gross, net = areas(15.0, 5)
    assert Printed("18.8", "in2").agrees(gross)
    assert Printed("12.5", "in2").agrees(net)
    gross, net = areas(13.5, 4.5)
    assert Printed("16.9", "in2").agrees(gross)
    assert Printed("11.3", "in2").agrees(net)
    assert Printed("1.88", "in2").agrees(areas(2.0, 0.5)[1])


@published(C1, connecting.shear_yielding, design.design_strength, design.allowable_strength)
def test_shear_yielding_from_the_rounded_area():
    R_n = connecting.shear_yielding(F_y=50, A_gv=Printed("18.8", "in2").value)
    assert Printed("564", "kip").agrees(R_n)
    assert Printed("564", "kip").agrees(design.design_strength(phi=SHEAR_YIELDING.phi, R_n=R_n))
    assert Printed("376", "kip").agrees(design.allowable_strength(Omega=SHEAR_YIELDING.omega, R_n=R_n))


@published(C1, connecting.shear_rupture_of_element, design.design_strength, design.allowable_strength)
def test_shear_rupture():
    R_n = connecting.shear_rupture_of_element(F_u=65, A_nv=12.5)
    assert Printed("488", "kip").agrees(R_n)
    assert Printed("366", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))
    assert Printed("244", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))


@published(C1, connecting.block_shear, design.design_strength, design.allowable_strength)
def test_block_shear_from_rounded_areas():
    R_n = connecting.block_shear(F_u=65, F_y=50, A_nv=Printed("11.3").value, A_gv=Printed("16.9").value, U_bs=1.0,
                                 A_nt=Printed("1.88").value)
    rounded = Printed("563", "kip")
    assert rounded.agrees(R_n)
    assert Printed("422", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=rounded.value))
    assert Printed("282", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=rounded.value))


@published(C1, connecting.block_shear)
def test_yielding_side_of_block_shear():
    """629 kip is printed as the limit; a shear rupture term above it makes it the strength."""
    R_n = connecting.block_shear(F_u=65, F_y=50, A_nv=100.0, A_gv=Printed("16.9").value, U_bs=1.0,
                                 A_nt=Printed("1.88").value)
    assert Printed("629", "kip").agrees(R_n)


@published(C1, connecting.spread_width)
def test_spread_width():
    assert Printed("13.2", "in").agrees(connecting.spread_width(w_0=4.0, L_s=8.0, theta=connecting.SPREAD))


@published(C1, members.gross_area_of_plate, connecting.tensile_yielding_of_element, design.design_strength,
           design.allowable_strength)
def test_yielding_of_the_spread_width_from_its_rounded_value():
    A_g = members.gross_area_of_plate(w=Printed("13.2", "in").value, t=0.5)
    R_n = connecting.tensile_yielding_of_element(F_y=50, A_g=A_g)
    assert Printed("6.60", "in2").agrees(A_g)
    assert Printed("330", "kip").agrees(R_n)
    assert Printed("297", "kip").agrees(design.design_strength(phi=YIELDING.phi, R_n=R_n))
    assert Printed("198", "kip").agrees(design.allowable_strength(Omega=YIELDING.omega, R_n=R_n))


SEGUI = "Segui, Ex. 3.10 and 3.11: the plate required in A36 for P_u 104.8 and P_a 70 kip"


@published(SEGUI, connecting.tensile_yielding_of_element, connecting.tensile_rupture_of_element, design.design_strength)
def test_least_areas_by_lrfd():
    """The example solves for the areas; put back, they give the required strength."""
    R_n = connecting.tensile_yielding_of_element(F_y=36, A_g=Printed("3.235", "in2").value)
    assert Printed("104.8", "kip").agrees(design.design_strength(phi=YIELDING.phi, R_n=R_n))
    R_n = connecting.tensile_rupture_of_element(F_u=58, A_e=Printed("2.409", "in2").value)
    assert Printed("104.8", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))


@published(SEGUI, connecting.tensile_rupture_of_element, design.allowable_strength)
def test_least_area_by_asd():
    R_n = connecting.tensile_rupture_of_element(F_u=58, A_e=Printed("2.414", "in2").value)
    assert Printed("70.0", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))
