"""`groundcourse working`: how a figure came about, down to what was typed."""

import argparse
import json
import sys
from collections.abc import Iterator
from typing import Any

from workbench.commands.terms import FINE, UNUSABLE, add_deal, open_deal
from workbench.engine.operands import Operand, Ref
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.engine.working import Working
from workbench.report.shown import Asked, Shower, find

SUMMARY = "show how a figure came about, down to what was typed"


def add_arguments(parser: argparse.ArgumentParser) -> None:
    add_deal(parser)
    parser.add_argument(
        "line", metavar="LINE", help="a line or a place of `figures --json`, as in statement.noi"
    )
    parser.add_argument("--year", type=int, help="the deal year, for figures by year")
    parser.add_argument("--json", action="store_true", help="full precision, with key paths")


def run(arguments: argparse.Namespace) -> int:
    shower = Shower(evaluate(compile_deal(open_deal(arguments))))
    asked = find(shower.result, arguments.line, arguments.year)
    if asked is None:
        print(f"{arguments.deal}: there is no figure “{arguments.line}”", file=sys.stderr)
        return UNUSABLE
    if asked.is_input:
        print(*shower.input_text(asked.key), sep="  ")
        return FINE
    fault = _misplaced(shower, asked)
    if fault:
        print(f"{arguments.deal}: {arguments.line}: {fault}", file=sys.stderr)
        return UNUSABLE
    tree = list(shower.tree(asked.key, asked.year))
    if arguments.json:
        workings = [plain(shower, shown) for _, shown in tree]
        json.dump(workings, sys.stdout, indent=1, ensure_ascii=False, allow_nan=False)
        print()
    else:
        for depth, shown in tree:
            print("\n".join(_text(shower, shown, depth)), end="\n\n")
    return FINE


def _misplaced(shower: Shower, asked: Asked) -> str:
    per = shower.result.declared[asked.key].per
    if per in ("month", "year"):
        if asked.year is None or not 1 <= asked.year <= 41:
            return "name a deal year with --year, from 1 to 41"
    elif asked.year is not None:
        return "this is one figure for the whole deal; leave --year out"
    return ""


def _text(shower: Shower, shown: Working, depth: int) -> Iterator[str]:
    indent = "  " * min(depth, 8)
    yield f"{indent}{shower.title(shown)}  {shower.value(shown)}   [{shown.key}]"
    yield f"{indent}  {shown.declared.definition}"
    if shown.value is None and shown.span != "date":
        yield f"{indent}  cannot be given: {shower.why(shown)}"
        return
    if shown.solved:
        yield f"{indent}  at this rate the present values of all flows add up to nothing:"
    elif any(token != Ref(1) for token in shown.tokens) or shown.operands[0].kind != "cells":
        yield f"{indent}  = {shower.names(shown)}"
        yield f"{indent}  = {shower.numbers(shown)}"
    for operand in shown.operands:
        name = "together" if shown.solved else shower.speller.operand(operand)
        yield from _operand(shower, operand, name, indent)


def _operand(shower: Shower, operand: Operand, name: str, indent: str) -> Iterator[str]:
    value = shower.amount(operand.value, shower.unit(operand))
    paths = ", ".join(shower.sources(operand))
    yield f"{indent}    {name}: {value}" + (f"   [{paths}]" if paths else "")
    for cell in operand.cells:
        yield f"{indent}      {shower.cell(operand, cell)}"


def plain(shower: Shower, shown: Working) -> dict[str, Any]:
    """One working as plain data; operands are numbered in the expression as [1], [2], …"""
    return {
        "key": shown.key,
        "label": shower.speller.leaf("line", shown.key),
        shown.span if shown.at is not None else "once": shown.at,
        "value": shown.value,
        "unit": shown.declared.unit,
        "definition": shown.declared.definition,
        "source": shown.declared.source,
        "names": shower.names(shown),
        "expression": "" if shown.solved else _expression(shown),
        "solved": shown.solved,
        "operands": [
            _plain_operand(shower, number, one)
            for number, one in enumerate(shown.operands, start=1)
        ],
    }


def _expression(shown: Working) -> str:
    return "".join(
        f"[{token.number}]"
        if isinstance(token, Ref)
        else token
        if isinstance(token, str)
        else repr(token)
        for token in shown.tokens
    )


def _plain_operand(shower: Shower, number: int, operand: Operand) -> dict[str, Any]:
    return {
        "number": number,
        "label": shower.speller.operand(operand),
        "kind": operand.kind,
        "path": operand.key,
        "span": operand.span,
        "at": operand.at,
        "value": operand.value,
        "how": operand.how,
        "from": shower.sources(operand),
        "cells": [
            {"of": cell.key, "at": cell.at, "value": cell.value, "parts": dict(cell.parts)}
            for cell in operand.cells
        ],
    }
