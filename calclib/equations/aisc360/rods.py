"""Threaded rods, AISC 360 chapter J3."""

from math import pi

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation


@equation(cite("J3.7", "J3.6"))
def body_area(d):
    """Return the nominal area of a rod on its unthreaded body, which is also its major thread diameter.

    Parameters
    ----------
    d : nominal diameter [in or mm], positive

    Returns
    -------
    A_b : nominal body area [in2 or mm2]

    Source: AISC 360-22 J3.7 (360-16 J3.6): nominal unthreaded body area of bolt or threaded part.

    >>> round(body_area(d=1.0), 4)
    0.7854
    """
    A_b = pi / 4 * d ** 2
    return A_b


@equation(cite("J3.7, Eq. J3-1, Table J3.2", "J3.6, Eq. J3-1, Table J3.2"))
def tensile_strength_on_body_area(F_u, A_b):
    """Return the nominal tensile strength of a threaded part by 0.75 of the tensile strength on the body area.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_b : nominal body area [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 Table J3.2 and J3.7; 360-16 Table J3.2 and J3.6.

    >>> round(tensile_strength_on_body_area(F_u=58, A_b=0.7854), 2)
    34.16
    """
    R_n = 0.75 * F_u * A_b
    return R_n


@equation(Cite("AISC 360", {"22": "Table J3.2, note b"}))
def tensile_strength_on_stress_area(F_u, A_t):
    """Return the nominal tensile strength of a threaded part by its tensile stress area.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_t : tensile stress area of the thread [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 Table J3.2, note b. The 2016 edition does not offer it.

    >>> round(tensile_strength_on_stress_area(F_u=58, A_t=0.606), 2)
    35.15
    """
    R_n = F_u * A_t
    return R_n
