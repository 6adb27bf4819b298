"""What a bolted member refuses, whole messages."""

import pytest
from bolted import bolted

from calclib.calc import evaluate
from calclib.errors import CalcError

FLAT = {"section": "", "plate_width": "8 in", "plate_thickness": "1/2 in", "first_line": ""}
PLACES = {"rows": "", "pitch": "", "end_distance": "", "first_line": ""}


@pytest.mark.parametrize("changes, message", [
    ({"section": "HSS6x6x3/8"},
     "section: HSS6x6x3/8 is a hollow section; bolts through its walls are outside this calc. Choose an open shape, or "
     "use the calc of a slotted hollow section."),
    ({"section": "W8x21"},
     "connected: is empty; W8x21 can be connected by both flanges or web: choose one."),
    ({"section": "C10x20", "connected": "both flanges"},
     'connected: "both flanges" is not an element by which C10x20 is connected here; choose "web".'),
    ({"section": ""},
     "plate_width: is empty and no rolled shape is chosen; give width and thickness of the plate, or choose a "
     "section."),
    ({"plate_width": "8 in"},
     "plate_width: is given and the section is 2L4x4x1/2x3/8; leave it blank, or leave the section blank for a plate."),
    ({"rows": ""},
     "rows: is empty; give the number of bolts in a line, or the places of the bolts."),
    ({"rows": "2.5"}, "rows: 2.5 is not a whole number; give the number of bolts or lines."),
    ({"pitch": ""}, "pitch: is empty and there are 4 bolts in a line; give their spacing."),
    ({"lines": "2"}, "gage: is empty and there are 2 bolt lines; give their spacing."),
    ({"lines": "3", "gages": "3 in"},
     "gages: 1 gages do not go with 3 bolt lines; give 2, each above 0."),
    ({"first_line": ""},
     "first_line: is empty; give the distance from the back of the angle to the first line of bolts."),
    ({"bolt_places": "2 in, 2 in"},
     "rows: is given and the bolts are given by their places; leave one of them blank."),
    ({**PLACES, "bolt_places": "2 in; 5 in"},
     'bolt_places: "2 in" is not a place; write distance from the end, distance across, such as "2 in, 1.5 in", and a '
     "semicolon between places."),
    ({**PLACES, "bolt_places": "0 in, 2 in"},
     'bolt_places: "0 in, 2 in" lies beyond the end of the member; give a distance above 0.'),
    ({**PLACES, "bolt_places": "2, 2 in"},
     'bolt_places: 2 has no unit; write "13/16 in" or "20 mm".'),
    ({"bolt_diameter": "13/16 in"},
     "bolt_diameter: bolt diameter: 0.8125 in is not in AISC 360-22 Table J3.3; the sizes are 1/2, 5/8, 3/4, 7/8, 1, "
     "and from 1-1/8 to 4 in."),
    ({"bolt_group": "Group A"},
     'bolt_group: bolt group: "Group A" is not in AISC 360-22 Table J3.2; there are A307, Group 120, Group 144, '
     "Group 150, Group 200."),
    ({"hole_diameter": "1/2 in"},
     "hole_diameter: 1/2 in is smaller than the bolt of 3/4 in; enlarge the hole or use a smaller bolt."),
    ({"gusset_edge": "17 in"},
     "gusset_width: 16 in does not hold a connection 0 in wide that begins 17 in from the lower edge; use a wider "
     "gusset."),
    ({"standard": "AISC 360-16", "spread_angle": "45 degrees"},
     "spread_angle: 45 degrees stands in the commentary of AISC 360-22 for gussets in tension, not in AISC 360-16; "
     'choose "30 degrees".'),
    ({"gusset_F_u": "50 ksi"},
     "gusset_F_u: 50 ksi is not above the yield stress of 50 ksi; give the specified minimum values of one grade."),
    ({"gussets": "two, one on each face"},
     "gussets: two gussets do not go with legs back to back here; the other face is not free. Choose \"one\"."),
    ({"user_U": "0.8"},
     "user_U_reason: is empty and a shear lag factor is given; state the reason, such as a test or an analysis."),
    ({"user_U": "1.2", "user_U_reason": "x"}, "user_U: 1.2 is above 1; a shear lag factor is at most 1 (D3)."),
    ({"end_distance": "13/32 in"},
     "rows: hole 1 at x = 0.40625, y = 2.5 breaks the edge from (0, 4) to (0, 0): the clear distance is 0."),
    ({"filler_thickness": "1/4 in"},
     "filler_thickness: is given and there are no fillers; leave it blank, or state the number of fillers."),
    ({"fillers": "one"},
     "filler_thickness: is empty and there are fillers; give their thickness together."),
    ({"cycles": "100000"}, "force_range: is empty and the number of stress cycles is above 20 000; give the range of "
     "axial force at service load."),
    ({**FLAT, "lines": "4", "gage": "2.5 in"}, "rows: hole 1 at x = 1.5, y = 0.25 breaks the edge y = 0: its centre is "
     "0.25 from the edge, half its width is 0.40625."),
])
def test_whole_messages(changes, message):
    with pytest.raises(CalcError) as refused:
        evaluate(bolted(**changes))
    assert str(refused.value) == message
