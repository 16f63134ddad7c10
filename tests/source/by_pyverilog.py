"""The same netlist through pyverilog as it comes, its own lexer included: for tests only."""

import warnings
from functools import cache
from typing import Any

from source.reference import (
    Bit,
    Range,
    RawConnection,
    RawInstance,
    RawModule,
    name_bits,
    number_bits,
    part,
)

with warnings.catch_warnings():
    warnings.simplefilter("ignore")
    from ply.yacc import NullLogger, yacc
    from pyverilog.vparser.lexer import VerilogLexer
    from pyverilog.vparser.parser import ParseError, VerilogParser

__all__ = ["ParseError", "read"]

Node = Any


class _Parser(VerilogParser):  # type: ignore[misc]
    """The package's parser, which would write files where it is started."""

    def __init__(self) -> None:
        self.lexer = VerilogLexer(error_func=self._lexer_error_func)
        self.lexer.build()
        self.tokens = self.lexer.tokens
        self.parser = yacc(
            module=self, debug=False, write_tables=False, tabmodule="none", errorlog=NullLogger()
        )


@cache
def _parser() -> _Parser:
    return _Parser()


def read(text: str) -> dict[str, RawModule]:
    _parser().lexer.reset_lineno()
    tree = _parser().parse(text)
    modules = [
        _Module(node).read() for node in tree.description.definitions if hasattr(node, "items")
    ]
    return {module.name: module for module in modules}


def _name(raw: str) -> str:
    return raw[1:] if raw[0] == "\\" else raw


def _kind(node: Node) -> str:
    return type(node).__name__


class _Module:
    def __init__(self, node: Node) -> None:
        self._node = node
        self._found = RawModule(_name(node.name))

    def read(self) -> RawModule:
        for port in self._node.portlist.ports:
            if _kind(port) == "Ioport":
                self._declare(port.first)
                self._found.ports.append(_name(port.first.name))
            else:
                self._found.ports.append(_name(port.name))
        items = self._node.items
        declarations = [node for item in items if _kind(item) == "Decl" for node in item.list]
        for node in declarations:
            self._declare(node)
        for node in [*declarations, *items]:
            if _kind(node) == "InstanceList":
                for instance in node.instances:
                    self._instance(instance)
            else:
                self._assign(node)
        return self._found

    def _declare(self, node: Node) -> None:
        kind = _kind(node).lower()
        if kind in ("assign", "parameter", "localparam"):
            return
        name = _name(node.name)
        limits = self._limits(node.width)
        known = self._found.ranges.setdefault(name, limits)
        assert known == limits, name
        if kind in ("input", "output", "inout"):
            self._found.directions[name] = kind
        if kind == "supply":
            bits = name_bits(name, limits)
            self._found.assigns.append((bits, ((str(node.value.value), None),) * len(bits), True))

    def _limits(self, width: Node) -> Range | None:
        return None if width is None else (self._integer(width.msb), self._integer(width.lsb))

    def _integer(self, node: Node) -> int:
        match _kind(node):
            case "IntConst":
                return int(node.value)
            case "Uminus":
                return -self._integer(node.right)
            case "Plus":
                return self._integer(node.left) + self._integer(node.right)
            case "Times":
                return self._integer(node.left) * self._integer(node.right)
            case "Minus":
                return self._integer(node.left) - self._integer(node.right)
        raise AssertionError(_kind(node))

    def _assign(self, node: Node) -> None:
        if _kind(node) == "Assign":
            left, _ = self._bits(node.left.var)
            right, sized = self._bits(node.right.var)
            self._found.assigns.append((left, right, sized))
        else:
            assert _kind(node) != "Always", "behaviour"

    def _instance(self, node: Node) -> None:
        connections = []
        for place, port in enumerate(node.portlist):
            pin = place if port.portname is None else _name(port.portname)
            if port.argname is None:
                connections.append(RawConnection(pin, None))
            else:
                connections.append(RawConnection(pin, *self._bits(port.argname)))
        name = _name(node.name) if node.name else None
        self._found.instances.append(RawInstance(_name(node.module), name, connections))

    def _bits(self, node: Node) -> tuple[tuple[Bit, ...], bool]:
        match _kind(node):
            case "Identifier":
                name = _name(node.name)
                return name_bits(name, self._found.ranges.get(name)), True
            case "Pointer":
                name, index = _name(node.var.name), self._integer(node.ptr)
                return part(name, self._range(name), index, index), True
            case "Partselect":
                name = _name(node.var.name)
                limits = self._range(name)
                return part(name, limits, self._integer(node.msb), self._integer(node.lsb)), True
            case "IntConst":
                size, quote, rest = str(node.value).rpartition("'")
                if not quote:
                    return number_bits(32, "d", rest), False
                rest = rest.lower().lstrip("s")
                return number_bits(int(size or 32), rest[0], rest[1:]), bool(size)
            case "Concat" | "LConcat":
                parts = [self._bits(item)[0] for item in node.list]
                return tuple(bit for bits in reversed(parts) for bit in bits), True
            case "Repeat":
                return self._bits(node.value)[0] * self._integer(node.times), True
        raise AssertionError(_kind(node))

    def _range(self, name: str) -> Range:
        limits = self._found.ranges[name]
        assert limits is not None
        return limits
