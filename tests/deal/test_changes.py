"""The only way a deal becomes another deal."""

import pytest

from tests.fullest import fullest
from workbench.deal.changes import set_value
from workbench.deal.paths import UnknownPathError, get


def test_a_change_is_a_new_deal() -> None:
    before = fullest()
    after = set_value(before, "leave.hold", 12)
    assert after.leave.hold == 12
    assert before == fullest()
    assert set_value(after, "leave.hold", 10) == before


def test_a_nested_item_is_changed_in_place() -> None:
    after = set_value(fullest(), "steps@p3.change", 0.05)
    assert get(after, "steps@p3.change") == 0.05
    assert [space.id for space in after.spaces] == ["s1", "s6"]


def test_none_lets_a_year_follow() -> None:
    assert set_value(fullest(), "earn.vacancy.3", None).earn.vacancy == {1: 0.05}


def test_an_unknown_path_is_refused() -> None:
    with pytest.raises(UnknownPathError):
        set_value(fullest(), "leave.holt", 12)
