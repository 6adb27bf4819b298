"""Built-up members against AISC Design Examples, chapter D: two angles back to back, and the Manual's double angles.

Example D.6 goes on with its rounded steps; where only a rounded step gives the printed digits, the test puts it in.
"""

import pytest
from built_up_samples import built_up_case
from printed import Printed, published

from calclib.calc import evaluate
from calclib.equations.aisc360 import RUPTURE, built_up, design, members, shear_lag
from calclib.tables.shapes import shape

D6 = "AISC Design Examples v16.0, Ex. D.6"
# 2L4x4x1/2 with eight 3/4 in bolts in one line; its radius of gyration r_y is that of a gap of 3/8 in.
CASE = {"arrangement": "two angles, long legs back to back", "section": "L4x4x1/2", "back_to_back": "3/8 in",
        "held_by": "intermittent welds", "connector_spacing": "75 in", "connector_holes": "0", "connector_hole": "",
        "end_connection": "bolts", "connected": "web, leg or plate at the gusset", "connection_length": "21 in",
        "holes": "1", "flange_holes": "0", "hole_diameter": "13/16 in", "length": "25 ft", "line_distance": "",
        "plate_thickness": "", "tie_length": "", "tie_fastener_spacing": "", "required_strength": "240 kip"}


def d6(**changes):
    return evaluate(built_up_case(**{**CASE, **changes}))


def step(calc, block, equation):
    return next(s.result for s in calc[block].steps if s.equation is equation)


@published(D6, built_up.gross_area_of_equal_parts, members.net_area_after_holes, shear_lag.shear_lag_factor,
           members.tensile_yielding, members.tensile_rupture_of_member, design.design_strength)
def test_d6_by_lrfd():
    calc = d6()
    assert Printed("7.50", "in2").agrees(step(calc, "areas", built_up.gross_area_of_equal_parts))
    assert Printed("6.63", "in2").agrees(step(calc, "net area", members.net_area_after_holes))
    assert Printed("0.944").agrees(step(calc, "shear lag", shear_lag.larger_shear_lag_factor))
    assert Printed("338", "kip").agrees(calc["gross yielding"].available)
    assert Printed("305", "kip").agrees(calc["rupture at the connection"].available)
    assert calc.governing.key == "rupture at the connection"
    assert calc.passes


@published(D6, members.tensile_yielding, design.allowable_strength)
def test_d6_by_asd():
    calc = d6(method="ASD", load_level="ASD", required_strength="160 kip")
    assert Printed("225", "kip").agrees(calc["gross yielding"].available)
    assert calc.governing.key == "rupture at the connection"


@published(D6, members.effective_net_area, members.tensile_rupture_of_member, design.allowable_strength)
def test_d6_rupture_from_the_rounded_steps():
    A_e = members.effective_net_area(A_n=Printed("6.63", "in2").value, U=Printed("0.944").value)
    assert Printed("6.26", "in2").agrees(A_e)
    P_n = members.tensile_rupture_of_member(F_u=65, A_e=Printed("6.26", "in2").value)
    assert Printed("407", "kip").agrees(P_n)
    assert Printed("204", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=Printed("407", "kip").value))


@published(D6, built_up.offset_back_to_back, built_up.radius_of_gyration_of_pair, built_up.least_radius_of_gyration,
           members.slenderness)
def test_d6_slenderness():
    calc = d6()
    assert Printed("1.83", "in").agrees(step(calc, "slenderness", built_up.radius_of_gyration_of_pair))
    assert Printed("1.21", "in").agrees(step(calc, "slenderness", built_up.least_radius_of_gyration))
    assert Printed("248").agrees(step(calc, "slenderness", members.slenderness))


@published("AISC Shapes Database v16.0, double angles", built_up.offset_back_to_back,
           built_up.radius_of_gyration_of_pair)
@pytest.mark.parametrize("name", ["2L6x6x1/2", "2L8x4x1/2x3/8LLBB", "2L5x3x1/4x3/4SLBB", "2L3x3x1/4x3/8"])
def test_radii_of_the_manuals_double_angles(name):
    """The table was made from unrounded angles; the angle's three digits leave 2 in 1000."""
    pair = shape(name)
    angle = shape(pair.parent)
    short = pair.backs == "short legs"
    e_1 = built_up.offset_back_to_back(s=pair.s or 0.0, x_bar=angle.y if short else angle.x)
    r = built_up.radius_of_gyration_of_pair(r_1=angle.r_x if short else angle.r_y, e_1=e_1)
    assert r == pytest.approx(pair.r_y, rel=0.004)
