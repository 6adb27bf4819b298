"""A slotted round hollow section against AISC Design Examples v16.0, Ex. D.5. Every row rounds from full precision."""

from printed import Printed, published
from weld_samples import slotted

from calclib.calc import evaluate
from calclib.equations.aisc360 import design, hollow, members, shear_lag

D5 = {"required_strength": "240 kip", "member_length": "30 ft"}
SOURCE = "AISC Design Examples v16.0, Ex. D.5"


def step(calc, block, equation):
    """Return a result of an equation in a block [base unit]."""
    return next(s.result for s in calc[block].steps if s.equation is equation)


@published(SOURCE, hollow.half_arc_beside_gusset, hollow.centroid_of_slotted_round_hss_2022,
           shear_lag.shear_lag_factor_of_slotted_round_hss_2022, hollow.slot_width, hollow.net_area_of_slotted_hss,
           members.effective_net_area, members.tensile_rupture_of_member, members.tensile_yielding, members.slenderness,
           design.design_strength)
def test_d5_by_lrfd():
    calc = evaluate(slotted(**D5))
    assert Printed("1.49").agrees(step(calc, "shear lag", hollow.half_arc_beside_gusset))
    assert Printed("1.76", "in").agrees(step(calc, "shear lag", hollow.centroid_of_slotted_round_hss_2022))
    assert Printed("0.991").agrees(step(calc, "shear lag", shear_lag.shear_lag_factor_of_slotted_round_hss_2022))
    assert step(calc, "net rupture", hollow.slot_width) == 0.5625
    assert Printed("7.57", "in2").agrees(step(calc, "net rupture", hollow.net_area_of_slotted_hss))
    assert Printed("7.50", "in2").agrees(step(calc, "net rupture", members.effective_net_area))
    assert Printed("465", "kip").agrees(calc["net rupture"].nominal)
    assert Printed("349", "kip").agrees(calc["net rupture"].available)
    assert Printed("364", "kip").agrees(calc["gross yielding"].available)
    assert Printed("184").agrees(step(calc, "slenderness", members.slenderness))


@published(SOURCE, design.allowable_strength)
def test_d5_by_asd():
    calc = evaluate(slotted(**{**D5, "required_strength": "160 kip"}, method="ASD", load_level="ASD"))
    assert Printed("233", "kip").agrees(calc["net rupture"].available)
    assert Printed("242", "kip").agrees(calc["gross yielding"].available)
