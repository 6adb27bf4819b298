"""Numbers as a source prints them, and the mark of a test that compares with them."""

from dataclasses import dataclass
from decimal import Decimal

import pytest

from calclib import units

_PINT = {text: unit for dimension in units.DIMENSIONS.values() for text, unit in dimension.accepted.items()}
PUBLISHED = []  # every test that compares with print, filled where the tests are defined


@dataclass(frozen=True)
class Printed:
    """A number as printed. A value agrees if it lies within half a unit of the last printed digit, never wider.

    >>> Printed("281", "kip").agrees(280.832, "kip"), Printed("281", "kip").agrees(280.4, "kip")
    (True, False)
    """

    digits: str
    unit: str = ""

    @property
    def half_unit(self):
        return Decimal(1).scaleb(Decimal(self.digits).as_tuple().exponent) / 2

    def agrees(self, value, unit=None):
        """Return whether `value`, in `unit` (the printed one if left out), rounds to the printed digits.

        A tie agrees on either side; 12 figures are compared, so that 104.64999999999999 is still a tie.
        """
        if unit and unit != self.unit:
            value = float(units.registry().Quantity(value, _PINT[unit]).to(_PINT[self.unit]).magnitude)
        return abs(Decimal(f"{value:.12g}") - Decimal(self.digits)) <= self.half_unit

    @property
    def value(self):
        """Return the printed number itself, for a source that goes on with its rounded step."""
        return float(self.digits)


@dataclass(frozen=True)
class Comparison:
    test: str
    source: str
    equations: tuple


def published(source, *equations):
    """Mark a test that compares `equations` with numbers printed in `source`; each must be called by the test."""
    def mark(test):
        PUBLISHED.append(Comparison(f"{test.__module__}.{test.__name__}", source, equations))
        return pytest.mark.published(source=source, equations=equations)(test)
    return mark
