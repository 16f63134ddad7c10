"""What reading promises beyond the right columns: order, places, quiet, no traces."""

import gc
import os
import subprocess
import sys
from pathlib import Path

import pytest
from benchmarks.netlist_generator import generate, liberty, models, wishes
from source import by_pyslang, by_pyverilog
from source.cases import CASES, FOLDER, read, text_of
from source.reference import expand, ours

from insertdft.diagnostics import DesignError, Severity
from insertdft.library import read_library
from insertdft.netlist import CONST0, CONST1, OPEN
from insertdft.source import read_netlist
from insertdft.text import SourceText

SHAPES = [
    ("lines", "full", False),
    ("dense", "full", False),
    ("lines", "clean", True),
    ("dense", "clean", False),
    ("lines", "gates", True),
]


@pytest.mark.parametrize(("layout", "profile", "flat"), SHAPES)
def test_generated_netlist_is_read_as_other_readers_read_it(
    layout: str, profile: str, flat: bool
) -> None:
    wanted = wishes(700, flat=flat, layout=layout, profile=profile)
    text = "".join(generate(wanted))

    found = ours(read(text))

    assert found == expand(by_pyslang.read(text))
    assert found == expand(by_pyverilog.read(text))
    assert sum(len(module.instances) for module in found.values()) >= 700


def test_generated_cells_are_described_twice_alike() -> None:
    library = read_library([SourceText("cells.lib", "".join(liberty()))])
    netlist = read("module top; endmodule\n" + "".join(models()), top="top")

    for name, module in netlist.modules.items():
        if name in library.cells:
            assert {port.name for port in module.ports} == set(library.cells[name].pins)
    assert {"SDFF_X1", "SDFFR_X1"} <= set(library.cells)


def test_generator_gives_the_same_text_for_the_same_seed() -> None:
    one, other = (list(generate(wishes(300, seed=seed))) for seed in (3, 3))

    assert one == other
    assert one != list(generate(wishes(300, seed=4)))


@pytest.mark.parametrize("case", CASES)
def test_instances_stand_in_source_order_with_their_statements(case: str) -> None:
    source = text_of(case)
    for module in read_netlist([source]).modules.values():
        starts = module.instance_start.tolist()
        assert starts == sorted(starts)
        assert all(module.instance_before <= module.instance_start)
        assert all(source.text[end - 1] == ";" for end in module.instance_end.tolist())
        assert source.text[module.start :].startswith(("module", "macromodule"))
        assert source.text[module.body_end :].startswith("endmodule")


@pytest.mark.parametrize("case", CASES)
def test_columns_are_whole(case: str) -> None:
    netlist = read_netlist([text_of(case)])
    for module in netlist.modules.values():
        instances = len(module.instance_names)
        assert len(set(module.instance_names)) == instances
        assert len(module.instance_cell) == len(module.instance_start) == instances
        assert module.pin_start[0] == 0
        assert module.pin_start[-1] == len(module.pin_net) == len(module.pin_name)
        assert all(module.pin_net >= OPEN)
        assert all(module.pin_net < len(module.net_names))
        assert len(set(module.net_names)) == len(module.net_names)
        for name, vector in module.vectors.items():
            assert len(vector.indices()) == vector.width, name


def test_order_of_files_does_not_matter() -> None:
    whole = text_of("hierarchy")
    parts = whole.text.split("endmodule\n")[:-1]
    sources = [SourceText(f"{at}.v", f"{text}endmodule\n") for at, text in enumerate(parts)]
    assert len(sources) == 4

    forward, backward = read_netlist(sources), read_netlist(sources[::-1])

    assert ours(forward) == ours(backward) == ours(read_netlist([whole]))
    assert forward.top == backward.top == "top"


def test_macros_go_on_into_the_next_file_and_default_nets_do_not() -> None:
    first = SourceText("a.v", "`define ONE 1'b1\n`default_nettype none\nmodule a;\nendmodule\n")
    second = SourceText("b.v", "module b;\n  a u ();\n  INV i (.A(`ONE), .Y(n));\nendmodule\n")

    module = read_netlist([first, second]).modules["b"]

    assert module.pin_net.tolist()[0] == CONST1
    assert "n" in module.net_names


def test_macros_can_come_from_outside() -> None:
    text = "module m;\n`ifdef FAST\n  INV u (.A(`LOW));\n`else\n  junk\n`endif\nendmodule\n"

    module = read(text, defines={"FAST": "", "LOW": "1'b0"}).top_module

    assert module.pin_net.tolist() == [CONST0]


def test_a_macro_that_ends_is_unknown_afterwards() -> None:
    text = "`define F 1'b0\nmodule m;\n  INV u (.A(`F));\n`undef F\n  INV v (.A(`F));\nendmodule\n"

    with pytest.raises(DesignError) as caught:
        read(text)

    [item] = caught.value.diagnostics
    assert item.span is not None
    assert item.span.place == "in.v:5:13"


def test_supply_nets_are_tied_bit_by_bit() -> None:
    module = read("module m;\n  supply0 [1:0] low;\n  supply1 high;\nendmodule\n").top_module

    names = [module.net_name(net) for net in module.assign_left.tolist()]
    assert dict(zip(names, module.assign_right.tolist(), strict=True)) == {
        "low[0]": CONST0,
        "low[1]": CONST0,
        "high": CONST1,
    }
    assert module.net_kinds == {"low": "supply0", "high": "supply1"}


def test_parameter_overrides_are_kept_as_text() -> None:
    netlist = read_netlist([text_of("parameters")])
    module = netlist.top_module

    by_name = {module.instance_names[at]: text for at, text in module.parameters.items()}
    assert by_name["m1"] == "#(4, 8)"
    assert by_name["m4"] == "#3"
    assert by_name["m2"].endswith('.NAME("mem (* no *) // no ; )"))')


def test_an_instance_called_like_a_net_is_worth_a_warning() -> None:
    netlist = read("module m;\n  wire u;\n  INV u (.A(u));\nendmodule\n")

    [item] = netlist.diagnostics
    assert (item.slug, item.severity) == ("name-duplicate", Severity.WARNING)
    assert item.names == ("u",)


@pytest.mark.parametrize("enabled", [True, False])
def test_garbage_collection_is_as_it_was(enabled: bool) -> None:
    before = gc.isenabled()
    try:
        (gc.enable if enabled else gc.disable)()
        read("module m;\nendmodule\n")
        with pytest.raises(DesignError):
            read("module m;")
        assert gc.isenabled() == enabled
    finally:
        (gc.enable if before else gc.disable)()


def test_reading_writes_no_files_and_says_nothing(tmp_path: Path) -> None:
    """The grammar is built from scratch, pyverilog's files are compiled from scratch."""
    code = (
        "import sys; from insertdft.source import read_netlist, read_sources;"
        "print(read_netlist(read_sources(sys.argv[1:])).top)"
    )
    environment = {
        **os.environ,
        "PYTHONPATH": str(FOLDER.parents[1]),
        "PYTHONPYCACHEPREFIX": str(tmp_path / "cache"),
    }
    work = tmp_path / "work"
    work.mkdir()

    done = subprocess.run(
        [sys.executable, "-W", "error", "-c", code, str(FOLDER / "gates" / "in.v")],
        cwd=work,
        env=environment,
        capture_output=True,
        text=True,
        check=False,
    )

    assert (done.stdout, done.stderr) == ("top\n", "")
    assert list(work.iterdir()) == []
    built = [path for path in (tmp_path / "cache").rglob("*") if "parsetab" in path.name]
    assert built == []


PLAIN = "module m (a, y);\n  input a;\n  output [1:0] y;\n  wire [1:0] y;\n  wire n;\n"
PLAIN += "  INV u (.A(a), .Y(n));\n  BUF b (n, y[0]);\n  assign y[1] = 1'b0;\nendmodule\n"


@pytest.mark.parametrize(
    ("text", "built"), [(PLAIN, "0"), ("module m (input a);\nendmodule\n", "1")]
)
def test_grammar_is_built_only_for_what_is_not_plain(text: str, built: str, tmp_path: Path) -> None:
    """It takes a while to build, so nobody should wait for it who does not need it."""
    code = (
        "import sys; from insertdft.source import grammar, read_netlist, read_sources;"
        "read_netlist(read_sources(sys.argv[1:]));"
        "print(grammar._parser.cache_info().currsize)"
    )
    path = tmp_path / "in.v"
    path.write_text(text)

    done = subprocess.run(
        [sys.executable, "-c", code, str(path)],
        env={**os.environ, "PYTHONPATH": str(FOLDER.parents[1])},
        capture_output=True,
        text=True,
        check=True,
    )

    assert done.stdout.strip() == built
