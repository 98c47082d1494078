"""One module a format; they write what is there and decide nothing."""
