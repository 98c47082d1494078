"""Placed steel and concrete, measured: lines, slices, distances, contacts, cover, the file."""
