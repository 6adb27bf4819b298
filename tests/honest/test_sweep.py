"""A sweep over arrays gives, point for point, what each case gives alone."""

from math import nan

import numpy as np
import pytest
from samples import ASD, ROD_SI, plate, rod

from calclib.calc import evaluate, sweep
from calclib.errors import CalcError, EntryError

E16 = {"standard": "AISC 360-16"}
RATED = {"fitting": "clevis", "fitting_rating": "25 kip", "rating_source": "Maker, size 4"}


def scalar(case, **texts):
    """Return key -> available strength of one case, or None where it is refused."""
    try:
        calc = evaluate(case.with_texts(**texts))
    except CalcError:
        return None
    return {block.key: block.available for block in calc.blocks if block.available is not None}


UNITS = {"F_y": "ksi", "F_u": "ksi", "pin_F_y": "ksi", "pitch": "tpi", "fitting_rating": "kip"}
SWEEPS = [
    (plate(), {"hole_diameter": (2.45, 2.6)}), (plate(**E16), {"hole_diameter": (2.48, 2.56)}),
    (plate(**ASD), {"end_distance": (-1, 9)}), (plate(), {"plate_thickness": (-0.5, 3)}),
    (plate(), {"plate_width": (1, 12)}), (plate(), {"pin_diameter": (2.4, 2.6)}),
    (plate(side_distance="2 in"), {"side_distance": (-1, 7)}), (plate(), {"side_distance": (0.1, 6)}),
    (plate(), {"F_y": (0, 170)}), (plate(), {"F_u": (0, 250)}), (plate(), {"pin_F_y": (-10, 170)}),
    (plate(), {"corner_distance": (1, 6)}), (plate(), {"pin_diameter": (2.9, 3.1), "hole_diameter": (2.95, 3.12)}),
    (rod(), {"F_u": (0, 250)}), (rod(**ASD), {"F_y": (0, 170)}), (rod(), {"pitch": (0.5, 40)}),
    (rod(), {"rod_diameter": (0.05, 5), "pitch": (4, 4)}), (rod(**E16), {"rod_diameter": (0.3, 3), "pitch": (30, 4)}),
    (rod(**RATED, rating_basis="LRFD design strength"), {"fitting_rating": (-5, 60)}),
]


@pytest.mark.parametrize("case, ranges", SWEEPS, ids=lambda each: "-".join(each) if isinstance(each, dict) else "")
def test_a_sweep_gives_what_each_case_gives_alone(case, ranges):
    """25 points, bit for bit; and no number exactly where the case alone is refused."""
    points = {name: np.linspace(low, high, 25) for name, (low, high) in ranges.items()}
    curves = sweep(case, **points)
    refused = 0
    for i in range(25):
        alone = scalar(case, **{name: f"{float(values[i])!r} {UNITS.get(name, 'in')}" for name, values in
                                points.items()})
        refused += alone is None
        for curve in curves:
            expected = nan if alone is None else alone[curve.key]
            np.testing.assert_equal(curve.available[i], expected, f"{curve.key}, {points}, {i}")
    assert refused < 25


def test_a_sweep_of_sizes_in_si():
    diameters, pitches = [16, 20, 24, 30, 36], [2, 2.5, 3, 3.5, 4]
    curves = sweep(rod(**ROD_SI), rod_diameter=diameters, pitch=pitches)
    for curve in curves:
        for i, (d, P) in enumerate(zip(diameters, pitches, strict=True)):
            alone = scalar(rod(**ROD_SI), rod_diameter=f"{d} mm", pitch=f"{P} mm")
            assert curve.available[i] == alone[curve.key]


def test_a_sweep_over_two_inputs_at_once():
    holes = np.linspace(2.5, 2.55, 4)
    widths = np.linspace(5.0, 9.0, 3)[:, None]
    for curve in sweep(plate(), hole_diameter=holes, plate_width=widths):
        assert curve.available.shape == (3, 4)
        for i in range(3):
            for j in range(4):
                alone = scalar(plate(), hole_diameter=f"{float(holes[j])!r} in",
                               plate_width=f"{float(widths[i, 0])!r} in")
                assert curve.available[i, j] == alone[curve.key]


def test_a_sweep_of_an_unknown_input_is_refused():
    with pytest.raises(EntryError, match='plate_widht: is not an input of "pin_plate"; did you mean "plate_width"'):
        sweep(plate(), plate_widht=np.array([1.0]))
