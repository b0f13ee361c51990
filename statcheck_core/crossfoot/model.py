"""The records that flow through Crossfoot: small, immutable, without behaviour.

Places are half-open spans of Unicode code points. Within a block's claims they count from the
start of the block's source, so that equal blocks have equal claims wherever they stand; a
:class:`Placed` claim carries the offset that turns them into places in the document.
"""

# No postponed annotations here: typing would compile that of every field, at each start.
from typing import NamedTuple

#: Strongest first; a severity's rank is its index.
SEVERITIES = ("reversal", "conflict", "doubt", "note")

#: The relations a reading may have, in their canonical signs.
RELATIONS = ("=", "<", ">", "≤", "≥", "≈")

#: What a claim describes.
KINDS = (
    "overall-model",
    "effect",
    "model-change",
    "coefficient",
    "correlation",
    "mean-comparison",
    "frequency",
    "anova-table",
    "coefficient-table",
    "model-summary",
)


class Span(NamedTuple):
    """A half-open range of code points."""

    start: int
    end: int


class Reading(NamedTuple):
    """One number as printed.

    Attributes
    ----------
    quantity
        Key of the quantity, one of :data:`crossfoot.laws.quantities.QUANTITIES`.
    relation
        One of :data:`RELATIONS`.
    literal
        The numeral as printed, without markup (``.026``, ``10,85``, ``6.8%``).
    low, high
        The closed interval of true values that would print so, as a plain number (percent turned
        into a fraction); infinite where the relation leaves that side open.
    span
        Place of the literal in the source of the block.
    term
        For a table: ``model``, ``error``, ``total`` or the name of the predictor or effect.
    """

    quantity: str
    relation: str
    literal: str
    low: float
    high: float
    span: Span
    term: str | None = None


class Claim(NamedTuple):
    """The readings that describe one model, test or table row.

    Attributes
    ----------
    kind
        One of :data:`KINDS`.
    label
        What a reader would call it: ``F(2, 57)``, ``Rainfall``, ``Table 2, Rainfall``.
    text
        The printed words it was read from, without markup, on one line.
    span
        Place in the source of the block, from the first to the last reading.
    readings
        In printed order.
    context
        What was recognised around it that changes what may be concluded (``one-sided``,
        ``robust``, ``adjusted-df`` …), sorted; see :mod:`crossfoot.laws.assumptions`.
    alpha
        The significance level that the text states for it, if it does.
    given
        Readings that stand elsewhere (a table's note, caption or other rows) and hold for this
        claim too: the error df of a coefficient's model. They are used like its own, and a
        finding names them by indices that go on after its own readings, but nothing is said of
        them here.
    row
        What the row of a table calls it, which findings name; empty where there is no such row,
        or where readings name theirs.
    """

    kind: str
    label: str
    text: str
    span: Span
    readings: tuple[Reading, ...]
    context: tuple[str, ...] = ()
    alpha: float | None = None
    given: tuple[Reading, ...] = ()
    row: str = ""


class Check(NamedTuple):
    """What became of one identity on one claim.

    ``outcome`` is ``agrees``, ``conflict``, ``doubt`` or ``not-applicable``; ``reason`` says why
    (an assumption unmet, a quantity not printed), and is empty where nothing needs saying.
    """

    identity: str
    outcome: str
    reason: str = ""


class Remedy(NamedTuple):
    """One change to one reading that makes the whole claim agree.

    ``reading`` is the index of the reading in its claim; ``literal`` is what would stand there
    instead, in the author's style, after a relation sign where that changes too; ``reason`` names
    the slip that would explain it. ``also`` has what the same slip changed elsewhere: index of
    the reading and literal.
    """

    reading: int
    quantity: str
    literal: str
    reason: str
    also: tuple[tuple[int, str], ...] = ()


class Finding(NamedTuple):
    """A finding about one claim.

    Attributes
    ----------
    identity
        Slug of the identity that fails.
    severity
        One of :data:`SEVERITIES`.
    message
        What is printed, what follows from the rest, what to look at; one sentence or two.
    reading
        Index, in the claim, of the reading the finding points at.
    recomputed
        The interval that the rest implies for that reading, where there is one.
    related
        Indices of the other readings that the conclusion rests on.
    working
        The recomputation written out, a line a step.
    elsewhere
        Places of other claims it rests on, in the document (not relative to the block).
    settled
        The reason a person gave for accepting it, or None.
    """

    identity: str
    severity: str
    message: str
    reading: int
    recomputed: tuple[float, float] | None = None
    remedies: tuple[Remedy, ...] = ()
    related: tuple[int, ...] = ()
    working: tuple[str, ...] = ()
    elsewhere: tuple[Span, ...] = ()
    settled: str | None = None


class Audited(NamedTuple):
    """A claim with what became of every identity on it."""

    claim: Claim
    checks: tuple[Check, ...]
    findings: tuple[Finding, ...]


class Placed(NamedTuple):
    """An audited claim where it stands: ``base`` is added to each of its places."""

    id: str
    base: int
    audited: Audited


class Problem(NamedTuple):
    """Why something could not be read: a sentence for a person, and where, if it has a place."""

    message: str
    span: Span | None = None


class Block(NamedTuple):
    """A stretch of a document that is read on its own.

    Attributes
    ----------
    kind
        ``prose``, ``heading``, ``table``, ``verbatim`` (printouts, and code that is shown) or
        ``code`` (what is run, in which nothing is reported).
    start
        Offset of ``source`` in the text of the document.
    source
        The text of the block as it stands, markup included.
    level
        Depth of a heading, from 1; 0 for anything else.
    """

    kind: str
    start: int
    source: str
    level: int = 0


class Document(NamedTuple):
    """A document split into blocks.

    Attributes
    ----------
    path
        As the user gave it; ``-`` is standard input.
    language
        Name of the format, a key of :data:`crossfoot.documents.FORMATS`.
    text
        The whole text; what is not text at heart (DOCX, PDF, notebooks) is written out first.
    blocks
        In order, without overlap; what lies between them is never shown to a reader.
    pages
        Offsets at which pages (or cells) start; empty where the document has none.
    definitions
        Pairs of name and meaning that the markup defines (LaTeX macros), needed to show a block.
    problems
        What could not be read.
    """

    path: str
    language: str
    text: str
    blocks: tuple[Block, ...]
    pages: tuple[int, ...] = ()
    definitions: tuple[tuple[str, str], ...] = ()
    problems: tuple[Problem, ...] = ()


class Report(NamedTuple):
    """All that was found in one document; ``problem`` is set where it could not be read."""

    document: Document
    claims: tuple[Placed, ...] = ()
    problem: str | None = None
