"""The open deal: changes, undo, merged edits, drafts, and figures that follow once."""

from dataclasses import replace
from pathlib import Path

from hypothesis import settings
from hypothesis import strategies as st
from hypothesis.stateful import RuleBasedStateMachine, initialize, invariant, rule
from pytestqt.qtbot import QtBot

from workbench.deal.deal import Deal
from workbench.deal.paths import get
from workbench.engine.plan import compile_deal
from workbench.engine.result import evaluate
from workbench.files.deal_file import deal_from_text, deal_to_text, read_deal
from workbench.places import sample_deals
from workbench.session.history import LONGEST, History, Step
from workbench.session.session import Change, Effect, Session

FLATS = read_deal(sample_deals() / "quillon-court-flats.deal")


def test_a_change_is_a_step_with_a_name(qtbot: QtBot) -> None:
    session = Session(FLATS)
    session.set("leave.hold", 7, "hold")
    assert session.deal.leave.hold == 7
    assert (session.undo_label, session.redo_label) == ("hold", None)
    session.undo()
    assert session.deal is FLATS
    assert (session.undo_label, session.redo_label) == (None, "hold")
    session.redo()
    assert session.deal.leave.hold == 7


def test_edits_of_one_field_in_one_focus_merge(qtbot: QtBot) -> None:
    session = Session(FLATS)
    for price in (1.0, 12.0, 123.0):
        session.set("purchase.price", price, "price", focus="purchase.price")
    session.end_focus()
    session.set("purchase.price", 5.0, "price", focus="purchase.price")
    session.undo()
    assert session.deal.purchase.price == 123.0
    session.undo()
    assert session.deal is FLATS


def test_an_undone_step_does_not_merge_with_the_next(qtbot: QtBot) -> None:
    session = Session(FLATS)
    session.set("purchase.price", 1.0, "price", focus="purchase.price")
    session.end_focus()
    session.set("leave.hold", 5, "hold", focus="leave.hold")
    session.undo()
    session.set("purchase.price", 2.0, "price", focus="purchase.price")
    session.undo()
    assert session.deal.purchase.price == 1.0


def test_a_change_that_alters_nothing_leaves_no_step(qtbot: QtBot) -> None:
    session = Session(FLATS)
    session.set("leave.hold", FLATS.leave.hold, "hold")
    assert session.undo_label is None
    assert session.revision == 0


def test_figures_follow_once_for_many_changes(qtbot: QtBot) -> None:
    session = Session(FLATS)
    results: list[object] = []
    effects: list[Effect] = []
    session.result_changed.connect(results.append)
    session.effect_seen.connect(effects.append)
    before = session.result.figure("value")
    for hold in (5, 6, 7):
        session.set("leave.hold", hold, "hold")
    assert results == []
    qtbot.waitUntil(lambda: bool(effects))
    assert len(results) == 1
    fresh = evaluate(compile_deal(session.deal))
    assert session.result.figure("value") == fresh.figure("value")
    assert effects == [Effect("hold", before, fresh.figure("value"))]


def test_drafts_are_kept_and_go_with_a_good_value(qtbot: QtBot) -> None:
    session = Session(FLATS)
    session.keep_draft("earn.vacancy.3", "abc", "vacancy year 3")
    session.catch_up()
    assert session.deal.drafts == {"earn.vacancy.3": "abc"}
    assert [one.code for one in session.issues_at("earn.vacancy.3")] == ["draft"]
    session.set("earn.vacancy.3", 0.04, "vacancy year 3")
    assert session.deal.drafts == {}
    session.undo()
    assert session.deal.drafts == {"earn.vacancy.3": "abc"}


def test_modified_is_about_the_deal_not_the_history(qtbot: QtBot) -> None:
    session = Session(FLATS)
    seen = [session.modified]
    session.set("leave.hold", 7, "hold")
    seen.append(session.modified)
    session.undo()
    seen.append(session.modified)
    session.redo()
    session.mark_clean()
    seen.append(session.modified)
    session.undo()
    seen.append(session.modified)
    assert seen == [False, True, False, False, True]


def test_a_change_may_be_any_function_of_the_deal(qtbot: QtBot) -> None:
    session = Session(FLATS)
    session.apply(Change("drop loans", lambda deal: replace(deal, loans=())))
    session.catch_up()
    assert session.result.figure("loan_amount") == 0.0
    session.start(FLATS)
    assert session.undo_label is None
    session.catch_up()
    assert session.result.figure("loan_amount") == FLATS.loans[0].amount


def test_history_lets_go_of_the_oldest() -> None:
    history = History((Step(FLATS, ""),))
    for number in range(LONGEST + 20):
        history = history.then(Step(replace(FLATS, next_id=1000 + number), "id"))
    assert len(history.steps) == LONGEST
    assert history.deal.next_id == 1000 + LONGEST + 19


PATHS = {
    "leave.hold": st.integers(1, 40),
    "purchase.price": st.floats(1e5, 1e7),
    "earn.vacancy.3": st.one_of(st.none(), st.floats(0, 0.5)),
    "earn.growth.2": st.one_of(st.none(), st.floats(-0.05, 0.1)),
    "property.name": st.text(max_size=5),
    "leave.method": st.sampled_from(["forward_noi", "perpetuity", "purchase_price"]),
}


class Edits(RuleBasedStateMachine):
    """Random edits, undo, redo, save and open never leave session, file and figures apart."""

    @initialize()
    def open(self) -> None:
        self.session = Session(FLATS)
        self.past: list[Deal] = [FLATS]
        self.ahead: list[Deal] = []
        self.saved = deal_to_text(FLATS)

    @rule(data=st.data(), path=st.sampled_from(sorted(PATHS)))
    def edit(self, data: st.DataObject, path: str) -> None:
        value = data.draw(PATHS[path])
        self.session.set(path, value, path)
        assert get(self.session.deal, path) == value
        if self.session.deal != self.past[-1]:
            self.past.append(self.session.deal)
            self.ahead = []

    @rule()
    def undo(self) -> None:
        self.session.undo()
        if len(self.past) > 1:
            self.ahead.append(self.past.pop())

    @rule()
    def redo(self) -> None:
        self.session.redo()
        if self.ahead:
            self.past.append(self.ahead.pop())

    @rule()
    def save(self) -> None:
        self.saved = deal_to_text(self.session.deal)
        self.session.mark_clean()

    @rule()
    def open_saved(self) -> None:
        deal = deal_from_text(self.saved)
        self.session.start(deal)
        self.past, self.ahead = [deal], []

    @invariant()
    def together(self) -> None:
        if not hasattr(self, "session"):
            return
        assert self.session.deal == self.past[-1]
        self.session.catch_up()
        assert self.session.result.plan.deal is self.session.deal
        fresh = evaluate(compile_deal(self.session.deal))
        for key in ("value", "exit_price", "irr_unlevered", "npv_levered"):
            assert self.session.result.figure(key) == fresh.figure(key)
        assert self.session.modified == (deal_to_text(self.session.deal) != self.saved)


Edits.TestCase.settings = settings(max_examples=25, stateful_step_count=20, deadline=None)


TestEdits = Edits.TestCase


def test_samples_open(qtbot: QtBot) -> None:
    for path in sorted(Path(sample_deals()).glob("*.deal")):
        assert Session(read_deal(path)).result.figure("value") is not None
