#!/usr/bin/python3
"""Writes tests/fixtures/vectors/heat-fit.json: warming curves fitted by scipy, for the heat-test engine.

Simulated logs (fixed seed) are fitted with scipy.optimize.curve_fit; the profile intervals of tau and of the
end temperature are found with brentq on a nested minimisation, a different way from the engine's grid.
Run: scripts/vectors/heat-fit.py   (Debian python3-scipy)
"""
import json
import pathlib

import numpy as np
from scipy import optimize, stats

OUT = pathlib.Path(__file__).parents[2] / 'tests/fixtures/vectors/heat-fit.json'


def best_sse(t, y, fixed, tau, end=None):
    """Least SSE for one tau; with `end`, for one tau and one end temperature."""
    g = 1 - np.exp(-t / tau)
    if end is None:
        columns, target = (([g], y - fixed) if fixed is not None else ([np.ones_like(t), g], y))
        matrix = np.array(columns).T
        solution = np.linalg.lstsq(matrix, target, rcond=None)[0]
        return float(np.sum((target - matrix @ solution) ** 2))
    if fixed is not None:
        return float(np.sum((y - fixed - (end - fixed) * g) ** 2))
    decay = 1 - g  # T = end - (end - T0) decay
    amplitude = np.sum((end - y) * decay) / np.sum(decay**2)
    return float(np.sum((y - end + amplitude * decay) ** 2))


def limited_sse(t, y, fixed, tau, through):
    """Least SSE for one tau of the curves that pass through one point (time, temperature)."""
    at, limit = through
    g, g_at = 1 - np.exp(-t / tau), 1 - np.exp(-at / tau)
    if fixed is not None:
        return float(np.sum((y - fixed - (limit - fixed) / g_at * g) ** 2))
    amplitude = np.sum((y - limit) * (g - g_at)) / np.sum((g - g_at) ** 2)
    return float(np.sum((y - limit - amplitude * (g - g_at)) ** 2))


def crossing(function, inside, outside):
    return optimize.brentq(function, inside, outside, xtol=1e-12, rtol=1e-12)


def fit(t, y, fixed):
    span = t[-1] - t[0]
    if fixed is None:
        model, guess = (lambda t, a, tau, t0: t0 + a * (1 - np.exp(-t / tau))), [y[-1] - y[0], span / 2, y[0]]
    else:
        model, guess = (lambda t, a, tau: fixed + a * (1 - np.exp(-t / tau))), [y[-1] - y[0], span / 2]
    p, cov = optimize.curve_fit(model, t, y, guess, xtol=1e-14, ftol=1e-14, maxfev=20000)
    a, tau = p[0], p[1]
    start = fixed if fixed is not None else p[2]
    sse = float(np.sum((y - model(t, *p)) ** 2))
    degrees = len(t) - len(p)
    critical = stats.f.ppf(0.95, 1, degrees)
    threshold = sse * (1 + critical / degrees)
    over = lambda x: best_sse(t, y, fixed, np.exp(x)) - threshold
    low = np.exp(crossing(over, np.log(tau), np.log(tau / 50)))
    high = np.exp(crossing(over, np.log(tau), np.log(tau * 50)))

    def end_over(end):
        nested = lambda x: best_sse(t, y, fixed, np.exp(x), end)
        found = optimize.minimize_scalar(nested, bounds=(np.log(tau / 20), np.log(tau * 20)), method='bounded',
                                         options={'xatol': 1e-12})
        return found.fun - threshold

    end = start + a
    reach = 20 * np.sqrt(cov[0, 0]) + 1
    limit = end - 0.5 * (end - model(t[-1], *p))

    def time_over(at):
        nested = lambda x: limited_sse(t, y, fixed, np.exp(x), (at, limit))
        found = optimize.minimize_scalar(nested, bounds=(np.log(tau / 20), np.log(tau * 20)), method='bounded',
                                         options={'xatol': 1e-12})
        return found.fun - threshold

    meets = -tau * np.log(1 - (limit - start) / a)
    latest = crossing(time_over, meets, 20 * meets) if time_over(20 * meets) > 0 else None
    return {
        'limitC': limit, 'meetsS': meets, 'soonestS': crossing(time_over, meets, t[-1]) if time_over(t[-1]) > 0
        else float(t[-1]), 'latestS': latest,
        'startC': start, 'riseK': a, 'tauS': tau, 'sse': sse,
        'riseSeK': float(np.sqrt(cov[0, 0])), 'tauSeS': float(np.sqrt(cov[1, 1])),
        'criticalF': float(critical), 'tauLowS': float(low), 'tauHighS': float(high),
        'endLowC': crossing(end_over, end, end - reach), 'endHighC': crossing(end_over, end, end + reach),
    }


def cases():
    random = np.random.default_rng(20260131)
    for number in range(16):
        warm = number % 2 == 1
        count = int(random.integers(9, 40))
        tau = float(random.uniform(120, 1500))
        span = tau * float(random.uniform(1.2, 4))
        ambient = round(float(random.uniform(-5, 38)), 1)
        start = ambient + (float(random.uniform(5, 25)) if warm else 0.0)
        rise = float(random.uniform(15, 90))
        t = np.round(np.linspace(0, span, count), 0)
        y = start + rise * (1 - np.exp(-t / tau)) + random.normal(0, 0.25, count)
        y = np.round(y, 1)
        fixed = None if warm else ambient
        yield {'ambientC': ambient, 'fixedStartC': fixed, 'timesS': t.tolist(), 'temperaturesC': y.tolist(),
               'fit': fit(t, y, fixed)}


def rounded(value):
    if isinstance(value, dict):
        return {key: rounded(item) for key, item in value.items()}
    if isinstance(value, list):
        return [rounded(item) for item in value]
    return float(f'{value:.10g}') if isinstance(value, (float, np.floating)) else value


if __name__ == '__main__':
    degrees = [*range(1, 41), 60, 99, 100, 101, 102, 150, 250, 1000, 5000]
    quantiles = [{'degrees': d, 't': float(stats.t.ppf(0.975, d))} for d in degrees]
    OUT.write_text(json.dumps(rounded({'tQuantiles': quantiles, 'fits': list(cases())}), indent=1) + '\n')
