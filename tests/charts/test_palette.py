"""The house palette; contrast as WCAG 2.1 defines it (success criterion 1.4.3)."""

from typing import get_args

import pytest

from workbench.charts.palette import DARK, LIGHT, PRINT, Palette, channels, contrast
from workbench.charts.shapes import Role


def test_contrast_of_known_pairs() -> None:
    assert contrast("#000000", "#FFFFFF") == pytest.approx(21)
    assert contrast("#FFFFFF", "#FFFFFF") == 1
    # #767676 is the lightest grey that has 4.5:1 on white
    assert contrast("#767676", "#FFFFFF") == pytest.approx(4.54, abs=0.01)
    assert contrast("#FFFFFF", "#767676") == contrast("#767676", "#FFFFFF")


def test_channels() -> None:
    assert channels("#FF8000") == (1.0, 128 / 255, 0.0)


@pytest.mark.parametrize("palette", [LIGHT, DARK, PRINT], ids=["light", "dark", "print"])
class TestEveryPalette:
    def test_every_role_has_a_tone(self, palette: Palette) -> None:
        assert set(palette) == set(get_args(Role))

    @pytest.mark.parametrize("ground", ["paper", "panel"])
    @pytest.mark.parametrize("letters", ["ink", "muted", "price"])
    def test_text_is_legible(self, palette: Palette, ground: Role, letters: Role) -> None:
        assert contrast(palette[letters], palette[ground]) >= 4.5

    def test_text_on_the_capstone_is_legible(self, palette: Palette) -> None:
        assert contrast(palette["on_exit"], palette["exit"]) >= 4.5

    def test_the_tiers_of_rent_differ_in_tone(self, palette: Palette) -> None:
        assert contrast(palette["in_hand"], palette["expected"]) >= 3

    def test_bars_stand_out_and_the_line_across_them(self, palette: Palette) -> None:
        # 3:1 for what is no text, as WCAG 2.1 has it (success criterion 1.4.11)
        assert contrast(palette["income"], palette["paper"]) >= 3
        assert contrast(palette["debt"], palette["paper"]) >= 3
        assert contrast(palette["debt"], palette["income"]) >= 3
