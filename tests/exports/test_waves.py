"""Pictures of clock sequences: what they show, as text and as SVG."""

import xml.etree.ElementTree as ET

import pytest

from insertdft.description import Cycle, Description, TestPort
from insertdft.exports.waves import Picture, Slot, pictures, to_data, to_svg, to_text
from insertdft.styles.lssd_sequences import Form, LssdClocks, lssd_sequences

SVG = "{http://www.w3.org/2000/svg}"


def drawn(
    sequences: dict[str, tuple[Cycle, ...]], ports: tuple[TestPort, ...] = ()
) -> dict[str, Picture]:
    description = Description("top", (), ports, sequences)
    return {picture.name: picture for picture in pictures(description)}


def lssd() -> dict[str, Picture]:
    clocks = LssdClocks(("clk_a",), ("clk_b",), ("clk",), held={"rst_n": 1})
    return drawn(lssd_sequences(Form.DOUBLE, clocks))


def test_a_shift_is_drawn_as_a_then_b() -> None:
    assert to_text(lssd()["shift"]) == (
        "shift: once for each bit of the longest chain\n"
        "\n"
        "            |1               |\n"
        "  clk_a     |_________/~\\____|\n"
        "  clk_b     |_____________/~\\|\n"
        "  scan in   |X===============|\n"
        "  scan out  |     ^          |\n"
        "\n"
        "  cycle 1: one bit along every chain\n"
    )


def test_a_pair_of_cycles_at_speed_is_told() -> None:
    text = to_text(lssd()["launch_on_capture"])

    assert "cycle 2, at speed after the cycle before: capture at speed" in text
    assert text.splitlines()[3] == "  clk      |_________/~\\____|_________/~\\|"
    assert text.splitlines()[4] == "  clk_b    |_____________/~\\|____________|"


def test_forced_ports_keep_their_value_and_show_where_they_change() -> None:
    found = drawn(
        {
            "x": (
                Cycle(pulses=(("c",),)),
                Cycle(force=(("se", 1),), pulses=(("c",),)),
                Cycle(force=(("se", 0),)),
            )
        }
    )["x"]

    [se] = [wave for wave in found.waves if wave.label == "se"]
    assert se.slots == (
        *[Slot.NONE] * 3,
        Slot.HIGH,
        Slot.HIGH,
        Slot.HIGH,
        Slot.FALL,
        Slot.LOW,
    )


def test_a_clock_that_rests_at_one_pulses_low() -> None:
    found = drawn({"x": (Cycle(pulses=(("c",),)),)}, (TestPort("c", "clock", off=1),))["x"]

    assert "|~~~~~~~~~\\_/|" in to_text(found)
    assert "M0 6 L36 6 L36 6 L72 6 L72 6 L80 6 L83 26" in to_svg(found)


def test_a_clock_that_is_forced_on_is_drawn_on() -> None:
    found = drawn(
        {
            "flush": (
                Cycle(force=(("a", 1),), pulses=(("b",),)),
                Cycle(force=(("a", 0),), pulses=(("a",),)),
            )
        }
    )["flush"]

    [a] = [wave for wave in found.waves if wave.label == "a"]
    assert a.slots == (Slot.RISE, Slot.HIGH, Slot.HIGH, Slot.FALL, Slot.LOW, Slot.PULSE)


def test_measured_outputs_and_new_inputs_are_marked() -> None:
    found = lssd()["capture"]

    by_label = {wave.label: wave.slots for wave in found.waves}
    assert by_label["inputs"][0] is Slot.CHANGE
    assert by_label["outputs"] == (Slot.NONE, Slot.STROBE, Slot.NONE)
    assert "scan in" not in by_label


def test_every_sequence_has_its_picture_in_order() -> None:
    clocks = LssdClocks(("a",), ("b",), ("c1",), ("c2",))
    sequences = lssd_sequences(Form.STAR, clocks)

    assert list(drawn(sequences)) == list(sequences)
    assert drawn({"empty": ()}) == {}


@pytest.mark.parametrize("form", list(Form))
def test_svg_is_well_formed_and_inside_its_frame(form: Form) -> None:
    clocks = LssdClocks(("a",), ("b",), ("c1", "c2"), ("d",) if form is Form.STAR else ())
    for picture in drawn(lssd_sequences(form, clocks)).values():
        root = ET.fromstring(to_svg(picture).encode("latin-1"))  # noqa: S314 -- our own text
        width, height = float(root.get("width") or 0), float(root.get("height") or 0)

        texts = [at.text or "" for at in root.iter(f"{SVG}text")]
        assert {wave.label for wave in picture.waves} <= set(texts)
        assert all(any(cycle.why in text for text in texts) for cycle in picture.cycles)
        for at in root.iter(f"{SVG}text"):
            end = float(at.get("x") or 0) + 8 * len(at.text or "")
            assert end <= width or float(at.get("x") or 0) <= width
        for at in root.iter(f"{SVG}line"):
            assert float(at.get("x1") or 0) <= width
            assert float(at.get("y2") or 0) <= height
        for row in root.iter(f"{SVG}g"):
            left = float((row.get("transform") or "").split("(")[1].split()[0])
            for path in row.iter(f"{SVG}path"):
                first = float((path.get("d") or "M0").split()[0][1:])
                assert left + first <= width


def test_names_are_escaped_and_kept() -> None:
    name = '\\clk<0>&"x\xe9'
    found = drawn({"x": (Cycle(pulses=((name,),), why="<why> & é"),)})["x"]
    svg = to_svg(found)

    root = ET.fromstring(svg.encode("latin-1"))  # noqa: S314 -- our own text

    assert "<0>" not in svg
    assert name in [at.text for at in root.iter(f"{SVG}text")]
    assert name in to_text(found)


def test_what_cannot_be_drawn_is_replaced() -> None:
    found = drawn({"x": (Cycle(pulses=(("c\x01\n",),)),)})["x"]

    assert found.waves[0].label == "c??"


def test_data_for_machines_has_every_slot() -> None:
    data = to_data(lssd()["shift"])

    assert data["sequence"] == "shift"
    assert data["waves"] == [
        {"label": "clk_a", "slots": ["low", "low", "pulse", "low"]},
        {"label": "clk_b", "slots": ["low", "low", "low", "pulse"]},
        {"label": "scan in", "slots": ["change", "keep", "keep", "keep"]},
        {"label": "scan out", "slots": ["none", "strobe", "none", "none"]},
    ]
