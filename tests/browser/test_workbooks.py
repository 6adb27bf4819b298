"""A person at the workbook: runs it, types, reads, mistypes, presses keys. Driven in JupyterLab in a real browser."""

import re
from urllib.parse import urlparse

import pytest

from calclib import case, units
from calclib.calc import evaluate


def pictures(page):
    return page.locator(".jp-Notebook .jp-OutputArea-output img").evaluate_all("all => all.map(one => one.src)")


def equations(page):
    """Return the text of every typeset equation, from the mathematics that screen readers are given."""
    return page.locator(".jp-Notebook mjx-container math").evaluate_all("all => all.map(one => one.textContent)")


def wait_for(page, made, timeout=10000):
    """Wait until `made()` is true; it is asked again and again."""
    deadline = timeout
    while not made():
        page.wait_for_timeout(50)
        deadline -= 50
        assert deadline > 0, "the page did not change in time"


def field(page, label):
    return page.locator(".calc-form").get_by_label(re.compile(f"^{label}"))


def test_typing_changes_equation_sketch_and_plot(workbook, lab):
    page = workbook("pin_plate")
    wait_for(page, lambda: len(pictures(page)) == 4 and any("168.8" in each for each in equations(page)))
    before = pictures(page)
    field(page, "Plate thickness").fill("1-1/4 in")
    field(page, "Plate thickness").press("Enter")
    after = evaluate(case.load(lab[1] / "workbooks/cases/hanger_plate.yaml").with_texts(plate_thickness="1-1/4 in"))
    printed = units.text(after["pin bearing"].available, units.FORCE, "US").split()[0]
    wait_for(page, lambda: any(printed in each for each in equations(page)))
    wait_for(page, lambda: all(a != b for a, b in zip(before, pictures(page), strict=True)))

    field(page, "Hole diameter").fill("2-9/16 in")
    wait_for(page, lambda: any("0.95" in each for each in equations(page)))

    good = equations(page)
    field(page, "Hole diameter").fill("banana")
    message = page.locator(".calc-form").get_by_text("is not a number with a unit")
    message.wait_for()
    assert field(page, "Hole diameter").get_attribute("aria-invalid") == "true"
    assert equations(page) == good

    assert {urlparse(url).hostname for url in page.addresses if not url.startswith(("data:", "blob:"))} == {"127.0.0.1"}


@pytest.mark.parametrize("keys", ["x", "dd", "a", "b", "m", "y", "z", "0", "00", "ii", "l", "o", "c", "v"])
def test_no_key_typed_in_the_form_changes_a_cell(workbook, keys):
    page = workbook("pin_plate")
    cells = page.locator(".jp-Notebook .jp-Cell").count()
    for control in ("Plate steel", "Method", "Movement at pin"):
        field(page, control).focus()
        for key in keys:
            page.keyboard.press(key)
        page.keyboard.press("Escape")
        for key in keys:
            page.keyboard.press(key)
    page.wait_for_timeout(300)
    assert page.locator(".jp-Notebook .jp-Cell").count() == cells
    assert page.locator(".calc-form").count() == 1


def test_a_reload_never_leaves_stale_equations_that_look_live(workbook):
    page = workbook("threaded_rod")
    field(page, "Required strength").fill("20 kip")
    wait_for(page, lambda: any("20.00" in each for each in equations(page)))
    page.reload()
    page.wait_for_selector(".jp-Notebook .jp-Cell", timeout=60000)
    page.wait_for_function("window.jupyterapp !== undefined")
    page.get_by_text("the workbook is not running").first.wait_for()


def test_a_dead_kernel_is_said_and_the_figures_are_marked(workbook):
    page = workbook("threaded_rod")
    wait_for(page, lambda: len(equations(page)) > 5)
    page.evaluate("""async () => {
        const app = window.jupyterapp;
        const panel = [...app.shell.widgets('main')].find(each => each.sessionContext);
        await panel.sessionContext.session.kernel.shutdown();
    }""")
    field(page, "Required strength").fill("21 kip")
    page.get_by_text("no answer from the kernel").first.wait_for(timeout=15000)
