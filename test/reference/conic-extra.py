"""Reference values for walks, cones and recovery beyond conic.json. Prints conic-extra.json.

python3 conic-extra.py > conic-extra.json   (mpmath; about two minutes)

Every probability is computed as a positive sum at 60 digits: walks and bridges by the convolution of their
Bernoulli variables, circular cones from their closed form, random cones from exact integers, recovery from
trapezoidal sums for the angles whose step is halved until 32 digits stand still.
"""
import json
from math import comb

import mpmath as mp

mp.mp.dps = 60
mpf = mp.mpf
rows = []


def add(quantity, args, value, complement=None):
    value = mpf(value)
    rows.append({
        'quantity': quantity,
        'args': args,
        'value': mp.nstr(value, 32, min_fixed=-4, max_fixed=20),
        'log': mp.nstr(mp.log(value), 32) if value > 0 else None,
        'complement': None if complement is None else mp.nstr(complement, 32),
        'method': 'positive sums at 60 digits',
        'source': 'conic-extra.py',
    })


# walks and bridges ------------------------------------------------------------------------------
def pmf(odds):
    """Law of a sum of Bernoulli variables 1/q, from the list of q."""
    law = [mpf(1)]
    for q in odds:
        law.append(mpf(0))
        for i in range(len(law) - 1, 0, -1):
            law[i] = (law[i] * (q - 1) + law[i - 1]) / q
        law[0] = law[0] * (q - 1) / q
    return law


def tails(quantity, args, law, d):
    inside, outside = mp.fsum(law[d:]), mp.fsum(law[:d])
    add(quantity, args, inside, outside)


for n in (7, 60, 250, 301, 302, 330, 1000):
    walk = pmf([2 * j for j in range(2, n + 1)])
    bridge = pmf([j for j in range(3, n + 1)])
    for d in sorted({1, 2, 3, 5, 8, 14, 30, n // 10, n // 3, n // 2, n - 20, n - 5, n - 3, n - 2, n - 1}):
        if 1 <= d <= n - 1:
            tails('walk', {'steps': n, 'd': d}, walk, d)
        if 1 <= d <= n - 2:
            tails('bridge', {'steps': n, 'd': d}, bridge, d)
for walks, bridges in (([10, 10], [8]), ([1] * 12, []), ([100, 3, 3], [50, 1, 2]), ([], [30, 40]),
                       ([200] * 4, [60])):
    odds = [2 * j for n in walks for j in range(1, n + 1)] + [j for n in bridges for j in range(2, n + 1)]
    odds.remove(2)
    law = pmf(odds)
    for d in (1, 2, 3, 5, 9, 20, 60, 200):
        if d < len(law):
            tails('joint', {'walks': walks, 'bridges': bridges, 'd': d}, law, d)


# circular cones -----------------------------------------------------------------------------------
def circular(n, angle):
    s, c = mp.sin(angle), mp.cos(angle)
    v = [mpf(0)] * (n + 1)
    for k in range(1, n):
        v[k] = mp.gamma(mpf(n) / 2) / (mp.gamma(mpf(k + 1) / 2) * mp.gamma(mpf(n - k + 1) / 2)) \
            * s ** (k - 1) * c ** (n - k - 1) / 2

    def cap(sine):
        # half of I_x((n - 1)/2, 1/2), x = sine^2
        a, half, x = mpf(n - 1) / 2, mpf(1) / 2, sine * sine
        return x ** a / (2 * a * mp.beta(a, half)) * mp.hyp2f1(a, half, a + 1, x)

    v[n], v[0] = cap(s), cap(c)
    return v


for n, angle in ((2, 0.1), (3, 1.5), (7, 0.9), (40, 0.01), (40, 1.3), (300, 0.7), (300, 1.57)):
    v = circular(n, mpf(angle))
    for k in sorted({0, 1, 2, n // 3, n // 2, n - 1, n}):
        add('circular', {'n': n, 'angle': angle, 'k': k}, v[k])


for n in (1, 5, 51, 200, 3000):
    for k in sorted({0, 1, n // 4, n // 2, n}):
        add('orthant', {'n': n, 'k': k}, mpf(comb(n, k)) / mpf(2) ** n)


# random cones -------------------------------------------------------------------------------------
def cover(n, d):
    if n == 0:
        return 1
    return 2 * sum(comb(n - 1, k) for k in range(d))


for n, d in ((1, 1), (1, 3), (2, 3), (3, 3), (4, 3), (9, 5), (10, 5), (40, 20), (41, 20), (100, 60),
             (2000, 1200), (5000, 50), (10 ** 15, 7)):
    all_ = cover(n, d)
    for k in sorted({0, 1, 2, d // 2, d - 1, d}):
        if k > d:
            continue
        volume = comb(n - 1, d - 1) if k == 0 else comb(n, d - k)
        add('schlaefli.v', {'n': n, 'd': d, 'k': k}, mpf(volume) / all_)
        if 1 <= k <= d and n >= d - k:
            faces = 2 ** (d - k) * comb(n, d - k) * cover(n - d + k, k)
            add('schlaefli.f', {'n': n, 'd': d, 'k': k}, mpf(faces) / all_)
        if 0 <= k < d and k <= n:
            faces = 2 ** k * comb(n, k) * cover(n - k, d - k)
            add('coverEfron.f', {'n': n, 'd': d, 'k': k}, mpf(faces) / all_)


# recovery -----------------------------------------------------------------------------------------
def trapezoid(f, scale):
    """Integral over the line of a function decaying like a Gaussian of that width."""
    h, old = scale / 4, None
    while True:
        j, total = 1, f(mpf(0))
        while True:
            term = f(j * h) + f(-j * h)
            total += term
            if abs(term) < mpf(10) ** -45 * abs(total) and j * h > 6 * scale:
                break
            j += 1
        total *= h
        if old is not None and abs(total - old) < mpf(10) ** -36 * abs(total):
            return total
        h, old = h / 2, total


def phi(z):
    return mp.erfc(-z / mp.sqrt(2)) / 2


def scaled_tail(a, y):
    """Phi(z) exp(z^2/2) at z = -a + i y."""
    z = mp.mpc(-a, y)
    return mp.exp(z * z / 2) * mp.erfc(-z / mp.sqrt(2)) / 2


def saddle(count, kappa, extra):
    f = lambda a: count * (mp.npdf(a) / phi(-a) - a) - kappa * a + (1 / a if extra else 0)
    lo, hi = mpf(10) ** -9, mpf(10) + mp.sqrt(count / kappa)
    for _ in range(80):
        mid = (lo + hi) / 2
        lo, hi = (mid, hi) if f(mid) > 0 else (lo, mid)
    return lo


def internal(count, kappa):
    """Orthant probability with correlation of r = -1/(count + kappa) over 1 + r."""
    if count == 0:
        return mpf(1)
    a = saddle(count, kappa, False)
    f = lambda y: (scaled_tail(a, y) ** count * mp.exp(mpf(kappa) * mp.mpc(-a, y) ** 2 / 2)).real
    return mp.sqrt((count + kappa) / (2 * mp.pi)) * trapezoid(f, 1 / mp.sqrt(kappa + mpf(count) / 3))


def absolute_sum(count, kappa):
    """P(|xi_1| + .. + |xi_count| <= sqrt(kappa) xi)."""
    if count == 0:
        return mpf(1) / 2
    a = saddle(count, kappa, True)
    f = lambda y: ((2 * scaled_tail(a, y)) ** count * mp.exp(mpf(kappa) * mp.mpc(-a, y) ** 2 / 2)
                   / mp.mpc(a, -y)).real
    return trapezoid(f, 1 / mp.sqrt(kappa + mpf(count) / 3)) / (2 * mp.pi)


def half_line(count, lam, two_sided):
    if count == 0:
        return mpf(1) / 2
    base = (lambda y: mp.erf(y / mp.sqrt(2))) if two_sided else phi
    f = lambda y: base(y) ** count * mp.exp(-lam * y * y / 2)
    top = mp.sqrt(2 * mp.log(mpf(count) / lam + 2))
    edges = [0] + [top * j / 6 for j in range(1, 13)] + [3 * top, 5 * top + 20]
    return mp.sqrt(mpf(lam) / (2 * mp.pi)) * mp.quad(f, edges)


def descent(n, s, nonnegative):
    v = [mpf(0)] * (n + 1)
    for m in range(s, n + 1):
        count = comb(n - s, m - s) * internal(m - s, s)
        if nonnegative:
            v[m - 1] += count * half_line(n - m, m, False)
            v[m] += comb(n - s, m - s) * mpf(2) ** -(n - s) * absolute_sum(m - s, s)
        else:
            v[m - 1] += 2 ** (m - s) * count * half_line(n - m, m, True)
    if not nonnegative:
        v[n] = absolute_sum(n - s, s)
    assert abs(sum(v[0::2]) - mpf(1) / 2) < mpf(10) ** -30, sum(v[0::2]) - mpf(1) / 2
    return v


mp.mp.dps = 48
for n, s, ms in ((2, 1, (1,)), (6, 2, (2, 4, 5)), (12, 11, (11,)), (15, 1, (1, 4, 9, 14)), (40, 8, (12, 20, 30, 38)),
                 (60, 30, (35, 50, 58))):
    for model, nonnegative in (('l1', False), ('nonnegativeL1', True)):
        v = descent(n, s, nonnegative)
        for m in ms:
            success = 2 * mp.fsum(v[m - 1::-2])
            failure = 2 * mp.fsum(v[m + 1::2])
            add('recovery', {'model': model, 'n': n, 'sparsity': s, 'measurements': m}, success, failure)
        if not nonnegative:
            for k in sorted({s - 1, s, (n + s) // 2, n - 1, n}):
                add('l1.v', {'n': n, 'sparsity': s, 'k': k}, v[k])

print('[\n' + ',\n'.join(json.dumps(row) for row in rows) + '\n]')
