"""What a drawing is made of: plain data in the model's unit of length, x to the right and y up.

How far a dimension line, a load or a note stands off is given on paper, in rows of a quarter inch, so that it looks the
same at every scale. A text is either a `str`, which prints as itself, or `Named("d_h", "13/16 in")`, which prints a
symbol. `calclib.sketch` draws it; the kinds of member need no more than this.

    Drawing([
        Outline([(-2, 0), (2, 0), (2, 6), (-2, 6)]),
        Circle((0, 4), 1.03, cross=True),
        Dimension((-2, 6), (2, 6), 1, Named("w", "4 in"), "horizontal"),
        Dimension((-0.515, 4), (0.515, 4), 1, Named("d_h", "1.03 in"), "horizontal", beyond=(0, 0)),
        Arrow((0, 0), (0, -2), Named("P_u", "24 kip")),
        FailurePath([(-2, 4), (-0.515, 4)], "net rupture"),
    ], title="Plate", unit="in")
"""

from dataclasses import dataclass, field


@dataclass(frozen=True)
class Named:
    """A symbol and what it equals, written by the library; Named("d_h", "13/16 in") prints a d with the index h.

    `symbol`: words such as "P_u" or "φ_t P_n"; what follows _ is an index, in braces or not. `value` and `before` print
    as they are.
    """

    symbol: str
    value: str = ""
    before: str = ""

    def __str__(self):
        return " ".join(filter(None, (self.before, self.symbol, self.value and f"= {self.value}")))


@dataclass(frozen=True)
class Outline:
    """A polyline. `weight`: "object", "hidden", "centre" or "thin"; `hatch`: the area is cut, and hatched."""
    points: list
    closed: bool = True
    hatch: bool = False
    weight: str = "object"


@dataclass(frozen=True)
class Circle:
    """A circle; `cross`: with centre lines that reach past it."""
    center: tuple
    diameter: float
    weight: str = "object"
    cross: bool = False


@dataclass(frozen=True)
class Arc:
    """An arc from the angle `start` to `end`, counter-clockwise from the x axis [degrees]."""
    center: tuple
    diameter: float
    start: float
    end: float
    weight: str = "object"


@dataclass(frozen=True)
class Arrow:
    """A load: its tail at `start`, its head `reach` = (right, up) rows away."""
    start: tuple
    reach: tuple
    text: object = ""


@dataclass(frozen=True)
class Dimension:
    """The distance from `p1` to `p2`, `direction` "aligned", "horizontal" or "vertical", as `text` states it.

    `offset`: rows from the points to the dimension line: up or right is positive, for an aligned one the left-hand side
    on the way from p1 to p2. `beyond`: a point from which the rows are counted instead, such as the edge of the plate.
    """
    p1: tuple
    p2: tuple
    offset: float
    text: object
    direction: str = "aligned"
    beyond: tuple | None = None


@dataclass(frozen=True)
class Leader:
    """A note that points at `point` from `reach` = (right, up) rows away."""
    point: tuple
    reach: tuple
    text: object


@dataclass(frozen=True)
class FailurePath:
    """Where the steel tears: a heavy broken line. Paths of one limit state carry one label; write it on one of them."""
    points: list
    label: object = ""
    kind: int = 0    # which of three dash patterns


@dataclass(frozen=True)
class Text:
    """Words centred on the point `at`, moved by `shift` = (right, up) rows."""
    at: tuple
    text: object
    shift: tuple = (0, 0)
    bold: bool = False


@dataclass(frozen=True)
class BreakLine:
    """The line of a cut end, across from `p1` to `p2`: the member goes on beyond it."""
    p1: tuple
    p2: tuple


@dataclass(frozen=True)
class Break:
    """Leave out of the drawing all between x1 and x2, over the height y1 to y2; dimensions still state the true length.

    Draw a long member along x. A drawing has at most one break, and no circle, arc or note inside it.
    """
    x1: float
    x2: float
    y1: float
    y2: float


@dataclass(frozen=True)
class Drawing:
    """What to draw. `unit`: "in" or "mm", the unit of every model length. `note`: a line under the title."""
    parts: list = field(default_factory=list)
    title: object = ""
    unit: str = "in"
    scale_note: bool = True
    note: object = ""
