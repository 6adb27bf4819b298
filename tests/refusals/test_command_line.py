"""The command line: what it prints, and where errors go. Issue and check have tests of their own."""

import json
import os
import subprocess
import sys
from pathlib import Path

import pytest
from samples import plate

from calclib.__main__ import main
from calclib.calc import evaluate
from calclib.members import KINDS
from calclib.record import results

ROOT = Path(__file__).parent.parent.parent


def run(capsys, *arguments):
    """Return (status, standard output, standard error)."""
    status = main(list(arguments))
    return status, *capsys.readouterr()


@pytest.fixture
def case_file(tmp_path):
    def write(**changes):
        path = tmp_path / "plate.yaml"
        path.write_text(plate(**changes).yaml(), encoding="utf-8", newline="\n")
        return str(path)
    return write


@pytest.mark.parametrize("kind", KINDS)
def test_fields_lists_every_input_with_unit_meaning_default_and_range(capsys, kind):
    status, out, err = run(capsys, "fields", kind)
    assert (status, err) == (0, "")
    for field in KINDS[kind].all_fields():
        assert f"  {field.name}: {field.meaning}\n" in out
    assert "in or mm" in out
    assert "kip or kN" in out


def test_fields_states_the_facts_of_a_field(capsys):
    _, out, _ = run(capsys, "fields", "pin_plate")
    for line in ("plate_thickness: Thickness of the plate at the pin.\n"
                 "      unit: in or mm; allowed: above 0; required\n", "allowed: one of: LRFD, ASD; required\n",
                 "allowed: one of: yes, no; default: yes\n",
                 "allowed: one of: letter, A4; default: letter or A4\n", "unit: in or mm; allowed: above 0; optional\n",
                 "allowed: any text; required\n"):
        assert line in out


def test_results_prints_the_results_as_json(capsys, case_file):
    status, out, err = run(capsys, "results", case_file())
    assert (status, err) == (0, "")
    assert json.loads(out) == json.loads(json.dumps(results(evaluate(plate()))))
    assert json.loads(out)["governing"] == {"key": "pin bearing", "title": "Bearing on the pin",
                                            "ratio": pytest.approx(148 / 168.75)}


def test_results_of_a_calc_that_fails_are_results(capsys, case_file):
    status, out, _ = run(capsys, "results", case_file(required_strength="700 kip"))
    assert status == 0
    assert json.loads(out)["passes"] is False


def test_errors_go_to_standard_error_with_status_2(capsys, case_file):
    status, out, err = run(capsys, "results", case_file(hole_diameter="3 in", plate_width="8"))
    assert (status, out) == (2, "")
    assert err == 'plate_width: 8 has no unit; write "13/16 in" or "20 mm".\n'


@pytest.mark.parametrize("arguments, message", [
    (["fields", "eyebrow"], f'"eyebrow" is not a kind of member; the kinds are: {", ".join(KINDS)}.\n'),
    (["fields", "pin_plat"], f'"pin_plat" is not a kind of member; the kinds are: {", ".join(KINDS)}; did you mean '
     '"pin_plate"?\n'),
    (["results", "none.yaml"], "none.yaml: cannot be read: No such file or directory.\n"),
])
def test_errors(capsys, arguments, message):
    assert run(capsys, *arguments) == (2, "", message)


@pytest.mark.parametrize("arguments", [[], ["solve"], ["results"], ["fields", "pin_plate", "more"]])
def test_a_wrong_command_exits_with_status_2_and_the_usage(capsys, arguments):
    with pytest.raises(SystemExit) as caught:
        main(arguments)
    assert caught.value.code == 2
    out, err = capsys.readouterr()
    assert out == ""
    assert err.startswith("usage: python -m calclib")


def test_the_module_runs_and_shows_no_traceback(tmp_path):
    """As a person runs it, with an accent in the case and a terminal of plain ASCII."""
    path = tmp_path / "plate.yaml"
    path.write_text(plate(project="Brücke", calc_number="Ü 1").yaml(), encoding="utf-8", newline="\n")
    done = subprocess.run([sys.executable, "-m", "calclib", "results", str(path)], capture_output=True, timeout=60,
                          check=False)
    assert done.returncode == 2
    assert b"Traceback" not in done.stderr
    assert done.stderr.startswith(b"calc_number: ")
    assert done.stdout == b""


@pytest.mark.parametrize("arguments", [["fields", "pin_plate"], ["results", "plate.yaml"]])
def test_a_pipe_of_another_encoding_gets_utf_8(tmp_path, arguments):
    (tmp_path / "plate.yaml").write_text(plate(remarks="½″ φ").yaml(), encoding="utf-8", newline="\n")
    done = subprocess.run([sys.executable, "-m", "calclib", *arguments], capture_output=True, timeout=60, check=True,
                          cwd=tmp_path, env={**os.environ, "PYTHONIOENCODING": "ascii", "PYTHONPATH": str(ROOT)})
    assert done.stdout.decode("utf-8")
    assert done.stderr == b""
