"""What is printed of whole models: R², F and the number of cases, in rows, columns or pairs."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.columns import labels_of, name_of
from crossfoot.reading.tables.contents import Content, Number, content_of
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.headings import NOTHING, Heading
from crossfoot.reading.tables.making import Column, Found, Sheet, claim, marked, reading
from crossfoot.reading.tables.steps import CHANGE, Entry, Model, parted, whose_test

#: Roles that speak of a model and of nothing else.
FIT = frozenset(
    {
        "R",
        "R2",
        "R2_adj",
        "R2_change",
        "F",
        "F_change",
        "F_model",
        "p_change",
        "s",
        "n",
        "df1",
        "df2",
    }
)
_STRONG = frozenset({"R2", "R2_adj", "R2_change", "F", "F_change", "F_model"})
_TESTS = frozenset({"F", "F_change", "F_model"})
_SHARES = frozenset({"R2", "R2_adj", "R2_change", "R"})


#: The label of a row that starts a step.
_STEP = re.compile(r"(?:step|block|model|stage|schritt|étape|paso)\b", re.IGNORECASE)


def is_fit(label: str) -> bool:
    """Say whether the label of a row names something of the whole model."""
    roles = headings.parse_label(label).roles
    return bool(roles) and roles[0] in FIT and not _is_letter(label)


def _is_letter(label: str) -> bool:
    """Say whether a label is a letter that may name a variable as well."""
    return len(label.strip()) == 1 and label.strip() not in "NnF"


def fit_rows(sheet: Sheet, groups: Sequence[Sequence[Column]], names: Sequence[str]) -> Found:
    """Return the models that the last rows of a table tell of, one for each group of columns.

    Parameters
    ----------
    sheet
        The panel.
    groups, names
        The columns of each model, and what it is called.
    """
    labels = labels_of(sheet.panel, sheet.columns)
    entries: list[list[Entry]] = [[] for _ in groups]
    contexts: list[list[str]] = [[] for _ in groups]
    rows: set[int] = set()
    after_fit = False
    for index, row in enumerate(sheet.panel.rows):
        words = [row[c.number] for c in labels if row[c.number].text]
        label = " ".join(box.text for box in words)
        heading = headings.parse_label(label)
        if heading.roles == ("df",):
            # Two numbers are those of F; of one it is not known whose it is.
            heading = heading._replace(roles=("df1", "df2")) if _are_pairs(row, groups) else NOTHING
        elif not (is_fit(label) or (after_fit and heading.roles == ("p",))):
            continue
        after_fit = True
        head = words[0] if words else row[0]
        for number, group in enumerate(groups):
            cells = [row[c.number] for c in group if row[c.number].text]
            for box in cells[:1]:
                found = entries_of(sheet, heading, head, box, contexts[number])
                entries[number] += found
                if found:
                    rows.add(index)
    models = [
        Model(name, tuple(found), tuple(entry.box for entry in found), tuple(said))
        for name, found, said in zip(names, entries, contexts, strict=True)
    ]
    return Found(tuple(model_claims(sheet, models, with_coefficients=True)), frozenset(rows))


def _are_pairs(row: tuple[Box, ...], groups: Sequence[Sequence[Column]]) -> bool:
    """Say whether the cells of a row hold two numbers each."""
    texts = [row[c.number].text for group in groups for c in group if row[c.number].text]
    return bool(texts) and all(
        (content := content_of(text)) is not None and len(content.numbers) == 2 for text in texts
    )


def entries_of(
    sheet: Sheet, heading: Heading, head: Box, box: Box, contexts: list[str]
) -> list[Entry]:
    """Return what a cell says of a model under a heading that stands in ``head``."""
    content = content_of(box.text, box.start)
    if content is None or not heading.roles:
        return []
    found: list[Entry] = []
    numbers = content.numbers
    if len(numbers) > len(heading.roles) and not (heading.roles[0] in _TESTS and len(numbers) == 3):
        numbers = content.plain if len(content.plain) <= len(heading.roles) else ()
    for role, number in zip(heading.roles, numbers, strict=False):
        quantity = {"p_change": "p", "F_model": "F"}.get(role, role)
        read = reading(sheet, number, quantity, percent=heading.percent)
        if read is not None and _possible(role, read):
            found.append(Entry(role, read, box))
    found += _degrees(sheet, heading, head, content, box)
    p = None if content.p is None else reading(sheet, content.p, "p")
    if p is not None:
        found.append(Entry("p", p, box))
    mark, default = marked(sheet, content)
    if mark is not None and heading.roles[0] in {*_TESTS, "R2", "R2_adj", "R2_change"}:
        change = heading.roles[0] in CHANGE
        found.append(Entry("p_change" if change else "p", mark, box))
        contexts += ["default-stars"] if default else []
    contexts += heading.contexts
    return found


def _possible(role: str, found: Reading) -> bool:
    """Say whether a number can be meant as such, if perhaps misprinted."""
    if role in {"R2", "R2_adj", "R2_change", "R"}:
        return found.low <= 1.5 and found.high >= -1.0
    if role in {"p", "p_change"}:
        return found.low <= 1.5 and found.high >= 0
    return found.high >= 0


def _degrees(sheet: Sheet, heading: Heading, head: Box, content: Content, box: Box) -> list[Entry]:
    """Return the degrees of freedom that stand in the cell, or in its heading."""
    role = heading.roles[0]
    numbers: tuple[Number, ...] = content.df
    if not numbers and role in _TESTS and len(content.enclosed) == 2:
        numbers = content.enclosed
    if not numbers and content.numbers and heading.df:
        numbers = tuple(
            n._replace(start=n.start + head.start, end=n.end + head.start) for n in heading.df
        )
    names = ("df1", "df2") if role in _TESTS else ("df2",) if role == "s" else ()
    if role == "s":
        numbers = numbers[:1]
    return [
        Entry(name, found, box)
        for name, number in zip(names, numbers, strict=False)
        if (found := reading(sheet, number, name)) is not None
    ]


#: Headings of what tells how well a program classifies.
_OF_CLASSIFIER = re.compile(
    r"\bF1\b|\bprecision\b|\brecall\b|\baccuracy\b|\bdropout\b", re.IGNORECASE
)


def fit_columns(sheet: Sheet, *, beside_coefficients: bool = False) -> Found:
    """Return the models that rows tell of under headings such as R² and ΔF."""
    roles = (
        FIT - {"n", "df1", "df2", "R"} if beside_coefficients else FIT | {"p", "df", "statistic"}
    )
    columns = _of_selection(
        [c for c in sheet.columns if c.heading.roles and c.heading.roles[0] in {*roles, "R2_part"}]
    )
    if not any(c.heading.roles[0] in _STRONG for c in columns) or _OF_CLASSIFIER.search(
        sheet.words
    ):
        return Found(())
    labels = labels_of(sheet.panel, sheet.columns)
    models: list[Model] = []
    rows: set[int] = set()
    for index, row in enumerate(sheet.panel.rows):
        words = tuple(row[c.number] for c in labels if row[c.number].text)
        label = name_of(row, labels)
        entries: list[Entry] = []
        contexts: list[str] = []
        for column in columns:
            heading = column.heading
            if heading.roles == ("df",):
                heading = heading._replace(roles=_pair_or_one(row[column.number].text))
            elif heading.roles == ("statistic",):
                heading = heading._replace(roles=("F",))  # that of the whole model
            entries += entries_of(sheet, heading, column.box, row[column.number], contexts)
        if entries:
            boxes = (*words, *(entry.box for entry in entries))
            models.append(Model(label, tuple(entries), boxes, tuple(contexts)))
            rows.add(index)
    claims = model_claims(sheet, models, with_coefficients=beside_coefficients)
    return Found(tuple(claims), frozenset(rows) if claims else frozenset())


def _of_selection(columns: list[Column]) -> list[Column]:
    """Take the part that each step adds for ΔR², where the R² of the model stands beside it."""
    roles = {column.heading.roles[0] for column in columns}
    if not {"R2_part", "R2"} <= roles:
        return [column for column in columns if column.heading.roles[0] != "R2_part"]
    renamed = {"R2_part": "R2_change", "F": "F_change"}
    return [
        c._replace(heading=c.heading._replace(roles=(renamed.get(role, role),)))
        if (role := c.heading.roles[0]) in renamed and len(c.heading.roles) == 1
        else c
        for c in columns
    ]


def steps_in(sheet: Sheet) -> list[tuple[int, str]]:
    """Return the rows that tell of a step and nothing else, where its predictors stand below.

    Each with the label under which :func:`fit_columns` tells of it.
    """
    found = fit_columns(sheet, beside_coefficients=True)
    labels = labels_of(sheet.panel, sheet.columns)
    told = {claim.label for claim in found.claims}
    steps: list[tuple[int, str]] = []
    for index in sorted(found.rows):
        label = name_of(sheet.panel.rows[index], labels)
        if label in told and _STEP.match(label):
            steps.append((index, label))
    return steps


def _pair_or_one(text: str) -> tuple[str, ...]:
    """Return what a cell under ``df`` holds: both degrees of freedom, or the model's."""
    content = content_of(text)
    return ("df1", "df2") if content is not None and len(content.numbers) == 2 else ("df1",)


def model_claims(
    sheet: Sheet, models: Sequence[Model], *, with_coefficients: bool = False
) -> list[Claim]:
    """Return the claims of models, each step with the R² of the step before it."""
    claims: list[Claim] = []
    before: Reading | None = None
    whose = whose_test(models)
    for model in models:
        for part in parted(model, whose):
            roles = {entry.role for entry in part.entries}
            if not (_tells(roles, with_coefficients) or _tells_beside(roles, sheet.words)):
                continue
            change = bool(roles & CHANGE)
            given = (before._replace(term="reduced"),) if change and before is not None else ()
            readings = [entry.reading for entry in part.entries]
            label = model.label or sheet.title or ("step" if change else "model")
            claims.append(
                claim(
                    sheet,
                    "model-change" if change else "overall-model",
                    label,
                    readings,
                    part.boxes,
                    row=model.label,
                    contexts=part.contexts,
                    given=given,
                )
            )
        before = next((e.reading for e in model.entries if e.role == "R2"), before)
    return claims


def _tells(roles: set[str], with_coefficients: bool) -> bool:
    """Say whether what is printed makes a result: R² alone, or beside an error, does not."""
    if not roles & _STRONG or len(roles) < 2:
        return False
    return with_coefficients or bool(roles & (_STRONG - {"R2"})) or bool(roles & {"R", "p"})


_ANALYSIS = re.compile(r"sum\sof\ssq|corrected\stotal|mean\ssq|analysis\sof\svar", re.IGNORECASE)


def _tells_beside(roles: set[str], words: str) -> bool:
    """Say whether R² and the residual error stand with an analysis of variance."""
    return {"R2", "s"} <= roles and _ANALYSIS.search(words) is not None
