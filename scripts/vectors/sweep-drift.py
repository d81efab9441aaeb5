#!/usr/bin/python3
"""Writes tests/fixtures/vectors/sweep-drift.json: antenna sweeps before and after, summarised by scikit-rf and numpy.

Each case is a pair of networks: up to three series-resonant dips behind a lossy line, on two different grids.
Run: scripts/vectors/sweep-drift.py   (Debian python3-scikit-rf)
"""
import json
import pathlib

import numpy as np

# scikit-rf 0.15 still asks for aliases that numpy 1.24 has dropped.
np.complex, np.float, np.int, np.bool = complex, float, int, bool
import skrf  # noqa: E402

OUT = pathlib.Path(__file__).parents[2] / 'tests/fixtures/vectors/sweep-drift.json'
BANDS_MHZ = [(3.5, 4.0), (7.0, 7.3), (14.0, 14.35)]


def antenna(f_mhz, dips, line_db, delay_ns):
    admittance = sum(1 / (r * (1 + 1j * q * (f_mhz / f0 - f0 / f_mhz))) for f0, r, q in dips)
    network = skrf.Network(f=f_mhz * 1e6, f_unit='hz', z0=50, s=skrf.z2s((1 / admittance).reshape(-1, 1, 1), 50))
    gamma = network.s[:, 0, 0] * 10 ** (-line_db / 10) * np.exp(-4j * np.pi * f_mhz * 1e6 * delay_ns * 1e-9)
    network.s[:, 0, 0] = gamma
    return network


def summary(network, low, high):
    f, swr = network.f / 1e6, network.s_vswr[:, 0, 0]
    inside = (f >= low) & (f <= high)
    edge_f = [x for x in (low, high) if f[0] <= x <= f[-1]]
    all_f = np.concatenate([edge_f, f[inside]])
    all_swr = np.concatenate([np.interp(edge_f, f, swr), swr[inside]])
    return {'samples': int(inside.sum()), 'lowestSwr': all_swr.min(), 'lowestAtMhz': all_f[all_swr.argmin()],
            'worstSwr': all_swr.max(), 'worstAtMhz': all_f[all_swr.argmax()]}


def case(random, number):
    base_f = np.round(np.linspace(3, 15, int(random.integers(120, 400))), 6)
    new_f = np.round(np.linspace(2.5, 16, int(random.integers(120, 400))), 6)
    dips = [(f0 * random.uniform(0.98, 1.02), random.uniform(30, 80), random.uniform(8, 15)) for f0 in (3.7, 7.1, 14.2)]
    moved = [(f0 * random.uniform(0.98, 1.0), r * random.uniform(0.8, 1.3), q) for f0, r, q in dips]
    before = antenna(base_f, dips, 0.3, 20)
    after = antenna(new_f, moved, 0.3 if number % 2 else 2.5, 20)
    gamma = after.s[:, 0, 0]
    resampled = np.interp(base_f, new_f, gamma.real) + 1j * np.interp(base_f, new_f, gamma.imag)
    now = skrf.Network(f=base_f * 1e6, f_unit='hz', z0=50, s=resampled.reshape(-1, 1, 1))
    swr = [network.s_vswr[:, 0, 0] for network in (before, now)]
    bands = []
    for low, high in BANDS_MHZ:
        inside = (base_f >= low) & (base_f <= high)
        sizes = [np.abs(network.s[inside, 0, 0]) for network in (before, now)]
        bands.append({'lowMhz': low, 'highMhz': high, 'before': summary(before, low, high), 'now': summary(now, low, high),
                      'largestSwrChange': np.abs(swr[1] - swr[0])[inside].max(),
                      'rmsMagnitudeChange': np.sqrt(np.mean((sizes[1] - sizes[0]) ** 2))})
    points = lambda f, s: [[mhz, g.real, g.imag] for mhz, g in zip(f, s)]
    return {'baseline': points(base_f, before.s[:, 0, 0]), 'next': points(new_f, gamma),
            'lowestShiftMhz': base_f[swr[1].argmin()] - base_f[swr[0].argmin()],
            'lowestSwrChange': swr[1].min() - swr[0].min(), 'bands': bands}


def plain(value):
    if isinstance(value, dict):
        return {key: plain(item) for key, item in value.items()}
    if isinstance(value, list):
        return [plain(item) for item in value]
    return float(f'{value:.9g}') if isinstance(value, (float, np.floating)) else value


if __name__ == '__main__':
    random = np.random.default_rng(20260308)
    OUT.write_text(json.dumps([plain(case(random, number)) for number in range(4)]) + '\n')
