"""A master latch and its slave, as a value."""

from typing import NamedTuple

from insertdft.survey.phases import Phase


class LatchPair(NamedTuple):
    """A master and its slave.

    Attributes:
        master: Flat instance id of L1.
        slave: Flat instance id of L2.
        inverted: Whether the slave's state is the inverse of the master's.
        master_phase: When the master is open.
        slave_phase: When the slave is open.
        master_used: Whether the master's output also goes elsewhere than to its slave.
        copies: Further latches that take the master's state in the slave's phase.
    """

    master: int
    slave: int
    inverted: bool
    master_phase: Phase
    slave_phase: Phase
    master_used: bool
    copies: tuple[int, ...] = ()

    @property
    def one_clock(self) -> bool:
        """Whether one port opens both, each at another level."""
        return self.master_phase.domain.port == self.slave_phase.domain.port
