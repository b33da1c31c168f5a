"""The examples in the engine's docstrings hold."""

import doctest
import importlib
import pkgutil
from functools import cache

import pytest

from workbench import engine

MODULES = [name for _, name, _ in pkgutil.walk_packages(engine.__path__, f"{engine.__name__}.")]


@cache
def outcome(name: str) -> doctest.TestResults:
    return doctest.testmod(importlib.import_module(name))


@pytest.mark.parametrize("name", MODULES)
def test_examples_hold(name: str) -> None:
    assert outcome(name).failed == 0


def test_public_functions_have_examples() -> None:
    tried = {name.rpartition(".")[2] for name in MODULES if outcome(name).attempted}
    assert tried >= {"actuarial", "calendar", "cash", "irr", "loan", "plan", "result"}
