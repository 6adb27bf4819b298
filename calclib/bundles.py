"""A section of a calc -> the outputs that a notebook stores: LaTeX, Markdown or PNG, with the section itself beside.

The public form reads truly in any notebook viewer, trusted or not; the private form is what the exporters lay out.
"""

import hashlib
import json
import re

SECTION = "application/vnd.calclib.section+json"
CALC = "application/vnd.calclib.calc+json"
_BAR = 20


def bundles(section):
    """Return the MIME bundles of one section, one an output; each picture is followed by its words.

    Every output that has words prints a stamp made from its content. An edit leaves the outputs that it does not touch
    as they are, stamp and all; the form knows the stamps of the calc as it is, and marks every other output stale.
    """
    made, rest = [], []
    for node in section["nodes"]:
        if node["type"] == "figure":
            stamp = _stamp([node["png"], node["caption"]])
            made.append(_bundle(section, stamp, [node], {"image/png": node["png"], "text/plain": node["alt"]}))
            made.append({"text/markdown": f"{markdown_words(node['caption'])}\n\n{_printed(stamp)}\n",
                         "text/plain": f"{node['caption']}\nstamp {stamp}"})
        else:
            rest.append(node)
    if rest:
        stamp = _stamp(rest)
        if any(node["type"] == "equation" for node in rest):
            public = {"text/latex": latex(section["title"], rest, stamp)}
        else:
            public = {"text/markdown": markdown(section["title"], rest, stamp)}
        plain = plain_text(section["title"], rest)
        made.insert(0, _bundle(section, stamp, rest, {**public, "text/plain": plain}))
    return made


def metadata(bundle):
    """Return the metadata of an output: words that only the notebook needs are left out by the exporters."""
    return {} if SECTION in bundle or CALC in bundle else {"calclib": "twin"}


def _stamp(content):
    return hashlib.sha256(json.dumps(content, sort_keys=True).encode()).hexdigest()[:8]


def _printed(stamp):
    return f"<small>stamp {stamp}</small>"


def _bundle(section, stamp, nodes, public):
    kept = [{k: v for k, v in node.items() if k != "png" or not node.get("svg")} for node in nodes]
    return {**public, SECTION: {"key": section["key"], "title": section["title"], "stamp": stamp, "nodes": kept}}


# --- LaTeX ------------------------------------------------------------------------------------------------------

_LATEX_SPECIAL = {"\\": r"\backslash ", "{": r"\{", "}": r"\}", "$": r"\$", "^": r"\hat{\ }", "~": r"\sim "}


def latex_words(text):
    r"""Return text from people as LaTeX that prints it and does nothing else.

    >>> latex_words(r"a $x$ \b")
    '\\text{a }\\$\\text{x}\\$\\text{ }\\backslash \\text{b}'
    """
    parts = re.split(r"([\\{}$^~])", text)
    return "".join(_LATEX_SPECIAL[p] if p in _LATEX_SPECIAL else r"\text{%s}" % re.sub(r"([%#&_])", r"\\\1", p)
                   for p in parts if p)


def latex(title, nodes, stamp):
    """Return the text/latex of a block of equations, one display a equation, its clause at the right margin."""
    lines = [rf"$$\large\textbf{{{_bold(title)}}}\tag*{{stamp {stamp}}}$$"]
    for node in nodes:
        if node["type"] == "equation":
            lines.append(_equation(node))
        elif node["type"] in ("text", "message"):
            lines.append("$$" + latex_words(node["text"]) + "$$")
    return "\n\n".join(lines)


def _bold(title):
    return re.sub(r"([%#&_])", r"\\\1", title)


def _equation(node):
    tag = rf"\tag*{{${latex_words(node['cite'])}$}}" if node["cite"] else ""
    first = f"{node['lhs']} &= {node['symbolic'] or node['result']}"
    if node["note"] and not node["symbolic"]:
        first += rf"\quad {latex_words(node['note'])}"
    rows = [first + tag]
    if node["symbolic"]:
        note = rf"\quad {latex_words(node['note'])}" if node["note"] else ""
        rows.append(f"&= {node['substituted']} = {node['result']}{note}")
    return "$$\\begin{align*}\n" + " \\\\\n".join(rows) + "\n\\end{align*}$$"


# --- Markdown ---------------------------------------------------------------------------------------------------

def markdown_words(text):
    """Return text from people as Markdown that prints it and does nothing else, on one line.

    >>> markdown_words("<b> *a* | $x$")
    '&lt;b&gt; &#42;a&#42; &#124; \\\\\\\\$x\\\\\\\\$'
    """
    text = " ".join(text.split()).replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")
    text = re.sub(r"[\\`*_{}\[\]#+!|~:]", lambda m: f"&#{ord(m[0])};", text)
    return text.replace("$", r"\\$")  # the page's own mathematics turns \$ into a dollar sign


def markdown(title, nodes, stamp):
    parts = [f"### {markdown_words(title)}"]
    for node in nodes:
        parts.append(_MARKDOWN[node["type"]](node))
    parts.append(_printed(stamp))
    return "\n\n".join(parts) + "\n"


def _markdown_table(columns, aligns, rows):
    rule = {"left": ":--", "right": "--:", "center": ":-:"}
    lines = [columns, [rule[a] for a in aligns], *rows]
    return "\n".join("| " + " | ".join(line) + " |" for line in lines)


def _table(node):
    rows = []
    for i, row in enumerate(node["rows"]):
        cells = [markdown_words(cell) for cell in row]
        mark = node["marks"].get(str(i))
        rows.append([f"**{cells[0]}**", *cells[1:]] if mark else cells)
    return _markdown_table([markdown_words(c["title"]) for c in node["columns"]],
                           [c["align"] for c in node["columns"]], rows)


def bar(share):
    """Return a ratio as a bar of characters, full at 1.

    >>> bar(0.5), bar(1.2)
    ('▰▰▰▰▰▰▰▰▰▰▱▱▱▱▱▱▱▱▱▱', '▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰▰ over')
    """
    filled = min(_BAR, int(share * _BAR))
    return "▰" * filled + "▱" * (_BAR - filled) + (" over" if share > 1 else "")


def _strengths(node):
    rows = []
    for row in node["rows"]:
        name = markdown_words(row["name"])
        if row["reason"]:
            rows.append([name, "not applicable", markdown_words(row["reason"]), "", "", "", "", ""])
            continue
        name = f"**{name}, governs**" if row["governs"] else name
        rows.append([name, *(markdown_words(row[k]) for k in ("clause", "nominal", "factor", "available", "required")),
                     row["ratio"] + ("" if row["passes"] else " **FAILS**"), bar(row["share"])])
    return _markdown_table(
        ["Limit state", "Clause", "Nominal", "Factor", node["columns"]["available"], node["columns"]["required"],
         "Ratio", "Share"], ["left", "left", "right", "right", "right", "right", "right", "left"], rows)


def _message(node):
    cite = f" ({markdown_words(node['cite'])})" if node["cite"] else ""
    return f"**{node['severity'].capitalize()}.** {markdown_words(node['text'])}{cite}"


_MARKDOWN = {
    "text": lambda node: markdown_words(node["text"]),
    "heading": lambda node: f"#### {markdown_words(node['text'])}",
    "list": lambda node: "\n".join(f"- {markdown_words(item)}" for item in node["items"]),
    "table": _table, "strengths": _strengths, "message": _message,
}


def plain_text(title, nodes):
    """Return what a terminal shows, and what a notebook test compares."""
    lines = [title]
    for node in nodes:
        if node["type"] == "equation":
            lines.append("  " + " = ".join(p for p in (node["lhs"], node["symbolic"], node["substituted"],
                                                       node["result"]) if p) + f"   [{node['cite']}]")
        elif node["type"] == "table":
            lines += ["  " + " | ".join(row) for row in node["rows"]]
        elif node["type"] == "strengths":
            lines += ["  " + " | ".join(row[k] for k in ("name", "available", "required", "ratio", "reason"))
                      for row in node["rows"]]
        elif node["type"] == "list":
            lines += [f"  - {item}" for item in node["items"]]
        else:
            lines.append("  " + node["text"])
    return "\n".join(lines)
