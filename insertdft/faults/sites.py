"""Single stuck-at faults: where they sit, and which are the same fault.

Sites are stems that something reads, and the branches of stems that several things read; an output
port and the data of a storage cell read as well (rule of the ISCAS benchmark counts). Clock nets
and what only makes clocks are no sites: a wrong clock shows in the chain test. Each site has two
faults; fault ``2 * site + value`` is "stuck at value".
"""

from dataclasses import dataclass, field

import numpy as np

from insertdft.netlist import FIRST_NET, Ids, Offsets
from insertdft.simulate.circuit import Circuit
from insertdft.simulate.lower import clock_nets, leads_to
from insertdft.simulate.words import Flags

STEM, PIN, PORT, BLIND = 0, 1, 2, 3


@dataclass(frozen=True, slots=True, eq=False)
class Sites:
    """Where single stuck-at faults can sit, ``k`` places.

    Attributes:
        circuit: Of the design, made without clocks.
        kind: STEM, PIN (a branch into a modelled cell), PORT (a branch into an output port), or
            BLIND (a branch into a black box), shape (k,).
        net: Flat net.
        slot: Slot of the net.
        row: Pin row of a PIN or BLIND branch, else -1.
        edge: Edge of a PIN branch, else -1.
        port: Place in ``Design.ports`` of a PORT branch, else -1.
        stem_of_net: Site of each net's stem, -1 where it has none, shape (nets,).
        branch_of_row: Site of each pin row's branch, -1 where it has none, shape (pins,).
    """

    circuit: Circuit
    kind: Ids = field(repr=False)
    net: Ids = field(repr=False)
    slot: Ids = field(repr=False)
    row: Ids = field(repr=False)
    edge: Ids = field(repr=False)
    port: Ids = field(repr=False)
    stem_of_net: Ids = field(repr=False)
    branch_of_row: Ids = field(repr=False)

    def at_row(self, rows: Ids) -> Ids:
        """Return the site that decides what the input pins ``rows`` read, -1 for none."""
        nets = self.circuit.design.pin_net[rows]
        stems = np.where(nets >= 0, self.stem_of_net[nets], -1)
        branches = self.branch_of_row[rows]
        found: Ids = np.where(branches >= 0, branches, stems).astype(np.int32)
        return found


def find_sites(circuit: Circuit) -> Sites:
    """Return every site: stems by net id, then branches by net and pin row, then port branches."""
    design = circuit.design
    edges = _reading_edges(circuit)
    rows = np.concatenate((circuit.edge_row[edges], _blind_rows(circuit))).astype(np.int64)
    edge_of = np.concatenate((edges, np.full(len(rows) - len(edges), -1)))
    outputs = [i for i, port in enumerate(design.ports) if port.direction != "input"]
    port_nets = np.array([design.ports[i].net for i in outputs], np.int64)
    nets = np.concatenate((design.pin_net[rows], port_nets)).astype(np.int64)
    kinds = np.concatenate((np.where(edge_of >= 0, PIN, BLIND), np.full(len(outputs), PORT)))
    rows = np.concatenate((rows, np.full(len(outputs), -1)))
    edge_of = np.concatenate((edge_of, np.full(len(outputs), -1)))
    ports = np.concatenate((np.full(len(rows) - len(outputs), -1), outputs)).astype(np.int64)

    readers = np.bincount(nets, minlength=design.net_count)
    readers[~_driven(circuit)] = 0
    stems = np.flatnonzero(readers)
    branches = np.flatnonzero(readers[nets] > 1)
    branches = branches[np.lexsort((ports[branches], rows[branches], nets[branches]))]
    none = np.full(len(stems), -1)
    site_net = np.concatenate((stems, nets[branches])).astype(np.int32)
    stem_of_net = np.full(design.net_count, -1, np.int32)
    stem_of_net[stems] = np.arange(len(stems))
    branch_of_row = np.full(len(design.pin_net), -1, np.int32)
    pins = np.flatnonzero(rows[branches] >= 0)
    branch_of_row[rows[branches[pins]]] = len(stems) + pins

    def column(values: Offsets) -> Ids:
        return np.concatenate((none, values[branches])).astype(np.int32)

    return Sites(
        circuit=circuit,
        kind=np.concatenate((none * 0 + STEM, kinds[branches])).astype(np.int32),
        net=site_net,
        slot=circuit.slot_of_net[site_net],
        row=column(rows),
        edge=column(edge_of),
        port=column(ports),
        stem_of_net=stem_of_net,
        branch_of_row=branch_of_row,
    )


def _reading_edges(circuit: Circuit) -> Offsets:
    """Return the edges that are pins and not part of the clock network alone."""
    ends = np.zeros(circuit.slots, np.bool_)
    ends[list(circuit.outputs.values())] = True
    ends[circuit.states.following] = True
    to_logic = leads_to(circuit, ends)
    clocks = np.zeros(circuit.slots, np.bool_)
    clocks[circuit.slot_of_net[clock_nets(circuit.design)]] = True
    only_clock = leads_to(circuit, clocks) & ~to_logic
    kept: Offsets = np.flatnonzero((circuit.edge_row >= 0) & ~only_clock[circuit.edge_node])
    return kept


def _blind_rows(circuit: Circuit) -> Ids:
    """Return pins of black boxes on nets that something else drives."""
    design = circuit.design
    boxes = np.array([i for i in circuit.unmodelled if design.cell_of(i) is None], np.int64)
    rows = np.flatnonzero(np.isin(design.pin_instance, boxes))
    rows = rows[design.pin_net[rows] >= FIRST_NET]
    return rows[circuit.slot_of_net[design.pin_net[rows]] >= circuit.first_node].astype(np.int32)


def _driven(circuit: Circuit) -> Flags:
    """Return the nets that a port, a cell or a black box drives; constants are none."""
    design = circuit.design
    found: Flags = np.diff(design.drivers.start) > 0
    found[sorted(design.input_ports)] = True
    found[:FIRST_NET] = False
    return found
