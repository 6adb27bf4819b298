"""The gusset behind a bolted or welded end: the width over which the force spreads, and its strength in tension."""

from dataclasses import replace

from calclib import units
from calclib.equations.aisc360 import RUPTURE, YIELDING, connecting, members
from calclib.errors import CalcError, EntryError
from calclib.members.fields import Field
from calclib.members.net_section import chains_of, net_area

SPREAD_30, SPREAD_45 = "30 degrees", "45 degrees"
BY_EDITION, LIMITED, NOT_LIMITED = "by the edition", "0.85 of gross", "net area as it is"

GUSSET = (
    Field("gusset_steel", "Gusset steel", "Gusset", "Standard and grade of the gusset."),
    Field("gusset_F_y", "Gusset yield stress", "Gusset", "Specified minimum yield stress of the gusset.", "F_yg",
          units.STRESS, above=0),
    Field("gusset_F_u", "Gusset tensile strength", "Gusset", "Specified minimum tensile strength of the gusset.",
          "F_ug", units.STRESS, above=0),
    Field("gusset_thickness", "Gusset thickness", "Gusset", "Thickness of one gusset.", "t_g", units.LENGTH, above=0),
    Field("gusset_width", "Gusset width", "Gusset",
          "Width of the gusset across the force, where the connection ends.", "w_g", units.LENGTH, above=0),
    Field("gusset_edge", "Gusset edge", "Gusset",
          "From the lower edge of the gusset to the lower line of bolts or to the weld group; blank: centred.", "e_g",
          units.LENGTH, optional=True, above=0),
    Field("spread_angle", "Angle of spread", "Gusset",
          "Angle at which the force spreads in the gusset; 45 degrees only in tension by the 2022 edition.",
          choices=(SPREAD_30, SPREAD_45), default=SPREAD_30),
    Field("net_area_limit", "Net area of gusset", "Gusset",
          "Whether the net area of the gusset counts up to 0.85 of its gross area only, the rule of earlier editions "
          "for bolted splice plates.", choices=(BY_EDITION, LIMITED, NOT_LIMITED), default=BY_EDITION),
)


def gusset_edges(x, w_0):
    """Return (e_1, e_2), from the outer lines of bolts, or from the weld group, to the edges of the gusset [in or mm].

    w_0 : distance between the outer lines, or width of the weld group
    """
    e_1 = (x.gusset_width - w_0) / 2 if x.gusset_edge is None else x.gusset_edge
    e_2 = x.gusset_width - w_0 - e_1
    if not (e_1 > 0 and e_2 > 0):
        def word(value):
            return units.text(value, units.LENGTH, x.units)
        where = "" if x.gusset_edge is None else f" that begins {word(x.gusset_edge)} from the lower edge"
        raise EntryError("gusset_width", f"{word(x.gusset_width)} does not hold a connection {word(w_0)} wide{where}; "
                                         "use a wider gusset")
    return e_1, e_2


def gusset_tension(x, run, w_0, L_s, count=1, holes=()):
    """Add the blocks "gusset spread", "gusset yielding" and "gusset rupture"; return the width of spread or None.

    Parameters
    ----------
    w_0 : distance between the outer lines of bolts, or width of the weld group [in or mm]
    L_s : length of the connection along the force [in or mm]; 0 (one row of bolts) gives no spread
    count : number of gussets that share the force
    holes : each a `Hole`, y from the lower edge of the gusset, x from the edge where the member comes in; none if
        welded
    """
    spread = run.block("gusset spread", "Spread of the force in the gusset")
    if L_s <= 0:
        reason = ("The connection has one row of bolts, so that the rule of spread gives no width; block shear, "
                  "bearing and tearout of the gusset are checked.")
        spread.left_out(reason)
        for key, title in (("gusset yielding", "Tensile yielding of the gusset"),
                           ("gusset rupture", "Tensile rupture of the gusset")):
            run.block(key, title).not_applicable(reason)
        run.caution("The gusset is not checked in tension, since one row of bolts gives no spread of the force.",
                    "J4.1")
        return None
    w_e, e_1 = _spread(x, run, spread, w_0, L_s)
    t = count * x.gusset_thickness
    plates = "" if count == 1 or run.silent else \
        f"{count} gussets of {units.text(x.gusset_thickness, units.LENGTH, run.units)}, together."

    part = run.block("gusset yielding", "Tensile yielding of the gusset")
    A_g = part(members.gross_area_of_plate, w=w_e, t=t, note=plates, symbols={"w": "w_{e}", "t": "t_{g}"})
    R_n = part(connecting.tensile_yielding_of_element, F_y=x.gusset_F_y, A_g=A_g, symbols={"F_y": "F_{yg}"})
    part.limit_state(YIELDING, R_n, "R_{n}", "J4.1(a)")

    part = run.block("gusset rupture", "Tensile rupture of the gusset")
    A_e = _net_area(x, run, part, w_e, e_1, t, A_g, holes)
    R_n = part(connecting.tensile_rupture_of_element, F_u=x.gusset_F_u, A_e=A_e, symbols={"F_u": "F_{ug}"})
    part.limit_state(RUPTURE, R_n, "R_{n}", "J4.1(b)")
    return w_e


def _spread(x, run, part, w_0, L_s):
    """Return the width of spread within the plate, and how far it reaches below the lower outer line."""
    e_1, e_2 = gusset_edges(x, w_0)
    if x.spread_angle == SPREAD_45:
        if run.edition != "22":
            raise EntryError("spread_angle", "45 degrees stands in the commentary of AISC 360-22 for gussets in "
                                             f'tension, not in AISC 360-{run.edition}; choose "{SPREAD_30}"')
        w_s = part(connecting.spread_width_in_tension, w_0=w_0, L_s=L_s, theta=connecting.SPREAD_IN_TENSION)
        run.caution("The force is taken to spread at 45 degrees, which the commentary accepts in tension only; where "
                    "the force can reverse, 30 degrees stay.", "Commentary J4.1")
    else:
        w_s = part(connecting.spread_width, w_0=w_0, L_s=L_s, theta=connecting.SPREAD)
    w_e = part(connecting.spread_width_within_plate, w_s=w_s, w_0=w_0, e_1=e_1, e_2=e_2)
    run.note("The width of spread in the gusset is limited by the edges of the plate: {w_e} instead of {w_s}.",
             when=w_e < w_s * (1 - 1e-9), w_e=w_e, w_s=w_s)
    return w_e, min((w_s - w_0) / 2, e_1)


def _net_area(x, run, part, w_e, reach, t, A_g, holes):
    if not holes:
        return part.given("A_{e}", units.AREA, A_g, run.cite("J4.1(b)"),
                          "Gross area: there are no holes in the section.")
    low = min(hole.y for hole in holes) - reach
    moved = tuple(replace(hole, y=hole.y - low, thickness=t) for hole in holes)
    try:
        found = chains_of(w_e, moved, A_g, 1 if run.silent else 3)
    except CalcError as error:
        raise EntryError("gusset_width", f"the net section of the gusset over its width of spread fails: {error}"
                         ) from error
    A_n = net_area(part, A_g, found, moved, t)
    limited = x.net_area_limit == LIMITED or (x.net_area_limit == BY_EDITION and run.edition == "16")
    if x.net_area_limit == BY_EDITION:
        run.assume("The net area of the gusset counts up to 0.85 of its gross area, the rule of earlier editions for "
                   "bolted splice plates; whether the 2016 edition has it is from memory, verify." if limited else
                   "The net area of the gusset is not limited to 0.85 of its gross area; that rule of earlier editions "
                   "is not in the 2022 edition.", "J4.1(b)")
    if limited:
        return part(connecting.effective_net_area_of_splice_plate, A_n=A_n, A_g=A_g)
    return part.given("A_{e}", units.AREA, A_n, run.cite("J4.1(b)"), "Net area; every part of the plate is connected.")
