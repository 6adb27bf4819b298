"""Equations written as text, for tests of what may be written."""

import linecache
from itertools import count
from math import pi

from calclib.equations import form

CITE = form.Cite("Test", {"": "equation"})
_numbers = count(1)
_ARGUMENTS = ("    a : first [1]", "    b : second [1]", "    c : third [1]")
_RESULTS = ("    y : result [1]",)


def written(body, arguments=_ARGUMENTS, results=_RESULTS, head=None, returns="y", symbols=None, docstring=None):
    """Return the Equation of these lines, as a module would define it; the decorator refuses what it refuses.

    Give the `register` fixture to the test, so that the equation does not stay in the register.
    """
    names = ", ".join(line.split()[0] for line in arguments)
    if docstring is None:
        docstring = "\n".join(["Return the result of a test.", "", "    Parameters", "    ----------", *arguments, "",
                               "    Returns", "    -------", *results, "", "    Source: test.", "    "])
    lines = [head or f"def written({names}):", f'    """{docstring}"""', *("    " + line for line in body.splitlines())]
    lines += [f"    return {returns}"] if returns else []
    source = "\n".join(lines) + "\n"
    file = f"<written {next(_numbers)}>"
    linecache.cache[file] = (len(source), None, source.splitlines(True), file)
    space = {name: getattr(form, name) for name in form.FUNCTIONS} | {"pi": pi, "__name__": "written"}
    exec(compile(source, file, "exec"), space)
    return form.equation(CITE, symbols)(space["written"])
