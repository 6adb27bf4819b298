"""A case file: every text as typed, whole or not at all, whatever is typed and whenever the process is killed."""

import os
import signal
import stat
import subprocess
import sys
import time
from pathlib import Path

import pytest
import yaml
from hypothesis import given
from hypothesis import strategies as st
from samples import PLATE, plate, rod

from calclib import case as cases
from calclib.case import REVISION_COLUMNS, Case, load, parse, save
from calclib.errors import CalcError
from calclib.members import KINDS

DEMOS = sorted((Path(__file__).parent.parent.parent / "workbooks" / "cases").glob("*.yaml"))
ROOT = Path(__file__).parent.parent.parent
NASTY = ["on", "012", "1:30", "null", "~", "1e3", "{a: b}", "# no comment", "a: b", "'", '"', "\\", "\\n", "- x",
         "&x *x", "!!int 3", "%TAG", "line\nbreak", "tab\there", "$x$ **b** <i>", "°½″–−", "𝛗 鉄骨",
         "\x85\u2028\u2029\ufeff\x7f"]


@pytest.mark.parametrize("text", NASTY)
def test_a_text_that_yaml_would_guess_at_comes_back_as_typed(text):
    assert parse(plate(project=text).yaml()).texts["project"] == text


@given(st.text(min_size=1).filter(str.strip), st.lists(st.tuples(*[st.text()] * 4), max_size=3))
def test_any_text_comes_back_as_typed(text, revisions):
    case = Case(KINDS["pin_plate"], {**PLATE, "project": text, "remarks": text}, tuple(revisions))
    again = parse(case.yaml())
    assert again.texts == case.texts
    assert again.revisions == case.revisions
    assert again.digest == case.digest


@given(st.dictionaries(st.sampled_from(sorted(PLATE)), st.text(max_size=8), max_size=8))
def test_only_blank_texts_are_left_out(texts):
    case = Case(KINDS["pin_plate"], texts)
    assert parse(case.yaml()).texts == {name: text for name, text in texts.items() if text.strip()}


@pytest.mark.parametrize("path", DEMOS, ids=lambda p: p.stem)
def test_a_demo_case_is_written_as_it_was_read(path):
    content = path.read_bytes()
    case = load(path)
    assert parse(case.yaml()) == Case(case.kind, case.texts, case.revisions)
    assert yaml.safe_load(content) == yaml.safe_load(case.yaml())


def test_values_stay_texts_even_unquoted():
    case = parse("kind: pin_plate\nproject: on\ncalc_number: 012\nrevision: 1\nsubject: 1:30\ndate: 2026-11-20\n")
    assert case.texts == {"project": "on", "calc_number": "012", "revision": "1", "subject": "1:30",
                          "date": "2026-11-20"}


def test_an_alias_stands_for_its_text():
    assert parse('kind: pin_plate\nF_y: &y "50 ksi"\npin_F_y: *y\n').texts == {"F_y": "50 ksi", "pin_F_y": "50 ksi"}


def test_aliases_that_multiply_are_refused_at_once():
    """Nine levels of nine, 387 million texts, if they were built one by one."""
    lines = ["a0: &a0 [x, x, x, x, x, x, x, x, x]"]
    lines += [f"a{i}: &a{i} [{', '.join([f'*a{i - 1}'] * 9)}]" for i in range(1, 9)]
    started = time.monotonic()
    with pytest.raises(CalcError, match='"a0" must be one text'):
        parse("\n".join(["kind: pin_plate", *lines]))
    assert time.monotonic() - started < 2


# --- digest ------------------------------------------------------------------------------------------------------

def test_the_digest_stands_for_the_inputs_and_not_for_the_layout():
    case = plate()
    turned = Case(case.kind, dict(reversed(case.texts.items())))
    spaced = case.with_texts(project=f"  {case.texts['project']} ", remarks=" ")
    assert case.digest == turned.digest == spaced.digest == parse("# a comment\n" + case.yaml()).digest
    assert len(case.digest) == 12
    assert int(case.digest, 16) > 0


def test_the_digest_changes_with_every_input_the_kind_and_the_history():
    case = plate()
    digests = {case.digest, rod().digest, Case(case.kind, case.texts, (("0", "2026-11-20", "A", "First"),)).digest}
    digests |= {case.with_texts(**{name: text + "0"}).digest for name, text in case.texts.items()}
    assert len(digests) == len(case.texts) + 3


def test_with_texts_leaves_the_case_as_it_was():
    case = plate()
    other = case.with_texts(F_y="36 ksi")
    assert (case.texts["F_y"], other.texts["F_y"]) == ("50 ksi", "36 ksi")


# --- saving ------------------------------------------------------------------------------------------------------

def test_what_is_saved_is_what_is_loaded(tmp_path):
    path = tmp_path / "plate.yaml"
    saved = save(plate(project="Brücke über den Fluß"), path)
    content = path.read_bytes()
    assert b"\r" not in content
    assert content.startswith(b'kind: "pin_plate"\n\n# Project\nproject: "Br\xc3\xbccke')
    assert load(path) == saved
    assert load(path).texts == saved.texts
    assert list(tmp_path.iterdir()) == [path]
    if os.name == "posix":
        assert stat.S_IMODE(path.stat().st_mode) == 0o644


def test_a_saved_case_can_be_changed_and_saved_again(tmp_path):
    case = save(plate(), tmp_path / "plate.yaml")
    for width in ("9 in", "10 in"):
        case = save(case.with_texts(plate_width=width))
        assert load(case.path).texts["plate_width"] == width


def test_a_byte_order_mark_is_no_part_of_the_case(tmp_path):
    path = tmp_path / "plate.yaml"
    path.write_bytes(b"\xef\xbb\xbf" + plate().yaml().encode())
    assert load(path).texts == plate().texts


@pytest.mark.parametrize("step", ["os.replace", "os.fsync", "os.chmod"])
def test_a_failure_before_the_replacement_leaves_the_old_file_whole(tmp_path, monkeypatch, step):
    case = save(plate(), tmp_path / "plate.yaml")
    before = case.path.read_bytes()

    def stop(*arguments):
        raise KeyboardInterrupt

    monkeypatch.setattr(cases.os, step.partition(".")[2], stop)
    with pytest.raises(KeyboardInterrupt):
        save(case.with_texts(plate_width="9 in"))
    assert case.path.read_bytes() == before
    assert list(tmp_path.iterdir()) == [case.path]


_WRITER = f"""
import sys
sys.path[:0] = [{str(ROOT)!r}, {str(ROOT / "tests")!r}]
from calclib.case import load, save
case = load(sys.argv[1])
print("ready", flush=True)
width = 0
while True:
    width += 1
    case = save(case.with_texts(remarks=f"{{width}} " * 20000))
"""


@pytest.mark.skipif(not hasattr(signal, "SIGKILL"), reason="Windows has no SIGKILL")
def test_a_process_killed_while_it_saves_leaves_a_whole_file(tmp_path):
    """The process saves without pause and is killed at once, five times; the file is each time one that was saved."""
    path = tmp_path / "plate.yaml"
    save(plate(remarks="0 " * 20000), path)
    for delay in (0.0, 0.003, 0.01, 0.02, 0.05):
        process = subprocess.Popen([sys.executable, "-c", _WRITER, str(path)], stdout=subprocess.PIPE, text=True)
        assert process.stdout.readline() == "ready\n"
        time.sleep(delay)
        process.send_signal(signal.SIGKILL)
        process.wait()
        process.stdout.close()
        case = load(path)
        number = case.texts["remarks"].split()[0]
        assert case.texts == plate(remarks=f"{number} " * 20000).texts
        save(case.with_texts(remarks="0 " * 20000))     # what a killed process leaves behind hinders nobody


def test_the_case_in_a_record_is_the_case():
    from calclib.calc import evaluate
    from calclib.record import record
    case = Case(plate().kind, plate().texts, (("0", "2026-11-20", "A", "First issue"),))
    again = cases.from_record(record(evaluate(case)))
    assert (again.digest, again.texts, again.revisions) == (case.digest, case.texts, case.revisions)
    assert REVISION_COLUMNS == ("revision", "date", "by", "description")
