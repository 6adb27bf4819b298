"""What can be wrong with a case. Every message names the field, the value, the limit, the clause and what to do."""

from difflib import get_close_matches


class CalcError(Exception):
    """No number exists: the message says why and what to do. Nothing was written."""


class EntryError(CalcError):
    """One field cannot be used as it is typed."""

    def __init__(self, field, problem):
        self.field, self.problem = field, problem
        super().__init__(f"{field}: {problem}" + ("" if problem.endswith((".", "?")) else "."))


class UnknownInput(EntryError):
    """An input that the kind of member does not have."""

    def __init__(self, name, known):
        super().__init__(name, "unknown input")
        self.args = (f'unknown input "{name}"' + (nearest(name, known) or "."),)


class CaseErrors(CalcError):
    """Several fields are wrong; the message lists them all, one a line."""

    def __init__(self, errors):
        self.errors = errors
        super().__init__("\n".join(str(error) for error in errors))


class RangeError(CalcError):
    """A value lies outside the range that an equation covers."""


def with_article(words):
    """Return words with their article.

    >>> with_article("force"), with_article("area")
    ('a force', 'an area')
    """
    return ("an " if words[0].lower() in "aeiou" else "a ") + words


def nearest(name, names):
    """Return '; did you mean "x"?' for the closest of `names`, or an empty string.

    >>> nearest("tread", ["thread", "rod_diameter"])
    '; did you mean "thread"?'
    """
    close = get_close_matches(name, list(names), 1, 0.6)
    return f'; did you mean "{close[0]}"?' if close else ""
