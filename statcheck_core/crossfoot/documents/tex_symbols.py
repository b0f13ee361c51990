"""What TeX's commands show: signs and letters, and what becomes of the arguments."""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.documents.visible import OPAQUE
from crossfoot.documents.words import words


class Arg(NamedTuple):
    """What becomes of one argument of a command.

    Attributes
    ----------
    before, after
        Shown around it.
    hide
        It is not shown at all.
    math
        Whether it is set as math; None leaves the mode as it is.
    opaque
        Belongs to a command of unknown meaning, and may have further arguments like itself.
    """

    before: str = ""
    after: str = ""
    hide: bool = False
    math: bool | None = None
    opaque: bool = False


Args = tuple[Arg, ...]

_GREEK = (
    "alpha α beta β gamma γ delta δ epsilon ϵ varepsilon ε zeta ζ eta η theta θ vartheta ϑ "
    "iota ι kappa κ lambda λ mu μ nu ν xi ξ omicron ο pi π varpi ϖ rho ρ varrho ϱ sigma σ "
    "varsigma ς tau τ upsilon υ phi ϕ varphi φ chi χ psi ψ omega ω "
    "Gamma Γ Delta Δ Theta Θ Lambda Λ Xi Ξ Pi Π Sigma Σ Upsilon Υ Phi Φ Psi Ψ Omega Ω "
    "upeta η upbeta β upchi χ upalpha α upmu μ uprho ρ upDelta Δ updelta δ increment Δ "
    "textbeta β texteta η textchi χ textalpha α textrho ρ textmu μ textDelta Δ textomega ω"
)

_SIGNS = (
    "le ≤ leq ≤ leqslant ≤ leqq ≤ ge ≥ geq ≥ geqslant ≥ geqq ≥ lt < gt > ne ≠ neq ≠ approx ≈ "
    "simeq ≈ cong ≅ sim ∼ equiv ≡ ll ≪ gg ≫ propto ∝ times × cdot · pm ± mp ∓ div ÷ ast * star * "
    "infty ∞ to → rightarrow → Rightarrow ⇒ leftarrow ← mapsto ↦ in ∈ notin ∉ subset ⊂ cup ∪ "
    "cap ∩ sum ∑ prod ∏ int ∫ partial ∂ nabla ∇ forall ∀ exists ∃ ldots … dots … cdots … vdots … "
    "mid | vert | lvert | rvert | Vert ‖ lVert ‖ rVert ‖ langle ⟨ rangle ⟩ lbrace { rbrace } "
    "lbrack [ rbrack ] prime ′ circ ° degree ° dagger † dag † ddagger ‡ ddag ‡ bullet • ell ℓ "
    "hbar ℏ angle ∠ perp ⊥ parallel ∥ backslash \\ colon : "
    "textless < textgreater > textbar | textbackslash \\ textasciitilde ~ textasciicircum ^ "
    "textunderscore _ textdollar $ textpercent % textpm ± texttimes × textdegree ° textminus − "
    "textendash – textemdash — textellipsis … textquoteright ’ textquoteleft ‘ textbullet • "
    "textasteriskcentered * textsection § textparagraph ¶ textbraceleft { textbraceright } "
    "textleq ≤ textgeq ≥ textapprox ≈ S § P ¶ pounds £ copyright © ss ß ae æ AE Æ oe œ OE Œ "
    "o ø O Ø aa å AA Å l ł L Ł i ı j ȷ lq ‘ rq ’ percent %"
)

_SPACES = "quad qquad enspace thinspace thickspace medspace space enskip newline par hfill tab"

#: Commands that show a sign, a letter or a space.
SYMBOLS: dict[str, str] = {
    **dict(zip(_GREEK.split()[::2], _GREEK.split()[1::2], strict=True)),
    **dict(zip(_SIGNS.split()[::2], _SIGNS.split()[1::2], strict=True)),
    **dict.fromkeys(_SPACES.split(), " "),
    "par": "\n",
    "newline": "\n",
    "tabularnewline": "\n",
    "item": "• ",
    "negthinspace": "",
    **{name: name for name in words("log ln exp min max sup inf lim Pr det arg sin cos tan var")},
}

#: Letters of the Greek alphabet among them: TeX ends their names with a space of no meaning.
LETTERS = frozenset(_GREEK.split()[::2])

#: Single characters after a backslash.
ESCAPES: dict[str, str] = {
    **{sign: sign for sign in "%$&#_{}|"},
    **dict.fromkeys(",;:> \n\t", " "),
    **dict.fromkeys("!/-@()[]+=<'\"`^~.", ""),
    "*": "×",
    "\\": "\n",
}

_DROPPED = (
    "left right middle big Big bigg Bigg bigl bigr Bigl Bigr biggl biggr Biggl Biggr bigm Bigm "
    "displaystyle textstyle scriptstyle scriptscriptstyle limits nolimits rm it bf sf tt sc sl em "
    "cal mit normalfont rmfamily sffamily ttfamily itshape upshape slshape scshape bfseries "
    "mdseries tiny scriptsize footnotesize small normalsize large Large LARGE huge Huge boldmath "
    "unboldmath centering raggedright raggedleft noindent indent newpage clearpage cleardoublepage "
    "pagebreak nopagebreak linebreak nolinebreak bigskip medskip smallskip vfill hline toprule "
    "midrule bottomrule endhead endfirsthead endfoot endlastfoot maketitle tableofcontents "
    "appendix protect relax xspace null strut phantomsection nonumber notag allowbreak null "
    "frontmatter mainmatter backmatter singlespacing doublespacing onehalfspacing sloppy fussy "
    "leavevmode ignorespaces unskip centerline expandafter begingroup endgroup bgroup egroup "
    "hfil vfil hss dotfill hrulefill landscape dashuline selectfont onecolumn twocolumn "
    " printbibliography listoffigures listoftables makeatletter makeatother "
    " morecmidrules lasthline firsthline arraybackslash"
)

#: Commands that show nothing and take no argument.
DROPPED = words(_DROPPED)

_SHOWN = (
    "mathrm mathit mathbf mathsf mathtt mathnormal mathcal mathbb mathfrak boldsymbol bm pmb "
    "symbf symit symrm operatorname mathop mathrel mathbin mathord mathclose mathopen textit "
    "textbf textrm textsf texttt textsc textsl textup textmd textnormal emph underline uline "
    "uwave hat widehat tilde widetilde vec dot ddot check acute grave breve mathring "
    "mbox makebox hbox fbox framebox num tablenum sym ensuremath url path nolinkurl np numprint "
    "enquote added hl ul smash mathstrut underbrace overbrace title author caption "
    "subcaption part chapter section subsection subsubsection paragraph subparagraph "
    "thead makecell shortstack text textnormal textquote uppercase lowercase MakeUppercase "
    "MakeLowercase MakeTextUppercase abstract lowercase centerline leftline rightline "
    " ang note tablenote figurenote unit si "
    " boxed  kw keywords subtitle textlf"
)

_SHOW = (Arg(),)
_HIDE = (Arg(hide=True),)

_HIDDEN_ONE = (
    "label ref eqref pageref autoref cref Cref nameref vref hspace vspace includegraphics input "
    "include bibliography bibliographystyle usepackage documentclass pagestyle thispagestyle "
    "phantom hphantom vphantom tag sout st xout cancel deleted cmidrule cline vskip index "
    "glsreset hypersetup graphicspath pagenumbering todo color cellcolor rowcolor "
    "arraycolsep linespread hyphenation footnotemark orcidlink RequirePackage "
    "sisetup captionsetup lstset theoremstyle geometry selectlanguage addbibresource "
    " nocite needspace stepcounter refstepcounter usetikzlibrary "
    "     SweaveOpts tikzset"
)

_HIDDEN_TWO = "setlength addtolength setcounter addtocounter fontsize newcolumntype"

_CITES = (
    "cite citep citet parencite textcite autocite footcite citealp citealt citeauthor citeyear "
    "citeyearpar fullcite supercite smartcite shortcite citeA citeNP gls Gls Sexpr "
    "Citet Citep possessivecite"
)

#: Commands with arguments, and what becomes of each.
COMMANDS: dict[str, Args] = {
    **dict.fromkeys(_SHOWN.split(), _SHOW),
    **dict.fromkeys(_HIDDEN_ONE.split(), _HIDE),
    **dict.fromkeys(_HIDDEN_TWO.split(), _HIDE * 2),
    **dict.fromkeys(_CITES.split(), (Arg(OPAQUE, hide=True),)),
    "frac": (Arg("(", ")"), Arg("/(", ")")),
    "sqrt": (Arg("√(", ")"),),
    "bar": (Arg(after="\u0304"),),
    "overline": (Arg(after="\u0304"),),
    "text": (Arg(math=False),),
    "mbox": (Arg(math=False),),
    "ensuremath": (Arg(math=True),),
    "textsuperscript": (Arg("^{", "}"),),
    "textsubscript": (Arg("_{", "}"),),
    "sp": (Arg("^{", "}"),),
    "sb": (Arg("_{", "}"),),
    "tnote": (Arg("^{", "}"),),
    "footnote": (Arg(" (", ")", math=False),),
    "footnotetext": (Arg(" (", ")", math=False),),
    "thanks": (Arg(" (", ")", math=False),),
    **dict.fromkeys(
        words("marginpar marginnote sidenote endnote tablefootnote pdfcomment"),
        (Arg(" (", ")", math=False),),
    ),
    "SI": (Arg(after=" "), Arg()),
    "qty": (Arg(after=" "), Arg()),
    "SIrange": (Arg(after="–"), Arg(after=" "), Arg()),
    "qtyrange": (Arg(after="–"), Arg(after=" "), Arg()),
    "numrange": (Arg(after="–"), Arg()),
    "href": (Arg(hide=True), Arg()),
    "textcolor": (Arg(hide=True), Arg()),
    "colorbox": (Arg(hide=True), Arg()),
    "captionof": (Arg(hide=True), Arg()),
    "parbox": (Arg(hide=True), Arg()),
    "raisebox": (Arg(hide=True), Arg()),
    "scalebox": (Arg(hide=True), Arg()),
    "rotatebox": (Arg(hide=True), Arg()),
    "foreignlanguage": (Arg(hide=True), Arg()),
    "resizebox": (Arg(hide=True), Arg(hide=True), Arg()),
    "multirow": (Arg(hide=True), Arg(hide=True), Arg()),
    "multicolumn": (Arg(hide=True), Arg(hide=True), Arg()),
    "replaced": (Arg(), Arg(hide=True)),
    "stackrel": (Arg(hide=True), Arg()),
    "overset": (Arg(hide=True), Arg()),
    "underset": (Arg(hide=True), Arg()),
    "binom": (Arg("(", " "), Arg(after=")")),
    "texorpdfstring": (Arg(), Arg(hide=True)),
    "rule": (Arg(hide=True), Arg(hide=True)),
    "addcontentsline": (Arg(hide=True), Arg(hide=True), Arg(hide=True)),
    "begin": (Arg(hide=True),),
    "end": (Arg(hide=True),),
}
for _name in ("dfrac", "tfrac", "cfrac", "sfrac", "nicefrac"):
    COMMANDS[_name] = COMMANDS["frac"]

#: Units of siunitx, which stand for words.
UNITS = {
    "percent": "%",
    "degreeCelsius": "°C",
    "celsius": "°C",
    "per": "/",
    "squared": "²",
    "cubed": "³",
    **{
        name: name
        for name in words(
            "metre meter gram kilogram second minute hour day litre liter kelvin mole newton "
            "pascal joule watt volt ampere ohm hertz kilo milli micro centi mega giga nano"
        )
    },
}

#: Environments set as math.
MATH_ENVIRONMENTS = frozenset(
    name + star
    for name in words("equation align gather multline eqnarray alignat flalign displaymath math")
    for star in ("", "*")
)

#: Environments with arguments that are not shown, by their number.
ENVIRONMENT_ARGS = {
    "tabular": 1,
    "tabular*": 2,
    "tabularx": 2,
    "tabulary": 2,
    "xltabular": 2,
    "longtable": 1,
    "longtable*": 1,
    "tabu": 1,
    "supertabular": 1,
    "array": 1,
    "alignat": 1,
    "alignat*": 1,
    "minipage": 1,
    "multicols": 1,
    "adjustbox": 1,
    "wrapfigure": 2,
    "wraptable": 2,
    "thebibliography": 1,
    "minted": 1,
}
