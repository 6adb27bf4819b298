"""Shear lag factors of tension members, AISC 360 D3 and Table D3.1. The two editions differ for hollow sections."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, maximum

CASE_5_2022 = Cite("AISC 360", {"22": "Table D3.1, case 5"})
LAPPED_PLATE = Cite("Common practice", {"": "(centroid of a lapped plate)"})


@equation(cite("Table D3.1, case 2"), {"x_bar": r"\bar{x}"})
def shear_lag_factor(l, x_bar):
    """Return the shear lag factor where not all elements of a section are connected.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 and 360-16 Table D3.1, case 2: fasteners, or longitudinal with transverse welds; not for hollow
    sections.

    >>> round(shear_lag_factor(l=9.0, x_bar=0.831), 4)
    0.9077
    """
    U = 1 - x_bar / l
    return U


@equation(cite("Table D3.1, case 4"))
def average_weld_length(l_1, l_2):
    """Return the length of a connection by two longitudinal welds.

    Parameters
    ----------
    l_1 : length of the first weld [in or mm], positive
    l_2 : length of the other weld [in or mm], positive

    Returns
    -------
    l : length of the connection [in or mm]

    Source: AISC 360-22 and 360-16 Table D3.1, case 4. Each weld is to be at least four times its size long.

    >>> average_weld_length(l_1=8.0, l_2=6.0)
    7.0
    """
    l = (l_1 + l_2) / 2
    return l


@equation(cite("Table D3.1, case 4"), {"x_bar": r"\bar{x}"})
def shear_lag_factor_of_longitudinal_welds(l, w, x_bar):
    """Return the shear lag factor of a connection by longitudinal welds alone.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    w : width of the plate or of the connected element between the welds [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 and 360-16 Table D3.1, case 4.

    >>> round(shear_lag_factor_of_longitudinal_welds(l=16.0, w=8.01, x_bar=1.09), 4)
    0.86
    """
    U = 3 * l ** 2 / (3 * l ** 2 + w ** 2) * (1 - x_bar / l)
    return U


@equation(CASE_5_2022, {"x_bar": r"\bar{x}"})
def shear_lag_factor_of_slotted_round_hss_2022(l, x_bar):
    """Return the shear lag factor of a round hollow section slotted over one gusset.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 Table D3.1, case 5.

    >>> round(shear_lag_factor_of_slotted_round_hss_2022(l=16.0, x_bar=1.76), 4)
    0.9915
    """
    U = (1 + (x_bar / l) ** 3.2) ** (-10)
    return U


@equation(CASE_5_2022, {"x_bar": r"\bar{x}"})
def shear_lag_factor_of_slotted_rectangular_hss_2022(l, x_bar):
    """Return the shear lag factor of a rectangular hollow section slotted over one gusset.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 Table D3.1, case 5.

    >>> shear_lag_factor_of_slotted_rectangular_hss_2022(l=12.0, x_bar=1.875)
    0.84375
    """
    U = 1 - x_bar / l
    return U


@equation(Cite("AISC 360", {"22": "Table D3.1, case 6"}))
def shear_lag_factor_of_side_plates_2022(l, B, H):
    """Return the shear lag factor of a rectangular hollow section between two side plates.

    Parameters
    ----------
    l : length of the welds [in or mm], positive
    B : width of the two faces that are connected [in or mm], positive
    H : height of the two faces that are not [in or mm], positive

    Returns
    -------
    U_B : factor of the connected faces [1]
    U_H : factor of the other faces [1]
    U : shear lag factor [1]

    Source: AISC 360-22 Table D3.1, case 6.

    >>> round(shear_lag_factor_of_side_plates_2022(l=6.0, B=4.0, H=6.0), 4)
    0.7984
    """
    U_B = 3 * l ** 2 / (3 * l ** 2 + B ** 2)
    U_H = 3 * l ** 2 / (3 * l ** 2 + H ** 2)
    U = (B * U_B + H * U_H) / (H + B)
    return U


@equation(Cite("AISC 360", {"16": "Table D3.1, case 5"}), {"x_bar": r"\bar{x}"})
def shear_lag_factor_of_round_hss_2016(l, x_bar):
    """Return the shear lag factor of a round hollow section slotted over one gusset.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-16 Table D3.1, case 5, for lengths from D to below 1.3 D; from 1.3 D on the factor is 1.

    >>> round(shear_lag_factor_of_round_hss_2016(l=6.0, x_bar=1.91), 4)
    0.6817
    """
    U = 1 - x_bar / l
    return U


@equation(Cite("AISC 360", {"16": "Table D3.1, case 6"}), {"x_bar": r"\bar{x}"})
def shear_lag_factor_of_rectangular_hss_2016(l, x_bar):
    """Return the shear lag factor of a rectangular hollow section with one gusset or two side plates.

    Parameters
    ----------
    l : length of the connection along the force [in or mm], positive
    x_bar : distance from the connection plane to the centroid of the part it connects [in or mm], not negative

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-16 Table D3.1, case 6, for lengths from H on.

    >>> shear_lag_factor_of_rectangular_hss_2016(l=12.0, x_bar=2.25)
    0.8125
    """
    U = 1 - x_bar / l
    return U


@equation(cite("D3"))
def shear_lag_factor_by_area(A_c, A_g):
    """Return the least shear lag factor of an open section by the part of it that is connected.

    Parameters
    ----------
    A_c : gross area of the connected elements [in2 or mm2], positive
    A_g : gross area [in2 or mm2], positive

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 and 360-16 D3, for open sections; not for hollow sections and plates.

    >>> round(shear_lag_factor_by_area(A_c=4.216, A_g=6.16), 4)
    0.6844
    """
    U = A_c / A_g
    return U


@equation(cite("Table D3.1"))
def larger_shear_lag_factor(U_1, U_2):
    """Return the larger of two shear lag factors that may both be used.

    Parameters
    ----------
    U_1 : first factor [1], 0 to 1
    U_2 : other factor [1], 0 to 1

    Returns
    -------
    U : shear lag factor [1]

    Source: AISC 360-22 and 360-16 Table D3.1, cases 7 and 8: the larger value of the two is permitted; D3.

    >>> larger_shear_lag_factor(U_1=0.908, U_2=0.85)
    0.908
    """
    U = maximum(U_1, U_2)
    return U


@equation(cite("Table D3.1, case 7"), {"b_min": r"b_{f,\mathrm{min}}"})
def least_flange_width_of_case_7(d):
    """Return the flange width from which the larger factor of case 7 holds.

    Parameters
    ----------
    d : depth of the section; of a tee, the depth of the section that it was cut from [in or mm], positive

    Returns
    -------
    b_min : least flange width [in or mm]

    Source: AISC 360-22 and 360-16 Table D3.1, case 7: 0.90 from this width on, 0.85 below.

    >>> least_flange_width_of_case_7(d=8.28)
    5.52
    """
    b_min = 2 / 3 * d
    return b_min


@equation(cite("Commentary D3", unread=("16",)), {"x_bar": r"\bar{x}"})
def centroid_from_connected_flange(d, Z_x, A_g):
    """Return the distance from a connected flange to the centroid of its half of a doubly symmetric section.

    Parameters
    ----------
    d : depth of the section [in or mm], positive
    Z_x : plastic section modulus about the strong axis [in3 or mm3], positive
    A_g : gross area [in2 or mm2], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: Commentary on AISC 360-22 D3: the section is taken as two tees.

    >>> round(centroid_from_connected_flange(d=8.28, Z_x=20.4, A_g=6.16), 4)
    0.8283
    """
    x_bar = d / 2 - Z_x / A_g
    return x_bar


@equation(cite("Commentary D3", unread=("16",)), {"x_bar": r"\bar{x}"})
def centroid_from_connected_web(Z_y, A_g):
    """Return the distance from the middle of a connected web to the centroid of its half of a doubly symmetric section.

    Parameters
    ----------
    Z_y : plastic section modulus about the weak axis [in3 or mm3], positive
    A_g : gross area [in2 or mm2], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: Commentary on AISC 360-22 D3: the section is taken as two channels.

    >>> round(centroid_from_connected_web(Z_y=5.69, A_g=6.16), 4)
    0.9237
    """
    x_bar = Z_y / A_g
    return x_bar


@equation(LAPPED_PLATE, {"x_bar": r"\bar{x}"})
def centroid_of_lapped_plate(t):
    """Return the distance from the face of a lapped plate to its centroid.

    Parameters
    ----------
    t : thickness of the plate [in or mm], positive

    Returns
    -------
    x_bar : distance to the centroid [in or mm]

    Source: by the general meaning of the distance in AISC 360 Table D3.1; many calcs take 0 for a plate in a single
    lap.

    >>> centroid_of_lapped_plate(t=0.5)
    0.25
    """
    x_bar = t / 2
    return x_bar
