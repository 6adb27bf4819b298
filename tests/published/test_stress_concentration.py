"""Stress at a hole in a strip in tension against Howland's values and a textbook's readings."""

import pytest
from printed import Printed, published

from calclib.equations import stress_concentration as hole


@published("R. C. J. Howland (1930), stress at the edge of a hole over the stress of the gross section",
           hole.stress_concentration_on_net_section)
@pytest.mark.parametrize("ratio, digits", [(0.2, "3.14"), (0.3, "3.36"), (0.5, "4.32")])
def test_howland(ratio, digits):
    """The values at 0.1 and 0.4 differ by 0.2 and 0.4 percent: tests/honest/test_hole_in_strip.py."""
    K_tn = hole.stress_concentration_on_net_section(w=1.0, d=ratio)
    assert Printed(digits).agrees(K_tn / (1 - ratio))


@published("V. B. Bhandari, Design of Machine Elements, Ex. 5.1 and 5.3", hole.stress_concentration_on_net_section)
@pytest.mark.parametrize("w, d, digits", [(30, 15, "2.16"), (50, 10, "2.51")])
def test_readings_of_a_textbook(w, d, digits):
    assert Printed(digits).agrees(hole.stress_concentration_on_net_section(w=w, d=d))
