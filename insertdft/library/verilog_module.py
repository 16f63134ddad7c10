"""What drives each net of one Verilog module."""

from collections.abc import Iterator
from dataclasses import dataclass, field
from typing import Final

from insertdft.library.cell import Storage, StorageKind
from insertdft.library.expression import (
    Const,
    Expression,
    Not,
    Or,
    Var,
    negation,
    substitute,
)
from insertdft.library.functions import choose, pruned, support, within
from insertdft.library.primitives import primitive_cell
from insertdft.library.stepping import latch_of, take_out_forced
from insertdft.library.verilog_logic import Values, constant, kind, logic, name_of, plain, run
from insertdft.library.verilog_tree import Node, UnsupportedError

GATES: Final = frozenset(
    "and nand or nor xor xnor buf not bufif0 bufif1 notif0 notif1 pullup pulldown".split()
)
_DIRECTIONS: Final = {"Input": "input", "Output": "output", "Inout": "inout"}


@dataclass(frozen=True, slots=True)
class Driver:
    """A net that is a function of others.

    Attributes:
        function: Over nets.
        three_state: When it is not driven, over nets; None for never.
    """

    function: Expression
    three_state: Expression | None = None


@dataclass(frozen=True, slots=True)
class Part:
    """An instance of a module or a user-defined primitive.

    Attributes:
        module: What it is an instance of.
        name: Its own name, unique within the module.
        by_name: Net by port name, or None if connected by position.
        by_place: Nets in the order written (None for an empty place).
    """

    module: str
    name: str
    by_name: dict[str, Expression | None] | None
    by_place: tuple[Expression | None, ...]


@dataclass(slots=True)
class Module:
    """One module, nothing resolved yet.

    Attributes:
        ports: In the order of the header.
        directions: By port.
        drivers: Nets that are functions of nets.
        storages: Nets that are registers; the state variable has the net's name.
        parts: Instances.
        vectors: Names declared with a range.
    """

    ports: tuple[str, ...] = ()
    directions: dict[str, str] = field(default_factory=dict)
    drivers: dict[str, Driver] = field(default_factory=dict)
    storages: dict[str, Storage] = field(default_factory=dict)
    parts: list[Part] = field(default_factory=list)
    vectors: set[str] = field(default_factory=set)

    def drive(self, net: str, driver: Driver) -> None:
        """Give a net its driver.

        Raises:
            UnsupportedError: It has one already.
        """
        if net in self.drivers or net in self.storages:
            raise UnsupportedError(f"`{net}` has two drivers")
        self.drivers[net] = driver


def read_module(tree: Node) -> Module:
    """Return what drives what in a module as pyverilog reads it.

    Raises:
        UnsupportedError: It holds something that is no model of a cell.
    """
    module = Module()
    module.ports = tuple(_header(tree, module))
    for item in tree.items:
        _item(item, module)
    return module


def _header(tree: Node, module: Module) -> Iterator[str]:
    for port in tree.portlist.ports:
        if kind(port) == "Ioport":
            _declared(port.first, module)
            yield plain(str(port.first.name))
        else:
            yield plain(str(port.name))


def _item(item: Node, module: Module) -> None:
    name = kind(item)
    if name == "Decl":
        for inner in item.list:
            _item(inner, module)
    elif name == "Assign":
        module.drive(name_of(item.left), _assigned(item.right))
    elif name == "Supply":
        module.drive(plain(str(item.name)), Driver(Const(constant(item.value) == "1")))
    elif name == "InstanceList":
        for instance in item.instances:
            _instance(instance, module)
    elif name == "Always":
        _procedure(item, module)
    elif name in ("Input", "Output", "Inout", "Wire", "Reg", "Tri", "Integer"):
        _declared(item, module)
    elif name not in ("Initial", "Parameter", "Localparam", "Function", "Task"):
        raise UnsupportedError(f"it holds `{name}`")


def _declared(item: Node, module: Module) -> None:
    name = plain(str(item.name))
    if item.width is not None and str(item.width.msb) != str(item.width.lsb):
        module.vectors.add(name)
    if kind(item) in _DIRECTIONS:
        module.directions[name] = _DIRECTIONS[kind(item)]


def _assigned(right: Node) -> Driver:
    """Return the driver of ``assign``; ``e ? a : 1'bz`` is a three-state driver."""
    node = right.var if kind(right) == "Rvalue" else right
    if kind(node) == "Cond":
        closed = logic(node.cond, {})
        if constant(node.true_value) == "z":
            return Driver(logic(node.false_value, {}), closed)
        if constant(node.false_value) == "z":
            return Driver(logic(node.true_value, {}), negation(closed))
    return Driver(logic(node, {}))


def _instance(instance: Node, module: Module) -> None:
    if instance.array is not None:
        raise UnsupportedError("it holds an array of instances")
    of = plain(str(instance.module))
    connections = list(instance.portlist)
    nets = [_connected(item.argname) for item in connections]
    if of in GATES:
        _gate(of, nets, module)
        return
    named = any(item.portname is not None for item in connections)
    own = plain(str(instance.name)) or f"{of}_{len(module.parts)}"
    by_name = (
        {plain(str(c.portname)): net for c, net in zip(connections, nets, strict=True)}
        if named
        else None
    )
    module.parts.append(Part(of, own, by_name, tuple(nets)))


def _connected(argument: Node | None) -> Expression | None:
    if argument is None or constant(argument) == "z":
        return None
    return logic(argument, {})


def _gate(of: str, nets: list[Expression | None], module: Module) -> None:
    try:
        cell = primitive_cell(of, len(nets))
    except ValueError as fault:
        raise UnsupportedError(f"{fault}") from None
    values = {f"#{place}": net or Const(False) for place, net in enumerate(nets)}
    for pin in cell.outputs():
        net = values[pin.name]
        if isinstance(net, Var) and pin.function is not None:
            off = None if pin.three_state is None else _filled(pin.three_state, values)
            module.drive(net.name, Driver(_filled(pin.function, values), off))


def _filled(expression: Expression, values: dict[str, Expression]) -> Expression:
    return substitute(expression, values)


def _procedure(item: Node, module: Module) -> None:
    """Take in one ``always``: flip-flops where edges are named, else latches or plain logic."""
    senses = list(item.sens_list.list) if item.sens_list is not None else []
    edges = [sense for sense in senses if sense.type in ("posedge", "negedge")]
    if not senses:
        raise UnsupportedError("a procedure waits for nothing")
    for net, following in run(item.statement, Values()).result().items():
        if edges:
            active: dict[str, Expression] = {name_of(sense.sig): _active(sense) for sense in edges}
            _store(module, net, _flip_flop(net, pruned(following), active))
        elif net in support(following):
            inputs = [name for name in support(following) if name != net]
            latch = latch_of(following, net, f"!{net}", inputs)
            if latch is None:
                raise UnsupportedError(f"`{net}` is neither latch nor gate")
            _store(module, net, latch)
        else:
            module.drive(net, Driver(pruned(following)))


def _active(sense: Node) -> Expression:
    net = Var(name_of(sense.sig))
    return net if sense.type == "posedge" else Not(net)


def _store(module: Module, net: str, storage: Storage) -> None:
    if net in module.drivers or net in module.storages:
        raise UnsupportedError(f"`{net}` has two drivers")
    module.storages[net] = storage


def _flip_flop(net: str, following: Expression, active: dict[str, Expression]) -> Storage:
    """Return the flip-flop of one register.

    The clock is the edge that the body does not look at; at any other edge, and while its signal
    stays active, the body must set or reset.
    """
    clocks = [name for name in active if name not in support(following)]
    if len(clocks) != 1:
        raise UnsupportedError(f"the clock of `{net}` cannot be told from its set and reset")
    others = {name: value for name, value in active.items() if name != clocks[0]}
    kind_, edge = StorageKind.FLIP_FLOP, active[clocks[0]]
    if not others:
        return Storage(kind_, net, f"!{net}", 1, following, edge)
    some = pruned(_any(tuple(others.values())))
    at_rest = pruned(choose(some, following, Var(net)))
    forced = take_out_forced(at_rest, list(others))
    if forced.rest != Var(net):
        raise UnsupportedError(f"`{net}` takes data at the edge of a set or reset")
    data = within(following, negation(some))
    return Storage(
        kind_, net, f"!{net}", 1, data, edge, None, forced.clear, forced.preset, forced.together
    )


def _any(parts: tuple[Expression, ...]) -> Expression:
    return parts[0] if len(parts) == 1 else Or(parts)
