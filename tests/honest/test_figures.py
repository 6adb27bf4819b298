"""Sketches are true to scale, charts say what was computed, and text from people prints as itself in both."""

import gc
import io
import itertools
import threading
import weakref
from math import sqrt

import matplotlib
import numpy as np
import pytest
from PIL import Image

from calclib.explore.figures import handover_points, sensitivity_figure, series_figure
from calclib.paper import THIN, Named, Paper, Words, words_size, wrapped
from calclib.sketch import (
    Arrow,
    Break,
    BreakLine,
    Circle,
    Dimension,
    Drawing,
    FailurePath,
    Leader,
    Outline,
    Text,
    draw,
    png,
    svg,
)

HOSTILE = r"$\frac{1}{0}$ & <script>x</script> ^_{ {{ % \input{/etc/passwd}"


def words(figure):
    return [artist for artist in figure.get_children() if isinstance(artist, Words)]


def overlapping(figure):
    """Return the pairs of labels whose boxes overlap."""
    return [(a.text, b.text) for a, b in itertools.combinations(words(figure), 2)
            if a.box[0] < b.box[2] and b.box[0] < a.box[2] and a.box[1] < b.box[3] and b.box[1] < a.box[3]]


def outside(figure):
    """Return the labels that reach past the edge of the figure."""
    width, height = figure.get_size_inches() * 72
    return [w.text for w in words(figure)
            if w.box[0] < 0 or w.box[1] < 0 or w.box[2] > width or w.box[3] > height]


def pin_plate(title="Pin-connected plate and its section through the hole"):
    """Return a plate 4-1/4 in wide with cut corners, in elevation and in section."""
    w, d, d_h, a, k, t, low = 4.25, 1.0, 1 + 1 / 32, 2.25, 0.9, 0.5, -4.2
    half, r, side = w / 2, d_h / 2, w / 2 + 3.5
    end, slope = a + r, 1 / sqrt(2)
    c = (half + end - k) * slope - r
    return Drawing([
        Outline([(half, low), (half, end - k), (half - k, end), (k - half, end), (-half, end - k), (-half, low)],
                closed=False),
        BreakLine((-half, low), (half, low)),
        Circle((0, 0), d_h, cross=True), Circle((0, 0), d, "thin"),
        Dimension((-half, low / 2), (half, low / 2), 0, Named("w", "4-1/4 in"), "horizontal"),
        Dimension((-half, 0), (-r, 0), 1, Named("b", "1.609 in"), "horizontal", beyond=(0, end)),
        Dimension((r, 0), (half, 0), 1, Named("b", "1.609 in"), "horizontal", beyond=(0, end)),
        Dimension((-r, 0), (r, 0), 2, Named("d_h", "1-1/32 in"), "horizontal", beyond=(0, end)),
        Dimension((0, r), (0, end), 1.2, Named("a", "2-1/4 in"), "vertical", beyond=(half, 0)),
        Dimension((r * slope, r * slope), ((r + c) * slope, (r + c) * slope), 0, Named("c", f"{c:.3f} in")),
        Leader((-0.43, -0.25), (-4.6, -1.5), Named("d", "1 in", "pin")),
        Arrow((0, low), (0, -2), Named("P_u", "24.00 kip")),
        FailurePath([(-half, 0), (-r, 0)], "net rupture"), FailurePath([(r, 0), (half, 0)]),
        FailurePath([(-d / 2, 0.2), (-d / 2, end)], kind=1), FailurePath([(d / 2, 0.2), (d / 2, end)], "shear-out", 1),
        Outline([(side, r), (side + t, r), (side + t, end), (side, end)], hatch=True),
        Outline([(side, low), (side, -r), (side + t, -r), (side + t, low)], False, hatch=True),
        BreakLine((side, low), (side + t, low)),
        Dimension((side, end), (side + t, end), 1, Named("t", "1/2 in"), "horizontal"),
        Text((0, low), "ELEVATION", (0, -3), bold=True), Text((side + t / 2, low), "SECTION", (0, -3), bold=True),
    ], title)


def threaded_rod():
    """Return a rod 1 in by 5 ft 8 in with its threads, a nut and the end of a turnbuckle."""
    d, thread, length = 1.0, 4.0, 68.0
    r, root, high = d / 2, 0.42, 0.8
    ends = [(0, thread), (length - thread, length)]
    return Drawing([
        Outline([(0, -r), (length, -r), (length, r), (0, r)]),
        *(Outline([(x1, y), (x2, y)], False, weight="thin") for x1, x2 in ends for y in (-root, root)),
        Outline([(thread, -r), (thread, r)], False), Outline([(length - thread, -r), (length - thread, r)], False),
        Break(thread + 2, length - thread - 2, -r, r),
        Outline([(-1.5, 0), (length + 1.5, 0)], False, weight="centre"),
        Outline([(length - 1.6, -0.85), (length - 0.6, -0.85), (length - 0.6, 0.85), (length - 1.6, 0.85)]),
        Outline([(-2, -high), (1.5, -high), (1.5, high), (-2, high)], False), BreakLine((-2, -high), (-2, high)),
        *(Dimension((x1, r), (x2, r), 1.4, Named("L_thread", "4 in"), "horizontal") for x1, x2 in ends),
        Dimension((thread, r), (length - thread, r), 1.4, Named("L_shank", "5'-0\""), "horizontal"),
        Dimension((0, -r), (length, -r), -1.6, Named("L", "5'-8\""), "horizontal"),
        Arrow((length, 0), (2.4, 0), Named("P_u", "24.00 kip")),
        Leader((length - 1.2, -0.85), (1, -2.5), "heavy hex nut"), Leader((0.6, r), (-1.5, 3), "1-8 UNC-2A"),
        FailurePath([(thread - 0.4, -0.7), (thread - 0.4, 0.7)], "thread rupture"),
    ], "Threaded rod")


def slender_plate():
    """Return a plate 2 in by 60 in, unbroken."""
    return Drawing([Outline([(0, -1), (60, -1), (60, 1), (0, 1)]),
                    Dimension((0, -1), (60, -1), -1, Named("L", "60 in"), "horizontal"),
                    Dimension((60, -1), (60, 1), 1, Named("w", "2 in"), "vertical")], "Plate 2 in x 60 in")


def thin_rod():
    """Return a rod of 6 mm, 12 m long, broken."""
    return Drawing([Outline([(0, -3), (12000, -3), (12000, 3), (0, 3)]), Break(110, 11890, -3, 3),
                    Dimension((0, 3), (12000, 3), 2, Named("L", "12 000 mm"), "horizontal"),
                    Dimension((0, 3), (80, 3), 1, Named("L_thread", "80 mm"), "horizontal"),
                    Dimension((95, -3), (95, 3), 0, Named("d", "6 mm"), "vertical"),
                    Arrow((12000, 0), (2, 0), Named("P_u", "5.2 kN"))], "Rod M6", unit="mm")


def by_hole_diameter(**more):
    x = np.union1d(np.linspace(1, 1.125, 60), [1 + 1 / 32, 1 + 1 / 16])
    curves = {"net rupture": 49 - 20 * x, "double-plane shear rupture": np.where(x <= 1 + 1 / 16, 28 - x, np.nan),
              "bearing on the pin": 0 * x + 28.0, "yielding of the plate": 0 * x + 95.6}
    given = {"unusable": [(1 + 1 / 16, 1.125, "AISC 360-22 D5.1 covers holes up to 1/16 in larger than the pin")],
             "x_format": "inch", "required_label": Named("P_u", "24.00 kip", "required"),
             "present_label": Named("d_h", "1-1/32 in", "present")}
    return sensitivity_figure("Pin hole diameter (in)", x, curves, 24.0, 1 + 1 / 32, **given | more)


def by_width():
    x = np.linspace(1.5, 9, 151)
    curves = {"net rupture": 24 * (x - 1.03), "shear-out": 52 + 0 * x, "bearing on the pin": 33.75 + x,
              "block shear of the gusset plate": 38 + 0.5 * x, "yielding": 22.5 * x}
    return sensitivity_figure("Plate width (in)", x, curves, 24.0, x[55], x_format="inch")


def by_thread():
    return series_figure("Rod diameter (in)", {
        "UNC": ([0.5, 0.75, 1, 1.25, 1.5, 2], [4.6, 10.9, 19.8, 31.6, 45.9, 81.5]),
        "UNF": ([0.5, 0.75, 1, 1.25, 1.5], [5.2, 12.2, 21.6, 35, 51.6]),
        "8UN": ([1.25, 1.5, 2], [32.6, 48.7, 90.4])}, 24.0, ("UNC", 1.25), x_format="inch")


FIGURES = {
    "pin plate": lambda: draw(pin_plate()), "threaded rod": lambda: draw(threaded_rod()),
    "slender plate": lambda: draw(slender_plate()), "thin rod": lambda: draw(thin_rod()),
    "hole diameter": by_hole_diameter, "plate width": by_width, "threads": by_thread,
}


@pytest.fixture(params=FIGURES, ids=lambda name: name.replace(" ", "-"))
def make(request):
    return FIGURES[request.param]


def test_the_same_drawing_gives_the_same_bytes(make):
    figure = make()
    assert png(figure) == png(make()) == png(figure)
    assert svg(figure) == svg(make()) == svg(figure)
    assert png(figure) == png(make())                              # also after an SVG was made of it


def test_threads_at_once_give_the_same_bytes(make):
    expected, made, start = (png(make()), svg(make())), [], threading.Barrier(2)

    def work():
        start.wait()
        made.extend((png(make()), svg(make())) for _ in range(3))

    threads = [threading.Thread(target=work) for _ in range(2)]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert len(made) == 6
    assert set(made) == {expected}


def test_a_users_style_neither_changes_a_figure_nor_is_changed(make):
    plain = png(make())
    with matplotlib.rc_context({"font.size": 30, "path.sketch": (3, 100, 2), "savefig.bbox": "tight",
                                "figure.facecolor": "red", "figure.dpi": 50, "text.usetex": True,
                                "figure.constrained_layout.use": True, "axes.grid": True}):
        before = dict(matplotlib.rcParams)
        assert png(make()) == plain
        svg(make())
        assert dict(matplotlib.rcParams) == before


def test_nothing_keeps_a_figure_alive(make):
    figure = make()
    png(figure)
    gone = weakref.ref(figure)
    del figure
    gc.collect()
    assert gone() is None


def test_labels_lie_inside_the_figure_and_off_each_other(make):
    figure = make()
    assert outside(figure) == []
    assert overlapping(figure) == []


def test_a_picture_is_black_on_white_and_an_svg_fetches_nothing(make):
    with Image.open(io.BytesIO(png(make()))) as image:
        assert image.mode == "L"
        assert image.getextrema() == (0, 255)
        assert image.info["dpi"] == pytest.approx((110, 110), abs=0.01)
    text = svg(make())
    assert "<dc:date>" not in text
    assert "<image" not in text
    assert "font-family" not in text


# --- scale -----------------------------------------------------------------------------------------------------

def ink(figure, dpi):
    """Return the (width, height) of all ink in points."""
    with Image.open(io.BytesIO(png(figure, dpi))) as image:
        left, top, right, bottom = image.point(lambda grey: 255 * (grey < 128)).getbbox()
    return (right - left) * 72 / dpi, (bottom - top) * 72 / dpi


@pytest.mark.parametrize(("unit", "diameter", "size", "points"), [
    ("in", 1.0, (1.5, 1.5), 72), ("in", 1.0, (3, 3), 144), ("in", 12.0, (6.5, 7.5), 12 * 72 / 2),
    ("mm", 25.4, (1.5, 1.5), 72), ("mm", 100.0, (3, 3), 100 * 72 / 25.4 / 2)])
def test_a_circle_has_its_true_size_on_paper(unit, diameter, size, points):
    figure = draw(Drawing([Circle((3, 4), diameter, "thin")], unit=unit, scale_note=False), size)
    assert ink(figure, 288) == pytest.approx((points + THIN, points + THIN), abs=0.5)


def test_the_scale_is_stated_and_its_bar_is_true():
    figure = draw(pin_plate())
    assert "Scale 1 : 3 in a figure 6.5 in wide" in [w.text for w in words(figure)]
    zero, end = (next(w for w in words(figure) if w.text == text) for text in ("0", "4 in"))
    middle = [(w.box[0] + w.box[2]) / 2 for w in (zero, end)]
    assert middle[1] - middle[0] == pytest.approx(4 * 72 / 3, abs=0.01)


def test_words_keep_their_size_at_every_scale():
    heights = {round(w.box[3] - w.box[1], 6) for make in (slender_plate, thin_rod, pin_plate)
               for w in words(draw(make())) if w.text.startswith("Scale")}
    assert len(heights) == 1


def test_the_drawing_keeps_to_the_height_it_is_given():
    figure = draw(pin_plate(), (6.5, 3.0))
    assert tuple(figure.get_size_inches()) == pytest.approx((6.5, 3.0))
    assert outside(figure) == []


def test_a_break_is_said_and_shortens_only_what_is_drawn():
    texts = [w.text for w in words(draw(thin_rod()))]
    assert "L = 12 000 mm" in texts
    assert "Scale 1 : 2 in a figure 165 mm wide; length left out at the break" in texts


@pytest.mark.parametrize(("drawing", "message"), [
    (Drawing([]), "The drawing has no parts."),
    (Drawing([Circle((0, float("nan")), 1)]), "A coordinate of the drawing is not a finite number."),
    (Drawing([Circle((0, 0), 1), Break(1, 2, 0, 1), Break(3, 4, 0, 1)]), "A drawing has at most one break."),
    (Drawing([Circle((0, 0), 1), Break(2, 1, 0, 1)]), "A break runs from x1 to a larger x2."),
    (Drawing([Dimension((1, 1), (1, 1), 0, "0 in")]), "The dimension 0 in has no length and so no direction."),
    (Drawing([Circle((0, 0), 1), Text((0, 0), "wide " * 60)]),
     "The drawing's words and dimensions need more than 6.5 in of width; take a larger figure or fewer of them."),
])
def test_what_cannot_be_drawn_is_refused(drawing, message):
    with pytest.raises(ValueError) as refusal:
        draw(drawing)
    assert str(refusal.value) == message


# --- text from people ------------------------------------------------------------------------------------------

def outlines(figure, text):
    """Return the shape of the label that starts like `text`, wherever it stands."""
    label = next(w for w in words(figure) if w.text == text)
    return label.get_path().vertices - label.get_path().vertices.min(axis=0)


def test_text_from_people_is_no_formula():
    figure = draw(Drawing([Circle((0, 0), 1), Text((0, 0), "$x_1$")], title=HOSTILE))
    assert HOSTILE in [w.text.replace("\n", " ") for w in words(figure)]
    # Every character has its own outline: a formula would have dropped the dollars and lowered the one.
    each = [len(outlines(draw(Drawing([Circle((0, 0), 1), Text((0, 0), c)])), c)) for c in "$x_1$"]
    assert len(outlines(figure, "$x_1$")) == sum(each)
    chart = sensitivity_figure(HOSTILE, [1, 2], {"$a$": [3, 4]}, 2.0, 1.0, required_label="$r$", present_label="$p$",
                               unusable=[(1.5, 1.9, "$u$")])
    assert {"$a$", "$r$", "$p$", "$u$"} <= {w.text for w in words(chart)}
    assert "<script" not in svg(figure) + svg(chart)


def test_a_symbol_is_typeset_only_where_the_library_asks():
    plain, symbol = (words_size(label)[0] for label in ("d_h = 1 in", Named("d_h", "1 in")))
    assert symbol < plain
    assert str(Named("P_u", "24.00 kip", "required")) == "required P_u = 24.00 kip"


def test_a_character_that_the_font_lacks_is_named_not_dropped():
    assert words_size("\u4e2d")[0] == pytest.approx(words_size("[U+4E2D]")[0])
    assert words_size("\x00")[0] == pytest.approx(words_size("[U+0000]")[0])


def test_long_text_is_wrapped_and_loses_nothing():
    text = "a plate " * 20 + "x" * 200
    lines = wrapped(text, 150).split("\n")
    assert "".join(lines).replace(" ", "") == text.replace(" ", "")
    assert max(words_size(line)[0] for line in lines) <= 150
    assert outside(draw(pin_plate(text))) == []


# --- charts ----------------------------------------------------------------------------------------------------

def test_handovers_stand_where_the_lines_cross():
    x = np.array([0.0, 1.0, 2.0, 3.0])
    found = handover_points(x, {"a": 4 * x, "b": 0 * x + 6, "c": 12 - 2 * x})
    assert [(h.x, h.y, h.before, h.after) for h in found] == [(1.5, 6.0, "a", "b")]
    assert handover_points(x, {"a": x + 1, "b": x + 1}) == []
    assert handover_points(x, {"a": x + 1, "b": [0.5, np.nan, 9, 9]}) == []
    one = handover_points(x, {"a": [1, 2, 3, 4], "b": [np.inf, np.inf, 2.5, 2.5]})
    assert [(h.x, h.y, h.before, h.after) for h in one] == [(2.0, 2.5, "a", "b")]


def test_a_handover_is_named():
    texts = [w.text.replace("\n", " ") for w in words(by_width())]
    assert "net rupture → bearing on the pin" in texts
    assert "bearing on the pin → block shear of the gusset plate" in texts


def test_a_limit_state_without_any_number_leaves_no_governing_line():
    x = np.linspace(10, 20, 11)
    figure = sensitivity_figure("Hole (mm)", x, {"net rupture": 200 + x, "shear": np.nan * x}, 180.0, x[4])
    texts = [w.text.replace("\n", " ") for w in words(figure)]
    assert "shear (no strength exists)" in texts
    assert "no strength exists" in texts
    assert not any("governs" in text for text in texts)
    assert outside(figure) == overlapping(figure) == []
    assert not heavy_lines(figure)


def heavy_lines(figure):
    return [line for artist in figure.get_children() if hasattr(artist, "get_segments")
            and artist.get_linewidth()[0] > 2 for line in artist.get_segments()]


def test_all_curves_without_a_number_still_make_a_figure():
    figure = sensitivity_figure("Hole (mm)", [1, 2], {"shear": [np.nan, np.nan]})
    assert "no strength exists" in [w.text for w in words(figure)]
    assert overlapping(figure) == outside(figure) == []


def test_the_governing_line_stops_where_any_limit_state_has_no_number():
    x = np.linspace(0, 10, 11)
    full = sensitivity_figure("x", x, {"a": 10 + x, "b": 20 + x})
    cut = sensitivity_figure("x", x, {"a": 10 + x, "b": np.where(x <= 5, 20 + x, np.nan)})
    assert np.ptp(heavy_lines(cut)[0][:, 0]) < 0.6 * np.ptp(heavy_lines(full)[0][:, 0])


def test_what_does_not_limit_and_what_is_for_comparison_never_govern():
    x = np.linspace(1, 2, 5)
    figure = sensitivity_figure("x", x, {"a": 10 * x, "never": np.inf * x}, beside={"other": 5 * x})
    assert "never (does not limit)" in [w.text.replace("\n", " ") for w in words(figure)]
    assert governing_end(figure) == pytest.approx(height_of(figure, "a"))
    figure = sensitivity_figure("x", x, {"a": 10 * x, "other": 5 * x})
    assert governing_end(figure) == pytest.approx(height_of(figure, "other"))


def governing_end(figure):
    return max(heavy_lines(figure), key=len)[-1, 1]


def height_of(figure, text):
    box = next(w.box for w in words(figure) if w.text == text)
    return (box[1] + box[3]) / 2


def test_a_curve_far_above_is_cut_off_and_says_so():
    figure = sensitivity_figure("x", [1, 2], {"a": [10, 11], "far": [900, 1000]}, 9.0)
    numbers = [float(w.text) for w in words(figure) if w.text.isdigit()]
    assert max(numbers) < 40
    assert f"far (above {max(numbers):g})" in [w.text.replace("\n", " ") for w in words(figure)]


def test_one_point_is_a_chart_too():
    figure = sensitivity_figure("Hole (mm)", [20.0], {"net rupture": [200.0], "bearing": [190.0]}, 180.0, 20.0)
    assert outside(figure) == overlapping(figure) == []
    series = series_figure("Rod", {"M": ([20.0], [50.0]), "none": ([20.0], [np.nan])}, None, ("M", 20.0))
    assert outside(series) == overlapping(series) == []


def test_many_standard_sizes_are_thinned_out_to_what_is_legible():
    x = np.linspace(0.25, 4, 200)
    sizes = [(v, f"{v:.4g}") for v in np.linspace(0.25, 4, 31)]
    figure = sensitivity_figure("Rod diameter (in)", x, {"rupture": 30 * x ** 2}, 100.0, ticks=sizes)
    shown = [w.text for w in words(figure) if w.text in dict(map(reversed, sizes))]
    assert 8 < len(shown) < 31
    assert overlapping(figure) == []


def test_the_size_in_use_is_written_whatever_is_left_out():
    sizes = [(v, f"{v:.4g}") for v in np.linspace(0.25, 4, 31)]
    x = np.array([v for v, _ in sizes])
    for value, text in sizes:
        figure = sensitivity_figure("d (in)", x, {"rupture": x ** 2}, present=value, ticks=sizes, present_label="p")
        assert text in [w.text for w in words(figure)]


def test_close_ends_have_names_apart():
    x = np.linspace(0, 1, 5)
    figure = sensitivity_figure("x", x, {f"limit state number {n}": 10 + n / 1000 + x for n in range(8)})
    assert overlapping(figure) == outside(figure) == []


@pytest.mark.parametrize(("change", "message"), [
    ({"present": 1.5}, "present = 1.5 is not one of x; add it, so that the dot on the line is a computed strength."),
    ({"x": [2, 1]}, "x must be one or more finite values that rise."),
    ({"x": []}, "x must be one or more finite values that rise."),
    ({"x": [1, 2, 3]}, "a: 2 strengths for 3 values of x."),
    ({"curves": {}}, "There is no curve to draw."),
    ({"curves": {"a": [1, -np.inf]}}, "a: a strength is minus infinity."),
    ({"curves": {str(n): [1, 2] for n in range(9)}},
     "9 curves cannot be told apart in black and white; draw at most 8."),
    ({"beside": {"a": [1, 2]}}, "A curve for comparison has the name of a limit state."),
    ({"unusable": [(0, 9, "too large")]},
     'A strength is given inside the range 1 to 2, where none is said to exist: "too large".'),
])
def test_what_cannot_be_charted_is_refused(change, message):
    given = {"x_label": "x", "x": [1, 2], "curves": {"a": [3, 4]}} | change
    if "unusable" in change:
        given |= {"x": [1, 1.5, 2], "curves": {"a": [3, 4, 5]}}
    with pytest.raises(ValueError) as refusal:
        sensitivity_figure(**given)
    assert str(refusal.value) == message


def test_an_unknown_series_is_refused():
    with pytest.raises(ValueError, match=r'^There is no series "UNG"; did you mean "UNC"\?$'):
        series_figure("Rod", {"UNC": ([1], [2])}, None, ("UNG", 1))


def test_hatching_stays_inside_its_area():
    paper = Paper()
    paper.hatch([(0, 0), (10, 0), (10, 30), (5, 12), (0, 30)])
    x0, y0, x1, y1 = paper.extent()
    assert -1e-9 < x0 < x1 < 10 + 1e-9
    assert -1e-9 < y0 < y1 < 30 + 1e-9
