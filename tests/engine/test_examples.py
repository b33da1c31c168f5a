"""The examples in the engine's docstrings hold."""

import doctest
import importlib
import pkgutil

import pytest

from workbench import engine

MODULES = [name for _, name, _ in pkgutil.walk_packages(engine.__path__, f"{engine.__name__}.")]


@pytest.mark.parametrize("name", MODULES)
def test_examples_hold(name: str) -> None:
    assert doctest.testmod(importlib.import_module(name)).failed == 0


def test_public_functions_have_examples() -> None:
    tried = {name: doctest.testmod(importlib.import_module(name)).attempted for name in MODULES}
    with_examples = {name.rpartition(".")[2] for name, count in tried.items() if count}
    assert with_examples >= {"actuarial", "calendar", "cash", "irr", "loan", "result"}
