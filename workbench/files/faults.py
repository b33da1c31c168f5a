"""What keeps a file from being read or used, as a value with a place and a sentence."""

from dataclasses import dataclass


@dataclass(frozen=True)
class Fault:
    """`place` is a key path, or a line and column, or empty for the whole file."""

    place: str
    sentence: str

    def __str__(self) -> str:
        return f"{self.place}: {self.sentence}" if self.place else self.sentence


class UnreadableError(Exception):
    """The file cannot be read whole. Carries every fault found, each in words."""

    def __init__(self, *faults: Fault) -> None:
        super().__init__("\n".join(map(str, faults)))
        self.faults = faults


def system_fault(error: OSError) -> Fault:
    """What the system says about a file that it could not read or write."""
    reason = error.strerror or str(error) or "it cannot be used"
    return Fault("", f"{reason[0].lower()}{reason[1:]}")
