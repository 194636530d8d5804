"""Energies that a triangular displacement puts into clusters of nearly equal frequencies, to 17 digits.

Frequencies by bisection on the count of enclosed-frequencies.py, shapes by shooting from the near end with 130
digits (the evanescent barriers cost up to 50 of them), inner products by quadrature. Inside a pair closer than
double precision only the sum over the pair can be compared. Writes pair-energies.json.

    python3 pair-energies.py        needs mpmath, takes some minutes
"""

import importlib.util
import json
import os

from mpmath import cos, cosh, mp, mpf, nstr, quad, sin, sinh, sqrt

HERE = os.path.dirname(os.path.abspath(__file__))
spec = importlib.util.spec_from_file_location("enclosed", os.path.join(HERE, "enclosed-frequencies.py"))
enclosed = importlib.util.module_from_spec(spec)
spec.loader.exec_module(enclosed)
mp.dps = 130


def fine_frequency(member, order, guess):
    low, high = guess * (1 - mpf(10) ** -11), guess * (1 + mpf(10) ** -11)
    assert enclosed.below(member, low) < order <= enclosed.below(member, high)
    while high - low > mpf(10) ** -110 * high:
        middle = (low + high) / 2
        if enclosed.below(member, middle) < order:
            low = middle
        else:
            high = middle
    return (low + high) / 2


def pieces(member, omega):
    """Per segment the function u(xi) for a shot from the near end."""
    lam = omega * omega
    u, p = (mpf(0), mpf(1)) if member["nearFixed"] else (mpf(1), None)
    if p is None:
        p = (mpf(member["springs"][0]) - lam * mpf(member["masses"][0])) * u
    out = []
    for i, (length, k, rho, s) in enumerate(member["segments"]):
        length, k, rho, s = (mpf(float(v)) for v in (length, k, rho, s))
        square = (lam * rho - s) / k
        root = sqrt(abs(square))
        if square > 0:
            wave = lambda xi, u=u, p=p, root=root, k=k: u * cos(root * xi) + p / (k * root) * sin(root * xi)
            slope = lambda xi, u=u, p=p, root=root, k=k: -u * root * k * sin(root * xi) + p * cos(root * xi)
        else:
            wave = lambda xi, u=u, p=p, root=root, k=k: u * cosh(root * xi) + p / (k * root) * sinh(root * xi)
            slope = lambda xi, u=u, p=p, root=root, k=k: u * root * k * sinh(root * xi) + p * cosh(root * xi)
        out.append((length, rho, wave))
        u, p = wave(length), slope(length)
        node = i + 1
        p = p + (mpf(member["springs"][node]) - lam * mpf(member["masses"][node])) * u
    return out, (u if member["farFixed"] else p)


def energies(member, positions, values, orders, guesses):
    def f(x):
        for (a, b), (va, vb) in zip(zip(positions, positions[1:]), zip(values, values[1:])):
            a, b, va, vb = mpf(a), mpf(b), mpf(va), mpf(vb)
            if a <= x <= b:
                return va + (vb - va) * (x - a) / (b - a)
        return mpf(0)

    out = []
    for order in orders:
        omega = fine_frequency(member, order, mpf(guesses[order - 1]))
        shape, residual = pieces(member, omega)
        start, mass, product = mpf(0), mpf(0), mpf(0)
        size = mpf(0)
        for i, (length, rho, wave) in enumerate(shape):
            cuts = sorted({start, start + length} | {mpf(x) for x in positions if start < mpf(x) < start + length})
            for a, b in zip(cuts, cuts[1:]):
                mass += rho * quad(lambda x: wave(x - start) ** 2, [a, b])
                product += rho * quad(lambda x: wave(x - start) * f(x), [a, b])
            start += length
            node = mpf(member["masses"][i + 1])
            mass += node * wave(length) ** 2
            product += node * wave(length) * f(start)
            size = max(size, abs(wave(length)))
        assert abs(residual) < mpf(10) ** -20 * size + mpf(10) ** -20
        out.append(omega**2 * product**2 / mass / 2)
    return out


def main():
    with open(os.path.join(HERE, "piecewise-members.json")) as file:
        table = {entry["id"]: entry for entry in json.load(file)["entries"]}
    out = []
    for name, positions, values, clusters in [
        ("b-05", [0, 0.25, 1, 3], [0, 0.01, 0, 0], [[1, 2], [3, 4], [5, 6], [7, 8]]),
        ("b-05c", [0, 0.25, 1, 3], [0, 0.01, 0, 0], [[1, 2], [3, 4], [5, 6]]),
        ("b-12", [0, 0.375, 1, 2], [0, 0.01, 0, 0], [[1, 2], [3, 4], [5, 6], [7, 8]]),
        ("b-19", [0, 0.25, 1, 5.8], [0, 0.01, 0, 0], [[1, 2, 3, 4], [5, 6, 7, 8]]),
    ]:
        member = enclosed.lumped(table[name])
        omega = table[name]["expected"]["omega"]
        # A position beyond the sum of the segments in double would leave the member.
        total = sum(mpf(float(s[0])) for s in member["segments"])
        positions = positions[:-1] + [float(total)]
        energy = mpf(0)
        for (a, b), (va, vb) in zip(zip(positions, positions[1:]), zip(values, values[1:])):
            energy += mpf(member["segments"][0][1]) * (mpf(vb) - mpf(va)) ** 2 / (mpf(b) - mpf(a)) / 2
        out.append(
            {
                "id": name,
                "member": member,
                "displacement": {"positions": positions, "values": values},
                "energy": float(nstr(energy, 17)),
                "clusters": [
                    {"orders": orders, "energy": float(nstr(sum(energies(member, positions, values, orders, omega)), 17))}
                    for orders in clusters
                ],
            }
        )
        print(name, flush=True)
    enclosed.write(
        "pair-energies.json",
        "Energies of clusters of nearly equal frequencies after a triangular displacement inside the first span. "
        "Stiffness of all strained stretches is that of the first segment.",
        out,
    )


if __name__ == "__main__":
    main()
