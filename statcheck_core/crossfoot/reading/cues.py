"""Words around a result that change what may be concluded from it."""

from __future__ import annotations

from typing import NamedTuple


class Cue(NamedTuple):
    """Words that mean a context.

    Attributes
    ----------
    context
        Key of :data:`crossfoot.laws.assumptions.CONTEXTS`.
    stems
        Lower-case substrings, one of which must stand in the text.
    near
        Whether the words must stand in the sentence of the result; otherwise anywhere in its
        block will do.
    spreads
        Whether the words, in a paragraph without a result, speak for the rest of the section
        (or, in a methods section, of the document).
    general
        Pattern that a paragraph must match as well before its cue spreads.
    confirm
        Pattern that the lower-case text must match as well, where the stems say too little.
    """

    context: str
    stems: tuple[str, ...]
    near: bool = False
    spreads: bool = False
    general: str = ""
    confirm: str = ""


def _stems(words: str) -> tuple[str, ...]:
    return tuple(words.split("; "))


#: "one-sided" in Romance languages, of tests: operations are unilateral, too.
_LATERAL = (
    r"(?:test|contrast|prueba|hip[oó]t|prova|probabil|significa|valor)\w{{0,12}}\W{{1,3}}"
    r"(?:\w{{1,16}}\W{{1,3}}){{0,2}}{0}lat|{0}lat[eé]ra\w{{0,6}}\W{{1,3}}(?:\w{{1,16}}\W{{1,3}})?"
    r"(?:test|p\b|signif|t\b)"
    r"|\(\s?{0}lat[eé]ra|[;,] {0}lat[eé]ra"
)
#: What says of a statement that it is one of all tests.
ALL_TESTS = (
    r"\ball\b|throughout|\btests? (?:were|are)\b|p\W{0,3}values? (?:were|are|have been)"
    r"|\balle\b|\btous\b|\btodos\b|\btutti\b"
)


CUES: tuple[Cue, ...] = (
    Cue(
        "one-sided",
        _stems(
            "one-sided; one-tailed; one sided; one tailed; 1-sided; 1-tailed; one- sided; "
            "one- tailed; directional; einseitig; unilatér; unilateral; eenzijdig; "
            "ensidig; ensidet; 片側; 单侧; 單側"
        ),
        near=True,
        spreads=True,
        general=ALL_TESTS,
        # Winds are directional, and operations unilateral.
        confirm=r"(?:one|1)[- ]{1,2}(?:sided|tailed)|einseitig|eenzijdig|ensid|片側|单侧|單側"
        r"|directional(?:ly)? (?:hypoth|test|predict|expect|alternat|t\b|p\b)"
        rf"|{_LATERAL.format('uni')}",
    ),
    Cue(
        "one-sided",
        _stems("alternative hypothesis"),
        near=True,
        confirm=r"alternative hypothesis:[^\n]* is (?:greater|less) than",
    ),
    Cue(
        "either-sided",
        _stems(
            "tost; equivalence; noninferiority; non-inferiority; superiority; mixture; halved; "
            "chi-bar; boundary"
        ),
        spreads=True,
        confirm=r"\btost\b|equivalence (?:test|bound|margin|limit|was|held)|for equivalence"
        r"|non-?inferiority|superiority test|mixture of|p\W{1,3}values? (?:was|were|is|are) halved"
        r"|halved p|halved the p|chi-bar|(?:on|at|of) the boundary",
    ),
    Cue(
        "two-sided",
        _stems(
            "two-sided; two-tailed; two sided; two tailed; 2-sided; 2-tailed; zweiseitig; "
            "bilatér; bilateral; tweezijdig; tvåsidig; tosidig; 両側; 双侧; 雙側"
        ),
        near=True,
        spreads=True,
        general=ALL_TESTS,
        confirm=r"(?:two|2)[- ](?:sided|tailed)|zweiseitig|tweezijdig|tvåsidig|tosid|両側|双侧|雙側"
        rf"|{_LATERAL.format('bi')}",
    ),
    Cue(
        "robust",
        _stems(
            "robust; hc0; hc1; hc2; hc3; hc4; clustered; cluster-; sandwich; huber; newey; "
            "driscoll; heteroskedasticity-consistent; heteroscedasticity-consistent; white-; "
            "white standard; white's; hac; eicker; robuste; robusti; robustos; robustas; robuust; "
            "robusta; clusters in; 稳健; 頑健"
        ),
        spreads=True,
        confirm=r"robust (?:standard |std\.? )?(?:errors?|s\.?e|variance|f\b|inference|regression"
        r"|estimat|fit|linear)|(?:sk|sc)edastic\w*[- ](?:robust|consistent)|\bhc[0-4]\b"
        r"|cluster(?:ed|-robust)|adjusted for [\d,]+ clusters|cluster\w* (?:at|by|on)\b|sandwich"
        r"|huber|newey|driscoll|eicker|\bhac\b|white(?:'s)?[- ](?:correct|standard|robust|heterosk)"
        r"|\|\s+robust\b|robust\s*\n|稳健|頑健"
        r"|robuste[nr]? standardfehler|erreurs?[- ]types? robustes"
        r"|err(?:eurs|ores|os|ori)(?: [\w-]{1,10})? robust|robuuste standaardf|robusta standardfel",
    ),
    Cue(
        "weighted",
        _stems(
            "weighted least; weighted regression; wls; inverse-variance; inverse variance; "
            "probability weight"
        ),
        spreads=True,
    ),
    Cue(
        "instrumental",
        _stems("instrumental; instrumented; 2sls; two-stage least; iv regression; iv estimat"),
        spreads=True,
    ),
    Cue(
        "mixed",
        _stems(
            "mixed effect; mixed-effect; mixed model; mixed-model; mixed linear; "
            "linear mixed; multilevel; hierarchical linear; random intercept; "
            "random-intercept; random slope; random-slope; random effect; random-effect; "
            "lmer; lmert; lmm; generalized estimating; generalised estimating; satterthwaite; "
            "kenward; gemischte; modèle mixte; modèle linéaire mixte; modèles mixtes; "
            "effets mixtes; effets aléatoires; "
            "modelo mixto; modelos mixtos; efectos mixtos; efectos aleatorios; "
            "modelo misto; efeitos mistos; efeitos aleatórios; modello misto; modelli misti; "
            "effetti casuali; mehrebenen; zufällige effekte; 混合效应; 混合効果; 混合模型"
        ),
        spreads=True,
        confirm=r"(?<!\w)(?:lmm|lmer\w*"
        r"|(?:mixed|random)[- ](?:effects?|model|linear|intercepts?|slopes?)"
        r"|linear mixed|multilevel|hierarchical linear"
        r"|generali[sz]ed estimating|satterthwaite|kenward"
        r"|gemischte[snr]? (?:lineare[snr]? )?modell"
        r"|(?:effets|efectos|efeitos|effetti) (?:mixt|mist|aléa|alea|casual)"
        r"|mod[eè]l[eoli]{1,2}s?(?: linéaires?| lineales?| lineare?s?)? mi[sx]t"
        r"|mehrebenen|zufällige effekte|混合)",
    ),
    Cue(
        "survey",
        _stems(
            "survey weight; survey-weight; survey design; survey-adjusted; complex sample; "
            "complex survey; taylor linear; taylor-linear; design-based"
        ),
        spreads=True,
    ),
    Cue(
        "generalised",
        _stems(
            "logistic; logit; probit; poisson; negative binomial; generalized linear; "
            "generalised linear; cox ; hazard; ordinal regression; deviance; "
            "log-likelihood ratio"
        ),
        confirm=r"logistic|logit|probit|poisson|negative binomial|generali[sz]ed linear"
        r"|\bcox (?:regression|model|proportional)|hazards? (?:ratio|model|regression)"
        r"|ordinal regression|deviance|log-likelihood ratio",
    ),
    Cue(
        "no-intercept",
        _stems(
            "through the origin; without an intercept; without intercept; no intercept; "
            "no-intercept; intercept suppressed; intercept was omitted; zero intercept; "
            "without a constant; without constant; no constant; constant suppressed; "
            "not contain a constant; uncentered; uncentred; "
            "durch den ursprung; ohne achsenabschnitt; ohne konstante; sans constante; "
            "sin constante; par l'origine"
        ),
        spreads=True,
    ),
    Cue(
        "adjusted-df",
        _stems(
            "welch; satterthwaite; kenward; greenhouse; huynh; brown-forsythe; "
            "brown–forsythe; unequal varianc; not assuming equal; sphericity; "
            "corrected degrees; corrected df; adjusted degrees; adjusted df"
        ),
    ),
    # The summary prints the residual df; the tests have those of the clusters.
    Cue(
        "adjusted-df",
        _stems("covariance type; robust to cluster"),
        confirm=r"covariance type:\s+(?:cluster|hac-|nw-)|robust to cluster",
    ),
    Cue(
        "scaled-df",
        _stems("greenhouse; huynh; sphericity"),
        near=True,
        confirm=r"^(?![\s\S]*(?:welch|satterthwaite|kenward|brown|unequal|equal varianc))",
    ),
    Cue(
        "adjusted-p",
        _stems(
            "bonferroni; holm; tukey; scheff; šid; sidak; benjamini; fdr; false discovery; "
            "dunnett; games-howell; hochberg; corrected for; adjusted for multiple; "
            "adjusted p; corrected p; multiple comparison; family-wise; familywise; "
            "post hoc; post-hoc; multiplicity; single-step; step-down; stepdown; westfall; simes; "
            "hommel; newman-keuls; fwe; tfce; mvt; mehrfach; multiple vergleich; "
            "multiplen vergleich; "
            "comparaisons multiples; comparaciones múltiples; comparaciones multiples; "
            "comparações múltiplas; confronti multipli; meervoudige; flera jämförelser; "
            "multiple sammenlig; 多重比较; 多重比較; 多重檢定"
        ),
        spreads=True,
        general=ALL_TESTS + r"|adjust\w*\s?[=:]|p\.adjust|p\W{1,3}values? adjust|adjustment"
        r"|(?:comparisons|contrasts|probabilities) (?:were|are)\b",
    ),
    Cue(
        "adjusted-p",
        _stems("adjustment; adjusted; corrected; correction; multiplied"),
        # of a comparison, by whatever method, and not for a covariate
        confirm=r"(?:contrast|compari|pairwise|emmean|p[- ]?value|probabilit|threshold)[^.]{0,80}"
        r"(?:adjust|correct)(?:ed|ion|ment)s?\b(?! for| r\b| r²)"
        r"|(?:adjust|correct)(?:ed|ion|ment)\b(?! for)[^.]{0,40}"
        r"(?:contrast|compari|pairwise|p[- ]?value)"
        r"|\w{1,20} adjustment gave|multiplied by (?:\d|two|three|four|five|six|ten|the number)",
    ),
    Cue(
        "pseudo-r2",
        _stems(
            "nagelkerke; mcfadden; pseudo; cox & snell; cox and snell; marginal r; "
            "conditional r; cross-validat; within r; tjur"
        ),
        near=True,
    ),
    Cue(
        "assumption-test",
        _stems(
            "levene; bartlett; shapiro; breusch; mauchly; durbin; homogeneity of varianc; "
            "equality of varianc; hausman; ramsey; white test; white's test; ljung; "
            "goldfeld; homogeneity of regression"
        ),
        near=True,
    ),
    Cue(
        "variance-ratio",
        _stems(
            "ratio of variances; variance ratio; variance-ratio; compare two variances; "
            "two variances; equal variances f"
        ),
    ),
    Cue(
        "other-null",
        _stems(
            "test for constraints; linear hypothesis; null value; hypothesised value; "
            "hypothesized value; noninferiority; non-inferiority; equivalence; from one; "
            "from unity; from 1; from chance; against one; against unity; against 1; "
            "against chance; chance level; above chance; isometr; 1:1; slope of 1; slope of one; "
            "slope of unity"
        ),
        confirm=r"constraints|linear hypothesis|(?:null|hypothesi[sz]ed) value|non-?inferiority"
        r"|equivalence|(?:from|against) (?:one|unity|1(?:\.0+)?|chance)(?![\w.,]*\d)|chance level"
        r"|above chance|isometr|1:1|slope of (?:1|one|unity)\b",
    ),
    Cue(
        "ratio-scale",
        _stems(
            "ratio; ratios; relative risk; odds; times; fold; -fold; hr; rr; irr; shr; ahr; arr; "
            "airr; or; aor; auc; auroc; roc; exp("
        ),
        near=True,
        confirm=r"(?:hazards?|risk|rate|odds|incidence|prevalence|response|means)[ -]ratios?\b"
        r"|\bratios? of|relative risk|\bodds\b"
        r"|\btimes (?:as|more|less|higher|lower|greater)"
        r"|fold\b|\ba?(?:hr|rr|irr|shr|or)s?\s?[=:(]|\bau(?:ro)?c\b|\broc\b|exp\(",
    ),
    Cue(
        "partial-sums",
        _stems("type ii; type iii; type-ii; type-iii; type 2 s; type 3 s; type 2 a; type 3 a"),
        spreads=True,
        confirm=r"type[ -](?:iii?|[23])[ -](?:sum|ss|anova|analysis|test|f)|\btype[ -](?:iii?)\b",
    ),
    Cue(
        "own-limits",
        _stems(
            "profile; credible; hdi; hpd; posterior; clopper; penali; firth; percentile interval"
        ),
        near=True,
        confirm=r"profil\w{0,3}[- ](?:likelihood|ci\b|conf|interval|95)|credible|\bhdi\b"
        r"|\bhpd\b|posterior|clopper|penali[sz]ed|firth|percentile interval",
    ),
    Cue(
        "rank-test",
        _stems("mann; wilcoxon; hodges; rank; u =; w ="),
        near=True,
        confirm=r"mann[- –]whitney|wilcoxon|hodges|rank[- ](?:sum|test|based)|signed[- ]rank"
        r"|\b[uw] = \d",
    ),
    Cue(
        "missing-cases",
        _stems(
            "missing; exclud; exclusion; incomplete; dropout; drop-out; dropped out; listwise; "
            "pairwise deletion; attrition; lost to follow; without data; cases without; unavailable"
        ),
    ),
    Cue(
        "normal-limits",
        _stems("normal-theory; normal theory; normal approx; wald; 1.96; z-based; asymptotic"),
        near=True,
        confirm=r"normal[- ](?:theory|approx)|wald (?:interval|ci\b|limits|confidence|95)"
        r"|1\.96\s?(?:×|x|\*|se\b|times)|±\s?1\.96|z-based|asymptotic (?:interval|ci\b|confid|95)",
    ),
    Cue(
        "repeated-measures",
        _stems(
            "repeated measure; repeated-measure; within-subject; within subject; "
            "within-participant; within participant; within-person; within person; "
            "within-individual; rmcorr; paired; split-plot; split plot; crossover"
        ),
    ),
    Cue(
        "imputed",
        ("imputation", "imputed", "imputiert", "imputé", "imputado", "imputaç", "imputación"),
        spreads=True,
    ),
    Cue("rank-correlation", ("spearman", "kendall", "rank correlation", "rank-order"), near=True),
    Cue(
        "partialled",
        _stems(
            "partial r; partial corr; partial-corr; semipartial; semi-partial; partialled; "
            "partialling; partialed; partialing; part corr; controlling; controlled; "
            "adjusting for; adjusted for; after adjustment; holding; held constant; covariate"
        ),
        spreads=True,
        confirm=r"partial|part corr|controll(?:ing|ed) for|adjust(?:ing|ed|ment) for"
        r"|holding \w+|held constant|covariate",
    ),
    Cue(
        "resampled",
        _stems(
            "bootstrap; resampl; monte carlo; fisher's exact; exact test; exact p; "
            "exact binomial; bca"
        ),
    ),
    Cue(
        "resampled",
        _stems("bootstrap; resampl; monte carlo"),
        spreads=True,
        general=r"\bp\W{1,3}values?\b|\bsignifican|\binference"
        r"|(?:bootstrap\w*|resampling|monte carlo) (?:p\b|tests?|standard errors?|procedure)"
        r"|tested (?:by|with) (?:the |a )?(?:bootstrap|resampl|monte carlo)",
    ),
    Cue(
        "own-limits",
        _stems("bootstrap; resampl; monte carlo"),
        spreads=True,
        confirm=r"interval|\blimits\b|\bcis?\b",
    ),
    Cue(
        "resampled",
        _stems(
            "permut; permanova; adonis; anosim; mantel; mrpp; rda; dbrda; db-rda; redundancy; "
            "canonical corresp; randomization test; randomisation test; randomization p; "
            "randomisation p"
        ),
        spreads=True,
        general=ALL_TESTS + r"|p\W{1,3}values? (?:from|by|based)|assessed|obtained|tested",
        confirm=r"\bpermut|permanova|adonis|anosim|\bmantel\b(?![- –]haenszel)|mrpp"
        r"|\b(?:db-?)?rda\b|redundancy anal|canonical corresp|randomi[sz]ation (?:test|p)",
    ),
    Cue(
        "own-distribution",
        _stems(
            "kolmogorov; smirnov; k-s z; k–s z; ks z; dickey; adf; phillips-perron; "
            "phillips–perron; unit root; unit-root; kpss; bounds test; bounds-test; cointegr; "
            "johansen; studentised range; studentized range; lilliefors; fmax; f-max; hartley; "
            "supf; sup-f; quandt; andrews; rayleigh; kuiper; mean vector; ajne"
        ),
        near=True,
    ),
    Cue(
        "corrected-statistic",
        _stems("yates; continuity correct; rao-scott; rao–scott; satorra"),
    ),
)
