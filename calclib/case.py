"""A case: one member's inputs, every value a text as typed, in a YAML file that is written whole or not at all."""

import hashlib
import json
import os
import re
import tempfile
from dataclasses import dataclass
from pathlib import Path

import yaml

from calclib.errors import CalcError, nearest
from calclib.members import KINDS

REVISION_COLUMNS = ("revision", "date", "by", "description")


@dataclass(frozen=True)
class Case:
    """The inputs of one calc: its kind, the texts as typed, and the revision history."""

    kind: object
    texts: dict
    revisions: tuple = ()
    path: Path | None = None
    file_digest: str = ""         # of the file as it was read, to see whether somebody else changed it

    @property
    def digest(self):
        """Return 12 hex digits that stand for these inputs, whatever the file's layout."""
        content = json.dumps([self.kind.name, {k: v.strip() for k, v in sorted(self.texts.items()) if v.strip()},
                              [list(r) for r in self.revisions]], ensure_ascii=True)
        return hashlib.sha256(content.encode()).hexdigest()[:12]

    def with_texts(self, **texts):
        """Return the case with some texts changed."""
        return Case(self.kind, {**self.texts, **texts}, self.revisions, self.path, self.file_digest)

    def yaml(self):
        """Return the case file: fields in the order of the form, every value quoted, so that YAML guesses nothing."""
        lines = [f"kind: {_quoted(self.kind.name)}"]
        group = None
        for each in self.kind.all_fields():
            if not self.texts.get(each.name, "").strip():
                continue
            if each.group != group:
                group = each.group
                lines += ["", f"# {group}"]
            lines.append(f"{each.name}: {_quoted(self.texts[each.name])}")
        if self.revisions:
            lines += ["", "# Revision history", "revisions:"]
            for row in self.revisions:
                cells = ", ".join(f"{key}: {_quoted(cell)}" for key, cell in zip(REVISION_COLUMNS, row, strict=True))
                lines.append(f"  - {{{cells}}}")
        return "\n".join(lines) + "\n"


# Characters that JSON leaves as they are, and YAML folds into a space or does not read.
_ESCAPED = re.compile("[\x7f-\xa0\u2028\u2029\ud800-\udfff\ufeff\ufffe\uffff]")


def _quoted(text):
    return _ESCAPED.sub(lambda m: f"\\u{ord(m[0]):04x}", json.dumps(text, ensure_ascii=False))


class _Texts(yaml.BaseLoader):
    """Reads every scalar as the text that stands there, and builds nothing but text, lists and mappings."""


def _mapping(loader, node):
    seen = {}
    for key_node, value_node in node.value:
        key = loader.construct_object(key_node, deep=True)
        if not isinstance(key, str):
            raise CalcError(f"line {key_node.start_mark.line + 1}: the name of an input must be plain text.")
        if key in seen:
            raise CalcError(f'line {key_node.start_mark.line + 1}: "{key}" stands twice in the case; keep one.')
        seen[key] = loader.construct_object(value_node, deep=True)
    return seen


_Texts.add_constructor("tag:yaml.org,2002:map", _mapping)
_Texts.add_constructor(None, lambda loader, node: _refuse_tag(node))


def _refuse_tag(node):
    raise CalcError(f"line {node.start_mark.line + 1}: {node.tag} is not allowed in a case; write plain quoted text.")


_Texts.add_constructor("tag:yaml.org,2002:str", yaml.BaseLoader.construct_scalar)
_Texts.add_constructor("tag:yaml.org,2002:seq", lambda loader, node: [
    loader.construct_object(child, deep=True) for child in node.value])


def parse(content, name="the case"):
    """Return the Case that the text of a case file states; raise CalcError if it is not a case."""
    try:
        data = yaml.load(content, _Texts)  # the loader above builds texts only
    except yaml.YAMLError as error:
        place = getattr(error, "problem_mark", None)
        where = f", line {place.line + 1}" if place else ""
        raise CalcError(f"{name}{where}: not readable as YAML: {getattr(error, 'problem', error)}.") from error
    except CalcError as error:
        raise CalcError(f"{name}, {error}") from error
    except RecursionError as error:
        raise CalcError(f"{name}: lists or mappings stand too deep in each other; a case is a plain list of lines.") \
            from error
    if not isinstance(data, dict):
        raise CalcError(f'{name}: is not a case; a case is a list of lines such as  plate_width: "4-1/4 in"')
    kind = data.pop("kind", None)
    if kind is None:
        raise CalcError(f'{name}: has no "kind"; write one of: {", ".join(KINDS)}.')
    if not isinstance(kind, str) or kind not in KINDS:
        raise CalcError(f'{name}: "{kind}" is not a kind of member; the kinds are: {", ".join(KINDS)}'
                        + (nearest(str(kind), KINDS) or "."))
    revisions = _revisions(data.pop("revisions", []), name)
    for key, value in data.items():
        if not isinstance(value, str):
            raise CalcError(f'{name}: "{key}" must be one text, such as  {key}: "..."')
    return Case(KINDS[kind], data, revisions)


def _revisions(rows, name):
    if not isinstance(rows, list) or not all(
            isinstance(row, dict) and set(row) == set(REVISION_COLUMNS)
            and all(isinstance(cell, str) for cell in row.values()) for row in rows):
        raise CalcError(f"{name}: each line of revisions needs exactly: {', '.join(REVISION_COLUMNS)}.")
    return tuple(tuple(row[key] for key in REVISION_COLUMNS) for row in rows)


def load(path):
    """Return the Case in a file; raise CalcError if there is none."""
    path = Path(path)
    try:
        content = path.read_bytes()
        text = content.decode("utf-8-sig")
    except UnicodeDecodeError as error:
        raise CalcError(f"{path}: is not a text file in UTF-8, so not a case.") from error
    except OSError as error:
        raise CalcError(f"{path}: cannot be read: {error.strerror}.") from error
    case = parse(text, str(path))
    return Case(case.kind, case.texts, case.revisions, path, hashlib.sha256(content).hexdigest())


def save(case, path=None):
    """Write the case file whole or not at all, and return the case as saved.

    Raises CalcError if the file is not the one that was loaded: somebody else changed it meanwhile, or another case
    has the name; and if the file cannot be written.
    """
    path = Path(path or case.path)
    content = case.yaml().encode("utf-8")
    try:
        write_whole(path, content, lambda: _refuse_changed(path, case))
    except OSError as error:
        raise CalcError(f"{path}: cannot be written: {error.strerror or error}. Nothing was saved.") from error
    return Case(case.kind, case.texts, case.revisions, path, hashlib.sha256(content).hexdigest())


def _refuse_changed(path, case):
    if path.exists() and hashlib.sha256(path.read_bytes()).hexdigest() != case.file_digest:
        if path == case.path:
            raise CalcError(f"{path}: somebody else changed this case since it was opened. Nothing was saved. Save "
                            "under another name, or open the case again.")
        raise CalcError(f"{path}: another file has this name. Nothing was saved. Save under another name.")


def write_whole(path, content, check=lambda: None):
    """Write bytes to a file so that it is either the old one or the new one, whenever the process is killed.

    `check` is called last, when only the renaming is left, so that nobody else's change slips in between.
    """
    handle, temporary = tempfile.mkstemp(prefix=f".{Path(path).name}.", dir=Path(path).parent)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(content)
            file.flush()
            os.fsync(file.fileno())
        os.chmod(temporary, 0o644)
        check()
        os.replace(temporary, path)
    except BaseException:
        Path(temporary).unlink(missing_ok=True)
        raise


def from_record(record):
    """Return the Case whose inputs a record holds."""
    kind = record["results"]["kind"]
    if kind not in KINDS:
        raise CalcError(f'the record is of kind "{kind}", which is not known here.')
    return Case(KINDS[kind], dict(record["inputs"]), tuple(tuple(row) for row in record["revisions"]))
