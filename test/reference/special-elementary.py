#!/usr/bin/env python3
"""Writes special-elementary.json: reference values for the elementary functions of src/special.

Rows are {fn, region, args, exact}: arguments as doubles, results with 36 digits. Everything comes from
mpmath (1.2 or later) with enough working digits that differences lose nothing; it shares no formula
with the library beyond the definitions. Run: python3 special-elementary.py
"""
import json
import os
import random
import math
from mpmath import (erf, erfc, euler, exp, expm1, findroot, isinf, log, log1p, loggamma, mp, mpf, nstr, pi, sqrt,
                    workdps)

random.seed(20240611)
mp.dps = 60
PER_REGION = 12
rows = []


def emit(fn, region, args, value):
    with workdps(60):
        rows.append({'fn': fn, 'region': region, 'args': args, 'exact': nstr(value, 36)})


def each(regions):
    for region, draw in regions:
        for _ in range(PER_REGION):
            yield region, draw()


def scale(a, b):
    return float(10 ** random.uniform(a, b))


def uniform(a, b):
    return random.uniform(a, b)


def sign():
    return random.choice([-1, 1])


def digits(*args):
    """Working digits that survive subtracting numbers as far apart as the arguments."""
    return 60 + int(2 * sum(abs(math.log10(abs(x))) for x in args if x))


def whole(a, b):
    return float(int(scale(a, b)))


# Helpers
for region, x in each([('|x| < 0.1', lambda: sign() * scale(-150, -1)), ('-1 .. -0.5', lambda: -1 + scale(-15, -0.31)),
                       ('-0.5 .. 0', lambda: uniform(-0.5, 0)), ('0 .. 1', lambda: uniform(0, 1)),
                       ('1 .. 10', lambda: uniform(1, 10)), ('x > 10', lambda: scale(1, 300))]):
    with workdps(digits(x, x)):
        emit('log1pmx', region, [x], log1p(mpf(x)) - mpf(x))
for region, x in each([('|x| < 0.1', lambda: sign() * scale(-150, -1)), ('-1 .. 0', lambda: uniform(-1, 0)),
                       ('0 .. 1', lambda: uniform(0, 1)), ('1 .. 709', lambda: scale(0, 2.85)),
                       ('x < -1', lambda: -scale(0, 300))]):
    with workdps(digits(x, x) if abs(x) < 1 else 60):
        emit('expm1mx', region, [x], expm1(mpf(x)) - mpf(x))
for region, x in each([('-0.1 .. 0', lambda: -scale(-300, -1)), ('-3 .. 0', lambda: -uniform(0, 3)),
                       ('x < -3', lambda: -uniform(3, 700))]):
    with workdps(60 + int(abs(x))):
        emit('log1mExp', region, [x], log(-expm1(mpf(x))))
pairs = [('|a|, |b| < 5', lambda: (uniform(-5, 5), uniform(-5, 5))),
         ('|a|, |b| < 800', lambda: (uniform(-800, 800), uniform(-800, 800))),
         ('a near b', lambda: (lambda a: (a, a + scale(-12, 0)))(uniform(-700, 700)))]
for region, (a, b) in each(pairs):
    a, b = max(a, b), min(a, b)
    with workdps(800):
        emit('logAddExp', region, [a, b], log(exp(mpf(a)) + exp(mpf(b))))
        emit('logSubExp', region, [a, b], log(exp(mpf(a)) - exp(mpf(b))))

# Gamma family
for region, x in each([('x < 0.1', lambda: scale(-300, -1)), ('0.1 .. 1', lambda: uniform(0.1, 1)),
                       ('near 1', lambda: 1 + sign() * scale(-15, -1)), ('1 .. 2', lambda: uniform(1, 2)),
                       ('near 2', lambda: 2 + sign() * scale(-15, -1)), ('2 .. 3', lambda: uniform(2, 3)),
                       ('3 .. 10', lambda: uniform(3, 10)), ('10 .. 1000', lambda: scale(1, 3)),
                       ('x > 1000', lambda: scale(3, 305))]):
    emit('logGamma', region, [x], loggamma(mpf(x)))
for region, x in each([('|x| < 0.1', lambda: sign() * scale(-300, -1)), ('-1 .. -0.5', lambda: -1 + scale(-15, -0.31)),
                       ('-0.5 .. 0', lambda: uniform(-0.5, 0)), ('0 .. 1', lambda: uniform(0, 1)),
                       ('near 1', lambda: 1 + sign() * scale(-15, -1)), ('1 .. 20', lambda: uniform(1, 20)),
                       ('x > 20', lambda: scale(1.3, 305))]):
    with workdps(digits(x) if abs(x) < 1 else 60):
        emit('logGamma1p', region, [x], loggamma(1 + mpf(x)) if abs(x) > 1e-40 else -euler * x + pi**2 / 12 * mpf(x)**2)


def remainder(x):
    return loggamma(x) - (x - mpf(1) / 2) * log(x) + x - log(2 * pi) / 2


for region, x in each([('x < 0.01', lambda: scale(-300, -2)), ('0.01 .. 0.125', lambda: uniform(0.01, 0.125)),
                       ('0.125 .. 1', lambda: uniform(0.125, 1)), ('1 .. 6', lambda: uniform(1, 6)),
                       ('6 .. 1000', lambda: scale(0.78, 3)), ('x > 1000', lambda: scale(3, 100))]):
    with workdps(digits(x, x) if x > 1 else 60):
        emit('stirlingRemainder', region, [x], remainder(mpf(x)))
ratios = [('x, a < 0.1', lambda: (scale(-100, -1), scale(-100, -1))), ('x < 0.1', lambda: (scale(-30, -1), scale(-3, 3))),
          ('0.1 .. 1', lambda: (uniform(0.1, 1), scale(-12, 0))), ('1 .. 10, small a', lambda: (uniform(1, 10), scale(-14, 0))),
          ('1 .. 10', lambda: (uniform(1, 10), uniform(0, 8))), ('1 .. 10, large a', lambda: (uniform(1, 10), scale(0, 12))),
          ('x > 10, small a', lambda: (scale(1, 15), scale(-15, 0))),
          ('x > 10', lambda: (lambda x: (x, x * scale(-3, 3)))(scale(1, 15))), ('huge', lambda: (scale(15, 60), scale(-15, 60))),
          ('a < 0, x < 10', lambda: (lambda x: (x, -x * uniform(0, 1)))(uniform(0.1, 10))),
          ('a < 0, small', lambda: (lambda x: (x, -x * scale(-14, -1)))(uniform(0.1, 50))),
          ('a < 0, x > 10', lambda: (lambda x: (x, -x * uniform(0, 1)))(scale(1, 12))),
          ('a near -x', lambda: (lambda x: (x, -x * (1 - scale(-7, -2))))(scale(0, 9)))]
for region, (x, a) in each(ratios):
    with workdps(digits(x, a)):
        ratio = loggamma(mpf(x) + mpf(a)) - loggamma(mpf(x))
        emit('logGammaRatio', region, [x, a], ratio)
        emit('logGammaRatioExcess', region, [x, a], ratio - mpf(a) * log(mpf(x)))
    with workdps(digits(x, a, x, a)):
        emit('stirlingRemainderDifference', region, [x, a], remainder(mpf(x) + mpf(a)) - remainder(mpf(x)))
for region, (a, b) in each([('a, b < 1', lambda: (scale(-12, 0), scale(-12, 0))), ('0.5 .. 8', lambda: (uniform(0.5, 8), uniform(0.5, 8))),
                            ('halves', lambda: (random.randint(1, 30) / 2, random.randint(1, 60) / 2)),
                            ('a < 1, b large', lambda: (scale(-5, 0), scale(0, 20))), ('a 1 .. 8, b large', lambda: (uniform(1, 8), scale(1, 25))),
                            ('8 .. 100', lambda: (uniform(8, 100), uniform(8, 100))), ('large', lambda: (scale(1, 15), scale(1, 15))),
                            ('huge', lambda: (scale(10, 60), scale(0, 60)))]):
    with workdps(digits(a, b)):
        emit('logBeta', region, [a, b], loggamma(mpf(a)) + loggamma(mpf(b)) - loggamma(mpf(a) + mpf(b)))


def inner(n):
    return (n, float(random.randint(1, int(n) - 1)))


for region, (n, k) in each([('n <= 60', lambda: inner(float(random.randint(2, 60)))), ('n <= 1e4', lambda: inner(whole(1.5, 4))),
                            ('n <= 2^53', lambda: inner(whole(4, 15.9))), ('k <= 60', lambda: (whole(2, 15.9), float(random.randint(1, 60)))),
                            ('real', lambda: (lambda n: (n, n * uniform(0, 1)))(scale(0, 6))),
                            ('real, k < 1', lambda: (lambda n: (n, scale(-15, 0) * min(1, n)))(scale(-3, 15))),
                            ('real, n < 2', lambda: (lambda n: (n, n * uniform(0, 1)))(uniform(0, 2))),
                            ('huge', lambda: (lambda n: (n, n * scale(-40, -0.01)))(scale(20, 60)))]):
    with workdps(digits(n, k)):
        value = loggamma(mpf(n) + 1) - loggamma(mpf(k) + 1) - loggamma(mpf(n) - mpf(k) + 1)
        emit('logBinomial', region, [n, k], value)
for region, n in each([('n <= 30', lambda: float(random.randint(2, 30))), ('n <= 1e4', lambda: whole(1.5, 4)),
                       ('n <= 2^53', lambda: whole(4, 15.95))]):
    emit('logFactorial', region, [n], loggamma(mpf(n) + 1))


# Error functions and the normal law
def scaled(x):
    """exp(x^2) erfc(x), by the asymptotic series where erfc would underflow even in mpmath's exponents."""
    if x > 1000:
        term = total = mpf(1)
        for k in range(1, 12):
            term *= -(2 * k - 1) / (2 * x * x)
            total += term
        return total / (x * sqrt(pi))
    return exp(x * x) * erfc(x)


for region, x in each([('|x| < 0.01', lambda: sign() * scale(-300, -2)), ('|x| < 0.5', lambda: uniform(-0.5, 0.5)),
                       ('0.5 .. 1', lambda: uniform(0.5, 1)), ('1 .. 6', lambda: uniform(1, 6)),
                       ('-6 .. -0.5', lambda: -uniform(0.5, 6))]):
    emit('erf', region, [x], erf(mpf(x)))
    emit('erfc', region, [x], erfc(mpf(x)))
for region, x in each([('6 .. 26', lambda: uniform(6, 26.5))]):
    emit('erfc', region, [x], erfc(mpf(x)))
for region, x in each([('0 .. 1', lambda: uniform(0, 1)), ('1 .. 4', lambda: uniform(1, 4)), ('4 .. 12', lambda: uniform(4, 12)),
                       ('12 .. 60', lambda: uniform(12, 60)), ('x > 60', lambda: scale(1.8, 300)),
                       ('-1 .. 0', lambda: -uniform(0, 1)), ('-26 .. -1', lambda: -uniform(1, 26.6))]):
    emit('erfcx', region, [x], scaled(mpf(x)))


def log_cdf(x):
    """log Phi(x)."""
    if x < -1000:
        return log(scaled(-x / sqrt(mpf(2))) / 2) - x * x / 2
    tail = erfc(abs(x) / sqrt(mpf(2))) / 2
    return log(tail) if x < 0 else log1p(-tail)


normal = [('|x| < 0.01', lambda: sign() * scale(-20, -2)), ('|x| < 0.7', lambda: uniform(-0.7, 0.7)), ('0.7 .. 3', lambda: sign() * uniform(0.7, 3)),
          ('3 .. 17', lambda: sign() * uniform(3, 17)), ('17 .. 37', lambda: sign() * uniform(17, 37))]
for region, x in each(normal + [('x > 37', lambda: scale(1.57, 150))]):
    emit('millsRatio', region, [x], sqrt(pi / 2) * scaled(mpf(x) / sqrt(mpf(2))))
    emit('logNormalCdf', region, [-x], log_cdf(-mpf(x)))
for region, x in each(normal):
    emit('normalCdf', region, [x], erfc(-mpf(x) / sqrt(mpf(2))) / 2)


def upper_point(log_tail):
    """The x > 0 with log Phi(-x) = log_tail <= -log 2, by Newton's method on the logarithm."""
    t = mpf(log_tail)
    x = sqrt(-2 * t) if t < -2 else (mpf(1) / 2 - exp(t)) * sqrt(2 * pi)
    for _ in range(200):
        step = (log_cdf(-x) - t) * sqrt(pi / 2) * scaled(x / sqrt(mpf(2)))
        x += step
        if abs(step) <= mpf(10) ** -45 * abs(x):
            return x
    raise ValueError(log_tail)


half = math.log(0.5)
for region, t in each([('-0.01 .. 0', lambda: -scale(-100, -2)), ('-0.7 .. 0', lambda: -uniform(0, 0.69)),
                       ('near -log 2', lambda: half * (1 + sign() * scale(-10, -1))), ('-5 .. -0.7', lambda: -uniform(0.7, 5)),
                       ('-32 .. -5', lambda: -uniform(5, 32)), ('-745 .. -32', lambda: -uniform(32, 745)),
                       ('t < -745', lambda: -scale(2.9, 300))]):
    with workdps(60 if t < -1e-3 else 180):
        lower = mpf(t) <= -log(mpf(2))
        point = -upper_point(t) if lower else upper_point(log(-expm1(mpf(t))))
        emit('normalQuantileOfLog', region, [t], point)
for region, p in each([('p < 0.01', lambda: scale(-300, -2)), ('0.01 .. 0.3', lambda: uniform(0.01, 0.3)), ('0.3 .. 0.7', lambda: uniform(0.3, 0.7)),
                       ('near 1/2', lambda: 0.5 + sign() * scale(-15, -1)), ('0.7 .. 1', lambda: uniform(0.7, 1)),
                       ('near 1', lambda: 1 - scale(-15, -1))]):
    if p == 0.5:
        continue
    emit('normalQuantile', region, [p], -upper_point(log(mpf(p))) if p < 0.5 else upper_point(log(1 - mpf(p))))

with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'special-elementary.json'), 'w') as file:
    file.write('[\n' + ',\n'.join(json.dumps(row) for row in rows) + '\n]\n')
