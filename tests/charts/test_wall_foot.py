"""What stands under the wall."""

from tests.charts.walls import BASE, wall_figures
from workbench.charts.shapes import Text
from workbench.charts.wall_foot import bond_of, foot, notes_of
from workbench.charts.wall_stack import WallFigures, stack_of


def notes(figures: WallFigures) -> tuple[str, ...]:
    return notes_of(figures, stack_of(figures))


def legend(figures: WallFigures, wide: float) -> list[Text]:
    shapes, _ = foot(figures, stack_of(figures), 11, wide)
    return [s for s in shapes if isinstance(s, Text) and s.text.startswith("rent ")]


def test_bricks_in_hand_are_long_and_stones_longer() -> None:
    in_hand, expected, stones = (
        bond_of(t, 11, 200).length for t in ("in_hand", "expected", "exit")
    )
    assert 2 * expected < in_hand < stones / 2


def test_a_narrow_wall_has_shorter_bricks() -> None:
    assert bond_of("exit", 11, 49.5).length == bond_of("exit", 11, 99).length / 2


def test_a_very_wide_wall_has_longer_bricks() -> None:
    assert bond_of("exit", 11, 660).length == bond_of("exit", 11, 200).length
    assert bond_of("exit", 11, 1320).length == 2 * bond_of("exit", 11, 200).length
    assert bond_of("exit", 11, 1320).joint == bond_of("exit", 11, 200).joint


def test_a_plain_wall_needs_no_notes() -> None:
    assert notes(wall_figures(BASE, 1e6, 1e6)) == ()


def test_notes() -> None:
    assert notes(wall_figures([(0.0, 5.0)], 1.0, has_leases=False)) == (
        "No leases entered: no rent is in hand.",
    )
    assert notes(wall_figures([(0.0, 5.0)], 1.0)) == ("No dated lease runs: no rent is in hand.",)
    assert notes(wall_figures([(1.0, 5.0)], None, exit_reason=" Because. ")) == (
        "No exit price. Because.",
    )
    assert notes(wall_figures([], None)) == ("No exit price.", "Nothing to stack yet.")
    assert notes(wall_figures([(0.0, 0.0)], 0.0, has_leases=False)) == (
        "No leases entered: no rent is in hand.",
        "The value is not above zero, so there are no shares.",
        "Every amount is zero.",
    )


def test_the_trench_names_its_years() -> None:
    rows = [(1.0, -1.0), (-1.0, 0.0), (0.0, -2.0), (5.0, 0.0), (0.0, -1.0)]
    assert notes(wall_figures(rows, 9.0))[0].startswith("Hatched: −5 below zero (years 1–3, 5).")
    assert notes(wall_figures(rows, -1.0))[-1].startswith(
        "Hatched: −6 below zero (years 1–3, 5 and the exit)."
    )
    assert "(year 1)" in notes(wall_figures([(-1.0, 0.0)], 9.0))[0]
    assert "(the exit)" in notes(wall_figures([(1.0, 0.0)], -9.0))[-1]


def test_the_legend_names_the_tiers_that_occur() -> None:
    assert [t.text for t in legend(wall_figures(BASE, 1.0), 262)] == [
        "rent in hand",
        "rent expected",
    ]
    assert [t.text for t in legend(wall_figures([(0.0, 1.0)], 1.0), 262)] == ["rent expected"]
    shapes, tall = foot(wall_figures([], 1.0), stack_of(wall_figures([], 1.0)), 11, 262)
    assert (shapes, tall) == ((), 0.0)


def test_the_legend_stands_on_one_line_where_it_fits() -> None:
    one, two = legend(wall_figures(BASE, 1.0), 262)
    assert one.y == two.y
    assert one.x < two.x
    one, two = legend(wall_figures(BASE, 1.0), 150)
    assert one.y < two.y
    assert one.x == two.x
