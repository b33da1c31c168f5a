"""Moving among the regions of a picture: by pointing, one after the other, up and down."""

from collections.abc import Sequence

from workbench.charts.shapes import Region

_ASIDE = 3.0
"""How much farther a region seems that lies aside, against one straight ahead."""


def region_at(regions: Sequence[Region], x: float, y: float) -> Region | None:
    """The uppermost region at a point."""
    return next((one for one in reversed(regions) if _holds(one, x, y)), None)


def _holds(region: Region, x: float, y: float) -> bool:
    inside = region.x <= x < region.x + region.width
    return inside and region.y <= y < region.y + region.height


def region_named(regions: Sequence[Region], key: str | None) -> Region | None:
    """The region of a key, if the picture has it."""
    return next((one for one in regions if one.key == key), None)


def step(regions: Sequence[Region], current: Region | None, by: int) -> Region | None:
    """The region so many places on in the order of drawing; at either end it stays there."""
    if not regions:
        return None
    if current is None:
        return regions[0 if by > 0 else -1]
    place = regions.index(current) + by
    return regions[min(max(place, 0), len(regions) - 1)]


def above(regions: Sequence[Region], current: Region | None) -> Region | None:
    """The nearest region whose middle lies higher; the same one where there is none."""
    return _nearest(regions, current, -1)


def below(regions: Sequence[Region], current: Region | None) -> Region | None:
    """The nearest region whose middle lies lower; the same one where there is none."""
    return _nearest(regions, current, 1)


def _nearest(regions: Sequence[Region], current: Region | None, down: int) -> Region | None:
    if current is None:
        return step(regions, None, 1)
    others = [one for one in regions if down * (_middle(one)[1] - _middle(current)[1]) > 0.5]
    return min(others, key=lambda one: _distance(current, one), default=current)


def _middle(region: Region) -> tuple[float, float]:
    return region.x + region.width / 2, region.y + region.height / 2


def _distance(one: Region, other: Region) -> tuple[float, float]:
    """Gaps between two regions, those aside counted more; then how far their middles are apart."""
    aside = max(one.x - other.x - other.width, other.x - one.x - one.width, 0.0)
    along = max(one.y - other.y - other.height, other.y - one.y - one.height, 0.0)
    (x, y), (far_x, far_y) = _middle(one), _middle(other)
    return along + _ASIDE * aside, abs(far_x - x) + abs(far_y - y)
