"""A bolted member that the tests begin with; a test states only what it changes."""

from samples import _PROJECT

from calclib.case import Case
from calclib.members import KINDS

BRACE = {
    **_PROJECT, "required_strength": "100 kip", "steel": "ASTM A572 Grade 50", "F_y": "50 ksi", "F_u": "65 ksi",
    "section": "2L4x4x1/2x3/8", "bolt_diameter": "3/4 in", "bolt_group": "Group 120", "rows": "4", "pitch": "3 in",
    "end_distance": "1-1/2 in", "first_line": "2-1/2 in", "gusset_end": "1-1/2 in",
    "gusset_steel": "ASTM A572 Grade 50", "gusset_F_y": "50 ksi", "gusset_F_u": "65 ksi", "gusset_thickness": "1/2 in",
    "gusset_width": "16 in",
}


def bolted(**changes):
    """Return a double-angle brace in US units with some texts changed; the group of bolts follows the edition."""
    texts = {**BRACE, **changes}
    if texts["standard"] == "AISC 360-16" and texts["bolt_group"] == "Group 120":
        texts["bolt_group"] = "Group A"
    return Case(KINDS["bolted_member"], texts)
