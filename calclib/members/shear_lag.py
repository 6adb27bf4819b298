"""The shear lag factor of a bolted end: every case of Table D3.1 that applies, the larger permitted one taken."""

from calclib import units
from calclib.equations.aisc360 import shear_lag
from calclib.errors import EntryError
from calclib.members.bolted_section import BACKS, FLANGE, FLANGES, FLAT, LONG_LEG, SHORT_LEG, STEM, TEES, WEB
from calclib.members.fields import Field
from calclib.tables import shapes
from calclib.tolerance import at_least

SHEAR_LAG = (
    Field("user_U", "Shear lag factor", "Shear lag", "Factor U of the engineer in place of Table D3.1; blank: by the "
          "table.", "U", units.NUMBER, optional=True, above=0),
    Field("user_U_reason", "Reason for the factor", "Shear lag",
          "Why the factor differs from the table; compulsory with a factor of the engineer.", optional=True),
)


def shear_lag_block(x, run, section, layout):
    """Add the block "shear lag" and return U."""
    part = run.block("shear lag", "Shear lag factor")
    candidates = _candidates(run, part, section, layout)
    if not candidates and x.user_U is None:
        raise EntryError("rows", "the connection is not longer than the eccentricity of the section and no case of "
                                 "Table D3.1 gives a factor; use more bolts in a line")
    U = max(candidates.values(), default=None)
    listed = "; ".join(f"{name}: {units.text(value, units.NUMBER, run.units)}" for name, value in candidates.items())
    if len(candidates) > 1:
        (name, other), *rest = candidates.items()
        U = other
        for key, value in rest:
            U = part(shear_lag.larger_shear_lag_factor, U_1=U, U_2=value, note=f"{name} and {key}." if not run.silent
                     else "")
            name = "the larger one"
        run.note(f"Shear lag factor, all that may be used: {listed}. The largest is taken.", "Table D3.1")
    if x.user_U is not None:
        if x.user_U > 1:
            raise EntryError("user_U", f"{x.user_U:g} is above 1; a shear lag factor is at most 1 (D3)")
        if not run.silent:
            if x.user_U_reason is None:
                raise EntryError("user_U_reason", "is empty and a shear lag factor is given; state the reason, such as "
                                                  "a test or an analysis")
            run.caution("The shear lag factor {U} is the engineer's, in place of {listed} by the table: {reason}",
                        "Table D3.1", U=(x.user_U, units.NUMBER), listed=listed or "no value", reason=x.user_U_reason)
        U = part.given("U", units.NUMBER, x.user_U, "Engineer", "In place of the table; see the cautions.")
    return U


def _candidates(run, part, section, layout):
    """Return name -> factor of every case that applies."""
    if section.way == FLAT:
        return {"case 1": part.given("U", units.NUMBER, 1.0, run.cite("Table D3.1, case 1"),
                                     "The force passes through the whole plate by bolts.")}
    found = {}
    length = layout.length
    x_bar = _x_bar(part, section)
    if length > 0:
        how = "out to out of the bolts along the force" if layout.equal_lines else \
            "first to last bolt of the line with the most bolts"
        part.given("l", units.LENGTH, length, run.cite("Table D3.1, case 2"), f"Length of the connection, {how}.")
        if length > x_bar * (1 + 1e-9):
            found["case 2"] = part(shear_lag.shear_lag_factor, l=length, x_bar=x_bar)
    if "case 2" not in found:
        run.note("Case 2 gives no factor: the connection is not longer than the eccentricity of the section.",
                 "Table D3.1, case 2")
    found |= _tabulated(run, part, section, layout)
    least = part(shear_lag.shear_lag_factor_by_area, A_c=section.A_c, A_g=section.A_g,
                 note="Lower bound for open sections: gross area of the connected elements.")
    return found | {"area of the connected elements": least}


def _x_bar(part, section):
    s, k = section.shape, section.k
    if section.way == FLANGES:
        return part(shear_lag.centroid_from_connected_flange, d=s.d * k, Z_x=s.Z_x * k**3, A_g=section.A_g,
                    note="The section is two tees; to the centroid of one.")
    if section.way == STEM or (section.way == WEB and section.x_bar is None):
        return part(shear_lag.centroid_from_connected_web, Z_y=s.Z_y * k**3, A_g=section.A_g,
                    note="From the middle of the web or stem to the centroid of the half on one side.")
    face = {FLANGE: "outer face of the flange", WEB: "back of the web", LONG_LEG: "back of the long leg",
            SHORT_LEG: "back of the short leg", BACKS: "backs of the angles"}[section.way]
    return part.given(r"\bar{x}", units.LENGTH, section.x_bar, shapes.SOURCE, f"From the {face} to the centroid"
                      + (" of one angle." if section.way == BACKS else "."))


def _tabulated(run, part, section, layout):
    """Return the factors of cases 7 and 8 that the bolts in a line reach."""
    n, family, s = layout.fewest, section.family, section.shape
    if not layout.equal_lines:
        run.caution("The bolt lines have unequal numbers of bolts; cases 7 and 8 count those of the shortest line.",
                    "Table D3.1")
    if family in ("L", "2L"):
        cite = run.cite("Table D3.1, case 8")
        if n >= 3:
            return {"case 8": part.given("U", units.NUMBER, 0.80 if n >= 4 else 0.60, cite,
                                         f"{n} bolts in a line: 0.80 from four on, 0.60 with three.")}
        run.note(f"Case 8 does not apply: {n} in a line, three are needed.", "Table D3.1, case 8")
        return {}
    if family in ("C", "MC"):
        run.note("Case 7 does not cover channels.", "Table D3.1, case 7")
        return {}
    cite = run.cite("Table D3.1, case 7")
    by_web = section.way in (WEB, STEM)
    if n < (4 if by_web else 3):
        run.note(f"Case 7 does not apply: {n} in a line, {'four' if by_web else 'three'} are needed.",
                 "Table D3.1, case 7")
        return {}
    if by_web:
        return {"case 7": part.given("U", units.NUMBER, 0.70, cite, "Web connected, four or more bolts in a line.")}
    tee = family in TEES
    depth = (s.parent_depth if tee else s.d) * section.k
    least = part(shear_lag.least_flange_width_of_case_7, d=depth,
                 note=f"Depth of {s.parent}, from which the tee is cut." if tee else "")
    wide = at_least(section.width, least)
    return {"case 7": part.given("U", units.NUMBER, 0.90 if wide else 0.85, cite,
                                 f"Flange {'at least' if wide else 'below'} two thirds of the depth wide, three or "
                                 "more bolts in a line.")}
