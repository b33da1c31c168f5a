"""Linter, formatter and strict types, as part of the one command that checks everything."""

import subprocess
import sys
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]


@pytest.mark.parametrize(
    "words",
    [
        ["ruff", "check", "."],
        ["ruff", "format", "--check", "."],
        ["mypy"],
    ],
    ids=" ".join,
)
def test_tool_is_content(words: list[str]) -> None:
    done = subprocess.run(
        [sys.executable, "-m", *words], cwd=ROOT, capture_output=True, text=True, check=False
    )
    assert done.returncode == 0, done.stdout + done.stderr


def test_no_exemptions_from_types() -> None:
    marks = [
        f"{path.relative_to(ROOT)}:{number}"
        for path in sorted((ROOT / "workbench").rglob("*.py"))
        for number, line in enumerate(path.read_text("utf-8").splitlines(), start=1)
        if "type: ignore" in line or "noqa" in line
    ]
    assert marks == []
