"""The memo's figures: those to be seen first, the tiers, and the table of measures."""

from workbench.report.document import Column, KeyFigure, SideBySide, Table
from workbench.report.readings import Readings
from workbench.report.voice import Voice
from workbench.text.numbers import day

_NOT_MARKET = "not market value"


def key_figures(read: Readings, voice: Voice) -> tuple[KeyFigure, ...]:
    """Price, value, margin, the shares, and what an owner and a lender look for first."""
    worth = f"worth on these assumptions at a required return of {voice.required_return()}"
    chosen = [
        KeyFigure(
            "Price", voice.priced(read.number("price")), f"all amounts in {voice.unit()}", True
        ),
        KeyFigure("Value", voice.priced(read.number("value")), f"{worth}, {_NOT_MARKET}", True),
        KeyFigure(
            "Margin",
            voice.priced(read.number("margin")),
            "value less price, purchase costs and initial works",
            True,
        ),
        KeyFigure(
            "Exit-value share",
            voice.share(read.number("exit_value_share")),
            exit_share_note(read, voice),
        ),
        KeyFigure(
            "Ground share",
            voice.share(read.number("ground_share")),
            "part of the price that stands on rent under contract",
        ),
        _irr(read, voice),
    ]
    if voice.deal.loans:
        chosen.append(_dscr(read, voice))
    cash = voice.priced(read.number("sources_uses.sources.equity"))
    note = "own money needed at closing" if voice.deal.loans else "no loan is assumed"
    return (*chosen, KeyFigure("Cash to close", cash, note))


def exit_share_note(read: Readings, voice: Voice) -> str:
    """Hold and reference share, without which the exit-value share is never printed."""
    reference = voice.share(read.number("reference_share"))
    return f"hold {voice.years(read.hold)}; reference share {reference}"


def _irr(read: Readings, voice: Voice) -> KeyFigure:
    unlevered = voice.rate(read.number("irr.unlevered"))
    if not voice.deal.loans:
        return KeyFigure("IRR, unlevered", unlevered, "before tax, without a loan")
    levered = voice.rate(read.number("irr.levered"))
    return KeyFigure("IRR, levered", levered, f"before tax, after debt; unlevered {unlevered}")


def _dscr(read: Readings, voice: Voice) -> KeyFigure:
    value, note = lowest_dscr(read, voice, "noi")
    on_cash, year = lowest_dscr(read, voice, "ncf")
    return KeyFigure("Lowest DSCR", value, f"on NOI, {note}; on net cash flow {on_cash}, {year}")


def lowest_dscr(read: Readings, voice: Voice, basis: str) -> tuple[str, str]:
    """The lowest debt service coverage of the years, and the year it falls in."""
    found = read.lowest(f"dscr.{basis}")
    if found is None:
        return voice.ratio(None), "no debt service"
    ratio, year = found
    return voice.ratio(ratio), f"year {year}"


def tier_table(read: Readings, voice: Voice) -> Table:
    """The three tiers with their amounts and shares; shares only where the value is above zero."""
    value = read.number("value")

    def row(label: str, amount: float | None) -> tuple[str, str, str]:
        shown = None
        if amount is not None and value is not None and value > 0:
            shown = amount / value
        return label, voice.short_money(amount), voice.share(shown)

    return Table(
        (
            Column("What the value is made of", share=0.46),
            Column("present value", "right", 0.31),
            Column("share", "right", 0.23),
        ),
        (
            row("Rent in hand", read.number("tiers.in_hand")),
            row("Rent expected", read.number("tiers.expected")),
            row("Exit (the sale)", read.number("tiers.exit")),
            row("Value", value),
        ),
        frozenset({3}),
    )


def measures(read: Readings, voice: Voice) -> SideBySide:
    """What stands behind the first page, in two tables beside one another."""
    purchase, extra = voice.deal.purchase, voice.deal.returns.extra_on_exit
    income = [
        ("Required return a year", voice.required_rate()),
        ("Hold", voice.years(read.hold)),
        ("Exit income a year", voice.money(read.number("exit.income"))),
        ("Exit yield", voice.rate(read.number("exit.yield"))),
        ("Exit price", voice.money(read.number("exit.price"))),
        ("Net exit, after selling costs", voice.money(read.number("exit.net"))),
    ]
    if extra:
        income.insert(1, ("Extra return on the exit", voice.rate(extra)))
    returns = [
        ("Exit-value share", voice.share(read.number("exit_value_share"))),
        ("Reference share at this hold", voice.share(read.number("reference_share"))),
        ("IRR, unlevered, before tax", voice.rate(read.number("irr.unlevered"))),
    ]
    if voice.deal.loans:
        returns.append(("IRR, levered, before tax", voice.rate(read.number("irr.levered"))))
        for basis, label in (("noi", "NOI"), ("ncf", "net cash flow")):
            ratio, year = lowest_dscr(read, voice, basis)
            returns.append((f"Lowest DSCR on {label}, {year}", ratio))
    returns.append(("Cash to close", voice.money(read.number("sources_uses.sources.equity"))))
    if purchase.closing_date is not None:
        returns.append(("Closing", day(purchase.closing_date, voice.locale, short=True)))
    columns = (Column("", share=0.71), Column("", "right", 0.29))
    return SideBySide((Table(columns, tuple(income)),), (Table(columns, tuple(returns)),))
