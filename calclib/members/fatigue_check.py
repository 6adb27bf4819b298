"""Fatigue of a member, AISC 360 Appendix 3, for every kind: off, and said to be off, unless cycles are given."""

import numpy as np

from calclib import units
from calclib.equations import fatigue
from calclib.errors import EntryError
from calclib.members.fields import Field
from calclib.tolerance import at_most

# Category F is shear on the throat of a weld, on an area of its own.
CATEGORIES = tuple(name for name, each in fatigue.CATEGORIES.items() if each.C_f is not None)
FATIGUE = (
    Field("cycles", "Stress cycles", "Fatigue",
          "Number of stress cycles in the design life; blank: fatigue is not evaluated.", "n_{SR}", units.NUMBER,
          optional=True, above=0),
    Field("force_range", "Service force range", "Fatigue",
          "Range of axial force at service load; where the force reverses, tension plus compression.", "P_{SR}",
          units.FORCE, optional=True, least=0),
    Field("stress_category", "Stress category", "Fatigue", "Category of the detail by Appendix 3, Table A-3.1.",
          choices=CATEGORIES, optional=True),
)


def fatigue_block(x, run, area, area_name):
    """Add the block "fatigue": the service force range against the allowable stress range on `area` [in2 or mm2].

    `area_name`: which area that is, in words, such as "net area at the connection". The kind has the fields FATIGUE.
    """
    part = run.block("fatigue", "Fatigue of the base metal at service load")
    if x.cycles is None:
        if x.force_range is not None:
            raise EntryError("cycles", "is empty and a service force range is given; give the number of stress cycles, "
                                       "or leave the force range blank")
        part.not_applicable("Fatigue is not evaluated: no number of stress cycles is given.")
        run.assume("Fatigue is not evaluated, since no number of stress cycles is given; Appendix 3 applies above "
                   "20 000 cycles.", "Appendix 3.1")
        return
    few = at_most(x.cycles, fatigue.CYCLES)
    if np.all(few):
        part.not_applicable("Fatigue need not be evaluated: at most 20 000 stress cycles.")
        return
    for name, words in (("force_range", "the range of axial force at service load"),
                        ("stress_category", "the category of the detail, one of: " + ", ".join(CATEGORIES))):
        if getattr(x, name) is None:
            raise EntryError(name, f"is empty and the number of stress cycles is above 20 000; give {words}")
    category = fatigue.CATEGORIES[x.stress_category]
    place = fatigue.RANGE.text(run.edition).replace("Appendix 3.2", "Table A-3.1")
    part.given("C_{f}", units.NUMBER, category.C_f, place, f"Category {x.stress_category}: {category.details}.")
    F_SR = part(fatigue.allowable_stress_range, C_f=category.C_f, n_SR=x.cycles, S_1=run.pair(fatigue.RANGE_CONSTANT),
                F_TH=run.pair(category.F_TH))
    available = part(fatigue.allowable_force_range, F_SR=F_SR, A=area, note=f"A: {area_name}.")
    part.rated(available, "P_{SR,a}", x.force_range, "P_{SR}", "Appendix 3.3",
               fatigue.RANGE.text(run.edition).replace("3.2", "3.3"))
    if run.arrays:            # few cycles have no limit, and no point on the curve
        part.available = np.where(few, np.nan, part.available)
    run.note("Fatigue is judged at service load by the range of force, without resistance or safety factor. Appendix 3 "
             "covers peak service stresses up to 0.66 F_y, and steel up to 300 °F (150 °C) that is protected from "
             "corrosion or only mildly exposed.", "Appendix 3.1")
