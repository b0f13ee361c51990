"""One finding in words: the entry of the text output."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.audit.wording import named
from crossfoot.laws.quantities import symbol
from crossfoot.model import Document, Finding, Placed, Remedy, Span
from crossfoot.output.drawing import drawn
from crossfoot.output.excerpt import MARK, UNMARK, quotation
from crossfoot.output.output import Look
from crossfoot.output.safe import one_line, safe
from crossfoot.output.wrapping import wrapped
from crossfoot.places import where

#: What stands before the number of a page, where it is no page.
_PAGES = {"notebook": "in cell"}

_COLOURS = {"reversal": "1;35", "conflict": "1;31", "doubt": "33", "note": "36"}


def entry(
    document: Document, placed: Placed, findings: Sequence[Finding], number: int, look: Look
) -> str:
    """Return the findings that point at one reading as lines, with a line feed at the end.

    The place, the quotation and the remedies that they share are written once.
    """
    first = findings[0]
    own = placed.audited.claim.readings
    span = (*own, *placed.audited.claim.given)[first.reading].span
    head = f"{number}. "
    indent = " " * len(head)
    place = place_words(document, Span(span.start + placed.base, span.end + placed.base))
    severity = painted(first.severity, _COLOURS[first.severity], look)
    slugs = ", ".join(dict.fromkeys(finding.identity for finding in findings))
    lines = [f"{head}{place}: {severity} ({slugs})"]
    beside = [own[i].span for finding in findings for i in finding.related if i < len(own)]
    rows = quotation(document, placed, span, beside)
    lines += [marked(line, look) for line in drawn(rows, look.width, indent)]
    for finding in findings:
        lines += wrapped(one_line(finding.message), look.width, indent)
    for remedies in dict.fromkeys(finding.remedies for finding in findings if finding.remedies):
        lines += _remedies(placed, remedies, look, indent)
    for other in dict.fromkeys(span for finding in findings for span in finding.elsewhere):
        lines.append(f"{indent}See also {place_words(document, other)}.")
    if first.settled is not None:
        lines += wrapped(f"Settled: {one_line(first.settled)}", look.width, indent)
    if look.explain:
        for finding in findings:
            lines += _working(finding, look, indent, several=len(findings) > 1)
    return "\n".join(lines) + "\n"


def _working(finding: Finding, look: Look, indent: str, *, several: bool) -> list[str]:
    """Return the recomputation, a step a line."""
    if not finding.working:
        return []
    lines = [f"{indent}Working ({finding.identity}):" if several else f"{indent}Working:"]
    for step in finding.working:
        lines += wrapped(one_line(step), look.width, indent + "  ", indent + "    ")
    return lines


def _remedies(placed: Placed, remedies: Sequence[Remedy], look: Look, indent: str) -> list[str]:
    """Return the single changes after which everything agrees."""
    one = len(remedies) == 1
    lead = "This change alone" if one else "Any one of these changes"
    lines = wrapped(f"{lead} would make the whole result agree:", look.width, indent)
    for remedy in remedies:
        words = f"{remedy_words(placed, remedy)} ({one_line(remedy.reason)})"
        lines += wrapped(words, look.width, indent + "  ", indent + "    ")
    return lines


def remedy_words(placed: Placed, remedy: Remedy) -> str:
    """Return a change as it would be printed."""
    reading = placed.audited.claim.readings[remedy.reading]
    name = named(reading) if reading.quantity == remedy.quantity else symbol(remedy.quantity)
    relation = "" if remedy.literal[:1] in tuple("=<>≤≥≈") else f"{reading.relation} "
    return one_line(f"{name} {relation}{remedy.literal}")


def place_words(document: Document, span: Span) -> str:
    """Return where a span starts as ``path:line:column``, with its page if there are pages."""
    place = where(document, span)
    words = f"{safe(document.path)}:{place.start.line}:{place.start.column}"
    if place.page is None:
        return words
    return f"{words} {_PAGES.get(document.language, 'on page')} {place.page}"


def marked(line: str, look: Look) -> str:
    """Return a quoted line with its marks as a person sees them."""
    start, end = ("\x1b[1m", "\x1b[22m") if look.colour else ("", "")
    return line.replace(MARK, f"{start}«").replace(UNMARK, f"»{end}")


def painted(text: str, colour: str, look: Look) -> str:
    """Return text in a colour where colours are wanted."""
    return f"\x1b[{colour}m{text}\x1b[0m" if look.colour else text
