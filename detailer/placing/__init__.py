"""Decisions: where the chosen bars lie, stop, end and lap; model to cage."""

from detailer.placing.place import place

__all__ = ["place"]
