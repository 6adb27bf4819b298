"""Connecting elements: tension, shear, block shear and the spread of a force in a gusset; AISC 360 J4."""

from math import pi

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, minimum, tan

SPREAD = pi / 6                # [rad]
SPREAD_IN_TENSION = pi / 4     # [rad]
SPLICE_PLATE = Cite("AISC 360-10", {"": "J4.1(b)"}, unread=("",))
WHITMORE = Cite("Common practice", {"": "(Whitmore section, from memory, verify)"})


@equation(cite("J4.1(a)"))
def tensile_yielding_of_element(F_y, A_g):
    """Return the nominal strength for tensile yielding of a connecting element.

    Parameters
    ----------
    F_y : specified minimum yield stress [ksi or MPa], positive
    A_g : gross area of the element [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J4.1(a).

    >>> tensile_yielding_of_element(F_y=50, A_g=6.6)
    330.0
    """
    R_n = F_y * A_g
    return R_n


@equation(cite("J4.1(b)"))
def tensile_rupture_of_element(F_u, A_e):
    """Return the nominal strength for tensile rupture of a connecting element.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_e : effective net area of the element [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J4.1(b).

    >>> tensile_rupture_of_element(F_u=58, A_e=2.5)
    145.0
    """
    R_n = F_u * A_e
    return R_n


@equation(SPLICE_PLATE)
def effective_net_area_of_splice_plate(A_n, A_g):
    """Return the net area of a bolted splice plate, not more than 0.85 of the gross area.

    Parameters
    ----------
    A_n : net area [in2 or mm2], positive
    A_g : gross area [in2 or mm2], positive

    Returns
    -------
    A_e : effective net area [in2 or mm2]

    Source: AISC 360-10 J4.1(b), from memory. The limit is not in the 2022 edition; whether the 2016 edition has it was
    not read.

    >>> effective_net_area_of_splice_plate(A_n=5.5, A_g=6.0)
    5.1
    """
    A_e = minimum(A_n, 0.85 * A_g)
    return A_e


@equation(cite("J4.3"))
def gross_area_of_cuts(n_c, L_c, t):
    """Return the gross area along straight cuts of one length.

    Parameters
    ----------
    n_c : number of cuts [1], positive
    L_c : length of one cut [in or mm], positive
    t : thickness [in or mm], positive

    Returns
    -------
    A_gv : gross area of the cuts [in2 or mm2]

    Source: AISC 360-22 and 360-16 J4.2 and J4.3; along a weld the net area is the same.

    >>> gross_area_of_cuts(n_c=2, L_c=13.5, t=0.625)
    16.875
    """
    A_gv = n_c * L_c * t
    return A_gv


@equation(cite("J4.3"))
def net_area_of_cuts(A_gv, n_h, d_e, t):
    """Return the net area along cuts through holes.

    Parameters
    ----------
    A_gv : gross area of the cuts [in2 or mm2], positive
    n_h : number of holes on all the cuts; at the corner of a block a half [1], not negative
    d_e : width deducted for one hole [in or mm], positive
    t : thickness [in or mm], positive

    Returns
    -------
    A_nv : net area of the cuts [in2 or mm2]

    Source: AISC 360-22 and 360-16 J4.2 and J4.3, with B4.3b. That a corner of a block counts half a hole is common
    practice.

    >>> net_area_of_cuts(A_gv=16.875, n_h=9, d_e=1.0, t=0.625)
    11.25
    """
    A_nv = A_gv - n_h * d_e * t
    return A_nv


@equation(cite("J4.2(a)", "J4.2(a), Eq. J4-3"))
def shear_yielding(F_y, A_gv):
    """Return the nominal strength for shear yielding of an element.

    Parameters
    ----------
    F_y : specified minimum yield stress [ksi or MPa], positive
    A_gv : gross area subject to shear [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J4.2(a).

    >>> shear_yielding(F_y=50, A_gv=18.8)
    564.0
    """
    R_n = 0.60 * F_y * A_gv
    return R_n


@equation(cite("J4.2(b)", "J4.2(b), Eq. J4-4"))
def shear_rupture_of_element(F_u, A_nv):
    """Return the nominal strength for shear rupture of an element.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_nv : net area subject to shear [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J4.2(b); also of the base metal along a fillet weld (J2.4).

    >>> shear_rupture_of_element(F_u=65, A_nv=12.5)
    487.5
    """
    R_n = 0.60 * F_u * A_nv
    return R_n


@equation(cite("J4.3, Eq. J4-5"), {"R_n1": "R_{n,1}", "R_n2": "R_{n,2}"})
def block_shear(F_u, F_y, A_nv, A_gv, U_bs, A_nt):
    """Return the nominal strength for block shear.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    F_y : specified minimum yield stress [ksi or MPa], positive
    A_nv : net area subject to shear [in2 or mm2], positive
    A_gv : gross area subject to shear [in2 or mm2], positive
    U_bs : 1 where the tension stress is uniform, 0.5 where it is not [1], 0 to 1
    A_nt : net area subject to tension [in2 or mm2], positive

    Returns
    -------
    R_n1 : shear rupture with tensile rupture [kip or N]
    R_n2 : shear yielding with tensile rupture [kip or N]
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J4.3.

    >>> block_shear(F_u=65, F_y=50, A_nv=11.25, A_gv=16.875, U_bs=1.0, A_nt=1.875)
    560.625
    """
    R_n1 = 0.60 * F_u * A_nv + U_bs * F_u * A_nt
    R_n2 = 0.60 * F_y * A_gv + U_bs * F_u * A_nt
    R_n = minimum(R_n1, R_n2)
    return R_n


@equation(cite("Commentary J4.3", unread=("16",)))
def block_shear_factor(l, e):
    """Return the factor on the tension term of block shear for a load off the centroid of the resistance.

    Parameters
    ----------
    l : length of the block [in or mm], positive
    e : distance from the load to the centroid of the resistance [in or mm], not negative

    Returns
    -------
    U_bs : factor [1]

    Source: Commentary on AISC 360-22 J4.3.

    >>> block_shear_factor(l=12.0, e=1.5)
    0.875
    """
    U_bs = 1 - e / l
    return U_bs


@equation(WHITMORE, {"theta": None})
def spread_width(w_0, L_s, theta):
    """Return the width of a gusset over which a force has spread at the last fastener, at 30 degrees.

    Parameters
    ----------
    w_0 : distance between the outer lines of fasteners, or width of the weld group [in or mm], not negative
    L_s : length of the fasteners or welds along the force [in or mm], not negative
    theta : angle of spread, 30 degrees [rad, printed in degrees], 0.523 to 0.524

    Returns
    -------
    w_s : width of spread [in or mm]

    Source: common practice, from memory: the Whitmore section.

    >>> round(spread_width(w_0=4.0, L_s=8.0, theta=0.5235987755982988), 2)
    13.24
    """
    w_s = w_0 + 2 * L_s * tan(theta)
    return w_s


@equation(Cite("AISC 360", {"22": "Commentary J4.1"}), {"theta": None})
def spread_width_in_tension(w_0, L_s, theta):
    """Return the width of a gusset in tension over which a force has spread at the last fastener, at 45 degrees.

    Parameters
    ----------
    w_0 : distance between the outer lines of fasteners, or width of the weld group [in or mm], not negative
    L_s : length of the fasteners or welds along the force [in or mm], not negative
    theta : angle of spread, 45 degrees [rad, printed in degrees], 0.785 to 0.786

    Returns
    -------
    w_s : width of spread [in or mm]

    Source: Commentary on AISC 360-22 J4.1: redistribution allows 45 degrees in tension; in compression 30 degrees
    stay.

    >>> round(spread_width_in_tension(w_0=3.0, L_s=9.0, theta=0.7853981633974483), 2)
    21.0
    """
    w_s = w_0 + 2 * L_s * tan(theta)
    return w_s


@equation(WHITMORE)
def spread_width_within_plate(w_s, w_0, e_1, e_2):
    """Return the part of the width of spread that lies within the plate.

    Parameters
    ----------
    w_s : width of spread [in or mm], positive
    w_0 : distance between the outer lines of fasteners, or width of the weld group [in or mm], not negative
    e_1 : from the lower outer line to the edge of the plate [in or mm], not negative
    e_2 : from the upper outer line to the edge of the plate [in or mm], not negative

    Returns
    -------
    w_e : width of spread within the plate [in or mm]

    Source: common practice, from memory: what would lie outside the plate is not there.

    >>> spread_width_within_plate(w_s=14.0, w_0=4.0, e_1=3.0, e_2=6.0)
    12.0
    """
    w_e = w_0 + minimum((w_s - w_0) / 2, e_1) + minimum((w_s - w_0) / 2, e_2)
    return w_e


@equation(cite("J4.3"))
def area_of_two_cuts(A_1, A_2):
    """Return the area of cuts of two kinds.

    Parameters
    ----------
    A_1 : area of the first [in2 or mm2], positive
    A_2 : area of the others [in2 or mm2], positive

    Returns
    -------
    A : area of both [in2 or mm2]

    Source: AISC 360-22 and 360-16 J4.3: the areas of a path are added.

    >>> area_of_two_cuts(A_1=4.0, A_2=1.5)
    5.5
    """
    A = A_1 + A_2
    return A
