"""The rent roll: spaces and their leases, what each pays and what the market would."""

from itertools import chain

from workbench.deal.earn import Lease, Space
from workbench.report.document import Section, Table, plain
from workbench.report.lease_notes import lease_note
from workbench.report.roll_columns import RollColumn, roll_columns
from workbench.report.voice import Voice

_WORDS = (
    "Rent a year is the rent entered for all units, at closing or at the start where that is "
    "later; the sum is of leases that run at closing. A space earns its market rent where no lease "
    "runs and after its last one; units without dates turn to it within a year."
)


def roll_section(voice: Voice) -> tuple[Section, ...]:
    """A row for each lease, and for each space without one."""
    spaces = voice.deal.spaces
    if not spaces:
        return ()
    columns = roll_columns(voice)
    rows = list(chain.from_iterable(_rows(columns, space) for space in spaces))
    leases = [lease for space in spaces for lease in space.leases or (None,)]
    notes = ["" if lease is None else lease_note(voice, lease) for lease in leases]
    table = Table(
        tuple(one.column for one in columns),
        (*rows, tuple(one.total for one in columns)),
        frozenset({len(rows)}),
        most_lines=5,
        notes=(*notes, ""),
        fine=True,
    )
    return (Section("Rent roll", (plain(_WORDS, "small"), table)),)


def _rows(columns: tuple[RollColumn, ...], space: Space) -> list[tuple[str, ...]]:
    """What belongs to the space as a whole stands in its first row."""
    leases: tuple[Lease | None, ...] = space.leases or (None,)
    return [
        tuple("" if place and one.of_space else one.cell(space, lease) for one in columns)
        for place, lease in enumerate(leases)
    ]
