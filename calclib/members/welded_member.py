"""Tension member welded to a gusset by fillet welds: AISC 360 D2, D3, J2 and J4."""

from dataclasses import replace

import numpy as np

from calclib import units
from calclib.block_paths import weld_block
from calclib.equations.aisc360 import RUPTURE, YIELDING, members, shear_lag, weld_groups, welds
from calclib.errors import EntryError
from calclib.members import weld_layout as layout
from calclib.members.block_shear import UNIFORM, block_shear
from calclib.members.fatigue_check import FATIGUE, fatigue_block
from calclib.members.fields import NO, YES, Field, Kind, Plot, multiples
from calclib.members.steel import refuse_stresses
from calclib.members.weld_group import fillet_group
from calclib.members.weld_sketch import draw_welded, profile
from calclib.members.welded_section import (
    DOUBLE,
    FLANGE,
    FLANGES,
    LONG_LEG,
    SHORT_LEG,
    SINGLE,
    WEB,
    WELDED,
    section,
)
from calclib.tables import shapes
from calclib.tolerance import at_most

LONGITUDINAL, BOTH, TRANSVERSE = "longitudinal", "longitudinal and transverse", "transverse"
ONE_END, BOTH_ENDS = "one end", "both ends"

FIELDS = (
    Field("steel", "Member steel", "Member", "Standard and grade of the member, such as ASTM A992."),
    Field("F_y", "Yield stress", "Member", "Specified minimum yield stress of the member.", "F_y", units.STRESS,
          above=0),
    Field("F_u", "Tensile strength", "Member", "Specified minimum tensile strength of the member.", "F_u", units.STRESS,
          above=0),
    Field("section", "Section", "Member", "Rolled shape from the table; blank for a flat plate given by its width and "
          "thickness.", choices=shapes.names(), search=True, reader=shapes.shape, optional=True),
    Field("plate_width", "Plate width", "Member", "Only for a flat plate: width across the force.", "b", units.LENGTH,
          optional=True, above=0),
    Field("plate_thickness", "Plate thickness", "Member", "Only for a flat plate: thickness.", "t", units.LENGTH,
          optional=True, above=0),
    Field("plate_lap", "Plate welded on", "Member",
          "Only for a flat plate: one gusset on one face, or a gusset on each face. Blank: one face.",
          choices=(SINGLE, DOUBLE), optional=True),
    Field("welded_element", "Welded element", "Member",
          "Only for a shape: the part of the section that is welded to the gusset; of double angles, the legs back to "
          "back; of a tee, the flange.", choices=(FLANGES, FLANGE, WEB, LONG_LEG, SHORT_LEG), optional=True),
    Field("weld_layout", "Weld layout", "Weld", "Direction of the welds against the force.",
          choices=(LONGITUDINAL, BOTH, TRANSVERSE)),
    Field("weld_length_1", "Length of weld 1, or lap", "Weld",
          "Longitudinal weld along one edge; of an angle, along the heel. With transverse welds alone, how far member "
          "and gusset lap.", "l_1", units.LENGTH, above=0),
    Field("weld_length_2", "Length of weld 2", "Weld",
          "Longitudinal weld along the other edge; of an angle, along the toe. Blank: as weld 1.", "l_2", units.LENGTH,
          optional=True, above=0),
    Field("weld_spacing", "Width between welds", "Weld",
          "Distance between the longitudinal welds, or length of a transverse weld. Blank: width of the welded "
          "element.", "w", units.LENGTH, optional=True, above=0),
    Field("transverse_ends", "Transverse welds at", "Weld",
          "Only with transverse welds: at the end of the member, or also at the edge of the gusset. Blank: one end.",
          choices=(ONE_END, BOTH_ENDS), optional=True),
    Field("opening_restrained", "Opening of the lap restrained", "Weld",
          "Only with one transverse weld alone: whether the lap cannot open under the largest load. Blank: no.",
          choices=(NO, YES), optional=True),
    Field("lap", "Lap", "Weld", "How far member and gusset lap, where that is more than the longest longitudinal weld.",
          "l_{lap}", units.LENGTH, optional=True, above=0),
    Field("concentric", "Force through the centroid of the welds", "Weld",
          "Only with transverse welds: whether the force passes through the centroid of the weld group; without it "
          "they take no increase for their direction. Blank: no.", choices=(NO, YES), optional=True),
    *layout.WELD, *layout.GUSSET, *layout.BLOCKS, *layout.OWN_U, *layout.SLENDER, *FATIGUE,
)


def evaluate(x, run):
    """Order the equations of a welded tension member; `x` holds one value for each field."""
    _refuse(x, run)
    m = section(x, run)
    part = run.block("gross yielding", "Tensile yielding in the gross section")
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=m.A_g)
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")
    _net_rupture(x, run, m)

    part = run.block("weld", "Strength of the fillet welds")
    R_n = fillet_group(x, run, part, m.faces, m.w, () if x.weld_layout == TRANSVERSE else (m.l_1, m.l_2), _across(x),
                       x.concentric == YES)
    part.limit_state(RUPTURE, R_n, "R_{n}", "J2.4")

    own, gusset = (x.F_y, x.F_u, ""), (x.gusset_F_y, x.gusset_F_u, "g")
    closed = {LONGITUDINAL: "", BOTH: "With transverse welds the shear along the longitudinal ones is part of block "
                                      "shear.",
              TRANSVERSE: "There are no longitudinal welds."}[x.weld_layout]
    layout.shear_along_welds(run, "member", "member", own, closed, m.elements, m.l_1, m.l_2, m.t)
    layout.shear_along_welds(run, "gusset", "gusset", gusset, closed, m.gussets, m.l_1, m.l_2, x.gusset_thickness)
    _block_shear(x, run, m)
    layout.gusset_tension(x, run, m.w, min(m.l_1, m.l_2), m.gussets, "There is one transverse weld alone, from which "
                          "the force does not spread; block shear of the gusset is checked."
                          if x.weld_layout == TRANSVERSE and _across(x) == 1 else "")
    layout.slenderness(x, run, m.r)
    fatigue_block(x, run, m.A_g, "gross area of the member where the welds end")
    _rules(x, run, m)
    _messages(x, run, m)


def _across(x):
    """Return the number of transverse welds on a face."""
    return 0 if x.weld_layout == LONGITUDINAL else 2 if x.transverse_ends == BOTH_ENDS else 1


def _refuse(x, run):
    """Refuse what has no number: stresses of no steel, a layout without its lengths, a section and a plate."""
    refuse_stresses(x, run)
    layout.refuse_gusset_steel(x, run)
    layout.refuse_filler(x, run)
    if x.section is None:
        for name, what in (("plate_width", "width"), ("plate_thickness", "thickness")):
            if getattr(x, name) is None:
                raise EntryError(name, f"is empty and no section is chosen; give the {what} of the flat plate, or "
                                       "choose a section")
    else:
        for name in ("plate_width", "plate_thickness"):
            if getattr(x, name) is not None:
                raise EntryError(name, f"is given and so is the section {x.section.name}; leave one of them blank")
        known = WELDED.get(x.section.family)
        if known is None:
            raise EntryError("section", f"{x.section.name} is a hollow section; its slotted end is a kind of its own. "
                                        "Choose an open shape")
        if x.welded_element not in known:
            given = f"{x.welded_element} of {x.section.name} is not covered" if x.welded_element else "is empty"
            raise EntryError("welded_element", f"{given}; for {x.section.family} choose: {', '.join(known)}")
    if x.weld_layout == TRANSVERSE and x.weld_length_2 is not None:
        raise EntryError("weld_length_2", "is given and there are transverse welds only; leave it blank, or choose a "
                                          "layout with longitudinal welds")
    longest = max(x.weld_length_1, x.weld_length_2 or 0)
    run.require(x.lap is None or at_most(longest, x.lap), "lap", "{lap} is shorter than the weld of {l}; the weld lies "
                "within the lap", lap=x.lap or longest, l=longest)


def _net_rupture(x, run, m):
    """Add the shear lag factor and tensile rupture."""
    part = run.block("shear lag", "Shear lag factor")
    A_c = None
    if m.is_open or x.weld_layout == TRANSVERSE:
        A_c = part(weld_groups.area_of_strips, n=m.elements, w=m.b, t=m.t,
                   symbols={"A": "A_{c}", "n": "n_{e}", "w": "b"}, note="Directly welded elements.")
    A_n = m.A_g
    if x.weld_layout == TRANSVERSE:
        U = part.given("U", units.NUMBER, 1.0, run.cite("Table D3.1, case 3"), "Transverse welds only: the net area is "
                       "that of the directly welded elements.")
        A_n = A_c
    elif x.weld_layout == BOTH and not m.is_open:
        U = part.given("U", units.NUMBER, 1.0, run.cite("Table D3.1, case 1"),
                       "Longitudinal and transverse welds load the whole plate.")
    else:
        U = _by_length(x, run, part, m, A_c)
    U = layout.own_factor(x, run, part, U)

    part = run.block("net rupture", "Tensile rupture on the effective net area")
    if x.weld_layout != TRANSVERSE:
        part.given("A_{n}", units.AREA, A_n, run.cite("B4.3b"), "No holes: the net area is the gross area.")
    A_e = part(members.effective_net_area, A_n=A_n, U=U,
               symbols={"A_n": "A_{c}"} if x.weld_layout == TRANSVERSE else {})
    P_n = part(members.tensile_rupture_of_member, F_u=x.F_u, A_e=A_e)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D2(b)")


def _by_length(x, run, part, m, A_c):
    """Return the shear lag factor of cases 2 and 4, of an open section at least the share of the welded area."""
    length = part(shear_lag.average_weld_length, l_1=m.l_1, l_2=m.l_2)
    straight = x.weld_layout == LONGITUDINAL
    case, U = "case 4" if straight else "case 2", None
    if m.is_open and length <= m.x_bar:
        run.caution("The welds of {l} are no longer than the distance to the centroid of {x_bar}; " + case + " gives "
                    "no factor, and the share of the welded area counts.", "Table D3.1", l=length, x_bar=m.x_bar)
    else:
        run.require(length > m.x_bar, "weld_length_1", "the welds of {l} are no longer than the distance to the "
                    "centroid of {x_bar}; " + run.cite("Table D3.1") + " gives no shear lag factor. Lengthen the welds",
                    l=length, x_bar=m.x_bar)
        names = {"U": "U_{1}"} if m.is_open else {}
        if straight:
            U = part(shear_lag.shear_lag_factor_of_longitudinal_welds, l=length, w=m.w, x_bar=m.x_bar, symbols=names)
        else:
            U = part(shear_lag.shear_lag_factor, l=length, x_bar=m.x_bar, symbols=names)
    if not m.is_open:
        run.note("The least factor by the share of the connected area is for open sections; it does not hold for a "
                 "plate.", "D3")
        return U
    by_area = part(shear_lag.shear_lag_factor_by_area, A_c=A_c, A_g=m.A_g,
                   symbols={"U": "U_{2}"} if U is not None else {}, note="Open section: least factor by the area that "
                   "is welded.")
    if U is None:
        return by_area
    run.note("Shear lag factors: " + case + " gives {U_1}, the share of the welded area {U_2}; the larger counts.",
             "D3", U_1=(U, units.NUMBER), U_2=(by_area, units.NUMBER))
    return part(shear_lag.larger_shear_lag_factor, U_1=U, U_2=by_area)


def _block_shear(x, run, m):
    """Add block shear of the member and of the gusset."""
    key, title = "member block shear", "Block shear of the member at the welds"
    if x.weld_layout == TRANSVERSE:
        run.block(key, title).not_applicable("Transverse welds load the whole element; no block is sheared out of the "
                                             "member.")
    elif not (m.inside or m.roots):
        run.block(key, title).not_applicable("The welds lie along both edges of the plate; the tension line crosses "
                                             "all of it, which is tensile rupture.")
    else:
        block_shear(run, key, title, [_member_path(m)], (0, 0), x.F_y, x.F_u, x.member_U_bs,
                    "Input; the commentary shows 1 for a welded angle.", m.elements)
    layout.gusset_block(x, run, m.w, m.l_1, m.l_2, m.gussets)


def _member_path(m):
    """Return the block of one welded element: between the welds, or torn across with what stands on it sheared off."""
    inner = max(m.l_1, m.l_2)
    if m.inside:
        return replace(weld_block(0.0, m.l_1, m.w, m.l_2, m.t), staggered=False)
    _, t, name = m.roots
    if name == "flange":
        return layout.path("web torn across, both flanges sheared off along their roots", [
            layout.cut("shear", ((0, 0), (m.l_1, 0)), t), layout.cut("shear", ((0, m.b), (m.l_2, m.b)), t),
            layout.cut("tension", ((inner, 0), (inner, m.b)), m.t)])
    heel = name == "outstanding leg"
    length = m.l_1 if heel else min(m.l_1, m.l_2)
    words = f"welded {'leg' if heel else 'flange'} torn across, {name} sheared off along its root over " + (
        "weld 1" if heel else "the shorter weld")
    return layout.path(words, [layout.cut("shear", ((0, 0), (length, 0)), t),
                               layout.cut("tension", ((inner, 0), (inner, m.b)), m.t)])


def _rules(x, run, m):
    thinner = min(m.t, x.gusset_thickness)
    if m.inside:
        layout.size_rules(x, run, thinner, x.gusset_thickness, "edge of the gusset")
    else:
        layout.size_rules(x, run, thinner, m.t, "edge of the member")
    straight = x.weld_layout == LONGITUDINAL
    lengths = [] if x.weld_layout == TRANSVERSE else [m.l_1, m.l_2]
    layout.length_rule(run, x.weld_size, lengths or [m.w], "Table D3.1, case 4" if straight else "J2.2b",
                       "fails" if straight else "caution",
                       "the shear lag factor does not hold; lengthen each weld." if straight else "")
    lap = x.lap if x.lap is not None else max(m.l_1, m.l_2)
    least = welds.least_lap(t=thinner, l_0=run.pair(welds.LEAST_LAP))
    run.rule("lap", "Lap of the joint", "J2.2b", at_most(least, lap), "at least {least}", "{lap}", least=least, lap=lap,
             remark="Lengthen the lap.")
    run.rule("both ends", "Transverse welds at both ends of the lap", "J2.2b",
             _across(x) == 2 or x.opening_restrained == YES, "both ends, or the opening restrained",
             (BOTH_ENDS if _across(x) == 2 else ONE_END) + (
                 ", opening restrained" if x.opening_restrained == YES else ""),
             applies=x.weld_layout == TRANSVERSE, reason="the joint has longitudinal welds",
             remark="Weld both ends, or restrain the lap from opening.")
    run.rule("length and width", "Length of the welds and width between them", "Commentary D3",
             at_most(m.w, min(m.l_1, m.l_2)), "each at least {w}, as advice", "shortest {l}", severity="caution",
             applies=straight, reason="the welds are not longitudinal alone", w=m.w, l=min(m.l_1, m.l_2),
             remark="permitted since the 2016 edition; welds as long as the width between them remain good practice.")
    run.rule("uneven welds", "Lengths of the two welds", "J1.7", at_most(max(m.l_1, m.l_2), 2 * min(m.l_1, m.l_2)),
             "the longer at most twice the shorter, as advice", "{l_1} and {l_2}", severity="caution",
             applies=x.weld_layout != TRANSVERSE, reason="there are no longitudinal welds", l_1=m.l_1, l_2=m.l_2,
             remark="the weld group is far off the line of the force; moment in the connection is not computed.")


def _messages(x, run, m):
    run.assume("Plate welded on: one face, by default.", when=x.section is None and x.plate_lap is None)
    run.assume("Transverse welds at: one end, by default.", when=_across(x) == 1 and x.transverse_ends is None)
    run.assume("Opening of the lap restrained: no, by default.",
               when=x.weld_layout == TRANSVERSE and _across(x) == 1 and x.opening_restrained is None)
    run.assume("Force through the centroid of the welds: no, by default.",
               when=x.weld_layout != LONGITUDINAL and x.concentric is None)
    run.note("The wording of the directional strength of fillets in the 2016 edition is from memory, verify.", "J2.4",
             when=run.edition == "16" and x.weld_layout != LONGITUDINAL)
    run.caution("Block shear takes the tension as uniform, as the commentary shows for welded angles; researchers "
                "advise a reduction for angles by one leg and tees by the flange.", "Commentary J4.3",
                when=m.is_open and x.member_U_bs == UNIFORM and x.weld_layout != TRANSVERSE)
    run.note("End connections of single and double angles are exempt from balancing about the centroid under static "
             "load.", "J1.7", when=x.section is not None and x.section.family in ("L", "2L"))
    run.caution("The welds are to be placed with their centroid on the centroid of the member, or the eccentricity "
                "provided for; no moment is computed here.", "J1.7",
                when=x.section is None or x.section.family not in ("L", "2L"))
    apart = x.section is not None and x.section.family == "2L"
    gap = x.section.s * layout.scale(run) if apart else 0.0
    run.caution("The angles stand {gap} apart and the gusset is {t} thick; choose the section with the separation of "
                "the gusset, since the radius of gyration goes with it.", gap=gap, t=x.gusset_thickness,
                when=apart and abs(gap - x.gusset_thickness) > 0.02 * x.gusset_thickness)
    layout.common_messages(x, run)


def sketch(x, calc):
    """Return elevation and section to scale, with the path of the governing limit state."""
    m = section(x, type(calc.run)(x, silent=True))
    lap = max(m.l_1, m.l_2, x.lap or 0)
    return draw_welded(x, calc, m, profile(x, m), lap, x.weld_layout != TRANSVERSE, _across(x))


def _lengths(x):
    """Return points that scale both longitudinal welds together, and with them the lap."""
    axis = np.union1d(np.linspace(0.3, 2.0, 199), [1.0])
    return {name: axis * getattr(x, name) for name in ("weld_length_1", "weld_length_2", "lap")
            if getattr(x, name) is not None}


PLOTS = (
    Plot("weld_length_1", _lengths),
    Plot("weld_size", multiples("weld_size", 0.4, 2.0)),
    Plot("gusset_thickness", multiples("gusset_thickness", 0.4, 2.0)),
    Plot("plate_thickness", multiples("plate_thickness", 0.4, 2.0), applies=lambda x: x.section is None),
)

KIND = Kind(
    name="welded_member",
    title="Welded tension member",
    scope="Tensile strength of a plate or open rolled shape welded to a gusset by fillet welds, by AISC 360 chapters D "
          "and J: yielding, rupture with shear lag, welds, shear and block shear of member and gusset, yielding of the "
          "gusset. Not covered: moment from eccentricity, the gusset's own connection to its support, hollow sections.",
    fields=FIELDS, evaluate=evaluate, sketch=sketch, plots=PLOTS, pointwise=True)
