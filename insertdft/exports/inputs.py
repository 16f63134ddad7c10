"""What every format is made from."""

from dataclasses import dataclass

from insertdft.description import Description
from insertdft.design.flat import TopPort
from insertdft.exports.frames import Program, make_program
from insertdft.exports.patterns import Pattern, chain_test
from insertdft.exports.timing import Timing


@dataclass(frozen=True, slots=True)
class ExportInput:
    """What every format is made from.

    Attributes:
        description: The chains.
        ports: Bits of the top ports of the scan netlist.
        timing: Edges of the tester cycle.
        patterns: Patterns with expected values; None if only the chain test is wanted.
        date: For headers; left out when None, so that equal inputs give equal bytes.
    """

    description: Description
    ports: tuple[TopPort, ...]
    timing: Timing
    patterns: tuple[Pattern, ...] | None = None
    date: str | None = None

    def program(self) -> Program:
        """Return the tester's cycles."""
        return make_program(self.description, self.ports)

    def all_patterns(self, program: Program) -> tuple[Pattern, ...]:
        """Return the chain test and then every other pattern."""
        return (chain_test(self.description, program), *(self.patterns or ()))
