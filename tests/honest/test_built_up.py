"""Built-up members: areas and radii by hand, each rule of D4 and J3.6 just inside and just outside, sweeps."""

from math import sqrt

import numpy as np
import pytest
from built_up_samples import ANGLES, ARRANGEMENTS, BACKS, COVERS, METRIC, PLATES, built_up_case
from pocket import check
from samples import ASD

from calclib import document, sketch
from calclib.calc import evaluate, sweep
from calclib.equations.aisc360 import built_up
from calclib.errors import CalcError
from calclib.tables.shapes import shape

E16 = {"standard": "AISC 360-16"}
PLATES_SI = {**PLATES, **METRIC, "back_to_back": "", "plate_width": "250 mm", "plate_thickness": "12 mm",
             "connector_spacing": "250 mm", "line_distance": "", "tie_length": "", "tie_fastener_spacing": ""}
CHANNEL = shape("C10x20")


def calc(**changes):
    return evaluate(built_up_case(**changes))


def status(rule, **changes):
    return next(r.status for r in calc(**changes).rules if r.key == rule)


def cautions(**changes):
    return " ".join(m.text for m in calc(**changes).cautions)


def step(found, block, equation):
    return next(s.result for s in found[block].steps if s.equation is equation)


# --- strength by hand --------------------------------------------------------------------------------------------

def test_two_channels_by_hand():
    found = calc()
    A_n = 2 * 5.87 - 6 * (15 / 16 + 1 / 16) * 0.379
    U = 1 - 0.606 / 12
    assert found["gross yielding"].available == pytest.approx(0.9 * 50 * 11.74)
    assert found["rupture at the connection"].available == pytest.approx(0.75 * 65 * A_n * U)
    assert found["rupture between the ends"].available == pytest.approx(0.75 * 65 * (11.74 - 4 * 0.875 * 0.436))
    assert found.governing.key == "rupture at the connection"


def test_asd_divides_the_same_nominal_strength():
    lrfd, asd = calc(), calc(**ASD)
    for key, omega in (("gross yielding", 1.67), ("rupture at the connection", 2.0)):
        assert asd[key].nominal == lrfd[key].nominal
        assert asd[key].available == lrfd[key].nominal / omega


def test_both_editions_give_the_same_strength():
    for changes in ARRANGEMENTS.values():
        for block, other in zip(calc(**changes).blocks, calc(**changes, **E16).blocks, strict=True):
            assert block.available == other.available


def test_cover_plates_by_hand():
    """Yielding takes the cover plates at a perforation; the ends have them whole."""
    found = calc(**COVERS)
    A_p, A_c = (13 - 6) * 0.375, 13 * 0.375
    assert found["gross yielding"].nominal == pytest.approx(50 * (11.74 + 2 * A_p))
    A_n = 11.74 + 2 * A_c - 6 * 0.379 - 4 * 0.436 - 4 * 0.375
    assert found["rupture at the connection"].nominal == pytest.approx(65 * A_n * (1 - 1.2 / 12))
    A_s = 11.74 + 2 * A_p - 4 * 0.875 * 0.436 - 4 * 0.875 * 0.375
    assert found["rupture between the ends"].nominal == pytest.approx(65 * A_s)
    assert any("instead of" in m.text and "perforation" in m.text for m in found.notes)


def test_perforations_alone_are_a_net_section():
    found = calc(**COVERS | {"connector_holes": "0", "connector_hole": ""})
    assert found["rupture between the ends"].nominal == pytest.approx(65 * (11.74 + 2 * 7 * 0.375))


def test_plates_by_hand():
    found = calc(**PLATES)
    assert found["gross yielding"].nominal == pytest.approx(50 * 15)
    assert found["rupture at the connection"].nominal == pytest.approx(65 * (15 - 9 * 0.5))
    assert found["rupture between the ends"].nominal == pytest.approx(65 * (15 - 6 * 0.875 * 0.5))


def test_without_holes_the_net_area_is_the_gross_area():
    found = calc(**ANGLES | {"end_connection": "longitudinal and transverse welds", "holes": "0", "hole_diameter": ""})
    assert found["rupture at the connection"].nominal == pytest.approx(65 * 9.5 * (1 - 0.981 / 12))
    assert found["rupture between the ends"].reason == ("The parts have neither connector holes nor perforations "
                                                        "between the end connections.")


def test_the_allowance_for_damage_is_a_pair():
    """1/16 in and 2 mm, not 1.59 mm."""
    us, si = calc(**PLATES), calc(**PLATES_SI)
    assert us["net area"].steps[0].result == 15 / 16 + 1 / 16
    assert si["net area"].steps[0].result == 24 + 2


# --- shear lag ---------------------------------------------------------------------------------------------------

def test_the_larger_factor_of_case_2_and_of_the_area_counts_and_both_are_printed():
    long, short = calc(), calc(connection_length="1 in")
    assert long["shear lag"].steps[-1].result == 1 - 0.606 / 12
    assert short["shear lag"].steps[-1].result == 10 * 0.379 / 5.87
    assert len(short["shear lag"].steps) == 5


def test_the_lower_bound_is_for_open_shapes_only():
    """Not for plates, nor for channels closed by cover plates."""
    plates = calc(**PLATES | {"connected": "web, leg or plate at the gusset", "x_bar": "1/2 in"})
    assert plates["shear lag"].steps[-1].result == 1 - 0.5 / 12
    assert calc(**COVERS)["shear lag"].steps[-1].result == 1 - 1.2 / 12


def test_the_distance_to_the_centroid_follows_the_legs_that_are_connected():
    long = calc(**ANGLES)["shear lag"].steps[0].result
    short = calc(**ANGLES | {"arrangement": "two angles, short legs back to back"})["shear lag"].steps[0].result
    assert (long, short) == (0.981, 1.98)


def test_connected_flanges_use_the_area_of_the_flanges():
    found = calc(connected="channel flanges", x_bar="2.6 in", holes="0", flange_holes="2")
    U = max(1 - 2.6 / 12, 2 * CHANNEL.b_f * CHANNEL.t_f / CHANNEL.A)
    A_n = 11.74 - 4 * CHANNEL.t_f
    assert found["rupture at the connection"].nominal == pytest.approx(65 * A_n * U)


def test_all_elements_connected_by_bolts_need_holes_in_all_of_them():
    everywhere = {"connected": "all elements"}
    assert "no hole in the flanges" in cautions(**everywhere)
    assert "no hole" not in cautions(**everywhere, flange_holes="2")
    assert "no hole in the other leg" in cautions(**ANGLES, **everywhere)
    assert "no hole" not in cautions(**ANGLES | {"holes": "2"}, **everywhere)
    assert "no hole" not in cautions(**PLATES)
    assert calc(**everywhere, flange_holes="2")["shear lag"].steps[-1].result == 1.0


def test_a_distance_of_the_engineers_own_is_cautioned_with_both_numbers():
    assert "as entered, 0.5 in" not in cautions(x_bar="0.606 in")
    assert "as entered, 1/2 in; the table gives 0.606 in" in cautions(x_bar="1/2 in")


# --- what holds the parts together: just inside and just outside ------------------------------------------------

@pytest.mark.parametrize("edition", ["22", "16"])
@pytest.mark.parametrize("rule, field, inside, outside, severity", [
    ("tie plate length", "tie_length", "7.3334 in", "7.333 in", "fails"),            # 2/3 of 11 in
    ("tie plate thickness", "plate_thickness", "0.22 in", "0.2199 in", "fails"),      # 11 in / 50
    ("tie plate fasteners", "tie_fastener_spacing", "6 in", "6.001 in", "fails"),
    ("tie plate fasteners", "tie_fastener_spacing", "0 in", "7 in", "fails"),
    ("component slenderness", "connector_spacing", "207 in", "207.01 in", "caution"),  # 300 r_y of 0.69 in
    ("member slenderness", "length", "1101 in", "1101.1 in", "caution"),               # 300 r_x of 3.67 in
])
def test_tie_plates(edition, rule, field, inside, outside, severity):
    changes = {"standard": f"AISC 360-{edition}"}
    assert status(rule, **changes, **{field: inside}) == "meets"
    assert status(rule, **changes, **{field: outside}) == severity


@pytest.mark.parametrize("rule, field, inside, outside", [
    ("tie plate length", "tie_length", "186.67 mm", "186.6 mm"),
    ("tie plate thickness", "plate_thickness", "5.6 mm", "5.59 mm"),
    ("tie plate fasteners", "tie_fastener_spacing", "150 mm", "150.1 mm"),     # a pair: 6 in would be 152.4 mm
])
def test_tie_plates_in_si(rule, field, inside, outside):
    assert status(rule, **METRIC | {field: inside}) == "meets"
    assert status(rule, **METRIC | {field: outside}) == "fails"


WEATHERING = {"exposure": "unpainted weathering steel, exposed"}


@pytest.mark.parametrize("edition, clause", [("22", "J3.6, D4"), ("16", "J3.5, D4")])
@pytest.mark.parametrize("changes, inside, outside", [
    ({}, "12 in", "12.001 in"),                                       # 24 t = 12 in
    ({"plate_thickness": "3/8 in"}, "9 in", "9.001 in"),              # 24 t
    ({"plate_thickness": "1 in"}, "12 in", "12.001 in"),              # 12 in
    ({**WEATHERING, "plate_thickness": "3/8 in"}, "5.25 in", "5.251 in"),     # 14 t
    ({**WEATHERING, "plate_thickness": "1 in"}, "7 in", "7.001 in"),
    ({"held_by": "intermittent welds", "connector_holes": "0"}, "12 in", "12.001 in"),
])
def test_spacing_of_connectors_in_contact(edition, clause, changes, inside, outside):
    base = {**PLATES, **changes, "standard": f"AISC 360-{edition}"}
    assert status("spacing of connectors", **base | {"connector_spacing": inside}) == "meets"
    assert status("spacing of connectors", **base | {"connector_spacing": outside}) == "fails"
    cite = next(r.cite for r in calc(**base).rules if r.key == "spacing of connectors")
    assert cite == f"AISC 360-{edition} {clause}"


@pytest.mark.parametrize("changes, inside, outside", [
    ({"plate_thickness": "20 mm"}, "300 mm", "300.1 mm"),             # a pair: 12 in would be 304.8 mm
    ({"plate_thickness": "10 mm"}, "240 mm", "240.1 mm"),
    ({**WEATHERING, "plate_thickness": "20 mm"}, "180 mm", "180.1 mm"),
])
def test_spacing_of_connectors_in_si(changes, inside, outside):
    assert status("spacing of connectors", **PLATES_SI | changes | {"connector_spacing": inside}) == "meets"
    assert status("spacing of connectors", **PLATES_SI | changes | {"connector_spacing": outside}) == "fails"


def test_cover_plates_are_in_contact_and_the_thinner_part_counts():
    """3/8 in plate on a flange of 0.436 in: 24 t = 9 in; with a thick plate the flange counts: 10.464 in."""
    assert status("spacing of connectors", **COVERS | {"connector_spacing": "9 in"}) == "meets"
    assert status("spacing of connectors", **COVERS | {"connector_spacing": "9.01 in"}) == "fails"
    thick = COVERS | {"plate_thickness": "1 in"}
    assert status("spacing of connectors", **thick | {"connector_spacing": "10.46 in"}) == "meets"
    assert status("spacing of connectors", **thick | {"connector_spacing": "10.47 in"}) == "fails"


@pytest.mark.parametrize("changes", [{}, BACKS, ANGLES])
def test_two_shapes_are_not_bound_by_the_spacing_of_plates(changes):
    assert status("spacing of connectors", **changes) == "not applicable"


@pytest.mark.parametrize("changes", [BACKS, ANGLES, PLATES, COVERS])
def test_tie_plate_rules_do_not_apply_without_tie_plates(changes):
    for rule in ("tie plate length", "tie plate thickness", "tie plate fasteners"):
        assert status(rule, **changes) == "not applicable"


@pytest.mark.parametrize("rule, field, inside, outside", [
    ("perforation length", "perforation_length", "12 in", "12.01 in"),
    ("perforation clear", "perforation_clear", "11 in", "10.99 in"),
    ("perforation radius", "perforation_radius", "1-1/2 in", "1.49 in"),
])
def test_perforations_are_guidance_only(rule, field, inside, outside):
    assert status(rule, **COVERS | {field: inside}) == "meets"
    found = calc(**COVERS | {field: outside})
    assert next(r.status for r in found.rules if r.key == rule) == "caution"
    assert found.passes
    assert status(rule, **COVERS | {field: ""}) == "not applicable"


def test_the_radius_of_perforations_is_a_pair():
    si = {**METRIC, **COVERS, "plate_width": "330 mm", "plate_thickness": "10 mm", "perforation_width": "150 mm",
          "line_distance": "280 mm", "connector_spacing": "150 mm", "x_bar": "30 mm", "perforation_length": "250 mm",
          "perforation_clear": "300 mm"}
    assert status("perforation radius", **si | {"perforation_radius": "38 mm"}) == "meets"
    assert status("perforation radius", **si | {"perforation_radius": "37.9 mm"}) == "caution"


@pytest.mark.parametrize("changes, inside, outside", [
    (PLATES, 300 * 0.5 / sqrt(12), None), (ANGLES, 300 * 0.864, None), (BACKS, 300 * 0.69, None),
])
def test_slenderness_of_one_part_is_advice(changes, inside, outside):
    assert status("component slenderness", **changes | {"connector_spacing": f"{inside!r} in"}) == "meets"
    found = calc(**changes | {"connector_spacing": f"{inside * 1.0001!r} in"})
    assert next(r.status for r in found.rules if r.key == "component slenderness") == "caution"


def test_a_slender_member_is_cautioned_and_passes():
    found = calc(length="1200 in")
    assert next(r.status for r in found.rules if r.key == "member slenderness") == "caution"
    assert found.passes
    assert status("member slenderness", length="") == "not applicable"


# --- radii of gyration -------------------------------------------------------------------------------------------

def second_moment(rectangles, axis):
    """Return area and second moment about x (axis 0) or y (axis 1) of rectangles (x1, x2, y1, y2, sign)."""
    area = moment = 0.0
    for x1, x2, y1, y2, sign in rectangles:
        b, h, middle = (x2 - x1, y2 - y1, (y1 + y2) / 2) if axis == 0 else (y2 - y1, x2 - x1, (x1 + x2) / 2)
        area += sign * b * h
        moment += sign * (b * h**3 / 12 + b * h * middle**2)
    return area, moment


def test_radius_of_a_pair_against_rectangles():
    """Two bars 2 x 6 whose middles are 5 in from the axis."""
    area, moment = second_moment([(4, 6, -3, 3, 1), (-6, -4, -3, 3, 1)], 1)
    assert built_up.radius_of_gyration_of_pair(
        r_1=built_up.radius_of_gyration_of_rectangle(h=2.0), e_1=5.0) == pytest.approx(sqrt(moment / area))
    assert built_up.offset_toe_to_toe(B=12.0, x_bar=1.0) == built_up.offset_back_to_back(s=8.0, x_bar=1.0) == 5.0


@pytest.mark.parametrize("axis", [0, 1])
def test_radius_with_cover_plates_against_rectangles(axis):
    """Two webs 1 x 10 at 5 in, and two plates 12 x 1/2 with a perforation of 4 in."""
    webs = [(4.5, 5.5, -5, 5, 1), (-5.5, -4.5, -5, 5, 1)]
    plates = [(-6, 6, y, y + 0.5, 1) for y in (5, -5.5)] + [(-2, 2, y, y + 0.5, -1) for y in (5, -5.5)]
    area, moment = second_moment(webs + plates, axis)
    rectangle = built_up.radius_of_gyration_of_rectangle
    if axis == 0:
        first = {"r_1": rectangle(h=10.0), "e_1": 0.0}
        second = {"r_2": rectangle(h=0.5), "e_2": built_up.offset_of_cover_plate(d=10.0, t=0.5)}
    else:
        first = {"r_1": rectangle(h=1.0), "e_1": 5.0}
        second = {"r_2": built_up.radius_of_gyration_of_perforated_plate(w=12.0, w_p=4.0), "e_2": 0.0}
    r = built_up.radius_of_gyration_with_cover_plates(n_1=2, A_1=10.0, n_2=2, A_2=4.0, **first, **second)
    assert r == pytest.approx(sqrt(moment / area))


def test_radius_of_a_stack_against_one_plate():
    assert built_up.radius_of_gyration_of_stack(n_1=3, t=0.5) == pytest.approx(1.5 / sqrt(12))
    assert built_up.holes_in_all_parts(n_1=2, m=3) == 6
    assert built_up.thinner_of_two_parts(t_1=0.5, t_2=0.375) == built_up.thinner_of_two_parts(t_1=0.375, t_2=0.5)


def test_short_and_long_legs_turn_the_radii():
    long = calc(**ANGLES)
    short = calc(**ANGLES | {"arrangement": "two angles, short legs back to back"})
    pair = built_up.radius_of_gyration_of_pair
    assert step(long, "slenderness", pair) == pytest.approx(sqrt(1.14**2 + (0.1875 + 0.981) ** 2))
    assert step(short, "slenderness", pair) == pytest.approx(sqrt(1.91**2 + (0.1875 + 1.98) ** 2))


# --- unit sets, sweeps, printing ---------------------------------------------------------------------------------

def test_a_shape_in_si_is_the_inch_shape_converted_and_the_calc_says_so():
    found = calc(**METRIC)
    assert found["areas"].steps[0].result == pytest.approx(5.87 * 25.4**2)
    assert any("tabulated in inches" in m.text for m in found.notes)
    assert found["gross yielding"].nominal == pytest.approx(345 * 2 * 5.87 * 645.16)
    assert not any("tabulated in inches" in m.text for m in calc(**PLATES_SI).notes)


UNITS = {"holes": "", "flange_holes": "", "cover_holes": "", "connector_holes": "", "cycles": "", "F_y": "ksi",
         "F_u": "ksi", "force_range": "kip"}
FATIGUE = {"cycles": "500000", "force_range": "30 kip", "stress_category": "B"}
SWEEPS = [
    ({}, "holes", np.arange(-1, 12)), ({}, "hole_diameter", np.linspace(-0.5, 4, 19)),
    ({}, "connection_length", np.linspace(0.2, 20, 19)), ({}, "F_y", np.linspace(10, 160, 16)),
    ({}, "flange_holes", np.arange(0, 6)), ({}, "connector_holes", np.arange(0, 8)),
    ({}, "x_bar", np.linspace(0, 14, 15)), ({}, "back_to_back", np.linspace(4, 16, 13)),
    ({}, "line_distance", np.linspace(2, 16, 15)), ({}, "tie_length", np.linspace(2, 60, 15)),
    (COVERS, "plate_thickness", np.linspace(0.1, 1, 10)), (COVERS, "plate_width", np.linspace(8, 16, 9)),
    (COVERS, "perforation_width", np.linspace(1, 12, 12)), (COVERS, "cover_holes", np.arange(0, 14)),
    (PLATES, "plate_thickness", np.linspace(0, 2, 11)), (PLATES, "holes", np.arange(0, 12)),
    (PLATES, "plate_width", np.linspace(1, 20, 20)), (ANGLES, "holes", np.arange(0, 8)),
    (BACKS, "connector_hole", np.linspace(0.1, 12, 13)), (FATIGUE, "cycles", np.array([1e4, 2e4, 1e5, 1e9])),
    (FATIGUE, "holes", np.arange(0, 6)), (FATIGUE, "force_range", np.linspace(0, 100, 5)), ({}, "holes",
                                                                                          np.array([1, 1.5, 2])),
]


@pytest.mark.parametrize("changes, name, points", SWEEPS, ids=lambda each: each if isinstance(each, str) else "")
def test_a_sweep_gives_what_each_case_gives_alone(changes, name, points):
    curves = sweep(built_up_case(**changes), **{name: points})
    refused = 0
    for i, value in enumerate(points):
        try:
            found = calc(**changes | {name: f"{float(value)!r} {UNITS.get(name, 'in')}".strip()})
        except CalcError:
            found = None
            refused += 1
        for curve in curves:
            alone = None if found is None else found[curve.key].available
            np.testing.assert_equal(curve.available[i], np.nan if alone is None else alone, f"{curve.key} {value}")
    assert refused < len(points)


VARIANTS = {f"{name} {method} {edition}": {**changes, **basis, "standard": f"AISC 360-{edition}"}
            for name, changes in {**ARRANGEMENTS, "SI": METRIC, "plates SI": PLATES_SI,
                                  "weathering": {**PLATES, **WEATHERING}, "fatigue": FATIGUE}.items()
            for method, basis in (("LRFD", {}), ("ASD", ASD)) for edition in ("22", "16")}


@pytest.mark.parametrize("name", VARIANTS)
def test_every_line_comes_out_on_a_pocket_calculator(name):
    known, count, found = {}, 0, calc(**VARIANTS[name])
    for block in found.blocks:
        for node in document.block_nodes(found, block):
            if node["type"] == "equation":
                check(node["lhs"], node["symbolic"], node["substituted"], node["result"], known)
                count += 1
    assert count > 15


def test_every_arrangement_has_the_same_blocks():
    keys = {tuple(block.key for block in calc(**changes).blocks) for changes in ARRANGEMENTS.values()}
    assert len(keys) == 1


@pytest.mark.parametrize("name", ARRANGEMENTS)
def test_every_arrangement_is_drawn_and_plotted(name):
    found = calc(**ARRANGEMENTS[name])
    assert sketch.svg(sketch.draw(found.case.kind.sketch(found.x, found)))
    nodes = document.sensitivity(found, vectors=None)[0]["nodes"]
    assert len(nodes) == {"ties": 4, "covers": 5, "backs": 4, "angles": 4, "plates": 4}[name]
    for plot in found.case.kind.plots:
        if plot.applies is None or plot.applies(found.x):
            assert any(np.isfinite(curve.available).any() for curve in sweep(found.case, **plot.points(found.x)))


def test_a_welded_member_without_holes_has_no_plot_of_holes():
    found = calc(**ANGLES | {"end_connection": "longitudinal and transverse welds", "holes": "0", "hole_diameter": ""})
    assert len(document.sensitivity(found, vectors=None)[0]["nodes"]) == 2


def test_fatigue_takes_the_smaller_net_area():
    found = calc(**FATIGUE)
    assert found["fatigue"].steps[-2].values["A"] == pytest.approx(min(11.74 - 6 * 0.379, 11.74 - 3.5 * 0.436))
    assert calc()["fatigue"].reason.startswith("Fatigue is not evaluated")


def test_what_was_not_read_in_the_2016_edition_says_so():
    cites = {r.key: r.cite for r in calc(**E16).rules}
    assert cites["tie plate length"] == cites["component slenderness"] == "AISC 360-16 D4 (from memory, verify)"
    assert {r.key: r.cite for r in calc().rules}["tie plate length"] == "AISC 360-22 D4"


def test_what_is_entered_and_not_used_is_said():
    assert "not used" not in " ".join(cautions(**changes) for changes in ARRANGEMENTS.values())
    assert "Entered and not used in this case: Section of one part, Distance back to back." in cautions(
        **PLATES | {"section": "C10x20", "back_to_back": "1 in"})
    assert "not used in this case: Length of tie plates, Width of perforations." in cautions(
        **ANGLES | {"tie_length": "9 in", "perforation_width": "3 in"})
    assert "not used in this case: Distance to centroid." in cautions(connected="all elements", flange_holes="2",
                                                                       x_bar="1 in")


def test_cover_plates_without_holes_in_a_bolted_end_are_cautioned():
    assert "No hole is counted in the cover plates" in cautions(**COVERS | {"cover_holes": "0"})
    assert "No hole is counted in the cover plates" not in cautions(**COVERS)
