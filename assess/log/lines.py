"""One line of a session: encoded with its checksum, decoded within limits; nothing malformed gets through."""

from __future__ import annotations

import json
import re
import zlib
from itertools import accumulate
from typing import Any

LONGEST_LINE = 1_000_000  # bytes
DEEPEST = 40  # brackets within brackets
LARGEST_FILE = 50_000_000  # bytes
MOST_LINES = 1_000_000
VERSION = 1

_CRC = re.compile(rb', "crc": "([0-9a-f]{8})"\}\Z')
_ESCAPED_HALF = re.compile(rb"\\u[dD][89a-fA-F]")  # the only way half a character gets past the UTF-8 decoder
# One text, or what is left of the line where it never ends. Possessive: a crafted line must not make it search again.
_TEXT = re.compile(rb'"(?:[^"\\]++|\\.?)*+"?')
_STEP = {ord("["): 1, ord("{"): 1, ord("]"): -1, ord("}"): -1}
_NO_BRACKETS = bytes(byte for byte in range(256) if byte not in _STEP)


class LineError(ValueError):
    """A line that cannot be applied, and why."""


def encode(event: dict[str, Any]) -> bytes:
    """A line as it is written, checksum last and newline at the end.

    event     the line's object, without `crc`
    returns   UTF-8 bytes; `crc` is the CRC-32 (zlib) of the line as it reads without it
    raises    LineError where the event cannot be written as JSON in UTF-8, or `decode` would refuse the line

    >>> encode({"willcarry": 1})
    b'{"willcarry": 1, "crc": "0443b9bb"}\\n'
    """
    try:
        body = json.dumps(event, ensure_ascii=False, allow_nan=False).encode("utf-8")
    except UnicodeEncodeError:
        raise LineError("holds half a character (a lone surrogate)") from None
    except RecursionError:
        raise LineError(f"is nested more than {DEEPEST} deep") from None
    except (ValueError, TypeError) as error:
        raise LineError(f"cannot be written: {error}") from None
    line = body[:-1] + f', "crc": "{zlib.crc32(body):08x}"'.encode() + b"}"
    decode(line)  # a line that could not be read back would be lost the moment it is acknowledged
    return line + b"\n"


def decode(line: bytes) -> dict[str, Any]:
    """The object of a line, its checksum verified where it has one.

    line      bytes without newline, BOM or CR
    raises    LineError: too long, too deep, not UTF-8, not JSON, a number that is none, a key given twice,
              half a character, a wrong checksum
    """
    if len(line) > LONGEST_LINE:
        raise LineError(f"is {len(line):,} bytes; a line holds at most {LONGEST_LINE:,}")
    if _depth(line) > DEEPEST:
        raise LineError(f"is nested more than {DEEPEST} deep")
    try:
        text = line.decode("utf-8")
    except UnicodeDecodeError:
        raise LineError("is not UTF-8") from None
    try:
        event = _JSON.decode(text)
    except json.JSONDecodeError as error:
        raise LineError(f"is not JSON: {error.msg} at character {error.pos + 1}") from None
    if not isinstance(event, dict):
        raise LineError("is not an object")
    if _ESCAPED_HALF.search(line):
        _no_surrogates(event)
    found = _CRC.search(line)
    if found:
        body = line[: found.start()] + b"}"
        if int(found[1], 16) != zlib.crc32(body):
            raise LineError("does not match its checksum")
        del event["crc"]
    elif "crc" in event:
        raise LineError("has a checksum that is not eight lower-case hex digits at its end")
    return event


def _depth(line: bytes) -> int:
    """Deepest nesting, brackets inside texts left out; linear, and before any parser sees the line."""
    if line.count(b"[") + line.count(b"{") <= DEEPEST:
        return 0
    brackets = _TEXT.sub(b"", line).translate(None, _NO_BRACKETS)
    return max(accumulate(map(_STEP.__getitem__, brackets)), default=0)


def _pairs(pairs: list[tuple[str, Any]]) -> dict[str, Any]:
    found = dict(pairs)
    if len(found) != len(pairs):
        seen: set[str] = set()
        twice = next(key for key, _ in pairs if key in seen or seen.add(key))  # type: ignore[func-returns-value]
        raise LineError(f"gives {twice[:40]!r} twice")
    return found


def _no_constant(text: str) -> float:
    raise LineError(f"holds {text}, which is no number")


def _whole(text: str) -> int:
    if len(text) > 20:
        raise LineError(f"holds a number of {len(text)} digits")
    return int(text)


def _real(text: str) -> float:
    value = float(text)
    if value in (float("inf"), float("-inf")):
        raise LineError(f"holds {text[:20]}, which is out of range")
    return value


def _no_surrogates(value: Any) -> None:
    """Half a character loads as JSON but could never be saved again."""
    if isinstance(value, str):
        if any("\ud800" <= char <= "\udfff" for char in value):
            raise LineError("holds half a character (a lone surrogate)")
    elif isinstance(value, dict):
        for key, item in value.items():
            _no_surrogates(key)
            _no_surrogates(item)
    elif isinstance(value, list):
        for item in value:
            _no_surrogates(item)


_JSON = json.JSONDecoder(object_pairs_hook=_pairs, parse_constant=_no_constant, parse_int=_whole, parse_float=_real)
