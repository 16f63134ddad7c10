"""Reference fault simulation: three values, one fault at a time, over a list of gates."""

from collections.abc import Mapping

from circuits import Gates

from insertdft.faults.access import Access
from insertdft.faults.collapse import FaultList
from insertdft.faults.sites import PIN, PORT, STEM
from insertdft.simulate.words import Words

Pair = tuple[int, int]  # patterns with a sure 1, patterns with a sure 0


def simulate(
    gates: Gates,
    order: list[str],
    sources: Mapping[str, Pair],
    stem: Mapping[str, Pair],
    branch: Mapping[tuple[str, int], Pair],
) -> dict[str, Pair]:
    """Return three-valued values of all names, one gate after the other."""
    values = {name: stem.get(name, value) for name, value in sources.items()}
    for name in order:
        kind, inputs = gates.gates[name]
        seen = [branch.get((name, i), values[one]) for i, one in enumerate(inputs)]
        values[name] = stem.get(name, gate(kind, seen))
    return values


def gate(kind: str, values: list[Pair]) -> Pair:
    one, zero = values[0]
    for a, b in values[1:]:
        match kind:
            case "and" | "nand":
                one, zero = one & a, zero | b
            case "or" | "nor":
                one, zero = one | a, zero & b
            case "xor" | "xnor":
                one, zero = one & b | zero & a, one & a | zero & b
    return (zero, one) if kind in ("nand", "nor", "xnor", "not") else (one, zero)


class OneAtATime:
    """Detects each fault of a list by simulating it alone."""

    def __init__(self, gates: Gates, access: Access, bits: Words, patterns: int) -> None:
        self.gates, self.access, self.order = gates, access, gates.order()
        ones = (1 << patterns) - 1
        self.ones = ones
        circuit = access.circuit
        slots = access.free.tolist()
        words = {
            slot: int.from_bytes(row.astype("<u8").tobytes(), "little") & ones
            for slot, row in zip(slots, bits, strict=True)
        }
        words |= {slot: ones * value for slot, value in access.held.items()}
        places = {name: circuit.inputs[name] for name in circuit.inputs if name != "clk"}
        names = dict(zip(gates.inputs, places.values(), strict=True))
        names |= dict(zip(gates.flops, circuit.states.slot.tolist(), strict=True))
        self.sources = {
            name: (words[slot], words[slot] ^ ones) if slot in words else (0, 0)
            for name, slot in names.items()
        }
        self.good = simulate(gates, self.order, self.sources, {}, {})

    def detected_at(self, faults: FaultList) -> list[int]:
        return [self._first(faults, fault) for fault in faults.first.tolist()]

    def _first(self, faults: FaultList, fault: int) -> int:
        stem, branch, port, stuck = place_of(self.gates, faults, fault, self.ones)
        wrong = simulate(self.gates, self.order, self.sources, stem, branch)
        hits = self._hits(wrong, port, stuck)
        return (hits & -hits).bit_length() - 1

    def _hits(self, wrong: Mapping[str, Pair], port: str, stuck: Pair) -> int:
        ends = {f"po_{i}": name for i, name in enumerate(self.gates.outputs)}
        for number, data in enumerate(self.gates.flops.values()):
            if self.access.observe[number]:
                ends[f"f{number}"] = data
        hits = 0
        for end, name in ends.items():
            one, zero = self.good[name]
            bad_one, bad_zero = stuck if end == port else wrong[name]
            hits |= one & bad_zero | zero & bad_one
        return hits


def place_of(
    gates: Gates, faults: FaultList, fault: int, ones: int
) -> tuple[dict[str, Pair], dict[tuple[str, int], Pair], str, Pair]:
    """Return stuck names, stuck gate inputs, the end (port or flip-flop) that is stuck, value."""
    sites, (site, value) = faults.sites, divmod(fault, 2)
    design = sites.circuit.design
    stuck = (ones, 0) if value else (0, ones)
    net = design.net_name(int(sites.net[site])).removeprefix("\\")
    stem: dict[str, Pair] = {}
    branch: dict[tuple[str, int], Pair] = {}
    port = ""
    if sites.kind[site] == STEM:
        stem = {net: stuck}
    elif sites.kind[site] == PIN:
        row = int(sites.row[site])
        instance = design.name(int(design.pin_instance[row]))
        pin = design.pin_names[int(design.pin_name[row])]
        if instance[0] == "g":
            branch = {(list(gates.gates)[int(instance[1:])], int(pin[1:]) - 1): stuck}
        else:
            port = instance
    else:
        assert sites.kind[site] == PORT
        port = design.ports[int(sites.port[site])].name
    return stem, branch, port, stuck
