from importlib import resources
from math import inf
from pathlib import Path

import pytest

from detailer.model import BarGroup, HandResults, LinkZone, Loads, Project, Stations
from detailer.reading import read_project
from detailer.values import Exposure, Face, SupportKind


@pytest.fixture(scope="module")
def project() -> Project:
    with resources.as_file(resources.files("detailer.demo") / "tern-quay.toml") as path:
        return read_project(Path(path))


def test_project_header(project: Project) -> None:
    assert (project.number, project.title) == ("TQ-118", "Tern Quay Boathouse")
    assert project.ductile is False and project.lateral is False
    assert (project.issue.date, project.issue.drawn) == ("2026-11-30", "MK")
    assert project.concrete.fck == 25
    assert project.concrete.exposure is Exposure.MODERATE
    assert (project.steel.main.fy, project.steel.links.fy) == (500, 415)
    assert project.steel.sizes == (8, 10, 12, 16, 20, 25, 32)
    assert project.columns[0].bars == BarGroup(8, 16)
    assert (project.columns[0].link_dia, project.columns[0].link_spacing) == (8, 150)


def test_lines_of_three_beams(project: Project) -> None:
    one, two, three = project.beams
    assert (one.start, one.end) == (-225, 17025)
    assert [s.x for s in one.supports] == [0, 6000, 10800, 16800]
    assert one.supports[0].across == 300
    assert two.supports[0].kind is SupportKind.WALL
    assert [s.x for s in two.supports] == [0, 4230], "clear 4000 between walls of 230"
    assert two.supports[0].across == 230
    assert (three.spans[1].left, three.spans[1].right) == (1, None)
    assert three.end == 6800
    assert (one.copies, two.copies, three.copies) == (2, 3, 1)
    assert one.d_assumed == (500, 500) and two.d_assumed == (None, None)


def test_results_in_newtons_and_millimetres(project: Project) -> None:
    one, two, three = project.beams
    stations = one.spans[1].results
    assert isinstance(stations, Stations)
    assert len(stations.rows) == 21
    assert stations.rows[0].m_min == pytest.approx(-168.2e6)
    assert stations.rows[-1].x == pytest.approx(4800)
    assert stations.rows[0].v_max == pytest.approx(134.5e3)
    assert two.spans[0].results == HandResults(moment=(0, 64e6, 0), shear=(59e3, -59e3))
    loads = three.spans[1].results
    assert isinstance(loads, Loads)
    assert (loads.dead, loads.points[0].x, loads.points[0].dead) == (18, 1750, 10e3)


def test_bars_and_links(project: Project) -> None:
    one, _, three = project.beams
    assert [bar.face for bar in one.bars] == [Face.TOP] * 3 + [Face.BOTTOM] * 3
    assert one.bars[0].spans == (1, 3) and one.bars[1].support == 1
    assert three.bars[1].reach == (450, inf)
    assert one.links[1].zones[0] == LinkZone(legs=2, dia=8, spacing=150, length=900)
    text = (resources.files("detailer.demo") / "tern-quay.toml").read_text().split("\n")
    for beam in project.beams:
        assert all("[[beam.bars]]" in text[bar.line - 1] for bar in beam.bars)
        assert all("[[beam.links]]" in text[links.line - 1] for links in beam.links)


def test_assumptions_are_numbered_and_short(project: Project) -> None:
    assert [a.number for a in project.assumptions] == list(range(1, len(project.assumptions) + 1))
    texts = [a.text for a in project.assumptions]
    assert "Cover is to the links (IS 456, 26.4.1)." in texts
    assert any(a.member == "FB1" and "interpolated" in a.text for a in project.assumptions)
    assert all(len(text) <= 180 and text.endswith(".") for text in texts)
    assert project.doubts == ()
