"""Pin-connected members, AISC 360 D5, and bearing on the pin, J7."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation, minimum

EFFECTIVE_WIDTH_ALLOWANCE = {"US": 0.63, "SI": 16.0}   # D5.1(a): printed as a pair, in and mm


@equation(cite("D5.1(a)"))
def centred_side_distance(w, d_h):
    """Return the distance from the edge of a centred hole to the edge of the plate, normal to the force.

    Parameters
    ----------
    w : width of the plate [in or mm], positive
    d_h : diameter of the hole [in or mm], positive

    Returns
    -------
    b : side distance [in or mm]

    Source: AISC 360-22 and 360-16 D5.1(a), by geometry.

    >>> centred_side_distance(w=8.0, d_h=3.0625)
    2.46875
    """
    b = (w - d_h) / 2
    return b


@equation(cite("D5.1(a)"))
def opposite_side_distance(w, d_h, b_1):
    """Return the side distance opposite to the one given.

    Parameters
    ----------
    w : width of the plate [in or mm], positive
    d_h : diameter of the hole [in or mm], positive
    b_1 : side distance on the first side [in or mm], positive

    Returns
    -------
    b_2 : side distance on the other side [in or mm]

    Source: AISC 360-22 and 360-16 D5.1(a), by geometry.

    >>> opposite_side_distance(w=8.0, d_h=3.0, b_1=2.0)
    3.0
    """
    b_2 = w - d_h - b_1
    return b_2


@equation(cite("D5.1(a)"))
def smaller_side_distance(b_1, b_2):
    """Return the side distance that counts for a hole off the centre line: the smaller one.

    Parameters
    ----------
    b_1 : side distance on the first side [in or mm], positive
    b_2 : side distance on the other side [in or mm], positive

    Returns
    -------
    b : side distance [in or mm]

    Source: AISC 360-22 and 360-16 D5.1(a): the actual distance from the edge of the hole to the edge of the part.

    >>> smaller_side_distance(b_1=2.0, b_2=3.0)
    2.0
    """
    b = minimum(b_1, b_2)
    return b


@equation(cite("D5.1(a)"), {"b_e1": "b_{e,1}", "Delta_be": None})
def effective_width_by_thickness(t, Delta_be):
    """Return the effective width to each side of the hole as the thickness allows it.

    Parameters
    ----------
    t : thickness of the plate [in or mm], positive
    Delta_be : constant of the clause, 0.63 in or 16 mm [in or mm], positive

    Returns
    -------
    b_e1 : effective width before the limit by the edge [in or mm]

    Source: AISC 360-22 and 360-16 D5.1(a).

    >>> round(effective_width_by_thickness(t=0.5, Delta_be=0.63), 12)
    1.63
    """
    b_e1 = 2 * t + Delta_be
    return b_e1


@equation(cite("D5.1(a)"), {"b_e1": "b_{e,1}"})
def effective_width(b_e1, b):
    """Return the effective width to each side of the hole, not more than the material that is there.

    Parameters
    ----------
    b_e1 : effective width by thickness [in or mm], positive
    b : side distance, from the edge of the hole [in or mm], positive

    Returns
    -------
    b_e : effective width [in or mm]

    Source: AISC 360-22 and 360-16 D5.1(a).

    >>> effective_width(b_e1=1.63, b=1.61)
    1.61
    """
    b_e = minimum(b_e1, b)
    return b_e


@equation(cite("D5.1(a), Eq. D5-1"))
def tensile_rupture(F_u, t, b_e):
    """Return the nominal strength for tensile rupture on the effective net area.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    t : thickness of the plate [in or mm], positive
    b_e : effective width [in or mm], positive

    Returns
    -------
    P_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 D5.1(a).

    >>> round(tensile_rupture(F_u=65, t=0.5, b_e=1.61), 2)
    104.65
    """
    P_n = F_u * (2 * t * b_e)
    return P_n


@equation(cite("D5.1(b)"))
def shear_area_at_pin(t, a, d):
    """Return the area on the two shear planes behind the pin.

    Parameters
    ----------
    t : thickness of the plate [in or mm], positive
    a : distance from the edge of the hole to the end of the plate, along the force [in or mm], positive
    d : diameter of the pin, not of the hole [in or mm], positive

    Returns
    -------
    A_sf : area on the shear failure path [in2 or mm2]

    Source: AISC 360-22 and 360-16 D5.1(b).

    >>> shear_area_at_pin(t=0.5, a=2.25, d=1.0)
    2.75
    """
    A_sf = 2 * t * (a + d / 2)
    return A_sf


@equation(cite("D5.1(b), Eq. D5-2"))
def shear_rupture_with_hole_factor(F_u, C_r, A_sf):
    """Return the nominal strength for shear rupture behind the pin, reduced for the clearance of the hole.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    C_r : reduction for the clearance between hole and pin [1], 0.95 to 1
    A_sf : area on the shear failure path [in2 or mm2], positive

    Returns
    -------
    P_n : nominal strength [kip or N]

    Source: AISC 360-22 D5.1(b). The factor is new in the 2022 edition; the 2016 edition is the next function.

    >>> round(shear_rupture_with_hole_factor(F_u=65, C_r=1.0, A_sf=2.75), 2)
    107.25
    """
    P_n = 0.6 * C_r * F_u * A_sf
    return P_n


@equation(cite("D5.1(b), Eq. D5-2", unread=("16",)))
def shear_rupture(F_u, A_sf):
    """Return the nominal strength for shear rupture behind the pin.

    Parameters
    ----------
    F_u : specified minimum tensile strength [ksi or MPa], positive
    A_sf : area on the shear failure path [in2 or mm2], positive

    Returns
    -------
    P_n : nominal strength [kip or N]

    Source: AISC 360-16 D5.1(b), from memory; agrees with the nominal value of AISC Design Examples v15, Ex. D.7.

    >>> round(shear_rupture(F_u=58, A_sf=2.75), 1)
    95.7
    """
    P_n = 0.6 * F_u * A_sf
    return P_n


@equation(cite("J7(a)"), {"F_ymin": r"F_{y,\mathrm{min}}", "F_yp": r"F_{y,\mathrm{pin}}"})
def weaker_yield_stress(F_y, F_yp):
    """Return the yield stress that counts in bearing: that of the weaker of plate and pin.

    Parameters
    ----------
    F_y : yield stress of the plate [ksi or MPa], positive
    F_yp : yield stress of the pin [ksi or MPa], positive

    Returns
    -------
    F_ymin : the smaller one [ksi or MPa]

    Source: AISC 360-22 and 360-16 J7(a). That the weaker part counts is common practice.

    >>> weaker_yield_stress(F_y=50, F_yp=36)
    36
    """
    F_ymin = minimum(F_y, F_yp)
    return F_ymin


@equation(cite("J7(a)"))
def projected_bearing_area(d, t):
    """Return the projected area in bearing of a pin on a plate.

    Parameters
    ----------
    d : diameter of the pin [in or mm], positive
    t : thickness of the plate [in or mm], positive

    Returns
    -------
    A_pb : projected bearing area [in2 or mm2]

    Source: AISC 360-22 and 360-16 J7(a).

    >>> projected_bearing_area(d=1.0, t=0.5)
    0.5
    """
    A_pb = d * t
    return A_pb


@equation(cite("J7(a), Eq. J7-1"))
def pin_bearing(F_y, A_pb):
    """Return the nominal strength in bearing of a pin in a reamed, drilled or bored hole.

    Parameters
    ----------
    F_y : yield stress of the weaker of pin and plate [ksi or MPa], positive
    A_pb : projected bearing area [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 and 360-16 J7(a). That the weaker part counts is common practice.

    >>> pin_bearing(F_y=50, A_pb=0.5)
    45.0
    """
    R_n = 1.8 * F_y * A_pb
    return R_n


@equation(cite("D5.2(c)"), {"a_min": r"a_{\mathrm{min}}"})
def least_end_distance(b_e):
    """Return the least distance from the edge of the hole to the end of the plate.

    Parameters
    ----------
    b_e : effective width [in or mm], positive

    Returns
    -------
    a_min : least end distance [in or mm]

    Source: AISC 360-22 and 360-16 D5.2(c).

    >>> round(least_end_distance(b_e=1.61), 4)
    2.1413
    """
    a_min = 1.33 * b_e
    return a_min


@equation(cite("D5.2(c)"), {"w_min": r"w_{\mathrm{min}}"})
def least_width(b_e, d):
    """Return the least width of the plate at the pin.

    Parameters
    ----------
    b_e : effective width [in or mm], positive
    d : diameter of the pin [in or mm], positive

    Returns
    -------
    w_min : least width [in or mm]

    Source: AISC 360-22 and 360-16 D5.2(c).

    >>> least_width(b_e=1.5, d=1.0)
    4.0
    """
    w_min = 2 * b_e + d
    return w_min
