"""The kinds of member. A new kind is one module here, one workbook, one demo case and its published checks."""

from calclib.members import bolted_member, built_up, pin_plate, slotted_hss, threaded_rod, welded_member

KINDS = {module.KIND.name: module.KIND for module in (
    pin_plate, threaded_rod, bolted_member, welded_member, slotted_hss, built_up)}
