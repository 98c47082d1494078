"""Lines of keys in a TOML text; loaded only when there is something to print."""

from __future__ import annotations

from collections.abc import Mapping
from typing import TYPE_CHECKING, TypeAlias

import tomli

if TYPE_CHECKING:
    from tree_sitter import Node

KeyPath: TypeAlias = tuple[str | int, ...]
"""Keys and 0-based places in arrays, from the root."""


def printed(path: KeyPath) -> str:
    """Return a key path as errors print it: dots, and places counted from 1.

    Parameters
    ----------
    path : tuple
        The key path.
    """
    text = ""
    for part in path:
        if isinstance(part, int):
            text += f"[{part + 1}]"
        else:
            name = plain(part)
            text += f".{name}" if text else name
    return text or "the file"


def plain(text: str) -> str:
    """Return a text from a file fit for a terminal: short, and without control characters.

    Parameters
    ----------
    text : str
        Whatever was written.
    """
    shown = "".join(letter if letter.isprintable() else "?" for letter in text.strip())
    return shown if len(shown) <= 40 else f"{shown[:39]}…"


def line_of(lines: Mapping[KeyPath, int], path: KeyPath) -> int | None:
    """Return the line of a key, or of the nearest table that holds it.

    Parameters
    ----------
    lines : mapping
        Lines by key path.
    path : tuple
        The key path.
    """
    for end in range(len(path), 0, -1):
        if path[:end] in lines:
            return lines[path[:end]]
    return None


def find_lines(source: bytes) -> dict[KeyPath, int]:
    """Return the 1-based line of every key, table and array item of a TOML text.

    Parameters
    ----------
    source : bytes
        The text, valid TOML.
    """
    import tree_sitter_toml
    from tree_sitter import Language, Parser

    tree = Parser(Language(tree_sitter_toml.language())).parse(source)
    finder = _Finder()
    finder.document(tree.root_node)
    return finder.lines


class _Finder:
    """Walks a syntax tree and notes where each key stands."""

    def __init__(self) -> None:
        self.lines: dict[KeyPath, int] = {}
        self.counts: dict[KeyPath, int] = {}

    def document(self, root: Node) -> None:
        """Note everything below the root."""
        for node in root.named_children:
            if node.type == "pair":
                self.pair(node, ())
            elif node.type in ("table", "table_array_element"):
                self.table(node)

    def table(self, node: Node) -> None:
        """Note a `[table]` or an item of a `[[table]]` and the pairs in it."""
        head, *rest = node.named_children
        path: KeyPath = ()
        for key in (keys := _keys(head))[:-1]:
            path = self.into(path, key)
        path = (*path, keys[-1])
        if node.type == "table_array_element":
            self.note(path, node)
            self.counts[path] = self.counts.get(path, 0) + 1
            path = (*path, self.counts[path] - 1)
        self.note(path, node)
        for child in rest:
            if child.type == "pair":
                self.pair(child, path)

    def into(self, path: KeyPath, key: str) -> KeyPath:
        """Return the path of a table, of its newest item where it is an array."""
        path = (*path, key)
        return (*path, self.counts[path] - 1) if path in self.counts else path

    def pair(self, node: Node, path: KeyPath) -> None:
        """Note a key and what its value holds."""
        head, *values = node.named_children
        for key in _keys(head):
            path = (*path, key)
            self.note(path, node)
        for value in values:
            self.value(value, path)

    def value(self, node: Node, path: KeyPath) -> None:
        """Note the items of an array or an inline table."""
        if node.type == "inline_table":
            for child in node.named_children:
                if child.type == "pair":
                    self.pair(child, path)
        elif node.type == "array":
            items = [child for child in node.named_children if child.type != "comment"]
            for place, child in enumerate(items):
                self.note((*path, place), child)
                self.value(child, (*path, place))

    def note(self, path: KeyPath, node: Node) -> None:
        """Keep the first line a path stands on."""
        self.lines.setdefault(path, node.start_point[0] + 1)


def _keys(node: Node) -> list[str]:
    """Return the parts of a bare, quoted or dotted key."""
    if node.type == "dotted_key":
        return [key for child in node.named_children for key in _keys(child)]
    text = (node.text or b"").decode("utf-8", "replace")
    return list(tomli.loads(f"{text} = 0")) if node.type == "quoted_key" else [text]
