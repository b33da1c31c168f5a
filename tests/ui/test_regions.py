"""Moving among the regions of a picture."""

from workbench.charts.shapes import Region
from workbench.ui.regions import above, below, region_at, region_named, step

LOW_LEFT = Region("in_hand.1", 0, 80, 60, 20)
LOW_RIGHT = Region("expected.1", 60, 80, 40, 20)
HIGH = Region("in_hand.2", 0, 60, 100, 20)
CAP = Region("exit", 0, 0, 100, 60)
WALL = (LOW_LEFT, LOW_RIGHT, HIGH, CAP)


def test_the_uppermost_region_is_pointed_at() -> None:
    over = Region("debt", 0, 70, 100, 20)
    assert region_at(WALL, 10, 85) is LOW_LEFT
    assert region_at((*WALL, over), 10, 85) is over
    assert region_at(WALL, 60, 85) is LOW_RIGHT
    assert region_at(WALL, 100, 85) is None
    assert region_at(WALL, 10, 100) is None


def test_a_region_by_its_key() -> None:
    assert region_named(WALL, "exit") is CAP
    assert region_named(WALL, "in_hand.9") is None
    assert region_named(WALL, None) is None


def test_one_after_the_other_and_no_farther_than_the_ends() -> None:
    assert step(WALL, None, 1) is LOW_LEFT
    assert step(WALL, None, -1) is CAP
    assert step(WALL, LOW_LEFT, 1) is LOW_RIGHT
    assert step(WALL, CAP, 1) is CAP
    assert step(WALL, LOW_LEFT, -1) is LOW_LEFT
    assert step((), None, 1) is None


def test_up_and_down() -> None:
    assert above(WALL, LOW_RIGHT) is HIGH
    assert above(WALL, HIGH) is CAP
    assert above(WALL, CAP) is CAP
    assert below(WALL, CAP) is HIGH
    assert below(WALL, HIGH) is LOW_LEFT
    assert above(WALL, None) is LOW_LEFT
    assert below((), None) is None


def test_what_lies_straight_ahead_comes_before_what_lies_aside() -> None:
    far, aside = Region("far", 0, 0, 20, 20), Region("aside", 40, 50, 20, 20)
    here = Region("here", 0, 80, 20, 20)
    assert above((here, far, aside), here) is far
    nearer = Region("nearer", 22, 50, 20, 20)
    assert above((here, far, nearer), here) is nearer
