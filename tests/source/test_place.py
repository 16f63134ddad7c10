"""Every part of an instance and of a header is found where it stands, so that it can be edited."""

import pytest
from source.cases import CASES, read, text_of

from insertdft.netlist import PRIMITIVES, Module, Netlist
from insertdft.netlist.names import canonical, plain, to_verilog
from insertdft.source import InstanceText, attributes, locate, read_netlist
from insertdft.text import SourceText, Splice, apply_splices, undo_splices

all_cases = pytest.mark.parametrize("case", CASES)


def located(netlist: Netlist) -> list[tuple[Module, int, InstanceText]]:
    return [
        (module, number, locate(module, number))
        for module in netlist.modules.values()
        for number in range(len(module.instance_names))
    ]


def edited(source: SourceText, splices: list[Splice]) -> Netlist:
    written = apply_splices(source, splices)
    assert undo_splices(written, splices, source) == source.text
    return read_netlist([SourceText("edited.v", written)])


def pins(netlist: Netlist, module: str, instance: str) -> dict[str, str]:
    [view] = [view for view in netlist.instances(netlist.modules[module]) if view.name == instance]
    return {
        pin: netlist.modules[module].net_name(net) if net >= 0 else ""
        for pin, net in view.pins.items()
    }


@all_cases
def test_cell_and_name_stand_where_they_are_found(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])

    for module, number, text in located(netlist):
        cell = source.text[slice(*text.cell)]
        if cell[0] != "`":
            assert canonical(cell) == netlist.cell_names[module.instance_cell[number]]
        if text.name is None:
            assert module.instance_names[number][0] == "$"
        else:
            name = source.text[slice(*text.name)]
            assert canonical(name) == module.instance_names[number]
        assert source.text[text.list_start - 1] == "("
        assert source.text[text.list_end] == ")"
        if cell not in PRIMITIVES:
            assert (text.parameters is None) == (number not in module.parameters)
            if text.parameters is not None:
                assert source.text[slice(*text.parameters)] == module.parameters[number]
        assert (text.comma is None) == (text.place == 0)
        if text.comma is not None:
            assert source.text[text.comma] == ","


@all_cases
def test_connections_stand_where_they_are_found(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])

    for module, number, text in located(netlist):
        seen = pins(netlist, module.name, module.instance_names[number])
        for place, connection in enumerate(text.connections):
            whole = source.text[connection.start : connection.end]
            inner = source.text[connection.expression_start : connection.expression_end]
            assert inner == connection.expression
            if text.is_by_position:
                assert connection.pin == f"#{place}"
                assert whole == inner
            else:
                assert whole[0] == "."
                assert whole[-1] == ")"
            if canonical(inner or "x") in module.net_names and connection.pin in seen:
                assert seen[connection.pin] == canonical(inner)
        if (
            not text.is_by_position
            and netlist.cell_names[module.instance_cell[number]] not in netlist.modules
        ):
            heads = {pin.partition("[")[0] if pin[0] != "\\" else pin for pin in seen}
            assert {connection.pin for connection in text.connections} >= heads - {
                pin for pin in heads if pin[0] == "\\"
            }


@all_cases
def test_a_pin_added_to_every_instance_is_read_back(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])
    splices, wanted = [], []
    for module, number, text in located(netlist):
        cell = netlist.cell_names[module.instance_cell[number]]
        if cell in netlist.modules:
            continue
        added = "added_net" if text.is_by_position else ".ADDED(added_net)"
        splices.append(Splice(text.insert_at, text.insert_at, text.insert_prefix + added, "test"))
        pin = f"#{len(text.connections)}" if text.is_by_position else "ADDED"
        wanted.append((module.name, module.instance_names[number], pin))
    heads = [module.header.end for module in netlist.modules.values()]
    splices += [Splice(end, end, " wire added_net;", "test") for end in heads]

    after = edited(source, splices)

    for module_name, instance, pin in wanted:
        before = pins(netlist, module_name, instance)
        assert pins(after, module_name, instance) == {**before, pin: "added_net"}


#: Here an assign reads a net that only a connection makes.
@pytest.mark.parametrize("case", [case for case in CASES if case != "implicit_nets"])
def test_every_connection_can_be_replaced(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])
    splices, wanted = [], []
    for module, number, text in located(netlist):
        if netlist.cell_names[module.instance_cell[number]] in netlist.modules:
            continue
        for connection in text.connections:
            splices.append(
                Splice(connection.expression_start, connection.expression_end, "put_in", "test")
            )
            wanted.append((module.name, module.instance_names[number], connection.pin))
    heads = [module.header.end for module in netlist.modules.values()]
    splices += [Splice(end, end, " wire put_in;", "test") for end in heads]

    after = edited(source, splices)

    for module_name, instance, pin in wanted:
        assert pins(after, module_name, instance)[pin] == "put_in"


#: Gates are no cells: strengths, delays and missing names belong to them.
@pytest.mark.parametrize("case", [case for case in CASES if case != "gates"])
def test_every_instance_can_be_renamed_and_given_another_cell_of_its_own(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])
    splices, wanted = [], []
    for module, number, text in located(netlist):
        if text.name is None or netlist.cell_names[module.instance_cell[number]] in netlist.modules:
            continue
        cell, name = f"CELL_{number}", f"name_{number}"
        if text.comma is None:
            splices.append(Splice(*text.cell, cell, "test"))
        else:
            parameters = source.text[slice(*text.parameters)] if text.parameters else ""
            splices.append(Splice(text.comma, text.comma + 1, f"; {cell} {parameters}", "test"))
        splices.append(Splice(*text.name, name, "test"))
        wanted.append((module.name, name, cell))

    after = edited(source, splices)

    for module_name, name, cell in wanted:
        module = after.modules[module_name]
        number = list(module.instance_names).index(name)
        assert after.cell_names[module.instance_cell[number]] == cell


@all_cases
def test_a_port_added_to_every_module_is_read_back(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])
    splices = []
    for module in netlist.modules.values():
        header = module.header
        listed = "output added" if header.ansi else "added"
        if header.list_end is None:
            splices.append(Splice(header.end - 1, header.end - 1, f" ({listed})", "list"))
        else:
            lead = "" if header.list_empty else ", "
            splices.append(Splice(header.list_end, header.list_end, lead + listed, "list"))
        if not header.ansi:
            splices.append(Splice(header.end, header.end, " output added;", "direction"))
        name_end = source.text[module.start : header.name_end].split()[-1]
        assert plain(canonical(name_end)) == plain(module.name)

    after = edited(source, splices)

    for name, module in after.modules.items():
        before = netlist.modules[name].ports
        assert [(port[:2], port.bit_names()) for port in module.ports] == [
            *[(port[:2], port.bit_names()) for port in before],
            (("added", "output"), ("added",)),
        ]


@all_cases
def test_an_instance_added_before_the_end_is_read_back(case: str) -> None:
    source = text_of(case)
    netlist = read_netlist([source])
    splices = [
        Splice(module.body_end, module.body_end, f"\n  LAST last (.A({_some_net(module)}));\n", "")
        for module in netlist.modules.values()
    ]

    after = edited(source, splices)

    for name, module in netlist.modules.items():
        assert after.modules[name].instance_names[-1] == "last"
        assert list(after.modules[name].instance_names[:-1]) == list(module.instance_names)


def _some_net(module: Module) -> str:
    return to_verilog(module.net_names[-1]) if len(module.net_names) > 4 else "1'b0"


def test_further_text_follows_the_last_connection_on_its_line() -> None:
    netlist = read(
        "module m;\n  DFF r (\n    .D(d), // data\n    .Q(q) // state )\n  );\nendmodule\n"
    )
    source = netlist.sources[0]
    text = locate(netlist.top_module, 0)

    written = apply_splices(source, [Splice(text.insert_at, text.insert_at, ", .S(s)", "")])

    assert "    .Q(q), .S(s) // state )\n  );\n" in written


def test_further_text_stays_outside_of_a_conditional_part() -> None:
    body = "DFF r (.D(d)\n`ifdef POWER\n  , .VDD(v)\n`endif\n  );"
    with_power = read(f"module m;\n{body}\nendmodule\n", defines={"POWER": ""})
    text = locate(with_power.top_module, 0)

    written = apply_splices(
        with_power.sources[0], [Splice(text.insert_at, text.insert_at, ", .S(s)", "")]
    )

    assert "`endif\n  , .S(s));" in written
    assert [item.pin for item in text.connections] == ["D", "VDD"]


def test_attributes_are_those_of_the_statement() -> None:
    netlist = read_netlist([text_of("attributes")])
    names = list(netlist.top_module.instance_names)
    found = {name: attributes(netlist.top_module, at) for at, name in enumerate(names)}

    assert found == {
        "u1": {"dont_touch": "true"},
        "u2": {"keep": "1", "weight": "3"},
        "u3": {"\\odd.name": 'x\\"y'},
        "u4": {},
    }
