"""What is to be detailed: frozen values, mm and N inside."""

from detailer.model.beam import Beam, Column, Cover, Section, Span, Support
from detailer.model.materials import Concrete, Steel, SteelGrade, over_ribs
from detailer.model.project import (
    Assumption,
    Doubt,
    Grid,
    Issue,
    Practice,
    Project,
)
from detailer.model.results import HandResults, Loads, PointLoad, Results, Station, Stations
from detailer.model.steelwork import BarGroup, ChosenBars, ChosenLinks, LinkZone

__all__ = [
    "Assumption",
    "BarGroup",
    "Beam",
    "ChosenBars",
    "ChosenLinks",
    "Column",
    "Concrete",
    "Cover",
    "Doubt",
    "Grid",
    "HandResults",
    "Issue",
    "LinkZone",
    "Loads",
    "PointLoad",
    "Practice",
    "Project",
    "Results",
    "Section",
    "Span",
    "Station",
    "Stations",
    "Steel",
    "SteelGrade",
    "Support",
    "over_ribs",
]
