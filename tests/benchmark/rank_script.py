#!/usr/bin/env python3
"""What an engineer would write for six.toml and six_duty.toml: every hookup of up to three vessels, the best shares of
each, the ten best by conversion. Second order, held; the standard library alone. Prints one JSON object."""
import json
import math
import time

K_C0 = 3.0 * 1.0  # 1/h: k times the feed's concentration
FEED = 6.0  # m3/h
MOST, TOP = 3, 10
LEAST_SHARE = 1e-4
VESSELS = {  # tag: (is a tank, m3)
    "T-1": (True, 2.4),
    "T-2": (True, 3.7),
    "T-3": (True, 5.1),
    "P-1": (False, math.pi / 4 * 0.200**2 * 42),
    "P-2": (False, math.pi / 4 * 0.250**2 * 55),
    "P-3": (False, math.pi / 4 * 0.150**2 * 38),
}


def hookups(tags):
    """Every hookup that uses all of these once: a tag, ("then", parts) or ("beside", parts)."""
    if len(tags) == 1:
        yield tags[0]
        return
    for join in ("then", "beside"):
        for chosen in range(1, 2 ** len(tags) - 1):
            first = [t for i, t in enumerate(tags) if chosen >> i & 1]
            rest = [t for i, t in enumerate(tags) if not chosen >> i & 1]
            if join == "beside" and tags[0] not in first:
                continue
            for a in hookups(first):
                if a[0] != join:
                    for b in hookups(rest):
                        yield (join, [a] + (b[1] if b[0] == join else [b]))


def left(hookup, c, feed):
    """Concentration over the feed's behind a hookup with the best shares, c before it."""
    if isinstance(hookup, str):
        is_tank, volume = VESSELS[hookup]
        da = K_C0 * volume / feed
        return 2 * c / (1 + math.sqrt(1 + 4 * da * c)) if is_tank else c / (1 + da * c)
    join, parts = hookup
    if join == "then":
        for part in parts:
            c = left(part, c, feed)
        return c
    return least_flow(parts, c, feed, LEAST_SHARE * feed) / feed


def least_flow(parts, c, feed, least):
    """What of the reactant leaves these branches together."""
    if len(parts) == 1:
        return feed * left(parts[0], c, feed)
    return least_of(
        lambda q: q * left(parts[0], c, q) + least_flow(parts[1:], c, feed - q, least), least, feed - least * (len(parts) - 1)
    )


def least_of(f, a, b, places=12):
    """A scan, then golden sections beside its lowest place."""
    x = [a + (b - a) * i / places for i in range(places + 1)]
    y = [f(at) for at in x]
    i = y.index(min(y))
    lo, hi = x[max(i - 1, 0)], x[min(i + 1, places)]
    golden = (math.sqrt(5) - 1) / 2
    p, q = hi - golden * (hi - lo), lo + golden * (hi - lo)
    fp, fq = f(p), f(q)
    while hi - lo > 1e-6 * (b - a):  # the value is then known to about 1e-12
        if fp < fq:
            hi, q, fq = q, p, fp
            p = hi - golden * (hi - lo)
            fp = f(p)
        else:
            lo, p, fp = p, q, fq
            q = lo + golden * (hi - lo)
            fq = f(q)
    return min(y[i], fp, fq)


def text(hookup):
    if isinstance(hookup, str):
        return hookup
    return f" {hookup[0]} ".join(part if isinstance(part, str) else f"[{text(part)}]" for part in hookup[1])


if __name__ == "__main__":
    start = time.perf_counter()
    tags = list(VESSELS)
    rated = []
    for chosen in range(1, 2 ** len(tags)):
        some = [t for i, t in enumerate(tags) if chosen >> i & 1]
        if len(some) <= MOST:
            rated += [(1 - left(h, 1.0, FEED), text(h)) for h in hookups(some)]
    rated.sort(key=lambda r: (-r[0], r[1]))
    seconds = time.perf_counter() - start
    print(json.dumps({"seconds": round(seconds, 3), "hookups": len(rated), "best": rated[0][0],
                      "top": [{"hookup": t, "conversion": x} for x, t in rated[:TOP]]}, indent=2))
