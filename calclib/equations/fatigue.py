"""Fatigue of members and connections, AISC 360 Appendix 3."""

from dataclasses import dataclass

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation, maximum


@dataclass(frozen=True)
class Category:
    """A stress category: its constant, its threshold in each unit set [ksi or MPa], and details of tension members."""

    C_f: float | None        # None: category F has an equation of its own
    F_TH: dict
    details: str


# Table A-3.1 of the 2022 edition. The threshold is printed as a pair, ksi and MPa.
CATEGORIES = {
    "A": Category(25, {"US": 24, "SI": 170}, "plain rolled or cleaned surface"),
    "B": Category(12, {"US": 16, "SI": 110}, "uncoated weathering steel; gross area of a slip-critical joint; net area "
                  "of a pretensioned joint; continuous longitudinal welds"),
    "B'": Category(6.1, {"US": 12, "SI": 83}, "longitudinal partial-penetration welds, or welds with backing"),
    "C": Category(4.4, {"US": 10, "SI": 69}, "toe of a transverse stiffener; drilled hole with a pretensioned bolt; "
                  "short attachment"),
    "D": Category(2.2, {"US": 7, "SI": 48}, "open hole; riveted joint"),
    "E": Category(1.1, {"US": 4.5, "SI": 31}, "net section of an eyebar or pin plate; end of a longitudinal fillet on "
                  "a part up to 1/2 in"),
    "E'": Category(0.39, {"US": 2.6, "SI": 18}, "end of a longitudinal fillet on a part above 1/2 in"),
    "F": Category(None, {"US": 8, "SI": 55}, "shear on the throat of a fillet"),
    "G": Category(0.39, {"US": 7, "SI": 48}, "threaded rod or bolt in tension, on the tensile stress area"),
}
CYCLES = 20_000                                  # Appendix 3.1: up to here fatigue need not be evaluated
RANGE_CONSTANT = {"US": 1000, "SI": 6900}        # Eq. A-3-1: printed as pairs, ksi and MPa
THROAT_CONSTANT = {"US": 100, "SI": 690}         # Eq. A-3-2; 690 MPa from memory, verify
RANGE = cite("Appendix 3.2", unread=("16",))


@equation(RANGE, {"P_max": r"P_{\mathrm{max}}", "P_min": r"P_{\mathrm{min}}"})
def stress_range(P_max, P_min, A_n):
    """Return the range of stress between two loads of one sign.

    Parameters
    ----------
    P_max : larger load of the cycle [kip or N], not negative
    P_min : smaller load of the cycle, of the same sign [kip or N], not negative
    A_n : area on which the detail is judged [in2 or mm2], positive

    Returns
    -------
    f_SR : stress range [ksi or MPa]

    Source: AISC 360-22 Appendix 3.2; 360-16 from memory. Service loads.

    >>> stress_range(P_max=100.0, P_min=20.0, A_n=4.0)
    20.0
    """
    f_SR = (P_max - P_min) / A_n
    return f_SR


@equation(RANGE)
def stress_range_with_reversal(P_t, P_c, A_n):
    """Return the range of stress between tension and compression.

    Parameters
    ----------
    P_t : largest tension of the cycle [kip or N], not negative
    P_c : largest compression of the cycle, as a positive number [kip or N], not negative
    A_n : area on which the detail is judged [in2 or mm2], positive

    Returns
    -------
    f_SR : stress range [ksi or MPa]

    Source: AISC 360-22 Appendix 3.2: the numerical sum; 360-16 from memory. Service loads.

    >>> stress_range_with_reversal(P_t=60.0, P_c=20.0, A_n=4.0)
    20.0
    """
    f_SR = (P_t + P_c) / A_n
    return f_SR


@equation(cite("Appendix 3.4", unread=("16",)), {"P_max": r"P_{\mathrm{max}}", "P_min": r"P_{\mathrm{min}}"})
def stress_range_of_pretensioned_bolt(P_max, P_min, A_t):
    """Return the range of stress in a pretensioned rod or bolt that grips steel, without a stiffness analysis.

    Parameters
    ----------
    P_max : larger load of the cycle, prying included [kip or N], not negative
    P_min : smaller load of the cycle, of the same sign [kip or N], not negative
    A_t : tensile stress area [in2 or mm2], positive

    Returns
    -------
    f_SR : stress range [ksi or MPa]

    Source: AISC 360-22 Appendix 3.4: 20 percent of the applied range; 360-16 from memory.

    >>> round(stress_range_of_pretensioned_bolt(P_max=30.0, P_min=5.0, A_t=0.606), 3)
    8.251
    """
    f_SR = 0.20 * ((P_max - P_min) / A_t)
    return f_SR


@equation(cite("Appendix 3.3, Eq. A-3-1", unread=("16",)), {"S_1": None, "F_SR1": "F_{SR,1}"})
def allowable_stress_range(C_f, n_SR, S_1, F_TH):
    """Return the allowable stress range of all categories but F.

    Parameters
    ----------
    C_f : constant of the category [1], positive
    n_SR : number of stress cycles in the design life [1], positive
    S_1 : constant of the clause, 1000 ksi or 6900 MPa [ksi or MPa], positive
    F_TH : threshold of the category [ksi or MPa], positive

    Returns
    -------
    F_SR1 : stress range before the threshold [ksi or MPa]
    F_SR : allowable stress range [ksi or MPa]

    Source: AISC 360-22 Appendix 3.3; 360-16 from memory. The exponent is the printed one, not a fraction of whole
    numbers.

    >>> round(allowable_stress_range(C_f=12, n_SR=2000000, S_1=1000, F_TH=16), 2)
    18.24
    """
    F_SR1 = S_1 * (C_f / n_SR) ** 0.333
    F_SR = maximum(F_SR1, F_TH)
    return F_SR


@equation(cite("Appendix 3.3, Eq. A-3-2", unread=("16",)), {"S_2": None, "F_SR1": "F_{SR,1}"})
def allowable_stress_range_of_throat(n_SR, S_2, F_TH):
    """Return the allowable stress range of category F, shear on the throat of a weld.

    Parameters
    ----------
    n_SR : number of stress cycles in the design life [1], positive
    S_2 : constant of the clause, 100 ksi or 690 MPa [ksi or MPa], positive
    F_TH : threshold of the category [ksi or MPa], positive

    Returns
    -------
    F_SR1 : stress range before the threshold [ksi or MPa]
    F_SR : allowable stress range [ksi or MPa]

    Source: AISC 360-22 Appendix 3.3, 690 MPa from memory; 360-16 from memory. The exponent is the printed one, not a
    fraction of whole numbers.

    >>> round(allowable_stress_range_of_throat(n_SR=2000000, S_2=100, F_TH=8), 3)
    9.487
    """
    F_SR1 = S_2 * (1.5 / n_SR) ** 0.167
    F_SR = maximum(F_SR1, F_TH)
    return F_SR


@equation(cite("Appendix 3.1", unread=("16",)), {"F_max": r"F_{\mathrm{max}}"})
def greatest_stress(F_y):
    """Return the greatest stress at service load to which Appendix 3 applies.

    Parameters
    ----------
    F_y : specified minimum yield stress [ksi or MPa], positive

    Returns
    -------
    F_max : greatest stress [ksi or MPa]

    Source: AISC 360-22 Appendix 3.1; 360-16 from memory.

    >>> greatest_stress(F_y=50)
    33.0
    """
    F_max = 0.66 * F_y
    return F_max


@equation(cite("Appendix 3.3", unread=("16",)), {"P_SRa": "P_{SR,a}"})
def allowable_force_range(F_SR, A):
    """Return the range of force that brings a detail to its allowable stress range.

    Parameters
    ----------
    F_SR : allowable stress range [ksi or MPa], positive
    A : area on which the detail is judged [in2 or mm2], positive

    Returns
    -------
    P_SRa : allowable range of force at service load [kip or N]

    Source: AISC 360-22 Appendix 3.2 and 3.3; 360-16 from memory.

    >>> allowable_force_range(F_SR=10.0, A=4.0)
    40.0
    """
    P_SRa = F_SR * A
    return P_SRa


@equation(cite("Appendix 3.3", unread=("16",)), {"ratio": r"\mathrm{ratio}"})
def fatigue_ratio(f_SR, F_SR):
    """Return the ratio of a stress range to the allowable one.

    Parameters
    ----------
    f_SR : stress range [ksi or MPa], not negative
    F_SR : allowable stress range [ksi or MPa], positive

    Returns
    -------
    ratio : stress range over allowable stress range [1]

    Source: AISC 360-22 Appendix 3.3; 360-16 from memory.

    >>> fatigue_ratio(f_SR=12.0, F_SR=16.0)
    0.75
    """
    ratio = f_SR / F_SR
    return ratio
