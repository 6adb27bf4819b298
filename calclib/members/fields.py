"""What a kind of member asks for: its fields, and the fields that every calc has."""

import re
from dataclasses import dataclass
from datetime import date
from types import SimpleNamespace

import numpy as np

from calclib import units
from calclib.errors import CalcError, CaseErrors, EntryError, UnknownInput, nearest

YES, NO = "yes", "no"


@dataclass(frozen=True)
class Field:
    """One input of a calc.

    A field with a `dimension` is a number with a unit; one with `choices` is one of a few words; any other is text.
    A blank field takes its `default`, which is printed as an assumption; without default it is required, or None
    where it is `optional`.
    """

    name: str
    label: str
    group: str
    meaning: str
    symbol: str = ""
    dimension: units.Dimension | None = None
    choices: tuple = ()
    default: str | dict = ""      # text as typed; a dict gives one for each unit set
    optional: bool = False
    above: float | None = None    # the value must be greater, in the base unit
    least: float | None = None    # the value must be at least this
    search: bool = False          # a long list of choices, typed with search
    pattern: str = ""             # in words, what a text must look like
    reader: object = None         # (text) -> value, where the value is neither a number nor one of few words

    def default_text(self, unit_set):
        return self.default[unit_set] if isinstance(self.default, dict) else self.default

    def example(self, unit_set):
        if self.choices:
            return self.choices[0]
        return self.dimension.examples[unit_set] if self.dimension else ""

    def allowed(self):
        """Return the allowed range in words.

        >>> Field("t", "t", "g", "m", dimension=units.LENGTH, above=0).allowed()
        'above 0'
        """
        if self.choices and not self.search:
            return "one of: " + ", ".join(self.choices)
        if self.above is not None:
            return f"above {self.above:g}"
        if self.least is not None:
            return f"at least {self.least:g}"
        return self.pattern or ("any value" if self.dimension else "any text")

    def allows(self, value):
        """Return whether a number, or each of an array, keeps the lower limit of the field; NaN does not."""
        above = -np.inf if self.above is None else self.above
        least = -np.inf if self.least is None else self.least
        return (value > above) & (value >= least)

    def read(self, text, unit_set):
        """Return the value that `text` states, or None if blank; raise EntryError if it cannot be used."""
        text = text.strip() or self.default_text(unit_set)
        if not text:
            if self.optional:
                return None
            example = self.example(unit_set)
            if self.choices and not self.search:
                raise EntryError(self.name, f"is empty; choose one of: {', '.join(self.choices)}")
            raise EntryError(self.name, "is empty; " + (f'write {self.label.lower()}' + (
                f', such as "{example}"' if example else "")))
        if self.reader:
            try:
                return self.reader(text)
            except CalcError as error:
                raise EntryError(self.name, str(error)) from error
        if self.choices:
            for choice in self.choices:
                if choice.lower() == text.lower():
                    return choice
            listed = "the names listed" if self.search else ", ".join(self.choices)
            raise EntryError(self.name, f'"{text}" is not one of {listed}'
                                        + nearest(text, self.choices))
        if not self.dimension:
            return text
        value = units.read(text, self.dimension, unit_set, self.name)
        if not self.allows(value):
            raise EntryError(self.name, f"{text} must be {self.allowed()}")
        return value


@dataclass(frozen=True)
class Kind:
    """One kind of member: what it asks for, the order of its equations, its picture and its plots."""

    name: str
    title: str
    scope: str
    fields: tuple                 # of the kind; every calc's own fields come before and after
    evaluate: object              # (x, run) -> None: orders the equations against the evaluator handed in
    sketch: object                # (x, calc) -> sketch.Drawing
    plots: tuple                  # of Plot
    pointwise: bool = False       # its geometry is searched, so a sweep evaluates one point after the other

    def all_fields(self):
        return (*PROJECT, *BASIS, *LOADS, *self.fields, *CLOSING)

    def field(self, name):
        for each in self.all_fields():
            if each.name == name:
                return each
        raise EntryError(name, f'is not an input of "{self.name}"' + nearest(name, [f.name for f in self.all_fields()]))


@dataclass(frozen=True)
class Plot:
    """A sensitivity plot that every calc of a kind carries, where it applies."""

    field: str                    # the input along the axis
    points: object                # (x) -> {input: array}: where to evaluate; the first is the axis
    present: object = None        # (x) -> present value, where the input itself may be blank
    sizes: object = None          # (x) -> [(value, text)]: standard sizes to mark along the axis
    discrete: bool = False        # only the points exist, such as the sizes of a series
    applies: object = None        # (x) -> whether the case has the input, where it may be blank


def multiples(name, low, high, count=200):
    """Return points from `low` to `high` times the present value of one input."""
    return lambda x: {name: np.linspace(low * getattr(x, name), high * getattr(x, name), count)}


FILE_NAME = "letters, digits, dot, dash and underscore"
PROJECT = (
    Field("project", "Project", "Project", "Project name as it stands on the title block."),
    Field("client", "Client", "Project", "For whom the calc is made.", optional=True),
    Field("firm", "Firm", "Project", "Firm that makes the calc.", optional=True),
    Field("calc_number", "Calc number", "Project", "Number of this calc; names the issue folder.",
          pattern=FILE_NAME),
    Field("subject", "Subject", "Project", "Member and place, such as a mark and gridline."),
    Field("revision", "Revision", "Project", "Revision of the calc.", default="0", pattern=FILE_NAME),
    Field("date", "Date", "Project", "Date of this revision, year-month-day.",
          pattern="year-month-day, such as 2026-11-20"),
    Field("prepared_by", "Prepared by", "Project", "Who prepared the calc."),
    Field("checked_by", "Checked by", "Project", "Who checks the calc; left empty until checked.", optional=True),
)
BASIS = (
    Field("standard", "Standard", "Design basis", "Standard and edition.", choices=("AISC 360-22", "AISC 360-16")),
    Field("method", "Method", "Design basis", "LRFD or ASD; one method for the whole calc.", choices=("LRFD", "ASD")),
    Field("units", "Units", "Design basis", "US customary (kip, in, ksi) or SI (kN, mm, MPa).",
          choices=units.UNIT_SETS),
    Field("page", "Page", "Design basis", "Paper size of the issued calc.", choices=("letter", "A4"),
          default={units.US: "letter", units.SI: "A4"}),
)
LOADS = (
    Field("required_strength", "Required strength", "Loads",
          "Largest axial tension by the load combinations of the method: factored for LRFD, service for ASD.",
          "P_r", units.FORCE, least=0),
    Field("load_level", "Load level", "Loads",
          "Level of the combinations that gave the required strength; it must be that of the method.",
          choices=("LRFD", "ASD")),
    Field("load_source", "Load source", "Loads", "Document, combination and page that the required strength is from."),
)
CLOSING = (
    Field("remarks", "Remarks", "Remarks", "Assumptions and remarks of the engineer, printed with the assumptions.",
          optional=True),
)


def check_names(kind, texts):
    """Raise CaseErrors naming every input that the kind does not have, with the nearest name."""
    known = [f.name for f in kind.all_fields()]
    unknown = [UnknownInput(name, known) for name in texts if name not in known]
    if unknown:
        raise CaseErrors(unknown)


def read_inputs(kind, texts):
    """Return (values, defaults): a namespace with one value a field, and the fields that took their default.

    Raises CaseErrors with every field that cannot be used.
    """
    check_names(kind, texts)
    errors, values, defaults = [], {}, []
    unit_set = units.US
    fields = kind.all_fields()
    for each in sorted(fields, key=lambda f: f.name != "units"):  # the unit set decides how the rest is read
        typed = texts.get(each.name, "").strip()
        try:
            values[each.name] = each.read(typed, unit_set)
        except EntryError as error:
            errors.append(error)
            continue
        if each.name == "units":
            unit_set = values["units"]
        if not typed and values[each.name] is not None:
            defaults.append((each, each.default_text(unit_set)))
    for check in (_check_date, _check_load_level, _check_numbers_for_files):
        errors += check(values)
    if errors:
        order = [f.name for f in fields]
        raise CaseErrors(sorted(errors, key=lambda e: order.index(e.field)))
    return SimpleNamespace(**values), defaults


def _check_date(values):
    if "date" in values:
        try:
            date.fromisoformat(values["date"])
        except ValueError:
            return [EntryError("date", f'"{values["date"]}" is not a date; write year-month-day, such as "2026-11-20"')]
    return []


def _check_load_level(values):
    level, method = values.get("load_level"), values.get("method")
    if level and method and level != method:
        return [EntryError("load_level", f"the required strength is at {level} level and the design basis is {method}; "
                                         "a factored load is never compared with an allowable strength, nor a service "
                                         "load with a design strength. Give the load of the same method, or change "
                                         "the method")]
    return []


def _check_numbers_for_files(values):
    return [EntryError(name, f'"{values[name]}" names a folder; use letters, digits, dot, dash and underscore, '
                             'such as "S-101"')
            for name in ("calc_number", "revision")
            if name in values and not re.fullmatch(r"[A-Za-z0-9][A-Za-z0-9._-]{0,59}", values[name])]
