"""What each exit method makes of the sale."""

from math import isfinite

from workbench.engine import formula as f
from workbench.engine.interpreter import Values
from workbench.engine.result import Result


def part_prices(result: Result, hold: int) -> tuple[float | None, ...]:
    """What each exit method makes of the sale: the parts of the formula of the exit price."""
    body = result.declared["exit_price_of_year"].body
    parts: list[f.Formula] = []
    for _ in result.plan.shape.exits[1:]:
        assert isinstance(body, f.Pair)
        parts.insert(0, body.right)
        body = body.left
    assert isinstance(body, f.Formula)
    values = Values(result)
    prices: list[float | None] = []
    for part, node in zip(result.plan.shape.exits, [body, *parts], strict=True):
        if part.weight is not None:
            assert isinstance(node, f.Pair)
            node = node.right
        row = values.of(node)
        price = float(row.flat[0] if row.size == 1 else row[hold - 1, 0])
        prices.append(price if isfinite(price) else None)
    return tuple(prices)
