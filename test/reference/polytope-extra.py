"""Membership of hulls near the sphere, of heavy tails and of wide queries, and integrals that it rests on.

Writes polytope-extra.json. mpmath at 60 to 90 digits; every integral by the trapezoidal rule with the step halved
until 36 digits stand, 60 for wide queries; insides are one minus the sum of the terms of the outside. Run: python3 polytope-extra.py
"""
import json
from mpmath import (mp, mpf, mpc, pi, exp, log, log1p, sqrt, sin, cos, tan, cosh, sinh, tanh, gamma, loggamma, hyp2f1,
                    factorial, binomial, erfc, findroot, nstr, asin)

mp.dps = 60
STAND = 36


def trapezoid(f, centre, width, cut):
    """The integral of f over the line from its largest value outward, the step halved until it stands."""
    def level(h):
        total = mpf(0)
        for side in (1, -1):
            k = 0 if side == 1 else 1
            peak = mpf(0)
            while True:
                value = f(centre + side * k * h)
                total += value
                peak = max(peak, abs(value))
                if k > 3 and abs(value) < peak * cut:
                    break
                k += 1
        return h * total

    h = width / 2
    before = level(h)
    while True:
        h /= 2
        now = level(h)
        if abs(now - before) < abs(now) * mpf(10) ** -STAND:
            return now
        before = now


def lower(p, z):
    """F of the density c cos^p, at Re z < 0."""
    c = gamma(p / 2 + 1) / (sqrt(pi) * gamma((p + 1) / 2))
    return c * cos(z) ** (p + 1) * hyp2f1(0.5, (p + 1) / 2, (p + 3) / 2, cos(z) ** 2) / (p + 1)


def exponents(family, alpha, m):
    if family == 'beta':
        return alpha, alpha * m, alpha * m + 2
    return alpha - 1, alpha * m - 1, alpha * m - 1


def internal(family, alpha, m):
    """J_(m,1): the line through the saddle, or the real path where there is none."""
    if m == 1:
        return mpf(1)
    if m == 2:
        return mpf(1)
    p, _, Q = exponents(family, alpha, m)
    M = m - 1
    norm = m * gamma((Q + 1) / 2) / (sqrt(pi) * gamma(Q / 2))
    e = (p + 1) * M - Q
    if e > -1:
        return norm * real_path(p, M, e) * (gamma(p / 2 + 1) / (sqrt(pi) * gamma((p + 1) / 2)) / (p + 1)) ** M
    c = gamma(p / 2 + 1) / (sqrt(pi) * gamma((p + 1) / 2))
    g = lambda a: M * c * cos(a) ** p / lower(p, -a) - Q * tan(a)
    low, high = mpf(10) ** -12, pi / 2 - mpf(10) ** -12
    for _ in range(60):
        a = (low + high) / 2
        low, high = (a, high) if g(a) > 0 else (low, a)
    delta = pi / 2 - a
    f = lambda t: (lower(p, mpc(-a, delta * sinh(t))) ** M * cos(mpc(-a, delta * sinh(t))) ** (-Q)
                   * delta * cosh(t)).real
    return norm * trapezoid(f, mpf(0), mpf(1) / 4, mpf(10) ** -(STAND + 6))


def real_path(p, M, e):
    """2 cos(pi e/2) int sinh^e (S / cosh)^M, S = 2F1(1/2, 1; (p + 3)/2; tanh^2)."""
    def log_f(x):
        return e * log(sinh(x)) + M * (log(hyp2f1(0.5, 1, (p + 3) / 2, tanh(x) ** 2)) - log(cosh(x)))
    peak = mpf(1) / 100
    best = None
    x = peak
    for _ in range(60):
        value = log_f(x) + log(x)
        if best is None or value > best:
            best, peak = value, x
        x *= mpf('1.15')
    f = lambda t: exp(log_f(peak * exp(t - exp(-t)))) * peak * exp(t - exp(-t)) * (1 + exp(-t))
    return 2 * cos(pi * e / 2) * trapezoid(f, mpf('0.567'), mpf(1) / 10, mpf(10) ** -(STAND + 6))


def log_external(family, alpha, log_n, n, m):
    """log I_(n,m); n is None where the binomial law is Poisson's to 40 digits."""
    p, q, _ = exponents(family, alpha, m)
    if n == m:
        return mpf(0)
    c = gamma(p / 2 + 1) / (sqrt(pi) * gamma((p + 1) / 2))

    def log_tail(u):
        return (log(c) - (p + 1) * log(cosh(u)) - log(p + 1)
                + log(hyp2f1(0.5, (p + 1) / 2, (p + 3) / 2, 1 / cosh(u) ** 2)))

    def log_f(u):
        tail = exp(log_tail(u)) if u >= 0 else 1 - exp(log_tail(-u))
        power = -exp(log_n) * tail if n is None else (n - m) * log1p(-tail)
        return power - (q + 1) * log(cosh(u))

    u = mpf(0)
    step = mpf(1)
    while step > mpf(10) ** -8:
        while log_f(u + step) > log_f(u):
            u += step
        while log_f(u - step) > log_f(u):
            u -= step
        step /= 2
    top = log_f(u)
    width = mpf(1)
    while log_f(u + width) < top - 1 or log_f(u - width) < top - 1:
        width /= 2
    integral = trapezoid(lambda x: exp(log_f(x) - top), u, width, mpf(10) ** -(STAND + 6))
    choices = m * log_n - log(factorial(m)) if n is None else log(binomial(n, m))
    norm = gamma(q / 2 + 1) / (sqrt(pi) * gamma((q + 1) / 2))
    return choices + log(norm) + top + log(integral)


def outside(family, alpha, log_n, n, d):
    """P(a point outside the hull of the others), n points in all."""
    total = mpf(0)
    for m in range(d, 0, -2):
        term = 2 * exp(log_external(family, alpha, log_n, n, m) - log_n) * internal(family, alpha, m)
        total += term
        if term < total * mpf(10) ** -(STAND + 4):
            break
    return total


def wide_query(log_n, scale):
    """P(scale X not in the hull of n) in the plane, 2 b_1, n so many that the binomial law is Poisson's."""
    kappa = 1 / (scale * scale)
    lam = 1 + kappa
    n = exp(log_n)
    f = lambda y: -n * erfc(y / sqrt(mpf(2))) / 2 - lam * y * y / 2
    y = findroot(lambda y: log_n - y * y / 2 - log(2 * pi) / 2 - log(lam * y), sqrt(2 * log_n))
    top = f(y)
    integral = trapezoid(lambda x: exp(f(x) - top), y, 1 / y, mpf(10) ** -(STAND + 6))
    return exp(log_n + top) * integral * sqrt(lam / (2 * pi))


def text(x):
    return nstr(x, 28, strip_zeros=False)


if __name__ == '__main__':
    rows = {'membership': [], 'wide': [], 'angle': []}
    for family, alpha, d, log_n in [('beta', '9.5', 10, '90'), ('beta', '29', 30, '100'), ('beta', '28.25', 30, '100'),
                                    ('beta', '49.5', 50, '200'), ('beta', '98.25', 100, '100')]:
        x = outside(family, mpf(alpha), mpf(log_n), None, d)
        rows['membership'].append({'family': family, 'alpha': alpha, 'd': d, 'logn': log_n, 'log': text(log(1 - x)), 'logComplement': text(log(x))})
        print(rows['membership'][-1], flush=True)
    for family, alpha, d, n in [('betaPrime', '1', 40, 60), ('betaPrime', '3', 30, 50), ('beta', '9.5', 10, 30),
                                ('beta', '4.25', 5, 12)]:
        # n points and the next one
        x = outside(family, mpf(alpha), log(mpf(n + 1)), n + 1, d)
        rows['membership'].append({'family': family, 'alpha': alpha, 'd': d, 'n': n, 'log': text(log(1 - x)), 'logComplement': text(log(x))})
        print(rows['membership'][-1], flush=True)
    mp.dps, STAND = 90, 64
    for log_n, scale in [('5000', '1e13'), ('5000', '1e16'), ('600', '1e14'), ('5000', '3e14')]:
        x = wide_query(mpf(log_n), mpf(scale))
        rows['wide'].append({'logn': log_n, 'scale': scale, 'log': text(log(1 - x))})
    mp.dps, STAND = 60, 36
    for p, M, e in [('99', 101, '0'), ('99', 121, '20'), ('99.5', 150, '48.5'), ('999', 1021, '20'), ('999', 1201, '200'),
                    ('0', 2000, '0'), ('2.5', 40, '35.5'), ('9.25', 300, '288.75'), ('0.5', 12, '9.5')]:
        x = real_path(mpf(p), M, mpf(e))
        rows['angle'].append({'p': p, 'M': M, 'e': e, 'log': text(log(abs(x)))})
        print(rows['angle'][-1], flush=True)
    table = [{'quantity': name, 'args': {k: v for k, v in row.items() if not k.startswith('log') or k == 'logn'},
              'log': row['log'], 'logComplement': row.get('logComplement')} for name in rows for row in rows[name]]
    with open('polytope-extra.json', 'w') as out:
        json.dump(table, out, indent=1)
        out.write('\n')
