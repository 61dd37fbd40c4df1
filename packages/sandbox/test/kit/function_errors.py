"""Errors of elementary functions in units of the last place, against decimal arithmetic of 80 digits.

Reads {name: [[argument, ..., value], ...]} of doubles from stdin and writes {name: [largest error, its arguments]}.
"""

import json
import math
import sys
from decimal import Decimal, getcontext

getcontext().prec = 80
ONE = Decimal(1)


def pi():
    """Machin's formula: pi = 16 arctan(1/5) - 4 arctan(1/239)."""

    def inverse_arctan(n):
        total = term = ONE / n
        k = 1
        while abs(term) > Decimal(10) ** -90:
            term = -term / (n * n)
            k += 2
            total += term / k
        return total

    return 16 * inverse_arctan(5) - 4 * inverse_arctan(239)


PI = pi()


def sine(x):
    x = x % (2 * PI)
    total = term = x
    k = 1
    while abs(term) > Decimal(10) ** -75:
        term = -term * x * x / ((k + 1) * (k + 2))
        k += 2
        total += term
    return total


def hyperbolic(x, sign):
    return (x.exp() + sign * (-x).exp()) / 2


FUNCTIONS = {
    "exp": lambda x: x.exp(),
    "expm1": lambda x: x.exp() - 1,
    "log": lambda x: x.ln(),
    "log1p": lambda x: (1 + x).ln(),
    "sin": sine,
    "cos": lambda x: sine(x + PI / 2),
    "sinh": lambda x: hyperbolic(x, -1),
    "cosh": lambda x: hyperbolic(x, 1),
    "tanh": lambda x: hyperbolic(x, -1) / hyperbolic(x, 1),
    "pow": lambda x, y: (y * x.ln()).exp(),
    "cosOfTurn": lambda k, n: sine(2 * PI * k / n + PI / 2),
    "sinOfTurn": lambda k, n: sine(2 * PI * k / n),
}


def error(name, arguments, value):
    exact = FUNCTIONS[name](*map(Decimal, arguments))
    return float(abs(Decimal(value) - exact) / Decimal(math.ulp(float(exact))))


def worst(name, rows):
    return max([error(name, row[:-1], row[-1]), row[:-1]] for row in rows)


json.dump({name: worst(name, rows) for name, rows in json.load(sys.stdin).items()}, sys.stdout)
