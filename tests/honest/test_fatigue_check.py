"""The fatigue block that every kind shares: off without cycles, and the range of force against the allowable one."""

from types import SimpleNamespace

import numpy as np
import pytest

from calclib.calc import Run
from calclib.equations.aisc360.members import gross_area_of_plate
from calclib.errors import EntryError
from calclib.members.fatigue_check import CATEGORIES, fatigue_block

X = {"standard": "AISC 360-22", "method": "LRFD", "units": "US", "required_strength": 100.0, "cycles": 2e6,
     "force_range": 20.0, "stress_category": "B"}


def run_of(arrays=False, **changes):
    x = SimpleNamespace(**{**X, **changes})
    run = Run(x, arrays=arrays)
    fatigue_block(x, run, gross_area_of_plate(w=4.0, t=0.5), "net area of a plate")
    return run


def block(**changes):
    return run_of(**changes).blocks[0]


def test_the_allowable_range_of_force():
    """Category B at two million cycles: 18.24 ksi on 2 in2."""
    assert block().available == pytest.approx(36.48, abs=0.01)
    assert block().ratio == pytest.approx(20 / 36.48, abs=0.001)
    assert block().factors is None
    assert block(method="ASD").available == block().available


def test_the_threshold_holds_at_many_cycles():
    assert block(cycles=1e9).available == 32.0
    assert block(cycles=1e9, units="SI").available == 2 * 110


@pytest.mark.parametrize("cycles", [1.0, 20_000.0])
def test_few_cycles_need_no_evaluation(cycles):
    part = block(cycles=cycles, force_range=None, stress_category=None)
    assert part.reason == "Fatigue need not be evaluated: at most 20 000 stress cycles."
    assert part.passes


def test_one_cycle_more_needs_it():
    assert block(cycles=20_001.0).available is not None


def test_without_cycles_it_is_said_to_be_off():
    run = run_of(cycles=None, force_range=None, stress_category=None)
    assert run.blocks[0].reason == "Fatigue is not evaluated: no number of stress cycles is given."
    assert "not evaluated" in run.assumptions[0].text


@pytest.mark.parametrize("changes, message", [
    ({"cycles": None}, "cycles: is empty and a service force range is given; give the number of stress cycles, or "
     "leave the force range blank."),
    ({"force_range": None}, "force_range: is empty and the number of stress cycles is above 20 000; give the range of "
     "axial force at service load."),
    ({"stress_category": None}, "stress_category: is empty and the number of stress cycles is above 20 000; give the "
     f"category of the detail, one of: {', '.join(CATEGORIES)}."),
])
def test_what_is_missing_is_asked_for(changes, message):
    with pytest.raises(EntryError) as caught:
        run_of(**changes)
    assert str(caught.value) == message


def test_the_2016_edition_is_from_memory():
    assert block().cite == "AISC 360-22 Appendix 3.3"
    assert block(standard="AISC 360-16").cite == "AISC 360-16 Appendix 3.3 (from memory, verify)"


def test_a_sweep_over_cycles_is_the_single_cases():
    cycles = np.array([1e4, 2e4, 1e5, 2e6, 1e9])
    swept = run_of(arrays=True, cycles=cycles).blocks[0].available
    single = [block(cycles=float(n)).available for n in cycles]
    assert list(np.isnan(swept)) == [each is None for each in single] == [True, True, False, False, False]
    assert list(swept[2:]) == single[2:]


def test_category_f_is_not_offered():
    """It stands on the throat of a weld, not on an area of the base metal."""
    assert CATEGORIES == ("A", "B", "B'", "C", "D", "E", "E'", "G")


def test_few_cycles_leave_the_other_limit_states_of_a_sweep_alone():
    assert not np.any(run_of(arrays=True, cycles=np.array([1e4, 1e5])).outside)
