"""Texts that must not hurt: markup, escapes, invisible marks, numbers that are none, formulas, paths."""

from __future__ import annotations

from hypothesis import strategies as st

# Rows of the inputs that must not hurt, by their ids.
MARKUP = (  # T1 to T3
    "[@click=app.quit]x[/]", "[@click=app.bell()]x[/]", '[@click="app.pwn()"]', "[link='https://evil.example/']x[/link]",
    "[x](file:///etc/passwd)", "[/]", "[/b]", "J12 [/] end", "[/", "[", "[[", "]", "[a=b]", "[bold]", "[0]", '[1, "3"]',
    "[$x]", "$v", "\\", "\\[", "x\\", "[\\@click=app.quit=",
)  # fmt: skip
CONTROL = (  # T4 to T6
    "\x1b]52;c;cHdu\x07", "\x1b]0;x\x07", "\x1b]8;;http://e\x1b\\", "\x1b[2J", "\x1b[6n", "\x1bc", "\x1bP1$q\x1b\\",
    "x\x1b", "\x9b31m", "\x9d0;x", "a\x85b", "a\x00b", "a\x07b", "a\x08b", "a\x0bb", "a\x0cb", "a\rb", "a\x7fb", "a\tb",
    "a\r\nb",
)  # fmt: skip
INVISIBLE = (  # T7, T8
    "inv\u202egpj.exe", "\u2066x", "\u2067x", "\u2068x", "x\u2069", "\u061cx", "\u200ex", "\u200fx",
    "\u200b\u2060\ufeff", "a\u200bb", "\u2028", "\u2029", "\U000e0041", "\ufffe", "\ud800",
)  # fmt: skip
LONG = (  # T9
    "Z" + "\u0301" * 10_000, "x" * 1_000_000, "line\n" * 100_000, "\U0001f469\u200d\U0001f469\u200d\U0001f467" * 200,
)  # fmt: skip
ALIKE = ("漢字", "A", "А", "J1", "j1 ")  # T9, T10
NUMBERS = (  # N1 to N5, and what reads as none
    "NaN", "nan", "Infinity", "-Infinity", "inf", "1e999", "9" * 400, "9" * 5000, "1e308", "5e-324", "-0.0", "0",
    "-3 in", "true", "null", "[12]", "{}", "900 %", "3,5 m", "12' 6\"", "1 mm; 2", "9**9**9", "5 in in", "−5 mm",
    "１２ mm", "5 in 3 mm", "", " ", "mm", "5", "0x10 mm", "1e3 mm", "5 psf", "5 furlong", "3 1/2 in", "7 3/2", "1/0",
    "13-4", "13-1/2", "11/2", "7 ± ", "± 1", "7 ± 9", "7 ±± 1", "7½½", "½2", "5 in\n3", "7 1/2 in ± 5 psf", "--5",
    "5..2", "1_000", "٣", "5²", "6:0", "0:12", "((((", "1e5e5", "'", '"',
)  # fmt: skip
OUTPUT = (  # O1 to O4: spreadsheets, pages, documents, drawings
    "=1+1", "+cmd|' /C calc'!A0", "@SUM(1)", "\t=1", " =1", "＝1", "-2+3+cmd|' /C calc'!A0", "-5.00",
    "<script>alert(1)</script>", '"><img src=x onerror=alert(1)>', "' onmouseover='alert(1)", "</style>", "<!--",
    "javascript:alert(1)", "{{7*7}}", '#eval("1+1")', '#read("/secret.txt")', '] #read("/x") [', '"; #panic("x")',
    "$x^2$", '#panic("x")', "#{while true {}}", '#import "@preview/x:0.1.0"', "@ref <label>", "= Heading", "//",
    "</text><script>", "]]>", "&#x1b;", "m" * 10_000,
)  # fmt: skip
PATHS = ("../../x", "../x.jpg", "/etc/passwd", "C:\\x", "%2e%2e/", "CON.jpg", "__class__", "__proto__")  # J6, P1
HOSTILE = tuple(dict.fromkeys(MARKUP + CONTROL + INVISIBLE + LONG + ALIKE + NUMBERS + OUTPUT + PATHS))


def hostile_texts() -> list[str]:
    """Every text of those rows, each once, for a test that puts them all where people type."""
    return list(HOSTILE)


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
