"""Built-up tension member of two shapes or of plates: AISC 360 D2, D3 and D4, with spacing of connectors by J3.6."""

import numpy as np

from calclib import units
from calclib.equations.aisc360 import RUPTURE, YIELDING, built_up, members, shear_lag
from calclib.members import built_up_parts as layout
from calclib.members.built_up_parts import ALL, COVERS, FLANGES, PLATES, TIES
from calclib.members.built_up_rules import connectors, messages, slenderness, tie_plates
from calclib.members.built_up_sketch import sketch
from calclib.members.fatigue_check import FATIGUE, fatigue_block
from calclib.members.fields import Kind, Plot, multiples
from calclib.members.steel import refuse_stresses
from calclib.tables.shapes import SOURCE


def evaluate(x, run):
    """Order the equations of a built-up member; `x` holds one value for each field."""
    refuse_stresses(x, run)
    layout.refuse(x, run)
    p = layout.parts(x)
    A_1, A_end, A_g = _areas(x, run, p)

    part = run.block("gross yielding", "Tensile yielding in the gross section")
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=A_g)
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")

    A_n = _net_area(x, run, p, A_end)
    U = _shear_lag(x, run, p, A_1)

    part = run.block("rupture at the connection", "Tensile rupture at the end connection")
    A_e = part(members.effective_net_area, A_n=A_n, U=U)
    P_n = part(members.tensile_rupture_of_member, F_u=x.F_u, A_e=A_e)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D2(b)")

    A_s = _between(x, run, p, A_g)
    least = A_n if A_s is None else np.minimum(A_n, A_s) if run.arrays else min(A_n, A_s)
    fatigue_block(x, run, least, "net area of the member" + (
        "" if A_s is None else ", the smaller of that at the end connection and that between the ends"))
    slenderness(x, run, p, A_1)
    connectors(x, run, p)
    tie_plates(x, run)
    messages(x, run, p)


def _areas(x, run, p):
    """Return the gross area of one main part, of all parts at the ends, and of all parts between the ends."""
    part = run.block("areas", "Gross area of the parts")
    if x.arrangement == PLATES:
        A_1 = part(members.gross_area_of_plate, w=x.plate_width, t=x.plate_thickness, symbols={"A_g": "A_{1}"})
    else:
        A_1 = part.given("A_{1}", units.AREA, p.A, SOURCE, f"One {p.name}.")
    if x.held_by != COVERS:
        A_g = part(built_up.gross_area_of_equal_parts, n_1=p.n, A_1=A_1)
        return A_1, A_g, A_g
    A_c = part(members.gross_area_of_plate, w=x.plate_width, t=x.plate_thickness,
               symbols={"A_g": "A_{2}", "w": "w", "t": "t"}, note="One cover plate.")
    A_end = part(built_up.gross_area_of_parts, n_1=p.n, A_1=A_1, n_2=2, A_2=A_c, symbols={"A_g": r"A_{g,\mathrm{end}}"},
                 note="At the ends, where the cover plates have no perforation.")
    w_n = part(members.net_width_of_straight_chain, w=x.plate_width, n_h=1, d_e=x.perforation_width,
               symbols={"w_n": "w_{2}", "n_h": "n_{p}", "d_e": "w_{p}"}, note="Beside a perforation.")
    A_p = part(members.net_area_of_plate, w_n=w_n, t=x.plate_thickness, symbols={"A_n": "A_{2,p}", "w_n": "w_{2}"})
    A_g = part(built_up.gross_area_of_parts, n_1=p.n, A_1=A_1, n_2=2, A_2=A_p, symbols={"A_2": "A_{2,p}"},
               note="At a perforation.")
    if not run.arrays:
        run.note(f"Yielding takes the area at a perforation, {units.text(A_g, units.AREA, run.units)} instead of "
                 f"{units.text(A_end, units.AREA, run.units)}: perforations recur along the member and are no local "
                 "holes. D4 gives no rule for it.", "D4")
    return A_1, A_end, A_g


def _deduct(part, A_0, before, holes, d_e, index):
    """Deduct holes from an area, one kind after the other, and return the net area.

    holes : (number of parts, holes in each, thickness, symbol of the thickness, words), those without holes left out
    index : of the symbols, such as "" or ",s"
    """
    holes = [each for each in holes if np.any(each[1] > 0)]
    for i, (n, m, t, t_symbol, words) in enumerate(holes, 1):
        last = i == len(holes)
        n_h = part(built_up.holes_in_all_parts, n_1=n, m=m, note=words,
                   symbols={"n_1": "n", "m": f"m_{{{i}{index}}}", "n_h": f"n_{{h{i}{index}}}"})
        after = f"A_{{n{index}}}" if last else f"A_{{n{i}{index}}}"
        A_0 = part(members.net_area_after_holes, A_0=A_0, n_h=n_h, d_e=d_e, t=t,
                   symbols={"A_0": before, "n_h": f"n_{{h{i}{index}}}", "d_e": f"d_{{e{index}}}", "t": t_symbol,
                            "A_n": after})
        before = after
    return A_0


def _net_area(x, run, p, A_end):
    """Return the net area of all parts at the critical section of the end connection."""
    part = run.block("net area", "Net area at the end connection")
    if not np.any(x.holes + x.flange_holes + x.cover_holes > 0):
        return part.given("A_{n}", units.AREA, A_end, run.cite("B4.3b"), "Gross area: there are no holes.")
    d_e = part(members.width_of_hole_deducted, d_h=x.hole_diameter, Delta_h=run.pair(members.HOLE_ALLOWANCE),
               symbols={"d_e": "d_{e}"})
    plates = x.arrangement == PLATES
    return _deduct(part, A_end, r"A_{g,\mathrm{end}}" if x.held_by == COVERS else "A_{g}", (
        (p.n, x.holes, p.t_w, "t" if plates else "t_{w}" if p.d else "t_{L}",
         "In the plates." if plates else "In the webs." if p.d else "In the angles."),
        (p.n, x.flange_holes, p.t_f, "t_{f}", "In the flanges."),
        (2, x.cover_holes, x.plate_thickness, "t", "In the cover plates.")), d_e, "")


def _shear_lag(x, run, p, A_1):
    """Return the shear lag factor of the case that the engineer states."""
    part = run.block("shear lag", "Shear lag factor")
    if x.connected == ALL:
        return part.given("U", units.NUMBER, 1.0, run.cite("Table D3.1, case 1"),
                          "Every element of every part is connected, as stated.")
    x_bar = x.x_bar
    if x_bar is None:
        run.require(x.arrangement != PLATES and x.connected != FLANGES and x.held_by != COVERS, "x_bar",
                    "is empty and no table gives it for this case; give the distance from the gusset to the centroid "
                    "of one part")
        x_bar = part.given(r"\bar{x}", units.LENGTH, p.x_bar, SOURCE, "From the back of the shape.")
        run.note("The distance to the centroid is taken from the back of the shape, where the gusset is, {x_bar}; for "
                 "channels toe to toe with gussets inside the webs it is on the safe side.", "Table D3.1, case 2",
                 x_bar=p.x_bar)
    elif p.x_bar is not None and x.connected != FLANGES and x.held_by != COVERS:
        run.caution("The distance to the centroid is as entered, {own}; the table gives {table} from the back of the "
                    "shape.", "Table D3.1, case 2", when=x_bar != p.x_bar, own=x_bar, table=p.x_bar)
    run.require(x.connection_length > x_bar, "connection_length", "{l} is not more than the distance to the centroid "
                "of {x_bar}; " + run.cite("Table D3.1, case 2") + " gives no factor above 0. Use a longer connection",
                l=x.connection_length, x_bar=x_bar)
    open_shape = p.is_shape and x.held_by != COVERS
    U = part(shear_lag.shear_lag_factor, l=x.connection_length, x_bar=x_bar,
             symbols={"U": "U_{1}" if open_shape else "U"})
    if not open_shape:
        run.note("The ratio of connected to gross area, which D3 gives as a lower bound on U, holds for open shapes "
                 "only and is not used.", "D3")
        return U
    if x.connected == FLANGES:
        A_f = part(members.gross_area_of_plate, w=p.b_f, t=p.t_f, symbols={"A_g": "A_{f}", "w": "b_{f}", "t": "t_{f}"})
        A_c = part(built_up.gross_area_of_equal_parts, n_1=2, A_1=A_f,
                   symbols={"A_g": "A_{c}", "n_1": "n_{f}", "A_1": "A_{f}"}, note="The flanges of one channel.")
    else:
        A_c = part(members.gross_area_of_plate, w=p.d or p.leg, t=p.t_w, note=f"The connected element of one {p.name}.",
                   symbols={"A_g": "A_{c}", "w": "d" if p.d else r"b_{L}", "t": "t_{w}" if p.d else "t_{L}"})
    U_2 = part(shear_lag.shear_lag_factor_by_area, A_c=A_c, A_g=A_1, symbols={"U": "U_{2}", "A_g": "A_{1}"})
    return part(shear_lag.larger_shear_lag_factor, U_1=U, U_2=U_2)


def _between(x, run, p, A_g):
    """Close the block of rupture between the ends and return its net area, or None where it does not apply."""
    part = run.block("rupture between the ends", "Tensile rupture between the end connections")
    bolted, covers = np.any(x.connector_holes > 0), x.held_by == COVERS
    if not bolted and not covers:
        part.not_applicable("The parts have neither connector holes nor perforations between the end connections.")
        return None
    A_n, symbol = A_g, "A_{g}"
    if bolted:
        d_e = part(members.width_of_hole_deducted, d_h=x.connector_hole, Delta_h=run.pair(members.HOLE_ALLOWANCE),
                   symbols={"d_h": "d_{h,s}", "d_e": "d_{e,s}"})
        at_flanges, plates = x.held_by in (TIES, COVERS), x.arrangement == PLATES
        A_n = _deduct(part, A_g, "A_{g}", (
            (p.n, x.connector_holes, p.t_f if at_flanges else p.t_w,
             "t_{f}" if at_flanges else "t" if plates else "t_{w}" if p.d else "t_{L}", "Connectors in the parts."),
            (2, x.connector_holes * covers, x.plate_thickness, "t", "Connectors in the cover plates."),
        ), d_e, ",s")
        symbol = "A_{n,s}"
    P_n = part(members.tensile_rupture_of_member, F_u=x.F_u, A_e=A_n, symbols={"A_e": symbol},
               note="All elements carry their share between the ends, U = 1.")
    part.limit_state(RUPTURE, P_n, "P_{n}", "D2(b)")
    if run.arrays:            # without holes the limit state does not apply, and has no point on the curve
        part.available = np.where(covers | (x.connector_holes > 0), part.available, np.nan)
    if covers and bolted:
        run.note("Connector holes and perforation are deducted in one section, though they may lie apart.", "B4.3b")
    return A_n


def _numbers_of_holes(x):
    """Return numbers of holes in each part from none to four more than at present, at the present diameter."""
    return {"holes": np.arange(0.0, x.holes + 5)}


PLOTS = (
    Plot("holes", _numbers_of_holes, discrete=True, applies=lambda x: x.hole_diameter is not None,
         sizes=lambda x: [(n, f"{n:g}") for n in _numbers_of_holes(x)["holes"]]),
    Plot("hole_diameter", multiples("hole_diameter", 0.6, 1.8), applies=lambda x: x.hole_diameter is not None),
    Plot("connection_length", multiples("connection_length", 0.2, 1.8), applies=lambda x: x.connected != ALL),
    Plot("plate_thickness", multiples("plate_thickness", 0.4, 1.8),
         applies=lambda x: x.arrangement == PLATES or x.held_by == COVERS),
    Plot("F_y", multiples("F_y", 0.6, 1.25)),
)

KIND = Kind(
    name="built_up",
    title="Built-up tension member",
    scope="Strength of a tension member of two channels, two angles, or two to four equal plates by AISC 360 D2 and "
          "D3, and what holds its parts together by D4: bolts or intermittent welds, tie plates, or two perforated "
          "cover plates. Not covered: bolts, welds, block shear and gusset of the end connection; lacing; strength of "
          "the connectors between the ends.",
    fields=(*layout.FIELDS, *FATIGUE), evaluate=evaluate, sketch=sketch, plots=PLOTS)
