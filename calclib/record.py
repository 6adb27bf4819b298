"""The machine-readable record of a calc: design basis, every limit state, rules, cautions, and every equation."""

from calclib import __version__, document, units
from calclib.typeset import line_values

FORMAT = "calclib record 1"


def _number(value):
    """Return a float with 12 significant figures, so that the last bit of a machine is not part of the record."""
    return None if value is None else float(f"{value:.12g}")


def _force(calc, value):
    return None if value is None else _number(value * units.FORCE.printed[calc.x.units][2])


def results(calc):
    """Return the results of a calc as plain data: what ``python -m calclib results CASE`` prints."""
    unit = units.FORCE.printed[calc.x.units][0]
    governing = calc.governing
    return {
        "kind": calc.case.kind.name,
        "calc_number": calc.x.calc_number,
        "revision": calc.x.revision,
        "design_basis": {"standard": calc.x.standard, "method": calc.x.method, "units": calc.x.units},
        "limit_states": [{
            "key": block.key, "title": block.title, "clause": block.cite,
            "nominal_strength": _force(calc, block.nominal), "available_strength": _force(calc, block.available),
            "required_strength": _force(calc, block.required), "ratio": _number(block.ratio), "unit": unit,
            "phi": block.factors.phi if block.factors and calc.x.method == "LRFD" else None,
            "omega": block.factors.omega if block.factors and calc.x.method == "ASD" else None,
            "passes": block.passes, "governs": block is governing, "for_comparison": block.advisory,
            "not_applicable": block.reason or None,
        } for block in calc.limit_states],
        "rules": [{"key": rule.key, "title": rule.title, "clause": rule.cite, "required": rule.required,
                   "provided": rule.provided, "status": rule.status, "remark": rule.remark} for rule in calc.rules],
        "cautions": [{"text": m.text, "clause": m.cite} for m in calc.cautions],
        "assumptions": [{"text": m.text, "clause": m.cite} for m in (*calc.assumptions, *calc.notes)],
        "governing": {"key": governing.key, "title": governing.title, "ratio": _number(governing.ratio)},
        "passes": calc.passes,
        "failing": calc.failing,
    }


def equations(calc):
    """Return every equation of the calc with each of its numbers, in base units (kip or N, in or mm)."""
    rows = []
    for block in calc.blocks:
        for step in block.steps:
            name = step.equation.name if step.equation else step.note
            values = line_values(step.equation, step.values) if step.equation else {step.chosen[0]: step.result}
            rows.append({"block": block.key, "equation": name, "clause": step.cite,
                         "values": {key: _number(value) for key, value in values.items()}})
    return rows


def record(calc):
    """Return the whole record: inputs as typed, digest, results, equations."""
    return {"format": FORMAT, "calclib": __version__, "digest": calc.case.digest, "verdict": document.verdict(calc),
            "inputs": {k: v for k, v in calc.case.texts.items() if v.strip()},
            "revisions": [list(row) for row in calc.case.revisions],
            "results": results(calc), "equations": equations(calc)}
