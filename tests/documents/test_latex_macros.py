"""Macros: what is defined, what a call shows, and where expansion stops."""

from __future__ import annotations

import pytest

from crossfoot.documents import open_document, show
from crossfoot.documents.latex import inputs
from crossfoot.documents.latex_macros import define, expand
from crossfoot.documents.visible import place
from crossfoot.model import Span

DEFINED = r"""
\newcommand{\Fval}[3]{F(#1, #2) = #3}
\renewcommand*\Rsq{R^2}
\newcommand{\opt}[2][df]{#1/#2}
\DeclareMathOperator{\Var}{Var}
\def\swap#1#2{#2 and #1}
\providecommand{\twice}[1]{#1#1}
% \newcommand{\hidden}{F(1, 2) = 3}
\newcommand{\textbf}[1]{no}
"""


def test_definitions_as_they_are_written() -> None:
    assert define(DEFINED) == (
        ("Fval", "[3]{F(#1, #2) = #3}"),
        ("Rsq", "{R^2}"),
        ("Var", "{Var}"),
        ("opt", "[2][df]{#1/#2}"),
        ("swap", "[2]{#2 and #1}"),
        ("twice", "[1]{#1#1}"),
    )
    assert define("No macros, F(1, 2) = 3.") == ()


@pytest.mark.parametrize(
    ("call", "shown"),
    [
        (r"\Fval{1}{26}{6.56}", "F(1, 26) = 6.56"),
        (r"\Fval 1 2 3", "F(1, 2) = 3"),
        (r"$\Rsq = .3$", "R^{2} = .3"),
        (r"\opt{3} \opt[a]{3}", "df/3 a/3"),
        (r"$\Var(x)$", "Var(x)"),
        (r"\swap{a}{b}", "b and a"),
        (r"\twice{\twice{a}}", "aaaa"),
        (r"\Fval{1}{2", "F(1, ) = 2"),
        (r"\Rsqx{1}", "￼1"),
        (r"% \Fval{1}{2}{3}", ""),
    ],
)
def test_calls(call: str, shown: str) -> None:
    assert show("latex", "prose", call, define(DEFINED)).text.replace("\u2009", " ") == shown


def test_arguments_keep_their_places_the_rest_is_the_call() -> None:
    source = r"so \Fval{1}{26}{6.56}."
    visible = expand(source, define(DEFINED))
    assert visible.text == "so F(1, 26) = 6.56."
    at = visible.text.index("6.56")
    assert place(visible, at, at + 4) == Span(16, 20)
    assert place(visible, 3, 4) == Span(3, 9)
    swapped = expand(r"\swap{a}{b}", define(DEFINED))
    assert {place(swapped, at, at + 1) for at in range(7)} == {Span(0, 11)}


def test_macros_that_never_end_are_not_expanded() -> None:
    definitions = define(r"\newcommand{\a}{\b\b}\newcommand{\b}{\a}\newcommand{\c}{\c}")
    assert expand(r"x \a \c", definitions).text == r"x \a \c"


def test_expansion_is_bounded() -> None:
    lines = [r"\newcommand{\ma}{0123456789}"]
    names = "abcdefg"
    for name, inner in zip(names[1:], names, strict=False):
        lines.append(rf"\newcommand{{\m{name}}}{{" + rf"\m{inner}" * 10 + "}")
    visible = expand(r"\mg", define("\n".join(lines)))
    assert len(visible.text) < 10_000


def test_a_document_collects_its_definitions() -> None:
    document = open_document("a.tex", DEFINED.encode() + rb"\Fval{1}{2}{3}")
    assert dict(document.definitions)["Rsq"] == "{R^2}"


def test_inputs() -> None:
    text = "\\input{tables/one}\n% \\input{no}\n\\include{ two }\\subfile{three.tex}"
    assert inputs(text) == ("tables/one", "two", "three.tex")
