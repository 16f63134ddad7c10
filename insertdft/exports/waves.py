"""Pictures of clock sequences: as text for the terminal, as SVG for documents.

Both are drawn from one value, ``Picture``. A cycle is a row of slots: inputs are forced, outputs
are measured, then one slot for each phase of clock pulses.
"""

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from enum import Enum
from typing import Final

from jinja2 import Environment, PackageLoader

from insertdft.description import Cycle, Description


class Slot(Enum):
    """What a signal does in one slot."""

    LOW = "low"
    HIGH = "high"
    PULSE = "pulse"  # from its rest value and back
    FALL = "fall"  # low at the start of the slot, high before
    RISE = "rise"
    CHANGE = "change"  # takes a new data value
    KEEP = "keep"  # keeps a data value
    STROBE = "strobe"  # is compared
    NONE = "none"  # nothing is asked of it


@dataclass(frozen=True, slots=True)
class Wave:
    """One signal.

    Attributes:
        label: Port, or what a group of ports is.
        rest: Value at rest of a clock.
        slots: What it does, slot by slot.
    """

    label: str
    rest: int
    slots: tuple[Slot, ...]


@dataclass(frozen=True, slots=True)
class Moment:
    """One cycle of a picture.

    Attributes:
        first: Index of its first slot.
        width: Number of its slots.
        why: What it is for.
        at_speed: Whether the time between the cycle before and this one is tested.
    """

    first: int
    width: int
    why: str
    at_speed: bool


@dataclass(frozen=True, slots=True)
class Picture:
    """One sequence, ready to be drawn.

    Attributes:
        name: Of the sequence.
        note: How often it runs, in words.
        cycles: In order.
        waves: Clocks first, then forced ports, then data.
    """

    name: str
    note: str
    cycles: tuple[Moment, ...]
    waves: tuple[Wave, ...]


#: How often each sequence runs.
NOTES: Final[Mapping[str, str]] = {
    "setup": "once, first",
    "shift": "once for each bit of the longest chain",
    "capture": "once for each pattern",
    "unload_start": "before the first bit of each unload",
}
_LAUNCH: Final = "in place of capture, for two-pattern tests"


def pictures(description: Description) -> tuple[Picture, ...]:
    """Return a picture of every sequence, in the order of the description."""
    rests = {at.port: at.off for at in description.ports if at.off is not None}
    return tuple(
        _picture(name, cycles, rests)
        for name, cycles in description.sequences.items()
        if len(cycles) > 0
    )


def _picture(name: str, cycles: Sequence[Cycle], rests: Mapping[str, int]) -> Picture:
    clocks = _unique(port for cycle in cycles for phase in cycle.pulses for port in phase)
    forced = _unique(port for cycle in cycles for port, _ in cycle.force if port not in clocks)
    moments: list[Moment] = []
    for cycle in cycles:
        first = moments[-1].first + moments[-1].width if moments else 0
        moments.append(Moment(first, 2 + len(cycle.pulses), cycle.why, cycle.at_speed))
    waves = [_clock(port, rests.get(port, 0), cycles) for port in clocks]
    waves += [_level(port, cycles) for port in forced]
    waves += _data(cycles)
    note = NOTES.get(name, _LAUNCH if name.startswith("launch") else "in place of capture")
    return Picture(name, note, tuple(moments), tuple(waves))


def _unique(names: Iterable[str]) -> list[str]:
    return list(dict.fromkeys(names))


def _shown(name: str) -> str:
    """Return a name with what cannot be drawn replaced."""
    return "".join(at if at.isprintable() else "?" for at in name)


def _clock(port: str, rest: int, cycles: Sequence[Cycle]) -> Wave:
    slots: list[Slot] = []
    value = rest
    for cycle in cycles:
        before, value = value, dict(cycle.force).get(port, value)
        slots += [_step(before, value), _hold(value)]
        slots += [Slot.PULSE if port in phase else _hold(value) for phase in cycle.pulses]
    return Wave(_shown(port), rest, tuple(slots))


def _level(port: str, cycles: Sequence[Cycle]) -> Wave:
    """Return a forced port; before it is first forced nothing is asked of it."""
    slots: list[Slot] = []
    value: int | None = None
    for cycle in cycles:
        before, value = value, dict(cycle.force).get(port, value)
        if value is None:
            slots += [Slot.NONE] * (2 + len(cycle.pulses))
            continue
        slots.append(_step(value if before is None else before, value))
        slots += [_hold(value)] * (1 + len(cycle.pulses))
    return Wave(_shown(port), 0, tuple(slots))


def _step(before: int, after: int) -> Slot:
    if before == after:
        return _hold(after)
    return Slot.RISE if after else Slot.FALL


def _hold(value: int) -> Slot:
    return Slot.HIGH if value else Slot.LOW


def _data(cycles: Sequence[Cycle]) -> list[Wave]:
    """Return scan data and mission data, each only if the sequence has it."""
    found: list[Wave] = []
    if any(cycle.scan for cycle in cycles):
        found.append(_driven("scan in", [cycle.scan for cycle in cycles], cycles))
        found.append(_compared("scan out", [cycle.scan for cycle in cycles], cycles))
    if any(cycle.inputs for cycle in cycles):
        found.append(_driven("inputs", [cycle.inputs for cycle in cycles], cycles))
    if any(cycle.measure for cycle in cycles):
        found.append(_compared("outputs", [cycle.measure for cycle in cycles], cycles))
    return found


def _driven(label: str, fresh: Sequence[bool], cycles: Sequence[Cycle]) -> Wave:
    slots: list[Slot] = []
    known = False
    for new, cycle in zip(fresh, cycles, strict=True):
        known = known or new
        rest = Slot.KEEP if known else Slot.NONE
        slots += [Slot.CHANGE if new else rest, *[rest] * (1 + len(cycle.pulses))]
    return Wave(label, 0, tuple(slots))


def _compared(label: str, strobed: Sequence[bool], cycles: Sequence[Cycle]) -> Wave:
    slots: list[Slot] = []
    for now, cycle in zip(strobed, cycles, strict=True):
        slots += [Slot.NONE, Slot.STROBE if now else Slot.NONE]
        slots += [Slot.NONE] * len(cycle.pulses)
    return Wave(label, 0, tuple(slots))


#: Each slot in four characters; a pulse of a clock that rests at 1 is turned.
_TEXT: Final[Mapping[Slot, str]] = {
    Slot.LOW: "____",
    Slot.HIGH: "~~~~",
    Slot.PULSE: "_/~\\",
    Slot.FALL: "\\___",
    Slot.RISE: "/~~~",
    Slot.CHANGE: "X===",
    Slot.KEEP: "====",
    Slot.STROBE: " ^  ",
    Slot.NONE: "    ",
}
_LOW_PULSE: Final = "~\\_/"


def to_text(picture: Picture) -> str:
    """Return the picture for a terminal, plain ASCII unless port names are not."""
    widest = max((len(wave.label) for wave in picture.waves), default=0)
    pad = " " * (widest + 4)
    lines = [f"{picture.name}: {picture.note}", "", pad + _ruler(picture)]
    for wave in picture.waves:
        row = ""
        for cycle in picture.cycles:
            slots = wave.slots[cycle.first : cycle.first + cycle.width]
            row += "|" + "".join(_slot_text(slot, wave.rest) for slot in slots)
        lines.append(f"  {wave.label:<{widest}}  {row}|")
    lines.append("")
    for number, cycle in enumerate(picture.cycles):
        speed = ", at speed after the cycle before" if cycle.at_speed else ""
        lines.append(f"  cycle {number + 1}{speed}: {cycle.why}")
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _ruler(picture: Picture) -> str:
    marks = [f"|{number + 1:<{4 * cycle.width}}" for number, cycle in enumerate(picture.cycles)]
    return "".join(marks) + "|"


def _slot_text(slot: Slot, rest: int) -> str:
    return _LOW_PULSE if slot is Slot.PULSE and rest else _TEXT[slot]


#: Measures of the SVG picture, in pixels.
_SLOT: Final = 36
_ROW: Final = 34
_HIGH, _LOW = 6, 26
_TOP: Final = 66
_CHARACTER: Final = 8.0


def to_svg(picture: Picture) -> str:
    """Return the picture as an SVG document that reads well on light and dark ground."""
    left = 24 + _CHARACTER * max((len(wave.label) for wave in picture.waves), default=0)
    slots = sum(cycle.width for cycle in picture.cycles)
    words = max(len(_caption(number, cycle)) for number, cycle in enumerate(picture.cycles))
    width = max(left + _SLOT * slots + 24, 48 + _CHARACTER * words)
    bottom = _TOP + _ROW * len(picture.waves)
    return _ENVIRONMENT.get_template("waves.svg.jinja").render(
        name=picture.name,
        note=picture.note,
        width=round(width),
        height=bottom + 16 + 20 * len(picture.cycles),
        left=round(left),
        top=_TOP,
        bottom=bottom,
        cycles=[
            {
                "x": round(left) + _SLOT * cycle.first,
                "width": _SLOT * cycle.width,
                "number": number + 1,
                "caption": _caption(number, cycle),
                "at_speed": cycle.at_speed,
                "y": bottom + 24 + 20 * number,
            }
            for number, cycle in enumerate(picture.cycles)
        ],
        waves=[
            {
                "label": wave.label,
                "y": _TOP + _ROW * number,
                "line": _line(wave),
                "data": _bars(wave),
                "strobes": _strobes(wave),
            }
            for number, wave in enumerate(picture.waves)
        ],
    )


_ENVIRONMENT: Final = Environment(
    loader=PackageLoader("insertdft.exports"), autoescape=True, trim_blocks=True, lstrip_blocks=True
)


def _caption(number: int, cycle: Moment) -> str:
    speed = " (at speed)" if cycle.at_speed else ""
    return f"{number + 1}{speed}: {cycle.why}"


def _line(wave: Wave) -> str:
    """Return the path of a level, relative to the row; empty for data."""
    points: list[str] = []
    for number, slot in enumerate(wave.slots):
        x = _SLOT * number
        steps = _levels(slot, wave.rest)
        if not steps:
            continue
        drawn = number > 0 and bool(_levels(wave.slots[number - 1], wave.rest))
        start = "L" if drawn else "M"
        for place, level in steps:
            points.append(f"{start}{x + place} {level}")
            start = "L"
    return " ".join(points)


def _levels(slot: Slot, rest: int) -> list[tuple[int, int]]:
    """Return the corners of one slot as (x, y)."""
    low, high = (_HIGH, _LOW) if rest else (_LOW, _HIGH)
    match slot:
        case Slot.LOW:
            return [(0, _LOW), (_SLOT, _LOW)]
        case Slot.HIGH:
            return [(0, _HIGH), (_SLOT, _HIGH)]
        case Slot.FALL:
            return [(0, _HIGH), (4, _LOW), (_SLOT, _LOW)]
        case Slot.RISE:
            return [(0, _LOW), (4, _HIGH), (_SLOT, _HIGH)]
        case Slot.PULSE:
            return [(0, low), (8, low), (11, high), (25, high), (28, low), (_SLOT, low)]
        case _:
            return []


def _bars(wave: Wave) -> list[dict[str, int]]:
    """Return the stretches in which a data value stands, each from its change on."""
    found: list[dict[str, int]] = []
    for number, slot in enumerate(wave.slots):
        if slot is Slot.CHANGE:
            found.append({"x": _SLOT * number, "width": _SLOT})
        elif slot is Slot.KEEP and found:
            found[-1]["width"] += _SLOT
    return found


def _strobes(wave: Wave) -> list[int]:
    return [
        _SLOT * number + _SLOT // 2 for number, slot in enumerate(wave.slots) if slot is Slot.STROBE
    ]


def to_data(picture: Picture) -> dict[str, object]:
    """Return the picture as plain data for ``--json``."""
    return {
        "sequence": picture.name,
        "runs": picture.note,
        "cycles": [
            {"slots": at.width, "why": at.why, "at_speed": at.at_speed} for at in picture.cycles
        ],
        "waves": [
            {"label": wave.label, "slots": [slot.value for slot in wave.slots]}
            for wave in picture.waves
        ],
    }
