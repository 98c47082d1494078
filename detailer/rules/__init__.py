"""What the standards say: pure functions of plain numbers, one module or package a standard."""
