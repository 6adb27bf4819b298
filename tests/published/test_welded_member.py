"""Welded tension members against AISC Design Examples v16.0, chapters D, J and part II.

The examples print three figures and go on with the rounded number. Where only the rounded step gives the printed
digits, the test puts that step into the equation and says so.
"""

from printed import Printed, published
from weld_samples import welded

from calclib.calc import evaluate
from calclib.equations.aisc360 import RUPTURE, YIELDING, connecting, design, members, shear_lag, weld_groups, welds

D3 = {"section": "WT6x20", "welded_element": "flange", "steel": "ASTM A992", "weld_length_1": "16 in",
      "required_strength": "240 kip", "member_length": "30 ft", "gusset_width": "30 in"}
J1 = {"section": "", "welded_element": "", "plate_width": "18 in", "plate_thickness": "1/4 in",
      "weld_length_1": "27 in", "weld_size": "3/16 in", "gusset_width": "40 in"}
# The copy that was read prints 5/8 for the thickness; area and centroid are those of 3/8.
C1 = {"section": "2L4x3-1/2x3/8x3/8LLBB", "welded_element": "long leg", "weld_length_1": "8 in",
      "gusset_thickness": "1/2 in", "gusset_width": "16 in"}
ASD = {"method": "ASD", "load_level": "ASD"}


def step(calc, block, equation):
    """Return the result of an equation in a block [base unit]."""
    return next(s.result for s in calc[block].steps if s.equation is equation)


@published("AISC Design Examples v16.0, Ex. D.3", shear_lag.shear_lag_factor_by_area,
           shear_lag.shear_lag_factor_of_longitudinal_welds, shear_lag.average_weld_length,
           shear_lag.larger_shear_lag_factor, members.effective_net_area, members.tensile_rupture_of_member,
           members.tensile_yielding, members.slenderness, weld_groups.area_of_strips, design.design_strength)
def test_d3_tee_welded_by_its_flange():
    calc = evaluate(welded(**D3))
    assert Printed("0.706").agrees(step(calc, "shear lag", shear_lag.shear_lag_factor_by_area))
    assert Printed("0.860").agrees(step(calc, "shear lag", shear_lag.shear_lag_factor_of_longitudinal_welds))
    assert step(calc, "shear lag", shear_lag.average_weld_length) == 16.0
    assert Printed("0.860").agrees(step(calc, "shear lag", shear_lag.larger_shear_lag_factor))
    assert Printed("4.13", "in2").agrees(step(calc, "shear lag", weld_groups.area_of_strips))
    assert Printed("5.02", "in2").agrees(step(calc, "net rupture", members.effective_net_area))
    assert Printed("326", "kip").agrees(calc["net rupture"].nominal)
    assert Printed("245", "kip").agrees(calc["net rupture"].available)
    assert Printed("263", "kip").agrees(calc["gross yielding"].available)
    assert Printed("229").agrees(step(calc, "slenderness", members.slenderness))


@published("AISC Design Examples v16.0, Ex. D.3", design.allowable_strength)
def test_d3_by_asd():
    calc = evaluate(welded(**{**D3, **ASD, "required_strength": "160 kip"}))
    assert Printed("163", "kip").agrees(calc["net rupture"].available)
    assert Printed("175", "kip").agrees(calc["gross yielding"].available)


@published("AISC Design Examples v16.0, Ex. J.1", welds.throat_of_fillet, welds.area_of_fillet, welds.stress_of_fillet,
           welds.length_factor_of_fillet, welds.effective_length_of_fillet, welds.fillet_strength_2022,
           weld_groups.area_of_pairs_of_welds, weld_groups.area_along_welds, connecting.shear_rupture_of_element)
def test_j1_long_fillets():
    calc = evaluate(welded(**J1))
    assert Printed("0.912").agrees(step(calc, "weld", welds.length_factor_of_fillet))
    assert Printed("5.57", "kip").agrees(welds.fillet_strength_2022(
        F_nw=welds.stress_of_fillet(F_EXX=70), A_we=welds.area_of_fillet(t_e=welds.throat_of_fillet(w=3 / 16), l_e=1),
        k_ds=1.0))
    assert Printed("274", "kip").agrees(calc["weld"].nominal)
    assert Printed("206", "kip").agrees(calc["weld"].available)
    assert Printed("137", "kip").agrees(evaluate(welded(**J1, **ASD))["weld"].available)
    assert Printed("527", "kip").agrees(calc["member shear rupture"].nominal)
    assert Printed("395", "kip").agrees(calc["member shear rupture"].available)


@published("AISC Design Examples v16.0, Ex. J.1", design.allowable_strength)
def test_j1_base_metal_by_asd_from_the_rounded_nominal_strength():
    """526.5 is printed 527 and carried on: 264 kip instead of 263."""
    nominal = Printed("527", "kip").value
    assert Printed("264", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=nominal))


@published("AISC Design Examples v16.0, Ex. II.C-1", members.tensile_yielding,
           shear_lag.shear_lag_factor_of_longitudinal_welds, members.effective_net_area, connecting.spread_width)
def test_c1_double_angle_brace():
    calc = evaluate(welded(**C1))
    assert Printed("268", "kip").agrees(calc["gross yielding"].nominal)
    assert Printed("241", "kip").agrees(calc["gross yielding"].available)
    assert Printed("160", "kip").agrees(evaluate(welded(**C1, **ASD))["gross yielding"].available)
    assert Printed("0.814").agrees(step(calc, "shear lag", shear_lag.shear_lag_factor_of_longitudinal_welds))
    assert Printed("4.36", "in2").agrees(step(calc, "net rupture", members.effective_net_area))
    assert Printed("142", "kip").agrees(evaluate(welded(**C1, **ASD))["net rupture"].available)
    assert Printed("13.2", "in").agrees(step(calc, "gusset spread", connecting.spread_width))
    assert Printed("198", "kip").agrees(evaluate(welded(**C1, **ASD))["gusset yielding"].available)


@published("AISC Design Examples v16.0, Ex. II.C-1", members.tensile_rupture_of_member, design.design_strength)
def test_c1_rupture_from_the_rounded_area():
    """4.36201 in2 is printed 4.36 and carried on: 283 kip, and from it 212."""
    P_n = members.tensile_rupture_of_member(F_u=65, A_e=Printed("4.36", "in2").value)
    assert Printed("283", "kip").agrees(P_n)
    assert Printed("212", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=Printed("283", "kip").value))


@published("AISC Design Examples v16.0, Ex. II.C-1", connecting.tensile_yielding_of_element, design.design_strength)
def test_c1_gusset_from_the_rounded_width():
    A_g = Printed("13.2", "in").value * 0.5
    R_n = connecting.tensile_yielding_of_element(F_y=50, A_g=A_g)
    assert Printed("6.60", "in2").agrees(A_g)
    assert Printed("330", "kip").agrees(R_n)
    assert Printed("297", "kip").agrees(design.design_strength(phi=YIELDING.phi, R_n=R_n))
