import subprocess
import sys
import time
from pathlib import Path

import pytest

from detailer import api
from detailer.cli import main
from detailer.errors import Refused
from detailer.values import CAUTION


def everything(folder: Path) -> dict[str, bytes]:
    return {
        str(p.relative_to(folder)): p.read_bytes() for p in sorted(folder.rglob("*")) if p.is_file()
    }


def test_draw_writes_every_file_twice_the_same(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    monkeypatch.chdir(tmp_path)
    assert main(["draw"]) == 0
    assert main(["draw", "-o", "again"]) == 0
    out = capsys.readouterr().out
    assert "files written to OUT" in out
    assert "findings: " in out
    first = everything(tmp_path / "OUT")
    assert first == everything(tmp_path / "again")
    assert set(first) == {
        "index.html",
        "schedule.csv",
        "summary.csv",
        "findings.json",
        "cage.json",
        "assumptions.json",
        *(f"drawings/FB{n}.{kind}" for n in (1, 2, 3) for kind in ("dxf", "svg")),
    }
    page = first["index.html"].decode()
    assert page.index(CAUTION) < page.index("id='findings'") < page.index("id='beam-FB1'")
    assert page.count("<svg") == 3
    for word in ("http://", "https://"):
        rest = page.replace("http://www.w3.org/", "")
        assert word not in rest


def test_start_writes_a_project_that_draws(tmp_path: Path) -> None:
    folder = tmp_path / "new"
    assert main(["start", str(folder)]) == 0
    assert main(["draw", str(folder / "tern-quay.toml"), "-o", str(tmp_path / "o")]) == 0
    assert main(["start", str(folder)]) == 2


def test_refused_input_exits_2_with_every_error_and_no_trace(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    api.start(tmp_path)
    file = tmp_path / "tern-quay.toml"
    text = file.read_text(encoding="utf-8")
    text = text.replace('"M25"', '"M26"').replace("ductile = false", "ductil = false")
    file.write_text(text, encoding="utf-8")
    assert main(["draw", str(file), "-o", str(tmp_path / "OUT")]) == 2
    told = capsys.readouterr().err
    assert "M26" in told
    assert "ductil" in told
    assert "Traceback" not in told
    assert not (tmp_path / "OUT").exists()


def test_a_file_that_is_not_there_exits_2(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["check", "no-such.toml"]) == 2
    assert "no-such.toml" in capsys.readouterr().err


def test_check_exits_by_what_it_found(capsys: pytest.CaptureFixture[str]) -> None:
    found = api.check()
    blocks = any(item.severity.blocks for item in found)
    assert main(["check"]) == (1 if blocks else 0)
    out = capsys.readouterr().out
    assert CAUTION in out
    assert "is not checked" in out


def test_schedule_prints_every_mark(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["schedule"]) == 0
    out = capsys.readouterr().out
    for row in api.schedule().rows:
        assert f" {row.mark} " in out


def test_the_verbs_are_in_the_package() -> None:
    import detailer

    assert detailer.read().number == "TQ-118"
    with pytest.raises(Refused):
        detailer.read("no-such.toml")


@pytest.mark.slow
def test_help_is_quick() -> None:
    def least(*arguments: str) -> float:
        best = float("inf")
        for _ in range(7):
            start = time.perf_counter()
            subprocess.run([sys.executable, *arguments], check=True, capture_output=True)
            best = min(best, time.perf_counter() - start)
        return best

    assert least("-m", "detailer", "--help") <= 3 * least("-c", "pass")
