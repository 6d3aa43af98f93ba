#!/usr/bin/python3
"""Writes special-beta.json: points of the incomplete beta function, of fair binomial tails and of the
inverse, denser than special.json near the places where hullgauge changes its method.

usage: /usr/bin/python3 test/reference/special-beta.py   (Debian's python3-mpmath; five minutes)

Arguments are doubles in their shortest decimal form; of x and y the smaller one is exact and the other
is 1 minus it. `exact` (left out below 1e-300) and `log` have 30 digits.
  betaTail {a, b, x, y, side}: the smaller tail, `side` = lower for I_x(a, b), upper for its complement
  fairTail {n, k, side}: the smaller one of P[X <= k] (lower) and P[X > k] (upper), X ~ Bin(n, 1/2)
  betaInverse {a, b, logP, side}: `exact` = logit of the x whose lower or upper tail has the logarithm logP

Every tail comes from two unrelated methods that agree to 1e-33: the hypergeometric series with positive
terms or quadrature of the tail integral in the logit (Gauss-Legendre), against mpmath's betainc, the
continued fraction in another form, or quadrature by the tanh-sinh rule. Fair tails with at most 3000 terms are
exact sums.
"""
import json
import os
import random

import mpmath as mp
from mpmath import mpf

mp.mp.dps = 50
rows = []
R = random.Random(20240607)


def text(x):
    return mp.nstr(x, 30, min_fixed=-5, max_fixed=20)


def add(fn, args, region, value=None, log=None):
    row = {"fn": fn, "region": region, "args": [repr(float(t)) if not isinstance(t, str) else t for t in args]}
    if value is not None and abs(value) > mpf("1e-300"):
        row["exact"] = text(value)
    if log is not None:
        row["log"] = text(log)
    rows.append(row)


# ---------------------------------------------------------------- incomplete beta
def series(a, b, x):
    """sum (a+b)_n / (a+1)_n x^n / a, or None where it is long"""
    term = total = mpf(1)
    eps = mpf(10) ** (-mp.mp.dps)
    for n in range(8000):
        term *= (a + b + n) / (a + 1 + n) * x
        total += term
        if term < total * eps:
            return total / a
    return None


def fraction(a, b, x):
    """The fraction of DLMF 8.17.22 by Lentz's method, or None where it is long"""
    tiny = mpf(10) ** -200
    eps = mpf(10) ** (-mp.mp.dps + 4)
    c = mpf(1)
    d = 1 / (1 - (a + b) * x / (a + 1))
    h = d
    for m in range(1, 4000):
        step = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m))
        d = 1 / ((1 + step * d) or tiny)
        c = (1 + step / c) or tiny
        h *= c * d
        step = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1))
        d = 1 / ((1 + step * d) or tiny)
        c = (1 + step / c) or tiny
        h *= c * d
        if abs(c * d - 1) < eps:
            return h / a
    return None


def quadrature(a, b, x, rule):
    nu = a + b
    exponent = lambda s: -a * s - nu * mp.log(1 + x * mp.expm1(-s))
    end = 1 / (abs(a - nu * x) + mp.sqrt(nu * x * (1 - x)) + a / 1000)
    while exponent(end) > -110:
        end *= 2
    low, high = mpf(0), end
    for _ in range(20):
        middle = (low + high) / 2
        if exponent(middle) > -110:
            low = middle
        else:
            high = middle
    cuts = ["0", "0.02", "0.08", "0.2", "0.45", "1"] if rule == "gauss-legendre" else ["0", "0.05", "0.3", "1"]
    return mp.quad(lambda s: mp.exp(exponent(s)), [high * mpf(c) for c in cuts], method=rule, maxdegree=9)


def log_below_mean(a, b, x, y):
    """log I_x(a, b) for x <= a/(a+b), x + y = 1 exactly"""
    prefix = a * mp.log(x) + b * mp.log(y) - (mp.loggamma(a) + mp.loggamma(b) - mp.loggamma(a + b))
    found = []
    if min(a, b) < 30000:
        found = [t for t in (series(a, b, x), fraction(a, b, x)) if t is not None]
    if len(found) < 2 and a > mpf("0.05") and min(a, b) > mpf("0.5"):
        found.append(quadrature(a, b, x, "gauss-legendre"))
        if len(found) < 2:
            found.append(quadrature(a, b, x, "tanh-sinh"))
    if len(found) < 2:
        found.append(mp.betainc(a, b, 0, x, regularized=True) / mp.exp(prefix))
    if len(found) < 2 or abs(found[0] / found[1] - 1) > mpf(10) ** -33:
        return None
    return prefix + mp.log(found[0])


def complement(log):
    with mp.workdps(mp.mp.dps + 20):
        return mp.log(-mp.expm1(log))


def exact_pair(x, y):
    return (mpf(x), 1 - mpf(x)) if x <= y else (1 - mpf(y), mpf(y))


def smaller_tail(a, b, x, y):
    """(side, log) of the smaller tail"""
    digits = 50 + 2 * max(0, int(mp.log10(max(a, b)))) + max(0, int(-mp.log10(min(x, y))))
    with mp.workdps(digits):
        a, b = mpf(a), mpf(b)
        x, y = exact_pair(x, y)
        lower = x * (a + b) <= a
        log = log_below_mean(a, b, x, y) if lower else log_below_mean(b, a, y, x)
        if log is None:
            return None
        if log > -mp.log(2):
            return ("upper" if lower else "lower"), complement(log)
        return ("lower" if lower else "upper"), log


def beta_point(a, b, x, y, region):
    if not (0 < x < 1 or 0 < y < 1) or min(x, y) <= 0:
        return
    found = smaller_tail(a, b, x, y)
    if found is None:
        return
    side, log = found
    add("betaTail", [a, b, x, y, side], region, mp.exp(log), log)


def deviance(a, t):
    if t <= -1:
        return -mp.inf
    return a * (mp.log1p(t) - t)


def pair_at(a, b, z):
    """doubles x, y with the signed root of the deviance near z"""
    with mp.workdps(20 + max(0, int(mp.log10(max(a, b))))):
        nu = mpf(a) + mpf(b)
        centre = mp.log(mpf(a) / mpf(b))
        low, high = mpf(0), mpf(690)
        for _ in range(60):
            middle = (low + high) / 2
            w = centre + middle * (1 if z > 0 else -1)
            x, y = 1 / (1 + mp.exp(-w)), 1 / (1 + mp.exp(w))
            delta = b * x - a * y
            if -(deviance(a, delta / a) + deviance(b, -delta / b)) < z * z / 2:
                low = middle
            else:
                high = middle
        w = centre + low * (1 if z > 0 else -1)
        if abs(w) > 690:
            return 0.0, 1.0
        return float(1 / (1 + mp.exp(-w))), float(1 / (1 + mp.exp(w)))


def log_uniform(low, high):
    return float(mp.exp(R.uniform(float(mp.log(low)), float(mp.log(high)))))


def half_integer(x):
    return max(0.5, round(2 * x) / 2)


def deviate():
    return R.choice([R.uniform(-3, 3), R.uniform(-8, 8), R.uniform(-37, 37)])


boxes = [
    ("shapes 1e-8 .. 1", 1e-8, 1, 120),
    ("shapes 0.3 .. 30", 0.3, 30, 160),
    ("shapes 10 .. 2000", 10, 2000, 160),
    ("shapes 1e3 .. 1e15", 1e3, 1e15, 110),
    ("shapes 1e-3 .. 1e15", 1e-3, 1e15, 160),
]
for name, low, high, count in boxes:
    for i in range(count):
        a, b = log_uniform(low, high), log_uniform(low, high)
        if i % 3 == 0:
            b = a * log_uniform(0.4, 2.5)
        if i % 2 == 0 and low > 0.1:
            a, b = half_integer(a), half_integer(b)
        if name == "shapes 1e-8 .. 1":
            w = R.uniform(-60, 60)
            x, y = float(1 / (1 + mp.exp(-w))), float(1 / (1 + mp.exp(w)))
        else:
            x, y = pair_at(a, b, deviate())
        beta_point(a, b, x, y, name)

# both sides of the lines where the method changes, one line a region
up, down = 1 + 2.0**-40, 1 - 2.0**-40
for s in (up, down):
    for a in (0.5, 3.0, 40.0):
        for b in (2.5, 30.0, 1e4):  # b x = 0.7
            beta_point(a, b, 0.7 * s / b, 1 - 0.7 * s / b, "b x = 0.7")
    for a in (0.2, 0.9, 4.0, 30.0):  # x = 0.7
        beta_point(a, 0.4, 0.7 * s, 1 - 0.7 * s, "x = 0.7")
    for a in (5.0, 300.0, 1e7):  # a y = 1
        for b in (0.01, 0.6):
            beta_point(a, b, 1 - s / a, s / a, "a y = 1")
    for a in (0.8, 1.3):  # y = 0.7
        beta_point(a, 0.3, 1 - 0.7 * s, 0.7 * s, "y = 0.7")
    for a in (0.3, 3.0, 70.0):  # b = 1, a = 1
        for x in (0.1, 0.5, 0.9, 0.99):
            beta_point(a, s, x, 1 - x, "b = 1")
            beta_point(s, a, x, 1 - x, "a = 1")
    for m in (200.0, 3000.0, 1e6):  # z^4 = m/16
        for factor in (1, 7.5):
            z = float((mpf(m) * s / 16) ** mpf("0.25"))
            x, y = pair_at(m, m * factor, -z)
            beta_point(m, m * factor, x, y, "z^4 = min(a, b)/16")
            x, y = pair_at(m * factor, m, z)
            beta_point(m * factor, m, x, y, "z^4 = min(a, b)/16")
    for z in (0.0, -1.0, -1.8):  # min(a, b) = 200
        x, y = pair_at(200 * s, 500.0, z) if z else (0.2, 0.8)
        beta_point(200 * s, 500.0, x, y, "min(a, b) = 200")
    for t in (1 / 32, -1 / 32, -0.5):  # the two forms of the deviance
        x = (1 + t * s) * 0.25
        beta_point(50.0, 150.0, x, 1 - x, "delta/a = 1/32, 1/2")
        beta_point(5000.0, 15000.0, x, 1 - x, "delta/a = 1/32, 1/2")
for a, b, x in ((1e-9, 0.5, 0.3), (1e-9, 0.5, 1e-200), (1e-10, 2e-10, 0.4), (2e-10, 1e-10, 0.4), (1e-12, 5.0, 0.01)):
    beta_point(a, b, x, 1 - x, "nearly certain")
for y in (1e-20, 1e-100, 1e-300):
    for a, b in ((20.0, 0.5), (3.5, 2.0), (0.01, 0.02), (1e6, 1.5)):
        beta_point(a, b, 1.0, y, "x = 1 - y beyond doubles")

# ---------------------------------------------------------------- fair binomial tails
def fair_point(n, k, region):
    j = min(k, n - 1 - k)
    side = "lower" if k <= n - 1 - k else "upper"
    if j < 3000:
        term = total = 1
        for i in range(1, j + 1):
            term = term * (n - i + 1) // i
            total += term
        with mp.workdps(60):
            log = mp.log(total) - n * mp.log(2)
    else:
        with mp.workdps(90):
            log = log_below_mean(mpf(n - j), mpf(j + 1), mpf("0.5"), mpf("0.5"))
        if log is None:
            return
    add("fairTail", [str(n), str(k), side], region, mp.exp(log), log)


for i in range(60):
    n = int(log_uniform(2000, 2**53))
    fair_point(n, int(log_uniform(1, 300)) - 1, "k <= 300")
    n = int(log_uniform(700, 30000))
    fair_point(n, int(min(n - 1, max(0, n / 2 + R.uniform(-18, 18) * n**0.5))), "n <= 30000")
    n = int(log_uniform(30000, 2**53))
    fair_point(n, int(n / 2 + R.uniform(-18, 18) * n**0.5), "n > 30000")
    n = int(log_uniform(30000, 2**53))
    fair_point(n, R.randrange(n), "far")
for n, k in (
    (2**54, 2**53 - 1), (2**54, 2**53), (2**54 + 4, 2**53 - 10**8), (2**54 + 4, 2**53 + 10**8),
    (2**60, 2**59 - 2**33), (2**60, 2**59 + 2**34), (2**53 - 1, 2**52 - 1), (10**17, 300), (10**17, 0),
    (10**20, 10**20 // 2 - 16384 * 10**6), (2**53, 299), (2**53, 8), (2**53, 9), (2**54, 3),
):
    fair_point(n, k, "beyond 2^53")

# ---------------------------------------------------------------- inverse
def log_lower(a, b, w):
    with mp.workdps(60 + 2 * max(0, int(mp.log10(max(a, b)))) + int(abs(w) / 2.3)):
        a, b = mpf(a), mpf(b)
        x, y = 1 / (1 + mp.exp(-w)), 1 / (1 + mp.exp(w))
        if x * (a + b) <= a:
            return log_below_mean(a, b, x, y)
        upper = log_below_mean(b, a, y, x)
        return None if upper is None else complement(upper)


def inverse_point(a, b, log_p, side, region):
    first, second = (a, b) if side == "lower" else (b, a)
    low = mp.log(mpf(first) / mpf(second)) - 300 - 50 / mpf(first)
    high = mp.log(mpf(first) / mpf(second)) + 300 / mpf(second)
    x0, x1 = low, high
    for _ in range(26):
        middle = (x0 + x1) / 2
        value = log_lower(first, second, middle)
        if value is None:
            return
        if value < log_p:
            x0 = middle
        else:
            x1 = middle
    f = lambda w: log_lower(first, second, w) - mpf(log_p)
    p, q = x0, x1
    try:
        fp, fq = f(p), f(q)
        for _ in range(12):
            if fp == fq or abs(p - q) < mpf(10) ** -38 * max(1, abs(p)):
                break
            p, fp, q = q, fq, q - fq * (q - p) / (fq - fp)
            fq = f(q)
    except TypeError:
        return
    if abs(fq) > mpf(10) ** -30:
        return
    add("betaInverse", [a, b, log_p, side], region, q if side == "lower" else -q)


for i in range(60):
    a, b = log_uniform(0.2, 2000), log_uniform(0.2, 2000)
    log_p = float(-R.choice([R.uniform(0.7, 3), R.uniform(0.7, 50), R.uniform(1, 600)]))
    inverse_point(a, b, log_p, R.choice(["lower", "upper"]), "shapes 0.2 .. 2000")

# ---------------------------------------------------------------- output
out = os.path.join(os.path.dirname(os.path.abspath(__file__)), "special-beta.json")
with open(out, "w") as f:
    f.write("[\n" + ",\n".join(json.dumps(row) for row in rows) + "\n]\n")
print(len(rows), "rows")
