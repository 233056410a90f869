#!/usr/bin/env python3
"""Writes jacketed.txt: random duties of vessels on their jackets, reckoned apart from the program.

Needs SciPy; not needed to run the tests.   python3 generate_jacketed.py | grep -a "^[t#]" > jacketed.txt

  tanks   at each of 20 000 temperatures the balances of A, then of B, are closed (each rate rises with its own species
          alone), and every change of sign of the heat balance is closed by Brent's method: all steady states there are.
          Stability by the eigenvalues of the transient balances, their derivatives by differences. The start is followed
          by a stiff method (tolerance 1e-10) until it is near a stable state; rows in which it is not within 400 space
          times, or two states lie near each other, are dropped.
  tubes   flows of the species, temperature and medium marched by an explicit method of the 8th order and by a stiff one,
          at 1e-12 and 1e-10; the hottest place is where dT/ds
          turns; rows in which they differ by more than 1e-8 are dropped. Counter-current: the temperature of the
          medium where it leaves is found by Brent's method between 400 samples; rows with several solutions are dropped.

A row: kind | phase | volume m3 | feed m3/s | feed K | feed Pa | contents | heat | reactions | U A W/K | medium K |
       m cp W/K (- no limit) | passage | start K | filled with | states | X | outlet K | hottest K
contents, heat, reactions as in sets.txt. states: X, K, stable (y, n) of each, parted by ; (tubes: -).
"""
import random

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import brentq

R = 8.314462618
rnd = random.Random(20011988)


def sig(x, n=4):
    return float(f"%.{n}g" % x)


class Duty:
    """A liquid or gas; A -> B, then perhaps B -> C; amounts in mol per m3 of feed."""

    def __init__(self, phase, steps):
        self.phase = phase
        self.T_in = sig(rnd.uniform(290, 400), 5) if phase == "liquid" else sig(rnd.uniform(450, 650), 5)
        self.P = 101325.0 if phase == "liquid" else float(rnd.choice([1e5, 2e5, 6e5]))
        if phase == "liquid":
            self.cA = sig(10 ** rnd.uniform(2.3, 3.6))
            self.cp = sig(rnd.uniform(1.5e6, 4.2e6))
        else:
            self.yA = round(rnd.uniform(0.02, 0.4), 3)
            self.c_total = self.P / (R * self.T_in)
            self.cA = self.yA * self.c_total
            self.cp_mol = sig(rnd.uniform(30, 60))
        capacity = self.cp if phase == "liquid" else self.cp_mol * self.c_total
        # the second step, whose reactant is made as it goes, of order 1 or more: with a broken order it is checked elsewhere
        self.n = [sig(rnd.choice([1, 1, 1, rnd.uniform(1.0 if j else 0.6, 2.2)]), 3) for j in range(steps)]
        self.E = [sig(rnd.uniform(5e4, 1.3e5)) for _ in range(steps)]
        self.at = 330.0 if phase == "liquid" else 550.0
        self.k = None
        self.dH = []
        for _ in range(steps):
            rise = rnd.choice([rnd.uniform(10, 200), rnd.uniform(10, 120), -rnd.uniform(5, 40)])
            self.dH.append(sig(rise * capacity / self.cA))  # releases
        self.steps = steps

    def rates(self, C, T):
        """per m3 of fluid"""
        k = [self.k[j] * np.exp(-self.E[j] / R * (1 / T - 1 / self.at)) for j in range(self.steps)]
        return [k[j] * max(C[j], 0.0) ** self.n[j] for j in range(self.steps)]

    def text(self, V, v, kind):
        if self.phase == "liquid":
            contents, heat = f"A {self.cA!r}", f"{self.cp!r}"
        else:
            contents = f"A {self.yA!r} N {round(1 - self.yA, 3)!r}"
            heat = " ".join(f"{s} {self.cp_mol!r}" for s in ["A", "N", "B"] + (["C"] if self.steps > 1 else []))
        names = ["A", "B", "C"]
        reactions = " & ".join(
            f"{names[j]} -> {names[j+1]} ; k {self.k[j]!r} ; orders {names[j]} {self.n[j]!r} ; E {self.E[j]!r} at {self.at!r} ; releases {self.dH[j]!r}"
            for j in range(self.steps))
        return f"{kind} | {self.phase} | {V!r} | {v!r} | {self.T_in!r} | {self.P!r} | {contents} | {heat} | {reactions}"


def tank_row(steps):
    d = Duty("liquid", steps)
    V = sig(10 ** rnd.uniform(-1, 1.3))
    tau = sig(10 ** rnd.uniform(1.5, 4.5))
    v = sig(V / tau)
    tau = V / v
    T_mid = d.T_in + rnd.uniform(0, 60)
    d.k = [sig(10 ** rnd.uniform(-1.5, 1) / tau * np.exp(d.E[j] / R * (1 / T_mid - 1 / d.at)) * d.cA ** (1 - d.n[j]))
           for j in range(steps)]
    Tm = sig(d.T_in + rnd.uniform(-60, 30), 5)
    UA = sig(10 ** rnd.uniform(-1.3, 1.0) * v * d.cp)
    mcp = None if rnd.random() < 0.4 else sig(UA * 10 ** rnd.uniform(-0.5, 1.5))
    u = UA if mcp is None else 1 / (1 / UA + 1 / mcp)
    start_K = sig(rnd.choice([d.T_in, Tm, d.T_in + rnd.uniform(-30, 50)]), 5)
    filled = rnd.choice(["feed", "solvent", "product"])

    def root(j, fed, T):
        """C with C + tau k C^n = fed"""
        k = d.k[j] * np.exp(-d.E[j] / R * (1 / T - 1 / d.at))
        if fed <= 0:
            return 0.0
        if d.n[j] == 1:
            return fed / (1 + tau * k)
        lo, hi = 0.0, fed
        C = fed / 2
        for _ in range(200):
            f = C + tau * k * C ** d.n[j] - fed
            if f > 0:
                hi = C
            else:
                lo = C
            nxt = C - f / (1 + tau * k * d.n[j] * C ** (d.n[j] - 1))
            if not lo < nxt < hi:
                nxt = (lo + hi) / 2
            if abs(nxt - C) <= 1e-16 * fed:
                break
            C = nxt
        return C

    def contents(T):
        A = root(0, d.cA, T)
        if steps == 1:
            return [A]
        return [A, root(1, d.cA - A, T)]

    def heat(T):
        C = contents(T)
        made = d.dH[0] * (d.cA - C[0])
        if steps > 1:
            made += d.dH[1] * (d.cA - C[0] - C[1])
        return made - d.cp * (T - d.T_in) - u / v * (T - Tm)

    def f(t, y):
        r = d.rates(y, y[-1])
        dy = [(d.cA - y[0]) / tau - r[0]]
        if steps > 1:
            dy.append(-y[1] / tau + r[0] - r[1])
        dy.append((d.T_in - y[-1]) / tau + sum(d.dH[j] * r[j] for j in range(steps)) / d.cp - u / (V * d.cp) * (y[-1] - Tm))
        return dy

    rise = sum(max(0, h) * d.cA / d.cp for h in d.dH)
    fall = sum(min(0, h) * d.cA / d.cp for h in d.dH)
    grid = np.linspace(min(d.T_in, Tm) + fall - 1, max(d.T_in, Tm) + rise + 1, 20001)
    grid = grid[grid > 150]
    h = np.array([heat(T) for T in grid])
    states = []
    for i in range(len(grid) - 1):
        if h[i] == 0 or h[i] * h[i + 1] < 0:
            states.append(brentq(heat, grid[i], grid[i + 1], xtol=1e-12, rtol=1e-15))
    # a near miss between samples: too close to a fold
    for i in range(1, len(grid) - 1):
        if abs(h[i]) < min(abs(h[i - 1]), abs(h[i + 1])) and h[i - 1] * h[i] > 0 and h[i] * h[i + 1] > 0 and abs(h[i]) < 1e-3 * d.cp:
            return None
    if any(b - a < 0.5 for a, b in zip(states, states[1:])):
        return None
    told = []
    for T in states:
        y = np.array(contents(T) + [T])
        J = np.zeros((len(y), len(y)))
        for i in range(len(y)):
            e = max(1e-6 * abs(y[i]), 1e-7)
            up, dn = y.copy(), y.copy()
            up[i] += e
            dn[i] -= e
            J[:, i] = (np.array(f(0, up)) - np.array(f(0, dn))) / (2 * e)
        growth = max(np.linalg.eigvals(J).real) * tau
        if abs(growth) < 0.02:
            return None
        told.append((1 - y[0] / d.cA, T, growth < 0, y))
    start = {"feed": [d.cA, 0.0], "solvent": [0.0, 0.0], "product": [0.0, d.cA]}[filled][:steps] + [start_K]
    if steps > 1 and filled == "solvent":
        start = [0.0, 0.0, start_K]
    s = solve_ivp(f, [0, 400 * tau], start, method="LSODA", rtol=1e-10, atol=1e-10)
    if not s.success:
        return None
    end = s.y[:, -1]
    near = [t for t in told if t[2] and abs(t[1] - end[-1]) < 1e-4 and abs(t[3][0] - end[0]) < 1e-5 * d.cA]
    if len(near) != 1:
        return None
    told.sort()
    texts = " ; ".join(f"{X!r} {T!r} {'y' if ok else 'n'}" for X, T, ok, _ in told)
    X, T = near[0][0], near[0][1]
    peak = max(s.y[-1])
    return (d.text(V, v, "tank") + f" | {UA!r} | {Tm!r} | {mcp if mcp is None else repr(mcp)} | uniform | {start_K!r} | {filled} | {texts} | {X!r} | {T!r} | -"
            ).replace("| None |", "| - |"), len(told)


def tube_row(phase, steps, passage):
    d = Duty(phase, steps)
    V = sig(10 ** rnd.uniform(-2, 0.5))
    tau = sig(10 ** rnd.uniform(1, 3.5))
    v = sig(V / tau)
    tau = V / v
    T_mid = d.T_in + rnd.uniform(0, 40)
    d.k = [sig(10 ** rnd.uniform(-1, 1) / tau * np.exp(d.E[j] / R * (1 / T_mid - 1 / d.at)) * d.cA ** (1 - d.n[j]))
           for j in range(steps)]
    capacity = d.cp if phase == "liquid" else d.cp_mol * d.c_total
    Tm = sig(d.T_in + rnd.uniform(-60, 40), 5)
    UA = sig(10 ** rnd.uniform(-0.5, 1.2) * v * capacity)
    mcp = None if passage == "uniform" else sig(v * capacity * 10 ** rnd.uniform(-0.1, 1.2))

    def f(s, y):
        n, T = y[:steps], y[steps]
        m = y[steps + 1] if mcp is not None else Tm
        expand = T / d.T_in if phase == "gas" else 1.0  # moles do not change
        r = d.rates([c / expand for c in n], T)
        dy = [-tau * r[0]]
        if steps > 1:
            dy.append(tau * (r[0] - r[1]))
        dy.append((tau * sum(d.dH[j] * r[j] for j in range(steps)) - UA / v * (T - m)) / capacity)
        if mcp is not None:
            dy.append((1 if passage == "co-current" else -1) * UA / mcp * (T - m))
        return dy

    def turns(s, y):
        return f(s, y)[steps]

    def march(leaving, method, rtol):
        y0 = [d.cA] + ([0.0] if steps > 1 else []) + [d.T_in] + ([leaving] if mcp is not None else [])
        with np.errstate(all="ignore"):
            return solve_ivp(f, [0, 1], y0, method=method, rtol=rtol, atol=1e-13 * np.array([d.cA] * steps + [400] * (len(y0) - steps)), events=turns)

    leaving = Tm
    if passage == "counter-current":
        rise = sum(max(0, h) * d.cA / capacity for h in d.dH)
        fall = sum(min(0, h) * d.cA / capacity for h in d.dH)
        at = np.linspace(max(150, min(d.T_in, Tm) + fall), max(d.T_in, Tm) + rise, 121)

        def off(K, rtol=1e-8):
            s = march(K, "LSODA", rtol)
            return s.y[-1, -1] - Tm if s.success else np.nan
        g = [off(K) for K in at]
        if not np.all(np.isfinite(g)):
            return None
        changes = [i for i in range(120) if g[i] * g[i + 1] <= 0]
        if len(changes) != 1:
            return None
        leaving = brentq(lambda K: off(K, 1e-12), at[changes[0]], at[changes[0] + 1], xtol=1e-11)
    a, b = march(leaving, "DOP853", 1e-12), march(leaving, "Radau", 1e-10)
    if not (a.success and b.success):
        return None
    X = 1 - a.y[0, -1] / d.cA
    if abs(a.y[0, -1] - b.y[0, -1]) > 1e-8 * d.cA or abs(a.y[steps, -1] - b.y[steps, -1]) > 1e-5 or X < 0.01:
        return None
    hottest = max([d.T_in, a.y[steps, -1]] + [y[steps] for y in a.y_events[0]])
    return (d.text(V, v, "tube") + f" | {UA!r} | {Tm!r} | {'-' if mcp is None else repr(mcp)} | {passage} | {d.T_in!r} | feed | - | {X!r} | {a.y[steps, -1]!r} | {float(hottest)!r}").replace("np.float64", "")


def rows(count, make):
    done = 0
    while done < count:
        row = make()
        if row is None:
            continue
        text = row[0] if isinstance(row, tuple) else row
        if isinstance(row, tuple) and row[1] == 1 and rnd.random() < 0.85:
            continue  # several states are the ones to see
        print(text, flush=True)
        done += 1


print("# kind | phase | volume m3 | feed m3/s | feed K | feed Pa | contents | heat | reactions | U A | medium K | m cp | passage | start K | filled with | states | X | outlet K | hottest K")
rows(110, lambda: tank_row(1))
rows(30, lambda: tank_row(2))
rows(60, lambda: tube_row("liquid", rnd.choice([1, 2]), "uniform"))
rows(30, lambda: tube_row("gas", rnd.choice([1, 2]), "uniform"))
rows(40, lambda: tube_row("liquid", rnd.choice([1, 2]), "co-current"))
rows(30, lambda: tube_row("liquid", rnd.choice([1, 2]), "counter-current"))
