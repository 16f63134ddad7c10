"""What replaces a storage cell, one file a style."""

from insertdft.styles.choose import Chooser
from insertdft.styles.conversion import (
    Conversion,
    Part,
    Refusal,
    ScanTap,
    TestNet,
    in_port_order,
    kind_of,
    test_nets_of,
)

__all__ = [
    "Chooser",
    "Conversion",
    "Part",
    "Refusal",
    "ScanTap",
    "TestNet",
    "in_port_order",
    "kind_of",
    "test_nets_of",
]
