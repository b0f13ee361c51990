"""Each result is counted once, and the exit status depends on what nobody has settled."""

import pytest

from crossfoot.model import Audited, Check, Claim, Document, Finding, Placed, Report, Span
from crossfoot.output.tally import EMPTY, FATES, add, closing, fails, fate


def audited(*severities, outcomes=("agrees",), settled=()):
    claim = Claim("effect", "F", "F", Span(0, 1), ())
    findings = [Finding("bounds", severity, "…", 0) for severity in severities]
    findings += [Finding("bounds", severity, "…", 0, settled="seen") for severity in settled]
    checks = tuple(Check("bounds", outcome) for outcome in outcomes)
    return Audited(claim, checks, tuple(findings))


def report(*claims):
    placed = tuple(Placed(f"c{number}", 0, claim) for number, claim in enumerate(claims))
    return Report(Document("a.md", "plain", "", ()), placed)


@pytest.mark.parametrize(
    ("claim", "what"),
    [
        (audited(), "agrees"),
        (audited("note"), "agrees"),
        (audited(outcomes=["not-applicable"]), "unchecked"),
        (audited(outcomes=[]), "unchecked"),
        (audited("note", outcomes=["not-applicable"]), "unchecked"),
        (audited("doubt"), "doubt"),
        (audited("doubt", "conflict"), "disagrees"),
        (audited("reversal"), "disagrees"),
        (audited(settled=["conflict"]), "settled"),
        (audited("note", settled=["doubt"]), "settled"),
        (audited(settled=["note"]), "agrees"),
        (audited("doubt", settled=["reversal"]), "doubt"),
    ],
)
def test_what_became_of_a_claim(claim, what):
    assert fate(claim) == what


def test_each_claim_is_counted_once():
    tally = add(EMPTY, report(audited("conflict", "doubt"), audited(), audited()))
    tally = add(tally, Report(Document("b.md", "", "", ()), (), "gone"))
    assert tally.results == 3
    assert closing(tally) == (
        "1 document read, 1 could not be read, 3 results found: 2 agree, 1 disagrees."
    )
    assert EMPTY.results == 0


def test_counts_of_every_fate_have_their_words():
    claims = dict(zip(FATES, range(1, 6), strict=True))
    assert closing(EMPTY._replace(read=2, claims=claims)) == (
        "2 documents read, 15 results found: 1 agrees, 2 disagree, 3 are in doubt, "
        "4 are settled, 5 could not be checked."
    )


def test_no_results_are_told_as_such():
    assert closing(EMPTY._replace(read=1)) == "1 document read, no reported result found."


@pytest.mark.parametrize(
    ("fail_on", "severities"),
    [
        ("never", ""),
        ("reversal", "reversal"),
        ("conflict", "reversal conflict"),
        ("doubt", "reversal conflict doubt"),
        ("note", "reversal conflict doubt note"),
    ],
)
def test_a_severity_fails_what_is_as_strong_or_stronger(fail_on, severities):
    for severity in ("reversal", "conflict", "doubt", "note"):
        assert fails(report(audited(severity)), fail_on) == (severity in severities.split())
        assert not fails(report(audited(settled=[severity])), fail_on)
    assert not fails(report(audited()), fail_on)
