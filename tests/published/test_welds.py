"""A long fillet weld and its base metal against AISC Design Examples, Ex. J.1."""

from printed import Printed, published

from calclib.equations.aisc360 import RUPTURE, connecting, design, welds

J1 = "AISC Design Examples v16.0, Ex. J.1"


@published(J1, welds.throat_of_fillet, welds.area_of_fillet, welds.stress_of_fillet, welds.fillet_strength_2022,
           welds.length_factor_of_fillet, welds.effective_length_of_fillet, design.design_strength,
           design.allowable_strength)
def test_j1_long_fillets():
    """E70, 3/16-in. fillets, two of 27 in."""
    t_e, F_nw = welds.throat_of_fillet(w=3 / 16), welds.stress_of_fillet(F_EXX=70)

    def strength(l_e):
        return welds.fillet_strength_2022(F_nw=F_nw, A_we=welds.area_of_fillet(t_e=t_e, l_e=l_e), k_ds=1.0)

    beta = welds.length_factor_of_fillet(l=27.0, w=3 / 16)
    R_n = strength(welds.effective_length_of_fillet(beta=beta, l=2 * 27.0))
    assert Printed("5.57", "kip").agrees(strength(1.0))         # printed in kip for each in. of weld
    assert Printed("0.912").agrees(beta)
    assert Printed("274", "kip").agrees(R_n)
    assert Printed("206", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))
    assert Printed("137", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=R_n))


@published(J1, welds.fillet_strength_2016, welds.area_of_fillet, welds.throat_of_fillet)
def test_j1_by_the_2016_form():
    """The example is on the 2022 edition; a longitudinal fillet has no directional factor in either."""
    A_we = welds.area_of_fillet(t_e=welds.throat_of_fillet(w=3 / 16), l_e=0.912 * 54.0)
    assert Printed("274", "kip").agrees(welds.fillet_strength_2016(F_nw=42, A_we=A_we))


@published(J1, connecting.gross_area_of_cuts, connecting.shear_rupture_of_element, design.design_strength)
def test_j1_base_metal():
    """PL 1/4 in A572 Grade 50 along both fillets. The allowable strength is printed from the rounded 527 kip."""
    A_nv = connecting.gross_area_of_cuts(n_c=2, L_c=27.0, t=0.25)
    R_n = connecting.shear_rupture_of_element(F_u=65, A_nv=A_nv)
    assert Printed("527", "kip").agrees(R_n)
    assert Printed("395", "kip").agrees(design.design_strength(phi=RUPTURE.phi, R_n=R_n))
    assert Printed("264", "kip").agrees(design.allowable_strength(Omega=RUPTURE.omega, R_n=Printed("527").value))
