"""Names that do not leave the program."""

import pytest

from tests.fullest import fullest, fullest_raw
from tests.report.sections import changed
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.deal.property import Property
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.report.document import texts
from workbench.report.memo import build
from workbench.report.withheld import WITHHELD, is_residential, without_names
from workbench.text.locale import DEFAULT


@pytest.mark.parametrize(
    "use",
    [
        "flat", "Flats", "two-room apartment", "residential", "Dwelling", "studios", "house",
        "town house", "Mietwohnung", "Wohnungen", "appartement", "appartamento", "vivienda",
        "διαμέρισμα", "κατοικία", "lägenhet", "mieszkanie", "住宅",
    ],
)  # fmt: skip
def test_words_for_dwellings(use: str) -> None:
    assert is_residential(Deal(), Space("s1", use=use))


@pytest.mark.parametrize(
    "use",
    [
        "shop",
        "office",
        "distribution warehouse",
        "storehouse",
        "café",
        "dental practice",
        "parking",
    ],
)
def test_words_for_other_uses(use: str) -> None:
    assert not is_residential(Deal(), Space("s1", use=use))


def test_a_space_without_a_use_goes_by_its_name_and_the_kind_of_property() -> None:
    assert is_residential(Deal(), Space("s1", name="Flat 3"))
    house = Deal(property=Property(kind="Apartment house"))
    assert is_residential(house, Space("s1", name="Unit 3"))
    assert not is_residential(house, Space("s1", name="Unit 3", use="shop"))
    assert not is_residential(Deal(), Space("s1", name="Unit 3"))


def test_names_are_withheld_where_people_live_and_only_there() -> None:
    deal = without_names(fullest())
    assert [[lease.tenant for lease in space.leases] for space in deal.spaces] == [
        ["Sailmaker", "Bookbinder"],
        [WITHHELD],
    ]


def test_a_lease_without_a_name_says_nothing_is_withheld() -> None:
    raw = fullest_raw()
    raw["spaces"][1]["leases"][0]["tenant"] = "  "
    assert without_names(changed(raw)).spaces[1].leases[0].tenant == ""


def test_a_name_typed_as_a_draft_is_withheld_as_well() -> None:
    drafts = {"leases@e7.tenant": "A. Person", "leave.hold": "ten"}
    deal = without_names(changed(drafts=drafts))
    assert deal.drafts == {"leases@e7.tenant": WITHHELD, "leave.hold": "ten"}


def test_no_issue_or_label_tells_a_name() -> None:
    raw = fullest_raw()
    raw["spaces"][1]["leases"][0] |= {"rent": {"amount": -1.0}}
    raw["other_income"][0]["lease"] = "e7"
    deal = changed(raw, drafts={"leases@e7.tenant": "Six households"})
    whole = " ".join(texts(build(evaluate(compile_deal(deal)), DEFAULT)))
    assert "Six households" not in whole
    assert "lease e7 “name withheld”" in whole
