"""How long after a key is typed the page shows the changed calc: run `python tests/benchmarks/bench_browser.py`.

Every field with a number, several values each, in JupyterLab in headless Chromium. A time runs from the input event to
the frame in which the thing stands. The yardstick, in the same browser, is a bare kernel that replaces one equation.
"""

import re
import sys
import tempfile
from pathlib import Path
from statistics import median

sys.path.insert(0, str(Path(__file__).resolve().parents[2]))
sys.path.insert(0, str(Path(__file__).resolve().parents[1] / "browser"))

import nbformat
from lab import PANEL, RUN_ALL, browser, jupyter_lab, open_notebook, ready

from calclib import case, units
from calclib.calc import evaluate
from calclib.errors import CalcError

CASES = {"pin_plate": "hanger_plate", "threaded_rod": "sag_rod"}
VIEWS = {"the form fills the page": 1000, "form and equations in view": 4200}
SHARES = (1.02, 0.97)
QUIET = 3000  # ms between edits, in which the drawings are stored as vectors too
PARTS = {  # pictures are numbered; each comes again when its vectors are stored
    "the form's answer": lambda times: min(times.get("form", [0])),
    "first changed equation": lambda times: min(times.get("equation", [0])),
    "all changed equations": lambda times: max(times.get("equation", [0])),
    "sketch": lambda times: min(times.get(0, [0])),
    "last plot": lambda times: max((min(found) for what, found in times.items() if what in range(1, 99)), default=0),
}
BARE = """
from IPython.display import display
handle = display({"text/latex": "$x = 1$"}, raw=True, display_id=True)
"""
WATCH = """() => {
    const notebook = document.querySelector('.jp-Notebook');
    window.seen = [];
    window.start = 0;
    document.addEventListener('input', event => { window.seen = []; window.start = event.timeStamp; }, true);
    const painted = what => requestAnimationFrame(() => setTimeout(() => {
        window.seen.push([what, performance.now() - window.start]);
    }));
    new MutationObserver(changes => {
        for (const change of changes) {
            const at = change.target.nodeType === 1 ? change.target : change.target.parentElement;
            if (!at) continue;
            if (at.closest('.calc-echo, .calc-status')) { painted('form'); continue; }
            if (!at.closest('.jp-OutputArea-output') || at.closest('.calc-form')) continue;
            for (const node of [...change.addedNodes, ...(change.type === 'attributes' ? [change.target] : [])]) {
                const is = name => node.nodeName === name || node.querySelector?.(name);
                if (is('MJX-CONTAINER')) painted('equation');
                const image = is('IMG') === true ? node : is('IMG');
                if (image) painted([...notebook.querySelectorAll('.jp-OutputArea-output img')].indexOf(image));
            }
        }
    }).observe(notebook, { childList: true, characterData: true, subtree: true, attributes: true,
                           attributeFilter: ['src'] });
}"""
BARE_EDIT = f"""async text => {{
    const kernel = {PANEL}.sessionContext.session.kernel;
    window.seen = [];
    window.start = performance.now();
    await kernel.requestExecute({{ code: `handle.update({{"text/latex": "$x = ${{text}}$"}}, raw=True)` }}).done;
}}"""


def edits(kind):
    """Return [(label, text)]: for each field with a number, values near the present one that can be computed."""
    start = case.load(Path(__file__).resolve().parents[2] / "workbooks" / "cases" / f"{CASES[kind]}.yaml")
    x = evaluate(start).x
    made = []
    for each in start.kind.all_fields():
        if not each.dimension or not start.texts.get(each.name):
            continue
        unit = each.dimension.printed[units.US][0]
        for share in SHARES:
            text = f"{getattr(x, each.name) * share * each.dimension.printed[units.US][2]:.4g} {unit}"
            try:
                evaluate(start.with_texts(**{each.name: text}))
            except CalcError:
                continue
            made.append((each.label, text))
        made.append((each.label, start.texts[each.name]))
    return made


def typed(page, label, text):
    """Put a text into a field as one input, and return {what: [ms]} of all that was painted after it."""
    control = page.locator(".calc-form").get_by_label(re.compile(f"^{re.escape(label)}")).first
    control.focus(timeout=5000)
    control.select_text()
    page.keyboard.insert_text(text)
    return seen(page)


def seen(page):
    page.wait_for_timeout(QUIET)
    times = {}
    for what, at in page.evaluate("window.seen"):
        times.setdefault(what, []).append(at)
    return times


def bare(page, url, folder):
    """Return the median time of one equation replaced by a bare kernel."""
    notebook = nbformat.v4.new_notebook(cells=[nbformat.v4.new_code_cell(BARE)])
    notebook.metadata["kernelspec"] = {"name": "python3", "display_name": "Python 3", "language": "python"}
    nbformat.write(notebook, folder / "workbooks" / "bare.ipynb")
    page.goto(f"{url}/lab/tree/workbooks/bare.ipynb?reset")
    ready(page)
    page.evaluate(RUN_ALL)
    page.wait_for_selector("mjx-container")
    page.evaluate(WATCH)
    times = []
    for number in range(10):
        page.evaluate(BARE_EDIT, str(number))
        times.append(seen(page)["equation"][0])
    return median(times)


def main():
    with tempfile.TemporaryDirectory() as home, jupyter_lab(Path(home)) as (url, folder), browser() as chromium:
        yardstick = bare(chromium.new_page(), url, folder)
        print(f"one equation replaced by a bare kernel: {yardstick:.0f} ms")
        for view, height in VIEWS.items():
            page = chromium.new_page(viewport={"width": 1280, "height": height})
            measured = []
            for kind in CASES:
                open_notebook(page, url, kind, run=True)
                page.wait_for_timeout(5000)
                page.evaluate(WATCH)
                measured += [typed(page, *edit) for edit in edits(kind)]
            page.close()
            print(f"{view}, {len(measured)} edits:")
            for words, pick in PARTS.items():
                times = sorted(filter(None, map(pick, measured)))
                if times:
                    print(f"  {words}: {median(times):.0f} ms, {median(times) / yardstick:.2f} of the bare equation "
                          f"(nine of ten under {times[len(times) * 9 // 10 - 1]:.0f} ms, {len(times)} edits)")


if __name__ == "__main__":
    main()
