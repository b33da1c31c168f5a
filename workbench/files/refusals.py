"""Why plain data is not a deal, each reason at its key path, in words for who typed the file."""

import json
import re
from collections.abc import Iterator, Mapping, Sequence
from typing import Any

from workbench.files.faults import Fault
from workbench.files.located import Location, allowed_at, field_at, place_of, within
from workbench.text.excerpt import excerpt

_YEAR = re.compile("0|-?[1-9][0-9]*")

_A_YEAR = "a deal year, a whole number from 1"
_NOUNS = {
    "float_type": "a number",
    "finite_number": "a number that a deal can hold",
    "int_type": "a whole number",
    "int_parsing": _A_YEAR,
    "int_parsing_size": _A_YEAR,
    "string_type": "a text",
    "bool_type": "true or false",
    "date_type": "a date like 2027-01-31",
    "date_from_datetime_parsing": "a date like 2027-01-31",
    "date_parsing": "a date like 2027-01-31",
    "tuple_type": "a list in brackets",
    "mapping_type": "an object in braces",
    "dict_type": "an object in braces",
    "dataclass_type": "an object in braces",
}
"""What was wanted, by the kind of pydantic's error."""

_SENTENCES = {
    "missing": "this must be there and is missing",
    "unexpected_keyword_argument": "a deal has no such key; check its spelling against the schema",
}


def refusals(raw: Any, errors: Sequence[Mapping[str, Any]]) -> Iterator[Fault]:
    """pydantic's errors as faults, one a place."""
    wanted: dict[Location, list[str]] = {}
    shown: dict[Location, str] = {}
    for error in errors:
        location = tuple(part for part in error["loc"] if part != "[key]")
        if error["type"] in _SENTENCES:
            yield Fault(place_of(raw, location), _SENTENCES[error["type"]])
            continue
        location = within(raw, location)
        wanted.setdefault(location, []).append(_noun(error))
        shown[location] = _shown(error["input"])
    for location, nouns in wanted.items():
        allowed = "" if nouns == [_A_YEAR] else allowed_at(location)
        sentence = f"{shown[location]} is not {' or '.join(nouns)}{allowed}"
        yield Fault(place_of(raw, location), sentence)


def odd_years(raw: Any, location: Location = ()) -> Iterator[Fault]:
    """Years written in a second way, as `01`: beside `1` one of the two would be lost."""
    if isinstance(raw, dict):
        field = field_at(location)
        if field is None or not field.is_row:
            for key, held in raw.items():
                yield from odd_years(held, (*location, key))
            return
        for key in raw:
            if _YEAR.fullmatch(key) is None:
                sentence = f"{_shown(key)} is not how a deal year is written; write it like 1 or 12"
                yield Fault(place_of(raw, location), sentence)
    elif isinstance(raw, list):
        for position, held in enumerate(raw):
            yield from odd_years(held, (*location, position))


def _noun(error: Mapping[str, Any]) -> str:
    message = str(error["msg"]).removeprefix("Input should be ")
    if error["type"] == "literal_error":
        return "one of " + message.replace("'", "").replace(" or ", ", ")
    return _NOUNS.get(str(error["type"]), message)


def _shown(value: Any) -> str:
    return excerpt(json.dumps(value, ensure_ascii=False, default=str))
