"""Threaded rod: AISC 360 J3 (tensile strength of threaded parts), D2 (body), elongation, and a maker's end fitting."""

import numpy as np

from calclib import units
from calclib.drawing import Arrow, Break, Dimension, Drawing, Leader, Named, Outline
from calclib.equations import mechanics, threads
from calclib.equations.aisc360 import RUPTURE, YIELDING, members, rods
from calclib.errors import EntryError, with_article
from calclib.members.fields import Field, Kind, Plot
from calclib.members.steel import refuse_stresses
from calclib.tables import threads as threads_of
from calclib.tolerance import at_least

BODY_RULE, STRESS_AREA_RULE = "0.75 Fu on body area", "Fu on tensile stress area"
INCH_SERIES = ("UNC", "UNF", "8UN")
SERIES = (*INCH_SERIES, "ISO coarse", "ISO fine")
LEAST_DIAMETER = {"US": 0.625, "SI": 16.0}     # common practice for rods that carry main loads
MODULUS = {"US": "29000 ksi", "SI": "200000 MPa"}
NO_FITTING = "none"
# What a maker's rating may be compared with: the basis it is stated on -> the level of the load.
RATING_BASES = ("LRFD design strength", "ASD allowable strength", "safe working load")

FIELDS = (
    Field("steel", "Rod steel", "Rod", "Standard and grade of the rod, such as ASTM A36 or ASTM F1554 Grade 55."),
    Field("F_y", "Yield stress", "Rod", "Specified minimum yield stress.", "F_y", units.STRESS, above=0),
    Field("F_u", "Tensile strength", "Rod", "Specified minimum tensile strength.", "F_u", units.STRESS, above=0),
    Field("rod_diameter", "Rod diameter", "Rod", "Nominal diameter of body and thread.", "d", units.LENGTH, above=0),
    Field("thread_series", "Thread series", "Rod", "Standard series that gives the pitch.", choices=SERIES),
    Field("pitch", "Thread pitch", "Rod",
          "Only where the series has two pitches for the size, or the thread is special: threads per inch such as "
          "\"8 tpi\" in US units, pitch such as \"2.5 mm\" in SI.", "P", units.PITCH, optional=True, above=0),
    Field("strength_rule", "Strength rule", "Rod",
          "Rule that governs the thread; the 2016 edition has the first only.",
          choices=(BODY_RULE, STRESS_AREA_RULE), default=BODY_RULE),
    Field("shank_length", "Shank length", "Elongation", "Length of the unthreaded body.", "L_b", units.LENGTH,
          default={"US": "0 in", "SI": "0 mm"}, least=0),
    Field("threaded_length", "Threaded length", "Elongation", "Threaded length under load, both ends together.", "L_t",
          units.LENGTH, default={"US": "0 in", "SI": "0 mm"}, least=0),
    Field("service_load", "Service load", "Elongation",
          "Axial tension under service load; blank for no elongation.", "P_s", units.FORCE, optional=True, least=0),
    Field("modulus", "Modulus of elasticity", "Elongation", "Modulus of elasticity of the steel.", "E", units.STRESS,
          default=MODULUS, above=0),
    Field("fitting", "End fitting", "End fitting", "Manufactured item at the end of the rod.",
          choices=(NO_FITTING, "turnbuckle", "clevis", "sleeve nut", "coupling nut"), default=NO_FITTING),
    Field("fitting_rating", "Rating", "End fitting", "Maker's rating of the fitting.", "R", units.FORCE, optional=True,
          above=0),
    Field("rating_basis", "Rating basis", "End fitting",
          "What the maker's rating states; a rating without a stated basis is not used.", choices=RATING_BASES,
          optional=True),
    Field("rating_source", "Rating source", "End fitting", "Maker, catalogue, size and page of the rating.",
          optional=True),
)


def evaluate(x, run):
    """Order the equations of a threaded rod; `x` holds one value for each field."""
    refuse_stresses(x, run)
    if run.edition == "16" and x.strength_rule == STRESS_AREA_RULE:
        raise EntryError("strength_rule", "AISC 360-16 has no rule on the tensile stress area; it came with "
                                          f'AISC 360-22 Table J3.2. Choose "{BODY_RULE}" or the 2022 edition')
    d = x.rod_diameter

    part = run.block("areas", "Areas of body and thread")
    A_b = part(rods.body_area, d=d)
    A_t = _stress_area(x, run, part)

    part = run.block("body yielding", "Tensile yielding of the body")
    P_n = part(members.tensile_yielding, F_y=x.F_y, A_g=A_b, symbols={"A_g": "A_{b}"})
    part.limit_state(YIELDING, P_n, "P_{n}", "D2(a)")

    part = run.block("thread, body area", "Thread strength by body area, 0.75 Fu Ab")
    R_n = part(rods.tensile_strength_on_body_area, F_u=x.F_u, A_b=A_b)
    part.limit_state(RUPTURE, R_n, "R_{n}", {"22": "J3.7, Table J3.2", "16": "J3.6, Table J3.2"},
                     advisory=x.strength_rule != BODY_RULE)

    part = run.block("thread, stress area", "Thread strength by stress area, Fu At")
    if run.edition == "22":
        R_n = part(rods.tensile_strength_on_stress_area, F_u=x.F_u, A_t=A_t)
        part.limit_state(RUPTURE, R_n, "R_{n}", "J3.7, Table J3.2 note b", advisory=x.strength_rule != STRESS_AREA_RULE)
    else:
        part.not_applicable("AISC 360-16 has no rule on the tensile stress area; it came with the 2022 edition.")
    _elongation(x, run, A_b, A_t)
    _fitting(x, run)
    _messages(x, run, A_b, A_t)


def _stress_area(x, run, part):
    """Return the tensile stress area by the pitch of the series, or by the pitch that is given."""
    inch = x.thread_series in INCH_SERIES
    if inch != (run.units == units.US):
        kind = "an inch" if inch else "a metric"
        raise EntryError("thread_series", f"{x.thread_series} is {kind} thread and the calc is in {run.units} units; "
                                          "choose a series of the same units")
    pitch = _pitch(x, run, part)
    symbol, dimension, cite = ("n", units.PER_LENGTH, "ASME B1.1") if inch else ("P", units.LENGTH, "ISO 261")
    coarsest = 1.3 / pitch if inch else 1.3 * pitch
    run.require(x.rod_diameter > coarsest, "pitch", "the thread is too coarse for a rod of {d}; its root would vanish. "
                "Check pitch and diameter", d=x.rod_diameter)
    if not run.arrays:
        part.given(symbol, dimension, pitch, cite, f"{x.thread_series} thread" + (
            ", pitch as given." if x.pitch is not None else ", from the table of the series."))
    if inch:
        return part(threads.tensile_stress_area_unified, d=x.rod_diameter, n=pitch)
    return part(threads.tensile_stress_area_metric, d=x.rod_diameter, P=pitch)


def _pitch(x, run, part):
    sizes = threads_of(x.thread_series)
    if run.arrays:
        if x.pitch is not None:
            return x.pitch
        found = [_of_size(sizes, d) for d in np.ravel(x.rod_diameter)]  # between the sizes of a series is no thread
        pitches = np.array([_standard_pitch(same[0]) if len(same) == 1 else np.nan for same in found])
        return pitches.reshape(np.shape(x.rod_diameter))
    same = _of_size(sizes, x.rod_diameter)
    names = ", ".join(thread.name for thread in same)
    if x.pitch is not None:
        run.caution(f"The pitch is not that of the {x.thread_series} series for this size"
                    + (f", which is {names}." if same else "; the series does not have the size."),
                    when=not any(abs(_standard_pitch(thread) - x.pitch) < 1e-6 * x.pitch for thread in same))
        return x.pitch
    if not same:
        near = sorted(sizes, key=lambda thread: abs(thread.d - x.rod_diameter))[:3]
        raise EntryError("rod_diameter", f"{units.text(x.rod_diameter, units.LENGTH, run.units)} is not a size of the "
                                         f"{x.thread_series} series; the nearest are "
                                         + ", ".join(thread.name for thread in sorted(near, key=lambda th: th.d))
                                         + ". Choose one of them, another series, or give the pitch")
    if len(same) > 1:
        raise EntryError("pitch", f"the {x.thread_series} series has more than one pitch for this size: {names}; "
                                  "give the pitch")
    return _standard_pitch(same[0])


def _of_size(sizes, d):
    """Return the threads of one nominal diameter."""
    return [thread for thread in sizes if abs(thread.d - d) < 1e-6 * thread.d]


def _standard_pitch(thread):
    """Return threads per inch of an inch thread, pitch [mm] of a metric one."""
    return thread.n if thread.P is None else thread.P


def _elongation(x, run, A_b, A_t):
    part = run.block("elongation", "Elastic elongation under service load")
    if x.service_load is None:
        part.left_out("Elongation is not computed: no service load is given.")
        return
    if not run.arrays and x.shank_length + x.threaded_length == 0:
        raise EntryError("shank_length", "a service load is given and both lengths are zero; give the shank length and "
                                         "the threaded length under load")
    part(mechanics.elongation_of_threaded_rod, P=x.service_load, E=x.modulus, L_b=x.shank_length, A_b=A_b,
         L_t=x.threaded_length, A_t=A_t, symbols={"P": "P_{s}"})
    run.note("The elongation is elastic only; seating of nuts and take-up come on top.")


def _fitting(x, run):
    """A manufactured end: its rating is compared with the load of the same level, and never multiplied by a factor."""
    part = run.block("end fitting", "Manufactured end fitting")
    if x.fitting == NO_FITTING:
        part.not_applicable("The rod has no manufactured end fitting.")
        return
    part.title = f"Maker's rating of the {x.fitting}"
    for name, words in (("fitting_rating", "the maker's rating"), ("rating_source", "maker, catalogue, size and page"),
                        ("rating_basis", "the basis that the maker states for the rating, one of: "
                                         + ", ".join(RATING_BASES))):
        if getattr(x, name) is None:
            raise EntryError(name, f"is empty and the rod has a {x.fitting}; give {words}")
    factored = x.rating_basis == "LRFD design strength"
    required, symbol = run.required, run.required_symbol
    if factored and run.method == "ASD":
        raise EntryError("rating_basis", "the rating is an LRFD design strength and the calc is in ASD; a service load "
                                         "is never compared with a design strength. Give the maker's allowable rating")
    if not factored and run.method == "LRFD":
        if x.service_load is None:
            raise EntryError("service_load", f"the rating is {with_article(x.rating_basis)} and the calc is in LRFD; a "
                                             "factored load is never compared with a working rating. Give the service "
                                             "load")
        required, symbol = x.service_load, "P_{s}"
    place = f"{x.rating_source}"
    part.given("R", units.FORCE, x.fitting_rating, place, f"Maker's rating, stated as {x.rating_basis}.")
    part.rated(x.fitting_rating, "R", required, symbol, "maker's rating", place)
    run.caution(f"The {x.fitting} stands on the maker's rating ({x.rating_basis}); the maker's data sheet goes with "
                "the submittal. Pin and grip of the fitting on the connected plate are to be checked.")


def _messages(x, run, A_b, A_t):
    d = x.rod_diameter
    run.caution("A rod of {d} is below {least}, the least diameter for rods that carry main loads by common practice.",
                when=not run.arrays and not at_least(d, run.pair(LEAST_DIAMETER)), d=d, least=run.pair(LEAST_DIAMETER))
    if not run.arrays:
        share = A_t / A_b
        run.caution(f"The tensile stress area is {units.trimmed(share, 3)} of the body area, below the 0.75 that the "
                    "rule on the body area counts on, so that this rule is not on the safe side here."
                    + (" The rule on the stress area is." if run.edition == "22" else ""), "Table J3.2",
                    when=share < 0.75 and x.strength_rule == BODY_RULE)
    run.caution("F_u / F_y is below 1.1; the ductility that the clause counts on is small.",
                when=not run.arrays and x.F_u < 1.1 * x.F_y)
    run.note("Tensile yielding of the body is reported beside J3, to which the standard sends threaded rods; "
             "good practice (from memory).")
    run.note("Slenderness of rods in tension is not limited.", "D1")
    run.assume("Threads are cut or rolled to Class 2A or the metric 6g, and every nut is fully engaged.")
    run.assume("The rod carries axial tension only; no bending at the ends.")
    run.assume("Yield stress and tensile strength are specified minimum values, not those of a mill certificate.",
               "A3")
    run.assume("Fatigue is not evaluated; Appendix 3 applies above 20 000 cycles of stress and uses the net tensile "
               "area.", "Appendix 3")


def sketch(x, calc):
    """Return the rod along its length to scale, threads as thin lines at the root, with what holds its ends."""
    def named(symbol, value):
        return Named(symbol, units.text(value, units.LENGTH, x.units))

    d = x.rod_diameter
    given = x.shank_length + x.threaded_length > 0
    thread, shank = (x.threaded_length / 2, x.shank_length) if given else (2 * d, 10 * d)
    length, nut, root = shank + 2 * thread, 0.875 * d, 0.42 * d
    parts = [Outline([(0, -d / 2), (length, -d / 2), (length, d / 2), (0, d / 2)]),
             Outline([(-1.2 * nut, 0), (length + 1.2 * nut, 0)], closed=False, weight="centre")]
    for start, end in ((0.0, thread), (length - thread, length)):
        if thread:
            parts += [Outline([(start, y), (end, y)], closed=False, weight="thin") for y in (-root, root)]
    parts += [Outline([(thread, -d / 2), (thread, d / 2)], closed=False)] if thread else []
    parts += [Outline([(length - thread, -d / 2), (length - thread, d / 2)], closed=False)] if thread else []
    parts.append(Outline([(-nut, -0.75 * d), (0, -0.75 * d), (0, 0.75 * d), (-nut, 0.75 * d)]))
    reach = nut if x.fitting == NO_FITTING else 2.2 * d
    parts.append(Outline([(length, -0.75 * d), (length + reach, -0.75 * d), (length + reach, 0.75 * d),
                          (length, 0.75 * d)]))
    if x.fitting != NO_FITTING:
        parts.append(Leader((length + reach / 2, 0.75 * d), (-1.5, 1.6), f"{x.fitting}, by its maker"))
    force = Named(calc.run.required_symbol.replace("{", "").replace("}", ""),
                  units.text(calc.run.required, units.FORCE, x.units))
    parts += [Arrow((-nut, 0), (-2.5, 0), force), Arrow((length + reach, 0), (2.5, 0), force)]
    if given and shank:
        parts.append(Dimension((thread, -d / 2), (length - thread, -d / 2), -2, named("L_b", shank), "horizontal"))
    if given and thread:
        half = "thread " + units.text(thread, units.LENGTH, x.units)
        parts += [Dimension((start, -d / 2), (end, -d / 2), -2, half, "horizontal")
                  for start, end in ((0.0, thread), (length - thread, length))]
    parts.append(Leader((thread / 2, d / 2), (1.5, 1.6), named("d", d)))
    if length > 14 * d:
        parts.append(Break(thread + 2 * d, length - thread - 2 * d, -d, d) if shank > 6 * d else
                     Break(d, thread - d, -d, d))
    note = "" if given else "Lengths are not given; drawn 14 diameters long."
    return Drawing(parts, title="Elevation", unit="in" if x.units == "US" else "mm", note=note)


def _series_sizes(x):
    """Return every size of the series between half and twice the present diameter, with its pitch."""
    near = [thread for thread in threads_of(x.thread_series)
            if 0.5 <= thread.d / x.rod_diameter <= 2 and (x.thread_series != "ISO fine" or thread.P <= 4)]
    return {"rod_diameter": np.array([thread.d for thread in near]),
            "pitch": np.array([_standard_pitch(thread) for thread in near])}


def _pitches(x):
    """Return pitches from half to twice the present one."""
    pitch = _present_pitch(x)
    return {"pitch": np.linspace(0.5 * pitch, 2 * pitch, 200)}


def _present_pitch(x):
    if x.pitch is not None:
        return x.pitch
    return _standard_pitch(_of_size(threads_of(x.thread_series), x.rod_diameter)[0])


def _standard_pitches(x):
    """Return the standard pitches of this diameter in every series of the unit set, to mark along the axis."""
    return [(_standard_pitch(thread), f"{_standard_pitch(thread):g} {series}") for series in SERIES
            if (series in INCH_SERIES) == (x.units == units.US)
            for thread in _of_size(threads_of(series), x.rod_diameter)]


PLOTS = (
    Plot("rod_diameter", _series_sizes, discrete=True,
         sizes=lambda x: [(d, units.text(d, units.LENGTH, x.units).split()[0])
                          for d in _series_sizes(x)["rod_diameter"]]),
    Plot("pitch", _pitches, present=_present_pitch, sizes=_standard_pitches),
)

KIND = Kind(
    name="threaded_rod",
    title="Threaded rod",
    scope="Tensile strength of a threaded rod by AISC 360 section J3, yielding of its body, elongation under service "
          "load, and the maker's rating of its end fitting. Not covered: fatigue, upset ends, pretension.",
    fields=FIELDS, evaluate=evaluate, sketch=sketch, plots=PLOTS)
