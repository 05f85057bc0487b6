"""The command line: what it prints, where, and with which exit status; never a traceback."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path
from typing import Any

import pytest

from tui import command, exits

DEMO = Path(__file__).resolve().parent.parent / "tui" / "data" / "demo.survey"
HEADER = {"willcarry": 1, "site": "Sluice cottage", "units": "US"}
JOIST: dict[str, Any] = {
    "kind": "joist",
    "size": {"width": "1 1/2 in", "depth": "9 1/4 in"},
    "spans": ["12 ft"],
    "spacing": "16 in",
    "wood": {"species": "Hem-Fir", "grade": "No. 2", "basis": "stamp"},
    "dead": "10 psf",
    "proposed_use": "dwelling, living areas",
}


def session(folder: Path, *events: dict[str, Any], header: dict[str, Any] | None = None) -> str:
    path = folder / "s.survey"
    lines = [header or HEADER, *events]
    path.write_text("".join(json.dumps(line) + "\n" for line in lines), encoding="utf-8")
    return str(path)


def put(name: str, **changes: Any) -> dict[str, Any]:
    data = {k: v for k, v in (JOIST | changes).items() if v is not None}
    return {"put": "member", "id": name, "data": data}


def run(capsys: pytest.CaptureFixture[str], *words: str) -> tuple[int, str, str]:
    status = command.main(list(words))
    out, err = capsys.readouterr()
    assert "Traceback" not in out + err
    return status, out, err


def test_help_and_unknown_words(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, _ = run(capsys, "-h")
    assert status == exits.ADEQUATE
    assert "example" in out
    for name in command.COMMANDS:
        assert name in out
        status, out_of_one, _ = run(capsys, name, "-h")
        assert status == exits.ADEQUATE
        assert "example" in out_of_one
    status, _, err = run(capsys, "--nonsense")
    assert status == exits.BAD_INPUT
    assert "--nonsense" in err


def test_an_adequate_member_is_status_0(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    status, out, err = run(capsys, "assess", session(tmp_path, put("J-1")))
    assert status == exits.ADEQUATE
    assert "adequate for dwelling, living areas (40 psf) under the assumptions listed" in " ".join(out.split())
    assert err == ""
    assert "not a stamped design" in out


def test_json_has_every_key_of_the_interface(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    status, out, _ = run(capsys, "assess", session(tmp_path, put("J-1")), "--json")
    data = json.loads(out, parse_constant=lambda text: pytest.fail(text))
    assert status == exits.ADEQUATE
    assert data["willcarry"] == "0.1.0"
    assert data["basis"] == "NDS 2018 ASD"
    assert data["sessions"][0]["site"] == "Sluice cottage"
    assert data["problems"] == []
    member = data["members"][0]
    for key in (
        "id", "file", "where", "verdict", "ratio", "governs", "range", "service", "service_ratio", "live_load",
        "change_of_use", "shore_now", "checks", "settle", "assumptions", "cautions",
    ):  # fmt: skip
        assert key in member
    assert set(member["governs"]) == {"check", "combination", "at_in"}
    assert {"of", "strength_psf", "strength_governs", "concentrated_ok", "service_psf", "service_governs",
            "posting_psf"} == set(member["live_load"])  # fmt: skip
    names = {(check["check"], check["combination"]) for check in member["checks"]}
    assert {("bending", "D"), ("bending", "D+L"), ("shear", "D+L"), ("bearing", "D+L"), ("live deflection", "L"),
            ("total deflection", "1.5D+L"), ("bounce", "frequency"), ("bounce", "1 kN")} <= names  # fmt: skip
    for check in member["checks"]:
        assert {"check", "combination", "at_in", "demand", "capacity", "unit", "ratio", "clause", "factors"} == set(
            check
        )
    # the published span table allows 15 ft 2 in for this joist, so at 12 ft it carries more than 40 psf
    assert member["live_load"]["strength_psf"] > 40


def test_explain_prints_steps_in_text_and_json(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    path = session(tmp_path, put("J-1"))
    _, out, _ = run(capsys, "assess", path, "--explain")
    for word in ("Fb_star * CL * Cfu", "NDS 3.3.3", "1.5 * V / (b * d)", "lb-in"):
        assert word in out
    _, out, _ = run(capsys, "assess", path, "--explain", "--json")
    steps = json.loads(out)["members"][0]["working"]
    assert {"scope", "symbol", "formula", "numbers", "result", "unit", "clause", "meaning"} == set(steps[0])


@pytest.mark.parametrize(
    ("events", "expected"),
    [
        ([put("J-1"), put("J-2", spans=["20 ft"])], exits.NOT_ADEQUATE),
        ([put("J-1", dead=None)], exits.NOT_ADEQUATE),
        ([put("J-1", sag="3/8 in")], exits.NOT_ADEQUATE),
        ([put("J-1"), put("J-2", tributary="4 ft")], exits.BAD_INPUT),
        ([put("J-1"), put("J-2", size={"width": "1 1/2 in", "depth": "0 in"})], exits.BAD_INPUT),
        ([put("J-1", wood={"species": "Hem-Fir", "grade": "Construction"})], exits.BAD_INPUT),
        ([], exits.ADEQUATE),
    ],
)
def test_exit_status(
    tmp_path: Path, capsys: pytest.CaptureFixture[str], events: list[dict[str, Any]], expected: int
) -> None:
    status, _, err = run(capsys, "assess", session(tmp_path, *events))
    assert status == expected
    if expected == exits.ADEQUATE:
        assert err == ""


@pytest.mark.parametrize(
    ("changes", "field", "words"),
    [
        ({"size": {"width": "1 1/2 in", "depth": "40 psf"}}, "size.depth", "7 1/2 in"),
        ({"size": {"width": "", "depth": "9 1/4 in"}}, "size.width", "empty"),
        ({"spans": ["0 ft"]}, "spans.0", "60 ft"),
        ({"spans": ["-3 ft"]}, "spans.0", "60 ft"),
        ({"spans": ["61 ft"]}, "spans.0", "60 ft"),
        ({"spans": ["nan"]}, "spans.0", "60 ft"),
        ({"spacing": "16 psf"}, "spacing", "16 in"),
        ({"tributary": "4 ft"}, "tributary", "not both"),
        ({"wood": {"species": "dug fur", "grade": "No. 2"}}, "wood.species", "nearest"),
        ({"wood": {"species": "Hem-Fir", "grade": "No. 9"}}, "wood.grade", "No. "),
        ({"spacng": "16 in"}, "spacng", "spacing"),
        ({"proposed_use": "ofices"}, "proposed_use", "offices"),
        ({"moisture": "900 %"}, "moisture", "200 %"),
    ],
)
def test_bad_input_is_one_line_with_line_number_field_and_what_is_accepted(
    tmp_path: Path, capsys: pytest.CaptureFixture[str], changes: dict[str, Any], field: str, words: str
) -> None:
    path = session(tmp_path, put("J-1"), put("J-2", **changes))
    status, out, err = run(capsys, "assess", path)
    assert status == exits.BAD_INPUT
    assert "J-1" in out  # the usable ones are still assessed and printed
    assert len(err.splitlines()) == 1
    assert f"line 3: J-2: {field}" in err
    assert words in err


def test_a_torn_tail_is_said_and_the_rest_stands(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    path = session(tmp_path, put("J-1"))
    with open(path, "a", encoding="utf-8") as file:
        file.write('{"put": "mem')
    status, out, err = run(capsys, "assess", path)
    assert status == exits.ADEQUATE
    assert "torn" in err
    assert "J-1" in out


def test_one_member_by_its_id(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    path = session(tmp_path, put("J-1"), put("J-2", spans=["20 ft"]))
    status, out, _ = run(capsys, "assess", path, "--member", "J-1")
    assert status == exits.ADEQUATE
    assert "J-2" not in out
    status, _, err = run(capsys, "assess", path, "--member", "J-3")
    assert status == exits.BAD_INPUT
    assert "J-3" in err


def test_members_inherit_from_their_bay(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    bay = {"put": "bay", "id": "north bay", "data": {k: v for k, v in JOIST.items() if k != "size"}}
    own = {"put": "member", "id": "J-1", "data": {"bay": "north bay", "size": JOIST["size"]}}
    short = {"put": "member", "id": "J-2", "data": {"bay": "north bay", "size": JOIST["size"], "spans": ["20 ft"]}}
    lost = {"put": "member", "id": "J-3", "data": {"bay": "south bay"}}
    status, out, err = run(capsys, "assess", session(tmp_path, bay, own, short, lost), "--json")
    members = {member["id"]: member["verdict"] for member in json.loads(out)["members"]}
    assert members == {"J-1": "adequate", "J-2": "inadequate"}
    assert status == exits.BAD_INPUT
    assert "south bay" in err


def test_si_session_reads_bare_numbers_in_millimetres(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    metric = {"size": {"width": "38.1", "depth": "234.95"}, "spans": ["3.6576"], "spacing": "406.4", "dead": "0.4788"}
    path = session(tmp_path, put("J-1", **metric), header=HEADER | {"units": "SI"})
    _, out, _ = run(capsys, "assess", path, "--json")
    ratio = json.loads(out)["members"][0]["ratio"]
    _, out, _ = run(capsys, "assess", session(tmp_path, put("J-1")), "--json")
    assert ratio == pytest.approx(json.loads(out)["members"][0]["ratio"], rel=1e-4)


def test_demo_prints_a_finding_for_each_member(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, err = run(capsys, "demo", "--print")
    assert status == exits.NOT_ADEQUATE
    assert err == ""
    ids = [json.loads(line)["id"] for line in DEMO.read_text(encoding="utf-8").splitlines()[2:]]
    assert len(ids) >= 10
    for name in ids:
        assert f"\n{name}," in out
    for verdict in ("undetermined", "inadequate", "adequate"):
        assert verdict in out
    assert max(len(line) for line in out.splitlines()) <= 80


def test_wood_lists_and_refuses(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, _ = run(capsys, "wood", "hem-fir", "#2")
    assert status == exits.ADEQUATE
    assert "850" in out
    assert "recalled" in out.lower()
    status, _, err = run(capsys, "wood", "dug fur")
    assert status == exits.BAD_INPUT
    assert len(err.splitlines()) == 1


def test_check_tells_sound_from_not(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    path = session(tmp_path, put("J-1"))
    assert run(capsys, "check", path)[0] == exits.ADEQUATE
    with open(path, "a", encoding="utf-8") as file:
        file.write("nonsense\n")
    status, out, _ = run(capsys, "check", path)
    assert status == exits.BAD_INPUT
    assert "line 3" in out
    assert run(capsys, "check", str(tmp_path))[0] == exits.BAD_INPUT


def test_schema_is_json(capsys: pytest.CaptureFixture[str]) -> None:
    status, out, _ = run(capsys, "schema")
    assert status == exits.ADEQUATE
    assert json.loads(out)["$schema"].endswith("2020-12/schema")


@pytest.mark.parametrize("words", [["no-such.survey"], [], ["demo"]])
def test_without_a_terminal_the_interface_says_so(words: list[str], tmp_path: Path) -> None:
    program = Path(sys.executable).parent / "willcarry"
    done = subprocess.run(
        [str(program), *words], capture_output=True, text=True, stdin=subprocess.DEVNULL, cwd=tmp_path, timeout=20,
        check=False,
    )  # fmt: skip
    assert done.returncode == exits.BAD_INPUT
    assert len(done.stderr.splitlines()) == 1
    assert not list(tmp_path.iterdir())


def test_a_hostile_folder_runs_nothing(tmp_path: Path) -> None:
    for name in ("json.py", "numpy.py", "pint.py"):
        (tmp_path / name).write_text("raise SystemExit('ran from the folder')", encoding="utf-8")
    (tmp_path / "tui").mkdir()
    (tmp_path / "tui" / "__init__.py").write_text("raise SystemExit('ran from the folder')", encoding="utf-8")
    program = Path(sys.executable).parent / "willcarry"
    done = subprocess.run(
        [str(program), "assess", str(DEMO)], capture_output=True, text=True, cwd=tmp_path, timeout=30, check=False
    )
    assert "ran from the folder" not in done.stdout + done.stderr
    assert done.returncode == exits.NOT_ADEQUATE


def test_plain_output_where_the_terminal_can_do_little() -> None:
    program = Path(sys.executable).parent / "willcarry"
    surroundings = {
        "PATH": os.environ["PATH"],
        "LANG": "C",
        "PYTHONIOENCODING": "ascii",
        "TERM": "dumb",
        "NO_COLOR": "1",
    }
    done = subprocess.run(
        [str(program), "demo", "--print"], capture_output=True, env=surroundings, timeout=30, check=False
    )
    assert done.returncode == exits.NOT_ADEQUATE
    assert b"Traceback" not in done.stderr
    done.stdout.decode("ascii")


@pytest.mark.parametrize(
    "name", [b"a\xffb.survey", b"-x.survey", b"a\nb.survey", "\u202egpj.survey".encode(), b"[b].survey"]
)
def test_odd_file_names_work_or_are_told_cleanly(tmp_path: Path, name: bytes) -> None:
    path = os.path.join(os.fsencode(tmp_path), name)
    with open(path, "wb") as file:
        file.write(Path(session(tmp_path, put("J-1"))).read_bytes())
    program = os.fsencode(Path(sys.executable).parent / "willcarry")
    for words in ([b"assess", path], [b"assess", path, b"--json"], [b"check", path]):
        done = subprocess.run([program, *words], capture_output=True, timeout=30, check=False)
        assert done.returncode == exits.ADEQUATE, done.stderr
        shown = done.stdout.decode("utf-8")
        assert "\u202e" not in shown
        assert b"Traceback" not in done.stderr


def test_a_foreign_package_in_the_way_is_named(tmp_path: Path) -> None:
    (tmp_path / "species").mkdir()
    (tmp_path / "species" / "__init__.py").write_text("", encoding="utf-8")
    code = "import sys; sys.path.insert(0, '.'); from tui.command import main; sys.exit(main(['wood']))"
    done = subprocess.run(
        [sys.executable, "-c", code], capture_output=True, text=True, cwd=tmp_path, timeout=30, check=False
    )
    assert done.returncode == exits.BAD_INPUT
    assert "'species'" in done.stderr


def test_a_round_member_is_never_called_adequate_on_its_whole_diameter(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    path = session(tmp_path, put("J-1", size={"diameter": "9 in"}))
    status, out, _ = run(capsys, "assess", path)
    assert status == exits.NOT_ADEQUATE
    assert "undetermined" in out
    assert "flat seat" in " ".join(out.split())
