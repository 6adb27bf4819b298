"""A built-up member that the tests begin with: two channels toe to toe with tie plates, and its other arrangements."""

from samples import PLATE

from calclib.case import Case
from calclib.members import KINDS

_PROJECT = {name: PLATE[name] for name in ("project", "calc_number", "subject", "date", "prepared_by", "standard",
                                           "method", "units", "load_level", "load_source", "steel", "F_y", "F_u")}
CHORD = {
    **_PROJECT, "required_strength": "385 kip", "arrangement": "two channels, toe to toe", "section": "C10x20",
    "back_to_back": "14 in", "plate_thickness": "3/8 in", "held_by": "tie plates", "connector_spacing": "48 in",
    "connector_holes": "2", "connector_hole": "13/16 in", "line_distance": "11 in", "tie_length": "9 in",
    "tie_fastener_spacing": "3 in", "end_connection": "bolts", "connected": "web, leg or plate at the gusset",
    "connection_length": "12 in", "holes": "3", "flange_holes": "0", "hole_diameter": "15/16 in", "length": "24 ft",
}
_NO_TIES = {"line_distance": "", "tie_length": "", "tie_fastener_spacing": "", "plate_thickness": ""}
COVERS = {
    "held_by": "perforated cover plates", "plate_width": "13 in", "perforation_width": "6 in",
    "perforation_length": "10 in", "perforation_clear": "12 in", "perforation_radius": "2 in",
    "connector_spacing": "6 in", "cover_holes": "2", "flange_holes": "2", "x_bar": "1.2 in", "tie_length": "",
    "tie_fastener_spacing": "",
}
BACKS = {**_NO_TIES, "arrangement": "two channels, back to back", "back_to_back": "1/2 in", "held_by": "bolts",
         "connector_holes": "1"}
ANGLES = {**_NO_TIES, "arrangement": "two angles, long legs back to back", "section": "L6x4x1/2",
          "back_to_back": "3/8 in", "held_by": "intermittent welds", "connector_holes": "0", "connector_hole": "",
          "connector_spacing": "30 in", "holes": "1", "required_strength": "200 kip"}
PLATES = {**_NO_TIES, "arrangement": "plates in contact", "section": "", "back_to_back": "", "plates": "3",
          "plate_width": "10 in", "plate_thickness": "1/2 in", "held_by": "bolts", "connector_spacing": "9 in",
          "connected": "all elements"}
ARRANGEMENTS = {"ties": {}, "covers": COVERS, "backs": BACKS, "angles": ANGLES, "plates": PLATES}
# Sizes of the metric trade; the section stays an inch shape.
METRIC = {
    "units": "SI", "required_strength": "1700 kN", "F_y": "345 MPa", "F_u": "450 MPa", "back_to_back": "350 mm",
    "plate_thickness": "10 mm", "connector_spacing": "1200 mm", "connector_hole": "22 mm", "line_distance": "280 mm",
    "tie_length": "230 mm", "tie_fastener_spacing": "75 mm", "connection_length": "300 mm", "hole_diameter": "24 mm",
    "length": "7.3 m",
}


def built_up_case(**changes):
    """Return the chord with some texts changed."""
    return Case(KINDS["built_up"], {**CHORD, **changes})
