"""The PDF and the HTML page say what the document says, the same every time, and nothing that a text asks for."""

import base64
import copy
import io
import os
import re
import subprocess
import sys
from html.parser import HTMLParser

import nbformat
import pikepdf
import pytest
from exporter_sample import ATTACHMENTS, HOSTILE, document
from nbformat.v4 import new_code_cell, new_markdown_cell, new_notebook, new_output
from pypdf import PdfReader

from calclib.bundles import CALC, SECTION
from calclib.errors import CalcError
from calclib.issuing import mathematics, notes, pages, pdf
from calclib.issuing.html import write_html
from calclib.issuing.pdf import seal_area, write_pdf


@pytest.fixture(scope="module")
def good():
    return write_pdf(document(), ATTACHMENTS)


@pytest.fixture(scope="module")
def failing():
    return write_pdf(document(fails=True, page="a4"), ATTACHMENTS)


def one_page(**head):
    """Return the front page of the sample alone."""
    said = document(**head)
    return {**said, "sections": said["sections"][:3]}


def texts(content):
    return [page.extract_text() for page in PdfReader(io.BytesIO(content)).pages]


def squeezed(text):
    return re.sub(r"\s+", "", text)


# --- the same bytes -----------------------------------------------------------------------------------------------

ELSEWHERE = """
import sys
sys.path.insert(0, {tests!r})
from exporter_sample import ATTACHMENTS, document
from calclib.issuing.html import write_html
from calclib.issuing.pdf import write_pdf
from hashlib import sha256
print(sha256(write_pdf(document(), ATTACHMENTS)).hexdigest())
print(sha256(write_html(document(), ATTACHMENTS).encode()).hexdigest())
"""


def test_the_same_bytes_in_another_folder_time_zone_and_locale(good, tmp_path):
    from hashlib import sha256
    here = os.path.dirname(__file__)
    environment = {**os.environ, "TZ": "Pacific/Kiritimati", "LC_ALL": "C", "LANG": "C", "TMPDIR": str(tmp_path),
                   "PYTHONPATH": os.path.dirname(os.path.dirname(here)), "PYTHONHASHSEED": "7"}
    run = subprocess.run([sys.executable, "-c", ELSEWHERE.format(tests=here)], cwd=tmp_path, env=environment,
                         capture_output=True, text=True, check=True)
    assert run.stdout.split() == [sha256(good).hexdigest(),
                                  sha256(write_html(document(), ATTACHMENTS).encode()).hexdigest()]
    assert not list(tmp_path.iterdir())  # nothing is left behind
    assert write_pdf(document(), ATTACHMENTS) == good


# --- the PDF ------------------------------------------------------------------------------------------------------

def test_every_page_has_its_title_block_and_number(good):
    shown = texts(good)
    assert len(shown) >= 6
    for i, text in enumerate(shown, start=1):
        for words in ("Footbridge over the Mill Race, east approach", "HL-114", "Hanger plate at pin P3, gridline D/7",
                      "2026-03-18", "R. Osei", "Harrow & Lyle Engineers", "3f9a0c1d22e4", "calclib 0.1.0",
                      f"Page {i} of {len(shown)}"):
            assert squeezed(words) in squeezed(text), (i, words)
        assert "NOT ACCEPTABLE" not in text


def test_a_calc_that_fails_says_so_on_every_page(failing):
    assert all("NOT ACCEPTABLE" in text for text in texts(failing))


@pytest.mark.parametrize(("page", "size"), [("letter", (612, 792)), ("a4", (595.276, 841.89))])
def test_page_size(page, size):
    for each in PdfReader(io.BytesIO(write_pdf(one_page(page=page)))).pages:
        assert (float(each.mediabox.width), float(each.mediabox.height)) == pytest.approx(size, abs=0.01)


def test_archival_tagged_and_dated(good):
    with pikepdf.open(io.BytesIO(good)) as file:
        with file.open_metadata() as metadata:
            assert metadata["pdfaid:part"] == "3"
            assert metadata["pdfaid:conformance"] == "A"
            assert metadata["xmp:CreateDate"].startswith("2026-03-18T12:00:00")
            assert metadata["dc:title"] == "HL-114 \N{EN DASH} Pin-connected plate \N{EN DASH} " \
                                           "Hanger plate at pin P3, gridline D/7"
        assert file.Root.MarkInfo.Marked
        assert file.Root.Lang == "en"
        alternatives = [str(element.Alt) for element in file.objects
                        if isinstance(element, pikepdf.Dictionary) and "/Alt" in element]
    assert "Plate with a hole, drawing 3" in alternatives
    assert "phi P sub n equals phi times P sub n equals 0.75 times 107.3 kip equals 80.04 kip" in alternatives


def test_attachments_come_back_whole(good):
    with pikepdf.open(io.BytesIO(good)) as file:
        assert {name: bytes(file.attachments[name].get_file().read_bytes()) for name in file.attachments} == \
            {name: content for name, (content, _, _) in ATTACHMENTS.items()}
        assert len(file.Root.AF) == len(ATTACHMENTS)


def test_one_bookmark_a_section(good):
    outline = [entry.title for entry in PdfReader(io.BytesIO(good)).outline]
    assert outline == [section["title"] for section in document()["sections"]]


def test_a_table_repeats_its_head_on_the_next_page(good):
    pages_with_rows = [text for text in texts(good) if "plate_dimension_" in text]
    assert len(pages_with_rows) >= 2
    assert all("Input" in text and "As read" in text for text in pages_with_rows)


def test_the_place_of_the_seal_lies_on_the_first_page():
    area = seal_area(document())
    assert area["page"] == 1
    assert area["width"] == area["height"] == pytest.approx(2.2 * 72)
    assert area["x"] + area["width"] < 612 and area["y"] + area["height"] < 792


@pytest.mark.parametrize("name", ["project", "subject", "firm", "prepared_by", "checked_by", "calc_number", "client"])
@pytest.mark.parametrize("value", ["a long name of a project " * 8, "y" * 200])
def test_a_long_text_wraps_inside_the_frame(name, value):
    content = write_pdf(one_page(**{name: value}))
    first = squeezed(texts(content)[0])
    assert squeezed(value) in first
    right = 612 - 17 / 25.4 * 72
    for page in PdfReader(io.BytesIO(content)).pages:
        ends = []
        page.extract_text(visitor_text=lambda text, cm, tm, *_, ends=ends: ends.append(tm[4]) if text.strip() else None)
        assert max(ends) < right


@pytest.mark.parametrize("date", ["", "18 March 2026", "2026-13-01"])
def test_a_pdf_without_a_date_is_refused(date):
    with pytest.raises(CalcError) as refusal:
        write_pdf(one_page(date=date))
    assert str(refusal.value) == (f'date: "{date}" is not a date; a PDF carries the date of issue, for example '
                                  '"2026-11-20".')


def test_another_page_size_is_refused():
    with pytest.raises(CalcError) as refusal:
        write_pdf(one_page(page="legal"))
    assert str(refusal.value) == 'page: "legal" is not a page size; write letter or a4.'


# --- texts that try to be more ------------------------------------------------------------------------------------

@pytest.mark.parametrize("text", [*HOSTILE, "Łódź Ωμέγα 😀", "#read(\"/etc/passwd\")", "<b>&amp;</b>", "]]>", "\"'",
                                  "</style><img src=x onerror=alert(1)>"])
def test_a_text_prints_as_itself(text):
    said = one_page(project=text, subject=text, firm=text, prepared_by=text, client=text, calc_number=text)
    said["sections"][1]["nodes"] = [
        {"type": "text", "text": text}, {"type": "list", "items": [text]}, {"type": "code", "text": text},
        {"type": "message", "severity": "caution", "text": text, "cite": text}]
    said["sections"][1]["title"] = text
    shown = squeezed(texts(write_pdf(said))[0])
    assert shown.count(squeezed(text)) >= 9
    page = Page(write_html(said))
    assert page.text.count(text) >= 9
    assert page.tags.isdisjoint({"script", "b", "x"})


@pytest.mark.parametrize("character", ["\x00", "\x07", "\x1b", "\ud800", "\ue000", "\ufeff", "\ufffe", "\u202e",
                                       "\U000f0000"])
def test_a_character_that_no_page_may_hold_is_shown_as_missing(character):
    said = one_page(project=f"left{character}right")
    assert "left\ufffdright" in texts(write_pdf(said))[0]
    assert "left\ufffdright" in write_html(said)


def test_a_character_without_a_glyph_prints_as_its_number():
    first = texts(write_pdf(one_page(firm="橋梁 Works")))[0]
    assert "⟨U+6A4B⟩⟨U+6881⟩ Works" in first
    assert "A character that the fonts of this page lack is printed as its Unicode number" in " ".join(first.split())
    assert "Unicode number" not in texts(write_pdf(one_page()))[0]
    assert "橋梁 Works" in write_html(one_page(firm="橋梁 Works"))


@pytest.mark.parametrize("latex", [r"\badcommand{x}", r"\frac{a", r"\input{/etc/passwd}", "a\n\n#read(\"x\")\n\nb", ""])
def test_a_formula_that_cannot_be_typeset_is_refused(latex):
    for convert in (mathematics.typst, mathematics.mathml):
        with pytest.raises(CalcError, match="cannot be typeset"):
            convert([latex])


def test_a_hash_in_a_formula_starts_no_code():
    made = mathematics.typst([r"\# \text{\#read("'"x"'")} x"])
    assert list(made.values()) == [r'\# upright("#read(\"x\")") x']


def test_a_mixed_number_stays_one_number():
    made = mathematics.typst([r"2 \cdot 1\tfrac{1}{8}\ \mathrm{in}", r"\tfrac{5}{8}\ \mathrm{in}", r"\frac{\pi}{4}"])
    assert list(made.values()) == ['2 dot.op 1 inline(1 / 8) med upright("in")', 'inline(5 / 8) med upright("in")',
                                   "pi / 4"]


# --- the HTML page ------------------------------------------------------------------------------------------------

class Page(HTMLParser):
    """What a browser would read: tags, attributes, words."""

    def __init__(self, source):
        super().__init__()
        self.tags, self.attributes, self.text, self._style = set(), [], "", False
        self.feed(source)

    def handle_starttag(self, tag, attributes):
        self.tags.add(tag)
        self.attributes += [(tag, *pair) for pair in attributes]
        self._style = tag == "style"

    def handle_data(self, data):
        self.text += "" if self._style else data


def test_the_page_runs_nothing_and_fetches_nothing():
    source = write_html(document(), ATTACHMENTS)
    page = Page(source)
    assert page.tags.isdisjoint({"script", "link", "iframe", "object", "embed", "svg", "form", "base"})
    for tag, name, value in page.attributes:
        assert not name.startswith("on")
        if name in ("src", "href", "srcset", "action", "data"):
            assert value.startswith("data:" if tag in ("img", "a") and "#" not in value[:1] else "#"), (tag, value)
    style = source[source.index("<style>"):source.index("</style>")]
    assert "url(" not in style and "@import" not in style
    assert re.findall("https?://[^\"' <]*", source) == ["http://www.w3.org/1998/Math/MathML"] * source.count("<math ")
    assert ("meta", "content", "default-src 'none'; style-src 'unsafe-inline'; img-src data:; font-src data:; "
            "base-uri 'none'; form-action 'none'") in page.attributes


def test_the_page_carries_its_attachments():
    links = [value for tag, name, value in Page(write_html(document(), ATTACHMENTS)).attributes
             if tag == "a" and name == "href" and value.startswith("data:")]
    assert [base64.b64decode(link.split(";base64,")[1]) for link in links] == [c for c, _, _ in ATTACHMENTS.values()]


def test_the_page_says_what_the_document_says():
    page = Page(write_html(document()))
    for section in document()["sections"]:
        assert section["title"] in page.text
    assert "NOT ACCEPTABLE" not in page.text.upper()
    assert "Not acceptable" in Page(write_html(document(fails=True))).text
    assert Page(write_html(document(page="a4"))).tags == page.tags
    assert "size: A4" in write_html(document(page="a4")) and "size: letter" in write_html(document())


def test_every_image_has_words():
    images = [dict(pairs) for pairs in _attributes_of("img", write_html(document()))]
    assert len(images) == 4 and all(image["alt"] for image in images)


def _attributes_of(wanted, source):
    found = []

    class Reader(HTMLParser):
        def handle_starttag(self, tag, attributes):
            if tag == wanted:
                found.append(attributes)

    Reader().feed(source)
    return found


# --- notebooks ----------------------------------------------------------------------------------------------------

STAMP = "1a2b3c4d"


def notebook():
    """Return an executed notebook of the sample calc, with a note, a plain output and a twin."""
    said = document()
    cells = []
    for section in said["sections"]:
        data = {"text/plain": section["title"], SECTION: {**section, "stamp": STAMP}}
        cells.append(new_code_cell("book.show(...)", execution_count=1, outputs=[new_output("display_data", data)]))
    cells[3].outputs.append(new_output("display_data", {"text/plain": "a twin"}, metadata={"calclib": "twin"}))
    cells.insert(4, new_markdown_cell("**Note** by hand: $x \\le 3$, <script>alert(1)</script>",
                                      metadata={"tags": ["note"]}))
    cells.insert(5, new_code_cell("print(...)", execution_count=2, outputs=[
        new_output("stream", name="stdout", text="printed \x1b[31mred\x1b[0m words")]))
    cells.append(new_markdown_cell("Buttons of the screen", metadata={"tags": ["remove-cell"]}))
    cells.insert(0, new_markdown_cell("Buttons of the screen", metadata={"tags": ["workbook"]}))
    closing = {"document": {k: v for k, v in said.items() if k != "sections"}, "record": {"format": "calclib record 1"},
               "case": "kind: \"pin_plate\"\n", "stamps": [STAMP]}
    cells.append(new_code_cell("book.close()", execution_count=3,
                               outputs=[new_output("display_data", {"text/plain": "done", CALC: closing})]))
    for i, cell in enumerate(cells):
        cell.id = f"cell-{i}"
    return new_notebook(cells=cells)


def test_a_notebook_gives_back_its_document():
    made, case, record = pages.document_of(notebook())
    said = document()
    assert [s["key"] for s in made["sections"]] == [s["key"] for s in said["sections"]]
    assert case == 'kind: "pin_plate"\n' and record == {"format": "calclib record 1"}
    loads = made["sections"][3]["nodes"]
    assert loads[:-2] == said["sections"][3]["nodes"]
    assert loads[-2]["type"] == "markdown"
    assert loads[-1] == {"type": "code", "text": "printed red words"}
    made["sections"][3]["nodes"] = loads[:-2]
    assert made == said


def test_a_section_in_several_outputs_is_one_section():
    book = notebook()
    data = book.cells[1].outputs[0].data
    rest = copy.deepcopy(data)
    rest[SECTION]["nodes"] = [{"type": "text", "text": "more"}]
    book.cells[1].outputs.append(new_output("display_data", rest))
    first = pages.document_of(book)[0]["sections"][0]
    assert [node["type"] for node in first["nodes"]] == ["strengths", "text"]


def test_a_note_above_the_first_section_is_carried():
    book = notebook()
    book.cells.insert(0, new_markdown_cell("Read this first"))
    first = pages.document_of(book)[0]["sections"][0]
    assert (first["title"], first["nodes"][0]["text"]) == ("Notes", "Read this first")


@pytest.mark.parametrize(("name", "begin"), [("calc-pdf", b"%PDF-1.7"), ("calc-html", b"<!DOCTYPE html>")])
def test_nbconvert_exports_a_calc_with_everything_attached(name, begin, tmp_path):
    from calclib.issuing.html import CalcHTMLExporter
    from calclib.issuing.pdf import CalcPDFExporter
    exporter = {"calc-pdf": CalcPDFExporter, "calc-html": CalcHTMLExporter}[name]()
    path = tmp_path / "hanger.ipynb"
    nbformat.write(notebook(), path)
    output, resources = exporter.from_filename(str(path))
    assert resources["output_extension"] == f".{name.removeprefix('calc-')}"
    content = output if isinstance(output, bytes) else output.encode()
    assert content.startswith(begin)
    again, _ = exporter.from_notebook_node(notebook())
    assert again == output
    if name == "calc-pdf":
        with pikepdf.open(io.BytesIO(content)) as file:
            assert sorted(file.attachments) == [f"HL-114-rev-2.{suffix}" for suffix in ("ipynb", "json", "yaml")]
            attached = file.attachments["HL-114-rev-2.ipynb"].get_file().read_bytes().decode()
            assert nbformat.reads(attached, as_version=4) == notebook()
        shown = " ".join(texts(content))
        assert "Note by hand" in shown and "<script>alert(1)</script>" in shown and "printed red words" in shown
        assert "Buttons of the screen" not in shown and "a twin" not in shown


def test_other_notebooks_are_refused():
    def refused(book):
        with pytest.raises(CalcError) as refusal:
            pages.document_of(book)
        return str(refusal.value)

    empty = new_notebook(cells=[new_code_cell("1 + 1"), new_markdown_cell("hello")])
    assert refused(empty) == ("the notebook holds no calc: run all its cells; its last cell must be book.close().")
    twice = notebook()
    twice.cells.append(twice.cells[-1])
    assert refused(twice) == "the notebook holds 2 calcs; a calc is one notebook."
    failed = notebook()
    failed.cells[3].outputs = [new_output("error", ename="ValueError", evalue="no such plate.", traceback=[])]
    assert refused(failed) == ("cell 4 failed with ValueError: no such plate. Mend it and run all cells; "
                               "nothing was exported.")
    stale = notebook()
    message = 'the section "Scope" was made from other inputs than the calc. Run all cells again; nothing was exported.'
    stale.cells[2].outputs[0].data[SECTION]["stamp"] = "00000000"
    assert refused(stale) == message
    del stale.cells[2].outputs[0].data[SECTION]["stamp"]
    assert refused(stale) == message
    strange = notebook()
    strange.cells[2].outputs[0].data[SECTION]["nodes"] = [{"type": "raw"}]
    assert refused(strange) == 'the section "Scope" holds "raw", which no page can show.'


def test_a_note_holds_no_markup_but_its_own():
    markdown = ("# A\n\n`x`{=typst} ```{=html}\n<i>\n```\n\n![p](https://example.org/a.png) [w](https://example.org) "
                "$\\badcommand$ \\input{x}\n\n> quoted\n\n1. one\n2. two\n\n| a | b |\n|---|---|\n| 1 | 2 |\n")
    said = one_page()
    said["sections"][1]["nodes"].append(notes.blocks_of(markdown))
    page = Page(write_html(said))
    assert "i" not in page.tags
    assert [value for tag, name, value in page.attributes if "example.org" in value] == []
    for words in ("[picture not carried: p https://example.org/a.png]", "w (https://example.org)", "$\\badcommand$",
                  "\\input{x}", "quoted", "1.one", "1 | 2"):
        assert words in page.text, words
        assert squeezed(words) in squeezed(" ".join(texts(write_pdf(said))[:2])), words


def test_a_picture_kept_in_a_note_is_shown():
    png = base64.b64decode("iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAAAAAA6fptVAAAACklEQVR4nGNgAAAAAgABSK+kcQAAAABJRU5Erk"
                           "Jggg==")
    said = one_page()
    said["sections"][1]["nodes"].append(notes.blocks_of("![Mill cert](attachment:c.png)",
                                                        {"c.png": ("image/png", png)}))
    assert 'alt="Mill cert"' in write_html(said)
    with pikepdf.open(io.BytesIO(write_pdf(said))) as file:
        assert any(str(each.Alt) == "Mill cert" for each in file.objects
                   if isinstance(each, pikepdf.Dictionary) and "/Alt" in each)


def test_an_unknown_name_of_a_module_is_an_error():
    with pytest.raises(AttributeError, match="no attribute 'Exporter'"):
        pdf.Exporter  # noqa: B018 - reading the attribute is the test
