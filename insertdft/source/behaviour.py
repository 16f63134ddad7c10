"""Where behavioural code ends, so that one report stands for the whole block."""

from typing import Final

from insertdft.source.tokens import tokens

_CLOSED_BY: Final = {
    "function": "endfunction",
    "task": "endtask",
    "generate": "endgenerate",
    "specify": "endspecify",
    "primitive": "endprimitive",
    "table": "endtable",
    "config": "endconfig",
}
_PROCESSES: Final = frozenset(
    """always always_ff always_comb always_latch initial final begin fork case casex casez if for
    forever while repeat else""".split()
)
_VARIABLES: Final = frozenset("reg integer real realtime time event genvar".split())

#: Words that start something that is no structure.
BEHAVIOUR: Final = frozenset((*_CLOSED_BY, *_PROCESSES, *_VARIABLES))

_DEEPER: Final = frozenset("begin fork case casex casez".split())
_BACK: Final = frozenset("end join endcase".split())


def end_of_block(code: str, start: int) -> int:
    """Return the offset behind the block that starts at ``start``, or the end of the text."""
    words = tokens(code, start, len(code), {})
    first = next(words)
    closing = _CLOSED_BY.get(first.text)
    if closing:
        return next((word.end for word in words if word.text == closing), len(code))
    return _end_of_statement(code, start)


def _end_of_statement(code: str, start: int) -> int:
    depth = brackets = 0
    end: int | None = None
    for word in tokens(code, start, len(code), {}):
        if end is not None and word.text != "else":
            return end
        end = None
        if word.text == "endmodule":
            return word.start
        depth += (word.text in _DEEPER) - (word.text in _BACK)
        if word.kind == "operator":
            brackets += (word.text in "([{") - (word.text in ")]}")
        if depth <= 0 and brackets <= 0 and (word.text == ";" or word.text in _BACK):
            end = word.end
    return end if end is not None else len(code)
