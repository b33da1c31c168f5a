"""The working of every figure, as the command prints it, gives the figure back."""

import json
import math
import re
from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest

from tests.oracle.test_random_deals import drawn
from workbench.__main__ import main
from workbench.commands.working import plain
from workbench.engine.figures import read_figures
from workbench.engine.plan import compile_deal
from workbench.engine.result import Result, evaluate
from workbench.files.deal_file import deal_from_raw, read_deal
from workbench.places import sample_deals
from workbench.report.shown import Shower, find

SAMPLES = sorted(sample_deals().glob("*.deal"))
PARADE = str(sample_deals() / "weidenufer-parade.deal")


def gathered(operand: dict[str, Any]) -> float:
    """An operand's value from the cells printed below it, where there are any."""
    values = [cell["value"] for cell in operand["cells"]]
    if operand["how"] == "one" or not values:
        return float(operand["value"])
    if operand["how"] == "first":
        return next(place for place, value in enumerate(values) if value >= 0) / 12
    ways: dict[str, Callable[[list[float]], float]] = {
        "sum": math.fsum,
        "product": math.prod,
        "least": min,
    }
    return ways[operand["how"]](values)


def comes_to(shown: dict[str, Any]) -> float:
    """The printed expression worked out anew."""
    operands = {one["number"]: gathered(one) for one in shown["operands"]}
    text = re.sub(r"\[(\d+)\]", lambda found: f"({operands[int(found[1])]!r})", shown["expression"])
    for sign, python in (("×", "*"), ("÷", "/"), ("−", "-"), ("^", "**"), (";", ",")):
        text = text.replace(sign, python)
    return float(eval(text, {"least": min, "greatest": max, "inf": math.inf}))


def misfits(result: Result) -> list[str]:
    """Figures of the record that the printed operands do not give back to 1e-9."""
    shower, found = Shower(result), []
    for read in read_figures(result):
        if read.figure.how in ("given", "nothing"):
            continue
        by_year = isinstance(read.value, list)
        for year, value in enumerate(read.value if by_year else [read.value], start=1):
            if value is None:
                continue
            shown = json.loads(
                json.dumps(
                    plain(shower, shower.working(read.figure.key, year if by_year else None))
                )
            )
            cells = [cell["value"] for one in shown["operands"] for cell in one["cells"]]
            slack = 1e-13 * math.fsum(map(abs, cells))
            if shown["solved"]:
                fine = abs(math.fsum(cells)) <= 10 * slack and shown["value"] == value
            else:
                near = slack + 1e-9
                fine = math.isclose(comes_to(shown), value, rel_tol=1e-9, abs_tol=near)
            if not fine:
                found.append(f"{'.'.join(read.figure.place)} {year}: {value!r} {shown}")
    return found


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_samples_come_back(path: Path) -> None:
    assert misfits(evaluate(compile_deal(read_deal(path)))) == []


@pytest.mark.parametrize("number", range(40))
def test_random_deals_come_back(number: int) -> None:
    raw = drawn(7000 + number, 1)[0]
    assert misfits(evaluate(compile_deal(deal_from_raw(raw)))) == []


def test_a_false_operand_is_noticed() -> None:
    shower = Shower(evaluate(compile_deal(read_deal(Path(PARADE)))))
    shown = plain(shower, shower.working("noi", 3))
    assert math.isclose(comes_to(shown), shown["value"], rel_tol=1e-12)
    shown["operands"][0]["value"] += 1.0
    assert not math.isclose(comes_to(shown), shown["value"], rel_tol=1e-9)


def said(capsys: pytest.CaptureFixture[str], *words: str) -> tuple[int, str, str]:
    status = main(["working", *words])
    out, err = capsys.readouterr()
    return status, out, err


def test_text_goes_down_to_what_was_typed(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, err = said(capsys, PARADE, "statement.noi", "--year", "3")
    assert (status, err) == (0, "")
    first = out.split("\n\n")[0].splitlines()
    assert first[0].startswith("Net operating income, reserves below, year 3  283.603,55")
    assert "= Effective gross income, year 3 + Operating expenses, year 3" in first[2]
    assert "= 369.428,80 + (−85.825,25)" in first[3]
    for path in ("[earn.vacancy]", "[earn.growth, earn.depreciation]", "[expenses@x"):
        assert path in out
    assert "Apotheke am Weidenufer” : " not in out
    assert "lease e2 “Apotheke am Weidenufer”: 50.117,33" in out


def test_a_rate_shows_flows_factors_and_a_sum_of_nothing(
    capsys: pytest.CaptureFixture[str],
) -> None:
    status, out, _ = said(capsys, PARADE, "irr.unlevered")
    assert status == 0
    assert "IRR, unlevered  6,793151" in out
    assert "at this rate the present values of all flows add up to nothing:" in out
    assert re.search(r"together: −?0,00", out)
    assert "1 month after closing" in out
    assert "factor 0,994538" in out


def test_inputs_and_missing_figures(capsys: pytest.CaptureFixture[str]) -> None:
    assert said(capsys, PARADE, "price")[1] == "Price  3.890.000,00\n"
    assert said(capsys, PARADE, "property.name")[1] == "Name  Weidenufer parade\n"
    assert said(capsys, PARADE, "returns.equity")[1].startswith("Required return on equity")
    status, out, _ = said(capsys, PARADE, "value", "--set", "purchase.price=null")
    assert status == 0 and "Value on these assumptions" in out
    status, out, _ = said(capsys, PARADE, "margin", "--set", "purchase.price=null")
    assert "cannot be given: waits for an input" in out


@pytest.mark.parametrize(
    ("words", "sentence"),
    [
        (["nonsense"], "there is no figure “nonsense”"),
        (["noi"], "name a deal year with --year, from 1 to 41"),
        (["noi", "--year", "0"], "name a deal year with --year, from 1 to 41"),
        (["noi", "--year", "42"], "name a deal year with --year, from 1 to 41"),
        (["value", "--year", "2"], "leave --year out"),
    ],
)
def test_what_cannot_be_shown(
    capsys: pytest.CaptureFixture[str], words: list[str], sentence: str
) -> None:
    status, out, err = said(capsys, PARADE, *words)
    assert (status, out) == (2, "")
    assert sentence in err


def test_json_holds_the_whole_tree(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, _ = said(capsys, PARADE, "value", "--json")
    tree = json.loads(out)
    assert status == 0
    assert tree[0]["key"] == "value"
    keys = [(one["key"], one.get("year"), one.get("month"), one.get("date")) for one in tree]
    assert len(keys) == len(set(keys))
    assert {"value_in_hand", "exit_present_value", "net_exit_of_year"} <= {one[0] for one in keys}


def test_find() -> None:
    result = evaluate(compile_deal(read_deal(Path(PARADE))))
    asked = find(result, "dscr.noi", 2)
    assert asked is not None and (asked.key, asked.year, asked.is_input) == ("dscr_noi", 2, False)
    assert find(result, "statement.recoveries", 1) is None
    assert find(result, "earn", None) is None
