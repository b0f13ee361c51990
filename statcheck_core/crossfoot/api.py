"""The functions of the library; ``crossfoot`` itself hands them out and imports this on demand.

They go by their arguments alone: the settings files of projects are for the command and for
editors.
"""

from __future__ import annotations

import os
from collections.abc import Iterable, Sequence

from crossfoot.batch import files
from crossfoot.batch.policy import Policy
from crossfoot.expressions import expression
from crossfoot.results import Derivation, Scan
from crossfoot.settings import Settings, read

PathLike = str | bytes | os.PathLike[str]

#: Halves of surrogate pairs, which no encoding can hold.
_HALVES = expression("[\ud800-\udfff]")


def scan_text(
    text: str, language: str = "markdown", *, alpha: float | None = None, path: str = "-"
) -> Scan:
    """Check the results that a text reports.

    Parameters
    ----------
    text
        The text, with its markup.
    language
        The format it is written in: ``markdown``, ``latex``, ``html``, ``plain`` or another name
        of :data:`crossfoot.documents.FORMATS`.
    alpha
        Significance level where the text states none; between 0 and 1, .05 by default.
    path
        What the text is called in the result.

    Returns
    -------
    Scan
        What was found.

    Raises
    ------
    ValueError
        If the format is not known, or ``alpha`` is no level.

    Examples
    --------
    >>> import crossfoot
    >>> scan = crossfoot.scan_text("The plans differed, *F*(2, 57) = 4.31, *p* = .052.")
    >>> scan
    <crossfoot.Scan: 1 document read, 1 result found: 1 disagrees.>
    >>> finding = scan.findings[0]
    >>> finding["severity"], finding["identity"], finding["literal"]
    ('reversal', 'p-from-f', '.052')
    >>> finding["where"]["start"]
    {'line': 1, 'column': 46}
    >>> scan.frame("readings")["literal"].tolist()
    ['2', '57', '4.31', '.052']
    """
    from crossfoot import scan

    settings = _settings(alpha=alpha, language=language)
    encodable = _HALVES.sub("\ufffd", text)
    return Scan([scan.scan_text(encodable, language, path=path, settings=settings)])


def scan_file(path: PathLike, language: str | None = None, *, alpha: float | None = None) -> Scan:
    """Check the results that a file reports.

    Parameters
    ----------
    path
        The file.
    language
        Its format, where its name is not to tell it.
    alpha
        Significance level where the text states none; between 0 and 1, .05 by default.

    Returns
    -------
    Scan
        What was found. A file that can't be read is a document whose status is ``unreadable``.

    Raises
    ------
    ValueError
        If the format is not known, or ``alpha`` is no level.

    Examples
    --------
    >>> import crossfoot
    >>> crossfoot.scan_file("no such file.md").documents[0]["problem"]
    "It can't be read: no such file or directory."
    """
    settings = _settings(alpha=alpha, language=language)
    return Scan([files.scan_file(os.fsdecode(path), settings)])


def scan_paths(
    paths: PathLike | Iterable[PathLike],
    language: str | None = None,
    *,
    alpha: float | None = None,
    exclude: Sequence[str] = (),
) -> Scan:
    """Check the results that files, and the documents in folders, report.

    Parameters
    ----------
    paths
        Files and folders, or one of them. Folders are searched as ``crossfoot scan`` does.
    language
        The format of every document, where their names are not to tell it.
    alpha
        Significance level where a text states none; between 0 and 1, .05 by default.
    exclude
        Patterns, in the syntax of ``.gitignore``, of what is not read.

    Returns
    -------
    Scan
        What was found. Its ``warnings`` tell of paths that led to no document.

    Raises
    ------
    ValueError
        If the format is not known, ``alpha`` is no level, or a pattern can't be understood.

    Examples
    --------
    >>> import crossfoot
    >>> crossfoot.scan_paths(["no such file.md", "no such folder"])
    <crossfoot.Scan: 0 documents read, 2 could not be read, no reported result found.>
    """
    settings = _settings(alpha=alpha, language=language, exclude=exclude)
    several = [paths] if isinstance(paths, (str, bytes, os.PathLike)) else paths
    warnings: list[str] = []
    reports = files.scan_paths(
        [os.fsdecode(path) for path in several],
        Policy(settings),
        lambda path, problem: warnings.append(f"{path}: {problem}"),
    )
    return Scan(reports, warnings)


def derive(text: str, language: str = "plain") -> Derivation:
    """Derive all that follows from the results in a text.

    Parameters
    ----------
    text
        A result as it is printed, or several.
    language
        The format it is written in, a name of :data:`crossfoot.documents.FORMATS`.

    Returns
    -------
    Derivation
        What follows; nothing where no result was recognised, or where the numbers of a result
        cannot all be true, which is then among the findings.

    Raises
    ------
    ValueError
        If the format is not known.

    Examples
    --------
    >>> import crossfoot
    >>> derivation = crossfoot.derive("F(2, 57) = 4.31")
    >>> p = derivation.results[0]["derived"][0]
    >>> p["quantity"], round(p["low"], 4), round(p["high"], 4)
    ('p', 0.018, 0.0181)
    >>> derivation.frame()["quantity"].tolist()
    ['p', 'eta2_partial', 'omega2']
    """
    return Derivation(scan_text(text, language).reports)


def _settings(**values: object) -> Settings:
    settings, problems = read(values)
    if problems:
        raise ValueError("; ".join(problems))
    return settings
