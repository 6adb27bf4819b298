"""What cannot be issued or checked: one message on standard error, exit status 2, nothing written, nothing run."""

import base64
import io
import json
import random
import zlib

import pikepdf
import pytest
from issued import DEMO, ROOT, RememberingIssuer, demo

from calclib import __main__
from calclib.case import from_record, load
from calclib.checking import ALTERED, check
from calclib.issuing import issue, pages


@pytest.fixture(scope="module")
def issued():
    with RememberingIssuer() as issuer:
        yield demo(issuer)


@pytest.fixture
def refused(capsys, tmp_path):
    """Check a file with some content, and return the message it is refused with."""
    def made(name, content=None):
        path = tmp_path / name
        if content is not None:
            path.write_bytes(content)
        status = __main__.main(["check", str(path)])
        out, err = capsys.readouterr()
        assert (status, out) == (2, ""), out
        assert err.startswith(str(path)) or err.startswith(f"the case in {path}"), err
        assert err.count("\n") == 1
        assert "Traceback" not in err and len(err) < 700
        return err.rstrip("\n").replace(str(path), name)
    return made


NO_PDF = "calc.pdf: is not a PDF as it was issued, so it cannot be checked ("
NO_CASE = "{}: carries no case, so it is no calc as it was issued. Ask for the file as it was issued."


# --- check: no issued calc ----------------------------------------------------------------------------------------

def test_no_such_file(refused):
    assert refused("none.pdf") == "none.pdf: no such file or folder."


@pytest.mark.parametrize("name", ["calc.docx", "calc", "calc.yaml", "calc.pdf.exe"])
def test_a_file_of_another_kind(refused, name):
    assert refused(name, b"1") == f"{name}: is not a PDF, HTML page, notebook or record, so no issued calc."


def test_a_folder_without_a_calc(refused, tmp_path):
    (tmp_path / "empty").mkdir()
    (tmp_path / "empty" / "letter.txt").write_bytes(b"1")
    assert refused("empty") == ("empty: holds no issued calc (no PDF, HTML page, notebook or record). Name the folder "
                                "of one revision.")


@pytest.mark.parametrize("content", [b"", b"%PDF-1.7\n", random.Random(7).randbytes(4000), b"\x00" * 1000,
                                     b"%PDF-1.7\n" + random.Random(8).randbytes(4000)])
def test_a_file_that_is_no_pdf(refused, content):
    assert refused("calc.pdf", content).startswith(NO_PDF)


@pytest.mark.parametrize("share", [0.1, 0.5, 0.9, 0.999])
def test_a_truncated_pdf(refused, issued, share):
    message = refused("calc.pdf", issued[".pdf"][:int(len(issued[".pdf"]) * share)])
    assert message.startswith((NO_PDF, "calc.pdf: carries no"))


def test_an_encrypted_pdf(refused, issued):
    out = io.BytesIO()
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        pdf.save(out, encryption=pikepdf.Encryption(user="", owner="o", R=4))
    assert refused("calc.pdf", out.getvalue()) == ("calc.pdf: is encrypted; an issued calc never is. Ask for the file "
                                                   "as it was issued.")


def test_a_pdf_without_attachments(refused):
    out = io.BytesIO()
    pdf = pikepdf.new()
    pdf.add_blank_page()
    pdf.save(out)
    assert refused("calc.pdf", out.getvalue()) == NO_CASE.format("calc.pdf")


def attached(issued, **files):
    """Return the PDF with files (suffix without dot -> bytes) in the place of its attachments, compressed."""
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        for suffix, content in files.items():
            for each in pdf.objects:
                if isinstance(each, pikepdf.Stream) and suffix in str(each.get("/Subtype")):
                    each.write(zlib.compress(content), filter=pikepdf.Name.FlateDecode)
        out = io.BytesIO()
        pdf.save(out)
        return out.getvalue()


def test_a_bomb_in_an_attachment(refused, issued):
    """A hundred megabytes of zeros in a hundred kilobytes."""
    assert refused("calc.pdf", attached(issued, yaml=b"0" * 100_000_000)).startswith(NO_PDF)


def test_a_file_larger_than_any_calc(refused, tmp_path):
    with open(tmp_path / "calc.html", "wb") as file:
        file.truncate(200_000_000)
    assert refused("calc.html") == "calc.html: is no file, or larger than any issued calc."


def test_two_cases_in_one_file(refused, issued):
    page = issued[".html"].replace(b"<li><a download=", b'<li><a download="b.yaml" href="data:text/plain;base64,">b</a>'
                                                       b"<a download=", 1)
    assert refused("calc.html", page) == ("calc.html: carries 2 cases, so it is no calc as it was issued. Ask for the "
                                          "file as it was issued.")


@pytest.mark.parametrize("content", [b"", b"<html></html>", b'<a download="case.yaml">x</a>',
                                     b'<a download="case.yaml" href="file:///etc/passwd">x</a>',
                                     b'<a download="case.yaml" href="https://example.org/case.yaml">x</a>'])
def test_a_page_without_attached_files(refused, content):
    assert refused("calc.html", content) == NO_CASE.format("calc.html")


@pytest.mark.parametrize("content", [b'<a download="c.yaml" href="data:,%%%">', b"\xff\xfe<html>",
                                     b'<a download="c.yaml" href="data:;base64,AAA">'])
def test_a_page_that_is_broken(refused, content):
    assert refused("calc.html", content).startswith("calc.html: is not a page as it was issued, so it cannot be ")


@pytest.mark.parametrize("content", [b"", b"{", b"no JSON", b"\xff\xfe", b"[" * 100_000, b'{"cells": [], "cells": []}'])
@pytest.mark.parametrize("name", ["calc.ipynb", "calc.json"])
def test_what_is_no_json(refused, name, content):
    assert refused(name, content).startswith(f"{name}: is not JSON as it was issued, so it cannot be checked (")


@pytest.mark.parametrize("content", [[], 1, None, "x", {}, {"cells": 1}, {"cells": [1]}, {"cells": [{"outputs": [1]}]}])
def test_json_that_is_no_notebook(refused, content):
    assert refused("calc.ipynb", json.dumps(content).encode()).startswith(
        ("calc.ipynb: is not a notebook as it was issued", "calc.ipynb: holds no calc"))


def test_a_notebook_that_was_not_run(refused):
    book = json.loads((ROOT / "workbooks" / "pin_plate.ipynb").read_text(encoding="utf-8"))
    for cell in book["cells"]:
        cell.pop("outputs", None)
    assert refused("calc.ipynb", json.dumps(book).encode()) == ("calc.ipynb: holds no calc; an issued notebook holds "
                                                                "one.")


@pytest.mark.parametrize("content", [
    [], 1, None, "x", {}, {"inputs": {}}, {"inputs": [], "results": {}, "revisions": []},
    {"inputs": {"a": 1}, "results": {"kind": "pin_plate"}, "revisions": []},
    {"inputs": {}, "results": {"kind": []}, "revisions": []}, {"inputs": {}, "results": {"kind": "x"}, "revisions": []},
    {"inputs": {}, "results": {"kind": "pin_plate"}, "revisions": [["1"]]},
])
def test_json_that_is_no_record(refused, content):
    assert refused("calc.json", json.dumps(content).encode()).startswith(
        ("calc.json: is not a record as it was issued", "calc.json: its inputs are not those of a case."))


@pytest.mark.parametrize("change", [
    lambda r: r.update(results=[]), lambda r: r.update(results={"kind": "pin_plate"}), lambda r: r.pop("equations"),
    lambda r: r["results"].update(limit_states=1), lambda r: r["results"].update(limit_states=[1]),
    lambda r: r["results"].update(limit_states=[{"key": []}]), lambda r: r["results"].update(rules=None),
    lambda r: r.update(equations={}), lambda r: r.update(verdict=[]), lambda r: r.pop("digest"),
    lambda r: r.update(digest=1), lambda r: r.update(calclib=[]),
])
def test_a_record_of_another_shape_is_never_clean_and_never_a_traceback(tmp_path, issued, change, capsys):
    record = json.loads(issued[".json"])
    change(record)
    path = tmp_path / "calc.json"
    path.write_text(json.dumps(record), encoding="utf-8")
    with RememberingIssuer() as issuer:
        issuer.built[load(DEMO).yaml()] = issued.files
        try:
            report = check(path, issuer)
        except __main__.CalcError as error:
            assert str(error).startswith(str(path))
        else:
            assert report.findings or report.numbers_only


# --- check: what a file asks for is not done ----------------------------------------------------------------------

@pytest.mark.parametrize("case, message", [
    (b"!!python/object/apply:os.system ['touch evil']", "tag:yaml.org,2002:python/object/apply:os.system is not "
     "allowed in a case"),
    (b"kind: pin_plate\nsubject: !!python/name:os.system\n", "is not allowed in a case"),
    (b"kind: pin_plate\nsubject: [a, b]\n", '"subject" must be one text'),
    (b"kind: [pin_plate]\n", "is not a kind of member"),
    (b"a: &a [x, x]\nb: &b [*a, *a]\nc: &c [*b, *b]\nkind: pin_plate\n", "must be one text"),
    (b"\xff\xfe", "is not a calc as it was issued, so it cannot be checked (UnicodeDecodeError"),
    (b"", "is not a case"),
])
def test_a_hostile_case_builds_nothing(refused, issued, tmp_path, monkeypatch, case, message):
    monkeypatch.chdir(tmp_path)
    page = issued[".html"].replace(base64.b64encode(issued[".yaml"]), base64.b64encode(case))
    assert message in refused("calc.html", page)
    assert message in refused("calc.pdf", attached(issued, yaml=case))
    assert [path.name for path in tmp_path.iterdir() if path.suffix not in (".pdf", ".html")] == []


def test_a_message_cannot_steer_a_terminal(refused, issued):
    page = issued[".html"].replace(base64.b64encode(issued[".yaml"]), base64.b64encode(b'kind: "\\e[2Jx"\n'))
    assert "\x1b" not in refused("calc.html", page)


def test_a_name_of_an_attached_file_is_no_path(tmp_path, issued):
    page = issued[".html"].replace(b'download="TC-101-rev-0', b'download="../../evil')
    path = tmp_path / "in" / "calc.html"
    path.parent.mkdir()
    path.write_bytes(page)
    with RememberingIssuer() as issuer:
        issuer.built[load(DEMO).yaml()] = issued.files
        assert check(path, issuer).status == ALTERED
    assert [each.name for each in tmp_path.rglob("*")] == ["in", "calc.html"]


def test_a_calc_number_in_a_file_is_no_path(refused, issued):
    record = json.loads(issued[".json"])
    record["inputs"]["calc_number"] = "../../evil"
    record["digest"] = from_record(record).digest
    assert refused("calc.json", json.dumps(record).encode()) == (
        'calc.json: nothing can be computed from the inputs it carries: calc_number: "../../evil" names a folder; use '
        'letters, digits, dot, dash and underscore, such as "S-101".')


def test_a_notebook_of_another_shape_is_never_clean_and_never_a_traceback(tmp_path, issued):
    with RememberingIssuer() as issuer:
        issuer.built[load(DEMO).yaml()] = issued.files
        for change in (lambda b: b["cells"].insert(0, 1), lambda b: b["cells"][0].pop("source"),
                       lambda b: b.update(cells={}), lambda b: b["metadata"].pop("calclib"),
                       lambda b: b["metadata"]["calclib"].update(typst=[]), lambda b: b["cells"][5].update(outputs=3),
                       lambda b: b["cells"][5]["outputs"][0]["data"].update({"text/plain": 5}),
                       lambda b: b["cells"][5].pop("id"), lambda b: b.update(nbformat="x")):
            book = json.loads(issued[".ipynb"])
            change(book)
            path = tmp_path / "calc.ipynb"
            path.write_bytes(pages.serialised(book))
            try:
                report = check(path, issuer)
            except __main__.CalcError as error:
                assert str(error).startswith((str(path), path.name))
            else:
                assert report.findings or report.numbers_only


# --- issue --------------------------------------------------------------------------------------------------------

def not_issued(capsys, *arguments):
    status = __main__.main(["issue", *map(str, arguments)])
    out, err = capsys.readouterr()
    assert (status, out) == (2, "")
    return err.rstrip("\n")


def test_no_case_is_issued(capsys, tmp_path):
    assert not_issued(capsys, tmp_path / "none.yaml", "--to", tmp_path) == \
        f"{tmp_path / 'none.yaml'}: cannot be read: No such file or directory."
    assert list(tmp_path.iterdir()) == []


def test_a_case_that_cannot_be_used_is_not_issued(capsys, tmp_path):
    path = tmp_path / "case.yaml"
    path.write_text(load(DEMO).with_texts(plate_width="8", calc_number="../x", date="").yaml(), encoding="utf-8")
    err = not_issued(capsys, path, "--to", tmp_path / "out")
    assert 'plate_width: 8 has no unit; write "13/16 in" or "20 mm".' in err.splitlines()
    assert ('calc_number: "../x" names a folder; use letters, digits, dot, dash and underscore, such as "S-101".'
            in err.splitlines())
    assert not (tmp_path / "out").exists()


def test_a_place_that_cannot_be_written_to(capsys, tmp_path, issued, monkeypatch):
    monkeypatch.setattr(issue.Issuer, "build", lambda self, case: issued.files)
    (tmp_path / "file").write_bytes(b"1")
    folder = tmp_path / "file" / "TC-101" / "rev-0"
    assert not_issued(capsys, DEMO, "--to", tmp_path / "file") == \
        f"{folder}: cannot be written: Not a directory. Nothing was issued."


def test_a_kind_without_a_workbook(monkeypatch, tmp_path):
    from calclib.members import KINDS
    monkeypatch.setattr(issue.calclib, "__file__", str(tmp_path / "calclib" / "__init__.py"))
    with pytest.raises(__main__.CalcError, match=r"no workbook pin_plate\.ipynb beside calclib; reinstall calclib"):
        issue.workbook_of(KINDS["pin_plate"])
