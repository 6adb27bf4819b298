"""What a welded member is refused with, the whole message."""

import pytest
from weld_samples import FLAT, WELDED_SI, flat, welded

from calclib.calc import evaluate
from calclib.errors import CalcError


@pytest.mark.parametrize("changes, message", [
    ({"section": ""}, "plate_width: is empty and no section is chosen; give the width of the flat plate, or choose a "
                      "section."),
    ({**FLAT, "plate_thickness": ""}, "plate_thickness: is empty and no section is chosen; give the thickness of the "
                                      "flat plate, or choose a section."),
    ({"plate_width": "6 in"}, "plate_width: is given and so is the section WT6x20; leave one of them blank."),
    ({"section": "HSS6x6x3/8"}, "section: HSS6x6x3/8 is a hollow section; its slotted end is a kind of its own. Choose "
                                "an open shape."),
    ({"section": "WT6x21"}, 'section: shape: "WT6x21" is not in the AISC Shapes Database v16.0 (16th-edition Manual); '
                            "the nearest are WT6x20, WT6x22.5, WT6x25."),
    ({"welded_element": ""}, "welded_element: is empty; for WT choose: flange."),
    ({"welded_element": "web"}, "welded_element: web of WT6x20 is not covered; for WT choose: flange."),
    ({"section": "2L4x3-1/2x3/8x3/8LLBB", "welded_element": "short leg"},
     "welded_element: the long legs of 2L4x3-1/2x3/8x3/8LLBB are back to back and touch the gusset; choose "
     '"long leg".'),
    ({"section": "W12x40", "welded_element": "web"},
     "weld_spacing: is empty and the web of a rolled shape is welded; give the distance between the welds on the web, "
     "at most the flat depth of 9-1/4 in."),
    ({"section": "W12x40", "welded_element": "web", "weld_spacing": "10 in"},
     "weld_spacing: 10 in is more than the flat depth of the web of 9-1/4 in; the gusset does not lie flat on the web. "
     "Place the welds closer."),
    ({"weld_spacing": "9 in"}, "weld_spacing: 9 in is more than the width of the welded element of 8.01 in; the welds "
                               "lie on it or along its edges."),
    ({"weld_layout": "transverse", "weld_length_2": "8 in"},
     "weld_length_2: is given and there are transverse welds only; leave it blank, or choose a layout with "
     "longitudinal welds."),
    ({"lap": "8 in"}, "lap: 8 in is shorter than the weld of 12 in; the weld lies within the lap."),
    ({"F_EXX": "485 MPa", "units": "US", "gusset_F_u": "400 ksi"},
     "gusset_F_u: 400 ksi lies outside 30 ksi to 200 ksi, the range of structural steel; check its unit."),
    ({"gusset_F_y": "65 ksi"}, "gusset_F_u: 65 ksi is not above the yield stress of 65 ksi; give the specified minimum "
                               "values of one grade."),
    ({"F_EXX": "7 ksi"}, "F_EXX: 7 ksi lies outside 60 ksi to 120 ksi, the range of filler metals; check its unit."),
    ({"user_U": "1.1", "user_U_reason": "test"}, "user_U: 1.1 is above 1; a shear lag factor lies above 0 and up to "
                                                   "1."),
    ({"user_U": "0.9"}, "user_U_reason: is empty and a shear lag factor is given; state the test, analysis or "
                         "document it is from, or leave the factor blank."),
    ({"gusset_width": "8 in"}, "gusset_width: 8 in does not hold a connection 8.01 in wide; use a wider gusset."),
    ({"standard": "AISC 360-16", "spread_angle": "45 degrees"},
     "spread_angle: 45 degrees stands in the commentary of AISC 360-22 for gussets in tension, not in AISC 360-16; "
     'choose "30 degrees".'),
])
def test_refused(changes, message):
    with pytest.raises(CalcError) as caught:
        evaluate(welded(**changes))
    assert str(caught.value) == message


@pytest.mark.parametrize("standard", ["AISC 360-22", "AISC 360-16"])
def test_a_plate_with_welds_shorter_than_the_distance_to_its_centroid(standard):
    with pytest.raises(CalcError) as caught:
        evaluate(flat(plate_thickness="3 in", weld_length_1="1.5 in", standard=standard))
    assert str(caught.value) == ("weld_length_1: the welds of 1-1/2 in are no longer than the distance to the centroid "
                                 f"of 1-1/2 in; {standard} Table D3.1 gives no shear lag factor. Lengthen the welds.")


def test_a_weld_of_no_size_and_a_stress_in_the_other_unit():
    with pytest.raises(CalcError, match="weld_size: 0 mm must be above 0"):
        evaluate(welded(**{**WELDED_SI, "weld_size": "0 mm"}))
