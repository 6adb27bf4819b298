"""Available strength and ratio, AISC 360 chapter B."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation


@equation(cite("B3.1, Eq. B3-1"), {"phiR_n": r"\phi R_{n}"})
def design_strength(phi, R_n):
    """Return the design strength (LRFD).

    Parameters
    ----------
    phi : resistance factor [1], 0 to 1
    R_n : nominal strength [kip or N], not negative

    Returns
    -------
    phiR_n : design strength [kip or N]

    Source: AISC 360-22 and 360-16 B3.1.

    >>> design_strength(phi=0.75, R_n=45.0)
    33.75
    """
    phiR_n = phi * R_n
    return phiR_n


@equation(cite("B3.2, Eq. B3-2"), {"R_n_Omega": r"R_{n} / \Omega"})
def allowable_strength(Omega, R_n):
    """Return the allowable strength (ASD).

    Parameters
    ----------
    Omega : safety factor [1], positive
    R_n : nominal strength [kip or N], not negative

    Returns
    -------
    R_n_Omega : allowable strength [kip or N]

    Source: AISC 360-22 and 360-16 B3.2.

    >>> allowable_strength(Omega=2.0, R_n=45.0)
    22.5
    """
    R_n_Omega = R_n / Omega
    return R_n_Omega


@equation(cite("B3"))
def ratio(R_r, R_c):
    """Return the ratio of required to available strength.

    Parameters
    ----------
    R_r : required strength [kip or N], not negative
    R_c : available strength [kip or N], positive

    Returns
    -------
    ratio : required over available strength [1]

    Source: AISC 360-22 and 360-16 B3: the required strength shall not exceed the available strength.

    >>> ratio(R_r=24.0, R_c=32.0)
    0.75
    """
    ratio = R_r / R_c
    return ratio
