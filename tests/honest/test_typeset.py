"""What is typeset is what was computed, and the renderer reads every allowed form as Python does."""

import ast
import dataclasses
import math
import re
from pathlib import Path

import pytest
import sympy
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from pint import DimensionalityError
from pocket import check, read_number
from samples import PLATE_SI, ROD_SI, plate, rod
from sympy.parsing.latex import parse_latex
from written import written

from calclib import typeset as typesetting
from calclib import units
from calclib.calc import Step, evaluate
from calclib.case import load
from calclib.equations.aisc360 import pins, rods
from calclib.equations.form import REGISTER
from calclib.typeset import Line, TypesetError, line_values, print_value, typeset

pytestmark = pytest.mark.usefixtures("register")
CASES = sorted((Path(__file__).parent.parent.parent / "workbooks" / "cases").glob("*.yaml"))
SAMPLES = {**{path.stem: load(path) for path in CASES}, "plate": plate(), "plate SI": plate(**PLATE_SI), "rod": rod(),
           "rod SI": rod(**ROD_SI)}
OURS = [e for e in REGISTER if e.function.__module__.startswith("calclib.")]


def step_of(equation, **values):
    return Step(equation, values, equation(**values), {}, "")


def printed(latex):
    """Return (value in the base unit, half a unit of the last figure printed) of a printed result."""
    number = read_number(latex)
    low, high = float(number.low), float(number.high)
    return (low + high) / 2, (high - low) / 2


def in_base_of_pocket(value, dimension, unit_set):
    """Return a value [base unit] in N and mm, the units of the pocket calculator."""
    base = dimension.base[unit_set]
    return float(units.registry().Quantity(value, base).to_base_units().m_as(
        {"length": "mm", "area": "mm**2", "force": "N", "stress": "MPa", "threads per length": "1/mm", "number": "",
         "section modulus": "mm**3", "angle": "rad", "angle of an arc": "rad"}[
            dimension.name]))


@pytest.mark.parametrize("name", SAMPLES)
def test_every_result_printed_is_the_value_computed(name):
    """Each step, its result read back out of the LaTeX; the number recorded by the calc lies in what is printed."""
    calc = evaluate(SAMPLES[name])
    count = 0
    for block in calc.blocks:
        for step in block.steps:
            line = typeset(step, calc.x.units)[-1]
            if step.equation and step.equation.name == "ratio":
                assert float(line.result) - 0.001 < step.result <= float(line.result) * (1 + 1e-9)
                assert line.result == f"{float(line.result):.3f}"
            else:
                dimension = step.chosen[1] if step.chosen else step.equation.result.dimension
                middle, half = printed(line.result)
                value = in_base_of_pocket(step.result, dimension, calc.x.units)
                assert abs(middle - value) <= half * (1 + 1e-9), (line, step.result)
            count += 1
    assert count > 10


@pytest.mark.parametrize("name", SAMPLES)
def test_every_value_put_in_is_the_value_used(name):
    """The numbers of the substituted half are the arguments of the step, each printed as its kind is printed."""
    calc = evaluate(SAMPLES[name])
    for block in calc.blocks:
        for step in block.steps:
            if step.equation is None:
                continue
            numbers = line_values(step.equation, step.values)
            for line, text in zip(typeset(step, calc.x.units), step.equation.lines, strict=True):
                for argument in {**step.equation.arguments, **step.equation.results}.values():
                    used = re.search(rf"\b{argument.name}\b", text.split(" = ")[1])
                    shown = print_value(argument, numbers[argument.name], calc.x.units)
                    assert not used or shown in line.substituted, (argument.name, line)


def unit_sets(equation):
    """Return the unit sets in which an equation may stand: an equation in inches serves one."""
    only = {a.unit_set for a in (*equation.arguments.values(), *equation.results.values())} - {None}
    assert len(only) < 2, f"{equation.name} mixes inches and millimetres"
    return only or units.UNIT_SETS


@pytest.mark.parametrize("equation, unit_set", [(e, u) for e in OURS for u in unit_sets(e)],
                         ids=lambda each: getattr(each, "name", each))
def test_every_registered_equation_is_typeset_in_each_unit_set_that_it_allows(equation, unit_set):
    # falling steeply, so that what is deducted stays below what it is deducted from
    values = {name: 9.5 / 4**i if a.high > 60 else (a.low + a.high) / 2
              for i, (name, a) in enumerate(equation.arguments.items())}
    step = step_of(equation, **values)
    lines = typeset(step, unit_set)
    assert len(lines) == len(equation.lines)
    for line in lines:
        assert all(part and "⟦" not in part and "Zsymbol" not in part for part in (line.lhs, *line.parts())), line
    known = {}
    for line in lines:
        check(line.lhs, line.symbolic, line.substituted, line.result, known)


def test_a_value_to_a_power_stands_in_brackets_and_a_symbol_does_not():
    line, = typeset(step_of(rods.body_area, d=1.25), units.US)
    assert line == Line("A_{b}", r"\frac{ \pi }{ 4 } \cdot d ^{ 2 }",
                        r"\frac{ \pi }{ 4 } \cdot \left( 1\tfrac{1}{4}\ \mathrm{in} \right) ^{ 2 }",
                        r"1.227\ \mathrm{in}^{2}")


@pytest.mark.parametrize("name", SAMPLES)
def test_no_value_with_a_unit_is_raised_to_a_power_without_brackets(name):
    calc = evaluate(SAMPLES[name])
    for block in calc.blocks:
        for step in block.steps:
            for line in typeset(step, calc.x.units):
                assert not re.search(r"\\mathrm\{\w+\}(\^\{-?\d\})? \^", line.substituted), line


def test_a_constant_with_a_unit_prints_in_both_halves():
    for unit_set, value, text in ((units.US, 0.63, r"0.63\ \mathrm{in}"), (units.SI, 16.0, r"16\ \mathrm{mm}")):
        line, = typeset(step_of(pins.effective_width_by_thickness, t=1.0, Delta_be=value), unit_set)
        assert text in line.symbolic
        assert text in line.substituted


def test_a_chosen_value_prints_as_itself():
    chosen = Step(None, {}, 0.95, {}, "", "", ("C_{r}", units.NUMBER))
    assert typeset(chosen, units.US) == [Line("C_{r}", "", "", "0.95")]


# --- what does not agree is not shown ----------------------------------------------------------------------------

def test_a_function_that_computes_something_else_than_its_lines_is_not_shown():
    """The shown lines come from the source; a function swapped behind them must not pass."""
    def pin_bearing(F_y, A_pb):
        return 2.4 * F_y * A_pb

    other = dataclasses.replace(pins.pin_bearing, function=pin_bearing)
    with pytest.raises(TypesetError, match=r"^pin_bearing: computed 60\.0, shown 45\.0"):
        typeset(step_of(other, F_y=50.0, A_pb=0.5), units.US)


def test_a_result_altered_after_the_fact_is_not_shown():
    step = dataclasses.replace(step_of(pins.pin_bearing, F_y=50.0, A_pb=0.5), result=45.000001)
    with pytest.raises(TypesetError, match="computed"):
        typeset(step, units.US)


@pytest.mark.parametrize("rendered, message", [
    (r"$$\begin{aligned} \end{aligned}$$", "1 lines ran and 0 are shown"),
    (r"$$\begin{aligned} R_{n} &= a = b \end{aligned}$$", "shown in an unexpected form"),
    (r"$$\begin{aligned} R_{n} &= 1.8 \cdot F_{y} = 1.8 \cdot ⟦0⟧ &= ⟦2⟧ \end{aligned}$$", "shows values of"),
    (r"$$\begin{aligned} R_{n} &= x = 1.8 \cdot ⟦0⟧ \cdot ⟦1⟧ = y &= ⟦2⟧ \end{aligned}$$", "unexpected form"),
])
def test_a_renderer_that_drops_something_is_noticed(rendered, message, monkeypatch):
    typesetting._templates.cache_clear()
    monkeypatch.setattr(typesetting.LatexRenderer, "render", lambda self, config: rendered)
    with pytest.raises(TypesetError, match=re.escape(message)):
        typeset(step_of(pins.pin_bearing, F_y=50.0, A_pb=0.5), units.US)
    typesetting._templates.cache_clear()


def test_a_wrong_unit_in_the_docstring_is_noticed():
    wrong = written("y = a * b", arguments=("    a : stress [ksi or MPa]", "    b : area [in2 or mm2]"),
                    results=("    y : result [in2 or mm2]",))
    with pytest.raises(DimensionalityError, match=r"Cannot convert from .* to 'inch \*\* 2'"):
        typeset(step_of(wrong, a=2.0, b=3.0), units.US)


def test_a_sum_of_two_kinds_is_noticed():
    wrong = written("y = a + b", arguments=("    a : stress [ksi or MPa]", "    b : area [in2 or mm2]"),
                    results=("    y : result [in2 or mm2]",))
    with pytest.raises(DimensionalityError, match="Cannot convert"):
        typeset(step_of(wrong, a=2.0, b=3.0), units.US)


# --- the renderer's reading of every allowed form ------------------------------------------------------------------

_LEAVES = st.sampled_from(["a", "b", "c", "2", "0.5", "3"])


def _longer(inner):
    pair = st.tuples(inner, inner)
    return st.one_of(
        st.tuples(pair, st.sampled_from("+-*/")).map(lambda t: f"({t[0][0]} {t[1]} {t[0][1]})"),
        inner.map(lambda x: f"({x} ** 2)"), inner.map(lambda x: f"(-{x})"), inner.map(lambda x: f"sqrt({x})"),
        pair.map(lambda t: f"minimum({t[0]}, {t[1]})"), pair.map(lambda t: f"maximum({t[0]}, {t[1]})"))


def _sparing(text):
    """Return the expression with no more brackets than Python needs, as a person writes it."""
    return ast.unparse(ast.parse(text, mode="eval").body)


@settings(max_examples=25)
@given(st.tuples(st.recursive(_LEAVES, _longer, max_leaves=5), st.sampled_from("+-*/"),
                 st.recursive(_LEAVES, _longer, max_leaves=4)))
def test_the_renderer_reads_every_allowed_form_as_python_does(parts):
    """Random arithmetic, with the fewest brackets: what is shown, read by a parser of its own, gives the same value."""
    left, operator, right = parts
    source = _sparing(f"({left}) {operator} ({right})")
    assume(re.search(r"\b[abc]\b", source))
    point = {"a": 1.75, "b": 2.5, "c": 3.25}
    values = {"sqrt": math.sqrt, "minimum": min, "maximum": max} | point
    try:
        expected = eval(source, {"__builtins__": {}}, values)
    except (ZeroDivisionError, ValueError):
        assume(False)
    equation = written(f"y = {source}")
    used = [name for name in "abc" if re.search(rf"\b{name}\b", source)]
    (lhs, symbolic, substituted), = typesetting._templates(equation, units.US, ())
    assert lhs == "y"
    for half, names in ((symbolic, {name: name for name in used}),
                        (substituted, {f"⟦{i}⟧": name for i, name in enumerate("abc")})):
        for mark, name in names.items():
            half = half.replace(mark, name)
        shown = parse_latex(half.replace("\\ ", " "), backend="lark")
        assert isinstance(shown, sympy.Basic), (source, half)
        assert float(shown.subs({sympy.Symbol(k): v for k, v in point.items()})) == pytest.approx(expected), (
            source, half)
