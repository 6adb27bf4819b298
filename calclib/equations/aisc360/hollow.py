"""Hollow sections slotted over a gusset or between side plates: wall, slot and centroid, AISC 360 B4 and Table D3.1."""

from math import pi

from calclib.equations.aisc360 import cite
from calclib.equations.aisc360.shear_lag import CASE_5_2022
from calclib.equations.form import Cite, asin, equation, sin


@equation(cite("B4.2", unread=("16",)), {"t_nom": r"t_{\mathrm{nom}}"})
def design_wall(t_nom):
    """Return the design wall thickness of a hollow section whose standard allows a thinner wall.

    Parameters
    ----------
    t_nom : nominal wall thickness [in or mm], positive

    Returns
    -------
    t : design wall thickness [in or mm]

    Source: AISC 360-22 B4.2, for A500, A847, A618 and A53; 360-16 from memory. Box sections, A1065 and A1085 keep the
    nominal thickness.

    >>> design_wall(t_nom=0.5)
    0.465
    """
    t = 0.93 * t_nom
    return t


@equation(cite("B4.3b"))
def slot_width(t_p, Delta_s):
    """Return the width of the slot in a hollow section that is pushed over a gusset.

    Parameters
    ----------
    t_p : thickness of the gusset [in or mm], positive
    Delta_s : what the slot is wider than the gusset [in or mm], not negative

    Returns
    -------
    b_s : width of the slot [in or mm]

    Source: AISC 360-22 and 360-16 B4.3b: the total width of material that is removed to form the slot.

    >>> slot_width(t_p=0.5, Delta_s=0.0625)
    0.5625
    """
    b_s = t_p + Delta_s
    return b_s


@equation(cite("B4.3b"))
def net_area_of_slotted_hss(A_g, t, b_s):
    """Return the net area of a hollow section slotted through both walls.

    Parameters
    ----------
    A_g : gross area [in2 or mm2], positive
    t : design wall thickness [in or mm], positive
    b_s : width of the slot [in or mm], positive

    Returns
    -------
    A_n : net area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> round(net_area_of_slotted_hss(A_g=8.09, t=0.465, b_s=0.5625), 3)
    7.567
    """
    A_n = A_g - 2 * t * b_s
    return A_n


@equation(CASE_5_2022)
def half_arc_beside_gusset(D, t_p):
    """Return half the angle of the arc on one side of the gusset, at the centre of a round hollow section.

    Parameters
    ----------
    D : outside diameter [in or mm], positive
    t_p : thickness of the gusset [in or mm], positive

    Returns
    -------
    theta : half angle [rad]

    Source: AISC 360-22 Table D3.1, case 5, by geometry; AISC Design Examples v16.0, Ex. D.5.

    >>> round(half_arc_beside_gusset(D=6.0, t_p=0.5), 3)
    1.487
    """
    theta = pi / 2 - asin(t_p / D)
    return theta


@equation(CASE_5_2022, {"x_bar": r"\bar{x}"})
def centroid_of_slotted_round_hss_2022(D, theta, t_p):
    """Return the distance from the gusset to the centroid of the arc on one side of it.

    Parameters
    ----------
    D : outside diameter [in or mm], positive
    theta : half the angle of the arc [rad], 0.1 to 1.5708
    t_p : thickness of the gusset [in or mm], positive

    Returns
    -------
    R : outside radius [in or mm]
    x_bar : distance to the centroid [in or mm]

    Source: AISC 360-22 Table D3.1, case 5. The legend does not say which radius R is; AISC Design Examples v16.0, Ex.
    D.5 takes the outside one.

    >>> round(centroid_of_slotted_round_hss_2022(D=6.0, theta=1.48737, t_p=0.5), 3)
    1.76
    """
    R = D / 2
    x_bar = R * (sin(theta) / theta) - t_p / 2
    return x_bar


@equation(CASE_5_2022)
def width_beside_gusset(B, t_p):
    """Return the distance from the gusset to the outer face of a rectangular hollow section.

    Parameters
    ----------
    B : overall width, square to the gusset [in or mm], positive
    t_p : thickness of the gusset [in or mm], positive

    Returns
    -------
    b : distance from gusset to outer face [in or mm]

    Source: AISC 360-22 Table D3.1, case 5, by geometry.

    >>> width_beside_gusset(B=6.0, t_p=0.75)
    2.625
    """
    b = (B - t_p) / 2
    return b


@equation(CASE_5_2022, {"x_bar": r"\bar{x}"})
def centroid_of_slotted_rectangular_hss_2022(b, H, t):
    """Return the distance from the gusset to the centroid of the wall and two half walls on one side of it.

    Parameters
    ----------
    b : distance from gusset to outer face [in or mm], positive
    H : overall height, along the gusset [in or mm], positive
    t : design wall thickness [in or mm], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: AISC 360-22 Table D3.1, case 5.

    >>> centroid_of_slotted_rectangular_hss_2022(b=2.625, H=6.0, t=0.375)
    1.875
    """
    x_bar = b - (2 * b ** 2 + t * H - 2 * t ** 2) / (2 * H + 4 * b - 4 * t)
    return x_bar


@equation(Cite("AISC 360", {"16": "Table D3.1, case 5"}), {"x_bar": r"\bar{x}"})
def centroid_of_round_hss_2016(D):
    """Return the distance from the middle plane to the centroid of half a round hollow section.

    Parameters
    ----------
    D : outside diameter [in or mm], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: AISC 360-16 Table D3.1, case 5.

    >>> round(centroid_of_round_hss_2016(D=6.0), 3)
    1.91
    """
    x_bar = D / pi
    return x_bar


@equation(Cite("AISC 360", {"16": "Table D3.1, case 6"}), {"x_bar": r"\bar{x}"})
def centroid_of_rectangular_hss_with_gusset_2016(B, H):
    """Return the distance from the middle plane to the centroid of half a rectangular hollow section.

    Parameters
    ----------
    B : overall width, square to the plane of the connection [in or mm], positive
    H : overall height, in the plane of the connection [in or mm], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: AISC 360-16 Table D3.1, case 6, a single concentric gusset.

    >>> centroid_of_rectangular_hss_with_gusset_2016(B=6.0, H=6.0)
    2.25
    """
    x_bar = (B ** 2 + 2 * B * H) / (4 * (B + H))
    return x_bar


@equation(Cite("AISC 360", {"16": "Table D3.1, case 6"}), {"x_bar": r"\bar{x}"})
def centroid_of_rectangular_hss_with_side_plates_2016(B, H):
    """Return the distance from a side plate to the centroid of its half of a rectangular hollow section.

    Parameters
    ----------
    B : overall width, square to the plane of the connection [in or mm], positive
    H : overall height, in the plane of the connection [in or mm], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: AISC 360-16 Table D3.1, case 6, two side gusset plates.

    >>> centroid_of_rectangular_hss_with_side_plates_2016(B=4.0, H=6.0)
    0.4
    """
    x_bar = B ** 2 / (4 * (B + H))
    return x_bar
