"""Reference values of Wigner symbols with large arguments; writes wigner_large.csv.

SymPy evaluates the symbols exactly (sign * rational * square root of a rational); the decimals are
rounded once. Arguments are drawn evenly from those that obey the selection rules.
"""
import random
import sys

import sympy
from sympy import Rational
from sympy.physics.wigner import wigner_3j, wigner_6j, wigner_9j

draw = random.Random(20261201)


def third(a, b, largest):
    low, high = abs(a - b), min(a + b, largest - ((largest ^ a ^ b) & 1))
    return None if high < low else low + 2 * draw.randrange((high - low) // 2 + 1)


def three_j(largest):
    while True:
        a, b = draw.randint(0, largest), draw.randint(0, largest)
        c = third(a, b, largest)
        if c is None:
            continue
        ma, mb = draw.randrange(-a, a + 1, 2), draw.randrange(-b, b + 1, 2)
        if abs(ma + mb) <= c:
            return a, b, c, ma, mb, -ma - mb


def triangle(a, b, c):
    return (a + b + c) % 2 == 0 and abs(a - b) <= c <= a + b


def six_j(largest):
    while True:
        a, b, d = (draw.randint(0, largest) for _ in range(3))
        c = third(a, b, largest)
        e = None if c is None else third(d, c, largest)
        f = None if e is None else third(a, e, largest)
        if f is not None and triangle(d, b, f):
            return a, b, c, d, e, f


def nine_j(largest):
    while True:
        a, b, d, e = (draw.randint(0, largest) for _ in range(4))
        c, f, g, h = third(a, b, largest), third(d, e, largest), third(a, d, largest), third(b, e, largest)
        if None in (c, f, g, h):
            continue
        i = third(g, h, largest)
        if i is not None and triangle(c, f, i):
            return a, b, c, d, e, f, g, h, i


rows = [("3j", three_j(n)) for n, count in ((60, 20), (200, 40), (400, 40), (1000, 15)) for _ in range(count)]
rows += [("3j", r) for r in ((400, 400, 400, 0, 0, 0), (400, 400, 398, 0, 0, 0), (1000, 1000, 1000, 2, 0, -2),
                             (200, 200, 400, 0, 0, 0), (399, 400, 401, 1, 0, -1), (1000, 1000, 2, 1000, -998, -2))]
rows += [("6j", six_j(n)) for n, count in ((60, 20), (200, 40), (400, 40), (1000, 15)) for _ in range(count)]
rows += [("6j", r) for r in ((400, 400, 400, 400, 400, 400), (1000, 1000, 1000, 1000, 1000, 1000),
                             (400, 400, 2, 400, 400, 400), (399, 400, 401, 399, 400, 401))]
rows += [("9j", nine_j(n)) for n, count in ((20, 20), (60, 10)) for _ in range(count)]
functions = {"3j": wigner_3j, "6j": wigner_6j, "9j": wigner_9j}

with open("wigner_large.csv", "w") as out:
    out.write(f"# Wigner symbols with large arguments from SymPy {sympy.__version__} by wigner_large.py;"
              " args = doubled angular momenta in reading order; value = 30 digits.\n")
    out.write("kind,doubled_args,value\n")
    for kind, args in rows:
        value = functions[kind](*[Rational(x, 2) for x in args])
        digits = "0" if value == 0 else str(sympy.N(value, 30))
        out.write(f"{kind},{' '.join(map(str, args))},{digits}\n")
        out.flush()
