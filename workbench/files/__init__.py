"""Deals on disk."""
