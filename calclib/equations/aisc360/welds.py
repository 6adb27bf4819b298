"""Fillet welds, AISC 360 J2. The base metal beside a weld is an element in shear: see `connecting.py`."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, maximum, minimum, sin

EDGE_ALLOWANCE = {"US": 1 / 16, "SI": 2.0}     # J2.2b: printed as pairs, in and mm
EDGE_THICKNESS = {"US": 1 / 4, "SI": 6.0}      # J2.2b: the allowance holds from this thickness on
LEAST_LAP = {"US": 1.0, "SI": 25.0}


@equation(cite("J2.2a"))
def throat_of_fillet(w):
    """Return the effective throat of a fillet weld with equal legs.

    Parameters
    ----------
    w : size of the fillet, its leg [in or mm], positive

    Returns
    -------
    t_e : effective throat [in or mm]

    Source: AISC 360-22 and 360-16 J2.2a, the shortest distance from root to face.

    >>> throat_of_fillet(w=0.25)
    0.17675
    """
    t_e = 0.707 * w
    return t_e


@equation(cite("J2.2a"))
def area_of_fillet(t_e, l_e):
    """Return the effective area of a fillet weld.

    Parameters
    ----------
    t_e : effective throat [in or mm], positive
    l_e : effective length [in or mm], positive

    Returns
    -------
    A_we : effective area [in2 or mm2]

    Source: AISC 360-22 and 360-16 J2.2a.

    >>> round(area_of_fillet(t_e=0.17675, l_e=20.0), 3)
    3.535
    """
    A_we = t_e * l_e
    return A_we


@equation(cite("Table J2.5"))
def stress_of_fillet(F_EXX):
    """Return the nominal stress of the weld metal of a fillet.

    Parameters
    ----------
    F_EXX : strength of the filler metal [ksi or MPa], positive

    Returns
    -------
    F_nw : nominal stress of the weld metal [ksi or MPa]

    Source: AISC 360-22 and 360-16 Table J2.5.

    >>> stress_of_fillet(F_EXX=70)
    42.0
    """
    F_nw = 0.60 * F_EXX
    return F_nw


@equation(Cite("AISC 360", {"22": "J2.4"}))
def directional_factor_2022(theta):
    """Return the factor on the strength of a fillet for the direction of the load.

    Parameters
    ----------
    theta : angle between the force and the axis of the weld [rad, printed in degrees], 0 to 1.5708

    Returns
    -------
    k_ds : directional factor [1]

    Source: AISC 360-22 J2.4, where the strains of the weld elements are compatible; not at the ends of rectangular
    hollow sections in tension.

    >>> round(directional_factor_2022(theta=0.7853981633974483), 3)
    1.297
    """
    k_ds = 1.0 + 0.50 * sin(theta) ** 1.5
    return k_ds


@equation(Cite("AISC 360", {"22": "J2.4"}))
def fillet_strength_2022(F_nw, A_we, k_ds):
    """Return the nominal strength of a fillet weld.

    Parameters
    ----------
    F_nw : nominal stress of the weld metal [ksi or MPa], positive
    A_we : effective area [in2 or mm2], positive
    k_ds : directional factor [1], 1 to 1.5

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J2.4.

    >>> fillet_strength_2022(F_nw=42, A_we=3.535, k_ds=1.0)
    148.47
    """
    R_n = F_nw * A_we * k_ds
    return R_n


@equation(Cite("AISC 360", {"16": "J2.4, Eq. J2-5"}, unread=("16",)))
def stress_of_fillet_in_direction_2016(F_EXX, theta):
    """Return the nominal stress of the weld metal of a fillet for the direction of the load.

    Parameters
    ----------
    F_EXX : strength of the filler metal [ksi or MPa], positive
    theta : angle between the force and the axis of the weld [rad, printed in degrees], 0 to 1.5708

    Returns
    -------
    F_nw : nominal stress of the weld metal [ksi or MPa]

    Source: AISC 360-16 J2.4, from memory, for a weld group in line, of one size, loaded through its centroid.

    >>> round(stress_of_fillet_in_direction_2016(F_EXX=70, theta=0.7853981633974483), 2)
    54.49
    """
    F_nw = 0.60 * F_EXX * (1.0 + 0.50 * sin(theta) ** 1.5)
    return F_nw


@equation(Cite("AISC 360", {"16": "J2.4, Eq. J2-3"}))
def fillet_strength_2016(F_nw, A_we):
    """Return the nominal strength of a fillet weld.

    Parameters
    ----------
    F_nw : nominal stress of the weld metal [ksi or MPa], positive
    A_we : effective area [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-16 J2.4.

    >>> fillet_strength_2016(F_nw=42, A_we=3.535)
    148.47
    """
    R_n = F_nw * A_we
    return R_n


@equation(cite("J2.4", unread=("16",)), {"R_n1": "R_{n,1}", "R_n2": "R_{n,2}"})
def strength_of_mixed_fillets(R_nwl, R_nwt):
    """Return the nominal strength of a concentric group of longitudinal and transverse fillets of one size.

    Parameters
    ----------
    R_nwl : nominal strength of the longitudinal fillets [kip or N], positive
    R_nwt : nominal strength of the transverse fillets without directional factor [kip or N], positive

    Returns
    -------
    R_n1 : sum without directional factors [kip or N]
    R_n2 : sum with the factors of the clause [kip or N]
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J2.4; 360-16 from memory. The larger sum counts.

    >>> strength_of_mixed_fillets(R_nwl=118.78, R_nwt=29.69)
    148.47
    """
    R_n1 = R_nwl + R_nwt
    R_n2 = 0.85 * R_nwl + 1.5 * R_nwt
    R_n = maximum(R_n1, R_n2)
    return R_n


@equation(cite("J2.2b, Eq. J2-1"))
def length_factor_of_fillet(l, w):
    """Return the factor on the length of an end-loaded fillet up to 300 times as long as its size.

    Parameters
    ----------
    l : actual length [in or mm], positive
    w : size of the fillet, its leg [in or mm], positive

    Returns
    -------
    beta : factor on the length [1]

    Source: AISC 360-22 J2.2b, the same in 360-05; for lengths above 100 times the size.

    >>> round(length_factor_of_fillet(l=27.0, w=0.1875), 4)
    0.912
    """
    beta = minimum(1.2 - 0.002 * (l / w), 1.0)
    return beta


@equation(cite("J2.2b"))
def effective_length_of_fillet(beta, l):
    """Return the effective length of an end-loaded fillet.

    Parameters
    ----------
    beta : factor on the length [1], 0 to 1
    l : actual length [in or mm], positive

    Returns
    -------
    l_e : effective length [in or mm]

    Source: AISC 360-22 J2.2b, the same in 360-05.

    >>> round(effective_length_of_fillet(beta=0.912, l=54.0), 2)
    49.25
    """
    l_e = beta * l
    return l_e


@equation(cite("J2.2b", unread=("16",)))
def effective_length_of_very_long_fillet(w):
    """Return the effective length of an end-loaded fillet more than 300 times as long as its size.

    Parameters
    ----------
    w : size of the fillet, its leg [in or mm], positive

    Returns
    -------
    l_e : effective length [in or mm]

    Source: AISC 360-22 J2.2b; 360-16 from memory.

    >>> effective_length_of_very_long_fillet(w=0.1875)
    33.75
    """
    l_e = 180 * w
    return l_e


@equation(cite("J2.2b", unread=("16",)))
def size_of_short_fillet(l):
    """Return the size that counts of a fillet shorter than four times its size.

    Parameters
    ----------
    l : actual length [in or mm], positive

    Returns
    -------
    w_e : size that counts [in or mm]

    Source: AISC 360-22 J2.2b; 360-16 from memory.

    >>> size_of_short_fillet(l=0.75)
    0.1875
    """
    w_e = l / 4
    return w_e


@equation(cite("J2.2b", unread=("16",)), {"l_min": r"l_{\mathrm{min}}"})
def least_length_of_fillet(w):
    """Return the least length of a fillet that counts with its full size.

    Parameters
    ----------
    w : size of the fillet, its leg [in or mm], positive

    Returns
    -------
    l_min : least length [in or mm]

    Source: AISC 360-22 J2.2b; 360-16 from memory. Table D3.1, case 4 asks the same of each longitudinal weld.

    >>> least_length_of_fillet(w=0.25)
    1.0
    """
    l_min = 4 * w
    return l_min


@equation(cite("J2.2b", unread=("16",)), {"Delta_w": None, "w_max": r"w_{\mathrm{max}}"})
def greatest_size_along_edge(t, Delta_w):
    """Return the greatest size of a fillet along the edge of a part of 1/4 in or 6 mm and thicker.

    Parameters
    ----------
    t : thickness of the part [in or mm], positive
    Delta_w : constant of the clause, 1/16 in or 2 mm [in or mm], positive

    Returns
    -------
    w_max : greatest size [in or mm]

    Source: AISC 360-22 J2.2b; 360-16 from memory. A weld built out to the full throat is exempt.

    >>> greatest_size_along_edge(t=0.375, Delta_w=0.0625)
    0.3125
    """
    w_max = t - Delta_w
    return w_max


@equation(cite("J2.2b", unread=("16",)), {"l_0": None, "l_lap": r"l_{\mathrm{lap}}"})
def least_lap(t, l_0):
    """Return the least lap of a lap joint.

    Parameters
    ----------
    t : thickness of the thinner part [in or mm], positive
    l_0 : limit of the clause, 1 in or 25 mm [in or mm], positive

    Returns
    -------
    l_lap : least lap [in or mm]

    Source: AISC 360-22 J2.2b; 360-16 from memory.

    >>> least_lap(t=0.375, l_0=1.0)
    1.875
    """
    l_lap = maximum(5 * t, l_0)
    return l_lap
