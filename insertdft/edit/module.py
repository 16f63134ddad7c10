"""The splices of one module: scan cells in place, chains joined, ports added."""

from collections.abc import Iterator, Mapping

from insertdft.chains.plan import SEGMENT, Element, Mend, ModulePlan, Plan, Segment
from insertdft.edit.instance import InstanceEdit, statement_mates, statement_splices
from insertdft.edit.wires import Wires
from insertdft.library.cell import Library
from insertdft.netlist import OPEN, Module, Netlist
from insertdft.netlist.names import to_verilog
from insertdft.styles.conversion import DATA, MISSION, SCAN, Conversion, Part
from insertdft.text import Splice


def module_splices(netlist: Netlist, library: Library, plan: Plan, module: Module) -> list[Splice]:
    """Return the splices that ``plan`` asks for in one module."""
    return _Editor(netlist, library, plan, module).splices()


class _Editor:
    """One module being edited: what each instance gains, what is declared, what is added."""

    def __init__(self, netlist: Netlist, library: Library, plan: Plan, module: Module) -> None:
        self._netlist = netlist
        self._library = library
        self._plan = plan
        self._module = module
        self._mine: ModulePlan = plan.modules[module.name]
        self._wires = Wires(module, port_names(plan, self._mine))
        self._edits: dict[int, InstanceEdit] = {}
        self._number = _numbers(module, self._mine)
        self._items: list[str] = []

    def splices(self) -> list[Splice]:
        for segment in self._mine.segments:
            self._lay(segment)
        for mend in self._mine.mends:
            self._mend(mend)
        self._pass_test_nets()
        found = [*self._header(), *self._statements()]
        if self._items:
            text = "".join(f"  {item}\n" for item in self._items)
            found.append(Splice(self._line_start(), self._line_start(), text, "scan-out ports"))
        return found

    def _statements(self) -> Iterator[Splice]:
        """Yield the splices of every statement that holds an edited instance."""
        done = -1
        for number in sorted(self._edits):
            if number > done:
                mates = statement_mates(self._module, number)
                done = mates[-1]
                cell = self._netlist.cell_names[int(self._module.instance_cell[number])]
                yield from statement_splices(self._module, mates, self._edits, cell)

    def _line_start(self) -> int:
        """Return where the line of ``endmodule`` begins, if nothing but blanks stands before it."""
        text, end = self._module.source.text, self._module.body_end
        start = text.rfind("\n", 0, end) + 1
        return start if not text[start:end].strip() else end

    def _lay(self, segment: Segment) -> None:
        upstream = segment.scan_in
        for place, element in enumerate(segment.elements, start=1):
            is_last = place == len(segment.elements)
            # The last element drives the port itself where nothing stands between.
            goal = segment.scan_out if is_last and not segment.connected else None
            if element.kind == SEGMENT:
                upstream = self._pass_through(element, upstream, goal)
            else:
                upstream = self._convert(element, upstream, goal)
        if segment.connected:
            self._items.append(self._connect(upstream, segment.scan_out))

    def _connect(self, net: str, port: str) -> str:
        if self._plan.connector is None:
            return f"assign {port} = {net};"
        cell, source, output = self._plan.connector
        name = to_verilog(self._wires.fresh_instance(f"{port}_buf"))
        return f"{cell} {name} (.{source}({net}), .{output}({port}));"

    def _pass_through(self, element: Element, upstream: str, goal: str | None) -> str:
        inner = self._plan.modules[self._cell(element.instance)].segments[element.number]
        edit = self._edit(element.instance)
        downstream = goal or self._wires.fresh(f"scan_link_{self._wires.count + 1}")
        edit.pins[inner.scan_in] = upstream
        edit.pins[inner.scan_out] = downstream
        return downstream

    def _convert(self, element: Element, upstream: str, goal: str | None) -> str:
        conversion = self._plan.conversions[element.number]
        edit = self._edit(element.instance)
        edit.cell = conversion.after
        edit.renamed = conversion.pins
        edit.positions = self._library.cells[conversion.before].pin_order or ()
        if conversion.parts:
            mission = self._net_at(element.instance, conversion.scan_in)
            data = self._wires.fresh_beside(element.instance, "scan_d")
            edit.pins[conversion.scan_in] = data
            nets = {MISSION: mission or "1'b0", SCAN: upstream, DATA: data}
            self._add_parts(element.instance, "scan", conversion.parts, nets)
        elif conversion.how != "kept":
            edit.pins[conversion.scan_in] = upstream
        for pin, net in conversion.test_pins.items():
            edit.pins[pin] = self._plan.port_names[net]
        for pin, value in conversion.ties.items():
            edit.pins[pin] = f"1'b{value}"
        return self._tap(element.instance, conversion, edit, goal)

    def _tap(self, name: str, conversion: Conversion, edit: InstanceEdit, goal: str | None) -> str:
        """Return the net that the next position takes, giving the output one if it has none."""
        tap = conversion.taps[0].pin
        old = {new: old for old, new in conversion.pins.items()}.get(tap, tap)
        net = self._net_at(name, old)
        if net is not None:
            return net
        fresh = goal or self._wires.fresh_beside(name, "scan_q")
        edit.pins[tap] = fresh
        return fresh

    def _mend(self, mend: Mend) -> None:
        edit = self._edit(mend.instance)
        old = self._net_at(mend.instance, mend.pin) or "1'b0"
        fresh = self._wires.fresh_beside(mend.instance, f"test_{mend.pin}")
        drives = self._drives(mend)
        nets = {MISSION: fresh, DATA: old} if drives else {MISSION: old, DATA: fresh}
        edit.pins[mend.pin] = fresh
        self._add_parts(mend.instance, "test", mend.parts, nets)

    def _drives(self, mend: Mend) -> bool:
        """Return whether a mend stands at an output of its instance."""
        cell = self._cell(mend.instance)
        if cell in self._netlist.modules:
            ports = self._netlist.modules[cell].ports
            return any(at.name == mend.pin and at.direction == "output" for at in ports)
        return self._library.cells[cell].pins[mend.pin].direction == "output"

    def _add_parts(
        self, name: str, prefix: str, parts: tuple[Part, ...], nets: dict[str, str]
    ) -> None:
        """Put parts beside an instance; nets between them are declared as they are met."""
        nets |= self._plan.port_names
        beside = self._edit(name).beside
        for part in parts:
            for net in part.pins.values():
                if net not in nets:
                    is_constant = net[0].isdigit()
                    nets[net] = (
                        net if is_constant else self._wires.fresh_beside(name, f"{prefix}_{net}")
                    )
            pins = ", ".join(f".{pin}({nets[net]})" for pin, net in part.pins.items())
            part_name = to_verilog(self._wires.fresh_part(name, f"{prefix}_{part.role}"))
            beside.append(f"{part.cell} {part_name} ({pins});")

    def _pass_test_nets(self) -> None:
        inner = {at.instance for segment in self._mine.segments for at in segment.elements}
        for name in sorted(inner, key=self._number.__getitem__):
            cell = self._cell(name)
            if cell in self._netlist.modules:
                edit = self._edit(name)
                ports = [self._plan.port_names[net] for net in self._plan.modules[cell].test_nets]
                edit.pins |= {port: port for port in ports}
                old = [port.name for port in self._netlist.modules[cell].ports]
                edit.order = [*old, *port_names(self._plan, self._plan.modules[cell])]

    def _edit(self, name: str) -> InstanceEdit:
        return self._edits.setdefault(self._number[name], InstanceEdit())

    def _cell(self, name: str) -> str:
        return self._netlist.cell_names[int(self._module.instance_cell[self._number[name]])]

    def _net_at(self, name: str, pin: str) -> str | None:
        """Return the text of the net at a pin of an instance, None if there is none."""
        number = self._number[name]
        module, names = self._module, self._netlist.pin_names
        order = self._library.cells[self._cell(name)].pin_order or ()
        for row in range(int(module.pin_start[number]), int(module.pin_start[number + 1])):
            net = int(module.pin_net[row])
            here = names[int(module.pin_name[row])]
            if here[0] == "#":
                here = order[int(here[1:])]
            if here == pin and net != OPEN:
                return to_verilog(module.net_name(net))
        return None

    def _header(self) -> list[Splice]:
        """Return the splices that add ports and declare wires."""
        header = self._module.header
        ports = self._directions()
        if header.ansi:
            listed = [f"{direction} {name}" for name, direction in ports.items()]
            declared = []
        else:
            listed = list(ports)
            declared = [f"{direction} {name};" for name, direction in ports.items()]
        declared += self._wires.declarations()
        joined = ",\n  ".join(listed)
        if header.list_end is None:
            listing = Splice(header.end - 1, header.end - 1, f" (\n  {joined}\n)", "new ports")
        else:
            lead = "" if header.list_empty else ",\n  "
            at = header.list_end if header.list_empty else self._after_last_port(header.list_end)
            listing = Splice(at, at, lead + joined, "new ports")
        text = "".join(f"\n  {line}" for line in declared)
        return [listing, Splice(header.end, header.end, text, "declarations")][: 1 + bool(text)]

    def _after_last_port(self, list_end: int) -> int:
        """Return where the port list can be gone on with: right behind its last port, if plain."""
        text = self._module.source.text
        at = list_end
        while text[at - 1].isspace():
            at -= 1
        line = text[text.rfind("\n", 0, at) + 1 : at]
        if "//" in line or "`" in line:
            return list_end
        return at + 1 if line.rpartition(" ")[2].startswith("\\") else at

    def _directions(self) -> Mapping[str, str]:
        outputs = {segment.scan_out for segment in self._mine.segments}
        return {
            at: "output" if at in outputs else "input" for at in port_names(self._plan, self._mine)
        }


def port_names(plan: Plan, module: ModulePlan) -> list[str]:
    """Return the ports that a module gains, in the order they are added."""
    names = [plan.port_names[net] for net in module.test_nets]
    for segment in module.segments:
        names += [segment.scan_in, segment.scan_out]
    return names


def _numbers(module: Module, plan: ModulePlan) -> dict[str, int]:
    """Return the instance ids of the names that the plan speaks of."""
    wanted = {at.instance for segment in plan.segments for at in segment.elements}
    names = enumerate(module.instance_names)
    return {name: number for number, name in names if name in wanted}
