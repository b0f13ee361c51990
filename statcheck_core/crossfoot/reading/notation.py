"""How quantities are named in print: one declaration a notation.

Patterns run over folded visible text (see :mod:`crossfoot.reading.fold`), where raised text
stands in ``^{…}`` and lowered text in ``_{…}``. From this table come the scanner, the examples in
the documentation and the tests that try each example.
"""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.reading.words import (
    COEFFICIENT,
    COMPUTED,
    CORRELATION,
    DEGREES,
    DETERMINATION,
    ERROR_NAMES,
    INTERVAL,
    PARTIAL,
    SIGNIFICANCE,
    SQUARE,
    VALUE,
    VALUE_BEFORE,
    VERB,
    VERB_UNSPACED,
)

_SQUARED = r"(?:\s?²|\s?\^\s?(?:\{\s?2\s?\}|2)|2(?![\d.,]?\d))"
#: A character of a script that writes no space between a name and the next word.
_SCRIPT = "(?=[\u3040-\u30ff\u4e00-\u9fff\uac00-\ud7a3])"
_SUB = r"(?:\s?_\{[^{}\n]{1,14}\}|_[a-zA-Z]{1,6}|[₀-₉]{1,2})"


class Notation(NamedTuple):
    """One way to name a quantity.

    Attributes
    ----------
    quantity
        Key of the quantity, or a scanner's word for what needs a decision later (``ci``,
        ``R2-percent``, ``df-pair``).
    pattern
        Regular expression for the name alone.
    wordy
        Whether the name is words, so that ``is``, ``:`` or plain space may stand for ``=``.
    initials
        The characters the name can start with; they decide which patterns are tried at a word.
    example
        A result in which the name stands, shown in the documentation and tried by a test.
    """

    quantity: str
    pattern: str
    wordy: bool
    initials: str
    example: str


NOTATIONS: tuple[Notation, ...] = (
    Notation(
        "F_change",
        r"(?:(?:Δ\s?|delta[\s-])F(?:[\s-]?(?:value|ratio|stat(?:istic)?|test))?|F[\s-]?(?i:inc|change)|F\s?_?\{?(?:change|inc|Δ)\}?|F\s?for\s(?:the\s)?change(?:\sin\sR(?:²|\^\{?2\}?|2))?)"
        r"(?![a-z])",
        False,
        "ΔFdp",
        "ΔR² = .07, ΔF(1, 96) = 9.58, p = .003",
    ),
    Notation(
        "p",
        r"(?:(?i:(?:asympto?\w*\.?\s)?sig\.(?:\s(?:asint[oó]tica|exacta|asymp\.))?(?:\s?F)?(?:\s?change)?(?:\s?\((?:2|zwei|two|bi|à\s2|a\s2)[^()\n]{2,18}\))?|sig(?=\s?=)|sig(?:nificance|nifikanz)?\s?F(?:\s?change)?|signifi(?:cance|kanz|cation|cación|cância|cativité|catività|cantie)(?:\s?\((?:2|zwei|two|bi|à\s2|a\s2)[^()\n]{2,18}\))?(?=\s?[=<])"
        rf"|associated\sprobability(?:\svalue)?|{SIGNIFICANCE})"
        r"|Prob(?:ability)?\s?(?:>|\()\s?(?:F|chi-?2|\|[tz]\|)(?:-statistic\s?\))?|Prob\s?\(F-statistic\)"
        r"|Pr\s?\(?>\s?\|?(?:F|[tz]|Chisq)\|?\)?|P(?:r(?:ob)?)?\s?\(\s?\|[TtZz]\|\s?>=?\s?\|?[tz]\|?\s?\)|Pr(?=\s?=\s?[01]?\.\d)|[pP]rob(?:ability)?\.?(?=\s?[<=>]\s?[01]?\.\d)|P\s?>\s?\|[tz]\||[pP]\s?\(\s?>?\s?\|?[FtzT]\|?\s?\))",
        True,
        "sSPpaÜo有显유",
        "Prob > F = 0.0312, F(2, 57) = 3.69",
    ),
    Notation(
        "F",
        rf"(?:[Ff]\s?(?i:[\s_-]?(?:statisti(?:c|k|ek|que|ca)|stat\.?(?![a-z])|ratio|test(?![a-z])|{COMPUTED})|(?:[\s_-]?(?=v)|[\s-]|(?=[値值])){VALUE})(?:\sgave)?"
        rf"(?:\svs\.\sconstant\smodel)?|(?:{VALUE_BEFORE})\s(?:de\s|di\s)?F(?![\w(])"
        r"|F\s?Statistic|Wald\s(?:test|F)(?=\s?:\s?\d{1,9}(?:\.\d{1,9})?\son\s\d{1,5}\sand))",
        True,
        "FfveWEsSP",
        "The F-value of 4.22 with 2 and 42 degrees of freedom gave a p-value of 0.021",
    ),
    Notation(
        "p",
        rf"(?:[pP](?:s|'s)?[\s_-]?(?i:{VALUE}|valor(?:es)?|val\.?|unc|level(?=\s?[=<]\s?0?[.,](?!(?:05|01|001|10?)\b)))(?![a-z])"
        rf"|(?:{VALUE_BEFORE})[\s-](?:de\s|di\s)?p(?![a-z])|pvalue|Prob\.|[Pp]rob(?=\s{{0,9}}=\s{{0,9}}[01]?\.\d))",
        True,
        "pPv",
        "F(2, 57) = 3.90, p-value: .026",
    ),
    Notation(
        "F",
        rf"(?:F(?:s|'s)?(?:(?![\w²-]|'\w)|{_SCRIPT})|F(?:[12₁₂]|_\{{[12]\}})(?=\s?(?:\(|<\s?1(?!\.?\d)))|F(?=[\d_₀-₉])|f(?=\s?\()"
        r"|min\s?F'?(?=\s?\())",
        False,
        "Ffm",
        "F(2, 57) = 3.90, p = .026",
    ),
    Notation(
        "R2_change",
        rf"(?:(?:Δ|delta[\s-]?)\s?_?\{{?\s?[Rr](?:{_SQUARED}|[\s-](?i:squared?))\}}?|[Rr]{_SQUARED}(?:\s?_\{{)?[\s-]?(?:change|inc(?:rement)?(?![a-z])|Δ)\}}?"
        rf"|R[\s-]?(?i:squared?|sq)[\s-](?i:change)|(?:change|increase|increment)\sin\s[Rr](?:{_SQUARED}|[\s-](?i:squared?)))",
        False,
        "ΔdRrci",
        "ΔR² = .07, ΔF(1, 96) = 9.58, p = .003",
    ),
    Notation(
        "R2_adj",
        r"(?:[aA]dj(?:usted)?[\s._-]?[rR](?:2|²|[\s._-]?sq(?:uared?)?)|[rR](?:2|²|[\s._-]?sq(?:uared?)?)[._-]?adj(?:usted)?|R\s?\(adj\.?\)\s?²)(?![a-zA-Z\d])",
        True,
        "aArR",
        "r2 = 0.210, adj_r2 = 0.185, F(3, 96) = 8.51",
    ),
    Notation(
        "R2",
        rf"(?:(?i:multiple\s|sample\s)?[Rr][\s-](?i:{SQUARE})(?![a-z])|(?i:{DETERMINATION})(?!\s?\(?,?\s?(?:(?:betrug|was|war|is|of)\s)?[Rr](?![a-z]))|(?i:multiple\s)?R\s?\u0304?{_SUB}?{_SQUARED}{_SUB}?"
        rf"|r{_SUB}?{_SQUARED}{_SUB}?)",
        True,
        "RrmsMcCBdDfFsSwk決决결",
        "R² = .21, F(3, 96) = 8.74, p < .001",
    ),
    Notation(
        "eta2_partial",
        rf"(?:{PARTIAL}\s?(?:(?i:eta)|η)[\s-]?(?:{SQUARE}|{_SQUARED})"
        rf"|p\s?η\s?{_SQUARED}|(?:η|𝜂|Î·|<U\+03B7>|n|\?)(?:\s?_?\{{?p\}}?\s?|ₚ)(?:{_SQUARED}|Â²)"
        rf"|(?:η|𝜂|Î·|<U\+03B7>)\s?(?:{_SQUARED}|Â²)\s*_?\{{?\s?\(?(?:ₚ|p|{PARTIAL})\)?\}}?(?![a-z])"
        rf"|(?i:eta)[\s-]?(?:{_SQUARED}|{SQUARE})\s?\(?{PARTIAL}\)?"
        r"|(?i:eta)_?\{?(?:2|²)_?p\}?(?![a-z])|PES(?![A-Za-z])|np2|n2p|hp2|h2p|g2p|gp2|[ηg]\s?p\s?2|(?<=[;,]\s)[hZ]2(?=\s?=\s?0?\.\d))",
        True,
        "pPη𝜂nÎ<e?EghZ部부偏č",
        "F(2, 57) = 3.90, p = .026, ηp² = .12",
    ),
    Notation(
        "eta2",
        rf"(?:(?:η|𝜂)\s?{_SQUARED}|[eE]ta[\s_-]?{SQUARE}|eta{_SQUARED})(?!\s?_?\{{?[A-Za-z])",
        True,
        "η𝜂eE",
        "F(2, 57) = 3.90, p = .026, η² = .12",
    ),
    Notation(
        "omega2",
        rf"(?:ω\s?{_SQUARED}|[oO]mega(?:[\s-]?squared?|{_SQUARED}))(?!\s?_)",
        True,
        "ωoO",
        "F(2, 57) = 3.90, p = .026, ω² = .09",
    ),
    Notation(
        "f2",
        rf"(?:Cohen's\s)?f{_SQUARED}(?!\s?[(\w])",
        False,
        "fC",
        "R² = .21, f² = .27, F(3, 96) = 8.51",
    ),
    Notation(
        "chi2",
        rf"(?:Δ\s?)?(?:χ\s?{_SUB}?\s?{_SQUARED}|X{_SQUARED}(?=\s?[(=\[])|(?i:k?[cj]?u?[hj]i|kh?i|qui|chí)[\s-]?(?i:{SQUARE}|2)(?![\d.a-zà-ÿ])"
        rf"|khi²|(?i:chi)\s?{_SQUARED}|[XK]-squared|χ)(?!\s?/\s?df)",
        True,
        "ΔχXcCkKjqQPFB",
        "χ²(1, N = 120) = 8.47, p = .004",
    ),
    Notation(
        "chi2-of",
        r"(?:[GHQ](?=\s?=\s?\d{1,4}[.,]\d+\s?[,;(]\s?d\.?f|\s?(?:\(\s?(?:df\s?=\s?)?|_\{)\d{1,3}\s?[,)}])|G(?:²|\^\{?2\}?)(?=\s?\()"
        r"|(?:LRT?|[dD]eviance(?:\s(?:dropped|fell|decreased|declined|was\sreduced)(?=\sby\s))?|(?i:likelihood[\s-]ratio|log-?rank|score|wald)(?:\s(?:statistic|test))?(?:\s?\(log-?rank\)\stest)?|LM|BP|卡方值?)(?=\s{0,14}[=(]|\s(?:was|of|by|for)\s))",
        False,
        "HQGLlSsWwB卡dD",
        "The Kruskal–Wallis test was significant, H(2) = 9.21, p = .010",
    ),
    Notation(
        "ci",
        rf"(?:(?:{INTERVAL}\s?(?:à\s|al\s|del\s|di\s|de\s|a\s)?[_({{]{{0,2}}(?P<level_after>[5-9]\d(?:[.,]\d)?)\s?%?[)}}]?"
        rf"|(?P<level_before>[5-9]\d(?:[.,]\d)?)\s?(?:%|per\s?cent)?[\s-]{{0,3}}{INTERVAL}"
        r"(?:\s(?:for|of|on|around)\s(?:the|this)\s(?:mean\s)?(?:difference|change|slope|estimate|effect|contrast)s?)?)"
        r"(?![a-z])|CI(?=\s?[:=]?\s?[\[(]\s?[-+]?[.\d]|:\s?[-+]?[.\d]))",
        True,
        "CKIBPGL56789icbklpт信置신",
        "b = 0.42, SE = 0.11, 95% CI [0.20, 0.64], t(96) = 3.82",
    ),
    Notation(
        "df1",
        r"(?:(?:df|ddl|gdl|gl|FG|ν)_?\{?1\}?(?!\d)|df[\s_]?\(?(?:num|model|between)\)?|num(?:erator|\.)?\s?(?:df|DF)|ddof1|DF?n|Df\s?Model)",
        True,
        "dnDNgFν",
        "F = 4.156, num df = 2.000, denom df = 19.204, p-value = 0.03163",
    ),
    Notation(
        "df2",
        r"(?:(?:df|ddl|gdl|gl|FG|ν)_?\{?2\}?(?!\d)|df[\s_]?\(?(?:den(?:om)?|error|resid(?:uals?)?|within)\)?|den(?:om(?:inator)?|\.)?\s?(?:df|DF)|ddof2|DFd"
        r"|Df\s?Residuals|(?i:(?:error|residual)\s(?:df|degrees\sof\sfreedom)))",
        True,
        "dnDeErRgFν",
        "F = 4.156, num df = 2.000, denom df = 19.204, p-value = 0.03163",
    ),
    Notation(
        "df",
        rf"(?:Δ\s?)?{DEGREES}(?![a-z]|[12](?![\d.,]))|ν(?=\s?=\s?\d{{1,4}}(?![\d.]|\s?[^\W\d]))",
        True,
        "ΔdgFfvsSbс自자Dν",
        "t = -1.926; df = 21.4; P = 0.068",
    ),
    Notation(
        "s",
        r"(?:(?i:residual\s(?:standard|std\.?)\s(?:error|deviation)|residuen-?standardfehler|error\sest[áa]ndar\sresidual|erreur\s(?:standard|type)\srésiduelle|errore\sstandard\sresiduo|root\s(?:mean\ssquared?(?:\serror)?|MSE))|RMSE|RSE|SEE"
        r"|(?i:(?:standard|std\.?)\s?error\sof\s(?:the\s)?(?:estimate|regression))|S(?=\s=\s[\d.]+\s+R-Sq)|s(?=\s?=\s?[\d.]))",
        True,
        "rRsSeE",
        "residual standard error = 4.653, R² = .3251, F(2, 57) = 13.73",
    ),
    Notation(
        "se",
        rf"(?:(?i:(?:robust\s)?(?:std[._]?|standard)\s?(?:error|err\.?))|S\.\s?E\.|s\.\s?e\.(?:\s?d\.)?|{ERROR_NAMES}|E[EPST](?=\s?=)|(?:SE|se)(?:\s?_\{{?\w{{1,4}}\}}?|\s?[Bb](?=\s?=)|\([bBβ]\))?)(?![a-zA-Z])",
        True,
        "rsSReEkm标標표",
        "b = 0.42, SE = 0.11, t(96) = 3.82, p < .001",
    ),
    Notation(
        "odds_ratio",
        r"(?:adjusted\s)?(?:a?OR|odds\sratios?|[eE]xp\s?\(\s?(?:[bBβ]|coef)\s?\))(?![a-zA-Z])",
        True,
        "aOoeE",
        "OR = 1.84, 95% CI [1.20, 2.82], p = .005",
    ),
    Notation(
        "d",
        r"P(?:r(?:ob)?)?\s?\(\s?[TFZ]\s?[<>]\s?[tfz]\s?\)",
        False,
        "P",
        "t = 2.12, Pr(T < t) = 0.98, df = 58, Pr(|T| > |t|) = 0.0383",
    ),
    Notation(
        "d",
        rf"(?:[gG]enerali[sz]ed\s(?:η|eta)[\s-]?(?:squared|{_SQUARED})|(?:Cohen's\s)?(?:d_\{{?\w\}}?|d)|(?:Hedges'?s?\s)?g|ε\s?²|M_?diff|Δ?M)(?![\w²'.-])",
        False,
        "CdHgGεMΔ",
        "t(58) = 2.05, p = .045, d = 0.54, 95% CI [0.01, 1.06]",
    ),
    Notation(
        "phi",
        r"(?:φ|ϕ|phi)(?:_\{?[A-Za-z]{1,5}\}?)?(?![a-zA-Z])(?:\scoefficient)?",
        True,
        "φϕp",
        "χ²(1, N = 120) = 8.47, p = .004, φ = .27",
    ),
    Notation(
        "cramers_v",
        r"(?:Cram[ée]r['’]?s?\s(?:V|φ|ϕ|phi)|V(?=\s?[=:]))(?![a-zA-Z])",
        True,
        "CV",
        "χ²(2, N = 310) = 9.21, p = .010, Cramér's V = .17",
    ),
    Notation("vif", r"VIF(?![a-z])", False, "V", "tolerance = .54, VIF = 1.85"),
    Notation("tolerance", r"[Tt]olerance(?![a-z])", False, "tT", "tolerance = .54, VIF = 1.85"),
    Notation(
        "b-se",
        r"(?:[bBβ]|(?i:estimate|slope|coefficient|(?:mean\s)?(?:difference|change)|effect))\s?(?:\(\s?±?\s?(?:SE|s\.e\.|S\.E\.|standard\serror)\)|±\s?(?:1\s)?(?:SE|s\.e\.|S\.E\.|standard\serror))",
        False,
        "bBβeEsScCdDmM",
        "B(SE) = 0.81 (0.30), t(90) = 2.70, p = .008",
    ),
    Notation(
        "beta",
        r"(?:(?:[sS]tandardi[sz]ed|[sS]td\.?)\s(?:(?:regression\s|path\s)?(?:coefficients?|weights?|slope|estimates?)(?:\s?\(?(?:β|b|beta)\)?(?![a-z]))?|(?:β|b|beta)(?![a-z]))"
        r"|(?:β|ß|beta|Beta)\s?\((?:[sS]td\.?|[sS]tandardi[sz]ed)\)|[bB]\s?\*(?=\s?=)|Beta(?=\s?[=:]))",
        True,
        "sSβßbB",
        "standardised β = .35, t(96) = 3.82, p < .001",
    ),
    Notation(
        "β",
        rf"(?:β|ß|beta)\u0302?{_SUB}?(?:\([\w .:*×-]{{1,30}}\))?(?![a-zA-Z])",
        False,
        "βßb",
        "β = .35, t(96) = 3.82, p < .001",
    ),
    Notation(
        "b",
        rf"(?:(?<![A-Za-z]-)[bB]\u0302?{_SUB}?\d?(?:(?![\w²^.\u0302])|{_SCRIPT})|(?i:{COEFFICIENT}(?!\s(?:of|de|di)\s(?:d[eé]termin|vari|corr))|(?:point\s)?est(?:\.|imates?)|slope))(?![a-zà-ÿ])",
        True,
        "bBrRcCpPeEsSihlIHLKkwкК回迴偏斜傾회기",
        "b = 0.42, SE = 0.11, t(96) = 3.82, p < .001",
    ),
    Notation(
        "b",
        r"(?:(?i:(?:mean\s)?difference|(?:(?:average|mean)\s)?marginal\seffect|gradient)|AME)(?=\s?=\s?[-+]?[.\d])",
        True,
        "dDmMaAgG",
        "difference = 0.42, SE = 0.11, t(96) = 3.82, p < .001",
    ),
    Notation(
        "n",
        rf"(?:[Nn]{{1}}(?:obs)?(?:_\{{?(?:total|obs)\}}?)?(?:(?![\w²^.-]|'\w)|{_SCRIPT})|(?i:(?:no\.|number|num\.?)\s?(?:of\s)?obs(?:ervations|\.)?)|(?i:sample\ssize|observations))",
        False,
        "nNsSoO",
        "N = 58. R = .643, R² = .414, F(2, 55) = 19.40",
    ),
    Notation(
        "k",
        r"k(?=\s?=\s?\d{1,2}(?![\d.,]?\d|%))",
        False,
        "k",
        "R² = .31, adjusted R² = .29, n = 84, k = 3, F = 12.09, p < .001",
    ),
    Notation(
        "R",
        rf"(?i:multiple\s(?:correlation\s)?(?:coefficient\s)?)?R(?:(?![\w²^.\u0304-])|{_SCRIPT})",
        False,
        "RmM",
        "R = .643, R² = .414, F(2, 55) = 19.40",
    ),
    Notation(
        "r",
        rf"(?:(?:(?:Pearson(?:'s)?|partial|correlation)\s)?r(?:_\{{?(?:s|p|xy|partial)\}}?|[ₛs](?=\())?(?:(?![\w²^.-]|'\w)|{_SCRIPT})|r(?=_\{{?\(?\d|[₀-₉]|\d{{1,4}}\s?=|_\{{[^{{}}\n]{{1,14}}\}}\s?\(\d)|(?:Spearman(?:'s)?\s(?:r|rho|ρ)|ρ|rho)(?:_\{{?s\}}?)?(?:(?![\w²^.-])|{_SCRIPT})"
        r"|[rR][_-]?value(?=\s?[=:])|cor(?=\s*\n\s*-?0?\.\d)|(?:rho|tau)(?=\s*\n\s*-?0?\.\d)"
        rf"|(?i:{CORRELATION})(?=\s(?:{VERB}|=)\s|\s?{VERB_UNSPACED})"
        r"|(?:Pearson(?:'s)?\s)?[cC]orrelation(?:\scoefficient)?(?:\sof\s\w{1,20}\sand\s\w{1,20}(?=\s=\s))?(?=\s(?:was|is|of|=|between|with|for)\s))",
        False,
        "rPpcCSKkRw相상ρ",
        "r(98) = .41, p < .001",
    ),
    Notation(
        "t",
        rf"(?:(?:[tT]\s?(?i:[\s_-]?(?:statisti(?:c|k|ek|que|ca)|stat\.?(?![a-z])|ratio|test(?![a-z])|{COMPUTED})"
        rf"|(?:[\s_-]?(?=v)|[\s-]|(?=[値值])){VALUE})|(?:{VALUE_BEFORE})\s(?:de\s|di\s)?t"
        r")(?![a-z])"
        rf"|t(?:s|'s)?(?:(?![\w²-]|'\w)|{_SCRIPT})|t(?:[12]|_\{{[12]\}})(?=\s?\()|T(?=\s?[(\[]\s?\d)|t(?=[_₀-₉])|t(?=\d{{1,4}}(?:\.\d{{1,3}})?\s?=))",
        True,
        "tTveEsSP",
        "t(47) = 2.20, p = .033",
    ),
    Notation(
        "statistic",
        r"(?:[tT]est[\s_-])?[sS]tatistic(?![a-z])|correlation(?==)",
        True,
        "sStTc",
        "TtestResult(statistic=2.31, pvalue=0.0245, df=58.0)",
    ),
    Notation(
        "z",
        rf"(?:(?:Wald\s)?[zZ](?:[\s-](?:value|score|statistic))?)(?:(?![\w²-]|'\w)|{_SCRIPT})",
        False,
        "zZW",
        "b = 0.61, SE = 0.22, z = 2.77, p = .006",
    ),
    Notation(
        "ms-error",
        r"(?:MSE|MSe|MS_?\{?(?:e|error|res(?:idual)?|within)\}?)(?![a-z])",
        False,
        "M",
        "F(1, 26) = 6.56, MSE = 37.63, p = .017",
    ),
    Notation(
        "p",
        rf"[Pp](?=[bo]0?\.\d)|(?:P|p)(?:s|'s)?(?:[\s-]?_?\{{?(?i:adj|corr|bonf(?:erroni)?|holm|tukey|fdr|perm|one-tailed|two-tailed)\.?\}}?)?(?:(?![\w²]|'\w)|{_SCRIPT})|[pP](?=_\{{\(?[^\W\d][^{{}}\n]{{0,24}}\}})",
        False,
        "pP",
        "F(2, 57) = 3.90, p = .026",
    ),
)
