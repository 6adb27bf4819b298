"""What welded kinds share: fields of weld and gusset, area of a fillet, shear, block shear, sizes of fillets."""

from calclib import units
from calclib.block_paths import BlockPath, Cut
from calclib.equations.aisc360 import (
    RUPTURE,
    SHEAR_YIELDING,
    connecting,
    members,
    weld_groups,
    welds,
)
from calclib.errors import EntryError
from calclib.members import gusset
from calclib.members.block_shear import UNIFORM, u_bs_field
from calclib.members.fields import NO, YES, Field
from calclib.members.steel import TENSILE_STRENGTH, YIELD_STRESS
from calclib.tolerance import at_most

# Table J2.4: (thinner part up to, least size), printed as pairs, in and mm. Read in print for the 2022 edition.
LEAST_SIZES = {"US": ((1 / 4, 1 / 8), (1 / 2, 3 / 16), (3 / 4, 1 / 4), (float("inf"), 5 / 16)),
               "SI": ((6.0, 3.0), (13.0, 5.0), (19.0, 6.0), (float("inf"), 8.0))}
ONE_PASS = {"US": 5 / 16, "SI": 8.0}           # common practice: larger fillets take more than one pass
SLENDERNESS = 300                              # D1: advice, no limit
INCH = 25.4                                    # mm; the tables of shapes are in inches
# A weld on paper has its own symbol for the size, since w is the width between welds.
SIZE = {"w": "w_{f}"}
_NAMES = {"1": "Weld 1", "2": "Weld 2", "t": "Each transverse weld", "l": "Each weld"}

WELD = (
    Field("weld_size", "Weld size", "Weld", "Leg of the fillet, equal legs; one size for the whole group.", "w_f",
          units.LENGTH, above=0),
    Field("filler_metal", "Filler metal", "Weld", "Class of the filler metal, such as E70XX."),
    Field("F_EXX", "Strength of the filler metal", "Weld",
          "Minimum tensile strength of the weld metal, such as 70 ksi for E70XX.", "F_{EXX}", units.STRESS, above=0),
    Field("built_out", "Built out to full throat", "Weld",
          "Whether the drawings call for welds along an edge to be built out to the full throat.", choices=(NO, YES),
          default=NO),
)
# Of the gusset's fields, those that speak of holes fall away.
GUSSET = tuple(field for field in gusset.GUSSET if field.name != "net_area_limit")
BLOCKS = (
    u_bs_field("member_U_bs", "U_bs of the member", "Block shear"),
    u_bs_field("gusset_U_bs", "U_bs of the gusset", "Block shear"),
)
OWN_U = (
    Field("user_U", "Shear lag factor", "Shear lag",
          "Factor of the engineer in the place of Table D3.1; blank: by the table.", "U", units.NUMBER, optional=True,
          above=0),
    Field("user_U_reason", "Reason for the factor", "Shear lag",
          "Why the factor differs from the table; compulsory with a factor of the engineer.", optional=True),
)
SLENDER = (
    Field("member_length", "Member length", "Slenderness",
          "Length as fabricated, for the advice on slenderness; blank: not computed.", "L", units.LENGTH, optional=True,
          above=0),
)


def scale(run):
    """Return what an inch of the tables of shapes is in the unit of the calc."""
    return 1.0 if run.units == units.US else INCH


def refuse_gusset_steel(x, run):
    """Refuse stresses of the gusset that are no steel's."""
    for name, ranges in (("gusset_F_y", YIELD_STRESS), ("gusset_F_u", TENSILE_STRENGTH)):
        low, high = run.pair(ranges)
        value = getattr(x, name)
        run.require(low <= value <= high, name, "{value} lies outside {low} to {high}, the range of structural steel; "
                    "check its unit", value=(value, units.STRESS), low=(low, units.STRESS), high=(high, units.STRESS))
    run.require(x.gusset_F_u > x.gusset_F_y, "gusset_F_u", "{F_u} is not above the yield stress of {F_y}; give the "
                "specified minimum values of one grade", F_u=(x.gusset_F_u, units.STRESS),
                F_y=(x.gusset_F_y, units.STRESS))


def refuse_filler(x, run):
    """Refuse a strength that is no filler metal's."""
    low, high = {"US": (60.0, 120.0), "SI": (410.0, 830.0)}[run.units]
    run.require(low <= x.F_EXX <= high, "F_EXX", "{value} lies outside {low} to {high}, the range of filler metals; "
                "check its unit", value=(x.F_EXX, units.STRESS), low=(low, units.STRESS), high=(high, units.STRESS))


def own_factor(x, run, part, computed):
    """Return the shear lag factor that counts: the computed one, or the one given with its reason."""
    if x.user_U is None:
        return computed
    run.require(x.user_U <= 1, "user_U", "{U} is above 1; a shear lag factor lies above 0 and up to 1",
                U=(x.user_U, units.NUMBER))
    if not x.user_U_reason and not run.silent:
        raise EntryError("user_U_reason", "is empty and a shear lag factor is given; state the test, analysis or "
                                           "document it is from, or leave the factor blank")
    reason = _sentence(x.user_U_reason or "")
    run.caution("The shear lag factor {U} is given and takes the place of the computed {computed}. Reason: {reason}",
                "Table D3.1", U=(x.user_U, units.NUMBER),
                computed=(computed, units.NUMBER), reason=reason)
    return part.given("U", units.NUMBER, x.user_U, "given", "Given in place of the computed factor. Reason: "
                      + reason)


def _sentence(text):
    return text if text.endswith(".") else text + "."


def fillet_area(x, run, part, length, mark, end_loaded):
    """Return the effective area of one fillet [in2 or mm2]; `mark`: which one, as its index."""
    size, least = x.weld_size, 4 * x.weld_size
    symbols = {"l": f"l_{{{mark}}}"}
    if not at_most(least, length):
        size = part(welds.size_of_short_fillet, l=length, symbols={**symbols, "w_e": f"w_{{e,{mark}}}"})
        run.caution("{weld} of {length} is shorter than four times its size of {size}; it counts with a size of "
                    "{counts} only. Lengthen it.", "J2.2b", weld=_NAMES[mark], length=length, size=x.weld_size,
                    counts=size)
    t_e = part(welds.throat_of_fillet, w=size, symbols=SIZE if size == x.weld_size else {"w": f"w_{{e,{mark}}}"})
    l_e, name = length, {"l_e": f"l_{{{mark}}}"}
    times = length / size
    if end_loaded and not at_most(times, 100):
        name = {"l_e": f"l_{{e,{mark}}}"}
        if at_most(times, 300):
            beta = part(welds.length_factor_of_fillet, l=length, w=size, symbols={**SIZE, **symbols})
            l_e = part(welds.effective_length_of_fillet, beta=beta, l=length, symbols={**symbols, **name})
        else:
            l_e = part(welds.effective_length_of_very_long_fillet, w=size, symbols={**SIZE, **name})
        run.note("{weld} is loaded at its end and longer than 100 times its size; {l_e} of its {length} count.",
                 "J2.2b", weld=_NAMES[mark], l_e=l_e, length=length)
    return part(welds.area_of_fillet, t_e=t_e, l_e=l_e, symbols={**name, "A_we": f"A_{{we,{mark}}}"})


def shear_along_welds(run, key, title, steel, closed, n, l_1, l_2, t):
    """Add shear yielding and shear rupture of a part along its longitudinal welds.

    `steel`: (F_y, F_u, index of their symbols); `closed`: why they do not apply, or "".
    """
    F_y, F_u, mark = steel
    names = {"n": "n_{g}" if mark else "n_{e}", "t": "t_{g}" if mark else "t", "F_y": f"F_{{y{mark}}}",
             "F_u": f"F_{{u{mark}}}"}
    for what, equation, factors, clause in (("yielding", connecting.shear_yielding, SHEAR_YIELDING, "J4.2(a)"),
                                            ("rupture", connecting.shear_rupture_of_element, RUPTURE, "J4.2(b)")):
        part = run.block(f"{key} shear {what}", f"Shear {what} of the {title} along the welds")
        if closed:
            part.not_applicable(closed)
            continue
        area = "A_gv" if what == "yielding" else "A_nv"
        A = part(weld_groups.area_along_welds, n=n, l_1=l_1, l_2=l_2, t=t,
                 symbols={**names, "A_gv": "A_{gv}" if what == "yielding" else "A_{nv}"})
        R_n = part(equation, **{area: A}, **({"F_y": F_y} if what == "yielding" else {"F_u": F_u}), symbols=names)
        part.limit_state(factors, R_n, "R_{n}", clause)


def gusset_tension(x, run, w, L_s, count, reason=""):
    """Add the spread of the force and the tension of the gusset; `reason`: why there is no spread, or ""."""
    if not reason:
        gusset.gusset_tension(x, run, w, L_s, count)
        return
    run.block("gusset spread", "Spread of the force in the gusset").left_out(reason)
    for what in ("yielding", "rupture"):
        run.block(f"gusset {what}", f"Tensile {what} of the gusset").not_applicable(reason)
    run.caution("The gusset is not checked in tension. " + reason, "J4.1")


def gusset_block(x, run, w, l_1, l_2, n):
    """Add block shear of `n` gussets within two longitudinal welds `w` apart: shear along each, tension across."""
    part = run.block("gusset block shear", "Block shear of the gusset at the welds")
    names = {"n": "n_{g}", "t": "t_{g}"}
    A_gv = part(weld_groups.area_along_welds, n=n, l_1=l_1, l_2=l_2, t=x.gusset_thickness, symbols=names,
                note="Shear along the welds; without holes the net area is the same.")
    A_nt = part(weld_groups.area_of_strips, n=n, w=w, t=x.gusset_thickness, symbols={**names, "A": "A_{nt}"},
                note="Tension across, between the welds.")
    U_bs = part.given("U_{bs}", units.NUMBER, 1.0 if x.gusset_U_bs == UNIFORM else 0.5, run.cite("J4.3"),
                      "Input; the welds hold the block on both sides.")
    R_n = part(connecting.block_shear, F_u=x.gusset_F_u, F_y=x.gusset_F_y, A_nv=A_gv, A_gv=A_gv, U_bs=U_bs, A_nt=A_nt,
               symbols={"F_y": "F_{yg}", "F_u": "F_{ug}", "A_nv": "A_{gv}"})
    part.limit_state(RUPTURE, R_n, "R_{n}", "J4.3")


def cut(kind, points, thickness, part="plate"):
    """Return a straight cut without holes; `points`: its two ends."""
    (x_1, y_1), (x_2, y_2) = points
    length = abs(x_2 - x_1) + abs(y_2 - y_1)
    return Cut(kind, part, tuple(points), length, length, (), thickness)


def path(name, cuts):
    """Return a block path of cuts without holes."""
    return BlockPath(name, ((1, 2),), (), tuple(cuts), False)


def slenderness(x, run, r):
    """Add the slenderness of the member, which is advice, where its length is given."""
    part = run.block("slenderness", "Slenderness")
    if x.member_length is None:
        part.left_out("Slenderness is not computed: no member length is given.")
        return
    ratio = part(members.slenderness, L=x.member_length, r=r)
    run.rule("slenderness", "Slenderness L/r", "D1", at_most(ratio, SLENDERNESS), f"at most {SLENDERNESS}, as advice",
             "{ratio}", severity="caution", ratio=(ratio, units.NUMBER),
             remark="the member is slender; watch sag and vibration. The standard sets no limit for tension.")


def common_messages(x, run):
    """Say what every welded kind takes for granted."""
    run.note("Fillets of other than equal legs, and weld access and inspection, are not part of this calc; filler "
             "metal is to match the base metal.", "Table J2.5")
    run.note("Welds that end at an edge in tension are to stop short of it, or return, without a notch in the base "
             "metal.", "J2.2b")
    run.caution("F_u / F_y is below 1.1; the ductility that the clause counts on is small.", when=x.F_u < 1.1 * x.F_y)
    run.assume("Bolts share no load with the welds.", "J1.8")
    run.assume("The force acts along the member. The connection of the gusset to its support, and the gusset in "
               "compression should the force reverse, are not part of this calc.")
    run.assume("Yield stress and tensile strength are specified minimum values, not those of a mill certificate.",
               "A3")


def size_rules(x, run, thinner, edge, edge_name):
    """Add the rules on the size of the fillets. `thinner`: the thinner part joined; `edge`: the part welded along its
    edge, None where the welds lie along no edge [in or mm]."""
    least = next(size for up_to, size in run.pair(LEAST_SIZES) if at_most(thinner, up_to))
    run.rule("least weld size", "Least size of the weld", "Table J2.4", at_most(least, x.weld_size),
             "at least {least} where the thinner part is {t}", "{size}", remark="Enlarge the weld.", least=least,
             t=thinner, size=x.weld_size)
    if edge is None:
        run.rule("greatest weld size", "Greatest size of a weld along an edge", "J2.2b", True, "", "{size}",
                 applies=False, reason=edge_name, size=x.weld_size)
    else:
        thin = edge < run.pair(welds.EDGE_THICKNESS) * (1 - 1e-9)
        most = edge if thin else welds.greatest_size_along_edge(t=edge, Delta_w=run.pair(welds.EDGE_ALLOWANCE))
        run.rule("greatest weld size", "Greatest size of a weld along an edge", "J2.2b", at_most(x.weld_size, most),
                 "at most {most} along the " + edge_name + " of {t}", "{size}", applies=x.built_out == NO,
                 reason="the drawings call for the weld to be built out to the full throat",
                 remark="Make the weld smaller and longer, or call for it to be built out.", most=most, t=edge,
                 size=x.weld_size)
    run.rule("one pass", "Size laid in one pass", "J2", at_most(x.weld_size, run.pair(ONE_PASS)),
             "at most {most}, as advice", "{size}", severity="caution",
             remark="the weld takes more than one pass; a longer and smaller weld costs less.",
             most=run.pair(ONE_PASS), size=x.weld_size)


def length_rule(run, size, lengths, clause="J2.2b", severity="caution", remark=""):
    """Add the rule that each weld is at least four times its size long."""
    short = min(lengths)
    run.rule("weld length", "Length of each weld", clause, at_most(4 * size, short), "each at least {least}",
             "shortest {short}", severity=severity, least=4 * size, short=short,
             remark=remark or "the shortest weld counts with a quarter of its length as size.")
