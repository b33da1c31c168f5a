"""Print every ratio beside its target. The figures are for people: no test judges them."""

import os

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

from collections.abc import Callable, Iterator
from dataclasses import dataclass, replace

import numpy as np
import pyxirr

from tests.bench.clock import Timed, interleaved
from tests.bench.deals import deal_of, raw_deal
from tests.oracle.oracle import figures
from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.engine.irr import irr_batch
from workbench.engine.plan import Plan, compile_deal
from workbench.engine.result import evaluate


@dataclass(frozen=True)
class Ratio:
    name: str
    target: str
    value: float
    parts: tuple[Timed, Timed]


def ratio(name: str, target: str, above: Timed, below: Timed, times: float = 1.0) -> Ratio:
    return Ratio(name, target, times * above.middle / below.middle, (above, below))


def oracle_against_engine() -> Iterator[Ratio]:
    raw, plan = raw_deal(20), compile_deal(deal_of(20))
    slow, fast = interleaved([(lambda: figures(raw), 1), (lambda: evaluate(plan), 20)], 7)
    yield ratio("plain-loop oracle ÷ evaluation, 20 spaces", "≥ 20", slow, fast)


def edits() -> Iterator[Ratio]:
    big, small = deal_of(1000), deal_of(1)
    jobs = [
        (editor(big, edit_row), 10),
        (editor(small, edit_row), 10),
        (editor(big, edit_roll), 10),
        (evaluator(small), 20),
    ]
    row_big, row_small, roll_big, plain = interleaved(jobs)
    yield ratio("year-row edit, 1,000 leases ÷ 1 lease", "≤ 1.3", row_big, row_small)
    yield ratio("roll edit + evaluation, 1,000 ÷ evaluation, 1", "≤ 4", roll_big, plain)


def edit_row(deal: Deal, turn: int) -> Deal:
    return set_value(deal, "earn.vacancy.3", 0.05 + 0.001 * (turn % 7))


def edit_roll(deal: Deal, turn: int) -> Deal:
    space = deal.spaces[500]
    lease = space.leases[0]
    rent = replace(lease.rent, amount=10_000.0 + turn)
    changed = replace(space, leases=(replace(lease, rent=rent),))
    return replace(deal, spaces=(*deal.spaces[:500], changed, *deal.spaces[501:]))


def editor(deal: Deal, edit: Callable[[Deal, int], Deal]) -> Callable[[], object]:
    """One edit after another, each compiled with what the plan before it already knows."""
    plan: list[Plan] = [compile_deal(deal)]
    turns = iter(range(10**9))

    def job() -> object:
        plan[0] = compile_deal(edit(plan[0].deal, next(turns)), plan[0])
        return evaluate(plan[0])

    return job


def evaluator(deal: Deal) -> Callable[[], object]:
    plan = compile_deal(deal)
    return lambda: evaluate(plan)


def batches() -> Iterator[Ratio]:
    plan = compile_deal(deal_of(20))
    side = 41
    yields, growth = np.meshgrid(np.linspace(0.05, 0.08, side), np.linspace(-0.01, 0.04, side))
    drivers = {
        "leave.exit_yield": yields.reshape(-1, 1),
        "earn.growth": growth.reshape(-1, 1),
    }
    wanted = ("value", "margin", "irr_unlevered")
    one = {path: table[:1] for path, table in drivers.items()}
    single, batch = interleaved(
        [(lambda: evaluate(plan, one, wanted), 40), (lambda: evaluate(plan, drivers, wanted), 1)]
    )
    yield ratio("1,681 single evaluations ÷ one batch", "≥ 12", single, batch, side * side)


def rates() -> Iterator[Ratio]:
    random = np.random.default_rng(5)
    flows = random.uniform(0.2, 1.4, (100_000, 121))
    flows[:, 0] = -random.uniform(60, 100, 100_000)
    flows[:, -1] += random.uniform(40, 90, 100_000)
    flows = np.asfortranarray(flows)
    some = np.ascontiguousarray(flows[:2000])
    times = np.arange(121) / 12
    adding, batch, loop = interleaved(
        [
            (lambda: np.add(flows, flows), 1),
            (lambda: irr_batch(flows, times), 1),
            (lambda: [pyxirr.irr(row, guess=0.005) for row in some], 1),
        ],
        7,
    )
    yield ratio("pyxirr's loop, good guess ÷ batched IRR, 100,000 × 121", "≥ 6", loop, batch, 50)
    yield ratio("batched IRR ÷ one np.add pass", "≤ 5", batch, adding)


def main() -> None:
    print(f"{'ratio':<58}{'target':>8}{'seen':>9}   {'milliseconds':<22}noise")
    for measure in (oracle_against_engine, edits, batches, rates):
        for one in measure():
            above, below = one.parts
            took = f"{above.middle * 1e3:.3f} / {below.middle * 1e3:.3f}"
            noise = f"{above.noise:.0%} / {below.noise:.0%}"
            print(f"{one.name:<58}{one.target:>8}{one.value:>9.2f}   {took:<22}{noise}", flush=True)


if __name__ == "__main__":
    main()
