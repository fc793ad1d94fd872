"""Prints the coefficients of cosmo/numerics/radauCoefficients.ts: Radau IIA with five stages, from its definition alone.

Nodes: roots of P_5 - P_4 shifted to [0, 1] (right Radau). Matrix A: a_ij = integral_0^c_i of the j-th Lagrange
polynomial. Eigenvalues of the inverse of A, and T with columns (u, Re u1, Im u1, Re u2, Im u2) from its eigenvectors,
scaled so that the last component of each eigenvector is 1. Run: /usr/bin/python3 radau.py
"""
from mpmath import mp, mpf, matrix, polyroots, eig, inverse, re, im, nstr, binomial

mp.dps = 60
S = 5


def shifted_legendre(n):
    return [(-1) ** (n + k) * binomial(n, k) * binomial(n + k, k) for k in range(n + 1)]


p5 = shifted_legendre(5)
p4 = shifted_legendre(4) + [mpf(0)]
c = sorted(re(r) for r in polyroots([a - b for a, b in zip(p5, p4)][::-1], maxsteps=500, extraprec=300))
A = matrix(S, S)
for j in range(S):
    poly, scale = [mpf(1)], mpf(1)
    for m in range(S):
        if m != j:
            poly = [(poly[i - 1] if i > 0 else 0) - (c[m] * poly[i] if i < len(poly) else 0) for i in range(len(poly) + 1)]
            scale *= c[j] - c[m]
    for i in range(S):
        A[i, j] = sum(a * c[i] ** (k + 1) / (k + 1) for k, a in enumerate(poly)) / scale
values, vectors = eig(inverse(A))
real = [i for i in range(S) if abs(im(values[i])) < mpf(10) ** -40]
pairs = sorted([i for i in range(S) if im(values[i]) > mpf(10) ** -40], key=lambda i: im(values[i]))
T = matrix(S, S)
for i in range(S):
    T[i, 0] = re(vectors[i, real[0]] / vectors[S - 1, real[0]])
    for n, k in enumerate(pairs):
        u = vectors[i, k] / vectors[S - 1, k]
        T[i, 1 + 2 * n], T[i, 2 + 2 * n] = re(u), im(u)
Ti = inverse(T)
print("nodes", [nstr(x, 25) for x in c])
print("real", nstr(re(values[real[0]]), 25))
for k in pairs:
    print("pair", nstr(re(values[k]), 25), nstr(im(values[k]), 25))
for name, m in (("T", T), ("inverse of T", Ti)):
    print(name)
    for i in range(S):
        print(", ".join(nstr(m[i, j], 25) for j in range(S)))
print("matrix A")
for i in range(S):
    print(", ".join(nstr(A[i, j], 25) for j in range(S)))
