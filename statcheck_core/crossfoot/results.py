"""What the functions of the library return: records, dictionaries and frames of one scan."""

from __future__ import annotations

from collections.abc import Iterable
from functools import cached_property
from typing import TYPE_CHECKING

from crossfoot.model import Report
from crossfoot.output.output import Look
from crossfoot.output.records import (
    SCHEMA,
    ClaimRecord,
    DocumentRecord,
    FindingRecord,
    ScanRecord,
    document_record,
)
from crossfoot.version import __version__

if TYPE_CHECKING:
    from pandas import DataFrame

    from crossfoot.output.derivation import DerivationRecord, ResultRecord


class LocatedClaim(ClaimRecord):
    """A claim with the path of its document."""

    path: str


class LocatedFinding(FindingRecord):
    """A finding with the path of its document."""

    path: str


class _Found:
    """What was found in one document or in several.

    Parameters
    ----------
    reports
        A report a document, in order.
    warnings
        Sentences about paths that led to no document.

    Attributes
    ----------
    reports : tuple of crossfoot.model.Report
        The same, as immutable records whose places are offsets.
    warnings : tuple of str
        Sentences about paths that led to no document.
    """

    def __init__(self, reports: Iterable[Report], warnings: Iterable[str] = ()) -> None:
        self.reports = tuple(reports)
        self.warnings = tuple(warnings)

    @cached_property
    def documents(self) -> list[DocumentRecord]:
        """A dictionary a document, as in ``--format json``.

        One that could not be read has the status ``unreadable``, and a problem that says why.
        """
        return [document_record(report) for report in self.reports]

    @property
    def claims(self) -> list[LocatedClaim]:
        """A dictionary a claim, over all documents, with the ``path`` of its document."""
        return [
            LocatedClaim(**claim, path=document["path"])
            for document in self.documents
            for claim in document["claims"]
        ]

    @property
    def findings(self) -> list[LocatedFinding]:
        """A dictionary a finding, over all documents, with the ``path`` of its document."""
        return [
            LocatedFinding(**finding, path=document["path"])
            for document in self.documents
            for finding in document["findings"]
        ]


class Scan(_Found):
    """What was found in one document or in several.

    Printed, it is the text that ``crossfoot scan --explain`` prints.

    Attributes
    ----------
    reports : tuple of crossfoot.model.Report
        A report a document, as immutable records whose places are offsets.
    warnings : tuple of str
        Sentences about paths that led to no document.
    """

    def to_dict(self) -> ScanRecord:
        """Return what ``--format json`` writes, as a dictionary that JSON can hold."""
        return {"crossfoot": __version__, "schema": SCHEMA, "documents": self.documents}

    def frame(self, rows: str = "findings") -> DataFrame:
        """Return a table of what was found; pandas is imported only here.

        Parameters
        ----------
        rows
            What a row is:

            ``findings``
                A finding, with the recomputed interval and the likeliest remedy.
            ``readings``
                A number as printed, with the interval of true values that would print so.
            ``checks``
                What became of one identity on one claim, with the reason where it could not be
                checked.

        Returns
        -------
        pandas.DataFrame
            Lines and columns count from 1, columns in code points. An interval that is open to a
            side is infinite there; a finding without a recomputed interval has NaN.

        Raises
        ------
        ValueError
            If there is no such kind of row.
        """
        from crossfoot.output.frames import TABLES, frame_of

        return frame_of(TABLES, rows, self.documents)

    def __str__(self) -> str:
        from crossfoot.output.text import write

        return "".join(write(self.reports, Look(explain=True))).rstrip("\n")

    def __repr__(self) -> str:
        from crossfoot.output.tally import EMPTY, add, closing

        tally = EMPTY
        for report in self.reports:
            tally = add(tally, report)
        return f"<crossfoot.Scan: {closing(tally)}>"


class Derivation(_Found):
    """What follows from the results in a text, and what in them disagrees.

    Printed, it is the text that ``crossfoot derive`` prints.
    """

    @cached_property
    def results(self) -> list[ResultRecord]:
        """A dictionary a result: the claim, its findings, and under ``derived`` what follows."""
        from crossfoot.output.derivation import result_records

        return [record for report in self.reports for record in result_records(report)]

    def frame(self, rows: str = "derived") -> DataFrame:
        """Return a table of what follows; pandas is imported only here.

        Parameters
        ----------
        rows
            What a row is: ``derived``, a quantity that follows, or what it may be for a scan.

        Returns
        -------
        pandas.DataFrame
            An interval that is open to a side is infinite there. ``assumed`` is empty where
            nothing is assumed beyond what the text says.

        Raises
        ------
        ValueError
            If there is no such kind of row.
        """
        from crossfoot.output.frames import DERIVED, TABLES, frame_of

        tables = {**DERIVED, **TABLES}
        return frame_of(tables, rows, self.results if rows in DERIVED else self.documents)

    def to_dict(self) -> DerivationRecord:
        """Return what ``derive --format json`` writes, as a dictionary that JSON can hold."""
        return {"crossfoot": __version__, "schema": SCHEMA, "results": self.results}

    def __str__(self) -> str:
        from crossfoot.output.derivation import write

        pieces = [piece for report in self.reports for piece in write(report, Look(explain=True))]
        return "".join(pieces).rstrip("\n")

    def __repr__(self) -> str:
        from crossfoot.output.tally import counted

        count = sum(len(result["derived"]) for result in self.results)
        verb = "1 quantity follows" if count == 1 else f"{count} quantities follow"
        return f"<crossfoot.Derivation: {verb} from {counted(len(self.results), 'result')}>"
