"""The deal file: read whole or not at all, written whole or not at all."""

import json
from dataclasses import fields, is_dataclass
from datetime import date
from pathlib import Path
from typing import Any, cast

from pydantic import ValidationError

from workbench.deal.checks_records import misnamed
from workbench.deal.deal import Deal
from workbench.files.adapter import deal_adapter
from workbench.files.atomic import write_atomically
from workbench.files.faults import Fault, UnreadableError, system_fault
from workbench.files.migrations import Raw, migrate
from workbench.files.refusals import misspelt, refusals
from workbench.files.strict_json import parse


def read_deal(path: Path) -> Deal:
    """The deal in a file. Raises UnreadableError, each fault with its place in words."""
    try:
        text = path.read_text(encoding="utf-8-sig")
    except UnicodeDecodeError:
        raise UnreadableError(Fault("", "this is not a deal: it is not UTF-8 text")) from None
    except OSError as error:
        raise UnreadableError(system_fault(error)) from None
    return deal_from_text(text)


def deal_from_text(text: str) -> Deal:
    """The deal in a JSON text. Raises UnreadableError."""
    raw = parse(text)
    if not isinstance(raw, dict):
        raise UnreadableError(Fault("", "a deal is a JSON object in braces"))
    return deal_from_raw(raw)


def deal_from_raw(raw: Raw) -> Deal:
    """The deal in plain data of any schema version. Raises UnreadableError."""
    current = migrate(raw)
    try:
        deal = cast(Deal, deal_adapter().validate_json(json.dumps(current), strict=True))
    except ValidationError as error:
        raise UnreadableError(*refusals(current, error.errors())) from None
    faults = [*misspelt(current), *(Fault(*one) for one in misnamed(deal))]
    if faults:
        raise UnreadableError(*faults)
    return deal


def deal_to_raw(deal: Deal) -> Raw:
    """The whole deal as plain data, every input written, pictures last."""
    return cast(Raw, _plain(deal))


def deal_to_text(deal: Deal) -> str:
    """The file's text: two spaces of indent, keys in the order of the records."""
    return json.dumps(deal_to_raw(deal), indent=2, ensure_ascii=False, allow_nan=False) + "\n"


def write_deal(path: Path, deal: Deal) -> None:
    """Write the deal file. Raises OSError; an old file then stands as it was."""
    write_atomically(path, deal_to_text(deal).encode("utf-8"))


def _plain(value: Any) -> Any:
    if is_dataclass(value):
        return {spec.name: _plain(getattr(value, spec.name)) for spec in fields(value)}
    if isinstance(value, tuple):
        return [_plain(item) for item in value]
    if isinstance(value, dict):
        return {str(key): _plain(held) for key, held in value.items()}
    return value.isoformat() if isinstance(value, date) else value
