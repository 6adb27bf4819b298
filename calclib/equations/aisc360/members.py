"""Tension members, AISC 360 chapter D."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation


@equation(cite("B4.3a"))
def gross_area_of_plate(w, t):
    """Return the gross area of a plate.

    Parameters
    ----------
    w : width [in or mm], positive
    t : thickness [in or mm], positive

    Returns
    -------
    A_g : gross area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3a.

    >>> gross_area_of_plate(w=4.25, t=0.5)
    2.125
    """
    A_g = w * t
    return A_g


@equation(cite("D2(a), Eq. D2-1"))
def tensile_yielding(F_y, A_g):
    """Return the nominal strength for tensile yielding in the gross section.

    Parameters
    ----------
    F_y : specified minimum yield stress [ksi or MPa], positive
    A_g : gross area [in2 or mm2], positive

    Returns
    -------
    P_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 D2(a).

    >>> tensile_yielding(F_y=50, A_g=2.125)
    106.25
    """
    P_n = F_y * A_g
    return P_n
