"""Write the workbook of each kind from its fields and the sections every calc has, and run it on its demo case.

    python .ci/make_workbooks.py            all kinds
    python .ci/make_workbooks.py pin_plate  one

A workbook may be edited by hand afterwards only in its texts; the parameters cell must list every input of the kind.
"""

import os
import sys
from pathlib import Path

import nbformat
from nbclient import NotebookClient

from calclib.document import SECTIONS
from calclib.issuing.issue import QUIET, _as_issued
from calclib.members import KINDS

FOLDER = Path(__file__).parent.parent / "workbooks"
DEMO = {"pin_plate": "hanger_plate", "threaded_rod": "sag_rod", "welded_member": "welded_brace",
        "slotted_hss": "slotted_brace", "built_up": "truss_chord", "bolted_member": "canopy_brace"}
TITLES = {
    "summary": "Summary of limit states", "scope": "Scope", "design_basis": "Design basis and materials",
    "loads": "Loads", "sketch_section": "Sketch to scale", "strength": "Limit states, one block each",
    "detailing": "Detailing rules", "sensitivity": "Sensitivity", "assumptions": "Assumptions and notes",
    "cautions": "Cautions", "revisions": "Revision history", "inputs": "Inputs", "checker": "For the checker",
}


def code(name, source, *tags):
    cell = nbformat.v4.new_code_cell(source)
    cell.id = name
    cell.metadata = {"tags": [*tags, "hide-input"], "jupyter": {"source_hidden": True}}
    return cell


def markdown(name, source):
    cell = nbformat.v4.new_markdown_cell(source)
    cell.id = name
    cell.metadata = {"tags": ["workbook"]}
    return cell


def workbook(kind):
    """Return the notebook of a kind, not yet run."""
    lines = ["# Parameters: the case to open; any other input as a text, where \"\" leaves what the case says",
             f'case = "cases/{DEMO[kind.name]}.yaml"']
    lines += [f'{each.name} = ""' for each in kind.all_fields()]
    cells = [
        markdown("title", f"# {kind.title}\n\n{kind.scope}\n\n"
                 '<button data-commandlinker-command="notebook:run-all-cells" data-commandlinker-args="{}">'
                 "Run the workbook</button>\n\n"
                 "Run it, fill in the form, and read the calc below as it changes. *Save case* keeps the inputs in the "
                 "case file; *Issue* writes the PDF and HTML of this revision."),
        code("parameters", "\n".join(lines), "parameters"),
        code("open", "# Open the case\nfrom calclib.workbook import open_workbook\n\n"
             f'book = open_workbook("{kind.name}", globals())'),
        code("form", "# Form\nbook.form()", "form"),
    ]
    for section in SECTIONS:
        name = section.__name__
        cells.append(code(name.replace("_", "-"), f'# {TITLES[name]}\nbook.show("{name}")', "live"))
    cells.append(code("close", "# The calc agrees with itself\nbook.close()"))
    notebook = nbformat.v4.new_notebook(cells=cells)
    notebook.metadata = {"kernelspec": {"name": "python3", "display_name": "Python 3", "language": "python"},
                         "language_info": {"name": "python"}}
    return notebook


def main(names):
    os.environ["CALCLIB_BATCH"] = "1"
    for name in names or KINDS:
        notebook = workbook(KINDS[name])
        client = NotebookClient(notebook, kernel_name="python3", record_timing=False, extra_arguments=QUIET,
                                resources={"metadata": {"path": str(FOLDER)}})
        client.execute()
        nbformat.write(_as_issued(notebook), FOLDER / f"{name}.ipynb")
        print(FOLDER / f"{name}.ipynb")


if __name__ == "__main__":
    main(sys.argv[1:])
