"""An executed notebook -> the document of its calc, for the exporters. Everything here is data; nothing is run."""

import base64
import json
import re
from pathlib import PurePath

from calclib.bundles import CALC, SECTION
from calclib.errors import CalcError
from calclib.issuing import notes

_LEFT_OUT = {"remove-cell", "remove_cell", "workbook"}  # "workbook": what every notebook of a kind says on screen
_NOTES = object()  # in the place of a digest: notes above the first section, which hold no number of the calc
_NO_OUTPUT = {"remove-output", "remove_output"}
_WIDGET = "application/vnd.jupyter.widget-view+json"
_CARRIED = {
    ".yaml": ("application/yaml", "Case: the inputs as typed, from which the calc can be run again"),
    ".json": ("application/json", "Record: inputs, results and every equation with its numbers, unrounded"),
    ".ipynb": ("application/x-ipynb+json", "Notebook as executed"),
}
NODE_TYPES = ("text", "heading", "equation", "table", "strengths", "figure", "message", "list", "markdown", "code")
# Characters that a document may not hold or that reorder the words around them: controls, marks of direction,
# halves of a pair, private use, noncharacters.
_UNPRINTABLE = re.compile("[\x00-\x08\x0b-\x1f\x7f-\x9f\u200e\u200f\u2028-\u202e\u2066-\u2069\ud800-\uf8ff\ufeff"
                          "\ufff0-\ufffb\ufffe\uffff\U000e0000-\U0010ffff]")


def document_of(notebook):
    """Return (document, case as YAML text, record) of an executed notebook.

    Sections stand in the order of the cells. A Markdown cell and an ordinary output follow the section that they stand
    below, so that a note is never lost; a cell tagged ``remove-cell`` or ``workbook`` is left out.

    Raises
    ------
    CalcError : a cell failed, there is no calc or more than one, or a section was made from other inputs.
    """
    closing, sections = [], []
    for number, cell in enumerate(notebook["cells"], start=1):
        tags = set(cell.get("metadata", {}).get("tags", []))
        if cell["cell_type"] == "code":
            for output in cell["outputs"]:
                _refuse_failure(output, number)
                data = output.get("data", {})
                if CALC in data:
                    closing.append(data[CALC])
                elif SECTION in data:
                    _add_section(sections, data[SECTION])
                elif not tags & (_LEFT_OUT | _NO_OUTPUT):
                    _add_nodes(sections, _ordinary(output))
        elif cell["cell_type"] == "markdown" and not tags & _LEFT_OUT and cell["source"].strip():
            _add_nodes(sections, [notes.blocks_of(cell["source"], _pictures(cell))])
    if len(closing) != 1:
        raise CalcError("the notebook holds no calc: run all its cells; its last cell must be book.close()."
                        if not closing else f"the notebook holds {len(closing)} calcs; a calc is one notebook.")
    document, record, case = closing[0]["document"], closing[0]["record"], closing[0]["case"]
    _refuse_stale(closing[0].get("stamps", ()), sections)
    return {**document, "sections": sections}, case, record


def _refuse_failure(output, number):
    if output["output_type"] == "error":
        raise CalcError(f"cell {number} failed with {output['ename']}: {notes.without_colours(output['evalue'])} "
                        "Mend it and run all cells; nothing was exported.")


def _refuse_stale(stamps, sections):
    for section in sections:
        if any(stamp not in stamps for stamp in section.pop("stamps", ())):
            raise CalcError(f"the section \"{section['title']}\" was made from other inputs than the calc. "
                            "Run all cells again; nothing was exported.")


def _add_section(sections, section):
    """Append a section, or the rest of the one before: a section may be stored in several outputs."""
    for node in section["nodes"]:
        if node["type"] not in NODE_TYPES:
            raise CalcError(f"the section \"{section['title']}\" holds \"{node['type']}\", which no page can show.")
    if sections and sections[-1]["key"] == section["key"]:
        sections[-1]["nodes"] += section["nodes"]
        sections[-1]["stamps"].append(section.get("stamp"))
    else:
        sections.append({"key": section["key"], "title": section["title"], "nodes": list(section["nodes"]),
                         "stamps": [section.get("stamp")]})


def _add_nodes(sections, nodes):
    if nodes and not sections:
        sections.append({"key": "notes", "title": "Notes", "digest": _NOTES, "nodes": []})
    if nodes:
        sections[-1]["nodes"] += nodes


def _ordinary(output):
    """Return the nodes of an output that is not part of a calc's structure, in the plainest form it has."""
    if output["output_type"] == "stream":
        return [_code(_whole(output["text"]))]
    data = output.get("data", {})
    if output.get("metadata", {}).get("calclib") == "twin" or _WIDGET in data:
        return []
    if "image/png" in data:
        png = "".join(_whole(data["image/png"]).split())
        return [{"type": "figure", "svg": "", "png": png, "alt": _whole(data.get("text/plain", "")) or "Figure",
                 "caption": "", "width": 0.8}]
    if "text/markdown" in data or "text/latex" in data:
        return [notes.blocks_of(_whole(data.get("text/markdown", data.get("text/latex"))))]
    return [_code(_whole(data.get("text/plain", "an output of a kind that no page can show")))]


def _code(text):
    return {"type": "code", "text": notes.without_colours(text).rstrip()}


def _whole(text):
    return text if isinstance(text, str) else "".join(text)


def _pictures(cell):
    return {name: next((mime, base64.b64decode(_whole(data))) for mime, data in bundle.items())
            for name, bundle in cell.get("attachments", {}).items() if bundle}


def printable(value):
    """Return the text, or every text inside a document, with characters that no page may hold shown as U+FFFD."""
    if isinstance(value, str):
        return _UNPRINTABLE.sub("\ufffd", value.replace("\r\n", "\n"))
    if isinstance(value, list):
        return [printable(each) for each in value]
    if isinstance(value, dict):
        return {name: each if name in ("svg", "png") else printable(each) for name, each in value.items()}
    return value


def serialised(notebook):
    """Return the bytes of a notebook, the same for the same content."""
    return (json.dumps(notebook, indent=1, sort_keys=True, ensure_ascii=False) + "\n").encode()


def attachments(files):
    """Return what the writers attach: file name -> (bytes, mime, description), from file name -> bytes."""
    made = {}
    for name, content in files.items():
        made[name] = (content, *_CARRIED[PurePath(name).suffix])
    return made


def exported(notebook):
    """Return (document, attachments) of a notebook that is exported by itself."""
    document, case, record = document_of(notebook)
    head = document["head"]
    stem = re.sub(r"[^\w.-]+", "-", f"{head['calc_number']}-rev-{head['revision']}")
    return document, attachments({
        f"{stem}.yaml": case.encode(),
        f"{stem}.json": (json.dumps(record, indent=1, ensure_ascii=False) + "\n").encode(),
        f"{stem}.ipynb": serialised(notebook)})
