"""The demo library as Liberty text, with delay tables by one simple formula.

With slew ``s`` (ns), load ``c`` (pF) and drive ``w``: delay is ``t + 0.25 s + 4 c / w`` and the
output transition ``0.012 + 0.1 s + 7 c / w``; falling edges take 0.9 of it. ``t`` grows with the
size of the cell. Set-up time is ``0.05 + 0.3 s_data - 0.1 s_clock``, hold time a fifth of it with
the opposite sign. The figures are invented; only their order of magnitude is that of a 130 nm kit.
"""

from collections.abc import Callable, Iterator
from itertools import product
from typing import Final

from demo_cells import Cell, Port

SLEWS: Final = (0.01, 0.04, 0.12, 0.32, 0.8)
LOADS: Final = (0.0005, 0.004, 0.012, 0.03, 0.06)
"""Loads of a cell of drive 1, pF; those of drive w are w times as much."""
EDGES: Final = (0.01, 0.12, 0.8)
DRIVES: Final = (1, 2, 4, 8)

HEAD: Final = """\
/* Invented cell library of the insertdft demo: no process, no foundry, no measured figure.
   Written by tools/make_demo.py; change the tables there. */
library (tidal) {
  delay_model : table_lookup;
  time_unit : "1ns";
  voltage_unit : "1V";
  current_unit : "1uA";
  pulling_resistance_unit : "1kohm";
  leakage_power_unit : "1nW";
  capacitive_load_unit (1, pf);
  nom_process : 1.0;
  nom_temperature : 25.0;
  nom_voltage : 1.2;
  operating_conditions (harbour) {
    process : 1.0;
    temperature : 25.0;
    voltage : 1.2;
  }
  default_operating_conditions : harbour;
  default_max_transition : 1.5;
  default_fanout_load : 1.0;
  default_input_pin_cap : 0.0016;
  default_output_pin_cap : 0.0;
  default_inout_pin_cap : 0.002;
  slew_lower_threshold_pct_rise : 20.0;
  slew_upper_threshold_pct_rise : 80.0;
  slew_lower_threshold_pct_fall : 20.0;
  slew_upper_threshold_pct_fall : 80.0;
  input_threshold_pct_rise : 50.0;
  input_threshold_pct_fall : 50.0;
  output_threshold_pct_rise : 50.0;
  output_threshold_pct_fall : 50.0;
"""

WIRES: Final = """\
  wire_load (pond) {
    resistance : 0.0005;
    capacitance : 0.00015;
    area : 0.0;
    slope : 18.0;
    fanout_length (1, 10.0);
    fanout_length (2, 22.0);
    fanout_length (4, 50.0);
    fanout_length (8, 118.0);
  }
  wire_load (harbour) {
    resistance : 0.0005;
    capacitance : 0.00015;
    area : 0.0;
    slope : 30.0;
    fanout_length (1, 18.0);
    fanout_length (2, 40.0);
    fanout_length (4, 92.0);
    fanout_length (8, 215.0);
  }
  default_wire_load : "pond";
"""

BUS: Final = """\
  type (four_bits) {
    base_type : array;
    data_type : bit;
    bit_width : 4;
    bit_from : 3;
    bit_to : 0;
    downto : true;
  }
"""

Formula = Callable[[float, float], float]


def liberty(cells: list[Cell]) -> str:
    """Return the whole file."""
    parts = [HEAD, WIRES, BUS, *map(_template, DRIVES), CHECK_TEMPLATE]
    return "".join([*parts, *map(_cell, cells), "}\n"])


def _numbers(values: tuple[float, ...]) -> str:
    return ", ".join(f"{value:.5g}" for value in values)


def _template(drive: int) -> str:
    loads = tuple(load * drive for load in LOADS)
    return (
        f"  lu_table_template (delay_w{drive}) {{\n"
        "    variable_1 : input_net_transition;\n"
        "    variable_2 : total_output_net_capacitance;\n"
        f'    index_1 ("{_numbers(SLEWS)}");\n    index_2 ("{_numbers(loads)}");\n  }}\n'
    )


CHECK_TEMPLATE: Final = (
    "  lu_table_template (check) {\n"
    "    variable_1 : related_pin_transition;\n    variable_2 : constrained_pin_transition;\n"
    f'    index_1 ("{_numbers(EDGES)}");\n    index_2 ("{_numbers(EDGES)}");\n  }}\n'
)


def _cell(cell: Cell) -> str:
    lines = [
        f"  cell ({cell.name}) {{",
        f"    area : {1.8 + 0.9 * cell.transistors:.2f};",
        f"    cell_leakage_power : {0.02 * cell.transistors:.2f};",
        *[f"    {words}" for words in cell.attributes],
    ]
    if cell.storage:
        lines.append(f"    {cell.storage}")
    text = "\n".join(lines) + "\n"
    pins = "".join(_pin(cell, port) for port in cell.ports)
    return text + pins + _test_cell(cell) + "  }\n"


def _open(port: Port, indent: str) -> str:
    if port.bits == 1:
        return f"{indent}pin ({port.name}) {{\n"
    return f"{indent}bus ({port.name}) {{\n{indent}  bus_type : four_bits;\n"


def _pin(cell: Cell, port: Port) -> str:
    lines = [f"      {words}" for words in port.attributes]
    if port.function is None:
        lines = ["      direction : input;", f"      capacitance : {port.load:.4f};", *lines]
        return _open(port, "    ") + "\n".join(lines) + "\n" + _checks(cell, port) + "    }\n"
    lines = [
        "      direction : output;",
        f"      max_capacitance : {LOADS[-1] * cell.drive:.3f};",
        f"      {_shows(cell, port.function)}",
        *lines,
    ]
    if cell.three_state:
        lines.append(f'      three_state : "{cell.three_state}";')
    if port.hidden:
        lines.append("      test_output_only : true;")
    arcs = "".join(_arcs(cell, port))
    return _open(port, "    ") + "\n".join(lines) + "\n" + arcs + "    }\n"


def _shows(cell: Cell, function: str) -> str:
    if not cell.storage.startswith("statetable"):
        return f'function : "{function}";'
    if function.startswith("!"):
        return f'state_function : "{function}";'
    return f'internal_node : "{function}";'


def _arcs(cell: Cell, port: Port) -> Iterator[str]:
    if not cell.storage:
        yield from _gate_arcs(cell, port)
        return
    timing = cell.timing
    base = 0.05 + 0.003 * cell.transistors
    for clock, kind, outputs in timing.launch:
        if port.name not in outputs:
            continue
        if kind == "clock_gate":
            yield _delay(cell, clock, "", "positive_unate", 0.05)
        else:
            yield _delay(cell, clock, kind, "non_unate", base)
    for data, outputs in timing.through:
        if port.name in outputs:
            yield _delay(cell, data, "", _through_sense(port.name), base)
    inverted = port.name.endswith("N")
    for pin, low in ((timing.clear, True), (timing.preset, False)):
        if pin is not None:
            kind = "clear" if low ^ inverted else "preset"
            sense = "positive_unate" if low ^ inverted else "negative_unate"
            yield _delay(cell, pin, kind, sense, base)


def _through_sense(output: str) -> str:
    return "negative_unate" if output.endswith("N") else "positive_unate"


def _gate_arcs(cell: Cell, port: Port) -> Iterator[str]:
    ins = [item.name for item in cell.ports if item.function is None]
    base = 0.01 + 0.004 * cell.transistors / cell.drive
    for position, name in enumerate(ins):
        if cell.three_state and name in cell.three_state:
            yield _delay(cell, name, "three_state_enable", "positive_unate", base)
            yield _delay(cell, name, "three_state_disable", "negative_unate", base)
        else:
            yield _delay(
                cell, name, "", sense_of(port.function or "", ins, name), base + 0.002 * position
            )


def sense_of(function: str, ins: list[str], name: str) -> str:
    """Return the Liberty sense of a function in one of its inputs, from its truth table."""
    code = function.replace("!", "~")
    rises = falls = False
    others = [pin for pin in ins if pin != name]
    for values in product((0, 1), repeat=len(others)):
        given = dict(zip(others, values, strict=True))
        low, high = (_value(code, {**given, name: bit}) for bit in (0, 1))
        rises |= high > low
        falls |= high < low
    return "non_unate" if rises and falls else "positive_unate" if rises else "negative_unate"


def _value(code: str, values: dict[str, int]) -> int:
    return int(eval(code, {"__builtins__": {}}, values)) & 1  # noqa: S307 (our own functions)


def _delay(cell: Cell, related: str, kind: str, sense: str, base: float) -> str:
    words = [f'        related_pin : "{related}";', f"        timing_sense : {sense};"]
    if kind:
        words.append(f"        timing_type : {kind};")
    template = f"delay_w{cell.drive}"
    loads = tuple(load * cell.drive for load in LOADS)
    tables = []
    for edge, factor in (("rise", 1.0), ("fall", 0.9)):

        def delay(slew: float, load: float, factor: float = factor) -> float:
            return factor * (base + 0.25 * slew + 4 * load / cell.drive)

        def transition(slew: float, load: float, factor: float = factor) -> float:
            return factor * (0.012 + 0.1 * slew + 7 * load / cell.drive)

        tables.append(_table(f"cell_{edge}", template, SLEWS, loads, delay))
        tables.append(_table(f"{edge}_transition", template, SLEWS, loads, transition))
    return "      timing () {\n" + "\n".join(words) + "\n" + "".join(tables) + "      }\n"


def _table(
    name: str, template: str, rows: tuple[float, ...], columns: tuple[float, ...], value: Formula
) -> str:
    lines = [
        '          "' + ", ".join(f"{value(row, column):.4f}" for column in columns) + '"'
        for row in rows
    ]
    return (
        f"        {name} ({template}) {{\n        values ( \\\n"
        + ", \\\n".join(lines)
        + ");\n        }\n"
    )


def _checks(cell: Cell, port: Port) -> str:
    found = []
    for pin, clock, edge in cell.timing.checks:
        if pin == port.name:
            found.append(_check(clock, f"setup_{edge}", _setup))
            found.append(_check(clock, f"hold_{edge}", _hold))
    if port.name in (cell.timing.clear, cell.timing.preset):
        for clock, kind, _ in cell.timing.launch[:1]:
            found.append(_check(clock, "recovery_" + kind.removesuffix("_edge"), _setup))
    return "".join(found)


def _setup(clock: float, data: float) -> float:
    return 0.05 + 0.3 * data - 0.1 * clock


def _hold(clock: float, data: float) -> float:
    return -_setup(clock, data) / 5


def _check(clock: str, kind: str, value: Formula) -> str:
    tables = [
        _table(f"{edge}_constraint", "check", EDGES, EDGES, value) for edge in ("rise", "fall")
    ]
    head = f'      timing () {{\n        related_pin : "{clock}";\n        timing_type : {kind};\n'
    return head + "".join(tables) + "      }\n"


def _test_cell(cell: Cell) -> str:
    if not cell.test:
        return ""
    lines = ["    test_cell () {\n", f"      {cell.test}\n"]
    for port in cell.ports:
        words = [f"        direction : {'output' if port.function else 'input'};"]
        if port.mission:
            words.append(f'        function : "{port.mission}";')
        if port.signal:
            words.append(f"        signal_type : {port.signal};")
        if port.hidden:
            words.append("        test_output_only : true;")
        lines.append(_open(port, "      ") + "\n".join(words) + "\n      }\n")
    return "".join([*lines, "    }\n"])
