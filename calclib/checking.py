"""Check an issued calc: recompute everything from the inputs it carries, and compare every number and every print.

The inputs are read from the file as data, the calc is issued again from them with the installed library, and the two
are compared. No code from the file is run.

Where the record agrees and the calc was made with what is installed here, the file must be what is issued again, down
to the last stroke. Where it does not, the file is compared with what it carries itself (so that a print altered by hand
is still told from a result that a library computes otherwise), and its notebook number by number with the one issued
again.
"""

import json
import re
from collections import Counter
from dataclasses import dataclass, field
from pathlib import Path

from calclib import __version__, bundles, comparing
from calclib import case as cases
from calclib.carried import READERS, carried_by, read_json, read_pdf, reading
from calclib.errors import CalcError

IDENTICAL, DIFFERS, ALTERED = "identical", "differs", "altered"
_ORDER = (IDENTICAL, DIFFERS, ALTERED)
_SHOWN = 12            # differences named in a report; the rest is counted
_WRITERS = (".pdf", ".html")
_ATTACHED = (".yaml", ".json", ".ipynb")   # in this order


@dataclass
class Report:
    """What a check found, in the order of weight."""

    name: str
    digest: str = ""
    issued_with: str = ""
    findings: list = field(default_factory=list)   # (status, words)
    remarks: list = field(default_factory=list)
    numbers_only: bool = False                     # made with other versions: layout and drawings are not compared

    def find(self, status, words):
        self.findings.append((status, words))

    @property
    def status(self):
        return max((status for status, _ in self.findings), key=_ORDER.index, default=IDENTICAL)

    def text(self):
        """Return the report in words. Text from the file is data, and cannot steer a terminal."""
        from calclib.issuing.pages import printable
        status = self.status.upper()
        if self.numbers_only and not self.findings:
            status = "NUMBERS IDENTICAL, layout and drawings not compared"
        lines = [f"{self.name}: {status}",
                 f"inputs {self.digest}, issued with calclib {self.issued_with}, checked with calclib {__version__}"]
        findings = sorted(self.findings, key=lambda each: -_ORDER.index(each[0]))
        lines += [f"  {status}: {words}" for status, words in findings[:_SHOWN]]
        if len(findings) > _SHOWN:
            counts = Counter(status for status, _ in findings[_SHOWN:])
            lines.append("  and " + ", ".join(f"{count} more of {status}" for status, count in counts.items()))
        if not findings:
            lines.append("  every number of the record and every result printed agree with the recomputed calc")
        lines += [f"  note: {remark}" for remark in dict.fromkeys(self.remarks)]
        return "\n".join(printable(" ".join(line.splitlines())) for line in lines)


def check(path, issuer=None):
    """Return the `Report` on an issued PDF, HTML page, notebook, record or folder.

    Raises
    ------
    CalcError : the file is no issued calc, or its inputs cannot be used.
    """
    from calclib.issuing.issue import Issuer
    path = Path(path)
    if issuer is None:
        with Issuer() as started:
            return check(path, started)
    if path.is_dir():
        return _check_folder(path, issuer)
    carried = carried_by(path)
    report = _report(path, carried)
    _compare(carried, _built(carried, issuer, report), report)
    return report


def _report(path, carried):
    return Report(str(path), carried.case.digest, str(carried.record.get("calclib")))


def _check_folder(folder, issuer):
    """Check every file of a revision's folder, and that it holds what was issued and nothing else."""
    from calclib.issuing.issue import LEFT_BY_SYSTEMS
    present = {path.name: path for path in sorted(folder.iterdir()) if path.name not in LEFT_BY_SYSTEMS}
    members = [path for path in present.values() if path.suffix.lower() in READERS]
    if not members:
        raise CalcError(f"{folder}: holds no issued calc (no PDF, HTML page, notebook or record). Name the folder of "
                        "one revision.")
    readable, refusals = [], []
    for path in members:
        try:
            readable.append(carried_by(path))
        except CalcError as error:
            refusals.append(error)
    if not readable:
        raise refusals[0]
    first = readable[0]
    report = _report(folder, first)
    for error in refusals:
        report.find(ALTERED, str(error))
    expected = _built(first, issuer, report)
    for name in [name for name in expected if name not in present]:
        report.find(ALTERED, f"{name} is missing from the folder")
    for name in [name for name in present if name not in expected]:
        report.find(ALTERED, f"{name} is not part of the issue")
    for each in readable:
        if each.record != first.record or each.case.yaml() != first.case.yaml():
            report.find(ALTERED, f"{each.name}: carries other inputs or another record than {first.name}")
        same = each.case.yaml() == first.case.yaml()
        _compare(each, expected if same else _built(each, issuer, report), report)
    for path in [path for path in present.values() if path.suffix == ".yaml"]:
        _compare_case_file(path, expected, first, report)
    return report


def _built(carried, issuer, report):
    """Return what is issued again from the inputs carried; inputs changed after issue may allow nothing."""
    if carried.record["digest"] != carried.case.digest:
        report.find(ALTERED, f"{carried.name}: the inputs have the digest {carried.case.digest}, the record says "
                             f"{carried.record['digest']}: inputs or record were changed after issue")
    try:
        return issuer.build(carried.case)
    except CalcError as error:
        if not report.findings:
            raise CalcError(f"{report.name}: nothing can be computed from the inputs it carries: {error}") from error
        report.find(ALTERED, f"{carried.name}: nothing can be computed from the inputs: {error}")
        return {}


# --- comparing -------------------------------------------------------------------------------------------------

def _compare(carried, expected, report):
    """Compare one file with the calc issued again from its own inputs."""
    if not expected:
        return
    again = _of(expected, carried.suffix)
    if carried.content == again:
        return
    record, notebook = json.loads(_of(expected, ".json")), json.loads(_of(expected, ".ipynb"))
    same_results = not _compare_records(carried, record, report)
    made_with = _made_with(carried)
    same_tools = made_with == notebook["metadata"]["calclib"]
    if not same_tools:
        report.numbers_only = True
        others = ", ".join(f"{name} {version}" for name, version in made_with.items()
                           if notebook["metadata"]["calclib"].get(name) != version)
        report.remarks.append(f"{carried.name}: issued with {others[:200]}; layout, drawings and marks over the "
                              "page are compared only where the same versions are installed")
    with reading(carried.name, "a calc"):
        if same_results and same_tools:
            before = len(report.findings)
            _compare_whole(carried, again, expected, report)
            if len(report.findings) == before:
                report.remarks.append(f"{carried.name}: the bytes are not as issued (signed, or saved again); every "
                                      "number, print and drawing is")
        elif carried.notebook is not None:
            _compare_with_itself(carried, report)
            _compare_notebooks(carried, notebook, same_tools, ALTERED if same_results else DIFFERS, report)
            if carried.suffix in _WRITERS:
                _compare_with_carried(carried, same_tools, report)


def _of(files, suffix):
    return next(content for name, content in files.items() if name.endswith(suffix))


def _made_with(carried):
    """Return the versions that made a calc; a record by itself knows calclib's only, and has no layout."""
    if carried.notebook is None:
        from calclib.issuing.issue import made_with
        return {**made_with(), "calclib": carried.record.get("calclib")}
    with reading(carried.name, "a notebook"):
        return dict(carried.notebook["metadata"]["calclib"])


def _compare_records(carried, again, report):
    """Report what of the record is computed otherwise, and return whether there is anything."""
    made = list(comparing.record_changes(carried.record, again))
    for computed, words in made:
        report.find(DIFFERS if computed else ALTERED, f"{carried.name}: {words}")
    return bool(made)


def _compare_whole(carried, again, files, report):
    """The file must be the one issued again: nothing printed, drawn or attached may differ."""
    changes, remarks = _changes(carried, again, files)
    report.remarks += [f"{carried.name}: {remark}" for remark in remarks]
    for words in changes:
        report.find(ALTERED, f"{carried.name}: {words}")


def _changes(carried, again, files):
    if carried.suffix == ".pdf":
        changes, remarks = comparing.pdf_changes(read_pdf(carried.name, carried.content),
                                                 read_pdf(carried.name, again))
    elif carried.suffix == ".html":
        changes, remarks = list(comparing.html_changes(carried.content, again)), []
    else:
        found, new = (read_json(carried.name, content) for content in (carried.content, again))
        made = comparing.notebook_changes(found, new) if carried.suffix == ".ipynb" else (
            (place, comparing.sides(old, new)) for place, old, new in comparing.leaves(found, new))
        changes, remarks = [f"{place}: {words}" for place, words in made], []
    attached = {name: content for name, content in files.items() if Path(name).suffix in _ATTACHED}
    changed = [f"the attached {name} is not the one issued" for name in {**attached, **carried.files}
               if carried.suffix in _WRITERS and carried.files.get(name) != attached.get(name)]
    return [*changed, *changes], remarks


def _compare_notebooks(carried, again, same_tools, status, report):
    """Compare the notebook carried with the one issued again: its sources, and each number that a section prints."""
    if same_tools:
        sources, sources_again = ([(cell["id"], "".join(cell["source"])) for cell in notebook["cells"]]
                                  for notebook in (carried.notebook, again))
        if sources != sources_again:
            report.find(ALTERED, f"{carried.name}: the source of the notebook is not that of the workbook (it was not "
                                 "run)")
    sections, sections_again = _sections(carried.notebook), _sections(again)
    for key in {**sections_again, **sections}:
        if key not in sections or key not in sections_again:
            report.find(status, f"{carried.name}: the section {key} stands only in the "
                                f"{'file' if key in sections else 'recomputed calc'}")
            continue
        texts, texts_again = ([text for each in group for text in _printing(each)]
                              for group in (sections[key], sections_again[key]))
        for old, new in comparing.changes(texts, texts_again):
            if comparing.numbers(old) != comparing.numbers(new):
                report.find(status, f"{carried.name}: section {key}: {comparing.sides(old, new)}")


def _sections(notebook):
    made = {}
    for cell in notebook["cells"]:
        for output in cell.get("outputs", []):
            if bundles.SECTION in output.get("data", {}):
                section = output["data"][bundles.SECTION]
                made.setdefault(section["key"], []).append(section)
    return made


# Sections whose words belong to a version: what they say is not a result.
_WORDS = ("scope", "assumptions", "cautions", "checker")


def _printing(section):
    """Return the texts of a section that print results, in order; a drawing is told by its words."""
    if section["key"] in _WORDS:
        return []
    return [text for node in section["nodes"] for text in _texts(
        {name: value for name, value in node.items() if name not in ("svg", "png", "width")})]


def _texts(value):
    if isinstance(value, dict):
        return [text for each in value.values() for text in _texts(each)]
    if isinstance(value, list):
        return [text for each in value for text in _texts(each)]
    return [str(value)] if value not in (None, "") else []


def _compare_with_itself(carried, report):
    """Compare what a notebook stores twice: case and record, and each section in its public and its private form."""
    stored = next(output["data"][bundles.CALC] for cell in carried.notebook["cells"]
                  for output in cell.get("outputs", []) if bundles.CALC in output.get("data", {}))
    if stored["record"] != carried.record or cases.parse(stored["case"]).yaml() != carried.case.yaml():
        report.find(ALTERED, f"{carried.name}: its notebook holds another case or record than it carries")
    head = stored["document"]
    told = {"digest": carried.case.digest, "version": f"calclib {carried.record['calclib']}",
            "verdict": carried.record["verdict"]}
    for name, value in told.items():
        if head[name] != value:
            report.find(ALTERED, f"{carried.name}: {name}: {comparing.sides(head[name], value)}")
    if carried.record["calclib"] != _made_with(carried).get("calclib"):
        report.find(ALTERED, f"{carried.name}: the notebook says calclib {_made_with(carried).get('calclib')}, the "
                             f"record {carried.record['calclib']}")
    for number, cell in enumerate(carried.notebook["cells"], 1):
        data = [output["data"] for output in cell.get("outputs", []) if "data" in output]
        sections = [each[bundles.SECTION] for each in data if bundles.SECTION in each]
        if sections:
            again = [output.data for section in sections for output in bundles.outputs(_with_pictures(section))]
            for words in _public_changes(data, again):
                report.find(ALTERED, f"{carried.name}: cell {number}, {words}")


def _with_pictures(section):
    """Return a section as it was shown; the picture is stored beside it."""
    return {**section, "nodes": [{"png": "", **node} if node["type"] == "figure" else node
                                 for node in section["nodes"]]}


def _public_changes(found, again):
    """Yield where the texts that any viewer shows print other numbers than the section stored beside them."""
    if len(found) != len(again):
        yield f"has {len(found)} outputs, its sections make {len(again)}"
    for data, made in zip(found, again, strict=False):
        for mime in ("text/latex", "text/markdown", "text/plain"):
            old, new = ("".join(each.get(mime, "")) for each in (data, made))
            # Another version may make another stamp; it is no result.
            old, new = (re.sub(r"\bstamp [0-9a-f]{8}\b", "", each) for each in (old, new))
            if comparing.numbers(old) != comparing.numbers(new):
                yield f"{mime}: {comparing.sides(old, new)}"


def _write(suffix):
    from calclib.issuing.html import write_html
    from calclib.issuing.pdf import write_pdf
    return write_pdf if suffix == ".pdf" else lambda *arguments: write_html(*arguments).encode()


def _compare_with_carried(carried, same_tools, report):
    """Lay out once more what the notebook in the file says, and compare: with the same versions all, else numbers."""
    from calclib.issuing import pages
    # Only what the calc says is laid out: no other cell or output of a stranger.
    cells = [{**cell, "outputs": [output for output in cell.get("outputs", [])
                                  if {bundles.SECTION, bundles.CALC} & set(output.get("data", {}))]}
             for cell in carried.notebook["cells"] if cell["cell_type"] == "code"]
    document, _, _ = pages.document_of({"cells": json.loads(json.dumps(cells))})
    files = {name: content for suffix in _ATTACHED for name, content in carried.files.items() if name.endswith(suffix)}
    for name in set(carried.files) - set(files):
        report.find(ALTERED, f"{carried.name}: the attached {name} is not part of the issue")
    again = _write(carried.suffix)(document, pages.attachments(files))
    if same_tools:
        _compare_whole(carried, again, carried.files, report)
        return
    if carried.suffix == ".pdf":
        reader = read_pdf(carried.name, carried.content)
        for words in comparing.marks_on(reader):
            report.find(ALTERED, f"{carried.name}: {words}")
        found, new = (comparing.pdf_numbers(each) for each in (reader, read_pdf(carried.name, again)))
    else:
        found, new = comparing.html_numbers(carried.content), comparing.html_numbers(again)
    for old, now in comparing.changes(found, new):
        report.find(ALTERED, f"{carried.name}: the numbers printed are not those of the notebook it carries: "
                             f"{comparing.sides(old, now)}")


def _compare_case_file(path, expected, first, report):
    try:
        case = cases.load(path)
    except CalcError as error:
        report.find(ALTERED, str(error))
        return
    if case.yaml() != first.case.yaml():
        report.find(ALTERED, f"{path.name}: the case in the folder is not the one in the issued calc")
    elif expected and path.read_bytes() != _of(expected, ".yaml"):
        report.remarks.append(f"{path.name}: written otherwise than issued; the inputs are the same")
