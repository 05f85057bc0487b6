"""From defects as they were seen to wood that is gone, splits, and bearings that are lost."""

from __future__ import annotations

from dataclasses import dataclass

from assess.record import Member
from assess.record_condition import Char, Decay, EndSplit, HangerCorrosion, Hole, Notch, Remaining
from assess.scenario import Loss, Split

# Practice, editable in the record: soft wood has no section, and more than was probed is taken off.
DECAY_MARGIN_IN = 0.25  # across the grain
DECAY_REACH_IN = 12.0  # along the grain, each way
CHAR_MARGIN_IN = 0.3  # below the scraped surface of each exposed face


@dataclass(frozen=True)
class ResolvedCondition:
    """What the defects take away, and what must be said of them.

    lost      (support from 0, why) for each bearing that is not relied on
    pending   defects that are recorded but not computed
    """

    losses: tuple[Loss, ...]
    splits: tuple[Split, ...]
    lost: tuple[tuple[int, str], ...]
    assumptions: tuple[str, ...]
    cautions: tuple[str, ...]
    pending: tuple[str, ...]


def resolve_condition(
    member: Member, breadth_in: float, depth_in: float, is_round: bool, supports_in: tuple[float, ...],
    bearing_in: tuple[float, ...],
) -> ResolvedCondition:  # fmt: skip
    """Losses of a member.

    member                 the record
    breadth_in, depth_in   of all plies, in the direction of load [in]
    supports_in            design points of the supports [in]; bearing_in their lengths [in]
    returns                ResolvedCondition; of a round member every defect that takes wood stays pending
    source                 engineering basis sections 4 and 5
    """
    losses: list[Loss] = []
    splits: list[Split] = []
    lost: list[tuple[int, str]] = []
    notes: list[str] = []
    cautions: list[str] = []
    pending: list[str] = []
    for number, defect in enumerate(member.condition or (), 1):
        name = f"{defect.defect} {number}"
        if is_round and not isinstance(defect, HangerCorrosion) and defect.defect != "check":
            pending.append(f"condition: {name}, on a round member")
            continue
        if isinstance(defect, Notch):
            start = defect.at.value
            cut = {f"{defect.edge}_in": defect.depth.value}
            losses.append(Loss(name, "notch", start, start + defect.length.value, **cut))
        elif isinstance(defect, Hole):
            radius = defect.diameter.value / 2
            losses.append(
                Loss(
                    name, "hole", defect.at.value - radius, defect.at.value + radius,
                    diameter_in=defect.diameter.value, height_in=defect.height.value,
                )
            )  # fmt: skip
        elif isinstance(defect, Decay):
            losses.append(_decay(defect, name, breadth_in))
            margin = defect.margin.value if defect.margin is not None else DECAY_MARGIN_IN
            notes.append(f"{name}: {margin:g} in more is taken off across the grain, 12 in each way along it")
            reached = losses[-1]
            for support, place in enumerate(supports_in):
                half = max(bearing_in[support] / 2, 0.75)
                if reached.from_in < place + half and reached.to_in > place - half:
                    lost.append((support, f"{defect.defect} reaches it"))
            rot = "wood rots for a cause, water, which must be found and stopped"
            cautions.append(f"{name}: {rot if defect.defect == 'decay' else 'find out whether the insects are active'}")
        elif isinstance(defect, Char):
            losses.append(_char(defect, name))
            notes.append(f"{name}: 0.3 in below the scraped surface is taken off each charred face (practice)")
            cautions.append(f"{name}: wood that was hot for long is an engineer's question")
        elif isinstance(defect, Remaining):
            losses.append(
                Loss(
                    name, "remaining", defect.at.value, defect.at.value + defect.length.value,
                    bottom_in=max(depth_in - defect.depth.value, 0.0),
                    side_in=max(breadth_in - defect.width.value, 0.0),
                )
            )  # fmt: skip
        elif isinstance(defect, EndSplit):
            splits.append(Split(name, defect.end, defect.remaining.value, defect.length.value))
        elif isinstance(defect, HangerCorrosion):
            if defect.support <= len(supports_in):
                lost.append((defect.support - 1, "its hanger is corroded"))
        else:
            notes.append(f"{name}: ordinary seasoning checks carry no penalty and no bonus")
    return ResolvedCondition(
        tuple(losses), tuple(splits), tuple(dict.fromkeys(lost)), tuple(notes), tuple(cautions), tuple(pending)
    )


def _decay(defect: Decay, name: str, breadth_in: float) -> Loss:
    margin = defect.margin.value if defect.margin is not None else DECAY_MARGIN_IN
    depth = defect.depth.value + margin
    start, end = defect.at.value - DECAY_REACH_IN, defect.at.value + defect.length.value + DECAY_REACH_IN
    if defect.face == "all":
        return Loss(name, defect.defect, start, end, top_in=depth, bottom_in=depth, side_in=min(2 * depth, breadth_in))
    if defect.face == "side":
        return Loss(name, defect.defect, start, end, side_in=min(depth, breadth_in))
    return Loss(name, defect.defect, start, end, **{f"{defect.face}_in": depth})


def _char(defect: Char, name: str) -> Loss:
    depth = defect.depth.value + CHAR_MARGIN_IN
    faces = set(defect.faces)
    if "all" in faces:
        faces = {"top", "bottom", "left", "right"}
    sides = len(faces & {"left", "right"}) or (1 if "side" in faces else 0)
    return Loss(
        name, "char", defect.at.value, defect.at.value + defect.length.value,
        top_in=depth if "top" in faces else 0.0,
        bottom_in=depth if "bottom" in faces else 0.0,
        side_in=depth * sides,
    )  # fmt: skip
