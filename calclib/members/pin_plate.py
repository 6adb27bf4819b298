"""Pin-connected plate: AISC 360 D5, with bearing on the pin by J7."""

from math import cos, pi, sin, sqrt

import numpy as np

from calclib import units
from calclib.drawing import Arrow, BreakLine, Circle, Dimension, Drawing, FailurePath, Leader, Named, Outline
from calclib.equations.aisc360 import RUPTURE, YIELDING, members, pins
from calclib.members.fields import NO, YES, Field, Kind, Plot, multiples
from calclib.members.steel import refuse_stresses
from calclib.tolerance import at_least, at_most

CLEARANCE = {"US": (1 / 32, 1 / 16), "SI": (1.0, 2.0)}   # D5.1(b), D5.2(b): printed as pairs, in and mm
LARGE_PIN = {"US": 3.0, "SI": 75.0}                      # D5.2(b), 2022: larger clearance from this pin diameter
CENTRING = {"US": 1 / 16, "SI": 2.0}                     # common practice: how far a hole may be from midway

FIELDS = (
    Field("steel", "Plate steel", "Plate", "Standard and grade of the plate, such as ASTM A572 Grade 50."),
    Field("F_y", "Plate yield stress", "Plate", "Specified minimum yield stress of the plate.", "F_y", units.STRESS,
          above=0),
    Field("F_u", "Plate tensile strength", "Plate", "Specified minimum tensile strength of the plate.", "F_u",
          units.STRESS, above=0),
    Field("plate_thickness", "Plate thickness", "Plate", "Thickness of the plate at the pin.", "t", units.LENGTH,
          above=0),
    Field("plate_width", "Plate width", "Plate", "Width of the plate across the force.", "w", units.LENGTH, above=0),
    Field("pin_diameter", "Pin diameter", "Pin and hole", "Diameter of the pin.", "d", units.LENGTH, above=0),
    Field("pin_F_y", "Pin yield stress", "Pin and hole", "Specified minimum yield stress of the pin.", "F_{y,pin}",
          units.STRESS, above=0),
    Field("hole_diameter", "Hole diameter", "Pin and hole", "Diameter of the pin hole.", "d_h", units.LENGTH, above=0),
    Field("hole_made_by", "Hole made by", "Pin and hole", "How the hole is made.",
          choices=("drilled", "reamed", "bored", "thermal cut, finished", "thermal cut, not finished"),
          default="drilled"),
    Field("movement", "Movement at pin", "Pin and hole",
          "Whether the pin must allow relative movement between connected parts under full load.", choices=(YES, NO),
          default=YES),
    Field("end_distance", "End distance", "Pin and hole",
          "From the edge of the hole, not its centre, to the end of the plate along the force.", "a", units.LENGTH,
          above=0),
    Field("side_distance", "Side distance", "Pin and hole",
          "From the edge of the hole to one edge of the plate; blank for a centred hole.", "b_1", units.LENGTH,
          optional=True, above=0),
    Field("corner_distance", "Corner distance", "Pin and hole",
          "From the edge of the hole to the 45 degree corner cut, square to the cut; blank for square corners.", "c",
          units.LENGTH, optional=True, above=0),
)


def evaluate(x, run):
    """Order the equations of a pin-connected plate; `x` holds one value for each field."""
    t, w, d, d_h, a = x.plate_thickness, x.plate_width, x.pin_diameter, x.hole_diameter, x.end_distance
    clearance = d_h - d
    _refuse(x, run, clearance)

    part = run.block("geometry", "Effective width at the pin")
    if x.side_distance is None:
        b = part(pins.centred_side_distance, w=w, d_h=d_h)
        sides = (b, b)
    else:
        other = part(pins.opposite_side_distance, w=w, d_h=d_h, b_1=x.side_distance)
        b = part(pins.smaller_side_distance, b_1=x.side_distance, b_2=other)
        sides = (x.side_distance, other)
    b_e1 = part(pins.effective_width_by_thickness, t=t, Delta_be=run.pair(pins.EFFECTIVE_WIDTH_ALLOWANCE))
    b_e = part(pins.effective_width, b_e1=b_e1, b=b)
    run.note("The effective width is limited by the edge of the plate: {b} instead of {b_e1}.", "D5.1(a)",
             when=b < b_e1, b=b, b_e1=b_e1)

    part = run.block("tensile rupture", "Tensile rupture on the effective net area")
    P_n = part(pins.tensile_rupture, F_u=x.F_u, t=t, b_e=b_e)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D5.1(a)")

    part = run.block("shear rupture", "Shear rupture behind the pin")
    A_sf = part(pins.shear_area_at_pin, t=t, a=a, d=d)
    if run.edition == "22":
        small, large = run.pair(CLEARANCE)
        C_r = part.choose("C_{r}", units.NUMBER, [
            (at_most(clearance, small), 1.0, _clearance_words(run, "at most", small)),
            (at_most(clearance, large), 0.95, _clearance_words(run, "above", small)),
        ], run.cite("D5.1(b)"))
        P_n = part(pins.shear_rupture_with_hole_factor, F_u=x.F_u, C_r=C_r, A_sf=A_sf)
    else:
        P_n = part(pins.shear_rupture, F_u=x.F_u, A_sf=A_sf)
    part.limit_state(RUPTURE, P_n, "P_{n}", "D5.1(b)")

    part = run.block("pin bearing", "Bearing on the pin")
    A_pb = part(pins.projected_bearing_area, d=d, t=t)
    F_y = part(pins.weaker_yield_stress, F_y=x.F_y, F_yp=x.pin_F_y)
    R_n = part(pins.pin_bearing, F_y=F_y, A_pb=A_pb, symbols={"F_y": r"F_{y,\mathrm{min}}"})
    part.limit_state(RUPTURE, R_n, "R_{n}", "J7(a)")
    run.note("Bearing takes the yield stress of the weaker of plate and pin. That the weaker part counts is common "
             "practice.", "J7(a)")

    part = run.block("gross yielding", "Tensile yielding in the gross section")
    A_g = part(members.gross_area_of_plate, w=w, t=t)
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=A_g)
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")

    part = run.block("dimensions", "Dimensions by D5.2")
    a_min = part(pins.least_end_distance, b_e=b_e)
    w_min = part(pins.least_width, b_e=b_e, d=d)
    w_min_uncapped = part(pins.least_width, b_e=b_e1, d=d, symbols={"b_e": "b_{e,1}", "w_min": r"w_{\mathrm{min},1}"},
                          note="With the effective width before the limit by the edge, as advice only.")
    _rules(x, run, clearance, sides, a_min, w_min, w_min_uncapped)
    _messages(x, run, clearance)


def _length(run, value):
    return units.text(value, units.LENGTH, run.units)


def _clearance_words(run, relation, limit):
    return "" if run.arrays else f"Hole and pin differ by {relation} {_length(run, limit)}."


def _refuse(x, run, clearance):
    """Refuse what has no number: impossible geometry, or a hole outside the clause."""
    d, d_h, w = x.pin_diameter, x.hole_diameter, x.plate_width
    small, large = run.pair(CLEARANCE)
    limit = large if run.edition == "22" else small
    refuse_stresses(x, run, ("F_y", "pin_F_y"))
    run.require(at_least(d_h, d), "hole_diameter", "{d_h} is smaller than the pin of {d}; the pin does not enter. "
                "Enlarge the hole or use a smaller pin", d_h=d_h, d=d)
    run.require(d_h < w, "hole_diameter", "{d_h} is not smaller than the plate of {w}; no plate is left beside the "
                "hole. Use a wider plate or a smaller pin", d_h=d_h, w=w)
    if x.side_distance is not None:
        run.require(x.side_distance + d_h < w, "side_distance", "hole and side distance of {b} reach beyond the edge "
                    "of the plate of {w}; give a smaller side distance or a wider plate", b=x.side_distance, w=w)
    run.require(at_most(clearance, limit), "hole_diameter",
                "{d_h} is {clearance} larger than the pin; " + run.cite({"22": "D5.1(b)", "16": "D5.2(b)"})
                + " covers up to {limit}. "
                "Ream and bush the hole, or use a larger pin", d_h=d_h, clearance=clearance, limit=limit)


def _rules(x, run, clearance, sides, a_min, w_min, w_min_uncapped):
    """The detailing rules of D5.2, each with required and provided."""
    small, large = run.pair(CLEARANCE)
    wide = run.edition == "22" and bool(np.all(at_least(x.pin_diameter, run.pair(LARGE_PIN))))
    allowed = large if wide else small
    off = abs(sides[0] - sides[1])
    run.rule("hole midway", "Hole midway across the width", "D5.2(a)", at_most(off, run.pair(CENTRING)),
             "sides equal within {tolerance}", "sides {b1} and {b2}",
             remark="the hole is off the centre line of the plate; relocate it or widen the plate on the short side.",
             tolerance=run.pair(CENTRING), b1=sides[0], b2=sides[1])
    run.rule("clearance", "Clearance of hole and pin", "D5.2(b)", at_most(clearance, allowed),
             "at most {allowed}", "{clearance}", applies=x.movement == YES,
             remark="use a hole of at most {largest}.", reason="no relative movement is expected at the pin",
             allowed=allowed, clearance=clearance, largest=x.pin_diameter + allowed)
    run.rule("width", "Width at the pin", "D5.2(c)", at_least(x.plate_width, w_min), "w at least {w_min}",
             "{w}", remark="widen the plate.", w_min=w_min, w=x.plate_width)
    run.rule("width before the limit", "Width at the pin, before the limit by the edge", "D5.2(c)",
             at_least(x.plate_width, w_min_uncapped), "w at least {w_min}, as advice", "{w}", severity="caution",
             remark="the plate is narrower than the full effective width would use; the limited width is used "
                    "throughout.", w_min=w_min_uncapped, w=x.plate_width)
    run.rule("end distance", "End distance", "D5.2(c)", at_least(x.end_distance, a_min), "a at least {a_min}",
             "{a}", remark="lengthen the end.", a_min=a_min, a=x.end_distance)
    cut = x.corner_distance is not None
    run.rule("corner cut", "Corner cut at 45 degrees", "D5.2(d)",
             not cut or at_least(x.corner_distance, x.end_distance), "c at least a = {a}",
             "{c}" if cut else "square corners", applies=cut, reason="the corners are square",
             remark="cut less off the corners.", a=x.end_distance, c=x.corner_distance if cut else "")


def _messages(x, run, clearance):
    run.caution("The hole is thermally cut and not finished; J7(a) speaks of reamed, drilled, bored or finished "
                "surfaces. Ream or bore the hole.", "J7(a)", when=x.hole_made_by == "thermal cut, not finished")
    run.caution("F_u / F_y is below 1.1; the ductility that the clause counts on is small.",
                when=not run.arrays and x.F_u < 1.1 * x.F_y)
    run.caution("Hole and pin have the same diameter; without clearance the pin may not enter.",
                when=not run.arrays and abs(clearance) < 1e-12)
    run.caution("Where live load varies so much that the pin wears in its hole, a pin connection is not recommended.",
                "Commentary D5")
    run.assume("The pin itself (shear, bending) and the parts that hold it are not part of this calc.")
    run.assume("The force acts in the plane of the plate and through the centre of the pin.")
    run.assume("Yield stress and tensile strength are specified minimum values, not those of a mill certificate.",
               "A3")
    run.assume("Fatigue is not evaluated; Appendix 3 applies above 20 000 cycles of stress.", "Appendix 3")
    run.assume("A lifting lug lies outside D5 and needs a lifting standard with its own design factors.", "D5")


def sketch(x, calc):
    """Return elevation and side view of the plate to scale, with the path of the governing limit state.

    The centre of the hole is the origin; the plate pulls down and the pin holds it up.
    """
    def named(symbol, value):
        return Named(symbol, units.text(value, units.LENGTH, x.units))

    r, a, w, t = x.hole_diameter / 2, x.end_distance, x.plate_width, x.plate_thickness
    b_1 = (w - 2 * r) / 2 if x.side_distance is None else x.side_distance
    left, right, top, bottom = -r - b_1, w - r - b_1, r + a, -r - max(w, 2 * a) * 0.75
    side = right + max(0.8 * w, 3 * t)          # left face of the side view
    parts = [
        Outline([(left, bottom), *_end(left, right, top, r, x.corner_distance), (right, bottom)], closed=False),
        BreakLine((left, bottom), (right, bottom)),
        Circle((0, 0), 2 * r, cross=True), Circle((0, 0), x.pin_diameter, weight="thin"),
        Outline([(side, bottom), (side, top), (side + t, top), (side + t, bottom)], closed=False),
        BreakLine((side, bottom), (side + t, bottom)),
        *(Outline([(side, y), (side + t, y)], closed=False, weight="hidden") for y in (-r, r)),
        Arrow((0, bottom), (0, -2), Named(calc.run.required_symbol.replace("{", "").replace("}", ""),
                                        units.text(calc.run.required, units.FORCE, x.units))),
        Dimension((left, top), (right, top), 2, named("w", w), "horizontal"),
        Dimension((left, 0), (-r, 0), -1, named("b" if x.side_distance is None else "b_1", b_1), "horizontal",
                  beyond=(0, bottom * 0.62)),
        Dimension((right, 0), (r, 0), -1, named("b" if x.side_distance is None else "b_2", right - r), "horizontal",
                  beyond=(0, bottom * 0.62)),
        Dimension((0, r), (0, top), 1, named("a", a), "vertical", beyond=(right, 0)),
        Dimension((side, top), (side + t, top), 1, named("t", t), "horizontal"),
        Leader((-r * cos(pi / 4), -r * sin(pi / 4)), (-3.2, -2.2), named("d_h", 2 * r)),
        Leader((x.pin_diameter / 2 * cos(pi / 4), -x.pin_diameter / 2 * sin(pi / 4)), (2.6, -2.6),
               named("d", x.pin_diameter)),
    ]
    if x.corner_distance is not None:
        edge, cut = r / sqrt(2), (r + x.corner_distance) / sqrt(2)
        parts.append(Dimension((-edge, edge), (-cut, cut), 0, named("c", x.corner_distance)))
    parts += _failure_path(x, calc, r, left, right, top, bottom)
    return Drawing(parts, title="Elevation and side view", unit="in" if x.units == "US" else "mm")


def _end(left, right, top, r, c):
    """Return the points of the plate's end from left to right, with 45 degree cuts where they meet the plate."""
    if c is None:
        return [(left, top), (right, top)]
    reach = sqrt(2) * (r + c)                    # a cut is the line |x| + y = reach
    points = []
    for edge, sign in ((left, -1), (right, 1)):
        cuts = abs(edge) + top > reach
        corner = [(edge, reach - abs(edge)), (sign * (reach - top), top)] if cuts else [(edge, top)]
        points += corner if sign < 0 else corner[::-1]
    return points


def _failure_path(x, calc, r, left, right, top, bottom):
    """Return the path along which the plate gives way in the governing limit state."""
    key, d = calc.governing.key, x.pin_diameter
    b_e = calc["geometry"].steps[-1].result
    if key == "tensile rupture":
        lines = [[(-r - b_e, 0), (-r, 0)], [(r, 0), (r + b_e, 0)]]
    elif key == "shear rupture":
        rise = sqrt(max(r ** 2 - (d / 2) ** 2, 0))
        lines = [[(-d / 2, rise), (-d / 2, top)], [(d / 2, rise), (d / 2, top)]]
    elif key == "pin bearing":
        lines = [[(r * cos(pi * i / 24), r * sin(pi * i / 24)) for i in range(3, 22)]]
    else:
        lines = [[(left, bottom * 0.85), (right, bottom * 0.85)]]
    return [FailurePath(line, calc.governing.title.lower() if line is lines[0] else "") for line in lines]


def _hole_range(x):
    """Return hole diameters from the pin's own to somewhat beyond the largest that the clause covers."""
    large = CLEARANCE[x.units][1]
    return {"hole_diameter": np.linspace(x.pin_diameter, x.pin_diameter + 1.5 * large, 199)}


def _width_range(x):
    """Return plate widths, and with them edge distances, from little beside the hole to half as wide again."""
    least = x.hole_diameter + (0 if x.side_distance is None else x.side_distance)
    return {"plate_width": np.linspace(least + 0.1 * (x.plate_width - least), 1.5 * x.plate_width, 200)}


PLOTS = (
    Plot("hole_diameter", _hole_range),
    Plot("end_distance", multiples("end_distance", 0.4, 1.7)),
    Plot("plate_width", _width_range),
    Plot("plate_thickness", multiples("plate_thickness", 0.4, 1.8)),
)

KIND = Kind(
    name="pin_plate",
    title="Pin-connected plate",
    scope="Strength of a pin-connected plate in tension and its detailing by AISC 360 section D5, with bearing on the "
          "pin by J7. Not covered: the pin itself, cheek plates, fatigue, lifting lugs.",
    fields=FIELDS, evaluate=evaluate, sketch=sketch, plots=PLOTS)
