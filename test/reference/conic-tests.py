"""Writes conic-tests.json: logistic thresholds and order-restricted tests, about 28 digits and more.

usage: /usr/bin/python3 test/reference/conic-tests.py > test/reference/conic-tests.json   (Debian's python3-mpmath)

Shares no code with the library and, where it can, no method:
  logistic   Gauss-Legendre panels in x at 32 digits, Newton's method; the library uses the trapezoidal rule
  share      adaptive quadrature of the logistic function against the normal density
  weights    total order: products of exact fractions; four unequal groups: trivariate orthant probabilities
             from arc sines and the recursion over partitions; trees: products of one-dimensional integrals,
             the one of negative correlation through its real multivariate definition
  orthant    four parameters: one integral of arc sines (Biometrika 41, 1954) and the face sums
  tails      sums of incomplete gamma and beta functions at 60 digits
Arguments are exact decimal expansions of doubles.
"""
import json
from fractions import Fraction
from itertools import combinations
import mpmath as m
from mpmath import mp, mpf

mp.dps = 45
rows = []


def text(x):
    return m.nstr(x, 36, min_fixed=-5, max_fixed=40)


def add(quantity, args, value, method):
    with m.workdps(60):
        value = +value
        log = m.log(value) if value > 0 else None
    rows.append({'quantity': quantity, 'args': args,
                 'value': text(value) if value == 0 or value > mpf(10) ** -300 else None,
                 'log': None if log is None else text(log), 'method': method, 'source': 'test/reference/conic-tests.py'})


# ---- logistic ---------------------------------------------------------------------------------------
def legendre(n):
    """Nodes and weights on [-1, 1]."""
    out = []
    for i in range(n):
        x = m.cos(m.pi * (i + mpf(3) / 4) / (n + mpf(1) / 2))
        for _ in range(60):
            p0, p1 = mpf(1), x
            for k in range(2, n + 1):
                p0, p1 = p1, ((2 * k - 1) * x * p1 - (k - 1) * p0) / k
            d = n * (x * p1 - p0) / (x * x - 1)
            step = p1 / d
            x -= step
            if abs(step) < mpf(10) ** -(mp.dps + 3):
                break
        out.append((x, 2 / ((1 - x * x) * d * d)))
    return out


GL = legendre(24)


def nodes(b, g):
    edges = {mpf(-16), mpf(16)}
    edges.update(mpf(k) for k in range(-16, 17))
    if g > 0:
        edges.update((u - b) / g for u in [mpf(k) for k in range(-100, 101, 4)])
    edges = sorted(e for e in edges if -16 <= e <= 16)
    out = []
    for lo, hi in zip(edges, edges[1:]):
        if hi - lo < mpf(10) ** -30:
            continue
        for t, w in GL:
            x = (hi + lo) / 2 + (hi - lo) / 2 * t
            u = b + g * x
            f = (hi - lo) / 2 * w * m.npdf(x)
            out.append((x, f / (1 + m.exp(-u)), f / (1 + m.exp(u))))
    return [q for q in out if q[1] + q[2] > mpf(10) ** -36]


def limit(b, g, intercept):
    pts = nodes(b, g)
    t0, t1 = mpf(0), mpf(0)

    def sums(t0, t1):
        F = G0 = G1 = H00 = H01 = H11 = mpf(0)
        for x, wp, wm in pts:
            a = t0 + t1 * x
            P, Q, f = m.ncdf(a), m.ncdf(-a), m.npdf(a)
            F += wp * ((1 + a * a) * P + a * f) + wm * ((1 + a * a) * Q - a * f)
            d1 = 2 * wp * (a * P + f) - 2 * wm * (f - a * Q)
            d2 = 2 * (wp * P + wm * Q)
            G0 += d1
            G1 += d1 * x
            H00 += d2
            H01 += d2 * x
            H11 += d2 * x * x
        return F, G0, G1, H00, H01, H11
    F, G0, G1, H00, H01, H11 = sums(t0, t1)
    for _ in range(200):
        if intercept:
            D = H00 * H11 - H01 ** 2
            s0, s1 = (H01 * G1 - H11 * G0) / D, (H01 * G0 - H00 * G1) / D
        else:
            s0, s1 = mpf(0), -G1 / H11
        dec = -(G0 * s0 + G1 * s1)
        lam = mpf(1)
        new = sums(t0 + s0, t1 + s1)
        while new[0] > F - lam * dec / 4 and dec > F * mpf(10) ** -15:
            lam /= 2
            new = sums(t0 + lam * s0, t1 + lam * s1)
        t0, t1 = t0 + lam * s0, t1 + lam * s1
        F, G0, G1, H00, H01, H11 = new
        if dec < F * mpf(10) ** -40:
            break
    m4 = B00 = B01 = B11 = mpf(0)
    for x, wp, wm in pts:
        a = t0 + t1 * x
        P, Q, f = m.ncdf(a), m.ncdf(-a), m.npdf(a)
        e2 = wp * ((1 + a * a) * P + a * f) + wm * ((1 + a * a) * Q - a * f)
        m4 += wp * ((a ** 4 + 6 * a * a + 3) * P + (a ** 3 + 5 * a) * f)
        m4 += wm * ((a ** 4 + 6 * a * a + 3) * Q - (a ** 3 + 5 * a) * f)
        B00 += e2
        B01 += e2 * x
        B11 += e2 * x * x
    if intercept:
        c = 2 * (H11 * B00 - 2 * H01 * B01 + H00 * B11) / (H00 * H11 - H01 ** 2)
    else:
        c = 2 * B11 / H11
    return F, m4, c


def share(b, g):
    """P(Y = +1)"""
    if g == 0:
        return 1 / (1 + m.exp(-b))
    pts = sorted({mpf(-20), mpf(20)} | {mpf(k) for k in range(-19, 20)} |
                 {(u - b) / g for u in map(mpf, range(-150, 151, 3)) if abs((u - b) / g) < 20})
    return m.quad(lambda x: m.npdf(x) / (1 + m.exp(-b - g * x)), pts)


for b, g in [('0', '0.0625'), ('0', '1'), ('0', '6.5'), ('0', '7.875'), ('0', '8'), ('0', '30'), ('0', '1000'),
             ('0.25', '0.5'), ('2', '0'), ('2', '3'), ('5', '0'), ('5', '1.5'), ('5', '12'), ('12', '4'), ('20', '0.5'),
             ('40', '7.75'), ('40', '8.5'), ('27', '0')]:
    with m.workdps(32):
        h, m4, c = limit(mpf(b), mpf(g), True)
    method = 'Gauss-Legendre panels, Newton'
    add('logit.threshold', {'offset': b, 'signal': g}, h, method)
    add('logit.fourth', {'offset': b, 'signal': g}, m4, method)
    add('logit.trace', {'offset': b, 'signal': g}, c, method)
for g in ('0.5', '3', '20'):
    with m.workdps(32):
        c = limit(mpf(0), mpf(g), False)[2]
    add('logit.trace_no_intercept', {'signal': g}, c, 'Gauss-Legendre panels, Newton')
for b, g in [('1', '0'), ('0.5', '1'), ('2', '4'), ('5', '7.875'), ('50', '7.875'), ('5', '8'), ('50', '8'), ('57', '8'),
             ('30', '12'), ('80', '12'), ('600', '100'), ('27', '0.125')]:
    add('logit.rare_share', {'offset': b, 'signal': g}, share(-mpf(b), mpf(g)), 'adaptive quadrature')


# ---- weights ----------------------------------------------------------------------------------------
def rho(a, b, c):
    return -m.sqrt(a * c / ((a + b) * (b + c)))


def order3(w):
    top = mpf(1) / 4 + m.asin(rho(*w)) / (2 * m.pi)
    return [mpf(1) / 2 - top, mpf(1) / 2, top]


def order4(w):
    a, b, c, d = w
    top = mpf(1) / 8 + (m.asin(rho(a, b, c)) + m.asin(rho(b, c, d))) / (4 * m.pi)
    three = (order3([a + b, c, d])[2] + order3([a, b + c, d])[2] + order3([a, b, c + d])[2]) / 2
    return [mpf(1) / 2 - three, mpf(1) / 2 - top, three, top]


for w in ([1, 1, 1], [10, 40, 10], [1, 1000, 1], [1000, 1, 1000], [3, 0.125, 7], [1e-6, 1, 1e6]):
    for j in (0, 2):
        with m.workdps(60):
            add('chibar.weight_unequal_order', {'weights': w, 'df': j}, order3(list(map(mpf, w)))[j], 'arc sine')
for w in ([10, 40, 10, 5], [1, 2, 3, 4], [1, 1000, 1000, 1], [1000, 1, 1, 1000], [5, 0.0625, 0.0625, 9],
          [1, 1e-6, 1e-6, 1], [1e6, 1, 1e-6, 3]):
    for j in range(4):
        with m.workdps(60):
            add('chibar.weight_unequal_order', {'weights': w, 'df': j}, order4(list(map(mpf, w)))[j], 'arc sines, partitions')


def order(k):
    w = [Fraction(1)]
    for j in range(2, k + 1):
        v = [Fraction(0)] * (len(w) + 1)
        for i, x in enumerate(w):
            v[i] += x * Fraction(j - 1, j)
            v[i + 1] += x / j
        w = v
    return [mpf(x.numerator) / x.denominator for x in w]


def positive(n, r):
    """P(n equicorrelated normals > 0), correlation r >= 0."""
    if n == 0:
        return mpf(1)
    c = m.sqrt(r / (1 - r))
    return m.quad(lambda y: m.npdf(y) * m.ncdf(c * y) ** n, [-14, -8, -5, -3, -2, -1, 0, 1, 2, 3, 5, 8, 14])


def tree(k, w0, w):
    """Through the recursion over partitions: all pooled = complement of the rest."""
    out = {}

    def pooled(j):
        """P(j treatments of weight w all pooled with a control of weight w0)"""
        if j not in out:
            out[j] = mpf(1) if j == 0 else 1 - sum(
                m.binomial(j, q) * positive(q, w / (w0 + (j - q + 1) * w)) * pooled(j - q) for q in range(1, j + 1))
        return out[j]
    return [m.binomial(k - 1, q) * positive(q, w / (w0 + (k - q) * w)) * pooled(k - 1 - q) for q in range(k)]


with m.workdps(60):
    for k, w0, w in ((3, 1, 1), (5, 30, 10), (8, 1, 1), (8, 1, 16), (8, 64, 1), (12, 2, 3)):
        t = tree(k, mpf(w0), mpf(w))
        for j in sorted({0, 1, k // 2, k - 1}):
            add('chibar.weight_simple_tree', {'k': k, 'df': j, 'w_control': w0, 'w_treatment': w}, t[j],
                'integrals of positive correlation, total probability')


def correlation(C):
    n = C.rows
    return m.matrix([[C[i, j] / m.sqrt(C[i, i] * C[j, j]) for j in range(n)] for i in range(n)])


def orthant(C):
    """P(all components > 0)"""
    R, n = correlation(C), C.rows
    if n == 0:
        return mpf(1)
    if n == 1:
        return mpf(1) / 2
    if n == 2:
        return mpf(1) / 4 + m.asin(R[0, 1]) / (2 * m.pi)
    if n == 3:
        return mpf(1) / 8 + (m.asin(R[0, 1]) + m.asin(R[0, 2]) + m.asin(R[1, 2])) / (4 * m.pi)

    def f(s):
        total = mpf(0)
        S = s * R
        for i in range(4):
            S[i, i] = mpf(1)
        for i, j in combinations(range(4), 2):
            k, l = [q for q in range(4) if q not in (i, j)]
            A = m.matrix([[1, S[i, j]], [S[i, j], 1]])
            B = m.matrix([[S[k, i], S[k, j]], [S[l, i], S[l, j]]])
            D = m.matrix([[1, S[k, l]], [S[k, l], 1]]) - B * A ** -1 * B.T
            r = D[0, 1] / m.sqrt(D[0, 0] * D[1, 1])
            total += R[i, j] / m.sqrt(1 - S[i, j] ** 2) * (mpf(1) / 4 + m.asin(r) / (2 * m.pi))
        return total / (2 * m.pi)
    return mpf(1) / 16 + m.quad(f, [0, 0.25, 0.5, 0.75, 0.875, 0.9375, 1])


def sub(C, idx):
    return m.matrix([[C[i, j] for j in idx] for i in idx])


def orthant_cone(C):
    """Sum over the sets of positive parameters S: P(estimate given the others 0 positive) P(multipliers positive)."""
    n, K = C.rows, C ** -1
    w = []
    for size in range(n + 1):
        total = mpf(0)
        for S in combinations(range(n), size):
            T = [i for i in range(n) if i not in S]
            inner = orthant(sub(K, S) ** -1) if S else mpf(1)
            outer = orthant(sub(C, T) ** -1) if T else mpf(1)
            total += inner * outer
        w.append(total)
    return w


matrices = {
    2: [[[4, 1], [1, 1]], [[1, -0.9375], [-0.9375, 1]]],
    3: [[[1, 0.5, 0.25], [0.5, 1, 0.375], [0.25, 0.375, 1]], [[2, -0.5, 0.25], [-0.5, 1, -0.75], [0.25, -0.75, 3]]],
    4: [[[1, 0.5, 0.25, -0.125], [0.5, 1, 0.375, 0], [0.25, 0.375, 1, 0.5], [-0.125, 0, 0.5, 1]],
        [[1, 0.875, 0.875, 0.875], [0.875, 1, 0.875, 0.875], [0.875, 0.875, 1, 0.875], [0.875, 0.875, 0.875, 1]],
        [[4, -1, 0.5, -1], [-1, 2, -0.5, 0.25], [0.5, -0.5, 1, -0.25], [-1, 0.25, -0.25, 3]]],
}
for n, cases in matrices.items():
    for C in cases:
        w = orthant_cone(m.matrix(C))
        assert abs(sum(w) - 1) < mpf(10) ** -30, sum(w)
        for j in range(n + 1):
            add('chibar.weight_orthant', {'covariance': C, 'df': j}, w[j], 'sum over faces of products of orthant probabilities')


# ---- tails ------------------------------------------------------------------------------------------
def gamma_tail(j, x, upper):
    a, y = mpf(j) / 2, mpf(x) / 2
    return m.gammainc(a, y, m.inf, regularized=True) if upper else m.gammainc(a, 0, y, regularized=True)


def beta_tail(a, b, x, upper):
    """By the positive series in x or y."""
    x = mpf(x)
    if upper:
        return beta_tail(b, a, 1 - x, False)
    s, t, n = mpf(0), mpf(1), 0
    while t > s * mpf(10) ** -70:
        s += t
        t *= (a + b + n) / (a + 1 + n) * x
        n += 1
    return s * x ** a * (1 - x) ** b / (a * m.beta(a, b))


with m.workdps(70):
    for k in (3, 5, 12, 60):
        w = order(k)
        for x in ('0.0009765625', '0.5', '3', '9.5', '40', '300', '1400', '20000'):
            sf = sum(w[j] * gamma_tail(j, x, True) for j in range(1, k))
            add('chibar.upper', {'k': k, 'x': x}, sf, 'sum of incomplete gamma functions')
            if sf > 0.4:
                low = w[0] + sum(w[j] * gamma_tail(j, x, False) for j in range(1, k))
                add('chibar.lower', {'k': k, 'x': x}, low, 'sum of incomplete gamma functions')
    for k, N in ((3, 5), (3, 30), (5, 15), (8, 400)):
        w = order(k)
        for x in ('0.0009765625', '0.0625', '0.25', '0.5', '0.9375', '0.9990234375'):
            sf = sum(w[j] * beta_tail(mpf(j) / 2, mpf(N - 1 - j) / 2, x, True) for j in range(1, k))
            add('ebar.upper', {'k': k, 'observations': N, 'x': x}, sf, 'sum of incomplete beta series')
            if sf > 0.4:
                low = w[0] + sum(w[j] * beta_tail(mpf(j) / 2, mpf(N - 1 - j) / 2, x, False) for j in range(1, k))
                add('ebar.lower', {'k': k, 'observations': N, 'x': x}, low, 'sum of incomplete beta series')
    for k, p in ((4, '0.0009765625'), (4, '0.5'), (6, '0.03125'), (10, '0.625'), (4, '1e-60')):
        w = order(k)
        f = lambda x: m.log(sum(w[j] * gamma_tail(j, x, True) for j in range(1, k))) - m.log(mpf(p))
        add('chibar.critical', {'k': k, 'p': p}, m.findroot(f, (mpf('0.01'), mpf(600)), solver='anderson', tol=mpf(10) ** -80, maxsteps=400), 'root')
    # the reversed test: "ordered" against "not ordered", 5 % and 1 %
    for k in (3, 4, 5):
        for p in ('0.05', '0.01'):
            w = order(k)[::-1]
            f = lambda x: sum(w[j] * gamma_tail(j, x, True) for j in range(1, k)) - mpf(p)
            add('chibar.critical_reversed', {'k': k, 'p': p}, m.findroot(f, (mpf(1), mpf(20)), solver='anderson', tol=mpf(10) ** -60, maxsteps=400), 'root')

print('[\n' + ',\n'.join(json.dumps(row) for row in rows) + '\n]')
