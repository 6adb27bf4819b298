"""Hollow section slotted over one gusset, or between two side plates: AISC 360 D2, D3, J2 and J4."""

from dataclasses import replace
from math import asin, cos, pi, sin

import numpy as np

from calclib import units
from calclib.equations.aisc360 import RUPTURE, SHEAR_YIELDING, YIELDING, connecting, members, weld_groups, welds
from calclib.errors import EntryError
from calclib.members import hollow_section as ends
from calclib.members import weld_layout as layout
from calclib.members.fatigue_check import FATIGUE, fatigue_block
from calclib.members.fields import NO, YES, Field, Kind, Plot, multiples
from calclib.members.hollow_section import LONGER, SHORTER, SIDES, SLOT_PLAY, SLOTS
from calclib.members.steel import refuse_stresses
from calclib.members.weld_sketch import Profile, draw_welded
from calclib.tables import shapes
from calclib.tolerance import at_most

LINES = 4     # of welds: two faces of the gusset by two walls, or two edges of two plates

FIELDS = (
    Field("steel", "Member steel", "Member", "Standard and grade of the section, such as ASTM A500 Grade C."),
    Field("F_y", "Yield stress", "Member", "Specified minimum yield stress of the section.", "F_y", units.STRESS,
          above=0),
    Field("F_u", "Tensile strength", "Member", "Specified minimum tensile strength of the section.", "F_u",
          units.STRESS, above=0),
    Field("section", "Section", "Member", "HSS or pipe from the table.", choices=ends.NAMES, search=True,
          reader=shapes.shape),
    Field("hss_standard", "Made to", "Member", "Standard that decides the wall for design.",
          choices=tuple(shapes.WALLS)),
    Field("gross_area", "Gross area", "Member",
          "Only where the table's area does not go with the wall, as with A1085: area by the producer's table.", "A_g",
          units.AREA, optional=True, above=0),
    Field("connection", "Connection", "Connection", "One gusset through slots, or two plates on the sides.",
          choices=(SLOTS, SIDES)),
    Field("side_along", "Side along the gusset", "Connection",
          "Only for a rectangular section: the side that lies along the gusset or carries the plate. Blank: the longer "
          "side.", choices=(LONGER, SHORTER), optional=True),
    Field("slot_width", "Slot width", "Connection",
          "Width of each of the two slots. Blank: gusset thickness and 1/16 in or 2 mm.", "b_s", units.LENGTH,
          optional=True, above=0),
    Field("slot_end", "Slot end", "Connection",
          "Only with slots: open, so that the net section counts, or closed by the weld around the end of the gusset. "
          "Blank: open.", choices=("open", "closed"), optional=True),
    Field("weld_spacing", "Width between welds", "Connection",
          "Only with side plates: distance between the two welds of a plate. Blank: the flat part of the face.", "w",
          units.LENGTH, optional=True, above=0),
    Field("weld_length", "Weld length", "Weld", "Length of each of the four weld lines along the force.", "l",
          units.LENGTH, above=0),
    Field("directional", "Increase for direction", "Weld",
          "Whether the factor for the direction of the load is asked for; not permitted at the ends of rectangular "
          "sections in tension (2022).", choices=(NO, YES), default=NO),
    *layout.WELD, *layout.GUSSET, *layout.BLOCKS[1:], *layout.OWN_U, *layout.SLENDER, *FATIGUE,
)


def evaluate(x, run):
    """Order the equations of a slotted or side-plated hollow section; `x` holds one value for each field."""
    _refuse(x, run)
    m = ends.hollow_section(x, run)
    plates = 2 if x.connection == SIDES else 1
    part = run.block("gross yielding", "Tensile yielding in the gross section")
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=m.A_g)
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")

    part = run.block("shear lag", "Shear lag factor")
    U = layout.own_factor(x, run, part, ends.factor(x, run, part, m)[0])
    part = run.block("net rupture", "Tensile rupture on the effective net area")
    A_n = ends.net_area(x, run, part, m)
    A_e = part(members.effective_net_area, A_n=A_n, U=U)
    P_n = part(members.tensile_rupture_of_member, F_u=x.F_u, A_e=A_e)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D2(b)")

    _weld(x, run, m)
    _wall_shear(x, run, m)
    layout.shear_along_welds(run, "gusset", "gusset", (x.gusset_F_y, x.gusset_F_u, "g"), "", plates, m.l_1, m.l_2,
                             x.gusset_thickness)
    layout.gusset_block(x, run, m.w, m.l_1, m.l_2, plates)
    layout.gusset_tension(x, run, m.w, m.l_1, plates)
    layout.slenderness(x, run, m.r)
    fatigue_block(x, run, A_n, "net area of the section")
    _rules(x, run, m)
    _messages(x, run, m)


def _refuse(x, run):
    """Refuse what has no number."""
    refuse_stresses(x, run)
    layout.refuse_gusset_steel(x, run)
    layout.refuse_filler(x, run)
    s = x.section
    if not s.is_hollow:
        raise EntryError("section", f"{s.name} is no hollow section; a welded open shape is a kind of its own. Choose "
                                    "HSS or pipe")
    is_round = s.family in ends.ROUND
    if is_round and x.connection == SIDES:
        raise EntryError("connection", f"{s.name} is round; two side plates are for rectangular sections. Choose "
                                       f'"{SLOTS}"')
    if is_round and x.side_along is not None:
        raise EntryError("side_along", f"is given and {s.name} is round; leave it blank")
    if x.connection == SIDES:
        for name in ("slot_width", "slot_end"):
            if getattr(x, name) is not None:
                raise EntryError(name, "is given and side plates need no slots; leave it blank")
    elif x.weld_spacing is not None:
        raise EntryError("weld_spacing", "is given and the gusset passes through slots, where the walls hold the "
                                         "welds; leave it blank")
    if x.directional == YES and not is_round and run.edition == "22":
        raise EntryError("directional", run.cite("J2.4") + " gives 1.0 at the ends of rectangular hollow sections in "
                                        'tension, whatever the direction of the weld; choose "no"')


def _weld(x, run, m):
    part = run.block("weld", "Strength of the fillet welds")
    A_1 = layout.fillet_area(x, run, part, m.l_1, "l", end_loaded=True)
    A_we = part(weld_groups.area_of_equal_welds, n=LINES, A_we1=A_1, symbols={"A_we1": "A_{we,l}"},
                note="Four lines of weld.")
    F_nw = part(welds.stress_of_fillet, F_EXX=x.F_EXX)
    if run.edition == "16":
        R_n = part(welds.fillet_strength_2016, F_nw=F_nw, A_we=A_we)
    else:
        if m.is_round:
            k_ds = part(welds.directional_factor_2022, theta=0.0, symbols={"theta": r"\theta_{w}"},
                        note="The welds lie along the force.")
        else:
            k_ds = part.given("k_{ds}", units.NUMBER, 1.0, run.cite("J2.4"),
                              "Ends of rectangular hollow sections in tension.")
        R_n = part(welds.fillet_strength_2022, F_nw=F_nw, A_we=A_we, k_ds=k_ds)
    part.limit_state(RUPTURE, R_n, "R_{n}", "J2.4")


def _wall_shear(x, run, m):
    """Add shear of the walls along the four lines of weld."""
    for what, equation, factors, clause in (("yielding", connecting.shear_yielding, SHEAR_YIELDING, "J4.2(a)"),
                                            ("rupture", connecting.shear_rupture_of_element, RUPTURE, "J4.2(b)")):
        part = run.block(f"wall shear {what}", f"Shear {what} of the wall along the welds")
        gross = what == "yielding"
        A = part(connecting.gross_area_of_cuts, n_c=LINES, L_c=m.l_1, t=m.t,
                 symbols={"A_gv": "A_{gv}" if gross else "A_{nv}", "L_c": "l"})
        R_n = part(equation, F_y=x.F_y, A_gv=A) if gross else part(equation, F_u=x.F_u, A_nv=A)
        part.limit_state(factors, R_n, "R_{n}", clause)


def _rules(x, run, m):
    thinner = min(m.t, x.gusset_thickness)
    if x.connection == SLOTS:
        layout.size_rules(x, run, thinner, None, "the gusset stands square to the wall; the welds lie along no edge")
    elif at_most(m.w, m.flat):
        layout.size_rules(x, run, thinner, x.gusset_thickness, "edge of the side plate")
    else:
        layout.size_rules(x, run, thinner, None, "the welds lie at the rounded corners of the section")
    layout.length_rule(run, x.weld_size, [m.l_1])
    run.rule("weld and section", "Length of the welds and size of the section", "Commentary D3",
             at_most(m.H, m.l_1), "at least {H}, as advice", "{l}", severity="caution", H=m.H, l=m.l_1,
             remark="shorter welds are far outside ordinary detailing; consider longer ones.")


def _messages(x, run, m):
    run.note("The least factor by the share of the connected area is for open sections; it does not hold for hollow "
             "sections.", "D3")
    run.caution("Welds at the rounded corners are flare welds; they are taken as fillets of the given size, which the "
                "welder is to reach.", "J2.1", when=x.connection == SIDES and not at_most(m.w, m.flat or m.H))
    run.caution("A slot that is cut too long and not welded up leaves the net section just beyond the gusset.",
                "Commentary D3", when=x.connection == SLOTS and x.slot_end != "closed")
    run.assume("Slot end: open, by default.", when=x.connection == SLOTS and x.slot_end is None)
    run.assume("Side along the gusset: longer side, by default.",
               when=not m.is_round and m.H != m.B and x.side_along is None)
    run.note("The walls are checked in shear along the four lines of weld; the tension across their small part at the "
             "end of the welds is left out.", "J4.2")
    run.assume("The gusset is concentric with the section, and the end of the section is sealed where weather can "
               "enter.")
    layout.common_messages(x, run)


def sketch(x, calc):
    """Return elevation and section to scale, with the path of the governing limit state."""
    run = type(calc.run)(x, silent=True)
    m = ends.hollow_section(x, run)
    m = replace(m, x_bar=ends.factor(x, run, run.block("shear lag", ""), m)[1])
    t_p, slotted = x.gusset_thickness, x.connection == SLOTS
    half = (x.slot_width or t_p + run.pair(SLOT_PLAY)) / 2 if slotted else 0.0
    rings = _round_rings(m, half) if m.is_round else _rectangular_rings(m, half)
    inner = m.H / 2 - m.t
    at = (-t_p / 2,) if slotted else (-m.B / 2 - t_p, m.B / 2)
    plane = (t_p / 2 if run.edition == "22" else 0.0) if slotted else -m.B / 2
    seen = Profile(rings, at, ((-inner, "hidden"), (inner, "hidden")), (), plane)
    return draw_welded(x, calc, m, seen, m.l_1)


def _round_rings(m, half):
    """Return the two halves of a round section beside its slots."""
    R, r = m.H / 2, m.H / 2 - m.t
    rings = []
    for sign in (1, -1):
        outer, inner = pi / 2 - asin(half / R), pi / 2 - asin(half / r)
        ring = [(sign * R * cos(a), R * sin(a)) for a in np.linspace(-outer, outer, 49)]
        ring += [(sign * r * cos(a), r * sin(a)) for a in np.linspace(inner, -inner, 49)]
        rings.append(tuple(ring))
    return tuple(rings)


def _rectangular_rings(m, half):
    """Return the two halves of a rectangular section beside its slots, corners drawn sharp."""
    b, h, t = m.B / 2, m.H / 2, m.t
    return tuple(((s * half, -h), (s * b, -h), (s * b, h), (s * half, h), (s * half, h - t), (s * (b - t), h - t),
                  (s * (b - t), -h + t), (s * half, -h + t)) for s in (1, -1))


def _present_slot(x):
    return x.slot_width or x.gusset_thickness + SLOT_PLAY[x.units]


PLOTS = (
    Plot("weld_length", multiples("weld_length", 0.3, 2.0)),
    Plot("weld_size", multiples("weld_size", 0.4, 2.0)),
    Plot("gusset_thickness", multiples("gusset_thickness", 0.4, 2.0)),
    Plot("slot_width", lambda x: {"slot_width": np.linspace(x.gusset_thickness, 2.5 * x.gusset_thickness, 199)},
         present=_present_slot, applies=lambda x: x.connection == SLOTS),
)

KIND = Kind(
    name="slotted_hss",
    title="Slotted hollow section in tension",
    scope="Tensile strength of HSS or pipe slotted over one concentric gusset, or of rectangular HSS between two side "
          "plates, by AISC 360 chapters D and J: yielding, rupture with shear lag, wall and gusset in shear, welds, "
          "block shear and yielding of the gusset. Not covered: moment from eccentricity, the gusset's own connection "
          "to its support.",
    fields=FIELDS, evaluate=evaluate, sketch=sketch, plots=PLOTS, pointwise=True)
