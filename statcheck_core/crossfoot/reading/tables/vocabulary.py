"""What columns and rows are called: one declaration a role.

A role is the key of a quantity, or one of a few words for what needs its neighbours to be told:
``df`` (of what, the row says), ``wald``, ``label``, ``p_adjusted``, ``rss``, ``df_residual``,
``df_change`` (of the difference of two models), ``ratio`` (of hazards, risks, rates), ``R2_part``.
Names are compared without case, spaces, dots and hyphens; symbols of one or two letters keep
their case, because F, f, B, b, R and r differ.
"""

from __future__ import annotations

from typing import NamedTuple


class Role(NamedTuple):
    """The names of one role: ``symbols`` as they stand, ``words`` without case or spaces."""

    role: str
    symbols: str
    words: str


ROLES: tuple[Role, ...] = (
    Role(
        "ss",
        "SS SSQ SumSq SQ QS SC SCE KT KS",
        "sumofsquares sumsofsqs sumofsqs sumofsq"
        " sumsofsquares sumsq ssdiff sumsquares squares ssq typeiiisumofsquares"
        " typeiisumofsquares typeisumofsquares typeiiiss typeiiss typeiss seqss adjss anovass"
        " partialss quadratsumme quadratsummen summederquadrate sommedescarrés sommecarrés"
        " sumadecuadrados sommadeiquadrati somadosquadrados somadequadrados kwadratensom"
        " kvadratsumma 平方和 离均差平方和 제곱합"
        " summederabweichungsquadrate summequadrate sumacuadrados sumadecuadradostipoiii"
        " sommaquadrati devianza somaquadrados somvankwadraten somkwadraten kvadratsum"
        " neliösumma sumakwadratów součetčtverců karelertoplamı суммаквадратов négyzetösszeg"
        " 偏差平方和 変動",
    ),
    Role(
        "ms",
        "MS MSS MeanSq MQ CM QM KO GK MK",
        "meansquare meansquares meansqs meansq square adjms seqms mittelderquadrate"
        " mittlerequadratsumme"
        " carrémoyen carrésmoyens mediacuadrática cuadradomedio quadradomédio quadratomedio"
        " gemiddeldekwadraat 均方 平均平方 평균제곱"
        " mittleresquadrat mittlerequadrate mediadecuadrados mediacuadratica cuadradosmedios"
        " mediaquadratica mediadeiquadrati quadratimedi quadradosmédios quadradomedio"
        " medelkvadrat medelkvadratsumma middelkvadrat gjennomsnittskvadrat"
        " gennemsnitskvadrat keskineliö średnikwadrat średniakwadratów průměrnýčtverec"
        " karelerortalaması среднийквадрат",
    ),
    Role(
        "df",
        "df Df DF dl FG gl GL ddl gdl GdL",
        "df dof dfdiff approxdf approximatedf satterthwaitedf kenwardrogerdf welchdf adjusteddf"
        " adjdf estimateddf"
        " dfconstraint degreesoffreedom degreeoffreedom dfs freiheitsgrade"
        " freiheitsgrad fg"
        " degrésdeliberté degrésdeliberte gradosdelibertad grausdeliberdade gradidilibertà"
        " vrijheidsgraden frihetsgrader 自由度 자유도"
        " gradosdelibertad(gl) frihedsgrader frihetsgrad vapausasteet stopnieswobody"
        " stupněvolnosti serbestlikderecesi степенисвободы szabadságfok gradideliberta",
    ),
    Role(
        "df1",
        "DFn DFN ν1",
        "df1 numdf numeratordf dfnum dfn ddof1 dfmodel modeldf dfeffect dfbetween dfregression"
        " regressiondf dfconstraint hypothesisdf dfnumerator numdof dfhypothesis zählerdf",
    ),
    Role(
        "df2",
        "DFd DFD ν2",
        "df2 dendf denominatordf dfden dfdenom dfd ddof2 dferror dfresidual dfresiduals dfwithin"
        " errordf residualdf dfdenominator denomdf dendof residualdegreesoffreedom"
        " errordegreesoffreedom nennerdf dofresiduals",
    ),
    Role("df_change", "", "Δdf deltadf chidf dfchange changeindf dfdifference diffdf"),
    Role("df_residual", "", "resdf residdf dfresid residualdf(model)"),
    Role("rss", "RSS SSR SSE ssr", "residsumofsquares residualss"),
    Role(
        "F",
        "F F0",
        "fvalue fratio fstatistic fstat ftest fwert valeurf valeurdef valorf valoref fwaarde"
        " approxf fvärde f值 fcalculated fcalc fstatistics fobserved estadísticof"
        " fværdi fverdi farvo wartośćf fdeğeri fhodnota valoredif estatísticaf f比 f통계량",
    ),
    Role(
        "p",
        "P p",
        "pvalue pvalues pval sig significance significancef signif prob probability prob>f"
        " prob(f) pr(>f) pr>f p>f p(>f) p(f) pr(>|t|) pr>|t| p>|t| p(>|t|) prob>|t| pr(>|z|)"
        " pr>|z| p>|z| prob>|z| prob(>|t|) pr(>chisq) pr(>chi2) pr>chisq p>chi2 prob>chi2"
        " sig(2tailed) sig(twotailed) punc prob(fstatistic) pwert signifikanz valeurp valeurdep"
        " valorp valordep valorep pwaarde pvärde p值 pexact sigf signifof signifofp asympsig"
        " asympsig(2sided) p(2tailed) p(twotailed) p(twosided) p(2sided) puncorr fp sigoft"
        " pofoverallmodel asymptoticsignificance asymptoticsig exactsig exactsignificance"
        " pværdi pverdi parvo wartośćp pdeğeri phodnota pvalor valoredip significatività"
        " significación significância signifikans p값 有意確率 显著性 유의확률"
        " sig(bilateral) sig(2seitig) sig(zweiseitig) signifikanz(2seitig)"
        " sig(bilatérale) sig(2zijdig) pr(>fc)"
        " pvaluef fpvalue pcritique prf prt prz prchisq",
    ),
    Role(
        "p_adjusted",
        "",
        "padj adjp adjustedp padjusted pbonf pbonferroni ptukey pholm pfdr pbh phochberg pscheffe"
        " pvaluehs adjpvalue adjustedpvalue correctedp pcorr pcorrected sigb psidak pdunnett"
        " p(bonferroni) p(holm) p(adj) p(adjusted) p(corrected) p(tukey) p(fdr) p(bh) p(sidak)"
        " bonferronip holmp tukeyp fdrp bonferronicorrectedp holmcorrectedp bonferroniadjustedp"
        " holmadjustedp fdrcorrectedp fdradjustedp bhadjustedp pvalue(adjusted) pvalueadjusted",
    ),
    # Of corrected degrees of freedom, or of another kind: nothing follows for them from p.
    Role(
        "p_other",
        "q",
        "pgg phf pggepsilon pr(>f[gg]) pr(>f[hf]) p[gg] p[hf] qvalue",
    ),
    Role(
        "p_one",
        "",
        "p(1tailed) p(onetailed) sig(1tailed) sig(onetailed) p(onesided) p(1sided) onetailedp",
    ),
    Role("eta2", "η2 ɳ2", "η2 eta2 etasquared etasq esη2 <u+03b7>2 η^2"),
    Role(
        "eta2_partial",
        "",
        "ηp2 η2p partialeta2 partialetasquared partialη2 partetasq partialetasq np2 pes η2partial"
        " etap2 eta2p eta2(partial) η2(partial) petasquared <u+03b7>2p parη2 η2part parteta2",
    ),
    Role("phi", "φ ϕ", "phi phicoefficient"),
    Role("cramers_v", "V", "cramérsv cramersv cramérv cramerv"),
    # The F of the whole model, where another F stands beside it.
    Role(
        "F_model",
        "",
        "overallf modelf fullmodelf finalmodelf finalf fofmodel f(model) f(full) f(overall)"
        " f(fullmodel) f(finalmodel) ffull ffinal ftotal foverall totalf fforthemodel fformodel",
    ),
    Role("omega2", "ω2", "ω2 omega2 omegasquared omegasq"),
    Role(
        "b",
        "b B b̂",
        "estimate estimates est coef coeff coefs coefficient coefficients regressioncoefficient"
        " unstandardizedb unstandardisedb unstandardizedβ unstandardisedβ unstdb unstdβ"
        " unstandardizedcoefficient unstandardisedcoefficient unstandardizedcoefficients"
        " unstandardisedcoefficients unstandardizedcoefficientsb parameterestimate"
        " estimatedcoefficient slope regressionskoeffizient koeffizient koeffizienten schätzer"
        " schätzung coeficiente coefficiente coëfficiënt estimateb bestimate coefficientb"
        " coefficientestimate unstandardized unstandardised bunstandardized bweight 系数 回归系数"
        " loghr logor emmean lsmean emmeans lsmeans dy/dx ey/ex dy/ex ey/dx marginaleffect"
        " estimation estimación stima estimativa 계수 unstd"
        " coeficientes coefficienti koefficient koeffisient regressionskoefficient"
        " regressionskoeffizienten regresjonskoeffisient kerroin współczynnik koeficient"
        " katsayı коэффициент steigung schätzwert helling pendiente pente pendenza"
        " 推定值 非标准化系数 偏回帰係数 回帰係数 係数 非標準化係数 估计值 系数估计 비표준화계수"
        " 회귀계수 추정치",
    ),
    Role("β", "β ß β̂ β^", "beta"),
    Role(
        "beta",
        "",
        "stdbeta stdβ standardizedbeta standardisedbeta standardizedβ standardisedβ"
        " standardizedcoefficient standardisedcoefficient standardizedcoefficients"
        " standardisedcoefficients standardizedcoefficientsbeta standardizedcoefficientsβ"
        " stdcoef stdcoeff stdestimate betaweight standardized standardised"
        " standardizedestimate standardisedestimate βstandardized βstandardised bstandardized"
        " 标准化系数 stdall betastd"
        " standardisierterkoeffizient standardisiertekoeffizienten"
        " standardisierteskoeffizient standardisiertesbeta coeficienteestandarizado"
        " coefficientstandardisé bêta standardiserad"
        " standardisertkoeffisient 標準化係数 標準偏回帰係数"
        " 标准化回归系数 표준화계수",
    ),
    Role(
        "se",
        "SE se S.E. s.e. EE EP",
        "stderror standarderror stderr standarderr sterr seb seβ sebeta se(b) se(β) se(beta) bse"
        " stderrorb standarderrorb stderrors standarderrors standardfehler stdfehler erreurtype"
        " errortípico errorestándar errorestandar errestándar errorestd errorestd"
        " errorestándarb errorestandard erropadrão errorestandar"
        " errorestándard errorest standaardfout"
        " medelfel 标准误 标准误差 seestimate seofb seest sterror asymptoticstderr 표준오차"
        " se(coef) robustse(coef) loghrse"
        " unstandardizedcoefficientsstderror unstandardizedcoefficientsse secoef secoeff"
        " erreurstandard erreursstandard errortipico erroretipico erropadrao standardfel"
        " standardfejl standardfeil keskivirhe błądstandardowy błądstd standarthata"
        " směrodatnáchyba стандартнаяошибка 標準誤差 標準誤"
        " desvtípica éctype",
    ),
    Role(
        "se_robust",
        "",
        "robustse robuststderror robuststandarderror robuststderr hcse"
        " clusteredse clusterse clusteredstandarderror",
    ),
    Role(
        "t",
        "t T",
        "tvalue tstat tstatistic tstatistics tratio ttest twert valeurt valeurdet valort valoret"
        " twaarde tvärde t值 studentt studentst tforh0 tforh0:parameter=0 tvalues"
        " tværdi tverdi tarvo wartośćt tdeğeri thodnota valoredit estadísticot estatísticat"
        " statistiquet t값 t통계량"
        " rapportot tquotient tdestudent tstudenta razãot",
    ),
    Role("z", "z Z", "zvalue zstat zstatistic zratio waldz zwert valeurz zvalues ztest"),
    Role(
        "wald",
        "",
        "wald waldχ2 waldchi2 waldchisquare waldchisquared waldchisq waldstatistic"
        " wald(χ2) waldtest",
    ),
    Role(
        "chi2",
        "χ2 X2 H Q G Δχ2 χ2diff G2",
        "kruskalwallis kruskalwallish hstatistic hstat htest hvalue cochranq cochransq friedmanχ2"
        " kruskalwallisχ2 gstatistic likelihoodratioχ2 lrtχ2"
        " Δχ2 changeinχ2 χ2change χ2difference likelihoodratio lrstatistic"
        " χ2 chi2 chisquare chisquared chisq lrchisq lrχ2 lrchi2 χ2value chisquarevalue pearsonχ2",
    ),
    Role("r", "r", "pearsonr pearsonsr correlation correlationcoefficient cor"),
    Role(
        "ci_low",
        "LL LB LCI LCB LCL LLCI CILL",
        "lower lowerbound lowerlimit lower95% cilower lowerci conflow cilow"
        " lowercl lcl lowercibound confintlow confintlower lowerconfint"
        " lower95%ci lo95 low 95%cilower 95%lower 95%cill cill lower2.5%"
        " 2.5% 0.025 [0.025 untergrenze limiteinférieure límiteinferior 95%cilow 95%cill lwr"
        " 95%confidenceintervallowerbound 95%cilowerbound lowerlimitof95%ci q2.5 cil"
        " unteregrenze limiteinferior limiteinferiore borneinférieure borneinf liminf linf"
        " ondergrens undregräns nedregräns nedregrænse nedregrense 下限 하한",
    ),
    Role(
        "ci_high",
        "UL UB UCI UCB UCL ULCI CIUL",
        "upper upperbound upperlimit upper95% ciupper upperci confhigh cihigh"
        " uppercl ucl uppercibound confintupp confintupper upperconfint"
        " upper95%ci hi95 high 95%ciupper 95%upper ciul upper97.5% 97.5%"
        " 0.975 0.975] obergrenze limitesupérieure límitesuperior 95%cihigh 95%ciul upr"
        " 95%confidenceintervalupperbound 95%ciupperbound upperlimitof95%ci q97.5 ciu"
        " oberegrenze limitesuperior limitesuperiore bornesupérieure bornesup limsup lsup"
        " bovengrens övregräns øvregrænse øvregrense 上限 상한",
    ),
    Role(
        "odds_ratio",
        "OR aOR AOR",
        "oddsratio oddsratios or exp(b) exp(β) expb exp(beta) aor"
        " adjustedor adjustedoddsratio exp(coef) exp(estimate) oddsratioexp(b) oddsratio(or)",
    ),
    # Ratios that are no odds ratios: of hazards, risks, rates, prevalences or means.
    Role(
        "ratio",
        "HR aHR AHR HRadj sHR SHR csHR RR aRR ARR IRR aIRR PR aPR APR RRR TR GMR",
        "hazardratio hazardratios hazardsratio riskratio rateratio relativerisk relativerisks"
        " incidencerateratio incidentrateratio prevalenceratio adjustedhazardratio adjustedhr"
        " adjustedrr adjustedriskratio adjustedrelativerisk adjustedpr adjustedirr"
        " subdistributionhazardratio relativeriskratio timeratio ratioofmeans geometricmeanratio"
        " ratioofgeometricmeans hazardratio(hr) relativerisk(rr) rateratio(rr) riskratio(rr)"
        " incidencerateratio(irr) prevalenceratio(pr) crudehr crudehazardratio unadjustedhr",
    ),
    Role("vif", "VIF", "vif gvif varianceinflationfactor"),
    Role("tolerance", "", "tolerance tol toleranz"),
    Role(
        "R",
        "R",
        "multipler multiplerkorrelationskoeffizient multiplecorrelation"
        " multiplecorrelationcoefficient",
    ),
    Role(
        "R2",
        "R2 r2",
        "rsquare rsquared rsq multiplersquared multiplersquare multipler2 r2value"
        " coefficientofdetermination determinationcoefficient r2total totalr2 bestimmtheitsmaß"
        " r平方 r方 cumulativer2 overallr2 modelr2 unadjustedr2"
        " rquadrat rcuadrado rquadrato rquadrado rkvadrat rkwadraat rcarré rdeux"
        " coeficientededeterminación 決定係数 决定系数 결정계수"
        " rquadro rkwadrat",
    ),
    Role(
        "R2_adj",
        "R̄2 R2a Ra2",
        "adjustedr2 adjr2 r2adj adjustedrsquare adjustedrsquared adjrsquare adjrsquared r2adjusted"
        " adjrsq rsqadj rsq(adj) rsquareadj rsquaredadj adjustedrsq r2(adj) r2(adjusted) r2corr"
        " adjustedr korrigiertesr2 r2korr korrr2 r2ajusté r2ajustado r2aj adjusteddr2 r2corretto"
        " 调整后r2 调整r2 调整的r2 r2adj. rsquare(adj) adjustedmultipler2 rsquared(adj)"
        " korrigiertesrquadrat angepasstesr2 adjustiertesr2 rcuadradocorregida"
        " rcuadradoajustado rcuadradocorregido r2ajustada r2corrigé r2aggiustato justeradr2"
        " justeratr2 justeretr2 justertr2 aangepaster2 gecorrigeerder2 skorygowaner2"
        " düzeltilmişr2 自由度調整済みr2 調整済みr2 自由度調整済み決定係数 校正r2 수정된r2"
        " 조정된r2"
        " rquadrocorretto rquadradoajustado skorygowanyrkwadrat adjustiertesbestimmtheitsmaß"
        " korrigiertesbestimmtheitsmaß rdeuxajusté angepasstesrquadrat",
    ),
    Role(
        "R2_change",
        "ΔR2 dR2",
        "Δr2 r2change rsquarechange rsquaredchange changeinr2 deltar2 r2increment changeinrsquare"
        " changeinrsquared incrementalr2 r2inc incrementinr2 r2Δ rsqchange ∆r2 r2δ δr2 r2chg",
    ),
    Role("R2_part", "", "partialr2 partialrsquare partialrsquared partialrsq"),
    Role(
        "F_change",
        "ΔF dF",
        "Δf fchange changeinf fforchange deltaf fforr2change fforchangeinr2 fforΔr2 finc fforδr2"
        " δf fofchange partialf fΔ fδ f(change) f(Δr2) f(δr2) incrementalf",
    ),
    Role(
        "p_change",
        "",
        "sigfchange pforchange pchange pforΔr2 pforδr2 p(Δr2) p(δr2) p(change)"
        " pofchange pΔr2 pδr2 pforfchange pforr2change pfchange",
    ),
    Role(
        "s",
        "S SEE RSE RMSE",
        "rmse rse see rootmse residualstandarderror residualstderror residualse residualstderr"
        " stderroroftheestimate standardfehlerdesschätzers standarderroroftheestimate"
        " stderrorofestimate"
        " standarderrorofestimate sigma seoftheestimate seofestimate seofregression"
        " rootmeansquareerror"
        " rootmeansquarederror residualstandarddeviation residsd residstderror",
    ),
    Role(
        "n",
        "N n",
        "observations includedobservations obs numberofobs numberofobservations noobservations"
        " noofobs numobs nobs numbobs noofobservations samplesize cases noofcases numberofcases"
        " casesincluded nobservations observationsn n(listwise) 观测值 样本量 样本数"
        " anzahlbeobachtungen beobachtungen observaciones osservazioni observações n(obs) 관측수"
        " fälle beobachtungszahl numérodeobservaciones númerodeobservaciones"
        " nombredobservations 標本数 サンプルサイズ 표본수",
    ),
    Role(
        "label",
        "",
        "source sourceofvariation variable variables predictor predictors term terms parameter"
        " effect effects factor factors model models step steps covariate covariates"
        " independentvariable independentvariables iv ivs sourceofvariance component measure"
        " metric item contrast quelle varianzquelle fuente parameters explanatoryvariable"
        " explanatoryvariables variationsource modelterm 变量 变异来源 来源 block"
        " fuentedevariación fuentedevariacion sourcedevariation fontedevariação"
        " fontedivariazione fonte fv källa variationskälla kilde bron źródło zdroj kaynak"
        " источник prädiktor prädiktoren prédicteur prédicteurs predictora predictores"
        " preditor preditores predittore predittori prediktor prediktorer variabel variabele"
        " variabile variabili variável variáveis muuttuja zmienna değişken переменная faktor"
        " faktoren facteur facteurs fattore fator effekt effet efecto effetto efeito 変数 説明変数"
        " 独立変数 要因 変動要因 自变量 因素 변인 변수 요인",
    ),
    Role("statistic", "", "statistic teststatistic"),
    Role("mean", "M", "mean means m"),
    Role("sd", "SD", "sd stddev standarddeviation stdev"),
)
