"""What a calc decides: editions, methods, unit sets, comparisons, what governs, what fails, what it warns of."""

from math import pi

import pytest
from printed import Printed
from samples import ASD, PLATE_SI, ROD_SI, plate, rod

from calclib import document
from calclib.calc import evaluate
from calclib.equations.aisc360 import RUPTURE, YIELDING, pins
from calclib.equations.mechanics import elongation_of_threaded_rod
from calclib.errors import CalcError
from calclib.tolerance import RELATIVE, at_least

E16 = {"standard": "AISC 360-16"}
KIP = 4448.2216152605     # N
LENGTHS = {"shank_length": "14'-6 in", "threaded_length": "10 in", "service_load": "15 kip"}
RATED = {"fitting": "clevis", "fitting_rating": "25 kip", "rating_source": "Maker, size 4"}


def strengths(calc):
    """Return key -> nominal strength [kip or N] of every limit state that has one."""
    return {block.key: block.nominal for block in calc.limit_states if block.nominal is not None}


def words(messages):
    return [message.text for message in messages]


def statuses(calc):
    return {rule.key: rule.status for rule in calc.rules}


# --- computed by hand elsewhere ----------------------------------------------------------------------------------

def test_a_pin_plate_by_hand():
    """F_y 50, F_u 65, t 1, w 8, d 3, d_h 3-1/16, a 4, worked by hand: b_e is limited to 2.469, bearing governs."""
    calc = evaluate(plate(pin_diameter="3 in", hole_diameter="3-1/16 in", pin_F_y="50 ksi"))
    assert Printed("2.469", "in").agrees(calc["geometry"].steps[-1].result)
    for key, digits in (("tensile rupture", "240.7"), ("shear rupture", "305.7"), ("pin bearing", "202.5"),
                        ("gross yielding", "360.0")):
        assert Printed(digits, "kip").agrees(calc[key].available)
    assert calc.governing.key == "pin bearing"
    by_2016 = pins.shear_rupture(F_u=65, A_sf=pins.shear_area_at_pin(t=1, a=4, d=3))
    assert Printed("321.7", "kip").agrees(RUPTURE.phi * by_2016)


def test_a_rod_by_hand():
    """A36, 1 in: the thread by its body area gives 25.62, the body yields at 25.45 and governs."""
    calc = evaluate(rod())
    assert Printed("25.62", "kip").agrees(calc["thread, body area"].available)
    assert Printed("25.45", "kip").agrees(calc["body yielding"].available)
    assert calc.governing.key == "body yielding"


@pytest.mark.parametrize("d, A_b, R_n, lrfd, asd", [
    ("5/8", "0.3068", "13.35", "10.01", "6.67"), ("3/4", "0.4418", "19.22", "14.41", "9.61"),
    ("7/8", "0.6013", "26.16", "19.62", "13.08"), ("1", "0.7854", "34.16", "25.62", "17.08"),
    ("1-1/4", "1.2272", "53.38", "40.04", "26.69"), ("1-1/2", "1.7671", "76.87", "57.65", "38.44"),
    ("2", "3.1416", "136.66", "102.49", "68.33"),
])
def test_rods_of_a36_by_hand(d, A_b, R_n, lrfd, asd):
    """0.75 F_u A_b for the usual sizes, derived by hand, not from print."""
    calc = evaluate(rod(rod_diameter=f"{d} in"))
    assert Printed(A_b, "in2").agrees(calc["areas"].steps[0].result)
    assert Printed(R_n, "kip").agrees(calc["thread, body area"].nominal)
    assert Printed(lrfd, "kip").agrees(calc["thread, body area"].available)
    assert Printed(asd, "kip").agrees(evaluate(rod(rod_diameter=f"{d} in", **ASD))["thread, body area"].available)


@pytest.mark.parametrize("size, series, digits", [
    ("1/2", "UNC", "0.1419"), ("5/8", "UNC", "0.2260"), ("3/4", "UNC", "0.3345"), ("1", "UNC", "0.6057"),
    ("1-1/8", "UNC", "0.7633"), ("1-1/2", "UNC", "1.4052"), ("2", "UNC", "2.4982"), ("3", "UNC", "5.9674"),
    ("1-1/8", "8UN", "0.7905"), ("1-1/4", "8UN", "0.9997"), ("1-1/2", "8UN", "1.4918"), ("2", "8UN", "2.7706"),
    ("3", "8UN", "6.5063"),
])
def test_stress_areas_by_hand(size, series, digits):
    calc = evaluate(rod(rod_diameter=f"{size} in", thread_series=series))
    assert Printed(digits, "in2").agrees(calc["areas"].steps[-1].result)


def test_elongation_is_that_of_one_bar_at_both_limits():
    """Shank alone and thread alone are P L / E A; both together are the sum."""
    P, E, A_b, A_t = 15.0, 29000.0, pi / 4, 0.606
    given = {"P": P, "E": E, "A_b": A_b, "A_t": A_t}
    shank = elongation_of_threaded_rod(L_b=100.0, L_t=0.0, **given)
    thread = elongation_of_threaded_rod(L_b=0.0, L_t=20.0, **given)
    assert shank == pytest.approx(P * 100 / (E * A_b), rel=1e-14)
    assert thread == pytest.approx(P * 20 / (E * A_t), rel=1e-14)
    assert elongation_of_threaded_rod(L_b=100.0, L_t=20.0, **given) == pytest.approx(shank + thread, rel=1e-14)


# --- editions, methods, unit sets --------------------------------------------------------------------------------

@pytest.mark.parametrize("case", [plate, rod])
@pytest.mark.parametrize("basis", [{}, E16])
def test_nominal_strength_knows_no_method(case, basis):
    lrfd, asd = evaluate(case(**basis)), evaluate(case(**basis, **ASD))
    assert strengths(lrfd) == strengths(asd)
    for key, nominal in strengths(lrfd).items():
        factors = YIELDING if "yielding" in key else RUPTURE
        assert lrfd[key].available == factors.phi * nominal
        assert asd[key].available == nominal / factors.omega


@pytest.mark.parametrize("case", [plate, rod])
def test_the_editions_agree_where_nothing_changed(case):
    """A hole up to 1/32 in larger: C_r is 1 in 2022 and does not exist in 2016."""
    new, old = strengths(evaluate(case())), strengths(evaluate(case(**E16)))
    assert {key: new[key] for key in old} == old
    assert set(new) - set(old) <= {"thread, stress area"}


def test_clauses_follow_the_edition():
    assert evaluate(rod())["thread, body area"].cite == "AISC 360-22 J3.7, Table J3.2"
    assert evaluate(rod(**E16))["thread, body area"].cite == "AISC 360-16 J3.6, Table J3.2"
    for block in evaluate(plate(**E16)).blocks:
        assert all("360-22" not in step.cite for step in block.steps)


def test_the_2016_shear_rupture_is_from_memory_and_says_so():
    steps = evaluate(plate(**E16))["shear rupture"].steps
    assert "AISC 360-16 D5.1(b), Eq. D5-2 (from memory, verify)" in [step.cite for step in steps]


def test_the_unit_sets_agree_within_their_paired_constants():
    """The same plate, converted exactly. Only b_e differs: the clause adds 0.63 in (16.002 mm) or 16 mm."""
    us, si = evaluate(plate()), evaluate(plate(**PLATE_SI))
    for key in ("shear rupture", "pin bearing", "gross yielding"):
        assert si[key].nominal == pytest.approx(us[key].nominal * KIP, rel=1e-9)
    by_constants = (2 * 25.4 + 16) / (2 * 25.4 + 0.63 * 25.4)
    assert si["tensile rupture"].nominal == pytest.approx(us["tensile rupture"].nominal * KIP * by_constants, rel=1e-9)
    assert abs(by_constants - 1) < 4e-5
    assert si.governing.key == us.governing.key
    assert si.governing.ratio == pytest.approx(us.governing.ratio, rel=1e-9)


def test_the_unit_sets_agree_where_the_edge_limits():
    """With b_e the distance to the edge no constant is left."""
    us = evaluate(plate(plate_width="6 in"))
    si = evaluate(plate(**PLATE_SI | {"plate_width": "152.4 mm"}))
    for key, nominal in strengths(us).items():
        assert si[key].nominal == pytest.approx(nominal * KIP, rel=1e-9)


def test_an_entry_in_the_other_unit_set_is_converted_and_said():
    calc = evaluate(plate(plate_thickness="25.4 mm"))
    said = "Plate thickness is entered as 25.4 mm in a calc in US units; it is converted to 1 in."
    assert said in words(calc.cautions)
    assert strengths(calc) == strengths(evaluate(plate()))
    assert not any("is entered as" in text for text in words(evaluate(plate()).cautions))


# --- the step at 1/32 in -----------------------------------------------------------------------------------------

def C_r(calc):
    return next((s.result for s in calc["shear rupture"].steps if s.chosen), None)


@pytest.mark.parametrize("hole, step", [("2-1/2 in", 1.0), ("2-33/64 in", 1.0), ("2-17/32 in", 1.0),
                                        ("2.5313 in", 0.95), ("2-9/16 in", 0.95)])
def test_the_step_of_C_r_in_2022(hole, step):
    calc = evaluate(plate(hole_diameter=hole))
    assert C_r(calc) == step
    assert calc["shear rupture"].nominal == pytest.approx(0.6 * step * 65 * 10.5, rel=1e-12)


@pytest.mark.parametrize("hole, step", [("64.5 mm", 1.0), ("64.501 mm", 0.95), ("65.5 mm", 0.95)])
def test_the_step_of_C_r_in_2022_in_millimetres(hole, step):
    assert C_r(evaluate(plate(**PLATE_SI | {"hole_diameter": hole}))) == step


def test_the_2016_edition_has_no_C_r_and_no_larger_hole():
    assert C_r(evaluate(plate(**E16))) is None
    with pytest.raises(CalcError, match="covers up to 1/32 in"):
        evaluate(plate(**E16, hole_diameter="2.5313 in"))


@pytest.mark.parametrize("pin, hole, changes, status", [
    ("2-63/64 in", "3-1/64 in", {}, "meets"), ("2-63/64 in", "3-3/64 in", {}, "fails"),
    ("3 in", "3-1/32 in", {}, "meets"), ("3 in", "3-1/16 in", {}, "meets"), ("3-1/2 in", "3-9/16 in", {}, "meets"),
    ("3 in", "3-1/32 in", E16, "meets"), ("2-1/2 in", "2-9/16 in", {"movement": "no"}, "not applicable"),
])
def test_the_larger_clearance_from_3_in_pins_in_2022(pin, hole, changes, status):
    assert statuses(evaluate(plate(pin_diameter=pin, hole_diameter=hole, **changes)))["clearance"] == status


@pytest.mark.parametrize("pin, hole, status", [("74.9 mm", "76.9 mm", "fails"), ("75 mm", "77 mm", "meets"),
                                               ("74.9 mm", "75.9 mm", "meets")])
def test_the_larger_clearance_from_75_mm_pins_in_2022(pin, hole, status):
    case = plate(**PLATE_SI | {"pin_diameter": pin, "hole_diameter": hole})
    assert statuses(evaluate(case))["clearance"] == status


def test_the_larger_clearance_is_not_there_in_2016():
    with pytest.raises(CalcError, match=r"1/16 in larger than the pin; AISC 360-16 D5\.2\(b\) covers up to 1/32 in"):
        evaluate(plate(pin_diameter="3 in", hole_diameter="3-1/16 in", **E16))


# --- comparisons -------------------------------------------------------------------------------------------------

def test_comparisons_have_a_tolerance_of_binary_arithmetic_and_no_more():
    assert 1.3 * 6.0 > 7.8
    assert at_least(7.8, 1.3 * 6.0)
    assert not at_least(7.8 - 1e-7, 1.3 * 6.0)
    assert RELATIVE <= 1e-9


def test_an_end_distance_that_is_just_enough_in_decimals_meets_the_rule():
    """b_e is 2.63 in; 1.33 times that is 3.4979 in."""
    assert statuses(evaluate(plate(end_distance="3.4979 in")))["end distance"] == "meets"
    assert statuses(evaluate(plate(end_distance="3.4978 in")))["end distance"] == "fails"


def test_a_hole_that_is_just_within_the_clearance_in_decimals():
    """0.1 + 0.03125 in is a hair above 1/32 in as a difference in binary."""
    assert C_r(evaluate(plate(pin_diameter="0.1 in", hole_diameter="0.13125 in"))) == 1.0


def test_a_ratio_of_one_passes_and_a_hair_more_does_not():
    exact = evaluate(plate(required_strength="168.75 kip"))
    assert (exact.governing.ratio, exact.passes) == (1.0, True)
    over = evaluate(plate(required_strength="168.751 kip"))
    assert not over.passes
    assert over.failing == ["Bearing on the pin: required 168.8 kip exceeds available 168.8 kip, ratio 1.001"]
    assert "ratio 1.001" in document.verdict(over)["text"]


# --- what governs and what fails ---------------------------------------------------------------------------------

def test_the_highest_ratio_governs():
    assert evaluate(plate()).governing.key == "pin bearing"
    assert evaluate(plate(end_distance="1 in")).governing.key == "shear rupture"
    assert evaluate(plate(plate_width="4 in")).governing.key == "tensile rupture"
    assert evaluate(plate(plate_width="4 in", pin_diameter="0.6 in", hole_diameter="0.6 in", F_u="52 ksi",
                          pin_F_y="150 ksi", end_distance="9 in")).governing.key == "pin bearing"


def test_without_load_the_least_strength_governs():
    calc = evaluate(plate(required_strength="0 kip"))
    assert (calc.governing.key, calc.governing.ratio, calc.passes) == ("pin bearing", 0.0, True)


def test_a_rule_for_comparison_never_governs_and_never_fails():
    """Half an inch: the stress area gives less than 0.75 of the body area, and is shown beside it."""
    half_inch = {"rod_diameter": "1/2 in", "F_y": "50 ksi", "F_u": "65 ksi", "required_strength": "7.1 kip"}
    calc = evaluate(rod(**half_inch))
    assert calc["thread, stress area"].ratio > 1 > calc["thread, body area"].ratio
    assert calc.governing.key == "thread, body area"
    assert calc.passes
    other = evaluate(rod(**half_inch, strength_rule="Fu on tensile stress area"))
    assert other.governing.key == "thread, stress area"
    assert not other.passes


@pytest.mark.parametrize("changes, key", [
    ({"end_distance": "3.4 in"}, "end distance"),
    ({"side_distance": "2.5 in"}, "hole midway"),
    ({"corner_distance": "3-7/8 in"}, "corner cut"),
    ({"hole_diameter": "2-9/16 in"}, "clearance"),
])
def test_a_rule_that_fails_makes_the_calc_not_acceptable(changes, key):
    """All ratios are below one, and still."""
    calc = evaluate(plate(**changes))
    assert all(block.passes for block in calc.limit_states)
    assert [rule.key for rule in calc.rules if rule.status == "fails"] == [key]
    assert not calc.passes
    assert len(calc.failing) == 1
    verdict = document.verdict(calc)
    assert not verdict["passes"]
    assert "NOT ACCEPTABLE: " + calc.failing[0] in verdict["text"]


def test_a_caution_does_not_fail():
    calc = evaluate(plate(plate_width="7.5 in"))
    assert statuses(calc)["width before the limit"] == "caution"
    assert calc.passes


def test_an_unknown_block_is_named():
    with pytest.raises(KeyError, match='no block "bearing"; there are: geometry, tensile rupture, '):
        evaluate(plate())["bearing"]


@pytest.mark.parametrize("cases", [
    [plate(), plate(**E16), plate(**PLATE_SI), plate(side_distance="2 in"), plate(**ASD)],
    [rod(), rod(**E16), rod(**ROD_SI), rod(**LENGTHS), rod(**RATED, rating_basis="LRFD design strength")],
])
def test_the_blocks_are_the_same_for_every_input(cases):
    """A workbook gives each block its place."""
    assert len({tuple(block.key for block in evaluate(case).blocks) for case in cases}) == 1


# --- a rated end fitting -----------------------------------------------------------------------------------------

def test_a_rating_is_compared_with_the_load_of_its_level_and_gets_no_factor():
    design = evaluate(rod(**RATED, rating_basis="LRFD design strength"))["end fitting"]
    assert (design.available, design.required, design.ratio) == (25.0, 20.0, 0.8)
    working = evaluate(rod(**RATED, **LENGTHS, rating_basis="safe working load"))["end fitting"]
    assert (working.available, working.required, working.ratio) == (25.0, 15.0, 0.6)
    asd = evaluate(rod(**RATED, **ASD, rating_basis="ASD allowable strength"))["end fitting"]
    assert (asd.available, asd.required) == (25.0, 20.0)
    assert design.factors is working.factors is asd.factors is None


def test_a_rating_governs_where_it_is_the_weakest():
    calc = evaluate(rod(**RATED | {"fitting_rating": "19.99 kip"}, rating_basis="LRFD design strength"))
    assert calc.governing.key == "end fitting"
    assert calc.failing == ["Maker's rating of the clevis: required 20.00 kip exceeds available 19.99 kip, "
                            "ratio 1.001"]


# --- cautions, notes, assumptions --------------------------------------------------------------------------------

@pytest.mark.parametrize("calc_of, part", [
    (lambda: plate(hole_made_by="thermal cut, not finished"), "The hole is thermally cut and not finished"),
    (lambda: plate(F_u="54 ksi"), "F_u / F_y is below 1.1"),
    (lambda: plate(hole_diameter="2-1/2 in"), "Hole and pin have the same diameter"),
    (lambda: plate(), "the pin wears in its hole"),
    (lambda: plate(plate_width="7.5 in"), "the plate is narrower than the full effective width would use"),
    (lambda: rod(rod_diameter="1/2 in"), "A rod of 1/2 in is below 5/8 in"),
    (lambda: rod(rod_diameter="1/2 in"), "The tensile stress area is 0.723 of the body area, below the 0.75"),
    (lambda: rod(**ROD_SI | {"rod_diameter": "14 mm"}), "A rod of 14 mm is below 16 mm"),
    (lambda: rod(F_u="39 ksi"), "F_u / F_y is below 1.1"),
    (lambda: rod(pitch="12 tpi"), "The pitch is not that of the UNC series for this size, which is 1-8 UNC."),
    (lambda: rod(rod_diameter="1.05 in", pitch="8 tpi"), "the series does not have the size."),
    (lambda: rod(**RATED, rating_basis="LRFD design strength"), "The clevis stands on the maker's rating"),
])
def test_cautions(calc_of, part):
    assert [text for text in words(evaluate(calc_of()).cautions) if part in text]


def test_a_sound_case_has_no_other_cautions():
    assert words(evaluate(rod()).cautions) == []
    assert len(evaluate(plate()).cautions) == 1


def test_a_limit_by_the_edge_is_printed_with_both_numbers():
    notes = words(evaluate(plate(plate_width="7.5 in")).notes)
    assert "The effective width is limited by the edge of the plate: 2-31/64 in instead of 2.63 in." in notes


def test_the_weaker_of_plate_and_pin_bears_and_is_named():
    calc = evaluate(plate(pin_F_y="36 ksi"))
    assert calc["pin bearing"].nominal == pytest.approx(1.8 * 36 * 2.5)
    weaker = calc["pin bearing"].steps[1]
    assert (weaker.values, weaker.result) == ({"F_y": 50, "F_yp": 36}, 36)


def test_a_default_is_printed_as_an_assumption():
    assert "Hole made by: drilled, by default." in words(evaluate(plate()).assumptions)
    assert not any(text.startswith("Hole made by") for text in words(evaluate(plate(hole_made_by="bored")).assumptions))
    assert "Modulus of elasticity: 29000 ksi, by default." in words(evaluate(rod()).assumptions)


@pytest.mark.parametrize("case", [plate(), rod(), plate(required_strength="700 kip")])
def test_the_usual_cautions_are_on_every_calc(case):
    nodes = document.cautions(evaluate(case))[0]["nodes"]
    texts = [node["text"] for node in nodes]
    assert all(text in texts for text in document.CAUTIONS)
    usual = " ".join(document.CAUTIONS)
    for part in ("an aid to a licensed engineer, who is responsible", "building code in force", "can kill",
                 "checked by a second engineer"):
        assert part in usual


def test_what_is_not_applicable_says_why():
    block = evaluate(rod(**E16))["thread, stress area"]
    assert block.is_limit_state
    assert block.reason == "AISC 360-16 has no rule on the tensile stress area; it came with the 2022 edition."
    elongation = evaluate(rod())["elongation"]
    assert not elongation.is_limit_state
    assert elongation.reason == "Elongation is not computed: no service load is given."
