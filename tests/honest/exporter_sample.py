"""A document of an invented calc, with every kind of node and with texts that try to be more than text."""

HOSTILE = ('#eval("1")', "$x$", "<script>alert(1)</script>", "*a*", "=cmd|' /C calc'!A0", "\\input{x}", "`code`", "a|b")
HEAD = {
    "project": "Footbridge over the Mill Race, east approach", "client": "Town of Ashby, Public Works",
    "firm": "Harrow & Lyle Engineers", "calc_number": "HL-114", "subject": "Hanger plate at pin P3, gridline D/7",
    "revision": "2", "date": "2026-03-18", "prepared_by": "R. Osei", "checked_by": "",
}


def equation(lhs, symbolic, substituted, result, cite="", note=""):
    return {"type": "equation", "lhs": lhs, "symbolic": symbolic, "substituted": substituted, "result": result,
            "cite": cite, "note": note}


def table(titles, rows, marks=None, caption="", aligns=None):
    aligns = aligns or ["left"] * len(titles)
    return {"type": "table", "columns": [{"title": t, "align": a} for t, a in zip(titles, aligns, strict=True)],
            "rows": rows, "marks": marks or {}, "caption": caption}


def figure(shift=0, width=0.9):
    lines = "".join(f'<path d="M{20 + 18 * i} 130 L{20 + 18 * i} {120 - (i * (9 + shift)) % 90}" stroke="#333"/>'
                    for i in range(20))
    svg = ('<svg xmlns="http://www.w3.org/2000/svg" width="400" height="160" viewBox="0 0 400 160">'
           '<rect x="10" y="10" width="380" height="130" fill="none" stroke="black"/>'
           f'<circle cx="{200 + shift}" cy="75" r="28" fill="none" stroke="black" stroke-width="2"/>{lines}</svg>')
    return {"type": "figure", "svg": svg, "png": "", "alt": f"Plate with a hole, drawing {shift}",
            "caption": "To scale. Dimensions in inches.", "width": width}


def _strengths(fails):
    rows = [
        ("Tensile yielding on the gross section", "AISC 360-22 D2(a)", "400.0 kip", "φ = 0.90", "360.0 kip", 0.411111),
        ("Tensile rupture on the effective net area", "AISC 360-22 D5.1(a)", "318.5 kip", "φ = 0.75", "238.9 kip",
         0.619506),
        ("Shear rupture behind the pin", "AISC 360-22 D5.1(b)", "107.3 kip", "φ = 0.75", "80.4 kip", 0.71),
        ("Bearing on the projected area of the pin", "AISC 360-22 J7", "45.00 kip", "φ = 0.75", "33.75 kip",
         1.3004 if fails else 0.7116),
    ]
    made = [{"name": name, "clause": clause, "nominal": nominal, "factor": factor, "available": available,
             "required": "148.0 kip", "ratio": f"{share:.3f}", "share": share, "governs": i == 3,
             "passes": share <= 1, "reason": ""} for i, (name, clause, nominal, factor, available, share)
            in enumerate(rows)]
    made.append({"name": "Block shear", "clause": "AISC 360-22 J4.3", "nominal": "", "factor": "", "available": "",
                 "required": "", "ratio": "", "share": 0.0, "governs": False, "passes": True,
                 "reason": "The plate has no bolts; a single pin has no block to tear out."})
    return {"type": "strengths", "columns": {"available": "Design strength", "required": "Required"}, "rows": made}


LONG = equation(
    r"P_{n}", r"\min \left( F_{y} \cdot A_{g} , F_{u} \cdot A_{e} \right) + " + r" + ".join(
        rf"\frac{{F_{{u{i}}} \cdot t_{{{i}}}}}{{\Omega_{{{i}}}}} \cdot \sqrt{{d_{{{i}}}}}" for i in range(1, 9)),
    r" + ".join(rf"\frac{{{60 + i}\ \mathrm{{ksi}} \cdot {i}\tfrac{{1}}{{8}}\ \mathrm{{in}}}}{{2.00}} \cdot "
                rf"\left( {i}.500\ \mathrm{{in}} \right)^{{2}}" for i in range(1, 9)),
    r"1107\ \mathrm{kip}", "AISC 360-22 D5.1(a), Eq. D5-1, and a clause so long that it must wrap in its column twice",
    "One very long equation. The effective width b_e is the smaller of 2t + 0.63 in and the actual distance.")


def _block(number):
    return {"key": f"strength:block{number}", "title": ("Tensile yielding on the gross section",
            "Tensile rupture on the effective net area", "Shear rupture behind the pin", "Bearing")[number % 4]
            + ("" if number < 4 else f", plane {number}"), "nodes": [
        equation(r"P_{u}", "", "", r"148.0\ \mathrm{kip}", "Case", "Required strength, from the loads above"),
        equation("C_{r}", "", "", "1.0", "AISC 360-22 D5.1(b)", "Shear lag factor at the pin"),
        equation("A_{sf}", r"2 \cdot t \cdot \left( a + \frac{d}{2} \right)",
                 r"2 \cdot 1\tfrac{1}{8}\ \mathrm{in} \cdot \left( 2\tfrac{3}{4}\ \mathrm{in} + "
                 r"\frac{2\tfrac{1}{2}\ \mathrm{in}}{2} \right)", r"2.750\ \mathrm{in}^{2}", "AISC 360-22 D5.1(b)"),
        equation("P_{n}", r"0.6 \cdot C_{r} \cdot F_{u} \cdot A_{sf}",
                 r"0.6 \cdot 1 \cdot 65\ \mathrm{ksi} \cdot 2.750\ \mathrm{in}^{2}", r"107.3\ \mathrm{kip}",
                 "AISC 360-22 D5.1(b), Eq. D5-2"),
        equation(r"\phi P_{n}", r"\phi \cdot P_{n}", r"0.75 \cdot 107.3\ \mathrm{kip}",
                 rf"80.{number}4\ \mathrm{{kip}}", "AISC 360-22 D5.1"),
        {"type": "text", "text": "Ratio 0.710: acceptable."}]}


def document(fails=False, page="letter", **head):
    """Return the sample document of about eight pages."""
    hostile = [*HOSTILE, "橋梁 Łódź Ωμέγα 😀", "a" * 150]
    sections = [
        {"key": "summary", "title": "Summary of limit states", "nodes": [_strengths(fails)]},
        {"key": "scope", "title": "Scope", "nodes": [{"type": "text", "text":
            "Static strength of a pin-connected plate in tension: yielding, rupture on the effective net area, shear "
            "rupture behind the pin, and bearing of the pin. Fatigue, fire and erection loads are not covered."}]},
        {"key": "basis", "title": "Design basis and materials", "nodes": [table(
            ["Item", "Value"], [["Standard", "AISC 360-22"], ["Method", "LRFD"], ["Steel", "ASTM A572 Grade 50"],
                                ["Yield stress", {"latex": r"F_{y} = 50\ \mathrm{ksi}"}]])]},
        {"key": "loads", "title": "Loads", "nodes": [table(
            ["Required strength", "Level", "Source"], [["148.0 kip", "LRFD", "Sheet S-002, 1.2D + 1.6S + 0.5W"]])]},
        {"key": "sketch", "title": "Sketch", "nodes": [figure(0)]},
        {"key": "strength:long", "title": "Effective net area", "nodes": [LONG]},
        *(_block(i) for i in range(8)),
        {"key": "detailing", "title": "Detailing rules", "nodes": [table(
            ["Rule", "Clause", "Required", "Provided", "Status"],
            [["Width of the plate beyond the hole", "AISC 360-22 D5.2(a)", "w >= 2be + d = 7.76 in", "8 in", "ok"],
             ["Pin hole at most 1/32 in larger than the pin", "AISC 360-22 D5.2", "2-17/32 in", "2-9/16 in",
              "fails. Ream and bush the hole, or use a larger pin."],
             ["Corner cut", "AISC 360-22 D5.2(c)", "4 in", "4-1/8 in", "ok"]], {"1": "fails", "2": "caution"})]},
        {"key": "sensitivity", "title": "Sensitivity", "nodes": [figure(3), figure(5, 0.6), figure(7)]},
        {"key": "assumptions", "title": "Assumptions and notes", "nodes": [
            {"type": "list", "items": ["The load acts in the plane of the plate.", *hostile]}]},
        {"key": "cautions", "title": "Cautions", "nodes": [
            {"type": "message", "severity": "fails", "text": "The pin hole is too large.", "cite": "AISC 360-22 D5.2"},
            {"type": "message", "severity": "caution", "text": "The project's documents govern.", "cite": ""},
            {"type": "message", "severity": "note", "text": hostile[2], "cite": ""}]},
        {"key": "inputs", "title": "Inputs", "nodes": [
            {"type": "heading", "text": "As typed"},
            table(["Input", "Meaning", "As typed", "As read"],
                  [[f"plate_dimension_{i}", f"Dimension {i} of the plate, measured from its upper edge", f"{i}-1/8 in",
                    f"{i}-1/8 in"] for i in range(1, 41)] + [[text, text, text, text] for text in hostile],
                  aligns=["left", "left", "left", "right"], caption="Every input as typed and as read.")]},
        {"key": "checker", "title": "For the checker", "nodes": [
            {"type": "code", "text": "python -m calclib check FILE\n  ok"}]},
    ]
    verdict = "Bearing governs: available strength 33.75 kip, required 24.00 kip, ratio 0.712."
    if fails:
        verdict = ("Bearing governs: available strength 33.75 kip, required 43.90 kip, ratio 1.301. NOT ACCEPTABLE: "
                   "bearing.")
    return {"title": "Pin-connected plate", "head": {**HEAD, **head}, "page": page,
            "basis": "AISC 360-22, LRFD, US customary units (kip, in, ksi)", "digest": "3f9a0c1d22e4",
            "version": "calclib 0.1.0", "verdict": {"passes": not fails, "text": verdict}, "sections": sections}


ATTACHMENTS = {
    "HL-114-rev-2.yaml": (b'kind: "pin_plate"\n', "application/yaml", "Case"),
    "HL-114-rev-2.json": (b'{"format": "calclib record 1"}\n', "application/json", "Record"),
    "HL-114-rev-2.ipynb": (b'{"cells": []}\n', "application/x-ipynb+json", "Notebook"),
}
