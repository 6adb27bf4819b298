"""What the renderer would not show truthfully is refused where an equation is defined, with a message."""

import numpy as np
import pytest
from written import written

from calclib.equations.form import REGISTER, EquationFormError, asin, cos, maximum, minimum, sin, sqrt, tan
from calclib.errors import RangeError
from calclib.members import KINDS  # noqa: F401  the kinds import every equation that a calc can use
from calclib.units import DOCSTRING_UNITS

pytestmark = pytest.mark.usefixtures("register")

NOT_SHOWN = "is not shown truthfully; one level up, make each outcome an equation of its own"
NOT_PLAIN = "is not a plain assignment to one name"
CALLED = "sqrt, minimum, maximum, sin, cos, tan, asin"
ALONE = 'written: write "y = " and the expression alone, without brackets around all of it'
DEFLECTION = ("    deflection : first [1]", "    b : second [1]")


def refusal(*arguments, **more):
    with pytest.raises(EquationFormError) as caught:
        written(*arguments, **more)
    return str(caught.value)


@pytest.mark.parametrize("body, message", [
    # conditions, which the renderer hides
    ("y = a * b if a > b else a", f"written: IfExp {NOT_SHOWN}"),
    ("y = a * (b > c)", f"written: Compare {NOT_SHOWN}"),
    ("y = (a and b) * c", f"written: BoolOp {NOT_SHOWN}"),
    ("y = (not a) * c", f"written: Not {NOT_SHOWN}"),
    ("if a > b:\n    y = a * b\nelse:\n    y = a * c", f"written: line 16 {NOT_PLAIN}"),
    ("for i in range(3):\n    y = a * i", f"written: line 16 {NOT_PLAIN}"),
    ("while a > b:\n    y = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("assert a > b\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("with a:\n    y = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("try:\n    y = a * b\nfinally:\n    pass", f"written: line 16 {NOT_PLAIN}"),
    # lines that never ran, or ran and are not shown
    ("return a\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("global z\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("import math\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("def inner():\n    pass\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("print(a)\ny = a * b", f"written: line 16 {NOT_PLAIN}"),
    # names that the renderer reads only at the end
    ("y = a * b\ny = y + c", "written: y is assigned twice or hides an argument; the renderer reads a name only at the "
     "end"),
    ("a = b * c\ny = a * b", "written: a is assigned twice or hides an argument; the renderer reads a name only at the "
     "end"),
    ("pi = 3 * b\ny = a * pi", "written: pi is assigned twice or hides an argument; the renderer reads a name only at "
     "the end"),
    ("minimum = 3 * b\ny = a * b", "written: minimum is assigned twice or hides an argument; the renderer reads a name "
     "only at the end"),
    ("y = a * b\ny += c", f"written: line 17 {NOT_PLAIN}"),
    ("y = z = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("y, z = a * b, a * c", f"written: line 16 {NOT_PLAIN}"),
    ("y: float = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("y[0] = a * b", f"written: line 16 {NOT_PLAIN}"),
    ("a.y = a * b", f"written: line 16 {NOT_PLAIN}"),
    # lines that vanish, or that the renderer cannot read
    ("y = a * b  # product", 'written: the line of y holds "#" and would vanish'),
    ("# product\ny = a * b", "written: no comments among the lines of an equation"),
    ("y = a @ b", 'written: the line of y holds "@" and would vanish'),
    ("y = (a\n    * b)", "written: y runs over several lines"),
    ("y = a * \\\n    b", "written: y runs over several lines"),
    # what is not arithmetic
    ("y = a.m_as(b)", f"written: only {CALLED} may be called, without keywords"),
    ("y = minimum(a=a, b=b)", f"written: only {CALLED} may be called, without keywords"),
    ("y = min(a, b)", f"written: only {CALLED} may be called, without keywords"),
    ("y = (lambda: a)() * b", f"written: only {CALLED} may be called, without keywords"),
    ("y = a * (z := b)", f"written: NamedExpr {NOT_SHOWN}"),
    ("y = lambda: a", f"written: Lambda {NOT_SHOWN}"),
    ("y = [a, b]", f"written: List {NOT_SHOWN}"),
    ("y = a[0] * b", f"written: Subscript {NOT_SHOWN}"),
    ("y = a.real * b", f"written: Attribute {NOT_SHOWN}"),
    ("y = sum(i for i in a) * b", f"written: only {CALLED} may be called, without keywords"),
    ("y = minimum(*a)", f"written: Starred {NOT_SHOWN}"),
    ("y = f'{a}' * b", f"written: JoinedStr {NOT_SHOWN}"),
    ("y = a % b", f"written: Mod {NOT_SHOWN}"),
    ("y = a // b", f"written: FloorDiv {NOT_SHOWN}"),
    ("y = a * +b", f"written: UAdd {NOT_SHOWN}"),
    ("y = a * 'b'", "written: 'b' is not a plain number"),
    ("y = a * True", "written: True is not a plain number"),
    ("y = a * None", "written: None is not a plain number"),
    ("y = a * 2j", "written: 2j is not a plain number"),
    # numbers that print otherwise than they are written
    ("y = a * 1e3", "written: write the number 1e3 as plain digits"),
    ("y = a * 1.e3", "written: write the number 1.e3 as plain digits"),
    ("y = a * 2.5E-3", "written: write the number 2.5E-3 as plain digits"),
    ("y = a * 29_000", "written: write the number 29_000 as plain digits"),
    ("y = a * 0x10", "written: write the number 0x10 as plain digits"),
    ("y = a * .5", "written: write the number .5 as plain digits"),
    ("y = a * 5.", "written: write the number 5. as plain digits"),
    # names without a value
    ("y = a * FACTOR", "written: FACTOR is neither an argument nor assigned above, so it would be shown without a "
     "value"),
    ("y = a * z\nz = a * b", "written: z is neither an argument nor assigned above, so it would be shown without a "
     "value"),
    ("y = a * minimum", "written: minimum is neither an argument nor assigned above, so it would be shown without a "
     "value"),
    # what is no equation
    ("y = a", "written: a bare name or number is not shown as an equation"),
    ("y = 2.5", "written: a bare name or number is not shown as an equation"),
    ("y = 2 * 2.5", "written: a bare name or number is not shown as an equation"),
    ("y = pi / 2", "written: a bare name or number is not shown as an equation"),
    ("y = (a)", "written: a bare name or number is not shown as an equation"),
    ("y = -a", "written: an equation that is one negative term is not shown; write it as a product or a difference"),
    ("y = -(a + b)", "written: an equation that is one negative term is not shown; write it as a product or a "
     "difference"),
    ("y = (a * b)", ALONE),
    ("y = a * b;", ALONE),
    ("y=a * b", ALONE),
])
def test_refused_in_the_body(body, message):
    assert refusal(body) == message


@pytest.mark.parametrize("body, returns, message", [
    ("", "a * b", "written: an equation is a docstring, assignments and one closing return"),
    ("y = a * b", None, "written: an equation is a docstring, assignments and one closing return"),
    ("y = a * b", "a", "written: return the name assigned last"),
    ("y = a * b", "y + 1", "written: return the name assigned last"),
    ("x = a * b\ny = x * c", "x", "written: return the name assigned last"),
    ("y = a * b", "y  # done", "written: no comments among the lines of an equation"),
    ("y = a * b; z = a * c", "z", ALONE),
])
def test_refused_at_the_return(body, returns, message):
    assert refusal(body, returns=returns) == message


@pytest.mark.parametrize("word, message", [
    ("deflection", 'written: the line of y holds "def" and would vanish'),
    ("undefined", 'written: the line of y holds "def" and would vanish'),
    ("returned", 'written: the line of y holds "return" and would vanish'),
])
def test_a_word_that_the_renderer_swallows_inside_a_name(word, message):
    assert refusal(f"y = {word} * b", arguments=(f"    {word} : first [1]", "    b : second [1]")) == message


def test_a_swallowed_word_in_an_assigned_name():
    assert refusal("deflection = a * b\ny = deflection * c", results=(
        "    deflection : between [1]", "    y : result [1]")) == (
            'written: the line of deflection holds "def" and would vanish')


@pytest.mark.parametrize("more, message", [
    ({"arguments": ("    a : first [1]", "    b : second [furlong]")},
     f"written: unit [furlong] of b is not one of {list(DOCSTRING_UNITS)}"),
    ({"arguments": ("    a : first [1]", "    b : second")},
     'written: "b : second" is not "name : meaning [unit], range"'),
    ({"arguments": ("    a : first [1]", "    b : second [1], mostly positive")},
     'written: range "mostly positive" of b is not "positive", "not negative" or "A to B"'),
    ({"head": "def written(a, b, d):"}, "written: the docstring and the arguments differ"),
    ({"head": "def written(b, a, c):"}, "written: the docstring and the arguments differ"),
    ({"head": "def written(a, b):"}, "written: the docstring and the arguments differ"),
    ({"results": ("    z : result [1]",)}, "written: the Returns section names ['z'], the body assigns ['y']"),
    ({"results": ("    y : result [1]", "    z : more [1]")},
     "written: the Returns section names ['y', 'z'], the body assigns ['y']"),
    ({"docstring": "Return y."}, "written: the docstring has no Parameters section"),
    ({"docstring": "Return y.\n\n    Parameters\n    ----------\n    a : first [1]\n    b : second [1]\n    "},
     "written: the docstring has no Returns section"),
])
def test_refused_in_the_docstring(more, message):
    assert refusal("y = a * b", **more) == message


def test_an_intermediate_result_that_the_docstring_leaves_out():
    assert refusal("x = a * b\ny = x * c") == "written: the Returns section names ['y'], the body assigns ['x', 'y']"


def test_what_is_refused_is_not_registered():
    before = list(REGISTER)
    refusal("y = a")
    assert before == REGISTER


def test_what_is_allowed():
    made = written("x = minimum(a, b) / c\ny = sqrt(x ** 2 + 0.5 * pi) - (-a)", results=(
        "    x : between [1]", "    y : result [1]"))
    assert made.lines == ("x = minimum(a, b) / c", "y = sqrt(x ** 2 + 0.5 * pi) - (-a)")
    assert list(made.results) == ["x", "y"]
    assert made.result.name == "y"
    assert repr(made) == "<equation written>"
    assert made(a=1.0, b=2.0, c=2.0) == pytest.approx((0.25 + np.pi / 2) ** 0.5 + 1)


# --- ranges ------------------------------------------------------------------------------------------------------

RANGES = ("    a : first [1], positive", "    b : second [1], not negative", "    c : third [1], 0.25 to 4")


@pytest.mark.parametrize("values, message", [
    ({"a": 0.0}, "first a is 0; the equation of written covers above 0."),
    ({"a": -1.5}, "first a is -1.5; the equation of written covers above 0."),
    ({"a": float("nan")}, "first a is nan; the equation of written covers above 0."),
    ({"b": -1e-9}, "second b is -1e-09; the equation of written covers at least 0."),
    ({"b": float("nan")}, "second b is nan; the equation of written covers at least 0."),
    ({"c": 0.2}, "third c is 0.2; the equation of written covers at least 0.25 and at most 4."),
    ({"c": 4.5}, "third c is 4.5; the equation of written covers at least 0.25 and at most 4."),
    ({"c": float("inf")}, "third c is inf; the equation of written covers at least 0.25 and at most 4."),
])
def test_outside_the_range(values, message):
    with pytest.raises(RangeError) as caught:
        written("y = a * b * c", arguments=RANGES)(**{"a": 1.0, "b": 1.0, "c": 1.0} | values)
    assert str(caught.value) == message


def test_an_array_is_nan_where_it_lies_outside():
    y = written("y = a * b * c", arguments=RANGES)(a=np.array([0.0, 1.0, 2.0, np.nan]), b=1.0, c=2.0)
    np.testing.assert_array_equal(y, [np.nan, 2.0, 4.0, np.nan])


def test_only_its_own_arguments():
    product = written("y = a * b * c")
    with pytest.raises(TypeError, match="written has no argument d"):
        product(a=1.0, b=1.0, c=1.0, d=1.0)
    with pytest.raises(KeyError, match="c"):
        product(a=1.0, b=1.0)
    with pytest.raises(TypeError):
        product(1.0, 1.0, 1.0)


def test_functions_serve_numbers_and_arrays():
    assert (minimum(1, 2), maximum(1, 2), sqrt(9.0)) == (1, 2, 3.0)
    np.testing.assert_array_equal(minimum(np.array([1.0, 3.0]), 2.0), [1.0, 2.0])
    np.testing.assert_array_equal(maximum(2.0, np.array([1.0, 3.0])), [2.0, 3.0])
    np.testing.assert_array_equal(sqrt(np.array([4.0, 9.0])), [2.0, 3.0])
    for function, reference in ((sin, np.sin), (cos, np.cos), (tan, np.tan), (asin, np.arcsin)):
        values = np.array([0.0, 0.25, 0.9])
        np.testing.assert_array_equal(function(values), reference(values))
        assert [function(value) for value in values.tolist()] == pytest.approx(reference(values).tolist(), rel=1e-15)


def test_a_sine_above_one_has_no_angle():
    with pytest.raises(RangeError) as caught:
        asin(1.25)
    assert str(caught.value) == "the sine of an angle is 1.25; it lies between -1 and 1."
    assert np.isnan(asin(np.array([0.5, 1.25, np.nan]))).tolist() == [False, True, True]


@pytest.mark.parametrize("equation", [e for e in REGISTER if e.function.__module__.startswith("calclib.")],
                         ids=lambda e: e.name)
def test_arrays_give_what_floats_give(equation):
    """The same lines on floats and on arrays; powers and angles of the two libraries differ in the last bit."""
    points = {name: np.linspace(0.6, 0.9, 5) * 10 / 2**i if a.high > 60 else
              np.linspace(0.3, 0.9, 5) * (a.high - a.low) + a.low
              for i, (name, a) in enumerate(equation.arguments.items())}
    swept = equation(**points)
    for i in range(5):
        alone = equation(**{name: float(values[i]) for name, values in points.items()})
        assert alone == pytest.approx(swept[i], rel=1e-14)
