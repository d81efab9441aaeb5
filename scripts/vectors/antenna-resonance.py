#!/usr/bin/python3
"""Writes tests/fixtures/vectors/antenna-resonance.json: lengths at which modelled wires are resonant.

nec2c models a bare straight wire, 2 mm in diameter, horizontal: a centre-fed dipole, and an end-fed half wave
against a counterpoise of 0.05 wavelength in line with it; in free space and 10 m above average ground
(er 13, 5 mS/m, Sommerfeld). Bisection finds the length of zero reactance.
Run: scripts/vectors/antenna-resonance.py   (Debian nec2c)
"""
import json
import pathlib
import subprocess
import tempfile

OUT = pathlib.Path(__file__).parents[2] / 'tests/fixtures/vectors/antenna-resonance.json'
FREQUENCIES_MHZ = [3.65, 7.1, 14.2, 28.4]
LIGHT_M_MHZ = 299.792458
RADIUS_M = 0.001


def impedance(wires, frequency, height):
    """wires: (segments, x1, x2); the source sits on the last segment of the first wire or its middle."""
    z = 0 if height is None else height
    cards = ['CE']
    for tag, (segments, x1, x2, _) in enumerate(wires, 1):
        cards.append(f'GW {tag} {segments} {x1:.6f} 0 {z} {x2:.6f} 0 {z} {RADIUS_M}')
    cards.append('GE 0' if height is None else 'GE 1')
    if height is not None:
        cards.append('GN 2 0 0 0 13 0.005')
    source = next(segment for *_, segment in wires if segment)
    cards += [f'EX 0 1 {source} 0 1 0', f'FR 0 1 0 0 {frequency} 0', 'XQ', 'EN']
    with tempfile.TemporaryDirectory() as folder:
        deck, answer = pathlib.Path(folder, 'in.nec'), pathlib.Path(folder, 'out.txt')
        deck.write_text('\n'.join(cards) + '\n')
        subprocess.run(['nec2c', '-i', deck, '-o', answer], check=True, capture_output=True)
        lines = answer.read_text().splitlines()
    at = next(i for i, line in enumerate(lines) if 'ANTENNA INPUT PARAMETERS' in line)
    row = next(line.split() for line in lines[at + 1:] if len(line.split()) == 11 and line.split()[0] == '1')
    return float(row[6]), float(row[7])


def dipole(length, frequency, height):
    return impedance([(101, -length / 2, length / 2, 51)], frequency, height)


def end_fed(length, frequency, height):
    """The counterpoise comes from the left; its last segment holds the source, centred on the feed point."""
    segment = LIGHT_M_MHZ / frequency / 200
    counterpoise = (11, -10 * segment, segment / 2, 11)
    return impedance([counterpoise, (95, segment / 2, length, None)], frequency, height)


def resonance(antenna, frequency, height, window):
    """X is monotone inside the window; its sign at the lower end decides the direction."""
    half_wave = LIGHT_M_MHZ / frequency / 2
    low, high = (part * half_wave for part in window)
    sign = antenna(low, frequency, height)[1] > 0
    assert sign != (antenna(high, frequency, height)[1] > 0), (antenna, frequency, height)
    for _ in range(24):
        middle = (low + high) / 2
        if (antenna(middle, frequency, height)[1] > 0) == sign:
            low = middle
        else:
            high = middle
    return low, antenna(low, frequency, height)[0]


if __name__ == '__main__':
    rows = []
    # A wire this thick for its length has no end-fed resonance at 28.4 MHz: X stays negative.
    for name, antenna, frequencies, window in (('dipole', dipole, FREQUENCIES_MHZ, (0.92, 1.02)),
                                               ('end-fed', end_fed, FREQUENCIES_MHZ[:3], (0.925, 1.0))):
        for frequency in frequencies:
            for height in (None, 10):
                length, ohm = resonance(antenna, frequency, height, window)
                rows.append({'antenna': name, 'frequencyMhz': frequency, 'heightM': height,
                             'lengthM': round(length, 4), 'resistanceOhm': round(ohm, 2)})
                print(rows[-1])
    OUT.write_text(json.dumps(rows, indent=1) + '\n')
