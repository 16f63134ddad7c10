"""The Verilog model of a stand-in, behavioural, for event-driven simulators."""

from insertdft.library.expression import Const
from insertdft.netlist.names import to_verilog as name_to_verilog
from insertdft.styles.stand_in_parts import MARK, Parts, StandInKind, to_text


def verilog(parts: Parts) -> str:
    """Return the module."""
    ins = [*(pin.name for pin in parts.plain.inputs()), parts.scan_in, *parts.clocks]
    outs = [pin.name for pin in parts.plain.outputs()] + ([parts.second] if parts.second else [])
    item = parts.storage
    shown = "l2" if parts.kind is StandInKind.DOUBLE else "l1"
    states = {item.state: shown, item.state_inverted: f"!{shown}"}
    lines = [
        f"// {MARK}.",
        f"module {name_to_verilog(parts.name)} ({', '.join(map(name_to_verilog, [*ins, *outs]))});",
        *(f"  input {name_to_verilog(name)};" for name in ins),
        *(f"  output {name_to_verilog(name)};" for name in outs),
        f"  reg l1{', l2' if len(parts.clocks) > 1 else ''};",
    ]
    edge = parts.kind is StandInKind.CLOCKED_SCAN
    lines += _edge_model(parts) if edge else _level_model(parts)
    lines += [
        f"  assign {name_to_verilog(pin.name)} ="
        f" {to_text(pin.function or Const(False), states, '&', '|')};"
        for pin in parts.plain.outputs()
    ]
    lines += [f"  assign {name_to_verilog(parts.second)} = l2;"] if parts.second else []
    return "\n".join([*lines, "endmodule", ""])


def _own_data(parts: Parts) -> str:
    states = {parts.storage.state: "l1", parts.storage.state_inverted: "!l1"}
    return to_text(parts.data, states, "&", "|")


def _forced_text(parts: Parts) -> tuple[str, str]:
    """Return the condition that anything is forced, and the value then."""
    acts = [
        (f"{'' if level else '!'}{name_to_verilog(pin)}", value)
        for pin, level, value in parts.forcing()
    ]
    if not acts:
        return "1'b0", "1'b0"
    return " || ".join(f"({act})" for act, _ in acts), f"({acts[0][0]}) ? {acts[0][1]} : " + str(
        acts[-1][1]
    )


def _edge_model(parts: Parts) -> list[str]:
    forced, value = _forced_text(parts)
    edge = "negedge" if parts.rest else "posedge"
    clock, scan = name_to_verilog(parts.clock), name_to_verilog(parts.clocks[0])
    lines = [
        f"  wire forced = {forced};",
        f"  always @({edge} {clock}) if (!forced) l1 <= {_own_data(parts)};",
        f"  always @(posedge {scan}) if (!forced) l1 <= {name_to_verilog(parts.scan_in)};",
    ]
    return [*lines, f"  always @* if (forced) l1 <= {value};"] if parts.forcing() else lines


def _level_model(parts: Parts) -> list[str]:
    forced, value = _forced_text(parts)
    clock = f"{'!' if parts.rest else ''}{name_to_verilog(parts.clock)}"
    first, *second = map(name_to_verilog, parts.clocks)
    force = f"if ({forced}) l1 = {value}; else " if parts.forcing() else ""
    lines = [
        f"  always @* {force}if ({clock} && {first}) l1 = 1'bx;",
        f"    else if ({first}) l1 = {name_to_verilog(parts.scan_in)};",
        f"    else if ({clock}) l1 = {_own_data(parts)};",
    ]
    both = parts.kind is StandInKind.DOUBLE and parts.forcing()
    force = f"if ({forced}) l2 = {value}; else " if both else ""
    return [*lines, f"  always @* {force}if ({second[0]}) l2 = l1;"] if second else lines
