"""What a calc says, as plain data that knows no page and no notebook: sections of text, equations, tables, figures.

The workbook shows the sections, the exporters lay them out. A section is
``{"key", "title", "nodes": [...]}``; a node is one of

    text, heading, list        words
    equation                   lhs = symbolic = substituted = result (LaTeX), cite, note
    table                      columns, rows (words), marks (row -> governs, fails, caution)
    strengths                  the summary of limit states, with the share of each ratio for a bar
    figure                     svg, png, alt, caption, width
    message                    severity, text, cite

Everything here is words and numbers as printed; the numbers themselves are in `calclib.record`.
"""

import base64

from calclib import __version__, units
from calclib.calc import CAUTION, FAILS
from calclib.typeset import typeset

CAUTIONS = (
    "This calc is an aid to a licensed engineer, who is responsible for it and for its use. Nothing here replaces "
    "engineering judgment.",
    "The building code in force, local amendments and the project's contract documents govern over this calc.",
    "The failure of a tension member can kill. Inputs, loads and load path are to be verified, and the calc is to be "
    "checked by a second engineer, before anything is built from it.",
)
UNIT_NAMES = {units.US: "US customary units (kip, in, ksi)", units.SI: "SI units (kN, mm, MPa)"}


def basis(calc):
    return f"{calc.x.standard}, {calc.x.method}, {UNIT_NAMES[calc.x.units]}"


def verdict(calc):
    """Return whether the calc passes, and the one sentence that says so."""
    governing = calc.governing
    strength = (f"{governing.title} governs: available strength {_force(calc, governing.available)}, required "
                f"{_force(calc, governing.required)}, ratio {units.ratio_text(governing.ratio)}.")
    if calc.passes:
        return {"passes": True, "text": strength}
    return {"passes": False, "text": strength + " NOT ACCEPTABLE: " + "; ".join(calc.failing) + "."}


def head(calc):
    names = ("project", "client", "firm", "calc_number", "subject", "revision", "date", "prepared_by", "checked_by")
    return {name: getattr(calc.x, name) or "" for name in names}


def cover(calc):
    """Return the document without its sections: what stands on every page, and the verdict."""
    return {"title": calc.case.kind.title, "head": head(calc), "basis": basis(calc), "page": calc.x.page.lower(),
            "digest": calc.case.digest, "version": f"calclib {__version__}", "verdict": verdict(calc)}


def document(calc):
    """Return the whole document of a calc."""
    return {**cover(calc), "sections": [section for group in SECTIONS for section in group(calc)]}


def _section(key, title, nodes):
    return {"key": key, "title": title, "nodes": nodes}


def _force(calc, value):
    return units.text(value, units.FORCE, calc.x.units)


def _table(columns, rows, marks=None, caption=""):
    return {"type": "table", "columns": [{"title": t, "align": a} for t, a in columns], "rows": rows,
            "marks": {str(k): v for k, v in (marks or {}).items()}, "caption": caption}


def _figure(make, alt, caption, vectors):
    """Return a figure node. `vectors`: with SVG (True), PNG only (False), or its words only (None)."""
    node = {"type": "figure", "svg": "", "png": "", "alt": alt, "caption": caption, "width": 1.0}
    if vectors is not None:
        from calclib import sketch  # matplotlib is slow to import and many callers want numbers only
        figure = make()
        node["png"] = base64.b64encode(sketch.png(figure)).decode()
        node["svg"] = sketch.svg(figure) if vectors else ""
    return node


def summary(calc):
    governing = calc.governing
    rows = []
    for block in calc.limit_states:
        row = {"name": block.title + (" (for comparison)" if block.advisory else ""), "clause": block.clause,
               "nominal": "", "factor": "", "available": "", "required": "", "ratio": "", "share": 0.0,
               "governs": block is governing, "passes": block.passes or block.advisory, "reason": block.reason}
        if not block.reason:
            row |= {"available": _force(calc, block.available), "required": _force(calc, block.required),
                    "ratio": units.ratio_text(block.ratio), "share": round(block.ratio, 6)}
        if block.factors:
            row |= {"nominal": _force(calc, block.nominal),
                    "factor": f"φ = {block.factors.phi:.2f}" if calc.x.method == "LRFD"
                    else f"Ω = {block.factors.omega:.2f}"}
        rows.append(row)
    columns = {"LRFD": ("Design strength", "Required"), "ASD": ("Allowable strength", "Required")}[calc.x.method]
    nodes = [{"type": "strengths", "columns": {"available": columns[0], "required": columns[1]}, "rows": rows}]
    nodes += [{"type": "message", "severity": FAILS, "text": each + ".", "cite": ""} for each in calc.failing]
    return [_section("summary", "Summary of limit states", nodes)]


def scope(calc):
    return [_section("scope", "Scope", [{"type": "text", "text": calc.case.kind.scope}])]


def design_basis(calc):
    rows = [["Standard", calc.x.standard], ["Method", calc.x.method], ["Units", UNIT_NAMES[calc.x.units]]]
    rows += [[each.label, _value(calc, each)] for each in calc.case.kind.fields
             if each.name == "steel" or each.dimension is units.STRESS]
    return [_section("basis", "Design basis and materials", [_table([("Item", "left"), ("Value", "left")], rows)])]


def loads(calc):
    rows = [["Required strength", _force(calc, calc.x.required_strength), calc.x.load_level, calc.x.load_source]]
    if getattr(calc.x, "service_load", None) is not None:
        rows.append(["Service load", _force(calc, calc.x.service_load), "service", calc.x.load_source])
    return [_section("loads", "Loads", [_table(
        [("Axial tension", "left"), ("Value", "right"), ("Level", "left"), ("Source", "left")], rows)])]


def sketch_section(calc, vectors=True):
    from calclib import sketch
    kind = calc.case.kind
    return [_section("sketch", "Sketch", [_figure(
        lambda: sketch.draw(kind.sketch(calc.x, calc)), f"Dimensioned sketch of the {kind.title.lower()}, to scale.",
        f"To scale. Governing limit state: {calc.governing.title}.", vectors)])]


def strength(calc):
    return [_section(f"strength:{block.key}", block.title, block_nodes(calc, block)) for block in calc.blocks]


def block_nodes(calc, block):
    """Return the equations of one block, each with its clause, and what is said of them."""
    if block.reason:
        return [{"type": "text", "text": f"Not applicable. {block.reason}"}]
    nodes = []
    for step in block.steps:
        for line in typeset(step, calc.x.units):
            nodes.append({"type": "equation", "lhs": line.lhs, "symbolic": line.symbolic,
                          "substituted": line.substituted, "result": line.result, "cite": step.cite,
                          "note": step.note})
    if block.available is not None:  # the last equation is the ratio
        nodes[-1]["note"] = "for comparison; it does not govern" if block.advisory else \
            "at most 1: acceptable" if block.passes else "above 1: NOT ACCEPTABLE"
    return nodes


def detailing(calc):
    if not calc.rules:
        return []
    marks = {i: rule.status for i, rule in enumerate(calc.rules) if rule.status in (FAILS, CAUTION)}
    rows = [[rule.title, rule.cite, rule.required, rule.provided,
             rule.status + (f": {rule.remark}" if rule.remark else "")] for rule in calc.rules]
    return [_section("detailing", "Detailing rules", [_table(
        [("Rule", "left"), ("Clause", "left"), ("Required", "left"), ("Provided", "left"), ("Status", "left")],
        rows, marks)])]


def sensitivity(calc, vectors=True):
    from calclib.explore import sensitivity as explore
    made = [explore.Sensitivity(calc, plot) for plot in calc.case.kind.plots
            if plot.applies is None or plot.applies(calc.x)]
    return [_section("sensitivity", "Sensitivity", [
        _figure(each.figure, each.alt, each.caption, vectors) for each in made])]


def assumptions(calc):
    items = [_cited(m) for m in (*calc.assumptions, *calc.notes)]
    if calc.x.remarks:
        items += [f"Remark of the engineer: {line.strip()}" for line in calc.x.remarks.splitlines() if line.strip()]
    return [_section("assumptions", "Assumptions and notes", [{"type": "list", "items": items}])]


def _cited(message):
    return f"{message.text} ({message.cite})" if message.cite else message.text


def cautions(calc):
    nodes = [{"type": "message", "severity": CAUTION, "text": m.text, "cite": m.cite} for m in calc.cautions]
    nodes += [{"type": "message", "severity": CAUTION, "text": text, "cite": ""} for text in CAUTIONS]
    return [_section("cautions", "Cautions", nodes)]


def revisions(calc):
    rows = [list(row) for row in calc.case.revisions] or [[calc.x.revision, calc.x.date, calc.x.prepared_by, ""]]
    return [_section("revisions", "Revision history", [_table(
        [("Revision", "left"), ("Date", "left"), ("By", "left"), ("Description", "left")], rows)])]


def _value(calc, each):
    value = getattr(calc.x, each.name)
    if value is None:
        return ""
    return units.text(value, each.dimension, calc.x.units) if each.dimension else value


def echo(calc):
    """Return each number as it was read, for the form: name -> text."""
    return {each.name: _value(calc, each) for each in calc.case.kind.all_fields() if each.dimension}


def inputs(calc):
    """Every input as typed and as read, so that the calc can be run again from the paper."""
    rows = []
    for each in calc.case.kind.all_fields():
        typed = calc.case.texts.get(each.name, "").strip()
        read = _value(calc, each)
        if typed or read:
            rows.append([each.name, each.label, typed or "(default)", read if each.dimension or not typed else ""])
    return [_section("inputs", "Inputs", [_table(
        [("Input", "left"), ("Meaning", "left"), ("As typed", "left"), ("As read", "right")], rows)])]


def checker(calc):
    return [_section("checker", "For the checker", [{"type": "list", "items": [
        f"Computed with calclib {__version__}; digest of the inputs {calc.case.digest}.",
        "The case (inputs), the record (inputs and results, unrounded) and the executed notebook are attached to this "
        "document.",
        "To recompute every number from the attached inputs and compare it with what is printed here: "
        "python -m calclib check FILE.",
        "Equations substitute printed figures; results are computed unrounded and rounded half up to four figures. "
        "Ratios are judged unrounded and printed rounded up.",
    ]}])]


SECTIONS = (summary, scope, design_basis, loads, sketch_section, strength, detailing, sensitivity, assumptions,
            cautions, revisions, inputs, checker)
