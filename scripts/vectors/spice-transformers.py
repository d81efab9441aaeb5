#!/usr/bin/python3
"""Writes tests/fixtures/vectors/spice-transformers.json: lossy transformers simulated by ngspice, for the RF engine.

Each transformer is a circuit of coupled windings with core loss, winding resistance and stray capacitance. It
is simulated open, shorted and loaded, with other loads, and as a back-to-back pair; efficiencies come from the
simulated voltages and never from the engine's formulas.
Run: scripts/vectors/spice-transformers.py   (Debian ngspice)
"""
import json
import math
import pathlib
import subprocess
import tempfile

OUT = pathlib.Path(__file__).parents[2] / 'tests/fixtures/vectors/spice-transformers.json'
FREQUENCIES_MHZ = [3.6, 7.1, 14.2, 21.2, 28.4]

# Turns, primary inductance, coupling, parallel core loss, winding resistances, strays, load. The first is the
# transformer of the calculation sheet.
TRANSFORMERS = [
    dict(name='49:1 on 2:14 turns', turns=(2, 14), l1='4.3u', k=0.994, core=240, r1=0.05, r2=1.0,
         c1='100p', c2='1p', load=2450, others=(1200, 3300)),
    dict(name='64:1 on 3:24 turns', turns=(3, 24), l1='9.6u', k=0.996, core=620, r1=0.06, r2=1.6,
         c1='68p', c2='1.5p', load=3200, others=(1800, 4500)),
    dict(name='9:1 on 3:9 turns', turns=(3, 9), l1='6.1u', k=0.998, core=900, r1=0.04, r2=0.3,
         c1='22p', c2='2p', load=450, others=(200, 900)),
    dict(name='49:1 on 2:14 turns, lossy core', turns=(2, 14), l1='1.1u', k=0.985, core=95, r1=0.05, r2=1.0,
         c1='150p', c2='2p', load=2450, others=(1200, 3300)),
]


def windings(t, suffix, low, high):
    """One transformer between its 50 ohm node and its high-impedance node."""
    ratio = (t['turns'][1] / t['turns'][0]) ** 2
    return f"""
R1{suffix} {low} p{suffix} {t['r1']}
L1{suffix} p{suffix} 0 {t['l1']}
RC{suffix} p{suffix} 0 {t['core']}
L2{suffix} s{suffix} 0 {{{ratio!r}*{t['l1']}}}
K{suffix} L1{suffix} L2{suffix} {t['k']}
R2{suffix} s{suffix} {high} {t['r2']}
C1{suffix} {low} 0 {t['c1']}
C2{suffix} {high} 0 {t['c2']}
"""


def simulate(body, nodes):
    """Complex node voltages at every frequency, for a source of 1 V behind 50 ohm at node `in`."""
    rows = {node: [] for node in nodes}
    for mhz in FREQUENCIES_MHZ:
        with tempfile.TemporaryDirectory() as folder:
            deck = pathlib.Path(folder, 'deck.cir')
            vectors = ' '.join(f'v({node})' for node in nodes)
            deck.write_text(f"""transformer
VS src 0 DC 0 AC 1
RS src in 50
{body}
.options reltol=1e-9 abstol=1e-15 vntol=1e-15 gmin=1e-20
.control
set numdgt=15
ac lin 1 {mhz}meg {mhz}meg
wrdata {folder}/out.data {vectors}
quit
.endc
.end
""")
            subprocess.run(['ngspice', '-b', str(deck)], check=True, capture_output=True)
            values = [float(part) for part in pathlib.Path(folder, 'out.data').read_text().split()]
        for at, node in enumerate(nodes):
            rows[node].append(complex(values[3 * at + 1], values[3 * at + 2]))
    return rows


def reflection(v_in):
    return 2 * v_in - 1


def efficiency(v_in, v_out, load):
    into = (v_in * ((1 - v_in) / 50).conjugate()).real
    return abs(v_out) ** 2 / load / into


def pair(value):
    return [value.real, value.imag]


def case(t):
    one = windings(t, 'a', 'in', 'out')
    loads = {'open': 1e15, 'short': 1e-9, 'load': t['load'], **{str(ohm): ohm for ohm in t['others']}}
    ended = {name: simulate(f'{one}RL out 0 {ohm}', ['in', 'out']) for name, ohm in loads.items()}
    middle = simulate(windings(t, 'a', 'in', 'mid') + windings(t, 'b', 'out', 'mid') + 'RL out 0 50', ['in', 'out'])
    points = []
    for at, mhz in enumerate(FREQUENCIES_MHZ):
        v_in, v_out = middle['in'][at], middle['out'][at]
        points.append({
            'mhz': mhz,
            'readings': {name: pair(reflection(ended[name]['in'][at])) for name in ('open', 'short', 'load')},
            'efficiency': efficiency(ended['load']['in'][at], ended['load']['out'][at], t['load']),
            'otherLoads': [{'ohm': o, 'efficiency': efficiency(ended[str(o)]['in'][at], ended[str(o)]['out'][at], o)}
                           for o in t['others']],
            'pair': {'s11': pair(reflection(v_in)), 's21': pair(2 * v_out),
                     'lossDb': -10 * math.log10(efficiency(v_in, v_out, 50)) / 2},
        })
    return {'name': t['name'], 'loadOhm': t['load'], 'points': points}


def rounded(value):
    if isinstance(value, dict):
        return {key: rounded(item) for key, item in value.items()}
    if isinstance(value, list):
        return [rounded(item) for item in value]
    return float(f'{value:.12g}') if isinstance(value, float) else value


if __name__ == '__main__':
    rows = []
    for found in rounded([case(t) for t in TRANSFORMERS]):
        points = ',\n'.join(f'   {json.dumps(point)}' for point in found.pop('points'))
        rows.append(f' {json.dumps(found)[:-1]}, "points": [\n{points}\n  ]}}')
    OUT.write_text('[\n' + ',\n'.join(rows) + '\n]\n')
