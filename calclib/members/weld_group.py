"""Strength of a group of longitudinal and transverse fillets of one size: AISC 360 J2.4, each edition its own form."""

from math import pi

from calclib import units
from calclib.equations.aisc360 import weld_groups, welds
from calclib.members.weld_layout import fillet_area


def fillet_group(x, run, part, faces, w, lengths, transverse, concentric):
    """Return the nominal strength of the group [kip or N].

    `faces`: faces with welds on them; `w`: length of one transverse weld; `lengths`: of the two longitudinal welds on
    a face, or (); `transverse`: transverse welds on a face, 0 to 2; `concentric`: whether the force passes through the
    centroid of the group, which the directional strength asks for.
    """
    if not transverse:
        A_we = _longitudinal(x, run, part, faces, lengths)
        return _strength(run, part, x, A_we, 0.0)
    if not lengths:
        A_we = _transverse(x, run, part, faces, w, transverse)
        run.note("The transverse welds take the increase for their direction: they are parallel, of one size, and the "
                 "force passes through their centroid.", "J2.4", when=concentric)
        _say_without(run, concentric)
        return _strength(run, part, x, A_we, pi / 2 if concentric else None)
    A_wl = _longitudinal(x, run, part, faces, lengths, "A_{wel}")
    A_wt = _transverse(x, run, part, faces, w, transverse, "A_{wet}")
    R_nwl = _strength(run, part, x, A_wl, None, "R_{nwl}", "A_{wel}")
    R_nwt = _strength(run, part, x, A_wt, None, "R_{nwt}", "A_{wet}", again=True)
    if concentric:
        R_n = part(welds.strength_of_mixed_fillets, R_nwl=R_nwl, R_nwt=R_nwt)
        run.note("Mixed welds: {plain} without factors for direction, {other} with 0.85 on the longitudinal and 1.5 on "
                 "the transverse welds; the larger counts.", "J2.4", plain=(R_nwl + R_nwt, units.FORCE),
                 other=(0.85 * R_nwl + 1.5 * R_nwt, units.FORCE))
        return R_n
    _say_without(run, concentric)
    return part(weld_groups.sum_of_mixed_fillets, R_nwl=R_nwl, R_nwt=R_nwt)


def _say_without(run, concentric):
    run.note("The transverse welds take no increase for their direction, since the force is not said to pass through "
             "the centroid of the weld group.", "J2.4", when=not concentric)


def _longitudinal(x, run, part, faces, lengths, symbol="A_{we}"):
    first, second = lengths
    A_1 = fillet_area(x, run, part, first, "1", end_loaded=True)
    A_2 = A_1 if second == first else fillet_area(x, run, part, second, "2", end_loaded=True)
    return part(weld_groups.area_of_pairs_of_welds, n=faces, A_we1=A_1, A_we2=A_2, symbols={"A_we": symbol},
                note="Both welds are equal." if second == first else "")


def _transverse(x, run, part, faces, w, transverse, symbol="A_{we}"):
    A_1 = fillet_area(x, run, part, w, "t", end_loaded=False)
    return part(weld_groups.area_of_equal_welds, n=faces * transverse, A_we1=A_1,
                symbols={"A_we": symbol, "A_we1": "A_{we,t}"}, note="Transverse welds.")


def _strength(run, part, x, A_we, theta, symbol="R_{n}", area="A_{we}", again=False):
    """Return the strength of welds in one direction; `theta` None: without the factor for direction."""
    names = {"R_n": symbol, "A_we": area}
    if run.edition == "16":
        if theta:
            F_nw = part(welds.stress_of_fillet_in_direction_2016, F_EXX=x.F_EXX, theta=theta)
        else:
            F_nw = welds.stress_of_fillet(F_EXX=x.F_EXX) if again else part(welds.stress_of_fillet, F_EXX=x.F_EXX)
        return part(welds.fillet_strength_2016, F_nw=F_nw, A_we=A_we, symbols=names)
    F_nw = welds.stress_of_fillet(F_EXX=x.F_EXX) if again else part(welds.stress_of_fillet, F_EXX=x.F_EXX)
    if theta is None:
        k_ds = 1.0 if again else part.given("k_{ds}", units.NUMBER, 1.0, run.cite("J2.4"),
                                            "Without the factor for direction.")
    else:
        k_ds = part(welds.directional_factor_2022, theta=theta)
    return part(welds.fillet_strength_2022, F_nw=F_nw, A_we=A_we, k_ds=k_ds, symbols=names)
