"""The project's outside: top level, README, entry point, shipped data."""

import importlib.metadata
import re
import tomllib
from pathlib import Path

from workbench import __version__
from workbench.places import resources, sample_deals

ROOT = Path(__file__).parents[1]
TOP = {
    "README.md",
    "DEVELOPERS.md",
    "pyproject.toml",
    "workbench",
    "resources",
    "tests",
    "sample_deals",
}


def test_top_level_holds_what_it_may() -> None:
    shown = {path.name for path in ROOT.iterdir() if not path.name.startswith(".")}
    made = {"build", "dist", "out", "memo.pdf"}  # by the commands of the README and the check
    assert shown - made == TOP


def test_readme_holds_two_commands() -> None:
    lines = (ROOT / "README.md").read_text("utf-8").splitlines()
    commands = [line for line in lines if line.startswith("python3 -m venv")]
    assert len(commands) == 2
    assert "groundcourse" in commands[0] and "sample_deals/" in commands[0]
    assert "pytest" in commands[1]
    named = re.findall(r"sample_deals/[\w.-]+", " ".join(commands))
    assert all((ROOT / name).is_file() for name in named)


def test_pictures_of_the_readme_are_there() -> None:
    text = (ROOT / "README.md").read_text("utf-8")
    pictures = re.findall(r"!\[[^\]]+\]\(([^)]+)\)", text)
    assert pictures
    assert all((ROOT / name).is_file() for name in pictures)


def test_version_and_entry_point() -> None:
    settings = tomllib.loads((ROOT / "pyproject.toml").read_text("utf-8"))
    assert settings["project"]["scripts"] == {"groundcourse": "workbench.__main__:main"}
    assert importlib.metadata.version("groundcourse") == __version__


def test_shipped_data_is_found() -> None:
    assert (resources() / "deal.schema.json").is_file()
    assert len(list(sample_deals().glob("*.deal"))) == 4
