"""Comparing numbers that binary arithmetic has touched: 1.3 * 6.0 is a hair above 7.8, and 7.8 must still be enough."""

RELATIVE = 1e-9


def at_least(value, limit):
    """Return whether a positive number, or each of an array, is at least `limit`, but for the last binary digits.

    >>> at_least(7.8, 1.3 * 6.0)
    True
    """
    return value >= limit * (1 - RELATIVE)


def at_most(value, limit):
    """Return whether a positive number, or each of an array, is at most `limit`, but for the last binary digits.

    >>> at_most(0.1 + 0.2, 0.3)
    True
    """
    return value <= limit * (1 + RELATIVE)
