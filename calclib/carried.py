"""What an issued file carries for whoever checks it: case, record and notebook, read as data.

The file is from a stranger. Nothing of it is run, no name in it is used as a path, and whatever is wrong with it is
said in one message.
"""

import base64
import io
import json
import logging
from collections import Counter
from contextlib import contextmanager
from dataclasses import dataclass
from html.parser import HTMLParser

from calclib import bundles
from calclib import case as cases
from calclib.errors import CalcError
from calclib.members import KINDS

_LARGEST = 100e6       # bytes; an issued calc has one or two million


@dataclass(frozen=True)
class Carried:
    """What an issued file carries for the checker."""

    name: str
    suffix: str
    content: bytes
    case: cases.Case
    record: dict
    notebook: dict | None     # none beside a record by itself
    files: dict               # name -> bytes, as attached


@contextmanager
def reading(name, what):
    """Turn whatever a reader raises over a broken or hostile file into one message."""
    try:
        yield
    except CalcError:
        raise
    except Exception as error:  # the libraries promise no kind of error for such files
        raise CalcError(f"{name}: is not {what} as it was issued, so it cannot be checked "
                        f"({type(error).__name__}: {str(error)[:200]}).") from error


def read_json(name, content):
    """Return plain data; an entry that stands twice is refused, since readers disagree on which one counts."""
    def once(pairs):
        twice = [key for key, count in Counter(key for key, _ in pairs).items() if count > 1]
        if twice:
            raise ValueError(f"the entry {twice[0]} stands twice")
        return dict(pairs)
    with reading(name, "JSON"):
        return json.loads(content.decode("utf-8"), object_pairs_hook=once)


def read_pdf(name, content):
    """Return a pypdf reader."""
    import pypdf
    logging.getLogger("pypdf").setLevel(logging.CRITICAL)  # what it has to say is said in one message here
    with reading(name, "a PDF"):
        reader = pypdf.PdfReader(io.BytesIO(content))
        if reader.is_encrypted:
            raise CalcError(f"{name}: is encrypted; an issued calc never is. Ask for the file as it was issued.")
        len(reader.pages)
        return reader


class Page(HTMLParser):
    """What a page shows: its words, the words for its pictures, and the links to attached files."""

    def __init__(self, content):
        super().__init__()
        self.words, self.links, self._silent = [], [], False
        self.feed(content.decode("utf-8"))

    def handle_starttag(self, tag, attributes):
        named = dict(attributes)
        self._silent = tag == "style"
        if tag == "img":
            self.words.append(named.get("alt") or "")
        if tag == "a" and named.get("download") and (named.get("href") or "").startswith("data:"):
            self.links.append((named["download"], named["href"].partition(",")[2]))

    def handle_data(self, data):
        if not self._silent:
            self.words.append(data)


def carried_by(path):
    """Return what an issued PDF, HTML page, notebook or record carries; raise CalcError if it carries no calc."""
    suffix = path.suffix.lower()
    if not path.exists():
        raise CalcError(f"{path}: no such file or folder.")
    if suffix not in READERS:
        raise CalcError(f"{path}: is not a PDF, HTML page, notebook or record, so no issued calc.")
    if not path.is_file() or path.stat().st_size > _LARGEST:
        raise CalcError(f"{path}: is no file, or larger than any issued calc.")
    try:
        content = path.read_bytes()
    except OSError as error:
        raise CalcError(f"{path}: cannot be read: {error.strerror}.") from error
    files, case, record, notebook = READERS[suffix](path, content)
    with reading(path, "a calc"):
        if not isinstance(record["results"], dict) or not isinstance(record.get("digest"), str):
            raise CalcError(f"{path}: what it carries as record is no record of a calc.")
    return Carried(path.name, suffix, content, case, record, notebook, files)


def _from_attachments(path, files):
    def one(suffix, word):
        made = [content for name, content in files if name.endswith(suffix)]
        if len(made) != 1:
            raise CalcError(f"{path}: carries {len(made) or 'no'} {word}{'s' if made else ''}, so it is no calc as it "
                            "was issued. Ask for the file as it was issued.")
        return made[0]

    case, record, notebook = one(".yaml", "case"), one(".json", "record"), one(".ipynb", "notebook")
    return dict(files), _case(path, case), read_json(path, record), read_json(path, notebook)


def _case(path, content):
    with reading(path, "a calc"):
        return cases.parse(content.decode("utf-8"), f"the case in {path}")


def _from_pdf(path, content):
    reader = read_pdf(path, content)
    with reading(path, "a PDF"):
        files = [(name, each) for name, parts in reader.attachments.items() for each in parts]
    return _from_attachments(path, files)


def _from_html(path, content):
    with reading(path, "a page"):
        files = [(name, base64.b64decode(data, validate=True)) for name, data in Page(content).links]
    return _from_attachments(path, files)


def _from_notebook(path, content):
    notebook = read_json(path, content)
    with reading(path, "a notebook"):
        stored = [output["data"][bundles.CALC] for cell in notebook["cells"] for output in cell.get("outputs", [])
                  if bundles.CALC in output.get("data", {})]
        if len(stored) != 1:
            raise CalcError(f"{path}: holds {len(stored) or 'no'} calc{'s' if stored else ''}; an issued notebook "
                            "holds one.")
        return {}, _case(path, stored[0]["case"].encode()), stored[0]["record"], notebook


def _from_record(path, content):
    record = read_json(path, content)
    with reading(path, "a record"):
        texts, rows = record["inputs"], record["revisions"]
        case = cases.Case(KINDS[record["results"]["kind"]], texts, tuple(tuple(row) for row in rows))
        case = cases.parse(case.yaml(), f"the inputs in {path}")
        if case.texts != texts or [list(row) for row in case.revisions] != rows:
            raise CalcError(f"{path}: its inputs are not those of a case.")
        return {}, case, record, None


READERS = {".pdf": _from_pdf, ".html": _from_html, ".ipynb": _from_notebook, ".json": _from_record}
