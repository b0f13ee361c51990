"""Words of many languages for what stands around the name of a quantity.

Each is a regular expression for use inside others; none takes a group.
"""

from __future__ import annotations

#: An effect size that leaves the other effects out, in the forms of several languages.
PARTIAL = r"(?:[pP]art(?:i[^\W\d_]{1,8}|\.)|[pP]ar[cz]ial\w{0,2}|část\w+|部分|부분|偏)"

#: Corrected for the number of predictors.
ADJUSTED = (
    r"(?:adj(?:usted|\.)?|angepasst\w*|bereinigt\w*|corrected|korrigiert\w*|korr\.|korrigerat?|korrigert|korrigeret|adjustiert\w*"
    r"|ajust[ée]\w*|ajust\.|ajusta[dt]\w*|aj\.|corretto|corr\.|corrigé\w*|corrigido|corregid\w*|aggiustat\w*|gecorrigeerd\w*|aangepast\w*"
    r"|juster\w*|adjustad\w*|korjattu|mukautettu|korrigált|módosított|調整済み?|调整后?的?|調整後?の?|修正后?的?|校正"
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
VALUE_BEFORE = r"(?:valeurs?|val[ou]re?s?|valori|valor)"

#: What stands between a name and its number instead of "=".
VERB = (
    r"(?:of|by|was|is|are|were|equals?|equal(?:led)?\sto|being|came\sto|comes\sto|reached|amount(?:s|ed)\sto"
    r"|von|war|ist|betrug|beträgt|liegt\sbei|lag\sbei|de|était|est\sde|était\sde|valait|vaut|est|égal\sà"
    r"|van|was|di|av|på|var|är|er|fue(?:\sde)?|fut|foi(?:\sde)?|è(?:\spari\sa)?|é(?:\sde)?|era|es(?:\sde)?|igual\sa|oli|on|bedroeg|bedraagt)"
)

#: The same in scripts without spaces.
VERB_UNSPACED = r"(?:为|為|是|は|が|는|은|达|:)"

#: Degrees of freedom.
DEGREES = (
    r"(?:(?i:d\.?\s?f\.?(?:'?s(?![a-z]))?|dof|degrees?\sof\sfreedom|grados\sde\slibertad|gradi\sdi\slibertà"
    r"|graus\sde\sliberdade|degrés\sde\sliberté|gdl)|ddl|g\.?\s?l\.?|FG|Freiheitsgrade?n?"
    r"|vrijheidsgraden|fri(?:hets|heds)grader|vapausast\w+|自由度|자유도)"
)

#: Standard errors, by name and by sign.
ERROR_NAMES = (
    r"Standardfehler|erreur[\s-]type|error\sestándar|error\stípico|erro[\s-]padrão|errore\sstandard"
    r"|standaardfout|standardfe(?:l|il|jl)|keskivirhe|标准误|標準誤差?|표준오차"
)
