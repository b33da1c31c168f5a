"""The memo's sentences about value, price and what they rest on."""

from workbench.charts.wrapping import Run
from workbench.report.document import Paragraph
from workbench.report.readings import Readings
from workbench.report.voice import Voice


def lead(read: Readings, voice: Voice) -> Paragraph:
    """What the memo says first: the value, how it stands to the price, and what it rests on."""
    value = read.number("value")
    if value is None:
        reason = read.reason("value", "exit") or "A figure it needs is missing"
        return Paragraph((Run(f"No value can be given. {sentence(reason)}"),), "lead")
    runs = [
        Run("On these assumptions, and at a required return of "),
        Run(f"{voice.required_return()}, the property "),
        *_worth(value, voice),
        Run(f"{_beside_price(read, voice)} "),
    ]
    share = read.number("exit_value_share")
    if share is not None:
        runs += [
            Run(voice.share(share), "bold"),
            Run(f" of the value is the sale at {voice.sale_date(read.hold)}; "),
            Run(_reference(read, voice)),
        ]
    elif value <= 0:
        runs.append(Run("The value is not above zero, so no shares of it are given."))
    return Paragraph(tuple(runs), "lead")


def _worth(value: float, voice: Voice) -> tuple[Run, ...]:
    if value > 0:
        return Run("is worth "), Run(voice.priced(value), "bold")
    if value < 0:
        return Run("would be worth less than nothing: "), Run(voice.priced(value), "bold")
    return (Run("would be worth nothing"),)


def _beside_price(read: Readings, voice: Voice) -> str:
    """Margin in words, as the end of a sentence."""
    margin = read.number("margin")
    if margin is None:
        return "."
    amount = voice.money(abs(margin))
    if amount == voice.money(0.0):
        return ", the same as its price, purchase costs and initial works together."
    side = "more" if margin > 0 else "less"
    return f", {amount} {side} than its price, purchase costs and initial works together."


def _reference(read: Readings, voice: Voice) -> str:
    reference = read.number("reference_share")
    if reference is None:
        return "a reference share for this hold cannot be given."
    return f"the reference share for this hold is {voice.share(reference)}."


def rests_on(read: Readings, voice: Voice) -> tuple[Paragraph, ...]:
    """What value and price stand on, in words and figures."""
    paragraphs = [_tiers(read, voice), _exit_beside_reference(read, voice)]
    paragraphs += [_ground(read, voice), _sale(read, voice)]
    return tuple(Paragraph(runs) for runs in paragraphs if runs)


def _tiers(read: Readings, voice: Voice) -> tuple[Run, ...]:
    in_hand, expected, leaving = (
        read.number(f"tiers.{tier}") for tier in ("in_hand", "expected", "exit")
    )
    if in_hand is None or expected is None:
        return ()
    runs = [Run("No rent is under contract. Brought back to today, rent only expected comes to ")]
    if in_hand:
        runs = [
            Run("Brought back to today, rent already under contract comes to "),
            Run(voice.money(in_hand), "bold"),
            Run(" and rent only expected to "),
        ]
    runs += [Run(voice.money(expected), "bold"), Run(", after its share of the costs")]
    if leaving is not None:
        runs += [
            Run(f"; the sale at {voice.sale_date(read.hold)} comes to "),
            Run(voice.money(leaving), "bold"),
            Run(", after selling costs"),
        ]
    return (*runs, Run("."))


def _exit_beside_reference(read: Readings, voice: Voice) -> tuple[Run, ...]:
    share, reference = read.number("exit_value_share"), read.number("reference_share")
    if share is None:
        return ()
    hold = voice.years(read.hold)
    stated = (Run("The exit-value share is "), Run(voice.share(share), "bold"))
    if reference is None:
        reason = sentence(read.reason("reference_share") or "It cannot be computed")
        return (*stated, Run(f" at a hold of {hold}. There is no reference share. {reason}"))
    beyond = share - reference
    side = "above" if beyond >= 0 else "below"
    return (
        *stated,
        Run(f" at a hold of {hold}. The reference share is "),
        Run(voice.share(reference), "bold"),
        Run(
            ": what the sale would be of the value if its price were simply the later rents, less "
            "their costs, brought back at the same return. The share lies "
            f"{voice.points(abs(beyond))} {side} it."
        ),
    )


def _ground(read: Readings, voice: Voice) -> tuple[Run, ...]:
    ground = read.number("ground_share")
    if ground is None:
        return ()
    if not ground:
        return (Run("The ground share is nil: none of the price stands on rent under contract."),)
    return (
        Run("The ground share is "),
        Run(voice.share(ground), "bold"),
        Run(
            ": so much of the price stands on rent under contract, after its share of the costs. "
            "The rest stands on rent still to be contracted and on the sale."
        ),
    )


def _sale(read: Readings, voice: Voice) -> tuple[Run, ...]:
    price = read.number("exit.price")
    if price is None:
        reason = read.reason("exit.price", "exit.present_value")
        return (Run(f"The sale has no price. {sentence(reason)}"),) if reason else ()
    runs = [
        Run("The sale is taken at "),
        Run(voice.money(price), "bold"),
        Run(f" at {voice.sale_date(read.hold)}"),
    ]
    income, rate = read.number("exit.income"), read.number("exit.yield")
    if income is not None and rate is not None:
        runs.append(Run(f": an income of {voice.money(income)} at a yield of {voice.rate(rate)}"))
    net = read.number("exit.net")
    if net is not None and voice.money(net) != voice.money(price):
        runs.append(
            Run(f". After selling costs, and with what is left in reserve, {voice.money(net)}")
        )
    return (*runs, Run("."))


def sentence(reason: str) -> str:
    """A reason as a sentence of its own; nothing if there is none."""
    text = reason.strip().rstrip(".")
    return f"{text[0].upper()}{text[1:]}." if text else ""
