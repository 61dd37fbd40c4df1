"""Operator means m(x,y) with their partial derivatives and divided differences (method, sections 3 and 5)."""

import numpy as np

SERIES_RADIUS = 0.05  # |log(x/y)| below which the power series replace the quotients
QUADRATURE_RATIO = 2.0  # ratio x/z within which a divided difference is a Gauss-Legendre integral of the derivative
NODES, WEIGHTS = np.polynomial.legendre.leggauss(16)
NODES, WEIGHTS = (NODES + 1) / 2, WEIGHTS / 2


def logarithmic(x, y):
    """Lambda(x,y) = (x-y)/(log x - log y) = sqrt(xy) sinh(h)/h with h = log(x/y)/2."""
    h = 0.5 * (np.log(x) - np.log(y))
    small = np.abs(h) < SERIES_RADIUS
    safe = np.where(small, 1.0, h)
    series = 1 + h**2 / 6 * (1 + h**2 / 20 * (1 + h**2 / 42 * (1 + h**2 / 72)))
    return np.sqrt(x * y) * np.where(small, series, np.sinh(safe) / safe)


def phi2(z):
    """(e^z - 1 - z)/z^2."""
    small = np.abs(z) < 0.5
    safe = np.where(small, 1.0, z)
    series = 1.0
    for k in range(17, 2, -1):
        series = 1 + series * np.where(small, z, 0.0) / k
    return np.where(small, series / 2, (np.expm1(safe) - safe) / safe**2)


def logarithmic_first(x, y):
    """d Lambda/dx = phi2(-log(x/y))."""
    return phi2(np.log(y) - np.log(x))


def geometric(x, y):
    return np.sqrt(x * y)


def harmonic(x, y):
    return 2 * x * y / (x + y)


# name -> (m, dm/dx, dm/dy)
MEANS = {
    "logarithmic": (logarithmic, logarithmic_first, lambda x, y: logarithmic_first(y, x)),
    "arithmetic": (lambda x, y: (x + y) / 2, lambda x, y: 0.5 + 0 * (x + y), lambda x, y: 0.5 + 0 * (x + y)),
    "geometric": (geometric, lambda x, y: 0.5 * np.sqrt(y / x), lambda x, y: 0.5 * np.sqrt(x / y)),
    "harmonic": (harmonic, lambda x, y: 2 * (y / (x + y)) ** 2, lambda x, y: 2 * (x / (x + y)) ** 2),
    "left": (lambda x, y: x + 0 * y, lambda x, y: 1 + 0 * (x + y), lambda x, y: 0 * (x + y)),
    "right": (lambda x, y: y + 0 * x, lambda x, y: 0 * (x + y), lambda x, y: 1 + 0 * (x + y)),
}


def divided_difference_first(mean, x, z, y):
    """(m(x,y) - m(z,y))/(x - z), the derivative dm/dx where x = z; arrays broadcast."""
    m, first, _ = MEANS[mean]
    return _divided(lambda s: m(s, y), lambda s: first(s, y), x, z)


def divided_difference_second(mean, x, y, z):
    """(m(x,y) - m(x,z))/(y - z), the derivative dm/dy where y = z; arrays broadcast."""
    m, _, second = MEANS[mean]
    return _divided(lambda s: m(x, s), lambda s: second(x, s), y, z)


def _divided(f, derivative, u, v):
    u, v = np.broadcast_arrays(u, v)
    near = np.maximum(u, v) <= QUADRATURE_RATIO * np.minimum(u, v)
    direct = (f(u) - f(v)) / np.where(near, 1.0, u - v)
    integral = sum(w * derivative(v + s * (u - v)) for s, w in zip(NODES, WEIGHTS))
    return np.where(near, integral, direct)
