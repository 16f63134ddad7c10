"""Random netlists, flat and hierarchical, run the laws; examples are seeded and shrink."""

from dataclasses import dataclass

from designs import design_of
from hypothesis import given, settings
from hypothesis import strategies as st

from insertdft import api
from insertdft.text import apply_splices, undo_splices

CELLS = ("DFF", "DFFR", "DFFN", "DFFI", "SDFF")


@dataclass(frozen=True)
class Shape:
    """One random module: its storage cells and the modules it holds."""

    cells: tuple[str, ...]
    inner: tuple[int, ...]


@st.composite
def hierarchies(draw: st.DrawFn) -> list[Shape]:
    """Return modules, each holding only those before it; the last is the top."""
    shapes: list[Shape] = []
    for number in range(draw(st.integers(1, 4))):
        cells = draw(st.lists(st.sampled_from(CELLS), min_size=1, max_size=6))
        inner = draw(st.lists(st.integers(0, number - 1), max_size=3)) if number else []
        shapes.append(Shape(tuple(cells), tuple(inner)))
    return shapes


def text_of(shapes: list[Shape]) -> str:
    """Return the netlist: data runs along all cells and modules, two clocks reach them all."""
    return "".join(_module(number, shapes) for number in range(len(shapes)))


def _module(number: int, shapes: list[Shape]) -> str:
    shape = shapes[number]
    name = "top" if number == len(shapes) - 1 else f"m{number}"
    steps = len(shape.cells) + len(shape.inner)
    lines = [f"module {name} (ca, cb, rn, d, q);", "  input ca, cb, rn, d; output q;"]
    lines += [f"  wire n{step};" for step in range(steps - 1)]
    for step in range(steps):
        before = f"n{step - 1}" if step else "d"
        after = "q" if step == steps - 1 else f"n{step}"
        clock = "ca" if step % 3 else "cb"
        if step < len(shape.cells):
            lines.append(_cell(shape.cells[step], step, before, after, clock))
        else:
            inner = shape.inner[step - len(shape.cells)]
            swap = ("cb", "ca") if step % 2 else ("ca", "cb")
            pins = ", ".join((*swap, "rn", before, after))
            lines.append(f"  m{inner} \\u.{step}[0] ({pins});")
    return "\n".join([*lines, "endmodule", ""])


def _cell(kind: str, step: int, before: str, after: str, clock: str) -> str:
    pins = {"D": before, "CKN" if kind == "DFFN" else "CK": clock}
    pins["QN" if kind == "DFFI" else "Q"] = after
    if kind == "DFFR":
        pins["RN"] = "rn"
    listed = ", ".join(f".{pin}({net})" for pin, net in pins.items())
    return f"  {kind} r{step} ({listed});"


@settings(max_examples=60, deadline=None, derandomize=True)
@given(hierarchies(), st.integers(0, 6))
def test_random_hierarchies_convert_trace_and_come_back(shapes: list[Shape], more: int) -> None:
    design = design_of(text_of(shapes), top="top")
    least = len(api.convert(design, api.Wishes()).description.chains)
    cells = len(api.survey(design).storage)

    done = api.convert(design, api.Wishes(chains=min(least + more, cells)))

    [patch] = done.patches
    written = apply_splices(patch.source, patch.splices)
    assert done.traced.problems == ()
    assert undo_splices(written, patch.splices, patch.source) == patch.source.text
    names = [cell.instance for chain in done.description.chains for cell in chain.cells]
    assert len(names) == len(set(names)) == cells


@settings(max_examples=40, deadline=None, derandomize=True)
@given(st.lists(st.sampled_from(CELLS), min_size=1, max_size=40), st.integers(1, 12))
def test_flat_netlists_stay_balanced_within_each_group(cells: list[str], chains: int) -> None:
    design = design_of(text_of([Shape(tuple(cells), ())]))
    least = len(api.convert(design, api.Wishes()).description.chains)
    done = api.convert(design, api.Wishes(chains=min(max(least, chains), len(cells))))

    by_group: dict[object, list[int]] = {}
    for chain in done.description.chains:
        by_group.setdefault((chain.clocks, chain.edge), []).append(chain.length)
    assert all(max(lengths) - min(lengths) <= 1 for lengths in by_group.values())
