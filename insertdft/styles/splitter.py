"""A clock splitter: makes the two clocks of shift-register latches out of one.

In mission mode C is on while the clock is low and B while it is high, so that L1 and L2 together
take data at the rising edge as a flip-flop does. Each is held off until the other is off: the two
never overlap, whatever the gate delays (the cross-coupled two-phase generator, common practice).
In test mode C and B come from ports of their own, and the clock is out of the way.
"""

from collections.abc import Collection

from insertdft.library.cell import Library
from insertdft.styles.gates import ComposedModule, free_name, gate_builder

#: Ports, inputs first.
PORTS = (
    ("CLK", "input"),
    ("TEST", "input"),
    ("TC", "input"),
    ("TB", "input"),
    ("C", "output"),
    ("B", "output"),
)


def compose_splitter(
    library: Library, taken: Collection[str] = frozenset(), *, rising: bool = True
) -> ComposedModule | None:
    """Return the splitter, None if the library lacks NAND gates or inverters.

    Args:
        library: Where the gates come from.
        taken: Names of modules and cells that are in use.
        rising: Whether the flip-flops behind the clock take data at its rising edge.
    """
    builder = gate_builder(library)
    if builder is None:
        return None
    mission = builder.invert("TEST", "mission")
    turned = builder.invert("CLK", "clk_n")
    first, second = (turned, "CLK") if rising else ("CLK", turned)
    test_c = builder.nand(["TC", "TEST"], "test_c_n")
    test_b = builder.nand(["TB", "TEST"], "test_b_n")
    own_c = builder.nand([first, mission, "b_off"], "own_c_n")
    own_b = builder.nand([second, mission, "c_off"], "own_b_n")
    builder.nand([own_c, test_c], "C")
    builder.nand([own_b, test_b], "B")
    builder.invert("C", "c_off")
    builder.invert("B", "b_off")
    name = free_name("clock_splitter" if rising else "clock_splitter_fall", taken)
    edge = "rising" if rising else "falling"
    return builder.module(
        name, PORTS, f"C and B for data at the {edge} edge of CLK; TEST frees them"
    )
