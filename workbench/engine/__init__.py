"""What follows from a deal: compiled once, evaluated over a trial axis."""
