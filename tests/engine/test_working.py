"""Every figure of the record comes back from the operands its working prints."""

import math
from typing import Any

import pytest

from tests.oracle.test_random_deals import drawn
from workbench.engine.figures import read_figures
from workbench.engine.plan import compile_deal
from workbench.engine.result import Result, evaluate
from workbench.engine.working import Operand, Ref, Working, working
from workbench.files.deal_file import deal_from_raw, read_deal
from workbench.places import sample_deals

SAMPLES = sorted(sample_deals().glob("*.deal"))


def gathered(operand: Operand) -> float:
    """An operand's value from its own cells, so that what is printed below it adds up too."""
    values = [cell.value for cell in operand.cells]
    if operand.how == "one" or not values:
        return operand.value
    if operand.how == "first":
        return next(place for place, value in enumerate(values) if value >= 0) / 12
    return {"sum": math.fsum, "product": math.prod, "least": min}[operand.how](values)


def comes_to(shown: Working) -> float:
    """The expression worked out anew, by plain arithmetic on what is printed."""
    words = {" × ": "*", " ÷ ": "/", " − ": "-", "−": "-", " ^ ": "**", "; ": ","}
    text = ""
    for token in shown.tokens:
        if isinstance(token, Ref):
            text += f"({gathered(shown.operands[token.number - 1])!r})"
        elif isinstance(token, str):
            text += words.get(token, token)
        else:
            text += repr(token)
    return float(eval(text, {"least": min, "greatest": max, "inf": math.inf}))


def misfits(result: Result) -> list[str]:
    """Figures that their working does not give back to 1e-9."""
    found = []
    for read in read_figures(result):
        if read.figure.how in ("given", "nothing"):
            continue
        values = read.value if isinstance(read.value, list) else [read.value]
        for year, value in enumerate(values, start=1):
            if value is None:
                continue
            at = year if isinstance(read.value, list) else None
            shown = working(result, read.figure.key, at)
            cells = [cell.value for one in shown.operands for cell in one.cells]
            slack = 1e-13 * math.fsum(map(abs, cells))
            if shown.solved:
                fine = abs(gathered(shown.operands[0])) <= 10 * slack
            else:
                slack += 1e-9
                fine = math.isclose(comes_to(shown), value, rel_tol=1e-9, abs_tol=slack)
            if not fine:
                found.append(f"{'.'.join(read.figure.place)} {at}: {value!r} {shown.tokens}")
    return found


def computed(raw: dict[str, Any]) -> Result:
    return evaluate(compile_deal(deal_from_raw(raw)))


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_samples_come_back(path: Any) -> None:
    assert misfits(evaluate(compile_deal(read_deal(path)))) == []


@pytest.mark.parametrize("number", range(40))
def test_random_deals_come_back(number: int) -> None:
    assert misfits(computed(drawn(7000 + number, 1)[0])) == []
