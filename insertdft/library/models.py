"""Verilog cell models -> cells: what the outputs are and what the cell stores.

Modules are opened down to gates, primitives and procedures; only what the outputs depend on is
looked at, so timing checks and notifiers do not matter.
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace
from functools import partial

from insertdft.library.cell import Storage
from insertdft.library.expression import Const, Expression, Var, substitute, variables
from insertdft.library.functions import pruned, support
from insertdft.library.udp import STATE, Primitive, read_primitive
from insertdft.library.verilog_module import Driver, Module, Part, read_module
from insertdft.library.verilog_text import Unit
from insertdft.library.verilog_tree import UnsupportedError, parse_module


@dataclass(frozen=True, slots=True)
class Model:
    """What a module does, seen from outside.

    Attributes:
        ports: In the order of connection.
        directions: By port.
        drivers: Function of each output over inputs and states.
        storages: Those that the outputs depend on, expressions over inputs and states.
    """

    ports: tuple[str, ...]
    directions: Mapping[str, str]
    drivers: Mapping[str, Driver]
    storages: tuple[Storage, ...]


class Models:
    """All modules and primitives of the files; each is worked out when first needed."""

    def __init__(self, units: Sequence[Unit]) -> None:
        """Keep the first unit of each name."""
        self.units: dict[str, Unit] = {}
        for unit in units:
            self.units.setdefault(unit.name, unit)
        self._primitives: dict[str, Primitive | None] = {}
        self._models: dict[str, Model] = {}
        self._failed: dict[str, str] = {}
        self._modules: dict[str, Module] = {}
        self._open: list[str] = []

    def model(self, name: str) -> Model:
        """Return what a module does.

        Raises:
            UnsupportedError: It cannot be derived.
        """
        if name in self._failed:
            raise UnsupportedError(self._failed[name])
        if name not in self._models:
            if name in self._open:
                raise UnsupportedError(f"`{name}` holds itself")
            self._open.append(name)
            try:
                self._models[name] = _Opened(self, name).model()
            except UnsupportedError as fault:
                self._failed[name] = str(fault)
                raise
            finally:
                self._open.pop()
        return self._models[name]

    def module(self, name: str) -> Module:
        """Return a module as read.

        Raises:
            UnsupportedError: It cannot be read.
        """
        if name not in self._modules:
            self._modules[name] = read_module(parse_module(self.units[name]))
        return self._modules[name]

    def primitive(self, name: str) -> Primitive:
        """Return a user-defined primitive.

        Raises:
            UnsupportedError: It is neither gate, latch nor flip-flop.
        """
        if name not in self._primitives:
            self._primitives[name] = read_primitive(self.units[name])
        found = self._primitives[name]
        if found is None:
            raise UnsupportedError(f"primitive `{name}` is neither gate, latch nor flip-flop")
        return found


class _Opened:
    """One module while its outputs are traced back to its inputs and states."""

    def __init__(self, models: Models, name: str) -> None:
        self._models = models
        self._module = models.module(name)
        self._delayed = dict(models.units[name].delayed)
        self._sources: dict[str, tuple[Part, str]] = {}
        self._values: dict[str, Expression] = {}
        self._pending: list[str] = []
        self._states: dict[str, Storage] = {}
        self._busy: set[str] = set()
        for part in self._module.parts:
            self._note(part)

    def model(self) -> Model:
        module = self._module
        wide = [name for name in module.ports if name in module.vectors]
        if wide:
            raise UnsupportedError(f"port `{wide[0]}` is a vector")
        outputs = [name for name in module.ports if module.directions.get(name) != "input"]
        drivers = {name: self._driver(name) for name in outputs if self._is_driven(name)}
        self._finish_states()
        return Model(module.ports, module.directions, drivers, tuple(self._states.values()))

    def _is_driven(self, net: str) -> bool:
        module = self._module
        return net in module.drivers or net in module.storages or net in self._sources

    def _driver(self, net: str) -> Driver:
        own = self._module.drivers.get(net)
        if own is not None and own.three_state is not None:
            return Driver(self._resolved(own.function), self._resolved(own.three_state))
        source = self._sources.get(net)
        if source is not None and not self._models.units[source[0].module].is_primitive:
            inner = self._inner_driver(*source)
            if inner is not None and inner.three_state is not None:
                return inner
        return Driver(self._driven(net))

    def _note(self, part: Part) -> None:
        """Remember which nets an instance drives."""
        unit = self._models.units.get(part.module)
        if unit is None:
            raise UnsupportedError(f"`{part.module}` is not among the models")
        if unit.is_primitive:
            outputs = {"": part.by_place[0] if part.by_place else None}
        else:
            inner = self._models.module(part.module)
            nets = _nets_of(part, inner.ports)
            outputs = {p: n for p, n in nets.items() if inner.directions.get(p) != "input"}
        for port, net in outputs.items():
            if isinstance(net, Var) and net.name not in self._sources:
                self._sources[net.name] = (part, port)

    def _value(self, net: str) -> Expression:
        """Return a net as a function of inputs and states."""
        if net in self._values:
            return self._values[net]
        if net in self._busy:
            raise UnsupportedError(f"`{net}` depends on itself through gates")
        self._busy.add(net)
        found = self._outside(net)
        self._busy.discard(net)
        self._values[net] = found
        return found

    def _outside(self, net: str) -> Expression:
        """Return what is read at a net: a pin as itself, else what drives it."""
        if self._module.directions.get(net) in ("input", "inout"):
            return Var(net)
        return self._driven(net)

    def _driven(self, net: str) -> Expression:
        module = self._module
        if net in module.storages:
            return self._state(net, module.storages[net])
        if net in module.drivers:
            return self._resolved(module.drivers[net].function)
        if net in self._sources:
            return self._from_part(*self._sources[net])
        if net in self._delayed:
            return self._value(self._delayed[net])
        raise UnsupportedError(f"nothing drives `{net}`")

    def _state(self, name: str, storage: Storage) -> Expression:
        """Return a state variable, its storage noted to be worked out."""
        if name not in self._states:
            self._states[name] = storage
            self._pending.append(name)
        return Var(f"state {name}")

    def _finish_states(self) -> None:
        while self._pending:
            name = self._pending.pop(0)
            raw = self._states[name]
            own = {raw.state: Var(f"state {name}")}
            self._states[name] = _mapped(
                replace(raw, state=f"state {name}", state_inverted=f"inverse {name}"),
                partial(self._resolved, known=own),
            )

    def _resolved(
        self, expression: Expression, known: Mapping[str, Expression] | None = None
    ) -> Expression:
        """Return an expression over nets as one over inputs and states."""
        known = known or {}
        needed = pruned(expression)
        values = {n: known[n] if n in known else self._value(n) for n in variables(needed)}
        return pruned(substitute(needed, values))

    def _from_part(self, part: Part, port: str) -> Expression:
        unit = self._models.units[part.module]
        if not unit.is_primitive:
            driver = self._inner_driver(part, port)
            if driver is None:
                raise UnsupportedError(f"nothing drives port `{port}` of `{part.name}`")
            return driver.function
        primitive = self._models.primitive(part.module)
        nets = dict(zip(primitive.inputs, part.by_place[1:], strict=False))
        if primitive.function is not None:
            return self._resolved(_connected(primitive.function, nets))
        if primitive.storage is None:
            raise UnsupportedError(f"primitive `{part.module}` says nothing")
        storage = _mapped(primitive.storage, partial(_connected, nets=nets))
        return self._state(part.name, storage)

    def _inner_driver(self, part: Part, port: str) -> Driver | None:
        """Return the driver of an instance's output over this module's inputs and states."""
        model = self._models.model(part.module)
        if port not in model.drivers:
            return None
        nets = _nets_of(part, model.ports)
        names = {item.state: f"{part.name}/{plain_state(item)}" for item in model.storages}
        states: dict[str, Expression] = {
            state: Var(f"state {name}") for state, name in names.items()
        }
        for storage in model.storages:
            name = names[storage.state]
            if name not in self._states:
                self._states[name] = _mapped(
                    replace(storage, state=f"state {name}", state_inverted=f"inverse {name}"),
                    partial(self._inside, nets=nets, states=states),
                )
        found = model.drivers[port]
        off = found.three_state
        return Driver(
            self._inside(found.function, nets, states),
            None if off is None else self._inside(off, nets, states),
        )

    def _inside(
        self,
        expression: Expression,
        nets: Mapping[str, Expression | None],
        states: Mapping[str, Expression],
    ) -> Expression:
        values: dict[str, Expression] = {}
        for name in support(expression):
            net = nets.get(name)
            if name in states:
                values[name] = states[name]
            elif net is None:
                raise UnsupportedError(f"port `{name}` of an instance is open")
            else:
                values[name] = self._resolved(net)
        return pruned(substitute(pruned(expression), values))


def plain_state(storage: Storage) -> str:
    """Return the name of a register without the mark of a state variable."""
    return storage.state.removeprefix("state ")


def _nets_of(part: Part, ports: tuple[str, ...]) -> dict[str, Expression | None]:
    if part.by_name is not None:
        return part.by_name
    return dict(zip(ports, part.by_place, strict=False))


def _connected(expression: Expression, nets: Mapping[str, Expression | None]) -> Expression:
    """Return a primitive's expression over nets; an open input counts as 0."""
    values = {
        name: nets.get(name) or Const(False) for name in variables(expression) if name != STATE
    }
    return substitute(expression, values)


def _mapped(storage: Storage, change: Callable[[Expression], Expression]) -> Storage:
    def own(expression: Expression | None) -> Expression | None:
        return None if expression is None else change(expression)

    clear, preset = own(storage.clear), own(storage.preset)
    never = Const(False)
    clear, preset = (None if item == never else item for item in (clear, preset))
    return replace(
        storage,
        data=own(storage.data),
        clock=own(storage.clock),
        clear=clear,
        preset=preset,
        clear_preset=storage.clear_preset if clear and preset else (None, None),
    )
