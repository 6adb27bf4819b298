"""What a slotted hollow section is refused with, the whole message."""

import pytest
from weld_samples import SQUARE, slotted

from calclib.calc import evaluate
from calclib.errors import CalcError

RECTANGLE = {"section": "HSS6x4x1/4"}
SIDES = {**RECTANGLE, "connection": "two side plates"}
E16 = {"standard": "AISC 360-16"}


@pytest.mark.parametrize("changes, message", [
    ({"section": "W8x21"}, "section: W8x21 is no hollow section; a welded open shape is a kind of its own. Choose HSS "
                           "or pipe."),
    ({"hss_standard": "A1085"}, "gross_area: is empty: HSS6.000x0.500 to A1085 is designed with its full wall of 0.5 "
                                "in (AISC 360 B4.2), but the table's area of 8.09 in2 goes with 0.465 in. Take the "
                                "area from the producer's table and enter it."),
    ({"connection": "two side plates"}, "connection: HSS6.000x0.500 is round; two side plates are for rectangular "
                                        'sections. Choose "one gusset through slots".'),
    ({"side_along": "longer side"}, "side_along: is given and HSS6.000x0.500 is round; leave it blank."),
    ({**SIDES, "slot_width": "5/8 in"}, "slot_width: is given and side plates need no slots; leave it blank."),
    ({**SIDES, "weld_spacing": "7 in"}, "weld_spacing: 7 in is more than the face of 6 in; the welds lie on it."),
    ({"weld_spacing": "5 in"}, "weld_spacing: is given and the gusset passes through slots, where the walls hold the "
                               "welds; leave it blank."),
    ({"slot_width": "7/16 in"}, "slot_width: 7/16 in is narrower than the gusset of 1/2 in; the gusset does not enter. "
                                "Widen the slot."),
    ({**RECTANGLE, "slot_width": "3-3/4 in"}, "slot_width: a slot of 3-3/4 in is not narrower than the section of "
                                              "3.534 in; no wall is left beside it. Use a thinner gusset."),
    ({**RECTANGLE, "weld_length": "1 in"}, "weld_length: 1 in is no longer than the distance to the centroid of "
                                           "1.34 in; AISC 360-22 Table D3.1, case 5 gives no shear lag factor. "
                                           "Lengthen the welds."),
    ({**E16, "weld_length": "5-15/16 in"}, "weld_length: 5-15/16 in is shorter than the diameter of 6 in; AISC 360-16 "
                                           "Table D3.1, case 5 begins there. Lengthen the welds, or use the 2022 "
                                           "edition."),
    ({**SQUARE, **E16, "weld_length": "5 in"}, "weld_length: 5 in is shorter than the side along the gusset of 6 in; "
                                               "AISC 360-16 Table D3.1, case 6 begins there. Lengthen the welds, or "
                                               "use the 2022 edition."),
    ({**SQUARE, "directional": "yes"}, "directional: AISC 360-22 J2.4 gives 1.0 at the ends of rectangular hollow "
                                       'sections in tension, whatever the direction of the weld; choose "no".'),
    ({"gusset_width": "6 in"}, "gusset_width: 6 in does not hold a connection 6 in wide; use a wider gusset."),
])
def test_refused(changes, message):
    with pytest.raises(CalcError) as caught:
        evaluate(slotted(**changes))
    assert str(caught.value) == message
