"""Parts, stages and the share between them: the path a sister will take, by the formula of the engineering basis."""

from __future__ import annotations

from dataclasses import replace

import pytest

from assess.engine import compute
from assess.scenario import Part, Scenario, Stage
from tests.scenarios import HEM_FIR_2, scenario


def sistered(jacked: float) -> Scenario:
    """The joist of the tests with a 2x8 of the same wood beside it, put on under part of the dead load."""
    base = scenario()
    sister = Part("sister", 1.5, 7.25, 1, False, False, (replace(HEM_FIR_2, E=1.5e6),))
    return replace(
        base,
        parts=(*base.parts, sister),
        stages=(Stage((0,), dead=1.0 - jacked, later=False), Stage((0, 1), dead=jacked, later=True)),
    )


@pytest.mark.parametrize("jacked", [0.0, 0.4, 1.0])
def test_the_old_joist_keeps_its_dead_load_and_shares_what_comes_later(jacked: float) -> None:
    # M_old = (1 - rho) M_D1 + alpha (rho M_D1 + M_L), alpha = EI share: 1.3e6 x 98.932 / (that + 1.5e6 x 47.635)
    EI_old, EI_new = 1.3e6 * 1.5 * 9.25**3 / 12, 1.5e6 * 1.5 * 7.25**3 / 12
    alpha = EI_old / (EI_old + EI_new)
    M_D, M_L = (psf * 16 / 144 * 160**2 / 8 for psf in (10.0, 40.0))
    computed = compute(sistered(jacked))
    env = computed.envelope
    i = [c.name for c in env.combinations].index("D+L")
    M_old = float(env.high(env.layout.M)[0, i].max())
    assert M_old == pytest.approx((1 - jacked) * M_D + alpha * (jacked * M_D + M_L), rel=1e-12)
    # dead alone: the locked-in part is the old joist's own
    i = [c.name for c in env.combinations].index("D")
    assert float(env.high(env.layout.M)[0, i].max()) == pytest.approx(
        (1 - jacked) * M_D + alpha * jacked * M_D, rel=1e-12
    )


def test_deflection_adds_only_by_what_comes_later() -> None:
    EI_old, EI_new = 1.3e6 * 1.5 * 9.25**3 / 12, 1.5e6 * 1.5 * 7.25**3 / 12
    computed = compute(sistered(0.0))
    live = 5 * (40 * 16 / 144) * 160**4 / (384 * (EI_old + EI_new))
    dead = 5 * (10 * 16 / 144) * 160**4 / (384 * EI_old)
    assert float(computed.live_deflection.demand[0, 0].max()) == pytest.approx(live, rel=1e-9)
    assert float(computed.total_deflection.demand[0, 0].max()) == pytest.approx(1.5 * dead + live, rel=1e-9)
