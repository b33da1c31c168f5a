"""The recovery file: what was typed since the last save, kept beside the settings."""

import hashlib
import json
from dataclasses import dataclass
from pathlib import Path

from workbench.deal.deal import Deal
from workbench.files.atomic import write_atomically
from workbench.files.deal_file import deal_from_raw, deal_to_raw
from workbench.files.faults import UnreadableError
from workbench.files.strict_json import parse


@dataclass(frozen=True)
class Recovered:
    """A deal left behind by a session that did not end well, and the file it belongs to."""

    deal: Deal
    path: Path | None
    kept_in: Path


def recovery_path(folder: Path, path: Path | None) -> Path:
    """Where the unsaved state of a deal file is kept; a deal without a file has one place."""
    name = "unnamed" if path is None else hashlib.sha256(str(path).encode()).hexdigest()[:24]
    return folder / f"{name}.recovery"


def keep(folder: Path, path: Path | None, deal: Deal) -> None:
    """Write the unsaved state. Raises OSError."""
    folder.mkdir(parents=True, exist_ok=True)
    whole = {"path": None if path is None else str(path), "deal": deal_to_raw(deal)}
    write_atomically(recovery_path(folder, path), json.dumps(whole).encode("utf-8"))


def forget(folder: Path, path: Path | None) -> None:
    """Drop the unsaved state, once saved or given up."""
    recovery_path(folder, path).unlink(missing_ok=True)


def left_behind(folder: Path) -> list[Recovered]:
    """Every unsaved state that can still be read; what cannot is left where it is."""
    found = []
    for kept in sorted(folder.glob("*.recovery")):
        try:
            whole = parse(kept.read_text(encoding="utf-8"))
            path = None if whole["path"] is None else Path(whole["path"])
            found.append(Recovered(deal_from_raw(whole["deal"]), path, kept))
        except (OSError, UnicodeDecodeError, UnreadableError, KeyError, TypeError):
            continue
    return found
