"""Texts that must not hurt: markup, escapes, invisible marks, numbers that are none, formulas, paths."""

from __future__ import annotations

from hypothesis import strategies as st

HOSTILE = (
    # markup, links, escapes, controls, marks of direction, invisible and combining marks
    "[@click=app.quit]x[/]", "[/]", "[bold]", "\\[", "x\\", "$v", "[link='https://evil.example/']x[/link]",
    "\x1b]52;c;cHdu\x07", "\x1b[2J", "\x9b31m", "a\x00b", "a\tb", "a\r\nb",
    "inv\u202egpj.exe", "\u2066x", "\u200b\u2060\ufeff",
    "\u2028", "\ufffe", "\ud800", "Z" + "\u0301" * 10_000, "x" * 1_000_000, "漢字", "A", "А", "J1", "j1 ",
    # numbers that are none, or none a person reads
    "NaN", "nan", "Infinity", "-Infinity", "inf", "1e999", "9" * 400, "9" * 5000, "1e308", "5e-324", "-0.0", "0",
    "-3 in", "3,5 m", "12' 6\"", "1 mm; 2", "9**9**9", "5 in in", "−5 mm", "１２ mm", "5 in 3 mm", "", " ", "mm", "5",
    "0x10 mm",
    "1e3 mm", "5 psf", "5 furlong", "3 1/2 in", "7 3/2", "1/0", "13-4", "13-1/2", "11/2", "7 ± ", "± 1", "7 ± 9",
    "7 ±± 1", "7½½", "½2", "5 in\n3", "7 1/2 in ± 5 psf", "--5", "5..2", "1_000", "٣", "5²", "6:0", "0:12", "((((",
    "1e5e5",
    "'", '"',
    # spreadsheets, pages, documents, paths
    "=1+1", "+cmd|' /C calc'!A0", "@SUM(1)", "<script>alert(1)</script>", "{{7*7}}", '#read("/secret.txt")', "]]>",
    "../../x", "/etc/passwd", "C:\\x", "%2e%2e/", "__class__", "__proto__",
)  # fmt: skip


def free_texts() -> st.SearchStrategy[str]:
    """Free text as people and strangers write it; never half a character, which no file can hold."""
    return st.one_of(
        st.sampled_from([text for text in HOSTILE if len(text) < 300 and "\ud800" not in text]),
        st.text(st.characters(exclude_categories=("Cs",)), max_size=40),
    )


def bad_texts() -> st.SearchStrategy[str]:
    """Texts that must be understood or refused in one line: the known bad ones, mangled readings, anything."""
    parts = st.sampled_from(
        ("7", "1/2", "in", "'", '"', "±", "+-", "-", " ", "ft", "mm", "m", "psf", "%", "°", "½", ".", ",", "e", "9",
         ":", "/", "kPa", "lb", "−", "′", "C", "12", "0")
    )  # fmt: skip
    return st.one_of(
        st.sampled_from(HOSTILE),
        st.lists(parts, max_size=9).map("".join),
        st.text(max_size=250),
    )
