"""Pin-connected plates against AISC Design Examples, chapter D.

The examples print three figures and go on with the rounded number. Where only the rounded step gives the printed
digits, the test puts that step into the equation and says so.
"""

import pytest
from printed import Printed, published
from samples import plate

from calclib.calc import evaluate
from calclib.equations.aisc360 import RUPTURE, YIELDING, design, members, pins

V16 = "AISC Design Examples v16.0, Ex. D.7"
V15 = "AISC Design Examples v14.x / v15, Ex. D.7"
# The example names no pin; its steel is taken to be no weaker than the plate.
D7 = {"required_strength": "24 kip", "plate_width": "4.25 in", "plate_thickness": "0.500 in", "pin_diameter": "1.00 in",
      "hole_diameter": "1.03 in", "end_distance": "2.25 in", "corner_distance": "2.50 in", "pin_F_y": "50 ksi"}
D7_ASD = {**D7, "method": "ASD", "load_level": "ASD", "required_strength": "16 kip"}
D7_A36 = {**D7, "standard": "AISC 360-16", "steel": "ASTM A36", "F_y": "36 ksi", "F_u": "58 ksi"}


def step(calc, block, equation):
    """Return the result of an equation in a block [base unit]."""
    return next(s.result for s in calc[block].steps if s.equation is equation)


@published(V16, pins.centred_side_distance, pins.effective_width_by_thickness, pins.effective_width,
           pins.least_end_distance, pins.least_width)
def test_d7_dimensions():
    calc = evaluate(plate(**D7))
    assert Printed("1.61", "in").agrees(step(calc, "geometry", pins.centred_side_distance))
    assert Printed("1.63", "in").agrees(step(calc, "geometry", pins.effective_width_by_thickness))
    assert Printed("1.61", "in").agrees(step(calc, "geometry", pins.effective_width))
    assert Printed("2.14", "in").agrees(step(calc, "dimensions", pins.least_end_distance))
    assert Printed("4.22", "in").agrees(step(calc, "dimensions", pins.least_width))
    assert [r.status for r in calc.rules if r.key in ("width", "end distance", "corner cut")] == ["meets"] * 3


@published(V16, pins.tensile_rupture, pins.shear_area_at_pin, pins.shear_rupture_with_hole_factor,
           pins.projected_bearing_area, pins.pin_bearing, members.gross_area_of_plate)
def test_d7_nominal_strengths():
    calc = evaluate(plate(**D7))
    assert Printed("105", "kip").agrees(calc["tensile rupture"].nominal)
    assert Printed("2.75", "in2").agrees(step(calc, "shear rupture", pins.shear_area_at_pin))
    assert next(s.result for s in calc["shear rupture"].steps if s.chosen) == 1.0    # C_r, a hole up to 1/32 in larger
    assert Printed("107", "kip").agrees(calc["shear rupture"].nominal)
    assert Printed("45.0", "kip").agrees(calc["pin bearing"].nominal)
    assert Printed("2.13", "in2").agrees(step(calc, "gross yielding", members.gross_area_of_plate))


@published(V16, design.design_strength)
def test_d7_bearing_governs_by_lrfd():
    calc = evaluate(plate(**D7))
    assert calc.governing.key == "pin bearing"
    assert Printed("33.8", "kip").agrees(calc.governing.available)
    assert calc.passes


@published(V16, design.allowable_strength)
def test_d7_bearing_governs_by_asd():
    calc = evaluate(plate(**D7_ASD))
    assert calc.governing.key == "pin bearing"
    assert Printed("22.5", "kip").agrees(calc.governing.available)
    assert calc.passes


@published(V16, design.design_strength, design.allowable_strength)
@pytest.mark.parametrize("rounded, factors, lrfd, asd", [
    ("105", RUPTURE, "78.8", "52.5"),      # tensile rupture, from P_n 104.65 printed 105
    ("107", RUPTURE, "80.3", "53.5"),      # shear rupture, from P_n 107.25 printed 107
    ("107", YIELDING, "96.3", "64.1"),     # yielding, from P_n 106.5 printed 107
])
def test_d7_available_strength_from_the_rounded_nominal_strength(rounded, factors, lrfd, asd):
    nominal = Printed(rounded, "kip").value
    assert Printed(lrfd, "kip").agrees(design.design_strength(phi=factors.phi, R_n=nominal))
    assert Printed(asd, "kip").agrees(design.allowable_strength(Omega=factors.omega, R_n=nominal))


@published(V16, members.tensile_yielding)
def test_d7_yielding_from_the_rounded_gross_area():
    """2.125 in2 is printed 2.13 and carried on: 107 kip instead of 106.25."""
    assert Printed("107", "kip").agrees(members.tensile_yielding(F_y=50, A_g=Printed("2.13", "in2").value))


@published(V15, pins.tensile_rupture, pins.shear_area_at_pin, pins.shear_rupture, pins.pin_bearing,
           members.gross_area_of_plate)
def test_d7_in_a36_by_the_2016_edition():
    calc = evaluate(plate(**D7_A36))
    assert Printed("93.4", "kip").agrees(calc["tensile rupture"].nominal)
    assert Printed("2.75", "in2").agrees(step(calc, "shear rupture", pins.shear_area_at_pin))
    assert Printed("95.7", "kip").agrees(calc["shear rupture"].nominal)
    assert Printed("32.4", "kip").agrees(calc["pin bearing"].nominal)
    assert Printed("2.13", "in2").agrees(step(calc, "gross yielding", members.gross_area_of_plate))


@published(V15, members.tensile_yielding)
def test_d7_in_a36_yielding_from_the_rounded_gross_area():
    assert Printed("76.7", "kip").agrees(members.tensile_yielding(F_y=36, A_g=Printed("2.13", "in2").value))


@published("AISC Design Examples v16.0, Ex. D.1, D.3, D.5, D.6; Ex. II.C-1", members.tensile_yielding,
           design.design_strength, design.allowable_strength)
@pytest.mark.parametrize("F_y, A_g, lrfd, asd", [
    (50, 6.16, "277", "184"),      # D.1
    (50, 5.84, "263", "175"),      # D.3
    (50, 8.09, "364", "242"),      # D.5
    (50, 7.50, "338", "225"),      # D.6
    (50, 5.36, "241", "160"),      # II.C-1
])
def test_yielding_of_the_gross_section(F_y, A_g, lrfd, asd):
    nominal = members.tensile_yielding(F_y=F_y, A_g=A_g)
    assert Printed(lrfd, "kip").agrees(design.design_strength(phi=YIELDING.phi, R_n=nominal))
    assert Printed(asd, "kip").agrees(design.allowable_strength(Omega=YIELDING.omega, R_n=nominal))


@published("NSCP 2015 lecture notes, Ex. 2.1", members.gross_area_of_plate, members.tensile_yielding,
           design.design_strength)
def test_yielding_of_a_plate_in_si():
    A_g = members.gross_area_of_plate(w=127, t=13)
    P_n = members.tensile_yielding(F_y=250, A_g=A_g)
    assert Printed("1651", "mm2").agrees(A_g)
    assert Printed("412.75", "kN").agrees(P_n, "N")
    assert Printed("371.475", "kN").agrees(design.design_strength(phi=YIELDING.phi, R_n=P_n), "N")
