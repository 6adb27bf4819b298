"""Entries as the shop writes them, and numbers as the trade prints them."""

import math
from decimal import ROUND_HALF_UP, Decimal
from fractions import Fraction

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from calclib import units
from calclib.errors import EntryError
from calclib.tolerance import RELATIVE
from calclib.units import AREA, FORCE, LENGTH, NUMBER, PITCH, SI, STRESS, US, read

DENOMINATORS = (2, 4, 8, 16, 32, 64)
VULGAR = {"¼": Fraction(1, 4), "½": Fraction(1, 2), "¾": Fraction(3, 4), "⅛": Fraction(1, 8), "⅜": Fraction(3, 8),
          "⅝": Fraction(5, 8), "⅞": Fraction(7, 8)}


@st.composite
def fractions(draw):
    """A fraction of an inch below one, as text and as number; not always in lowest terms."""
    bottom = draw(st.sampled_from(DENOMINATORS))
    top = draw(st.integers(1, bottom - 1))
    return f"{top}/{bottom}", Fraction(top, bottom)


spaces = st.sampled_from(["", " ", "  "])
inch_signs = st.sampled_from(["in", "in.", "inch", "inches", '"', "″", "”"])
foot_signs = st.sampled_from(["'", "′", "’", " ft"])


@given(fractions(), st.integers(0, 500), st.sampled_from(["-", " ", " - ", "  ", "–", "−"]), spaces,
       inch_signs)
def test_whole_and_fraction(fraction, whole, between, space, sign):
    text, value = fraction
    assert read(f"{whole}{between}{text}{space}{sign}", LENGTH, US, "f") == float(whole + value)
    assert read(f"{text}{space}{sign}", LENGTH, US, "f") == float(value)


@given(st.integers(0, 90), st.integers(0, 11), fractions(), foot_signs, st.sampled_from(["-", " ", "", " - "]),
       st.sampled_from(['"', "″", " in"]))
def test_feet_and_inches(feet, inches, fraction, foot, between, inch):
    text, value = fraction
    between = between if between.strip() or foot != " ft" else " "
    assert read(f"{feet}{foot}{between}{inches}{inch}", LENGTH, US, "f") == 12 * feet + inches
    assert read(f"{feet}{foot}{between}{inches} {text}{inch}", LENGTH, US, "f") == float(12 * feet + inches + value)
    assert read(f"{feet}{foot}{between}{inches}-{text}{inch}", LENGTH, US, "f") == float(12 * feet + inches + value)
    assert read(f"{feet}{foot}", LENGTH, US, "f") == 12 * feet


@given(st.integers(0, 500), st.sampled_from(sorted(VULGAR)), st.sampled_from(["", " ", "-"]), inch_signs)
def test_fraction_signs(whole, sign, between, inch):
    assert read(f"{whole}{between}{sign} {inch}", LENGTH, US, "f") == float(whole + VULGAR[sign])
    assert read(f"{sign}{inch}", LENGTH, US, "f") == float(VULGAR[sign])


@given(st.decimals(0, 10**6, places=4), spaces)
def test_a_decimal_in_the_base_unit_is_the_float_of_its_digits(number, space):
    for dimension, unit_set, unit in ((LENGTH, US, "in"), (LENGTH, SI, "mm"), (FORCE, US, "kip"), (FORCE, SI, "N"),
                                      (STRESS, US, "ksi"), (STRESS, SI, "MPa"), (AREA, US, "in2"), (AREA, SI, "mm²")):
        assert read(f"{number}{space}{unit}", dimension, unit_set, "f") == float(number)
    assert read(str(number), NUMBER, US, "f") == float(number)


# Every conversion by its definition: 1 in = 25.4 mm, 1 lbf = 4.4482216152605 N.
@pytest.mark.parametrize("text, dimension, unit_set, value", [
    ("25.4 mm", LENGTH, US, 1.0), ("1 in", LENGTH, SI, 25.4), ("1 ft", LENGTH, SI, 304.8), ("2.54 cm", LENGTH, US, 1.0),
    ("4.42 m", LENGTH, SI, 4420.0), ("1'-1\"", LENGTH, SI, 330.2), ("4.4482216152605 kN", FORCE, US, 1.0),
    ("1 kip", FORCE, SI, 4448.2216152605), ("2 kips", FORCE, US, 2.0), ("500 lbf", FORCE, US, 0.5),
    ("500 lb", FORCE, US, 0.5), ("110 kN", FORCE, SI, 110000.0), ("0.2 MN", FORCE, SI, 200000.0),
    ("1 ksi", STRESS, SI, 6.894757293168361), ("36000 psi", STRESS, US, 36.0), ("0.2 GPa", STRESS, SI, 200.0),
    ("345 N/mm2", STRESS, SI, 345.0), ("345 N/mm²", STRESS, SI, 345.0), ("1 in2", AREA, SI, 645.16),
    ("645.16 mm^2", AREA, US, 1.0), ("8 tpi", PITCH, US, 8.0), ("8 per in", PITCH, US, 8.0), ("8/in", PITCH, US, 8.0),
    ("2.5 mm", PITCH, SI, 2.5),
])
def test_conversion(text, dimension, unit_set, value):
    assert read(text, dimension, unit_set, "f") == pytest.approx(value, rel=1e-14)


@pytest.mark.parametrize("text, value", [
    ("1 1/8 in", 1.125), ("5'-3\"", 63.0), ("1½ in", 1.5),            # what pint alone reads as 0.125, 2 and 1
    ("1 1/8\"", 1.125), ("2'-6 1/2\"", 30.5), ("5’-3½”", 63.5), ("-1/8 in", -0.125), ("−1-1/8 in", -1.125),
    ("-5'-3\"", -63.0), ("+1/8 in", 0.125), ("1e1 in", 10.0), (" 13/16in ", 0.8125), ("5' 14\"", 74.0),
])
def test_entries_that_a_units_library_misreads(text, value):
    assert read(text, LENGTH, US, "f") == value


@given(st.text(max_size=30))
def test_any_text_is_read_or_refused_and_never_infinite(text):
    try:
        assert math.isfinite(read(text, LENGTH, US, "f"))
    except EntryError as error:
        assert str(error).startswith("f: ")


@given(st.floats(-1e9, 1e9), st.sampled_from(["in", "mm"]), st.sampled_from(units.UNIT_SETS))
def test_what_python_writes_of_a_number_is_read_back(value, unit, unit_set):
    shown = read(f"{value!r} {unit}", LENGTH, unit_set, "f")
    factor = {("in", US): 1.0, ("mm", SI): 1.0, ("in", SI): 25.4, ("mm", US): 1 / 25.4}[unit, unit_set]
    assert shown == pytest.approx(value * factor, rel=1e-14)


@pytest.mark.parametrize("text, unit_set, other", [
    ("20 mm", US, True), ("20 mm", SI, False), ("1-1/8 in", SI, True), ("1-1/8 in", US, False), ("1½ in", SI, True),
    ("2'-6 1/2\"", SI, True), ("2'-6 1/2\"", US, False), ("4 m", US, True), ("", US, False), ("x", US, False),
])
def test_whether_an_entry_is_in_the_other_unit_set(text, unit_set, other):
    assert units.is_other_set(text, LENGTH, unit_set) is other


# --- printing ----------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("value, places, text", [
    (87.75, 1, "87.8"), (2.5, 0, "3"), (-2.5, 0, "-3"), (104.65, 1, "104.7"), (104.64999999999999, 1, "104.7"),
    (0.5, 0, "1"), (1.005, 2, "1.01"), (2.675, 2, "2.68"), (0.0, 2, "0.00"), (1e6, 0, "1000000"),
])
def test_half_up(value, places, text):
    """2.675 is a hair below the tie in binary; a person sees 2.675 and rounds it up."""
    assert units.half_up(value, places) == text


@given(st.decimals("0.0001", 10**6, places=6))
def test_significant_figures_round_half_up_and_never_a_whole_figure_away(number):
    text = units.significant(float(number))
    shown = Decimal(text)
    places = max(0, 3 - shown.adjusted())
    assert -shown.as_tuple().exponent == places or number == 0
    assert abs(shown - number) <= Decimal(1).scaleb(-places) / 2
    if number >= 1000:
        assert shown == number.quantize(Decimal(1), ROUND_HALF_UP)


@pytest.mark.parametrize("value, text", [
    (9.9996, "10.00"), (99.996, "100.0"), (999.96, "1000"), (9999.6, "10000"), (0.99996, "1.000"), (12494.2, "12494"),
    (123456.7, "123457"), (0.0, "0"), (-45.0, "-45.00"), (0.0012345, "0.001235"), (33.75, "33.75"),
])
def test_significant(value, text):
    assert units.significant(value) == text


@pytest.mark.parametrize("value", [math.nan, math.inf, -math.inf])
def test_what_is_not_finite_is_never_printed(value):
    with pytest.raises(ValueError, match="never printed"):
        units.significant(value)


@given(st.integers(1, 64 * 200))
def test_a_size_that_is_a_fraction_of_an_inch_prints_as_one_and_is_read_back(parts):
    value = parts / 64
    text = units.text(value, LENGTH, US)
    assert read(text, LENGTH, US, "f") == value
    assert "." not in text


@given(st.decimals("0.001", 1000, places=3))
def test_a_size_is_a_fraction_only_where_it_is_exactly_one(number):
    exact = Fraction(number) * 64
    text = units.text(float(number), LENGTH, US)
    assert ("/" in text) == (exact.denominator == 1 and exact % 64 != 0)
    if exact.denominator == 1:
        assert read(text, LENGTH, US, "f") == float(number)


@given(st.decimals("0.001", 5000, places=2), st.sampled_from([(LENGTH, SI), (STRESS, US), (STRESS, SI), (FORCE, US),
                                                             (FORCE, SI), (AREA, US), (AREA, SI), (LENGTH, US)]))
def test_a_printed_number_is_read_back_within_half_a_unit_of_its_fourth_figure(number, kind):
    dimension, unit_set = kind
    text = units.text(float(number), dimension, unit_set)
    assert read(text, dimension, unit_set, "f") == pytest.approx(float(number), rel=0.5001e-3)


@pytest.mark.parametrize("value, dimension, unit_set, text, latex", [
    (1.125, LENGTH, US, "1-1/8 in", r"1\tfrac{1}{8}\ \mathrm{in}"),
    (0.125, LENGTH, US, "1/8 in", r"\tfrac{1}{8}\ \mathrm{in}"),
    (8.0, LENGTH, US, "8 in", r"8\ \mathrm{in}"),
    (1.03, LENGTH, US, "1.03 in", r"1.03\ \mathrm{in}"),
    (1.61249, LENGTH, US, "1.612 in", r"1.612\ \mathrm{in}"),
    (20.0, LENGTH, SI, "20 mm", r"20\ \mathrm{mm}"),
    (20.5, LENGTH, SI, "20.5 mm", r"20.5\ \mathrm{mm}"),
    (0.0, LENGTH, US, "0 in", r"0\ \mathrm{in}"),
    (33.75, FORCE, US, "33.75 kip", r"33.75\ \mathrm{kip}"),
    (24000.0, FORCE, SI, "24.00 kN", r"24.00\ \mathrm{kN}"),
    (65.0, STRESS, US, "65 ksi", r"65\ \mathrm{ksi}"),
    (448.159, STRESS, SI, "448.2 MPa", r"448.2\ \mathrm{MPa}"),
    (2.125, AREA, US, "2.125 in²", r"2.125\ \mathrm{in}^{2}"),
    (0.95, NUMBER, US, "0.95", "0.95"),
    (8.0, PITCH, US, "8 per in", r"8\ \mathrm{in}^{-1}"),
    (2.5, PITCH, SI, "2.5 mm", r"2.5\ \mathrm{mm}"),
])
def test_how_the_trade_prints_it(value, dimension, unit_set, text, latex):
    assert units.text(value, dimension, unit_set) == text
    assert units.latex(value, dimension, unit_set) == latex


# --- the ratio ---------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("value, text", [
    (1.0004, "1.001"), (1.0, "1.000"), (0.9996, "1.000"), (0.99901, "1.000"), (0.71111, "0.712"), (0.712, "0.712"),
    (0.0, "0.000"), (12.3451, "12.346"), (7.8 / (1.3 * 6.0), "1.000"), ((1.3 * 6.0) / 7.8, "1.000"), (1e-7, "0.001"),
    (1 + 9e-10, "1.000"), (1 + 1e-8, "1.001"),
])
def test_a_ratio_is_rounded_up(value, text):
    assert units.ratio_text(value) == text


@given(st.floats(0, 100))
def test_a_printed_ratio_is_never_below_the_ratio_and_less_than_a_unit_above(value):
    shown = float(units.ratio_text(value))
    assert value * (1 - 1e-9) <= shown < value + 0.001 + 1e-9


@given(st.floats(0.9, 1.1) | st.floats(1 - 3e-9, 1 + 3e-9))
def test_a_ratio_that_prints_as_one_or_less_passes_and_any_other_fails(value):
    assume(abs(value - 1 - RELATIVE) > 1e-14)
    assert (float(units.ratio_text(value)) <= 1) == (value <= 1 + RELATIVE)
