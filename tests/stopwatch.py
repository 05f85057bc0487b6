"""A limit on the processor time of what is tested, whatever else runs."""

from __future__ import annotations

import contextlib
import gc
import time
from collections.abc import Iterator


@contextlib.contextmanager
def within(limit_s: float) -> Iterator[None]:
    """Fail where the block takes longer than this [s of processor time].

    The collector rests meanwhile, as in `timeit`: its sweep over what other tests left is no work of the block.
    """
    was_on = gc.isenabled()
    gc.disable()
    start = time.process_time()
    try:
        yield
        took_s = time.process_time() - start
    finally:
        if was_on:
            gc.enable()
    assert took_s < limit_s, f"{took_s:.3f} s"
