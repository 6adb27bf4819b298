"""What a built-up member is refused with, the whole message."""

import pytest
from built_up_samples import ANGLES, BACKS, COVERS, PLATES, built_up_case

from calclib.calc import evaluate
from calclib.errors import CalcError

BY_TIES = "is empty and the parts are held by tie plates; give it."


@pytest.mark.parametrize("changes, message", [
    ({"held_by": "lacing"}, "held_by: lacing is out of scope: its bars carry the shear of the member by E6.2, which "
     "AISC 360 states for compression and this calc does not work out. Use tie plates or perforated cover plates, or "
     "design the lacing apart."),
    ({"held_by": "bolts"}, "held_by: bolts cannot hold two channels, toe to toe in this calc; choose one of: tie "
     "plates, perforated cover plates."),
    (PLATES | {"held_by": "tie plates"}, "held_by: tie plates cannot hold plates in contact in this calc; choose one "
     "of: bolts, intermittent welds."),
    (ANGLES | {"held_by": "tie plates"}, "held_by: tie plates cannot hold two angles, long legs back to back in this "
     "calc; choose one of: bolts, intermittent welds."),
    ({"section": ""}, "section: is empty and the member is of two channels, toe to toe; give it."),
    ({"back_to_back": ""}, "back_to_back: is empty and the member is of two channels, toe to toe; give it."),
    (PLATES | {"plates": ""}, "plates: is empty and the member is of plates in contact; give it."),
    (PLATES | {"plate_width": ""}, "plate_width: is empty and the member is of plates in contact; give it."),
    ({"plate_thickness": ""}, f"plate_thickness: {BY_TIES}"),
    ({"line_distance": ""}, f"line_distance: {BY_TIES}"),
    ({"tie_length": ""}, f"tie_length: {BY_TIES}"),
    ({"tie_fastener_spacing": ""}, f"tie_fastener_spacing: {BY_TIES}"),
    (COVERS | {"perforation_width": ""}, "perforation_width: is empty and the parts are held by perforated cover "
     "plates; give it."),
    ({"section": "L4x4x1/2"}, "section: L4x4x1/2 is not a channel and the member is of two channels, toe to toe; "
     "choose another section or arrangement."),
    (ANGLES | {"section": "C10x20"}, "section: C10x20 is not an angle and the member is of two angles, long legs back "
     "to back; choose another section or arrangement."),
    ({"section": "W8x21"}, "section: W8x21 is not a channel and the member is of two channels, toe to toe; "
     "choose another section or arrangement."),
    (ANGLES | {"connected": "channel flanges"}, "connected: the member is of two angles, long legs back to back; only "
     'channels have flanges. Choose "all elements" or "web, leg or plate at the gusset".'),
    ({"end_connection": "longitudinal welds only"}, "end_connection: AISC 360-22 Table D3.1, case 2 does not cover "
     "longitudinal welds alone; case 4 does, part by part. Add transverse welds, connect all elements, or calculate "
     "each part as a welded member."),
    ({"back_to_back": "5.4 in"}, "back_to_back: 5.4 in is less than two flanges of 2.74 in; the channels overlap. Give "
     "the distance over both webs."),
    ({"line_distance": "14 in"}, "line_distance: 14 in is not less than the width of the member of 14 in; the lines "
     "lie outside the flanges."),
    ({"tie_length": "48 in"}, "tie_length: 48 in is not less than the spacing of the tie plates of 48 in; the plates "
     "would overlap. Give the spacing centre to centre."),
    (COVERS | {"plate_width": "11 in"}, "plate_width: 11 in is not more than the distance between lines of 11 in; the "
     "lines lie beside the cover plate."),
    (COVERS | {"perforation_width": "11 in"}, "perforation_width: 11 in is not less than the distance between lines of "
     "11 in; the perforation would cut the connectors."),
    (PLATES | {"flange_holes": "2"}, "flange_holes: is given and the member has no channels; leave it blank."),
    ({"cover_holes": "2"}, "cover_holes: is given and the member has no cover plates; leave it blank."),
    ({"holes": "2.5"}, "holes: 2.5 is not a whole number; holes are counted."),
    ({"holes": "0"}, "holes: the end connection is bolted and there is no hole in its critical section; count the "
     "holes."),
    (BACKS | {"connector_holes": "0"}, "connector_holes: the parts are held by bolts and no connector hole is counted; "
     "give the number in one cross section of each part."),
    ({"hole_diameter": ""}, 'hole_diameter: is empty and there are holes; give the nominal diameter, such as "13/16 '
     'in".'),
    ({"connector_hole": ""}, 'connector_hole: is empty and there are holes; give the nominal diameter, such as "13/16 '
     'in".'),
    ({"holes": "11"}, "holes: 11 of 15/16 in leave nothing of the web, leg or plate of 10 in; count the holes of one "
     "cross section."),
    ({"connector_holes": "7"}, "connector_holes: 7 of 13/16 in leave nothing of the two flanges of 5.48 in; count the "
     "holes of one cross section."),
    ({"connected": "channel flanges"}, "x_bar: is empty and no table gives it for this case; give the distance from "
     "the gusset to the centroid of one part."),
    (COVERS | {"x_bar": ""}, "x_bar: is empty and no table gives it for this case; give the distance from the gusset "
     "to the centroid of one part."),
    ({"connection_length": "0.6 in"}, "connection_length: 0.6 in is not more than the distance to the centroid of "
     "0.606 in; AISC 360-22 Table D3.1, case 2 gives no factor above 0. Use a longer connection."),
    ({"F_u": "50 ksi"}, "F_u: 50 ksi is not above the yield stress of 50 ksi; give the specified minimum values of one "
     "grade."),
    ({"section": "C10x21"}, "section: "),
])
def test_a_built_up_member_is_refused(changes, message):
    with pytest.raises(CalcError) as caught:
        evaluate(built_up_case(**changes))
    assert str(caught.value).startswith(message) if message.endswith(": ") else str(caught.value) == message
