"""The same netlist through pyslang's parser: an independent reader, for tests only.

Only the syntax tree is its; meaning is given to it here, without a look at our reader.
"""

from typing import Any

from pyslang.syntax import SyntaxKind, SyntaxTree
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

Node = Any
_SUPPLIES = {"supply0": "0", "supply1": "1"}
_BASES = {"b": "b", "o": "o", "d": "d", "h": "h"}


def read(text: str) -> dict[str, RawModule]:
    tree = SyntaxTree.fromText(text)
    errors = [str(item.code) for item in tree.diagnostics if item.isError()]
    assert not errors, errors
    root = tree.root
    members = root.members if _is(root, "CompilationUnit") else [root]
    modules = [_Module(item).read() for item in members if _is(item, "ModuleDeclaration")]
    return {module.name: module for module in modules}


def accepts(text: str) -> bool:
    return not any(item.isError() for item in SyntaxTree.fromText(text).diagnostics)


def _is(node: Node, kind: str) -> bool:
    return bool(node.kind == getattr(SyntaxKind, kind))


def _kind(node: Node) -> str:
    return str(node.kind).rpartition(".")[2]


def _nodes(items: Node) -> list[Node]:
    return [item for item in items if type(item).__name__ != "Token"]


def _words(node: Node) -> list[str]:
    if type(node).__name__ == "Token":
        return [node.valueText]
    return [word for item in node for word in _words(item)]


class _Module:
    def __init__(self, node: Node) -> None:
        self._node = node
        self._found = RawModule(node.header.name.valueText)
        self._waiting: list[tuple[Node, Node]] = []

    def read(self) -> RawModule:
        self._header(self._node.header.ports)
        instances = []
        for member in self._node.members:
            match _kind(member):
                case "PortDeclaration":
                    self._port(member.header, member.declarators)
                case "NetDeclaration":
                    self._net(member)
                case "HierarchyInstantiation" | "PrimitiveInstantiation":
                    instances.append(member)
                case "ContinuousAssign":
                    self._waiting += [
                        (item.left, item.right) for item in _nodes(member.assignments)
                    ]
                case "ParameterDeclarationStatement" | "EmptyMember":
                    pass
                case other:
                    raise AssertionError(other)
        for member in instances:
            self._instances(member)
        for left, right in self._waiting:
            target, _ = self._bits(left)
            source, sized = self._bits(right)
            self._found.assigns.append((target, source, sized))
        return self._found

    def _header(self, ports: Node) -> None:
        if ports is None:
            return
        if _is(ports, "AnsiPortList"):
            header: Node = None
            for item in _nodes(ports.ports):
                name = item.declarator.name.valueText
                words = _words(item.header)
                if any(word in ("input", "output", "inout") for word in words):
                    header = item.header
                self._found.ports.append(name)
                self._port(header, [item.declarator])
            return
        for item in _nodes(ports.ports):
            inner = item.expr.name.valueText
            self._found.ports.append(inner)
            if _is(item, "ExplicitNonAnsiPort"):
                self._found.outer[inner] = item.name.valueText

    def _port(self, header: Node, declarators: Node) -> None:
        direction = next(word for word in _words(header) if word in ("input", "output", "inout"))
        for item in _nodes(declarators):
            name = item.name.valueText
            self._found.directions[name] = direction
            self._declare(name, self._range(header.dataType))

    def _net(self, member: Node) -> None:
        supply = _SUPPLIES.get(member.netType.valueText)
        limits = self._range(member.type)
        for item in _nodes(member.declarators):
            name = item.name.valueText
            self._declare(name, limits)
            bits = name_bits(name, limits)
            if supply:
                self._found.assigns.append((bits, ((supply, None),) * len(bits), True))
            if item.initializer is not None:
                self._waiting.append((item.name.valueText, item.initializer.expr))

    def _declare(self, name: str, limits: Range | None) -> None:
        known = self._found.ranges.setdefault(name, limits)
        assert known == limits, name

    def _range(self, data_type: Node) -> Range | None:
        dimensions = _nodes(data_type.dimensions)
        if not dimensions:
            return None
        select = dimensions[0].specifier.selector
        return self._integer(select.left), self._integer(select.right)

    def _integer(self, node: Node) -> int:
        match _kind(node):
            case "IntegerLiteralExpression":
                return int(node.literal.valueText.replace("_", ""))
            case "UnaryPlusExpression":
                return self._integer(node.operand)
            case "UnaryMinusExpression":
                return -self._integer(node.operand)
            case "AddExpression":
                return self._integer(node.left) + self._integer(node.right)
            case "MultiplyExpression":
                return self._integer(node.left) * self._integer(node.right)
            case "SubtractExpression":
                return self._integer(node.left) - self._integer(node.right)
        raise AssertionError(_kind(node))

    def _instances(self, member: Node) -> None:
        cell = member.type.valueText
        for item in _nodes(member.instances):
            name = item.decl.name.valueText if item.decl is not None else None
            connections = [
                self._connection(place, node) for place, node in enumerate(_nodes(item.connections))
            ]
            if len(connections) == 1 and connections[0].pin == 0 and connections[0].bits is None:
                connections = []
            self._found.instances.append(RawInstance(cell, name or None, connections))

    def _connection(self, place: int, node: Node) -> RawConnection:
        match _kind(node):
            case "EmptyPortConnection":
                return RawConnection(place, None)
            case "OrderedPortConnection":
                return RawConnection(place, *self._bits(node.expr))
            case "NamedPortConnection":
                pin = node.name.valueText
                if node.expr is None:
                    return RawConnection(pin, None)
                return RawConnection(pin, *self._bits(node.expr))
        raise AssertionError(_kind(node))

    def _bits(self, node: Node) -> tuple[tuple[Bit, ...], bool]:
        if isinstance(node, str):
            return name_bits(node, self._found.ranges.get(node)), True
        match _kind(node):
            case "SimplePropertyExpr" | "SimpleSequenceExpr":
                return self._bits(node.expr)
            case "ParenthesizedExpression":
                return self._bits(node.expression)
            case "IdentifierName":
                name = node.identifier.valueText
                return name_bits(name, self._found.ranges.get(name)), True
            case "IdentifierSelectName":
                return self._select(node), True
            case "IntegerLiteralExpression":
                return number_bits(32, "d", node.literal.valueText), False
            case "IntegerVectorExpression":
                base = node.base.rawText.strip("'").lower().lstrip("s")
                width = int(str(node.size.valueText)) if node.size.rawText else 32
                return number_bits(width, _BASES[base], node.value.rawText), bool(node.size.rawText)
            case "ConcatenationExpression":
                parts = [self._bits(item)[0] for item in _nodes(node.expressions)]
                return tuple(bit for bits in reversed(parts) for bit in bits), True
            case "MultipleConcatenationExpression":
                return self._bits(node.concatenation)[0] * self._integer(node.expression), True
        raise AssertionError(_kind(node))

    def _select(self, node: Node) -> tuple[Bit, ...]:
        name = node.identifier.valueText
        limits = self._found.ranges[name]
        assert limits is not None
        [item] = _nodes(node.selectors)
        selector = item.selector
        if _is(selector, "BitSelect"):
            index = self._integer(selector.expr)
            return part(name, limits, index, index)
        first, second = self._integer(selector.left), self._integer(selector.right)
        if _is(selector, "SimpleRangeSelect"):
            return part(name, limits, first, second)
        last = first + second - 1 if _is(selector, "AscendingRangeSelect") else first - second + 1
        low, high = min(first, last), max(first, last)
        return (
            part(name, limits, high, low)
            if limits[0] >= limits[1]
            else part(name, limits, low, high)
        )
