"""Block shear of a member or a gusset: every path weighed, the governing one written out, the others listed."""

import math

from calclib import units
from calclib.equations.aisc360 import RUPTURE, connecting, members
from calclib.members.fields import Field

UNIFORM, NOT_UNIFORM = "1, uniform tension", "0.5, tension not uniform"
_VALUES = {UNIFORM: 1.0, NOT_UNIFORM: 0.5}


def u_bs_field(name, label, group):
    """Return the field that states U_bs of J4.3 for a member or a gusset."""
    return Field(name, label, group, "Factor U_bs on the tension term of block shear: 1 where the tension stress is "
                 "uniform, 0.5 where it is not.", "U_bs", choices=(UNIFORM, NOT_UNIFORM), default=UNIFORM)


def nominal(path, F_y, F_u, U_bs, count=1):
    """Return the nominal block shear strength of `count` equal paths [kip or N]."""
    shear = min(0.60 * F_u * path.net_shear_area, 0.60 * F_y * path.gross_shear_area)
    return count * (shear + U_bs * F_u * path.net_tension_area)


def block_shear(run, key, title, paths, deductions, F_y, F_u, u_bs, reason, count=1, symbols=None):
    """Add the limit state "block shear" of one element and return its governing `BlockPath`.

    Parameters
    ----------
    key, title : of the block
    paths : every `BlockPath` of one element
    deductions : what one hole takes from a shear line and from a tension line [in or mm]; (0, 0) without holes
    F_y, F_u : of the element [ksi or MPa]
    u_bs : text of a field made by `u_bs_field`
    reason : in words, a sentence, why this U_bs
    count : number of equal elements that tear together, such as two flanges
    symbols : name -> LaTeX of F_y and F_u
    """
    part = run.block(key, title)
    U_bs = _VALUES[u_bs]
    ranked = sorted(paths, key=lambda path: nominal(path, F_y, F_u, U_bs))
    path = ranked[0]
    part.given("U_{bs}", units.NUMBER, U_bs, run.cite("J4.3"),
               f"{reason} {_compared(run, ranked, F_y, F_u, U_bs, count)}")
    widths = _deducted(part, deductions)
    areas = [_area(part, path, kind, net, widths, count)
             for kind, net in (("shear", False), ("shear", True), ("tension", True))]
    R_n = part(connecting.block_shear, F_u=F_u, F_y=F_y, A_nv=areas[1], A_gv=areas[0], U_bs=U_bs, A_nt=areas[2],
               symbols=symbols)
    part.limit_state(RUPTURE, R_n, "R_{n}", "J4.3")
    run.caution(f"{title}: the innermost fasteners of neighbouring lines do not lie level; s²/(4g) is not counted in "
                "the tension line, since the clause does not speak of it.", "J4.3", when=path.staggered)
    return path


def _compared(run, ranked, F_y, F_u, U_bs, count):
    if run.silent:
        return ""
    others = "; ".join(f"{path.name} {units.text(nominal(path, F_y, F_u, U_bs, count), units.FORCE, run.units)}"
                       for path in ranked[1:6])
    more = f"; and {len(ranked) - 6} stronger ones" if len(ranked) > 6 else ""
    return f"Governing path: {ranked[0].name}." + (f" Nominal strength of the others: {others}{more}." if others else
                                         " There is no other path.")


def _deducted(part, deductions):
    """Write out what a hole takes from a shear line and from a tension line, and return each with its symbol."""
    if not any(deductions):
        return [(0.0, "d_{e}")] * 2
    allowance = part.run.pair(members.HOLE_ALLOWANCE)
    one = len(set(deductions)) == 1
    symbols = ["d_{e}"] * 2 if one else ["d_{e,v}", "d_{e,t}"]
    for deduction, symbol in list(zip(deductions, symbols, strict=True))[:1 if one else 2]:
        part(members.width_of_hole_deducted, d_h=deduction - allowance, Delta_h=allowance, symbols={"d_e": symbol})
    return list(zip(deductions, symbols, strict=True))


def _area(part, path, kind, net, widths, count):
    """Write out one area of a path, cuts of one length together, and return it [in2 or mm2]."""
    letter = "v" if kind == "shear" else "t"
    groups = {}
    for cut in path.cuts:
        if cut.kind == kind:
            holes = round(math.fsum(share for _, share in cut.holes), 9)
            groups.setdefault((cut.part, round(cut.gross, 9), cut.thickness, holes), []).append(cut)
    areas = []
    for i, ((name, length, thickness, holes), cuts) in enumerate(groups.items()):
        mark = "" if len(groups) == 1 else str(i + 1)
        if kind == "tension" and name != "plate":
            areas.append(part.given(f"A_{{nt{mark}}}", units.AREA, count * cuts[0].net * thickness,
                                    part.run.cite("J4.3"), f"Area of the {name}, torn across."))
            continue
        n = count * len(cuts)
        if not net or not holes:
            areas.append(part(connecting.gross_area_of_cuts, n_c=n, L_c=length, t=thickness,
                              symbols={"A_gv": rf"A_{{{'n' if net else 'g'}{letter}{mark}}}"}))
            continue
        gross = n * length * thickness
        if kind == "tension":
            gross = part(connecting.gross_area_of_cuts, n_c=n, L_c=length, t=thickness,
                         symbols={"A_gv": f"A_{{gt{mark}}}"})
        areas.append(part(connecting.net_area_of_cuts, A_gv=gross, n_h=n * holes,
                          d_e=widths[kind == "tension"][0], t=thickness,
                          symbols={"d_e": widths[kind == "tension"][1], "A_gv": f"A_{{g{letter}{mark}}}",
                                   "A_nv": f"A_{{n{letter}{mark}}}"}))
    total = areas[0]
    for area in areas[1:]:
        total = part(connecting.area_of_two_cuts, A_1=total, A_2=area,
                     symbols={"A": rf"A_{{{'n' if net else 'g'}{letter}}}"})
    return total
