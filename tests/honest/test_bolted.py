"""What a bolted member decides: numbers worked out by hand, and the traps that practitioners fall into."""

import math

import numpy as np
import pytest
from bolted import bolted
from pocket import check

from calclib import document
from calclib.calc import evaluate, sweep
from calclib.equations.aisc360 import bearing, bolts, connecting, members, shear_lag
from calclib.sketch import draw

ASD = {"method": "ASD", "load_level": "ASD"}
E16 = {"standard": "AISC 360-16"}
TEE = {"section": "WT8x25", "connected": "flange", "rows": "3", "lines": "2", "gage": "3.5 in", "first_line": "",
       "end_distance": "2 in", "gusset_end": "2 in", "bolt_diameter": "1 in"}
PAIR = {"section": "2L6x6x5/8", "F_y": "36 ksi", "F_u": "58 ksi", "rows": "9", "end_distance": "2.125 in",
        "first_line": "2.25 in", "bolt_diameter": "7/8 in", "gusset_F_y": "36 ksi", "gusset_F_u": "58 ksi",
        "gusset_width": "30 in", "gusset_end": "1.35075 in", "required_strength": "200 kip"}
FLAT = {"section": "", "plate_width": "8 in", "plate_thickness": "1/2 in", "first_line": ""}
SI = {"units": "SI", "required_strength": "444.8221615 kN", "F_y": "344.737864659 MPa", "F_u": "448.159224057 MPa",
      "bolt_diameter": "20 mm", "pitch": "76.2 mm", "end_distance": "38.1 mm", "first_line": "63.5 mm",
      "gusset_F_y": "344.737864659 MPa", "gusset_F_u": "448.159224057 MPa", "gusset_thickness": "12.7 mm",
      "gusset_width": "406.4 mm", "gusset_end": "38.1 mm"}


def results(calc, block, equation):
    return [s.result for s in calc[block].steps if s.equation is equation]


def rule(calc, key):
    return next(r for r in calc.rules if r.key == key)


def texts(calc):
    return " ".join(m.text for m in (*calc.messages, *calc.assumptions))


def factor(calc, case):
    """Return the factor that the block of shear lag states for one case of Table D3.1."""
    return [s.result for s in calc["shear lag"].steps if s.cite.endswith(case) and s.chosen and s.chosen[0] == "U"]


# Numbers worked out by hand

def test_pair_of_angles_with_nine_bolts():
    calc = evaluate(bolted(**PAIR))
    A_g = 14.3                                     # of the table of shapes
    assert calc["gross yielding"].nominal == pytest.approx(36 * A_g)
    A_n = A_g - 2 * 1.0 * 0.625
    assert results(calc, "net section", members.net_area_after_holes) == [pytest.approx(A_n)]
    U, = results(calc, "shear lag", shear_lag.shear_lag_factor)
    assert round(U, 4) == 0.9283
    assert calc["net rupture"].nominal == pytest.approx(58 * A_n * U)
    block = calc["member block shear"].steps[-3].values
    assert (round(block["A_gv"], 3), round(block["A_nv"], 3), round(block["A_nt"], 4)) == (32.656, 22.031, 4.0625)
    assert round(calc["member block shear"].nominal, 1) == 941.0
    assert calc["member block shear"].available == pytest.approx(705.75)
    assert round(calc["bolt shear"].nominal / 9, 1) == 64.9
    assert [round(v, 1) for v in results(calc, "bolt group", bearing.bearing)] == [152.2, 60.9]
    assert 30.7 in [round(v, 1) for v in results(calc, "bolt group", bearing.tearout)]
    assert 71.8 in [round(v, 1) for v in results(calc, "bolt group", bearing.tearout)]
    assert round(calc["bolt group"].nominal, 1) == 517.9
    assert round(calc["bolt group"].available, 1) == 388.4
    assert evaluate(bolted(**PAIR | ASD))["bolt group"].available == pytest.approx(517.8936 / 2)


def test_tee_by_its_flange():
    calc = evaluate(bolted(**TEE))
    assert round(results(calc, "net section", members.net_area_after_holes)[0], 3) == 5.874
    assert round(calc["net rupture"].available, 1) == 243.4
    assert calc["gross yielding"].available == pytest.approx(0.9 * 50 * 7.37)
    note = calc["member block shear"].steps[0].note
    assert "Governing path: whole width, stem sheared off" in note
    assert round(calc["member block shear"].available, 1) == 223.2
    assert "line 1 to the lower edge and line 2 to the upper edge 344.8 kip" in note       # 258.6 / 0.75


@pytest.mark.parametrize("angle, width", [("30 degrees", 13.39), ("45 degrees", 21.00)])
def test_width_of_spread(angle, width):
    calc = evaluate(bolted(**FLAT, lines="2", gage="3 in", rows="4", gusset_width="40 in", spread_angle=angle))
    assert round(results(calc, "gusset spread", connecting.spread_width_within_plate)[0], 2) == width
    assert ("45 degrees" in " ".join(m.text for m in calc.cautions)) == (angle == "45 degrees")


@pytest.mark.parametrize("s, net", [("2 in", 8.04), ("2.5 in", 8.25)])
def test_zigzag_governs_below_a_pitch(s, net):
    """Plate 10 x 1/2, three 3/4-in. bolts, gage 3: the chain of two holes is 8.25 in., that of three 8.04 at s = 2."""
    low, high = f"{3} in", f"{3 + float(s.split()[0])} in"
    calc = evaluate(bolted(**FLAT | {"plate_width": "10 in"}, rows="", pitch="", end_distance="",
                           bolt_places=f"{low}, 5 in; {high}, 2 in; {high}, 8 in"))
    A_n = next(s.result for s in calc["net rupture"].steps)
    assert round(A_n / 0.5, 2) == net


# Shear lag: traps

def test_case_7_of_a_tee_uses_the_depth_of_its_parent():
    """Two thirds of the tee's own 8.13 in. would give 5.42 in. and the factor 0.90."""
    calc = evaluate(bolted(**TEE))
    assert results(calc, "shear lag", shear_lag.least_flange_width_of_case_7) == [pytest.approx(16.3 * 2 / 3)]
    assert factor(calc, "case 7") == [0.85]


def test_web_of_a_w_shape_takes_the_factor_of_the_web():
    web = {"section": "W12x40", "connected": "web", "lines": "2", "gage": "3 in", "first_line": ""}
    calc = evaluate(bolted(**web))
    assert factor(calc, "case 7") == [0.70]
    assert factor(evaluate(bolted(**web | {"rows": "3"})), "case 7") == []


def test_channels_have_no_case_7():
    calc = evaluate(bolted(section="C10x20", lines="2", gage="4 in", first_line=""))
    assert factor(calc, "case 7") == []
    assert "Case 7 does not cover channels" in texts(calc)


@pytest.mark.parametrize("rows, expected", [("2", []), ("3", [0.60]), ("4", [0.80])])
def test_case_8_counts_bolts_in_a_line(rows, expected):
    assert factor(evaluate(bolted(rows=rows)), "case 8") == expected


def test_case_8_counts_the_shortest_line():
    places = "2 in, 1.5 in; 5 in, 1.5 in; 8 in, 1.5 in; 11 in, 1.5 in; 2 in, 4.5 in; 5 in, 4.5 in; 8 in, 4.5 in"
    calc = evaluate(bolted(section="L6x6x1/2", connected="long leg", rows="", pitch="", end_distance="", first_line="",
                           bolt_places=places))
    assert factor(calc, "case 8") == [0.60]
    assert "unequal numbers of bolts" in texts(calc)


def test_length_of_connection_is_between_outer_bolts():
    calc = evaluate(bolted())
    assert [s.result for s in calc["shear lag"].steps if s.chosen and s.chosen[0] == "l"] == [9.0]


def test_staggered_lines_count_out_to_out():
    calc = evaluate(bolted(section="L6x6x1/2", connected="long leg", lines="2", gage="2.5 in", first_line="2.25 in",
                           stagger="1.5 in"))
    assert [s.result for s in calc["shear lag"].steps if s.chosen and s.chosen[0] == "l"] == [10.5]


def test_plate_has_no_lower_bound_by_area():
    calc = evaluate(bolted(**FLAT))
    assert results(calc, "shear lag", shear_lag.shear_lag_factor_by_area) == []
    assert calc["shear lag"].steps[-1].result == 1.0


def test_one_bolt_rests_on_the_lower_bound():
    calc = evaluate(bolted(rows="1", pitch="", required_strength="10 kip"))
    assert calc["shear lag"].steps[-1].result == pytest.approx(2 * 4 * 0.5 / 7.5)
    assert "the connection is not longer than the eccentricity" in texts(calc)
    assert calc["gusset yielding"].reason and calc["gusset rupture"].reason


def test_factor_of_the_engineer_is_a_caution_with_its_reason():
    calc = evaluate(bolted(user_U="0.7", user_U_reason="test report {17}"))
    assert calc["net rupture"].steps[0].values["U"] == 0.7
    words = " ".join(m.text for m in calc.cautions)
    assert "test report {17}" in words and "case 2: 0.8689" in words


def test_centroid_of_a_w_shape_by_both_flanges_is_that_of_a_half():
    calc = evaluate(bolted(section="W8x21", connected="both flanges", lines="2", first_line=""))
    x_bar, = results(calc, "shear lag", shear_lag.centroid_from_connected_flange)
    assert x_bar == pytest.approx(8.28 / 2 - 20.4 / 6.16)
    assert "workable gage" in texts(calc)


# Net area: traps

@pytest.mark.parametrize("d, deduction", [("7/8 in", 1.0), ("1 in", 1.1875), ("1-1/8 in", 1.3125)])
def test_hole_is_that_of_the_table_and_the_allowance(d, deduction):
    calc = evaluate(bolted(section="L6x6x1/2", connected="long leg", bolt_diameter=d, pitch="4 in",
                           end_distance="2.5 in", gusset_end="2.5 in"))
    assert results(calc, "net section", members.width_of_hole_deducted) == [pytest.approx(deduction)]


def test_metric_hole_takes_the_metric_allowance():
    calc = evaluate(bolted(**SI))
    assert results(calc, "net section", members.width_of_hole_deducted) == [24.0]


def test_allowance_is_in_block_shear_and_not_in_the_clear_distance():
    calc = evaluate(bolted())
    assert all(s.values["d_e"] == 0.875 for s in calc["member block shear"].steps
               if s.equation is connecting.net_area_of_cuts)
    assert results(calc, "bolt group", bearing.clear_distance_to_next_hole)[0] == 3 - 0.8125


def test_a_chain_that_is_neither_straight_nor_full_zigzag_can_govern():
    calc = evaluate(bolted(**FLAT | {"plate_width": "14 in"}, rows="2", pitch="5 in", lines="4", stagger="2.5 in",
                           gages="3 in, 4 in, 3 in", gusset_width="24 in"))
    assert "Governing chain: 3 holes, 1 gage space at an angle" in calc["net section"].steps[1].note


def test_a_chain_behind_bolts_carries_the_rest_of_the_load():
    """One bolt deep inside, two pairs before it, plate 5 in. wide: 3.25 / (4/5) is less than 4.125 in. wide."""
    calc = evaluate(bolted(**FLAT | {"plate_width": "5 in"}, rows="", pitch="", end_distance="",
                           bolt_places="2 in, 1.2 in; 2 in, 3.8 in; 5 in, 1.2 in; 5 in, 3.8 in; 8 in, 2.5 in"))
    A_n = 2.5 - 2 * 0.875 * 0.5
    assert results(calc, "net section", members.net_area_for_full_load) == [pytest.approx(A_n * 5 / 4)]


def test_an_extra_hole_is_deducted_like_a_bolted_one():
    calc = evaluate(bolted(open_holes="10.5 in, 1.2 in"))
    assert results(calc, "net section", members.net_area_after_holes)[0] == pytest.approx(7.5 - 4 * 0.875 * 0.5)
    assert "1 hole without bolt" in " ".join(m.text for m in calc.cautions)
    assert calc["bolt shear"].nominal == evaluate(bolted())["bolt shear"].nominal


def test_a_misplaced_bolt_changes_what_depends_on_it():
    places = "1.5 in, 2.5 in; 4.5 in, 2.5 in; 7.5 in, 2.5 in; 9.75 in, 2.5 in"
    moved = evaluate(bolted(rows="", pitch="", end_distance="", first_line="", bolt_places=places))
    assert [s.result for s in moved["shear lag"].steps if s.chosen and s.chosen[0] == "l"] == [8.25]
    assert min(results(moved, "bolt group", bearing.clear_distance_to_next_hole)) == 2.25 - 0.8125


def test_places_and_pattern_agree():
    places = "; ".join(f"{1.5 + 3 * i} in, 2.5 in" for i in range(4))
    one, two = evaluate(bolted()), evaluate(bolted(rows="", pitch="", end_distance="", first_line="",
                                                   bolt_places=places))
    assert [b.available for b in one.blocks] == [b.available for b in two.blocks]


@pytest.mark.parametrize("edition, choice, limited", [
    ("AISC 360-22", "by the edition", False), ("AISC 360-16", "by the edition", True),
    ("AISC 360-22", "0.85 of gross", True), ("AISC 360-16", "net area as it is", False),
])
def test_net_area_of_the_gusset_by_edition(edition, choice, limited):
    calc = evaluate(bolted(standard=edition, net_area_limit=choice, rows="2", pitch="2.25 in"))
    A_g = calc["gusset yielding"].steps[0].result
    A_e = calc["gusset rupture"].steps[-3].values["A_e"]
    assert (A_e == pytest.approx(0.85 * A_g)) == limited or A_e < 0.85 * A_g
    assert bool(results(calc, "gusset rupture", connecting.effective_net_area_of_splice_plate)) == limited
    assert ("0.85" in texts(calc)) == (choice == "by the edition")


# Bolts: traps

def test_group_is_the_sum_of_the_least_of_each_bolt():
    """A short edge of the gusset holds back one bolt; neither n times the worst nor the least of three sums."""
    calc = evaluate(bolted(gusset_end="3/4 in", gusset_thickness="3/8 in"))
    each = results(calc, "bolt group", bolts.strength_of_one_bolt)
    assert len(each) == 3
    counts = (1, 1, 2)
    assert calc["bolt group"].nominal == pytest.approx(sum(n * r for n, r in zip(counts, each, strict=True)))
    assert 4 * min(each) < calc["bolt group"].nominal < calc["bolt shear"].nominal
    assert min(each) == pytest.approx(1.2 * (0.75 - 0.40625) * 0.375 * 65)


def test_threads_are_in_the_plane_unless_said_and_then_with_a_caution():
    assert evaluate(bolted())["bolt shear"].steps[1].result == 54
    calc = evaluate(bolted(threads="X, not in the shear plane"))
    assert calc["bolt shear"].steps[1].result == 68
    assert "may have no shank" in " ".join(m.text for m in calc.cautions)


@pytest.mark.parametrize("rows, long", [("13", False), ("14", True)])
def test_long_joint_by_coordinates(rows, long):
    """13 bolts at 3-1/6 in. are 38 in. long, which needs no reduction."""
    pitch = f"{38 / 12} in"
    calc = evaluate(bolted(rows=rows, pitch=pitch, gusset_width="60 in"))
    assert bool(results(calc, "bolt shear", bolts.shear_stress_in_long_joint)) == long


def test_oversize_holes_fail_in_a_bearing_joint():
    calc = evaluate(bolted(hole_kind="oversize"))
    assert rule(calc, "oversize").status == "fails"
    assert not calc.passes
    assert rule(evaluate(bolted(hole_kind="oversize", joint="slip-critical")), "oversize").status == "meets"


def test_slots_along_the_force_fail_in_a_bearing_joint():
    assert rule(evaluate(bolted(hole_kind="short slot", slot_direction="along the force")), "slots").status == "fails"
    assert rule(evaluate(bolted(hole_kind="short slot")), "slots").status == "meets"
    both = evaluate(bolted(hole_kind="long slot", hole_ply="member and gusset", pitch="4 in"))
    assert rule(both, "long slots").status == "fails"


def test_long_slot_across_the_force_bears_less():
    calc = evaluate(bolted(hole_kind="long slot"))
    assert results(calc, "bolt group", bearing.bearing_in_long_slot) == [pytest.approx(2.0 * 0.75 * 0.5 * 65)]
    assert results(calc, "bolt group", bearing.bearing) == [pytest.approx(2.4 * 0.75 * 1.0 * 65)]


def test_slip_critical_keeps_the_checks_of_a_bearing_joint():
    calc = evaluate(bolted(joint="slip-critical"))
    assert all(calc[key].available for key in ("slip", "bolt shear", "bolt group"))
    assert calc["slip"].nominal == pytest.approx(4 * 0.30 * 1.13 * 28 * 2)
    assert evaluate(bolted())["slip"].reason


@pytest.mark.parametrize("hole, direction, phi", [
    ("standard", "across the force", 1.00), ("short slot", "across the force", 1.00),
    ("short slot", "along the force", 0.85), ("oversize", "across the force", 0.85),
    ("long slot", "across the force", 0.70),
])
def test_factor_of_slip_by_the_hole(hole, direction, phi):
    calc = evaluate(bolted(joint="slip-critical", hole_kind=hole, slot_direction=direction))
    assert calc["slip"].factors.phi == phi


@pytest.mark.parametrize("distance, table, diameter", [
    ("1 in", "meets", "meets"), ("7/8 in", "caution", "meets"), ("5/8 in", "caution", "fails"),
])
def test_short_edge_is_a_caution_and_below_one_diameter_fails(distance, table, diameter):
    calc = evaluate(bolted(end_distance=distance, required_strength="1 kip"))
    assert rule(calc, "least edge, end of member").status == table
    assert rule(calc, "edge of one diameter, end of member").status == diameter
    approved = evaluate(bolted(end_distance=distance, required_strength="1 kip", edge_approval="EOR, RFI {12}"))
    assert rule(approved, "edge of one diameter, end of member").status != "fails"


@pytest.mark.parametrize("pitch, least, preferred", [
    ("2 in", "meets", "caution"), ("1.9 in", "fails", "caution"), ("2.25 in", "meets", "meets"),
])
def test_spacing(pitch, least, preferred):
    calc = evaluate(bolted(pitch=pitch))
    assert rule(calc, "least spacing").status == least
    assert rule(calc, "preferred spacing").status == preferred


def test_greatest_spacing_by_exposure():
    assert rule(evaluate(bolted(pitch="8 in")), "greatest spacing").status == "meets"
    bare = evaluate(bolted(pitch="8 in", exposure="bare weathering steel, exposed"))
    assert rule(bare, "greatest spacing").status == "fails"


def test_fillers_reduce_shear():
    calc = evaluate(bolted(fillers="one", filler_thickness="1/2 in"))
    assert calc["bolt shear"].nominal == pytest.approx(0.9 * evaluate(bolted())["bolt shear"].nominal)
    assert evaluate(bolted(fillers="one", filler_thickness="1/4 in"))["bolt shear"].nominal == \
        evaluate(bolted())["bolt shear"].nominal


def test_two_gussets_give_two_shear_planes():
    one, two = evaluate(bolted(**FLAT)), evaluate(bolted(**FLAT, gussets="two, one on each face"))
    for key in ("bolt shear", "gusset yielding", "gusset rupture", "gusset block shear"):
        assert two[key].nominal == pytest.approx(2 * one[key].nominal)


# Block shear and gusset: traps

def test_factor_of_block_shear_is_stated_with_its_reason():
    one, half = evaluate(bolted()), evaluate(bolted(member_U_bs="0.5, tension not uniform"))
    values = [calc["member block shear"].steps[-3].values for calc in (one, half)]
    assert [v["U_bs"] for v in values] == [1.0, 0.5]
    assert one["member block shear"].nominal - half["member block shear"].nominal == \
        pytest.approx(0.5 * 65 * values[0]["A_nt"])
    assert "figure of the commentary" in one["member block shear"].steps[0].note


def test_every_block_of_member_and_gusset_is_listed():
    calc = evaluate(bolted(section="L6x6x1/2", connected="long leg", lines="2", gage="2.5 in", first_line="2.25 in"))
    words = calc["member block shear"].steps[0].note
    for path in ("lines 1 to 2", "line 1 to the upper edge", "line 2 to the lower edge"):
        assert path in words + calc["gusset block shear"].steps[0].note


def test_spread_is_cut_off_at_the_edges_of_the_gusset():
    calc = evaluate(bolted(gusset_width="8 in"))
    assert results(calc, "gusset spread", connecting.spread_width_within_plate) == [8.0]
    assert "limited by the edges" in texts(calc)
    off = evaluate(bolted(gusset_edge="2 in"))
    assert results(off, "gusset spread", connecting.spread_width_within_plate)[0] == \
        pytest.approx(2 + 9 * math.tan(math.pi / 6))


# The whole

def test_slenderness_is_advice():
    calc = evaluate(bolted(length="60 ft"))
    assert rule(calc, "slenderness").status == "caution"
    assert calc.passes


def test_fatigue_is_off_and_says_so():
    assert "Fatigue is not evaluated" in evaluate(bolted())["fatigue"].reason
    calc = evaluate(bolted(cycles="500000", force_range="20 kip", stress_category="B"))
    assert calc["fatigue"].available == pytest.approx(1000 * (12 / 500000) ** 0.333 * 6.625)


def test_stress_at_a_hole_is_information():
    calc = evaluate(bolted(**FLAT))
    assert len(calc["stress at hole"].steps) == 3
    assert not calc["stress at hole"].is_limit_state


CASES = {"pair": {}, "tee": TEE, "plate": FLAT, "flanges": {"section": "W8x21", "connected": "both flanges",
         "lines": "2", "first_line": ""}, "web": {"section": "W12x40", "connected": "web", "lines": "2",
         "gage": "3 in", "first_line": ""}, "channel": {"section": "C10x20", "lines": "2", "gage": "3 in",
         "first_line": ""}, "stem": {"section": "WT8x25", "connected": "stem", "first_line": "4 in"},
         "angle": {"section": "L6x4x1/2", "connected": "short leg"},
         "two angles": {"section": "2L6x4x3/8x3/8LLBB", "lines": "2", "gage": "2.5 in", "first_line": "2.25 in",
                        "stagger": "1.5 in"}}


@pytest.mark.parametrize("name", CASES)
@pytest.mark.parametrize("basis", [{}, ASD, E16, E16 | ASD], ids=["22 LRFD", "22 ASD", "16 LRFD", "16 ASD"])
def test_every_section_by_every_method_has_the_same_blocks(name, basis):
    calc = evaluate(bolted(**CASES[name] | basis))
    assert [b.key for b in calc.blocks] == [b.key for b in evaluate(bolted()).blocks]
    lrfd = evaluate(bolted(**CASES[name] | {k: v for k, v in basis.items() if k == "standard"}))
    for one, two in zip(calc.blocks, lrfd.blocks, strict=True):
        assert one.nominal == two.nominal
    assert basis or draw(calc.case.kind.sketch(calc.x, calc))


def test_the_same_brace_in_metric_units():
    """Bolts and holes have sizes of their own in each set; what does not depend on them is the same."""
    si, inch = evaluate(bolted(**SI)), evaluate(bolted())
    assert si["gross yielding"].available / 4448.221615 == pytest.approx(inch["gross yielding"].available)
    assert si["gusset yielding"].available / 4448.221615 == pytest.approx(inch["gusset yielding"].available, rel=1e-6)
    assert "converted exactly" in texts(si)


@pytest.mark.parametrize("index", range(5))
@pytest.mark.parametrize("name", ["pair", "tee", "two angles"])
def test_sweep_equals_single_cases(name, index):
    case = bolted(**CASES[name])
    x = evaluate(case).x
    plot = case.kind.plots[index]
    points = plot.points(x)
    curves = sweep(case, **points)
    axis = points[plot.field]
    for i in (0, len(axis) // 3, len(axis) - 1):
        value = repr(float(axis[i])) + (" in" if case.kind.field(plot.field).dimension.name == "length" else "")
        value = f"{axis[i]:g}" if plot.discrete else value
        single = evaluate(bolted(**CASES[name] | {plot.field: value} | (
            {"user_U_reason": "Test"} if plot.field == "user_U" else {})))
        for curve in curves:
            found = single[curve.key].available
            assert (np.isnan(curve.available[i]) and found is None) or curve.available[i] == pytest.approx(found)


def test_present_value_of_every_plot_is_on_the_calc():
    case = bolted()
    calc = evaluate(case)
    for plot in case.kind.plots:
        present = plot.present(calc.x) if plot.present else getattr(calc.x, plot.field)
        for curve in sweep(case, **{plot.field: np.array([present])}):
            assert curve.available[0] == pytest.approx(calc[curve.key].available)


def test_plots_of_a_pattern_are_not_drawn_for_places():
    x = evaluate(bolted(rows="", pitch="", end_distance="", first_line="", bolt_places="2 in, 2.5 in; 5 in, 2.5 in")).x
    kind = bolted().kind
    assert [p.field for p in kind.plots if p.applies is None or p.applies(x)] == ["hole_diameter", "user_U"]


PRINTED = {
    **CASES, "metric": SI, "metric plate": SI | {"section": "", "plate_width": "200 mm", "plate_thickness": "12 mm",
                                                 "lines": "2", "gage": "80 mm", "first_line": "", "stagger": "40 mm"},
    "slip": {"joint": "slip-critical", "hole_kind": "oversize", "fillers": "two or more", "filler_thickness": "3/8 in"},
    "long": {"rows": "14", "pitch": "3-1/4 in", "gusset_width": "60 in", "threads": "X, not in the shear plane"},
    "A307": {"bolt_group": "A307", "gusset_thickness": "4 in"}, "slots": {"hole_kind": "long slot"},
    "2016": E16 | ASD | {"hole_diameter": "7/8 in", "deformation": "no", "length": "20 ft"},
    "wide": {"spread_angle": "45 degrees", "gusset_edge": "3 in", "user_U": "0.8", "user_U_reason": "Test"},
    "misplaced": {"rows": "", "pitch": "", "end_distance": "", "first_line": "", "open_holes": "4 in, 1.2 in",
                  "bolt_places": "2 in, 2.5 in; 5.1 in, 2.6 in; 7.8 in, 2.45 in"},
    "fatigue": {"cycles": "300000", "force_range": "30 kip", "stress_category": "B"},
}


@pytest.mark.parametrize("name", PRINTED)
def test_every_printed_line_comes_out_on_a_pocket_calculator(name):
    calc, known = evaluate(bolted(**PRINTED[name])), {}
    for block in calc.blocks:
        for node in document.block_nodes(calc, block):
            if node["type"] == "equation":
                check(node["lhs"], node["symbolic"], node["substituted"], node["result"], known)
    assert len(known) > 30
