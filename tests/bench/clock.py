"""Interleaved timing: rounds of each job in turn, and the ratio of their medians."""

import gc
import time
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from statistics import median

ROUNDS = 15


@dataclass(frozen=True)
class Timed:
    """Seconds a call, one for each round."""

    seconds: tuple[float, ...]

    @property
    def middle(self) -> float:
        return median(self.seconds)

    @property
    def noise(self) -> float:
        """How far the middle half of the rounds lies apart, as a part of the median."""
        ordered = sorted(self.seconds)
        quarter = len(ordered) // 4
        return (ordered[-1 - quarter] - ordered[quarter]) / self.middle


def interleaved(
    jobs: Sequence[tuple[Callable[[], object], int]], rounds: int = ROUNDS
) -> list[Timed]:
    """Time each job, called so many times a round, in turn; one round first to warm up."""
    taken: list[list[float]] = [[] for _ in jobs]
    gc.disable()
    try:
        for number in range(rounds + 1):
            for place, (job, calls) in enumerate(jobs):
                start = time.perf_counter()
                for _ in range(calls):
                    job()
                if number:
                    taken[place].append((time.perf_counter() - start) / calls)
            gc.collect()
    finally:
        gc.enable()
    return [Timed(tuple(one)) for one in taken]
