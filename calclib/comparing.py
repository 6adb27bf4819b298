"""Two versions of one thing - plain data, a notebook, a page, a PDF - and where they differ, in words.

`found` is always from a stranger, `again` is what calclib made. Nothing of either is run, and no name in a file is
used as a path.
"""

import difflib
import json
import re
from collections import Counter
from xml.etree import ElementTree

from calclib.carried import Page

_WORTH_ALIGNING = 3000   # lines or numbers; a file with more changes than that is told by its first one
_SHOWN = 90              # characters of each side


# --- plain data ------------------------------------------------------------------------------------------------

def leaves(found, again, place=""):
    """Yield (place, found, again) of every leaf in which two pieces of plain data differ."""
    if isinstance(found, dict) and isinstance(again, dict):
        for key in {**again, **found}:
            yield from leaves(found.get(key), again.get(key), f"{place}.{key}".lstrip("."))
    elif isinstance(found, list) and isinstance(again, list) and len(found) == len(again):
        for i, pair in enumerate(zip(found, again, strict=True), 1):
            yield from leaves(*pair, f"{place}[{i}]")
    elif found != again or isinstance(found, bool) != isinstance(again, bool):
        yield place, found, again


def sides(found, again):
    """Say both sides of a difference, from a little before it."""
    found, again = (x if isinstance(x, str) else json.dumps(x, ensure_ascii=False) for x in (found, again))
    start = next((i for i, (a, b) in enumerate(zip(found, again, strict=False)) if a != b), min(len(found), len(again)))
    start = start - 30 if start > 40 else 0
    return f'printed "{found[start:start + _SHOWN]}", recomputed "{again[start:start + _SHOWN]}"'


def changes(found, again):
    """Yield (found, again) of each run in which two lists of texts differ, the runs joined by spaces."""
    head = next((i for i, (a, b) in enumerate(zip(found, again, strict=False)) if a != b), min(len(found), len(again)))
    found, again = found[head:], again[head:]
    tail = next((i for i, (a, b) in enumerate(zip(found[::-1], again[::-1], strict=False)) if a != b),
                min(len(found), len(again)))
    found, again = found[:len(found) - tail], again[:len(again) - tail]
    if max(len(found), len(again)) > _WORTH_ALIGNING:
        yield " ".join(found[:20]), " ".join(again[:20])
        return
    for tag, a, b, c, d in difflib.SequenceMatcher(None, found, again, autojunk=False).get_opcodes():
        if tag != "equal":
            yield " ".join(found[a:b]), " ".join(again[c:d])


def numbers(text):
    """Return every number of a text in order, as printed.

    >>> numbers("1-1/8 in, P_n = 341.9 kip")
    ['1', '1', '8', '341.9']
    """
    return re.findall(r"\d+(?:\.\d+)*", text)


# --- records ---------------------------------------------------------------------------------------------------

_NOT_COMPUTED = ("format", "digest", "inputs", "revisions")    # what a record repeats from the case
_FIRST = ("available_strength", "ratio", "nominal_strength", "required_strength", "phi", "omega")


def record_changes(found, again):
    """Yield (computed, words) of what differs in two records, limit states first, each with its numbers.

    `computed` is False for what a record only repeats from its case. The version of calclib is left out.
    """
    groups = {}
    for place, old, new in leaves(_by_key(found), _by_key(again)):
        if place != "calclib":
            rank, label, entry = _place(place, again)
            groups.setdefault((rank, label, place.split(".")[0].partition("[")[0] not in _NOT_COMPUTED), []).append(
                (_FIRST.index(entry) if entry in _FIRST else len(_FIRST),
                 f"{entry}{': ' if entry else ''}record {_brief(old)}, recomputed {_brief(new)}{_by(old, new)}"))
    for (_, label, computed), entries in sorted(groups.items()):
        yield computed, f"{label}{'; '.join(words for _, words in sorted(entries))}"


def _by_key(record):
    """Name limit states and rules by their keys, so that a new one does not shift all that follow."""
    made = {**record, "results": dict(record["results"])}
    for name in ("limit_states", "rules"):
        rows = made["results"].get(name)
        if isinstance(rows, list) and all(isinstance(row, dict) and isinstance(row.get("key"), str) for row in rows):
            by_key = {row["key"]: row for row in rows}
            if len(by_key) == len(rows):
                made["results"] |= {name: by_key, f"order of {name}": list(by_key)}
    return made


def _place(place, record):
    """Return (rank, label, entry) of a place in a record."""
    for rank, (group, word) in enumerate((("limit_states", "limit state"), ("rules", "rule"))):
        for row in record["results"][group]:
            start = f"results.{group}.{row['key']}"
            if place == start or place.startswith(start + "."):
                return rank, f"{word} \"{row['title']}\", ", place[len(start) + 1:]
    return (2 if place.startswith("results") else 3), f"{place}: ", ""


def _brief(value):
    return json.dumps(value, ensure_ascii=False)[:160]


def _by(old, new):
    if type(old) in (int, float) and type(new) in (int, float) and new:
        return f" ({(old / new - 1) * 100:+.3g} %)"
    return ""


# --- notebooks -------------------------------------------------------------------------------------------------

def notebook_changes(found, again):
    """Yield (place, words) of every leaf of two notebooks that differs, a text stored in lines read as one text."""
    found, again = _with_whole_texts(found), _with_whole_texts(again)
    names, names_again = ([str(cell.get("id")) for cell in notebook["cells"]] for notebook in (found, again))
    for old, new in changes(names, names_again):
        yield "cells", sides(old, new)
    cells = dict(zip(names, found["cells"], strict=True))
    for number, (name, cell_again) in enumerate(zip(names_again, again["cells"], strict=True), 1):
        for place, old, new in leaves(cells.get(name, cell_again), cell_again):
            code = ": its source is not that of the workbook (it was not run)" if place == "source" else ""
            yield f"cell {number}, {place}{code}", sides(old, new)
    for place, old, new in leaves({**found, "cells": 0}, {**again, "cells": 0}):
        yield place, sides(old, new)


def _with_whole_texts(notebook):
    def whole(value):
        lines = isinstance(value, list) and all(isinstance(line, str) for line in value)
        return "".join(value) if lines else value

    cells = []
    for cell in notebook["cells"]:
        cell = {**cell, "source": whole(cell["source"])}
        if "outputs" in cell:
            cell["outputs"] = [{**output, **{name: whole(output[name]) for name in ("text",) if name in output},
                                **({"data": {mime: whole(each) for mime, each in output["data"].items()}}
                                   if "data" in output else {})} for output in cell["outputs"]]
        cells.append(cell)
    return {**notebook, "cells": cells}


# --- HTML ------------------------------------------------------------------------------------------------------

def html_changes(found, again):
    """Yield the words for each difference between two pages; line ends may be those of another system."""
    for old, new in changes(_cut(found), _cut(again)):
        yield sides(old, new)


def _cut(content):
    return re.findall(r"<[^>]*>|[^<]+|<", content.replace(b"\r\n", b"\n").decode("utf-8", "backslashreplace"))


def html_numbers(content):
    return numbers(" ".join(Page(content).words))


# --- PDF -------------------------------------------------------------------------------------------------------

# What a program says of itself when it saves or signs a file.
_LATER = ("/Producer", "/ModDate", "Producer", "ModifyDate", "MetadataDate")
_FOR_SIGNATURES = ("/AcroForm", "/Perms", "/DSS", "/Extensions")
_OF_STREAMS = ("/Length", "/Filter", "/DecodeParms")
_PLACES = {"/StructTreeRoot": "the words for screen readers", "/Outlines": "the bookmarks", "/Names": "attached files",
           "/AF": "attached files"}


def pdf_changes(found, again):
    """Return (changes, remarks) of two pypdf readers: everything that can be reached from page or catalog is compared.

    Fonts, forms and pictures are part of a page: a digit is changed as well by its outline in a font as by its code.
    """
    if len(found.pages) != len(again.pages):
        return [f"has {len(found.pages)} pages, issued again {len(again.pages)}"], []
    made, remarks = {}, []
    root, root_again = found.trailer["/Root"], again.trailer["/Root"]
    pages = list(zip(found.pages, again.pages, strict=True))
    seen = {(page.indirect_reference.idnum, new.indirect_reference.idnum) for page, new in pages}
    for number, (page, page_again) in enumerate(pages, 1):
        _compare_marks(f"page {number}", page, page_again, seen, made, remarks)
        for place, old, new in _walk(page, page_again, seen, ("/Annots", "/Parent")):
            drawn = next((words for key, words in (("/XObject", "a drawing"), ("/Font", "a font"),
                                                   ("/Contents", "what is printed")) if key in place), place[0])
            made.setdefault(f"page {number}: {drawn} is not what was issued", (number, old, new))
    added = [key for key in _FOR_SIGNATURES if key in root and key not in root_again]
    if added and _only_unseen_signatures(root):
        remarks.append("a signature was added that shows on no page; whether it is valid is not checked here")
    elif added:
        made["fields or actions were added"] = None
    for place, old, new in _walk(root, root_again, seen, ("/Pages", "/Metadata", *added)):
        made.setdefault(f"{_PLACES.get(place[0], place[0])}: not as issued{_strings(old, new)}", None)
    for name, old, new in _property_changes(found, again):
        if name in _LATER:
            remarks.append("another program saved or signed it")
        else:
            made[f"the property {name.lstrip('/')}: {sides(old, new)}"] = None
    return [*_printed(made, found, again), *made], list(dict.fromkeys(remarks))


def _walk(found, again, seen, left_out):
    """Yield (place, found, again) of each difference between two graphs of PDF objects."""
    from pypdf.generic import IndirectObject, StreamObject
    waiting = [((), found, again)]
    while waiting:
        place, old, new = waiting.pop()
        if isinstance(old, IndirectObject) and isinstance(new, IndirectObject):
            if (old.idnum, new.idnum) in seen:
                continue
            seen.add((old.idnum, new.idnum))
        old, new = (x.get_object() if isinstance(x, IndirectObject) else x for x in (old, new))
        if isinstance(old, dict) and isinstance(new, dict) and \
                isinstance(old, StreamObject) == isinstance(new, StreamObject):
            stream = isinstance(old, StreamObject)
            if stream and old.get_data() != new.get_data():
                yield place or ("/",), None, None
            for key in {**new, **old}:
                if not (stream and key in _OF_STREAMS) and not (not place and key in left_out):
                    waiting.append(((*place, key), old.raw_get(key) if key in old else None,
                                    new.raw_get(key) if key in new else None))
        elif isinstance(old, list) and isinstance(new, list) and len(old) == len(new):
            waiting += [(place, a, b) for a, b in zip(list.__iter__(old), list.__iter__(new), strict=True)]
        elif old != new or isinstance(old, dict) != isinstance(new, dict):
            yield place or ("/",), old, new


def _property_changes(found, again):
    """Yield (name, found, again) of the properties that differ, those in XMP whatever the layout of its XML."""
    info, info_again = ({key: str(value) for key, value in (each.metadata or {}).items()} for each in (found, again))
    for key in {**info_again, **info}:
        if info.get(key) != info_again.get(key):
            yield key, info.get(key), info_again.get(key)
    xmp, xmp_again = (_xmp(reader) for reader in (found, again))
    if [each for each in xmp if each[0] not in _LATER] != [each for each in xmp_again if each[0] not in _LATER]:
        yield "XMP", *(" ".join(text for each in entries for text in each if text) for entries in (xmp, xmp_again))
    elif xmp != xmp_again:
        yield "ModifyDate", "", ""


def _xmp(reader):
    stream = reader.trailer["/Root"].get("/Metadata")
    if stream is None:
        return []
    return [(element.tag.rpartition("}")[2], (element.text or "").strip(), (element.tail or "").strip(),
             *(text for pair in sorted(element.items()) for text in pair))
            for element in ElementTree.fromstring(stream.get_object().get_data()).iter()]


def _strings(old, new):
    return f", {sides(old, new)}" if isinstance(old, str) and isinstance(new, str) else ""


def _printed(made, found, again):
    """Yield what is printed otherwise on the pages that differ, line by line."""
    for number in dict.fromkeys(entry[0] for entry in made.values() if entry):
        texts = [reader.pages[number - 1].extract_text().splitlines() for reader in (found, again)]
        for old, new in changes(*texts):
            yield f"page {number}: {sides(old, new)}"


def _compare_marks(name, page, page_again, seen, made, remarks):
    marks, marks_again = ([each.get_object() for each in p.get("/Annots") or []] for p in (page, page_again))
    count = len(marks_again)
    if len(marks) < count or any(_walk(marks[:count], marks_again, seen, ())):
        made[f"{name}: the links are not as issued"] = None
    for mark in marks[count:]:
        if _unseen_signature(mark):
            remarks.append("a signature was added that shows on no page; whether it is valid is not checked here")
        else:
            made[f"{name}: an added mark (annotation {str(mark.get('/Subtype', ''))[1:]}); what it covers or says is "
                 "not part of the calc"] = None


def _unseen_signature(mark):
    return (mark.get("/FT") == "/Sig" and not {"/A", "/AA", "/Kids"} & set(mark)
            and all(float(x) == 0 for x in mark.get("/Rect", [1])))


def _only_unseen_signatures(root):
    form = root.get("/AcroForm", {})
    return set(form) <= {"/Fields", "/SigFlags"} and all(
        _unseen_signature(each.get_object()) for each in form.get("/Fields", []))


def marks_on(reader):
    """Return where a page carries a mark that the writer never makes: anything but a link."""
    return [f"page {number}: an added mark (annotation {str(mark.get_object().get('/Subtype', ''))[1:]})"
            for number, page in enumerate(reader.pages, 1) for mark in page.get("/Annots") or []
            if mark.get_object().get("/Subtype") != "/Link" and not _unseen_signature(mark.get_object())]


def pdf_numbers(reader):
    """Return every number that the pages print; what all pages have in common, the title block, counts once."""
    texts = [numbers(re.sub(r"Page\s+\d+\s+of\s+\d+", "", page.extract_text())) for page in reader.pages]
    common = Counter(texts[0])
    for text in texts[1:]:
        common &= Counter(text)
    made = sorted(common.elements())
    for text in texts:
        left = Counter(common)
        for number in text:
            if left[number]:
                left[number] -= 1
            else:
                made.append(number)
    return made
