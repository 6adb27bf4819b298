"""A hollow section at its slotted or side-plated end: wall, area, slots, and its shear lag factor by each edition."""

from dataclasses import dataclass

from calclib import units
from calclib.equations.aisc360 import hollow, shear_lag
from calclib.errors import EntryError
from calclib.members.weld_layout import scale
from calclib.tables import TableError, shapes
from calclib.tolerance import at_least, at_most

SLOTS, SIDES = "one gusset through slots", "two side plates"
LONGER, SHORTER = "longer side", "shorter side"
ROUND = ("HSS round", "PIPE")
SLOT_PLAY = {"US": 1 / 16, "SI": 2.0}          # common practice: how much wider than the gusset a slot is cut
NAMES = tuple(name for name in shapes.names() if shapes.family(name) in shapes.HOLLOW)


@dataclass(frozen=True)
class Hollow:
    """The section at its connection. Lengths and areas in the unit of the calc."""

    A_g: float
    t: float                      # wall for design
    r: float
    H: float                      # in the plane of the gusset: diameter, or the side along the gusset
    B: float                      # square to it
    w: float                      # width between the weld lines on the gusset
    l_1: float                    # length of each weld
    l_2: float
    is_round: bool
    flat: float | None            # flat part of the side along the gusset
    inside: bool = False
    x_bar: float = 0.0


def hollow_section(x, run):
    """Record the section with its wall by the standard it is made to, and return it as a Hollow."""
    part = run.block("section", "Section and wall")
    s, k, place = x.section, scale(run), shapes.SOURCE
    is_round = s.family in ROUND
    t = part.given("t", units.LENGTH, s.wall(x.hss_standard) * k, run.cite("B4.2"),
                   _wall_words(run, s, x.hss_standard, k))
    A_g = _gross_area(x, run, part, k)
    run.caution("Of {name} " + s.doubt + "; check the area with the producer.", name=s.name,
                when=bool(s.doubt) and x.gross_area is None)
    r = part.given("r", units.LENGTH, min(s.r_x, s.r_y) * k, place, "Least radius of gyration.")
    run.note("The values of " + s.name + " are those of the inch table, converted with 25.4 mm to the inch.",
             when=k != 1.0)
    if is_round:
        H = B = part.given("D", units.LENGTH, s.D * k, place, "Outside diameter.")
        flat = None
    else:
        along = x.side_along or LONGER
        longer, shorter = s.H * k, s.B * k
        H, B = (longer, shorter) if along == LONGER else (shorter, longer)
        flat = (s.h_flat if along == LONGER else s.b_flat) * k
        part.given("H", units.LENGTH, H, place, "Along the gusset" + (f": the {along}." if longer != shorter else "."))
        part.given("B", units.LENGTH, B, place, "Square to the gusset.")
    w = H
    if x.connection == SIDES:
        w = part.given("w", units.LENGTH, flat if x.weld_spacing is None else x.weld_spacing,
                       place if x.weld_spacing is None else "input", "Width between the welds of a side plate"
                       + (": the flat part of the face." if x.weld_spacing is None else "."))
        run.require(at_most(w, H), "weld_spacing", "{w} is more than the face of {H}; the welds lie on it", w=w, H=H)
    return Hollow(A_g=A_g, t=t, r=r, H=H, B=B, w=w, l_1=x.weld_length, l_2=x.weld_length, is_round=is_round, flat=flat)


def _wall_words(run, s, standard, k):
    if run.silent:
        return ""
    nominal = units.text(s.t_nominal * k, units.LENGTH, run.units)
    if shapes.WALLS[standard] == 1:
        return f"{s.name} to {standard}: the nominal wall of {nominal}."
    return f"{s.name} to {standard}: 0.93 of the nominal wall of {nominal}, as tabulated."


def _gross_area(x, run, part, k):
    s = x.section
    if x.gross_area is not None:
        run.caution("The gross area of {A_g} is given in place of the tabulated {A}, which goes with a wall of {t}.",
                    "B4.3a", A_g=(x.gross_area, units.AREA), A=(s.A * k ** 2, units.AREA), t=s.t_design * k)
        return part.given("A_{g}", units.AREA, x.gross_area, "given", "Gross area, given.")
    try:
        return part.given("A_{g}", units.AREA, s.gross_area(x.hss_standard) * k ** 2, shapes.SOURCE, f"{s.name}.")
    except TableError as error:
        raise EntryError("gross_area", f"is empty: {error}".rstrip(".")) from error


def net_area(x, run, part, m):
    """Return the net area: less two slots, one in each wall, unless the slots are closed by the weld around the gusset.
    """
    if x.connection == SIDES:
        return part.given("A_{n}", units.AREA, m.A_g, run.cite("B4.3b"), "Side plates take nothing out of the section.")
    t_p = x.gusset_thickness
    if x.slot_width is None:
        b_s = part(hollow.slot_width, t_p=t_p, Delta_s=run.pair(SLOT_PLAY), note="Each slot is cut wider than the "
                   "gusset by the usual amount.")
        run.assume("Slot width: gusset thickness and "
                   + ("1/16 in" if run.units == units.US else "2 mm") + ", by default, cut through both walls.")
    else:
        b_s = part.given("b_{s}", units.LENGTH, x.slot_width, "input", "Width of each slot.")
        run.require(at_least(b_s, t_p), "slot_width", "{b_s} is narrower than the gusset of {t_p}; the gusset does not "
                    "enter. Widen the slot", b_s=b_s, t_p=t_p)
    room = m.B if m.is_round else m.B - 2 * m.t
    run.require(b_s < room, "slot_width" if x.slot_width is not None else "gusset_thickness", "a slot of {b_s} is not "
                "narrower than the section of {room}; no wall is left beside it. Use a thinner gusset", b_s=b_s,
                room=room)
    run.caution("The gap between slot and gusset is {gap} on each side, more than {most}; the welds are to be enlarged "
                "by the gap (AWS D1.1, from memory, verify).", gap=(b_s - t_p) / 2, most=run.pair(SLOT_PLAY),
                when=not at_most((b_s - t_p) / 2, run.pair(SLOT_PLAY)))
    if x.slot_end == "closed":
        run.caution("The slots end at the gusset and the weld runs around its end, so that no section is reduced; the "
                    "drawings must say so. A slot cut longer than the gusset leaves the net section.", "Commentary D3")
        return part.given("A_{n}", units.AREA, m.A_g, run.cite("B4.3b"), "The slots are closed by the weld around the "
                          "end of the gusset; no section is reduced.")
    return part(hollow.net_area_of_slotted_hss, A_g=m.A_g, t=m.t, b_s=b_s, note="Two slots, one through each wall.")


def factor(x, run, part, m):
    """Return the shear lag factor by the edition, and the distance to the centroid it stands on."""
    new = run.edition == "22"
    if x.connection == SIDES:
        return _side_plates_2022(run, part, m) if new else _rectangular_2016(run, part, m, True)
    if m.is_round:
        return _round_2022(x, run, part, m) if new else _round_2016(run, part, m)
    return _rectangular_2022(x, run, part, m) if new else _rectangular_2016(run, part, m, False)


def _round_2022(x, run, part, m):
    t_p = x.gusset_thickness
    theta = part(hollow.half_arc_beside_gusset, D=m.H, t_p=t_p)
    x_bar = part(hollow.centroid_of_slotted_round_hss_2022, D=m.H, theta=theta, t_p=t_p,
                 note="R is taken as the outside radius; the legend of the table does not say which. Verify.")
    run.caution("The table does not say which radius R is; the outside radius D/2 is taken, which is the safer choice. "
                "From memory, verify.", "Table D3.1, case 5")
    _short_2022(run, m, "D")
    return part(shear_lag.shear_lag_factor_of_slotted_round_hss_2022, l=m.l_1, x_bar=x_bar), x_bar


def _rectangular_2022(x, run, part, m):
    b = part(hollow.width_beside_gusset, B=m.B, t_p=x.gusset_thickness)
    x_bar = part(hollow.centroid_of_slotted_rectangular_hss_2022, b=b, H=m.H, t=m.t)
    run.require(m.l_1 > x_bar, "weld_length", "{l} is no longer than the distance to the centroid of {x_bar}; "
                + run.cite("Table D3.1, case 5") + " gives no shear lag factor. Lengthen the welds", l=m.l_1,
                x_bar=x_bar)
    _short_2022(run, m, "H")
    return part(shear_lag.shear_lag_factor_of_slotted_rectangular_hss_2022, l=m.l_1, x_bar=x_bar), x_bar


def _side_plates_2022(run, part, m):
    _short_2022(run, m, "H")
    return part(shear_lag.shear_lag_factor_of_side_plates_2022, l=m.l_1, B=m.B, H=m.H,
                note="The sides count alike, whichever carries the plate."), 0.0


def _short_2022(run, m, symbol):
    run.caution("The welds of {l} are shorter than " + symbol + " of {H}; the 2022 edition covers this, earlier ones "
                "did not.", "Table D3.1", when=not at_least(m.l_1, m.H), l=m.l_1, H=m.H)


def _round_2016(run, part, m):
    _reach_2016(run, m, "case 5", "diameter")
    x_bar = part(hollow.centroid_of_round_hss_2016, D=m.H)
    if at_least(m.l_1, 1.3 * m.H):
        return part.given("U", units.NUMBER, 1.0, run.cite("Table D3.1, case 5"),
                          "The welds are at least 1.3 times the diameter long."), x_bar
    return part(shear_lag.shear_lag_factor_of_round_hss_2016, l=m.l_1, x_bar=x_bar), x_bar


def _rectangular_2016(run, part, m, sides):
    _reach_2016(run, m, "case 6", "side along the gusset")
    equation = hollow.centroid_of_rectangular_hss_with_side_plates_2016 if sides else \
        hollow.centroid_of_rectangular_hss_with_gusset_2016
    x_bar = part(equation, B=m.B, H=m.H)
    return part(shear_lag.shear_lag_factor_of_rectangular_hss_2016, l=m.l_1, x_bar=x_bar), x_bar


def _reach_2016(run, m, case, what):
    run.require(at_least(m.l_1, m.H), "weld_length", "{l} is shorter than the " + what + " of {H}; "
                + run.cite(f"Table D3.1, {case}") + " begins there. Lengthen the welds, or use the 2022 edition",
                l=m.l_1, H=m.H)
