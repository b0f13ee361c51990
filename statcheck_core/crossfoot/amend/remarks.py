"""Allowing a finding: a remark with the reason, in the comment syntax of the document's format.

Where the remark stands decides which claim it speaks of, and each format lets comments stand in
other places. So the places are tried, the most readable first, and the document is scanned with
the remark in it: the first place is taken at which just the intended finding is settled.
"""

from __future__ import annotations

from collections.abc import Iterator

from crossfoot.amend.change import Change, applied, block_at
from crossfoot.documents import FORMATS, split
from crossfoot.expressions import expression
from crossfoot.model import Block, Document, Finding, Placed, Report, Span
from crossfoot.scan import scan_document
from crossfoot.settings import Settings

#: What may close right behind the last number of a claim.
_CLOSING = expression(r"(?:\\[,;) ]|[\s\w]{0,3}[$*_}\])]|</[A-Za-z]{1,12}>|[.,;:])*")
_SPACE = expression(r"[ \t]+")

#: Formats whose comments run to the end of the line.
_TO_THE_END = frozenset({"latex", "typst"})


def allowance(
    report: Report, placed: Placed, finding: Finding, reason: str, settings: Settings
) -> Change | None:
    """Return the insertion of a remark that allows a finding.

    Parameters
    ----------
    report
        The report on the document as it stands.
    placed, finding
        The claim, and what is found about it.
    reason
        Why it is right as printed, in a few words.
    settings
        Those of the scan.

    Returns
    -------
    Change or None
        None where the format has no comments, or none can stand at a fitting place.
    """
    document = report.document
    words = " ".join(reason.split())
    if document.language not in FORMATS or not words:
        return None
    remark = FORMATS[document.language].remark(
        f"crossfoot: allow {finding.identity} because {words}"
    )
    block = block_at(document, placed.base)
    if block is None:
        return None
    for change in _places(document, block, placed, remark):
        if _settles(report, change, placed, finding, settings):
            return change
    return None


def _places(document: Document, block: Block, placed: Placed, remark: str) -> Iterator[Change]:
    """Yield the places where a remark may stand, the most readable first."""
    text, feed = document.text, _feed(document.text)
    closes = bool(FORMATS[document.language].comment_close)
    end = placed.base + placed.audited.claim.span.end
    stop = block.start + len(block.source)
    closing = _CLOSING.match(text, end, stop)
    behind = closing.end() if closing is not None else end
    above = text.rfind("\n", 0, block.start) + 1
    if not text[above : block.start].strip():
        between = feed if document.language in ("latex", "plain", "org") else feed * 2
        yield Change(Span(above, above), f"{remark}{between}")
    line_end = min(at for at in (text.find("\n", end), len(text)) if at >= 0)
    if closes:
        yield Change(Span(behind, behind), f" {remark}")
        yield Change(Span(end, end), f" {remark}")
        return
    if text[line_end - 1 : line_end] == "\r":
        line_end -= 1
    if document.language in _TO_THE_END:
        yield Change(Span(line_end, line_end), f" {remark}")
        space = _SPACE.search(text, behind, stop)
        if space is not None:
            yield Change(Span(space.end(), space.end()), f"{remark}{feed}")
        return
    if document.language == "rst":  # a comment there is a paragraph of its own
        return
    start = text.rfind("\n", 0, placed.base + placed.audited.claim.span.start) + 1
    yield Change(Span(start, start), f"{remark}{feed}")


def _feed(text: str) -> str:
    at = text.find("\n")
    return "\r\n" if at > 0 and text[at - 1] == "\r" else "\n"


def _settles(
    report: Report, change: Change, placed: Placed, finding: Finding, settings: Settings
) -> bool:
    """Say whether a document with a remark in it differs by one settled finding alone."""
    document = report.document
    text = applied(document.text, (change,))
    changed = document._replace(text=text, blocks=_blocks(document, text, change))
    after = scan_document(changed, settings)
    if len(after.document.problems) > len(document.problems):
        return False
    wanted = [
        (p.audited.claim.text, f.identity, f.settled is not None or (p is placed and f is finding))
        for p in report.claims
        for f in p.audited.findings
    ]
    # Another finding of the same identity on the same claim is settled with it.
    alike = {(placed.audited.claim.text, finding.identity)}
    found = [
        (p.audited.claim.text, f.identity, f.settled is not None)
        for p in after.claims
        for f in p.audited.findings
    ]
    return [w[:2] for w in wanted] == [f[:2] for f in found] and all(
        want[2] == have[2] or (have[2] and want[:2] in alike and p_same)
        for want, have, p_same in zip(wanted, found, _same_claim(report, placed), strict=True)
    )


def _same_claim(report: Report, placed: Placed) -> list[bool]:
    return [p is placed for p in report.claims for _ in p.audited.findings]


def _blocks(document: Document, text: str, change: Change) -> tuple[Block, ...]:
    """Return the blocks of a changed text; where cells make the document, those of its cell."""
    if not document.pages:
        return split(document.language, text)
    blocks: list[Block] = []
    shift = len(change.text)
    for block in document.blocks:
        if block.start <= change.span.start <= block.start + len(block.source):
            source = applied(block.source, (change,), block.start)
            blocks += [
                inner._replace(start=block.start + inner.start)
                for inner in split("markdown", source)
            ]
        elif block.start >= change.span.start:
            blocks.append(block._replace(start=block.start + shift))
        else:
            blocks.append(block)
    return tuple(blocks)
