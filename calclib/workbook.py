"""A workbook: the form and the live sections of one calc inside a notebook.

A notebook names its kind and shows its sections, one a cell::

    book = open_workbook("pin_plate", globals())
    book.form()
    book.show("summary")
    ...
    book.close()

Every section is an ordinary stored output. While the form is alive, a change recomputes the calc and replaces only the
outputs that changed; an entry that cannot be used leaves the last good calc where it is.
"""

import os
from pathlib import Path
from threading import RLock, Timer

from IPython.display import display

from calclib import bundles, document, record
from calclib import case as cases
from calclib.calc import evaluate
from calclib.errors import CalcError, CaseErrors, EntryError, UnknownInput
from calclib.members import KINDS

SETTLE = 0.8  # seconds without a change until the drawings are stored as vectors too
DRAWN = ("sketch_section", "sensitivity")  # groups of pictures
_GROUPS = {group.__name__: group for group in document.SECTIONS}


def is_live():
    """Return whether a person sits at the notebook; a batch run shows no form and writes nothing."""
    return "JPY_SESSION_NAME" in os.environ and "CALCLIB_BATCH" not in os.environ


def open_workbook(kind_name, parameters):
    """Return the Workbook for the parameters cell of a notebook.

    Parameters
    ----------
    kind_name : the kind of member of this notebook
    parameters : the notebook's ``globals()``: ``case`` names the case file, and each input may be given as a text,
        where an empty text leaves what the case file says

    Raises
    ------
    CalcError : no such case, a case of another kind, an input that does not exist or cannot be used.
    """
    kind = KINDS[kind_name]
    case = cases.load(parameters["case"])
    if case.kind is not kind:
        raise CalcError(f'{parameters["case"]}: is a case of kind "{case.kind.name}"; this workbook is for '
                        f'"{kind.name}".')
    names = [each.name for each in kind.all_fields()]
    given = {name: value for name, value in parameters.items()
             if isinstance(value, str) and not name.startswith("_") and name != "case"}
    unknown = [UnknownInput(name, names) for name in given if name not in names]
    if unknown:
        raise CaseErrors(unknown)
    return Workbook(case.with_texts(**{name: text for name, text in given.items() if text}))


class Workbook:
    """The calc that a notebook shows, and the outputs it is shown in."""

    def __init__(self, case):
        self.case = case          # as typed, whether it can be used or not
        self.calc = evaluate(case)  # the last good calc
        self.lock = RLock()       # widget messages arrive on a second thread
        self._shown = {}          # (group, index) -> (display handle, bundle)
        self._timer = None
        self._vouched = ""        # the stamps that the form was told last
        self._form = None

    # --- what the notebook calls

    def form(self):
        """Show the form when a person sits at the notebook."""
        if not is_live():
            return
        from calclib.form import Form
        self._form = Form(_form_fields(self.case), dict(self.case.texts), self._judge, self._save, self._issue)
        display(self._form)

    def show(self, group):
        """Show one group of sections, each as ordinary outputs that are replaced when an input changes."""
        with self.lock:
            for index, output in enumerate(self._outputs(group, vectors=True)):
                self._shown[group, index] = (_display(output), output)

    def close(self):
        """Assert that the calc is consistent, and store the case and the record for the exporters."""
        with self.lock:
            output = self._closing()
            self._shown["close", 0] = (_display(output), output)

    # --- what the form calls

    def _judge(self, _name, _text, texts):
        with self.lock:
            self.case = self.case.with_texts(**texts)
            messages, echo, status = {}, {}, ""
            try:
                self.calc = evaluate(self.case)
            except CaseErrors as errors:
                messages = {error.field: error.problem for error in errors.errors}
            except EntryError as error:
                messages = {error.field: error.problem}
            except CalcError as error:
                status = str(error)
            else:
                self._vouched = self._stamps_of_calc()
                echo = document.echo(self.calc)
                status = document.verdict(self.calc)["text"]
                self._later(0, self._refresh)  # after the answer, so that the form is never kept waiting
            if messages:
                status = "The calc below is the last good one; see the message beside the field."
            return {"ok": not (messages or (status and not echo)), "messages": messages, "echo": echo,
                    "stamp": self._vouched, "status": status}

    def _save(self):
        with self.lock:
            if self.case.digest != self.calc.case.digest:
                raise CalcError("An entry cannot be used; mend it first. Nothing was saved.")
            self.case = cases.save(self.case)
            return f"Saved to {self.case.path}."

    def _issue(self):
        from calclib.issuing.issue import Issuer
        with self.lock:
            if not self.case.path.exists() or cases.load(self.case.path).digest != self.case.digest:
                raise CalcError("The form differs from the case file; save the case first. Nothing was issued.")
            with Issuer() as issuer:
                return "Issued: " + ", ".join(str(path) for path in issuer.issue(self.case.path, _exports()))

    # --- outputs

    def _outputs(self, group, vectors):
        make, digest = _GROUPS[group], self.calc.case.digest
        sections = make(self.calc, vectors) if group in DRAWN else make(self.calc)
        return [output for section in sections for output in bundles.outputs(section, digest)]

    def _stamps_of_calc(self):
        """Return the stamps of every output that the present calc will have; nothing is drawn for it."""
        groups = dict.fromkeys(group for group, _ in self._shown if group != "close")
        made = [output for group in groups if group not in DRAWN for output in self._outputs(group, False)]
        captions = [output for group in groups if group in DRAWN
                    for section in _GROUPS[group](self.calc, vectors=None)
                    for output in bundles.outputs(section, self.calc.case.digest)]
        return " ".join(dict.fromkeys(output.stamp for output in made + captions if output.stamp))

    def _refresh(self):
        """Replace what changed: words and equations first, then the pictures, and when all is quiet their vectors."""
        with self.lock:
            for drawn in (False, True):
                for group in dict.fromkeys(group for group, _ in self._shown if (group in DRAWN) == drawn):
                    self._replace_group(group, vectors=False)
            self._later(SETTLE, self._settle)

    def _settle(self):
        with self.lock:
            for group in DRAWN:
                self._replace_group(group, vectors=True)
            self._replace(("close", 0), self._closing())

    def _replace_group(self, group, vectors):
        if group != "close":
            for index, output in enumerate(self._outputs(group, vectors)):
                self._replace((group, index), output)

    def _replace(self, key, output):
        handle, before = self._shown[key]
        if output != before:
            handle.update(output.data, raw=True, metadata=output.metadata)
            self._shown[key] = (handle, output)

    def _later(self, seconds, job):
        """Do a job once no edit has come for a while; an edit that comes first starts the wait again."""
        if self._timer:
            self._timer.cancel()
        self._timer = Timer(seconds, job)
        self._timer.daemon = True
        self._timer.start()

    def _closing(self):
        calc = self.calc
        made = record.record(calc)
        _assert_consistent(calc, made)
        words = (f"Inputs {calc.case.digest}. {len(calc.limit_states)} limit states, {len(calc.rules)} detailing "
                 f"rules. {document.verdict(calc)['text']}")
        stamps = [output.stamp for _, output in self._shown.values() if bundles.SECTION in output.data]
        return bundles.Output({"text/plain": words, bundles.CALC: {
            "document": document.cover(calc), "record": made, "case": calc.case.yaml(), "stamps": stamps}}, "")


def _display(output):
    return display(output.data, raw=True, display_id=True, metadata=output.metadata)


def _assert_consistent(calc, made):
    """Compute the calc once more from the case as it would be written, and compare every number."""
    again = record.record(evaluate(cases.parse(calc.case.yaml())))
    if again != made:
        raise AssertionError("the calc computed from its own case file differs from the one shown")


def _exports():
    """Return the folder for issued calcs: exports beside the workbooks, or in the present folder."""
    beside = Path.cwd().parent / "exports"
    return beside if beside.is_dir() else Path.cwd() / "exports"


def _form_fields(case):
    unit_set = case.texts.get("units", "US").strip()
    unit_set = unit_set if unit_set in ("US", "SI") else "US"
    return [{"name": each.name, "label": each.label, "symbol": each.symbol, "group": each.group, "help": each.meaning,
             "unit": each.dimension.printed[unit_set][0] if each.dimension else "",
             "choices": list(each.choices) or None, "search": each.search, "example": each.example(unit_set),
             "optional": each.optional or bool(each.default)} for each in case.kind.all_fields()]
