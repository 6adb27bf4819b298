"""Markdown that an engineer wrote into a notebook -> plain nodes that the exporters lay out.

Pandoc reads the Markdown and only the forms named here are carried: anything else prints as its own text, so neither
HTML nor Typst nor a link to a picture elsewhere gets into a calc.
"""

import base64
import json
import re

import pypandoc

from calclib.errors import CalcError
from calclib.issuing import mathematics

_READER = ("markdown-raw_html-raw_tex-raw_attribute-native_divs-native_spans-citations-example_lists-fenced_divs"
           "-bracketed_spans-yaml_metadata_block-pandoc_title_block-smart-implicit_figures+lists_without_preceding_blankline"
           "-blank_before_header+tex_math_dollars")


def blocks_of(markdown, pictures=None):
    """Return the nodes of one Markdown text: {"type": "markdown", "blocks": [...]}.

    A block is {"kind": "paragraph" | "heading" | "item" | "code", "runs": [...], "level": depth, "label": "1."};
    a run is {"text", "strong", "emphasis", "code"} or {"latex"}.

    Parameters
    ----------
    pictures : file name -> (mime, bytes) of the pictures stored in the cell itself
    """
    tree = json.loads(pypandoc.convert_text(markdown, "json", format=_READER))
    blocks = []
    _lower(tree["blocks"], blocks, 0, "", pictures or {})
    return {"type": "markdown", "text": markdown, "blocks": _readable(blocks)}


def _readable(blocks):
    """Turn each formula that cannot be typeset into its own source: a note prints as typed before it is lost."""
    try:
        mathematics.typst(mathematics.latex_of(blocks))
    except CalcError:
        for block in blocks:
            block["runs"] = [_readable_run(run) for run in block["runs"]]
    return blocks


def _readable_run(run):
    if "latex" not in run:
        return run
    try:
        mathematics.typst([run["latex"]])
    except CalcError:
        return {"text": f"${run['latex']}$", "code": True}
    return run


def _lower(tree, blocks, level, label, pictures):
    """Append the blocks of a pandoc tree. `label` stands before the first one: the sign of a list item."""
    for element in tree:
        kind, content = element["t"], element.get("c")
        if kind in ("Para", "Plain", "Header"):
            runs = _runs(content[2] if kind == "Header" else content, pictures)
            shape = "heading" if kind == "Header" else "item" if level else "paragraph"
            blocks.append({"kind": shape, "runs": runs, "level": level, "label": label})
        elif kind == "CodeBlock":
            blocks.append({"kind": "code", "runs": [{"text": content[1]}], "level": level, "label": label})
        elif kind in ("BulletList", "OrderedList"):
            items = content[1] if kind == "OrderedList" else content
            first = content[0][0] if kind == "OrderedList" else None
            for i, item in enumerate(items):
                _lower(item, blocks, level + 1, f"{first + i}." if kind == "OrderedList" else "•", pictures)
        elif kind in ("BlockQuote", "Div"):
            _lower(content if kind == "BlockQuote" else content[1], blocks, level + 1, label, pictures)
        elif kind == "Table":
            _lower_table(content, blocks, level, pictures)
        elif kind == "HorizontalRule":
            continue
        else:
            blocks.append({"kind": "paragraph", "runs": [{"text": text} for text in _all_text(element)],
                           "level": level, "label": label})
        label = ""


def _lower_table(content, blocks, level, pictures):
    """Carry a table row by row, cells parted by a bar; its words matter, its rules do not."""
    _, _, _, head, bodies, foot = content
    rows = [*head[1], *(row for body in bodies for row in (*body[2], *body[3])), *foot[1]]
    for row in rows:
        runs = []
        for cell in row[1]:
            runs += [{"text": " | "}] if runs else []
            for block in cell[4]:
                runs += _runs(block["c"], pictures) if block["t"] in ("Para", "Plain") else \
                    [{"text": text} for text in _all_text(block)]
        blocks.append({"kind": "paragraph", "runs": runs, "level": level, "label": ""})


def _runs(inlines, pictures, **marks):
    runs = []
    for inline in inlines:
        kind, content = inline["t"], inline.get("c")
        if kind == "Str":
            runs.append({"text": content, **marks})
        elif kind in ("Space", "SoftBreak"):
            runs.append({"text": " ", **marks})
        elif kind == "LineBreak":
            runs.append({"text": "\n", **marks})
        elif kind == "Strong":
            runs += _runs(content, pictures, **{**marks, "strong": True})
        elif kind == "Emph":
            runs += _runs(content, pictures, **{**marks, "emphasis": True})
        elif kind == "Code":
            runs.append({"text": content[1], **marks, "code": True})
        elif kind == "Math":
            runs.append({"latex": content[1]})
        elif kind == "Link":
            words = _runs(content[1], pictures, **marks)
            runs += words
            if content[2][0] not in "".join(run.get("text", "") for run in words):
                runs.append({"text": f" ({content[2][0]})", **marks})
        elif kind == "Image":
            runs.append(_picture(content, pictures))
        else:
            runs += [{"text": text, **marks} for text in _all_text(inline)]
    return _joined(runs)


def _picture(content, pictures):
    alt, target = "".join(_all_text(content[1])), content[2][0]
    stored = pictures.get(target.removeprefix("attachment:"))
    if target.startswith("attachment:") and stored and stored[0] == "image/png":
        return {"png": base64.b64encode(stored[1]).decode(), "alt": alt or "Picture in a note"}
    return {"text": f"[picture not carried: {alt} {target[:80]}]"}


def _joined(runs):
    """Merge neighbours that look the same, so that a sentence is one run."""
    made = []
    for run in runs:
        if made and "text" in run and "text" in made[-1] and {**run, "text": ""} == {**made[-1], "text": ""}:
            made[-1] = {**run, "text": made[-1]["text"] + run["text"]}
        else:
            made.append(run)
    return made


def _all_text(tree):
    """Return every word below an element of a kind that is not laid out."""
    if isinstance(tree, dict):
        if tree.get("t") in ("Str", "Code", "CodeBlock", "Math"):
            content = tree["c"]
            return [content if isinstance(content, str) else content[-1]]
        if tree.get("t") in ("Space", "SoftBreak"):
            return [" "]
        return _all_text(tree.get("c", []))
    if isinstance(tree, list):
        return [text for each in tree for text in _all_text(each)]
    return []


def without_colours(text):
    """Remove the colour codes of a terminal from what a cell printed."""
    return re.sub(r"\x1b\[[0-9;]*[A-Za-z]", "", text)
