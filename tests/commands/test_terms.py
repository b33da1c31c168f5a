"""What the commands share: how they open a deal, and how they end."""

import argparse
from pathlib import Path

import pytest

from tests.fullest import fullest, small
from workbench.commands.terms import (
    FINE,
    ISSUES,
    UNUSABLE,
    add_deal,
    open_deal,
    say_fault,
    say_issues,
    shown_name,
)
from workbench.deal.changes import set_value
from workbench.files.deal_file import write_deal
from workbench.files.faults import Fault, UnreadableError


def arguments(*words: str) -> argparse.Namespace:
    parser = argparse.ArgumentParser()
    add_deal(parser)
    return parser.parse_args(words)


def test_exit_statuses() -> None:
    assert (FINE, ISSUES, UNUSABLE) == (0, 1, 2)


def test_a_deal_is_opened_with_its_changes(tmp_path: Path) -> None:
    path = tmp_path / "my.deal"
    write_deal(path, small())
    assert open_deal(arguments(str(path))) == small()
    changed = open_deal(arguments(str(path), "--set", "leave.hold=7", "--set", "earn.vacancy=4%"))
    assert (changed.leave.hold, changed.earn.vacancy) == (7, {1: 0.04})


def test_one_command_line_does_not_remember_another(tmp_path: Path) -> None:
    assert arguments("a.deal", "--set", "x=1").entries == ["x=1"]
    assert arguments("a.deal").entries == []


def test_no_issue_says_nothing(capsys: pytest.CaptureFixture[str]) -> None:
    assert say_issues(fullest()) == FINE
    assert capsys.readouterr() == ("", "")


def test_issues_are_said_by_path_and_words(capsys: pytest.CaptureFixture[str]) -> None:
    assert say_issues(set_value(fullest(), "leave.hold", 99)) == ISSUES
    said = capsys.readouterr()
    assert said.out == ""
    assert said.err == "leave.hold: Hold: 99 is not allowed; it must be from 1 to 40\n"


def test_every_fault_is_said(capsys: pytest.CaptureFixture[str]) -> None:
    error = UnreadableError(Fault("leave", "it is odd"), Fault("", "it is empty"))
    assert say_fault("my.deal", error) == UNUSABLE
    assert capsys.readouterr().err == "my.deal: leave: it is odd\nmy.deal: it is empty\n"


def test_a_fault_of_the_system_is_said(capsys: pytest.CaptureFixture[str]) -> None:
    assert say_fault(Path("my.deal"), OSError(13, "Permission denied")) == UNUSABLE
    assert capsys.readouterr().err == "my.deal: permission denied\n"


@pytest.mark.parametrize(
    ("name", "shown"), [("my.deal", "my.deal"), ("a\nb", "a b"), ("x" * 300, "x" * 199 + "…")]
)
def test_a_name_is_shown_on_one_line(name: str, shown: str) -> None:
    assert shown_name(Path(name)) == shown
