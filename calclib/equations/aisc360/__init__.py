"""ANSI/AISC 360, Specification for Structural Steel Buildings, editions 2022 and 2016."""

from dataclasses import dataclass

from calclib.equations.form import Cite


@dataclass(frozen=True)
class Factors:
    """The resistance factor (LRFD) and safety factor (ASD) of one limit state."""

    phi: float
    omega: float


YIELDING = Factors(0.90, 1.67)     # D2(a); the standard prints 1.67, not 5/3
RUPTURE = Factors(0.75, 2.00)      # D2(b), D5.1, J2.4, J3, J4, J7
SHEAR_YIELDING = Factors(1.00, 1.50)       # J4.2(a)
SLIP = Factors(1.00, 1.50)                 # J3.9 (2016: J3.8), standard holes and short slots across the force
SLIP_OVERSIZED = Factors(0.85, 1.76)       # the same, oversized holes and short slots along the force
SLIP_LONG_SLOT = Factors(0.70, 2.14)       # the same, long slots


def cite(clause_22, clause_16=None, unread=()):
    """Return where an equation stands in each edition; one clause serves both unless a second is given."""
    return Cite("AISC 360", {"22": clause_22, "16": clause_16 or clause_22}, unread)
