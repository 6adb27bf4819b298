"""A person at the workbook: runs it, types, reads, mistypes, presses keys. Driven in JupyterLab in a real browser."""

import re
import shutil

import nbformat
import pytest
from lab import PANEL, READY, RUN_ALL, ready
from nbclient import NotebookClient

from calclib import case, units
from calclib.calc import evaluate

HOSTILE = {
    "project": r"Pier $x$ <b>bold</b> `*a*` \backslash {_q_} | &amp; ~~no~~ # 100%",
    "subject": r"\frac{1}{2} $$y$$ <script>document.title='run'</script> [a](b) ![c](d)",
    "load_source": r"\(z\) and \[w\] and \$5$ <img src=x> & 1.2D + 1.6S",
    "steel": r"$A36$ \textbf{x} __b__ <i>",
    "remarks": "* star $k$\n# head <u>\n1. one\n> quote \\alpha",
}


def field(page, label):
    return page.locator(".calc-form").get_by_label(re.compile(f"^{label}")).first


def enter(page, label, text):
    """Type over a field, key by key for the last one."""
    control = field(page, label)
    control.fill(text[:-1])
    control.press_sequentially(text[-1])


def equations(page):
    """Return the text of every typeset equation, from the mathematics that screen readers are given."""
    return page.locator(".jp-Notebook mjx-container math").evaluate_all("all => all.map(one => one.textContent)")


def pictures(page):
    return page.locator(".jp-Notebook .jp-OutputArea-output img").evaluate_all("all => all.map(one => one.src)")


def cells(page):
    """Return id and source of every cell of the notebook itself; the page holds only those near the view."""
    return page.evaluate(f"[...{PANEL}.context.model.cells].map(cell => [cell.id, cell.sharedModel.getSource()])")


def texts(page):
    """Return the text of every output without its formulas."""
    return page.locator(".jp-Notebook .jp-OutputArea-output").evaluate_all("""all => all.map(one => {
        const copy = one.cloneNode(true);
        for (const formula of copy.querySelectorAll('mjx-container')) formula.remove();
        return copy.textContent;
    })""")


def outputs(page):
    """Return [stamps printed, holds a picture, marked stale] of each cell's outputs that print a stamp."""
    return page.locator(".jp-Notebook .jp-Cell-outputWrapper").evaluate_all("""all => all.map(one => [
        [...one.textContent.matchAll(/stamp\\s+([0-9a-f]{8})/g)].map(found => found[1]),
        Boolean(one.querySelector('img')), one.classList.contains('calc-stale-output'),
    ]).filter(each => each[0].length)""")


def wait_for(page, made, seconds=60):
    """Wait until `made()` is true; it is asked again and again."""
    for _ in range(seconds * 20):
        if made():
            return
        page.wait_for_timeout(50)
    raise AssertionError("the page did not change in time")


def at_rest(page):
    """Wait until the workbook shows everything and nothing is marked."""
    wait_for(page, lambda: len(outputs(page)) > 8 and len(equations(page)) > 3 and len(pictures(page)) > 2)
    wait_for(page, lambda: not any(stale for _, _, stale in outputs(page)))


def test_typing_changes_equations_sketch_and_plots(workbook, lab):
    page = workbook("pin_plate")
    at_rest(page)
    assert page.locator(".calc-form").evaluate("""form => {
        const page = form.closest('.jp-WindowedPanel-outer').getBoundingClientRect();
        const top = form.getBoundingClientRect().top;
        return top >= page.top - 10 && top < page.bottom;
    }"""), "after the run the form is in view"
    start = case.load(lab[1] / "workbooks/cases/hanger_plate.yaml")
    for label, name, text in (("Plate thickness", "plate_thickness", "1-1/4 in"),
                              ("Hole diameter", "hole_diameter", "2-9/16 in")):
        before = pictures(page)
        start = start.with_texts(**{name: text})
        wanted = {units.text(block.available, units.FORCE, "US").split()[0]
                  for block in evaluate(start).limit_states if block.available}
        enter(page, label, text)
        wait_for(page, lambda wanted=wanted: all(any(each in shown for shown in equations(page)) for each in wanted))
        wait_for(page, lambda before=before: all(a != b for a, b in zip(before, pictures(page), strict=True)))
    at_rest(page)

    good, drawn = equations(page), pictures(page)
    enter(page, "Hole diameter", "banana")
    page.locator(".calc-form").get_by_text("is not a number with a unit").wait_for()
    assert field(page, "Hole diameter").get_attribute("aria-invalid") == "true"
    page.get_by_text("The calc below is the last good one").wait_for()
    page.wait_for_timeout(500)
    assert (equations(page), pictures(page)) == (good, drawn)

    enter(page, "Hole diameter", "2-17/32 in")
    wait_for(page, lambda: equations(page) != good)
    assert field(page, "Hole diameter").get_attribute("aria-invalid") == "false"
    at_rest(page)


def test_fast_typing_ends_with_everything_of_the_last_entry(workbook, lab):
    page = workbook("pin_plate")
    at_rest(page)
    control = field(page, "Required strength")
    control.fill("")
    control.press_sequentially("123.4 kip", delay=20)
    field(page, "Plate width").fill("")
    field(page, "Plate width").press_sequentially("8-1/2 in", delay=40)
    changed = case.load(lab[1] / "workbooks/cases/hanger_plate.yaml").with_texts(
        required_strength="123.4 kip", plate_width="8-1/2 in")
    wait_for(page, lambda: any(changed.digest in each for each in texts(page)))
    at_rest(page)
    calc = evaluate(changed)
    for block in calc.limit_states:
        if block.available:
            printed = units.text(block.available, units.FORCE, "US").split()[0]
            assert any(printed in shown for shown in equations(page)), block.title


def test_no_key_typed_in_the_form_changes_a_cell(workbook):
    page = workbook("threaded_rod")
    at_rest(page)
    before = cells(page)
    assert len(before) > 15
    seen = set()
    for control in page.locator(".calc-form .calc-control, .calc-form button").element_handles():
        control.focus()
        kind = control.evaluate("one => one.nodeName + (one.role || '')")
        for key in ("x d d a b Escape x d d" if kind in seen else
                    "x d d a b m y r c v z 0 0 i i l o Shift+M Escape x d d a b z 0 0 i i").split():
            page.keyboard.press(key)
        seen.add(kind)
        assert page.locator(".jp-Dialog").count() == 0
    assert {"INPUT", "SELECT", "BUTTON"} <= seen
    page.wait_for_timeout(500)
    assert cells(page) == before
    assert page.locator(".calc-form").count() == 1


def test_a_page_opened_again_never_shows_old_outputs_as_live(workbook):
    page = workbook("threaded_rod")
    at_rest(page)
    page.evaluate(f"{PANEL}.context.save()")
    old = equations(page)
    enter(page, "Required strength", "19 kip")
    wait_for(page, lambda: equations(page) != old)
    at_rest(page)
    page.reload()  # the kernel lives on, and the file holds the outputs from before the edit
    ready(page)
    wait_for(page, lambda: field(page, "Required strength").input_value() == "19 kip")
    wait_for(page, lambda: [stale for _, picture, stale in outputs(page) if picture] == [True, True])
    page.get_by_text("Outputs marked STALE were made from other inputs").wait_for()

    page.evaluate(f"{PANEL}.sessionContext.session.kernel.restart()")
    wait_for(page, lambda: all(stale for _, _, stale in outputs(page)))
    page.get_by_text("No answer from the kernel").first.wait_for()
    page.wait_for_function(READY)
    page.evaluate(RUN_ALL)
    wait_for(page, lambda: any("30.5" in each for each in equations(page)))
    at_rest(page)

    page.evaluate(f"{PANEL}.context.save()")
    page.evaluate(f"{PANEL}.sessionContext.shutdown()")
    wait_for(page, lambda: all(stale for _, _, stale in outputs(page)))
    page.reload()  # no kernel, so no form: the note says so
    page.wait_for_selector(".jp-Notebook .jp-Cell")
    page.get_by_text("the workbook is not running").first.wait_for()


@pytest.fixture(scope="session")
def hostile(lab):
    """A workbook on a case whose texts are markup, run by another program, so that the browser does not trust it."""
    folder = lab[1] / "workbooks"
    calc = case.load(folder / "cases/hanger_plate.yaml").with_texts(**HOSTILE)
    case.save(case.Case(calc.kind, calc.texts, ((r"<b>", "$d$", r"\by", "`x` *y*"),)), folder / "cases/hostile.yaml")
    notebook = nbformat.read(folder / "pin_plate.ipynb", as_version=4)
    parameters = next(cell for cell in notebook.cells if "parameters" in cell.metadata.get("tags", []))
    parameters.source = re.sub(r"^case = .*$", 'case = "cases/hostile.yaml"', parameters.source, flags=re.MULTILINE)
    with pytest.MonkeyPatch.context() as patch:
        patch.setenv("CALCLIB_BATCH", "1")
        NotebookClient(notebook, kernel_name="python3", resources={"metadata": {"path": str(folder)}}).execute()
    nbformat.write(notebook, folder / "hostile.ipynb")
    return "hostile"


def test_texts_of_people_print_as_themselves_trusted_or_not(workbook, hostile):
    page = workbook(hostile, run=False)
    for run in (False, True):
        if run:
            page.evaluate(RUN_ALL)
            page.wait_for_selector(".calc-form", state="attached")
        at_rest(page)
        trusted = page.evaluate(f"[...{PANEL}.context.model.cells].some(each => each.trusted && each.outputs?.length)")
        assert trusted == run
        assert page.locator(".jp-Notebook .jp-RenderedMarkdown table").count() >= 6
        assert len(equations(page)) >= 5
        read = [" ".join(each.split()) for each in page.locator(
            ".jp-Notebook td, .jp-Notebook li").evaluate_all("all => all.map(one => one.textContent)")]
        for text in HOSTILE.values():
            for line in text.splitlines():
                assert any(line in each for each in read), line
        for text in ("<b>", "$d$", r"\by", "`x` *y*"):
            assert text in read
        raw = [each for each in texts(page) if re.search(r"\\begin|\\cdot|\\text\{|\\mathrm|&#|\\\\", each)]
        assert raw == []
        assert page.title() != "run"
        assert page.locator(".jp-OutputArea-output :is(script, i, u, del, img[src='x'])").count() == 0


def test_saving_and_issuing(workbook, lab):
    folder = lab[1]
    path = folder / "workbooks/cases/sag_rod.yaml"
    original = path.read_bytes()
    try:
        page = workbook("threaded_rod")
        at_rest(page)
        enter(page, "Required strength", "29 kip")
        page.get_by_role("button", name="Save case").click()
        page.locator(".calc-notice").get_by_text("Saved to").wait_for()
        assert case.load(path).texts["required_strength"] == "29 kip"

        page.get_by_role("button", name="Issue").click()
        notice = page.locator(".calc-notice").get_by_text("Issued: ")
        notice.wait_for(timeout=60000)
        issued = folder / "exports/TC-102/rev-0"
        for suffix in ("pdf", "html", "ipynb", "json", "yaml"):
            assert (issued / f"TC-102-rev-0.{suffix}").exists()
            assert f"TC-102-rev-0.{suffix}" in notice.inner_text()

        case.save(case.load(path).with_texts(project="Somebody else was here"))
        enter(page, "Required strength", "28 kip")
        page.get_by_role("button", name="Save case").click()
        page.locator(".calc-notice").get_by_text("somebody else changed this case").wait_for()
        assert case.load(path).texts["required_strength"] == "29 kip"

        again = workbook("threaded_rod")
        wait_for(again, lambda: again.locator(".calc-form").count() == 1)
        assert field(again, "Project").input_value() == "Somebody else was here"
        assert field(again, "Required strength").input_value() == "29 kip"
    finally:
        path.write_bytes(original)
        shutil.rmtree(folder / "exports/TC-102", ignore_errors=True)
