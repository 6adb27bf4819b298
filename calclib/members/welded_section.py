"""A plate or open shape at its welded end: area, welded element, distance to the centroid, what stands on it."""

from dataclasses import dataclass

from calclib import units
from calclib.equations.aisc360 import members, shear_lag, weld_groups
from calclib.errors import EntryError
from calclib.members.weld_layout import scale
from calclib.tables import shapes
from calclib.tolerance import at_most

SINGLE, DOUBLE = "one face", "both faces, a gusset on each"
FLANGES, FLANGE, WEB, LONG_LEG, SHORT_LEG = "both flanges", "flange", "web", "long leg", "short leg"
I_SHAPES, CHANNELS, TEES = ("W", "M", "S", "HP"), ("C", "MC"), ("WT", "MT", "ST")
WELDED = {**dict.fromkeys(I_SHAPES, (FLANGES, WEB)), **dict.fromkeys(CHANNELS, (WEB,)),
          **dict.fromkeys(TEES, (FLANGE,)), "L": (LONG_LEG, SHORT_LEG), "2L": (LONG_LEG, SHORT_LEG)}


@dataclass(frozen=True)
class Welded:
    """The member at its connection. Lengths and areas in the unit of the calc."""

    A_g: float
    r: float | None               # least radius of gyration
    x_bar: float
    elements: int                 # welded elements: two flanges, two angles
    faces: int                    # faces with welds on them
    gussets: int
    b: float                      # width of one welded element
    t: float                      # its thickness
    w: float                      # width between the welds
    l_1: float                    # lengths of the longitudinal welds; of a transverse weld alone, the lap
    l_2: float
    roots: tuple                  # (number, thickness, name) of what stands on the welded elements; () for a plate
    is_open: bool

    @property
    def inside(self):
        """Whether the welds lie inside the element, away from its edges."""
        return not at_most(self.b, self.w)


def section(x, run):
    """Record the section and its welded element, and return them."""
    part = run.block("section", "Section and welded element")
    if x.section is None:
        b, t = x.plate_width, x.plate_thickness
        A_g = part(members.gross_area_of_plate, w=b, t=t, symbols={"w": "b"})
        double = x.plate_lap == DOUBLE
        if double:
            x_bar = part.given(r"\bar{x}", units.LENGTH, 0.0, "Table D3.1", "A gusset on each face: the connection is "
                               "symmetrical about the plate.")
        else:
            x_bar = part(shear_lag.centroid_of_lapped_plate, t=t,
                         note="One gusset on one face: taken as half the thickness; many calcs take 0.")
        r = part(weld_groups.radius_of_gyration_of_plate, t=t)
        shape = dict(A_g=A_g, r=r, x_bar=x_bar, elements=1, faces=1 + double, gussets=1 + double, b=b, t=t, roots=(),
                     is_open=False)
    else:
        shape = _shape(x, run, part)
    b = shape["b"]
    w = b if x.weld_spacing is None else x.weld_spacing
    run.require(at_most(w, b), "weld_spacing", "{w} is more than the width of the welded element of {b}; the welds lie "
                "on it or along its edges", w=w, b=b)
    part.given("w", units.LENGTH, w, "input" if x.weld_spacing is not None else "Table D3.1",
               "Width between the welds" + ("." if x.weld_spacing is not None else ": width of the welded element."))
    return Welded(**shape, w=w, l_1=x.weld_length_1,
                  l_2=x.weld_length_1 if x.weld_length_2 is None else x.weld_length_2)


def _shape(x, run, part):
    """Return what the table of shapes says of the section and its welded element, each value with its place."""
    s, k = x.section, scale(run)
    place = shapes.SOURCE

    def table(symbol, dimension, value, note=""):
        power = {units.LENGTH: 1, units.AREA: 2, units.VOLUME: 3}[dimension]
        return part.given(symbol, dimension, value * k ** power, place, note)

    A_g = table("A_{g}", units.AREA, s.A, f"{s.name}.")
    run.note(f"The values of {s.name} are those of the inch table, converted with 25.4 mm to the inch.",
             when=k != 1.0)
    radii = {"r_{x}": s.r_x, "r_{y}": s.r_y, "r_{z}": s.r_z if s.family == "L" else None}
    symbol, least = min(((name, value) for name, value in radii.items() if value), key=lambda each: each[1])
    r = table(symbol, units.LENGTH, least, "Least radius of gyration.")
    element, one = x.welded_element, dict(elements=1, faces=1, gussets=1)
    if s.family in ("L", "2L"):
        long = element == LONG_LEG
        if s.family == "2L":
            backs = {"long legs": LONG_LEG, "short legs": SHORT_LEG}.get(s.backs, element)
            if backs != element:
                raise EntryError("welded_element", f"the {s.backs} of {s.name} are back to back and touch the gusset; "
                                                   f'choose "{backs}"')
            one = dict(elements=2, faces=2, gussets=1)
        b = table("b", units.LENGTH, s.leg_long if long else s.leg_short, f"Welded {element}.")
        t = table("t", units.LENGTH, s.t, "Thickness of the angle.")
        distance = s.x if s.family == "2L" or long else s.y
        x_bar = table(r"\bar{x}", units.LENGTH, distance, "From the back of the welded leg"
                      + (", of one angle." if s.family == "2L" else "."))
        return dict(A_g=A_g, r=r, x_bar=x_bar, b=b, t=t, roots=(one["elements"], t, "outstanding leg"), is_open=True,
                    **one)
    if element == FLANGE:
        b = table("b_{f}", units.LENGTH, s.b_f, "Welded flange.")
        t = table("t_{f}", units.LENGTH, s.t_f, "Thickness of the flange.")
        x_bar = table(r"\bar{x}", units.LENGTH, s.y, "From the outer face of the flange.")
        return dict(A_g=A_g, r=r, x_bar=x_bar, b=b, t=t, roots=(1, s.t_w * k, "stem"), is_open=True, **one)
    d = table("d", units.LENGTH, s.d, "Depth.")
    if element == FLANGES:
        b = table("b_{f}", units.LENGTH, s.b_f, "Welded flanges.")
        t = table("t_{f}", units.LENGTH, s.t_f, "Thickness of a flange.")
        Z_x = table("Z_{x}", units.VOLUME, s.Z_x)
        x_bar = part(shear_lag.centroid_from_connected_flange, d=d, Z_x=Z_x, A_g=A_g,
                     note="The section is taken as two tees.")
        return dict(A_g=A_g, r=r, x_bar=x_bar, b=b, t=t, roots=(2, s.t_w * k, "web"), is_open=True, elements=2,
                    faces=2, gussets=2)
    t = table("t_{w}", units.LENGTH, s.t_w, "Thickness of the welded web.")
    t_f = table("t_{f}", units.LENGTH, s.t_f, "Thickness of a flange.")
    if s.family in CHANNELS:
        x_bar = table(r"\bar{x}", units.LENGTH, s.x, "From the back of the welded web.")
        return dict(A_g=A_g, r=r, x_bar=x_bar, b=d, t=t, roots=(2, t_f, "flange"), is_open=True, **one)
    Z_y = table("Z_{y}", units.VOLUME, s.Z_y)
    x_bar = part(shear_lag.centroid_from_connected_web, Z_y=Z_y, A_g=A_g, note="The section is taken as two channels.")
    b = part(weld_groups.clear_depth_of_web, d=d, t_f=t_f)
    run.require(x.weld_spacing is not None, "weld_spacing", "is empty and the web of a rolled shape is welded; give "
                "the distance between the welds on the web, at most the flat depth of {T}", T=s.T * k if s.T else b)
    if s.T:
        run.require(at_most(x.weld_spacing, s.T * k), "weld_spacing", "{w} is more than the flat depth of the web of "
                    "{T}; the gusset does not lie flat on the web. Place the welds closer", w=x.weld_spacing, T=s.T * k)
    return dict(A_g=A_g, r=r, x_bar=x_bar, b=b, t=t, roots=(2, t_f, "flange"), is_open=True, **one)
