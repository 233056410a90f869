"""The cases of bench_rating.cpp by a general ODE library (SciPy), for the comparison printed beside them."""
import time

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import brentq

C_A, C_B, K, V, FEED = 2000.0, 2600.0, 3.5e-3 / 2000**0.5, 0.4, 5e-4


def reach(tau):
    return solve_ivp(lambda t, x: [K * (C_A - x[0]) * (C_B - x[0]) ** 0.5], (0, tau), [0.0], method="DOP853", rtol=1e-9, atol=1e-9 * C_A).y[0, -1] / C_A


def states(k_tau):
    def g(u):
        return 20 - u - k_tau * u / (1 + u) ** 2

    grid = np.linspace(1e-9, 20, 201)
    values = g(grid)
    return [brentq(g, grid[i], grid[i + 1]) for i in range(200) if (values[i] > 0) != (values[i + 1] > 0)]


def median_us(work):
    spent = []
    for _ in range(7):
        start = time.perf_counter()
        work()
        spent.append(time.perf_counter() - start)
    return 1e6 * sorted(spent)[3]


if __name__ == "__main__":
    for name, work in [
        ("a held tube rated once", lambda: reach(V / FEED)),
        ("its ceiling for X = 0.9", lambda: brentq(lambda lf: reach(V / np.exp(lf)) - 0.9, np.log(1e-6), np.log(1e-1), xtol=1e-9)),
        ("all three states of a held tank", lambda: states(90.0)),
    ]:
        print(f"  {name:<52} {median_us(work):12.1f} us")
