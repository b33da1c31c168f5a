"""`groundcourse document`: the purchase memo as PDF."""

import argparse
import sys
from dataclasses import replace
from pathlib import Path

from workbench.commands.terms import add_deal, open_deal, say_issues
from workbench.files.atomic import write_atomically
from workbench.report.memo import build
from workbench.report.record import record_of
from workbench.text.locale import DEFAULT, find_locale

SUMMARY = "write the purchase memo of a deal as PDF"


def add_arguments(parser: argparse.ArgumentParser) -> None:
    add_deal(parser)
    parser.add_argument("out", type=Path, metavar="OUT.pdf", help="where to write it")
    parser.add_argument("--paper", choices=("a4", "letter"), help="in place of the locale's own")


def run(arguments: argparse.Namespace) -> int:
    from workbench.report.pdf import draw

    deal = open_deal(arguments)
    document = build(deal, record_of(deal), find_locale(deal.conventions.locale) or DEFAULT)
    if arguments.paper:
        document = replace(document, paper=arguments.paper)
    drawn = draw(document)
    write_atomically(arguments.out, drawn.pdf)
    if drawn.lacking:
        marks = " ".join(drawn.lacking)
        print(
            f"{arguments.deal}: printed as a mark, since the font lacks them: {marks}",
            file=sys.stderr,
        )
    return say_issues(deal)
