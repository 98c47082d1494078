import pytest
from hypothesis import given
from hypothesis import strategies as st

from detailer.model import BarGroup, LinkZone
from detailer.model.materials import SIZE_OVER_RIBS
from detailer.reading.notation import (
    NotationError,
    parse_bars,
    parse_zone,
    print_bars,
    print_zone,
)

SIZES = st.sampled_from(tuple(SIZE_OVER_RIBS))
GROUPS = st.lists(st.builds(BarGroup, st.integers(1, 60), SIZES), min_size=1, max_size=5)
ZONES = st.builds(
    LinkZone,
    legs=st.integers(2, 12),
    dia=SIZES,
    spacing=st.integers(10, 1000).map(float),
    length=st.none() | st.integers(1, 30000).map(float),
)


@pytest.mark.parametrize(
    ("text", "printed"),
    [
        ("3T20", "3-T20"),
        ("3-T20", "3-T20"),
        ("3 T 20", "3-T20"),
        ("3 Ø20", "3-T20"),
        ("3-20Ø", "3-T20"),
        ("4 Ø 12", "4-T12"),
        ("3Y16", "3-T16"),
        ("3y16", "3-T16"),
        ("8T16", "8-T16"),
        ("3-16", "3-T16"),
        ("3-16 + 2-12", "3-T16 + 2-T12"),
        ("2T20+1T16", "2-T20 + 1-T16"),
        ("2-T16", "2-T16"),
        ("2 nos 16 mm", "2-T16"),
        ("2–φ25", "2-T25"),
        ("2\u00a0⌀ 10", "2-T10"),
        ("4-12#", "4-T12"),
        ("12T10", "12-T10"),
    ],
)
def test_bars_as_offices_write_them(text: str, printed: str) -> None:
    assert print_bars(parse_bars(text)) == printed


@pytest.mark.parametrize(
    ("text", "printed"),
    [
        ("2L-T8@150 x 900", "2L-T8@150 x 900"),
        ("2L-T8@150x900", "2L-T8@150 x 900"),
        ("T8@150", "2L-T8@150"),
        ("2L-8@150", "2L-T8@150"),
        ("8@150", "2L-T8@150"),
        ("4L T10 @ 100 mm c/c × 1200 mm", "4L-T10@100 x 1200"),
        ("2l-8Ø@125", "2L-T8@125"),
    ],
)
def test_links_as_offices_write_them(text: str, printed: str) -> None:
    assert print_zone(parse_zone(text)) == printed


@pytest.mark.parametrize(
    "text",
    ["", "T20", "20", "3T", "0T20", "3T20+", "+", "3T20,2T16", "316", "3R16", "-3T20",
     "3T20 (2 layers)", "٣T٢٠", "3T20\n", "3T20\x00", "9" * 999, "3T20+" * 30,
     "61T20", "3T18", "3T30", "3T0"],
)  # fmt: skip
def test_what_is_no_group_of_bars(text: str) -> None:
    with pytest.raises(NotationError) as caught:
        parse_bars(text)
    assert caught.value.problem and caught.value.remedy


@pytest.mark.parametrize(
    "text", ["", "T8", "T8@", "@150", "2L-T8@150 x", "2L-T8@150 x 0", "1L-T8@150", "T9@150", "T8@5",
             "T8@nan", "2L-T8@150 y 900", "T8@-150", "2-T8@150"],
)  # fmt: skip
def test_what_is_no_zone_of_links(text: str) -> None:
    with pytest.raises(NotationError):
        parse_zone(text)


def test_a_size_between_two() -> None:
    with pytest.raises(NotationError, match=r"30 mm bars are not rolled\. 28 or 32\?"):
        parse_bars("2T30")


@given(GROUPS)
def test_bars_print_and_parse(groups: list[BarGroup]) -> None:
    assert parse_bars(print_bars(groups)) == tuple(groups)


@given(ZONES)
def test_links_print_and_parse(zone: LinkZone) -> None:
    assert parse_zone(print_zone(zone)) == zone


@given(st.text(max_size=30) | st.from_regex(r"[0-9TYØL@x+ \-]{1,20}"))
def test_any_text_is_read_or_refused(text: str) -> None:
    for parse in (parse_bars, parse_zone):
        try:
            parse(text)  # type: ignore[operator]
        except NotationError as slip:
            assert slip.problem and slip.remedy
