"""`check`: what is wrong in a deal, if anything."""

import json
from pathlib import Path

import pytest

from tests.commands.running import run
from tests.fullest import FULLEST
from workbench.places import sample_deals

SAMPLES = sorted(sample_deals().glob("*.deal"))


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_samples_are_sound(capsys: pytest.CaptureFixture[str], path: Path) -> None:
    ran = run(capsys, "check", path)
    assert (ran.status, ran.out, ran.err) == (0, f"{path}: no issues found\n", "")


def test_issues_go_to_the_error_stream_alone(
    capsys: pytest.CaptureFixture[str], tmp_path: Path
) -> None:
    path = tmp_path / "my.deal"
    path.write_text(json.dumps({"schema": 1}))
    ran = run(capsys, "check", path)
    assert (ran.status, ran.out) == (1, "")
    assert ran.err.splitlines() == [
        "purchase.price: Price: a value from 0 to 1,000,000,000,000,000 is needed",
        "earn.vacancy.1: Vacancy allowance, year 1: a value from 0% to 100% is needed",
        "leave.hold: Hold: a value from 1 to 40 is needed",
        "returns.required.1: Required return, year 1: a value from −50% to 100% is needed",
        "spaces: Rent roll: there is no space to let yet; enter at least one, with its count of "
        "units and its market rent",
        "leave.exit_yield: Exit yield: a value from 0.01% to 100% is needed for the exit method "
        "“forward_noi”",
    ]


def test_a_change_can_mend_or_break(capsys: pytest.CaptureFixture[str], tmp_path: Path) -> None:
    path = tmp_path / "my.deal"
    path.write_text(json.dumps({**FULLEST, "next_id": 2}))
    assert run(capsys, "check", path).status == 1
    assert run(capsys, "check", path, "--set", "next_id=40").status == 0
    assert run(capsys, "check", path, "--set", "next_id=40", "--set", "leave.hold=0").status == 1
