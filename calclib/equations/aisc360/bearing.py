"""Bearing and tearout at bolt holes, spacing and edge distance of bolts; AISC 360 J3."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, minimum

GREATEST_EDGE_DISTANCE = {"US": 6.0, "SI": 150.0}     # J3.6: printed as pairs, in and mm
GREATEST_SPACING = {"US": 12.0, "SI": 300.0}
GREATEST_SPACING_WEATHERING = {"US": 7.0, "SI": 180.0}


@equation(cite("J3.11", "J3.10"))
def clear_distance_to_edge(L_e, d_h):
    """Return the clear distance from a hole to the edge of the ply, along the force.

    Parameters
    ----------
    L_e : distance from the centre of the hole to the edge [in or mm], positive
    d_h : nominal length of the hole along the force [in or mm], positive

    Returns
    -------
    l_c : clear distance [in or mm]

    Source: AISC 360-22 J3.11 (360-16 J3.10). The allowance for damage is not deducted here.

    >>> clear_distance_to_edge(L_e=1.5, d_h=0.9375)
    1.03125
    """
    l_c = L_e - d_h / 2
    return l_c


@equation(cite("J3.11", "J3.10"))
def clear_distance_to_next_hole(s, d_h):
    """Return the clear distance from a hole to the next one, along the force.

    Parameters
    ----------
    s : spacing of the holes, centre to centre [in or mm], positive
    d_h : nominal length of the hole along the force [in or mm], positive

    Returns
    -------
    l_c : clear distance [in or mm]

    Source: AISC 360-22 J3.11 (360-16 J3.10). The allowance for damage is not deducted here.

    >>> clear_distance_to_next_hole(s=3.0, d_h=0.9375)
    2.0625
    """
    l_c = s - d_h
    return l_c


@equation(cite("J3.11(a), Eq. J3-6a", "J3.10(a), Eq. J3-6a"))
def bearing(d, t, F_u):
    """Return the nominal bearing strength at a bolt hole, where deformation at service load counts.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a)).

    >>> bearing(d=0.875, t=0.625, F_u=65)
    85.3125
    """
    R_n = 2.4 * d * t * F_u
    return R_n


@equation(cite("J3.11(a), Eq. J3-6b", "J3.10(a), Eq. J3-6b", unread=("16",)))
def bearing_with_deformation(d, t, F_u):
    """Return the nominal bearing strength at a bolt hole, where deformation at service load does not count.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a), from memory).

    >>> round(bearing_with_deformation(d=0.875, t=0.625, F_u=65), 1)
    106.6
    """
    R_n = 3.0 * d * t * F_u
    return R_n


@equation(cite("J3.11(a)", "J3.10(a)", unread=("16",)))
def bearing_in_long_slot(d, t, F_u):
    """Return the nominal bearing strength at a bolt hole, in a long slot across the force.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a), from memory).

    >>> round(bearing_in_long_slot(d=0.875, t=0.625, F_u=65), 2)
    71.09
    """
    R_n = 2.0 * d * t * F_u
    return R_n


@equation(cite("J3.11(a), Eq. J3-6c", "J3.10(a), Eq. J3-6c"))
def tearout(l_c, t, F_u):
    """Return the nominal tearout strength at a bolt hole, where deformation at service load counts.

    Parameters
    ----------
    l_c : clear distance along the force, from hole to hole or to the edge of the ply [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a)).

    >>> round(tearout(l_c=1.03125, t=0.625, F_u=65), 2)
    50.27
    """
    R_n = 1.2 * l_c * t * F_u
    return R_n


@equation(cite("J3.11(a), Eq. J3-6d", "J3.10(a), Eq. J3-6d", unread=("16",)))
def tearout_with_deformation(l_c, t, F_u):
    """Return the nominal tearout strength at a bolt hole, where deformation at service load does not count.

    Parameters
    ----------
    l_c : clear distance along the force, from hole to hole or to the edge of the ply [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a), from memory).

    >>> round(tearout_with_deformation(l_c=1.03125, t=0.625, F_u=65), 2)
    62.84
    """
    R_n = 1.5 * l_c * t * F_u
    return R_n


@equation(cite("J3.11(a)", "J3.10(a)", unread=("16",)))
def tearout_in_long_slot(l_c, t, F_u):
    """Return the nominal tearout strength at a bolt hole, in a long slot across the force.

    Parameters
    ----------
    l_c : clear distance along the force, from hole to hole or to the edge of the ply [in or mm], positive
    t : thickness of the ply [in or mm], positive
    F_u : specified minimum tensile strength of the ply [ksi or MPa], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(a) (360-16 J3.10(a), from memory).

    >>> round(tearout_in_long_slot(l_c=1.03125, t=0.625, F_u=65), 2)
    41.89
    """
    R_n = 1.0 * l_c * t * F_u
    return R_n


@equation(Cite("AISC 360", {"22": "J3.11(b), Eq. J7-1"}))
def bearing_in_box(F_y, d, t):
    """Return the nominal bearing strength of a bolt that passes through an unstiffened box or hollow section.

    Parameters
    ----------
    F_y : specified minimum yield stress of the wall [ksi or MPa], positive
    d : nominal diameter of the bolt [in or mm], positive
    t : design thickness of the walls in bearing, added [in or mm], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.11(b) and J7.

    >>> round(bearing_in_box(F_y=50, d=0.75, t=0.349), 2)
    23.56
    """
    R_n = 1.8 * F_y * d * t
    return R_n


@equation(cite("J3.4", "J3.3", unread=("22",)), {"s_min": r"s_{\mathrm{min}}"})
def least_spacing(d):
    """Return the least distance between centres of holes.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive

    Returns
    -------
    s_min : least spacing [in or mm]

    Source: AISC 360-22 J3.4, its fraction from memory (360-16 J3.3). Three diameters are preferred; between holes one
    diameter is to stay clear.

    >>> least_spacing(d=0.75)
    2.0
    """
    s_min = (2 + 2 / 3) * d
    return s_min


@equation(cite("J3.4", "J3.3"), {"s_pref": r"s_{\mathrm{pref}}"})
def preferred_spacing(d):
    """Return the preferred distance between centres of holes.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive

    Returns
    -------
    s_pref : preferred spacing [in or mm]

    Source: AISC 360-22 J3.4 (360-16 J3.3).

    >>> preferred_spacing(d=0.75)
    2.25
    """
    s_pref = 3 * d
    return s_pref


@equation(cite("Table J3.4"), {"L_min": r"L_{e,\mathrm{min}}"})
def least_edge_distance_of_large_bolts(d):
    """Return the least edge distance for bolts above 1-1/4 in or 36 mm.

    Parameters
    ----------
    d : nominal diameter of the bolt [in or mm], positive

    Returns
    -------
    L_min : least edge distance [in or mm]

    Source: AISC 360-22 and 360-16 Table J3.4; smaller bolts have tabulated distances.

    >>> least_edge_distance_of_large_bolts(d=1.5)
    1.875
    """
    L_min = 1.25 * d
    return L_min


@equation(cite("J3.6", "J3.5"), {"L_max0": None, "L_max": r"L_{e,\mathrm{max}}"})
def greatest_edge_distance(t, L_max0):
    """Return the greatest distance from the centre of a bolt to the nearest edge.

    Parameters
    ----------
    t : thickness of the connected part [in or mm], positive
    L_max0 : limit of the clause, 6 in or 150 mm [in or mm], positive

    Returns
    -------
    L_max : greatest edge distance [in or mm]

    Source: AISC 360-22 J3.6 (360-16 J3.5).

    >>> greatest_edge_distance(t=0.375, L_max0=6.0)
    4.5
    """
    L_max = minimum(12 * t, L_max0)
    return L_max


@equation(cite("J3.6", "J3.5"), {"s_max0": None, "s_max": r"s_{\mathrm{max}}"})
def greatest_spacing(t, s_max0):
    """Return the greatest spacing along the force of fasteners that hold painted parts, or parts not exposed, together.

    Parameters
    ----------
    t : thickness of the thinner part [in or mm], positive
    s_max0 : limit of the clause, 12 in or 300 mm [in or mm], positive

    Returns
    -------
    s_max : greatest spacing [in or mm]

    Source: AISC 360-22 J3.6 (360-16 J3.5), for a plate with a plate or a shape.

    >>> greatest_spacing(t=0.375, s_max0=12.0)
    9.0
    """
    s_max = minimum(24 * t, s_max0)
    return s_max


@equation(cite("J3.6", "J3.5"), {"s_max0": None, "s_max": r"s_{\mathrm{max}}"})
def greatest_spacing_when_weathering(t, s_max0):
    """Return the greatest spacing along the force of fasteners that hold bare parts of weathering steel together.

    Parameters
    ----------
    t : thickness of the thinner part [in or mm], positive
    s_max0 : limit of the clause, 7 in or 180 mm [in or mm], positive

    Returns
    -------
    s_max : greatest spacing [in or mm]

    Source: AISC 360-22 J3.6 (360-16 J3.5), for a plate with a plate or a shape.

    >>> greatest_spacing_when_weathering(t=0.375, s_max0=7.0)
    5.25
    """
    s_max = minimum(14 * t, s_max0)
    return s_max
