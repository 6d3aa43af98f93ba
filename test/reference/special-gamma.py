#!/usr/bin/python3
"""Writes special-gamma.json: points of the incomplete gamma functions, their inverses, the Faddeeva
function and Stirling numbers, denser than special.json near the places where hullgauge changes its
method.

usage: /usr/bin/python3 test/reference/special-gamma.py   (Debian's python3-mpmath; three minutes)

Arguments are doubles in their shortest decimal form; `exact` (left out where it leaves the range of
doubles) and `log`, the logarithm, have 30 digits. No method is shared with the library:
  incomplete gamma   series with positive terms or Legendre's continued fraction at 60 digits, checked
                     against Gauss-Legendre quadrature of the tail integral; a > 20000: two quadratures
  inverses           bisection and secant steps on the above
  Faddeeva           exp(-z^2) erfc(-iz) at as many digits as it cancels, or Laplace's continued
                     fraction beyond |z| = 40
  Stirling numbers   exact integers up to n = 2500; exact power sums near the diagonal; else a Cauchy
                     integral, its nodes doubled until 33 digits stand
"""
import json
import os
import random
from fractions import Fraction

import mpmath as mp
from mpmath import mpc, mpf

mp.mp.dps = 60
rows = []


def add(fn, args, exact, region, log=None):
    def text(x):
        return mp.nstr(x, 30, min_fixed=-5, max_fixed=20)

    row = {"fn": fn, "region": region, "args": args}
    if exact is not None and (exact == 0 or mpf("1e-300") < abs(exact) < mpf("1e300")):
        row["exact"] = text(exact)
    if log is not None:
        row["log"] = text(log)
    rows.append(row)


# ---------------------------------------------------------------- incomplete gamma
def quadrature(a, x, lower, rule):
    """tail / (x^a e^-x / Gamma(a)) with the substitution t = x e^(-+s)"""
    if lower:
        exponent = lambda s: -a * s - x * mp.expm1(-s)
    else:
        exponent = lambda s: a * s - x * mp.expm1(s)
    end = 1 / (abs(a - x) + mp.sqrt(x) + mpf("0.01"))
    while exponent(end) > -130:
        end *= 2
    low, high = mpf(0), end
    for _ in range(20):
        middle = (low + high) / 2
        if exponent(middle) > -130:
            low = middle
        else:
            high = middle
    cuts = ["0", "0.02", "0.08", "0.2", "0.45", "1"] if rule == "gauss-legendre" else ["0", "0.05", "0.3", "1"]
    return mp.quad(lambda s: mp.exp(exponent(s)), [high * mpf(c) for c in cuts], method=rule, maxdegree=9)


def small_tail(a, x):
    """(is lower, log of that tail): P for x <= a, Q for x > a"""
    digits = 70 + int(mp.log10(max(a, x, 1))) * 2
    with mp.workdps(digits):
        a, x = mpf(a), mpf(x)
        prefix = a * mp.log(x) - x - mp.loggamma(a)
        lower = x <= a
        if a <= 20000:
            eps = mpf(10) ** (-mp.mp.dps + 5)
            if lower or x < mpf("0.5"):
                term = total = 1 / a
                n = 0
                while term > total * eps:
                    n += 1
                    term *= x / (a + n)
                    total += term
                if not lower:
                    return False, mp.log(1 - mp.exp(prefix + mp.log(total)))
            else:
                n = 400
                previous = mpf(0)
                while True:
                    rest = mpf(0)
                    for i in range(n, 0, -1):
                        rest = i * (a - i) / (x + 1 - a + 2 * i + rest)
                    total = 1 / (x + 1 - a + rest)
                    if abs(total / previous - 1 if previous else 1) < mpf(10) ** -45:
                        break
                    previous, n = total, 2 * n
            if a > mpf("0.2"):
                check = quadrature(a, x, lower, "gauss-legendre")
                assert abs(check / total - 1) < mpf(10) ** -30, (a, x, total, check)
        else:
            total = quadrature(a, x, lower, "gauss-legendre")
            check = quadrature(a, x, lower, "tanh-sinh")
            assert abs(check / total - 1) < mpf(10) ** -30, (a, x, total, check)
        return lower, prefix + mp.log(total)


def log1m(log):
    with mp.workdps(mp.mp.dps + min(1500, 20 + int(-log / 2))):
        return mp.log(-mp.expm1(log)) if log > -1 else mp.log1p(-mp.exp(log))


def log_tail(a, x, upper):
    lower, log = small_tail(a, x)
    return log if lower != upper else log1m(log)


def gamma_point(a, x, region):
    lower, log = small_tail(a, x)
    other = log1m(log)
    for fn, value in (("gammaP", log if lower else other), ("gammaQ", other if lower else log)):
        if mp.exp(value) < mpf("0.75"):
            add(fn, [a, x], mp.exp(value), region, value)


def at_deviate(a, z):
    """x with x - a - a log(x/a) = z^2/2 on the side of the sign of z"""
    t = mpf(z) / mp.sqrt(a)
    y = mp.mpf(1) + t if t > -1 else mpf("0.1")
    u = mp.log(abs(y))
    for _ in range(200):
        f = mp.expm1(u) - u - t * t / 2
        step = f / mp.expm1(u)
        u -= step
        if abs(step) < mpf(10) ** -25:
            break
    return float(a * mp.exp(u))


def gamma_rows():
    random.seed(20240601)
    uniform = random.uniform
    for _ in range(40):  # a <= 1, x <= 1 and just above
        gamma_point(10 ** uniform(-12, 0), 10 ** uniform(-60, 0), "a<=1, x<=1")
        gamma_point(uniform(0.01, 1), uniform(0.05, 1), "a<=1, x<=1")
    for _ in range(40):
        gamma_point(uniform(0.001, 1), uniform(1, 3), "a<=1, x>1")
        gamma_point(10 ** uniform(-10, 0), 10 ** uniform(0, 2.8), "a<=1, x>1")
    for _ in range(60):
        a = uniform(1, 15)
        gamma_point(a, a * uniform(0.2, 3), "1<a<15")
        gamma_point(a, a * 10 ** uniform(-30, 0), "1<a<15 far")
        gamma_point(a, uniform(a, 700), "1<a<15 far")
    for _ in range(40):  # half-integers: chi-squared
        a = random.randint(1, 60) / 2
        gamma_point(a, random.randint(1, 400) / 4, "half-integer a")
    for low, high, name in ((15, 100, "15<=a<100"), (100, 1e4, "100<=a<1e4"), (1e4, 1e8, "1e4<=a<1e8"), (1e8, 1e15, "1e8<=a<=1e15")):
        for _ in range(25):
            a = float(mp.mpf(low) * (mp.mpf(high) / low) ** uniform(0, 1))
            gamma_point(a, at_deviate(a, uniform(-4, 4)), name)
            gamma_point(a, at_deviate(a, uniform(-37, 37)), name + " far")
    for _ in range(12):
        gamma_point(10 ** uniform(15, 40), 10 ** uniform(-30, 2), "a>1e15")
    for a in (15.0, 15.5, 40.0, 300.0):  # both sides of z^2 = 0.9 a, and of a = 15
        for sign in (-1, 1):
            for factor in (0.999, 1.001):
                gamma_point(a, at_deviate(a, sign * factor * float(mp.sqrt(0.9 * a))), "threshold")
    for a in (200.0, 200.00001, 1000.0, 1e5):  # both sides of a = 200 and of 125 terms of the series
        for z in (-12, -5, -2, -0.5, 0.5, 2, 12):
            gamma_point(a, at_deviate(a, z), "threshold")
    for a in (14.999999, 15.0):
        for x in (8.0, 14.5, 15.0, 15.5, 30.0):
            gamma_point(a, x, "threshold")
    for a in (0.999999, 1.0, 1.000001):
        for x in (0.25, 0.999999, 1.0, 1.000001, 4.0):
            gamma_point(a, x, "threshold")


# ---------------------------------------------------------------- inverses
def solve(a, log, upper):
    sign = -1 if upper else 1
    with mp.workdps(60):
        log = mpf(log)
        f = lambda u: sign * (log_tail(a, mp.exp(u), upper) - log)
        low = high = mp.log(a)
        step = 1 / mp.sqrt(a)
        while f(low) > 0:
            low, step = low - step, 2 * step
        step = 1 / mp.sqrt(a)
        while f(high) < 0:
            high, step = high + step, 2 * step
        fl, fh = f(low), f(high)
        for i in range(200):
            middle = (low * fh - high * fl) / (fh - fl) if i % 3 else (low + high) / 2
            fm = f(middle)
            if fm > 0:
                high, fh = middle, fm
            else:
                low, fl = middle, fm
            if high - low < mpf(10) ** -33 or fm == 0:
                break
            # one secant step from the better end, and a bracket tight around it
            guess = (low * fh - high * fl) / (fh - fl)
            for delta in (mpf(10) ** -8, mpf(10) ** -16, mpf(10) ** -34):
                if low < guess - delta and guess + delta < high:
                    fa, fb = f(guess - delta), f(guess + delta)
                    if fa <= 0 <= fb:
                        low, high, fl, fh = guess - delta, guess + delta, fa, fb
                        guess = (low * fh - high * fl) / (fh - fl)
        return mp.exp((low + high) / 2)


def inverse_rows():
    random.seed(7)
    for i in range(90):
        a = 10 ** random.uniform(-1.5, 4)
        log = -(10 ** random.uniform(-2, 2.6))
        upper = random.random() < 0.5
        x = solve(a, log, upper)
        fn = "gammaQInvLog" if upper else "gammaPInvLog"
        region = "a<0.1" if a < 0.1 else "0.1<=a<1" if a < 1 else "1<=a<15" if a < 15 else "a>=15"
        add(fn, [a, log], x, region)


# ---------------------------------------------------------------- Faddeeva
def faddeeva(x, y):
    z = mpc(x, y)
    size = float(abs(z))
    if y >= 0 and size > 40:
        with mp.workdps(90):
            rest = mpc(0)
            for k in range(400, 0, -1):
                rest = mpf(k) / 2 / (z - rest)
            return mpc(0, 1) / mp.sqrt(mp.pi) / (z - rest)
    with mp.workdps(80 + int(min(5000, 1.8 * size * size))):
        return mp.exp(-z * z) * mp.erfc(-mpc(0, 1) * z)


def faddeeva_point(x, y, region):
    w = faddeeva(x, y)
    for fn, part in (("faddeevaRe", w.real), ("faddeevaIm", w.imag)):
        if part != 0 and (abs(part) < mpf("1e-300") or abs(part) > mpf("1e300")):
            continue
        add(fn, [x, y], part, region)


def faddeeva_rows():
    random.seed(5)
    uniform = random.uniform
    for _ in range(50):
        faddeeva_point(uniform(0, 7), uniform(0, 7), "box")
        faddeeva_point(uniform(0, 12), 10 ** uniform(-12, 1), "strip")
        faddeeva_point(10 ** uniform(-10, 1), 10 ** uniform(-10, 1), "small")
    for _ in range(25):
        faddeeva_point(uniform(0, 25), 0.0, "real axis")
        faddeeva_point(0.0, 10 ** uniform(-5, 2), "imaginary axis")
        faddeeva_point(10 ** uniform(1.7, 6), 10 ** uniform(-3, 6), "far")
        faddeeva_point(uniform(0, 4), -uniform(0, 4), "lower")
        x = uniform(0, 20)
        faddeeva_point(x, -uniform(0, 1) * float(mp.sqrt(x * x + 690)), "lower far")
    h = float(mp.sqrt(mp.pi / 13))
    for k in range(0, 26):  # on the nodes of either rule, and where the rule changes
        for d in (0, 0.25 * h - 1e-9, 0.25 * h + 1e-9):
            faddeeva_point(k * h / 2 + d, 10 ** uniform(-8, 0), "nodes")
    for x in (1.0, 6.0, 6.39, 6.4, 9.0):  # y = max(x, pi/h), |z| = 1e4
        for y in (6.39, 6.3906, 6.3907, x * (1 - 1e-12), x * (1 + 1e-12)):
            faddeeva_point(x, y, "threshold")
    for x in (9999.999, 10000.001):
        for y in (1e-6, 0.0, 5.0):
            faddeeva_point(x, y, "threshold")
            faddeeva_point(y, x, "threshold")


# ---------------------------------------------------------------- Stirling numbers
def exact_row(n, kind):
    row = [1]
    for j in range(1, n + 1):
        root = j - 1 if kind == "1" else 2 * j - 1
        row = [(row[i] * root if i < len(row) else 0) + (row[i - 1] if i else 0) for i in range(len(row) + 1)]
    return row


def near_diagonal(n, m, kind):
    """exact e_m of the roots by Newton's identities on exact power sums (Faulhaber)"""
    from math import comb

    def faulhaber(count, r):  # sum of i^r, i = 1..count
        total = Fraction(0)
        for i in range(r + 1):
            p, q = mp.bernfrac(i)
            total += Fraction(comb(r + 1, i)) * Fraction(int(p), int(q)) * (-1) ** i * Fraction(count) ** (r + 1 - i)
        return total / (r + 1)

    if kind == "1":
        sums = [None] + [faulhaber(n - 1, r) for r in range(1, m + 1)]
    else:
        sums = [None] + [faulhaber(2 * n, r) - 2**r * faulhaber(n, r) for r in range(1, m + 1)]
    e = [Fraction(1)]
    for i in range(1, m + 1):
        e.append(sum((-1) ** (j - 1) * e[i - j] * sums[j] for j in range(1, i + 1)) / i)
    return mp.log(mpf(e[m].numerator) / e[m].denominator)


def cauchy(n, k, kind):
    with mp.workdps(70 + 2 * len(str(n))):
        half = mpf(1) / 2
        if kind == "1":
            product = lambda z: mp.loggamma(z + n) - mp.loggamma(z)
            sign = lambda r: r * (mp.psi(0, r + n) - mp.psi(0, r)) - k
        else:
            product = lambda z: n * mp.log(2) + mp.loggamma(z / 2 + n + half) - mp.loggamma(z / 2 + half)
            sign = lambda r: r / 2 * (mp.psi(0, r / 2 + n + half) - mp.psi(0, r / 2 + half)) - k
        low, high = mpf("1e-30"), mpf(10) ** 40
        for _ in range(200):
            middle = mp.sqrt(low * high)
            if sign(middle) > 0:
                high = middle
            else:
                low = middle
        r = low
        base = product(r)
        previous, count = None, 128
        while True:
            width = min(mp.pi, 20 / mp.sqrt(sign(r * mpf("1.01")) * 100 + 4))  # the peak only
            total = mpf(0)
            for i in range(count):
                theta = width * (2 * i + 1) / (2 * count)
                z = r * mp.expj(theta)
                total += mp.re(mp.exp(product(z) - base - mpc(0, k * theta)))
            total *= width / mp.pi / count
            if previous is not None and abs(total / previous - 1) < mpf(10) ** -33:
                return base - k * mp.log(r) + mp.log(total)
            previous, count = total, 2 * count
            assert count < 20000


def stirling_point(n, k, kind, region, rows_cache={}):
    m = n - k
    if n <= 2500:
        key = (n, kind)
        if key not in rows_cache:
            rows_cache[key] = exact_row(n, kind)
        log = mp.log(mpf(rows_cache[key][k]))
    elif m <= 45:
        log = near_diagonal(n, m, kind)
    else:
        log = cauchy(n, k, kind)
    add("logStirling1" if kind == "1" else "logStirlingB", [n, k], None, region, log)


def stirling_rows():
    random.seed(3)
    for kind in ("1", "B"):
        for m in (1, 5, 20, 39, 40, 41):  # both sides of 8 m^2 = n and of m = 40
            for n in (8 * m * m, 8 * m * m + 1, 8 * m * m + 2, 8 * m * m + 3):
                if n > 70:
                    stirling_point(n, n - m, kind, "threshold")
        for _ in range(14):
            n = int(10 ** random.uniform(3.5, 15.9))
            k = int(10 ** random.uniform(0.3, 0.99 * float(mp.log10(n))))
            stirling_point(n, k, kind, "small k")
            stirling_point(n, n - k, kind, "large k")
            stirling_point(n, int(n * random.uniform(0.02, 0.98)), kind, "middle k")


if __name__ == "__main__":
    faddeeva_rows()
    gamma_rows()
    inverse_rows()
    stirling_rows()
    path = os.path.join(os.path.dirname(os.path.abspath(__file__)), "special-gamma.json")
    with open(path, "w") as file:
        file.write("[\n" + ",\n".join(json.dumps(row) for row in rows) + "\n]\n")
