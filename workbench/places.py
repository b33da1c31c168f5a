"""Where shipped data lives: inside the package when installed, one level up in a checkout."""

from pathlib import Path

_PACKAGE = Path(__file__).resolve().parent


def _find(name: str) -> Path:
    for parent in (_PACKAGE, _PACKAGE.parent):
        if (parent / name).is_dir():
            return parent / name
    raise FileNotFoundError(f"the folder {name} is missing from this installation")


def resources() -> Path:
    """Fonts, the deal schema and the written pages."""
    return _find("resources")


def sample_deals() -> Path:
    """The invented deals that come with the program."""
    return _find("sample_deals")
