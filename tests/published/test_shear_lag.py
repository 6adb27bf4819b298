"""Shear lag factors against AISC Design Examples, chapter D and part II."""

import pytest
from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, design, members, shear_lag

V16 = "AISC Design Examples v16.0"


@published(f"{V16}, Ex. D.1 and D.3", shear_lag.shear_lag_factor_by_area)
@pytest.mark.parametrize("A_c, A_g, digits", [
    (2 * 5.27 * 0.400, 6.16, "0.684"),    # D.1: both flanges of a W8x21
    (8.01 * 0.515, 5.84, "0.706"),        # D.3: the flange of a WT6x20
])
def test_factor_by_area(A_c, A_g, digits):
    assert Printed(digits).agrees(shear_lag.shear_lag_factor_by_area(A_c=A_c, A_g=A_g))


@published(f"{V16}, Ex. D.1 and D.6", shear_lag.shear_lag_factor)
@pytest.mark.parametrize("l, x_bar, digits", [(9.0, 0.831, "0.908"), (21.0, 1.18, "0.944")])
def test_case_2(l, x_bar, digits):  # noqa: E741  the symbol of the standard
    assert Printed(digits).agrees(shear_lag.shear_lag_factor(l=l, x_bar=x_bar))


@published(f"{V16}, Ex. D.1", shear_lag.larger_shear_lag_factor, shear_lag.least_flange_width_of_case_7)
def test_d1_case_7_and_the_larger_factor():
    b_min = shear_lag.least_flange_width_of_case_7(d=8.28)
    assert Printed("5.52", "in").agrees(b_min)
    assert b_min > 5.27                   # so case 7 gives 0.85
    assert Printed("0.908").agrees(shear_lag.larger_shear_lag_factor(U_1=1 - 0.831 / 9, U_2=0.85))


@published(f"{V16}, Ex. D.3 and II.C-1", shear_lag.average_weld_length,
           shear_lag.shear_lag_factor_of_longitudinal_welds, members.effective_net_area)
@pytest.mark.parametrize("weld, w, x_bar, A_n, U, A_e", [
    (16.0, 8.01, 1.09, 5.84, "0.860", "5.02"),
    (8.0, 4.0, 0.947, 5.36, "0.814", "4.36"),
])
def test_case_4(weld, w, x_bar, A_n, U, A_e):
    length = shear_lag.average_weld_length(l_1=weld, l_2=weld)
    factor = shear_lag.shear_lag_factor_of_longitudinal_welds(l=length, w=w, x_bar=x_bar)
    assert Printed(U).agrees(factor)
    assert Printed(A_e, "in2").agrees(members.effective_net_area(A_n=A_n, U=factor))


@published(f"{V16}, Ex. D.3", members.tensile_rupture_of_member, design.design_strength, design.allowable_strength)
def test_d3_rupture():
    P_n = members.tensile_rupture_of_member(F_u=65, A_e=members.effective_net_area(
        A_n=5.84, U=shear_lag.shear_lag_factor_of_longitudinal_welds(l=16.0, w=8.01, x_bar=1.09)))
    assert Printed("326", "kip").agrees(P_n)
    assert Printed("245", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=P_n))
    assert Printed("163", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=P_n))


@published(f"{V16}, Ex. D.5", shear_lag.shear_lag_factor_of_slotted_round_hss_2022)
def test_d5_case_5():
    factor = shear_lag.shear_lag_factor_of_slotted_round_hss_2022(l=16.0, x_bar=Printed("1.76", "in").value)
    assert Printed("0.991").agrees(factor)
