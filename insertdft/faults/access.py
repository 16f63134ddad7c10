"""What a test can set and see: ports, and the states that scan reaches."""

from collections.abc import Collection, Mapping
from dataclasses import dataclass, field

import numpy as np

from insertdft.netlist import Ids
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.words import Flags


@dataclass(frozen=True, slots=True, eq=False)
class Access:
    """Control and observation during one capture.

    Attributes:
        circuit: Of the design, made without clocks.
        control: States that are loaded before the capture, shape (states,).
        observe: States that are unloaded after it, shape (states,).
        held: Slot of an input port bit -> value it keeps (reset off, test mode on, clocks at rest).
        free: Slots that take pattern bits: input port bits that are not held, loaded states.
        unknown: Source slots that keep an unknown value and are read by something.
        seen: Shape (slots,), slots whose value the tester sees.
    """

    circuit: Circuit
    control: Flags = field(repr=False)
    observe: Flags = field(repr=False)
    held: Mapping[int, int] = field(repr=False)
    free: Ids = field(repr=False)
    unknown: Ids = field(repr=False)
    seen: Flags = field(repr=False)


def full_access(circuit: Circuit, held: Mapping[str, int]) -> Access:
    """Return the access of full scan: every state is loaded and unloaded.

    Args:
        circuit: Made without clocks.
        held: Input port bits that keep a value, beside the clocks that the circuit pulses.
    """
    everything = np.ones(len(circuit.states.slot), np.bool_)
    return _access(circuit, everything, everything, held)


def scan_access(
    circuit: Circuit,
    control: Collection[int],
    observe: Collection[int],
    held: Mapping[str, int],
) -> Access:
    """Return the access that scan gives to some cells.

    Args:
        circuit: Made without clocks.
        control: Leaf instances whose states are known after loading (LSSD: L1 and L2).
        observe: Leaf instances whose states are unloaded after capture (LSSD: L1).
        held: Input port bits that keep a value, beside the clocks that the circuit pulses.

    Raises:
        KeyError: ``held`` names no input port bit.
    """
    instance = circuit.states.instance
    return _access(
        circuit,
        np.isin(instance, np.array(sorted(control), np.int64)),
        np.isin(instance, np.array(sorted(observe), np.int64)),
        held,
    )


def _access(circuit: Circuit, control: Flags, observe: Flags, held: Mapping[str, int]) -> Access:
    states = circuit.states
    kept = {circuit.inputs[name]: value for name, value in ({**circuit.at_rest, **held}).items()}
    ports = [slot for slot in circuit.inputs.values() if slot not in kept]
    is_read = np.zeros(circuit.slots, np.bool_)
    is_read[circuit.edge_slot] = True
    open_ends = np.concatenate((circuit.unknown, states.slot[~control]))
    seen = np.zeros(circuit.slots, np.bool_)
    seen[list(circuit.outputs.values())] = True
    seen[states.following[observe]] = True
    return Access(
        circuit=circuit,
        control=control,
        observe=observe,
        held=kept,
        free=np.array([*dict.fromkeys(ports), *states.slot[control].tolist()], np.int32),
        unknown=np.unique(open_ends[is_read[open_ends]]).astype(np.int32),
        seen=seen,
    )
