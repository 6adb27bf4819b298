"""Cases of welded and slotted members that the tests begin with; a test states only what it changes."""

from samples import PLATE

from calclib.case import Case
from calclib.members import KINDS

_PROJECT = {name: PLATE[name] for name in ("project", "calc_number", "subject", "date", "prepared_by", "standard",
                                           "method", "units", "load_level", "load_source")}
WELDED = {
    **_PROJECT, "required_strength": "100 kip", "steel": "ASTM A572 Grade 50", "F_y": "50 ksi", "F_u": "65 ksi",
    "section": "WT6x20", "welded_element": "flange", "weld_layout": "longitudinal", "weld_length_1": "12 in",
    "weld_size": "1/4 in", "filler_metal": "E70XX", "F_EXX": "70 ksi", "gusset_steel": "ASTM A572 Grade 50",
    "gusset_F_y": "50 ksi", "gusset_F_u": "65 ksi", "gusset_thickness": "1/2 in", "gusset_width": "20 in",
}
STEEL_SI = {"units": "SI", "F_y": "344.737864659 MPa", "F_u": "448.159224057 MPa", "F_EXX": "482.633010523 MPa",
            "gusset_F_y": "344.737864659 MPa", "gusset_F_u": "448.159224057 MPa"}
WELDED_SI = {
    **WELDED, **STEEL_SI, "required_strength": "444.82216152605 kN", "weld_length_1": "304.8 mm",
    "weld_size": "6.35 mm", "gusset_thickness": "12.7 mm", "gusset_width": "508 mm",
}
FLAT = {"section": "", "welded_element": "", "plate_width": "6 in", "plate_thickness": "1/2 in",
        "gusset_width": "14 in", "weld_length_1": "8 in"}


def welded(**changes):
    """Return a welded member case in US units with some texts changed."""
    return Case(KINDS["welded_member"], {**WELDED, **changes})


def flat(**changes):
    """Return a case of a flat plate with some texts changed."""
    return welded(**{**FLAT, **changes})


SLOTTED = {
    **{name: text for name, text in WELDED.items() if name not in ("welded_element", "weld_layout", "weld_length_1")},
    "steel": "ASTM A500 Grade C", "F_u": "62 ksi", "section": "HSS6.000x0.500", "hss_standard": "A500",
    "connection": "one gusset through slots", "weld_length": "16 in",
}
SLOTTED_SI = {
    **SLOTTED, **STEEL_SI, "F_u": "427.474952178 MPa", "required_strength": "444.82216152605 kN",
    "weld_length": "406.4 mm", "weld_size": "6.35 mm", "gusset_thickness": "12.7 mm", "gusset_width": "508 mm",
    "slot_width": "14.2875 mm",
}
# HSS 6x6x3/8 to A1085: full wall, and the area that goes with it.
SQUARE = {"section": "HSS6x6x3/8", "hss_standard": "A1085", "gross_area": "8.08 in2", "F_u": "65 ksi",
          "weld_length": "12 in", "gusset_thickness": "3/4 in", "weld_size": "5/16 in"}


def slotted(**changes):
    """Return a slotted hollow section case in US units with some texts changed."""
    return Case(KINDS["slotted_hss"], {**SLOTTED, **changes})
