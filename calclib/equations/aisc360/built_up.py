"""Built-up tension members, AISC 360 D4. Connectors of parts in contact follow J3.6: see `bearing.py`."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation

TIE_PLATE_SPACING = {"US": 6.0, "SI": 150.0}     # D4, longitudinal spacing at tie plates: printed as a pair, in and mm


@equation(cite("B4.3a"))
def gross_area_of_parts(n_1, A_1, n_2, A_2):
    """Return the gross area of a member built of parts of two kinds.

    Parameters
    ----------
    n_1 : number of parts of the first kind [1], positive
    A_1 : gross area of one of them [in2 or mm2], positive
    n_2 : number of other parts [1], not negative
    A_2 : gross area of one of these [in2 or mm2], positive

    Returns
    -------
    A_g : gross area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3a.

    >>> gross_area_of_parts(n_1=2, A_1=5.86, n_2=1, A_2=4.5)
    16.22
    """
    A_g = n_1 * A_1 + n_2 * A_2
    return A_g


@equation(cite("D4", unread=("16",)), {"l_tp": r"l_{\mathrm{min}}"})
def least_length_of_tie_plate(b):
    """Return the least length of a tie plate along the member.

    Parameters
    ----------
    b : distance between the lines of connectors [in or mm], positive

    Returns
    -------
    l_tp : least length [in or mm]

    Source: AISC 360-22 D4; 360-16 from memory.

    >>> least_length_of_tie_plate(b=9.0)
    6.0
    """
    l_tp = 2 / 3 * b
    return l_tp


@equation(cite("D4", unread=("16",)), {"t_tp": r"t_{\mathrm{min}}"})
def least_thickness_of_tie_plate(b):
    """Return the least thickness of a tie plate.

    Parameters
    ----------
    b : distance between the lines of connectors [in or mm], positive

    Returns
    -------
    t_tp : least thickness [in or mm]

    Source: AISC 360-22 D4; 360-16 from memory.

    >>> least_thickness_of_tie_plate(b=9.0)
    0.18
    """
    t_tp = b / 50
    return t_tp


@equation(cite("D4", unread=("16",)), {"a_max": r"a_{\mathrm{max}}"})
def preferred_length_between_connectors(r_i):
    """Return the length between connectors up to which a part stays within the preferred slenderness of 300.

    Parameters
    ----------
    r_i : least radius of gyration of one part [in or mm], positive

    Returns
    -------
    a_max : preferred length between connectors [in or mm]

    Source: AISC 360-22 D4; 360-16 from memory.

    >>> preferred_length_between_connectors(r_i=0.75)
    225.0
    """
    a_max = 300 * r_i
    return a_max
