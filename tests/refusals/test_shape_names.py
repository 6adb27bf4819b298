"""How a shape may be typed, and what is refused, with the whole message."""

import pytest

from calclib.tables import TableError
from calclib.tables.shapes import names, shape, shapes

DATABASE = "the AISC Shapes Database v16.0 (16th-edition Manual)"


def refusal(call, *arguments):
    with pytest.raises(TableError) as caught:
        call(*arguments)
    return str(caught.value)


@pytest.mark.parametrize("typed, name", [
    ("w8x21", "W8x21"), ("W8X21", "W8x21"), (" W 8 x 21 ", "W8x21"), ("W8\N{MULTIPLICATION SIGN}21", "W8x21"),
    ("L4x4x1/2", "L4x4x1/2"), ("l4x4x.5", "L4x4x1/2"), ("L2-1/2x2x1/4", "L2-1/2x2x1/4"),
    ("L 2 1/2 x 2 x 1/4", "L2-1/2x2x1/4"), ("L2.5x2x1/4", "L2-1/2x2x1/4"),
    ("HSS6x6x3/8", "HSS6x6x3/8"), ("hss 6 x 6 x 0.375", "HSS6x6x3/8"), ("HSS6x0.5", "HSS6.000x0.500"),
    ("2L4x4x1/2x3/8", "2L4x4x1/2x3/8"), ("2L 6 x 4 x 1/2 x 3/8 llbb", "2L6x4x1/2x3/8LLBB"),
    ("pipe 2 1/2 xs", "Pipe2-1/2XS"), ("Pipe 4 Std.", "Pipe4STD"), ("MC12x10.6", "MC12x10.6"),
    ("HP14x73", "HP14x73"), ("ST3x8.6", "ST3x8.6"),
])
def test_a_designation_is_read_as_it_is_typed(typed, name):
    assert shape(typed).name == name


def test_every_designation_is_read_in_capitals_and_in_small_letters():
    for name in names():
        assert shape(name) is shape(name.upper()) is shape(name.lower())


@pytest.mark.parametrize("typed, nearest", [
    ("W8x22", "W8x21, W8x24, W8x18"),
    ("W8x021.5", "W8x21, W8x24, W8x18"),
    ("HSS6x6x0.4", "HSS6x6x3/8, HSS6x6x5/16, HSS6x6x1/2"),
    ("L2-1/2x2x0.188", "L2-1/2x2x3/16, L2-1/2x2x1/4, L2-1/2x2x5/16"),
    ("2L6x4x1/2x3/8", "2L6x4x1/2x3/8LLBB, 2L6x4x1/2x3/8SLBB, 2L6x4x7/16x3/8LLBB"),
    ("2L4x4x1/2x1/2", "2L4x4x1/2x3/8, 2L4x4x7/16x3/8, 2L4x4x1/2x3/4"),
    ("WT8x26", "WT8x25, WT8x28.5, WT8x22.5"),
    ("Pipe2.3XS", "Pipe2-1/2XS, Pipe2-1/2STD, Pipe2-1/2XXS"),
    # 21/2 may be meant as 2-1/2 or as 10.5; it is not guessed.
    ("L21/2x2x1/4", "L2-1/2x2x1/4, L2x2x1/4, L2-1/2x2-1/2x1/4"),
    ("W8", "W8x67, W8x58, W8x48"),
    ("W1/0x3", "W10x39, W10x33, W10x30"),
    ("", "WT9x96, WT9x87.5, WT9x79"),
])
def test_an_unknown_designation_is_refused_with_the_nearest(typed, nearest):
    assert refusal(shape, typed) == f'shape: "{typed}" is not in {DATABASE}; the nearest are {nearest}.'


def test_a_very_long_text_is_refused_at_once():
    typed = "W" + "9" * 100_000 + "x1"
    assert refusal(shape, typed).startswith(f'shape: "{typed}" is not in ')


def test_an_unknown_family_is_refused():
    assert refusal(shapes, "HSS") == ('there is no family of shapes "HSS"; there are W, M, S, HP, C, MC, L, WT, MT, '
                                      "ST, 2L, HSS rectangular, HSS square, HSS round, PIPE.")


def test_a_wall_needs_a_hollow_section_and_a_known_standard():
    assert refusal(shape("W8x21").wall, "A500") == (
        "W8x21 has no wall; only HSS and pipe have a design wall thickness.")
    assert refusal(shape("HSS6x6x3/8").wall, "A36") == (
        'standard: "A36" has no design wall here; there are A500, A847, A618, A53, A1065, A1085 (AISC 360 B4.2).')


def test_an_area_with_the_full_wall_is_not_invented():
    assert refusal(shape("HSS6x6x3/8").gross_area, "A1085") == (
        "HSS6x6x3/8 to A1085 is designed with its full wall of 0.375 in (AISC 360 B4.2), but the table's area of "
        "7.58 in2 goes with 0.349 in. Take the area from the producer's table and enter it.")
    assert shape("HSS6x6x3/8").gross_area("A500") == 7.58
    assert shape("W8x21").gross_area("A992") == 6.16


def test_a_hollow_section_without_a_known_standard_has_no_area():
    assert refusal(shape("Pipe4STD").gross_area, "A501") == (
        'standard: "A501" has no design wall here; there are A500, A847, A618, A53, A1065, A1085 (AISC 360 B4.2).')


def test_only_open_sections_have_the_lower_bound_on_u():
    assert not shape("HSS6x6x3/8").is_open and not shape("Pipe4STD").is_open
    assert all(shape(name).is_open for name in ("W8x21", "C15x50", "L4x4x1/2", "WT8x25", "2L4x4x1/2"))


def test_a_shape_cannot_be_changed():
    with pytest.raises(AttributeError):
        shape("W8x21").A = 1.0
