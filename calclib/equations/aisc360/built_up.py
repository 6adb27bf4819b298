"""Built-up tension members, AISC 360 D4. Connectors of parts in contact follow J3.6: see `bearing.py`."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import Cite, equation, minimum, sqrt

PARALLEL_AXES = Cite("Mechanics of materials", {"": "(parallel axes)"})
TIE_PLATE_SPACING = {"US": 6.0, "SI": 150.0}     # D4, longitudinal spacing at tie plates: printed as a pair, in and mm


@equation(cite("B4.3a"))
def gross_area_of_equal_parts(n_1, A_1):
    """Return the gross area of a member built of equal parts.

    Parameters
    ----------
    n_1 : number of parts [1], positive
    A_1 : gross area of one of them [in2 or mm2], positive

    Returns
    -------
    A_g : gross area [in2 or mm2]

    Source: AISC 360-22 and 360-16 B4.3a.

    >>> gross_area_of_equal_parts(n_1=2, A_1=3.75)
    7.5
    """
    A_g = n_1 * A_1
    return A_g


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


@equation(cite("B4.3b"))
def holes_in_all_parts(n_1, m):
    """Return how many holes a section of equal parts loses.

    Parameters
    ----------
    n_1 : number of parts [1], positive
    m : number of holes in each of them [1], not negative

    Returns
    -------
    n_h : number of holes [1]

    Source: AISC 360-22 and 360-16 B4.3b.

    >>> holes_in_all_parts(n_1=2, m=3)
    6
    """
    n_h = n_1 * m
    return n_h


@equation(PARALLEL_AXES, {"x_bar": r"\bar{x}"})
def offset_toe_to_toe(B, x_bar):
    """Return how far the centroid of one of two parts with the toes inward lies from the axis between them.

    Parameters
    ----------
    B : distance between the backs [in or mm], positive
    x_bar : distance from the back of a part to its centroid [in or mm], positive

    Returns
    -------
    e_1 : distance from the axis to the centroid of a part [in or mm]

    Source: geometry.

    >>> offset_toe_to_toe(B=14.0, x_bar=0.75)
    6.25
    """
    e_1 = B / 2 - x_bar
    return e_1


@equation(PARALLEL_AXES, {"x_bar": r"\bar{x}"})
def offset_back_to_back(s, x_bar):
    """Return how far the centroid of one of two parts with the backs inward lies from the axis between them.

    Parameters
    ----------
    s : distance between the backs [in or mm], not negative
    x_bar : distance from the back of a part to its centroid [in or mm], positive

    Returns
    -------
    e_1 : distance from the axis to the centroid of a part [in or mm]

    Source: geometry.

    >>> offset_back_to_back(s=0.5, x_bar=0.75)
    1.0
    """
    e_1 = s / 2 + x_bar
    return e_1


@equation(PARALLEL_AXES)
def offset_of_cover_plate(d, t):
    """Return how far the middle of a cover plate lies from the axis through the middle of the shapes.

    Parameters
    ----------
    d : depth of the shapes [in or mm], positive
    t : thickness of the cover plate [in or mm], positive

    Returns
    -------
    e_2 : distance from the axis to the middle of the plate [in or mm]

    Source: geometry.

    >>> offset_of_cover_plate(d=10.0, t=0.5)
    5.25
    """
    e_2 = d / 2 + t / 2
    return e_2


@equation(PARALLEL_AXES)
def radius_of_gyration_of_pair(r_1, e_1):
    """Return the radius of gyration of two equal parts about the axis midway between them.

    Parameters
    ----------
    r_1 : radius of gyration of one part about its own axis, parallel to that axis [in or mm], positive
    e_1 : distance from the axis to the centroid of a part [in or mm], not negative

    Returns
    -------
    r : radius of gyration [in or mm]

    Source: mechanics, the parallel axes theorem; the parts act as one.

    >>> radius_of_gyration_of_pair(r_1=3.0, e_1=4.0)
    5.0
    """
    r = sqrt(r_1 ** 2 + e_1 ** 2)
    return r


@equation(PARALLEL_AXES)
def radius_of_gyration_with_cover_plates(n_1, A_1, r_1, e_1, n_2, A_2, r_2, e_2):
    """Return the radius of gyration of a member built of parts of two kinds about an axis of symmetry.

    Parameters
    ----------
    n_1 : number of parts of the first kind [1], positive
    A_1 : area of one of them [in2 or mm2], positive
    r_1 : its radius of gyration about its own axis [in or mm], positive
    e_1 : distance from the axis of the member to its centroid [in or mm], not negative
    n_2 : number of other parts [1], positive
    A_2 : area of one of these [in2 or mm2], positive
    r_2 : its radius of gyration about its own axis [in or mm], positive
    e_2 : distance from the axis of the member to its centroid [in or mm], not negative

    Returns
    -------
    r : radius of gyration [in or mm]

    Source: mechanics, the parallel axes theorem; the parts act as one.

    >>> radius_of_gyration_with_cover_plates(n_1=2, A_1=5.0, r_1=3.0, e_1=4.0, n_2=2, A_2=5.0, r_2=4.0, e_2=3.0)
    5.0
    """
    r = sqrt((n_1 * A_1 * (r_1 ** 2 + e_1 ** 2) + n_2 * A_2 * (r_2 ** 2 + e_2 ** 2)) / (n_1 * A_1 + n_2 * A_2))
    return r


@equation(PARALLEL_AXES)
def radius_of_gyration_of_rectangle(h):
    """Return the radius of gyration of a rectangle about the axis through its middle.

    Parameters
    ----------
    h : side square to the axis [in or mm], positive

    Returns
    -------
    r : radius of gyration [in or mm]

    Source: mechanics.

    >>> round(radius_of_gyration_of_rectangle(h=6.0), 4)
    1.7321
    """
    r = h / sqrt(12)
    return r


@equation(PARALLEL_AXES)
def radius_of_gyration_of_stack(n_1, t):
    """Return the radius of gyration of a stack of equal plates about the axis along them.

    Parameters
    ----------
    n_1 : number of plates [1], positive
    t : thickness of one [in or mm], positive

    Returns
    -------
    r : radius of gyration [in or mm]

    Source: mechanics; the plates act as one.

    >>> round(radius_of_gyration_of_stack(n_1=3, t=0.5), 4)
    0.433
    """
    r = n_1 * t / sqrt(12)
    return r


@equation(PARALLEL_AXES)
def radius_of_gyration_of_perforated_plate(w, w_p):
    """Return the radius of gyration, across its width, of a plate at a perforation in its middle.

    Parameters
    ----------
    w : width of the plate [in or mm], positive
    w_p : width of the perforation [in or mm], positive

    Returns
    -------
    r : radius of gyration [in or mm]

    Source: mechanics, the difference of two rectangles.

    >>> round(radius_of_gyration_of_perforated_plate(w=12.0, w_p=6.0), 4)
    4.5826
    """
    r = sqrt((w ** 2 + w * w_p + w_p ** 2) / 12)
    return r


@equation(PARALLEL_AXES, {"r_min": r"r_{\mathrm{min}}"})
def least_radius_of_gyration(r_x, r_y):
    """Return the least radius of gyration.

    Parameters
    ----------
    r_x : radius of gyration about one axis of symmetry [in or mm], positive
    r_y : radius of gyration about the other [in or mm], positive

    Returns
    -------
    r_min : the smaller one [in or mm]

    Source: mechanics.

    >>> least_radius_of_gyration(r_x=3.87, r_y=5.5)
    3.87
    """
    r_min = minimum(r_x, r_y)
    return r_min


@equation(cite("J3.6", "J3.5"), {"t_min": r"t_{\mathrm{min}}"})
def thinner_of_two_parts(t_1, t_2):
    """Return the thickness that limits the spacing of connectors of two parts in contact.

    Parameters
    ----------
    t_1 : thickness of one part [in or mm], positive
    t_2 : thickness of the other part [in or mm], positive

    Returns
    -------
    t_min : the smaller one [in or mm]

    Source: AISC 360-22 J3.6 (360-16 J3.5).

    >>> thinner_of_two_parts(t_1=0.436, t_2=0.375)
    0.375
    """
    t_min = minimum(t_1, t_2)
    return t_min
