"""A document -> PDF/A-3a, through the Typst compiler that its wheel carries; no program, font or network is needed.

The template reads a data file, so a text from a person is never markup. Formulas come from pandoc alone.
"""

import base64
import json
import shutil
import tempfile
from contextlib import contextmanager
from datetime import UTC, date, datetime, time
from functools import lru_cache
from pathlib import Path

import typst

from calclib.errors import CalcError, EntryError
from calclib.issuing import mathematics, pages

_TEMPLATE = Path(__file__).parent / "templates" / "calc.typ"
_NO_ATTACHMENTS = {}


def write_pdf(document, attachments=_NO_ATTACHMENTS):
    """Return the bytes of the PDF of a document, the same whenever and wherever it is written.

    Parameters
    ----------
    document : see `calclib.document`
    attachments : file name -> (bytes, mime, description)

    Raises
    ------
    CalcError : no date, a formula that cannot be typeset, a page size that is not letter or a4.
    """
    with _compiler(document, attachments) as compiler:
        try:
            return compiler.compile(format="pdf", pdf_standards=["a-3a"], timestamp=_timestamp(document))
        except typst.TypstError as error:
            raise CalcError(f"the PDF cannot be laid out: {error.message}. Nothing was written.") from error


def seal_area(document, attachments=_NO_ATTACHMENTS):
    """Return where the seal goes: {"page", "x", "y", "width", "height"}, points from the top left of the page."""
    with _compiler(document, attachments) as compiler:
        return json.loads(compiler.query("<seal-area>", field="value", one=True))


@contextmanager
def _compiler(document, attachments):
    """Yield a compiler over a folder of its own: the template, the data, the figures and the attachments."""
    with tempfile.TemporaryDirectory(prefix="calc-") as name:
        folder = Path(name)
        shutil.copyfile(_TEMPLATE, folder / "calc.typ")
        data = _data(document, folder)
        data["attachments"] = []
        for i, (file_name, (content, mime, description)) in enumerate(attachments.items()):
            (folder / f"attachment-{i}").write_bytes(content)
            data["attachments"].append({"name": file_name, "mime": mime, "description": description, "file":
                                        f"attachment-{i}",
                                        "relation": "data" if mime == "application/json" else "source"})
        lacking = set()
        data = _with_glyphs(data, lacking)
        data["lacking"] = bool(lacking)
        (folder / "data.json").write_text(json.dumps(data), encoding="utf-8", newline="\n")
        yield typst.Compiler(str(folder / "calc.typ"), root=name, font_paths=_fonts(), ignore_system_fonts=True)


def _font_folder():
    import matplotlib  # slow to import, and loaded already where a figure was drawn
    return Path(matplotlib.get_data_path()) / "fonts" / "ttf"


@lru_cache(1)
def _fonts():
    """Return the fonts of the Typst wheel, and those of matplotlib for signs that they lack."""
    return typst.Fonts(include_system_fonts=False, font_paths=[_font_folder()])


@lru_cache(1)
def _glyphs():
    """Return the code points that every style of text can print: those of the last font that is tried."""
    from matplotlib.ft2font import FT2Font
    return frozenset(FT2Font(str(_font_folder() / "DejaVuSans.ttf")).get_charmap())


def _with_glyphs(value, lacking):
    """Return `value` with each character that no font has as its Unicode number, and add it to `lacking`.

    A box would read as any character at all, on paper and when the text is copied.
    """
    if isinstance(value, str):
        lacks = {c for c in value if not c.isascii() and ord(c) not in _glyphs()}
        lacking |= lacks
        return "".join(f"\u27e8U+{ord(c):04X}\u27e9" if c in lacks else c for c in value) if lacks else value
    if isinstance(value, list):
        return [_with_glyphs(each, lacking) for each in value]
    if isinstance(value, dict):
        return {name: _with_glyphs(each, lacking) for name, each in value.items()}
    return value


def _timestamp(document):
    """Return noon of the issue date, so that the file says the same day in every time zone."""
    text = document["head"]["date"]
    try:
        day = date.fromisoformat(text)
    except ValueError:
        raise EntryError("date", f'"{text}" is not a date; a PDF carries the date of issue, for example '
                                 '"2026-11-20"') from None
    return int(datetime.combine(day, time(12), UTC).timestamp())


def _data(document, folder):
    """Return the document as the template reads it, and put its figures into `folder`."""
    if document["page"] not in ("letter", "a4"):
        raise EntryError("page", f'"{document["page"]}" is not a page size; write letter or a4')
    document = pages.printable(document)
    formulas = mathematics.typst(mathematics.latex_of(document["sections"]))
    sections = [{**section, "nodes": [_node(node, formulas, folder) for node in section["nodes"]]}
                for section in document["sections"]]
    return {**document, "sections": sections}


def _node(node, formulas, folder):
    if node["type"] == "equation":
        return _equation(node, formulas)
    if node["type"] == "figure":
        file = _picture(node, folder)
        return {**{k: v for k, v in node.items() if k not in ("svg", "png")}, "file": file}
    if node["type"] == "markdown":
        return {"type": "markdown", "blocks": [
            {**block, "runs": [_run(run, formulas, folder) for run in block["runs"]]} for block in node["blocks"]]}
    return _cells(node, formulas)


def _equation(node, formulas):
    made = {name: formulas.get(node[name], "") for name in ("lhs", "symbolic", "substituted", "result")}
    rights = [made[name] for name in ("symbolic", "substituted", "result") if made[name]]
    return {"type": "equation", "lhs": made["lhs"], "rights": rights,
            "chunks": [mathematics.chunks(right) for right in rights],
            "alt": mathematics.spoken(" = ".join([made["lhs"], *rights])), "cite": node["cite"], "note": node["note"]}


def _cells(value, formulas):
    """Replace each {"latex"} below a node by the formula and its words."""
    if isinstance(value, dict) and "latex" in value:
        made = formulas[value["latex"]]
        return {"math": made, "alt": mathematics.spoken(made)}
    if isinstance(value, dict):
        return {name: _cells(each, formulas) for name, each in value.items()}
    if isinstance(value, list):
        return [_cells(each, formulas) for each in value]
    return value


def _run(run, formulas, folder):
    if "png" in run:
        return {"file": _picture({"svg": "", **run}, folder), "alt": run["alt"]}
    return _cells(run, formulas)


def _picture(node, folder):
    """Write a figure beside the template, as drawing if there is one, and return its file name."""
    suffix, content = ("svg", node["svg"].encode()) if node["svg"] else ("png", base64.b64decode(node["png"]))
    name = f"figure-{len(list(folder.glob('figure-*')))}.{suffix}"
    (folder / name).write_bytes(content)
    return name


def __getattr__(name):
    """Give nbconvert its exporter from here; importing nbconvert takes longer than writing a calc."""
    if name == "CalcPDFExporter":
        from calclib.issuing.exporters import CalcPDFExporter
        return CalcPDFExporter
    raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
