"""Cases that the tests begin with, each complete; a test states only what it changes."""

from calclib.case import Case
from calclib.members import KINDS

_PROJECT = {
    "project": "Test", "calc_number": "T-1", "subject": "Member", "date": "2026-11-20", "prepared_by": "Tester",
    "standard": "AISC 360-22", "method": "LRFD", "units": "US", "load_level": "LRFD", "load_source": "Test",
}
PLATE = {
    **_PROJECT, "required_strength": "148 kip", "steel": "ASTM A572 Grade 50", "F_y": "50 ksi", "F_u": "65 ksi",
    "plate_thickness": "1 in", "plate_width": "8 in", "pin_diameter": "2-1/2 in", "pin_F_y": "75 ksi",
    "hole_diameter": "2-17/32 in", "end_distance": "4 in",
}
ROD = {
    **_PROJECT, "required_strength": "20 kip", "steel": "ASTM A36", "F_y": "36 ksi", "F_u": "58 ksi",
    "rod_diameter": "1 in", "thread_series": "UNC",
}
ASD = {"method": "ASD", "load_level": "ASD"}
# The same members in the other unit set, converted exactly.
PLATE_SI = {
    **PLATE, "units": "SI", "required_strength": "658.3367990582 kN", "F_y": "344.737864659 MPa",
    "F_u": "448.159224057 MPa", "plate_thickness": "25.4 mm", "plate_width": "203.2 mm", "pin_diameter": "63.5 mm",
    "pin_F_y": "517.106796988 MPa", "hole_diameter": "64.29375 mm", "end_distance": "101.6 mm",
}
ROD_SI = {
    **ROD, "units": "SI", "required_strength": "90 kN", "F_y": "250 MPa", "F_u": "400 MPa", "rod_diameter": "24 mm",
    "thread_series": "ISO coarse",
}


def plate(**changes):
    """Return a pin plate case in US units with some texts changed."""
    return Case(KINDS["pin_plate"], {**PLATE, **changes})


def rod(**changes):
    """Return a threaded rod case in US units with some texts changed."""
    return Case(KINDS["threaded_rod"], {**ROD, **changes})
