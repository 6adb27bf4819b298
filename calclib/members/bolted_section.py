"""The section of a bolted tension member and its connected element, laid out as a flat strip.

The strip has y = 0 at its lower edge: of an angle, the back of the heel; of a web or stem, the inner face of the
flange. Tables of shapes are in inches; in an SI calc their values are converted exactly.
"""

from dataclasses import dataclass

from calclib import units
from calclib.block_paths import Attached
from calclib.equations.aisc360 import members
from calclib.errors import EntryError
from calclib.members.fields import Field
from calclib.tables import shapes

FLAT, FLANGES, FLANGE, WEB, STEM = "flat", "both flanges", "flange", "web", "stem"
LONG_LEG, SHORT_LEG, BACKS = "long leg", "short leg", "legs back to back"
I_SHAPES, CHANNELS, TEES = ("W", "M", "S", "HP"), ("C", "MC"), ("WT", "MT", "ST")
_WAYS = {**dict.fromkeys(I_SHAPES, (FLANGES, WEB)), **dict.fromkeys(CHANNELS, (WEB,)),
         **dict.fromkeys(TEES, (FLANGE, STEM)), "L": (LONG_LEG, SHORT_LEG), "2L": (BACKS,), "plate": (FLAT,)}

SECTION = (
    Field("steel", "Member steel", "Member", "Standard and grade of the member, such as ASTM A992."),
    Field("F_y", "Yield stress", "Member", "Specified minimum yield stress of the member.", "F_y", units.STRESS,
          above=0),
    Field("F_u", "Tensile strength", "Member", "Specified minimum tensile strength of the member.", "F_u",
          units.STRESS, above=0),
    Field("section", "Section", "Member", "Rolled shape; blank for a plate or flat bar by its dimensions.",
          choices=shapes.names(), search=True, reader=shapes.shape, optional=True),
    Field("plate_width", "Plate width", "Member", "Width of a plate or flat bar across the force.", "w", units.LENGTH,
          optional=True, above=0),
    Field("plate_thickness", "Plate thickness", "Member", "Thickness of a plate or flat bar.", "t", units.LENGTH,
          optional=True, above=0),
    Field("connected", "Connected by", "Member", "Element of the section that the bolts go through; needed where the "
          "section leaves a choice.", choices=(FLANGES, FLANGE, WEB, STEM, LONG_LEG, SHORT_LEG, BACKS, FLAT),
          optional=True),
    Field("length", "Length of member", "Member", "Length as fabricated, for the slenderness; blank: not computed.",
          "L", units.LENGTH, optional=True, above=0),
)


@dataclass(frozen=True)
class Section:
    """A section with its connected element [in, in2 or mm, mm2].

    shape : the `Shape`, or None for a plate
    way : one of the words of the field "connected"
    k : what an inch of the table is in the calc: 1 or 25.4
    A_g : gross area of the whole section
    width, t : of the strip, and its thickness
    count : equal elements that tear together: two flanges, two angles
    patterns : of bolts: one on each flange
    plies : of the member that each bolt goes through: two for double angles
    lower, upper : whether the strip ends there at a free edge
    origin : what the lower edge of the strip is measured from, less `offset`
    attached : what stands on the strip
    A_c : gross area of the connected elements
    x_bar : distance from the connection plane to the centroid, where a table gives it
    r : least radius of gyration, None where it was not read
    """
    shape: object
    way: str
    k: float
    A_g: float
    width: float
    t: float
    count: int = 1
    patterns: int = 1
    plies: int = 1
    lower: bool = True
    upper: bool = True
    offset: float = 0.0
    origin: str = "the lower edge"
    attached: tuple = ()
    A_c: float | None = None
    x_bar: float | None = None
    r: float | None = None

    @property
    def family(self):
        return "plate" if self.shape is None else self.shape.family

    @property
    def is_symmetric(self):
        """Whether the middle of the strip lies on the line of the member's centroid."""
        return self.way in (FLAT, FLANGES, FLANGE, WEB)


def section_block(x, run):
    """Add the block "section" and return the Section; refuse what is no section or has no such element."""
    part = run.block("section", "Section and gross area")
    if x.section is None:
        for name in ("plate_width", "plate_thickness"):
            if getattr(x, name) is None:
                raise EntryError(name, "is empty and no rolled shape is chosen; give width and thickness of the plate, "
                                       "or choose a section")
        way = _way(x, run, "plate")
        A_g = part(members.gross_area_of_plate, w=x.plate_width, t=x.plate_thickness)
        return Section(None, way, 1.0, A_g, x.plate_width, x.plate_thickness, r=x.plate_thickness / 12**0.5)
    if x.plate_width is not None or x.plate_thickness is not None:
        name = "plate_width" if x.plate_width is not None else "plate_thickness"
        raise EntryError(name, f"is given and the section is {x.section.name}; leave it blank, or leave the section "
                               "blank for a plate")
    if x.section.is_hollow:
        raise EntryError("section", f"{x.section.name} is a hollow section; bolts through its walls are outside this "
                                    "calc. Choose an open shape, or use the calc of a slotted hollow section")
    shape, way = x.section, _way(x, run, x.section.family)
    k = 1.0 if run.units == units.US else 25.4
    part.given("A_{g}", units.AREA, shape.A * k * k, shapes.SOURCE,
               f"{shape.name}." if k == 1 else f"{shape.name}: {shape.A:g} in² in the table, converted.")
    run.note(f"{shape.name} stands in a table in inches; its values are converted exactly, 1 in = 25.4 mm.",
             when=k != 1)
    return _MAKERS[way](shape, k)


def _way(x, run, family):
    ways = _WAYS[family]
    name = "a plate" if family == "plate" else x.section.name
    if x.connected is None:
        if len(ways) > 1:
            raise EntryError("connected", f"is empty; {name} can be connected by {' or '.join(ways)}: choose one")
        return ways[0]
    if x.connected not in ways:
        raise EntryError("connected", f'"{x.connected}" is not an element by which {name} is connected here; choose '
                                      + " or ".join(f'"{way}"' for way in ways))
    return x.connected


def _standing(name, s, k, depth, area):
    """Return the web or stem that stands on the middle of a flange; where it shears off, the fillets stay."""
    return Attached(name, s.b_f * k / 2, s.t_w * k, area * k * k, (depth - s.k_des) * s.t_w * k * k)


def _flanges(s, k):
    half_web = _standing("web", s, k, s.d / 2, s.A / 2 - s.b_f * s.t_f)
    return Section(s, FLANGES, k, s.A * k * k, s.b_f * k, s.t_f * k, count=2, patterns=2, attached=(half_web,),
                   A_c=2 * s.b_f * s.t_f * k * k, r=min(s.r_x, s.r_y) * k)


def _flange(s, k):
    stem = _standing("stem", s, k, s.d, s.A - s.b_f * s.t_f)
    return Section(s, FLANGE, k, s.A * k * k, s.b_f * k, s.t_f * k, attached=(stem,), A_c=s.b_f * s.t_f * k * k,
                   x_bar=s.y * k, r=min(s.r_x, s.r_y) * k)


def _web(s, k):
    h = (s.d - 2 * s.t_f) * k
    area = (s.A * k * k - h * s.t_w * k) / 2
    sides = tuple(Attached(name, y, s.t_w * k, area) for name, y in (("lower flange", 0.0), ("upper flange", h)))
    return Section(s, WEB, k, s.A * k * k, h, s.t_w * k, lower=False, upper=False, offset=s.t_f * k,
                   origin="the outer face of the lower flange", attached=sides, A_c=h * s.t_w * k,
                   x_bar=s.x * k if s.family in CHANNELS else None, r=min(s.r_x, s.r_y) * k)


def _stem(s, k):
    h = (s.d - s.t_f) * k
    flange = Attached("flange", 0.0, s.t_w * k, s.A * k * k - h * s.t_w * k)
    return Section(s, STEM, k, s.A * k * k, h, s.t_w * k, lower=False, offset=s.t_f * k,
                   origin="the outer face of the flange", attached=(flange,), A_c=h * s.t_w * k,
                   r=min(s.r_x, s.r_y) * k)


def _leg(s, k, leg, x_bar, r, way, count=1):
    A, leg, t = s.A * k * k / count, leg * k, s.t * k
    other = Attached("outstanding leg", t / 2, t, A - leg * t)
    return Section(s, way, k, s.A * k * k, leg, t, count, plies=count, lower=False, origin="the back of the angle",
                   attached=(other,), A_c=count * leg * t, x_bar=x_bar * k, r=None if r is None else r * k)


_MAKERS = {
    FLANGES: _flanges, FLANGE: _flange, WEB: _web, STEM: _stem,
    LONG_LEG: lambda s, k: _leg(s, k, s.leg_long, s.x, s.r_z, LONG_LEG),
    SHORT_LEG: lambda s, k: _leg(s, k, s.leg_short, s.y, s.r_z, SHORT_LEG),
    BACKS: lambda s, k: _leg(s, k, s.d, s.x, min(s.r_x, s.r_y), BACKS, 2),
}
