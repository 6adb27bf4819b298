"""The workbook without a browser: whatever is typed, however fast, the outputs end as those of the last good case."""

import os
import time
from itertools import count
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from calclib import bundles, case, document, live, workbook
from calclib.errors import CalcError, CaseErrors, EntryError
from calclib.issuing import pages

CASES = Path(__file__).parent.parent.parent / "workbooks" / "cases"
KINDS = {"pin_plate": "hanger_plate", "threaded_rod": "sag_rod"}
EDITS = {
    "pin_plate": [("plate_thickness", "1-1/4 in"), ("plate_thickness", "7/8 in"), ("plate_thickness", "banana"),
                  ("hole_diameter", "2-9/16 in"), ("required_strength", "30 kip"), ("required_strength", "900 kip"),
                  ("units", "SI"), ("units", "US"), ("method", "ASD"), ("project", "$x$ <b>"), ("pin_diameter", "9 in"),
                  ("corner_distance", ""), ("end_distance", "3 in")],
    "threaded_rod": [("required_strength", "20 kip"), ("required_strength", "2 kip"), ("rod_diameter", "1 in"),
                     ("rod_diameter", "banana"), ("shank_length", ""), ("service_load", ""), ("fitting", "none"),
                     ("fitting_rating", ""), ("thread_series", "UNF")],
}


class Page:
    """Stands in for the notebook: keeps what is displayed, in order, and paints with or without being asked twice."""

    def __init__(self, monkeypatch):
        self.outputs = {}
        self.numbers = count()
        monkeypatch.setattr(live, "display", self.display)
        monkeypatch.setattr(live, "SETTLE", 0.02)
        monkeypatch.setattr(live, "PATIENCE", 0.02)

    def display(self, data, raw, display_id, metadata):
        number = next(self.numbers)
        self.outputs[number] = (data, metadata)
        return Handle(self.outputs, number)

    def notebook(self):
        cells = [{"cell_type": "code", "metadata": {}, "outputs": [
            {"output_type": "display_data", "data": data, "metadata": metadata}]}
            for data, metadata in self.outputs.values()]
        return {"cells": cells}


class Handle:
    def __init__(self, outputs, number):
        self.outputs, self.number = outputs, number

    def update(self, data, raw, metadata):
        self.outputs[self.number] = (data, metadata)


@pytest.fixture
def page(monkeypatch):
    return Page(monkeypatch)


@pytest.fixture
def person(monkeypatch):
    """Somebody sits at the notebook."""
    monkeypatch.setenv("JPY_SESSION_NAME", "workbooks/x.ipynb")
    monkeypatch.delenv("CALCLIB_BATCH", raising=False)
    monkeypatch.setattr(workbook, "display", lambda form: None)


def opened(kind, **texts):
    """Return a workbook of which everything is shown."""
    book = workbook.open_workbook(kind, {"case": str(CASES / f"{KINDS[kind]}.yaml"), **texts})
    book.form()
    for group in document.SECTIONS:
        book.show(group.__name__)
    book.close()
    return book


def typed(book, name, text):
    """Deliver a key stroke as the kernel would, and return the reply."""
    book._form._handle_custom_msg({"id": "v.1", "edits": [[name, text]], "press": None,
                                   "in_view": []}, [])
    return book._form.reply


def wait_for(made):
    deadline = time.monotonic() + 60
    while not made():
        assert time.monotonic() < deadline, "nothing happened in time"
        time.sleep(0.005)


def calc_stored(page):
    return next(data[bundles.CALC] for data, _ in page.outputs.values() if bundles.CALC in data)


def await_quiet(book, page):
    """Wait until the stored calc is the last good one, with vectors in every picture."""
    deadline = time.monotonic() + 60
    while True:
        assert time.monotonic() < deadline, "the outputs did not come to rest"
        try:
            stored, _, _ = pages.document_of(page.notebook())
        except CalcError:  # outputs of two calcs, which the exporters refuse
            stored = None
        if stored and stored["digest"] == book.calc.case.digest and all(
                node["svg"] for section in stored["sections"] for node in section["nodes"] if node["type"] == "figure"):
            return stored
        time.sleep(0.005)


def last_good(kind, edits):
    """Return the last case along the edits that can be computed, from the equations alone."""
    texts, good = {}, case.load(CASES / f"{KINDS[kind]}.yaml")
    start = good
    for name, text in edits:
        texts[name] = text
        changed = start.with_texts(**texts)
        try:
            workbook.evaluate(changed)
        except (CalcError, CaseErrors, EntryError):
            continue
        good = changed
    return good


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=4, suppress_health_check=list(HealthCheck))
@given(data=st.data())
def test_a_burst_of_edits_ends_with_everything_as_of_the_last_good_case(kind, data):
    with pytest.MonkeyPatch.context() as monkeypatch:
        monkeypatch.setitem(os.environ, "JPY_SESSION_NAME", "x")
        monkeypatch.delenv("CALCLIB_BATCH", raising=False)
        monkeypatch.setattr(workbook, "display", lambda form: None)
        page = Page(monkeypatch)
        book = opened(kind)
        paints = data.draw(st.booleans())
        monkeypatch.setattr(book._form, "send", lambda content: paints and book.outputs.painted(content["drawn"]))
        edits = data.draw(st.lists(st.sampled_from(EDITS[kind]), min_size=1, max_size=8))
        pauses = data.draw(st.lists(st.sampled_from([0, 0, 0.01, 0.15]), min_size=8, max_size=8))
        for (name, text), pause in zip(edits, pauses, strict=False):
            typed(book, name, text)
            time.sleep(pause)
        good = last_good(kind, edits)
        assert book.calc.case.digest == good.digest
        stored = await_quiet(book, page)
        assert stored == document_of(good)
        stamps = book._form.reply["stamp"].split()
        assert all(output.stamp in stamps for output in book.outputs.shown.values() if output.stamp)


def document_of(good):
    """Return the document of a case as a notebook that never saw an edit would give it."""
    made = document.document(workbook.evaluate(good))
    for section in made["sections"]:
        for node in section["nodes"]:
            if node["type"] == "figure":
                node.pop("png", None)
    return made


def test_outputs_of_two_calcs_are_refused_by_the_exporters(page, person, monkeypatch):
    book = opened("pin_plate")
    monkeypatch.setattr(live, "SETTLE", 60)
    before = book.calc.case.digest
    typed(book, "plate_thickness", "1-1/4 in")
    wait_for(lambda: any("1-1/4" in data.get("text/markdown", "") for data, _ in page.outputs.values()))
    assert calc_stored(page)["document"]["digest"] == before
    with pytest.raises(CalcError, match="was made from other inputs than the calc"):
        pages.document_of(page.notebook())


def test_an_entry_that_cannot_be_used_leaves_the_calc_and_says_so(page, person):
    book = opened("pin_plate")
    before = dict(page.outputs)
    reply = typed(book, "hole_diameter", "banana")
    assert "is not a number with a unit" in reply["messages"]["hole_diameter"] and not reply["ok"]
    assert reply["status"] == "The calc below is the last good one; see the message beside the field."
    assert page.outputs == before
    with pytest.raises(CalcError, match="Nothing was saved"):
        book._save()


def test_what_is_in_view_is_replaced_first_then_equations_then_the_rest(page, person, monkeypatch):
    book = opened("pin_plate")
    order = []

    def noted(self, data, raw, metadata):
        if self.outputs is page.outputs:  # a workbook of an earlier test may still be bringing its own up to date
            order.append(self.number)

    monkeypatch.setattr(Handle, "update", noted)
    numbers = dict(zip(book.outputs.shown, page.outputs, strict=True))
    seen = [key for key, output in book.outputs.shown.items() if "text/latex" in output.data][2]
    book._form.in_view = [book.outputs.shown[seen].stamp]
    with book.lock:
        book._judge("plate_thickness", "", {**book.case.texts, "plate_thickness": "1-1/4 in"})
    wait_for(lambda: len(order) >= 8)
    assert order[0] == numbers[seen]
    keys = {number: key for key, number in numbers.items()}
    groups = [keys[number][0] for number in order]
    assert groups[1:5] == ["strength"] * 4


def test_work_that_fails_is_shown_in_the_form(page, person, monkeypatch):
    book = opened("pin_plate")
    monkeypatch.setattr(document, "base64", None)  # the drawing cannot be stored
    typed(book, "plate_thickness", "1-1/4 in")
    wait_for(lambda: book._form.reply["error"])
    assert book._form.reply["error"].startswith("AttributeError") and book._form.reply["stamp"] == ""


@pytest.mark.parametrize("path", sorted(CASES.glob("*.yaml")), ids=lambda path: path.stem)
def test_every_kind_keeps_its_places_whatever_is_chosen_or_left_blank(path):
    start = case.load(path)

    def places(calc):
        return [key for group in document.SECTIONS for key in workbook.Workbook._made(group.__name__, calc, None)]

    usual, tried = places(workbook.evaluate(start)), 0
    for field in start.kind.all_fields():
        for text in (*field.choices[:8], ""):
            try:
                calc = workbook.evaluate(start.with_texts(**{field.name: text}))
            except CalcError:
                continue
            tried += 1
            assert places(calc) == usual, (field.name, text)
    assert tried > 20


def test_the_form_says_what_a_blank_choice_means_and_follows_the_units(page, person):
    book = opened("pin_plate")
    spec = {field["name"]: field for field in book._form.fields}
    assert spec["page"]["blank"] == "letter, by default" and spec["plate_thickness"]["unit"] == "in"
    typed(book, "units", "SI")
    spec = {field["name"]: field for field in book._form.fields}
    assert spec["page"]["blank"] == "A4, by default" and spec["plate_thickness"]["unit"] == "mm"


def test_saving_refuses_a_file_that_somebody_else_changed(page, person, tmp_path):
    path = tmp_path / "a.yaml"
    path.write_text((CASES / "hanger_plate.yaml").read_text(encoding="utf-8"), encoding="utf-8", newline="\n")
    book = workbook.open_workbook("pin_plate", {"case": str(path)})
    book.form()
    typed(book, "plate_thickness", "1-1/4 in")
    assert book._form.press("save")["notice"]["text"] == f"Saved to {path}."
    assert case.load(path).texts["plate_thickness"] == "1-1/4 in"
    case.save(case.load(path).with_texts(project="Somebody else's"))
    typed(book, "plate_thickness", "1-1/2 in")
    assert "somebody else changed this case" in book._form.press("save")["notice"]["text"]
    assert case.load(path).texts["project"] == "Somebody else's"


def test_inputs_of_the_parameters_cell(page):
    book = opened("pin_plate", plate_thickness="1-1/4 in", project="")
    assert book.case.texts["plate_thickness"] == "1-1/4 in" and book.case.texts["project"] != ""
    with pytest.raises(CaseErrors, match="plate_thicknes"):
        opened("pin_plate", plate_thicknes="1 in")
    with pytest.raises(CalcError, match='is a case of kind "threaded_rod"; this workbook is for "pin_plate"'):
        workbook.open_workbook("pin_plate", {"case": str(CASES / "sag_rod.yaml")})
