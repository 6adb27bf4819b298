"""Areas of weld groups and of the steel beside them: AISC 360 B4.3, J2.2a, J4.2 and J4.3."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, sqrt


@equation(cite("B4.3a"))
def area_of_strips(n, w, t):
    """Return the area of equal flat elements across the force.

    Parameters
    ----------
    n : number of elements [1], positive
    w : width of one [in or mm], positive
    t : thickness of one [in or mm], positive

    Returns
    -------
    A : area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3a.

    >>> round(area_of_strips(n=1, w=8.01, t=0.515), 3)
    4.125
    """
    A = n * w * t
    return A


@equation(cite("J4.2"))
def area_along_welds(n, l_1, l_2, t):
    """Return the area of the steel that two longitudinal welds put in shear.

    Parameters
    ----------
    n : number of equal parts [1], positive
    l_1 : length of the first weld [in or mm], positive
    l_2 : length of the other weld [in or mm], positive
    t : thickness of one part [in or mm], positive

    Returns
    -------
    A_gv : area in shear, gross and net [in2 or mm2]

    Source: AISC 360-22 and 360-16 J4.2 and J4.3; without holes the net area is the same.

    >>> area_along_welds(n=1, l_1=27.0, l_2=27.0, t=0.25)
    13.5
    """
    A_gv = n * (l_1 + l_2) * t
    return A_gv


@equation(cite("J2.2a"), {"A_we1": "A_{we,1}", "A_we2": "A_{we,2}"})
def area_of_pairs_of_welds(n, A_we1, A_we2):
    """Return the effective area of equal pairs of fillets.

    Parameters
    ----------
    n : number of pairs [1], positive
    A_we1 : effective area of the first fillet of a pair [in2 or mm2], positive
    A_we2 : effective area of the other fillet [in2 or mm2], positive

    Returns
    -------
    A_we : effective area [in2 or mm2]

    Source: AISC 360-22 and 360-16 J2.2a.

    >>> area_of_pairs_of_welds(n=2, A_we1=1.25, A_we2=0.75)
    4.0
    """
    A_we = n * (A_we1 + A_we2)
    return A_we


@equation(cite("J2.2a"), {"A_we1": "A_{we,1}"})
def area_of_equal_welds(n, A_we1):
    """Return the effective area of equal fillets.

    Parameters
    ----------
    n : number of fillets [1], positive
    A_we1 : effective area of one [in2 or mm2], positive

    Returns
    -------
    A_we : effective area [in2 or mm2]

    Source: AISC 360-22 and 360-16 J2.2a.

    >>> area_of_equal_welds(n=4, A_we1=1.5)
    6.0
    """
    A_we = n * A_we1
    return A_we


@equation(cite("J2.4"))
def sum_of_mixed_fillets(R_nwl, R_nwt):
    """Return the nominal strength of longitudinal and transverse fillets without factors for direction.

    Parameters
    ----------
    R_nwl : nominal strength of the longitudinal fillets [kip or N], positive
    R_nwt : nominal strength of the transverse fillets without directional factor [kip or N], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J2.4.

    >>> round(sum_of_mixed_fillets(R_nwl=118.78, R_nwt=29.69), 2)
    148.47
    """
    R_n = R_nwl + R_nwt
    return R_n


@equation(cite("D3"))
def clear_depth_of_web(d, t_f):
    """Return the depth of a web between its flanges.

    Parameters
    ----------
    d : depth of the section [in or mm], positive
    t_f : thickness of a flange [in or mm], positive

    Returns
    -------
    b : depth of the web [in or mm]

    Source: AISC 360-22 and 360-16 D3: the area of the connected element alone; the fillets are left out.

    >>> round(clear_depth_of_web(d=8.28, t_f=0.4), 2)
    7.48
    """
    b = d - 2 * t_f
    return b


@equation(Cite("Mechanics", {"": "(flat plate)"}))
def radius_of_gyration_of_plate(t):
    """Return the least radius of gyration of a flat plate.

    Parameters
    ----------
    t : thickness [in or mm], positive

    Returns
    -------
    r : least radius of gyration [in or mm]

    Source: mechanics, the square root of second moment over area.

    >>> round(radius_of_gyration_of_plate(t=1.0), 4)
    0.2887
    """
    r = t / sqrt(12)
    return r
