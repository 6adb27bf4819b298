"""LaTeX of a document -> Typst mathematics or MathML, all of it in one call of pandoc.

Every formula is handed over inside pandoc's own document tree, so no LaTeX is ever read as text, and each comes back as
one paragraph. A formula that pandoc cannot read is refused: it would print as its source.
"""

import json
import re

import pypandoc

from calclib.errors import CalcError

_EQUATION_PARTS = ("lhs", "symbolic", "substituted", "result")
_LONG_TERM = 140  # characters of Typst; a longer product may be broken too
_SPOKEN = {"dot.op": "times", "/": "over", ",": ") over (", "lt.eq": "at most", "gt.eq": "at least", "+": "plus",
           "-": "minus", "=": "equals", "_": "sub", "^": "to the power", "sqrt": "root of", "phi.alt": "phi",
           "med": "", "thin": "", "thick": "", "quad": "", "upright": "", "frac": "", "inline": "", "lr": ""}
# One piece of Typst mathematics: a string, an escaped character, a name, a number, or any other sign.
_PIECE = re.compile(r'"(?:[^"\\]|\\.)*"|\\.|[A-Za-z]+(?:\.[a-z]+)*|\d+(?:\.\d+)*|\s+|.', re.S)


def latex_of(node):
    """Return every LaTeX text in a document or a part of one, in order, each once."""
    found = {}
    _gather(node, found)
    return list(found)


def _gather(node, found):
    if isinstance(node, list):
        for each in node:
            _gather(each, found)
    elif isinstance(node, dict):
        names = _EQUATION_PARTS if node.get("type") == "equation" else ("latex",)
        found.update(dict.fromkeys(node[name] for name in names if node.get(name)))
        for each in node.values():
            if isinstance(each, (list, dict)):
                _gather(each, found)


def typst(texts):
    """Return {LaTeX: Typst mathematics}.

    Raises
    ------
    CalcError : pandoc cannot read one of the formulas, or what it wrote could be more than mathematics.
    """
    return {text: _checked_typst(text, made) for text, made in zip(texts, _pandoc(texts, "typst"), strict=True)}


def mathml(texts):
    """Return {LaTeX: a MathML element}. Raises CalcError as `typst` does."""
    return {text: _checked_mathml(text, made) for text, made in zip(texts, _pandoc(texts, "html"), strict=True)}


def _pandoc(texts, to):
    if not texts:
        return []
    for text in texts:
        if not text.strip():
            _refuse(text)
    # One line each, as TeX reads it: a comment ends with its line, and a line end is a space.
    texts = [" ".join(re.sub(r"(?<!\\)%[^\n]*", "", text).split()) for text in texts]
    blocks = [{"t": "Para", "c": [{"t": "Math", "c": [{"t": "InlineMath"}, text]}]} for text in texts]
    tree = json.dumps({"pandoc-api-version": [1, 23], "meta": {}, "blocks": blocks})
    made = pypandoc.convert_text(tree, to, format="json", extra_args=["--mathml", "--wrap=none"])
    made = made.replace("\r\n", "\n").strip("\n")
    lines = re.split(r"\n\n", made) if to == "typst" else made.split("\n")
    if len(lines) != len(texts):
        raise CalcError(f"{len(texts)} formulas were to be converted and {len(lines)} came back.")
    return lines


def _refuse(text):
    raise CalcError(f"The formula {text} cannot be typeset; nothing was issued.")


def _checked_typst(text, made):
    if not re.fullmatch(r"\$[^$].*\$", made, re.S):
        _refuse(text)
    made = made[1:-1].strip()
    # A hash outside a string starts code in Typst. Pandoc writes one itself, for spaces.
    if "#" in _PIECE.sub(lambda m: "" if m[0][0] in '"\\' else m[0], re.sub(r"#h\([\d.]+em\)", "", made)):
        _refuse(text)
    made = re.sub(r"upright\(([A-Za-z](?: [A-Za-z])+)\)", lambda m: f'upright("{m[1].replace(" ", "")}")', made)
    made = re.sub(r"(?<=\d )(\d+) / (\d+)\b", r"inline(\1 / \2)", made)          # mixed: 1 1/8
    return re.sub(r"(?<![\w)] )\b(\d+) / (\d+)(?= med upright)", r"inline(\1 / \2)", made)  # and 5/8 in


def _checked_mathml(text, made):
    match = re.fullmatch(r'<p>(<math .*</math>)</p>', made)
    if not match:
        _refuse(text)
    made = re.sub(r"<annotation.*?</annotation>", "", match[1])
    made = re.sub(r"</?semantics>", "", made)
    return re.sub(r'<mrow>((?:<mi mathvariant="normal">[A-Za-z]</mi>){2,})</mrow>',
                  lambda m: f'<mi mathvariant="normal">{"".join(re.findall(">([A-Za-z])<", m[1]))}</mi>', made)


def spoken(made):
    """Return Typst mathematics in words, for a reader who cannot see it. Brackets stay, so that it reads one way.

    >>> spoken('P_n = 0.6 dot.op frac(A_g, 2) med upright("in")^2')
    'P sub n equals 0.6 times (A sub g) over (2) in to the power 2'
    """
    words = []
    made = re.sub(r'upright\(("[^"]*")\)', r"\1", re.sub(r"#h\([\d.]+em\)", " ", made))
    for piece in _PIECE.findall(made):
        if piece[0] == '"':
            words.append(piece[1:-1])
        elif not piece.isspace():
            words.append(_SPOKEN.get(piece, piece.lstrip("\\")))
    return re.sub(r"(?<=\() | (?=[),])", "", " ".join(word for word in words if word))


def chunks(made):
    """Cut Typst mathematics before the operators outside brackets, where a long line may be broken: sums first.

    >>> chunks("a + frac(b + c, d) dot.op e")
    ['a ', '+ frac(b + c, d) dot.op e']
    """
    terms = _cut(made, ("+", "-", "=", "lt.eq", "gt.eq"))
    return [piece for term in terms for piece in (_cut(term, ("dot.op",)) if len(term) > _LONG_TERM else [term])]


def _cut(made, operators):
    cut, depth = [""], 0
    for piece in _PIECE.findall(made):
        depth += {"(": 1, ")": -1}.get(piece, 0)
        if piece in operators and depth == 0 and cut[-1].strip():
            cut.append("")
        cut[-1] += piece
    return cut
