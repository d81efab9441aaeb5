#!/usr/bin/python3
"""Writes tests/fixtures/vectors/rf-networks.json: networks worked out by scikit-rf, for the RF engine.

Random reciprocal passive two-ports (fixed seed) are terminated and renormalised by scikit-rf; powers come from
voltages and currents of the impedance matrix, and the maximum gain from a search over loads, so that neither
uses the engine's formulas. Also lines, reflections, and Touchstone text as scikit-rf writes it.
Run: scripts/vectors/rf-networks.py   (Debian python3-scikit-rf)
"""
import json
import pathlib
import warnings

import numpy as np
import skrf
from scipy import optimize

warnings.filterwarnings('ignore')
# scikit-rf 0.15 still uses names that numpy 1.24 dropped.
np.complex, np.float, np.int, np.bool = complex, float, int, bool
OUT = pathlib.Path(__file__).parents[2] / 'tests/fixtures/vectors/rf-networks.json'
LOAD_OHM = 2450.0
RANDOM = np.random.default_rng(20260214)


def pair(value):
    return [float(np.real(value)), float(np.imag(value))]


def network(matrix, z0):
    frequency = skrf.Frequency.from_f([7.1], unit='mhz')
    return skrf.Network(frequency=frequency, s=np.array([matrix]), z0=z0)


def random_network():
    """U diag(s) U^T with singular values up to 1: every one of these is reciprocal and passive."""
    raw = RANDOM.normal(size=(2, 2)) + 1j * RANDOM.normal(size=(2, 2))
    unitary, _ = np.linalg.qr(raw)
    singular = np.sqrt(1 - RANDOM.uniform(0.01, 0.6, 2))
    return network(unitary @ np.diag(singular) @ unitary.T, [50, LOAD_OHM])


def powers(ntwk, load):
    """Power into port 1 and into the load at port 2 for a current of 1 A, from the impedance matrix."""
    z = ntwk.z[0]
    i2 = -z[1, 0] / (z[1, 1] + load)
    v1 = z[0, 0] + z[0, 1] * i2
    return float(np.real(v1)), float(abs(i2) ** 2 * np.real(load))


def efficiency(ntwk, load):
    into, out = powers(ntwk, load)
    return out / into


def maximum_gain(ntwk):
    """Best efficiency over all passive loads, by search."""
    def loss(x):
        return -efficiency(ntwk, np.exp(x[0]) * (1 + 1j * x[1]))
    starts = [(np.log(r), q) for r in (20, 200, 2000, 20000) for q in (-2, 0, 2)]
    options = {'xatol': 1e-10, 'fatol': 1e-15, 'maxiter': 8000, 'maxfev': 8000}
    found = [optimize.minimize(loss, start, method='Nelder-Mead', options=options) for start in starts]
    return -min(result.fun for result in found)


def measured(ntwk, reflection):
    """Reflection at port 1 with a termination at port 2 that is referred to the load resistance."""
    termination = network([[reflection]], LOAD_OHM)
    return (ntwk ** termination).s[0, 0, 0]


def referred(value, ohm):
    one_port = network([[value]], 50)
    one_port.renormalize(ohm)
    return one_port.s[0, 0, 0]


def two_port_case():
    while True:
        ntwk = random_network()
        gammas = {'open': measured(ntwk, 1), 'short': measured(ntwk, -1), 'load': measured(ntwk, 0)}
        if abs(gammas['open'] - gammas['short']) > 0.2:
            break
    wcr = 2 * np.pi * 7.1e6 * 3e-12 * LOAD_OHM
    stray = (1 - 1j * wcr) / (1 + 1j * wcr)
    loads = [complex(r, x) for r, x in ((1200, 0), (3300, 0), (2450, -1500), (800, 2100))]
    return {
        's11': pair(ntwk.s[0, 0, 0]), 's22': pair(ntwk.s[0, 1, 1]),
        'p': pair(ntwk.s[0, 0, 1] * ntwk.s[0, 1, 0]),
        'readings': {name: pair(value) for name, value in gammas.items()},
        'readingsAt75Ohm': {name: pair(referred(value, 75)) for name, value in gammas.items()},
        'openWith3Pf': pair(measured(ntwk, stray)),
        'efficiency': efficiency(ntwk, LOAD_OHM),
        'otherLoads': [{'ohm': pair(z), 'efficiency': efficiency(ntwk, z)} for z in loads],
        'gMax': maximum_gain(ntwk),
    }


def pair_case():
    """Two unlike networks joined at their high sides; the loss of the whole from powers, halved in dB."""
    one, other = random_network(), random_network()
    joined = one ** other.flipped()
    back = joined.flipped()
    forward, reverse = (-10 * np.log10(efficiency(each, 50)) / 2 for each in (joined, back))
    s = joined.s[0]
    return {
        's11': pair(s[0, 0]), 's21': pair(s[1, 0]), 's12': pair(s[0, 1]), 's22': pair(s[1, 1]),
        'forwardDb': float(forward), 'reverseDb': float(reverse),
    }


def line_case():
    loss_db, degrees = float(RANDOM.uniform(0.05, 12)), float(RANDOM.uniform(10, 700))
    size, angle = float(RANDOM.uniform(0, 0.95)), float(RANDOM.uniform(-180, 180))
    frequency = skrf.Frequency.from_f([7.1], unit='mhz')
    gamma = loss_db * np.log(10) / 20 + 1j * np.radians(degrees)
    media = skrf.media.DefinedGammaZ0(frequency, gamma=np.array([gamma]), z0=50)
    line = media.line(1, 'm')
    load = media.load(size * np.exp(1j * np.radians(angle)))
    total = -10 * np.log10(efficiency(line, complex(load.z[0, 0, 0])))
    return {
        'matchedDb': loss_db, 'swrAtLoad': (1 + size) / (1 - size), 'totalDb': float(total),
        'swrAtTransmitter': float((line ** load).s_vswr[0, 0, 0]),
        'farEndOpen': pair((line ** media.open()).s[0, 0, 0]),
        'farEndShort': pair((line ** media.short()).s[0, 0, 0]),
        's': {'s11': pair(line.s[0, 0, 0]), 's21': pair(line.s[0, 1, 0])},
    }


def reflection_case():
    z = complex(10 ** RANDOM.uniform(-1, 4), RANDOM.normal() * 10 ** RANDOM.uniform(0, 3))
    z0 = float(RANDOM.choice([50, 75, 450]))
    one_port = network([[0]], z0)
    one_port.z = np.array([[[z]]])
    return {
        'z': pair(z), 'z0Ohm': z0, 'gamma': pair(one_port.s[0, 0, 0]),
        'swr': float(one_port.s_vswr[0, 0, 0]), 'returnLossDb': float(-one_port.s_db[0, 0, 0]),
    }


def touchstone_case(ports, form, unit, ohm):
    count = 5
    frequency = skrf.Frequency(1.8, 54, count, unit='mhz')
    frequency.unit = unit
    s = (RANDOM.normal(size=(count, ports, ports)) + 1j * RANDOM.normal(size=(count, ports, ports))) * 0.3
    ntwk = skrf.Network(frequency=frequency, s=s, z0=ohm, name=f'{form}-{unit}')
    text = ntwk.write_touchstone(return_string=True, form=form)
    order = [(0, 0)] if ports == 1 else [(0, 0), (1, 0), (0, 1), (1, 1)]
    return {
        'ports': ports, 'ohm': ohm, 'text': text, 'frequencyHz': [float(hz) for hz in frequency.f],
        'traces': [[pair(value) for value in s[:, row, column]] for row, column in order],
    }


def rounded(value):
    if isinstance(value, dict):
        return {key: rounded(item) for key, item in value.items()}
    if isinstance(value, list):
        return [rounded(item) for item in value]
    return float(f'{value:.12g}') if isinstance(value, float) else value


if __name__ == '__main__':
    forms, units = ('ri', 'ma', 'db'), ('hz', 'khz', 'mhz', 'ghz')
    content = {
        'loadOhm': LOAD_OHM,
        'twoPorts': [two_port_case() for _ in range(24)],
        'pairs': [pair_case() for _ in range(12)],
        'lines': [line_case() for _ in range(16)],
        'reflections': [reflection_case() for _ in range(16)],
        'touchstone': [touchstone_case(ports, form, units[at % 4], 50 if at % 2 else 75)
                       for ports in (1, 2) for at, form in enumerate(forms * 2)],
    }
    rows = ',\n'.join(
        f' {json.dumps(key)}: ' + ('[\n' + ',\n'.join(f'  {json.dumps(case)}' for case in part) + '\n ]'
                                   if isinstance(part, list) else json.dumps(part))
        for key, part in rounded(content).items())
    OUT.write_text('{\n' + rows + '\n}\n')
