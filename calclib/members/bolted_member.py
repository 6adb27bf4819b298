"""Tension member bolted to a gusset: AISC 360 chapters D and J3, J4."""

from functools import lru_cache

import numpy as np

from calclib import units
from calclib.block_paths import block_paths, strip
from calclib.equations import stress_concentration as stress
from calclib.equations.aisc360 import RUPTURE, YIELDING, members
from calclib.equations.aisc360.weld_groups import radius_of_gyration_of_plate
from calclib.errors import CalcError, EntryError
from calclib.members.block_shear import block_shear, u_bs_field
from calclib.members.bolt_group import BOLTS, bolt_blocks
from calclib.members.bolt_layout import LAYOUT, MOST_BOLTS, lay_out, standard_hole
from calclib.members.bolt_rules import RULES, bolt_rules
from calclib.members.bolted_section import BACKS, FLANGE, FLANGES, FLAT, I_SHAPES, SECTION, WEB, section_block
from calclib.members.bolted_sketch import sketch
from calclib.members.fatigue_check import FATIGUE, fatigue_block
from calclib.members.fields import Field, Kind, Plot, multiples
from calclib.members.gusset import GUSSET, gusset_tension
from calclib.members.net_section import LISTED, chains_of, net_area
from calclib.members.shear_lag import SHEAR_LAG, shear_lag_block
from calclib.members.steel import refuse_stresses
from calclib.tables import fasteners, shapes
from calclib.tolerance import at_most

SLENDERNESS = 300.0             # D1, advice
ONE, TWO = "one", "two, one on each face"

FIELDS = (
    *SECTION, *BOLTS, *LAYOUT, *GUSSET,
    Field("gussets", "Gussets at the element", "Gusset", "Gussets at each connected element; with two, the bolts have "
          "two shear planes.", choices=(ONE, TWO), default=ONE),
    *SHEAR_LAG,
    u_bs_field("member_U_bs", "Tension in the block of the member", "Block shear"),
    u_bs_field("gusset_U_bs", "Tension in the block of the gusset", "Block shear"),
    *RULES, *FATIGUE,
)


def evaluate(x, run):
    """Order the equations of a bolted tension member; `x` holds one value for each field."""
    refuse_stresses(x, run)
    _refuse_gusset_steel(x, run)
    section = section_block(x, run)
    gussets = _gussets(x, run, section)
    layout = lay_out(x, run, section)

    part = run.block("gross yielding", "Tensile yielding in the gross section")
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=section.A_g)
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")

    part = run.block("net section", "Net section by every chain of holes")
    found = _searched(x, chains_of, section.width, layout.member, section.A_g / section.count,
                      1 if run.silent else LISTED)
    A_n = net_area(part, section.A_g, found, layout.member, section.t, section.count)
    U = shear_lag_block(x, run, section, layout)
    part = run.block("net rupture", "Tensile rupture in the net section")
    A_e = part(members.effective_net_area, A_n=A_n, U=U)
    P_n = part(members.tensile_rupture_of_member, F_u=x.F_u, A_e=A_e)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D2(b)")

    _block_shear(x, run, section, layout, gussets)
    bolt_blocks(x, run, section, layout, gussets)
    count = section.patterns * gussets
    gusset_tension(x, run, layout.width, layout.reach, count, layout.gusset)
    bolt_rules(x, run, section, layout)
    _slenderness(x, run, section)
    _stress_at_hole(x, run, section, layout)
    fatigue_block(x, run, found[0].net_area * section.count, "net area at the bolts")
    _messages(x, run, section, layout)


def _refuse_gusset_steel(x, run):
    run.require(x.gusset_F_u > x.gusset_F_y, "gusset_F_u", "{F_u} is not above the yield stress of {F_y}; give the "
                "specified minimum values of one grade", F_u=(x.gusset_F_u, units.STRESS),
                F_y=(x.gusset_F_y, units.STRESS))


def _gussets(x, run, section):
    """Return how many gusset plies each bolt goes through."""
    if x.gussets == ONE:
        return 1
    if section.way in (BACKS, FLANGES, FLANGE):
        raise EntryError("gussets", f"two gussets do not go with {section.way} here; the other face is not free. "
                                    f'Choose "{ONE}"')
    return 2


@lru_cache(512)      # a sweep of what is not geometry asks for the same paths again and again
def _blocks(width, reach, thickness, holes, attached=()):
    """Return every block path of a strip that goes on beyond `reach`, the x of its last hole."""
    return block_paths(strip(width, 2 * reach + width), thickness, list(holes), attached)


def _searched(x, search, *given):
    """Return what a search of the geometry finds; what it refuses is a matter of the layout."""
    try:
        return search(*given)
    except CalcError as error:
        raise EntryError("rows" if x.bolt_places is None else "bolt_places", str(error)) from error


def _block_shear(x, run, section, layout, gussets):
    def deductions(holes):
        return holes[0].shear_deduction, holes[0].deduction

    paths = _searched(x, _blocks, section.width, max(hole.x for hole in layout.member), section.t, layout.member,
                      section.attached)
    block_shear(run, "member block shear", "Block shear of the member", paths, deductions(layout.member), x.F_y, x.F_u,
                x.member_U_bs, _reason(x.member_U_bs, "the end of a member"), section.count)
    run.caution("Block shear takes the tension as uniform, as the figure of the commentary draws it; research on "
                "angles by one leg and tees by their flange asks for less.", "Commentary J4.3",
                when=section.family in ("L", "WT", "MT", "ST") and x.member_U_bs.startswith("1"))
    paths = _searched(x, _blocks, x.gusset_width, max(hole.x for hole in layout.gusset), x.gusset_thickness,
                      layout.gusset)
    block_shear(run, "gusset block shear", "Block shear of the gusset", paths, deductions(layout.gusset), x.gusset_F_y,
                x.gusset_F_u, x.gusset_U_bs, _reason(x.gusset_U_bs, "a gusset behind a concentric group of bolts"),
                section.patterns * gussets, {"F_y": "F_{yg}", "F_u": "F_{ug}"})


def _reason(chosen, what):
    return f"The figure of the commentary draws {what} with uniform tension." if chosen.startswith("1") else \
        "Tension not uniform, as chosen."


def _slenderness(x, run, section):
    part = run.block("slenderness", "Slenderness, as advice")
    if x.length is None:
        part.left_out("The slenderness is not computed: no length is given. D1 sets no limit in tension.")
        run.note("The slenderness is not computed: no length is given.", "D1")
        return
    if section.shape is None:
        r = part(radius_of_gyration_of_plate, t=section.t)
    else:
        r = part.given("r", units.LENGTH, section.r, shapes.SOURCE, "Least radius of gyration" + (
            " of the pair; r_y for backs " + units.text(section.shape.s * section.k, units.LENGTH, run.units)
            + " apart." if section.family == "2L" and section.shape.s else "."))
    slenderness = part(members.slenderness, L=x.length, r=r)
    run.rule("slenderness", "Slenderness", "D1", at_most(slenderness, SLENDERNESS), "L/r up to 300, as advice",
             units.trimmed(slenderness) if not run.silent else "", severity="caution",
             remark="a slender member may sway or rattle; the advice is no limit.")


def _stress_at_hole(x, run, section, layout):
    part = run.block("stress at hole", "Elastic stress at the hole, for information")
    if section.way != FLAT or len(layout.lines) > 1 or len(layout.member) > len(layout.bolts):
        part.left_out("Elastic stress at the hole is shown for a plate with one line of bolts only. Strength does not "
                      "depend on it.")
        return
    w, d = section.width, layout.member[0].width
    K_tn = part(stress.stress_concentration_on_net_section, w=w, d=d, note="Open hole in the middle of the plate; a "
                "bolt changes the stress. Strength does not depend on it.")
    f_n = part(stress.mean_stress_of_net_section, P=run.required, w=w, d=d, t=section.t)
    part(stress.peak_stress_at_hole, K_tn=K_tn, f_n=f_n)


def _messages(x, run, section, layout):
    if run.silent:
        return
    off = abs(sum(y for _, y in layout.bolts) / len(layout.bolts) - section.width / 2)
    run.caution("The bolts lie {off} off the middle of the connected element; chapter D does not count the moment.",
                "J1.7", when=section.is_symmetric and off > 1e-6 * section.width, off=off)
    flat = section.shape.T * section.k if section.way == WEB and section.shape.T else section.width
    between = section.way == WEB and section.family in I_SHAPES
    run.caution("A gusset of {w} does not lie between the flanges, where the web is flat over {flat}; trim it along "
                "the lap.", when=between and not at_most(x.gusset_width, flat), w=x.gusset_width, flat=flat)
    run.note("End connections of angles are exempt from the balance of eccentricity.", "J1.7",
             when=section.family in ("L", "2L"))
    run.note("Eccentricity of the connected face from the centroid enters by the shear lag factor only.",
             when=section.family in ("C", "MC", "WT", "MT", "ST"))
    separation = section.shape.s * section.k if section.family == "2L" else x.gusset_thickness
    run.note("The table's angles are {s} apart, the gusset is {t} thick; strength does not depend on it.",
             when=abs(separation - x.gusset_thickness) > 1e-9, s=separation, t=x.gusset_thickness)
    run.caution("F_u / F_y is below 1.1; the ductility that the clause counts on is small.", when=x.F_u < 1.1 * x.F_y)
    if section.family == "2L":
        run.assume("Connectors hold the two angles together; they and the slenderness of one angle between them are "
                   "not part of this calc.", "D4")
    run.assume("The force acts along the bolt lines, and every bolt takes an equal share of it.")
    run.assume("A chain behind bolts that have shed their load carries the rest of it, in proportion to the bolts; "
               "common practice.")
    run.assume("The gusset is a rectangle behind the connection, held at its far edge; its weld or bolts to the "
               "support and its buckling if the force reverses are not part of this calc.")
    run.assume("Member and gusset are in firm contact, and the bolts are installed as the joint asks.")
    run.assume("Yield stress and tensile strength are specified minimum values, not those of a mill certificate.", "A3")


def _holes(x):
    """Return hole widths from that of the table less its clearance to 1.5 bolt diameters."""
    return {"hole_diameter": np.linspace(x.bolt_diameter, 1.4 * x.bolt_diameter, 25)}


def _present_hole(x):
    return standard_hole(x) if x.hole_diameter is None else x.hole_diameter


def _table_holes(x):
    return [(fasteners.hole(x.bolt_diameter, kind, x.standard[-2:], x.units).width, kind)
            for kind in ("standard", "oversize")]


def _rows(x):
    top = min(max(6, round(1.7 * x.rows)), MOST_BOLTS // round(x.lines))
    return {"rows": np.arange(1.0, max(top, x.rows) + 1)}


def _present_U(x):
    """Return the shear lag factor of the case, of the engineer or by the table."""
    from calclib.calc import Run  # it knows the kinds, so it cannot be imported with them
    run = Run(x, silent=True)
    section = section_block(x, run)
    return shear_lag_block(x, run, section, lay_out(x, run, section))


def _by_pattern(x):
    return x.bolt_places is None


PLOTS = (
    Plot("rows", _rows, discrete=True, applies=_by_pattern,
         sizes=lambda x: [(n, f"{n:g}") for n in _rows(x)["rows"]]),
    Plot("pitch", multiples("pitch", 0.5, 2, 25), applies=lambda x: _by_pattern(x) and x.pitch is not None),
    Plot("end_distance", multiples("end_distance", 0.5, 2, 25), applies=_by_pattern),
    Plot("hole_diameter", _holes, present=_present_hole, sizes=_table_holes),
    Plot("user_U", lambda x: {"user_U": np.linspace(0.3, 1, 29)}, present=_present_U),
)

KIND = Kind(
    name="bolted_member",
    title="Bolted tension member",
    scope="Strength of a tension member bolted to a gusset through flanges, web, stem, leg or flat: yielding, rupture "
          "with shear lag, and block shear by AISC 360 chapter D and J4; its bolts by J3; its gusset by J4. Not "
          "covered: what holds the gusset, prying, hollow sections.",
    fields=FIELDS, evaluate=evaluate, sketch=sketch, plots=PLOTS, pointwise=True)
