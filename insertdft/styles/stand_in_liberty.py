"""The Liberty stub of a stand-in: a state table for what it does, a test_cell for its mission."""

from collections.abc import Iterator, Mapping
from itertools import product
from typing import Final

from insertdft.library.cell import StorageKind
from insertdft.library.expression import Const, Expression, evaluate
from insertdft.library.functions import literal, support
from insertdft.styles.gates import free_name
from insertdft.styles.stand_in_parts import MARK, Parts, StandInKind, to_text


def liberty(parts: Parts) -> str:
    """Return a library of one cell."""
    rows = _edge_rows(parts) if parts.kind is StandInKind.CLOCKED_SCAN else _level_rows(parts)
    inputs = [*parts.data_pins(), parts.clock, parts.scan_in, *parts.clocks]
    inputs += [pin for pin, _, _ in parts.forcing()]
    nodes = _nodes(parts)
    table = ", \\\n              ".join(rows)
    lines = [
        f"/* {MARK} */",
        f"library (stand_in_{parts.plain.name}) {{",
        f"  cell ({parts.name}) {{",
        f'    statetable ("{" ".join(inputs)}", "{" ".join(nodes)}") {{',
        f'      table : "{table}";',
        "    }",
        *_pin_lines(parts, nodes[-1] if parts.kind is StandInKind.DOUBLE else nodes[0]),
        *_test_cell(parts),
        "  }",
        "}",
    ]
    return "\n".join(lines) + "\n"


def _nodes(parts: Parts) -> tuple[str, ...]:
    first = parts.storage.state
    if parts.kind in (StandInKind.CLOCKED_SCAN, StandInKind.FIRST):
        return (first,)
    return (first, free_name(f"{first}_L2", {*parts.plain.pins}))


def _row(parts: Parts, tokens: Mapping[str, str], current: str, after: str) -> str:
    inputs = [*parts.data_pins(), parts.clock, parts.scan_in, *parts.clocks]
    quiet = {pin: _value(1 - level) for pin, level, _ in parts.forcing()}
    named = [tokens.get(name, "-") for name in inputs]
    named += [tokens.get(pin, quiet[pin]) for pin, _, _ in parts.forcing()]
    return f"{' '.join(named)} : {current} : {after}"


def _value(bit: int) -> str:
    return "H" if bit else "L"


def _forced_rows(parts: Parts) -> Iterator[str]:
    """Yield the rows of set and reset: the one that wins, whatever the other does, comes first."""
    width = len(_nodes(parts))
    for number, (pin, level, value) in enumerate(parts.forcing()):
        tokens = {pin: _value(level)}
        if number == 0:
            tokens |= {other: "-" for other, _, _ in parts.forcing() if other != pin}
        before, after = " ".join("-" * width), _value(value)
        if parts.kind is StandInKind.SINGLE:
            yield _row(parts, {**tokens, parts.clocks[1]: "L"}, before, f"{after} N")
            yield _row(parts, {**tokens, parts.clocks[1]: "H"}, before, f"{after} {after}")
        else:
            yield _row(parts, tokens, before, " ".join([after] * width))


def _data_rows(parts: Parts) -> Iterator[tuple[dict[str, str], str, str]]:
    """Yield tokens of the data pins, of the current state, and the state that follows."""
    state = parts.storage.state
    uses_state = {state, parts.storage.state_inverted} & set(support(parts.data))
    for bits in product((1, 0), repeat=len(parts.data_pins())):
        known = dict(zip(parts.data_pins(), bits, strict=True))
        for before in (1, 0) if uses_state else (0,):
            states = {state: before, parts.storage.state_inverted: 1 - before}
            after = evaluate(parts.data, {**known, **states}, 1)
            tokens = {name: _value(bit) for name, bit in known.items()}
            yield tokens, _value(before) if uses_state else "-", _value(after)


def _edge_rows(parts: Parts) -> list[str]:
    [scan] = parts.clocks
    rise = "F" if parts.rest else "R"
    rows = list(_forced_rows(parts))
    for tokens, current, after in _data_rows(parts):
        rows.append(_row(parts, {**tokens, parts.clock: rise, scan: "L"}, current, after))
    for bit in (1, 0):
        tokens = {parts.clock: _value(parts.rest), parts.scan_in: _value(bit), scan: "R"}
        rows.append(_row(parts, tokens, "-", _value(bit)))
    rows.append(_row(parts, {parts.clock: f"~{rise}", scan: "~R"}, "-", "N"))
    return rows


def _level_rows(parts: Parts) -> list[str]:
    """Return the rows of L1 and, if there is one, of L2 with B off and on."""
    off, on = _value(parts.rest), _value(1 - parts.rest)
    first, *second = parts.clocks
    rows = list(_forced_rows(parts))
    for copies in (0, 1) if second else (0,):
        still = {second[0]: _value(copies)} if second else {}
        quiet = {parts.clock: off, first: "L", **still}
        rows += [
            _both(parts, quiet, before, "N", before if copies else "N")
            for before in (("H", "L") if copies else ("-",))
        ]
        for tokens, current, after in _data_rows(parts):
            load = {**tokens, parts.clock: on, first: "L", **still}
            rows.append(_both(parts, load, current, after, after if copies else "N"))
        for bit in ("H", "L"):
            shift = {parts.clock: off, parts.scan_in: bit, first: "H", **still}
            rows.append(_both(parts, shift, "-", bit, bit if copies else "N"))
    return rows


def _both(parts: Parts, tokens: Mapping[str, str], current: str, one: str, two: str) -> str:
    if len(parts.clocks) == 1:
        return _row(parts, tokens, current, one)
    return _row(parts, tokens, f"{current} -", f"{one} {two}")


def _pin_lines(parts: Parts, shown: str) -> Iterator[str]:
    clocks = {parts.clock, *parts.clocks}
    for name in [*(pin.name for pin in parts.plain.inputs()), parts.scan_in, *parts.clocks]:
        clock = " clock : true;" if name in clocks else ""
        yield f"    pin ({name}) {{ direction : input;{clock} }}"
    for pin in parts.plain.outputs():
        function = pin.function or Const(False)
        own = literal(function)
        if own == (parts.storage.state, False):
            yield f'    pin ({pin.name}) {{ direction : output; internal_node : "{shown}"; }}'
            continue
        states = {parts.storage.state: shown, parts.storage.state_inverted: f"!{shown}"}
        text = to_text(function, states, "*", "+")
        yield f'    pin ({pin.name}) {{ direction : output; state_function : "{text}"; }}'
    if parts.second is not None:
        node = _nodes(parts)[1]
        yield f'    pin ({parts.second}) {{ direction : output; internal_node : "{node}"; }}'


def _test_cell(parts: Parts) -> Iterator[str]:
    item = parts.storage
    group = "ff" if item.kind is StorageKind.FLIP_FLOP else "latch"
    edge, data = ("clocked_on", "next_state") if group == "ff" else ("enable", "data_in")
    clock = f"!{parts.clock}" if parts.rest else parts.clock
    also = f' clocked_on_also : "{parts.clocks[1]}";' if parts.kind is StandInKind.DOUBLE else ""
    words = [f'{data} : "{to_text(parts.data, {}, "*", "+")}"; {edge} : "{clock}";{also}']
    for name, condition in (("clear", item.clear), ("preset", item.preset)):
        words += [f'{name} : "{to_text(condition, {}, "*", "+")}";'] if condition else []
    for number, token in enumerate(item.clear_preset):
        words += [f"clear_preset_var{number + 1} : {token};"] if token else []
    yield "    test_cell () {"
    yield f"      {group} ({item.state}, {item.state_inverted}) {{ {' '.join(words)} }}"
    signals = dict(zip(parts.clocks, _SIGNALS[parts.kind], strict=True))
    signals[parts.scan_in] = "test_scan_in"
    for name in [*(pin.name for pin in parts.plain.inputs()), *signals]:
        signal = f" signal_type : {signals[name]};" if name in signals else ""
        yield f"      pin ({name}) {{ direction : input;{signal} }}"
    for pin in parts.plain.outputs():
        function = to_text(pin.function or Const(False), {}, "*", "+")
        signal = "" if parts.second else _shown_signal(parts, pin.function)
        yield f'      pin ({pin.name}) {{ direction : output; function : "{function}";{signal} }}'
    if parts.second is not None:
        extra = "signal_type : test_scan_out; test_output_only : true;"
        yield f"      pin ({parts.second}) {{ direction : output; {extra} }}"
    yield "    }"


_SIGNALS: Final[Mapping[StandInKind, tuple[str, ...]]] = {
    StandInKind.CLOCKED_SCAN: ("test_scan_clock",),
    StandInKind.FIRST: ("test_scan_clock_a",),
    StandInKind.SINGLE: ("test_scan_clock_a", "test_scan_clock_b"),
    StandInKind.DOUBLE: ("test_scan_clock_a", "test_scan_clock_b"),
}


def _shown_signal(parts: Parts, function: Expression | None) -> str:
    own = literal(function) if function is not None else None
    if own is None:
        return ""
    turned = own[1] ^ (own[0] == parts.storage.state_inverted)
    return f" signal_type : test_scan_out{'_inverted' if turned else ''};"
