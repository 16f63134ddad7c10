"""SDC run by a Tcl interpreter whose commands check their arguments."""

import shutil
import subprocess
from itertools import pairwise
from pathlib import Path

import pytest
from exports.made import STYLES, made

from insertdft.exports.sdc import tcl_word, to_sdc

STUBS = r"""
set f [open names]; set names [split [string trimright [read $f] "\n"] "\n"]; close $f
set clocks {}
proc get_ports {list} {
  global names
  foreach name $list { if {$name ni $names} { error "no port is called <$name>" } }
  if {![llength $list]} { error "no ports" }
  return $list
}
proc number {text} { if {![string is double -strict $text]} { error "<$text> is no number" } }
proc create_clock {n name p period w waveform ports} {
  global clocks
  if {"$n $p $w" ne "-name -period -waveform"} { error "arguments $n $p $w" }
  foreach {rise fall} $waveform {}
  foreach time [list $period $rise $fall] { number $time }
  if {$rise >= $fall || $rise >= $period} { error "waveform $waveform" }
  lappend clocks $name
  puts "clock $ports $period $rise $fall"
}
proc set_case_analysis {value ports} {
  if {$value ni {0 1}} { error "value $value" }
  foreach port $ports { puts "case $port $value" }
}
proc delay {kind args} {
  global clocks
  if {[llength $args] != 4 || [lindex $args 1] ne "-clock"} { error "arguments $args" }
  number [lindex $args 0]
  if {[lindex $args 2] ni $clocks} { error "no clock [lindex $args 2]" }
  puts "$kind [lindex $args 3]"
}
proc set_input_delay args { delay input {*}$args }
proc set_output_delay args { delay output {*}$args }
proc set_false_path {how ports} { if {$how ni {-from -to}} { error $how } }
proc unknown args { error "no command $args" }
"""


def run_tcl(folder: Path, text: str, names: list[str]) -> list[str]:
    shell = shutil.which("tclsh")
    if shell is None:
        pytest.fail("tclsh is missing; the README's second line installs it")
    (folder / "names").write_text("\n".join(names), encoding="latin-1")
    (folder / "run.tcl").write_text(STUBS + text, encoding="latin-1")
    ran = subprocess.run(
        [shell, "run.tcl"], cwd=folder, capture_output=True, text=True, check=False
    )
    assert ran.returncode == 0, ran.stderr
    return ran.stdout.splitlines()


@pytest.mark.parametrize("style", STYLES)
def test_every_mode_runs_and_names_ports_that_exist(style: str, tmp_path: Path) -> None:
    given = made(style, count=0).given
    names = [port.name for port in given.ports]

    modes = to_sdc(given)

    assert list(modes) == ["mission", "shift", "capture"]
    for mode, text in modes.items():
        lines = run_tcl(tmp_path, text, names)
        assert lines, mode
    shift = run_tcl(tmp_path, modes["shift"], names)
    clocked = {line.split()[1] for line in shift if line.startswith("clock ")}
    assert clocked == {port for chain in given.description.chains for port in chain.clocks}


def test_lssd_clocks_do_not_overlap_in_any_mode(tmp_path: Path) -> None:
    given = made("lssd", count=0).given
    names = [port.name for port in given.ports]

    for mode in ("shift", "capture"):
        lines = run_tcl(tmp_path, to_sdc(given)[mode], names)
        edges = sorted(
            (float(line.split()[3]), float(line.split()[4]), line.split()[1])
            for line in lines
            if line.startswith("clock ")
        )
        for one, two in pairwise(edges):
            assert one[1] < two[0] or one[:2] == two[:2], (one, two)
        idle = {line.split()[1] for line in lines if line.startswith("case ")}
        assert not idle & {edge[2] for edge in edges}


def test_scan_enable_is_on_while_shifting_and_off_elsewhere(tmp_path: Path) -> None:
    given = made("mux-d", count=0).given
    names = [port.name for port in given.ports]

    for mode, value in (("mission", 0), ("shift", 1), ("capture", 0)):
        assert f"case scan_enable {value}" in run_tcl(tmp_path, to_sdc(given)[mode], names)


@pytest.mark.parametrize("name", ["a[3]", '\\a"b[3]', "\\{x", "\\$y;z", "\\bus[1] [2]"])
def test_tcl_substitutes_nothing_in_a_name(name: str, tmp_path: Path) -> None:
    [line] = run_tcl(tmp_path, f"puts [get_ports [list {tcl_word(name)}]]", [name])

    assert name in line


def test_a_port_that_does_not_exist_is_noticed(tmp_path: Path) -> None:
    given = made("mux-d", count=0).given

    with pytest.raises(AssertionError, match="no port is called"):
        run_tcl(tmp_path, to_sdc(given)["shift"], ["clk"])
