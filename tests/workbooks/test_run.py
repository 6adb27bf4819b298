"""The committed workbooks: what they hold, what is stored in them, and how papermill runs them."""

import importlib.util
import json

import nbformat
import papermill
import pytest
from issued import ROOT

from calclib import bundles
from calclib.calc import evaluate
from calclib.case import load
from calclib.document import SECTIONS, detailing
from calclib.issuing import pages
from calclib.members import KINDS
from calclib.record import record

FOLDER = ROOT / "workbooks"
# What a notebook viewer shows as it is, trusted or not: no HTML, no script, no SVG.
_PLAIN = {"text/latex", "text/markdown", "image/png", "text/plain", bundles.SECTION, bundles.CALC}


def stored(kind):
    return nbformat.read(FOLDER / f"{kind}.ipynb", as_version=4)


@pytest.fixture(scope="module")
def maker():
    """The script that writes the workbooks."""
    path = ROOT / ".ci" / "make_workbooks.py"
    spec = importlib.util.spec_from_file_location("make_workbooks", path)
    module = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(module)
    return module


def test_every_kind_has_a_workbook_and_nothing_else_is_there():
    assert {path.stem for path in FOLDER.glob("*.ipynb")} == set(KINDS)


@pytest.mark.parametrize("kind", KINDS)
def test_a_workbook_is_what_its_kind_says(maker, kind):
    said = [(cell.cell_type, cell.id, cell.source, cell.metadata) for cell in maker.workbook(KINDS[kind]).cells]
    assert [(cell.cell_type, cell.id, cell.source, cell.metadata) for cell in stored(kind).cells] == said


@pytest.mark.parametrize("kind", KINDS)
def test_the_parameters_are_the_inputs_of_the_kind_and_nothing_else(kind):
    cells = [cell for cell in stored(kind).cells if "parameters" in cell.metadata.get("tags", [])]
    names = {}
    exec(cells[0].source, {}, names)    # our own cell, which papermill reads
    assert len(cells) == 1
    assert list(names) == ["case", *(each.name for each in KINDS[kind].all_fields())]
    assert set(names.values()) - {names["case"]} == {""}
    assert load(FOLDER / names["case"]).kind is KINDS[kind]


@pytest.mark.parametrize("kind", KINDS)
def test_every_section_is_stored_and_reads_truly_before_the_notebook_is_trusted(maker, kind):
    book = stored(kind)
    by_name = {cell.id: cell for cell in book.cells}
    calc = evaluate(load(FOLDER / "cases" / f"{maker.DEMO[kind]}.yaml"))
    for section in SECTIONS:   # a kind without detailing rules has no such section
        made = (section is detailing and not calc.rules) or by_name[section.__name__.replace("_", "-")].outputs
        assert made, section.__name__
    for cell in book.cells:
        for output in cell.get("outputs", []):
            assert output.output_type == "display_data"
            assert set(output.data) <= _PLAIN
            assert {"text/plain"} < set(output.data)
    assert "widgets" not in book.metadata


@pytest.mark.parametrize("kind", KINDS)
def test_what_is_stored_is_the_calc_of_the_case_as_it_is_computed_now(maker, kind):
    document, case, made = pages.document_of(json.loads(json.dumps(stored(kind))))
    calc = evaluate(load(FOLDER / "cases" / f"{maker.DEMO[kind]}.yaml"))
    assert case == calc.case.yaml()
    assert made == json.loads(json.dumps(record(calc)))
    assert document["digest"] == calc.case.digest


# --- papermill ----------------------------------------------------------------------------------------------------

def run(tmp_path, kind, **parameters):
    """Run a workbook as a checker does, from its folder, and return the notebook."""
    out = tmp_path / "out.ipynb"
    papermill.execute_notebook(FOLDER / f"{kind}.ipynb", out, parameters, cwd=FOLDER, progress_bar=False,
                               kernel_name="python3", log_output=False)
    return nbformat.read(out, as_version=4)


def test_papermill_runs_a_workbook_with_other_inputs(tmp_path):
    before = (FOLDER / "cases" / "hanger_plate.yaml").read_bytes()
    book = run(tmp_path, "pin_plate", case="cases/hanger_plate.yaml", plate_thickness="1-1/4 in")
    _, case, made = pages.document_of(json.loads(json.dumps(book)))
    assert 'plate_thickness: "1-1/4 in"\n' in case
    expected = record(evaluate(load(FOLDER / "cases" / "hanger_plate.yaml").with_texts(plate_thickness="1-1/4 in")))
    assert made == json.loads(json.dumps(expected))
    assert (FOLDER / "cases" / "hanger_plate.yaml").read_bytes() == before    # a run writes nothing


@pytest.mark.parametrize("name, value, message", [
    ("plate_thicknes", "1 in", 'unknown input "plate_thicknes"; did you mean "plate_thickness"?'),
    ("plate_thickness", "1-1/4", "plate_thickness: 1-1/4 has no unit"),
    ("case", "cases/none.yaml", "cases/none.yaml: cannot be read"),
    ("case", "cases/sag_rod.yaml", 'is a case of kind "threaded_rod"; this workbook is for "pin_plate".'),
])
def test_papermill_is_refused_what_cannot_be_used(tmp_path, name, value, message):
    with pytest.raises(papermill.exceptions.PapermillExecutionError) as refusal:
        run(tmp_path, "pin_plate", **{name: value})
    assert message in str(refusal.value)


