"""The tables of steels and filler metals: printed pairs, ranges without gaps, how a grade is typed, what is refused."""

from itertools import pairwise

import pytest

from calclib.tables import FROM_MEMORY, PRINTED, TableError, table
from calclib.tables.materials import electrode, material, materials

# Grade, thickness or diameter [in], edition, F_y, F_u [ksi]: what published examples and tables state.
PUBLISHED = [
    ("A992", 0.4, None, 50, 65),                     # AISC Design Examples v16.0, Ex. D.1
    ("A572 Gr. 50", 0.5, None, 50, 65),              # Ex. D.7
    ("A500 Gr. C round", 0.465, "22", 50, 62),       # Ex. D.5
    ("A500 Gr. C round", 0.465, "16", 46, 62),       # AISC Manual, 15th ed., Table 2-4
    ("A500 Gr. B round", 0.465, None, 42, 58),       # AISC 360-05 Table C-A3.1
    ("A500 Gr. B rectangular", 0.465, None, 46, 58),
    ("A500 Gr. C rectangular", 0.465, None, 50, 62),
    ("A53 Gr. B", 0.3, None, 35, 60),
    ("A501 Gr. A", 0.3, None, 36, 58),
    ("A618 Gr. II", 0.3, None, 50, 70),
    ("A618 Gr. III", 0.3, None, 50, 65),
    ("A847", 0.3, None, 50, 70),
    ("A36", 1.0, None, 36, 58),                      # AISC Design Examples v15, Ex. D.7
    ("A709 HPS 70W", 4.0, None, 70, 85),             # ASTM A709 as reproduced by a supplier
    ("A709 HPS 100W", 2.5, None, 100, 110),
    ("A709 HPS 100W", 2.6, None, 90, 100),
    ("A709 Gr. 50W", 1.0, None, 50, 70),
    ("A588", 4.0, None, 50, 70), ("A588", 4.5, None, 46, 67), ("A588", 8.0, None, 42, 63),
    ("F1554 Gr. 36", 1.0, None, 36, 58), ("F1554 Gr. 55", 1.0, None, 55, 75), ("F1554 Gr. 105", 3.0, None, 105, 125),
]
FROM_MEMORY_ONLY = {"A36, t over 8", "A514, t to 2-1/2", "A514, t over 2-1/2 to 6", "A1085 Gr. A",
                    "A193 Gr. B7, d to 2-1/2", "A193 Gr. B7, d over 2-1/2 to 4", "A354 Gr. BC, d to 2-1/2",
                    "A354 Gr. BC, d over 2-1/2 to 4", "A354 Gr. BD, d to 2-1/2", "A354 Gr. BD, d over 2-1/2 to 4",
                    "A449, d to 1", "A449, d over 1 to 1-1/2", "A449, d over 1-1/2 to 3"}


def refusal(call, *arguments):
    with pytest.raises(TableError) as caught:
        call(*arguments)
    return str(caught.value)


@pytest.mark.parametrize("grade, thickness, edition, F_y, F_u", PUBLISHED)
def test_a_published_pair(grade, thickness, edition, F_y, F_u):
    steel = material(grade, thickness, edition)
    assert (steel.F_y, steel.F_u, steel.read) == (F_y, F_u, PRINTED)


def test_rows_from_memory_are_these_and_no_others():
    assert {row["row"] for row in table("steel_us").rows if row["read"] == FROM_MEMORY} == FROM_MEMORY_ONLY
    assert {row["grade"] for row in table("steel_si").rows if row["read"] == PRINTED} == {"CSA 300W", "CSA 350W"}
    assert [row["electrode"] for row in table("electrodes").rows if row["read"] == PRINTED] == ["E70"]


@pytest.mark.parametrize("name", ["steel_us", "steel_si"])
def test_strengths_are_possible_and_ranges_leave_no_gap(name):
    rows = table(name).rows
    for row in rows:
        assert 1.1 <= row["F_u"] / row["F_y"] <= 2
        assert row["F_y"] < (row["F_y_max"] or 1e9) and row["F_u"] < (row["F_u_max"] or 1e9)
        end = row["F_y_max"] or row["F_y"]
        assert end < (row["F_u_max"] or 1e9)
    for grade in {row["grade"] for row in rows}:
        steps = [(row["over"], row["to"]) for row in rows if row["grade"] == grade and not row["edition"]]
        assert not steps or steps[0][0] is None
        assert all(above == to for (_, to), (above, _) in pairwise(steps) if to)
        strengths = [row["F_y"] for row in rows if row["grade"] == grade and not row["edition"]]
        assert strengths == sorted(strengths, reverse=True)


def test_the_number_in_a_name_is_the_yield_stress():
    for name in materials("ksi"):
        number = name.rpartition(" ")[2]
        if name.startswith(("A572", "A529", "A913", "A1043", "F1554")) or name == "A709 Gr. 36":
            assert material(name, 0.5).F_y == float(number)
    for name in ("S235", "S275", "S355"):
        assert material(name, 16).F_y == float(name[1:])


@pytest.mark.parametrize("typed", ["A572-50", "a572 gr 50", "A572 Gr. 50", "ASTM A572 Grade 50", "A57250"])
def test_a_grade_is_read_as_it_is_typed(typed):
    assert material(typed, 1).name == "A572 Gr. 50"


def test_every_name_reads_itself():
    assert len(set(materials())) == len(materials()) == len(materials("ksi")) + len(materials("MPa"))
    assert all(material(name, 0.1, "22").name == name for name in materials())


def test_a_limit_belongs_to_the_smaller_range():
    assert material("A588", 4.0 + 1e-12).F_y == 50
    assert material("A588", 4.001).F_y == 46
    assert material("A449", 1.0).F_u == 120 and material("A449", 1.125).F_u == 105


@pytest.mark.parametrize("arguments, message", [
    (("A500 Gr. C round", 0.465), "A500 Gr. C round: F_y is 46 ksi with AISC 360-16 and 50 ksi with AISC 360-22; "
                                  "state the edition."),
    (("A500 Gr. C round", 0.465, "10"), "A500 Gr. C round: F_y is 46 ksi with AISC 360-16 and 50 ksi with AISC 360-22; "
                                        "state the edition."),
    (("A500 Gr. C", 0.465), 'material: "A500 Gr. C" is not in the tables; the nearest are A500 Gr. C round, '
                            "A501 Gr. B, A501 Gr. A."),
    (("A572 Gr. 50", 4.5), "A572 Gr. 50: a thickness of 4-1/2 in is outside the grade, which reaches to 4 in. "
                           "Choose another grade."),
    (("S355", 100), "S355: a thickness of 100 mm is outside the grade, which reaches to 80 mm. Choose another grade."),
    (("A992", 0), "A992: the thickness is 0 in; it must be above 0."),
    (("A992", float("nan")), "A992: the thickness is nan in; it must be above 0."),
])
def test_what_the_tables_do_not_cover_is_refused(arguments, message):
    assert refusal(material, *arguments) == message


@pytest.mark.parametrize("typed, strength", [
    ("E70", 70), ("e70xx", 70), ("E7018", 70), ("E71T-1", 70), ("E70T-1", 70), ("ER70S-6", 70), ("E60", 60),
    ("E8018", 80), ("E81T1", 80), ("E90", 90), ("E10018", 100), ("E11018", 110), ("E 110", 110),
])
def test_a_filler_metal_is_read_with_its_process(typed, strength):
    found = electrode(typed)
    assert (found.name, found.F_EXX) == (f"E{strength}", strength)


@pytest.mark.parametrize("typed", ["E120", "E700", "70", "E75", "", "E7", "E70XXX", "E7018 or E8018"])
def test_an_unknown_filler_metal_is_refused(typed):
    assert refusal(electrode, typed) == (
        f'electrode: "{typed}" is not in the table; there are E60, E70, E80, E90, E100, E110.')
