"""Detailing rules of bolts in a tension connection: spacing, edges, kinds of holes; AISC 360 J3."""

from itertools import combinations, pairwise
from math import hypot

from calclib import units
from calclib.equations.aisc360 import bearing
from calclib.members.bolt_group import CLASS_A, SLIP_CRITICAL
from calclib.members.bolt_layout import ALONG, LONG_SLOT, OVERSIZE, SHORT_SLOT, STANDARD
from calclib.members.fields import Field
from calclib.tables import fasteners
from calclib.tolerance import at_least, at_most

PAINTED, WEATHERING = "painted, or not exposed", "bare weathering steel, exposed"
_SPACING, _EDGE, _GREATEST = ({"22": "J3.4", "16": "J3.3"}, {"22": "J3.5, Table J3.4", "16": "J3.4, Table J3.4"},
                              {"22": "J3.6", "16": "J3.5"})
_HOLES = {"22": "J3.3", "16": "J3.2"}

RULES = (
    Field("exposure", "Exposure", "Detailing", "Decides the greatest spacing of bolts along the force.",
          choices=(PAINTED, WEATHERING), default=PAINTED),
    Field("edge_approval", "Approval of short edges", "Detailing",
          "Who approved an edge distance below one bolt diameter, and where; blank: none.", optional=True),
)


def bolt_rules(x, run, section, layout):
    """Add the block "detailing" with the limits, and every detailing rule."""
    part = run.block("detailing", "Spacing and edge distance")
    if run.silent:
        return
    d, thin = x.bolt_diameter, min(section.t, x.gusset_thickness)
    s_min = part(bearing.least_spacing, d=d)
    s_pref = part(bearing.preferred_spacing, d=d)
    L_max = part(bearing.greatest_edge_distance, t=section.t, L_max0=run.pair(bearing.GREATEST_EDGE_DISTANCE))
    if x.exposure == PAINTED:
        s_max = part(bearing.greatest_spacing, t=thin, s_max0=run.pair(bearing.GREATEST_SPACING))
    else:
        s_max = part(bearing.greatest_spacing_when_weathering, t=thin,
                     s_max0=run.pair(bearing.GREATEST_SPACING_WEATHERING))
    _spacing(x, run, layout, s_min, s_pref, s_max)
    _edges(x, run, part, section, layout, L_max)
    _kinds(x, run, layout)


def _spacing(x, run, layout, s_min, s_pref, s_max):
    d = x.bolt_diameter
    pairs = [(hypot(a.x - b.x, a.y - b.y), a, b) for a, b in combinations(layout.member, 2)]
    some = bool(pairs)
    nearest = min((gap for gap, _, _ in pairs), default=0.0)
    clear = min((gap - max(a.along, a.width) for gap, a, _ in pairs), default=0.0)
    run.rule("least spacing", "Least spacing of holes", _SPACING, at_least(nearest, s_min), "at least {s_min}",
             "{nearest}", remark="Space the bolts wider.", applies=some, reason="there is one bolt", s_min=s_min,
             nearest=nearest)
    run.rule("preferred spacing", "Preferred spacing of holes", _SPACING, at_least(nearest, s_pref),
             "three diameters, {s_pref}, preferred", "{nearest}", severity="caution",
             remark="the spacing is below three diameters.", applies=some, reason="there is one bolt", s_pref=s_pref,
             nearest=nearest)
    run.rule("clear spacing", "Clear distance between holes", _SPACING, at_least(clear, d), "at least d = {d}",
             "{clear}", remark="Space the bolts wider.", applies=some, reason="there is one bolt", d=d, clear=clear)
    along = [layout.bolts[b][0] - layout.bolts[a][0] for line in layout.lines
             for a, b in pairwise(line)]
    run.rule("greatest spacing", "Greatest spacing along the force", _GREATEST, at_most(max(along, default=0.0), s_max),
             "at most {s_max}", "{s}", remark="Space the bolts closer.", applies=bool(along),
             reason="there is one bolt in a line", s_max=s_max, s=max(along, default=0.0))


def _edges(x, run, part, section, layout, L_max):
    """Edge distances of member and gusset, along and across the force."""
    d, bolts = x.bolt_diameter, layout.bolts
    ends = min(hole.x for hole in layout.member)
    sides = [value for value, free in ((min(y for _, y in bolts), section.lower),
                                       (section.width - max(y for _, y in bolts), section.upper)) if free]
    gusset_sides = (min(h.y for h in layout.gusset), x.gusset_width - max(h.y for h in layout.gusset))
    places = [("end of member", "End of the member", ends, layout.member_kind, True)]
    places += [("side of member", "Side of the member", min(sides), layout.member_kind, False)] if sides else []
    places += [("end of gusset", "Edge of the gusset toward the member", min(h.x for h in layout.gusset),
                layout.gusset_kind, True),
               ("side of gusset", "Side of the gusset", min(gusset_sides), layout.gusset_kind, False)]
    shown = None
    for key, title, provided, kind, at_end in places:
        least = _least_edge(x, run, kind, at_end)
        if least != shown:
            part.given(r"L_{e,\mathrm{min}}", units.LENGTH, least, run.cite("Table J3.4"),
                       "Least edge distance" + ("." if kind == STANDARD else f", with the increment of Table J3.5 for "
                                                f"{kind} holes."))
            shown = least
        run.rule(f"least edge, {key}", f"{title}: least distance", _EDGE, at_least(provided, least),
                 "at least {least}", "{there}", severity="caution",
                 remark="below the table; permitted where bearing, tearout and block shear are satisfied.", least=least,
                 there=provided)
        approved = x.edge_approval is not None
        run.rule(f"edge of one diameter, {key}", f"{title}: one bolt diameter", _EDGE, at_least(provided, d),
                 "at least d = {d} without approval", "{there}", severity="caution" if approved else "fails",
                 remark="below one diameter, approved: {approval}" if approved else
                 "Increase the distance, or state who approved it.", d=d, there=provided,
                 approval=x.edge_approval or "")
    for key, title, provided in (("end", "End of the member", ends),
                                 ("side", "Side of the member", max(sides, default=0)),
                                 ("gusset", "Edge of the gusset toward the member", min(h.x for h in layout.gusset))):
        limit = min(12 * x.gusset_thickness, run.pair(bearing.GREATEST_EDGE_DISTANCE)) if key == "gusset" else L_max
        run.rule(f"greatest edge, {key}", f"{title}: greatest distance", _GREATEST, at_most(provided, limit),
                 "at most {limit}", "{there}", remark="Move the bolts nearer to the edge.",
                 applies=key != "side" or bool(sides), reason="the element has no free edge along the force",
                 limit=limit, there=provided)


def _least_edge(x, run, kind, at_end):
    table = fasteners.minimum_edge(x.bolt_diameter, run.edition, run.units).value
    along = x.slot_direction == ALONG
    direction = fasteners.PERPENDICULAR if along == at_end else fasteners.PARALLEL
    return table + fasteners.edge_increment(x.bolt_diameter, kind, direction, run.edition, run.units).value


def _kinds(x, run, layout):
    """Which kinds of holes a joint may have."""
    kinds = {layout.member_kind, layout.gusset_kind}
    slip = x.joint == SLIP_CRITICAL
    run.rule("oversize", "Oversize holes", _HOLES, slip, "in slip-critical joints only", x.joint + " joint",
             applies=OVERSIZE in kinds, reason="there are none", remark="Use standard holes, or a slip-critical joint.")
    slots = {SHORT_SLOT, LONG_SLOT} & kinds
    across = x.slot_direction != ALONG
    run.rule("slots", "Slots", _HOLES, slip or across, "across the force in bearing joints",
             f"long axis {x.slot_direction}, {x.joint} joint", applies=bool(slots), reason="there are none",
             remark="Turn the slots across the force, or use a slip-critical joint.")
    run.rule("long slots", "Long slots", _HOLES, not (layout.member_kind == layout.gusset_kind == LONG_SLOT),
             "in one part at each faying surface", f"in {x.hole_ply}", applies=LONG_SLOT in kinds,
             reason="there are none", remark="Use standard holes in one of the parts.")
    other = kinds - {STANDARD} and not (kinds <= {STANDARD, SHORT_SLOT} and across)
    run.caution("Holes other than standard holes and short slots across the force need the approval of the engineer "
                "of record.", _HOLES, when=bool(other))
    if x.hole_diameter is not None:
        table = fasteners.hole(x.bolt_diameter, x.hole_kind, run.edition, run.units).width
        run.rule("hole as made", "Hole width as made", _HOLES, at_most(x.hole_diameter, table),
                 "at most {table}, the " + x.hole_kind + " hole", "{hole}", severity="fails" if not slip else "caution",
                 remark="larger than the table; ream for a larger bolt, or use a slip-critical joint with oversize "
                        "holes.", table=table, hole=x.hole_diameter)
        run.caution("The hole of {hole} is smaller than that of the table, {table}; it is permitted, and fit-up is "
                    "to be looked at.", _HOLES, when=x.hole_diameter < table * (1 - 1e-9), hole=x.hole_diameter,
                    table=table)
    run.caution("Class A surfaces are unpainted clean mill scale, or coated and tested as such; the drawing must say "
                "so.", {"22": "J3.9", "16": "J3.8"}, when=slip and x.surface == CLASS_A)
    run.caution("One bolt in a line: the end of the member can turn, and the connection has no second bolt.",
                when=layout.fewest == 1)
