#!/usr/bin/env python3
"""Recomputes the polynomial coefficients of src/special.

Each polynomial is the Chebyshev interpolant of a function on an interval, cut where its
coefficients fall below the stated size and rewritten in powers of the variable. The cut
interpolant is within a factor of about 2 of the best polynomial of its degree. Run it with mpmath
1.2 or later: python3 special-coefficients.py. It prints, for each polynomial, the largest
relative error in exact arithmetic, the condition of the evaluation (sum of the moduli of the terms
over the modulus of the sum, at worst), and the coefficients from the constant term upwards.
"""
from mpmath import (
    atanh, cos, erf, erfc, euler, exp, expm1, findroot, log, loggamma, mp, mpf, nstr, pi, sqrt
)

mp.dps = 60


def interpolant(f, lower, upper, nodes):
    """Chebyshev coefficients of f on [lower, upper]."""
    middle, half = (lower + upper) / 2, (upper - lower) / 2
    angles = [pi * (2 * j + 1) / (2 * nodes) for j in range(nodes)]
    values = [f(middle + half * cos(angle)) for angle in angles]
    coefficients = [2 * sum(v * cos(k * angle) for v, angle in zip(values, angles)) / nodes for k in range(nodes)]
    coefficients[0] /= 2
    return coefficients


def powers(chebyshev, lower, upper):
    """The same polynomial in powers of t, where lower <= t <= upper."""
    middle, half = (lower + upper) / 2, (upper - lower) / 2
    step = [-middle / half, 1 / half]

    def times(p, q):
        product = [mpf(0)] * (len(p) + len(q) - 1)
        for i, a in enumerate(p):
            for j, b in enumerate(q):
                product[i + j] += a * b
        return product

    basis = [[mpf(1)], step]
    while len(basis) < len(chebyshev):
        doubled = [2 * c for c in times(step, basis[-1])]
        before = basis[-2] + [mpf(0)] * (len(doubled) - len(basis[-2]))
        basis.append([a - b for a, b in zip(doubled, before)])
    result = [mpf(0)] * len(chebyshev)
    for c, polynomial in zip(chebyshev, basis):
        for i, a in enumerate(polynomial):
            result[i] += c * a
    return result


def fit(name, f, lower, upper, degree):
    lower, upper = mpf(lower), mpf(upper)
    chebyshev = interpolant(f, lower, upper, degree + 12)
    coefficients = [mpf(float(c)) for c in powers(chebyshev[: degree + 1], lower, upper)]
    worst, condition, points = mpf(0), mpf(0), 400
    exact_coefficients = powers(chebyshev[: degree + 1], lower, upper)
    for i in range(points + 1):
        t = (lower + upper) / 2 + (upper - lower) / 2 * cos(pi * i / points)
        exact = f(t)
        value = sum(c * t**k for k, c in enumerate(exact_coefficients))
        worst = max(worst, abs(value / exact - 1))
        condition = max(condition, sum(abs(c * t**k) for k, c in enumerate(coefficients)) / abs(value))
    print(f"\n{name}: degree {degree} on [{nstr(lower, 6)}, {nstr(upper, 6)}],"
          f" relative error {nstr(worst, 2)}, condition {nstr(condition, 3)}")
    print("  " + ", ".join(repr(float(c)) for c in coefficients) + ",")


def remainder(x):
    return loggamma(x) - (x - mpf(1) / 2) * log(x) + x - log(2 * pi) / 2


def series(tail, exact, limit):
    """exact(t), but the power series tail(t) where the plain formula cancels."""
    return lambda t: tail(t) if abs(t) < limit else exact(t)


fit("log1pmx: S(q) = (atanh(r)/r - 1)/q, q = r^2",
    series(lambda q: sum(q**k / (2 * k + 3) for k in range(9)), lambda q: (atanh(sqrt(q)) / sqrt(q) - 1) / q, 1e-6),
    0, mpf(1) / 9, 9)
fit("expm1mx: (e^t - 1 - t)/t^2",
    series(lambda t: mpf(1) / 2 + t / 6 + t**2 / 24 + t**3 / 120, lambda t: (expm1(t) - t) / t**2, 1e-12),
    -1, 1, 13)
fit("stirlingRemainder, x >= 6: D(x) x in powers of 1/x^2",
    series(lambda z: mpf(1) / 12 - z / 360 + z**2 / 1260, lambda z: remainder(1 / sqrt(z)) / sqrt(z), 1e-7),
    0, mpf(1) / 36, 8)
c = mpf(0.3125)
fit("stirlingRemainder, 0.11 <= x <= 8: D(x) (12 x + 1/2) in powers of t = (x - 5/16)/(x + 5/16)",
    lambda t: remainder(c * (1 + t) / (1 - t)) * (12 * c * (1 + t) / (1 - t) + mpf(1) / 2),
    (mpf(0.11) - c) / (mpf(0.11) + c), (8 - c) / (8 + c), 32)


def between(t):
    z = t + mpf(3) / 4
    if z == 0:
        return +euler
    if z == 1:
        return 1 - euler
    return loggamma(1 + z) / (z * (z - 1))


fit("logGamma1p, 0 <= z <= 3/2: log Gamma(1 + z)/(z (z - 1)) in powers of z - 3/4", between, -0.75, 0.75, 25)
fit("erfcx, 0 <= x <= 12: exp(x^2) erfc(x) (1 + x) in powers of t = (x - 4)/(x + 4)",
    lambda t: (lambda x: exp(x * x) * erfc(x) * (1 + x))(4 * (1 + t) / (1 - t)),
    -1, mpf(1) / 2, 21)
fit("erfcx, x >= 12: exp(x^2) erfc(x) x sqrt(pi) in powers of 1/x^2",
    series(lambda z: 1 - z / 2 + 3 * z**2 / 4 - 15 * z**3 / 8, lambda z: exp(1 / z) * erfc(1 / sqrt(z)) * sqrt(pi / z), 1e-5),
    0, mpf(1) / 144, 7)
fit("erf: erf(x)/x in powers of x^2",
    series(lambda q: 2 / sqrt(pi), lambda q: erf(sqrt(q)) / sqrt(q), 1e-40),
    0, 0.25, 8)


def central(z):
    q = sqrt(z)
    if q < 1e-20:
        return sqrt(2 * pi)
    return findroot(lambda y: erf(y / sqrt(2)) / 2 - q, q * sqrt(2 * pi) * (1 + q * q)) / q


fit("normal quantile near the median: y/q in powers of q^2, where Phi(y) = 1/2 + q", central, 0, 0.09, 16)


def tail(w):
    s = 1 / w
    x = s * (1 - mpf(0.18))
    for _ in range(60):
        density = exp(-x * x / 2) / sqrt(2 * pi)
        probability = erfc(x / sqrt(2)) / 2
        step = (log(probability) + s * s / 2) * probability / density
        x += step
        if abs(step) < mpf(10) ** -40:
            return x / s
    raise ValueError(w)


fit("normal quantile in the tail (start value): -x/s in powers of 1/s, s = sqrt(-2 log Phi(x))", tail, 0.125, 0.56, 8)
