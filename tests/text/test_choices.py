"""Choices in words."""

from collections.abc import Iterator
from typing import Any, Literal, get_args, get_origin

import pytest

from workbench.deal.deal import Deal
from workbench.deal.inputs import declared
from workbench.text.choices import CHOICES, choice


def choices(record: Any) -> Iterator[tuple[str, str]]:
    """Every value of every choice below a record class, with its field."""
    for name, field in declared(record).items():
        for kind in (field.kind, *get_args(field.kind)):
            if get_origin(kind) is Literal:
                yield from ((name, value) for value in get_args(kind))
            elif isinstance(kind, type) and hasattr(kind, "__dataclass_fields__"):
                yield from choices(kind)


@pytest.mark.parametrize(("field", "value"), sorted(set(choices(Deal))))
def test_every_choice_has_words(field: str, value: str) -> None:
    if field != "locale":
        assert value in CHOICES[field]
        assert "_" not in choice(field, value)


def test_nothing_is_named_that_no_input_has() -> None:
    listed = {(field, value) for field, values in CHOICES.items() for value in values}
    assert listed <= set(choices(Deal))


def test_what_needs_no_words_stands_for_itself() -> None:
    assert choice("locale", "de-DE") == "de-DE"
