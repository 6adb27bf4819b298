"""A slotted round hollow section against AISC Design Examples, Ex. D.5."""

from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, design, hollow, members, shear_lag

D5 = "AISC Design Examples v16.0, Ex. D.5"


@published(D5, hollow.design_wall, hollow.slot_width, hollow.net_area_of_slotted_hss)
def test_d5_wall_and_net_area():
    t = hollow.design_wall(t_nom=0.5)
    assert Printed("0.465", "in").agrees(t)
    A_n = hollow.net_area_of_slotted_hss(A_g=8.09, t=t, b_s=hollow.slot_width(t_p=0.5, Delta_s=1 / 16))
    assert Printed("7.57", "in2").agrees(A_n)


@published(D5, hollow.half_arc_beside_gusset, hollow.centroid_of_slotted_round_hss_2022,
           shear_lag.shear_lag_factor_of_slotted_round_hss_2022, members.effective_net_area,
           members.tensile_rupture_of_member, design.design_strength)
def test_d5_shear_lag_and_rupture():
    """The example takes the outside radius, which the legend of the table leaves open."""
    theta = hollow.half_arc_beside_gusset(D=6.0, t_p=0.5)
    x_bar = hollow.centroid_of_slotted_round_hss_2022(D=6.0, theta=theta, t_p=0.5)
    U = shear_lag.shear_lag_factor_of_slotted_round_hss_2022(l=16.0, x_bar=x_bar)
    A_e = members.effective_net_area(A_n=8.09 - 2 * 0.465 * 0.5625, U=U)
    P_n = members.tensile_rupture_of_member(F_u=62, A_e=A_e)
    assert Printed("1.49", "rad").agrees(theta)
    assert Printed("1.76", "in").agrees(x_bar)
    assert Printed("0.991").agrees(U)
    assert Printed("7.50", "in2").agrees(A_e)
    assert Printed("465", "kip").agrees(P_n)
    assert Printed("349", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=P_n))
