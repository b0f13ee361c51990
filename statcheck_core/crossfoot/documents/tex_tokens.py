"""How the tokens of TeX are told apart."""

from __future__ import annotations

from crossfoot.documents.tex_symbols import Arg
from crossfoot.expressions import expression

#: What means something in TeX; the text between is plain.
TOKEN = expression(
    r"[\\{}$&~^_%`-](?:(?<=\\)(?:(?:verb\*?|lstinline(?:\[[^\[\]\n]{0,200}\])?)(?P<quote>[^\w\s*{\[])(?P<code>[^\n]{0,300}?)(?P=quote)"
    r"|(?P<name>[A-Za-z@]+)\*?|(?P<sign>[\s\S])|\Z)"
    r"|(?<=\$)\$?|(?<=[{}&~^_%])|(?<=-)(?P<dash>-{1,2})(?!-)|(?<=`)(?P<run>[^`\n]{1,200}`))"
)
#: Raised stars: marks of significance.
STARS = expression(r"\s*(?:\{\s*((?:\*|\\ast\b|\\star\b|\s)+)\}|(\*+|\\ast\b|\\star\b))")
#: An optional argument.
OPTION = expression(r"\s{0,20}\[[^\[\]\n]{0,200}\]")
#: Optional arguments before a group.
OPTIONS = expression(r"(?:\s{0,9}\[[^\[\]\n]{0,200}\]){1,2}(?=\s{0,9}\{)")
#: How far a line is moved down.
DIMENSION = expression(r"\*?[ \t]{0,20}\[-?[\d.]{1,9}[ \t]{0,9}[A-Za-z\\]{2,20}\]")
#: The name of an environment.
NAME = expression(r"\s{0,20}\{([^{}\n]{0,40})\}")
#: A comment, and the white space that starts the next line.
COMMENT = expression(r"%[^\n]*(?:\n[ \t]*)?")
#: What is defined, and its parameters.
DEF = expression(r"\s{0,20}\\[A-Za-z@]+[^{}]{0,100}")
#: A group that starts like a number.
NUMBER = expression(r"\{\s{0,20}[-+−.\d$]")

_ADDRESS = expression(r"\s{0,20}\{[^{}\n]{0,2000}\}")

#: What follows a command as no TeX: an address, or the sides on which a rule is cut short.
RAW = {
    "url": _ADDRESS,
    "nolinkurl": _ADDRESS,
    "href": _ADDRESS,
    "cmidrule": expression(r"\([lr]{1,4}\)"),
}

#: What raises and lowers.
SCRIPTS = {"^": (Arg("^{", "}"),), "_": (Arg("_{", "}"),)}
HIDE = Arg(hide=True)
#: Commands that define others.
DEFINING = {
    "newcommand": (HIDE, HIDE),
    "renewcommand": (HIDE, HIDE),
    "providecommand": (HIDE, HIDE),
    "DeclareRobustCommand": (HIDE, HIDE),
    "DeclareMathOperator": (HIDE, HIDE),
    "newenvironment": (HIDE, HIDE, HIDE),
    "renewenvironment": (HIDE, HIDE, HIDE),
    "NewDocumentCommand": (HIDE, HIDE, HIDE),
    "newtheorem": (HIDE, HIDE),
    "let": (HIDE, HIDE),
}
