#!/usr/bin/env python3
"""Writes sets.txt: random duties with conversions reckoned apart from the program.

Needs SciPy; not needed to run the tests.   python3 generate.py > sets.txt

How the figures come about, none of them with extents marched as the program does it:
  one reaction     the conversion is drawn, and the volume that gives it follows: a tube's by Gauss-Kronrod quadrature of
                   1/r over the extent (split in pieces, error below 1e-12), a tank's by division. A tank's other steady
                   states are looked for on a grid of 40 000 extents; filled with feed it comes to the lowest one.
  one, used up     a tube longer than it takes to use up a reactant whose order is below one: the limit itself.
  more reactions   flows of the species marched by an 8th-order explicit method at 1e-13, and again by a stiff one; rows in
                   which the two differ by more than 1e-10 are dropped. Tanks: brought on line from the feed by a
                   stiff method, then polished by Newton's method on the balances of the species.
Rows near a fold, where the figure would hang on the last digit of an input, are dropped.

A row: kind | phase | thermal | volume m3 | feed m3/s | feed K | feed Pa | contents | heat | reactions | states | X | outlet K
contents: mol/m3 (liquid) or mole fractions (gas). heat: J/m3/K (liquid) or J/mol/K of every species (gas), - where not asked.
reactions: parted by &, their properties by ;   k in mol, m3, s of the reaction as written; releases J/mol at 298.15 K.
states: how many steady states a tank has, - where not told.
"""
import math
import random

import numpy as np
from scipy.integrate import quad, solve_ivp
from scipy.optimize import brentq

R = 8.314462618
rnd = random.Random(19640214)


def draw(lo, hi):
    return float("%.4g" % rnd.uniform(lo, hi))


def draw_log(lo, hi):
    return float("%.4g" % math.exp(rnd.uniform(math.log(lo), math.log(hi))))


class Reaction:
    def __init__(self, equation, nu, orders, k, E=0.0, at=300.0, releases=0.0, K=None, adsorption=None, power=1):
        self.equation, self.nu, self.orders, self.k, self.E, self.at = equation, nu, orders, k, E, at
        self.releases, self.K, self.adsorption, self.power = releases, K, adsorption or {}, power

    def heat(self, T, cp):
        """dH at T, J/mol; cp: of every species (gas) or None (constant)."""
        dcp = sum(n * cp[s] for s, n in self.nu.items()) if cp else 0.0
        return -self.releases + dcp * (T - 298.15)

    def equilibrium(self, T, cp):
        b = sum(n * cp[s] for s, n in self.nu.items()) if cp else 0.0
        a = -self.releases - b * 298.15
        return self.K * math.exp(-a / R * (1 / T - 1 / self.at) + b / R * math.log(T / self.at))

    def rate(self, C, T, cp):
        if any(C[s] <= 0 for s, n in self.nu.items() if n < 0):
            return 0.0
        r = self.k * math.exp(-self.E / R * (1 / T - 1 / self.at))
        for s, n in self.orders.items():
            r *= C[s] ** n
        if self.K is not None:
            q = 1.0
            for s, n in self.nu.items():
                q *= C[s] ** n if n > 0 or C[s] > 0 else 0.0
            r *= 1 - q / self.equilibrium(T, cp)
        return r / (1 + sum(v * C[s] for s, v in self.adsorption.items())) ** self.power

    def text(self):
        t = [self.equation, "k %r" % self.k, "orders " + " ".join("%s %g" % i for i in self.orders.items())]
        if self.E:
            t.append("E %r at %r" % (self.E, self.at))
        if self.releases:
            t.append("releases %r" % self.releases)
        if self.K is not None:
            t.append("K %r at %r" % (self.K, self.at))
        if self.adsorption:
            t.append("adsorption " + " ".join("%s %r" % i for i in self.adsorption.items()) + " power %g" % self.power)
        return " ; ".join(t)


class Set:
    def __init__(self, kind, phase, thermal, contents, reactions, T, P=0.0, heat=None):
        self.kind, self.phase, self.thermal, self.contents = kind, phase, thermal, contents
        self.reactions, self.T, self.P, self.heat = reactions, T, P, heat
        self.feed = draw_log(1e-5, 1e-1)
        total = P / (R * T) if phase == "gas" else 1.0
        self.species = list(contents) + [s for r in reactions for s in r.nu if s not in contents]
        self.species = list(dict.fromkeys(self.species))
        self.c0 = {s: contents.get(s, 0.0) * total for s in self.species}
        self.cp = heat if phase == "gas" else None

    def amounts(self, xi):
        c = dict(self.c0)
        for r, x in zip(self.reactions, xi):
            for s, n in r.nu.items():
                c[s] += n * x
        return c

    def temperature(self, xi):
        if self.thermal == "hold":
            return self.T
        released = -sum(r.heat(self.T, self.cp) * x for r, x in zip(self.reactions, xi))
        if self.phase == "liquid":
            return self.T + released / self.heat
        c = self.amounts(xi)
        return self.T + released / sum(c[s] * self.cp[s] for s in self.species)

    def concentrations(self, xi, T):
        c = self.amounts(xi)
        if self.phase == "liquid":
            return c
        scale = self.P / (R * T) / sum(c.values())
        return {s: v * scale for s, v in c.items()}

    def rates(self, xi):
        T = self.temperature(xi)
        C = self.concentrations(xi, T)
        return np.array([r.rate(C, T, self.cp) for r in self.reactions])

    def most(self):
        """extent at which the first reactant of the only reaction is gone"""
        r = self.reactions[0]
        return min(self.c0[s] / -n for s, n in r.nu.items() if n < 0)

    def conversion(self, xi):
        return 1 - self.amounts(xi)["A"] / self.c0["A"]

    def row(self, volume, xi, states):
        return " | ".join([
            self.kind, self.phase, self.thermal, "%r" % volume, "%r" % self.feed, "%r" % self.T,
            "%r" % self.P if self.phase == "gas" else "-",
            " ".join("%s %r" % i for i in self.contents.items()),
            "-" if self.thermal == "hold" else "%r" % self.heat if self.phase == "liquid"
            else " ".join("%s %r" % (s, self.heat[s]) for s in self.species),
            " & ".join(r.text() for r in self.reactions), str(states), "%.15g" % self.conversion(xi),
            "%.15g" % self.temperature(xi)])


def one_reaction(s, share):
    """share of what can be reached; None where the row is no good"""
    top = s.most()
    grid = np.concatenate([np.linspace(0, top, 40001)[:-1], [top * (1 - 1e-9)]])
    rates = np.array([s.rates([x])[0] for x in grid])
    stop = np.argmax(rates <= 0) if (rates <= 0).any() else len(grid) - 1   # equilibrium
    if stop == 0:
        return None
    if rates[stop] <= 0:
        top = brentq(lambda x: s.rates([x])[0], grid[stop - 1], grid[stop], xtol=1e-16 * top, rtol=1e-14)
    xi = share * top
    if s.kind == "tube":
        edges = np.linspace(0, xi, 9)
        tau, error = 0.0, 0.0
        for a, b in zip(edges[:-1], edges[1:]):
            part, e = quad(lambda x: 1 / s.rates([x])[0], a, b, epsabs=0, epsrel=1e-13, limit=200)
            tau, error = tau + part, error + e
        if not 0 < error < 1e-11 * tau:
            return None
        return s.row(tau * s.feed, [xi], "-")
    tau = xi / s.rates([xi])[0]
    left = grid - tau * rates                                   # zero at every steady state
    roots = [i for i in range(len(grid) - 1) if left[i] < 0 <= left[i + 1] or left[i] >= 0 > left[i + 1]]
    found = [brentq(lambda x: x - tau * s.rates([x])[0], grid[i], grid[i + 1], xtol=1e-16 * top, rtol=1e-14) for i in roots]
    # no figure next to a fold: neither two roots close by, nor a near touch between them
    inner = np.diff(left)
    turns = [i + 1 for i in range(len(inner) - 1) if inner[i] * inner[i + 1] < 0]
    if any(abs(left[i]) < 2e-3 * top for i in turns) or not found:
        return None
    return s.row(tau * s.feed, [found[0]], len(found))


def spent(s):
    """a tube half as long again as it takes to use up a reactant of an order below one: nothing of it is left"""
    tau = quad(lambda u: 2 * u / s.rates([s.most() - u * u])[0], 0, math.sqrt(s.most()), limit=500)[0]   # u = sqrt(rest)
    return s.row(1.5 * tau * s.feed, [s.most()], "-")


def more_reactions(s, tau):
    c0 = np.array([s.c0[x] for x in s.species])
    scale = c0.max()
    index = {x: i for i, x in enumerate(s.species)}
    nu = np.zeros((len(c0), len(s.reactions)))
    for j, r in enumerate(s.reactions):
        for x, n in r.nu.items():
            nu[index[x], j] = n
    solve = np.linalg.pinv(nu)

    def source(c):
        return nu @ s.rates(solve @ (c - c0))

    if s.kind == "tube":
        ends = [solve_ivp(lambda t, c: source(c), (0, tau), c0, method=m, rtol=rt, atol=1e-14 * scale).y[:, -1]
                for m, rt in (("DOP853", 1e-13), ("LSODA", 1e-12))]
        if abs(ends[0] - ends[1]).max() > 1e-10 * scale:
            return None
        c = ends[0]
    else:
        f = lambda c: (c0 - c) / tau + source(c)
        c = solve_ivp(lambda t, c: f(c), (0, 400 * tau), c0, method="LSODA", rtol=1e-10, atol=1e-12 * scale).y[:, -1]
        for _ in range(30):
            J = np.array([(f(c + d) - f(c - d)) / (2 * d.max()) for d in np.eye(len(c)) * scale * 1e-5]).T
            step = np.linalg.solve(J, f(c))
            c = c - step
        if abs(step).max() > 1e-13 * scale or abs(f(c)).max() * tau > 1e-12 * scale:
            return None
    xi = solve @ (c - c0)
    if not 0.02 < s.conversion(xi) < 0.97 or min(c) < -1e-12 * scale:
        return None
    return s.row(tau * s.feed, xi, "-")


def constant(orders, c):
    """k for a half-life of about 1000 s at concentrations of the size c"""
    n = sum(orders.values())
    return float("%.5g" % (draw_log(2e-4, 5e-3) * c ** (1 - n)))


def order():
    return float("%.2f" % rnd.uniform(0.3, 3))


def heat_of(thermal, phase, c, species):
    """releases J/mol, and the heat column; rises of -60 .. 90 K"""
    if thermal == "hold":
        return 0.0, None
    if phase == "liquid":
        rho_cp = draw(1.5e6, 4.2e6)
        return float("%.4g" % (draw(-60, 90) * rho_cp / c)), rho_cp
    return draw(-20e3, 30e3), {s: draw(30, 160) for s in species}


def liquid(kind, thermal, family):
    c = draw_log(100, 6000)
    contents = {"A": c}
    Ea, at = (draw(3e4, 1.1e5), 330.0)
    if family == "power":
        eq, nu, orders = "A -> P", {"A": -1, "P": 1}, {"A": order()}
    elif family == "two":
        contents["B"] = float("%.4g" % (c * rnd.uniform(0.7, 2.5)))
        eq, nu = rnd.choice([("A + B -> C", {"A": -1, "B": -1, "C": 1}), ("A + 2 B -> C", {"A": -1, "B": -2, "C": 1}),
                             ("2 A + B -> C + D", {"A": -2, "B": -1, "C": 1, "D": 1})])
        orders = {"A": order(), "B": float("%.2f" % rnd.uniform(0, 1.5))}
    elif family == "reversible":
        if rnd.random() < 0.5:
            eq, nu, orders = "A <-> P", {"A": -1, "P": 1}, {"A": 1}
        else:
            contents["B"] = float("%.4g" % (c * rnd.uniform(0.7, 2.5)))
            eq, nu, orders = "A + B <-> C + D", {"A": -1, "B": -1, "C": 1, "D": 1}, {"A": 1, "B": 1}
    else:
        eq, nu, orders = "A -> P", {"A": -1, "P": 1}, {"A": 1}
    releases, heat = heat_of(thermal, "liquid", c, None)
    K = draw_log(0.3, 30) if "<->" in eq else None
    adsorption = {"A": float("%.4g" % (draw_log(0.5, 60) / c))} if family == "hindered" else None
    r = Reaction(eq, nu, orders, constant(orders, c), Ea, at, releases, K, adsorption, rnd.choice([1, 2]))
    return Set(kind, "liquid", thermal, contents, [r], draw(290, 370), 0.0, heat)


def gas(kind, thermal, family):
    T, P = draw(450, 900), draw(1e5, 1e6)
    y = float("%.3g" % rnd.uniform(0.2, 1.0))
    b = float("%.3g" % (y * rnd.uniform(0.4, 0.6))) if family == "two" else 0.0
    a = float("%.3g" % (y - b))
    contents = {"A": a}
    if b:
        contents["B"] = b
    rest = round(1 - a - b, 6)
    if rest > 0:
        contents["I"] = rest
    c = P / (R * T) * y
    if family == "two":
        eq, nu = rnd.choice([("A + B -> C", {"A": -1, "B": -1, "C": 1}), ("A + B -> 3 C", {"A": -1, "B": -1, "C": 3})])
        orders = {"A": order(), "B": 0.5}
    elif family == "reversible":
        eq, nu, orders = "A <-> C + D", {"A": -1, "C": 1, "D": 1}, {"A": 1}
    else:
        n = rnd.choice([2, 3, 4])
        eq, nu, orders = "A -> %d C" % n, {"A": -1, "C": n}, {"A": order()}
    species = list(contents) + [s for s in nu if s not in contents]
    releases, heat = heat_of(thermal, "gas", c, species)
    K = float("%.4g" % (c * draw_log(0.2, 5))) if family == "reversible" else None
    r = Reaction(eq, nu, orders, constant(orders, c), draw(6e4, 2e5), float("%.4g" % T), releases, K)
    return Set(kind, "gas", thermal, contents, [r], T, P, heat)


def several(kind, thermal, family):
    c = draw_log(100, 6000)
    contents = {"A": c}
    heat = None if thermal == "hold" else draw(1.5e6, 4.2e6)
    lists = {
        "chain": [("A -> B", {"A": -1, "B": 1}, ["A"]), ("B -> C", {"B": -1, "C": 1}, ["B"])],
        "aside": [("A -> B", {"A": -1, "B": 1}, ["A"]), ("B -> C", {"B": -1, "C": 1}, ["B"]), ("2 A -> D", {"A": -2, "D": 1}, ["A"])],
        "twice": [("A + B -> C", {"A": -1, "B": -1, "C": 1}, ["A", "B"]), ("C + B -> D", {"C": -1, "B": -1, "D": 1}, ["C", "B"])],
        "back": [("A <-> B", {"A": -1, "B": 1}, ["A"]), ("B -> C", {"B": -1, "C": 1}, ["B"])],
    }
    reactions = []
    if family == "twice":
        contents["B"] = float("%.4g" % (c * rnd.uniform(0.8, 2.2)))
    for eq, nu, reactants in lists[family]:
        simple = "<->" in eq
        orders = {x: 1.0 if simple else float("%.2f" % rnd.uniform(1, 2)) for x in reactants}
        releases = 0.0 if heat is None else float("%.4g" % (draw(-30, 50) * heat / c))
        reactions.append(Reaction(eq, nu, orders, constant(orders, c), draw(3e4, 9e4), 330.0, releases,
                                  draw_log(0.5, 8) if simple else None))
    return Set(kind, "liquid", thermal, contents, reactions, draw(300, 350), 0.0, heat), draw_log(100, 5000)


def main():
    """prints all rows"""
    print("# kind | phase | thermal | volume m3 | feed m3/s | feed K | feed Pa | contents | heat | reactions | states | X | outlet K")
    for family, make, count in (("power", liquid, 10), ("two", liquid, 10), ("reversible", liquid, 8), ("hindered", liquid, 12),
                                ("mole change", gas, 8), ("two", gas, 6), ("reversible", gas, 5)):
        for kind in ("tank", "tube"):
            for thermal in ("hold", "adiabatic"):
                made = 0
                while made < count:
                    s = make(kind, thermal, family)
                    if not 250 < s.temperature([0.98 * s.most()]) < 1600:
                        continue
                    row = one_reaction(s, rnd.choice([rnd.uniform(0.03, 0.9), rnd.uniform(0.9, 0.99)]))
                    if row:
                        print(row)
                        made += 1
    for thermal in ("hold", "adiabatic"):
        made = 0
        while made < 8:
            s = liquid("tube", thermal, ("power", "two")[made % 2])
            gone = [x for x, n in s.reactions[0].nu.items() if n < 0 and s.c0[x] <= -n * s.most() * (1 + 1e-12)]
            if s.temperature([s.most()]) > 250 and all(0.3 <= s.reactions[0].orders[x] < 0.9 for x in gone):
                print(spent(s))
                made += 1
    for family in ("chain", "aside", "twice", "back"):
        for kind in ("tank", "tube"):
            for thermal in ("hold", "adiabatic"):
                made = 0
                while made < 5:
                    s, tau = several(kind, thermal, family)
                    try:
                        row = more_reactions(s, tau)
                    except (ValueError, OverflowError):   # cooled below absolute zero on the way
                        continue
                    if row:
                        print(row)
                        made += 1


main()
