"""Texts as they may stand in a file: one line, no control characters, nothing that turns it."""

from __future__ import annotations

import unicodedata

_DROPPED = ("Cc", "Cs", "Cn")
"""Categories that no file may hold: controls, lone surrogates, no characters at all."""

_TURNING = frozenset("\u061c\u200e\u200f\u202a\u202b\u202c\u202d\u202e\u2066\u2067\u2068\u2069")
"""Marks that change the direction of what follows."""


def plain(text: str) -> str:
    """Return a text on one line, without characters that are not meant to be seen.

    Parameters
    ----------
    text : str
        Any text, from anywhere.

    Returns
    -------
    str
        Line ends and tabs have become spaces; controls are gone.
    """
    if text.isascii() and text.isprintable():
        return text
    return "".join(_kept(char) for char in text)


def _kept(char: str) -> str:
    if char in "\t\n\v\f\r\x85\u2028\u2029":
        return " "
    if char in _TURNING or unicodedata.category(char) in _DROPPED:
        return ""
    return char
