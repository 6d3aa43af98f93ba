"""Writes wendel.json: tails of the fair binomial law as Wendel's formula needs them, to 40 digits.

usage: /usr/bin/python3 test/reference/wendel.py > test/reference/wendel.json   (Debian's python3-mpmath)

Shares no code with the library. Three methods, by size:
  exact      n <= 2500: integers, then one division at 60 digits
  sum        min(d, n - d) <= 300: the at most 300 terms at 80 digits
  integral   beyond: pmf(k) (N - k) int_0^1 (1 - u^2)^k (1 - u)^(N - 2 k - 1) du, N = n - 1, k = d - 1,
             Gauss-Legendre at 50 digits over the width of the integrand; the pmf by log-gamma at 80 digits
"""
import json
import random
from mpmath import mp, mpf, binomial, loggamma, log, exp, quad, sqrt, linspace, log1p, nstr

mp.dps = 60


def exact(n, d):
    term, total = 1, 0
    for k in range(d):
        total += term
        term = term * (n - 1 - k) // (k + 1)
    return mpf(total) / mpf(2) ** (n - 1)


def direct(n, d):
    """2^-(n-1) sum_{k<d} binom(n-1, k), as a logarithm"""
    with mp.workdps(80):
        term, total = mpf(1), mpf(0)
        for k in range(d):
            total += term
            term = term * (n - 1 - k) / (k + 1)
        return log(total) - (n - 1) * log(mpf(2))


def by_integral(n, d):
    """log of P(Bin(n-1,1/2) <= d-1) for 2 d <= n"""
    N, k = n - 1, d - 1
    with mp.workdps(80):
        pmf = loggamma(mpf(N) + 1) - loggamma(mpf(k) + 1) - loggamma(mpf(N - k) + 1) - N * log(mpf(2))
    with mp.workdps(50):
        f = lambda u: exp(k * log1p(-u * u) + (N - 2 * k - 1) * log1p(-u))
        width = mpf(1) / (sqrt(mpf(k)) + (N - 2 * k))
        top = min(mpf(1), 60 * width)
        ratio = (N - k) * quad(f, linspace(0, top, 31))
        if top < 1:
            ratio += (N - k) * quad(f, [top, min(mpf(1), 4 * top)])
        return pmf + log(ratio)


def log_out(n, d):
    """log of P(not surrounded) for 2 d <= n"""
    if n <= 2500:
        return log(exact(n, d)), 'exact integers'
    if d <= 300:
        return direct(n, d), 'sum of at most 300 terms, 80 digits'
    return by_integral(n, d), 'ratio integral, 50 digits'


random.seed(20261201)
cases = set()
for n in (55, 56, 100, 106, 107, 108, 200, 500, 1000, 2000, 2500):
    for d in {1, 2, 3, n // 10, n // 5, n // 3, n // 2 - 10, n // 2 - 1, n // 2, n // 2 + 1, n - n // 3, n - 2, n - 1}:
        if 0 < d < n:
            cases.add((n, d))
for n in (3001, 10 ** 4, 10 ** 6, 10 ** 9, 10 ** 12, 10 ** 15, 2 ** 53 - 1):
    for d in (1, 2, 5, 9, 10, 11, 50, 99, 100, 101, 150, 299, 300, 301):
        cases.add((n, d))
        if d in (2, 50, 300):
            cases.add((n, n - d))
    # ordinary to far tails at 0.01 to 37 standard deviations, both sides
    root = n ** 0.5 / 2
    for z in (0.01, 0.3, 1, 3, 6, 9, 12, 20, 30, 36.9):
        d = int(n / 2 - z * root)
        if d > 301:
            cases.add((n, d))
            if z in (0.3, 6, 36.9):
                cases.add((n, n - d))
    for share in (0.01, 0.1, 0.25, 0.4, 0.49):
        d = int(share * n)
        if d > 301:
            cases.add((n, d))
for _ in range(60):
    n = int(10 ** random.uniform(3.5, 15.9))
    d = int(n / 2 - abs(random.gauss(0, 1)) * 10 ** random.uniform(-1, 1.3) * n ** 0.5 / 2)
    if 301 < d < n:
        cases.add((n, d))

rows = []
for n, d in sorted(cases):
    small_out = 2 * d <= n
    logs, method = log_out(n, d if small_out else n - d)
    value = exp(logs)
    rows.append({
        'n': str(n), 'd': str(d), 'small': 'out' if small_out else 'in',
        'log': nstr(logs, 40), 'value': nstr(value, 40) if value > mpf(10) ** -307 else None,
        'complement': nstr(1 - value, 40), 'method': method,
    })
print('[\n' + ',\n'.join(json.dumps(row) for row in rows) + '\n]')
