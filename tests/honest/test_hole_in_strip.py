"""Stress at a hole: the limits of the formula, and how far it lies from Howland's values."""

import pytest

from calclib.equations import stress_concentration as hole


def test_a_small_hole_triples_the_stress():
    assert hole.stress_concentration_on_net_section(w=1e6, d=1.0) == pytest.approx(3.0, rel=1e-5)


def test_a_hole_as_wide_as_the_strip_doubles_the_mean_stress():
    assert hole.stress_concentration_on_net_section(w=1.0, d=1.0) == pytest.approx(2.0, rel=1e-9)


@pytest.mark.parametrize("ratio, howland", [(0.1, 3.03), (0.2, 3.14), (0.3, 3.36), (0.4, 3.74), (0.5, 4.32)])
def test_distance_from_howland(ratio, howland):
    gross = hole.stress_concentration_on_net_section(w=1.0, d=ratio) / (1 - ratio)
    assert gross == pytest.approx(howland, rel=0.004)


def test_peak_stress():
    f_n = hole.mean_stress_of_net_section(P=20.0, w=4.0, d=1.0, t=0.5)
    assert f_n == pytest.approx(40 / 3)
    assert hole.peak_stress_at_hole(K_tn=2.4, f_n=f_n) == pytest.approx(32.0)
