"""Why plain data is not a deal, each reason at its key path, in words for who typed the file."""

import json
import re
from collections.abc import Iterator, Mapping, Sequence
from typing import Any

from workbench.files.faults import Fault
from workbench.files.located import Location, allowed_at, field_at, place_of, within
from workbench.text.excerpt import excerpt

_YEAR = re.compile("0|-?[1-9][0-9]*")
_DATE = re.compile("[0-9]{4}-[0-9]{2}-[0-9]{2}")

_A_YEAR = "a deal year, a whole number from 1"
_A_DATE = "a date like 2027-01-31"
_NOUNS = {
    "float_type": "a number",
    "finite_number": "a number that a deal can hold",
    "int_type": "a whole number",
    "int_parsing": _A_YEAR,
    "int_parsing_size": _A_YEAR,
    "string_type": "a text",
    "bool_type": "true or false",
    "date_type": _A_DATE,
    "date_parsing": _A_DATE,
    "tuple_type": "a list in brackets",
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


def misspelt(raw: Any) -> Iterator[Fault]:
    """Years and dates in a second spelling, of which pydantic takes some.

    A year `01` beside `1` would lose one of the two, and a date `"86400"` would be seconds.
    """
    for location, sentence in _misspelt(raw, ()):
        yield Fault(place_of(raw, location), sentence)


def _misspelt(raw: Any, location: Location) -> Iterator[tuple[Location, str]]:
    if isinstance(raw, dict):
        field = field_at(location)
        if field is not None and field.is_row:
            odd = (key for key in raw if _YEAR.fullmatch(key) is None)
            yield from ((location, f"{_shown(key)} is not {_A_YEAR}, like 1 or 12") for key in odd)
        else:
            for key, held in raw.items():
                yield from _misspelt(held, (*location, key))
    elif isinstance(raw, list):
        for position, held in enumerate(raw):
            yield from _misspelt(held, (*location, position))
    elif isinstance(raw, str) and _DATE.fullmatch(raw) is None and _is_date(location):
        yield location, f"{_shown(raw)} is not {_A_DATE}"


def _is_date(location: Location) -> bool:
    field = field_at(location)
    return field is not None and field.input is not None and field.input.unit == "date"


def _noun(error: Mapping[str, Any]) -> str:
    value = error["input"]
    if error["type"] == "int_type" and isinstance(value, float) and value.is_integer():
        return "written as a whole number, without a decimal point"
    message = str(error["msg"]).removeprefix("Input should be ")
    if error["type"] == "literal_error":
        return "one of " + message.replace("'", "").replace(" or ", ", ")
    return _NOUNS.get(str(error["type"]), message)


def _shown(value: Any) -> str:
    return excerpt(json.dumps(value, ensure_ascii=False))
