"""What an entry is refused with, the whole message: field, value, limit, clause, and what to do."""

import pytest
from samples import ASD, PLATE_SI, ROD_SI, plate, rod

from calclib.calc import evaluate
from calclib.case import Case
from calclib.errors import CalcError
from calclib.units import AREA, FORCE, LENGTH, NUMBER, PITCH, SI, STRESS, US, read

LENGTH_SO = 'write "13/16 in" or "20 mm".'
FORCE_SO = 'write "24 kip" or "110 kN".'


def refusal(call):
    with pytest.raises(CalcError) as caught:
        call()
    return str(caught.value)


def refused(case):
    return refusal(lambda: evaluate(case))


# --- one text ----------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("text, dimension, message", [
    ("", LENGTH, f"f: is empty; {LENGTH_SO}"),
    ("   ", LENGTH, f"f: is empty; {LENGTH_SO}"),
    ("20", LENGTH, f"f: 20 has no unit; {LENGTH_SO}"),
    ("3/4", LENGTH, f"f: 3/4 has no unit; {LENGTH_SO}"),
    ("1-1/8", LENGTH, f"f: 1-1/8 has no unit; {LENGTH_SO}"),
    ("345", STRESS, 'f: 345 has no unit; write "50 ksi" or "345 MPa".'),
    ("24 kip", LENGTH, f'f: "24 kip" is a force, and a length is needed; {LENGTH_SO}'),
    ("50 ksi", FORCE, f'f: "50 ksi" is a stress, and a force is needed; {FORCE_SO}'),
    ("20 mm", STRESS, 'f: "20 mm" is a length, and a stress is needed; write "50 ksi" or "345 MPa".'),
    ("2 in", AREA, 'f: "2 in" is a length, and an area is needed; write "0.334 in2" or "245 mm2".'),
    ("2 in", NUMBER, 'f: "2 in" is a length, and a number is needed; write a plain number such as "0.75".'),
    ("1,5 in", LENGTH, 'f: "1,5 in" has a comma in the number; write a decimal point and no thousands mark.'),
    ("1,000 kip", FORCE, 'f: "1,000 kip" has a comma in the number; write a decimal point and no thousands mark.'),
    ("1.000,5 kip", FORCE, 'f: "1.000,5 kip" has a comma in the number; write a decimal point and no thousands mark.'),
    ("1 000 kip", FORCE, f'f: "000 kip" in "1 000 kip" is not a unit known here; {FORCE_SO}'),
    ("12 k", FORCE, f'f: "k" in "12 k" is not a unit known here; {FORCE_SO}'),
    ("20 MM", LENGTH, f'f: "MM" in "20 MM" is not a unit known here; {LENGTH_SO}'),
    ("1_000 in", LENGTH, f'f: "_000 in" in "1_000 in" is not a unit known here; {LENGTH_SO}'),
    ("0x10 in", LENGTH, f'f: "x10 in" in "0x10 in" is not a unit known here; {LENGTH_SO}'),
    ("1.2.3 in", LENGTH, f'f: ".3 in" in "1.2.3 in" is not a unit known here; {LENGTH_SO}'),
    ("1--1/8 in", LENGTH, f'f: "--1/8 in" in "1--1/8 in" is not a unit known here; {LENGTH_SO}'),
    ("1/2/3 in", LENGTH, f'f: "/3 in" in "1/2/3 in" is not a unit known here; {LENGTH_SO}'),
    ("2 in * 3", LENGTH, f'f: "in * 3" in "2 in * 3" is not a unit known here; {LENGTH_SO}'),
    ("5' in", LENGTH, f'f: "\' in" in "5\' in" is not a unit known here; {LENGTH_SO}'),
    ("5'-3", LENGTH, f'f: "\'-3" in "5\'-3" is not a unit known here; {LENGTH_SO}'),
    ("nan in", LENGTH, f'f: "nan in" is not a number with a unit; {LENGTH_SO}'),
    ("NaN kip", FORCE, f'f: "NaN kip" is not a number with a unit; {FORCE_SO}'),
    ("inf kip", FORCE, f'f: "inf kip" is not a number with a unit; {FORCE_SO}'),
    ("-inf kip", FORCE, f'f: "-inf kip" is not a number with a unit; {FORCE_SO}'),
    ("about 2 in", LENGTH, f'f: "about 2 in" is not a number with a unit; {LENGTH_SO}'),
    ("in", LENGTH, f'f: "in" is not a number with a unit; {LENGTH_SO}'),
    ("__import__('os')", LENGTH, f'f: "__import__(\'os\')" is not a number with a unit; {LENGTH_SO}'),
    ("1e400 kip", FORCE, 'f: "1e400 kip" is not a finite number.'),
    ("1e999999999 kip", FORCE, 'f: "1e999999999 kip" is not a finite number.'),
    ("9" * 5000 + "/1 kip", FORCE, f'f: "{"9" * 40}..." is too long for a number with a unit; {FORCE_SO}'),
    ("1/0 in", LENGTH, 'f: "1/0" divides by zero.'),
    ("1-1/0 in", LENGTH, 'f: "1-1/0" divides by zero.'),
    ("1-9/8 in", LENGTH, 'f: "1-9/8" is a whole number and a fraction above one; write the size once, as in '
     '"1-1/8 in".'),
    ("2.5 mm", PITCH, 'f: "2.5 mm" is not how a thread pitch is stated in US units; write "10 tpi".'),
])
def test_an_entry_is_refused(text, dimension, message):
    assert refusal(lambda: read(text, dimension, US, "f")) == message


def test_a_pitch_in_threads_per_inch_is_no_pitch_in_si():
    assert refusal(lambda: read("10 tpi", PITCH, SI, "f")) == (
        'f: "10 tpi" is not how a thread pitch is stated in SI units; write "2.5 mm".')


# --- one field ---------------------------------------------------------------------------------------------------

@pytest.mark.parametrize("changes, message", [
    ({"plate_thickness": "-1 in"}, "plate_thickness: -1 in must be above 0."),
    ({"plate_thickness": "0 in"}, "plate_thickness: 0 in must be above 0."),
    ({"required_strength": "-5 kip"}, "required_strength: -5 kip must be at least 0."),
    ({"required_strength": "24 in"},
     f'required_strength: "24 in" is a length, and a force is needed; {FORCE_SO}'),
    ({"plate_width": ""}, 'plate_width: is empty; write plate width, such as "13/16 in".'),
    ({"plate_width": "nan"}, f'plate_width: "nan" is not a number with a unit; {LENGTH_SO}'),
    ({"steel": " "}, "steel: is empty; write plate steel."),
    ({"F_y": ""}, 'F_y: is empty; write plate yield stress, such as "50 ksi".'),
    ({"method": "LFRD"}, 'method: "LFRD" is not one of LRFD, ASD; did you mean "LRFD"?'),
    ({"method": "both"}, 'method: "both" is not one of LRFD, ASD.'),
    ({"method": ""}, "method: is empty; choose one of: LRFD, ASD."),
    ({"standard": "AISC 360-10"}, 'standard: "AISC 360-10" is not one of AISC 360-22, AISC 360-16; did you mean '
     '"AISC 360-16"?'),
    ({"date": "20.11.2026"}, 'date: "20.11.2026" is not a date; write year-month-day, such as "2026-11-20".'),
    ({"date": "2026-02-30"}, 'date: "2026-02-30" is not a date; write year-month-day, such as "2026-11-20".'),
    ({"calc_number": "../x"}, 'calc_number: "../x" names a folder; use letters, digits, dot, dash and underscore, such '
     'as "S-101".'),
    ({"tread": "UNC"}, 'unknown input "tread".'),
    ({"plate_widht": "4 in"}, 'unknown input "plate_widht"; did you mean "plate_width"?'),
])
def test_a_field_is_refused(changes, message):
    assert refused(plate(**changes)) == message


def test_an_unknown_field_of_a_rod():
    assert refused(rod(tread_series="UNC")) == 'unknown input "tread_series"; did you mean "thread_series"?'


def test_every_field_that_cannot_be_used_is_named_in_the_order_of_the_form():
    assert refused(plate(end_distance="4", F_y="x ksi", method="", units="US", date="")) == "\n".join([
        "date: is empty; write date.",
        "method: is empty; choose one of: LRFD, ASD.",
        'F_y: "x ksi" is not a number with a unit; write "50 ksi" or "345 MPa".',
        f"end_distance: 4 has no unit; {LENGTH_SO}",
    ])


def test_a_missing_field_is_named():
    case = plate()
    texts = {name: text for name, text in case.texts.items() if name not in ("hole_diameter", "project")}
    assert refused(Case(case.kind, texts)) == "\n".join([
        "project: is empty; write project.", 'hole_diameter: is empty; write hole diameter, such as "13/16 in".'])


# --- the plate as a whole ----------------------------------------------------------------------------------------

@pytest.mark.parametrize("changes, message", [
    ({"hole_diameter": "2-15/32 in"}, "hole_diameter: 2-15/32 in is smaller than the pin of 2-1/2 in; the pin does not "
     "enter. Enlarge the hole or use a smaller pin."),
    ({"pin_diameter": "3 in", "hole_diameter": "3-1/8 in"}, "hole_diameter: 3-1/8 in is 1/8 in larger than the pin; "
     "AISC 360-22 D5.1(b) covers up to 1/16 in. Ream and bush the hole, or use a larger pin."),
    ({"standard": "AISC 360-16", "hole_diameter": "2-9/16 in"}, "hole_diameter: 2-9/16 in is 1/16 in larger than the "
     "pin; AISC 360-16 D5.2(b) covers up to 1/32 in. Ream and bush the hole, or use a larger pin."),
    ({"plate_width": "2 in"}, "hole_diameter: 2-17/32 in is not smaller than the plate of 2 in; no plate is left "
     "beside the hole. Use a wider plate or a smaller pin."),
    ({"side_distance": "6 in"}, "side_distance: hole and side distance of 6 in reach beyond the edge of the plate of "
     "8 in; give a smaller side distance or a wider plate."),
    ({"F_u": "50 ksi"}, "F_u: 50 ksi is not above the yield stress of 50 ksi; give the specified minimum values of one "
     "grade."),
    ({"F_u": "45 ksi"}, "F_u: 45 ksi is not above the yield stress of 50 ksi; give the specified minimum values of one "
     "grade."),
    ({"F_y": "345 ksi"}, "F_y: 345 ksi lies outside 20 ksi to 150 ksi, the range of structural steel; check its unit."),
    ({"F_u": "450 ksi"}, "F_u: 450 ksi lies outside 30 ksi to 200 ksi, the range of structural steel; check its unit."),
    ({"F_y": "50 MPa"}, "F_y: 7.252 ksi lies outside 20 ksi to 150 ksi, the range of structural steel; check its "
     "unit."),
    ({"pin_F_y": "0.05 ksi"}, "pin_F_y: 0.05 ksi lies outside 20 ksi to 150 ksi, the range of structural steel; check "
     "its unit."),
])
def test_a_plate_is_refused(changes, message):
    assert refused(plate(**changes)) == message


@pytest.mark.parametrize("changes, message", [
    ({"F_y": "50 MPa"}, "F_y: 50 MPa lies outside 140 MPa to 1035 MPa, the range of structural steel; check its unit."),
    ({"F_u": "65 MPa"}, "F_u: 65 MPa lies outside 205 MPa to 1380 MPa, the range of structural steel; check its unit."),
    ({"hole_diameter": "66 mm"}, "hole_diameter: 66 mm is 2.5 mm larger than the pin; AISC 360-22 D5.1(b) covers up to "
     "2 mm. Ream and bush the hole, or use a larger pin."),
])
def test_a_plate_in_si_is_refused(changes, message):
    assert refused(plate(**PLATE_SI | changes)) == message


LEVEL = ("load_level: the required strength is at {} level and the design basis is {}; a factored load is never "
         "compared with an allowable strength, nor a service load with a design strength. Give the load of "
         "the same method, or change the method.")


@pytest.mark.parametrize("level, method", [("ASD", "LRFD"), ("LRFD", "ASD")])
def test_a_load_of_the_other_method_is_refused(level, method):
    assert refused(plate(load_level=level, method=method)) == LEVEL.format(level, method)


# --- the rod as a whole ------------------------------------------------------------------------------------------

RATED = {"fitting": "turnbuckle", "fitting_rating": "25 kip", "rating_source": "Maker, size 4",
         "rating_basis": "LRFD design strength"}
NEVER = "a service load is never compared with a design strength"


@pytest.mark.parametrize("changes, message", [
    ({"standard": "AISC 360-16", "strength_rule": "Fu on tensile stress area"}, "strength_rule: AISC 360-16 has no "
     "rule on the tensile stress area; it came with AISC 360-22 Table J3.2. Choose \"0.75 Fu on body area\" or the "
     "2022 edition."),
    (RATED | ASD, f"rating_basis: the rating is an LRFD design strength and the calc is in ASD; {NEVER}. Give the "
     "maker's allowable rating."),
    (RATED | {"rating_basis": "safe working load"}, "service_load: the rating is a safe working load and the calc is "
     "in LRFD; a factored load is never compared with a working rating. Give the service load."),
    (RATED | {"rating_basis": "ASD allowable strength"}, "service_load: the rating is an ASD allowable strength and "
     "the calc is in LRFD; a factored load is never compared with a working rating. Give the service load."),
    (RATED | {"rating_basis": ""}, "rating_basis: is empty and the rod has a turnbuckle; give the basis that the maker "
     "states for the rating, one of: LRFD design strength, ASD allowable strength, safe working load."),
    (RATED | {"fitting_rating": ""}, "fitting_rating: is empty and the rod has a turnbuckle; give the maker's rating."),
    (RATED | {"rating_source": ""}, "rating_source: is empty and the rod has a turnbuckle; give maker, catalogue, size "
     "and page."),
    ({"rod_diameter": "1.05 in"}, "rod_diameter: 1.05 in is not a size of the UNC series; the nearest are 7/8-9 UNC, "
     "1-8 UNC, 1-1/8-7 UNC. Choose one of them, another series, or give the pitch."),
    ({"pitch": "1 tpi"}, "pitch: the thread is too coarse for a rod of 1 in; its root would vanish. Check pitch and "
     "diameter."),
    ({"pitch": "40 tpi"}, "threads per inch n is 40 1/in; the equation of tensile stress area unified covers at least "
     "3 and at most 32 1/in."),
    ({"rod_diameter": "5 in", "pitch": "4 tpi"}, "nominal diameter d is 5 in; the equation of tensile stress area "
     "unified covers at least 0.25 and at most 4 in."),
    ({"thread_series": "ISO coarse"}, "thread_series: ISO coarse is a metric thread and the calc is in US units; "
     "choose a series of the same units."),
    ({"service_load": "15 kip"}, "shank_length: a service load is given and both lengths are zero; give the shank "
     "length and the threaded length under load."),
    ({"F_u": "36 ksi"}, "F_u: 36 ksi is not above the yield stress of 36 ksi; give the specified minimum values of one "
     "grade."),
    ({"threaded_length": "-1 in"}, "threaded_length: -1 in must be at least 0."),
])
def test_a_rod_is_refused(changes, message):
    assert refused(rod(**changes)) == message


def test_a_metric_rod_is_refused():
    assert refused(rod(**ROD_SI | {"thread_series": "UNC"})) == (
        "thread_series: UNC is an inch thread and the calc is in SI units; choose a series of the same units.")
    assert refused(rod(**ROD_SI | {"rod_diameter": "30 mm", "thread_series": "ISO fine", "F_y": "36 MPa"})) == (
        "F_y: 36 MPa lies outside 140 MPa to 1035 MPa, the range of structural steel; check its unit.")
    assert refused(rod(**ROD_SI | {"rod_diameter": "10 mm", "thread_series": "ISO fine"})) == (
        "pitch: the ISO fine series has more than one pitch for this size: M10x1.25, M10x1; give the pitch.")
