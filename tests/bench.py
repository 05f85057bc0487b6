"""`python -m tests.bench`: medians and ratios measured side by side in one run; a command, never a timed test."""

from __future__ import annotations

import json
import os
import pty
import select
import statistics
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path
from typing import Any

from assess import assess
from assess.record import read_member

DEMO = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
EMPTY_APP = "from textual.app import App\nclass E(App):\n    def on_ready(self):\n        self.exit()\nE().run()"


def record(step: int) -> dict[str, Any]:
    """A joist under a change of use; each step reads another span, so that no cache answers."""
    return {
        "kind": "joist",
        "size": {"width": "1 5/8 in", "depth": "9 1/2 in"},
        "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
        "spans": [f"{120 + step * 0.01:.2f} in"],
        "spacing": "16 in",
        "dead": "12 psf",
        "present_use": "dwelling, living areas",
        "proposed_use": "offices",
    }


def median_ms(run: Callable[[int], object], count: int) -> float:
    """Median time of a call, in ms, over count steps after a warm-up."""
    run(-1)
    times = []
    for step in range(count):
        start = time.perf_counter()
        run(step)
        times.append(time.perf_counter() - start)
    return statistics.median(times) * 1000


def process_ms(command: list[str], count: int = 7) -> float:
    """Median wall time of a whole process, in ms."""

    def run(_: int) -> None:
        subprocess.run(command, capture_output=True, check=False, stdin=subprocess.DEVNULL)

    return median_ms(run, count)


class Terminal:
    """A program in a pseudo-terminal of 80x24, its output read as it comes."""

    def __init__(self, command: list[str]) -> None:
        self.pid, self.fd = pty.fork()
        if self.pid == 0:
            os.environ.update(TERM="xterm-256color", COLUMNS="80", LINES="24")
            os.execvp(command[0], command)

    def read(self, timeout: float) -> bytes:
        """What comes until nothing has come for `timeout` seconds."""
        out = b""
        while select.select([self.fd], [], [], timeout)[0]:
            try:
                data = os.read(self.fd, 65536)
            except OSError:
                break
            if not data:
                break
            out += data
        return out

    def wait_for(self, word: bytes, limit: float = 20.0) -> float:
        """Seconds until the word has come."""
        start, out = time.perf_counter(), b""
        while word not in out and time.perf_counter() - start < limit:
            if select.select([self.fd], [], [], 0.5)[0]:
                out += os.read(self.fd, 65536)
        return time.perf_counter() - start

    def echo_s(self, key: bytes) -> float:
        """Seconds from a key to the first bytes that answer it."""
        start = time.perf_counter()
        os.write(self.fd, key)
        select.select([self.fd], [], [], 2.0)
        return time.perf_counter() - start

    def close(self) -> None:
        """End the program."""
        os.kill(self.pid, 9)
        os.waitpid(self.pid, 0)
        os.close(self.fd)


def first_paint_ms(command: list[str], word: bytes, count: int = 5) -> float:
    """Median time from start until a word stands on the screen, in ms."""

    def run(_: int) -> None:
        terminal = Terminal(command)
        terminal.wait_for(word)
        terminal.close()

    return median_ms(run, count)


def rows() -> list[tuple[str, float, str, str]]:
    """(what, median ms, unit of its target, target) for each figure."""
    member = [read_member(record(step)) for step in range(1000)]
    program = str(Path(sys.executable).parent / "willcarry")
    one = median_ms(lambda step: assess(member[step]), 400)
    three = median_ms(lambda step: assess(read_member(three_spans(step))), 60)
    start = time.perf_counter()
    for each in member:
        assess(each)
    thousand = (time.perf_counter() - start) * 1000
    bare = process_ms([sys.executable, "-c", "pass"], 15)
    found = [
        ("one joist assessed, with capacity and change of use", one, "1 ms", ""),
        ("three spans, ten defects, read and assessed", three, "5 ms", ""),
        ("1,000 members assessed", thousand, "1,600 ms (5,000 in 8 s)", ""),
        ("python -c pass", bare, "", ""),
    ]
    with tempfile.TemporaryDirectory() as folder:
        session = Path(folder) / "one.survey"
        header = {"willcarry": 1, "site": "bench", "units": "US"}
        put = {"put": "member", "id": "B-1", "data": record(0)}
        session.write_text("".join(json.dumps(line) + "\n" for line in (header, put)), encoding="utf-8")
        for words, limit in ((["-h"], 4), (["wood", "hem-fir"], 8), (["assess", str(session)], 50)):
            ms = process_ms([program, *words])
            found.append((f"willcarry {words[0]}", ms, f"{limit} x python -c pass", f"{ms / bare:.1f} x"))
        empty = process_ms_in_terminal([sys.executable, "-c", EMPTY_APP])
        paint = first_paint_ms([program, str(session)], b"B-1")
        found.append(("an empty Textual app, start to exit", empty, "", f"{empty / bare:.1f} x"))
        found.append(("first paint of the walk list", paint, "30 x python -c pass", f"{paint / bare:.1f} x"))
        many = Path(folder) / "many.survey"
        puts = [{"put": "member", "id": f"B-{n}", "data": record(n)} for n in range(12)]
        many.write_text("".join(json.dumps(line) + "\n" for line in (header, *puts)), encoding="utf-8")
        terminal = Terminal([program, str(many)])
        terminal.wait_for(b"B-1")
        terminal.read(1.5)
        echoes = []
        for step in range(40):
            echoes.append(terminal.echo_s(b"k" if step % 2 else b"j"))
            terminal.read(0.1)
        terminal.close()
        echoes.sort()
        found.append(("key to the first answering bytes, 95th percentile", echoes[37] * 1000, "8 ms", ""))
    return found


def process_ms_in_terminal(command: list[str], count: int = 5) -> float:
    """Median wall time of a whole program that needs a terminal, in ms."""

    def run(_: int) -> None:
        terminal = Terminal(command)
        while terminal.read(0.3):
            pass
        os.waitpid(terminal.pid, 0)
        os.close(terminal.fd)

    # The last wait for silence is not the program's own time.
    return median_ms(run, count) - 300


def three_spans(step: int) -> dict[str, Any]:
    """A three-span girder with an overhang and ten holes, another depth at each step."""
    made = record(step) | {
        "kind": "beam",
        "size": {"width": "5 1/2 in", "depth": f"{9 + step * 0.01:.2f} in"},
        "wood": {"species": "Douglas Fir-Larch", "grade": "No. 1", "basis": "stamp"},
        "spans": ["9 ft", "10 ft", "9 ft"],
        "overhang_right": "2 ft",
        "tributary": "8 ft",
        "condition": [
            {"defect": "hole", "at": f"{2 + 2.5 * n} ft", "diameter": "1 in", "height": "4 1/2 in"} for n in range(10)
        ],
    }
    del made["spacing"]
    return made


def main() -> None:
    """Print the table."""
    for what, ms, target, ratio in rows():
        sys.stdout.write(f"{what:<52} {ms:>10.2f} ms   {ratio:>8}   target {target or '-'}\n")


if __name__ == "__main__":
    main()
