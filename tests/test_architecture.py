"""The arrows between the rooms: who may import whom, read from the code itself."""

import ast
from collections.abc import Iterator, Mapping
from pathlib import Path

import pytest

import workbench

PACKAGE = Path(workbench.__file__).parent

ARROWS: Mapping[str, frozenset[str]] = {
    "deal": frozenset(),
    "places": frozenset(),
    "engine": frozenset({"deal"}),
    "text": frozenset({"deal", "places"}),
    "charts": frozenset({"places"}),
    "files": frozenset({"engine", "deal", "text", "charts", "places"}),
    "report": frozenset({"engine", "deal", "text", "charts", "places"}),
    "commands": frozenset({"report", "files", "engine", "deal", "text", "charts", "places"}),
    "session": frozenset({"report", "files", "engine", "deal", "text", "charts", "places"}),
    "ui": frozenset({"session", "report", "files", "engine", "deal", "text", "charts", "places"}),
    "__main__": frozenset({"commands", "files", "ui"}),
    "__init__": frozenset(),
}
"""Each room and the rooms it may import besides itself."""

ONLY_IN: Mapping[str, tuple[str, ...]] = {
    "numpy": ("engine",),
    "pydantic": ("files",),
    "reportlab": ("report",),
    "PySide6": ("session", "ui"),
}
"""Outside libraries that belong to some rooms alone."""

NEVER_AT_TOP = frozenset({"pandas", "openpyxl", "reportlab", "pypdfium2", "PySide6", "scipy"})
"""Slow to import: they are imported where they are used, never on the way to a command's help."""


def rooms(package: Path) -> Iterator[tuple[str, Path]]:
    for path in sorted(package.rglob("*.py")):
        first = path.relative_to(package).parts[0]
        yield first.removesuffix(".py"), path


def imports(path: Path) -> Iterator[str]:
    """Every module that a file imports, at any depth of its code."""
    for node in ast.walk(ast.parse(path.read_text("utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom) and node.module:
            if node.module == "workbench":
                yield from (f"workbench.{alias.name}" for alias in node.names)
            else:
                yield node.module


def trespasses(package: Path) -> list[str]:
    """Imports against the arrows, each as a sentence."""
    found = []
    for room, path in rooms(package):
        for module in imports(path):
            top, _, rest = module.partition(".")
            target = rest.partition(".")[0]
            name = path.relative_to(package)
            if top == package.name and target not in {room, "", "__version__", *ARROWS[room]}:
                found.append(f"{name}: {room} may not import {target}")
            if top in ONLY_IN and room not in ONLY_IN[top]:
                found.append(f"{name}: {room} may not import {top}")
    return found


def test_every_room_has_its_arrows() -> None:
    assert {room for room, _ in rooms(PACKAGE)} == set(ARROWS)


def test_imports_follow_the_arrows() -> None:
    assert trespasses(PACKAGE) == []


@pytest.mark.parametrize(
    ("room", "line", "sentence"),
    [
        ("deal", "import workbench.engine.plan", "deal may not import engine"),
        ("deal", "from workbench import text", "deal may not import text"),
        ("engine", "from workbench.text.locale import Locale", "engine may not import text"),
        ("charts", "import reportlab.pdfgen", "charts may not import reportlab"),
        ("text", "def late():\n    import numpy", "text may not import numpy"),
        ("report", "from workbench.commands import terms", "report may not import commands"),
    ],
)
def test_a_planted_violation_is_found(tmp_path: Path, room: str, line: str, sentence: str) -> None:
    planted = tmp_path / "workbench" / room / "planted.py"
    planted.parent.mkdir(parents=True)
    planted.write_text(line, "utf-8")
    assert trespasses(tmp_path / "workbench") == [f"{room}/planted.py: {sentence}"]


def test_no_circle_between_rooms() -> None:
    below: dict[str, set[str]] = {room: set() for room in ARROWS}
    for room in ARROWS:
        reached = set(ARROWS[room])
        while reached - below[room]:
            below[room] |= reached
            reached = {far for near in reached for far in ARROWS[near]}
        assert room not in below[room]


def loaded_by(words: str) -> set[str]:
    """Which slow libraries a fresh process has loaded after running these words."""
    import subprocess
    import sys

    code = f"import sys\n{words}\nprint(*sorted({set(NEVER_AT_TOP)!r} & set(sys.modules)))"
    done = subprocess.run(
        [sys.executable, "-c", code], capture_output=True, text=True, check=True, timeout=60
    )
    return set(done.stdout.split())


def test_slow_libraries_are_not_loaded_on_the_way() -> None:
    assert loaded_by("from workbench.__main__ import parser; parser()") == set()
    assert loaded_by("import reportlab") == {"reportlab"}
