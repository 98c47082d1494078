"""Primitives on sheets, widths of texts, dimensions: paper and millimetres, no concrete."""
