"""Elastic behaviour of a bar, from mechanics of materials."""

from calclib.equations.form import Cite, equation

MECHANICS = Cite("Mechanics of materials", {"": "(elastic bar, F L / E A)"})


@equation(MECHANICS)
def elongation_of_threaded_rod(P, E, L_b, A_b, L_t, A_t):
    """Return the elastic elongation of a rod, shank and threaded length in series.

    Parameters
    ----------
    P : axial force [kip or N], not negative
    E : modulus of elasticity [ksi or MPa], positive
    L_b : length of the unthreaded shank [in or mm], not negative
    A_b : area of the shank [in2 or mm2], positive
    L_t : threaded length under load [in or mm], not negative
    A_t : tensile stress area of the thread [in2 or mm2], positive

    Returns
    -------
    delta : elongation [in or mm]

    Source: mechanics of materials, elastic bars in series.

    >>> round(elongation_of_threaded_rod(P=10, E=29000, L_b=100, A_b=0.7854, L_t=20, A_t=0.6057), 5)
    0.05529
    """
    delta = P / E * (L_b / A_b + L_t / A_t)
    return delta
