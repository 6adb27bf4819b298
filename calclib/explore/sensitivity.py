"""Sensitivity of a calc to one input: every limit state over its range, with the present value and the required strength."""

from dataclasses import dataclass

import numpy as np

from calclib import units
from calclib.calc import sweep
from calclib.explore.figures import sensitivity_figure, series_figure


@dataclass(frozen=True)
class Made:
    """A sensitivity plot with its words."""

    figure: object
    caption: str
    alt: str


def plot(calc, which):
    """Return the `Made` plot `which` (a `members.fields.Plot`) of a calc."""
    x, kind = calc.x, calc.case.kind
    field = kind.field(which.field)
    points = {name: np.asarray(values, float) for name, values in which.points(x).items()}
    present = (which.present or (lambda each: getattr(each, which.field)))(x)
    if not which.discrete:
        points[which.field] = np.union1d(points[which.field], [present])  # the dot stands on a computed point
    factor = units.FORCE.printed[x.units][2]
    curves = [curve for curve in sweep(calc.case, **points) if curve.required == calc.run.required]
    axis = points[which.field]
    symbol = {"LRFD": "P_u", "ASD": "P_a"}[x.method]
    unit = units.FORCE.printed[x.units][0]
    words = {
        "required": calc.run.required * factor,
        "required_label": f"required {units.text(calc.run.required, units.FORCE, x.units)}",
        "present_label": f"present {units.text(present, field.dimension, x.units)}",
        "ticks": which.sizes(x) if which.sizes else None,
        "x_format": {units.US: "inch", units.SI: "mm"}[x.units] if field.dimension is units.LENGTH else None,
        "y_label": f"Available strength ({unit})",
    }
    label = f"{field.label} ({field.dimension.printed[x.units][0]})"
    if which.discrete:
        governing = min((c for c in curves if not c.advisory), key=lambda c: c.available[list(axis).index(present)])
        figure = series_figure(label, {_name(c): (axis, c.available * factor) for c in curves},
                               present=(_name(governing), present), **words)
    else:
        figure = sensitivity_figure(label, axis, {_name(c): c.available * factor for c in curves if not c.advisory},
                                    beside={_name(c): c.available * factor for c in curves if c.advisory},
                                    present=present, **words)
    left_out = [b.title for b in calc.limit_states if b.available is not None and b.required != calc.run.required]
    caption = (f"Available strength of each limit state against {field.label.lower()}; every other input as it is. "
               f"Required strength {symbol} and the present value are marked.")
    if left_out:
        caption += f" Not drawn, since compared with another load: {', '.join(left_out)}."
    return Made(figure, caption, _alt(calc, field, axis, curves))


def _name(curve):
    return curve.title + (" (for comparison)" if curve.advisory else "")


def _alt(calc, field, axis, curves):
    low, high = (units.text(value, field.dimension, calc.x.units) for value in (axis[0], axis[-1]))
    return (f"Plot of available strength against {field.label.lower()} from {low} to {high}, for "
            + ", ".join(_name(curve).lower() for curve in curves) + ".")
