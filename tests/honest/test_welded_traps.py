"""Welded tension members: by hand, the traps that welded ends set, editions, methods, unit sets, sweeps."""

from math import pi, sqrt

import numpy as np
import pytest
from printed import Printed
from samples import ASD
from weld_samples import FLAT, WELDED_SI, flat, welded

from calclib import document
from calclib.block_paths import weld_block
from calclib.calc import evaluate, sweep
from calclib.equations.aisc360 import RUPTURE, SHEAR_YIELDING, YIELDING, shear_lag, weld_groups, welds
from calclib.sketch import draw

E16 = {"standard": "AISC 360-16"}
KIP = 4448.2216152605
MIXED = {"weld_layout": "longitudinal and transverse"}
ACROSS = {"weld_layout": "transverse", "weld_length_1": "4 in"}
ANGLE = {"section": "L4x3x3/8", "welded_element": "long leg"}
PAIR = {"section": "2L4x3-1/2x3/8x3/8LLBB", "welded_element": "long leg", "gusset_thickness": "3/8 in"}
EVERY = {
    "tee": {}, "angle": ANGLE, "short leg": {**ANGLE, "welded_element": "short leg"}, "double angle": PAIR,
    "channel": {"section": "C10x20", "welded_element": "web"},
    "flanges": {"section": "W8x21", "welded_element": "both flanges"},
    "web": {"section": "W12x40", "welded_element": "web", "weld_spacing": "8 in"},
    "plate": FLAT, "plate between gussets": {**FLAT, "plate_lap": "both faces, a gusset on each"},
    "mixed": {**FLAT, **MIXED}, "mixed angle": {**ANGLE, **MIXED, "concentric": "yes"},
    "across": {**FLAT, **ACROSS}, "across at both ends": {**FLAT, **ACROSS, "transverse_ends": "both ends"},
    "short of the edge": {**FLAT, "weld_spacing": "5 in"}, "own U": {"user_U": "0.8", "user_U_reason": "Tests"},
}


def used(calc, block):
    return {s.equation.name for s in calc[block].steps if s.equation}


def result(calc, block, equation):
    return next(s.result for s in calc[block].steps if s.equation is equation)


def rule(calc, key):
    return next(r for r in calc.rules if r.key == key)


def texts(messages):
    return " ".join(m.text for m in messages)


# --- by hand -----------------------------------------------------------------------------------------------------

def test_the_new_equations_by_hand():
    assert weld_groups.area_of_equal_welds(n=2, A_we1=1.5) == 3.0
    assert weld_groups.sum_of_mixed_fillets(R_nwl=100.0, R_nwt=20.0) == 120.0
    assert weld_groups.clear_depth_of_web(d=12.0, t_f=0.5) == 11.0
    area, inertia = 6.0 * 0.5, 6.0 * 0.5 ** 3 / 12
    assert weld_groups.radius_of_gyration_of_plate(t=0.5) == pytest.approx(sqrt(inertia / area), rel=1e-14)


def test_mixed_welds_give_both_sums_and_the_larger():
    """Two fillets of 8 in and one of 4 in, 1/4 in, E70: 148.5 and 145.5 kip."""
    calc = evaluate(flat(**MIXED, plate_width="4 in", concentric="yes", gusset_width="12 in"))
    step = next(s for s in calc["weld"].steps if s.equation is welds.strength_of_mixed_fillets)
    plain = step.values["R_nwl"] + step.values["R_nwt"]
    other = 0.85 * step.values["R_nwl"] + 1.5 * step.values["R_nwt"]
    assert Printed("148.5", "kip").agrees(plain)
    assert Printed("145.5", "kip").agrees(other)
    assert calc["weld"].nominal == plain
    assert "148.5 kip without factors for direction, 145.5 kip with 0.85" in texts(calc.notes)


def test_factors_of_every_limit_state():
    for basis, lrfd in (({}, True), (ASD, False)):
        calc = evaluate(welded(**basis))
        for block in calc.limit_states:
            if block.reason:
                continue
            factors = SHEAR_YIELDING if "shear yielding" in block.key else YIELDING if "yielding" in block.key \
                else RUPTURE
            expected = factors.phi * block.nominal if lrfd else block.nominal / factors.omega
            assert block.available == pytest.approx(expected, rel=1e-14), block.key


def test_the_gusset_block_is_that_of_the_search():
    calc = evaluate(welded(weld_length_2="10 in"))
    path = weld_block(0.0, 12.0, 8.01, 10.0, 0.5)
    shear = min(0.6 * 65 * path.net_shear_area, 0.6 * 50 * path.gross_shear_area)
    assert calc["gusset block shear"].nominal == pytest.approx(shear + 65 * path.net_tension_area, rel=1e-12)


def test_block_of_an_angle():
    """The welded leg of 4 in tears across, the other shears off along the heel over weld 1."""
    calc = evaluate(welded(**ANGLE, weld_length_1="8 in", weld_length_2="4 in"))
    assert calc["member block shear"].nominal == pytest.approx(0.6 * 50 * 8 * 0.375 + 65 * 4 * 0.375, rel=1e-12)
    half = evaluate(welded(**ANGLE, weld_length_1="8 in", weld_length_2="4 in",
                           member_U_bs="0.5, tension not uniform"))
    assert half["member block shear"].nominal == pytest.approx(0.6 * 50 * 8 * 0.375 + 65 * 2 * 0.375, rel=1e-12)


# --- traps -------------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("edition", [{}, E16])
def test_longitudinal_welds_alone_take_case_4_in_both_editions(edition):
    """At l = 2 w the steps of 2010 give 1; the formula gives 0.923 (1 - x/l)."""
    calc = evaluate(flat(weld_length_1="12 in", plate_lap="both faces, a gusset on each", **edition))
    U = result(calc, "shear lag", shear_lag.shear_lag_factor_of_longitudinal_welds)
    assert Printed("0.923").agrees(U)
    assert "shear_lag_factor" not in used(calc, "shear lag")
    with_across = evaluate(welded(**MIXED, **edition))
    assert "shear_lag_factor" in used(with_across, "shear lag")


def test_the_share_of_area_holds_for_open_sections_only():
    short = {"weld_length_1": "2 in", "weld_size": "1/4 in"}
    calc = evaluate(welded(**short))
    assert calc["net rupture"].nominal == pytest.approx(65 * 8.01 * 0.515, rel=1e-12)      # floor times A_g
    plate = evaluate(flat(**short))
    assert "shear_lag_factor_by_area" not in used(plate, "shear lag")
    U = result(plate, "shear lag", shear_lag.shear_lag_factor_of_longitudinal_welds)
    assert plate["net rupture"].nominal == pytest.approx(65 * U * 3.0, rel=1e-12)


def test_where_case_4_gives_nothing_the_share_of_area_counts_and_the_calc_says_so():
    calc = evaluate(welded(weld_length_1="1 in"))
    assert "case 4 gives no factor" in texts(calc.cautions)
    assert calc["net rupture"].nominal == pytest.approx(65 * 8.01 * 0.515, rel=1e-12)


def test_distance_to_the_centroid_is_that_of_the_welded_leg():
    for element, other in (("long leg", 0.775), ("short leg", 1.27)):
        calc = evaluate(welded(**{**ANGLE, "welded_element": element}))
        step = next(s for s in calc["section"].steps if s.chosen and s.chosen[0] == r"\bar{x}")
        assert step.result == other


def test_a_wide_flange_by_both_flanges_is_two_tees():
    """The centroid of the whole section lies in its middle and would give U = 1."""
    calc = evaluate(welded(**EVERY["flanges"]))
    assert result(calc, "section", shear_lag.centroid_from_connected_flange) == pytest.approx(8.28 / 2 - 20.4 / 6.16)


@pytest.mark.parametrize("edition", [{}, E16])
def test_transverse_welds_alone(edition):
    """Case 3: the area of the welded element; the increase of 1.5 only where the force passes through the centroid."""
    calc = evaluate(welded(**{**ANGLE, **ACROSS}, transverse_ends="both ends", **edition))
    assert calc["net rupture"].nominal == pytest.approx(65 * 4 * 0.375, rel=1e-12)
    plain = 0.6 * 70 * 0.707 * 0.25 * 2 * 4
    assert calc["weld"].nominal == pytest.approx(plain, rel=1e-12)
    more = evaluate(welded(**{**ANGLE, **ACROSS}, transverse_ends="both ends", concentric="yes", **edition))
    assert more["weld"].nominal == pytest.approx(1.5 * plain, rel=1e-12)


@pytest.mark.parametrize("concentric, nominal", [("no", 178.164), ("yes", 178.164)])
def test_the_increase_never_goes_with_the_whole_longitudinal_strength(concentric, nominal):
    """8 + 8 + 8 in: 1.0 and 1.0 give 178.2; 0.85 and 1.5 give 190.0; 1.0 and 1.5 would give 207.9."""
    calc = evaluate(flat(**MIXED, plate_width="8 in", concentric=concentric, gusset_width="20 in"))
    one = 0.6 * 70 * 0.707 * 0.25 * 8
    expected = 3 * one if concentric == "no" else (0.85 * 2 + 1.5) * one
    assert calc["weld"].nominal == pytest.approx(expected, rel=1e-12)
    assert calc["weld"].nominal < (2 + 1.5) * one


def test_each_weld_is_to_be_four_times_its_size_long():
    """1-1/2 and 10-1/2 in of 1/2 in: the mean is enough, the first is not."""
    calc = evaluate(flat(weld_size="1/2 in", weld_length_1="1-1/2 in", weld_length_2="10-1/2 in",
                         plate_thickness="3/4 in"))
    assert rule(calc, "weld length").status == "fails"
    assert not calc.passes
    first = 0.707 * 1.5 / 4 * 1.5
    assert calc["weld"].nominal == pytest.approx(42 * (first + 0.707 * 0.5 * 10.5), rel=1e-12)
    assert "counts with a size of 3/8 in only" in texts(calc.cautions)


@pytest.mark.parametrize("length, share", [("25 in", 1.0), ("37.5 in", 0.90), ("62.5 in", 0.70), ("75 in", 0.60),
                                           ("100 in", 0.45)])
def test_long_welds(length, share):
    """1/4 in: 100, 150, 250, 300 and 400 times the size; beyond 300 times, 180 times the size count."""
    calc = evaluate(flat(weld_length_1=length))
    actual = float(length.split()[0])
    assert calc["weld"].nominal == pytest.approx(2 * 42 * 0.707 * 0.25 * share * actual, rel=1e-12)
    assert ("longer than 100 times" in texts(calc.notes)) == (share < 1)


@pytest.mark.parametrize("t, least", [("1/4 in", "1/8 in"), ("5/16 in", "3/16 in"), ("1/2 in", "3/16 in"),
                                      ("9/16 in", "1/4 in"), ("3/4 in", "1/4 in"), ("1 in", "5/16 in")])
def test_least_size_by_the_thinner_part(t, least):
    calc = evaluate(flat(plate_thickness=t, gusset_thickness="1-1/4 in"))
    assert f"at least {least} " in rule(calc, "least weld size").required
    assert f"at least {least} " in rule(evaluate(flat(plate_thickness="1-1/4 in", gusset_thickness=t)),
                                        "least weld size").required


@pytest.mark.parametrize("t, size, status", [("3/16 in", "3/16 in", "meets"), ("1/4 in", "3/16 in", "meets"),
                                             ("1/4 in", "1/4 in", "fails"), ("1/2 in", "7/16 in", "meets")])
def test_greatest_size_along_an_edge(t, size, status):
    assert rule(evaluate(flat(plate_thickness=t, weld_size=size)), "greatest weld size").status == status
    built = rule(evaluate(flat(plate_thickness=t, weld_size=size, built_out="yes")), "greatest weld size")
    assert built.status == "not applicable"


def test_one_transverse_weld_alone_fails_unless_the_lap_cannot_open():
    assert rule(evaluate(flat(**ACROSS)), "both ends").status == "fails"
    assert rule(evaluate(flat(**ACROSS, opening_restrained="yes")), "both ends").status == "meets"
    assert rule(evaluate(flat(**ACROSS, transverse_ends="both ends")), "both ends").status == "meets"


def test_the_spread_is_cut_off_at_the_edge_of_the_gusset():
    wide, narrow = evaluate(welded(gusset_width="40 in")), evaluate(welded(gusset_width="10 in"))
    assert narrow["gusset yielding"].nominal == pytest.approx(50 * 10 * 0.5)
    assert wide["gusset yielding"].nominal == pytest.approx(50 * 0.5 * (8.01 + 2 * 12 * np.tan(pi / 6)))


def test_slenderness_is_advice():
    calc = evaluate(welded(member_length="45 ft"))
    assert rule(calc, "slenderness").status == "caution"
    assert calc.passes


def test_a_given_factor_is_printed_with_its_reason_and_never_silent():
    calc = evaluate(welded(user_U="0.95", user_U_reason="Test report 12"))
    assert calc["net rupture"].nominal == pytest.approx(65 * 0.95 * 5.84)
    assert "0.95 is given and takes the place of the computed" in texts(calc.cautions)
    assert "Test report 12." in texts(calc.cautions)


def test_fatigue_is_off_and_says_so_unless_cycles_are_given():
    assert "no number of stress cycles" in evaluate(welded())["fatigue"].reason
    calc = evaluate(welded(cycles="100000", force_range="60 kip", stress_category="E'"))
    assert not calc["fatigue"].reason


# --- editions, methods, unit sets, sweeps ------------------------------------------------------------------------

@pytest.mark.parametrize("name", EVERY)
@pytest.mark.parametrize("basis", [{}, E16, ASD, {**E16, **ASD}])
def test_every_layout_prints_and_draws(name, basis):
    calc = evaluate(welded(**{**EVERY[name], **basis}))
    assert document.strength(calc)
    first = [b.key for b in evaluate(welded()).blocks]
    assert [b.key for b in calc.blocks] == first
    if not basis:
        draw(calc.case.kind.sketch(calc.x, calc))


@pytest.mark.parametrize("name", EVERY)
def test_the_editions_agree_on_welded_members(name):
    new, old = evaluate(welded(**EVERY[name])), evaluate(welded(**EVERY[name], **E16))
    assert {b.key: b.nominal for b in new.blocks} == pytest.approx({b.key: b.nominal for b in old.blocks})


def test_unit_sets_agree():
    us, si = evaluate(welded()), evaluate(welded(**WELDED_SI))
    for block in us.limit_states:
        if block.nominal:
            assert si[block.key].nominal == pytest.approx(KIP * block.nominal, rel=1e-9), block.key
    assert "converted with 25.4 mm to the inch" in texts(si.notes)
    assert "at least 5 mm where the thinner part is 12.7 mm" in rule(si, "least weld size").required


@pytest.mark.parametrize("changes", [{}, FLAT, {**FLAT, **ACROSS}, {"weld_length_2": "9 in"}])
def test_a_sweep_is_the_single_cases(changes):
    case = welded(**changes)
    for plot in case.kind.plots:
        calc = evaluate(case)
        if plot.applies and not plot.applies(calc.x):
            continue
        points = plot.points(calc.x)
        for curve in sweep(case, **points):
            for i in (0, 77, 199 if len(curve.available) > 199 else -1):
                if np.isnan(curve.available[i]):
                    continue
                entries = {n: f"{float(v[i])!r} in" for n, v in points.items()}
                assert curve.available[i] == pytest.approx(evaluate(welded(**{**changes, **entries}))[
                    curve.key].available, rel=1e-12)
