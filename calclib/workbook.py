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
from threading import RLock

from IPython.display import display

from calclib import bundles, document, record
from calclib import case as cases
from calclib.calc import evaluate
from calclib.errors import CalcError, CaseErrors, EntryError, UnknownInput
from calclib.live import LiveOutputs
from calclib.members import KINDS

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
        self.case = case            # as typed, whether it can be used or not
        self.calc = evaluate(case)  # the last good calc
        self.lock = RLock()         # widget messages arrive on a second thread
        self.outputs = LiveOutputs(self._drawn, self._closing, self._tell, self._fail)
        self._form = None
        self._vouch()

    # --- what the notebook calls

    def form(self):
        """Show the form when a person sits at the notebook."""
        if not is_live():
            return
        from calclib.form import Form
        self._form = Form(_form_fields(self.case), dict(self.case.texts), self._judge, self._save, self._issue,
                          self.outputs.painted)
        display(self._form)

    def show(self, group):
        """Show one group of sections, each as ordinary outputs that are replaced when an input changes."""
        with self.lock, self.outputs.pencil:
            for key, output in self._made(group, self.calc, vectors=True).items():
                self.outputs.show(key, output)

    def close(self):
        """Assert that the calc is consistent, and store the case and the record for the exporters."""
        with self.lock:
            for key, output in self._closing(self.calc).items():
                self.outputs.show(key, output)
            if self._form:
                self._form.complete = True

    # --- what the form calls

    def _judge(self, _name, _text, texts):
        with self.lock:
            self.case = self.case.with_texts(**texts)
            messages, echo, status, units_before = {}, {}, "", self.calc.x.units
            try:
                self.calc = evaluate(self.case)
            except CaseErrors as errors:
                messages = {error.field: error.problem for error in errors.errors}
            except EntryError as error:
                messages = {error.field: error.problem}
            except CalcError as error:
                status = str(error)
            else:
                self._vouch()
                echo = document.echo(self.calc)
                status = document.verdict(self.calc)["text"]
                if self._form:  # which has drawn nothing yet while it is being made
                    if self.calc.x.units != units_before:
                        self._form.fields = _form_fields(self.case)
                    self.outputs.follow(self.calc, self._words, self._form.in_view)
            if messages:
                status = "The calc below is the last good one; see the message beside the field."
            return {"ok": not (messages or (status and not echo)), "messages": messages, "echo": echo,
                    "stamp": self._stamps, "status": status}

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

    def _tell(self, number):
        self._form.send({"drawn": number})

    def _fail(self, error):
        self._form.fail(error)

    # --- outputs

    def _vouch(self):
        """Make the words of the calc, and the stamps of every output that it will have; nothing is drawn for them."""
        self._words, stamps = {}, []
        for group in _GROUPS:
            made = self._made(group, self.calc, vectors=None)
            stamps += [output.stamp for output in made.values() if output.stamp]
            if group not in DRAWN:
                self._words.update(made)
        self._stamps = " ".join(dict.fromkeys(stamps))

    @staticmethod
    def _made(group, calc, vectors):
        """Return {(group, index): Output} of a group of sections, as many of them whatever the inputs are."""
        sections = _GROUPS[group](calc, vectors) if group in DRAWN else _GROUPS[group](calc)
        made = [output for section in sections for output in bundles.outputs(section, calc.case.digest)]
        places = {"detailing": 1, "sensitivity": 2 * len(calc.case.kind.plots)}.get(group, len(made))
        return {(group, index): output
                for index, output in enumerate(made + [bundles.BLANK] * (places - len(made)))}

    def _drawn(self, calc, vectors):
        for group in DRAWN:
            if (group, 0) in self.outputs.shown:
                yield self._made(group, calc, vectors)

    def _closing(self, calc):
        made = record.record(calc)
        _assert_consistent(calc, made)
        words = (f"Inputs {calc.case.digest}. {len(calc.limit_states)} limit states, {len(calc.rules)} detailing "
                 f"rules. {document.verdict(calc)['text']}")
        stamps = [output.stamp for output in self.outputs.shown.values() if bundles.SECTION in output.data]
        return {("close", 0): bundles.Output({"text/plain": words, bundles.CALC: {
            "document": document.cover(calc), "record": made, "case": calc.case.yaml(), "stamps": stamps}}, "")}


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
             "blank": f"{each.default_text(unit_set)}, by default" if each.default else "",
             "optional": each.optional or bool(each.default)} for each in case.kind.all_fields()]
