"""An equation and its numbers -> LaTeX. The only place that knows handcalcs.

handcalcs reads the source lines of an equation and writes symbol = substitution = result. It is run once for each
equation and unit set, with stand-ins for the values; the printed digits are then put in the places of the stand-ins.
So an edit costs a text replacement, and the shape of every line is still the renderer's own reading of the code that
ran. Before a template is made, the lines are run once more on pint quantities, which proves the units.
"""

import re
import sys
from dataclasses import dataclass
from functools import lru_cache
from math import inf, pi

from handcalcs import global_config
from handcalcs.handcalcs import LatexRenderer

from calclib import units
from calclib.equations import form

# The names below are what the renderer is given for a name that prints as the trade's own symbol.
_ALIAS = "Zsymbol{}"


class TypesetError(RuntimeError):
    """The renderer's reading of an equation and the numbers computed do not agree; nothing is shown."""


@dataclass(frozen=True)
class Line:
    """One printed equation, each part LaTeX: lhs = symbolic = substituted = result."""

    lhs: str
    symbolic: str
    substituted: str
    result: str

    def parts(self):
        return [part for part in (self.symbolic, self.substituted, self.result) if part]


class _Standin:
    """A value that prints as a mark, to be replaced by printed digits."""

    def __init__(self, mark):
        self.mark = mark

    def __str__(self):
        return self.mark

    def __format__(self, spec):
        return self.mark


def _rendered(source, values):
    """Return the renderer's LaTeX of some lines, and leave the recursion limit, which it raises, as it was."""
    limit = sys.getrecursionlimit()
    try:
        return LatexRenderer("# Short\n" + source, values,
                             {"precision": None, "sci_not": None, "override": ""}).render(dict(global_config._config))
    finally:
        sys.setrecursionlimit(limit)


@lru_cache(512)
def _templates(equation, unit_set, symbols):
    """Return one (lhs, symbolic, substituted) a line of `equation`, with marks in the places of values."""
    symbols = {**equation.symbols, **dict(symbols)}
    names = [*equation.arguments, *equation.results]
    alias = {name: _ALIAS.format(chr(ord("a") + i)) for i, name in enumerate(names) if name in symbols}
    source = "\n".join(re.sub(r"\b[A-Za-z]\w*\b", lambda m: alias.get(m[0], m[0]), line) for line in equation.lines)
    mark = {name: f"⟦{i}⟧" for i, name in enumerate(names)}
    values = {alias.get(name, name): _Standin(mark[name]) for name in names}
    values["pi"] = _Standin(r"\pi")
    rendered = _rendered(source, values)
    lines = [line for line in re.split(r"\\\\", re.sub(r"\\(?:begin|end)\{aligned\}|\$\$", "", rendered))
             if line.strip()]
    if len(lines) != len(equation.lines):
        raise TypesetError(f"{equation.name}: {len(equation.lines)} lines ran and {len(lines)} are shown")
    made = []
    for line in lines:
        parts = [part.strip() for part in line.split("&=")]
        lhs, middle, result = parts if len(parts) == 3 else ("", "", "")
        symbolic, equals, substituted = middle.partition(" = ")
        if not equals or "=" in substituted or result.count("⟦") != 1:
            raise TypesetError(f"{equation.name}: shown in an unexpected form: {line}")
        made.append(tuple(_tidy(_with_symbols(part, alias, symbols, mark)) for part in (lhs, symbolic, substituted)))
    _check_marks(equation, made, mark)
    return tuple(made)


def _with_symbols(latex, alias, symbols, mark):
    for name, stand in alias.items():
        symbol = symbols[name]
        latex = latex.replace(rf"\mathrm{{{stand}}}", mark[name] if symbol is None else symbol)
    if "Zsymbol" in latex:
        raise TypesetError(f"a symbol was not set: {latex}")
    return latex


def _tidy(latex):
    latex = re.sub(r"\\left\( (\S+) \\right\)(?= \^)", r"\1", latex)               # (d)^2 -> d^2, but a value keeps
    latex = re.sub(r"(⟦\d+⟧)(?=\s*\^)", r"\\left( \1 \\right)", latex)             # its brackets: (1 in)^2
    latex = re.sub(r"\^\{ \\left\( - (\d+) \\right\) \}", r"^{ -\1 }", latex)               # a negative power
    latex = re.sub(r"\\operatorname\{(min|max)imum\}", r"\\\1", latex)
    return re.sub(r"\s+", " ", latex).strip()


def _check_marks(equation, made, mark):
    """Every argument that a line uses must show its value in the substituted half, and no other may."""
    for line, (_, _, substituted) in zip(equation.lines, made, strict=True):
        used = set(re.findall(r"[A-Za-z]\w*", line.split(" = ", 1)[1])) & {*equation.arguments, *equation.results}
        shown = {name for name in mark if mark[name] in substituted}
        if used != shown:
            raise TypesetError(f"{equation.name}: the line uses {sorted(used)} and shows values of {sorted(shown)}")


@lru_cache(512)
def _prove_units(equation, unit_set):
    """Run the lines on pint quantities; raise unless each result has the unit that the docstring states."""
    quantity = units.registry().Quantity
    space = {name: getattr(form, name) for name in form.FUNCTIONS} | {"pi": pi}
    floats = dict(space)
    for i, argument in enumerate(equation.arguments.values()):
        # Any numbers in range do that differ; they fall, since a part stands behind its whole.
        value = 4 / (1 + 0.25 * i) if argument.high == inf else (argument.low + argument.high) / 2
        floats[argument.name] = value
        space[argument.name] = quantity(value, argument.dimension.base[argument.unit_set or unit_set])
    for line, result in zip(equation.lines, equation.results.values(), strict=True):
        for names in (space, floats):
            exec(line, {"__builtins__": {}}, names)  # our own source, checked at import by calclib.equations.form
        base = result.dimension.base[result.unit_set or unit_set]
        shown = quantity(space[result.name]).to(base).magnitude
        if abs(shown - floats[result.name]) > 1e-9 * abs(floats[result.name]):
            raise TypesetError(f"{equation.name}: {result.name} is {floats[result.name]} in plain numbers and {shown} "
                               "in quantities")


def line_values(equation, values):
    """Return every name of `equation` with its number: the arguments given and each assigned name."""
    names = {name: getattr(form, name) for name in form.FUNCTIONS} | {"pi": pi} | dict(values)
    for line in equation.lines:
        exec(line, {"__builtins__": {}}, names)  # as above
    return {name: names[name] for name in (*equation.arguments, *equation.results)}


def typeset(step, unit_set):
    """Return the Lines of a step of a calc: as many as its equation has.

    Raises
    ------
    TypesetError : what would be shown is not what was computed.
    """
    if step.equation is None:
        symbol, dimension = step.chosen
        return [Line(symbol, "", "", units.latex(step.result, dimension, unit_set))]
    equation = step.equation
    _prove_units(equation, unit_set)
    numbers = line_values(equation, step.values)
    if abs(numbers[equation.result.name] - step.result) > 1e-12 * abs(step.result):
        raise TypesetError(f"{equation.name}: computed {step.result}, shown {numbers[equation.result.name]}")
    kinds = {**equation.arguments, **equation.results}
    printed = [print_value(kinds[name], number, unit_set) for name, number in numbers.items()]
    lines = []
    templates = _templates(equation, unit_set, tuple(sorted(step.symbols.items())))
    for template, result in zip(templates, printed[-len(templates):], strict=True):
        put = [re.sub(r"⟦(\d+)⟧", lambda m: printed[int(m[1])], part) for part in template]
        lines.append(Line(*put, result))
    return lines


def print_value(argument, number, unit_set):
    """Return the LaTeX of one number: a ratio is rounded up, a factor printed as the standard prints it."""
    if argument.name == "ratio":
        return units.ratio_text(number)
    if argument.name in ("phi", "Omega"):
        return units.half_up(number, 2)
    return units.latex(number, argument.dimension, argument.unit_set or unit_set)
