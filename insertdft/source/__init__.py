"""Structural Verilog text to a netlist that remembers its places."""

from insertdft.source.files import read_sources
from insertdft.source.place import Connection, InstanceText, attributes, locate
from insertdft.source.reader import read_netlist

__all__ = [
    "Connection",
    "InstanceText",
    "attributes",
    "locate",
    "read_netlist",
    "read_sources",
]
