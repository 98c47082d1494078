"""Files to model: TOML, tables, bar notation; collects all errors and lists what it assumed."""

from detailer.reading.project import read_project

__all__ = ["read_project"]
