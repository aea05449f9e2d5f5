"""The same cases through scipy.integrate.quad in ln f with break points; prints JSON: seconds a call and the result."""
import json
import math
import sys
import time

from scipy.integrate import quad

given = json.load(sys.stdin)
model = given["model"]


def gain_of(gain):
    kind = gain["kind"]
    if kind == "none":
        return (lambda f: 1.0), []
    if kind == "butterworth":
        order, cutoff = gain["order"], gain["cutoff"]
        return (lambda f: 1.0 / (1.0 + (f / cutoff) ** (2 * order))), [cutoff]
    if kind == "chebyshev":
        order, edge = gain["order"], gain["edge"]
        eps2 = math.expm1(gain["ripple"] * math.log(10) / 10)

        def chebyshev(f):
            x = f / edge
            t = math.cos(order * math.acos(x)) if x <= 1 else math.cosh(order * math.acosh(x))
            return 1.0 / (1.0 + eps2 * t * t)

        return chebyshev, [edge * math.cos(math.pi * (k + 0.5) / order) for k in range(order // 2)] + [edge]
    if kind == "a":
        p = [20.59899705756814, 107.6526486430463, 737.8622307362899, 12194.21714799801]

        def raw(f):
            x = f * f
            return (x * x / ((x + p[0] ** 2) * (x + p[3] ** 2))) ** 2 / ((x + p[1] ** 2) * (x + p[2] ** 2))

        one = raw(1000.0)
        return (lambda f: raw(f) / one), p
    if kind == "average":
        seconds = gain["seconds"]
        return (lambda f: (math.sin(math.pi * f * seconds) / (math.pi * f * seconds)) ** 2), None
    order, ratio, rate = gain["order"], gain["ratio"], gain["rate"]

    def sinc(f):
        below = math.sin(math.pi * f / rate)
        if below == 0.0:
            return 1.0
        return (math.sin(math.pi * f * ratio / rate) / (ratio * below)) ** (2 * order)

    return sinc, None


def breaks_of(gain, low, high, knots):
    if knots is not None:
        return sorted(k for k in knots if low < k < high)
    lobe = 1 / gain["seconds"] if gain["kind"] == "average" else gain["rate"] / gain["ratio"]
    count = int(high / lobe)
    return [lobe * k for k in range(1, count + 1) if low < lobe * k < high]


out = []
for case in given["cases"]:
    gain, knots = gain_of(case["gain"])
    low, high = case["band"]
    floor2, corner, exponent = model["floor"] ** 2, model["cornerHz"], model["exponent"]

    def integrand(t):
        f = math.exp(t)
        return floor2 * (1 + (corner / f) ** exponent) * gain(f) * f

    edges = [low, *breaks_of(case["gain"], low, high, knots), high]

    def run():
        return sum(
            quad(integrand, math.log(a), math.log(b), epsabs=0, epsrel=1e-12, limit=200)[0]
            for a, b in zip(edges, edges[1:])
        )

    value = run()
    calls, begin = 0, time.perf_counter()
    while calls < 1 or time.perf_counter() - begin < 0.4:
        run()
        calls += 1
    out.append({"rms": math.sqrt(value), "seconds": (time.perf_counter() - begin) / calls})
print(json.dumps(out))
