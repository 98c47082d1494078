from pathlib import Path

import pytest

from detailer.output.files import safe_names, whole


def everything(folder: Path) -> dict[str, bytes]:
    return {
        str(p.relative_to(folder)): p.read_bytes() for p in sorted(folder.rglob("*")) if p.is_file()
    }


def test_files_arrive_together_and_nothing_else_stays(tmp_path: Path) -> None:
    out = tmp_path / "a" / "OUT"
    with whole(out) as batch:
        batch.write("drawings/FB1.svg", b"1")
        batch.write("index.html", b"2")
        assert not (out / "index.html").exists()
    assert everything(out) == {"drawings/FB1.svg": b"1", "index.html": b"2"}
    assert sorted(p.name for p in out.iterdir()) == ["drawings", "index.html"]


def test_a_run_that_fails_leaves_no_trace(tmp_path: Path) -> None:
    out = tmp_path / "a" / "OUT"
    with pytest.raises(RuntimeError), whole(out) as batch:
        batch.write("index.html", b"2")
        raise RuntimeError
    assert list(tmp_path.iterdir()) == []


def test_a_file_that_cannot_be_moved_puts_the_others_back(tmp_path: Path) -> None:
    (tmp_path / "a.txt").write_bytes(b"old")
    (tmp_path / "b").write_bytes(b"a file where a folder must go")
    with pytest.raises(OSError), whole(tmp_path) as batch:
        batch.write("a.txt", b"new")
        batch.write("b/c.txt", b"new")
    assert everything(tmp_path) == {"a.txt": b"old", "b": b"a file where a folder must go"}


@pytest.mark.parametrize("name", ["../x", "/etc/x", "a/../../x", ""])
def test_nothing_is_written_outside(tmp_path: Path, name: str) -> None:
    with pytest.raises(ValueError, match="below"), whole(tmp_path / "o") as batch:
        batch.write(name, b"")


def test_names_are_plain_and_unique() -> None:
    names = safe_names(("FB1", "fb1", "../x", "a/b", "con", "", "Ö"))
    assert names == ("FB1", "fb1_2", "___x", "a_b", "con_", "_", "__2")
