"""Block shear areas against a published example."""

from fractions import Fraction

import pytest

from calclib.block_paths import block_paths, strip
from calclib.holes import Hole


@pytest.mark.parametrize("area, printed", [("gross_shear_area", "16.9"), ("net_shear_area", "11.3"),
                                           ("net_tension_area", "1.88")])
def test_aisc_design_examples_v16_ii_c_1_clip_angles(area, printed):
    """Two legs 15 x 5/8, five 7/8-in. bolts at 3 in., 1-1/2 in. to the end and 2 in. to the edge.

    The force runs along the 15 in.; 11.25 and 1.875 are printed rounded up.
    """
    holes = [Hole(x=1.5 + 3 * i, y=2, width=15 / 16, allowance=1 / 16) for i in range(5)]
    path, = (path for path in block_paths(strip(4, 16), 2 * 0.625, holes) if path.name == "line 1 to the lower edge")
    digits = len(printed.partition(".")[2])
    assert abs(Fraction(getattr(path, area)) - Fraction(printed)) <= Fraction(1, 2 * 10**digits)
