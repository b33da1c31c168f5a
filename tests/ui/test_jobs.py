"""Work beside the window: order, errors, calling off, nothing left running."""

import gc
import threading
from collections.abc import Iterator
from threading import Event

import pytest
from PySide6.QtCore import QObject
from pytestqt.qtbot import QtBot

from workbench.ui.jobs import Done, Jobs


@pytest.fixture
def jobs(qtbot: QtBot) -> Iterator[Jobs]:
    made = Jobs()
    yield made
    made.close_down()
    made.deleteLater()


class Told(QObject):
    """What came back, and in which thread."""

    def __init__(self, jobs: Jobs) -> None:
        super().__init__()
        self.done: list[Done] = []
        self.threads: set[int] = set()
        jobs.finished.connect(self.take)

    def take(self, done: Done) -> None:
        self.done.append(done)
        self.threads.add(threading.get_ident())


def test_results_come_back_by_number_in_the_thread_of_the_window(jobs: Jobs, qtbot: QtBot) -> None:
    told = Told(jobs)
    at_work: list[int] = []

    def work(cancel: Event) -> object:
        at_work.append(threading.get_ident())
        return len(at_work)

    numbers = [jobs.start(work) for _ in range(3)]
    qtbot.waitUntil(lambda: len(told.done) == 3)
    assert told.done == [Done(number, place) for place, number in enumerate(numbers, start=1)]
    assert told.threads == {threading.get_ident()}
    assert threading.get_ident() not in at_work


def test_an_error_comes_back_as_such(jobs: Jobs, qtbot: QtBot) -> None:
    told = Told(jobs)

    def work(cancel: Event) -> object:
        raise ValueError("broken")

    jobs.start(work)
    qtbot.waitUntil(lambda: bool(told.done))
    assert told.done[0].value is None
    assert isinstance(told.done[0].error, ValueError)


def test_a_job_can_be_called_off(jobs: Jobs, qtbot: QtBot) -> None:
    told = Told(jobs)

    def work(cancel: Event) -> object:
        return "left off" if cancel.wait(20) else "went on"

    jobs.cancel(jobs.start(work))
    qtbot.waitUntil(lambda: bool(told.done))
    assert told.done[0].value == "left off"
    jobs.cancel(99)


def test_closing_down_waits_and_takes_no_more(jobs: Jobs, qtbot: QtBot) -> None:
    begun, ended = Event(), Event()

    def work(cancel: Event) -> object:
        begun.set()
        cancel.wait(20)
        ended.set()
        return None

    second: list[int] = []
    told = Told(jobs)
    jobs.start(work)
    jobs.start(lambda cancel: second.append(1))
    assert begun.wait(20)
    jobs.close_down()
    assert ended.is_set() and second == []
    qtbot.wait(20)
    assert told.done == []
    jobs.start(lambda cancel: second.append(2))
    jobs.close_down()
    assert second == []


def test_cyclic_collection_rests_while_a_job_runs(jobs: Jobs, qtbot: QtBot) -> None:
    assert gc.isenabled()
    told = Told(jobs)
    jobs.start(lambda cancel: gc.isenabled())
    jobs.start(lambda cancel: gc.isenabled())
    qtbot.waitUntil(lambda: len(told.done) == 2)
    assert [done.value for done in told.done] == [False, False]
    assert gc.isenabled()
    jobs.start(lambda cancel: cancel.wait(20))
    assert not gc.isenabled()
    jobs.close_down()
    assert gc.isenabled()


def test_collection_that_somebody_else_put_off_stays_off(jobs: Jobs, qtbot: QtBot) -> None:
    told = Told(jobs)
    gc.disable()
    try:
        jobs.start(lambda cancel: None)
        qtbot.waitUntil(lambda: bool(told.done))
        assert not gc.isenabled()
    finally:
        gc.enable()
