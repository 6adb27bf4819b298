"""Bolts in shear, tension and slip, AISC 360 J3; fillers, J5.2; bolts with welds, J1.8. Bearing is in `bearing.py`."""

from calclib.equations.aisc360 import cite
from calclib.equations.form import equation, maximum, minimum

LONG_JOINT = {"US": 38.0, "SI": 950.0}         # Table J3.2, footnote: printed as pairs, in and mm
GRIP_STEP = {"US": 1 / 16, "SI": 2.0}          # the same, for A307
FILLER_THICKNESS = {"US": 1 / 4, "SI": 6.0}    # J5.2
FILLER_REDUCTION = {"US": 0.4, "SI": 0.0154}   # J5.2 [1/in or 1/mm]
MEAN_PRETENSION = 1.13                         # J3.9: D_u, mean installed over least pretension


@equation(cite("J3.7, Eq. J3-1", "J3.6, Eq. J3-1"))
def bolt_shear(F_nv, A_b, n_s):
    """Return the nominal shear strength of one bolt.

    Parameters
    ----------
    F_nv : nominal shear stress [ksi or MPa], positive
    A_b : nominal area of the unthreaded body [in2 or mm2], positive
    n_s : number of shear planes [1], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.7 (360-16 J3.6).

    >>> bolt_shear(F_nv=54, A_b=0.442, n_s=1)
    23.868
    """
    R_n = F_nv * A_b * n_s
    return R_n


@equation(cite("J3.7, Eq. J3-1", "J3.6, Eq. J3-1"))
def bolt_tension(F_nt, A_b):
    """Return the nominal tensile strength of one bolt.

    Parameters
    ----------
    F_nt : nominal tensile stress, reduced where the bolt is also in shear [ksi or MPa], positive
    A_b : nominal area of the unthreaded body [in2 or mm2], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.7 (360-16 J3.6). The required strength includes prying.

    >>> bolt_tension(F_nt=90, A_b=0.442)
    39.78
    """
    R_n = F_nt * A_b
    return R_n


@equation(cite("Table J3.2, footnote", unread=("16",)), {"F_nv1": "F_{nv,1}"})
def shear_stress_in_long_joint(F_nv):
    """Return the nominal shear stress of bolts in an end-loaded joint longer than 38 in or 950 mm.

    Parameters
    ----------
    F_nv : nominal shear stress [ksi or MPa], positive

    Returns
    -------
    F_nv1 : nominal shear stress in the long joint [ksi or MPa]

    Source: AISC 360-22 Table J3.2; the same in 360-10, so 360-16 from memory.

    >>> shear_stress_in_long_joint(F_nv=54)
    44.982
    """
    F_nv1 = 0.833 * F_nv
    return F_nv1


@equation(cite("Table J3.2, footnote", unread=("16",)), {"Delta_g": None, "F_n1": "F_{n,1}"})
def stress_with_long_grip(F_n, L_g, d, Delta_g):
    """Return the nominal stress of an A307 bolt whose grip is longer than five diameters.

    Parameters
    ----------
    F_n : nominal stress by the table [ksi or MPa], positive
    L_g : grip [in or mm], positive
    d : nominal diameter [in or mm], positive
    Delta_g : step of the footnote, 1/16 in or 2 mm [in or mm], positive

    Returns
    -------
    F_n1 : nominal stress reduced [ksi or MPa]

    Source: AISC 360-22 Table J3.2: 1 percent for each step of grip above five diameters; a part of a step counts in
    proportion.

    >>> stress_with_long_grip(F_n=45, L_g=5.0, d=0.75, Delta_g=0.0625)
    36.0
    """
    F_n1 = minimum(F_n * (1 - 0.01 * (L_g - 5 * d) / Delta_g), F_n)
    return F_n1


@equation(cite("J3.8", "J3.7"))
def required_shear_stress(V_r, A_b):
    """Return the shear stress that the load causes in one bolt.

    Parameters
    ----------
    V_r : required shear strength of one shear plane [kip or N], not negative
    A_b : nominal area of the unthreaded body [in2 or mm2], positive

    Returns
    -------
    f_rv : required shear stress [ksi or MPa]

    Source: AISC 360-22 J3.8 (360-16 J3.7).

    >>> round(required_shear_stress(V_r=8.0, A_b=0.442), 2)
    18.1
    """
    f_rv = V_r / A_b
    return f_rv


@equation(cite("J3.8, Eq. J3-3a", "J3.7, Eq. J3-3a"), {"F_nt1": "F'_{nt,1}", "F_nt2": "F'_{nt}"})
def tension_with_shear_lrfd(F_nt, F_nv, phi, f_rv):
    """Return the nominal tensile stress of a bolt that is also in shear (LRFD).

    Parameters
    ----------
    F_nt : nominal tensile stress [ksi or MPa], positive
    F_nv : nominal shear stress [ksi or MPa], positive
    phi : resistance factor [1], 0 to 1
    f_rv : required shear stress [ksi or MPa], not negative

    Returns
    -------
    F_nt1 : nominal tensile stress before its limit [ksi or MPa]
    F_nt2 : nominal tensile stress with shear [ksi or MPa]

    Source: AISC 360-22 J3.8 (360-16 J3.7). Not needed where either stress is at most 30 percent of what is available.

    >>> round(tension_with_shear_lrfd(F_nt=90, F_nv=54, phi=0.75, f_rv=18.1), 2)
    76.78
    """
    F_nt1 = 1.3 * F_nt - F_nt / (phi * F_nv) * f_rv
    F_nt2 = minimum(F_nt1, F_nt)
    return F_nt2


@equation(cite("J3.8, Eq. J3-3b", "J3.7, Eq. J3-3b"), {"F_nt1": "F'_{nt,1}", "F_nt2": "F'_{nt}"})
def tension_with_shear_asd(F_nt, F_nv, Omega, f_rv):
    """Return the nominal tensile stress of a bolt that is also in shear (ASD).

    Parameters
    ----------
    F_nt : nominal tensile stress [ksi or MPa], positive
    F_nv : nominal shear stress [ksi or MPa], positive
    Omega : safety factor [1], positive
    f_rv : required shear stress [ksi or MPa], not negative

    Returns
    -------
    F_nt1 : nominal tensile stress before its limit [ksi or MPa]
    F_nt2 : nominal tensile stress with shear [ksi or MPa]

    Source: AISC 360-22 J3.8 (360-16 J3.7). Not needed where either stress is at most 30 percent of what is available.

    >>> round(tension_with_shear_asd(F_nt=90, F_nv=54, Omega=2.0, f_rv=12.1), 2)
    76.67
    """
    F_nt1 = 1.3 * F_nt - Omega * (F_nt / F_nv) * f_rv
    F_nt2 = minimum(F_nt1, F_nt)
    return F_nt2


@equation(cite("J3.9, Eq. J3-4", "J3.8, Eq. J3-4"))
def slip(mu, D_u, h_f, T_b, n_s):
    """Return the nominal slip resistance of one bolt.

    Parameters
    ----------
    mu : mean slip coefficient of the faying surface [1], 0 to 1
    D_u : ratio of mean installed to least pretension [1], positive
    h_f : factor for fillers [1], 0 to 1
    T_b : least pretension [kip or N], positive
    n_s : number of slip planes [1], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.9 (360-16 J3.8).

    >>> round(slip(mu=0.3, D_u=1.13, h_f=1.0, T_b=28, n_s=2), 2)
    18.98
    """
    R_n = mu * D_u * h_f * T_b * n_s
    return R_n


@equation(cite("J3.10", "J3.9", unread=("16",)))
def slip_factor_with_tension_lrfd(D_u, T_b, n_b, T_u):
    """Return the factor on the slip resistance of bolts that are also in tension (LRFD).

    Parameters
    ----------
    D_u : ratio of mean installed to least pretension [1], positive
    T_b : least pretension [kip or N], positive
    n_b : number of bolts that carry the tension [1], positive
    T_u : required tension by LRFD [kip or N], not negative

    Returns
    -------
    k_sc : factor [1]

    Source: AISC 360-22 J3.10; 360-16 J3.9 from memory.

    >>> round(slip_factor_with_tension_lrfd(D_u=1.13, T_b=28, n_b=4, T_u=40), 4)
    0.6839
    """
    k_sc = maximum(1 - T_u / (D_u * T_b * n_b), 0)
    return k_sc


@equation(cite("J3.10", "J3.9", unread=("16",)))
def slip_factor_with_tension_asd(D_u, T_b, n_b, T_a):
    """Return the factor on the slip resistance of bolts that are also in tension (ASD).

    Parameters
    ----------
    D_u : ratio of mean installed to least pretension [1], positive
    T_b : least pretension [kip or N], positive
    n_b : number of bolts that carry the tension [1], positive
    T_a : required tension by ASD [kip or N], not negative

    Returns
    -------
    k_sc : factor [1]

    Source: AISC 360-22 J3.10; 360-16 J3.9 from memory.

    >>> round(slip_factor_with_tension_asd(D_u=1.13, T_b=28, n_b=4, T_a=25), 4)
    0.7037
    """
    k_sc = maximum(1 - 1.5 * T_a / (D_u * T_b * n_b), 0)
    return k_sc


@equation(cite("J3.10", "J3.9", unread=("16",)), {"R_n1": "R_{n,1}"})
def slip_with_tension(k_sc, R_n):
    """Return the nominal slip resistance of one bolt in a joint that is also in tension.

    Parameters
    ----------
    k_sc : factor for the tension [1], 0 to 1
    R_n : nominal slip resistance without tension [kip or N], positive

    Returns
    -------
    R_n1 : nominal strength [kip or N]

    Source: AISC 360-22 J3.10; 360-16 J3.9 from memory.

    >>> round(slip_with_tension(k_sc=0.75, R_n=18.984), 2)
    14.24
    """
    R_n1 = k_sc * R_n
    return R_n1


@equation(cite("J5.2", unread=("16",)), {"k_t": None, "t_0": None})
def shear_factor_with_filler(t_f, k_t, t_0):
    """Return the factor on the shear strength of bolts through a filler thicker than 1/4 in or 6 mm.

    Parameters
    ----------
    t_f : thickness of the filler [in or mm], positive
    k_t : reduction of the clause, 0.4 for each in or 0.0154 for each mm [1/in or 1/mm], positive
    t_0 : thickness that needs no reduction, 1/4 in or 6 mm [in or mm], positive

    Returns
    -------
    k_f : factor [1]

    Source: AISC 360-22 J5.2; 360-16 from memory. Fillers that are developed or extended need no factor.

    >>> shear_factor_with_filler(t_f=0.5, k_t=0.4, t_0=0.25)
    0.9
    """
    k_f = maximum(1 - k_t * (t_f - t_0), 0.85)
    return k_f


@equation(cite("J5.2", unread=("16",)), {"R_n1": "R_{n,1}"})
def bolt_shear_with_filler(k_f, R_n):
    """Return the nominal shear strength of one bolt through a filler.

    Parameters
    ----------
    k_f : factor for the filler [1], 0 to 1
    R_n : nominal shear strength without filler [kip or N], positive

    Returns
    -------
    R_n1 : nominal strength [kip or N]

    Source: AISC 360-22 J5.2; 360-16 from memory.

    >>> round(bolt_shear_with_filler(k_f=0.9, R_n=23.9), 2)
    21.51
    """
    R_n1 = k_f * R_n
    return R_n1


@equation(cite("J3.7", "J3.6", unread=("16",)))
def strength_of_one_bolt(R_nv, R_nb, R_nt):
    """Return the nominal strength at one bolt: the least of shear, bearing and tearout.

    Parameters
    ----------
    R_nv : nominal shear strength [kip or N], positive
    R_nb : nominal strength in bearing, the least of all plies [kip or N], positive
    R_nt : nominal strength in tearout, the least of all plies [kip or N], positive

    Returns
    -------
    r_n : nominal strength at the bolt [kip or N]

    Source: AISC 360-22 J3.7, user note, and the commentary on J3.11; 360-16 J3.6 from memory.

    >>> strength_of_one_bolt(R_nv=32.5, R_nb=85.3, R_nt=50.2)
    32.5
    """
    r_n = minimum(minimum(R_nv, R_nb), R_nt)
    return r_n


@equation(cite("J3.7", "J3.6", unread=("16",)), {"r_n1": "r_{n,1}", "r_n2": "r_{n,2}"})
def strength_of_bolt_group(n_1, r_n1, n_2, r_n2):
    """Return the nominal strength of a bolt group as the sum over its bolts.

    Parameters
    ----------
    n_1 : number of bolts nearest to the end [1], not negative
    r_n1 : nominal strength at one of them [kip or N], positive
    n_2 : number of other bolts [1], not negative
    r_n2 : nominal strength at one of them [kip or N], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J3.7, user note; 360-16 J3.6 from memory.

    >>> strength_of_bolt_group(n_1=1, r_n1=30.7, n_2=8, r_n2=60.9)
    517.9
    """
    R_n = n_1 * r_n1 + n_2 * r_n2
    return R_n


@equation(cite("J1.8", unread=("16",)))
def slip_with_longitudinal_fillets(R_ns, R_nw):
    """Return the nominal strength of slip-critical bolts that share the load with longitudinal fillet welds.

    Parameters
    ----------
    R_ns : nominal slip resistance of the bolts [kip or N], positive
    R_nw : nominal strength of the fillet welds [kip or N], positive

    Returns
    -------
    R_n : nominal strength [kip or N]

    Source: AISC 360-22 J1.8; 360-16 from memory. The clause sets the least shares of bolts and welds.

    >>> slip_with_longitudinal_fillets(R_ns=76.0, R_nw=100.0)
    176.0
    """
    R_n = R_ns + R_nw
    return R_n


@equation(cite("J3.7", "J3.6"))
def strength_of_equal_bolts(n, r_n):
    """Return the nominal strength of bolts of equal strength.

    Parameters
    ----------
    n : number of bolts [1], positive
    r_n : nominal strength of one [kip or N], positive

    Returns
    -------
    R_n : nominal strength of all [kip or N]

    Source: AISC 360-22 J3.7 and J3.9 (360-16 J3.6 and J3.8).

    >>> strength_of_equal_bolts(n=11, r_n=26.5)
    291.5
    """
    R_n = n * r_n
    return R_n
