"""Slotted hollow sections: by hand, the traps that they set, editions, methods, unit sets, sweeps."""

import numpy as np
import pytest
from printed import Printed
from samples import ASD
from weld_samples import SLOTTED_SI, SQUARE, slotted

from calclib import document
from calclib.calc import evaluate, sweep
from calclib.equations.aisc360 import RUPTURE, SHEAR_YIELDING, YIELDING, members, shear_lag
from calclib.sketch import draw

E16 = {"standard": "AISC 360-16"}
KIP = 4448.2216152605
RECTANGLE = {"section": "HSS6x4x1/4", "weld_length": "8 in"}
SIDES = {**RECTANGLE, "connection": "two side plates"}
PIPE = {"section": "Pipe4STD", "hss_standard": "A53", "F_y": "35 ksi", "F_u": "60 ksi", "weld_length": "6 in",
        "gusset_thickness": "3/8 in"}
EVERY = {"round": {}, "pipe": PIPE, "square": SQUARE, "rectangle": RECTANGLE,
         "shorter side": {**RECTANGLE, "side_along": "shorter side"}, "sides": SIDES,
         "wide plates": {**SIDES, "weld_spacing": "6 in"}, "closed": {"slot_end": "closed"},
         "wide slot": {"slot_width": "3/4 in"}, "own U": {"user_U": "0.8", "user_U_reason": "Tests"}}


def factor(calc):
    return next(s.values["U"] for s in calc["net rupture"].steps if s.equation is members.effective_net_area)


def net(calc):
    return next(s.values["A_n"] for s in calc["net rupture"].steps if s.equation is members.effective_net_area)


def texts(messages):
    return " ".join(m.text for m in messages)


# --- by hand -----------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("basis, rupture", [({}, "307.3"), (E16, "295.9")])
def test_a_square_section_by_hand(basis, rupture):
    """HSS 6x6x3/8 with its full wall, gusset 3/4, four welds of 5/16 by 12 in."""
    calc = evaluate(slotted(**SQUARE, **basis))
    assert Printed("7.471", "in2").agrees(net(calc))
    assert Printed(rupture, "kip").agrees(calc["net rupture"].available)
    assert Printed("334.1", "kip").agrees(calc["weld"].available)
    assert Printed("540.0", "kip").agrees(calc["wall shear yielding"].available)
    assert Printed("526.5", "kip").agrees(calc["wall shear rupture"].available)


def test_factors_of_every_limit_state():
    for basis, lrfd in (({}, True), (ASD, False)):
        for block in evaluate(slotted(**basis)).limit_states:
            if block.reason:
                continue
            factors = SHEAR_YIELDING if "shear yielding" in block.key else YIELDING if "yielding" in block.key \
                else RUPTURE
            expected = factors.phi * block.nominal if lrfd else block.nominal / factors.omega
            assert block.available == pytest.approx(expected, rel=1e-14), block.key


# --- traps -------------------------------------------------------------------------------------------------------

def test_two_walls_are_cut():
    """One cut would leave 7.83 in2, two leave 7.57."""
    assert net(evaluate(slotted())) == pytest.approx(8.09 - 2 * 0.465 * 0.5625, rel=1e-14)
    assert net(evaluate(slotted(slot_width="3/4 in"))) == pytest.approx(8.09 - 2 * 0.465 * 0.75, rel=1e-14)
    assert "Slot width: gusset thickness and 1/16 in, by default" in texts(evaluate(slotted()).assumptions)


def test_a_closed_slot_leaves_the_whole_section_and_says_so():
    calc = evaluate(slotted(slot_end="closed"))
    assert net(calc) == 8.09
    assert "the drawings must say so" in texts(calc.cautions)


def test_side_plates_take_nothing_out():
    assert net(evaluate(slotted(**SIDES))) == 4.3


@pytest.mark.parametrize("standard, wall", [("A500", 0.465), ("A53", 0.465), ("A1085", 0.5), ("A1065", 0.5)])
def test_the_wall_belongs_to_the_standard(standard, wall):
    area = {"gross_area": "8.64 in2"} if wall == 0.5 else {}
    calc = evaluate(slotted(hss_standard=standard, **area))
    assert calc["wall shear yielding"].nominal == pytest.approx(0.6 * 50 * 4 * 16 * wall, rel=1e-12)


def test_the_editions_keep_their_own_factors():
    """Round, l = D: 0.68 by 2016, more by 2022. Side plates 4 by 6 in, l = 6: 0.933 and 0.798."""
    old, new = (factor(evaluate(slotted(weld_length="6 in", **basis))) for basis in (E16, {}))
    assert Printed("0.68").agrees(old)
    assert new > old
    old, new = (factor(evaluate(slotted(**{**SIDES, "weld_length": "6 in"}, **basis))) for basis in (E16, {}))
    assert (round(old, 3), round(new, 3)) == (0.933, 0.798)
    long_old, long_new = (factor(evaluate(slotted(weld_length="7.8 in", **basis))) for basis in (E16, {}))
    assert long_old == 1.0
    assert long_new < 1.0


def test_thirteen_tenths_of_the_diameter_is_reached_in_binary():
    """1.3 * 6.0 is a hair above 7.8; 7.8 in is still enough, 7.79 in is not."""
    assert factor(evaluate(slotted(weld_length="7.8 in", **E16))) == 1.0
    assert factor(evaluate(slotted(weld_length="7.79 in", **E16))) == pytest.approx(1 - 6 / np.pi / 7.79)


@pytest.mark.parametrize("name", EVERY)
@pytest.mark.parametrize("basis", [{}, E16])
def test_the_share_of_area_never_holds(name, basis):
    calc = evaluate(slotted(**EVERY[name], **basis))
    assert shear_lag.shear_lag_factor_by_area not in [s.equation for b in calc.blocks for s in b.steps]
    assert "does not hold for hollow sections" in texts(calc.notes)


def test_no_increase_at_the_end_of_a_rectangular_section():
    for name in ("square", "rectangle", "sides"):
        calc = evaluate(slotted(**EVERY[name]))
        chosen = [s for s in calc["weld"].steps if s.chosen and s.chosen[0] == "k_{ds}"]
        assert [s.result for s in chosen] == [1.0]
        assert "Ends of rectangular hollow sections" in chosen[0].note


def test_long_welds():
    """1/4 in by 30 in: 120 times its size, 0.96 of it counts."""
    calc = evaluate(slotted(weld_length="30 in"))
    assert calc["weld"].nominal == pytest.approx(4 * 42 * 0.707 * 0.25 * 0.96 * 30, rel=1e-12)


def test_which_radius_is_taken_is_said():
    assert "which radius R is" in texts(evaluate(slotted()).cautions)
    assert "which radius R is" not in texts(evaluate(slotted(**SQUARE)).cautions)


def test_a_wide_slot_and_a_short_weld_are_warned_of():
    assert "The gap between slot and gusset is 1/8 in" in texts(evaluate(slotted(slot_width="3/4 in")).cautions)
    assert "shorter than D of 6 in" in texts(evaluate(slotted(weld_length="5 in")).cautions)


def test_slenderness_is_advice_and_fatigue_is_off_and_says_so():
    calc = evaluate(slotted(member_length="60 ft"))
    assert next(r for r in calc.rules if r.key == "slenderness").status == "caution"
    assert calc.passes
    assert "no number of stress cycles" in calc["fatigue"].reason


# --- editions, methods, unit sets, sweeps ------------------------------------------------------------------------

@pytest.mark.parametrize("name", EVERY)
@pytest.mark.parametrize("basis", [{}, E16, ASD, {**E16, **ASD}])
def test_every_section_prints_and_draws(name, basis):
    calc = evaluate(slotted(**{**EVERY[name], **basis}))
    assert document.strength(calc)
    assert [b.key for b in calc.blocks] == [b.key for b in evaluate(slotted()).blocks]
    if not basis:
        draw(calc.case.kind.sketch(calc.x, calc))


def test_unit_sets_agree():
    us, si = evaluate(slotted()), evaluate(slotted(**SLOTTED_SI))
    for block in us.limit_states:
        if block.nominal:
            assert si[block.key].nominal == pytest.approx(KIP * block.nominal, rel=1e-9), block.key


@pytest.mark.parametrize("changes", [{}, E16, SQUARE, SIDES])
def test_a_sweep_is_the_single_cases(changes):
    case = slotted(**changes)
    for plot in case.kind.plots:
        calc = evaluate(case)
        if plot.applies and not plot.applies(calc.x):
            continue
        points = plot.points(calc.x)
        for curve in sweep(case, **points):
            for i in (0, 77, 150):
                if np.isnan(curve.available[i]):
                    continue
                entries = {n: f"{float(v[i])!r} in" for n, v in points.items()}
                assert curve.available[i] == pytest.approx(
                    evaluate(slotted(**{**changes, **entries}))[curve.key].available, rel=1e-12)
