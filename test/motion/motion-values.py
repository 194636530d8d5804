"""Values at 40 digits for the tests of modal motion, projection and integrals; writes motion-values.json beside itself.

Inputs are exact binary doubles, results are printed to 25 digits.

- freeMotion: q'' + c q' + w^2 q = 0 by its two complex roots (limit form at a double root)
- dissipated: energy taken by the damping up to t, integral of c q'^2 by the same roots
- powers: integral over [0, h] of t^d y(xi), t = xi/h, y'' + k2 y = 0 (exact recursion at 300 digits)
- uniform: m(g, phi_n) = integral of rho x^d phi_n over [from, to] on a uniform fixed-fixed member
- stepped: a_n = m(f, phi_n) and v_n = m(g, phi_n) on a member of three segments with foundation, masses and a spring;
  frequencies by bracketing and secant on the end condition, mass products by quadrature of half waves
"""
import json, os
from mpmath import mp, mpf, mpc, sqrt, sin, cos, sinh, cosh, exp, pi, nstr, quad, findroot, linspace, re, floor, ceil, fabs

mp.dps = 60

def text(x): return nstr(x, 25, min_fixed=-1, max_fixed=-1)

# free motion ---------------------------------------------------------------------------------------

def motion(a, v, w, c, t):
    a, v, w, c, t = map(mpf, (a, v, w, c, t))
    if w == 0:
        if c == 0: return a + v * t, v
        return a + v * (1 - exp(-c * t)) / c, v * exp(-c * t)
    root = sqrt(mpc(c * c / 4 - w * w))
    s1, s2 = -c / 2 + root, -c / 2 - root
    if root == 0:
        b = v - s1 * a
        return re((a + b * t) * exp(s1 * t)), re((b + s1 * (a + b * t)) * exp(s1 * t))
    p, q = (v - s2 * a) / (s1 - s2), -(v - s1 * a) / (s1 - s2)
    return re(p * exp(s1 * t) + q * exp(s2 * t)), re(p * s1 * exp(s1 * t) + q * s2 * exp(s2 * t))

def dissipated(a, v, w, c, t):
    a, v, w, c, t = map(mpf, (a, v, w, c, t))
    q, u = motion(a, v, w, c, t)
    return (v * v + w * w * a * a - u * u - w * w * q * q) / 2

free = []
rates = []
for w in (1.0, 2.75):
    for zeta in (0.0, 1e-9, 0.05, 0.5, 0.9999, 1 - 1e-6, 1 - 1e-9, 1 - 1e-13, 1.0, 1 + 1e-13, 1 + 1e-9, 1 + 1e-6, 1.0001,
                 1.5, 5.0, 1e3, 1e8):
        rates.append((w, 2 * zeta * w))
rates += [(0.0, 0.0), (0.0, 0.3), (0.0, 1e-20), (0.0, 1e6), (1e5, 1e-3), (1e-5, 10.0)]
for w, c in rates:
    for a, v in ((1.0, 0.0), (0.0, 1.0), (0.625, -1.75)):
        for t in (0.0, 1e-6, 3e-5, 1e-3, 0.25, 2.0, 12.5, 800.0, 1e9):
            if a == 0.625 and t in (1e-6, 12.5): continue
            if a != 0.625 and t in (0.0, 800.0): continue
            q, u = motion(a, v, w, c, t)
            if fabs(q) < mpf(10) ** -300: q = mpf(0)
            if fabs(u) < mpf(10) ** -300: u = mpf(0)
            free.append([a, v, w, c, t, text(q), text(u)])

lost = []
for w, c in rates:
    if c == 0: continue
    for a, v in ((1.0, 0.0), (0.625, -1.75)):
        for t in (1e-3, 0.25, 2.0, 800.0):
            lost.append([a, v, w, c, t, text(dissipated(a, v, w, c, t))])

# integrals of powers against a wave ------------------------------------------------------------------

def power_integrals(k2, value, slope, h, degree):
    """Integrals of t^d y over [0, h], d = 0 .. degree."""
    with mp.workdps(300):
        k2, value, slope, h = map(mpf, (k2, value, slope, h))
        if k2 == 0:
            return [h * (value / (d + 1) + slope * h / (d + 2)) for d in range(degree + 1)]
        kappa = sqrt(mpc(k2))
        plus, minus = (value + slope / (1j * kappa)) / 2, (value - slope / (1j * kappa)) / 2
        sums = [mpc(0)] * (degree + 1)
        for sign, amplitude in ((1, plus), (-1, minus)):
            z = 1j * sign * kappa * h
            e = exp(z)
            integral = (e - 1) / z
            sums[0] += amplitude * integral * h
            for d in range(1, degree + 1):
                integral = (e - d * integral) / z
                sums[d] += amplitude * integral * h
        return [re(s) for s in sums]

powers = []
for h, k2 in ((0.5, 0.0), (0.5, 1e-6), (0.5, 4.0), (0.5, 36.0), (0.5, 144.0), (0.5, 1600.0), (0.5, 1e6), (0.5, 1e10),
              (0.5, -1e-6), (0.5, -4.0), (0.5, -144.0), (0.5, -1e4), (0.5, -1e6)):
    for value, slope in ((1.0, 0.0), (0.0, 1.0), (-0.75, 20.0)):
        y = lambda xi: mpf(value) * cos(sqrt(mpc(k2)) * xi) + mpf(slope) * (
            sin(sqrt(mpc(k2)) * xi) / sqrt(mpc(k2)) if k2 != 0 else xi)
        integrals = power_integrals(k2, value, slope, h, 20)
        if k2 < 0 and slope != 1.0 and k2 * h * h < -50: continue  # a decay is given by its two ends there
        powers.append({"length": h, "square": k2, "value": value, "slope": slope, "farValue": text(re(y(mpf(h)))),
                       "integrals": [text(i) for i in integrals]})

# uniform member ----------------------------------------------------------------------------------------

length, stiffness, inertia = 2.0, 3.0, 0.5
uniform = []
for n in (1, 2, 7, 50, 400):
    kappa = n * pi / mpf(length)
    height = sqrt(2 / (mpf(inertia) * length))
    start, end = mpf(0.25), mpf(1.75)
    for d in range(21):
        with mp.workdps(300):
            k = n * pi / mpf(length)
            z = 1j * k
            integral = (exp(z * end) - exp(z * start)) / z
            for m in range(1, d + 1):
                integral = (end ** m * exp(z * end) - start ** m * exp(z * start) - m * integral) / z
            value = mpf(inertia) * height * mp.im(integral)
        uniform.append([n, d, text(value)])

# stepped member ----------------------------------------------------------------------------------------

segments = [(1.0, 2.0, 3.0, 0.0), (0.75, 5.0, 0.5, 40.0), (1.5, 3.0, 1.0, 0.0)]
masses = [0.0, 0.5, 0.0, 0.25]
springs = [0.0, 0.0, 4.0, 0.0]

def march(w):
    """States (u, p) at both ends of every segment for u = 0, p = 1 at x = 0."""
    u, p = mpf(0), mpf(1)
    states = []
    for i, (l, k, rho, s) in enumerate(segments):
        l, k, rho, s = map(mpf, (l, k, rho, s))
        kappa = sqrt(mpc((w * w * rho - s) / k))
        states.append((u, p, kappa))
        c, sn = re(cos(kappa * l)), re(sin(kappa * l) / kappa)
        k2 = (w * w * rho - s) / k
        u, p = c * u + sn * p / k, c * p - k * k2 * sn * u
        if i < 2: p += (springs[i + 1] - w * w * masses[i + 1]) * u
    return states, u, p

def defect(w):
    _, u, p = march(w)
    return p - w * w * masses[3] * u

def frequencies(orders):
    found, w, step = [], mpf(0.003), mpf(0.02)
    with mp.workdps(20):
        before = defect(w)
        while len(found) < max(orders):
            w += step
            now = defect(w)
            if (now > 0) != (before > 0): found.append((w - step, w))
            before = now
    return {n: findroot(defect, found[n - 1], solver='anderson', tol=mpf(10) ** -100) for n in orders}

def piecewise(points):
    def f(x):
        for (x0, y0), (x1, y1) in zip(points, points[1:]):
            if x <= x1: return mpf(y0) + (mpf(y1) - y0) * (x - mpf(x0)) / (mpf(x1) - x0)
        return mpf(points[-1][1])
    return f

total = mpf(3.25)
shapes = {
    "polyline": (piecewise([(0, 0), (0.5, 0.75), (1.25, -0.5), (2, 1), (3.25, 0.25)]), [0.5, 1.25, 2]),
    "polynomial": (lambda x: x - x ** 2 / 2 + x ** 3 / 4 + x ** 4 / 8 - x ** 5 / 16 + x ** 6 / 64, []),
    "bump": (lambda x: ((x - mpf(0.5)) * (mpf(2.5) - x)) ** 2 if mpf(0.5) <= x <= mpf(2.5) else mpf(0), [0.5, 2.5]),
    "half-sine": (lambda x: sin(3 * pi * x / total), []),
    "uniform": (lambda x: mpf(1) if mpf(0.5) <= x <= mpf(2.5) else mpf(0), [0.5, 2.5]),
}
stepped = []
roots = frequencies([1, 2, 3, 5, 12, 60, 200])
for n, w in roots.items():
    states, u_end, _ = march(w)
    starts = [mpf(0), mpf(1), mpf(1.75), mpf(3.25)]
    def phi(x, i):
        (l, k, rho, s), (u, p, kappa) = segments[i], states[i]
        xi = x - starts[i]
        return re(u * cos(kappa * xi) + p / k * sin(kappa * xi) / kappa)
    def product(f, breaks):
        value = mpf(0)
        for i, (l, k, rho, s) in enumerate(segments):
            cuts = sorted({starts[i], starts[i + 1]} | {mpf(b) for b in breaks if starts[i] < b < starts[i + 1]})
            for a, b in zip(cuts, cuts[1:]):
                panels = int(fabs(states[i][2]) * (b - a) / 3) + 1
                # values just inside the cell: a shape may jump at its ends
                g = lambda x: f(min(max(x, a + mpf(10) ** -40), b - mpf(10) ** -40)) * phi(x, i)
                value += mpf(rho) * quad(g, linspace(a, b, panels + 1), maxdegree=5)
        ends = [mpf(0)] + [states[i][0] for i in (1, 2)] + [u_end]
        return value + sum(mpf(masses[j]) * f(starts[j]) * ends[j] for j in range(4) if masses[j])
    mass = mpf(0)
    for i, (l, k, rho, s) in enumerate(segments):
        u, p, kappa = states[i]
        panels = int(fabs(kappa) * mpf(l) / 3) + 1
        mass += mpf(rho) * quad(lambda x: phi(x, i) ** 2, linspace(starts[i], starts[i + 1], panels + 1), maxdegree=5)
    mass += mpf(masses[1]) * states[1][0] ** 2 + mpf(masses[3]) * u_end ** 2
    height = 1 / sqrt(mass)
    stepped.append({"order": n, "omega": text(w),
                    "products": {name: text(height * product(f, breaks)) for name, (f, breaks) in shapes.items()}})

out = {"freeMotion": free, "dissipated": lost, "powers": powers, "uniform": uniform, "stepped": stepped}
here = os.path.dirname(os.path.abspath(__file__))
with open(os.path.join(here, "motion-values.json"), "w") as file:
    json.dump(out, file, indent=2)
    file.write("\n")
