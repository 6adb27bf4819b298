"""Issue: one folder a revision, whole or not at all, the same bytes every time, in a clean run."""

import os
import shutil
import subprocess
import sys
import time

import nbformat
import pytest
from issued import DEMO, ROOT, RememberingIssuer, demo

from calclib import __main__
from calclib.checking import IDENTICAL, check
from calclib.errors import CalcError
from calclib.issuing import issue
from calclib.issuing.issue import Issuer

SUFFIXES = (".pdf", ".html", ".ipynb", ".json", ".yaml")


@pytest.fixture(scope="module")
def issuer():
    with RememberingIssuer() as made:
        yield made


@pytest.fixture(scope="module")
def issued(issuer):
    return demo(issuer)


def contents(folder):
    return {path.relative_to(folder).as_posix(): path.read_bytes() for path in folder.rglob("*") if path.is_file()}


def test_issue_prints_its_paths_one_a_line_and_a_second_issue_changes_nothing(tmp_path, issued, capsys, monkeypatch):
    monkeypatch.chdir(tmp_path)
    assert __main__.main(["issue", str(DEMO)]) == 0
    out = capsys.readouterr().out
    assert out.splitlines() == [os.path.join("exports", "TC-101", "rev-0", f"TC-101-rev-0{s}") for s in SUFFIXES]
    folder = tmp_path / "exports" / "TC-101"
    assert contents(folder / "rev-0") == issued.files
    assert [path.name for path in folder.iterdir()] == ["rev-0"]
    stamps = [os.stat(path).st_mtime_ns for path in folder.rglob("*")]
    assert __main__.main(["issue", str(DEMO), "--to", "exports"]) == 0
    assert capsys.readouterr().out == out
    assert [os.stat(path).st_mtime_ns for path in folder.rglob("*")] == stamps


def test_several_cases_are_issued_one_after_the_other(tmp_path, capsys):
    rod = ROOT / "workbooks" / "cases" / "sag_rod.yaml"
    assert __main__.main(["issue", str(DEMO), str(rod), "--to", str(tmp_path)]) == 0
    assert len(capsys.readouterr().out.splitlines()) == 10
    with Issuer() as issuer:
        for folder in tmp_path.glob("*/rev-*"):
            assert check(folder, issuer).status == IDENTICAL


@pytest.mark.parametrize("exporter, suffix", [("calc-pdf", ".pdf"), ("calc-html", ".html")])
def test_nbconvert_makes_the_same_bytes_by_the_short_name(tmp_path, issued, exporter, suffix):
    notebook = tmp_path / issued.name(".ipynb")
    notebook.write_bytes(issued[".ipynb"])
    done = subprocess.run([sys.executable, "-m", "nbconvert", "--to", exporter, str(notebook), "--output-dir",
                           str(tmp_path / "out")], capture_output=True, text=True, timeout=120, check=False)
    assert done.returncode == 0, done.stderr
    assert contents(tmp_path / "out") == {issued.name(suffix): issued[suffix]}


# --- a clean run --------------------------------------------------------------------------------------------------

def test_the_run_is_clean_of_settings_and_files_of_the_user(tmp_path, issued):
    """Start-up files, plot settings, and modules in the folder where the command is given."""
    (tmp_path / "profile_default" / "startup").mkdir(parents=True)
    evil = f"open({str(tmp_path / 'ran')!r}, 'a').close()\n"
    (tmp_path / "profile_default" / "startup" / "00.py").write_text(evil, encoding="utf-8")
    (tmp_path / "startup.py").write_text(evil, encoding="utf-8")
    (tmp_path / "matplotlibrc").write_text("lines.linewidth: 9\nfont.size: 20\nsavefig.dpi: 30\n", encoding="utf-8")
    here = tmp_path / "here"
    here.mkdir()
    for name in ("handcalcs.py", "pint.py", "typst.py", "antigravity.py", "sitecustomize.py"):
        (here / name).write_text(evil, encoding="utf-8")
    environment = {**os.environ, "IPYTHONDIR": str(tmp_path), "PYTHONSTARTUP": str(tmp_path / "startup.py"),
                   "MATPLOTLIBRC": str(tmp_path / "matplotlibrc"), "TZ": "Pacific/Kiritimati", "LC_ALL": "C"}
    script = ("import sys; sys.path.remove(''); from calclib.__main__ import main; "
              f"sys.exit(main(['issue', {str(DEMO)!r}, '--to', 'out']))")
    done = subprocess.run([sys.executable, "-c", script], cwd=here, env=environment,
                          capture_output=True, text=True, timeout=120, check=False)
    assert done.returncode == 0, done.stderr
    assert done.stderr == ""
    assert contents(here / "out" / "TC-101" / "rev-0") == issued.files
    assert not (tmp_path / "ran").exists()


def test_one_run_leaves_nothing_to_the_next(tmp_path, issued):
    """Names, and the settings of the drawing library, of a workbook that ran before in the same kernel."""
    with RememberingIssuer() as issuer:
        issuer.run_in_kernel("plate_width = '99 in'\ncase = 'none'\nimport matplotlib\n"
                             "matplotlib.rcParams['lines.linewidth'] = 9\nmatplotlib.rcParams['font.size'] = 20\n")
        assert demo(issuer).files == issued.files


# --- never overwritten --------------------------------------------------------------------------------------------

REFUSAL = ("{}: this revision is issued already, with other content. An issued revision is never overwritten: raise "
           "the revision in the case, or issue to another folder.")


def other_case(tmp_path, **texts):
    from calclib.case import load
    path = tmp_path / "case.yaml"
    path.write_text(load(DEMO).with_texts(**texts).yaml(), encoding="utf-8", newline="\n")
    return path


def test_another_calc_under_an_issued_revision_is_refused(tmp_path, issuer, issued):
    issuer.issue(DEMO, tmp_path)
    before = contents(tmp_path)
    with pytest.raises(CalcError) as refusal:
        issuer.issue(other_case(tmp_path, required_strength="150 kip"), tmp_path)
    assert str(refusal.value) == REFUSAL.format(tmp_path / "TC-101" / "rev-0")
    assert {name: content for name, content in contents(tmp_path).items() if name != "case.yaml"} == before
    assert "rev-1" in str(issuer.issue(other_case(tmp_path, required_strength="150 kip", revision="1"), tmp_path)[0])


@pytest.mark.parametrize("change", ["signed", "more", "less", "a folder more"])
def test_an_issued_folder_that_was_changed_is_left_alone(tmp_path, issuer, issued, change):
    folder = issued.write(tmp_path / "TC-101" / "rev-0")
    if change == "signed":
        (folder / issued.name(".pdf")).write_bytes(issued[".pdf"] + b"signature")
    elif change == "more":
        (folder / "letter.txt").write_bytes(b"1")
    elif change == "less":
        (folder / issued.name(".pdf")).unlink()
    else:
        (folder / "sub").mkdir()
    before = contents(folder)
    with pytest.raises(CalcError) as refusal:
        issuer.issue(DEMO, tmp_path)
    assert str(refusal.value) == REFUSAL.format(folder)
    assert contents(folder) == before


# --- whole or not at all ------------------------------------------------------------------------------------------

def test_a_process_killed_at_any_moment_leaves_a_whole_folder_or_none(tmp_path, issued):
    """Killed while the workbook runs, and as each of the five files stands in the folder that is being written."""
    made = issued.write(tmp_path / "made")
    out = tmp_path / "out"
    killed([sys.executable, "-m", "calclib", "issue", str(DEMO), "--to", str(out)], lambda process: time.sleep(2))
    assert_whole_or_none(out, issued)
    for number in (5, 4, 3, 2, 1, 0):
        killed([sys.executable, "-c", SLOWLY, str(DEMO), str(out), str(made)],
               lambda process, number=number: wait_until_written(out, process, number))
        assert_whole_or_none(out, issued)
        shutil.rmtree(out / "TC-101" / "rev-0", ignore_errors=True)
    assert any(path.name.startswith(".") for path in (out / "TC-101").iterdir())
    subprocess.run([sys.executable, "-c", SLOWLY, str(DEMO), str(out), str(made)], check=True,
                   stdout=subprocess.DEVNULL)
    assert [path.name for path in (out / "TC-101").iterdir()] == ["rev-0"]   # the rest was swept
    assert contents(out / "TC-101" / "rev-0") == issued.files


# Issues what was built before, file by file with a pause.
SLOWLY = """
import pathlib, sys, time
from calclib import case
from calclib.__main__ import main
from calclib.issuing.issue import Issuer
write = case.write_whole

def slowly(path, content):
    time.sleep(0.05)
    write(path, content)

case.write_whole = slowly
Issuer.build = lambda self, case: {path.name: path.read_bytes() for path in pathlib.Path(sys.argv[3]).iterdir()}
sys.exit(main(["issue", sys.argv[1], "--to", sys.argv[2]]))
"""


def killed(command, wait):
    folder = command[-1]     # where it leaves what it had open, too
    process = subprocess.Popen(command, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL,
                               env={**os.environ, "TMPDIR": os.path.dirname(folder)})
    wait(process)
    process.kill()
    process.wait()


def wait_until_written(folder, process, number):
    """Wait until `number` files stand in a new folder that is not in place yet."""
    old = {path.name for path in folder.glob("TC-101/.rev-0-*")}
    while process.poll() is None:
        for path in folder.glob("TC-101/.rev-0-*"):
            if path.name not in old and len(list(path.glob("TC*"))) >= number:
                return
        time.sleep(0.001)


def assert_whole_or_none(folder, issued):
    made = folder / "TC-101" / "rev-0"
    if made.exists():
        assert contents(made) == issued.files


def test_what_a_process_was_still_writing_is_never_put_in_place_half_swept(tmp_path, issued, monkeypatch):
    """Two issues of one revision at the same time: one sweeps what the other writes."""
    folder = tmp_path / "TC-101" / "rev-0"
    write, count = issue.cases.write_whole, []

    def interrupted(path, content):
        write(path, content)
        count.append(path)
        if len(count) == 3:
            issue._sweep(folder)

    monkeypatch.setattr(issue.cases, "write_whole", interrupted)
    with pytest.raises(OSError, match="No such file"):
        issue._write_folder(folder, issued.files)
    assert not folder.exists()
    assert list(folder.parent.iterdir()) == []


def test_a_failure_while_writing_leaves_nothing(tmp_path, issuer, monkeypatch):
    def full(path, content):
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(issue.cases, "write_whole", full)
    with pytest.raises(CalcError) as refusal:
        issuer.issue(DEMO, tmp_path)
    assert str(refusal.value) == (f"{tmp_path / 'TC-101' / 'rev-0'}: cannot be written: No space left on device. "
                                  "Nothing was issued.")
    assert list((tmp_path / "TC-101").iterdir()) == []


# --- workbooks that fail ------------------------------------------------------------------------------------------

@pytest.mark.parametrize("source, message", [
    ("raise ValueError('no such plate')", "the workbook stopped in cell 4 with ValueError: no such plate. Nothing was "
     "issued."),
    ("import os; os._exit(1)", "the workbook gave no answer in cell 4. Nothing was issued."),
])
def test_a_workbook_that_fails_issues_nothing(tmp_path, monkeypatch, source, message):
    book = nbformat.read(ROOT / "workbooks" / "pin_plate.ipynb", as_version=4)
    book.cells[2].source = source      # cell 4, once the case is put in
    nbformat.write(book, tmp_path / "book.ipynb")
    monkeypatch.setattr(issue, "workbook_of", lambda kind: tmp_path / "book.ipynb")
    with Issuer() as issuer, pytest.raises(CalcError) as refusal:
        issuer.issue(DEMO, tmp_path / "out")
    assert str(refusal.value) == message
    assert not (tmp_path / "out").exists()


def test_the_versions_that_decide_the_bytes_are_those_that_are_pinned():
    pinned = (ROOT / ".ci" / "versions.txt").read_text(encoding="utf-8")
    names = {line.partition("==")[0].lower() for line in pinned.splitlines() if "==" in line}
    assert names == set(issue.made_with()) - {"calclib"}
