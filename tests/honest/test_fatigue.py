"""Allowable stress ranges worked out beside the module: logarithms instead of powers."""

from math import exp, log

import pytest

from calclib.equations import fatigue
from calclib.equations.fatigue import CATEGORIES, RANGE_CONSTANT, THROAT_CONSTANT

# Category -> allowable stress range [ksi] at 1e5, 5e5, 2e6 and 1e7 cycles, worked out by hand from the equations.
RANGES = {"A": (63.2, 37.0, 24, 24), "B": (49.5, 29.0, 18.2, 16), "B'": (39.5, 23.1, 14.6, 12),
          "C": (35.4, 20.7, 13.1, 10), "D": (28.1, 16.5, 10.4, 7), "E": (22.3, 13.1, 8.23, 4.82),
          "E'": (15.8, 9.25, 5.83, 3.41), "F": (15.7, 12.0, 9.49, 8), "G": (15.8, 9.25, 7, 7)}
CYCLES = (1e5, 5e5, 2e6, 1e7)


def allowed(category, n_SR, unit_set="US"):
    each = CATEGORIES[category]
    if each.C_f is None:
        return fatigue.allowable_stress_range_of_throat(n_SR=n_SR, S_2=THROAT_CONSTANT[unit_set],
                                                        F_TH=each.F_TH[unit_set])
    return fatigue.allowable_stress_range(C_f=each.C_f, n_SR=n_SR, S_1=RANGE_CONSTANT[unit_set],
                                          F_TH=each.F_TH[unit_set])


@pytest.mark.parametrize("category", CATEGORIES)
def test_allowable_stress_range(category):
    assert [allowed(category, n) for n in CYCLES] == pytest.approx(RANGES[category], rel=0.004)


@pytest.mark.parametrize("category", CATEGORIES)
@pytest.mark.parametrize("n_SR", CYCLES)
def test_powers_by_logarithms(category, n_SR):
    each = CATEGORIES[category]
    power = 1000 * exp(0.333 * log(each.C_f / n_SR)) if each.C_f else 100 * exp(0.167 * log(1.5 / n_SR))
    assert allowed(category, n_SR) == pytest.approx(max(power, each.F_TH["US"]), rel=1e-12)


def test_the_exponents_are_those_printed():
    """With 1/3 in the place of 0.333 it would be 18.17 ksi."""
    assert allowed("B", 2e6) == pytest.approx(18.24, abs=0.005)


@pytest.mark.parametrize("category", CATEGORIES)
def test_both_unit_sets_are_close(category):
    """The constants and thresholds are rounded pairs; 1 ksi is 6.895 MPa."""
    for n in CYCLES:
        assert allowed(category, n, "SI") == pytest.approx(6.895 * allowed(category, n), rel=0.03)


def test_categories_fall_in_order():
    order = ["A", "B", "B'", "C", "D", "E", "E'"]
    assert [CATEGORIES[c].C_f for c in order] == sorted((CATEGORIES[c].C_f for c in order), reverse=True)
    assert [CATEGORIES[c].F_TH["US"] for c in order] == sorted((CATEGORIES[c].F_TH["US"] for c in order), reverse=True)


def test_ranges_of_stress():
    assert fatigue.stress_range(P_max=100.0, P_min=20.0, A_n=4.0) == 20.0
    assert fatigue.stress_range_with_reversal(P_t=60.0, P_c=20.0, A_n=4.0) == 20.0
    assert fatigue.stress_range_of_pretensioned_bolt(P_max=100.0, P_min=20.0, A_t=4.0) == pytest.approx(4.0)
    assert fatigue.fatigue_ratio(f_SR=12.0, F_SR=16.0) == 0.75
    assert fatigue.allowable_force_range(F_SR=16.0, A=2.5) == 40.0
    assert fatigue.greatest_stress(F_y=50) == pytest.approx(33.0)
