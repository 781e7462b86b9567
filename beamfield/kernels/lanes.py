"""Rows of LANES numbers, handled as one vector: the inner loops of the far field.

Arrays are flat; a row begins at an index that is a multiple of LANES. Each operation is written twice: as a loop, which says
what it does and runs where nothing is compiled, and as vector instructions. The compiler does not make the second from the
first, as it has to allow for rows that overlap. Both are strict IEEE arithmetic, so the width of a vector does not show in
the bits.
"""

from functools import wraps

from llvmlite import ir
from numba.core import types
from numba.extending import lower_builtin, type_callable

LANES = 16
_ROW = ir.VectorType(ir.DoubleType(), LANES)
_COUNT = ir.IntType(32)


def _vectors(loop, result=types.void):
    """Decorator: what the loop does, as vector instructions, emit(builder, the arguments of the loop)."""

    def decorate(emit):
        @type_callable(loop)
        def typed(context):
            return wraps(loop)(lambda *kinds: result)

        @lower_builtin(loop, types.VarArg(types.Any))
        def lowered(context, builder, signature, values):
            given = (_argument(context, builder, *pair) for pair in zip(signature.args, values, strict=True))
            value = emit(builder, *given)
            return context.get_dummy_value() if result is types.void else value

        return emit

    return decorate


def _argument(context, builder, kind, value):
    return (
        _Rows(builder, context.make_array(kind)(context, builder, value).data)
        if isinstance(kind, types.Array)
        else value
    )


class _Rows:
    """An array as the rows that begin at given indices."""

    def __init__(self, builder, data):
        self.builder, self.data = builder, data

    def _place(self, index):
        return self.builder.bitcast(self.builder.gep(self.data, [index]), _ROW.as_pointer())

    def __getitem__(self, index):
        return self.builder.load(self._place(index), align=8)

    def __setitem__(self, index, row):
        self.builder.store(row, self._place(index), align=8)


def _every_lane(builder, number):
    one = builder.insert_element(ir.Constant(_ROW, ir.Undefined), number, ir.Constant(_COUNT, 0))
    return builder.shuffle_vector(one, one, ir.Constant(ir.VectorType(_COUNT, LANES), [0] * LANES))


def add_products(out, o, d, d0, d1, d2, d3, m, m0, m1, m2, m3):
    """out[o] += d[d0] m[m0] + d[d1] m[m1] + d[d2] m[m2] + d[d3] m[m3]."""
    for k in range(LANES):
        left = d[d0 + k] * m[m0 + k] + d[d1 + k] * m[m1 + k]
        out[o + k] += left + (d[d2 + k] * m[m2 + k] + d[d3 + k] * m[m3 + k])


@_vectors(add_products)
def _(builder, out, o, d, d0, d1, d2, d3, m, m0, m1, m2, m3):
    pairs = [builder.fmul(d[i], m[j]) for i, j in ((d0, m0), (d1, m1), (d2, m2), (d3, m3))]
    left, right = builder.fadd(pairs[0], pairs[1]), builder.fadd(pairs[2], pairs[3])
    out[o] = builder.fadd(out[o], builder.fadd(left, right))


def add_product(out, o, x, a, d, i):
    """out[o] += x[a] d[i]."""
    for k in range(LANES):
        out[o + k] += x[a + k] * d[i + k]


@_vectors(add_product)
def _(builder, out, o, x, a, d, i):
    out[o] = builder.fadd(out[o], builder.fmul(x[a], d[i]))


def add_scaled(out, o, w, d, i):
    """out[o] += w d[i]."""
    for k in range(LANES):
        out[o + k] += w * d[i + k]


@_vectors(add_scaled)
def _(builder, out, o, w, d, i):
    out[o] = builder.fadd(out[o], builder.fmul(_every_lane(builder, w), d[i]))


def times(d, t, w, x, a, e, i):
    """d[t] = w x[a] e[i]."""
    for k in range(LANES):
        d[t + k] = w * (x[a + k] * e[i + k])


@_vectors(times)
def _(builder, d, t, w, x, a, e, i):
    d[t] = builder.fmul(_every_lane(builder, w), builder.fmul(x[a], e[i]))


def times_plus(d, t, x, a, i, w, j):
    """d[t] = x[a] d[i] + w d[j]."""
    for k in range(LANES):
        d[t + k] = x[a + k] * d[i + k] + w * d[j + k]


@_vectors(times_plus)
def _(builder, d, t, x, a, i, w, j):
    d[t] = builder.fadd(builder.fmul(x[a], d[i]), builder.fmul(_every_lane(builder, w), d[j]))


def scaled(d, t, w, x, i):
    """d[t] = w x[i]."""
    for k in range(LANES):
        d[t + k] = w * x[i + k]


@_vectors(scaled)
def _(builder, d, t, w, x, i):
    d[t] = builder.fmul(_every_lane(builder, w), x[i])


def minus_both(d, t, i, j):
    """d[t] = - d[i] - d[j]."""
    for k in range(LANES):
        d[t + k] = -d[i + k] - d[j + k]


@_vectors(minus_both)
def _(builder, d, t, i, j):
    d[t] = builder.fneg(builder.fadd(d[i], d[j]))


def minus_from(d, t, i):
    """d[t] -= d[i]."""
    for k in range(LANES):
        d[t + k] -= d[i + k]


@_vectors(minus_from)
def _(builder, d, t, i):
    d[t] = builder.fsub(d[t], d[i])


def row_sum(rows, at):
    """The sum of the numbers of rows[at], halves added until one is left."""
    row = list(rows[at : at + LANES])
    while len(row) > 1:
        row = [a + b for a, b in zip(row[: len(row) // 2], row[len(row) // 2 :], strict=True)]
    return row[0]


@_vectors(row_sum, types.float64)
def _(builder, rows, at):
    row, width = rows[at], LANES
    while width > 1:
        width //= 2
        low, high = (ir.Constant(ir.VectorType(_COUNT, width), list(range(i, i + width))) for i in (0, width))
        row = builder.fadd(builder.shuffle_vector(row, row, low), builder.shuffle_vector(row, row, high))
    return builder.extract_element(row, ir.Constant(_COUNT, 0))
