"""Reference values with 60 digits for test/precise, by quadrature and integer sums at 90 digits.

usage: /usr/bin/python3 test/reference/precise.py > test/reference/precise.json
"""
import json
from fractions import Fraction
from math import comb
from mpmath import mp, mpf, beta, betainc, gamma, nstr, quad, sqrt, pi, factorial

mp.dps = 90
rows = []


def put(fn, args, value):
    rows.append({"fn": fn, "args": args, "value": nstr(value, 60, strip_zeros=False)})


# Incomplete beta by integrating the density: decimal arguments, not doubles.
for a, b, x in [("0.5", "0.5", "0.1"), ("2.5", "7.25", "0.3"), ("0.125", "40", "0.001"), ("30", "1.5", "0.75"),
                ("7", "7", "0.9"), ("100.5", "60.25", "0.6"), ("1", "0.001", "0.999")]:
    p, q, z = mpf(a), mpf(b), mpf(x)
    # t = u^(1/a) takes the singularity at 0 away.
    integral = quad(lambda u: (1 - u ** (1 / p)) ** (q - 1), [0, z ** p / 2, z ** p]) / p
    put("incompleteBeta", [a, b, x], integral / beta(p, q))

# Wendel by integers.
for n, d in [(3000, 1400), (3000, 1600), (5000, 30), (4001, 2000)]:
    total = sum(comb(n - 1, k) for k in range(d, n))
    put("originInHull", [n, d], mpf(total) / mpf(2) ** (n - 1))

# Volume ratios as the mean of a power of the mean excess at an order statistic, integrated in v by a
# substitution of its own.
def cap(b, h):
    w = 1 - h * h
    return betainc(b + 1, mpf(1) / 2, 0, w, regularized=True) / 2 if h > 0 else 1 - cap(b, -h) if h < 0 else mpf(1) / 2


for n, d, b in [(5, 2, "0"), (12, 2, "-1"), (20, 3, "0.5"), (9, 4, "-0.75"), (60, 6, "2")]:
    q = mpf(b) + mpf(d - 1) / 2
    c = gamma(q + mpf(3) / 2) / (sqrt(pi) * gamma(q + 1))
    A = c / (2 * (q + 1))

    def f(h):
        v = cap(q, h)
        w = 1 - h * h
        mean = A * w ** (q + 1) / v
        return mean ** d * v ** d * (1 - v) ** (n - d - 1) * c * w ** q

    k = factorial(n) / (factorial(d) * factorial(n - d - 1))
    mp.dps = 75
    put("hullVolumeRatio", [n, d, b], k * quad(f, [-1, -0.5, 0, 0.5, 1], maxdegree=9))
    mp.dps = 90

print("[\n" + ",\n".join(json.dumps(row) for row in rows) + "\n]")
