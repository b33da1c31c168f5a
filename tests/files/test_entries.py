"""Changes typed on the command line: every form they may have, and every way they may be bad."""

from datetime import date
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.fullest import fullest
from workbench.deal.inputs import leaves
from workbench.deal.paths import get
from workbench.files.deal_file import deal_to_text
from workbench.files.entries import with_entries
from workbench.files.faults import UnreadableError

DEAL = fullest()


def refused(*entries: str) -> str:
    with pytest.raises(UnreadableError) as caught:
        with_entries(DEAL, entries)
    return str(caught.value)


@pytest.mark.parametrize(
    ("entry", "path", "value"),
    [
        ("leave.hold=7", "leave.hold", 7),
        (" leave.hold = 7 ", "leave.hold", 7),
        ("purchase.price=1.3e6", "purchase.price", 1_300_000.0),
        ("earn.growth.2=-0.01", "earn.growth.2", -0.01),
        ("leave.exit_yield=7%", "leave.exit_yield", 0.07),
        ("leave.exit_yield=6.85%", "leave.exit_yield", 0.0685),
        ("leave.exit_yield= 7.15 % ", "leave.exit_yield", 0.0715),
        ("earn.growth.1=-2%", "earn.growth.1", -0.02),
        ("earn.vacancy.3=7%", "earn.vacancy.3", 0.07),
        ("earn.vacancy.2=0.08", "earn.vacancy.2", 0.08),
        ("earn.vacancy.3=null", "earn.vacancy.3", None),
        ("earn.vacancy.9=null", "earn.vacancy.9", None),
        ("earn.vacancy=5%", "earn.vacancy", {1: 0.05}),
        ("earn.vacancy=0.05", "earn.vacancy", {1: 0.05}),
        ('earn.vacancy={"1": 0.05, "4": 0.1}', "earn.vacancy", {1: 0.05, 4: 0.1}),
        ("expenses@x16.growth=null", "expenses@x16.growth", None),
        ("expenses@x17.growth=4%", "expenses@x17.growth", {1: 0.04}),
        ("expenses@x17.growth.1=4%", "expenses@x17.growth", {1: 0.04}),
        ("spaces@s6.market_rent=1175", "spaces@s6.market_rent.amount", 1175.0),
        ("spaces@s6.market_rent=1175", "spaces@s6.market_rent.per", "month"),
        ("spaces@s1.market_rent=250", "spaces@s1.market_rent.of", "area"),
        ("spaces@s6.market_rent.amount=1175", "spaces@s6.market_rent.amount", 1175.0),
        ('leases@e2.rent={"amount": 9, "per": "year"}', "leases@e2.rent.per", "year"),
        ("costs@c13.amount=3%", "costs@c13.amount", 0.03),
        ("blend@b9.weight=0.25", "blend@b9.weight", 0.25),
        ("steps@p3.change=5%", "steps@p3.change", 0.05),
        ("steps@p4.amount=2600", "steps@p4.amount", 2600.0),
        ("steps@p4.date=2029-02-01", "steps@p4.date", date(2029, 2, 1)),
        ("lines@a23.adjustment=-900", "lines@a23.adjustment", -900.0),
        ("leases@e2.end=2030-06-30", "leases@e2.end", date(2030, 6, 30)),
        ("leases@e5.break_date=null", "leases@e5.break_date", None),
        ("leave.method=perpetuity", "leave.method", "perpetuity"),
        ('leave.method="perpetuity"', "leave.method", "perpetuity"),
        ("leave.blend=[]", "leave.blend", ()),
        ("loans=[]", "loans", ()),
        ("earn.count_empty_time_once=false", "earn.count_empty_time_once", False),
        ("other_income@i14.lease=e5", "other_income@i14.lease", "e5"),
        ("property.name=Corner house", "property.name", "Corner house"),
        ("property.name=a=b=c", "property.name", "a=b=c"),
        ("property.name=", "property.name", ""),
        ("property.name=1931", "property.name", "1931"),
        ("property.name=50%", "property.name", "50%"),
        ("property.name=null", "property.name", "null"),
        ("property.name=NaN", "property.name", "NaN"),
        ("property.name=true", "property.name", "true"),
        ('property.name="a \\"b\\""', "property.name", 'a "b"'),
        ("property.name=Ωμέγα 🏠", "property.name", "Ωμέγα 🏠"),
        ("conventions.currency=EUR", "conventions.currency", "EUR"),
        ("next_id=90", "next_id", 90),
        ('drafts={"leave.hold": "ten"}', "drafts", {"leave.hold": "ten"}),
    ],
)
def test_entry(entry: str, path: str, value: Any) -> None:
    assert get(with_entries(DEAL, [entry]), path) == value


def test_an_entry_changes_nothing_else() -> None:
    after = with_entries(DEAL, ["steps@p3.change=5%"])
    pairs = zip(leaves(after), leaves(DEAL), strict=True)
    assert [new.path for new, old in pairs if new.value != old.value] == ["steps@p3.change"]
    assert fullest() == DEAL


def test_no_entry_leaves_the_deal_as_it_is() -> None:
    assert with_entries(DEAL, []) is DEAL


def test_entries_are_applied_in_turn() -> None:
    after = with_entries(DEAL, ["leave.hold=5", "earn.vacancy=4%", "leave.hold=6"])
    assert (after.leave.hold, after.earn.vacancy) == (6, {1: 0.04})


def test_a_value_out_of_range_is_taken_as_in_a_file() -> None:
    assert with_entries(DEAL, ["leave.hold=99"]).leave.hold == 99


@pytest.mark.parametrize(
    ("entry", "said"),
    [
        ("", "a change is written KEY=VALUE"),
        ("leave.hold", "leave.hold: a change is written KEY=VALUE"),
        ("=5", "=5: a change is written KEY=VALUE"),
        ("leave.holt=5", "leave.holt: the deal has no “holt”"),
        (".leave.hold=5", ".leave.hold: the deal has no “.leave.hold”"),
        ("expenses@x99.amount=5", "expenses@x99.amount: the deal has no “expenses@x99”"),
        ("earn.vacancy.0=5%", "earn.vacancy.0: the deal has no “0”"),
        ("drafts.1=x", "drafts.1: the deal has no “1”"),
        ("noi=5", "noi: the deal has no “noi”"),
        ("leave.hold=ten", 'leave.hold: "ten" is not a whole number; it must be from 1 to 40'),
        ("leave.hold=", 'leave.hold: "" is not a whole number; it must be from 1 to 40'),
        ("leave.hold=5%", "leave.hold: 0.05 is not a whole number; it must be from 1 to 40"),
        ("leave.hold=true", "leave.hold: true is not a whole number; it must be from 1 to 40"),
        ("leave.hold=[5]", "leave.hold: [5] is not a whole number; it must be from 1 to 40"),
        (
            "leave.hold=NaN",
            "leave.hold: NaN is not a number that a deal can hold; it must be from 1 to 40",
        ),
        (
            "earn.vacancy.1=1e400",
            "earn.vacancy.1: 1e400 is not a number that a deal can hold; it must be from 0 to 1",
        ),
        (
            "leave.exit_yield=NaN%",
            'leave.exit_yield: "NaN%" is not a number; it must be from 0.0001 to 1',
        ),
        (
            "leave.exit_yield=1e9999%",
            'leave.exit_yield: "1e9999%" is not a number; it must be from 0.0001 to 1',
        ),
        (
            "leave.exit_yield=x%",
            'leave.exit_yield: "x%" is not a number; it must be from 0.0001 to 1',
        ),
        (
            "leave.exit_yield=7,5",
            'leave.exit_yield: "7,5" is not a number; it must be from 0.0001 to 1',
        ),
        ("leave=5", "leave: 5 is not an object in braces"),
        ("spaces=5", "spaces: 5 is not a list in brackets"),
        ("spaces@s1=5", "spaces[1]: 5 is not an object in braces"),
        ("earn.vacancy=much", 'earn.vacancy: "much" is not an object in braces'),
        ("earn.vacancy=null", "earn.vacancy: null is not an object in braces"),
        ("earn.vacancy=true", "earn.vacancy: true is not an object in braces"),
        (
            'earn.vacancy={"01": 0.1}',
            'earn.vacancy: "01" is not a deal year, a whole number from 1, like 1 or 12',
        ),
        (
            'earn.vacancy={"1": 0.1, "1": 0.2}',
            "earn.vacancy: the key “1” stands twice here; keep one of them",
        ),
        ("leases@e2.end=31.12.2030", 'leases@e2.end: "31.12.2030" is not a date like 2027-01-31'),
        ("leases@e2.end=2030", "leases@e2.end: 2030 is not a date like 2027-01-31"),
        ("spaces@s1.id=x16", "spaces@x16: an id here is the letter s and a number from 1"),
        ("spaces@s1.id=s6", "spaces@s6: this id stands twice; each item has its own"),
        ("schema=0", "schema: the version of the schema is needed here; it must be 1"),
        ("property.name=\udcff", "property.name: this text holds half a character"),
        ('leave.method="\\ud800"', "leave.method: this text holds half a character"),
    ],
)
def test_a_bad_entry_says_what_is_wrong(entry: str, said: str) -> None:
    assert refused(entry).startswith(said)


def test_a_bad_entry_after_a_good_one_is_refused() -> None:
    assert refused("leave.hold=5", "leave.holt=6").startswith("leave.holt:")


def test_a_long_bad_entry_is_cut() -> None:
    assert len(refused("x" * 100_000)) < 200
    assert len(refused("x" * 100_000 + "=1")) < 200
    assert len(refused("earn.vacancy." + "9" * 100_000 + "=1")) < 200
    assert len(refused("leave.hold=" + "9" * 100_000)) < 200


def test_a_nested_entry_beyond_measure_is_refused() -> None:
    deep = "[" * 50_000 + "]" * 50_000
    assert "is not a whole number" in refused(f"leave.hold={deep}")
    deep = '{"a":' * 100 + "1" + "}" * 100
    entry = f'cases=[{{"id": "k25", "add": [{{"to": "works", "item": {deep}}}]}}]'
    assert refused(entry) == "cases@k25.add: this is nested too deep"


PATHS = st.sampled_from([leaf.path for leaf in leaves(DEAL)])


@settings(deadline=None)
@given(PATHS | st.text(max_size=12), st.text(max_size=12), st.text(max_size=3))
def test_any_entry_is_taken_or_refused(path: str, value: str, year: str) -> None:
    for key in (path, f"{path}.{year}"):
        try:
            deal = with_entries(DEAL, [f"{key}={value}"])
        except UnreadableError as error:
            assert all(fault.sentence for fault in error.faults)
        else:
            assert deal_to_text(deal)
