"""A check of an issued calc: each digit that can be altered is altered, and each alteration is told."""

import base64
import io
import json
import re

import pikepdf
import pypdf
import pytest
from issued import ROOT, Issued, RememberingIssuer, chosen, demo, digits, with_digit

from calclib import __main__, checking
from calclib.case import load
from calclib.checking import ALTERED, DIFFERS, IDENTICAL, check
from calclib.issuing import issue, pages
from calclib.issuing.html import write_html
from calclib.issuing.pdf import write_pdf


@pytest.fixture(scope="module")
def issuer():
    with RememberingIssuer() as made:
        yield made


@pytest.fixture(scope="module")
def issued(issuer):
    return demo(issuer)


@pytest.fixture
def report_on(tmp_path, issuer, issued):
    """Write one file of the issued calc with other content, and return the report on it."""
    def made(suffix, content):
        path = tmp_path / issued.name(suffix)
        path.write_bytes(content)
        return check(path, issuer)
    return made


def assert_altered(report, *words):
    assert report.status == ALTERED, report.text()
    for each in words:
        assert each in report.text()


# --- as issued ----------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb", ".json"])
def test_a_file_as_issued_is_identical(report_on, issued, suffix):
    report = report_on(suffix, issued[suffix])
    assert (report.status, report.remarks) == (IDENTICAL, [])
    assert report.text().splitlines()[0].endswith(": IDENTICAL")
    assert "every number of the record and every result printed agree with the recomputed calc" in report.text()


def test_a_folder_as_issued_is_identical(tmp_path, issuer, issued):
    folder = issued.write(tmp_path / "rev-0")
    (folder / ".DS_Store").write_bytes(b"what a file browser leaves")
    report = check(folder, issuer)
    assert (report.status, report.remarks) == (IDENTICAL, [])


def test_the_exit_status_tells(tmp_path, issuer, issued, monkeypatch, capsys):
    monkeypatch.setattr(issue, "Issuer", lambda: issuer)
    monkeypatch.setattr(RememberingIssuer, "__exit__", lambda *_: None)
    folder = issued.write(tmp_path / "rev-0")
    assert __main__.main(["check", str(folder)]) == 0
    assert capsys.readouterr().out.startswith(f"{folder}: IDENTICAL\n")
    record = json.loads(issued[".json"])
    record["results"]["limit_states"][0]["available_strength"] = 300.0
    (folder / issued.name(".json")).write_text(json.dumps(record), encoding="utf-8")
    assert __main__.main(["check", str(folder / issued.name(".json"))]) == 1
    out = capsys.readouterr().out
    assert ('limit state "Tensile rupture on the effective net area", available_strength: record 300.0, recomputed '
            "256.425 (+17 %)") in out
    (folder / issued.name(".html")).write_bytes(issued[".html"].replace(b"341.9", b"349.1"))
    assert __main__.main(["check", str(folder)]) == 3
    assert capsys.readouterr().out.startswith(f"{folder}: ALTERED\n")


# --- HTML ---------------------------------------------------------------------------------------------------------

HTML_PARTS = {
    "head and style": rb"(?s)^.*?</style>",
    "title block": rb'(?s)<dl class="title-block">.*?</dl>',
    "verdict": rb'(?s)<div class="verdict">.*?</div>',
    "summary of limit states": rb'(?s)<table class="data strengths.*?</table>',
    "an equation": rb'(?s)<div class="equation">.*?</div></div>|<div class="equation">.*?</p>',
    "a result": rb'(?s)<mn>\d+\.\d</mn>',
    "detailing rules": rb'(?s)Detailing rules</h2>.*?</section>',
    "inputs": rb'(?s)Inputs</h2>.*?</section>',
    "revisions": rb'(?s)Revision history</h2>.*?</section>',
    "for the checker": rb'(?s)For the checker</h2>.*?</section>',
    "names of attached files": rb'<a download="[^"]*"',
}


@pytest.mark.parametrize("part", HTML_PARTS)
def test_a_digit_altered_in_a_page(report_on, issued, part):
    page = issued[".html"]
    places = digits(page, HTML_PARTS[part])
    assert places
    for place in chosen(places, 3):
        assert_altered(report_on(".html", with_digit(page, place)), "printed", "recomputed")


@pytest.mark.parametrize("old, new", [(b"To scale.", b"Not to scale."), (b'alt="Dimensioned', b'alt="Rough'),
                                      (b"</html>\n", b"</html>"), (b"</style>", b"dd{display:none}</style>"),
                                      (b"</main>", b"<script>1</script></main>"), (b"meets", b"fails")])
def test_words_altered_in_a_page(report_on, issued, old, new):
    page = issued[".html"].replace(old, new, 1)
    assert page != issued[".html"]
    assert_altered(report_on(".html", page), "printed", "recomputed")


def test_a_digit_altered_in_the_numbers_of_each_equation_of_a_page(report_on, issued):
    page = issued[".html"]
    equations = list(re.finditer(rb'(?s)<div class="equation">.*?<p class="cite">', page))
    assert len(equations) > 15
    altered = page
    for number, equation in enumerate(equations):   # all in one page; each must be told by itself
        places = [equation.start() + m.start(1) for m in re.finditer(rb"<mn>\D*(\d)[^<]*</mn>", equation[0])]
        altered = with_digit(altered, places[number % len(places)])
    told = [words for status, words in report_on(".html", altered).findings if status == ALTERED]
    assert len(told) == len(equations)


def test_a_digit_altered_in_a_drawing_of_a_page(report_on, issued):
    page = issued[".html"]
    drawings = list(re.finditer(rb"data:image/svg\+xml;base64,([^\"]+)", page))
    assert len(drawings) > 3
    for found in drawings:
        svg = base64.b64decode(found[1])
        for place in chosen(digits(svg), 2):
            again = base64.b64encode(with_digit(svg, place))
            assert_altered(report_on(".html", page[:found.start(1)] + again + page[found.end(1):]))


@pytest.mark.parametrize("suffix", [".yaml", ".json", ".ipynb"])
def test_a_digit_altered_in_a_file_attached_to_a_page(report_on, issued, suffix):
    for place in chosen(digits(issued[suffix]), 5):
        content = with_digit(issued[suffix], place)
        page = issued[".html"].replace(base64.b64encode(issued[suffix]), base64.b64encode(content))
        assert page != issued[".html"]
        assert_altered(report_on(".html", page), {".yaml": "inputs or record were changed after issue",
                                                  ".json": "its notebook holds another case or record",
                                                  ".ipynb": "is not the one issued"}[suffix])


def test_a_page_with_the_line_ends_of_another_system_is_as_issued(report_on, issued):
    report = report_on(".html", issued[".html"].replace(b"\n", b"\r\n"))
    assert report.status == IDENTICAL
    assert "the bytes are not as issued" in report.text()


# --- notebook -----------------------------------------------------------------------------------------------------

def outputs_of(notebook, mime):
    return [output["data"] for cell in notebook["cells"] for output in cell.get("outputs", [])
            if mime in output.get("data", {})]


@pytest.mark.parametrize("mime", ["text/latex", "text/markdown", "text/plain"])
def test_a_digit_altered_in_each_output_of_a_notebook(report_on, issued, mime):
    notebook = json.loads(issued[".ipynb"])
    altered = 0
    for data in outputs_of(notebook, mime):
        text = "".join(data[mime]).encode()
        if places := digits(text):
            data[mime] = with_digit(text, chosen(places, 1)[0]).decode()
            altered += 1
    assert altered > 5
    report = report_on(".ipynb", pages.serialised(notebook))
    assert_altered(report)
    assert len(report.findings) == altered


@pytest.mark.parametrize("mime", ["application/vnd.calclib.section+json", "application/vnd.calclib.calc+json"])
def test_a_digit_altered_in_what_a_notebook_stores_beside_its_outputs(report_on, issued, mime):
    stored = [json.dumps(data[mime]).encode() for data in outputs_of(json.loads(issued[".ipynb"]), mime)]
    for number, text in enumerate(stored):
        for place in chosen(digits(text), 12 if len(stored) == 1 else 1):
            notebook = json.loads(issued[".ipynb"])
            altered = with_digit(text, place)
            try:
                outputs_of(notebook, mime)[number][mime] = json.loads(altered)
            except ValueError:   # 1.0 became 01.0 or an escape ended: no data any more
                continue
            report = report_on(".ipynb", pages.serialised(notebook))
            assert report.findings and report.status != IDENTICAL, altered[place - 20:place + 5]


def test_a_byte_altered_in_each_picture_of_a_notebook(report_on, issued):
    notebook = json.loads(issued[".ipynb"])
    pictures = outputs_of(notebook, "image/png")
    for data in pictures:
        png = bytearray(base64.b64decode("".join(data["image/png"])))
        png[len(png) // 2] ^= 1
        data["image/png"] = base64.b64encode(png).decode()
    report = report_on(".ipynb", pages.serialised(notebook))
    assert len(report.findings) == len(pictures) > 3
    assert_altered(report)


def test_a_digit_altered_in_source_or_setting_of_a_notebook(report_on, issued):
    notebook = json.loads(issued[".ipynb"])
    content = issued[".ipynb"]
    for cell in notebook["cells"]:
        if any(c.isdigit() for c in "".join(cell["source"])):
            source = json.dumps("".join(cell["source"]), ensure_ascii=False).encode()
            start = content.index(source)
            assert_altered(report_on(".ipynb", with_digit(content, start + digits(source)[0])))
    for key in (rb'"execution_count": \d+', rb'"nbformat_minor": \d', rb'"display_name": "Python 3'):
        assert_altered(report_on(".ipynb", with_digit(content, digits(content, key)[-1])))


def test_a_parameter_added_or_a_cell_removed_is_told(report_on, issued):
    notebook = json.loads(issued[".ipynb"])
    parameters = next(cell for cell in notebook["cells"] if cell["id"] == "parameters")
    parameters["source"] = parameters["source"].replace('plate_width = ""', 'plate_width = "9 in"')
    assert_altered(report_on(".ipynb", pages.serialised(notebook)),
                   "its source is not that of the workbook (it was not run)", "9 in")
    notebook = json.loads(issued[".ipynb"])
    del notebook["cells"][10]
    report = report_on(".ipynb", pages.serialised(notebook))
    assert_altered(report, 'cells: printed "", recomputed "')
    assert len(report.findings) == 1


def test_a_notebook_saved_in_another_form_is_as_issued(report_on, issued):
    notebook = json.loads(issued[".ipynb"])
    for data in outputs_of(notebook, "text/plain"):
        data["text/plain"] = data["text/plain"].splitlines(keepends=True)
    report = report_on(".ipynb", json.dumps(notebook, indent=2).encode())
    assert report.status == IDENTICAL, report.text()
    assert "the bytes are not as issued" in report.text()


# --- record and case ----------------------------------------------------------------------------------------------

def leaves(value, place=()):
    if isinstance(value, (dict, list)):
        for key, each in value.items() if isinstance(value, dict) else enumerate(value):
            yield from leaves(each, (*place, key))
    else:
        yield place, value


def with_leaf(data, place, value):
    data = json.loads(json.dumps(data))
    inner = data
    for key in place[:-1]:
        inner = inner[key]
    inner[place[-1]] = value
    return data


def test_each_number_and_each_digit_of_a_record_altered(report_on, issued):
    record = json.loads(issued[".json"])
    count = 0
    for place, value in leaves(record):
        if place[0] in ("inputs", "revisions") or place == ("calclib",):
            continue         # each is another case; below
        if type(value) in (int, float):
            altered = value + (abs(value) * 1e-11 or 1e-11) if count % 2 else value + 1
            assert altered != value
        elif isinstance(value, bool):
            altered = not value
        elif isinstance(value, str) and (places := digits(value.encode())):
            altered = with_digit(value.encode(), chosen(places, 1)[0]).decode()
        else:
            continue
        count += 1
        report = report_on(".json", json.dumps(with_leaf(record, place, altered)).encode())
        assert report.status in (DIFFERS, ALTERED), place
        assert report.findings
    assert count > 100


def test_a_digit_altered_in_the_inputs_of_a_record(report_on, issued):
    record = json.loads(issued[".json"])
    for place in (("inputs", "plate_thickness"), ("inputs", "subject"), ("revisions", 0, 1)):
        value = dict(leaves(record))[place].encode()
        altered = with_leaf(record, place, with_digit(value, digits(value)[0]).decode())
        assert_altered(report_on(".json", json.dumps(altered).encode()), "the inputs have the digest")


def test_a_record_of_another_version_is_no_clean_one(report_on, issued):
    altered = with_leaf(json.loads(issued[".json"]), ("calclib",), "0.0.9")
    report = report_on(".json", json.dumps(altered).encode())
    assert report.text().splitlines()[0].endswith("NUMBERS IDENTICAL, layout and drawings not compared")
    assert "issued with calclib 0.0.9" in report.text()


def test_a_digit_altered_in_the_case_of_a_folder(tmp_path, issuer, issued):
    for place in chosen(digits(issued[".yaml"]), 8):
        folder = issued.write(tmp_path, yaml=with_digit(issued[".yaml"], place))
        assert_altered(check(folder, issuer))


def test_a_case_written_in_another_form_is_the_same_case(tmp_path, issuer, issued):
    folder = issued.write(tmp_path, yaml=b"# by hand\n" + issued[".yaml"].replace(b"\n", b"\r\n"))
    report = check(folder, issuer)
    assert report.status == IDENTICAL
    assert "written otherwise than issued; the inputs are the same" in report.text()


@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb", ".json", ".yaml"])
def test_a_file_missing_from_a_folder(tmp_path, issuer, issued, suffix):
    folder = issued.write(tmp_path)
    (folder / issued.name(suffix)).unlink()
    assert_altered(check(folder, issuer), f"{issued.name(suffix)} is missing from the folder")


@pytest.mark.parametrize("name", ["letter.txt", "TC-101-rev-0-signed.pdf", "sub"])
def test_a_file_more_in_a_folder(tmp_path, issuer, issued, name):
    folder = issued.write(tmp_path)
    if name == "sub":
        (folder / name).mkdir()
    else:
        (folder / name).write_bytes(issued[".pdf"])
    assert_altered(check(folder, issuer), f"{name} is not part of the issue")


def test_a_broken_file_among_good_ones(tmp_path, issuer, issued):
    folder = issued.write(tmp_path, pdf=issued[".pdf"][:5000])
    assert_altered(check(folder, issuer), "is not a PDF as it was issued")


def test_files_of_two_calcs_in_one_folder(tmp_path, issuer, issued):
    other = Issued(issuer.build(load(ROOT / "workbooks" / "cases" / "hanger_plate.yaml")
                                .with_texts(required_strength="140 kip")))
    folder = issued.write(tmp_path, html=other[".html"])
    assert_altered(check(folder, issuer), "carries other inputs or another record than")


# --- PDF ----------------------------------------------------------------------------------------------------------

def saved(pdf):
    out = io.BytesIO()
    pdf.save(out, compress_streams=False, fix_metadata_version=False)
    return out.getvalue()


def codes(font):
    """Return {digit: code} of a font, from the table that says which code is which character."""
    table = font.ToUnicode.read_bytes().decode("latin-1")
    made = {}
    for code, text in re.findall(r"<([0-9a-fA-F]{4})>\s*<([0-9a-fA-F]{4})>", table):
        if chr(int(text, 16)).isdigit():
            made[chr(int(text, 16))] = bytes.fromhex(code)
    return made


def with_printed_digit(pdf, page):
    """Print another digit in the place of one on a page, and return the digits; nothing else changes."""
    instructions, changed = [], None
    for operands, operator in pikepdf.parse_content_stream(page):
        if str(operator) == "Tf":
            by_digit = codes(page.Resources.Font[str(operands[0])])
        if str(operator) in ("Tj", "TJ") and changed is None and len(by_digit) > 1:
            strings = list(operands[0]) if str(operator) == "TJ" else [operands[0]]
            for i, string in enumerate(strings):
                if not isinstance(string, pikepdf.String):
                    continue
                content = bytes(string)
                pairs = [content[k:k + 2] for k in range(0, len(content), 2)]
                digit = next((d for d, code in by_digit.items() if code in pairs), None)
                if digit and changed is None:
                    other = next(d for d in by_digit if d != digit)
                    pairs[pairs.index(by_digit[digit])] = by_digit[other]
                    strings[i] = pikepdf.String(b"".join(pairs))
                    changed = (digit, other)
            operands = [pikepdf.Array(strings)] if str(operator) == "TJ" else strings
        instructions.append((operands, operator))
    assert changed
    page.Contents = pdf.make_stream(pikepdf.unparse_content_stream(instructions))
    return changed


def test_a_pdf_saved_again_is_as_issued(report_on, issued):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        out = io.BytesIO()
        pdf.save(out)      # which writes the properties in another form
        for content in (saved(pdf), out.getvalue()):
            report = report_on(".pdf", content)
            assert report.status == IDENTICAL, report.text()
            assert "the bytes are not as issued (signed, or saved again)" in report.text()


def test_a_digit_altered_in_a_line_of_a_drawing_of_a_pdf(report_on, issued):
    pattern = rb"[\d.]+ [\d.]+ l\s+[\d.]+ [\d.]+ l\s"
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        numbers = [i for i, page in enumerate(pdf.pages) if re.search(pattern, page.Contents.read_bytes())]
    assert len(numbers) > 1
    for number in numbers[:3]:
        with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
            page = pdf.pages[number]
            content = page.Contents.read_bytes()
            page.Contents = pdf.make_stream(with_digit(content, digits(content, pattern)[-1]))
            assert_altered(report_on(".pdf", saved(pdf)), f"page {number + 1}: what is printed is not what was issued")


def test_a_digit_altered_on_each_page_of_a_pdf(report_on, issued):
    """All in one file; each must be told by itself."""
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        for page in pdf.pages:
            with_printed_digit(pdf, page)
        told = [words for status, words in report_on(".pdf", saved(pdf)).findings if status == ALTERED]
        count = len(pdf.pages)
    assert count > 6
    for number in range(1, count + 1):
        assert any(f"page {number}: printed \"" in words for words in told)
        assert any(f"page {number}: what is printed is not what was issued" in words for words in told)


def streams(pdf, test):
    return [each for each in pdf.objects if isinstance(each, pikepdf.Stream) and test(each)]


PDF_STREAMS = {
    "what a font says": (lambda s: b"beginbfchar" in s.read_bytes(), "a font is not what"),
    "the properties": (lambda s: s.get("/Type") == "/Metadata", "the property XMP: printed"),
    "attached files": (lambda s: s.get("/Type") == "/EmbeddedFile", "altered: "),
}


@pytest.mark.parametrize("part", PDF_STREAMS)
def test_a_digit_altered_in_a_stream_of_a_pdf(report_on, issued, part):
    test, words = PDF_STREAMS[part]
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        count = len(streams(pdf, test))
    assert count
    for number in range(count):
        with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
            stream = streams(pdf, test)[number]
            content = stream.read_bytes()
            pattern = {"what a font says": rb"<[0-9a-f]+> <\w+>", "the properties": rb"(?s)<dc:title>.*?</dc:title>"}
            pattern = pattern.get(part, rb"(?s).*")
            stream.write(with_digit(content, chosen(digits(content, pattern), 1)[0]))
            assert_altered(report_on(".pdf", saved(pdf)), words)


def test_the_outline_of_a_glyph_altered(report_on, issued):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        font = streams(pdf, lambda s: s.get("/Subtype") in ("/CIDFontType0C", "/OpenType"))[0]
        content = bytearray(font.read_bytes())
        content[len(content) // 2] ^= 1
        font.write(bytes(content))
        assert_altered(report_on(".pdf", saved(pdf)), "a font is not what was issued")


def dictionaries(pdf, key):
    return [each for each in pdf.objects if isinstance(each, pikepdf.Dictionary) and key in each
            and any(c.isdigit() for c in str(each[key]))]


@pytest.mark.parametrize("key, words", [("/Alt", "the words for screen readers: not as issued, printed \""),
                                        ("/Title", "printed \"")])
def test_a_digit_altered_in_words_and_bookmarks_of_a_pdf(report_on, issued, key, words):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        count = len(dictionaries(pdf, key))
    assert count
    for number in chosen(list(range(count)), 6):
        with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
            element = dictionaries(pdf, key)[number]
            text = str(element[key])
            place = next(i for i, c in enumerate(text) if c.isdigit())
            element[key] = text[:place] + str((int(text[place]) + 1) % 10) + text[place + 1:]
            assert_altered(report_on(".pdf", saved(pdf)), words)


@pytest.mark.parametrize("key", ["/Title", "/Author", "/CreationDate", "/Creator"])
def test_a_property_of_a_pdf_altered(report_on, issued, key):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        pdf.trailer.Info[key] = "D:20261121120000Z" if "Date" in key else "Someone 1"
        assert_altered(report_on(".pdf", saved(pdf)), f"the property {key[1:]}: ")


def test_pages_removed_added_swapped_and_turned(report_on, issued):
    def changed(change):
        with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
            change(pdf)
            return report_on(".pdf", saved(pdf))

    def swap(pdf):
        pdf.pages.insert(2, pdf.pages[3])
        del pdf.pages[4]

    assert_altered(changed(lambda pdf: pdf.pages.__delitem__(3)), "pages, issued again")
    assert_altered(changed(lambda pdf: pdf.pages.append(pdf.pages[0])), "pages, issued again")
    assert_altered(changed(swap), "page 3")
    assert_altered(changed(lambda pdf: pdf.pages[1].rotate(90, relative=False)), "page 2")
    assert_altered(changed(lambda pdf: setattr(pdf.pages[1], "mediabox", [0, 0, 612, 700])), "page 2")


def test_a_picture_stamped_over_a_page(report_on, issued):
    stamp = pikepdf.new()
    page = stamp.add_blank_page(page_size=(100, 20))
    page.Contents = stamp.make_stream(b"1 1 1 rg 0 0 100 20 re f")
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        pdf.pages[0].add_overlay(page, pikepdf.Rectangle(300, 400, 400, 420))
        assert_altered(report_on(".pdf", saved(pdf)), "page 1: ")


@pytest.mark.parametrize("subtype", ["FreeText", "Stamp", "Square", "Redact"])
def test_an_annotation_over_a_page(report_on, issued, subtype):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        mark = pikepdf.Dictionary(Type=pikepdf.Name.Annot, Subtype=pikepdf.Name(f"/{subtype}"), F=4,
                                  Rect=[300, 400, 400, 420], Contents="175.0 kip")
        pdf.pages[1].Annots = pikepdf.Array([pdf.make_indirect(mark)])
        assert_altered(report_on(".pdf", saved(pdf)), f"page 2: an added mark (annotation {subtype})")


def signed(issued, rectangle, **more):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        mark = pdf.make_indirect(pikepdf.Dictionary(
            Type=pikepdf.Name.Annot, Subtype=pikepdf.Name.Widget, FT=pikepdf.Name.Sig, T="Seal", Rect=rectangle, F=4,
            P=pdf.pages[0].obj))
        pdf.pages[0].Annots = pikepdf.Array([mark])
        pdf.Root.AcroForm = pikepdf.Dictionary(Fields=pikepdf.Array([mark]), SigFlags=3, **more)
        return saved(pdf)


def test_a_signature_that_shows_nowhere_is_a_note_and_one_that_shows_is_a_mark(report_on, issued):
    report = report_on(".pdf", signed(issued, [0, 0, 0, 0]))
    assert report.status == IDENTICAL, report.text()
    assert "a signature was added that shows on no page; whether it is valid is not checked here" in report.text()
    assert_altered(report_on(".pdf", signed(issued, [400, 500, 560, 600])), "an added mark (annotation Widget)")
    assert_altered(report_on(".pdf", signed(issued, [0, 0, 0, 0], XFA=pikepdf.String("<xdp/>"))),
                   "fields or actions were added")


def test_an_action_that_runs_on_opening_is_told(report_on, issued):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        pdf.Root.OpenAction = pikepdf.Dictionary(S=pikepdf.Name.JavaScript, JS="app.alert(1)")
        assert_altered(report_on(".pdf", saved(pdf)), "/OpenAction: not as issued")


def test_an_update_appended_that_changes_nothing_drawn_is_a_note(report_on, issued):
    writer = pypdf.PdfWriter(io.BytesIO(issued[".pdf"]), incremental=True)
    writer.add_metadata({"/ModDate": "D:20261201080000Z", "/Producer": "a signing program"})
    out = io.BytesIO()
    writer.write(out)
    assert out.getvalue().startswith(issued[".pdf"]) and out.getvalue() != issued[".pdf"]
    report = report_on(".pdf", out.getvalue())
    assert report.status == IDENTICAL, report.text()
    assert "another program saved or signed it" in report.text()


def test_an_update_appended_that_prints_otherwise_is_told(report_on, issued):
    writer = pypdf.PdfWriter(io.BytesIO(issued[".pdf"]), incremental=True)
    stream = pypdf.generic.DecodedStreamObject()
    stream.set_data(b"q 1 1 1 rg 300 400 100 20 re f Q")
    page = writer.pages[0]
    page[pypdf.generic.NameObject("/Contents")] = pypdf.generic.ArrayObject(
        [page.raw_get("/Contents"), writer._add_object(stream)])
    out = io.BytesIO()
    writer.write(out)
    assert_altered(report_on(".pdf", out.getvalue()), "page 1: what is printed is not what was issued")


def test_an_attachment_replaced_or_added(report_on, issued):
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        pdf.attachments["../../evil.txt"] = pikepdf.AttachedFileSpec(pdf, b"1", filename="../../evil.txt")
        assert_altered(report_on(".pdf", saved(pdf)), "the attached ../../evil.txt is not the one issued")


# --- a library that computes otherwise, and a calc altered everywhere ---------------------------------------------

OTHER_FACTOR = """
from dataclasses import replace
from calclib.members import pin_plate
pin_plate.{name} = replace(pin_plate.{name}, phi={phi})
"""
REPORT = ('limit state "Tensile rupture on the effective net area", available_strength: record 256.425, recomputed '
          "273.52 (-6.25 %)")


@pytest.fixture(scope="module")
def other_library():
    """An issuer whose kernel computes rupture with another factor."""
    with RememberingIssuer() as made:
        made.run_in_kernel(OTHER_FACTOR.format(name="RUPTURE", phi=0.80))
        yield made


@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb", ".json"])
def test_a_library_that_computes_otherwise_is_a_difference_and_no_alteration(tmp_path, other_library, issued, suffix):
    path = tmp_path / issued.name(suffix)
    path.write_bytes(issued[suffix])
    report = check(path, other_library)
    assert report.status == DIFFERS, report.text()
    assert REPORT in report.text()
    assert "phi: record 0.75, recomputed 0.8 (-6.25 %)" in report.text()


def test_where_results_differ_a_print_altered_by_hand_is_still_told(tmp_path, other_library, issued):
    path = tmp_path / issued.name(".html")
    path.write_bytes(issued[".html"].replace(b"<mn>341.9</mn>", b"<mn>349.1</mn>"))
    assert_altered(check(path, other_library), '"349.1"', REPORT)
    path = tmp_path / issued.name(".pdf")
    with pikepdf.open(io.BytesIO(issued[".pdf"])) as pdf:
        with_printed_digit(pdf, pdf.pages[2])
        path.write_bytes(saved(pdf))
    assert_altered(check(path, other_library), "page 3: what is printed is not what was issued", REPORT)
    notebook = json.loads(issued[".ipynb"])
    data = outputs_of(notebook, "text/latex")[1]
    data["text/latex"] = data["text/latex"].replace("341.9", "349.1")
    path = tmp_path / issued.name(".ipynb")
    path.write_bytes(pages.serialised(notebook))
    assert_altered(check(path, other_library), "text/latex", "349.1", REPORT)


def forged(issued, change):
    """Return the calc with its notebook changed and everything laid out from that: no two parts disagree."""
    notebook = json.loads(change(issued[".ipynb"].decode()))
    document, case, record = pages.document_of(json.loads(json.dumps(notebook)))
    files = {issued.name(".yaml"): case.encode(),
             issued.name(".json"): (json.dumps(record, indent=1, ensure_ascii=False) + "\n").encode(),
             issued.name(".ipynb"): pages.serialised(notebook)}
    attachments = pages.attachments(files)
    return Issued({**files, issued.name(".html"): write_html(document, attachments).encode(),
                   issued.name(".pdf"): write_pdf(document, attachments)})


@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb", ".json", ""])
def test_a_number_altered_in_every_place_alike_is_caught(tmp_path, issuer, issued, suffix):
    calc = forged(issued, lambda text: text.replace("341.9", "349.1").replace("256.425", "261.825")
                  .replace("256.4", "261.8"))
    folder = calc.write(tmp_path / "rev-0")
    report = check(folder / calc.name(suffix) if suffix else folder, issuer)
    assert report.status == DIFFERS, report.text()
    assert "available_strength: record 261.825, recomputed 256.425 (+2.11 %)" in report.text()


@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb", ".json"])
def test_an_input_altered_with_its_digest_kept(tmp_path, issuer, issued, suffix):
    calc = forged(issued, lambda text: text.replace('plate_width: \\"8 in', 'plate_width: \\"9 in')
                  .replace('"plate_width": "8 in', '"plate_width": "9 in'))
    folder = calc.write(tmp_path / "rev-0")
    assert_altered(check(folder / calc.name(suffix), issuer), "the record says 3d357af779db",
                   "inputs or record were changed after issue")


def test_an_input_altered_to_one_that_cannot_be_used(tmp_path, issuer, issued):
    folder = issued.write(tmp_path, json=issued[".json"].replace(b'"plate_width": "8 in"', b'"plate_width": "8"'))
    path = folder / issued.name(".json")
    assert_altered(check(path, issuer), "nothing can be computed from the inputs: plate_width: 8 has no unit")


# --- another version ----------------------------------------------------------------------------------------------

OTHER_VERSION = """
from calclib import document, record
document.__version__ = record.__version__ = "0.0.9"
"""


@pytest.fixture(scope="module")
def older():
    """The demo calc as another version of calclib issued it."""
    def made_with_older(original=issue.made_with):
        return {**original(), "calclib": "0.0.9"}

    patch = pytest.MonkeyPatch()
    with RememberingIssuer() as made, patch.context() as patched:
        patched.setattr(issue, "made_with", made_with_older)
        made.run_in_kernel(OTHER_VERSION)
        return demo(made)


@pytest.mark.parametrize("suffix", [".html", ".json", ""])
def test_numbers_of_another_version_are_compared_and_its_layout_is_not(tmp_path, issuer, older, suffix):
    folder = older.write(tmp_path / "rev-0")
    report = check(folder / older.name(suffix) if suffix else folder, issuer)
    assert report.status == IDENTICAL, report.text()
    assert report.numbers_only
    assert "issued with calclib 0.0.9; layout, drawings and marks over the page are compared only where" in \
        report.text()


def test_a_layout_of_another_version_may_look_otherwise(tmp_path, issuer, older):
    page = older[".html"].replace(b"Digest of inputs", b"Inputs").replace(b"margin", b"padding")
    path = tmp_path / older.name(".html")
    path.write_bytes(page)
    assert check(path, issuer).status == IDENTICAL


def test_a_number_altered_in_a_calc_of_another_version(tmp_path, issuer, older):
    """All in one file; each must be told by itself."""
    parts = ("title block", "verdict", "summary of limit states", "an equation", "detailing rules", "inputs",
             "revisions", "for the checker")
    page = older[".html"]
    for part in parts:
        shown = [place for place in digits(page, HTML_PARTS[part])      # no length of a bar, no target of a link
                 if page.rfind(b"<", 0, place) < page.rfind(b">", 0, place)]
        page = with_digit(page, chosen(shown, 1)[0])
    path = tmp_path / older.name(".html")
    path.write_bytes(page)
    report = check(path, issuer)
    assert_altered(report, "the numbers printed are not those of the notebook it carries")
    assert len(report.findings) == len(parts)


def test_a_digit_altered_and_a_mark_added_on_pages_of_another_version(tmp_path, issuer, older):
    path = tmp_path / older.name(".pdf")
    with pikepdf.open(io.BytesIO(older[".pdf"])) as pdf:
        with_printed_digit(pdf, pdf.pages[0])
        mark = pikepdf.Dictionary(Type=pikepdf.Name.Annot, Subtype=pikepdf.Name.Stamp, Rect=[300, 400, 400, 420])
        pdf.pages[1].Annots = pikepdf.Array([pdf.make_indirect(mark)])
        path.write_bytes(saved(pdf))
    assert_altered(check(path, issuer), "the numbers printed are not those of the notebook it carries",
                   "page 2: an added mark (annotation Stamp)")


def test_two_results_changed_places_in_a_calc_of_another_version(tmp_path, issuer, older):
    path = tmp_path / older.name(".html")
    page = older[".html"]
    path.write_bytes(page.replace(b"<mn>256.4</mn>", b"<mn>!</mn>").replace(b"<mn>307.1</mn>", b"<mn>256.4</mn>")
                     .replace(b"<mn>!</mn>", b"<mn>307.1</mn>"))
    assert path.read_bytes() != page
    assert_altered(check(path, issuer))


@pytest.mark.parametrize("suffix", [".pdf", ".html", ".ipynb"])
def test_a_print_altered_alike_in_document_and_notebook_of_another_version(tmp_path, issuer, older, suffix):
    """The record is left as it is."""
    calc = forged(older, lambda text: text.replace("341.9 ", "349.1 ").replace("341.9\\\\", "349.1\\\\"))
    path = tmp_path / calc.name(suffix)
    path.write_bytes(calc[suffix])
    assert_altered(check(path, issuer), "349.1")


def test_versions_that_disagree_within_a_calc(report_on, older, issued):
    notebook = json.loads(older[".ipynb"])
    notebook["metadata"]["calclib"]["calclib"] = "0.0.8"
    assert_altered(report_on(".ipynb", pages.serialised(notebook)),
                   "the notebook says calclib 0.0.8, the record 0.0.9")


# --- what a file asks for is never done ---------------------------------------------------------------------------

def test_no_code_of_a_notebook_is_run(tmp_path, report_on, issued):
    notebook = json.loads(issued[".ipynb"])
    witness = tmp_path / "ran"
    for cell in notebook["cells"]:
        if cell["cell_type"] == "code":
            cell["source"] = f"open({str(witness)!r}, 'w').close()\n" + "".join(cell["source"])
    assert_altered(report_on(".ipynb", pages.serialised(notebook)), "(it was not run)")
    assert not witness.exists()


def test_a_report_cannot_steer_a_terminal(report_on, issued):
    report = report_on(".html", issued[".html"].replace(b"<mn>341.9</mn>", b"<mn>\x1b[2J34\n1.9</mn>"))
    assert_altered(report)
    assert "\x1b" not in report.text()
    assert len(report.text().splitlines()) == 2 + len(report.findings)


def test_a_report_counts_what_it_does_not_name(report_on, issued):
    report = report_on(".html", re.sub(rb"<mn>\d", b"<mn>0", issued[".html"]))
    assert f"  and {len(report.findings) - checking._SHOWN} more of altered" in report.text().splitlines()
