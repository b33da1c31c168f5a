"""Groundcourse: an underwriting workbench for one income property at a time."""

__version__ = "0.1.0"
