"""What a person may set, and the words with which it is refused."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from crossfoot.settings import DEFAULTS, SETTINGS, Settings, read


def test_every_setting_is_declared_once():
    assert tuple(SETTINGS) == Settings._fields


def test_nothing_set_means_the_defaults():
    assert read({}) == (DEFAULTS, ())
    assert read(dict.fromkeys(SETTINGS)) == (DEFAULTS, ())


@pytest.mark.parametrize("value", [".01", "0.01", 0.01, "1e-2"])
def test_alpha_may_be_text_or_a_number(value):
    assert read({"alpha": value}) == (Settings(alpha=0.01), ())


@pytest.mark.parametrize(
    "value", ["0", "1", "-.05", "5", "five", "", "nan", "inf", "5%", 0, 1, True, [0.05], "9" * 999]
)
def test_a_bad_alpha_is_refused_and_the_default_kept(value):
    settings, (problem,) = read({"alpha": value})
    assert settings == DEFAULTS
    assert problem == f"alpha: {value!r} is not a number between 0 and 1, such as .05"


def test_a_severity_that_is_none_is_refused_with_those_there_are():
    _, (problem,) = read({"fail_on": "conflcit"})
    assert problem == (
        "fail_on: 'conflcit' is not a severity (never, reversal, conflict, doubt, note); "
        "perhaps 'conflict' is meant"
    )


def test_an_unknown_format_is_refused_with_those_there_are():
    settings, (problem,) = read({"language": "markdwon"})
    assert settings.language is None
    assert problem.startswith("language: 'markdwon' is not a format that can be read (")
    assert problem.endswith("perhaps 'markdown' is meant")


def test_a_setting_that_does_not_exist_is_never_passed_over():
    _, (problem,) = read({"alfa": 0.1})
    assert problem == "there is no setting 'alfa'; perhaps 'alpha' is meant"


def test_patterns_are_a_list_of_texts():
    assert read({"exclude": ["old/", "*.log"]}) == (Settings(exclude=("old/", "*.log")), ())
    for value in ("old/", [1], 1, ["a", "!"], ["[z-a]"]):
        assert read({"exclude": value}) == (
            DEFAULTS,
            (f"exclude: {value!r} is not a list of patterns as in .gitignore",),
        )


def test_a_size_is_a_positive_number():
    assert read({"max_bytes": 10})[0].max_bytes == 10
    for value in (0, -1, True, "10", 1.5):
        assert read({"max_bytes": value}) == (
            DEFAULTS,
            (f"max_bytes: {value!r} is not a positive number of bytes",),
        )


def test_each_problem_is_told():
    _, problems = read({"alpha": 7, "fail_on": "nothing", "colour": 1})
    assert len(problems) == 3


@settings(deadline=None)  # the first value may import a library
@given(
    st.dictionaries(
        st.sampled_from([*SETTINGS, "other"]),
        st.none() | st.booleans() | st.integers() | st.floats() | st.text() | st.lists(st.text()),
    )
)
def test_no_value_makes_it_raise(values):
    assert 0 < read(values)[0].alpha < 1
