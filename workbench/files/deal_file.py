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
from workbench.files.faults import Fault, UnreadableError
from workbench.files.migrations import Raw, migrate
from workbench.files.strict_json import parse


def read_deal(path: Path) -> Deal:
    """The deal in a file. Raises UnreadableError, each fault with its place in words."""
    try:
        text = path.read_text(encoding="utf-8")
    except UnicodeDecodeError:
        raise UnreadableError(Fault("", "this is not a deal: it is not UTF-8 text")) from None
    except OSError as error:
        reason = error.strerror or "it cannot be read"
        raise UnreadableError(Fault("", f"{reason[0].lower()}{reason[1:]}")) from None
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
        deal = deal_adapter().validate_json(json.dumps(current), strict=True)
    except ValidationError as error:
        raise UnreadableError(*(_fault(current, dict(one)) for one in error.errors())) from None
    faults = [Fault(path, sentence) for path, sentence in misnamed(deal)]
    if faults:
        raise UnreadableError(*faults)
    return cast(Deal, deal)


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


def _fault(raw: Raw, error: dict[str, Any]) -> Fault:
    """One of pydantic's errors at a key path of ours, worded for the person who typed the file."""
    location = [part for part in error["loc"] if part != "[key]"]
    place = _place(raw, location)
    shown = json.dumps(error.get("input"), ensure_ascii=False, default=str)
    shown = shown if len(shown) <= 60 else f"{shown[:57]}…"
    kind = str(error["type"])
    if kind == "unexpected_keyword_argument":
        return Fault(place, "a deal has no such key; check its spelling against the schema")
    if kind == "missing":
        return Fault(place, "this must be there and is missing")
    message = str(error["msg"]).removeprefix("Input should be ")
    return Fault(place, f"{shown} is not {_noun(kind, message)}")


_NOUNS = {
    "float_type": "a number",
    "finite_number": "a finite number",
    "int_type": "a whole number",
    "int_from_float": "a whole number",
    "int_parsing": "a deal year, a whole number from 1",
    "string_type": "a text",
    "bool_type": "true or false",
    "date_type": "a date like 2027-01-31",
    "date_from_datetime_parsing": "a date like 2027-01-31",
    "date_parsing": "a date like 2027-01-31",
    "tuple_type": "a list in brackets",
    "mapping_type": "an object in braces",
    "dict_type": "an object in braces",
    "dataclass_type": "an object in braces",
    "dataclass_exact_type": "an object in braces",
}


def _noun(kind: str, message: str) -> str:
    if kind == "literal_error":
        return "one of " + message.replace("'", "").replace(" or ", ", ")
    return _NOUNS.get(kind, message)


def _place(raw: Any, location: list[Any]) -> str:
    """The key path of an error's location: items by id where they have one, else by number."""
    place = ""
    here = raw
    for part in location:
        if isinstance(part, int) and isinstance(here, list):
            here = here[part]
            identity = here.get("id") if isinstance(here, dict) else None
            name = place.rpartition(".")[2]
            place = f"{name}@{identity}" if isinstance(identity, str) else f"{place}[{part + 1}]"
            continue
        here = here.get(str(part)) if isinstance(here, dict) else None
        place = f"{place}.{part}" if place else str(part)
    return place
