"""Elastic stress at an open hole in a strip in tension. Shown beside strength, which does not depend on it."""

from calclib.equations.form import Cite, equation

STRIP_WITH_HOLE = Cite("Roark's Formulas for Stress and Strain", {"": "(central circular hole, axial tension)"})


@equation(STRIP_WITH_HOLE)
def stress_concentration_on_net_section(w, d):
    """Return the elastic stress concentration factor of a central open hole in a strip in tension.

    Parameters
    ----------
    w : width of the strip [in or mm], positive
    d : diameter of the hole [in or mm], positive

    Returns
    -------
    K_tn : peak stress over the mean stress of the net section [1]

    Source: Roark's Formulas for Stress and Strain, table of stress concentration factors, central circular hole in
    axial tension, as reproduced; a fit to Howland (1930). Up to d/w of one half it lies within 0.4 percent of
    Howland's values. A pin or bolt in the hole changes the stress.

    >>> stress_concentration_on_net_section(w=50.0, d=10.0)
    2.50816
    """
    K_tn = 3.00 - 3.13 * (d / w) + 3.66 * (d / w) ** 2 - 1.53 * (d / w) ** 3
    return K_tn


@equation(STRIP_WITH_HOLE)
def mean_stress_of_net_section(P, w, d, t):
    """Return the mean stress of the net section beside a hole.

    Parameters
    ----------
    P : force in the strip [kip or N], not negative
    w : width of the strip [in or mm], positive
    d : diameter of the hole [in or mm], positive
    t : thickness of the strip [in or mm], positive

    Returns
    -------
    f_n : mean stress [ksi or MPa]

    Source: mechanics of materials.

    >>> round(mean_stress_of_net_section(P=20.0, w=4.0, d=1.0, t=0.5), 2)
    13.33
    """
    f_n = P / ((w - d) * t)
    return f_n


@equation(STRIP_WITH_HOLE, {"f_max": r"f_{\mathrm{max}}"})
def peak_stress_at_hole(K_tn, f_n):
    """Return the elastic stress at the edge of an open hole.

    Parameters
    ----------
    K_tn : stress concentration factor on the net section [1], positive
    f_n : mean stress of the net section [ksi or MPa], not negative

    Returns
    -------
    f_max : peak stress [ksi or MPa]

    Source: the meaning of the factor.

    >>> peak_stress_at_hole(K_tn=2.41, f_n=13.33)
    32.1253
    """
    f_max = K_tn * f_n
    return f_max
