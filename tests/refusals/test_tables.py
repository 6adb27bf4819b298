"""What the table loader refuses, with the whole message."""

import pytest

from calclib.tables import COMPULSORY, TableError, parse, table, thread, threads

TOML = """
source = "a book"
read = "from the printed table"
gaps = "none"
key = "size"
[sources]
A = "page 1"
[columns]
size = { doc = "name" }
d = { unit = "in", doc = "diameter" }
"""
CSV = "size,d\none,1-1/8\ntwo,2\n"


def refusal(call, *arguments):
    with pytest.raises(TableError) as caught:
        call(*arguments)
    return str(caught.value)


def test_the_small_table_is_accepted():
    small = parse("small", CSV, TOML)
    assert [row["d"] for row in small.rows] == [1.125, 2.0]
    assert small.row("one")["printed"]["d"] == "1-1/8"
    assert small.row("one")["source"] == "a book"


@pytest.mark.parametrize("call, message", [
    (lambda: thread("UNC", "1-1/9"),
     'thread: "1-1/9" is not in the series UNC; the nearest are 1-1/8-7 UNC, 1-8 UNC, 1-1/4-7 UNC.'),
    (lambda: thread("ISO fine", "M10"),
     'thread: "M10" is not in the series ISO fine; the nearest are M10x1.25, M10x1, M8x1.'),
    (lambda: thread("ISO coarse", "20"),
     'thread: "20" is not in the series ISO coarse; the nearest are M20, M18, M22.'),
    (lambda: thread("UNC", "9" * 400 + "/1"),
     f'thread: "{"9" * 400}/1" is not in the series UNC; the nearest are 4-4 UNC, 3-3/4-4 UNC, 3-1/2-4 UNC.'),
    (lambda: thread("UNF", "fine"),
     'thread: "fine" is not in the series UNF; the nearest are 9/16-18 UNF, 7/8-14 UNF, 7/16-20 UNF.'),
    (lambda: threads("UNEF"), 'there is no thread series "UNEF"; there are UNC, UNF, 8UN, ISO coarse, ISO fine.'),
    (lambda: table("threads_unc").row("1-1/8"),
     'thread: "1-1/8" is not in table threads_unc; the nearest are 1-1/8-7 UNC, 5/16-18 UNC, 1-8 UNC.'),
])
def test_an_unknown_name_is_refused_with_the_nearest(call, message):
    assert refusal(call) == message


def test_an_unknown_table_is_refused_with_the_list():
    message = refusal(table, "../errors")
    assert message.startswith('there is no table "../errors"; there are ')
    assert "threads_unc" in message


@pytest.mark.parametrize("size", ["M10x1.25", "M10 x 1.25", " M10×1.25 "])  # noqa: RUF001
def test_a_multiplication_sign_and_blanks_are_read(size):
    assert thread("ISO fine", size).name == "M10x1.25"


@pytest.mark.parametrize("key", COMPULSORY)
def test_each_compulsory_key_is_compulsory(key):
    line = "[columns]" if key == "columns" else f"{key} = "
    cut = TOML.split("[columns]")[0] if key == "columns" else "\n".join(
        text for text in TOML.splitlines() if not text.startswith(line))
    assert refusal(parse, "small", CSV, cut) == f"small.toml: {key} must be given."


@pytest.mark.parametrize("csv_text, toml_text, message", [
    (CSV, TOML.replace("from the printed table", "seen"),
     'small.toml: read is "seen"; write one of from the printed table, from memory, verify, by row.'),
    (CSV, TOML.replace(', doc = "diameter"', ""), "small.toml: column d has no doc."),
    (CSV, TOML.replace('key = "size"', 'key = "name"'), "small.toml: the key column name is not a column."),
    ("size,D\none,1\n", TOML, "small: the CSV has columns size, D; the TOML describes size, d."),
    ("size,d\none,1,2\n", TOML, "small.csv, line 2: 3 cells, but 2 columns."),
    ("size,d\none,1\none,2\n", TOML, 'small.csv, line 3: size "one" is blank or stands there twice.'),
    ("size,d\n,1\n", TOML, 'small.csv, line 2: size "" is blank or stands there twice.'),
    (CSV, TOML.replace("from the printed table", "by row"),
     'small.csv, line 2: read is "None"; write "printed" or "from memory, verify".'),
    ("size,d,source\none,1,B\n", TOML + 'source = { doc = "place" }\n',
     'small.csv, line 2: source "B" is not among the sources of the TOML.'),
])
def test_files_that_contradict_each_other_are_refused(csv_text, toml_text, message):
    assert refusal(parse, "small", csv_text, toml_text) == message


@pytest.mark.parametrize("cell", ["1,5", "1 1/8", "1/0", "nan", "inf", "1e3", "-1", "0x10", "1_000", "½", "٣"])
def test_a_cell_that_is_no_plain_number_is_refused(cell):
    assert refusal(parse, "small", f'size,d\none,"{cell}"\n', TOML) == \
        f'small.csv, line 2, d: "{cell}" is not a number; write 0.182, 13/16 or 1-1/8.'


def test_a_cached_row_cannot_be_changed():
    row = table("threads_unc").row("1-8 UNC")
    with pytest.raises(TypeError):
        row["A_s"] = 1.0
