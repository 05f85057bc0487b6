"""A skipped test is a failed one: nothing is left unproven quietly."""

from __future__ import annotations

from collections.abc import Generator
from typing import Any

import pytest


@pytest.hookimpl(wrapper=True)
def pytest_runtest_makereport(item: pytest.Item, call: pytest.CallInfo[Any]) -> Generator[None, pytest.TestReport, Any]:
    """Turn a skip into a failure that says so."""
    report = yield
    if report.skipped:
        report.outcome = "failed"
        report.longrepr = f"{item.nodeid} was skipped: a skip is a failure here"
    return report
