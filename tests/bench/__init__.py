"""Speed as ratios against a reference in the same run: `python -m tests.bench`."""
