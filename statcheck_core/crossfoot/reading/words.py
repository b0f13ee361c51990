"""Words of many languages for what stands around the name of a quantity.

Each is a regular expression for use inside others; none takes a group.
"""

from __future__ import annotations

#: An effect size that leaves the other effects out, in the forms of several languages.
PARTIAL = r"(?:[pP]art(?:i[^\W\d_]{1,8}|\.)|[pP]ar[cz]i[aá]l\w{0,3}|část\w+|部分|부분|偏)"

#: Corrected for the number of predictors.
ADJUSTED = (
    r"(?:adj(?:usted|\.)?|angepasst\w*|bereinigt\w*|corrected|korrigiert\w*|korr\.|korrigerat?|korrigert|korrigeret|adjustiert\w*"
    r"|ajust[ée]\w*|ajust\.|ajusta[dt]\w*|aj\.|aj(?![a-z])|corretto|corr\.|corrigé\w*|corrigido|corregid\w*|aggiustat\w*|gecorrigeerd\w*|aangepast\w*"
    r"|juster\w*|adjustad\w*|korjattu|mukautettu|korrigált|módosított|(?:自由度)?調整済み?|调整后?的?|調整後?の?|修正后?的?|校正"
    r"|수정된?|조정된?|düzeltilmiş|skorygowan\w*|upraven\w*|korigovan\w*|hiệu\schỉnh|скорр?ектированн\w*|скоригован\w*)"
)

#: The analogues of R² for models that are not fitted by least squares, and R² of other samples.
PSEUDO = (
    r"(?:pseudo|Nagelkerke(?:'s)?|McFadden(?:'s)?|Cox\s?(?:&|and|-)\s?Snell|marginal|conditional"
    r"|cross-validated|within|between|predicted|CV|test|validation|generali[sz]ed|Tjur(?:'s)?"
    r"|Efron(?:'s)?|deviance)"
)

#: A second fit against a first.
CHANGED = (
    r"(?:(?:change|increase|increment|gain|rise)\s(?:in|of)|Δ|incremental"
    r"|(?:increas|rais|improv)\w*\s?(?:the)?)"
)

#: "value" in names such as "p value", "F-Wert", "valor p".
VALUE = (
    r"(?:values?|Werte?s?|waarden?|v[äæ]rde(?:[tn]|rna)?|verdi(?:en|er)?|værdi(?:en|er)?"
    r"|arvo|[値值]|값)"
)
VALUE_BEFORE = (
    r"(?:valeurs?|val[ou]re?s?|valori|valor|esta[dt][ií]stic[oa]|statisti(?:que|ca|k)|Prüfgröße)"
)

#: What stands between a name and its number instead of "=".
VERB = (
    r"(?:(?:is|was|est|è|es|é|foi|fue|wird|wurde|är|er)\s(?:estimated\sat|estimée?\sà|stimat[oa]\s(?:a|in)|estimad[oa]\se[mn]|auf)"
    r"|of|by|was|is|are|were|equals?|equal(?:led)?\sto|being|came\sto|comes\sto|reached|amount(?:s|ed)\sto"
    r"|von|war|ist|betrug|beträgt|liegt\sbei|lag\sbei|de|était|est\sde|était\sde|valait|vaut|est|(?:è|es|é|fue|foi)\sdel|égal\sà"
    r"|van|was|di|av|på|var|är|er|fue(?:\sde)?|fut|foi(?:\sde)?|è(?:\spari\sa)?|é(?:\sde)?|era|es(?:\sde)?|igual\sa|oli|on|bedroeg|bedraagt|blev|ble|wurde|resultó|risulta|resultou)"
)

#: The same in scripts without spaces.
VERB_UNSPACED = r"(?:(?:分别|分別|均|都|各)?(?:为|為|是|は|が|는|은|达|:)(?:それぞれ|ともに)?)"

#: Degrees of freedom.
DEGREES = (
    r"(?:(?i:d\.?\s?f\.?(?:'?s(?![a-z]))?|d\.?o\.?f\.?(?![a-z])|degrees?\sof\sfreedom|grados\sde\slibertad"
    r"|gradi\sdi\slibertà|graus\sde\sliberdade|degrés\sde\sliberté|grade\sde\slibertate|gdl)"
    r"|d\.?\s?d\.?\s?l\.?(?![a-zà-ÿ])|d\.?l\.?(?=\s?[=:,)])|g\.?\s?l\.?|FG|F\.G\.|f\.\s?g\.|fg(?=\s?=)|Freiheitsgrade?n?"
    r"|vrijheidsgraden|graden\svan\svrijheid|fri(?:hets|heds)gra(?:der|d)|vapausast\w+"
    r"|stup\w{1,3}\s(?:volnosti|voľnosti)|stop\w{2,6}\s(?:swobody|slobode)"
    r"|sd(?=\s?=\s?\d)|bậc\stự\sdo|степен\w{1,3}\s(?:свободы|свободи)|自由度|자유도)"
)

#: Standard errors, by name and by sign.
ERROR_NAMES = (
    r"Standardfehler|medelfel|erreur[\s-](?:type|standard)|error\s(?:est[áa]ndar|típico)|erro[\s-]padrão|errore\s(?:standard|tipico)|błąd\sstandardowy|standart\shata|směrodatná\schyba|стандартная\sошибка"
    r"|standaardfout|standardfe(?:l|il|jl)|keskivirhe|标准误|標準誤差?|표준오차"
)

#: A coefficient of a regression, by its name or as a slope.
COEFFICIENT = (
    r"(?:(?:regression\s)?coef(?:f?\.|f|ficients?)?"
    r"|(?:Regressions)?[Kk]oeffizient(?:en)?|Regressionsgewicht|Steigung|pente|coefficiente|pendenza"
    r"|coeficiente|pendiente|inclinação|(?:regressie|richtings)?coëfficiënt|helling(?:sgetal)?"
    r"|(?:regressions|riktnings|hældnings)?koe(?:fficient|ffisient)(?:en)?|lutning(?:en)?|hældning(?:en)?"
    r"|stigningstall(?:et)?|(?:regressio|kulma)kerroin|współczynnik|koeficient|směrnice"
    r"|(?:regresyon\s)?katsayısı|коэффициент|(?:回归|迴歸|回帰|偏回帰)[系係]数|斜率|傾き|회귀계수|기울기)"
)

_LESS = (
    r"(?:less|lower|smaller|kleiner|geringer|niedriger|inf[ée]rieure?s?|inferior(?:es|i|e)?|menor(?:es)?"
    r"|minor[ei]|lager|mindre|lägre|lavere|mniejsz\w|menší|pienempi)"
)
_MORE = (
    r"(?:greater|larger|higher|more|größer|höher|sup[ée]rieure?s?|superior(?:es|i|e)?|mayor(?:es)?"
    r"|maior(?:es)?|maggior[ei]|groter|hoger|større|större|högre|højere|høyere|większ\w|větší|suurempi)"
)
_THAN = r"(?:than|als|dan|do\sque|que|à|a|di|än|end|enn|niż|než|kuin)"

#: Words that stand for "<" and for ">".
BELOW = rf"(?:{_LESS}\s{_THAN}|below|under|unter|unterhalb|小于|小於|低于|未満)"
ABOVE = rf"(?:{_MORE}\s{_THAN}|above|over|über|oberhalb|大于|大於|高于)"

#: Words that say of one number that it is of several tests.
ALL = (
    r"(?:(?:both|all|each|beide[nr]?|alle[nr]?|jeweils|jew\.|les\sdeux|tou(?:te)?s|amb[oa]s|tod[oa]s|entramb[ie]"
    r"|tutt[ie]|båda|samtliga|begge)(?:\s(?:the|les|los|las|os|as|i|le|die|de|deux|drei|three|trois|tres|tre|drie))?"
    r"|均|都|いずれも|すべて|ともに|모두)"
)

#: Words that deal numbers out in order.
RESPECTIVELY = (
    r"(?:respectively|beziehungsweise|bzw|respectivement|respectivamente|rispettivamente"
    r"|respectievelijk|respektive|henholdsvis|odpowiednio|分别|分別|それぞれ|각각)"
)

#: What stands between the limits of an interval.
TO = r"(?:to|and|und|bis|à|et|a|al?|tot|til|till|y|e|en|och|og|do|až|至|到|から|~)"

#: "squared" in names such as "R-Quadrat", "chi deux", "eta cuadrado".
SQUARE = (
    r"(?:squared?|sq\.?|deux|carr[ée]e?|quadrat[oi]?|quadrado|quadro|cuadrad[oa]|kwadraat|kwadrat"
    r"|kva?drat|kvadrát|négyzet|neliö|två)"
)

#: "calculated" behind the name of a statistic.
COMPUTED = (
    r"(?:calc(?:ulated|ulado|ulada|olato|ulé|\.)?|cal\.?|computed|obtained|observed|berechnet"
    r"|empirisch|berekend|obtenido)(?![a-z])"
)

#: A confidence interval, by its name or its initials.
INTERVAL = (
    r"(?:CIs?|CLs?|KI|IC|BI|PU|GA|LV|confidence\s(?:intervals?|limits?)|Konfidenzintervall|Vertrauensintervall"
    r"|[iI]ntervalle?\sde\sconfiance|[iI]ntervalo\sde\sconfian[zç]a|[iI]ntervallo\sdi\sconfidenza"
    r"|betrouwbaarheidsinterval|[kK]onfidensintervall?|luottamusväli|przedział\sufności"
    r"|interval\sspolehlivosti|güven\saralığı|доверительный\sинтервал|信頼区間|(?:置信|信赖)区间|신뢰구간)"
)

#: What leads from the name of a quantity to what it is of.
OF = (
    r"(?:for|of|on|between|in|für|von|der|des|zwischen|bei|pour|sur|de|du|entre|para|da|do|del"
    r"|dell[ao']|di|tra|fra|voor|van|tussen|för|av|mellan|af|mellem|mellom)"
)

#: Verbs between what a quantity is of and its number.
COPULA = (
    r"(?:was|is|were|equal(?:s|led)|war|ist|betrug|beträgt|lag\sbei|est|était|vaut|valait|es|fue|era"
    r"|foi|é|è|bedroeg|bedraagt|var|är|er|oli|on|blev|ble|wynosi|wynosił|byl)"
)

#: What changed by the number that follows.
CHANGED_BY = (
    r"(?:\b(?:stieg|sank|fiel|wuchs|nahm|sinkt|steigt|erhöh|verringer|vermind|verkürz|augment|aument"
    r"|diminu|dismin|rédui|redu[cz]|crec|cresc|ökade|minskade|steg|økte|sank|faldt|falt|steeg|daalde)"
    r"[^\W\d]*(?:\s[^\W\d]+){0,5}\s(?:um|de|en|di|em|med|met))"
)

#: The coefficient of determination, by its name.
DETERMINATION = (
    r"(?:coefficient\sof\sdetermination|Bestimmtheitsmaß|coeficiente\sde\sdetermina(?:ción|ção)"
    r"|coefficiente\sdi\sdeterminazione|coefficient\sde\sdétermination|determinatiecoëfficiënt"
    r"|determinationskoefficient(?:en)?|forklaringsgrad(?:en)?|förklaringsgrad(?:en)?|selitysaste"
    r"|współczynnik\sdeterminacji|koeficient\sdeterminace|決定係数|决定系数|결정계수)"
)

#: A correlation, by its name.
CORRELATION = (
    r"(?:(?:coefficient\sde\s)?corrélation|(?:coeficiente\sde\s)?correla(?:ción|ção)"
    r"|(?:coefficiente\sdi\s)?correlazione|(?:Rang)?[Kk]orrelation(?:skoeffizient|skoefficient|en)?(?:en)?"
    r"|correlatie(?:coëfficiënt)?|korrelasjon(?:skoeffisient)?(?:en)?|korrelaatio(?:kerroin)?"
    r"|(?:współczynnik\s)?korelacj[ai]|相关系数|相関係数|상관계수)"
    r"(?:\s(?:(?:de|di|von|nach|van|av|af)\s)?(?:Pearson|Spearman))?"
)

#: The probability of a test's result, by its name.
SIGNIFICANCE = r"(?:有意確率|显著性|유의확률|Überschreitungswahrscheinlichkeit|overschrijdingskans)"
