"""What a case file is refused with, the whole message."""

import os
import sys

import pytest
from samples import plate

from calclib import case as cases
from calclib.case import load, parse, save
from calclib.errors import CalcError
from calclib.members import KINDS

KNOWN = ", ".join(KINDS)
KIND = "kind: pin_plate\n"
NO_CASE = 'plate.yaml: is not a case; a case is a list of lines such as  plate_width: "4-1/4 in"'
DEEP = "plate.yaml: lists or mappings stand too deep in each other; a case is a plain list of lines."


def refusal(call, *arguments):
    with pytest.raises(CalcError) as caught:
        call(*arguments)
    return str(caught.value)


@pytest.mark.parametrize("content, message", [
    ("", NO_CASE),
    ("# only a comment\n", NO_CASE),
    ("plate", NO_CASE),
    ("- plate_width: 4 in", NO_CASE),
    ("null", NO_CASE),
    ("F_y: 50 ksi", f'plate.yaml: has no "kind"; write one of: {KNOWN}.'),
    ("kind: eyebrow", f'plate.yaml: "eyebrow" is not a kind of member; the kinds are: {KNOWN}.'),
    ("kind: pin_plat", f'plate.yaml: "pin_plat" is not a kind of member; the kinds are: {KNOWN}; did you mean '
     '"pin_plate"?'),
    ("kind: [pin_plate]", f"plate.yaml: \"['pin_plate']\" is not a kind of member; the kinds are: {KNOWN}; did you "
     'mean "pin_plate"?'),
    (KIND + "F_y: 50 ksi\nF_u: 65 ksi\nF_y: 36 ksi", 'plate.yaml, line 4: "F_y" stands twice in the case; keep one.'),
    (KIND + "kind: threaded_rod", 'plate.yaml, line 2: "kind" stands twice in the case; keep one.'),
    (KIND + "F_y: [50 ksi]", 'plate.yaml: "F_y" must be one text, such as  F_y: "..."'),
    (KIND + "F_y: {a: b}", 'plate.yaml: "F_y" must be one text, such as  F_y: "..."'),
    (KIND + "<<: {F_y: 50 ksi}", 'plate.yaml: "<<" must be one text, such as  <<: "..."'),
    (KIND + "? [a, b]\n: c", "plate.yaml, line 2: the name of an input must be plain text."),
    (KIND + "F_y: 50 ksi: 60 ksi", "plate.yaml, line 2: not readable as YAML: mapping values are not allowed here."),
    (KIND + "F_y: *y", "plate.yaml, line 2: not readable as YAML: found undefined alias 'y'."),
    (KIND + "F_y: &y [*y]", "plate.yaml, line 2: not readable as YAML: found unconstructable recursive node."),
    (KIND + "\tF_y: x", "plate.yaml, line 2: not readable as YAML: found character '\\t' that cannot start any token."),
    (KIND + "---\nF_y: x", "plate.yaml, line 2: not readable as YAML: but found another document."),
    (KIND + "F_y: \x00", "plate.yaml: not readable as YAML: unacceptable character #x0000: special characters are not "
     'allowed\n  in "<unicode string>", position 21.'),
    (KIND + "revisions: none", "plate.yaml: each line of revisions needs exactly: revision, date, by, description."),
    (KIND + "revisions:\n  - {revision: 0}", "plate.yaml: each line of revisions needs exactly: revision, date, by, "
     "description."),
    (KIND + "revisions:\n  - {revision: [0], date: a, by: b, description: c}", "plate.yaml: each line of revisions "
     "needs exactly: revision, date, by, description."),
    ("[" * 5000, DEEP),
    ("{" * 5000, DEEP),
])
def test_a_case_is_refused(content, message):
    assert refusal(parse, content, "plate.yaml") == message


@pytest.mark.parametrize("tag, shown", [
    ("!!python/object/apply:os.system", "tag:yaml.org,2002:python/object/apply:os.system"),
    ("!!python/name:os.system", "tag:yaml.org,2002:python/name:os.system"),
    ("!!python/object/new:subprocess.Popen", "tag:yaml.org,2002:python/object/new:subprocess.Popen"),
    ("!!python/module:os", "tag:yaml.org,2002:python/module:os"),
    ("!!int", "tag:yaml.org,2002:int"),
    ("!!binary", "tag:yaml.org,2002:binary"),
    ("!own", "!own"),
])
def test_a_tag_is_refused_and_never_run(tag, shown, tmp_path, monkeypatch):
    mark = tmp_path / "ran"
    called = []
    monkeypatch.setattr(os, "system", called.append)
    for value in (f'["touch {mark}"]', f'"touch {mark}"', "{a: b}"):
        for content in (KIND + f"F_y: {tag} {value}\n", f"kind: {tag} {value}\n", f"{tag} {value}\n",
                        KIND + f"? {tag} {value}\n: x\n", KIND + f"revisions: [{tag} {value}]\n"):
            message = refusal(parse, content, "plate.yaml")
            line = 2 if content.startswith(KIND) else 1
            assert message == f"plate.yaml, line {line}: {shown} is not allowed in a case; write plain quoted text."
    assert not called
    assert not mark.exists()


def test_a_tag_behind_a_shorthand_is_refused():
    content = "%TAG !x! tag:yaml.org,2002:python/\n---\nkind: !x!object/apply:os.system [x]\n"
    assert refusal(parse, content, "plate.yaml") == (
        "plate.yaml, line 3: tag:yaml.org,2002:python/object/apply:os.system is not allowed in a case; write plain "
        "quoted text.")


# --- files -------------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("content", [b"kind: pin_plate\nproject: Br\xfccke\n", plate().yaml().encode("utf-16"),
                                     b"%PDF-1.7\n\xe2\xe3\xcf\xd3", bytes(range(256))])
def test_a_file_that_is_not_utf_8(tmp_path, content):
    path = tmp_path / "plate.yaml"
    path.write_bytes(content)
    assert refusal(load, path) == f"{path}: is not a text file in UTF-8, so not a case."


def test_an_empty_file(tmp_path):
    path = tmp_path / "plate.yaml"
    path.write_bytes(b"")
    assert refusal(load, path) == f'{path}: is not a case; a case is a list of lines such as  plate_width: "4-1/4 in"'


def test_a_file_that_is_not_there(tmp_path):
    path = tmp_path / "none.yaml"
    assert refusal(load, path) == f"{path}: cannot be read: No such file or directory."


@pytest.mark.skipif(sys.platform == "win32", reason="Windows words it otherwise")
def test_a_folder(tmp_path):
    assert refusal(load, tmp_path) == f"{tmp_path}: cannot be read: Is a directory."


# --- saving ------------------------------------------------------------------------------------------------------

def test_a_case_that_somebody_else_changed_is_not_overwritten(tmp_path):
    path = tmp_path / "plate.yaml"
    mine = save(plate(), path)
    theirs = save(load(path).with_texts(plate_width="9 in"))
    before = path.read_bytes()
    message = (f"{path}: somebody else changed this case since it was opened. Nothing was saved. Save under another "
               "name, or open the case again.")
    assert refusal(save, mine.with_texts(plate_width="10 in")) == message
    assert path.read_bytes() == before
    assert save(theirs.with_texts(plate_width="11 in")).texts["plate_width"] == "11 in"


def test_one_more_byte_is_a_change(tmp_path):
    mine = save(plate(), tmp_path / "plate.yaml")
    with mine.path.open("ab") as file:
        file.write(b"\n")
    assert "somebody else changed this case" in refusal(save, mine)


def test_another_case_is_not_overwritten(tmp_path):
    mine = save(plate(), tmp_path / "mine.yaml")
    save(plate(plate_width="9 in"), tmp_path / "theirs.yaml")
    path = tmp_path / "theirs.yaml"
    before = path.read_bytes()
    message = f"{path}: another file has this name. Nothing was saved. Save under another name."
    assert refusal(save, mine, path) == message
    assert refusal(save, plate(), path) == message
    assert path.read_bytes() == before


def test_a_folder_that_is_not_there(tmp_path):
    path = tmp_path / "none" / "plate.yaml"
    assert refusal(save, plate(), path) == (
        f"{path}: cannot be written: No such file or directory. Nothing was saved.")


def test_a_full_disk_leaves_the_old_file_whole(tmp_path, monkeypatch):
    mine = save(plate(), tmp_path / "plate.yaml")
    before = mine.path.read_bytes()

    def full(*arguments):
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(cases.os, "replace", full)
    assert refusal(save, mine.with_texts(plate_width="9 in")) == (
        f"{mine.path}: cannot be written: No space left on device. Nothing was saved.")
    assert mine.path.read_bytes() == before
    assert list(tmp_path.iterdir()) == [mine.path]


def test_a_record_of_an_unknown_kind():
    assert refusal(cases.from_record, {"results": {"kind": "eyebrow"}}) == (
        'the record is of kind "eyebrow", which is not known here.')
