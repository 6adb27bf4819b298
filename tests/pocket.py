r"""A pocket calculator for printed equations: LaTeX goes in, a verdict comes out. It knows nothing of calclib.

A line ``lhs = symbolic = substituted = result`` is checked as a reader checks it: the substituted half must be the
symbolic half with each symbol replaced by one value, and working it out from the digits printed must give the result.
A printed decimal stands for every number that rounds to it, so the working is interval arithmetic; a general-purpose
parser (SymPy, its Lark grammar) reads the mathematics.

What a reader has to know of the printing, and nothing more:
    - four figures are printed, closing zeros of sizes and stresses are left out, whole figures are never rounded away;
    - a fraction of an inch is exact; phi and Omega are exact; a number that stands in both halves is exact;
    - the ratio is rounded up.
"""

import math
import re
from fractions import Fraction
from functools import lru_cache

import sympy
from mpmath import iv, mp
from sympy.parsing.latex import parse_latex

# Factors to N and mm, exact by definition of the units.
_INCH, _KIP = Fraction("25.4"), Fraction("4448.2216152605")
FACTORS = {"in": _INCH, "mm": Fraction(1), "kip": _KIP, "kN": Fraction(1000), "ksi": _KIP / _INCH**2,
           "MPa": Fraction(1), "rad": Fraction(1), "deg": Fraction(math.pi) / 180}    # to 16 figures
EXACT = {r"\phi", r"\Omega"}
FIGURES = 4
NOT_COUNTED = Fraction(1, 10**9)     # what two computers may differ by

_NUMBER = (r"(?:(?P<decimal>\d+(?:\.\d+)?)?\\tfrac\{(?P<top>\d+)\}\{(?P<bottom>\d+)\}|(?P<plain>\d+(?:\.\d+)?))"
           r"(?:\\ \\mathrm\{(?P<unit>[A-Za-z]+)\}(?:\^\{(?P<power>-?\d)\})?)?")
_STRUCTURE = (r"\\left\(|\\right\)|\\frac|\\cdot|\\min|\\max|\\sqrt|(?:\\sin|\\cos|\\tan|\\arcsin)(?![A-Za-z])"
              r"|[-+{}^,]")
_SYMBOL = r"(?:\\bar\{[A-Za-z]\}|\\[A-Za-z]+|[A-Za-z])'?(?:_\{(?:[^{}]|\{[^{}]*\})*\})?"
_FUNCTIONS = {sympy.sin: iv.sin, sympy.cos: iv.cos, sympy.tan: iv.tan}
_LETTERS = "abcfghjkmnqrstuvwxyz"    # the parser gives no meaning of its own to these


class Wrong(AssertionError):
    """What is printed is not so."""


class Number:
    """One printed number: its digits, the interval it stands for, and its unit as a factor to N and mm."""

    def __init__(self, match, exact):
        self.text = match[0]
        unit, power = match["unit"], int(match["power"] or 1)
        if unit and unit not in FACTORS:
            raise Wrong(f"{match[0]}: no such unit")
        factor = FACTORS[unit] ** power if unit else Fraction(1)
        if match["bottom"]:
            value = Fraction(match["decimal"] or 0) + Fraction(int(match["top"]), int(match["bottom"]))
            half = Fraction(0)
        else:
            value = Fraction(match["plain"])
            half = Fraction(0) if exact else half_unit(match["plain"])
        half += 0 if exact else abs(value) * NOT_COUNTED
        self.low, self.high = (value - half) * factor, (value + half) * factor

    def interval(self):
        return _between(self.low, self.high)


def _between(low, high):
    lower, upper = iv.mpf(low.numerator) / low.denominator, iv.mpf(high.numerator) / high.denominator
    return iv.mpf([lower.a, upper.b])


def half_unit(digits):
    """Return half a unit of the last of the four figures that a printed decimal stands for."""
    value, places = Fraction(digits), len(digits.partition(".")[2])
    while 0 < value < Fraction(10) ** (FIGURES - 1 - places) and places < FIGURES:
        places += 1                  # closing zeros that were left out: 1.03 stands for 1.030
    return Fraction(1, 2 * 10**places)


def read_number(latex, exact=False):
    """Return the Number that is all of `latex`; it may be negative."""
    match = re.fullmatch(_NUMBER, latex.removeprefix("-"))
    if not match:
        raise Wrong(f"{latex}: not a number")
    number = Number(match, exact)
    if latex.startswith("-"):
        number.low, number.high = -number.high, -number.low
    return number


def _scan(latex, known):
    """Return (skeleton, atoms): the structure with a mark for each number or symbol, and these in order."""
    named = "|".join(re.escape(name) for name in sorted(known, key=len, reverse=True))
    token = re.compile((rf"(?P<named>{named})(?![A-Za-z_])|" if named else "")
                       + rf"(?P<structure>{_STRUCTURE})|(?P<number>{_NUMBER})|(?P<symbol>{_SYMBOL})|(?P<space>\\ | )")
    skeleton, atoms, place = [], [], 0
    while place < len(latex):
        match = token.match(latex, place)
        if not match:
            raise Wrong(f"{latex}: not read from {latex[place:]}")
        place = match.end()
        if match.lastgroup == "space" or match["space"]:
            continue
        if match["structure"]:
            skeleton.append(match[0])
        elif skeleton[-2:] == ["^", "{"] and match["number"] and match[0].isdigit():
            skeleton.append(match[0])                    # a whole power is part of the structure
        elif match[0] == r"\pi":
            skeleton.append(r"\pi")
        else:
            skeleton.append("#")
            atoms.append((match[0], match if match["number"] else None))
    return re.sub(r"\\left\( # \\right\)", "#", " ".join(skeleton)), atoms


@lru_cache(1000)
def _parse(skeleton):
    """Return the mathematics of a skeleton: a SymPy expression in one letter for each mark, and the letters."""
    letters = iter(_LETTERS)
    used = []

    def letter(match):
        used.append(next(letters) if match[0] == "#" else "p")
        return used[-1]

    parsed = parse_latex(re.sub(r"#|\\pi", letter, skeleton), backend="lark")
    if not isinstance(parsed, sympy.Expr):
        raise Wrong(f"{skeleton}: cannot be read in one way only")
    return parsed, [name for name in used if name != "p"]


def _work_out(expression, values):
    if expression.is_Symbol:
        return iv.pi if expression.name == "p" else values[expression.name]
    if expression.is_Rational:
        return iv.mpf(expression.p) / expression.q
    if expression.is_Pow and expression.exp.is_Integer:
        return _work_out(expression.base, values) ** int(expression.exp)
    if expression.is_Pow and expression.exp == sympy.Rational(1, 2):
        return iv.sqrt(_work_out(expression.base, values))
    if expression.is_Pow:
        return _work_out(expression.base, values) ** _work_out(expression.exp, values)
    if expression.func in _FUNCTIONS:
        return _FUNCTIONS[expression.func](_work_out(expression.args[0], values))
    if expression.func == sympy.asin:
        sine = _work_out(expression.args[0], values)
        return iv.mpf([mp.asin(sine.a), mp.asin(sine.b)])    # it rises with its argument
    parts = [_work_out(part, values) for part in expression.args]
    total = parts[0]
    for part in parts[1:]:
        if expression.is_Add:
            total += part
        elif expression.is_Mul:
            total *= part
        elif isinstance(expression, (sympy.Min, sympy.Max)):
            choose = min if isinstance(expression, sympy.Min) else max
            total = iv.mpf([choose(total.a, part.a), choose(total.b, part.b)])
        else:
            raise Wrong(f"{expression}: not on this calculator")
    return total


def check(lhs, symbolic, substituted, result, known):
    """Raise Wrong unless the line is right. `known` holds lhs -> result of the lines above, and takes this one."""
    if symbolic:
        form, symbols = _scan(symbolic, known)
        same, numbers = _scan(substituted, ())
        if form != same:
            raise Wrong(f"{symbolic} and {substituted} are not of one form")
        values = {}
        for (symbol, constant), (number, match) in zip(symbols, numbers, strict=True):
            if match is None:
                raise Wrong(f"{substituted}: {number} has no value")
            if constant is not None and number != symbol:
                raise Wrong(f"{symbolic}: {symbol} became {number}")
            if constant is None and values.setdefault(symbol, number) != number:
                raise Wrong(f"{substituted}: {symbol} has two values")
            if constant is None and known.get(symbol, number) != number:
                raise Wrong(f"{symbol} is {known[symbol]} above and {number} here")
        expression, letters = _parse(form)
        intervals = {letter: Number(match, constant is not None or symbol in EXACT).interval() for
                     letter, (symbol, constant), (_, match) in zip(letters, symbols, numbers, strict=True)}
        found = _work_out(expression, intervals)
        printed = _rounded_up(result) if lhs == r"\mathrm{ratio}" else read_number(result).interval()
        if found.b < printed.a or printed.b < found.a:
            raise Wrong(f"{substituted} gives {found}, printed {result}, which is {printed} in N and mm")
    known[lhs] = result


def _rounded_up(digits):
    value = Fraction(digits)
    return _between(value - Fraction(1, 1000), value * (1 + NOT_COUNTED))
