"""Prints the Gauss-Kronrod (10, 21) rule of cosmo/numerics/gaussKronrod.ts, from its definition alone.

The ten Gauss nodes are the roots of the Legendre polynomial P_10. The eleven added nodes are the roots of the
Stieltjes polynomial E_11, defined by  integral P_10 E_11 x^k dx = 0  for k = 0..10 (Kronrod 1965). The weights follow
from exactness on the Legendre polynomials up to degree 20. Run: /usr/bin/python3 gaussKronrod.py
"""
from mpmath import mp, mpf, matrix, lu_solve, polyroots, legendre, taylor

mp.dps = 80
N = 10


def legendre_coefficients(n):
    p, q = [mpf(1)], [mpf(0), mpf(1)]
    if n == 0:
        return p
    for k in range(1, n):
        r = [mpf(0)] * (k + 2)
        for i, c in enumerate(q):
            r[i + 1] += mpf(2 * k + 1) / (k + 1) * c
        for i, c in enumerate(p):
            r[i] -= mpf(k) / (k + 1) * c
        p, q = q, r
    return q


def moment(power):
    return mpf(2) / (power + 1) if power % 2 == 0 else mpf(0)


P = legendre_coefficients(N)
# E = x^11 + sum e_j x^j over odd j < 11 (odd symmetry); conditions for odd k
unknowns = list(range(1, N + 1, 2))
A, b = matrix(len(unknowns)), matrix(len(unknowns), 1)
for row, k in enumerate(range(1, N + 1, 2)):
    for col, j in enumerate(unknowns):
        A[row, col] = sum(c * moment(i + j + k) for i, c in enumerate(P))
    b[row] = -sum(c * moment(i + N + 1 + k) for i, c in enumerate(P))
e = lu_solve(A, b)
E = [mpf(0)] * (N + 2)
E[N + 1] = mpf(1)
for col, j in enumerate(unknowns):
    E[j] = e[col]
gauss = sorted(polyroots(P[::-1], maxsteps=500, extraprec=400))
added = sorted(polyroots(E[::-1], maxsteps=500, extraprec=400))
nodes = sorted(gauss + added)
m = len(nodes)
B, rhs = matrix(m), matrix(m, 1)
for k in range(m):
    for i, x in enumerate(nodes):
        B[k, i] = legendre(k, x)
rhs[0] = mpf(2)
weights = lu_solve(B, rhs)
G, grhs = matrix(N), matrix(N, 1)
for k in range(N):
    for i, x in enumerate(gauss):
        G[k, i] = legendre(k, x)
grhs[0] = mpf(2)
gweights = lu_solve(G, grhs)
mp.pretty = True
print("// node, Kronrod weight, Gauss weight (0 for an added node), from 1 down to 0")
for i in reversed(range(m)):
    x = nodes[i]
    if x < mpf(10) ** -40:
        x = mpf(0)
    if i < m // 2:
        break
    gw = mpf(0)
    for j, g in enumerate(gauss):
        if abs(g - nodes[i]) < mpf(10) ** -30:
            gw = gweights[j]
    print(mp.nstr(x, 30), mp.nstr(weights[i], 30), mp.nstr(gw, 30))
