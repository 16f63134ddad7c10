"""Files come in as text whatever their packing, and what is no netlist is said to be none."""

import gzip
from pathlib import Path

import pytest

from insertdft.diagnostics import DesignError, Diagnostic
from insertdft.source import read_netlist, read_sources

TEXT = "module m;\n  INV u (.A(a));\nendmodule\n"


def problems(*paths: Path) -> list[Diagnostic]:
    with pytest.raises(DesignError) as caught:
        read_sources(paths)
    return list(caught.value.diagnostics)


def test_every_byte_is_kept(tmp_path: Path) -> None:
    path = tmp_path / "in.v"
    data = "// \xe9\xff\r\nmodule m;\tendmodule".encode("latin-1")
    path.write_bytes(data)

    [source] = read_sources([path])

    assert source.text.encode("latin-1") == data
    assert source.name == str(path)


def test_packed_file_is_known_by_its_content(tmp_path: Path) -> None:
    path = tmp_path / "in.v"
    path.write_bytes(gzip.compress(TEXT.encode()))

    [source] = read_sources([str(path)])

    assert source.text == TEXT
    assert read_netlist([source]).top == "m"


def test_missing_file_folder_and_empty_file_are_all_named(tmp_path: Path) -> None:
    (tmp_path / "empty.v").write_text(" \n")

    found = problems(tmp_path / "no.v", tmp_path, tmp_path / "empty.v")

    assert [item.slug for item in found] == ["file-unreadable", "file-unreadable", "netlist-empty"]
    assert all(item.hint for item in found)
    assert "no.v` does not exist" in found[0].message


@pytest.mark.parametrize("data", [b"\x7fELF\x02\x01\x01\x00\x00", b"module m;\x00endmodule"])
def test_binary_file_is_no_text(tmp_path: Path, data: bytes) -> None:
    path = tmp_path / "in.v"
    path.write_bytes(data)

    [item] = problems(path)

    assert item.slug == "not-text"


def test_cut_packed_file_is_unreadable(tmp_path: Path) -> None:
    path = tmp_path / "in.v.gz"
    path.write_bytes(gzip.compress(TEXT.encode() * 100)[:-20])

    [item] = problems(path)

    assert item.slug == "file-unreadable"


def test_file_given_twice_is_refused(tmp_path: Path) -> None:
    path = tmp_path / "in.v"
    path.write_text(TEXT)

    [item] = problems(path, path)

    assert "twice" in item.message
