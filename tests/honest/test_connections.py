"""Equations of connections against geometry, limits and hand arithmetic of our own."""

from math import cos, pi, sin

import pytest

from calclib.equations.aisc360 import bearing, bolts, built_up, connecting, hollow, members, shear_lag, welds


def middle(count, low, high):
    """Return the middles of `count` equal steps from low to high."""
    return [low + (high - low) * (i + 0.5) / count for i in range(count)]


@pytest.mark.parametrize("D, t_p", [(6.0, 0.5), (168.3, 20.0), (10.0, 1e-9)])
def test_centroid_of_an_arc_by_summation(D, t_p):
    """The arc of the outside radius to one side of the gusset, cut into pieces."""
    theta = hollow.half_arc_beside_gusset(D=D, t_p=t_p)
    pieces = [D / 2 * cos(angle) for angle in middle(20000, -theta, theta)]
    expected = sum(pieces) / len(pieces) - t_p / 2
    assert hollow.centroid_of_slotted_round_hss_2022(D=D, theta=theta, t_p=t_p) == pytest.approx(expected, rel=1e-6)
    assert D / 2 * sin(pi / 2 - theta) == pytest.approx(t_p / 2, abs=1e-12)      # the arc ends at the gusset


def test_the_round_section_of_the_2016_edition_is_the_one_of_2022_with_a_thin_gusset():
    thin = hollow.centroid_of_slotted_round_hss_2022(D=6.0, theta=hollow.half_arc_beside_gusset(D=6.0, t_p=1e-12),
                                                     t_p=1e-12)
    assert thin == pytest.approx(hollow.centroid_of_round_hss_2016(D=6.0), rel=1e-9)


def test_the_rectangular_section_of_the_2016_edition_is_the_one_of_2022_with_thin_plates():
    b = hollow.width_beside_gusset(B=4.0, t_p=1e-12)
    thin = hollow.centroid_of_slotted_rectangular_hss_2022(b=b, H=6.0, t=1e-12)
    assert thin == pytest.approx(hollow.centroid_of_rectangular_hss_with_gusset_2016(B=4.0, H=6.0), rel=1e-9)


@pytest.mark.parametrize("b, H, t", [(2.625, 6.0, 0.375), (1.75, 10.0, 0.5), (90.0, 120.0, 8.0)])
def test_centroid_of_a_wall_and_two_half_walls(b, H, t):
    """Three rectangles: the far wall over the whole height, and a half wall at each end of it."""
    wall, legs = H * t, 2 * (b - t) * t
    expected = (wall * (b - t / 2) + legs * (b - t) / 2) / (wall + legs)
    assert hollow.centroid_of_slotted_rectangular_hss_2022(b=b, H=H, t=t) == pytest.approx(expected, rel=1e-12)


def test_centroid_of_half_a_tube_beside_a_side_plate():
    """Three thin lines: the connected face, and half of either other face."""
    B, H = 4.0, 6.0
    expected = 2 * (B / 2) * (B / 4) / (2 * (B / 2) + H)
    assert hollow.centroid_of_rectangular_hss_with_side_plates_2016(B=B, H=H) == pytest.approx(expected)


def test_editions_of_hollow_sections_apart():
    """HSS 6x6x3/8, gusset 3/4, 12 in. of weld; HSS 4x6 between side plates, welds of 6 and 12 in."""
    b = hollow.width_beside_gusset(B=6.0, t_p=0.75)
    x_bar = hollow.centroid_of_slotted_rectangular_hss_2022(b=b, H=6.0, t=0.375)
    U = shear_lag.shear_lag_factor_of_slotted_rectangular_hss_2022(l=12.0, x_bar=x_bar)
    assert (round(x_bar, 3), round(U, 3)) == (1.875, 0.844)
    x_bar = hollow.centroid_of_rectangular_hss_with_gusset_2016(B=6.0, H=6.0)
    assert (x_bar, shear_lag.shear_lag_factor_of_rectangular_hss_2016(l=12.0, x_bar=x_bar)) == (2.25, 0.8125)
    x_bar = hollow.centroid_of_rectangular_hss_with_side_plates_2016(B=4.0, H=6.0)
    for length, now, before in ((6.0, 0.798, 0.933), (12.0, 0.940, 0.967)):
        assert round(shear_lag.shear_lag_factor_of_side_plates_2022(l=length, B=4.0, H=6.0), 3) == now
        assert round(shear_lag.shear_lag_factor_of_rectangular_hss_2016(l=length, x_bar=x_bar), 3) == before


def test_a_square_tube_between_side_plates_has_the_factor_of_a_plate():
    square = shear_lag.shear_lag_factor_of_side_plates_2022(l=9.0, B=6.0, H=6.0)
    assert square == pytest.approx(shear_lag.shear_lag_factor_of_longitudinal_welds(l=9.0, w=6.0, x_bar=0.0))


def test_centroids_of_a_w_shape_from_its_plates():
    """Three plates without fillets; the plastic moduli by the same plates."""
    d, b_f, t_f, t_w = 8.28, 5.27, 0.4, 0.25
    A_g = 2 * b_f * t_f + (d - 2 * t_f) * t_w
    Z_x = b_f * t_f * (d - t_f) + t_w * (d / 2 - t_f) ** 2
    Z_y = t_f * b_f**2 / 2 + (d - 2 * t_f) * t_w**2 / 4
    tee = (b_f * t_f * t_f / 2 + t_w * (d / 2 - t_f) * (d / 2 + t_f) / 2) / (A_g / 2)
    assert shear_lag.centroid_from_connected_flange(d=d, Z_x=Z_x, A_g=A_g) == pytest.approx(tee)
    channel = (2 * t_f * (b_f / 2) * b_f / 4 + (d - 2 * t_f) * (t_w / 2) * t_w / 4) / (A_g / 2)
    assert shear_lag.centroid_from_connected_web(Z_y=Z_y, A_g=A_g) == pytest.approx(channel)
    assert shear_lag.centroid_of_lapped_plate(t=0.5) == 0.25


def test_spread_widths():
    assert connecting.spread_width(w_0=3.0, L_s=9.0, theta=connecting.SPREAD) == pytest.approx(13.392, abs=5e-4)
    assert connecting.spread_width_in_tension(w_0=3.0, L_s=9.0, theta=connecting.SPREAD_IN_TENSION) == pytest.approx(21)


def test_splice_plate_and_block_factor():
    assert connecting.effective_net_area_of_splice_plate(A_n=5.5, A_g=6.0) == pytest.approx(5.1)
    assert connecting.effective_net_area_of_splice_plate(A_n=5.0, A_g=6.0) == 5.0
    assert connecting.block_shear_factor(l=12.0, e=3.0) == 0.75


def test_a_chain_behind_half_of_the_bolts_needs_half_the_area():
    assert members.net_area_for_full_load(A_n=5.0, N=8, m=4) == 10.0
    assert members.net_area_for_full_load(A_n=5.0, N=8, m=0) == 5.0


def test_mixed_fillets_by_hand():
    """Two of 8 in. along the force and one of 4 in. across, 1/4 in., E70: 148.5 and 145.5 kip."""
    throat = welds.throat_of_fillet(w=0.25)
    along, across = (42 * welds.area_of_fillet(t_e=throat, l_e=length) for length in (16.0, 4.0))
    assert welds.strength_of_mixed_fillets(R_nwl=along, R_nwt=across) == pytest.approx(148.5, abs=0.05)
    assert welds.strength_of_mixed_fillets(R_nwl=1e-9, R_nwt=29.7) == pytest.approx(1.5 * 29.7)


@pytest.mark.parametrize("degrees, factor", [(0, 1.0), (30, 1.1768), (45, 1.2973), (90, 1.5)])
def test_directional_factor_of_both_editions(degrees, factor):
    theta = degrees * pi / 180
    assert welds.directional_factor_2022(theta=theta) == pytest.approx(factor, abs=5e-5)
    assert welds.stress_of_fillet_in_direction_2016(F_EXX=70, theta=theta) == pytest.approx(
        welds.stress_of_fillet(F_EXX=70) * welds.directional_factor_2022(theta=theta))


def test_length_of_fillets():
    factors = [welds.length_factor_of_fillet(l=ratio * 0.25, w=0.25) for ratio in (50, 100, 150, 250, 300)]
    assert factors == pytest.approx([1.0, 1.0, 0.9, 0.7, 0.6])
    long = welds.effective_length_of_fillet(beta=factors[-1], l=300 * 0.25)      # meets the constant length beyond
    assert welds.effective_length_of_very_long_fillet(w=0.25) == pytest.approx(long)
    assert welds.size_of_short_fillet(l=welds.least_length_of_fillet(w=0.25)) == 0.25
    assert welds.greatest_size_along_edge(t=0.375, Delta_w=welds.EDGE_ALLOWANCE["US"]) == 0.3125
    assert [welds.least_lap(t=t, l_0=welds.LEAST_LAP["US"]) for t in (0.125, 0.5)] == [1.0, 2.5]


def test_bolts_in_tension_keep_the_friction_that_is_left():
    assert bolts.slip_factor_with_tension_lrfd(D_u=1.13, T_b=28, n_b=4, T_u=0.0) == 1.0
    assert bolts.slip_factor_with_tension_lrfd(D_u=1.13, T_b=28, n_b=1, T_u=1.13 * 28 * 2) == 0.0
    half = bolts.slip_factor_with_tension_asd(D_u=1.13, T_b=28, n_b=1, T_a=1.13 * 28 / 3)
    assert half == pytest.approx(0.5)
    assert bolts.slip_with_tension(k_sc=half, R_n=20.0) == pytest.approx(10.0)
    assert bolts.slip_with_longitudinal_fillets(R_ns=76.0, R_nw=100.0) == 176.0


def test_little_shear_leaves_the_tension_of_a_bolt_as_it_is():
    assert bolts.tension_with_shear_lrfd(F_nt=90, F_nv=54, phi=0.75, f_rv=5.0) == 90
    assert bolts.tension_with_shear_asd(F_nt=90, F_nv=54, Omega=2.0, f_rv=0.0) == 90


@pytest.mark.parametrize("unit_set, step", [("US", 0.25), ("SI", 6.5)])
def test_fillers(unit_set, step):
    """No reduction where the clause begins; about a tenth for another 1/4 in.; never below 0.85."""
    begin, rate = bolts.FILLER_THICKNESS[unit_set], bolts.FILLER_REDUCTION[unit_set]
    factors = [bolts.shear_factor_with_filler(t_f=begin + more, k_t=rate, t_0=begin) for more in (0, step, 10 * step)]
    assert factors == pytest.approx([1.0, 0.9, 0.85], rel=2e-4)
    assert bolts.bolt_shear_with_filler(k_f=0.9, R_n=20.0) == 18.0


def test_long_joints_and_long_grips():
    assert bolts.shear_stress_in_long_joint(F_nv=54) == pytest.approx(44.98, abs=0.005)
    step = bolts.GRIP_STEP["US"]
    grips = [bolts.stress_with_long_grip(F_n=45, L_g=grip, d=0.75, Delta_g=step) for grip in (2.0, 3.75, 4.375)]
    assert grips == pytest.approx([45, 45, 40.5])


def test_a_group_is_the_sum_of_its_bolts():
    """Nine bolts, one at the end of the gusset, the others governed by bearing."""
    end = bolts.strength_of_one_bolt(R_nv=64.9, R_nb=60.9, R_nt=30.7)
    other = bolts.strength_of_one_bolt(R_nv=64.9, R_nb=60.9, R_nt=71.8)
    assert (end, other) == (30.7, 60.9)
    assert bolts.strength_of_bolt_group(n_1=1, r_n1=end, n_2=8, r_n2=other) == pytest.approx(517.9)


def test_rows_of_bearing_and_tearout_stand_in_the_ratios_of_their_factors():
    bolt, strip = {"d": 0.75, "t": 0.5, "F_u": 65}, {"l_c": 1.25, "t": 0.5, "F_u": 65}
    rows = [f(**bolt) for f in (bearing.bearing_in_long_slot, bearing.bearing, bearing.bearing_with_deformation)]
    assert rows == pytest.approx([48.75, 58.5, 73.125])
    rows = [f(**strip) for f in (bearing.tearout_in_long_slot, bearing.tearout, bearing.tearout_with_deformation)]
    assert rows == pytest.approx([40.625, 48.75, 60.9375])
    assert bearing.bearing_in_box(F_y=50, d=0.75, t=0.7) == pytest.approx(47.25)


def test_spacing_and_edges():
    assert bearing.least_spacing(d=0.75) == pytest.approx(2.0)
    assert bearing.preferred_spacing(d=0.75) == 2.25
    assert bearing.least_edge_distance_of_large_bolts(d=1.5) == 1.875
    edge, spacing, bare = (each["US"] for each in (bearing.GREATEST_EDGE_DISTANCE, bearing.GREATEST_SPACING,
                                                   bearing.GREATEST_SPACING_WEATHERING))
    assert [bearing.greatest_edge_distance(t=t, L_max0=edge) for t in (0.25, 1.0)] == [3.0, 6.0]
    assert [bearing.greatest_spacing(t=t, s_max0=spacing) for t in (0.25, 1.0)] == [6.0, 12.0]
    assert [bearing.greatest_spacing_when_weathering(t=t, s_max0=bare) for t in (0.25, 1.0)] == [3.5, 7.0]


def test_built_up_members():
    assert built_up.gross_area_of_parts(n_1=2, A_1=5.86, n_2=1, A_2=4.5) == pytest.approx(16.22)
    assert built_up.least_length_of_tie_plate(b=9.0) == pytest.approx(6.0)
    assert built_up.least_thickness_of_tie_plate(b=9.0) == pytest.approx(0.18)
    r_i = 0.75
    assert members.slenderness(L=built_up.preferred_length_between_connectors(r_i=r_i), r=r_i) == pytest.approx(300)
