"""The command line: issue, check, results, fields. Errors go to standard error, one message, exit status 2."""

import argparse
import json
import os
import sys
from pathlib import Path

from calclib import __version__, units
from calclib.errors import CalcError

DIFFERENT, ALTERED, ERROR = 1, 3, 2


def _parser():
    parser = argparse.ArgumentParser(prog="python -m calclib", description="Calcs of steel tension members: issue "
                                     "them, check them, read their results.")
    parser.add_argument("--version", action="version", version=f"calclib {__version__}")
    commands = parser.add_subparsers(dest="command", required=True, metavar="COMMAND")

    issue = commands.add_parser("issue", help="run the workbook of a case and write PDF, HTML, notebook and record",
                                description="Run the workbook of each case in a clean kernel and write one folder per "
                                "revision. Prints the path of each file, one a line. An issued revision is never "
                                "overwritten.")
    issue.add_argument("case", nargs="+", metavar="CASE", help="case file (YAML)")
    issue.add_argument("--to", default="exports", metavar="FOLDER", help="where to write (default: exports)")
    issue.set_defaults(run=_issue)

    check = commands.add_parser("check", help="recompute an issued calc and compare every number",
                                description="Recompute an issued PDF, HTML, notebook or folder from the inputs it "
                                "carries, with the installed library, and compare every number. No code from the file "
                                f"is run. Exit status: 0 identical, {DIFFERENT} differs, {ALTERED} altered, "
                                f"{ERROR} cannot be checked.")
    check.add_argument("file", metavar="FILE", help="issued PDF, HTML, notebook, or the folder of a revision")
    check.set_defaults(run=_check)

    results = commands.add_parser("results", help="print the results of a case as JSON",
                                  description="Print design basis, limit states, rules, cautions and the governing "
                                  "limit state of a case as JSON. Strengths are in kip or kN.")
    results.add_argument("case", metavar="CASE", help="case file (YAML)")
    results.set_defaults(run=_results)

    fields = commands.add_parser("fields", help="list every input of a kind of member",
                                 description="List every input of a kind of member: unit, meaning, default, allowed "
                                 "range.")
    fields.add_argument("kind", metavar="KIND", help="pin_plate or threaded_rod")
    fields.set_defaults(run=_fields)
    return parser


def _issue(arguments):
    from calclib.issuing.issue import Issuer
    with Issuer() as issuer:
        for case in arguments.case:
            for path in issuer.issue(case, arguments.to):
                print(path)
    return 0


def _check(arguments):
    from calclib.checking import check
    report = check(Path(arguments.file))
    print(report.text())
    return {"identical": 0, "differs": DIFFERENT, "altered": ALTERED}[report.status]


def _results(arguments):
    from calclib.calc import evaluate
    from calclib.case import load
    from calclib.record import results
    print(json.dumps(results(evaluate(load(arguments.case))), indent=1, ensure_ascii=False))
    return 0


def _fields(arguments):
    from calclib.errors import nearest
    from calclib.members import KINDS
    if arguments.kind not in KINDS:
        raise CalcError(f'"{arguments.kind}" is not a kind of member; the kinds are: {", ".join(KINDS)}'
                        + (nearest(arguments.kind, KINDS) or "."))
    group = None
    for each in KINDS[arguments.kind].all_fields():
        if each.group != group:
            group = each.group
            print(f"\n{group}")
        print(f"  {each.name}: {each.meaning}")
        print(f"      {_field_facts(each)}")
    return 0


def _field_facts(each):
    facts = []
    if each.dimension:
        facts.append(f"unit: {' or '.join(each.dimension.printed[s][0] for s in units.UNIT_SETS)}")
    facts.append(f"allowed: {each.allowed()}")
    default = each.default
    if isinstance(default, dict):
        default = " or ".join(default.values())
    facts.append(f"default: {default}" if default else "optional" if each.optional else "required")
    return "; ".join(facts)


def main(argv=None):
    """Run the command line and return the exit status."""
    arguments = _parser().parse_args(argv)
    if hasattr(sys.stdout, "reconfigure"):     # a pipe on Windows has an encoding without half of the signs used here
        sys.stdout.reconfigure(encoding="utf-8")
    try:
        return arguments.run(arguments)
    except CalcError as error:
        print(_plain(str(error)), file=sys.stderr)
        return ERROR
    except BrokenPipeError:  # whoever read the output has heard enough
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return ERROR
    except OSError as error:
        print(f"{error.filename}: {error.strerror}.", file=sys.stderr)
        return ERROR


def _plain(text):
    """Return a message with the control characters of a stranger's file shown as missing: none steers a terminal."""
    return "".join(c if c.isprintable() or c == "\n" else "\ufffd" for c in text)


if __name__ == "__main__":
    sys.exit(main())
