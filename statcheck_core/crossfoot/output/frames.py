"""Records as rows of a pandas DataFrame. Only who asks for a frame pays for importing pandas."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Mapping
from typing import TYPE_CHECKING, Any, NamedTuple

from crossfoot.output.records import DocumentRecord, WhereRecord

if TYPE_CHECKING:
    from pandas import DataFrame

    from crossfoot.output.derivation import ResultRecord

_PLACE = {"path": "string", "page": "Int64", "line": "Int64", "column": "Int64"}
_CLAIM = {"claim": "string", "kind": "string", "label": "string"}
_VALUE = {"literal": "string", "low": "float64", "high": "float64"}


class Table(NamedTuple):
    """What one kind of frame holds: its columns with their types, and its rows."""

    columns: Mapping[str, str]
    rows: Callable[[Any], Iterator[dict[str, Any]]]


def frame_of(tables: Mapping[str, Table], name: str, records: Iterable[Any]) -> DataFrame:
    """Return the rows of some records as a frame; its columns are there without any row.

    Parameters
    ----------
    tables
        The kinds of frame there are, by name.
    name
        The kind that is wanted.
    records
        What its rows are taken from.

    Raises
    ------
    ValueError
        If there is no such kind.
    """
    if name not in tables:
        raise ValueError(f"rows is {name!r}; it can be one of {', '.join(tables)}")
    from pandas import DataFrame, Series

    table = tables[name]
    rows = [row for record in records for row in table.rows(record)]
    return DataFrame(
        {
            name: Series([row[name] for row in rows], dtype=kind)
            for name, kind in table.columns.items()
        }
    )


def findings(document: DocumentRecord) -> Iterator[dict[str, Any]]:
    """Return a row a finding, with the likeliest of its remedies."""
    claims = {claim["id"]: claim for claim in document["claims"]}
    for finding in document["findings"]:
        claim = claims[finding["claim"]]
        interval = finding["recomputed"]
        remedy = finding["remedies"][0] if finding["remedies"] else None
        yield {
            **_place(document, finding["where"]),
            "severity": finding["severity"],
            "identity": finding["identity"],
            "claim": finding["claim"],
            "kind": claim["kind"],
            "label": claim["label"],
            "quantity": finding["quantity"],
            "literal": finding["literal"],
            "low": math.nan if interval is None else _bound(interval["low"], -math.inf),
            "high": math.nan if interval is None else _bound(interval["high"], math.inf),
            "message": finding["message"],
            "remedy_quantity": remedy["quantity"] if remedy else None,
            "remedy_literal": remedy["literal"] if remedy else None,
            "remedy_reason": remedy["reason"] if remedy else None,
            "settled": finding["settled"],
        }


def readings(document: DocumentRecord) -> Iterator[dict[str, Any]]:
    """Return a row a reading."""
    for claim in document["claims"]:
        for reading in claim["readings"]:
            yield {
                **_place(document, reading["where"]),
                "claim": claim["id"],
                "kind": claim["kind"],
                "label": claim["label"],
                "quantity": reading["quantity"],
                "term": reading["term"],
                "relation": reading["relation"],
                "literal": reading["literal"],
                "low": _bound(reading["low"], -math.inf),
                "high": _bound(reading["high"], math.inf),
            }


def checks(document: DocumentRecord) -> Iterator[dict[str, Any]]:
    """Return a row for what became of each identity on each claim."""
    for claim in document["claims"]:
        for check in claim["checks"]:
            yield {
                **_place(document, claim["where"]),
                "claim": claim["id"],
                "kind": claim["kind"],
                "label": claim["label"],
                **check,
            }


def derived(result: ResultRecord) -> Iterator[dict[str, Any]]:
    """Return a row a quantity that follows."""
    for item in result["derived"]:
        yield {
            "claim": result["id"],
            "kind": result["kind"],
            "label": result["label"],
            "quantity": item["quantity"],
            "low": _bound(item["low"], -math.inf),
            "high": _bound(item["high"], math.inf),
            "assumed": " ".join(item["assumed"]),
            "working": "\n".join(item["working"]),
        }


def _place(document: DocumentRecord, where: WhereRecord) -> dict[str, Any]:
    start = where["start"]
    place = {"page": where["page"], "line": start["line"], "column": start["column"]}
    return {"path": document["path"], **place}


def _bound(value: float | None, infinite: float) -> float:
    return infinite if value is None else value


#: The frames of a scan, by the name of what a row is.
TABLES: Mapping[str, Table] = {
    "findings": Table(
        {
            **_PLACE,
            "severity": "string",
            "identity": "string",
            **_CLAIM,
            "quantity": "string",
            **_VALUE,
            "message": "string",
            "remedy_quantity": "string",
            "remedy_literal": "string",
            "remedy_reason": "string",
            "settled": "string",
        },
        findings,
    ),
    "readings": Table(
        {
            **_PLACE,
            **_CLAIM,
            "quantity": "string",
            "term": "string",
            "relation": "string",
            **_VALUE,
        },
        readings,
    ),
    "checks": Table(
        {**_PLACE, **_CLAIM, "identity": "string", "outcome": "string", "reason": "string"},
        checks,
    ),
}

#: The frame that a derivation has besides.
DERIVED: Mapping[str, Table] = {
    "derived": Table(
        {
            **_CLAIM,
            "quantity": "string",
            "low": "float64",
            "high": "float64",
            "assumed": "string",
            "working": "string",
        },
        derived,
    )
}
