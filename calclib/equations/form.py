"""The form every equation has, enforced at import, and the functions it may call."""

import ast
import inspect
import math
import re
import textwrap
from dataclasses import dataclass, field

import numpy as np

from calclib import units
from calclib.errors import RangeError

# What an equation may call; defined at the end of this file. Angles are in radians. A sine stands last in its
# product: sin(x) times y may be read as the sine of x times y.
FUNCTIONS = ("sqrt", "minimum", "maximum", "sin", "cos", "tan", "asin")
_ALLOWED = (ast.BinOp, ast.UnaryOp, ast.USub, ast.Add, ast.Sub, ast.Mult, ast.Div, ast.Pow, ast.Name, ast.Load,
            ast.Constant, ast.Call)
# The renderer drops every line that holds one of these, even inside a longer name.
_SWALLOWED = ("def", "return", "@", "#")


class EquationFormError(TypeError):
    """An equation is written in a way that the renderer would not show truthfully."""


@dataclass(frozen=True)
class Cite:
    """Where an equation stands: the document, and the clause in each edition that has it."""

    document: str
    clauses: dict                 # edition -> clause with equation number
    unread: tuple = ()            # editions whose wording was not read: "from memory, verify"

    def text(self, edition):
        """Return e.g. 'AISC 360-22 D5.1(a), Eq. D5-1'."""
        if edition not in self.clauses:
            raise RangeError(f"{self.document}-{edition} has no such equation; it stands in "
                             + ", ".join(f"{self.document}-{e}" for e in self.clauses) + ".")
        document = f"{self.document}-{edition}" if edition else self.document
        memory = " (from memory, verify)" if edition in self.unread else ""
        return f"{document} {self.clauses[edition]}{memory}".strip()


@dataclass(frozen=True)
class Argument:
    """One argument or result as its docstring states it."""

    name: str
    meaning: str
    dimension: units.Dimension
    unit: str                     # as the docstring writes it
    unit_set: str | None          # the only set the unit belongs to, or None
    low: float = -math.inf
    high: float = math.inf
    open_low: bool = False

    def check(self, value, owner):
        """Raise RangeError unless a float lies in range; NaN is outside. Arrays become NaN outside."""
        if isinstance(value, np.ndarray):
            inside = (value > self.low) if self.open_low else (value >= self.low)
            return np.where(inside & (value <= self.high), value, np.nan)
        inside = (value > self.low if self.open_low else value >= self.low) and value <= self.high
        if not inside:
            unit = "" if self.unit == "1" else f" {self.unit}"
            limit = "above" if self.open_low else "at least"
            limit = f"{limit} {self.low:g}" + (f" and at most {self.high:g}" if self.high < math.inf else "")
            raise RangeError(f"{self.meaning} {self.name} is {value:g}{unit}; the equation of {owner} covers "
                             f"{limit}{unit}.")
        return value


_ARGUMENT = re.compile(r"^(\w+) : (.+?) \[([^\]]+)\](?:, (.+))?$")
_RANGES = {"positive": (0.0, math.inf, True), "not negative": (0.0, math.inf, False),
           None: (-math.inf, math.inf, False)}


def _argument(line, owner):
    match = _ARGUMENT.match(line)
    if not match:
        raise EquationFormError(f'{owner}: "{line}" is not "name : meaning [unit], range"')
    name, meaning, unit, span = match.groups()
    if unit not in units.DOCSTRING_UNITS:
        raise EquationFormError(f"{owner}: unit [{unit}] of {name} is not one of {list(units.DOCSTRING_UNITS)}")
    dimension, unit_set = units.DOCSTRING_UNITS[unit]
    if span in _RANGES:
        low, high, open_low = _RANGES[span]
    else:
        numbers = re.fullmatch(r"([\d.]+) to ([\d.]+)", span)
        if not numbers:
            raise EquationFormError(f'{owner}: range "{span}" of {name} is not "positive", "not negative" or "A to B"')
        low, high, open_low = float(numbers[1]), float(numbers[2]), False
    return Argument(name, meaning, dimension, unit, unit_set, low, high, open_low)


def _docstring_arguments(function):
    doc = inspect.getdoc(function) or ""
    sections = re.split(r"^(Parameters|Returns|Source)\n-+\n|^Source: ", doc, flags=re.MULTILINE)
    named = {sections[i]: sections[i + 1] for i in range(1, len(sections) - 1, 2) if sections[i]}
    for section in ("Parameters", "Returns"):
        if section not in named:
            raise EquationFormError(f"{function.__name__}: the docstring has no {section} section")
    lines = {key: [line for line in body.strip().splitlines() if re.match(r"^\w+ : ", line)]
             for key, body in named.items()}
    arguments = [_argument(line, function.__name__) for line in lines["Parameters"]]
    results = [_argument(line, function.__name__) for line in lines["Returns"]]
    if [a.name for a in arguments] != list(inspect.signature(function).parameters):
        raise EquationFormError(f"{function.__name__}: the docstring and the arguments differ")
    return {a.name: a for a in arguments}, {r.name: r for r in results}


def _check_expression(node, owner, known, source):
    """Refuse an expression that is more than arithmetic on `known` names and plain numbers."""
    called = {part.func for part in ast.walk(node) if isinstance(part, ast.Call)}
    for part in ast.walk(node):
        if not isinstance(part, _ALLOWED):
            raise EquationFormError(f"{owner}: {type(part).__name__} is not shown truthfully; one level up, "
                                    "make each outcome an equation of its own")
        if isinstance(part, ast.Call) and (not isinstance(part.func, ast.Name) or part.func.id not in FUNCTIONS
                                           or part.keywords):
            raise EquationFormError(f"{owner}: only {', '.join(FUNCTIONS)} may be called, without keywords")
        if isinstance(part, ast.Name) and part not in called and part.id not in known:
            raise EquationFormError(f"{owner}: {part.id} is neither an argument nor assigned above, so it would be "
                                    "shown without a value")
        if isinstance(part, ast.Constant):
            if type(part.value) not in (int, float):
                raise EquationFormError(f"{owner}: {part.value!r} is not a plain number")
            written = ast.get_source_segment(source, part)
            if not re.fullmatch(r"\d+(\.\d+)?", written):
                raise EquationFormError(f"{owner}: write the number {written} as plain digits")
    names = {part.id for part in ast.walk(node) if isinstance(part, ast.Name)} - {"pi", *FUNCTIONS}
    if isinstance(node, (ast.Name, ast.Constant)) or not names:
        raise EquationFormError(f"{owner}: a bare name or number is not shown as an equation")
    if isinstance(node, ast.UnaryOp):
        raise EquationFormError(f"{owner}: an equation that is one negative term is not shown; write it as a product "
                                "or a difference")


def _body(function):
    """Return the assignments of `function` as source lines, after refusing what would not be shown truthfully."""
    owner = function.__name__
    source = textwrap.dedent(inspect.getsource(function))
    tree = ast.parse(source).body[0]
    statements = tree.body[1:]  # behind the docstring
    if len(statements) < 2 or not isinstance(statements[-1], ast.Return):
        raise EquationFormError(f"{owner}: an equation is a docstring, assignments and one closing return")
    seen = set(inspect.signature(function).parameters) | set(FUNCTIONS) | {"pi"}
    lines = source.splitlines()
    for statement in statements[:-1]:
        if not (isinstance(statement, ast.Assign) and len(statement.targets) == 1
                and isinstance(statement.targets[0], ast.Name)):
            raise EquationFormError(f"{owner}: line {statement.lineno} is not a plain assignment to one name")
        name = statement.targets[0].id
        if name in seen:
            raise EquationFormError(f"{owner}: {name} is assigned twice or hides an argument; the renderer reads a "
                                    "name only at the end")
        if statement.end_lineno != statement.lineno:
            raise EquationFormError(f"{owner}: {name} runs over several lines")
        line = lines[statement.lineno - 1]
        for word in _SWALLOWED:
            if word in line:
                raise EquationFormError(f'{owner}: the line of {name} holds "{word}" and would vanish')
        _check_expression(statement.value, owner, seen - set(FUNCTIONS), source)
        if line.strip() != f"{name} = {ast.get_source_segment(source, statement.value)}":
            raise EquationFormError(f'{owner}: write "{name} = " and the expression alone, without brackets around all '
                                    "of it")
        seen.add(name)
    first = tree.body[0].end_lineno
    if len(lines) > statements[-1].end_lineno or any(
            "#" in line for line in lines[first:statements[-1].lineno]):
        raise EquationFormError(f"{owner}: no comments among the lines of an equation")
    if not isinstance(statements[-1].value, ast.Name) or statements[-1].value.id != statements[-2].targets[0].id:
        raise EquationFormError(f"{owner}: return the name assigned last")
    return [lines[s.lineno - 1].strip() for s in statements[:-1]]


@dataclass(frozen=True, eq=False)
class Equation:
    """A function with what its docstring and source say of it. Call it with keywords on floats or arrays."""

    function: object
    cite: Cite
    symbols: dict                 # name -> LaTeX, for names that the renderer would not set as the trade writes them
    arguments: dict = field(default_factory=dict)
    results: dict = field(default_factory=dict)
    lines: tuple = ()

    @property
    def name(self):
        return self.function.__name__

    @property
    def result(self):
        return list(self.results.values())[-1]

    def __call__(self, **values):
        checked = {name: argument.check(values.pop(name), self.name.replace("_", " "))
                   for name, argument in self.arguments.items()}
        if values:
            raise TypeError(f"{self.name} has no argument {', '.join(values)}")
        return self.function(**checked)

    def __repr__(self):
        return f"<equation {self.name}>"


REGISTER = []  # every equation, in the order of import; the tests go through it


def equation(cite, symbols=None):
    """Return a decorator that makes a function an `Equation`, or refuses it at import.

    `symbols` gives the LaTeX of a name where the trade's symbol needs it. A constant that is printed with its unit,
    such as 0.63 in, is an argument whose symbol is ``None``: it prints as its value in both halves.
    """
    def make(function):
        arguments, results = _docstring_arguments(function)
        made = Equation(function, cite, dict(symbols or {}), arguments, results, tuple(_body(function)))
        assigned = [line.split(" = ")[0] for line in made.lines]
        if list(results) != assigned:
            raise EquationFormError(f"{function.__name__}: the Returns section names {list(results)}, the body "
                                    f"assigns {assigned}")
        module = function.__globals__
        module.setdefault("__test__", {})[function.__name__] = function  # doctest does not look into an Equation
        REGISTER.append(made)
        return made
    return make


def _plain(*values):
    return all(isinstance(value, (int, float)) for value in values)


def minimum(a, b):
    """Return the smaller of two numbers, arrays or quantities, for use inside an equation."""
    return min(a, b) if _plain(a, b) else np.minimum(a, b)


def maximum(a, b):
    """Return the larger of two numbers, arrays or quantities, for use inside an equation."""
    return max(a, b) if _plain(a, b) else np.maximum(a, b)


def sqrt(a):
    """Return the square root of a number, array or quantity, for use inside an equation."""
    return math.sqrt(a) if _plain(a) else np.sqrt(a)


def sin(a):
    """Return the sine of an angle [rad] that is a number, array or quantity, for use inside an equation."""
    return math.sin(a) if _plain(a) else np.sin(a)


def cos(a):
    """Return the cosine of an angle [rad] that is a number, array or quantity, for use inside an equation."""
    return math.cos(a) if _plain(a) else np.cos(a)


def tan(a):
    """Return the tangent of an angle [rad] that is a number, array or quantity, for use inside an equation."""
    return math.tan(a) if _plain(a) else np.tan(a)


def asin(a):
    """Return the angle [rad] of a sine that is a number, array or quantity, for use inside an equation.

    A number outside -1 to 1 is refused; in an array it becomes NaN, as every value outside a range does.

    >>> round(asin(0.5), 6)
    0.523599
    """
    if _plain(a):
        if not -1 <= a <= 1:
            raise RangeError(f"the sine of an angle is {a:g}; it lies between -1 and 1.")
        return math.asin(a)
    with np.errstate(invalid="ignore"):
        return np.arcsin(a)
