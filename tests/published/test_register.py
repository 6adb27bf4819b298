"""Every equation is compared with print, or stands here with the reason why not."""

from importlib import import_module
from pathlib import Path
from pkgutil import walk_packages

import printed
import pytest

import calclib.equations
from calclib.equations.form import REGISTER
from calclib.members import KINDS  # noqa: F401  the kinds import every equation that a calc can use

HOLLOW = ("no published example on a hollow section of this kind was found; centroids by summation and the two "
          "editions against each other in tests/honest/test_connections.py")
CENTROID = ("the examples take the distance from a table of tees or angles; against plates in "
            "tests/honest/test_connections.py")
NO_EXAMPLE = "no published example was found; hand arithmetic and limits in tests/honest/test_connections.py"
DETAILING = "a detailing rule that no example prints; tests/honest/test_connections.py"
BUILT_UP = "no published example was found; by hand in tests/honest/test_built_up.py"
FATIGUE = "no published example was found; powers by logarithms in tests/honest/test_fatigue.py"
WELDED = "no published example was found; by hand in tests/honest/test_welded_traps.py"
PRODUCT = "product of a factor that is checked; tests/honest/test_hole_in_strip.py"
UNPUBLISHED = {
    "ratio": "no example prints the ratio; a quotient, recomputed by the pocket-calculator test",
    "opposite_side_distance": "no published example of a hole off the centre line was found; geometry",
    "smaller_side_distance": "no published example of a hole off the centre line was found; the smaller of two",
    "weaker_yield_stress": "no published example has a pin weaker than the plate; the smaller of two",
    "elongation_of_threaded_rod": "no published example of shank and thread in series was found; checked by the two "
                                  "limits of one bar in tests/honest/test_calc.py",
    "width_beside_gusset": HOLLOW,
    "centroid_of_slotted_rectangular_hss_2022": HOLLOW,
    "centroid_of_round_hss_2016": HOLLOW,
    "centroid_of_rectangular_hss_with_gusset_2016": HOLLOW,
    "centroid_of_rectangular_hss_with_side_plates_2016": HOLLOW,
    "shear_lag_factor_of_slotted_rectangular_hss_2022": HOLLOW,
    "shear_lag_factor_of_side_plates_2022": HOLLOW,
    "shear_lag_factor_of_round_hss_2016": HOLLOW,
    "shear_lag_factor_of_rectangular_hss_2016": HOLLOW,
    "centroid_from_connected_flange": CENTROID,
    "centroid_from_connected_web": CENTROID,
    "centroid_of_lapped_plate": CENTROID,
    "net_area_for_full_load": NO_EXAMPLE,
    "effective_net_area_of_splice_plate": NO_EXAMPLE,
    "block_shear_factor": NO_EXAMPLE,
    "spread_width_in_tension": NO_EXAMPLE,
    "spread_width_within_plate": NO_EXAMPLE,
    "area_of_two_cuts": "the examples add in words; a sum",
    "shear_stress_in_long_joint": NO_EXAMPLE,
    "stress_with_long_grip": NO_EXAMPLE,
    "slip_factor_with_tension_lrfd": NO_EXAMPLE,
    "slip_factor_with_tension_asd": NO_EXAMPLE,
    "slip_with_tension": NO_EXAMPLE,
    "shear_factor_with_filler": NO_EXAMPLE,
    "bolt_shear_with_filler": NO_EXAMPLE,
    "strength_of_one_bolt": NO_EXAMPLE,
    "strength_of_bolt_group": NO_EXAMPLE,
    "slip_with_longitudinal_fillets": NO_EXAMPLE,
    "bearing_with_deformation": NO_EXAMPLE,
    "bearing_in_long_slot": NO_EXAMPLE,
    "bearing_in_box": NO_EXAMPLE,
    "tearout_with_deformation": NO_EXAMPLE,
    "tearout_in_long_slot": NO_EXAMPLE,
    "directional_factor_2022": NO_EXAMPLE,
    "stress_of_fillet_in_direction_2016": NO_EXAMPLE,
    "strength_of_mixed_fillets": NO_EXAMPLE,
    "effective_length_of_very_long_fillet": NO_EXAMPLE,
    "size_of_short_fillet": NO_EXAMPLE,
    "area_of_equal_welds": WELDED,
    "sum_of_mixed_fillets": WELDED,
    "clear_depth_of_web": WELDED,
    "radius_of_gyration_of_plate": WELDED,
    "gross_area_of_parts": NO_EXAMPLE,
    "holes_in_all_parts": BUILT_UP,
    "offset_toe_to_toe": BUILT_UP,
    "offset_of_cover_plate": BUILT_UP,
    "radius_of_gyration_with_cover_plates": BUILT_UP,
    "radius_of_gyration_of_rectangle": BUILT_UP,
    "radius_of_gyration_of_stack": BUILT_UP,
    "radius_of_gyration_of_perforated_plate": BUILT_UP,
    "thinner_of_two_parts": BUILT_UP,
    "least_spacing": DETAILING,
    "preferred_spacing": DETAILING,
    "least_edge_distance_of_large_bolts": DETAILING,
    "greatest_edge_distance": DETAILING,
    "greatest_spacing": DETAILING,
    "greatest_spacing_when_weathering": DETAILING,
    "least_length_of_fillet": DETAILING,
    "greatest_size_along_edge": DETAILING,
    "least_lap": DETAILING,
    "least_length_of_tie_plate": DETAILING,
    "least_thickness_of_tie_plate": DETAILING,
    "preferred_length_between_connectors": DETAILING,
    "stress_range": FATIGUE,
    "stress_range_with_reversal": FATIGUE,
    "stress_range_of_pretensioned_bolt": FATIGUE,
    "allowable_stress_range": FATIGUE,
    "allowable_stress_range_of_throat": FATIGUE,
    "greatest_stress": FATIGUE,
    "allowable_force_range": FATIGUE,
    "fatigue_ratio": FATIGUE,
    "mean_stress_of_net_section": PRODUCT,
    "peak_stress_at_hole": PRODUCT,
}


def unchecked_equations():
    for path in Path(__file__).parent.glob("test_*.py"):
        import_module(path.stem)
    for module in walk_packages(calclib.equations.__path__, "calclib.equations."):
        import_module(module.name)
    checked = {equation for comparison in printed.PUBLISHED for equation in comparison.equations}
    return {equation.name for equation in REGISTER
            if equation not in checked and equation.function.__module__.startswith("calclib.")}


def test_every_equation_is_checked_against_print():
    """The list may only shrink: an equation that has found its source must leave it."""
    unchecked = unchecked_equations()
    missing, stale = sorted(unchecked - set(UNPUBLISHED)), sorted(set(UNPUBLISHED) - unchecked)
    assert not missing, f"not compared with print and without a reason: {', '.join(missing)}"
    assert not stale, f"compared with print by now, or gone; take out of the list: {', '.join(stale)}"


def test_names_of_equations_are_unique():
    names = [equation.name for equation in REGISTER if equation.function.__module__.startswith("calclib.")]
    assert sorted(set(names)) == sorted(names)


@pytest.mark.parametrize("digits, inside, outside", [
    ("281", (280.5, 281.5, 280.832), (280.499, 281.501)),
    ("45.0", (44.95, 45.05), (44.949, 45.051)),
    ("0.0318", (0.03182,), (0.03186,)),
])
def test_a_printed_number_allows_half_a_unit_of_its_last_digit(digits, inside, outside):
    number = printed.Printed(digits, "kip")
    assert all(number.agrees(value) for value in inside)
    assert not any(number.agrees(value) for value in outside)


def test_a_printed_number_is_compared_in_its_own_unit():
    assert printed.Printed("412.75", "kN").agrees(412750, "N")
    assert not printed.Printed("412.75", "kN").agrees(412.75, "N")
