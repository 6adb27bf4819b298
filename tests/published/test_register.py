"""Every equation is compared with print, or stands here with the reason why not."""

from importlib import import_module
from pathlib import Path

import printed
import pytest

from calclib.equations.form import REGISTER
from calclib.members import KINDS  # noqa: F401  the kinds import every equation that a calc can use

UNPUBLISHED = {
    "ratio": "no example prints the ratio; a quotient, recomputed by the pocket-calculator test",
    "opposite_side_distance": "no published example of a hole off the centre line was found; geometry",
    "smaller_side_distance": "no published example of a hole off the centre line was found; the smaller of two",
    "elongation_of_threaded_rod": "no published example of shank and thread in series was found; checked by the two "
                                  "limits of one bar in tests/honest/test_calc.py",
}


def unchecked_equations():
    for path in Path(__file__).parent.glob("test_*.py"):
        import_module(path.stem)
    checked = {equation for comparison in printed.PUBLISHED for equation in comparison.equations}
    return {equation.name for equation in REGISTER
            if equation not in checked and equation.function.__module__.startswith("calclib.")}


def test_every_equation_is_checked_against_print():
    """The list may only shrink: an equation that has found its source must leave it."""
    unchecked = unchecked_equations()
    missing, stale = sorted(unchecked - set(UNPUBLISHED)), sorted(set(UNPUBLISHED) - unchecked)
    assert not missing, f"not compared with print and without a reason: {', '.join(missing)}"
    assert not stale, f"compared with print by now, or gone; take out of the list: {', '.join(stale)}"


def test_names_of_equations_are_unique():
    names = [equation.name for equation in REGISTER if equation.function.__module__.startswith("calclib.")]
    assert sorted(set(names)) == sorted(names)


@pytest.mark.parametrize("digits, inside, outside", [
    ("281", (280.5, 281.5, 280.832), (280.499, 281.501)),
    ("45.0", (44.95, 45.05), (44.949, 45.051)),
    ("0.0318", (0.03182,), (0.03186,)),
])
def test_a_printed_number_allows_half_a_unit_of_its_last_digit(digits, inside, outside):
    number = printed.Printed(digits, "kip")
    assert all(number.agrees(value) for value in inside)
    assert not any(number.agrees(value) for value in outside)


def test_a_printed_number_is_compared_in_its_own_unit():
    assert printed.Printed("412.75", "kN").agrees(412750, "N")
    assert not printed.Printed("412.75", "kN").agrees(412.75, "N")
