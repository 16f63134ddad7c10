import pytest

from insertdft.diagnostics import DesignError
from insertdft.library.liberty_syntax import parse
from insertdft.text import SourceText

GOOD = """/* head { comment " */
library ("one") {
  define (own, cell, string);
  technology (cmos);
  unquoted : table_lookup ; quoted : "a : b; {c}" ;
  no_semicolon : 5
  continued : "first, \\
               second";
  // a line comment with { and "
  units (1, pf);
  cell (A) { area : 1.5e2; /* inside */ pin (X, "Y") { direction : input; } }
  cell ("B") {
    leakage_power () { when : "!A } {"; value : 1; }
    internal_power () { rise_power (t) { values ("1, 2"); } /* } */ }
    pin (Q) { timing () { cell_rise (t) { values ("1, 2", \\
      "3, 4"); } } }
  }
}
"""


def fault(text: str) -> tuple[str, str, str]:
    with pytest.raises(DesignError) as caught:
        parse(SourceText("bad.lib", text))
    [item] = caught.value.diagnostics
    assert item.span is not None
    return item.slug, item.span.place, item.message


def test_groups_attributes_and_places_are_read() -> None:
    [library] = parse(SourceText("good.lib", GOOD))

    assert library.kind == "library"
    assert library.name == "one"
    assert library.text("unquoted") == "table_lookup"
    assert library.text("quoted") == "a : b; {c}"
    assert library.text("no_semicolon") == "5"
    assert (library.text("continued") or "").split() == ["first,", "second"]
    assert library.arguments("units") == ("1", "pf")
    first, second = library.all_of("cell")
    assert first.number("area") == 150.0
    assert first.all_of("pin")[0].names == ("X", "Y")
    assert first.span("area").place == "good.lib:11:21"
    [pin] = second.all_of("pin")
    [rise] = pin.all_of("timing")[0].all_of("cell_rise")
    assert rise.arguments("values") == ("1, 2", "3, 4")
    assert second.span().text == 'cell ("B")'


def test_groups_nobody_needs_are_stepped_over() -> None:
    [library] = parse(SourceText("good.lib", GOOD))

    assert [group.kind for group in library.all_of("cell")[1].groups] == ["pin"]


def test_windows_line_ends_read_alike() -> None:
    [unix] = parse(SourceText("a", GOOD))
    [windows] = parse(SourceText("b", GOOD.replace("\n", "\r\n")))

    assert windows.text("quoted") == unix.text("quoted")
    assert (windows.text("continued") or "").split() == (unix.text("continued") or "").split()
    assert [cell.name for cell in windows.groups] == [cell.name for cell in unix.groups]


@pytest.mark.parametrize(
    ("text", "place"),
    [
        ("library (a) {\n  cell (b) {\n    area 5;\n  }\n}\n", "bad.lib:3:5"),
        ("library (a) {\n  cell (b) {\n    area : 5;\n", "bad.lib:2:3"),
        ("library (a) {\n}\n}\n", "bad.lib:3:1"),
        ("library (a) {\n  x : ;\n}\n", "bad.lib:2:3"),
        ("library (a) {\n  = 5;\n}\n", "bad.lib:2:3"),
        ('library (a) {\n  x : "open;\n  cell (b) { area : 5; }\n}\n', "bad.lib:2:7"),
        ('library (a) {\n  x : "one; \n y : "two";\n}\n', "bad.lib:2:7"),
        ("not liberty at all", "bad.lib:1:1"),
        ("library (a) {\n cell (b {\n area : 5; } }", "bad.lib:2:2"),
    ],
)
def test_mistake_is_reported_at_its_place(text: str, place: str) -> None:
    slug, found, _ = fault(text)

    assert (slug, found) == ("library-syntax", place)


def test_including_another_file_is_refused_with_what_to_do() -> None:
    slug, place, message = fault("library (a) {\n  include_file (more.lib);\n}\n")

    assert (slug, place) == ("library-unsupported", "bad.lib:2:3")
    assert "more.lib" in message


def test_every_lost_brace_or_quote_of_a_good_file_is_noticed() -> None:
    """One character lost at a time; only a brace or quote inside a comment may go unnoticed."""
    comment_at = {GOOD.index(mark) for mark in ('{ comment "', '" */', '{ and "', '"\n  units')}
    comment_at.add(GOOD.index("/* } */") + 3)
    for at, letter in enumerate(GOOD):
        if letter in "{}" and at not in comment_at and not _in_quotes(at):
            with pytest.raises(DesignError):
                parse(SourceText("bad.lib", GOOD[:at] + GOOD[at + 1 :]))


def _in_quotes(at: int) -> bool:
    line = GOOD.rfind("\n", 0, at) + 1
    return GOOD.count('"', line, at) % 2 == 1
