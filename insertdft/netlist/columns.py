"""A netlist as columns: arrays of ids beside interned names, never an object a pin.

Nothing here knows a library: a cell is a name, a pin is a name. Everything is frozen once read.
"""

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Final, NamedTuple, NewType

import numpy as np
import numpy.typing as npt

from insertdft.diagnostics import Diagnostic
from insertdft.text import SourceText, Span

NetId = NewType("NetId", int)
InstanceId = NewType("InstanceId", int)

Ids = npt.NDArray[np.int32]
Offsets = npt.NDArray[np.int64]

CONST0: Final = NetId(0)
CONST1: Final = NetId(1)
CONSTX: Final = NetId(2)
CONSTZ: Final = NetId(3)
FIRST_NET: Final = 4
OPEN: Final = NetId(-1)
CONSTANT_NAMES: Final = ("1'b0", "1'b1", "1'bx", "1'bz")

#: Gate primitives of IEEE 1364-2005, clause 7, that a netlist may instance. Their pins have no
#: names; columns call them ``#0`` (the output), ``#1``, ``#2``, ... in the order written.
PRIMITIVES: Final = frozenset(
    "and nand or nor xor xnor buf not bufif0 bufif1 notif0 notif1 pullup pulldown".split()
)


class Vector(NamedTuple):
    """A declared range: bit ``lsb`` has net id ``base``, the next towards ``msb`` ``base + 1``."""

    msb: int
    lsb: int
    base: int

    @property
    def width(self) -> int:
        """Number of bits."""
        return abs(self.msb - self.lsb) + 1

    def indices(self) -> range:
        """Return the declared indices from the least significant bit: k-th is net ``base + k``."""
        step = 1 if self.msb >= self.lsb else -1
        return range(self.lsb, self.msb + step, step)


class Port(NamedTuple):
    """One port of a module.

    Attributes:
        name: Kept spelling of the port (what a connection by name uses).
        direction: ``input``, ``output`` or ``inout``.
        nets: Net ids inside the module, least significant bit first. One for a scalar.
        vector: The declared range, or None for a scalar.
    """

    name: str
    direction: str
    nets: tuple[int, ...]
    vector: Vector | None

    def bit_names(self) -> tuple[str, ...]:
        """Pin names of the bits, least significant first, as ``Module.pin_name`` has them."""
        if self.vector is None:
            return (self.name,)
        from_lsb = self.vector.indices()
        gap = " " if self.name[0] == "\\" else ""
        return tuple(f"{self.name}{gap}[{index}]" for index in from_lsb)


@dataclass(frozen=True, slots=True)
class Header:
    """Where a module's text may be given new ports and declarations.

    Attributes:
        ansi: Whether directions are written inside the port list.
        list_end: Offset of the ``)`` that closes the port list, or None if there is no list.
        list_empty: Whether nothing stands in the list.
        end: Offset just behind the ``;`` of the header; declarations can be inserted here.
        name_end: Offset just behind the module name (a missing port list goes before the ``;``).
    """

    ansi: bool
    list_end: int | None
    list_empty: bool
    end: int
    name_end: int


@dataclass(frozen=True, slots=True, eq=False)
class Module:
    """One module as columns.

    ``n`` instances, ``m`` connected pins (bits), ``k`` bits of continuous assignment.

    Attributes:
        name: Kept spelling.
        source: The text it stands in.
        start: Offset of the keyword ``module``.
        body_end: Offset of ``endmodule``; new items go before it.
        header: Where ports can be added.
        ports: In port-list order.
        net_names: Name of every net bit by id; ids 0..3 are the constants 0, 1, x, z.
        vectors: Declared ranges by vector name.
        net_kinds: Nets (whole names) that are not plain wires: ``tri``, ``wand``, ``supply0`` ...
        instance_names: Shape (n,), kept spelling, unique. A nameless primitive gets a name that
            starts with ``$``.
        instance_cell: Shape (n,), ids into ``Netlist.cell_names``.
        instance_before: Shape (n,), offset where the text before the statement (comments,
            attributes) begins.
        instance_start: Shape (n,), offset of the cell name of the statement. Instances of one
            statement share it.
        instance_end: Shape (n,), offset behind the ``;`` of the statement.
        pin_start: Shape (n + 1,): pins of instance i are rows ``pin_start[i]:pin_start[i + 1]``.
        pin_name: Shape (m,), ids into ``Netlist.pin_names``. A vector pin has one row a bit, least
            significant first, called by the bit's declared index (``din[3]``) where the cell is a
            module of the netlist and by its place from 0 where it is not. A pin connected by
            position to something that is no module of the netlist is ``#0``, ``#1``, ...
        pin_net: Shape (m,), net ids, or OPEN for ``.A()``.
        assign_left: Shape (k,), the net that is driven.
        assign_right: Shape (k,), the net (or constant) that drives it.
        assign_start: Shape (k,), offset of the statement.
        parameters: Instance id -> text of its parameter overrides.
        code: The text that was read: that of ``source`` with blanks for directives and for
            branches not taken, so that offsets mean the same in both.
    """

    name: str
    source: SourceText
    start: int
    body_end: int
    header: Header
    ports: tuple[Port, ...]
    net_names: Sequence[str] = field(repr=False)
    vectors: Mapping[str, Vector] = field(repr=False)
    net_kinds: Mapping[str, str] = field(repr=False)
    instance_names: Sequence[str] = field(repr=False)
    instance_cell: Ids = field(repr=False)
    instance_before: Offsets = field(repr=False)
    instance_start: Offsets = field(repr=False)
    instance_end: Offsets = field(repr=False)
    pin_start: Offsets = field(repr=False)
    pin_name: Ids = field(repr=False)
    pin_net: Ids = field(repr=False)
    assign_left: Ids = field(repr=False)
    assign_right: Ids = field(repr=False)
    assign_start: Offsets = field(repr=False)
    parameters: Mapping[int, str] = field(repr=False)
    code: str = field(default="", repr=False)

    def span(self, instance: int) -> Span:
        """Return the place of the statement of ``instance``, from its cell name on."""
        start, end = int(self.instance_start[instance]), int(self.instance_end[instance])
        return Span(self.source, start, end)

    def net_name(self, net: int) -> str:
        """Return the spelling of a net bit, usable as an expression's text via ``to_verilog``."""
        return CONSTANT_NAMES[net] if net < FIRST_NET else self.net_names[net]


@dataclass(frozen=True, slots=True, eq=False)
class Netlist:
    """All modules of a design, as read from its sources.

    Attributes:
        sources: In the order given.
        modules: By kept name, in source order.
        top: Name of the top module.
        cell_names: Interned names of everything that is instanced.
        pin_names: Interned pin (bit) names.
        diagnostics: Warnings met while reading.
    """

    sources: tuple[SourceText, ...]
    modules: Mapping[str, Module] = field(repr=False)
    top: str
    cell_names: Sequence[str] = field(repr=False)
    pin_names: Sequence[str] = field(repr=False)
    diagnostics: tuple[Diagnostic, ...] = ()

    @property
    def top_module(self) -> Module:
        """The module that nothing instances, or that the user chose."""
        return self.modules[self.top]

    def instances(self, module: Module) -> Iterator["Instance"]:
        """Yield every instance of ``module`` as a view, in source order."""
        return (Instance(self, module, index) for index in range(len(module.instance_names)))


class Instance(NamedTuple):
    """A view of one instance, for code that reads well; not for loops over a million."""

    netlist: Netlist
    module: Module
    number: int

    @property
    def name(self) -> str:
        """Kept spelling of the instance name."""
        return self.module.instance_names[self.number]

    @property
    def cell(self) -> str:
        """Name of the cell or module."""
        return self.netlist.cell_names[int(self.module.instance_cell[self.number])]

    @property
    def pins(self) -> dict[str, int]:
        """Net id by pin (bit) name, in the order of the columns."""
        rows = slice(
            int(self.module.pin_start[self.number]), int(self.module.pin_start[self.number + 1])
        )
        names = self.netlist.pin_names
        return {
            names[pin]: int(net)
            for pin, net in zip(self.module.pin_name[rows], self.module.pin_net[rows], strict=True)
        }

    @property
    def span(self) -> Span:
        """Where its statement stands."""
        return self.module.span(self.number)
