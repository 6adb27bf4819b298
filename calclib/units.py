"""One unit registry; reads entries as the shop writes them; prints quantities as the trade prints them.

Two unit sets, each consistent, so that equations need no factor:

    US   kip, in, in**2, ksi
    SI   N, mm, mm**2, MPa      (forces are printed in kN)

Constants that a standard prints as a pair (1/16 in and 2 mm) are chosen by the unit set and never converted.
"""

import math
import re
from dataclasses import dataclass
from decimal import ROUND_HALF_UP, Decimal
from fractions import Fraction
from functools import lru_cache

import pint

from calclib.errors import EntryError, with_article

US, SI = "US", "SI"
UNIT_SETS = (US, SI)


@lru_cache(1)
def registry():
    """Return the one pint registry, made when first needed (it costs a tenth of a second)."""
    ureg = pint.UnitRegistry(cache_folder=":auto:")
    ureg.formatter.default_format = "~P"
    return ureg


@dataclass(frozen=True, eq=False)
class Dimension:
    """What a number measures: its unit in each set, the units an entry may use, and an example of each."""

    name: str
    base: dict           # unit set -> pint unit in which the equations compute
    printed: dict        # unit set -> (text, LaTeX, factor from the base unit)
    accepted: dict       # text an entry may use -> pint unit
    examples: dict       # unit set -> example entry


_LENGTHS = {
    "in": "inch", "in.": "inch", "inch": "inch", "inches": "inch", '"': "inch", "ft": "foot", "'": "foot",
    "mm": "millimeter", "cm": "centimeter", "m": "meter",
}
_ANGLES = {"deg": "degree", "degrees": "degree", "°": "degree", "rad": "radian"}
_FORCES = {"kip": "kip", "kips": "kip", "lbf": "force_pound", "lb": "force_pound", "N": "newton", "kN": "kilonewton",
           "MN": "meganewton"}
_STRESSES = {"ksi": "ksi", "psi": "psi", "MPa": "megapascal", "GPa": "gigapascal", "N/mm2": "megapascal",
             "N/mm²": "megapascal"}

LENGTH = Dimension(
    "length", {US: "inch", SI: "millimeter"}, {US: ("in", r"\mathrm{in}", 1), SI: ("mm", r"\mathrm{mm}", 1)},
    _LENGTHS, {US: "13/16 in", SI: "20 mm"})
AREA = Dimension(
    "area", {US: "inch**2", SI: "millimeter**2"},
    {US: ("in²", r"\mathrm{in}^{2}", 1), SI: ("mm²", r"\mathrm{mm}^{2}", 1)},
    {"in2": "inch**2", "in²": "inch**2", "in^2": "inch**2", "mm2": "millimeter**2", "mm²": "millimeter**2",
     "mm^2": "millimeter**2"}, {US: "0.334 in2", SI: "245 mm2"})
VOLUME = Dimension(     # of a section modulus, the only third power of a length that the trade prints here
    "section modulus", {US: "inch**3", SI: "millimeter**3"},
    {US: ("in³", r"\mathrm{in}^{3}", 1), SI: ("mm³", r"\mathrm{mm}^{3}", 1)},
    {"in3": "inch**3", "in³": "inch**3", "in^3": "inch**3", "mm3": "millimeter**3", "mm³": "millimeter**3",
     "mm^3": "millimeter**3"}, {US: "20.4 in3", SI: "334000 mm3"})
FORCE = Dimension(
    "force", {US: "kip", SI: "newton"}, {US: ("kip", r"\mathrm{kip}", 1), SI: ("kN", r"\mathrm{kN}", 1e-3)},
    _FORCES, {US: "24 kip", SI: "110 kN"})
STRESS = Dimension(
    "stress", {US: "ksi", SI: "megapascal"}, {US: ("ksi", r"\mathrm{ksi}", 1), SI: ("MPa", r"\mathrm{MPa}", 1)},
    _STRESSES, {US: "50 ksi", SI: "345 MPa"})
PER_LENGTH = Dimension(
    "threads per length", {US: "1/inch", SI: "1/millimeter"},
    {US: ("per in", r"\mathrm{in}^{-1}", 1), SI: ("per mm", r"\mathrm{mm}^{-1}", 1)},
    {"per in": "1/inch", "tpi": "1/inch", "/in": "1/inch"}, {US: "10 tpi", SI: "10 tpi"})
# The trade states a thread by threads per inch in US units and by its pitch in SI.
PITCH = Dimension(
    "thread pitch", {US: "1/inch", SI: "millimeter"},
    {US: ("per in", r"\mathrm{in}^{-1}", 1), SI: ("mm", r"\mathrm{mm}", 1)},
    {"per in": "1/inch", "tpi": "1/inch", "/in": "1/inch", "mm": "millimeter"}, {US: "10 tpi", SI: "2.5 mm"})
# The equations compute in radians. The trade states a direction in degrees; an arc enters a formula in radians.
ANGLE = Dimension(
    "angle", {US: "radian", SI: "radian"}, dict.fromkeys(UNIT_SETS, ("deg", r"\mathrm{deg}", 180 / math.pi)), _ANGLES,
    {US: "30 deg", SI: "30 deg"})
ARC = Dimension(
    "angle of an arc", {US: "radian", SI: "radian"}, dict.fromkeys(UNIT_SETS, ("rad", r"\mathrm{rad}", 1)), _ANGLES,
    {US: "1.49 rad", SI: "1.49 rad"})
NUMBER = Dimension("number", {US: "", SI: ""}, {US: ("", "", 1), SI: ("", "", 1)}, {"": ""}, {US: "0.75", SI: "0.75"})

DIMENSIONS = {d.name: d for d in (LENGTH, AREA, VOLUME, FORCE, STRESS, PER_LENGTH, PITCH, ANGLE, ARC, NUMBER)}
# How a docstring writes the unit of an argument -> its dimension, and the one unit set it holds in (None: both).
DOCSTRING_UNITS = {
    "in or mm": (LENGTH, None), "in2 or mm2": (AREA, None), "kip or N": (FORCE, None), "ksi or MPa": (STRESS, None),
    "in3 or mm3": (VOLUME, None), "1/in or 1/mm": (PER_LENGTH, None), "rad": (ARC, None),
    "rad, printed in degrees": (ANGLE, None),
    "in": (LENGTH, US), "mm": (LENGTH, SI), "in2": (AREA, US), "mm2": (AREA, SI), "1/in": (PER_LENGTH, US),
    "1": (NUMBER, None),
}

# --- reading ---------------------------------------------------------------------------------------------------

LONGEST_ENTRY = 40  # characters; nothing the shop writes is longer
_VULGAR = {"¼": "1/4", "½": "1/2", "¾": "3/4", "⅛": "1/8", "⅜": "3/8", "⅝": "5/8", "⅞": "7/8"}
_NUMBER = r"(?:\d+(?: *- *| +)\d+/\d+|\d+/\d+|\d+\.?\d*(?:[eE][+-]?\d+)?|\.\d+(?:[eE][+-]?\d+)?)"
_ENTRY = re.compile(rf"([+-]?)\s*({_NUMBER})\s*(.*)", re.DOTALL)
_FEET_AND_INCHES = re.compile(rf"([+-]?)\s*(\d+)\s*(?:'|ft\b)\s*[- ]?\s*({_NUMBER})\s*(?:\"|in\.?|inch|inches)")


def _number(text, field):
    """Return the number that stands there: exact where it has a fraction, infinite where no float holds it."""
    if "/" not in text:
        return float(text)
    whole, _, fraction = re.sub(r"[ -]+(?=\d+/)", "+", text).rpartition("+")
    try:
        value = Fraction(fraction)
    except ZeroDivisionError as error:
        raise EntryError(field, f'"{text}" divides by zero') from error
    if whole and value >= 1:
        raise EntryError(field, f'"{text}" is a whole number and a fraction above one; write the size once, '
                                'as in "1-1/8 in"')
    return value + Fraction(whole or 0)


def _plain(text):
    """Return an entry with the signs of a keyboard: 1½ as 1 1/2, ’ as ', − as -."""
    plain = re.sub("[¼½¾⅛⅜⅝⅞]", lambda m: " " + _VULGAR[m.group()], text.strip())
    plain = plain.replace("’", "'").replace("′", "'").replace("”", '"').replace("″", '"').replace("−", "-")
    return plain.replace("–", "-").strip()


def _convert(value, unit, dimension, unit_set, shown, field):
    """Return `value` [unit] in the base unit of the set; a unit that is the base unit is not multiplied."""
    base = dimension.base[unit_set]
    if unit == base:
        return value
    try:
        return float(registry().Quantity(value, unit).to(base).magnitude)
    except pint.DimensionalityError as error:
        raise EntryError(field, f'"{shown}" is not how {with_article(dimension.name)} is stated in {unit_set} units; '
                                f'write "{dimension.examples[unit_set]}"') from error


@lru_cache(4096)
def read(text, dimension, unit_set, field):
    """Return the number that `text` states, in the base unit of `dimension` in `unit_set`.

    Accepts what the trade writes: ``13/16 in``, ``1-1/8 in``, ``1 1/8"``, ``2'-6 1/2"``, ``20 mm``, ``50 ksi``.

    Raises
    ------
    EntryError : no number, no unit, a unit of something else, a decimal comma, not finite.

    >>> read('1-1/8 in', LENGTH, US, "pin_diameter")
    1.125
    >>> read("2'-6 1/2\\"", LENGTH, US, "length")
    30.5
    >>> read("20", LENGTH, US, "hole_diameter")
    Traceback (most recent call last):
    ...
    calclib.errors.EntryError: hole_diameter: 20 has no unit; write "13/16 in" or "20 mm".
    """
    shown, plain = text.strip(), _plain(text)
    examples = f'write "{dimension.examples[US]}" or "{dimension.examples[SI]}"'
    if dimension is NUMBER:
        examples = f'write a plain number such as "{dimension.examples[US]}"'
    if not plain:
        raise EntryError(field, f"is empty; {examples}")
    if len(plain) > LONGEST_ENTRY:
        raise EntryError(field, f'"{shown[:LONGEST_ENTRY]}..." is too long for a number with a unit; {examples}')
    feet = _FEET_AND_INCHES.fullmatch(plain)
    if feet and dimension is LENGTH:
        inches = 12 * int(feet[2]) + _number(feet[3], field)
        return _convert(float(-inches if feet[1] == "-" else inches), "inch", LENGTH, unit_set, shown, field)
    entry = _ENTRY.fullmatch(plain)
    if not entry:
        raise EntryError(field, f'"{shown}" is not a number with a unit; {examples}')
    sign, digits, unit = entry.groups()
    unit = unit.strip()
    if unit.startswith(","):
        raise EntryError(field, f'"{shown}" has a comma in the number; write a decimal point and no thousands mark')
    value = _number(digits, field)
    value = float(-value if sign == "-" else value)
    if not math.isfinite(value):
        raise EntryError(field, f'"{shown}" is not a finite number')
    if unit == "" and dimension is not NUMBER:
        raise EntryError(field, f"{shown} has no unit; {examples}")
    if unit in dimension.accepted:
        return _convert(value, dimension.accepted[unit], dimension, unit_set, shown, field)
    for other in DIMENSIONS.values():
        if unit in other.accepted:
            raise EntryError(field, f'"{shown}" is {with_article(other.name)}, and {with_article(dimension.name)} is '
                                    f"needed; {examples}")
    raise EntryError(field, f'"{unit}" in "{shown}" is not a unit known here; {examples}')


def is_other_set(text, dimension, unit_set):
    """Return whether `text` is written in a unit of the other set, such as mm in a US calc.

    >>> is_other_set("20 mm", LENGTH, US)
    True
    """
    plain = _plain(text)
    feet = dimension is LENGTH and _FEET_AND_INCHES.fullmatch(plain)
    unit = "inch" if feet else dimension.accepted.get(re.sub(rf"^[+-]?\s*{_NUMBER}\s*", "", plain))
    metric = {"millimeter", "centimeter", "meter", "newton", "kilonewton", "meganewton", "megapascal", "gigapascal",
              "millimeter**2"}
    return unit is not None and (unit in metric) != (unit_set == SI)


# --- printing --------------------------------------------------------------------------------------------------

DIGITS = 4  # significant figures of a computed value
FINEST_FRACTION = 64  # a size is printed as a fraction of an inch when it is a whole number of these


def half_up(value, places):
    """Return `value` with so many decimals, a half rounded away from zero, as the trade rounds.

    >>> half_up(87.75, 1), half_up(2.5, 0)
    ('87.8', '3')
    """
    clean = Decimal(f"{value:.12g}")  # 104.65 computed as 104.64999999999999 is still a half
    return str(clean.quantize(Decimal(1).scaleb(-places), ROUND_HALF_UP))


def significant(value, digits=DIGITS):
    """Return `value` with so many significant figures; whole figures are never rounded away.

    >>> significant(104.65), significant(45.0), significant(12494.2), significant(0.0012345)
    ('104.7', '45.00', '12494', '0.001235')
    """
    if value == 0:
        return "0"
    if not math.isfinite(value):
        raise ValueError("a number that is not finite is never printed")
    exponent = math.floor(math.log10(abs(value)))
    text = half_up(value, max(0, digits - 1 - exponent))
    if math.floor(math.log10(abs(float(text)))) > exponent:  # 9.9996 became 10.000
        text = half_up(value, max(0, digits - 2 - exponent))
    return text


def trimmed(value, digits=DIGITS):
    """Return `value` in significant figures without closing zeros: 65, 1.61, 0.75.

    >>> trimmed(65.0), trimmed(1.61), trimmed(1.6124)
    ('65', '1.61', '1.612')
    """
    text = significant(value, digits)
    return text.rstrip("0").rstrip(".") if "." in text else text


def inch_fraction(value):
    """Return (whole, numerator, denominator) of a size that is a fraction of an inch, else None.

    >>> inch_fraction(1.125), inch_fraction(1.03)
    ((1, 1, 8), None)
    """
    parts = value * FINEST_FRACTION
    if abs(parts - round(parts)) > 1e-9 or value <= 0:
        return None
    exact = Fraction(round(parts), FINEST_FRACTION)
    whole, rest = divmod(exact, 1)
    return int(whole), rest.numerator, rest.denominator


def _digits(value, dimension, unit_set):
    if dimension in (FORCE, AREA):
        return significant(value)
    return trimmed(value)


@lru_cache(4096)
def text(value, dimension, unit_set):
    """Return `value` [base unit] as the trade prints it, with its unit.

    >>> text(1.125, LENGTH, US), text(65.0, STRESS, US), text(24000.0, FORCE, SI), text(33.75, FORCE, US)
    ('1-1/8 in', '65 ksi', '24.00 kN', '33.75 kip')
    """
    unit, _, factor = dimension.printed[unit_set]
    fraction = inch_fraction(value) if dimension is LENGTH and unit_set == US else None
    if fraction:
        whole, numerator, denominator = fraction
        parts = [str(whole)] if whole or not numerator else []
        number = "-".join([*parts, f"{numerator}/{denominator}"] if numerator else parts)
    else:
        number = _digits(value * factor, dimension, unit_set)
    return f"{number} {unit}".strip()


@lru_cache(4096)
def latex(value, dimension, unit_set):
    r"""Return `value` [base unit] as LaTeX with its unit.

    >>> latex(1.125, LENGTH, US)
    '1\\tfrac{1}{8}\\ \\mathrm{in}'
    """
    _, unit, factor = dimension.printed[unit_set]
    fraction = inch_fraction(value) if dimension is LENGTH and unit_set == US else None
    if fraction:
        whole, numerator, denominator = fraction
        number = str(whole) if whole or not numerator else ""
        number += rf"\tfrac{{{numerator}}}{{{denominator}}}" if numerator else ""
    else:
        number = _digits(value * factor, dimension, unit_set)
    return rf"{number}\ {unit}" if unit else number


def ratio_text(value, places=3):
    """Return a ratio rounded up, so that 1.0004 never prints as 1.000.

    A billionth is not counted, as it is not in the judgment: 1.3 * 6.0 / 7.8 is a hair above 1 in binary.

    >>> ratio_text(1.0004), ratio_text(0.71111)
    ('1.001', '0.712')
    """
    scale = 10 ** places
    return f"{math.ceil(value * scale * (1 - 1e-9)) / scale:.{places}f}"
