"""Motion of one modal coordinate under loads at 60 digits; writes forced-values.json beside itself.

q'' + c q' + w^2 q = p by the exponential of an augmented matrix, which knows neither resonance nor critical damping
as special cases. Inputs are exact binary doubles, results are printed to 25 digits.

- lines: q and q' from (q, q') = (a, v) under p = value + slope t + curve t^2/2
- waves: q and q' from rest under p = Re(z e^{rt})
"""
import json, os
from mpmath import mp, mpf, mpc, matrix, expm, nstr, re, im

mp.dps = 60

def text(x): return nstr(x, 25, min_fixed=-1, max_fixed=-1)

def line(w, c, t, start, p):
    m = matrix(5, 5)
    w, c, t = mpf(w), mpf(c), mpf(t)
    m[0, 1] = 1
    m[1, 0], m[1, 1], m[1, 2] = -w * w, -c, 1
    m[2, 3] = m[3, 4] = 1
    state = expm(m * t) * matrix([mpf(x) for x in (*start, *p)])
    return text(state[0]), text(state[1])

def wave(w, c, t, z, r):
    w, c, t = mpf(w), mpf(c), mpf(t)
    m = matrix(3, 3)
    m[0, 1] = 1
    m[1, 0], m[1, 1], m[1, 2] = -w * w, -c, 1
    m[2, 2] = mpc(*r)
    e = expm(m * t)
    return text(re(e[0, 2] * mpc(*z))), text(re(e[1, 2] * mpc(*z)))

lines = []
for w, rates, times in [
    (0.0, (0.0, 1e-12, 0.1, 50.0), (1e-9, 0.01, 1.0, 30.0)),
    (1e-9, (0.0, 2e-9, 0.1), (1.0, 1e4)),
    (1e-3, (0.0, 2e-3, 5.0), (0.5, 700.0, 5000.0)),
    (7.0, (0.0, 1e-12, 0.14, 14.0, 14.0 * (1 + 1e-9), 14.0 * (1 - 1e-9), 14.0 * (1 + 1e-5), 140.0, 1e5),
     (1e-9, 1e-3, 0.1, 0.1142, 0.115, 1.0, 40.0)),
    (4096.0, (0.0, 81.92, 8192.0, 1e6), (1e-6, 1e-4, 0.02, 0.5)),
]:
    for c in rates:
        for t in times:
            for start, p in (((0.5, -3.0), (0.0, 0.0, 0.0)), ((0.0, 0.0), (1.0, 0.0, 0.0)),
                             ((0.0, 0.0), (0.0, 1.0, 0.0)), ((0.0, 0.0), (0.0, 0.0, 1.0))):
                lines.append([w, c, t, start, p, *line(w, c, t, start, p)])

waves = []
w = 7.0
for c in (0.0, 0.014, 14.0, 14.0 * (1 + 1e-9), 14.0 * (1 - 1e-9), 42.0):
    rates = [(0.0, w * f) for f in (1.0, 1 + 1e-9, 1 - 1e-9, 1 + 1e-5, 1.004, 0.9, 1e-3, 1e-7, 100.0)]
    rates += [(-0.5 * c, abs(w * w - c * c / 4) ** 0.5)] if 0 < c < 13 else []
    rates += [(-0.25, 3.0), (0.0, 0.0)]
    for r in rates:
        for t in (1e-6, 0.02, 0.3, 10.0, 400.0):
            waves.append([w, c, t, (0.6, -0.8), r, *wave(w, c, t, (0.6, -0.8), r)])
for c in (0.0, 0.3):
    for r in ((0.0, 2.0), (0.0, 1e-4)):
        for t in (1e-3, 5.0, 300.0):
            waves.append([0.0, c, t, (0.6, -0.8), r, *wave(0.0, c, t, (0.6, -0.8), r)])

here = os.path.dirname(os.path.abspath(__file__))
with open(os.path.join(here, "forced-values.json"), "w") as file:
    json.dump({"lines": lines, "waves": waves}, file, indent=1)
    file.write("\n")
print(len(lines), len(waves))
