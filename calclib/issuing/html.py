"""A document -> one HTML page that fetches nothing, runs nothing and prints with its title block on every sheet.

Formulas are MathML, figures and attachments are data addresses. Every text is escaped where it is written.
"""

import base64
from html import escape
from pathlib import Path
from urllib.parse import quote
from xml.etree import ElementTree

from calclib.issuing import mathematics, pages

_STYLE = Path(__file__).parent / "templates" / "calc.css"
_NO_ATTACHMENTS = {}
_POLICY = ("default-src 'none'; style-src 'unsafe-inline'; img-src data:; font-src data:; base-uri 'none'; "
           "form-action 'none'")
_MATHML = "http://www.w3.org/1998/Math/MathML"
ElementTree.register_namespace("", _MATHML)
_LONG = 1500  # characters of MathML, about a line of a printed page
_REFUSED = '<p class="refused">Not acceptable</p>'
_SEVERITIES = {"error": "Error", "fails": "Fails", "caution": "Caution", "note": "Note"}


def write_html(document, attachments=_NO_ATTACHMENTS):
    """Return the page of a document as text, the same whenever and wherever it is written.

    Parameters
    ----------
    document : see `calclib.document`
    attachments : file name -> (bytes, mime, description)

    Raises
    ------
    CalcError : a formula cannot be typeset.
    """
    document = pages.printable(document)
    formulas = mathematics.mathml(mathematics.latex_of(document["sections"]))
    head = document["head"]
    title = " \N{EN DASH} ".join(text for text in (head["calc_number"], document["title"], head["subject"]) if text)
    paper = "A4" if document["page"] == "a4" else "letter"
    body = [_cover(document), _contents(document["sections"])]
    body += [_section(i, section, formulas) for i, section in enumerate(document["sections"], start=1)]
    body += [_attached(attachments)]
    # The title block is the head of a table without meaning, because browsers repeat that on every printed sheet.
    return "\n".join((
        "<!DOCTYPE html>", '<html lang="en">', "<head>", '<meta charset="utf-8">',
        f'<meta http-equiv="Content-Security-Policy" content="{_POLICY}">',
        '<meta name="viewport" content="width=device-width, initial-scale=1">',
        f"<title>{escape(title)}</title>",
        f"<style>\n@page {{ size: {paper}; }}\n{_STYLE.read_text(encoding='utf-8')}</style>", "</head>",
        f'<body class="{"passes" if document["verdict"]["passes"] else "fails"}">',
        '<table class="sheet" role="presentation"><thead><tr><td>', _title_block(document), "</td></tr></thead>",
        "<tbody><tr><td>", "<main>", *body, "</main>", "</td></tr></tbody></table>", "</body>", "</html>", ""))


def _text(string):
    return escape(string).replace("\n", "<br>")


def _title_block(document):
    head = document["head"]
    fields = (("Project", head["project"], "wide"), ("Calc no.", head["calc_number"], ""),
              ("Revision", head["revision"], ""), ("Date", head["date"], ""),
              ("Subject", head["subject"], "wide"), ("Prepared by", head["prepared_by"], ""),
              ("Checked by", head["checked_by"], "double"),
              ("Firm", head["firm"], "wide"), ("Digest of inputs", document["digest"], ""),
              ("Computed with", document["version"], "double"))
    cells = "\n".join(f'<div class="{kind}"><dt>{name}</dt><dd>{_text(value)}</dd></div>'
                      for name, value, kind in fields)
    return f'<dl class="title-block">\n{cells}\n</dl>' + ("" if document["verdict"]["passes"] else "\n" + _REFUSED)


def _cover(document):
    client = document["head"]["client"]
    verdict = document["verdict"]
    words = "Acceptable" if verdict["passes"] else "NOT ACCEPTABLE"
    return "\n".join((
        '<div class="cover">', "<div>", f"<h1>{_text(document['title'])}</h1>", f"<p>{_text(document['basis'])}</p>",
        f'<p class="quiet">For {_text(client)}</p>' if client else "",
        f'<div class="verdict"><strong>{words}</strong><p>{_text(verdict["text"])}</p></div>', "</div>",
        '<div class="seal"><div class="seal-area"><span>Seal</span></div>',
        "<p>Signature and date</p>", "<p>Licence no.</p>", "<p>Expiry</p></div>", "</div>"))


def _contents(sections):
    items = "\n".join(f'<li><a href="#section-{i}">{_text(section["title"])}</a></li>'
                      for i, section in enumerate(sections, start=1))
    return f'<nav aria-label="Sections"><ol>\n{items}\n</ol></nav>'


def _section(number, section, formulas):
    nodes = "\n".join(_NODES[node["type"]](node, formulas) for node in section["nodes"])
    return (f'<section aria-labelledby="section-{number}">\n<h2 id="section-{number}">{_text(section["title"])}</h2>\n'
            f"{nodes}\n</section>")


def _attached(attachments):
    items = "\n".join(
        f'<li><a download="{escape(name)}" href="data:{quote(mime, safe="/+.-")};base64,'
        f'{base64.b64encode(content).decode()}">{escape(name)}</a> {_text(description)}</li>'
        for name, (content, mime, description) in attachments.items())
    return f'<section><h2>Attached files</h2>\n<ul class="attached">\n{items}\n</ul></section>' if items else ""


# --- nodes --------------------------------------------------------------------------------------------------------

def _equation(node, formulas):
    rights = [formulas[node[name]] for name in ("symbolic", "substituted", "result") if node[name]]
    parts = "".join(f'<span class="part"><span class="sign">=</span><span class="terms">{_terms(right)}</span></span>'
                    for right in rights)
    note = f'<p class="quiet">{_text(node["note"])}</p>' if node["note"] else ""
    return (f'<div class="equation"><div class="formula"><span class="lhs">{formulas[node["lhs"]]}</span>'
            f'<span class="rhs">{parts}</span></div><p class="cite">{_text(node["cite"])}</p>{note}</div>')


def _terms(formula):
    """Cut a long formula before its sums, so that the page can break the line there."""
    if len(formula) < _LONG:
        return formula
    root = ElementTree.fromstring(formula)
    row = root[0] if len(root) == 1 and root[0].tag.endswith("mrow") else root
    groups = [[]]
    for child in row:
        if child.tag.endswith("mo") and child.text in ("+", "\N{MINUS SIGN}") and groups[-1]:
            child.set("form", "infix")
            groups.append([])
        groups[-1].append(ElementTree.tostring(child, encoding="unicode").replace(f' xmlns="{_MATHML}"', ""))
    return "".join(f'<math display="inline" xmlns="{_MATHML}"><mrow>{"".join(group)}</mrow></math>' for group in groups)


def _cell(cell, formulas):
    return _text(cell) if isinstance(cell, str) else formulas[cell["latex"]]


def _mark(word):
    return f'<span class="mark">{word}</span>'


def _table(node, formulas):
    aligns = [column["align"] for column in node["columns"]]
    head = "".join(f'<th scope="col" class="{align}">{_text(column["title"])}</th>'
                   for column, align in zip(node["columns"], aligns, strict=True))
    rows = []
    for i, row in enumerate(node["rows"]):
        mark = node["marks"].get(str(i))
        cells = [_cell(cell, formulas) for cell in row]
        if mark and not any(isinstance(cell, str) and mark in cell.lower() for cell in row):
            cells[0] += " " + _mark(mark)
        cells = "".join(f'<td class="{align}">{cell}</td>' for cell, align in zip(cells, aligns, strict=True))
        rows.append(f'<tr class="{"marked" if mark else ""}">{cells}</tr>')
    caption = f"<caption>{_text(node['caption'])}</caption>" if node["caption"] else ""
    return (f'<table class="data{" short" if len(rows) <= 12 else ""}">{caption}<thead><tr>{head}</tr></thead>\n<tbody>'
            + "\n".join(rows) + "</tbody></table>")


def _strengths(node, formulas):
    titles = ("Limit state", "Nominal", "Factor", node["columns"]["available"], node["columns"]["required"], "Ratio",
              "Share of strength used")
    head = "".join(f'<th scope="col" class="{"left" if i in (0, 6) else "right"}">{_cell(title, formulas)}</th>'
                   for i, title in enumerate(titles))
    rows = "\n".join(_strength(row, formulas) for row in node["rows"])
    return f'<table class="data strengths short"><thead><tr>{head}</tr></thead>\n<tbody>{rows}</tbody></table>'


def _strength(row, formulas):
    marks = (_mark("governs") if row["governs"] else "") + ("" if row["passes"] else " " + _mark("fails"))
    name = f'{_cell(row["name"], formulas)}<br><small>{_text(row["clause"])}</small>'
    first = f'<th scope="row" class="left">{name}{"<br>" + marks if marks else ""}</th>'
    if row["reason"]:
        return f'<tr>{first}<td colspan="6" class="left quiet">Not applicable. {_text(row["reason"])}</td></tr>'
    cells = "".join(f'<td class="right">{_cell(row[name], formulas)}</td>'
                    for name in ("nominal", "factor", "available", "required", "ratio"))
    share = row["share"]
    bar = (f'<span class="bar" aria-hidden="true"><span style="width:{100 * min(share, 1):.1f}%"></span></span>'
           + ('<span class="over">▶ over</span>' if share > 1 else ""))
    return f'<tr class="{"marked" if marks else ""}">{first}{cells}<td class="left">{bar}</td></tr>'


def _figure(node, formulas):
    mime, content = ("image/svg+xml", base64.b64encode(node["svg"].encode()).decode()) if node["svg"] else \
        ("image/png", node["png"])
    caption = f"<figcaption>{_text(node['caption'])}</figcaption>" if node["caption"] else ""
    # A figure of full width keeps the size it was drawn in where that fits, so that a scale stays true.
    width = "auto" if node["width"] >= 1 else f"{100 * float(node['width']):.1f}%"
    return (f'<figure><img alt="{escape(node["alt"])}" style="width:{width}" '
            f'src="data:{mime};base64,{escape(content)}">{caption}</figure>')


def _message(node, formulas):
    severity = node["severity"]
    word = _mark(_SEVERITIES[severity]) if severity in ("error", "fails") else \
        f"<strong>{_SEVERITIES[severity]}.</strong>"
    cite = f' <span class="quiet">({_text(node["cite"])})</span>' if node["cite"] else ""
    return f'<p class="message {severity}">{word} {_text(node["text"])}{cite}</p>'


def _list(node, formulas):
    return "<ul>" + "".join(f"<li>{_text(item)}</li>" for item in node["items"]) + "</ul>"


def _note(node, formulas):
    blocks = []
    for block in node["blocks"]:
        content = "".join(_run(run, formulas) for run in block["runs"])
        label = f'<span class="label">{_text(block["label"])}</span>' if block["label"] else ""
        tag = {"heading": "h3", "code": "pre"}.get(block["kind"], "p")
        blocks.append(f'<{tag} style="margin-left:{1.4 * block["level"]:.1f}em">{label}{content}</{tag}>')
    return '<div class="note">' + "\n".join(blocks) + "</div>"


def _run(run, formulas):
    if "latex" in run:
        return formulas[run["latex"]]
    if "png" in run:
        return f'<img alt="{escape(run["alt"])}" src="data:image/png;base64,{escape(run["png"])}">'
    made = _text(run["text"])
    for name, tag in (("code", "code"), ("strong", "strong"), ("emphasis", "em")):
        made = f"<{tag}>{made}</{tag}>" if run.get(name) else made
    return made


_NODES = {
    "text": lambda node, formulas: f"<p>{_text(node['text'])}</p>",
    "heading": lambda node, formulas: f"<h3>{_text(node['text'])}</h3>",
    "code": lambda node, formulas: f"<pre>{escape(node['text'])}</pre>",
    "equation": _equation, "table": _table, "strengths": _strengths, "figure": _figure, "message": _message,
    "list": _list, "markdown": _note,
}


def __getattr__(name):
    """Give nbconvert its exporter from here; importing nbconvert takes longer than writing a calc."""
    if name == "CalcHTMLExporter":
        from calclib.issuing.exporters import CalcHTMLExporter
        return CalcHTMLExporter
    raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
