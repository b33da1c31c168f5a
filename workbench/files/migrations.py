"""Older deal files brought up to date, one version at a time, as plain data."""

from collections.abc import Callable, Mapping
from typing import Any, TypeAlias

from workbench.deal.deal import SCHEMA
from workbench.files.faults import Fault, UnreadableError

Raw: TypeAlias = dict[str, Any]
Migration: TypeAlias = Callable[[Raw], Raw]

MIGRATIONS: Mapping[int, Migration] = {}
"""The step from each version to the next one; version 1 is the first."""


def migrate(
    raw: Raw, migrations: Mapping[int, Migration] = MIGRATIONS, newest: int = SCHEMA
) -> Raw:
    """The file's data as of the newest version. Raises UnreadableError.

    The data given is not changed; each step gets what the step before it returned.
    """
    version = raw.get("schema")
    if not isinstance(version, int) or isinstance(version, bool) or version < 1:
        allowed = f"a whole number from 1 to {newest}" if newest > 1 else "1"
        sentence = f"the version of the schema is needed here; it must be {allowed}"
        raise UnreadableError(Fault("schema", sentence))
    if version > newest:
        sentence = (
            f"this deal was written by a newer program (schema {version}; this one reads up to "
            f"{newest}). Open it with that program; it has not been changed"
        )
        raise UnreadableError(Fault("schema", sentence))
    for step in range(version, newest):
        raw = {**migrations[step](dict(raw)), "schema": step + 1}
    return raw
