"""The parts of a built-up tension member: what is asked for, what does not fit together, and their dimensions."""

from dataclasses import dataclass

import numpy as np

from calclib import units
from calclib.errors import EntryError
from calclib.members.fields import Field
from calclib.tables import shapes

TOES, BACKS = "two channels, toe to toe", "two channels, back to back"
LONG_LEGS, SHORT_LEGS = "two angles, long legs back to back", "two angles, short legs back to back"
PLATES = "plates in contact"
CHANNELS, ANGLES = (TOES, BACKS), (LONG_LEGS, SHORT_LEGS)
BOLTS, WELDS, TIES, COVERS, LACING = ("bolts", "intermittent welds", "tie plates", "perforated cover plates", "lacing")
HELD_BY = {TOES: (TIES, COVERS), BACKS: (BOLTS, WELDS, TIES, COVERS), LONG_LEGS: (BOLTS, WELDS),
           SHORT_LEGS: (BOLTS, WELDS), PLATES: (BOLTS, WELDS)}
ALL, WEB, FLANGES = "all elements", "web, leg or plate at the gusset", "channel flanges"
PAINTED, WEATHERING = "painted, or not exposed", "unpainted weathering steel, exposed"
END_BOLTS, END_WELDS, END_LONGITUDINAL = "bolts", "longitudinal and transverse welds", "longitudinal welds only"

_HOLES = {"dimension": units.NUMBER, "least": 0}
_OPTIONAL_LENGTH = {"dimension": units.LENGTH, "optional": True, "above": 0}
FIELDS = (
    Field("arrangement", "Arrangement", "Parts", "What the member is built of.", choices=tuple(HELD_BY)),
    Field("section", "Section of one part", "Parts", "Channel or angle from the table; blank for plates.",
          choices=tuple(name for name in shapes.names() if shapes.family(name) in ("C", "MC", "L")), search=True,
          reader=shapes.shape, optional=True),
    Field("back_to_back", "Distance back to back", "Parts",
          "Between the backs of the two shapes: over all for channels toe to toe, the gap for parts back to back "
          "(0 where they touch); blank for plates.", "B", units.LENGTH, optional=True, least=0),
    Field("plates", "Number of plates", "Parts", "Only for plates in contact: how many equal plates.",
          choices=("2", "3", "4"), optional=True),
    Field("plate_width", "Plate width", "Parts", "Width of each plate, or of each of two cover plates.", "w",
          **_OPTIONAL_LENGTH),
    Field("plate_thickness", "Plate thickness", "Parts", "Thickness of each plate, cover plate or tie plate.", "t",
          **_OPTIONAL_LENGTH),
    Field("steel", "Steel", "Parts", "Standard and grade of all parts, such as ASTM A572 Grade 50."),
    Field("F_y", "Yield stress", "Parts", "Specified minimum yield stress; of the weakest part.", "F_y", units.STRESS,
          above=0),
    Field("F_u", "Tensile strength", "Parts", "Specified minimum tensile strength; of the weakest part.", "F_u",
          units.STRESS, above=0),
    Field("held_by", "Held together by", "Connectors",
          "Bolts or intermittent welds between the ends, in contact or with fillers; tie plates or perforated cover "
          "plates on the two open sides.", choices=(BOLTS, WELDS, TIES, COVERS, LACING)),
    Field("connector_spacing", "Spacing of connectors", "Connectors",
          "Along the force, centre to centre, of bolts, intermittent welds or tie plates.", "a", units.LENGTH, above=0),
    Field("connector_holes", "Connector holes in each part", "Connectors",
          "Number in one cross section of each part between the ends; 0 where connectors are welded. In flanges where "
          "tie or cover plates are, else in web, leg or plate.", "m_s", **_HOLES, default="0"),
    Field("connector_hole", "Diameter of connector holes", "Connectors", "Nominal diameter; blank if there are none.",
          "d_{h,s}", **_OPTIONAL_LENGTH),
    Field("exposure", "Exposure", "Connectors", "For the spacing of connectors where a plate lies in contact.",
          choices=(PAINTED, WEATHERING), default=PAINTED),
    Field("line_distance", "Distance between lines", "Connectors",
          "Across the member, between the lines of fasteners or welds that hold tie or cover plates.", "b",
          **_OPTIONAL_LENGTH),
    Field("tie_length", "Length of tie plates", "Connectors", "Along the member.", "l_t", **_OPTIONAL_LENGTH),
    Field("tie_fastener_spacing", "Spacing at tie plates", "Connectors",
          "Along the member, of fasteners or intermittent welds at one tie plate; 0 for continuous welds.", "s_t",
          units.LENGTH, optional=True, least=0),
    Field("perforation_width", "Width of perforations", "Connectors", "Across the cover plate.", "w_p",
          **_OPTIONAL_LENGTH),
    Field("perforation_length", "Length of perforations", "Connectors", "Along the cover plate; only for guidance.",
          "l_p", **_OPTIONAL_LENGTH),
    Field("perforation_clear", "Clear between perforations", "Connectors", "Along the cover plate; only for guidance.",
          "c_p", **_OPTIONAL_LENGTH),
    Field("perforation_radius", "Radius of perforations", "Connectors", "At the corners; only for guidance.", "r_p",
          **_OPTIONAL_LENGTH),
    Field("end_connection", "End connection by", "End connection", "What connects the parts to the gusset.",
          choices=(END_BOLTS, END_WELDS, END_LONGITUDINAL)),
    Field("connected", "Connected elements", "End connection",
          "Which elements of each part the end connection holds; it decides the shear lag factor.",
          choices=(ALL, WEB, FLANGES)),
    Field("connection_length", "Length of end connection", "End connection",
          "Along the force: first to last bolt, not the lap; or length of the longitudinal welds.", "l", units.LENGTH,
          above=0),
    Field("x_bar", "Distance to centroid", "End connection",
          "From the gusset to the centroid of one part, with its half of the cover plates; blank: the table's distance "
          "from the back of the shape.", r"\bar{x}", units.LENGTH, optional=True, least=0),
    Field("holes", "Holes in each part", "End connection",
          "Number in the critical section of each web, angle or plate; 0 where there are none.", "m", **_HOLES),
    Field("flange_holes", "Holes in each channel's flanges", "End connection",
          "Number in the critical section, both flanges of one channel together.", "m_f", **_HOLES, default="0"),
    Field("cover_holes", "Holes in each cover plate", "End connection", "Number in the critical section.", "m_c",
          **_HOLES, default="0"),
    Field("hole_diameter", "Hole diameter", "End connection", "Nominal diameter; blank where there are no holes.",
          "d_h", **_OPTIONAL_LENGTH),
    Field("length", "Member length", "Member", "As fabricated; blank: slenderness of the member is not shown.", "L",
          **_OPTIONAL_LENGTH),
)
REQUIRED = {  # what each case cannot do without: (words of the case, fields)
    PLATES: ("plates", "plate_width", "plate_thickness"),
    **dict.fromkeys((*CHANNELS, *ANGLES), ("section", "back_to_back")),
    TIES: ("plate_thickness", "line_distance", "tie_length", "tie_fastener_spacing"),
    COVERS: ("plate_width", "plate_thickness", "line_distance", "perforation_width"),
}


def unused(x):
    """Return the labels of what is entered and has no place in this case."""
    plates, ties, covers = x.arrangement == PLATES, x.held_by == TIES, x.held_by == COVERS
    used = {"section": not plates, "back_to_back": not plates, "plates": plates, "plate_width": plates or covers,
            "plate_thickness": plates or ties or covers, "line_distance": ties or covers, "tie_length": ties,
            "tie_fastener_spacing": ties, "x_bar": x.connected != ALL,
            **{field.name: covers for field in FIELDS if field.name.startswith("perforation")}}
    return [field.label for field in FIELDS if not used.get(field.name, True) and getattr(x, field.name) is not None]


@dataclass(frozen=True)
class Parts:
    """Dimensions of one main part in the unit of the calc; None where it has none. `n`: how many there are."""

    n: int
    name: str
    A: float | None = None
    d: float | None = None        # depth of a channel
    b_f: float | None = None
    t_w: float | None = None      # web, or thickness of an angle or plate: where `holes` are
    t_f: float | None = None
    leg: float | None = None      # of an angle, back to back
    x_bar: float | None = None    # from the back to the centroid
    r_across: float | None = None  # about the axis through the centroid, parallel to the back
    r_along: float | None = None   # about the other axis
    r_i: float | None = None      # least

    @property
    def is_shape(self):
        return self.A is not None


def parts(x):
    """Return the Parts of a case that `refuse` let pass; a shape's inches become mm in SI."""
    if x.arrangement == PLATES:
        return Parts(int(x.plates), "plate", t_w=x.plate_thickness)
    s, inch = x.section, 1.0 if x.units == units.US else 25.4
    if x.arrangement in CHANNELS:
        names = {"d": s.d, "b_f": s.b_f, "t_w": s.t_w, "t_f": s.t_f, "x_bar": s.x, "r_across": s.r_y, "r_along": s.r_x,
                 "r_i": s.r_y}
    elif x.arrangement == LONG_LEGS:
        names = {"t_w": s.t, "leg": s.leg_long, "x_bar": s.x, "r_across": s.r_y, "r_along": s.r_x, "r_i": s.r_z}
    else:
        names = {"t_w": s.t, "leg": s.leg_short, "x_bar": s.y, "r_across": s.r_x, "r_along": s.r_y, "r_i": s.r_z}
    return Parts(2, s.name, A=s.A * inch**2, **{name: value * inch for name, value in names.items()})


def refuse(x, run):
    """Refuse what does not fit together, and what is missing for the case."""
    if x.held_by == LACING:
        raise EntryError("held_by", "lacing is out of scope: its bars carry the shear of the member by E6.2, which "
                                    "AISC 360 states for compression and this calc does not work out. Use tie plates "
                                    "or perforated cover plates, or design the lacing apart")
    if x.held_by not in HELD_BY[x.arrangement]:
        raise EntryError("held_by", f"{x.held_by} cannot hold {x.arrangement} in this calc; choose one of: "
                                    + ", ".join(HELD_BY[x.arrangement]))
    for case in (x.arrangement, x.held_by):
        for name in REQUIRED.get(case, ()):
            if getattr(x, name) is None:
                raise EntryError(name, f"is empty and the member is of {case}; give it" if case == x.arrangement else
                                 f"is empty and the parts are held by {case}; give it")
    families = ("C", "MC") if x.arrangement in CHANNELS else ("L",)
    if x.arrangement != PLATES and x.section.family not in families:
        raise EntryError("section", f"{x.section.name} is not {'a channel' if 'C' in families else 'an angle'} and the "
                                    f"member is of {x.arrangement}; choose another section or arrangement")
    if x.connected == FLANGES and x.arrangement not in CHANNELS:
        raise EntryError("connected", f"the member is of {x.arrangement}; only channels have flanges. Choose "
                                      f'"{ALL}" or "{WEB}"')
    if x.connected != ALL and x.end_connection == END_LONGITUDINAL:
        raise EntryError("end_connection", f"{run.cite('Table D3.1')}, case 2 does not cover longitudinal welds alone; "
                                           "case 4 does, part by part. Add transverse welds, connect all elements, or "
                                           "calculate each part as a welded member")
    geometry(x, run, parts(x))


def geometry(x, run, p):
    """Refuse impossible geometry and numbers of holes that do not fit."""
    channels, covers = x.arrangement in CHANNELS, x.held_by == COVERS
    if x.arrangement == TOES:
        run.require(x.back_to_back * (1 + 1e-9) >= 2 * p.b_f, "back_to_back", "{B} is less than two flanges of {b_f}; "
                    "the channels overlap. Give the distance over both webs", B=x.back_to_back, b_f=p.b_f)
    if x.held_by in (TIES, COVERS):
        width = x.back_to_back if x.arrangement == TOES else x.back_to_back + 2 * p.b_f
        run.require(x.line_distance < width, "line_distance", "{b} is not less than the width of the member of {width}"
                    "; the lines lie outside the flanges", b=x.line_distance, width=width)
    if x.held_by == TIES:
        run.require(x.tie_length < x.connector_spacing, "tie_length", "{l} is not less than the spacing of the tie "
                    "plates of {a}; the plates would overlap. Give the spacing centre to centre", l=x.tie_length,
                    a=x.connector_spacing)
    if covers:
        run.require(x.line_distance < x.plate_width, "plate_width", "{w} is not more than the distance between lines "
                    "of {b}; the lines lie beside the cover plate", w=x.plate_width, b=x.line_distance)
        run.require(x.perforation_width < x.line_distance, "perforation_width", "{w_p} is not less than the distance "
                    "between lines of {b}; the perforation would cut the connectors", w_p=x.perforation_width,
                    b=x.line_distance)
    for name, applies, words in (("flange_holes", channels, "no channels"), ("cover_holes", covers, "no cover plates")):
        run.require((getattr(x, name) == 0) | applies, name,
                    "is given and the member has " + words + "; leave it blank")
    for name in ("holes", "flange_holes", "cover_holes", "connector_holes"):
        run.require(getattr(x, name) == np.round(getattr(x, name)), name,
                    "{n} is not a whole number; holes are counted", n=(getattr(x, name), units.NUMBER))
    ends = x.holes + x.flange_holes + x.cover_holes
    run.require((ends > 0) | (x.end_connection != END_BOLTS), "holes", "the end connection is bolted and there is no "
                "hole in its critical section; count the holes")
    run.require((x.connector_holes > 0) | (x.held_by != BOLTS), "connector_holes", "the parts are held by bolts and no "
                "connector hole is counted; give the number in one cross section of each part")
    element = p.d if channels else p.leg if p.is_shape else x.plate_width
    at_flanges = x.held_by in (TIES, COVERS)
    flanges = 2 * p.b_f if channels else element
    for name, size, width, place in (
            ("holes", "hole_diameter", element, "web, leg or plate"), ("flange_holes", "hole_diameter", flanges,
                                                                        "two flanges"),
            ("cover_holes", "hole_diameter", x.plate_width, "cover plate"),
            ("connector_holes", "connector_hole", flanges if at_flanges else element,
             "two flanges" if at_flanges else "web, leg or plate")):
        count, diameter = getattr(x, name), getattr(x, size)
        if not np.any(count > 0):
            continue
        if diameter is None:
            raise EntryError(size, "is empty and there are holes; give the nominal diameter, such as "
                                   f'"{units.LENGTH.examples[x.units]}"')
        run.require(count * diameter < width, name, "{n} of {d_h} leave nothing of the {place} of {width}; count the "
                    "holes of one cross section", n=(count, units.NUMBER), d_h=diameter, place=place, width=width)
