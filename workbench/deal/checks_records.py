"""Ids, references, statements, cases, pictures and drafts."""

import base64
import binascii
import hashlib
import re
from collections.abc import Iterator
from dataclasses import is_dataclass
from typing import Any

from workbench.deal.checks_leases import is_dated
from workbench.deal.deal import ID_LETTERS, Deal
from workbench.deal.inputs import declared
from workbench.deal.issues import Issue
from workbench.deal.paths import UnknownPathError, find_item, locate

PICTURES = 24
"""The most pictures a deal holds."""


def check_records(deal: Deal) -> Iterator[Issue]:
    if not re.fullmatch("[A-Z]{3}", deal.conventions.currency):
        yield Issue("conventions.currency", "bad_currency", deal.conventions.currency)
    yield from _check_references(deal)
    for statement in deal.statements:
        if statement.start and statement.end and statement.end < statement.start:
            other = {"start": statement.start}
            path = f"statements@{statement.id}.end"
            yield Issue(path, "before_start", statement.end, other=other)
    for case in deal.cases:
        named = [*case.set, *case.remove, *(addition.to for addition in case.add)]
        for path in named:
            if not _exists(deal, path):
                yield Issue(f"cases@{case.id}", "path_lost", path, other={"case": case.name})
    for path, text in deal.drafts.items():
        yield Issue(path, "draft", text)


def items(record: Any) -> Iterator[tuple[str, Any]]:
    """Every list item at any depth, with the name of its list."""
    for name in declared(type(record)):
        value = getattr(record, name)
        for item in value if isinstance(value, tuple) else (value,):
            if is_dataclass(item) and not isinstance(item, type):
                if hasattr(item, "id"):
                    yield name, item
                yield from items(item)


def highest_id(record: Any) -> tuple[int, str]:
    """The highest number among the ids below a record, with its id; 0 where there is none."""
    found = ((int(item.id[1:]), str(item.id)) for _, item in items(record))
    return max(found, default=(0, ""))


def check_ids(next_id: int, highest: tuple[int, str]) -> Iterator[Issue]:
    """Whether the next id lies above all others."""
    number, identity = highest
    if number >= next_id:
        yield Issue("next_id", "id_ahead", next_id, number + 1, other={"id": identity})


def misnamed(deal: Deal) -> Iterator[tuple[str, str]]:
    """Items whose id could not be named in a key path, with what is wrong; none in a sound file."""
    seen: set[str] = set()
    for name, item in items(deal):
        letter = ID_LETTERS[name]
        if re.fullmatch(rf"{letter}[1-9][0-9]{{0,8}}", item.id) is None:
            yield f"{name}@{item.id}", f"an id here is the letter {letter} and a number from 1"
        elif item.id in seen:
            yield f"{name}@{item.id}", "this id stands twice; each item has its own"
        seen.add(item.id)


def _check_references(deal: Deal) -> Iterator[Issue]:
    tied = [item for item in deal.other_income if item.lease is not None]
    leases = (lease for space in deal.spaces for lease in space.leases) if tied else ()
    dated = {lease.id for lease in leases if is_dated(lease)}
    for item in tied:
        if item.lease not in dated:
            yield Issue(f"other_income@{item.id}.lease", "no_such_lease", item.lease)
    for digest in deal.property.pictures:
        if digest not in deal.pictures:
            yield Issue("property.pictures", "picture_lost", digest)


def _exists(deal: Deal, path: str) -> bool:
    try:
        if "@" in path and "." not in path:
            find_item(deal, path)
        else:
            locate(deal, path)
    except UnknownPathError:
        return False
    return True


def check_pictures(deal: Deal) -> Iterator[Issue]:
    if len(deal.pictures) > PICTURES:
        yield Issue("pictures", "too_many", len(deal.pictures), 0, PICTURES)
    for digest, text in deal.pictures.items():
        if not _is_picture(digest, text):
            yield Issue(f"pictures.{digest[:12]}", "not_the_picture", digest)


def _is_picture(digest: str, text: str) -> bool:
    try:
        data = base64.b64decode(text, validate=True)
    except (binascii.Error, ValueError):
        return False
    return data.startswith(b"\xff\xd8\xff") and hashlib.sha256(data).hexdigest() == digest
