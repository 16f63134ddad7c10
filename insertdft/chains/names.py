"""Names for new ports, taken by nothing in any module that is touched."""

from collections.abc import Iterable, Mapping

from insertdft.chains.wishes import DEFAULT_PORTS
from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.netlist import Module
from insertdft.netlist.names import KEYWORDS, SIMPLE


class PortNamer:
    """Gives out port names, unique over all modules that the plan touches."""

    def __init__(self, modules: Iterable[Module], asked: Mapping[str, str]) -> None:
        """Take the modules that get ports and the user's own names.

        Raises:
            DesignError: The user names an unknown kind of port or gives no plain identifier.
        """
        self._taken: set[str] = set()
        self._homes: dict[str, Module] = {}
        for module in modules:
            self._taken.update(names_in(module))
            self._homes[module.name] = module
        self._asked = dict(asked)
        problems = [found for found in map(self._check, asked.items()) if found]
        if problems:
            raise DesignError(problems)

    def one(self, kind: str) -> str:
        """Return the name of a port that there is one of, such as ``scan_enable``."""
        wanted = self._asked.get(kind, DEFAULT_PORTS[kind])
        if kind in self._asked and wanted in self._taken:
            raise DesignError([self._clash(kind, wanted)])
        return self._fresh(wanted)

    def numbered(self, kind: str, count: int) -> list[str]:
        """Return names for ``count`` ports of one kind: ``scan_in_1``, ``scan_in_2``, ..."""
        wanted = self._asked.get(kind, DEFAULT_PORTS[kind])
        names = [f"{wanted}_{number + 1}" for number in range(count)]
        if kind in self._asked:
            clashes = [self._clash(kind, name) for name in names if name in self._taken]
            if clashes:
                raise DesignError(clashes)
        stem = wanted
        while any(name in self._taken for name in names):
            stem = f"{stem}_x"
            names = [f"{stem}_{number + 1}" for number in range(count)]
        self._taken.update(names)
        return names

    def _fresh(self, wanted: str) -> str:
        name, tries = wanted, 1
        while name in self._taken:
            tries += 1
            name = f"{wanted}_{tries}"
        self._taken.add(name)
        return name

    def _check(self, item: tuple[str, str]) -> Diagnostic | None:
        kind, name = item
        if kind not in DEFAULT_PORTS:
            return error(
                "port-taken",
                f"there is no new port of kind `{kind}`",
                hint=f"kinds are {', '.join(DEFAULT_PORTS)}",
            )
        if not SIMPLE.match(name) or name in KEYWORDS:
            return error(
                "port-taken",
                f"`{name}` cannot be the name of a new port",
                hint="use letters, digits and _ and no word of Verilog",
            )
        return None

    def _clash(self, kind: str, name: str) -> Diagnostic:
        return error(
            "port-taken",
            f"`{name}` is to be the name of the new port for {kind} but is already taken",
            hint="choose another name for the port",
        )


def names_in(module: Module) -> Iterable[str]:
    """Yield every name that a new one in ``module`` must differ from."""
    yield from module.net_names
    yield from module.vectors
    yield from module.instance_names
    yield from (port.name for port in module.ports)
