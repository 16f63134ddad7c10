"""Many patterns at once: 64 a machine word, one rail for two values, two rails for three.

Values are arrays of shape (rails, slots, words). With one rail a bit is the value. With two, rail 0
says "surely 1", rail 1 says "surely 0", and neither means unknown (never both).
"""

from collections.abc import Callable, Sequence
from functools import lru_cache
from typing import Final

import numpy as np
import numpy.typing as npt

from insertdft.library.expression import And, Const, Expression, Not, Or, Var, Xor

Words = npt.NDArray[np.uint64]
Flags = npt.NDArray[np.bool_]
#: Rails of a value: one or two arrays of equal shape.
Rails = tuple[Words, ...]

ONES: Final = np.uint64(0xFFFF_FFFF_FFFF_FFFF)
BITS: Final = 64

#: Takes the rails of every input and gives those of the output.
Step = Callable[[Sequence[Rails]], Rails]


@lru_cache(maxsize=4096)
def compiled(expression: Expression, rails: int) -> Step:
    """Return ``expression``, whose variables are ``"0"``, ``"1"``, ..., as a function on arrays.

    The function takes the rails of each variable in order and gives rails that share no memory
    with them unless the expression is a plain variable. A constant gives arrays shaped like those
    of variable 0, and needs one.
    """
    match expression:
        case Const(value):
            return _constant(value)
        case Var(name):
            return _variable(int(name))
        case Not(part):
            return _inverted(compiled(part, rails))
        case And(parts):
            return _joined([compiled(part, rails) for part in parts], np.bitwise_and, np.bitwise_or)
        case Or(parts):
            return _joined([compiled(part, rails) for part in parts], np.bitwise_or, np.bitwise_and)
        case Xor(parts):
            return _parity([compiled(part, rails) for part in parts])


def _constant(value: bool) -> Step:
    def step(inputs: Sequence[Rails]) -> Rails:
        like = inputs[0]
        return tuple(
            np.full_like(rail, ONES if value ^ bool(i) else 0) for i, rail in enumerate(like)
        )

    return step


def _variable(number: int) -> Step:
    def step(inputs: Sequence[Rails]) -> Rails:
        return inputs[number]

    return step


def _inverted(part: Step) -> Step:
    def step(inputs: Sequence[Rails]) -> Rails:
        return inverse(part(inputs))

    return step


def inverse(value: Rails) -> Rails:
    """Return the inverse of a value."""
    return (np.bitwise_not(value[0]),) if len(value) == 1 else value[::-1]


def _joined(parts: list[Step], on_ones: np.ufunc, on_zeros: np.ufunc) -> Step:
    def step(inputs: Sequence[Rails]) -> Rails:
        values = [part(inputs) for part in parts]
        found: list[Words] = []
        for rail in range(len(values[0])):
            join = on_zeros if rail else on_ones
            result: Words = join(values[0][rail], values[1][rail])
            for value in values[2:]:
                join(result, value[rail], out=result)
            found.append(result)
        return tuple(found)

    return step


def _parity(parts: list[Step]) -> Step:
    def step(inputs: Sequence[Rails]) -> Rails:
        result = parts[0](inputs)
        for part in parts[1:]:
            result = exclusive_or(result, part(inputs))
        return result

    return step


def exclusive_or(one: Rails, two: Rails) -> Rails:
    """Return the exclusive or of two values."""
    if len(one) == 1:
        return (one[0] ^ two[0],)
    return (one[0] & two[1]) | (one[1] & two[0]), (one[0] & two[0]) | (one[1] & two[1])


def differs(one: Rails, two: Rails) -> Words:
    """Return where both are known and unequal."""
    if len(one) == 1:
        return one[0] ^ two[0]
    return (one[0] & two[1]) | (one[1] & two[0])


def selected(choose: Words, one: Rails, other: Rails) -> Rails:
    """Return ``one`` where ``choose`` has a 1, elsewhere ``other``."""
    return tuple(b ^ ((a ^ b) & choose) for a, b in zip(one, other, strict=True))


def pack(bits: npt.NDArray[np.bool_]) -> Words:
    """Return patterns as words: shape (..., patterns) to (..., words), pattern p is bit p % 64.

    The last word is filled up with 0.
    """
    count = bits.shape[-1]
    words = -(-count // BITS)
    padded = np.zeros((*bits.shape[:-1], words * BITS), np.bool_)
    padded[..., :count] = bits
    return np.packbits(padded, axis=-1, bitorder="little").view("<u8").astype(np.uint64)


def unpack(words: Words, count: int) -> npt.NDArray[np.bool_]:
    """Return words as patterns: shape (..., words) to (..., count)."""
    data = np.ascontiguousarray(words).astype("<u8").view(np.uint8)
    return np.unpackbits(data, axis=-1, bitorder="little", count=count).astype(np.bool_)


_ONES_IN_BYTE: Final = np.array([value.bit_count() for value in range(256)], np.uint8)


def count_ones(words: Words) -> npt.NDArray[np.int64]:
    """Return the number of 1 bits over the last axis."""
    data = np.ascontiguousarray(words).view(np.uint8)
    found: npt.NDArray[np.int64] = _ONES_IN_BYTE[data].sum(axis=-1, dtype=np.int64)
    return found


def random_words(generator: np.random.Generator, shape: tuple[int, ...]) -> Words:
    """Return words of fair coin tosses."""
    return generator.integers(0, 2**64, size=shape, dtype=np.uint64, endpoint=False)
