"""Values of the wave functions at 40 digits, printed to 25; writes wave-functions-values.json beside itself.

Inputs are exact binary doubles. S = sin(a)/a, C = cos(a), R = (1 - C S)/(2 a^2) with a^2 of either sign
(a imaginary where a^2 < 0); mean squares by quadrature of the solution itself, not by a closed form.
"""
import json, os
from mpmath import mp, mpf, sqrt, sin, cos, sinh, cosh, nstr, quad, linspace

mp.dps = 60

def S(q):
    if q == 0: return mpf(1)
    if q > 0: return sin(sqrt(q)) / sqrt(q)
    return sinh(sqrt(-q)) / sqrt(-q)

def C(q):
    return cos(sqrt(q)) if q >= 0 else cosh(sqrt(-q))

def R(q):
    if abs(q) < mpf(10) ** -18: return mpf(1) / 3 - q / 15
    return (1 - C(q) * S(q)) / (2 * q)

def text(x): return nstr(x, 25, min_fixed=-1, max_fixed=-1)

squares = [0.0]
for size in [1e-300, 1e-16, 1e-8, 1e-3, 0.1, 0.2499999999, 0.25, 0.2500000001, 0.26, 0.5, 1.0, 2.5, 9.869604401089358,
             40.0, 1e3, 1e5]:
    squares += [size, -size]
squares += [1e8, 1e12]

def solution(y0, slope, q, xi):
    return y0 * C(q * xi * xi) + slope * xi * S(q * xi * xi)

mean_square = []
for q in [0.0, 1e-10, -1e-10, 0.2, -0.2, 0.2500000001, -0.2500000001, -0.9, 1.0, 9.869604401089358, 400.0, 1e4]:
    for y0, slope in [(0.75, -1.375), (0.0, 1.0), (1.0, 0.0), (-0.5, -12.5)]:
        parts = max(1, int(sqrt(abs(mpf(q))) / 3) + 1)
        value = quad(lambda xi: solution(mpf(y0), mpf(slope), mpf(q), xi) ** 2, linspace(0, 1, parts + 1))
        mean_square.append({"square": q, "y0": y0, "slope": slope, "value": text(value)})

def between(y0, y1, a, xi):
    return (y0 * sinh(a * (1 - xi)) + y1 * sinh(a * xi)) / sinh(a)

mean_square_between = []
for a in [0.5, 1.0, 1.0009765625, 3.0, 12.5, 40.0, 710.0, 1e5, 1e9]:
    for y0, y1 in [(1.0, 1.0), (1.0, -1.0), (0.0, 1.0), (2.5, 1e-9)]:
        # the two boundary layers apart; the middle of a strong decay is below any digit
        edge = min(mpf(1) / 2, 100 / mpf(a))
        cuts = [edge * m / 8 for m in range(9)]
        points = cuts + [1 - c for c in reversed(cuts)]
        value = quad(lambda xi: between(mpf(y0), mpf(y1), mpf(a), xi) ** 2, sorted(set(points)))
        mean_square_between.append({"a": a, "y0": y0, "y1": y1, "value": text(value)})

out = {
    "functions": [{"square": q, "sinc": text(S(mpf(q))), "cosine": text(C(mpf(q))), "sineSquareMean": text(R(mpf(q)))}
                  for q in squares],
    "meanSquare": mean_square,
    "meanSquareBetween": mean_square_between,
}
here = os.path.dirname(os.path.abspath(__file__))
with open(os.path.join(here, "wave-functions-values.json"), "w") as file:
    json.dump(out, file, indent=2)
    file.write("\n")
