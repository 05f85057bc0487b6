"""A real pseudo-terminal with the program in it: bytes in, bytes out, and the screen they make."""

from __future__ import annotations

import fcntl
import os
import pty
import select
import signal
import struct
import sys
import termios
import time
from pathlib import Path

import pyte

PROGRAM = str(Path(sys.executable).parent / "willcarry")


class Terminal:
    """A program on a screen of so many columns and lines."""

    def __init__(self, *words: str, columns: int = 80, lines: int = 24, **environment: str) -> None:
        self.screen = pyte.Screen(columns, lines)
        self.stream = pyte.ByteStream(self.screen)
        self.out = b""
        self.status: int | None = None
        held = {k: v for k, v in os.environ.items() if k in ("PATH", "HOME", "VIRTUAL_ENV")}
        surroundings = held | {"TERM": "xterm-256color", "LANG": "C.UTF-8"} | environment
        self.pid, self.fd = pty.fork()
        if self.pid == 0:
            fcntl.ioctl(0, termios.TIOCSWINSZ, struct.pack("HHHH", lines, columns, 0, 0))
            os.execvpe(words[0], list(words), surroundings)

    def pump(self, seconds: float) -> None:
        """Take in what the program writes."""
        end = time.monotonic() + seconds
        while (left := end - time.monotonic()) > 0:
            ready, _, _ = select.select([self.fd], [], [], left)
            if not ready:
                return
            try:
                data = os.read(self.fd, 65536)
            except OSError:
                data = b""
            if not data:
                return
            self.out += data
            self.stream.feed(data)

    def text(self) -> str:
        """The screen as it stands."""
        return "\n".join(self.screen.display)

    def wait_for(self, *words: str, seconds: float = 10.0) -> str:
        """Wait until all words stand on the screen."""
        end = time.monotonic() + seconds
        while time.monotonic() < end:
            self.pump(0.02)
            if all(word in self.text() for word in words):
                return self.text()
        raise AssertionError(f"{words} did not come up:\n{self.text()}")

    def send(self, *keys: str) -> None:
        """Type, as one burst."""
        os.write(self.fd, "".join(keys).encode("utf-8", "surrogatepass"))

    def kill(self, number: int) -> None:
        """Send a signal."""
        os.kill(self.pid, number)

    def ended(self, seconds: float = 10.0) -> int:
        """Exit status, once the program has ended; minus the signal where one ended it."""
        end = time.monotonic() + seconds
        while time.monotonic() < end:
            self.pump(0.02)
            done, status = os.waitpid(self.pid, os.WNOHANG)
            if done:
                self.pump(0.2)
                self.status = os.waitstatus_to_exitcode(status)
                os.close(self.fd)
                return self.status
        os.kill(self.pid, signal.SIGKILL)
        raise AssertionError(f"did not end:\n{self.text()}")


ENTER, ESCAPE, TAB = "\r", "\x1b", "\t"
HOME, END, DOWN, UP, F1, F2, F4 = "\x1b[H", "\x1b[F", "\x1b[B", "\x1b[A", "\x1bOP", "\x1bOQ", "\x1bOS"
CTRL_Q, CTRL_S, CTRL_U, CTRL_C = "\x11", "\x13", "\x15", "\x03"


def pasted(text: str) -> str:
    """A text as a terminal sends it when it is pasted."""
    return f"\x1b[200~{text}\x1b[201~"
