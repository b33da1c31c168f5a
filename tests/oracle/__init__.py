"""A slow, independent reckoning of the figures, to hold the engine against."""
