#!/usr/bin/env python3
"""The jacketed tubes of bench_heat.cpp by a general ODE library, as a plain script would do them."""
import math
import time

from scipy.integrate import solve_ivp

C_A, RHO_CP, FEED_K, E_R, K_FEED, AREA, V = 2000, 2e6, 330, 9000, 2e-3, 80, 0.4


def march(U, medium_K, dH, feed, method, tol):
    def f(t, y):
        r = K_FEED * math.exp(-E_R * (1 / y[1] - 1 / FEED_K)) * (1 - y[0])
        return [r, (-dH * C_A * r - U * AREA * (y[1] - medium_K)) / RHO_CP]

    return solve_ivp(f, [0, V / feed], [0, FEED_K], method=method, rtol=tol, atol=tol).y[0, -1]


for name, U in (("mild", 350), ("stiff", 230e3)):
    for method, tol in (("LSODA", 1e-9),):
        times = []
        for _ in range(15):
            start = time.perf_counter()
            march(U, 325, -60e3, 8e-4, method, tol)
            times.append(time.perf_counter() - start)
        print(f"  {name}, {method} at {tol:.0e}: {sorted(times)[7] * 1e6:.0f} us")
