"""Check an issued calc: recompute everything from the inputs it carries, and compare every number and every print.

The inputs are read from the file as data, the calc is issued again from them with the installed library, and the two
are compared. No code from the file is run.
"""

import base64
import binascii
import difflib
import hashlib
import io
import json
import re
from dataclasses import dataclass, field
from html.parser import HTMLParser
from pathlib import Path

from calclib import __version__, units
from calclib import case as cases
from calclib.bundles import CALC
from calclib.errors import CalcError

IDENTICAL, DIFFERS, ALTERED = "identical", "differs", "altered"
_ORDER = (IDENTICAL, DIFFERS, ALTERED)
_SHOWN = 12  # differences named in a report; the rest is counted


@dataclass
class Report:
    """What a check found, in the order of weight."""

    name: str
    digest: str = ""
    issued_with: str = ""
    findings: list = field(default_factory=list)   # (status, words)
    remarks: list = field(default_factory=list)

    def find(self, status, words):
        self.findings.append((status, words))

    @property
    def status(self):
        return max((status for status, _ in self.findings), key=_ORDER.index, default=IDENTICAL)

    def text(self):
        """Return the report in words."""
        lines = [f"{self.name}: {self.status.upper()}",
                 f"inputs {self.digest}, issued with calclib {self.issued_with}, checked with calclib {__version__}"]
        lines += [f"  {status}: {words}" for status, words in self.findings[:_SHOWN]]
        if len(self.findings) > _SHOWN:
            lines.append(f"  and {len(self.findings) - _SHOWN} more")
        if not self.findings:
            lines.append("  every number of the record and every result printed agree with the recomputed calc")
        return "\n".join(lines + [f"  note: {remark}" for remark in self.remarks])


@dataclass(frozen=True)
class Carried:
    """What an issued file carries for the checker."""

    case: cases.Case
    record: dict
    files: dict        # name -> bytes of everything attached


def check(path, issuer=None):
    """Return the `Report` on an issued PDF, HTML page, notebook, record or folder.

    Raises
    ------
    CalcError : the file is no issued calc, or its inputs cannot be used.
    """
    from calclib.issuing.issue import Issuer
    path = Path(path)
    if not path.exists():
        raise CalcError(f"{path}: no such file or folder.")
    if issuer is None:
        with Issuer() as started:
            return check(path, started)
    members = sorted(p for p in path.iterdir() if p.suffix in _READERS) if path.is_dir() else [path]
    if not members:
        raise CalcError(f"{path}: holds no issued calc (no PDF, HTML page, notebook or record).")
    carried = {member: _carried(member) for member in members}
    first = carried[members[0]]
    report = Report(str(path), first.case.digest, str(first.record.get("calclib")))
    expected = {}
    for member, each in carried.items():
        if each.case.digest not in expected:
            expected[each.case.digest] = issuer.build(each.case)
        _compare(member, each, expected[each.case.digest], report)
    if path.is_dir():
        _compare_case_file(path, first, report)
    return report


# --- what a file carries ---------------------------------------------------------------------------------------

def _carried(path):
    content = path.read_bytes()
    if path.suffix not in _READERS:
        raise CalcError(f"{path}: is not a PDF, HTML page, notebook or record, so no issued calc.")
    files = _READERS[path.suffix](path, content)
    case = next((v for k, v in files.items() if k.endswith(".yaml")), None)
    record = next((v for k, v in files.items() if k.endswith(".json")), None)
    if case is None and record is None:
        raise CalcError(f"{path}: carries no case and no record, so it is no issued calc, or they were removed. "
                        "Ask for the file as it was issued.")
    if case is None or record is None:
        raise CalcError(f"{path}: carries no {'case' if case is None else 'record'}; it cannot be checked. "
                        "Ask for the file as it was issued.")
    try:
        data = json.loads(record)
    except ValueError as error:
        raise CalcError(f"{path}: the record it carries is not readable: {error}.") from error
    if not isinstance(data, dict) or "results" not in data:
        raise CalcError(f"{path}: what it carries as record is no record of a calc.")
    return Carried(cases.parse(case.decode("utf-8", "replace"), f"the case in {path.name}"), data, files)


def _from_pdf(path, content):
    reader = _reader(path, content)
    return {name: parts[0] for name, parts in reader.attachments.items()}


def _reader(path, content):
    import pypdf
    from pypdf.errors import PyPdfError
    try:
        reader = pypdf.PdfReader(io.BytesIO(content))
        len(reader.pages)
    except (PyPdfError, ValueError, KeyError, OSError) as error:
        raise CalcError(f"{path}: is not a readable PDF: {error}.") from error
    return reader


class _Links(HTMLParser):
    def __init__(self):
        super().__init__()
        self.files = {}

    def handle_starttag(self, tag, attributes):
        named = dict(attributes)
        if tag == "a" and "download" in named and (named.get("href") or "").startswith("data:"):
            data = named["href"].partition(",")[2]
            self.files[named["download"]] = base64.b64decode(data, validate=True)


def _from_html(path, content):
    parser = _Links()
    try:
        parser.feed(content.decode("utf-8"))
    except (UnicodeDecodeError, binascii.Error) as error:
        raise CalcError(f"{path}: is not a page as it was issued: {error}.") from error
    return parser.files


def _from_notebook(path, content):
    for output in _outputs(_json(path, content)):
        if CALC in output.get("data", {}):
            stored = output["data"][CALC]
            return {"case.yaml": stored["case"].encode(), "record.json": json.dumps(stored["record"]).encode()}
    return {}


def _json(path, content):
    try:
        return json.loads(content)
    except ValueError as error:
        raise CalcError(f"{path}: is not readable: {error}.") from error


def _outputs(notebook):
    return [output for cell in notebook.get("cells", []) for output in cell.get("outputs", [])]


def _from_record(path, content):
    data = _json(path, content)
    if not isinstance(data, dict) or "inputs" not in data:
        raise CalcError(f"{path}: is no record of a calc.")
    case = cases.from_record(data)
    return {"record.json": content, "case.yaml": case.yaml().encode()}


_READERS = {".pdf": _from_pdf, ".html": _from_html, ".ipynb": _from_notebook, ".json": _from_record}


# --- comparing -------------------------------------------------------------------------------------------------

def _compare(path, carried, expected, report):
    """Compare one file with the calc issued again from its own inputs."""
    suffix = path.suffix
    again = next(content for name, content in expected.items() if name.endswith(suffix))
    content = path.read_bytes()
    record = json.loads(next(v for k, v in expected.items() if k.endswith(".json")))
    if carried.record.get("digest") != carried.case.digest:
        report.find(ALTERED, f"{path.name}: the inputs have the digest {carried.case.digest}, the record says "
                             f"{carried.record.get('digest')}: inputs or record were changed after issue")
    if content == again:
        return
    _compare_records(path, carried.record, record, report)
    before = len(report.findings)
    if carried.record.get("calclib") == __version__:
        _PRINTS[suffix](path, content, again, report)
        if len(report.findings) == before and report.status == IDENTICAL:
            report.remarks.append(f"{path.name}: the bytes are not as issued (signed, stamped or saved again); every "
                                  "number, print and drawing is.")
    else:
        _compare_prints_with_record(path, content, carried.record, report)
        report.remarks.append(f"{path.name}: issued with another version; layout and drawings are not compared.")


def _compare_records(path, found, again, report):
    for key, label in (("limit_states", "limit state"), ("rules", "rule")):
        old = {row.get("key"): row for row in found.get("results", {}).get(key, [])}
        new = {row["key"]: row for row in again["results"][key]}
        for name in [*new, *(name for name in old if name not in new)]:
            if name not in old or name not in new:
                report.find(DIFFERS, f"{path.name}: {label} {name} stands only in the "
                                     f"{'recomputed calc' if name in new else 'record'}")
                continue
            for entry, value in new[name].items():
                if old[name].get(entry) != value:
                    report.find(DIFFERS, f"{path.name}: {label} {name}, {entry}: record {old[name].get(entry)}, "
                                         f"recomputed {value}" + _by(old[name].get(entry), value))
    if found != again and not any(words.startswith(path.name) for _, words in report.findings):
        for place, old, new in _leaves(found, again):
            if place != "calclib":
                report.find(DIFFERS, f"{path.name}: record, {place}: {old}, recomputed {new}" + _by(old, new))


def _by(old, new):
    if type(old) in (int, float) and type(new) in (int, float) and new:
        return f" ({(old / new - 1) * 100:+.3g} %)"
    return ""


def _leaves(old, new, place=""):
    """Yield (place, old, new) of every leaf in which two pieces of plain data differ."""
    if isinstance(old, dict) and isinstance(new, dict):
        for key in {**old, **new}:
            yield from _leaves(old.get(key), new.get(key), f"{place}.{key}".lstrip("."))
    elif isinstance(old, list) and isinstance(new, list) and len(old) == len(new):
        for i, (a, b) in enumerate(zip(old, new, strict=True)):
            yield from _leaves(a, b, f"{place}[{i}]")
    elif old != new:
        yield place, old, new


def _compare_lines(path, where, found, again, report):
    for old, new in _different_lines(found, again):
        report.find(ALTERED, f"{path.name}, {where}: printed \"{old}\", recomputed \"{new}\"")


def _different_lines(found, again):
    matcher = difflib.SequenceMatcher(None, found, again, autojunk=False)
    for tag, a, b, c, d in matcher.get_opcodes():
        if tag != "equal":
            yield " ".join(found[a:b])[:160], " ".join(again[c:d])[:160]


def _compare_pdf(path, content, again, report):
    found, new = _reader(path, content), _reader(path, again)
    if len(found.pages) != len(new.pages):
        report.find(ALTERED, f"{path.name}: has {len(found.pages)} pages, issued again {len(new.pages)}")
        return
    for number, (page, page_again) in enumerate(zip(found.pages, new.pages, strict=True), 1):
        _compare_lines(path, f"page {number}", page.extract_text().splitlines(), page_again.extract_text().splitlines(),
                       report)
    attached, attached_again = _from_pdf(path, content), _from_pdf(path, again)
    for name in sorted({*attached, *attached_again}):
        if attached.get(name) != attached_again.get(name):
            report.find(ALTERED, f"{path.name}: the attached {name} is not the one issued")
    for number, (page, page_again) in enumerate(zip(found.pages, new.pages, strict=True), 1):
        if _drawn(page) != _drawn(page_again):
            report.find(ALTERED, f"{path.name}, page {number}: what is drawn is not what was issued (a digit in a "
                                 "figure, a stamp over the page, or an added mark)")
    if (found.metadata or {}) != (new.metadata or {}):
        report.find(ALTERED, f"{path.name}: the title, date or other properties are not those issued")


def _drawn(page):
    """Return a digest of all that a page draws: its own content and every form and image it uses."""
    digest, seen = hashlib.sha256(), set()

    def add(thing):
        from pypdf.generic import ArrayObject, DictionaryObject, IndirectObject, StreamObject
        if isinstance(thing, IndirectObject):
            if (thing.idnum, thing.generation) in seen:
                return
            seen.add((thing.idnum, thing.generation))
            thing = thing.get_object()
        if isinstance(thing, StreamObject):
            digest.update(thing.get_data())
        if isinstance(thing, DictionaryObject):
            for key in sorted(thing):
                if key not in ("/Parent", "/P", "/StructParent", "/StructParents", "/Length", "/Filter", "/DecodeParms",
                               "/Annots", "/FontFile2", "/FontFile3"):
                    digest.update(key.encode())
                    add(thing.raw_get(key))
        elif isinstance(thing, ArrayObject):
            for each in thing:
                add(each)
        else:
            digest.update(repr(thing).encode())

    for key in ("/Contents", "/Resources", "/MediaBox", "/Rotate"):
        if key in page:
            add(page.raw_get(key))
    return digest.hexdigest()


def _compare_html(path, content, again, report):
    _compare_lines(path, "page", _cut(content), _cut(again), report)


def _cut(content):
    return re.findall(r"[^<>\s][^<>]*|<[^>]*>", content.decode("utf-8", "replace"))


def _compare_notebook(path, content, again, report):
    found, new = _json(path, content), json.loads(again)
    for i, (old, cell) in enumerate(zip(found.get("cells", []), new["cells"], strict=False), 1):
        if "".join(old.get("source", "")) != "".join(cell["source"]):
            report.find(ALTERED, f"{path.name}, cell {i}: its source is not that of the workbook (it was not run)")
        a = [output.get("data", output) for output in old.get("outputs", [])]
        b = [output.get("data", output) for output in cell.get("outputs", [])]
        for place, was, now in _leaves(a, b):
            report.find(ALTERED, f"{path.name}, cell {i}, output {place}: {_short(was, now)}")
    if len(found.get("cells", [])) != len(new["cells"]):
        report.find(ALTERED, f"{path.name}: has {len(found.get('cells', []))} cells, the workbook {len(new['cells'])}")


def _short(was, now):
    was, now = ("".join(x) if isinstance(x, list) else str(x) for x in (was, now))
    start = max(0, next((i for i, (a, b) in enumerate(zip(was, now, strict=False)) if a != b), 0) - 30)
    return f'printed "{was[start:start + 80]}", recomputed "{now[start:start + 80]}"'


def _compare_json(path, content, again, report):
    for place, old, new in _leaves(json.loads(content), json.loads(again)):
        report.find(ALTERED, f"{path.name}, {place}: {old}, recomputed {new}")


_PRINTS = {".pdf": _compare_pdf, ".html": _compare_html, ".ipynb": _compare_notebook, ".json": _compare_json}


def _compare_prints_with_record(path, content, record, report):
    """With another version, the prints of each limit state must still be those of the record."""
    if path.suffix == ".json":
        return
    if path.suffix == ".pdf":
        text = " ".join(page.extract_text() for page in _reader(path, content).pages)
    else:
        text = content.decode("utf-8", "replace")
    plain = re.sub(r"\s+", " ", text)
    for row in record["results"].get("limit_states", []):
        for entry in ("nominal_strength", "available_strength", "required_strength"):
            if row.get(entry) is not None and (printed := f"{units.significant(row[entry])} {row['unit']}") not in plain:
                report.find(ALTERED, f"{path.name}: {row['key']}, {entry} {printed} of the record is not printed")


def _compare_case_file(folder, carried, report):
    for path in folder.glob("*.yaml"):
        if cases.load(path).digest != carried.case.digest:
            report.find(ALTERED, f"{path.name}: the case in the folder is not the one in the issued calc")
