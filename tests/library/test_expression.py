import pytest
from hypothesis import given
from hypothesis import strategies as st

from insertdft.library.expression import (
    And,
    Const,
    Expression,
    ExpressionError,
    Not,
    Or,
    Var,
    Xor,
    evaluate,
    parse_expression,
    substitute,
    truth_table,
    variables,
)
from insertdft.library.functions import (
    cofactor,
    from_table,
    literal,
    pruned,
    same,
    satisfiable,
    support,
    within,
)

A, B, C = Var("A"), Var("B"), Var("C")
NAMES = ("A", "B", "C", "D")


@pytest.mark.parametrize(
    ("written", "meant"),
    [
        ("A", A),
        ("!A", Not(A)),
        ("A'", Not(A)),
        ("A''", A),
        ("(A B)'", Not(And((A, B)))),
        ("A ' + B", Or((Not(A), B))),
        ("A'B", And((Not(A), B))),
        ("A*B+C", Or((And((A, B)), C))),
        ("A & B | C", Or((And((A, B)), C))),
        ("A B C", And((A, B, C))),
        # XOR binds tighter than AND, unlike in Verilog.
        ("A & B ^ C", And((A, Xor((B, C))))),
        ("A ^ B & C", And((Xor((A, B)), C))),
        ("!A ^ B", Xor((Not(A), B))),
        ("1", Const(True)),
        ("0", Const(False)),
        ("D[0] + D[1]", Or((Var("D[0]"), Var("D[1]")))),
        ('"1A" B', And((Var("1A"), B))),
        (" ( A )\n * B", And((A, B))),
    ],
)
def test_expression_is_read_with_the_precedence_of_liberty(written: str, meant: Expression) -> None:
    assert parse_expression(written) == meant


@pytest.mark.parametrize(
    "written", ["", "  ", "A +", "(A", "A)", "+ A", "A ! ", "A # B", "A ^", "'"]
)
def test_text_that_is_no_expression_is_refused(written: str) -> None:
    with pytest.raises(ExpressionError):
        parse_expression(written)


def expressions() -> st.SearchStrategy[Expression]:
    def grow(inner: st.SearchStrategy[Expression]) -> st.SearchStrategy[Expression]:
        parts = st.lists(inner, min_size=2, max_size=3).map(tuple)
        return st.one_of(
            st.builds(Not, inner),
            st.builds(And, parts),
            st.builds(Or, parts),
            st.builds(Xor, parts),
        )

    leaves = st.one_of(st.sampled_from(NAMES).map(Var), st.booleans().map(Const))
    return st.recursive(leaves, grow, max_leaves=8)


def in_python(expression: Expression) -> str:
    match expression:
        case Const(value):
            return str(value)
        case Var(name):
            return name
        case Not(part):
            return f"(not {in_python(part)})"
        case And(parts):
            return "(" + " and ".join(map(in_python, parts)) + ")"
        case Or(parts):
            return "(" + " or ".join(map(in_python, parts)) + ")"
        case Xor(parts):
            return (
                "(bool(" + ") != bool(".join(map(in_python, parts[:2])) + "))"
                if len(parts) == 2
                else f"(bool({in_python(Xor(parts[:2]))}) != bool({in_python(parts[2])}))"
            )


def in_liberty(expression: Expression) -> str:
    match expression:
        case Const(value):
            return str(int(value))
        case Var(name):
            return name
        case Not(part):
            return f"(!({in_liberty(part)}))"
        case And(parts):
            return "(" + " & ".join(map(in_liberty, parts)) + ")"
        case Or(parts):
            return "(" + " + ".join(map(in_liberty, parts)) + ")"
        case Xor(parts):
            return "(" + "^".join(map(in_liberty, parts)) + ")"


def patterns() -> list[dict[str, bool]]:
    return [{n: bool(p >> i & 1) for i, n in enumerate(NAMES)} for p in range(16)]


@given(expressions())
def test_truth_table_is_what_python_computes(expression: Expression) -> None:
    table = truth_table(expression, NAMES)

    for number, values in enumerate(patterns()):
        wanted = eval(in_python(expression), {}, values)  # noqa: S307
        assert bool(table >> number & 1) == bool(wanted)


@given(expressions())
def test_written_expression_reads_back_as_the_same_function(expression: Expression) -> None:
    assert same(parse_expression(in_liberty(expression)), expression)


@given(expressions(), st.sampled_from(NAMES), expressions())
def test_substitution_is_composition(outer: Expression, name: str, inner: Expression) -> None:
    found = substitute(outer, {name: inner})

    for values in patterns():
        words = {key: int(value) for key, value in values.items()}
        put_in = {**words, name: evaluate(inner, words, 1)}
        assert evaluate(found, words, 1) == evaluate(outer, put_in, 1)


@given(expressions())
def test_support_is_what_a_change_can_be_seen_of(expression: Expression) -> None:
    table = truth_table(expression, NAMES)
    seen = {
        name
        for i, name in enumerate(NAMES)
        if any((table >> p & 1) != (table >> (p ^ 1 << i) & 1) for p in range(16))
    }

    assert set(support(expression)) == seen
    assert set(variables(pruned(expression))) == seen
    assert truth_table(pruned(expression), NAMES) == table


@given(expressions(), st.sampled_from(NAMES), st.sampled_from((0, 1)))
def test_cofactor_holds_one_variable(expression: Expression, name: str, value: int) -> None:
    held = cofactor(expression, name, value)

    assert name not in variables(held)
    for values in patterns():
        words = {key: int(item) for key, item in values.items()} | {name: value}
        assert evaluate(held, words, 1) == evaluate(expression, words, 1)


@given(st.integers(0, 2**16 - 1), st.integers(0, 2**16 - 1))
def test_expression_of_a_table_has_that_table_where_it_matters(table: int, care: int) -> None:
    found = from_table(table, NAMES, care)

    assert (truth_table(found, NAMES) ^ table) & care == 0
    assert truth_table(from_table(table, NAMES), NAMES) == table


@given(expressions(), expressions())
def test_function_within_a_condition_equals_it_there(
    function: Expression, condition: Expression
) -> None:
    found = within(function, condition)

    held = truth_table(condition, NAMES)
    assert (truth_table(found, NAMES) ^ truth_table(function, NAMES)) & held == 0


@pytest.mark.parametrize(
    ("written", "found"),
    [
        ("A", ("A", False)),
        ("A' + A' B", ("A", True)),
        ("A B + A B'", ("A", False)),
        ("A B", None),
        ("A + A'", None),
    ],
)
def test_literal_is_recognised_in_any_writing(written: str, found: tuple[str, bool] | None) -> None:
    assert literal(parse_expression(written)) == found


def test_conditions_that_exclude_each_other_are_never_true_together() -> None:
    clear, preset = parse_expression("R'"), parse_expression("S' R")

    assert not satisfiable([clear, preset])
    assert satisfiable([clear, parse_expression("S'")])
