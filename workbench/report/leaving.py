"""How the exit was derived: from the income or price it starts from down to its present value."""

from workbench.deal.leave import ExitPart
from workbench.report.document import Column, Section, Table, plain
from workbench.report.leaving_methods import Sale, Step, method_steps
from workbench.report.leaving_prices import part_prices
from workbench.report.wording import sentence
from workbench.report.years import Years
from workbench.text import numbers
from workbench.text.choices import choice
from workbench.text.messages import word_reason

_WHOLE = 24
"""A derivation of up to so many steps is kept on one page."""
_TITLE = "How the exit was derived"


def exit_section(years: Years) -> Section:
    """A table that is read from top to bottom; its amounts are lines of the engine."""
    if not years.count:
        return Section(_TITLE, (plain("The hold is not known, so there is no sale."),))
    sale = Sale(years)
    steps = [*_prices(sale), *_net(sale)]
    heading = f"Sale at {years.voice.sale_date(years.count)}"
    table = Table(
        (Column(heading), Column(years.voice.unit(), "right", fit=True)),
        tuple((step.label, step.text) for step in steps),
        frozenset(number for number, step in enumerate(steps) if step.strong),
        notes=tuple(step.note for step in steps),
        fine=True,
        whole=len(steps) <= _WHOLE,
    )
    if years.result.figure("exit_price") is not None:
        return Section(_TITLE, (table,))
    reason = years.result.reason("exit_price")
    said = word_reason(years.voice.deal, reason.code, reason.words, reason.issue)
    return Section(_TITLE, (plain(f"The sale has no price. {sentence(said)}"), table))


def _prices(sale: Sale) -> list[Step]:
    """The one method, or each part of the blend and what they come to together."""
    deal, voice = sale.years.voice.deal, sale.years.voice
    prices = part_prices(sale.years.result, sale.hold)
    if not deal.leave.blend:
        return [_headed(deal.leave.method, ""), *method_steps(sale, deal.leave.method, prices[0])]
    steps: list[Step] = []
    weighed: list[str] = []
    for part, price in zip(deal.leave.blend, prices, strict=True):
        steps += [
            _headed(part.method, _weight(sale, part)),
            *method_steps(sale, part.method, price),
        ]
        weighed.append(f"{_weight(sale, part)} × {voice.money(price)}")
    note = " + ".join(weighed)
    return [*steps, sale.amount("Exit price, blended", "exit_price", note=note, strong=True)]


def _headed(method: str, weight: str) -> Step:
    name = f"By the {choice('method', method)}"
    return Step(f"{name}, {weight} of the blend" if weight else name, "", strong=True)


def _weight(sale: Sale, part: ExitPart) -> str:
    return sale.years.voice.rate(part.weight)


def _net(sale: Sale) -> list[Step]:
    """What is left of the price, and what that is worth at closing."""
    voice, hold = sale.years.voice, sale.hold
    result = sale.years.result
    price, net = result.figure("exit_price"), result.figure("exit_net")
    balance = 0.0
    kept: list[Step] = []
    if "reserve_balance" in result.declared:
        balance = result.figure("reserve_balance", hold) or 0.0
        kept = [Step("Reserve balance, comes back", voice.money(balance))]
    cost = None if price is None or net is None else net - price - balance + 0.0
    rate = voice.rate(voice.deal.leave.selling_cost)
    factor = result.figure("exit_discount_of_year", hold)
    return [
        Step(f"Selling cost, {rate} of the exit price", voice.money(cost)),
        *kept,
        sale.amount("Net exit", "exit_net", strong=True),
        Step(
            "Discount factor",
            numbers.number(factor, voice.locale, 4),
            f"required return of {voice.required_return()}, {voice.years(hold)} from closing",
        ),
        sale.amount("Present value of the net exit", "exit_present_value", strong=True),
    ]
