"""What the rows of a table are, by their labels."""

from __future__ import annotations

import re

from crossfoot.reading.tables.roles import plain

_FOOT = re.compile(r"\^\{(?:[a-z*†‡,]{1,3}|[13-9])\}|[*†‡]+$|\s?\([a-e]\)$|(?<=[a-z)])[¹³⁴](?=$)")
_INDEX = re.compile(r"^\(?\d{1,3}[.)]\s+")

_ERROR = re.compile(
    r"(?:pure\s|experimental\s|random\s|sampling\s)?(?:error|errors|residuals?|resid\.?|unexplained|deviations?)"
    r"(?:\s?(?:term|variance|variation|error|\(?within\)?|within|within\s(?:groups|cells)|\(?mse?\)?))?"
    r"|(?:within|residual|error)(?:[\s-](?:groups?|samples?|treatments?|cells?|subjects\serror))?(?:\s\(error\)|\s\(residual\))?"
    r"|(?:error|residuals?)\s?(?:\(.{1,40}\)|[×x:].{1,40}|[1-9ab]|between.{0,20}|within.{0,20})|w(?:ithin)?\.?\scells?"
    r"|(?:intra|within)[\s-]?groups?|fehler|residuen|rest|reststreuung|residual[\s-]?(?:streuung|fehler)|innerhalb(?:\s(?:der\s)?gruppen)?"
    r"|résidus?|résiduelles?|erreur|intra[\s-]?groupes?|residuos?|residual|dentro\s(?:de\s)?(?:los\s)?grupos|intra[\s-]?grupos?"
    r"|error\sexperimental|resíduos?|erro|dentro\sdos?\sgrupos?|residui|residuo|residua(?:l|le)?|residualvarians|feil|fejl|fel|hata|błąd|chyba|reszidu\w+|остат\w+|ошибка"
    r"|jäännös|virhe|inom\sgrupper|inden\sfor\sgrupper|innen(?:for)?\sgrupper|ryhmien\ssisä\w+|wewnątrz\sgrup"
    r"|uvnitř\sskupin|grup\siçi|внутри\sгрупп|集団内|群内|entro\si?\s?gruppi|errore|binnen\s(?:de\s)?groepen|residu"
    r"|inom\sgrupper|误差项?|机误|随机误差|处理内|组内|残差|誤差|오차|잔차|error\svariance|(?:.{1,40}\s?[×x*]\s?)?(?:subjects?|participants?|ss)\s(?:within|w\.?)\s?(?:groups?|cells)?"
)
#: The error within subjects, unless it is tested itself: then ``subject`` is a factor.
_BY_SUBJECTS = re.compile(r".{1,40}\s?[×x*]\s?(?:subjects?|participants?)")
_TOTAL = re.compile(
    r"(?:grand\s)?total(?:\s(?:variation|variance|ss|sum))?|sum|gesamt(?:variation)?|insgesamt|summe|totale?|totaal|totalt|i\salt|yhteensä|ogółem|razem|celkem|toplam|всего|итого|összesen|合计|总计|总和|总变异|总的|合計|全体|전체|합계"
)
_CORRECTED = re.compile(
    r"(?:corrected|cor(?:r)?\.?|c\.?|adjusted|mean[\s-]corrected)\s?total|total\s?\(?(?:corrected|corr\.?|adjusted|cor)\)?"
    r"|校正总?计|修正总?计|校正的?总计|korrigierte\s(?:gesamtvariation|gesamtsumme)|total\scorregid[oa]|total\scorrigé"
)
_UNCORRECTED = re.compile(
    r"(?:uncorrected|uncorr\.?|raw)\s?total|total\s?\(?(?:uncorrected|uncorr\.?)\)?"
)
_MODEL = re.compile(
    r"(?:overall\s|full\s|corrected\s)?model|regression(?:\smodel)?|(?:due\sto\s)?regression|explained|between(?:[\s-](?:groups?|samples?|treatments?|cells?))?"
    r"(?:\s\(combined\))?|(?:korrigiertes\s)?modell|modèle|modelo(?:\scorregido)?|modello|zwischen(?:\s(?:den\s)?gruppen)?|inter[\s-]?groupes?|entre\s(?:los\s)?grupos"
    r"|inter[\s-]?grupos|tra\s(?:i\s)?gruppi|tussen\s(?:de\s)?groepen|entre\sgrup[eo]s|mellan\sgrupper|mellem\sgrupper|mellom\sgrupper"
    r"|ryhmien\sväli\w+|między\sgrupami|mezi\sskupinami|gruplar\sarası|между\sгруппами|集団間|群間|组间|处理间|回归|모형|회귀"
)
_INTERCEPT = re.compile(
    r"(?:\(?\s?(?:intercept|constant|const\.?|_cons|cons|grand\smean|konstante|achsenabschnitt|constante|costante|intercepto|ordonnée\sà\sl'origine|截距|常数项|常量|常数|상수|절편)"
    r"\s?\)?)(?:\s?\((?:intercept|constant|a|β_?\{?0\}?|b_?\{?0\}?|α)\)|\s?[,:]?\s?(?:α|β_?0|a|b0))?|(?:β|b)_?\{?0\}?|alpha|α|a\s?\(intercept\)|\(?intercept\)?.{0,12}"
)
_SUB = re.compile(
    r"(?:linear|quadratic|cubic|quartic|lineal|contrast.{0,30}|polynomial.{0,20}|.{1,30}\svs\.?\s.{1,30}"
    r"|of\swhich.{0,30}|davon.{0,30}|[-–—•·]\s.{1,60}|c\d)(?:\s(?:trend|term|component|effect|contrast))?"
)
#: The residual of a regression with replicates falls into these two.
_LACK_OF_FIT = re.compile(
    r"lack[\s-]of[\s-]fit|non-?linearity|fehlende\sanpassung|mangelnde\sanpassung"
    r"|manque\sd'ajustement|falta\sde\s(?:ajuste|ajustamento)|失拟"
)
_PURE_ERROR = re.compile(r"pure\serror|reiner\sfehler|erreur\spure|error\spuro|erro\spuro|纯误差")
#: Correction of degrees of freedom that a row of a repeated-measures table names.
_CORRECTION = re.compile(
    r"sphericity\sassumed|greenhouse[\s–-]geisser|huynh[\s–-]feldt|lower[\s-]bound"
)


def label_of(text: str) -> str:
    """Return a row's label without footnote marks, in one line."""
    return " ".join(_FOOT.sub("", text).split()).strip(" :")


def kind_of(label: str) -> str:
    """Tell what a row of an analysis of variance is.

    ``error``, ``total``, ``corrected`` (total), ``uncorrected`` (total), ``model``,
    ``intercept``, ``part`` (of another row), ``blank`` or ``effect``.
    """
    low = plain(_INDEX.sub("", label)).lower().strip(" .:*")
    if not low:
        return "blank"
    if len(low) > 60:
        return "effect"
    for kind, pattern in (
        ("part", _LACK_OF_FIT),
        ("part", _PURE_ERROR),
        ("part", _SUB),
        ("corrected", _CORRECTED),
        ("uncorrected", _UNCORRECTED),
        ("total", _TOTAL),
        ("error", _ERROR),
        ("model", _MODEL),
        ("intercept", _INTERCEPT),
    ):
        if pattern.fullmatch(low):
            return kind
    return "effect"


def is_by_subjects(label: str) -> bool:
    """Say whether a row is the interaction of an effect with subjects."""
    return _BY_SUBJECTS.fullmatch(plain(label).lower().strip(" .:*")) is not None


def is_lack_of_fit(label: str) -> bool:
    """Say whether a row is what a model leaves of the differences between groups."""
    return _LACK_OF_FIT.fullmatch(label.lower().strip(" .:*-–—•·")) is not None


def is_pure_error(label: str) -> bool:
    """Say whether a row is the error within replicates."""
    return _PURE_ERROR.fullmatch(label.lower().strip(" .:*-–—•·")) is not None


def is_intercept(label: str) -> bool:
    """Say whether a row of coefficients is the intercept's."""
    low = _INDEX.sub("", label).lower().strip(" .:*")
    return len(low) <= 40 and _INTERCEPT.fullmatch(low) is not None


def correction_of(label: str) -> str:
    """Return the correction of degrees of freedom that a label names, or nothing."""
    found = _CORRECTION.search(label.lower())
    return found.group() if found else ""
