"""Sensitivity of a calc to one input: every limit state over its range, the present value, the required strength."""

import numpy as np

from calclib import units
from calclib.calc import sweep
from calclib.explore.figures import sensitivity_figure, series_figure

MOST = 6     # curves with names beside them that can be told apart in one figure


class Sensitivity:
    """One sensitivity plot of a calc: its words at once, its figure when asked for."""

    def __init__(self, calc, plot):
        self.calc, self.plot, self.x = calc, plot, calc.x
        self.field = calc.case.kind.field(plot.field)

    @property
    def caption(self):
        text = (f"Available strength of each limit state against {self.field.label.lower()}; every other input as it "
                "is. The required strength and the present value are marked.")
        other = [b.title for b in self.calc.limit_states
                 if b.available is not None and b.required != self.calc.run.required]
        several = [b for b in self.calc.limit_states
                   if b.available is not None and not b.advisory and b.required == self.calc.run.required]
        if len(several) > MOST and not self.plot.discrete:
            text += (" Drawn are the limit states that govern somewhere in the range, and those next above at the "
                     "present value; the others govern nowhere in it.")
        return text + (f" Not drawn, since compared with another load: {', '.join(other)}." if other else "")

    @property
    def alt(self):
        return f"Plot of the available strength of each limit state against {self.field.label.lower()}."

    def figure(self):
        """Return the matplotlib Figure."""
        x, plot, field = self.x, self.plot, self.field
        points = {name: np.asarray(values, float) for name, values in plot.points(x).items()}
        present = plot.present(x) if plot.present else getattr(x, plot.field)
        if not plot.discrete:
            points[plot.field] = np.union1d(points[plot.field], [present])  # the dot stands on a computed point
        axis = points[plot.field]
        unit, _, factor = units.FORCE.printed[x.units]
        curves = [curve for curve in sweep(self.calc.case, **points) if curve.required == self.calc.run.required]
        words = {
            "required": self.calc.run.required * factor,
            "required_label": f"required {units.text(self.calc.run.required, units.FORCE, x.units)}",
            "present_label": f"present {units.text(present, field.dimension, x.units)}",
            "ticks": plot.sizes(x) if plot.sizes else None,
            "x_format": {units.US: "inch", units.SI: "mm"}[x.units] if field.dimension is units.LENGTH else None,
            "y_label": f"Available strength ({unit})",
        }
        printed = field.dimension.printed[x.units][0]
        label = f"{field.label} ({printed})" if printed else field.label
        governing = [curve for curve in curves if not curve.advisory]
        if plot.discrete:
            at = list(axis).index(present)
            least = min(governing, key=lambda curve: curve.available[at])
            return series_figure(label, {_name(c): (axis, c.available * factor) for c in curves},
                                 present=(_name(least), present), **words)
        drawn = _lowest(governing, axis, present)
        return sensitivity_figure(label, axis, {_name(c): c.available * factor for c in drawn}, present=present,
                                  beside={_name(c): c.available * factor for c in curves if c.advisory}, **words)


def _lowest(curves, axis, present):
    """Return the curves to draw, in their order: all that are lowest somewhere, then the lowest at the present value
    up to MOST."""
    strengths = np.array([curve.available for curve in curves])
    known = strengths[:, ~np.isnan(strengths).all(axis=0)]
    lowest = set(np.nanargmin(known, axis=0)) if known.size else set()
    at_present = np.argsort(strengths[:, list(axis).index(present)], kind="stable")
    rest = [i for i in at_present if i not in lowest][:max(MOST - len(lowest), 0)]
    return [curve for i, curve in enumerate(curves) if i in lowest or i in rest]


def _name(curve):
    return curve.title + (" (for comparison)" if curve.advisory else "")
