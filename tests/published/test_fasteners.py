"""The tables of bolts: published cells, what the rows share, and what is refused with the whole message."""

from fractions import Fraction
from math import inf, nan, pi

import pytest

from calclib.tables import FROM_MEMORY, PRINTED, TableError, table, thread
from calclib.tables.fasteners import (
    EDITIONS,
    HOLE_KINDS,
    PARALLEL,
    PERPENDICULAR,
    bolt_group,
    bolt_groups,
    edge_increment,
    hole,
    hole_sizes,
    minimum_edge,
    pretension,
    threaded_part,
)

SI, US = "SI", "US"


def refusal(call, *arguments):
    with pytest.raises(TableError) as caught:
        call(*arguments)
    return str(caught.value)


# Published cells

@pytest.mark.parametrize("edition, group, stresses", [
    ("22", "Group 120", (90, 54, 68)),         # AISC Design Examples v16.0, Ex. J.3, for the first two
    ("22", "Group 150", (113, 68, 84)),
    ("22", "Group 144", (108, 65, 81)),
    ("22", "Group 200", (150, 90, 113)),
    ("22", "A307", (45, 27, 27)),
    ("16", "Group A", (90, 54, 68)),           # AISC 360-10 Table J3.2, which has no Group C
    ("16", "Group B", (113, 68, 84)),
    ("16", "Group C", (150, 90, 113)),
    ("16", "A307", (45, 27, 27)),
])
def test_nominal_stresses(edition, group, stresses):
    found = bolt_group(edition, group)
    assert (found.F_nt, found.F_nv_N, found.F_nv_X) == stresses
    assert (found.unit, found.read) == ("ksi", PRINTED if edition == "22" else FROM_MEMORY)


def test_the_paired_stresses_are_the_printed_ones():
    """68 ksi is 470 MPa in one row and 470 in another; conversion would give 469."""
    in_mpa = {group: bolt_group("22", group, SI) for group in bolt_groups("22")}
    assert {name: (g.F_nt, g.F_nv_N, g.F_nv_X) for name, g in in_mpa.items()} == {
        "A307": (310, 190, 190), "Group 120": (620, 370, 470), "Group 144": (750, 450, 560),
        "Group 150": (780, 470, 580), "Group 200": (1000, 620, 780)}
    for name, pair in in_mpa.items():
        ksi = bolt_group("22", name)
        for column in ("F_nt", "F_nv_N", "F_nv_X"):
            assert abs(getattr(pair, column) / getattr(ksi, column) / 6.894757 - 1) < 0.034


@pytest.mark.parametrize("edition", EDITIONS)
def test_a_threaded_part_has_its_share_of_the_tensile_strength(edition):
    part = threaded_part(edition, 58)
    assert (part.F_nt, part.F_nv_N, part.F_nv_X) == (0.75 * 58, 0.450 * 58, 0.563 * 58)
    assert threaded_part(edition, 400, SI).unit == "MPa"


@pytest.mark.parametrize("d, group, T_b", [
    (0.75, "Group 120", 28), (1, "Group 120", 51),            # AISC Design Examples v16.0, Ex. J.4
    (0.5, "Group 120", 12), (0.875, "Group 150", 49), (1.125, "Group 120", 64), (1.25, "Group 200", 143),
    (1.375, "A325", 97), (1.5, "Group 144", 148),
])
def test_pretension_in_kips(d, group, T_b):
    found = pretension(d, group, "22")
    assert (found.value, found.unit, found.read) == (T_b, "kip", PRINTED)


def test_pretension_is_0_70_of_the_tensile_strength_of_the_thread():
    """The footnotes of Table J3.1: to the nearest kip, A325 at 120 ksi and A490 at 150; areas to three decimals."""
    threads = {row["d"]: row["n"] for row in table("threads_unc").rows}
    for group, strength in (("Group 120", 120), ("Group 150", 150)):
        for d in (0.5, 0.625, 0.75, 0.875, 1, 1.125, 1.25, 1.375, 1.5):
            area = round(pi / 4 * (d - 0.9743 / threads[d]) ** 2, 3)
            assert abs(pretension(d, group, "22").value - 0.70 * strength * area) <= 0.5


def test_metric_pretension_is_0_70_of_830_or_1040_mpa_on_the_thread():
    """User note of J3.3: A325M and A490M have 830 and 1040 MPa."""
    for group, strength, slack in (("Group 120", 830, 0.006), ("Group 150", 1040, 0.006)):
        for d in (16, 20, 22, 24, 27, 30, 36):
            area = float(thread("ISO coarse", f"M{d}").A_s_printed)
            assert abs(pretension(d, group, "22", SI).value * 1000 / (0.70 * strength * area) - 1) < slack


@pytest.mark.parametrize("edition", EDITIONS)
@pytest.mark.parametrize("d, kind, size", [
    ("3/4", "standard", "13/16"), ("7/8", "standard", "15/16"),
    ("1", "standard", "1-1/8"),                                # AISC Design Examples v16.0
    ("3/4", "short slot", "13/16 x 1"),                        # AISC FAQ on bolt holes
    ("1/2", "oversize", "5/8"), ("7/8", "oversize", "1-1/16"), ("1", "oversize", "1-1/4"),
    ("1", "short slot", "1-1/8 x 1-5/16"), ("5/8", "long slot", "11/16 x 1-9/16"),
    ("7/8", "long slot", "15/16 x 2-3/16"), ("1-1/8", "standard", "1-1/4"), ("1-1/4", "oversize", "1-9/16"),
    ("1-1/4", "short slot", "1-3/8 x 1-5/8"), ("1-1/2", "long slot", "1-5/8 x 3-3/4"),
])
def test_holes_in_inches(edition, d, kind, size):
    def inches(text):
        return float(sum(map(Fraction, text.split("-"))))
    assert list(hole(inches(d), kind, edition)) == [*map(inches, size.split(" x ")), None][:2]


# Table 5.11 of Brockenbrough's Structural Steel Designer's Handbook, after AISC 360-05 Table J3.3M.
METRIC = {16: "18 20 22 40", 20: "22 24 26 50", 22: "24 28 30 55", 24: "27 30 32 60", 27: "30 35 37 67",
          30: "33 38 40 75"}


@pytest.mark.parametrize("edition", EDITIONS)
def test_holes_in_millimetres(edition):
    for d, text in METRIC.items():
        standard, oversize, short, long = map(float, text.split())
        assert [tuple(hole(d, kind, edition, SI)) for kind in HOLE_KINDS] == [
            (standard, None), (oversize, None), (standard, short), (standard, long)]
    assert [tuple(hole(36, kind, edition, SI)) for kind in HOLE_KINDS] == [(39, None), (44, None), (39, 46), (39, 90)]
    assert [tuple(hole(42, kind, edition, SI)) for kind in HOLE_KINDS] == [(45, None), (50, None), (45, 52), (45, 105)]


def test_the_largest_holes_follow_from_the_diameter():
    """A long slot is 2.5 d long, an oversize hole at most 5/16 in and a short slot at most 3/8 in over the bolt."""
    for edition in EDITIONS:
        for unit_set in (US, SI):
            for d in hole_sizes(edition, unit_set):
                sizes = {kind: hole(d, kind, edition, unit_set) for kind in HOLE_KINDS}
                assert d < sizes["standard"].width < sizes["oversize"].width < sizes["short slot"].length
                assert sizes["short slot"].length < sizes["long slot"].length <= 2.5 * d
                assert abs(sizes["long slot"].length - 2.5 * d) <= 0.5
                assert sizes["standard"].width == sizes["short slot"].width == sizes["long slot"].width


@pytest.mark.parametrize("d, unit_set, edge", [
    (0.5, US, 0.75), (0.625, US, 0.875), (0.75, US, 1), (0.875, US, 1.125), (1, US, 1.25), (1.125, US, 1.5),
    (1.25, US, 1.625), (1.5, US, 1.875), (12, SI, 18), (16, SI, 22), (20, SI, 26), (22, SI, 28), (24, SI, 30),
    (27, SI, 34), (30, SI, 38), (36, SI, 46), (42, SI, 52.5),
])
def test_minimum_edge_distance(d, unit_set, edge):
    assert minimum_edge(d, "22", unit_set).value == edge


@pytest.mark.parametrize("d, unit_set, oversize, short, long", [
    # AISC 360-05 Tables J3.5 and J3.5M
    (0.5, US, 1 / 16, 1 / 8, 0.375), (0.875, US, 1 / 16, 1 / 8, 0.65625), (1, US, 1 / 8, 1 / 8, 0.75),
    (1.125, US, 1 / 8, 3 / 16, 0.84375), (1.5, US, 1 / 8, 3 / 16, 1.125),
    (16, SI, 2, 3, 12), (22, SI, 2, 3, 16.5), (24, SI, 3, 3, 18), (27, SI, 3, 5, 20.25), (36, SI, 3, 5, 27),
])
def test_edge_distance_increments(d, unit_set, oversize, short, long):
    for edition in EDITIONS:
        for direction, increments in ((PERPENDICULAR, [0, oversize, short, long]), (PARALLEL, [0, oversize, 0, 0])):
            assert [edge_increment(d, kind, direction, edition, unit_set).value for kind in HOLE_KINDS] == increments


# What the rows share

def test_the_2022_rows_from_memory_are_these_and_the_printed_ones_of_2016_are_those():
    names = ("bolt_groups", "threaded_parts", "pretension_inch", "pretension_metric", "holes_inch", "holes_metric",
             "edges_inch", "edges_metric", "edge_increments_inch", "edge_increments_metric")
    rows = [(row[table(name).key], row) for name in names for row in table(name).rows]
    assert {key for key, row in rows if row["edition"] == "22" and row["read"] == FROM_MEMORY} == {
        "22, 1 short slot", "22, 1-1/4"}
    assert {key for key, row in rows if row["edition"] == "16" and row["read"] == PRINTED} == {
        "16, 1 standard", "16, 1-1/8 and over standard"}


def test_the_two_editions_have_the_same_numbers():
    """What the 2016 tables are remembered to say: as in 2022, under other names of the groups and without M12."""
    for unit_set in (US, SI):
        for d in hole_sizes("16", unit_set):
            assert minimum_edge(d, "16", unit_set).value == minimum_edge(d, "22", unit_set).value
            for kind in HOLE_KINDS:
                assert tuple(hole(d, kind, "16", unit_set)) == tuple(hole(d, kind, "22", unit_set))
    for old, new in (("Group A", "Group 120"), ("Group B", "Group 150"), ("Group C", "Group 200")):
        for d in (1, 1.125, 1.25):
            assert pretension(d, old, "16").value == pretension(d, new, "22").value


@pytest.mark.parametrize("edition, typed, name", [
    ("22", "A325", "Group 120"), ("22", "120", "Group 120"), ("22", "group 150", "Group 150"),
    ("22", "F3125 Grade A490", "Group 150"), ("22", "F1852", "Group 120"), ("22", "ASTM A354 Gr. BD", "Group 150"),
    ("22", "F3148", "Group 144"), ("16", "A325", "Group A"), ("16", "B", "Group B"), ("16", "f3043", "Group C"),
    ("16", "A449", "Group A"),
])
def test_a_group_is_found_by_its_members(edition, typed, name):
    assert bolt_group(edition, typed).name == name


# Refusals

@pytest.mark.parametrize("call, message", [
    (lambda: bolt_group("22", "Group A"), 'bolt group: "Group A" is not in AISC 360-22 Table J3.2; there are A307, '
                                          "Group 120, Group 144, Group 150, Group 200."),
    (lambda: bolt_group("16", "Group 120"), 'bolt group: "Group 120" is not in AISC 360-16 Table J3.2; there are A307, '
                                            "Group A, Group B, Group C."),
    (lambda: bolt_group("22", ""), 'bolt group: "" is not in AISC 360-22 Table J3.2; there are A307, Group 120, '
                                   "Group 144, Group 150, Group 200."),
    (lambda: bolt_group("10", "A325"), 'edition: "10" is not one of 22, 16.'),
    (lambda: bolt_group("16", "A325", SI), "Group A: AISC 360-16 Table J3.2 was not read in MPa. Work in US units, or "
                                           "with AISC 360-22."),
    (lambda: bolt_group("22", "A325", "metric"), 'unit set: "metric" is not one of US, SI.'),
    (lambda: pretension(0.75, "A307", "22"), "A307 has no minimum pretension in AISC 360-22 Table J3.1."),
    (lambda: pretension(24, "Group 144", "22", SI), "Group 144 has no minimum pretension in AISC 360-22 Table J3.1M."),
    (lambda: pretension(0.75, "Group 200", "22"), "bolt diameter: 0.75 in is not in AISC 360-22 Table J3.1 for "
                                                  "Group 200; the sizes are 1, 1-1/8, 1-1/4 in."),
    (lambda: pretension(1.75, "A325", "22"),
     "bolt diameter: 1.75 in is not in AISC 360-22 Table J3.1 for Group 120; the sizes are 1/2, 5/8, 3/4, 7/8, 1, "
     "1-1/8, 1-1/4, 1-3/8, 1-1/2 in."),
    (lambda: hole(0.8, "standard", "22"), "bolt diameter: 0.8 in is not in AISC 360-22 Table J3.3; the sizes are 1/2, "
                                          "5/8, 3/4, 7/8, 1, and from 1-1/8 to 4 in."),
    (lambda: hole(20, "standard", "22"), "bolt diameter: 20 in is not in AISC 360-22 Table J3.3; the sizes are 1/2, "
                                         "5/8, 3/4, 7/8, 1, and from 1-1/8 to 4 in."),
    (lambda: hole(0.75, "standard", "16", SI), "bolt diameter: 0.75 mm is not in AISC 360-16 Table J3.3M; the sizes "
                                               "are 16, 20, 22, 24, 27, 30, and from 36 to 100 mm."),
    (lambda: hole(33, "oversize", "22", SI), "bolt diameter: 33 mm is not in AISC 360-22 Table J3.3M; the sizes are "
                                             "12, 16, 20, 22, 24, 27, 30, and from 36 to 100 mm."),
    (lambda: hole(nan, "standard", "22"), "bolt diameter: nan in is not in AISC 360-22 Table J3.3; the sizes are 1/2, "
                                          "5/8, 3/4, 7/8, 1, and from 1-1/8 to 4 in."),
    (lambda: hole(0.75, "slot", "22"), 'kind of hole: "slot" is not one of standard, oversize, short slot, long slot.'),
    (lambda: minimum_edge(0.4375, "22"),
     "bolt diameter: 0.4375 in is not in AISC 360-22 Table J3.4; the sizes are 1/2, 5/8, 3/4, 7/8, 1, 1-1/8, 1-1/4, "
     "and from 1-1/4 to 4 in."),
    (lambda: minimum_edge(inf, "22", SI),
     "bolt diameter: inf mm is not in AISC 360-22 Table J3.4M; the sizes are 12, 16, 20, 22, 24, 27, 30, 36, and from "
     "36 to 100 mm."),
    (lambda: edge_increment(0.9, "oversize", PARALLEL, "22"),
     "bolt diameter: 0.9 in is not in AISC 360-22 Table J3.5; the sizes are 1/2, 5/8, 3/4, 7/8, 1, 1-1/8, 1-1/4, and "
     "from 1-1/4 to 4 in."),
    (lambda: edge_increment(0.75, "short slot", "across", "22"),
     'direction of the slot: "across" is not one of perpendicular, parallel.'),
])
def test_what_the_tables_do_not_have_is_refused(call, message):
    assert refusal(call) == message
