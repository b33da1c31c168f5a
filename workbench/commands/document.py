"""`groundcourse document`: the purchase memo as PDF."""

import argparse
import sys
from contextlib import suppress
from pathlib import Path

from workbench.commands.terms import add_deal, open_deal, say_fault, say_issues, shown_name
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.atomic import write_atomically
from workbench.files.faults import Fault, UnreadableError
from workbench.report.memo import build
from workbench.text.locale import DEFAULT, find_locale

SUMMARY = "write the purchase memo of a deal as PDF"


def add_arguments(parser: argparse.ArgumentParser) -> None:
    add_deal(parser)
    parser.add_argument("out", type=Path, metavar="OUT.pdf", help="where to write it")
    parser.add_argument("--paper", choices=("a4", "letter"), help="in place of the locale's own")


def run(arguments: argparse.Namespace) -> int:
    from workbench.report.pdf import draw

    deal = open_deal(arguments)
    if _same_file(arguments.deal, arguments.out):
        fault = Fault("", "this is the deal file; name another file for the memo")
        return say_fault(arguments.out, UnreadableError(fault))
    locale = find_locale(deal.conventions.locale) or DEFAULT
    drawn = draw(build(evaluate(compile_deal(deal)), locale, arguments.paper))
    try:
        write_atomically(arguments.out, drawn.pdf)
    except OSError as error:
        return say_fault(arguments.out, error)
    if drawn.lacking:
        marks = " ".join(drawn.lacking)
        print(
            f"{shown_name(arguments.deal)}: printed as a mark, since the font lacks them: {marks}",
            file=sys.stderr,
        )
    return say_issues(deal)


def _same_file(deal: Path, out: Path) -> bool:
    with suppress(OSError):
        return out.samefile(deal)
    return False
