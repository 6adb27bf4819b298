"""Tension members: gross, net and effective net area, yielding and rupture; AISC 360 B4.3 and chapter D."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation

HOLE_ALLOWANCE = {"US": 1 / 16, "SI": 2.0}     # B4.3b: printed as a pair, in and mm
LOAD_SHARE = Cite("Common practice", {"": "(load share of a chain)"})


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


@equation(cite("D1"), {"lambda_r": r"\lambda"})
def slenderness(L, r):
    """Return the slenderness of a member or of one of its parts.

    Parameters
    ----------
    L : length, as fabricated or between connectors [in or mm], positive
    r : least radius of gyration [in or mm], positive

    Returns
    -------
    lambda_r : length over radius of gyration [1]

    Source: AISC 360-22 and 360-16 D1. The limit of 300 is advice; rods and hangers are exempt.

    >>> round(slenderness(L=300.0, r=1.26), 1)
    238.1
    """
    lambda_r = L / r
    return lambda_r


@equation(cite("B4.3b"), {"Delta_h": None})
def width_of_hole_deducted(d_h, Delta_h):
    """Return the width that one hole takes from the net section.

    Parameters
    ----------
    d_h : nominal width of the hole across the force [in or mm], positive
    Delta_h : allowance of the clause for damage, 1/16 in or 2 mm [in or mm], positive

    Returns
    -------
    d_e : width deducted for one hole [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b, for net areas in tension and in shear.

    >>> width_of_hole_deducted(d_h=0.8125, Delta_h=0.0625)
    0.875
    """
    d_e = d_h + Delta_h
    return d_e


@equation(cite("B4.3b"))
def net_width_of_straight_chain(w, n_h, d_e):
    """Return the net width of a chain of holes square to the force.

    Parameters
    ----------
    w : width of the element [in or mm], positive
    n_h : number of holes in the chain [1], not negative
    d_e : width deducted for one hole [in or mm], positive

    Returns
    -------
    w_n : net width [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> net_width_of_straight_chain(w=14.0, n_h=2, d_e=0.875)
    12.25
    """
    w_n = w - n_h * d_e
    return w_n


@equation(cite("B4.3b"))
def width_gained_by_stagger(s, g):
    """Return what the net width gains by one gage space that the chain crosses at an angle.

    Parameters
    ----------
    s : pitch between the two holes, along the force [in or mm], not negative
    g : gage between the two holes, across the force [in or mm], positive

    Returns
    -------
    Delta_w : width gained [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> round(width_gained_by_stagger(s=2.5, g=3.0), 4)
    0.5208
    """
    Delta_w = s ** 2 / (4 * g)
    return Delta_w


@equation(cite("B4.3b"))
def net_width_with_stagger(w_0, n_g, s, g):
    """Return the net width of a chain with gage spaces that it crosses at an angle.

    Parameters
    ----------
    w_0 : net width before these gage spaces are counted [in or mm], positive
    n_g : number of gage spaces of this pitch and gage [1], positive
    s : pitch between the two holes, along the force [in or mm], not negative
    g : gage between the two holes, across the force [in or mm], positive

    Returns
    -------
    w_n : net width [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b. Used once for each pair of pitch and gage in the chain.

    >>> round(net_width_with_stagger(w_0=10.5, n_g=2, s=2.5, g=3.0), 2)
    11.54
    """
    w_n = w_0 + n_g * (s ** 2 / (4 * g))
    return w_n


@equation(cite("B4.3b"))
def gage_across_heel(g_1, g_2, t):
    """Return the gage between holes in opposite legs of an angle, as the angle is laid flat.

    Parameters
    ----------
    g_1 : gage in the first leg, from the back of the angle [in or mm], positive
    g_2 : gage in the other leg, from the back of the angle [in or mm], positive
    t : thickness of the angle [in or mm], positive

    Returns
    -------
    g : gage across the heel [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> gage_across_heel(g_1=2.25, g_2=2.25, t=0.375)
    4.125
    """
    g = g_1 + g_2 - t
    return g


@equation(cite("B4.3b"))
def net_area_of_plate(w_n, t):
    """Return the net area of a plate on a chain of holes.

    Parameters
    ----------
    w_n : net width [in or mm], positive
    t : thickness [in or mm], positive

    Returns
    -------
    A_n : net area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> net_area_of_plate(w_n=11.5, t=0.5)
    5.75
    """
    A_n = w_n * t
    return A_n


@equation(cite("B4.3b"))
def net_area_after_holes(A_0, n_h, d_e, t):
    """Return the area that is left where holes are deducted from a section.

    Parameters
    ----------
    A_0 : area before these holes are deducted [in2 or mm2], positive
    n_h : number of holes in parts of this thickness [1], not negative
    d_e : width deducted for one hole [in or mm], positive
    t : thickness at the holes [in or mm], positive

    Returns
    -------
    A_n : net area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3b. Used once for each thickness.

    >>> net_area_after_holes(A_0=6.16, n_h=4, d_e=0.875, t=0.4)
    4.76
    """
    A_n = A_0 - n_h * d_e * t
    return A_n


@equation(cite("B4.3b"))
def net_area_with_stagger(A_0, n_g, s, g, t):
    """Return the net area of a section on a chain with gage spaces that it crosses at an angle.

    Parameters
    ----------
    A_0 : net area before these gage spaces are counted [in2 or mm2], positive
    n_g : number of gage spaces of this pitch and gage [1], positive
    s : pitch between the two holes, along the force [in or mm], not negative
    g : gage between the two holes, across the force [in or mm], positive
    t : thickness; where the holes lie in unequal parts, the smaller one [in or mm], positive

    Returns
    -------
    A_n : net area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3b. That the smaller thickness counts is common practice.

    >>> round(net_area_with_stagger(A_0=18.755, n_g=2, s=3.0, g=3.0, t=0.415), 2)
    19.38
    """
    A_n = A_0 + n_g * (s ** 2 / (4 * g)) * t
    return A_n


@equation(LOAD_SHARE, {"A_n1": "A_{n,1}"})
def net_area_for_full_load(A_n, N, m):
    """Return the net area that would carry the full load as a chain carries its share.

    Parameters
    ----------
    A_n : net area on the chain [in2 or mm2], positive
    N : number of fasteners of equal load [1], positive
    m : number of fasteners that have shed their load before the chain [1], not negative

    Returns
    -------
    A_n1 : equivalent net area [in2 or mm2]

    Source: common practice; the commentary on AISC 360-22 D3 ties the net area to the load that crosses it.

    >>> round(net_area_for_full_load(A_n=5.0, N=8, m=2), 3)
    6.667
    """
    A_n1 = A_n * (N / (N - m))
    return A_n1


@equation(cite("D3, Eq. D3-1"))
def effective_net_area(A_n, U):
    """Return the effective net area of a tension member.

    Parameters
    ----------
    A_n : net area [in2 or mm2], positive
    U : shear lag factor [1], 0 to 1

    Returns
    -------
    A_e : effective net area [in2 or mm2]

    Source: AISC 360-22 and 360-16 D3.

    >>> effective_net_area(A_n=4.76, U=0.908)
    4.32208
    """
    A_e = A_n * U
    return A_e


@equation(cite("D2(b), Eq. D2-2"))
def tensile_rupture_of_member(F_u, A_e):
    """Return the nominal strength for tensile rupture in the net section.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_e : effective net area [in2 or mm2], positive

    Returns
    -------
    P_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 D2(b).

    >>> tensile_rupture_of_member(F_u=65, A_e=4.32)
    280.8
    """
    P_n = F_u * A_e
    return P_n
