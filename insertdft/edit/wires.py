"""New names inside one module: wires and instances that clash with nothing there."""

from collections.abc import Iterable

from insertdft.chains.names import names_in
from insertdft.netlist import Module
from insertdft.netlist.names import plain, plain_to_name, to_verilog


class Wires:
    """Wires declared so far and the names that are taken.

    Attributes:
        count: Number of wires declared.
    """

    def __init__(self, module: Module, also_taken: Iterable[str]) -> None:
        """Take all names of ``module`` and those of the ports that it is about to get."""
        self._taken = set(names_in(module))
        self._taken.update(also_taken)
        self._declared: list[str] = []

    @property
    def count(self) -> int:
        """Number of wires declared so far."""
        return len(self._declared)

    def fresh(self, wanted: str) -> str:
        """Declare a wire called ``wanted`` or nearly so; return its text in expressions."""
        name = self._free(wanted)
        self._declared.append(name)
        return to_verilog(name)

    def fresh_beside(self, instance: str, suffix: str) -> str:
        """Declare a wire named after an instance; return its text in expressions."""
        return self.fresh(f"{plain(instance)}_{suffix}")

    def fresh_instance(self, wanted: str) -> str:
        """Return a free name for an instance."""
        return self._free(wanted)

    def fresh_part(self, instance: str, suffix: str) -> str:
        """Return a free name for an instance that stands beside another."""
        return self._free(f"{plain(instance)}_{suffix}")

    def declarations(self) -> list[str]:
        """Return one declaration a wire, in the order they were asked for."""
        return [f"wire {to_verilog(name)};" for name in self._declared]

    def _free(self, wanted: str) -> str:
        name, tries = plain_to_name(wanted), 1
        while name in self._taken:
            tries += 1
            name = plain_to_name(f"{wanted}_{tries}")
        self._taken.add(name)
        return name
