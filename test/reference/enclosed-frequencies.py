"""Natural frequencies to 32 digits of the members as binary doubles describe them.

Every number of a member is taken as the double nearest to its printed decimal, exactly, so that a certified
enclosure can be compared without any allowance for the rounding of the inputs. Method: Wittrick-Williams count
(Wittrick & Williams, Q. J. Mech. Appl. Math. 24, 1971, 263-284) on the exact dynamic stiffness of the segments,
bisection on the count alone with 90 digits. Writes enclosed-frequencies.json and random-members.json.

    python3 enclosed-frequencies.py        needs mpmath, takes some minutes
"""

import json
import os
import random

from mpmath import coth, cot, floor, mp, mpf, nstr, pi, sin, sinh, sqrt

mp.dps = 90
HERE = os.path.dirname(os.path.abspath(__file__))


def below(member, omega):
    """Number of natural frequencies below omega."""
    lam = omega * omega
    n = len(member["segments"])
    diagonal = [mpf(float(member["springs"][i])) - lam * mpf(float(member["masses"][i])) for i in range(n + 1)]
    off = []
    count = 0
    for i, (length, stiffness, inertia, foundation) in enumerate(member["segments"]):
        length, k = mpf(float(length)), mpf(float(stiffness))
        square = (lam * mpf(float(inertia)) - mpf(float(foundation))) / k
        if square > 0:
            kappa = sqrt(square)
            count += int(floor(kappa * length / pi))
            own, cross = k * kappa * cot(kappa * length), -k * kappa / sin(kappa * length)
        elif square < 0:
            kappa = sqrt(-square)
            own, cross = k * kappa * coth(kappa * length), -k * kappa / sinh(kappa * length)
        else:
            own, cross = k / length, -k / length
        diagonal[i] += own
        diagonal[i + 1] += own
        off.append(cross)
    first = 1 if member["nearFixed"] else 0
    last = n - 1 if member["farFixed"] else n
    pivot = None
    for i in range(first, last + 1):
        pivot = diagonal[i] - (off[i - 1] ** 2 / pivot if pivot is not None else 0)
        if pivot < 0:
            count += 1
    return count


def frequency(member, order, low, high):
    """Frequency number `order` (rigid-body modes counted) between low and high, by bisection on the count."""
    while below(member, high) < order:
        high *= 2
    assert below(member, low) < order
    while (high - low) > mpf(10) ** -40 * high:
        middle = (low + high) / 2
        if below(member, middle) < order:
            low = middle
        else:
            high = middle
    return nstr((low + high) / 2, 32, strip_zeros=False)


def lumped(entry):
    """Member of an entry of uniform-ends.json or piecewise-members.json, or None."""
    inputs = entry["inputs"]
    if "segments" in inputs:
        segments = [(s["L"], s["k"], s["rho"], s["s"]) for s in inputs["segments"]]
        return dict(
            segments=segments,
            masses=inputs["node_masses"],
            springs=inputs["node_springs"],
            nearFixed=inputs["left"] == "fixed",
            farFixed=inputs["right"] == "fixed",
        )
    if isinstance(inputs.get("left"), dict):
        left, right = inputs["left"], inputs["right"]
        return dict(
            segments=[(inputs["L"], inputs["k"], inputs["rho"], 0)],
            masses=[left["M"], right["M"]],
            springs=[left["K"], right["K"]],
            nearFixed=left["type"] == "fixed",
            farFixed=right["type"] == "fixed",
        )
    return None


def enclosed():
    out = []
    for name in ("uniform-ends", "piecewise-members"):
        with open(os.path.join(HERE, name + ".json")) as file:
            entries = json.load(file)["entries"]
        for entry in entries:
            member = lumped(entry)
            if member is None:
                continue
            expected = entry["expected"]
            rigid = expected["rigid_body_modes"]
            values = []
            for i, guess in enumerate(expected["omega"] if "omega" in expected else expected["z"]):
                guess = mpf(guess)
                values.append(frequency(member, i + 1 + rigid, guess * (1 - mpf(10) ** -11), guess * (1 + mpf(10) ** -11)))
            out.append({"id": entry["id"], "omega": values})
            print(entry["id"], flush=True)
    return out


def random_member(rng):
    """Up to six segments, contrasts to 1e6, lumps and foundations; numbers of four digits."""

    def spread(decades):
        return float("%.4g" % 10 ** rng.uniform(-decades, decades))

    n = rng.randint(1, 6)
    decades = rng.choice([0.5, 1.5, 3])
    segments = []
    for _ in range(n):
        stiffness, inertia = spread(decades), spread(decades)
        foundation = float("%.4g" % (stiffness * rng.uniform(1, 400))) if rng.random() < 0.25 else 0.0
        if n > 1 and rng.random() < 0.08:
            inertia = 0.0
        segments.append((float("%.4g" % rng.uniform(0.1, 2)), stiffness, inertia, foundation))
    if all(s[2] == 0 for s in segments):
        segments[0] = segments[0][:2] + (1.0,) + segments[0][3:]
    masses = [spread(2) if rng.random() < 0.35 else 0.0 for _ in range(n + 1)]
    springs = [spread(2) if rng.random() < 0.3 else 0.0 for _ in range(n + 1)]
    near, far = rng.random() < 0.5, rng.random() < 0.5
    if near:
        masses[0] = springs[0] = 0.0
    if far:
        masses[n] = springs[n] = 0.0
    return dict(segments=segments, masses=masses, springs=springs, nearFixed=near, farFixed=far)


def randoms(count):
    rng = random.Random(1877)
    out = []
    for i in range(count):
        member = random_member(rng)
        supported = member["nearFixed"] or member["farFixed"] or any(member["springs"]) or any(s[3] for s in member["segments"])
        rigid = 0 if supported else 1
        travel = sum(mpf(s[0]) * sqrt(mpf(s[2]) / mpf(s[1])) for s in member["segments"])
        orders = [n for n in (1, 2, 3, 4, 5, 6, 8, 12, 40, 150) if n > rigid]
        values = [[n, frequency(member, n, mpf(10) ** -25, pi * (n + 1) / travel)] for n in orders]
        out.append({"id": "r-%02d" % (i + 1), "rigid_body_modes": rigid, "member": member, "omega": values})
        print(out[-1]["id"], flush=True)
    return out


def write(name, notes, entries):
    lines = ",\n".join(" " + json.dumps(entry) for entry in entries)
    with open(os.path.join(HERE, name), "w") as file:
        file.write('{\n"notes": %s,\n"entries": [\n%s\n]\n}\n' % (json.dumps(notes), lines))


if __name__ == "__main__":
    write(
        "random-members.json",
        "Random members; omega is a list of [order, frequency in rad/s to 32 digits], rigid-body modes counted in the order. "
        "Segments are [length, stiffness, inertia, foundation]; masses and springs run over the nodes.",
        randoms(60),
    )
    write(
        "enclosed-frequencies.json",
        "Frequencies in rad/s to 32 digits of the entries of uniform-ends.json and piecewise-members.json with "
        "their inputs taken as exact binary doubles.",
        enclosed(),
    )
