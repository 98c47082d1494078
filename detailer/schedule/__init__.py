"""Marks, shapes, scheduled lengths and masses, read off the cage."""

from detailer.schedule.numbering import number, placing_order
from detailer.schedule.rows import Row, mass_of, rows
from detailer.schedule.summary import MemberMass, SizeMass, Summary, summarise

__all__ = [
    "MemberMass",
    "Row",
    "SizeMass",
    "Summary",
    "mass_of",
    "number",
    "placing_order",
    "rows",
    "summarise",
]
