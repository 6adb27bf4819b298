"""A section of a calc -> the outputs that a notebook stores: LaTeX, Markdown or PNG, with the section itself beside.

The public form reads truly in any notebook viewer, trusted or not; the private form is what the exporters lay out.
"""

import hashlib
import json
import re
from dataclasses import dataclass

SECTION = "application/vnd.calclib.section+json"
CALC = "application/vnd.calclib.calc+json"
_BAR = 20
_LARGEST_DISPLAY = 2500


@dataclass(frozen=True)
class Output:
    """One output of a notebook: its MIME bundle, and the stamp that was made from its content."""

    data: dict
    stamp: str

    @property
    def metadata(self):
        """Words that only the notebook needs are left out by the exporters."""
        return {} if SECTION in self.data or CALC in self.data else {"calclib": "twin"}


BLANK = Output({"text/markdown": "", "text/plain": ""}, "")  # keeps the place of an output that other inputs will need


def outputs(section, drawn_from=""):
    """Return the Outputs of one section.

    Pictures and blocks of equations are followed by words that print a stamp made from their content. An edit leaves
    the outputs that it does not touch as they are, stamp and all; the form knows the stamps of the calc as it is and
    marks every other output stale. A picture's stamp is made from its caption and `drawn_from`, the digest of the
    inputs, so that it is known before the picture is drawn.
    """
    figures = [node for node in section["nodes"] if node["type"] == "figure"]
    rest = [node for node in section["nodes"] if node["type"] != "figure"]
    made, stamp, title = [], _stamp(rest), section["title"]
    if section["key"].startswith("strength:"):  # two outputs whether it applies or not, so that each keeps its place
        made.append(_words(f"### {markdown_words(title)}", title, ""))
        public = {"text/latex": latex(rest, stamp)} if any(node["type"] == "equation" for node in rest) else \
            {"text/markdown": markdown("", rest, stamp)}
        made.append(_output(section, rest, stamp, {**public, "text/plain": plain_text(title, rest)}))
    elif rest:
        made.append(_output(section, rest, stamp, {"text/markdown": markdown(title, rest, stamp),
                                                   "text/plain": plain_text(title, rest)}))
    for node in figures:
        stamp = _stamp([drawn_from, node["caption"]])
        made.append(_output(section, [node], stamp, {"image/png": node["png"], "text/plain": node["alt"]}))
        made.append(_words(markdown_words(node["caption"]), node["caption"], stamp))
    return made


def _stamp(content):
    return hashlib.sha256(json.dumps(content, sort_keys=True).encode()).hexdigest()[:8]


def _printed(stamp):
    return f"<small>stamp {stamp}</small>"


def _words(markdown_text, plain, stamp):
    """Return an output that stands in the notebook only."""
    if stamp:
        markdown_text, plain = f"{markdown_text}\n\n{_printed(stamp)}", f"{plain}\nstamp {stamp}"
    return Output({"text/markdown": markdown_text.strip() + "\n", "text/plain": plain.strip()}, stamp)


def _output(section, nodes, stamp, public):
    kept = [{k: v for k, v in node.items() if k != "png" or not node.get("svg")} for node in nodes]
    private = {"key": section["key"], "title": section["title"], "stamp": stamp, "nodes": kept}
    return Output({**public, SECTION: private}, stamp)


# --- LaTeX ------------------------------------------------------------------------------------------------------

_LATEX_SPECIAL = {"\\": r"\backslash ", "{": r"\{", "}": r"\}", "$": r"\$", "^": r"\hat{\ }", "~": r"\sim "}


def latex_words(text):
    r"""Return text from people as LaTeX that prints it and does nothing else.

    >>> latex_words(r"a $x$ \b")
    '\\text{a }\\$\\text{x}\\$\\text{ }\\backslash \\text{b}'
    """
    parts = re.split(r"([\\{}$^~])", text)
    return "".join(_LATEX_SPECIAL.get(p) or "\\text{" + re.sub(r"([%#&_])", r"\\\1", p) + "}" for p in parts if p)


def latex(nodes, stamp):
    """Return the text/latex of a block: its equations aligned at the equal sign, each clause at the right margin.

    One display holds a few equations only, since a page leaves a display of more than 5 kB unset.
    """
    rows = [_rows(node) for node in nodes if node["type"] == "equation"]
    displays, size = [[]], 0
    for row in rows:
        if size + len(row) > _LARGEST_DISPLAY and displays[-1]:
            displays.append([])
            size = 0
        displays[-1].append(row)
        size += len(row)
    made = ["$$\\begin{align*}\n" + " \\\\[4pt]\n".join(display) + "\n\\end{align*}$$" for display in displays]
    made += [f"$${latex_words(node['text'])}$$" for node in nodes if node["type"] != "equation"]
    return "\n\n".join([*made, f"stamp {stamp}"])


def _rows(node):
    tag = rf"\tag*{{${latex_words(node['cite'])}$}}" if node["cite"] else ""
    note = rf"\quad {latex_words(node['note'])}" if node["note"] else ""
    if not node["symbolic"]:
        return f"{node['lhs']} &= {node['result']}{note}{tag}"
    return (f"{node['lhs']} &= {node['symbolic']}{tag} \\\\\n"
            f"&= {node['substituted']} = {node['result']}{note}")


# --- Markdown ---------------------------------------------------------------------------------------------------

def markdown_words(text):
    """Return text from people as Markdown that prints it and does nothing else, on one line.

    >>> markdown_words("<b> *a* $x$")
    '&lt;b&gt; &#42;a&#42; <span>&#36;</span>x<span>&#36;</span>'
    """
    text = " ".join(text.split()).replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")
    text = re.sub(r"[`*_{}\[\]#+!|~:]", lambda m: f"&#{ord(m[0])};", text)
    # The page looks for formulas in the finished text, between dollar signs and after backslashes, never across tags.
    return re.sub(r"[$\\]", lambda m: f"<span>&#{ord(m[0])};</span>", text)


def markdown(title, nodes, stamp):
    parts = [f"### {markdown_words(title)}"] if title else []
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
