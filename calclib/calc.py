"""What a calc is: blocks of equations, limit states, detailing rules, cautions, assumptions, and which one governs.

A kind of member orders its equations once, in a function ``evaluate(x, run)``. The `Run` handed in records each
equation with the numbers that went in and came out, so the same pass is what is computed, what is shown and, with an
array in the place of one input, what is swept.
"""

from dataclasses import dataclass, field
from types import SimpleNamespace

import numpy as np

from calclib import units
from calclib.equations.aisc360 import design
from calclib.errors import CalcError, EntryError
from calclib.members.fields import read_inputs
from calclib.tolerance import at_most

FAILS, CAUTION, NOTE = "fails", "caution", "note"


@dataclass(frozen=True)
class Step:
    """One equation with its numbers [base units], or a value chosen from named cases."""

    equation: object              # Equation, or None for a chosen value
    values: dict                  # argument -> float
    result: float
    symbols: dict                 # name -> LaTeX, for this use only
    cite: str
    note: str = ""
    chosen: tuple = ()            # (LaTeX symbol, dimension) of a chosen value


@dataclass
class Block:
    """Steps that belong together; a limit state where it ends in an available strength."""

    key: str
    title: str
    run: "Run"
    factors: object = None
    steps: list = field(default_factory=list)
    nominal: float | None = None      # [kip or N]
    available: float | None = None    # [kip or N]
    required: float | None = None     # [kip or N]
    ratio: float | None = None        # judged unrounded
    clause: str = ""
    cite: str = ""
    reason: str = ""                  # why the limit state does not apply
    notes: list = field(default_factory=list)
    advisory: bool = False            # shown beside the others, never governs
    counts: bool = True               # False: a block that is no limit state, whatever its reason

    def __call__(self, equation, note="", symbols=None, **values):
        """Compute one equation, record it, and return its result."""
        result = equation(**values)
        if self.run.arrays:       # an argument outside its range gives NaN here and is refused as a single number
            self.run.outside = self.run.outside | np.isnan(result)
        cite = equation.cite.text(self.run.edition) if equation.cite.document == self.run.document else \
            equation.cite.text("") if "" in equation.cite.clauses else equation.cite.text(self.run.edition)
        self.steps.append(Step(equation, values, result, symbols or {}, cite, note))
        return result

    def choose(self, symbol, dimension, cases, cite):
        """Record and return the value of the first case that holds; a case is (condition, value, reason)."""
        if self.run.arrays:
            return np.select([np.broadcast_to(c, np.shape(c)) for c, _, _ in cases], [v for _, v, _ in cases], np.nan)
        for condition, value, reason in cases:
            if condition:
                return self.given(symbol, dimension, value, cite, reason)
        raise CalcError(f"{self.title}: no case of {cite} covers these values.")

    def given(self, symbol, dimension, value, cite, note=""):
        """Record and return a value that comes from a table or from others, with its place."""
        self.steps.append(Step(None, {}, value, {}, cite, note, (symbol, dimension)))
        return value

    def limit_state(self, factors, nominal, symbol, clause, advisory=False):
        """Close the block as a limit state: available strength and ratio by the method of the design basis."""
        run = self.run
        self.factors, self.nominal, self.advisory = factors, nominal, advisory
        self.clause, self.cite = run.clause(clause), run.cite(clause)
        if run.method == "LRFD":
            self.available = self(design.design_strength, phi=factors.phi, R_n=nominal,
                                  symbols={"R_n": symbol, "phiR_n": rf"\phi {symbol}"})
        else:
            self.available = self(design.allowable_strength, Omega=factors.omega, R_n=nominal,
                                  symbols={"R_n": symbol, "R_n_Omega": rf"{symbol} / \Omega"})
        self._compare(rf"\phi {symbol}" if run.method == "LRFD" else rf"{symbol} / \Omega", run.required,
                      run.required_symbol)
        return self.available

    def rated(self, available, symbol, required, required_symbol, clause, cite):
        """Close the block as a limit state whose available strength is a maker's rating; no factor is applied."""
        self.available, self.clause, self.cite = available, clause, cite
        self._compare(symbol, required, required_symbol)

    def _compare(self, symbol, required, required_symbol):
        self.required = required
        self.ratio = self(design.ratio, R_r=required, R_c=self.available,
                          symbols={"R_r": required_symbol, "R_c": symbol, "ratio": r"\mathrm{ratio}"})

    def not_applicable(self, reason):
        """Close the block as a limit state that does not apply, with its reason."""
        self.reason = reason

    def left_out(self, reason):
        """Close the block, which is no limit state, with the reason why it has no equations."""
        self.reason, self.counts = reason, False

    @property
    def is_limit_state(self):
        return self.available is not None or (self.counts and bool(self.reason))

    @property
    def passes(self):
        return self.reason != "" or at_most(self.ratio, 1)


@dataclass(frozen=True)
class Rule:
    """A detailing rule: what is required, what is provided, and whether it is met."""

    key: str
    title: str
    cite: str
    required: str
    provided: str
    status: str                   # "meets", FAILS, CAUTION or "not applicable"
    remark: str = ""


@dataclass(frozen=True)
class Message:
    severity: str
    text: str
    cite: str = ""


class Run:
    """The evaluator that a kind of member is handed.

    With `arrays`, inputs may be arrays; then, and when it is `silent`, no message and no rule is worded.
    """

    def __init__(self, x, arrays=False, silent=False):
        self.x, self.arrays, self.silent = x, arrays, silent or arrays
        self.document, _, self.edition = x.standard.rpartition("-")
        self.method, self.units = x.method, x.units
        self.required = x.required_strength
        self.required_symbol = "P_{u}" if x.method == "LRFD" else "P_{a}"
        self.blocks, self.rules, self.messages, self.assumptions = [], [], [], []
        self.outside = False      # with arrays: where no number exists

    def clause(self, clause):
        """Return the clause of the edition; a dict gives one for each."""
        return clause[self.edition] if isinstance(clause, dict) else clause

    def cite(self, clause):
        """Return the clause of the edition with its document."""
        return f"{self.document}-{self.edition} {self.clause(clause)}"

    def pair(self, constants):
        """Return the constant of the unit set, as the standard prints it."""
        return constants[self.units]

    def block(self, key, title):
        self.blocks.append(Block(key, title, self))
        return self.blocks[-1]

    def require(self, condition, name, problem, **values):
        """Refuse: no number exists unless `condition` holds. Values in `problem` are lengths, or (value, dimension)."""
        if self.arrays:
            self.outside = self.outside | ~np.asarray(condition)
        elif not condition:
            raise EntryError(name, self._words(problem, values))

    def _words(self, text, values):
        def word(value):
            if isinstance(value, str):
                return value
            return units.text(*(value if isinstance(value, tuple) else (value, units.LENGTH)), self.units)
        return text.format(**{name: word(value) for name, value in values.items()})

    def message(self, severity, text, cite="", when=True, **values):
        """Add a caution or note where `when` holds; values named in `text` are lengths unless already text."""
        if not self.silent and when:
            self.messages.append(Message(severity, self._words(text, values), self.cite(cite) if cite else ""))

    def caution(self, text, cite="", when=True, **values):
        self.message(CAUTION, text, cite, when, **values)

    def note(self, text, cite="", when=True, **values):
        self.message(NOTE, text, cite, when, **values)

    def assume(self, text, cite="", when=True):
        if not self.silent and when:
            self.assumptions.append(Message(NOTE, text, self.cite(cite) if cite else ""))

    def rule(self, key, title, clause, meets, required, provided, severity=FAILS, remark="", applies=True, reason="",
             **values):
        """Add a detailing rule. `required` and `provided` are words in which values named are lengths."""
        if self.silent:
            return
        status = "not applicable" if not applies else "meets" if meets else severity
        remark = reason if not applies else remark if not meets else ""
        self.rules.append(Rule(key, title, self.cite(clause), self._words(required, values),
                               self._words(provided, values), status, self._words(remark, values)))


@dataclass(frozen=True)
class Calc:
    """The result of one case."""

    case: object
    x: SimpleNamespace
    blocks: list
    rules: list
    messages: list
    assumptions: list
    run: Run

    def __getitem__(self, key):
        for block in self.blocks:
            if block.key == key:
                return block
        raise KeyError(f'no block "{key}"; there are: {", ".join(b.key for b in self.blocks)}')

    @property
    def limit_states(self):
        return [b for b in self.blocks if b.is_limit_state]

    @property
    def governing(self):
        """Return the limit state with the highest ratio; with no load, the least available strength."""
        real = [b for b in self.limit_states if not b.reason and not b.advisory]
        return max(real, key=lambda b: (b.ratio, -b.available))

    @property
    def failing(self):
        """Return in words everything that fails, an empty list if the calc passes."""
        units_text = self.run.units
        over = [f"{b.title}: required {units.text(b.required, units.FORCE, units_text)} exceeds available "
                f"{units.text(b.available, units.FORCE, units_text)}, ratio {units.ratio_text(b.ratio)}"
                for b in self.limit_states if not b.passes and not b.advisory]
        return over + [f"{r.title}: {r.cite} requires {r.required}; provided {r.provided}"
                       for r in self.rules if r.status == FAILS]

    @property
    def passes(self):
        return not self.failing

    @property
    def cautions(self):
        from_rules = [Message(CAUTION, f"{r.title}: {r.remark}", r.cite) for r in self.rules if r.status == CAUTION]
        return [m for m in self.messages if m.severity == CAUTION] + from_rules

    @property
    def notes(self):
        return [m for m in self.messages if m.severity == NOTE]


def evaluate(case):
    """Return the Calc of a case; raise CaseErrors or CalcError, whose text says what to do, if no number exists."""
    x, defaults = read_inputs(case.kind, case.texts)
    run = Run(x)
    for each in case.kind.all_fields():
        typed = case.texts.get(each.name, "")
        if each.dimension and typed.strip() and units.is_other_set(typed, each.dimension, x.units):
            run.caution(f"{each.label} is entered as {typed.strip()} in a calc in {x.units} units; it is converted to "
                        f"{units.text(getattr(x, each.name), each.dimension, x.units)}.")
    for each, text in defaults:
        if each.group not in ("Project", "Design basis"):
            run.assume(f"{each.label}: {text}, by default.")
    case.kind.evaluate(x, run)
    return Calc(case, x, run.blocks, run.rules, run.messages, run.assumptions, run)


@dataclass(frozen=True)
class Curve:
    """One limit state over a sweep: available strength [kip or N], NaN where no number exists."""

    key: str
    title: str
    available: np.ndarray
    required: float               # what it is compared with [kip or N]
    advisory: bool


def sweep(case, **arrays):
    """Return a Curve for each limit state, with arrays [base unit] in the place of some inputs, all at once.

    Raises
    ------
    CaseErrors, EntryError : the case itself cannot be used, or the kind has no such input.
    """
    x, _ = read_inputs(case.kind, case.texts)
    arrays = {name: np.asarray(values, float) for name, values in arrays.items()}
    shape = np.broadcast_shapes(*(values.shape for values in arrays.values()))
    if case.kind.pointwise:
        return _sweep_points(case.kind, x, {n: np.broadcast_to(v, shape).ravel() for n, v in arrays.items()}, shape)
    run = Run(SimpleNamespace(**{**vars(x), **arrays}), arrays=True)
    for name, values in arrays.items():
        run.outside = run.outside | ~case.kind.field(name).allows(values)
    case.kind.evaluate(run.x, run)
    outside = np.broadcast_to(run.outside, shape)
    return [Curve(block.key, block.title, np.where(outside, np.nan, np.broadcast_to(block.available, shape)),
                  block.required, block.advisory) for block in run.blocks if block.available is not None]


def _sweep_points(kind, x, arrays, shape):
    """Evaluate one point after the other, for a kind whose geometry is searched; refused points are NaN."""
    base = Run(x, silent=True)
    kind.evaluate(x, base)
    shown = [block for block in base.blocks if block.available is not None]
    available = {block.key: np.full(int(np.prod(shape)), np.nan) for block in shown}
    fields = {name: kind.field(name) for name in arrays}
    for i, point in enumerate(zip(*arrays.values(), strict=True)):
        values = dict(zip(arrays, map(float, point), strict=True))
        run = Run(SimpleNamespace(**{**vars(x), **values}), silent=True)
        try:
            if all(fields[name].allows(value) for name, value in values.items()):
                kind.evaluate(run.x, run)
        except CalcError:  # a sweep goes where the clause does not; there is no number there, and none is drawn
            continue
        for block in run.blocks:
            if block.available is not None and block.key in available:
                available[block.key][i] = block.available
    return [Curve(block.key, block.title, available[block.key].reshape(shape), block.required, block.advisory)
            for block in shown]
