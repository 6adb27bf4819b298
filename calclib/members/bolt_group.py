"""Strength of the bolts of a connection: shear, bearing and tearout bolt by bolt, slip; AISC 360 J3."""

from calclib import units
from calclib.equations.aisc360 import RUPTURE, SLIP, SLIP_LONG_SLOT, SLIP_OVERSIZED, bearing, bolts, rods
from calclib.errors import EntryError
from calclib.members.bolt_layout import ACROSS, ALONG, LONG_SLOT, OVERSIZE, SHORT_SLOT, clear_distances
from calclib.members.fields import NO, YES, Field
from calclib.tables import TableError, fasteners
from calclib.tolerance import at_most

BEARING_JOINT, SLIP_CRITICAL = "bearing", "slip-critical"
INCLUDED, EXCLUDED = "N, in the shear plane", "X, not in the shear plane"
CLASS_A, CLASS_B = "Class A", "Class B"
NO_FILLER, ONE_FILLER, MORE_FILLERS = "none", "one", "two or more"
_MU = {CLASS_A: 0.30, CLASS_B: 0.50}
_GROUPS = tuple(dict.fromkeys(name for edition in fasteners.EDITIONS for name in fasteners.bolt_groups(edition)))
_TEAROUT = {"22": "J3.11", "16": "J3.10"}

BOLTS = (
    Field("bolt_diameter", "Bolt diameter", "Bolts", "Nominal diameter of the bolts.", "d", units.LENGTH, above=0),
    Field("bolt_group", "Bolt group", "Bolts", "Group of the bolts by Table J3.2; the names differ between editions.",
          choices=_GROUPS),
    Field("threads", "Threads", "Bolts", "Whether threads lie in the shear plane.", choices=(INCLUDED, EXCLUDED),
          default=INCLUDED),
    Field("joint", "Joint", "Bolts", "Bearing joint, or slip-critical joint.", choices=(BEARING_JOINT, SLIP_CRITICAL),
          default=BEARING_JOINT),
    Field("surface", "Faying surface", "Bolts", "Class of the faying surfaces of a slip-critical joint.",
          choices=(CLASS_A, CLASS_B), default=CLASS_A),
    Field("deformation", "Deformation at holes counts", "Bolts",
          "Whether deformation at the bolt holes at service load is a design consideration.", choices=(YES, NO),
          default=YES),
    Field("fillers", "Fillers", "Bolts", "Number of fillers between the connected parts.",
          choices=(NO_FILLER, ONE_FILLER, MORE_FILLERS), default=NO_FILLER),
    Field("filler_thickness", "Filler thickness", "Bolts",
          "Thickness of all fillers at a shear plane together; blank without fillers.", "t_f", units.LENGTH,
          optional=True, above=0),
)


def bolt_blocks(x, run, section, layout, gussets):
    """Add the blocks "bolt shear", "bolt group" and "slip".

    gussets : gusset plies that each bolt goes through
    """
    group = _group(x, run)
    n = len(layout.bolts) * section.patterns
    planes = section.plies + gussets - 1
    R_nv = _shear(x, run, section, layout, group, n, planes, gussets)
    _bearing(x, run, section, layout, R_nv, gussets)
    _slip(x, run, layout, n, planes)


def _group(x, run):
    try:
        return fasteners.bolt_group(run.edition, x.bolt_group, run.units)
    except TableError as error:
        raise EntryError("bolt_group", str(error)) from error


def _shear(x, run, section, layout, group, n, planes, gussets):
    part = run.block("bolt shear", "Shear of the bolts")
    A_b = part(rods.body_area, d=x.bolt_diameter)
    included = x.threads == INCLUDED
    grip = section.plies * section.t + gussets * x.gusset_thickness + (x.filler_thickness or 0.0)
    long_joint = not at_most(layout.reach, run.pair(bolts.LONG_JOINT))
    long_grip = group.name == "A307" and not at_most(grip, 5 * x.bolt_diameter)
    names = [f"F_{{nv,{i}}}" for i in range(long_joint + long_grip)] + ["F_{nv}"]     # each step has its own symbol
    F_nv = part.given(names[0], units.STRESS, group.F_nv_N if included else group.F_nv_X,
                      run.cite("Table J3.2") + _memory(group), f"{group.name}, threads "
                      + ("in" if included else "not in") + " the shear plane.")
    run.caution("The bolts count with threads outside the shear plane; grip, washers and thread length are to be shown "
                "to leave the shank there. A short bolt may have no shank.", "J3.7" if run.edition == "22" else "J3.6",
                when=not included)
    if long_joint:
        F_nv = part(bolts.shear_stress_in_long_joint, F_nv=F_nv, symbols={"F_nv": names[0], "F_nv1": names[1]},
                    note="" if run.silent else f"End-loaded joint of {_length(run, layout.reach)}, longer than "
                                               f"{_length(run, run.pair(bolts.LONG_JOINT))}.")
    if long_grip:
        F_nv = part(bolts.stress_with_long_grip, F_n=F_nv, L_g=grip, d=x.bolt_diameter,
                    Delta_g=run.pair(bolts.GRIP_STEP), symbols={"F_n": names[-2], "F_n1": names[-1]},
                    note="A307 bolt with a grip above five diameters.")
    k_f = _filler(x, run, part)
    R_nv = part(bolts.bolt_shear, F_nv=F_nv, A_b=A_b, n_s=planes,
                symbols={"R_n": "R_{nv}" if k_f is None else "R_{nv,0}"})
    if k_f is not None:
        R_nv = part(bolts.bolt_shear_with_filler, k_f=k_f, R_n=R_nv, symbols={"R_n": "R_{nv,0}", "R_n1": "R_{nv}"})
    R_n = part(bolts.strength_of_equal_bolts, n=n, r_n=R_nv, symbols={"r_n": "R_{nv}"})
    part.limit_state(RUPTURE, R_n, "R_{n}", {"22": "J3.7", "16": "J3.6"})
    return R_nv


def _memory(row):
    return "" if row.read == "printed" else " (from memory, verify)"


def _length(run, value):
    return units.text(value, units.LENGTH, run.units)


def _filler(x, run, part):
    """Return the factor on the shear strength of a bolt for a thick filler, or None."""
    if x.fillers == NO_FILLER:
        if x.filler_thickness is not None:
            raise EntryError("filler_thickness", "is given and there are no fillers; leave it blank, or state the "
                                                 "number of fillers")
        return None
    if x.filler_thickness is None:
        raise EntryError("filler_thickness", "is empty and there are fillers; give their thickness together")
    limit = run.pair(bolts.FILLER_THICKNESS)
    if at_most(x.filler_thickness, limit):
        run.note("Fillers of {t} need no reduction of the bolt shear, up to {limit}.", "J5.2", t=x.filler_thickness,
                 limit=limit)
        return None
    run.note("Bolt shear is reduced for fillers of {t}; fillers that are developed or extended need no reduction.",
             "J5.2", t=x.filler_thickness)
    return part(bolts.shear_factor_with_filler, t_f=x.filler_thickness, k_t=run.pair(bolts.FILLER_REDUCTION), t_0=limit)


def _equations(x, kind):
    """Return the equations of bearing and tearout for holes of one kind."""
    if kind == LONG_SLOT and x.slot_direction == ACROSS:
        return bearing.bearing_in_long_slot, bearing.tearout_in_long_slot
    if x.deformation == YES:
        return bearing.bearing, bearing.tearout
    return bearing.bearing_with_deformation, bearing.tearout_with_deformation


def _bearing(x, run, section, layout, R_nv, gussets):
    """Sum over the bolts the least of shear, bearing and tearout in every ply."""
    part = run.block("bolt group", "Bolt group by shear, bearing and tearout")
    plies = {
        "m": (section.plies * section.t, x.F_u, layout.member, layout.member_kind),
        "g": (gussets * x.gusset_thickness, x.gusset_F_u, layout.gusset, layout.gusset_kind),
    }
    R_nb, tear = {}, {}
    for mark, (t, F_u, _, kind) in plies.items():
        bears, tear[mark] = _equations(x, kind)
        R_nb[mark] = part(bears, d=x.bolt_diameter, t=t, F_u=F_u, symbols={
            "R_n": f"R_{{nb,{mark}}}", "t": f"t_{{{mark}}}", "F_u": f"F_{{u,{mark}}}"},
            note="Bearing on the member at one bolt." if mark == "m" else "Bearing on the gusset at one bolt.")
    at_b = min(R_nb, key=R_nb.get)
    classes = _classes(layout)
    total = None
    for i, ((at_m, at_g), number) in enumerate(classes.items()):
        R_nt = {}
        for mark, (distance, is_end) in (("m", at_m), ("g", at_g)):
            t, F_u, holes, _ = plies[mark]
            l_c = _clear(run, part, distance, is_end, holes[0].along, mark, i)
            R_nt[mark] = part(tear[mark], l_c=l_c, t=t, F_u=F_u, symbols={
                "R_n": f"R_{{nt,{mark}}}", "l_c": f"l_{{c,{mark}}}", "t": f"t_{{{mark}}}", "F_u": f"F_{{u,{mark}}}"})
        at_t = min(R_nt, key=R_nt.get)
        note = "" if run.silent else \
            f"Bolts {i + 1}, {section.patterns * number} in number: " + _which(R_nv, R_nb, R_nt)
        r_n = part(bolts.strength_of_one_bolt, R_nv=R_nv, R_nb=R_nb[at_b], R_nt=R_nt[at_t], note=note, symbols={
            "r_n": f"r_{{n,{i + 1}}}", "R_nb": f"R_{{nb,{at_b}}}", "R_nt": f"R_{{nt,{at_t}}}"})
        number *= section.patterns
        last = i == len(classes) - 1
        if total is None:
            held = number, r_n
            total = part(bolts.strength_of_equal_bolts, n=number, r_n=r_n) if last else r_n
        else:
            n_1, r_1 = (held if i == 1 else (1, total))
            partial = "".join(str(j + 1) for j in range(i))      # of a sum, the bolts in it
            total = part(bolts.strength_of_bolt_group, n_1=n_1, r_n1=r_1, n_2=number, r_n2=r_n, symbols={
                "r_n1": "r_{n,1}" if i == 1 else f"R_{{n,{partial}}}", "r_n2": f"r_{{n,{i + 1}}}",
                "R_n": "R_{n}" if last else f"R_{{n,{partial}{i + 1}}}"})
    part.limit_state(RUPTURE, total, "R_{n}", {"22": "J3.7, J3.11", "16": "J3.6, J3.10"})
    run.assume("Deformation at the bolt holes at service load is a design consideration.", _TEAROUT,
               when=x.deformation == YES)


def _which(R_nv, R_nb, R_nt):
    """Return in words what is least at a bolt."""
    least = min(R_nv, *R_nb.values(), *R_nt.values())
    if least == R_nv:
        return "shear of the bolt is least."
    for name, values in (("bearing", R_nb), ("tearout", R_nt)):
        for mark, ply in (("m", "member"), ("g", "gusset")):
            if values[mark] == least:
                return f"{name} in the {ply} is least."
    raise AssertionError("one of them is least")


def _classes(layout):
    """Return (member, gusset) -> number of bolts, where each is (distance, whether to the end) along the force."""
    count, found = len(layout.bolts), {}
    pairs = zip(clear_distances(layout.member, count), clear_distances(layout.gusset, count), strict=True)
    for member, gusset in pairs:
        key = (round(member[0], 9), member[1]), (round(gusset[0], 9), gusset[1])
        found[key] = found.get(key, 0) + 1
    return dict(sorted(found.items(), key=lambda item: (not item[0][0][1], not item[0][1][1], item[0])))


def _clear(run, part, distance, is_end, along, mark, i):
    where = "end of the member" if mark == "m" else "edge of the gusset"
    note = f"Bolts {i + 1}, " + (f"to the {where}." if is_end else
                                 f"to the next hole, in the {'member' if mark == 'm' else 'gusset'}.")
    half = along / 2 if is_end else along
    if distance <= half:
        raise EntryError("end_distance" if is_end and mark == "m" else "gusset_end" if is_end else "pitch",
                         f"no steel is left along the force between a hole of {_length(run, along)} and the "
                         f"{where if is_end else 'next hole'}, {_length(run, distance)} from its centre "
                         f"({run.cite(_TEAROUT)}); increase the distance")
    symbol = {"l_c": f"l_{{c,{mark}}}"}
    if is_end:
        return part(bearing.clear_distance_to_edge, L_e=distance, d_h=along, note=note, symbols=symbol)
    return part(bearing.clear_distance_to_next_hole, s=distance, d_h=along, note=note, symbols=symbol)


def _slip(x, run, layout, n, planes):
    part = run.block("slip", "Slip of the joint")
    if x.joint != SLIP_CRITICAL:
        part.not_applicable("The joint is a bearing joint; it may slip into bearing.")
        return
    try:
        T_b = fasteners.pretension(x.bolt_diameter, x.bolt_group, run.edition, run.units)
    except TableError as error:
        raise EntryError("bolt_diameter", str(error)) from error
    clause = {"22": "J3.9", "16": "J3.8"}
    mu = part.given(r"\mu", units.NUMBER, _MU[x.surface], run.cite(clause), f"{x.surface} surface.")
    h_f = part.given("h_{f}", units.NUMBER, 0.85 if x.fillers == MORE_FILLERS else 1.0, run.cite(clause),
                     f"Fillers: {x.fillers}.")
    tension = part.given("T_{b}", units.FORCE, T_b.value * (1 if run.units == units.US else 1000),
                         run.cite("Table J3.1" if run.units == units.US else "Table J3.1M") + _memory(T_b),
                         "Least pretension.")
    r_n = part(bolts.slip, mu=mu, D_u=bolts.MEAN_PRETENSION, h_f=h_f, T_b=tension, n_s=planes, symbols={"R_n": "r_{n}"})
    R_n = part(bolts.strength_of_equal_bolts, n=n, r_n=r_n, symbols={"r_n": "r_{n}"})
    part.limit_state(slip_factors(x, layout), R_n, "R_{n}", clause)
    run.note("Slip is checked at the level of the required strength; shear, bearing and tearout are checked beside it, "
             "as the clause asks.", clause)


def slip_factors(x, layout):
    """Return the Factors of slip by the worst kind of hole in the joint."""
    kinds = {layout.member_kind, layout.gusset_kind}
    if LONG_SLOT in kinds:
        return SLIP_LONG_SLOT
    if OVERSIZE in kinds or (SHORT_SLOT in kinds and x.slot_direction == ALONG):
        return SLIP_OVERSIZED
    return SLIP
