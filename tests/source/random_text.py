"""Random netlists that use every feature of the subset, as Hypothesis draws them."""

from dataclasses import dataclass, field

from hypothesis import strategies as st

WORDS = ["a", "clk", "n1", "n_2", "u$3", "Q", "_9_", "data", "logic", "x"]
ODD = ["\\n[3] ", "\\a.b ", "\\(; ", "\\,) ", "\\// ", "\\$x\t", "\\b \n", "\\end ", "\\-{} "]
CELLS = ["INV", "NAND2_X1", "\\cell! ", "RAM"]
PINS = ["A", "B1", "Q", "\\P[0] ", "CK", "Z_N"]
GATES = ["and", "nand", "or", "nor", "xor", "xnor", "buf", "not", "bufif1", "notif0", "pullup"]
GAPS = ["", " ", "\n  ", "\t", " /* ; ) */ ", " // .A(x);\n", "\r\n"]
BEFORE = ["", " ", "\n", "(* keep *) ", '(* src = "a;b.v:1", w = 3 *)\n', "// (* no *)\n", "/**/"]

Range = tuple[int, int] | None


@dataclass
class Scope:
    """Nets of the module being written: spelling in text and range."""

    nets: dict[str, Range] = field(default_factory=dict)
    ports: list[tuple[str, str, Range]] = field(default_factory=list)


gap = st.sampled_from(GAPS)
limits = st.one_of(st.none(), st.tuples(st.integers(-2, 6), st.integers(-2, 6)))


def width(shape: Range) -> int:
    return 1 if shape is None else abs(shape[0] - shape[1]) + 1


def ranged(shape: Range) -> str:
    return "" if shape is None else f"[{shape[0]}:{shape[1]}] "


@st.composite
def names(draw: st.DrawFn, count: int) -> list[str]:
    simple = st.builds(lambda word, n: f"{word}{n}", st.sampled_from(WORDS), st.integers(0, 99))
    odd = st.builds(
        lambda word, n: f"{word[0]}{n}{word[1:]}", st.sampled_from(ODD), st.integers(0, 99)
    )
    return draw(
        st.lists(
            st.one_of(simple, odd), min_size=count, max_size=count, unique_by=lambda n: n.strip()
        )
    )


@st.composite
def constant(draw: st.DrawFn, bits: int) -> str:
    digits = draw(st.text("01xz", min_size=1, max_size=bits))
    sign = draw(st.sampled_from(["", "s", "S"]))
    return draw(
        st.sampled_from(
            [
                f"{bits}'{sign}b{digits}",
                f"{bits}'{sign}h{draw(st.text('0123456789abcdefABCDEFxz_', max_size=2))}1",
                f"{bits} 'd {draw(st.integers(0, 2**bits - 1))}",
                f"{bits}'o{draw(st.integers(0, 7))}",
            ]
        )
    )


@st.composite
def select(draw: st.DrawFn, scope: Scope) -> tuple[str, int]:
    name = draw(st.sampled_from(sorted(scope.nets)))
    shape = scope.nets[name]
    if shape is None or draw(st.booleans()):
        return name, width(shape)
    low, high = sorted(shape)
    first, last = sorted((draw(st.integers(low, high)), draw(st.integers(low, high))))
    size = last - first + 1
    is_down = shape[0] >= shape[1]
    texts = [
        f"{name}[{last}:{first}]" if is_down else f"{name}[{first}:{last}]",
        f"{name} [ {first} +: {size} ]",
        f"{name}[{last}-:{size}]",
    ]
    if size == 1:
        texts += [f"{name}[{first}]", f"{name}[ {first} ]"]
    return draw(st.sampled_from(texts)), size


@st.composite
def expression(draw: st.DrawFn, scope: Scope, depth: int = 2) -> tuple[str, int]:
    kind = draw(st.integers(0, 9))
    if kind == 0:
        bits = draw(st.integers(1, 9))
        return draw(constant(bits)), bits
    if kind == 1 and depth:
        parts = draw(st.lists(expression(scope, depth - 1), min_size=1, max_size=3))
        text = f",{draw(gap)}".join(part for part, _ in parts)
        return f"{{{draw(gap)}{text} }}", sum(bits for _, bits in parts)
    if kind == 2 and depth:
        inner, bits = draw(expression(scope, depth - 1))
        times = draw(st.integers(1, 3))
        return f"{{{times}{{{inner}}}}}", times * bits
    if kind == 3 and depth:
        inner, bits = draw(expression(scope, 0))
        return f"({inner})", bits
    return draw(select(scope))


@st.composite
def instance(draw: st.DrawFn, scope: Scope, name: str) -> str:
    cell = draw(st.sampled_from(CELLS))
    by_name = draw(st.booleans())
    pins = draw(st.lists(st.sampled_from(PINS), max_size=4, unique=True))
    texts = [draw(expression(scope))[0] if draw(st.integers(0, 5)) else "" for _ in pins]
    if by_name:
        joined = f"{draw(gap)},{draw(gap)}".join(
            f".{draw(gap)}{pin}{draw(gap)}({draw(gap)}{text}{draw(gap)})"
            for pin, text in zip(pins, texts, strict=True)
        )
    else:
        if texts and not any(text.strip() for text in texts):
            texts = []
        joined = f"{draw(gap)},{draw(gap)}".join(texts)
    parameters = draw(st.sampled_from(["", "", "", "#(4)", '#(.P("a;)"), .Q(3\'d1)) ', "#7 "]))
    return f"{cell} {parameters}{draw(gap)}{name}{draw(gap)}({draw(gap)}{joined}{draw(gap)})"


@st.composite
def gate(draw: st.DrawFn, scope: Scope, name: str) -> str:
    kind = draw(st.sampled_from(GATES))
    terms = draw(st.lists(select(scope), min_size=2, max_size=4))
    if kind == "pullup":
        terms = terms[:1]
        strength = draw(st.sampled_from(["", "(pull1) ", "(pull1, pull0) "]))
        delay = ""
    else:
        strength = draw(st.sampled_from(["", "", "(strong0, weak1) "]))
        delay = draw(st.sampled_from(["", "", "#1 ", "#(1, 2:3:4) "]))
    shown = draw(st.sampled_from(["", name]))
    return f"{kind} {strength}{delay}{shown} ({', '.join(text for text, _ in terms)})"


@st.composite
def child(draw: st.DrawFn, scope: Scope, name: str, inner: tuple[str, Scope]) -> str:
    """An instance of a module of the netlist, all widths right."""
    module, shape = inner
    texts = []
    for _, _, limits_of in shape.ports:
        bits = width(limits_of)
        fitting = [net for net, own in sorted(scope.nets.items()) if width(own) == bits]
        texts.append(draw(st.sampled_from([*fitting, f"{bits}'b0", "", "0"])))
    if draw(st.booleans()):
        pairs = list(zip((port[0] for port in shape.ports), texts, strict=True))
        pairs = draw(st.permutations(pairs))[: draw(st.integers(0, len(pairs)))]
        return f"{module} {name} (" + ", ".join(f".{port} ({text})" for port, text in pairs) + ")"
    kept = texts[: draw(st.integers(1, len(texts)))] if texts else []
    if len(kept) == 1 and not kept[0]:
        kept = []
    return f"{module} {name} ({', '.join(kept)})"


@st.composite
def module(draw: st.DrawFn, name: str, inner: list[tuple[str, Scope]]) -> tuple[str, Scope]:
    scope = Scope()
    spelled = draw(names(draw(st.integers(4, 9))))
    count = draw(st.integers(0, 3))
    for port in spelled[:count]:
        direction = draw(st.sampled_from(["input", "output", "inout"]))
        scope.ports.append((port, direction, draw(limits)))
        scope.nets[port] = scope.ports[-1][2]
    is_ansi = draw(st.booleans())
    lines = []
    if is_ansi:
        listed = ", ".join(f"{way} {ranged(shape)}{port}" for port, way, shape in scope.ports)
    else:
        listed = f"{draw(gap)}, ".join(port for port, _, _ in scope.ports)
        for port, way, shape in scope.ports:
            lines.append(f"{way} {ranged(shape)}{port};")
            if draw(st.booleans()):
                lines.append(f"wire {ranged(shape)}{port};")
    wires = spelled[count:]
    for wire in wires:
        shape = draw(limits)
        kind = draw(st.sampled_from(["wire", "wire", "wire", "tri", "wand", "supply0", "wor"]))
        scope.nets[wire] = shape
        lines.append(f"{kind} {ranged(shape)}{wire};")
    lines += draw(body(scope, inner))
    text = "".join(f"{draw(st.sampled_from(BEFORE))}{line}\n" for line in lines)
    head = f"module {name} ({listed})" if scope.ports or draw(st.booleans()) else f"module {name}"
    return f"{head};\n{text}endmodule\n", scope


@st.composite
def body(draw: st.DrawFn, scope: Scope, inner: list[tuple[str, Scope]]) -> list[str]:
    lines = []
    for number in range(draw(st.integers(0, 6))):
        name = draw(st.sampled_from([f"u{number}", f"\\u.{number}[0] ", f"\\u;{number}) "]))
        kind = draw(st.integers(0, 9))
        if kind < 5:
            text = draw(instance(scope, name))
            more = draw(instance(scope, f"v{number}")).partition(f"v{number}")
            is_row = text.startswith(more[0].split("#")[0].split(" ")[0] + " ") and "#" not in (
                more[0] + text.partition(name)[0]
            )
            lines.append(f"{text}, {more[1]}{more[2]};" if is_row else f"{text};")
        elif kind == 5:
            lines.append(f"{draw(gate(scope, name))};")
        elif kind < 8 and inner:
            lines.append(f"{draw(child(scope, name, draw(st.sampled_from(inner))))};")
        else:
            left, bits = draw(select(scope))
            right = draw(st.sampled_from([f"{bits}'b0", "1", left]))
            lines.append(f"assign{draw(gap)} {left}{draw(gap)}={draw(gap)}{right};")
    return lines


@st.composite
def netlist(draw: st.DrawFn) -> str:
    inner: list[tuple[str, Scope]] = []
    texts = []
    for number in range(draw(st.integers(1, 3))):
        text, scope = draw(module(f"m{number}", list(inner)))
        inner.append((f"m{number}", scope))
        texts.append(text)
    return "".join(draw(st.permutations(texts)))
