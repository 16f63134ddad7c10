"""Reasons for faults that stay undetected: each with a circuit that has it and one that has not."""

import pytest
from circuits import design_of

from insertdft.faults.access import scan_access
from insertdft.faults.collapse import make_faults
from insertdft.faults.grade import grade_random
from insertdft.faults.hidden import Reason, Remaining, explain, fault_name
from insertdft.faults.untestable import prove_untestable
from insertdft.simulate.lower import make_circuit

HEAD = "module top (c, a, b, d, t, y); input c, a, b, d, t; output y; "


def remaining(body: str, scanned: tuple[str, ...], patterns: int = 64) -> Remaining:
    design = design_of(f"{HEAD}{body} endmodule")
    circuit = make_circuit(design)
    names = [design.name(i) for i in range(len(design.cell))]
    kept = [names.index(name) for name in scanned]
    access = scan_access(circuit, kept, kept, {"c": 0, "t": 0})
    grade = grade_random(make_faults(circuit), access, patterns, seed=1)
    return explain(grade)


def names_for(found: Remaining, reason: Reason) -> list[str]:
    index = list(Reason).index(reason)
    return [
        fault_name(found.grade.faults, number)
        for number, why in zip(found.classes.tolist(), found.reason.tolist(), strict=True)
        if why == index
    ]


def test_an_effect_that_ends_in_an_unscanned_cell_names_that_cell() -> None:
    found, fine = (
        remaining(
            "wire n, s, r; and u1 (n, a, b); DFF f (.D(n), .CK(c), .Q(s));"
            " DFF g (.D(s), .CK(c), .Q(r)); or u2 (y, r, d);",
            scanned,
        )
        for scanned in ((), ("f", "g"))
    )

    assert "u1.#1 stuck at 1" not in names_for(fine, Reason.UNSEEN_END)
    assert names_for(found, Reason.UNSEEN_END)
    design = found.grade.faults.sites.circuit.design
    assert [design.name(i) for i, _ in found.obstacles()] == ["f", "g"]
    assert fine.obstacles() == ()


def test_a_line_held_by_the_test_mode() -> None:
    found = remaining("wire n, s; and u1 (n, a, t); xor u2 (y, n, b);", ())

    assert "u1.#0 stuck at 0" in names_for(found, Reason.HELD)
    assert names_for(remaining("xor u2 (y, a, b);", ()), Reason.HELD) == []


def test_a_line_that_hangs_on_an_unscanned_cell() -> None:
    body = "wire s; DFF f (.D(a), .CK(c), .Q(s)); and u1 (y, s, b);"

    found, fine = remaining(body, ()), remaining(body, ("f",))

    assert "f.Q stuck at 0" in names_for(found, Reason.UNLOADED_SOURCE)
    assert fine.counts() == {}


def twenty_flops() -> tuple[str, str, tuple[str, ...]]:
    """Return flip-flops and a wire ``n``, their outputs as terms, their names."""
    terms = ", ".join(f"s{i}" for i in range(20))
    flops = "".join(f"DFF f{i} (.D(a), .CK(c), .Q(s{i})); " for i in range(20))
    return f"wire n, {terms}; {flops}", terms, tuple(f"f{i}" for i in range(20))


def test_a_rare_value_is_not_excited_and_a_common_one_is() -> None:
    flops, terms, scanned = twenty_flops()

    found = remaining(f"{flops} and u1 (n, {terms}); xor u2 (y, n, a, b, d);", scanned)

    assert "u1.#0 stuck at 0" in names_for(found, Reason.NOT_EXCITED)
    assert remaining("xor u2 (y, a, b, d);", ()).counts() == {}


def test_an_excited_fault_behind_a_rarely_open_gate_is_not_seen() -> None:
    flops, terms, scanned = twenty_flops()

    found = remaining(f"{flops} xor u1 (n, a, b); and u2 (y, n, {terms});", scanned)

    assert "u1.#0 stuck at 0" not in names_for(found, Reason.NOT_EXCITED)
    assert names_for(found, Reason.NOT_SEEN)


def test_a_proved_redundancy_comes_first() -> None:
    grade = remaining("wire n; and u1 (n, a, b); or u2 (y, a, n);", ()).grade
    proofs = prove_untestable(grade.faults, grade.access, grade.undetected().tolist())

    assert set(explain(grade, proofs).counts()) == {Reason.NO_TEST}
    assert Reason.NO_TEST not in explain(grade).counts()


@pytest.mark.parametrize("patterns", [0, 64])
def test_every_undetected_class_has_one_reason(patterns: int) -> None:
    found = remaining("wire n; nand u1 (n, a, b); xor u2 (y, n, d);", (), patterns)

    assert len(found.reason) == len(found.classes)
    assert sum(found.counts().values()) == len(found.grade.undetected())
