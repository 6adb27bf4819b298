"""What holds the parts of a built-up member together: slenderness, spacing of connectors, tie plates, cover plates."""

from calclib import units
from calclib.equations.aisc360 import bearing, built_up, members
from calclib.members.built_up_parts import (
    ALL,
    ANGLES,
    CHANNELS,
    COVERS,
    END_BOLTS,
    PLATES,
    TIES,
    TOES,
    WEATHERING,
    unused,
)
from calclib.tables.shapes import SOURCE
from calclib.tolerance import at_least, at_most

SLENDER = 300.0                                  # D1, D4: as advice
RADIUS = {"US": 1.5, "SI": 38.0}                 # E6.2, perforations: printed as a pair, in and mm
D4 = {"22": "D4", "16": "D4 (from memory, verify)"}
PERFORATIONS = {"22": "E6.2", "16": "E6.2 (from memory, verify)"}
CONTACT = {"22": "J3.6, D4", "16": "J3.5, D4"}


def slenderness(x, run, p, A_1):
    """Close the block of radii of gyration, and add what the standard advises on slenderness."""
    part = run.block("slenderness", "Radii of gyration and slenderness")
    if x.arrangement == PLATES:
        r_x = part(built_up.radius_of_gyration_of_stack, n_1=p.n, t=x.plate_thickness, symbols={"r": "r_{x}"})
        r_y = part(built_up.radius_of_gyration_of_rectangle, h=x.plate_width, symbols={"r": "r_{y}", "h": "w"})
        r_i = part(built_up.radius_of_gyration_of_rectangle, h=x.plate_thickness, symbols={"r": "r_{i}", "h": "t"},
                   note="Of one plate.")
    else:
        r_x, r_y, r_i = _radii_of_shapes(x, part, p, A_1)
    r = part(built_up.least_radius_of_gyration, r_x=r_x, r_y=r_y)
    run.note("Radii of gyration take the parts to act as one about both axes; they serve the advice on slenderness "
             "only.", "D1")
    lam = None
    if x.length is not None:
        lam = part(members.slenderness, L=x.length, r=r, symbols={"r": r"r_{\mathrm{min}}"})
    run.rule("member slenderness", "Slenderness of the member", "D1", lam is not None and at_most(lam, SLENDER),
             "L/r at most 300, as advice", "{lam}" if lam is not None else "not given", severity="caution",
             remark="the member is slender; it may sag and vibrate in handling and in service.",
             applies=lam is not None, reason="no length of the member is given",
             lam=(lam, units.NUMBER) if lam is not None else "")
    _component(x, run, part, r_i, "component slenderness", "Slenderness of one part between connectors", "r_{i}")
    covers = x.held_by == COVERS
    if covers:
        r_c = part(built_up.radius_of_gyration_of_rectangle, h=x.plate_thickness, symbols={"r": "r_{i,2}", "h": "t"},
                   note="Of one cover plate.")
        _component(x, run, part, r_c, "cover plate slenderness", "Slenderness of a cover plate between connectors",
                   "r_{i,2}")


def _radii_of_shapes(x, part, p, A_1):
    """Return the radii of gyration of the member about both axes, and the least of one shape."""
    x_bar = part.given(r"x_{1}", units.LENGTH, p.x_bar, SOURCE, "From the back of one shape to its centroid.")
    r_across = part.given("r_{1,y}", units.LENGTH, p.r_across, SOURCE, "Of one shape, about its axis along the back.")
    r_along = part.given("r_{1,x}", units.LENGTH, p.r_along, SOURCE, "Of one shape, about the axis square to the back.")
    if x.arrangement == TOES:
        e_1 = part(built_up.offset_toe_to_toe, B=x.back_to_back, x_bar=x_bar, symbols={"x_bar": "x_{1}"})
    else:
        e_1 = part(built_up.offset_back_to_back, s=x.back_to_back, x_bar=x_bar, symbols={"x_bar": "x_{1}"})
    r_i = part.given("r_{i}", units.LENGTH, p.r_i, SOURCE, "Least, of one shape.")
    if x.held_by != COVERS:
        r_y = part(built_up.radius_of_gyration_of_pair, r_1=r_across, e_1=e_1,
                   symbols={"r": "r_{y}", "r_1": "r_{1,y}"}, note="About the axis between the shapes, along the backs.")
        return r_along, r_y, r_i
    w, t, w_p = x.plate_width, x.plate_thickness, x.perforation_width
    A_2 = (w - w_p) * t
    plate_y = part(built_up.radius_of_gyration_of_perforated_plate, w=w, w_p=w_p, symbols={"r": "r_{2,y}"})
    names = {"n_1": "n_{1}", "n_2": "n_{2}", "A_1": "A_{1}", "A_2": "A_{2,p}"}
    r_y = part(built_up.radius_of_gyration_with_cover_plates, n_1=p.n, A_1=A_1, r_1=r_across, e_1=e_1, n_2=2, A_2=A_2,
               r_2=plate_y, e_2=0.0, note="At a perforation, about the axis along the backs.",
               symbols={**names, "r": "r_{y}", "r_1": "r_{1,y}", "r_2": "r_{2,y}", "e_2": "e_{2,y}"})
    plate_x = part(built_up.radius_of_gyration_of_rectangle, h=t, symbols={"r": "r_{2,x}", "h": "t"})
    e_2 = part(built_up.offset_of_cover_plate, d=p.d, t=t)
    r_x = part(built_up.radius_of_gyration_with_cover_plates, n_1=p.n, A_1=A_1, r_1=r_along, e_1=0.0, n_2=2, A_2=A_2,
               r_2=plate_x, e_2=e_2, note="At a perforation, about the axis square to the backs.",
               symbols={**names, "r": "r_{x}", "r_1": "r_{1,x}", "r_2": "r_{2,x}", "e_1": "e_{1,x}"})
    return r_x, r_y, r_i


def _component(x, run, part, r_i, key, title, symbol):
    """Add the advice on the slenderness of one part between connectors."""
    a_max = part(built_up.preferred_length_between_connectors, r_i=r_i,
                 symbols={"r_i": symbol, "a_max": symbol.replace("r_{i", r"a_{\mathrm{max}")})
    run.rule(key, title, D4, at_most(x.connector_spacing, a_max), "a at most 300 times the least radius of gyration, "
             "{a_max}, as advice", "{a}", severity="caution", remark="place connectors closer together.", a_max=a_max,
             a=x.connector_spacing)


def connectors(x, run, p):
    """Close the block of the spacing of connectors of parts in contact."""
    part = run.block("spacing of connectors", "Spacing of connectors of parts in contact")
    covers = x.held_by == COVERS
    if x.arrangement != PLATES and not covers:
        reason = ("tie plates hold the parts apart" if x.held_by == TIES else
                  "the clause speaks of a plate with a plate or a shape, and the parts are two shapes")
        part.left_out(f"{reason[0].upper()}{reason[1:]}.")
        run.rule("spacing of connectors", "Spacing of connectors in contact", CONTACT, False, "", "", applies=False,
                 reason=reason)
        return
    t = x.plate_thickness
    if covers:
        t = part(built_up.thinner_of_two_parts, t_1=p.t_f, t_2=t, symbols={"t_1": "t_{f}", "t_2": "t"})
    symbols = {"t": r"t_{\mathrm{min}}"} if covers else {}
    if x.exposure == WEATHERING:
        s_max = part(bearing.greatest_spacing_when_weathering, t=t, symbols=symbols,
                     s_max0=run.pair(bearing.GREATEST_SPACING_WEATHERING))
    else:
        s_max = part(bearing.greatest_spacing, t=t, s_max0=run.pair(bearing.GREATEST_SPACING), symbols=symbols)
    run.rule("spacing of connectors", "Spacing of connectors in contact", CONTACT,
             at_most(x.connector_spacing, s_max), f"at most {{s_max}}, {x.exposure}", "{a}",
             remark="Place connectors closer together.", s_max=s_max, a=x.connector_spacing)


def tie_plates(x, run):
    """Close the block of tie plates, and add the rules and the guidance of D4 for open sides."""
    part = run.block("tie plates", "Tie plates")
    ties, covers = x.held_by == TIES, x.held_by == COVERS
    why = "the parts are held by " + x.held_by
    if not ties:
        part.left_out(f"{why[0].upper()}{why[1:]}.")
        l_min = t_min = None
    else:
        l_min = part(built_up.least_length_of_tie_plate, b=x.line_distance)
        t_min = part(built_up.least_thickness_of_tie_plate, b=x.line_distance)
    if not run.arrays:
        spacing, pitch = run.pair(built_up.TIE_PLATE_SPACING), x.tie_fastener_spacing
        for key, title, meets, required, provided, remark in (
                ("length", "Length of tie plates", ties and at_least(x.tie_length, l_min), "at least {l_min}", "{l}",
                 "Lengthen the tie plates."),
                ("thickness", "Thickness of tie plates", ties and at_least(x.plate_thickness, t_min),
                 "at least {t_min}", "{t}", "Thicken the tie plates."),
                ("fasteners", "Fasteners or intermittent welds at tie plates", ties and at_most(pitch, spacing),
                 "at most {spacing}", "{s}" if pitch else "continuous welds", "Place them closer together.")):
            values = {"l_min": l_min, "t_min": t_min, "spacing": spacing, "l": x.tie_length, "t": x.plate_thickness,
                      "s": pitch} if ties else {}
            run.rule(f"tie plate {key}", title, D4, meets, required if ties else "", provided if ties else "",
                     remark=remark, applies=ties, reason=why, **values)
        _perforations(x, run, covers, why)


def _perforations(x, run, covers, why):
    """Add the geometry of perforations by E6.2, which is written for compression, as guidance."""
    def guidance(key, title, given, meets, required, provided, remark):
        values = {name: (value, units.LENGTH) for name, value in lengths.items() if value is not None} if given else {}
        run.rule(key, title, PERFORATIONS, given and meets(), required if given else "", provided if given else "",
                 severity="caution", remark=remark, applies=given, reason="not given" if covers else why, **values)

    w_p, l_p, c_p, r_p, b = ((x.perforation_width, x.perforation_length, x.perforation_clear, x.perforation_radius,
                              x.line_distance) if covers else (None,) * 5)
    least = run.pair(RADIUS)
    lengths = {"l_p": l_p, "c_p": c_p, "r_p": r_p, "b": b, "least": least, "most": 2 * w_p if covers else None}
    guidance("perforation length", "Length of perforations", l_p is not None, lambda: at_most(l_p, 2 * w_p),
             "at most twice the width, {most}, as guidance", "{l_p}", "shorten the perforations.")
    guidance("perforation clear", "Clear distance between perforations", c_p is not None, lambda: at_least(c_p, b),
             "at least the distance between lines, {b}, as guidance", "{c_p}", "place the perforations farther apart.")
    guidance("perforation radius", "Radius of perforations", r_p is not None, lambda: at_least(r_p, least),
             "at least {least}, as guidance", "{r_p}", "round the corners more.")


def messages(x, run, p):
    """Say what the calc takes for granted, and what it leaves to others."""
    run.caution("F_u / F_y is below 1.1; the ductility that the clause counts on is small.",
                when=not run.arrays and x.F_u < 1.1 * x.F_y)
    everywhere = x.flange_holes > 0 if x.arrangement in CHANNELS else x.holes > 1
    run.caution("All elements are stated to be connected, but there is no hole in "
                + ("the flanges" if x.arrangement in CHANNELS else "the other leg")
                + "; where an element is not connected, U is less than 1.", "Table D3.1",
                when=not run.arrays and x.connected == ALL and x.end_connection == END_BOLTS and p.is_shape
                and not everywhere)
    run.caution("No hole is counted in the cover plates; they belong to the net area only where the end connection "
                "holds them.", "B4.3b", when=not run.arrays and x.held_by == COVERS and x.end_connection == END_BOLTS
                and x.cover_holes == 0)
    left = unused(x)
    run.caution(f"Entered and not used in this case: {', '.join(left)}.", when=bool(left))
    run.note("The section is tabulated in inches; its dimensions are converted to mm exactly and not rounded.",
             when=x.units == units.SI and p.is_shape)
    run.note("Tie plates are taken on both open sides and at both ends of the member, as near the ends as the "
             "connection allows (common practice); they carry no share of the force and are not counted in any area.",
             "D4", when=x.held_by == TIES)
    run.note("Cover plates are taken on both open sides, alike and opposite each other, and to carry their share of "
             "the force from end to end. Their perforations are guided by E6.2, which is written for compression.",
             "D4", when=x.held_by == COVERS)
    run.note("Table D3.1, case 8, which may give a larger factor for angles with three or more fasteners a line, is "
             "not used.", "Table D3.1", when=x.arrangement in ANGLES)
    run.note("Parts that do not touch are held by bolts or welds through fillers or the gusset.", "D4",
             when=not run.arrays and x.back_to_back is not None and x.back_to_back > 0
             and x.held_by not in (TIES, COVERS))
    run.assume("The number of holes is that of the chain that governs, by the engineer's count; chains with stagger "
               "are not searched.", "B4.3b")
    run.assume("All parts are of one steel, or the stresses are those of the weakest.")
    run.assume("The force acts through the centroid of the member, and every part is connected at both ends.")
    run.assume("Bolts, welds, block shear and gusset of the end connection are calcs of their own; so is the strength "
               "of the connectors between the ends.")
    run.assume("Yield stress and tensile strength are specified minimum values, not those of a mill certificate.",
               "A3")
