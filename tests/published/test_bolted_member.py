"""Bolted members end to end against published examples; what an example leaves open is chosen so as not to matter.

The AISC examples print three figures and go on with the rounded number. Where only the rounded step gives the printed
digits, the test puts that step into the equation and says so.
"""

import pytest
from bolted import bolted
from printed import Printed, published

from calclib.calc import evaluate
from calclib.equations.aisc360 import RUPTURE, bearing, bolts, connecting, design, members, rods, shear_lag

V16 = "AISC Design Examples v16.0, Ex. "
ASD = {"method": "ASD", "load_level": "ASD"}
D1 = {"section": "W8x21", "connected": "both flanges", "rows": "4", "lines": "2", "pitch": "3 in", "length": "25 ft",
      "first_line": "", "required_strength": "180 kip"}
D6 = {"section": "2L4x4x1/2x3/4", "rows": "8", "pitch": "3 in", "first_line": "2.5 in", "length": "25 ft",
      "required_strength": "240 kip"}
PLATE_14 = {"section": "", "plate_width": "14 in", "plate_thickness": "1/2 in", "rows": "", "pitch": "",
            "end_distance": "", "first_line": "", "gusset_width": "20 in", "gusset_thickness": "3/4 in",
            "required_strength": "50 kip"}


def results(calc, block, equation):
    """Return the results of an equation in a block [base unit]."""
    return [s.result for s in calc[block].steps if s.equation is equation]


@published(V16 + "D.1", shear_lag.shear_lag_factor_by_area, shear_lag.shear_lag_factor,
           shear_lag.least_flange_width_of_case_7, shear_lag.larger_shear_lag_factor, members.net_area_after_holes,
           members.effective_net_area, members.tensile_rupture_of_member, members.slenderness, members.tensile_yielding)
def test_d1_flange_bolted_w_shape():
    """The example reads the centroid of a WT4x10.5, 0.831 in.; the calc computes 0.828 in. from the W8x21."""
    calc = evaluate(bolted(**D1))
    assert Printed("0.684").agrees(*results(calc, "shear lag", shear_lag.shear_lag_factor_by_area))
    assert Printed("0.908").agrees(*results(calc, "shear lag", shear_lag.shear_lag_factor))
    assert Printed("5.52", "in").agrees(*results(calc, "shear lag", shear_lag.least_flange_width_of_case_7))
    assert Printed("4.76", "in2").agrees(*results(calc, "net section", members.net_area_after_holes))
    assert Printed("4.32", "in2").agrees(*results(calc, "net rupture", members.effective_net_area))
    assert Printed("281", "kip").agrees(calc["net rupture"].nominal)
    assert Printed("211", "kip").agrees(calc["net rupture"].available)
    assert Printed("277", "kip").agrees(calc["gross yielding"].available)
    assert Printed("238").agrees(*results(calc, "slenderness", members.slenderness))
    assert [s.result for s in calc["shear lag"].steps if "case 7" in s.cite and s.chosen] == [0.85]
    assert Printed("184", "kip").agrees(evaluate(bolted(**D1 | ASD))["gross yielding"].available)


@published(V16 + "D.1", design.allowable_strength)
def test_d1_rupture_by_asd_from_the_rounded_nominal_strength():
    assert Printed("141", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=Printed("281").value))


@published(V16 + "D.6", shear_lag.shear_lag_factor, members.net_area_after_holes, members.tensile_yielding,
           members.slenderness, members.tensile_rupture_of_member)
def test_d6_double_angle():
    calc = evaluate(bolted(**D6))
    assert Printed("0.944").agrees(*results(calc, "shear lag", shear_lag.shear_lag_factor))
    assert results(calc, "net section", members.net_area_after_holes) == [pytest.approx(6.625)]     # printed 6.63
    assert Printed("6.63", "in2").agrees(6.625)
    assert Printed("338", "kip").agrees(calc["gross yielding"].available)
    assert Printed("305", "kip").agrees(calc["net rupture"].available)
    assert Printed("248").agrees(*results(calc, "slenderness", members.slenderness))
    assert Printed("225", "kip").agrees(evaluate(bolted(**D6 | ASD))["gross yielding"].available)


@published(V16 + "D.6", members.effective_net_area, members.tensile_rupture_of_member, design.allowable_strength)
def test_d6_rupture_from_rounded_steps():
    A_e = members.effective_net_area(A_n=Printed("6.63").value, U=Printed("0.944").value)
    P_n = members.tensile_rupture_of_member(F_u=65, A_e=Printed("6.26").value)
    assert Printed("6.26", "in2").agrees(A_e)
    assert Printed("407", "kip").agrees(P_n)
    assert Printed("204", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=Printed("407").value))


@published(V16 + "D.9", members.width_of_hole_deducted, members.net_area_after_holes, members.net_area_with_stagger)
def test_d9_staggered_plate():
    """Lines 3, 4 and 3 in. apart, the inner holes 2-1/2 in. nearer to the end; all four holes are on the chain."""
    calc = evaluate(bolted(**PLATE_14, bolt_places="2 in, 5 in; 2 in, 9 in; 4.5 in, 2 in; 4.5 in, 12 in"))
    A_n, = results(calc, "net section", members.net_area_with_stagger)
    assert Printed("11.5", "in").agrees(A_n / 0.5)
    assert "Governing chain: 4 holes" in calc["net section"].steps[1].note
    assert "2 holes, net width 12-1/4 in" in calc["net section"].steps[1].note


@published("T. B. Quimby, A Beginner's Guide to the Steel Construction Manual, failure path Ex01",
           members.net_area_after_holes, members.net_area_with_stagger)
def test_staggered_plate_of_quimby():
    """Four holes in a plate 12 x 3/8, two gage spaces of 3 in. with a pitch of 3 in., one that is square."""
    calc = evaluate(bolted(**PLATE_14 | {"plate_width": "12 in", "plate_thickness": "3/8 in"},
                           bolt_places="2 in, 4.5 in; 2 in, 7.5 in; 5 in, 1.5 in; 5 in, 10.5 in"))
    A_n, = results(calc, "net section", members.net_area_with_stagger)
    assert Printed("3.75", "in2").agrees(A_n)


@published("NSCP 2015 lecture notes, Ex. 2.1", members.gross_area_of_plate, members.tensile_rupture_of_member,
           members.net_area_after_holes)
def test_plate_in_si():
    """PL 127 x 13, two 16 mm bolts on the section."""
    calc = evaluate(bolted(
        units="SI", required_strength="100 kN", section="", plate_width="127 mm", plate_thickness="13 mm",
        F_y="250 MPa", F_u="400 MPa", bolt_diameter="16 mm", rows="3", lines="2", pitch="60 mm", gage="60 mm",
        end_distance="40 mm", first_line="", gusset_F_y="250 MPa", gusset_F_u="400 MPa", gusset_thickness="20 mm",
        gusset_width="250 mm", gusset_end="40 mm"))
    assert Printed("1651", "mm2").agrees(*results(calc, "section", members.gross_area_of_plate))
    assert Printed("412.75", "kN").agrees(calc["gross yielding"].nominal, "N")
    assert Printed("371.475", "kN").agrees(calc["gross yielding"].available, "N")
    assert Printed("452.4", "kN").agrees(calc["net rupture"].nominal, "N")
    assert Printed("339.30", "kN").agrees(calc["net rupture"].available, "N")


@published(V16 + "II.A-2", rods.body_area, bolts.bolt_shear, bearing.bearing, bearing.tearout,
           bearing.clear_distance_to_edge, bearing.clear_distance_to_next_hole)
def test_values_of_one_bolt_in_tables_of_the_manual():
    """Table values for 3/4-in. bolts in steel of 65 ksi: kip per in. of thickness, with phi 0.75; shear in kip."""
    calc = evaluate(bolted(section="", plate_width="8 in", plate_thickness="1 in", first_line="", rows="3",
                           end_distance="1.25 in", gusset_thickness="1 in", gusset_width="12 in"))
    shear, = results(calc, "bolt shear", bolts.bolt_shear)
    assert Printed("17.9", "kip").agrees(0.75 * shear)
    assert Printed("11.9", "kip").agrees(shear / 2)
    assert Printed("87.8", "kip").agrees(0.75 * results(calc, "bolt group", bearing.bearing)[0])
    assert Printed("49.4", "kip").agrees(0.75 * results(calc, "bolt group", bearing.tearout)[0])
    assert Printed("32.9", "kip").agrees(results(calc, "bolt group", bearing.tearout)[0] / 2)


@published(V16 + "II.C-1", bearing.clear_distance_to_edge, bearing.clear_distance_to_next_hole, bearing.bearing)
def test_clear_distances_of_seven_eighths_bolts():
    calc = evaluate(bolted(section="", plate_width="8 in", plate_thickness="5/8 in", first_line="", rows="3",
                           bolt_diameter="7/8 in", end_distance="1.5 in", gusset_width="12 in"))
    assert Printed("85.3", "kip").agrees(results(calc, "bolt group", bearing.bearing)[0])
    assert Printed("1.03", "in").agrees(results(calc, "bolt group", bearing.clear_distance_to_edge)[0])
    assert Printed("2.06", "in").agrees(results(calc, "bolt group", bearing.clear_distance_to_next_hole)[0])
    assert Printed("16.2", "kip").agrees(results(calc, "bolt shear", bolts.bolt_shear)[0] / 2)


@published(V16 + "II.C-1", connecting.spread_width)
def test_width_of_spread():
    """Lines 4 in. apart, 8 in. long."""
    calc = evaluate(bolted(section="", plate_width="8 in", plate_thickness="1/2 in", first_line="", lines="2",
                           gage="4 in", rows="3", pitch="4 in", gusset_width="30 in"))
    assert Printed("13.2", "in").agrees(*results(calc, "gusset spread", connecting.spread_width))


@published(V16 + "J.4A, J.4B", bolts.slip)
@pytest.mark.parametrize("hole, printed", [("standard", "12.7"), ("long slot", None)])
def test_slip_of_one_bolt(hole, printed):
    """3/4-in. bolts with two slip planes: double angles."""
    calc = evaluate(bolted(joint="slip-critical", hole_kind=hole, slot_direction="along the force",
                           method="ASD", load_level="ASD"))
    r_n, = results(calc, "slip", bolts.slip)
    assert Printed("19.0", "kip").agrees(r_n)
    if printed:
        assert Printed(printed, "kip").agrees(calc["slip"].available / 4)
    else:
        assert calc["slip"].factors.omega == 2.14


@published(V16 + "J.4B", bolts.slip, design.design_strength)
def test_slip_in_long_slots_by_lrfd():
    calc = evaluate(bolted(joint="slip-critical", hole_kind="long slot", slot_direction="along the force"))
    assert Printed("13.3", "kip").agrees(calc["slip"].available / 4)


@published("T. B. Quimby, A Beginner's Guide to the Steel Construction Manual, Ex. 4.1", bolts.strength_of_equal_bolts)
def test_eleven_bolts():
    """Slip of one bolt 11.074 kip, shear of one 26.507 kip, both printed with three figures."""
    assert Printed("122", "kip").agrees(bolts.strength_of_equal_bolts(n=11, r_n=11.074))
    assert Printed("292", "kip").agrees(bolts.strength_of_equal_bolts(n=11, r_n=26.507))
