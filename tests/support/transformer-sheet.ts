/**
 * The transformer of the calculation sheet, sections 3 and 4 (ngspice): L1 4.3 uH on 2 turns with 240 ohm
 * across it, L2 = 49 L1 on 14 turns, k 0.994, windings of 0.05 and 1.0 ohm, 1 pF across the secondary, 100 pF across
 * the primary; load 2450 ohm.
 */
const complex = (re: number, im: number): { re: number; im: number } => ({ re, im })

/** Two of them back to back at 50 ohm: section 3, both tables. */
export const PAIR_SWEEP = [
  {
    mhz: 3.6,
    s11: complex(-0.233139384, 0.242181832),
    s21: complex(0.762734043, 0.195688012),
    lossDb: 0.777445,
    insertionLossDb: 1.03784,
    efficiency: 0.836095,
    trueLossDb: 0.837513,
  },
  {
    mhz: 7.1,
    s11: complex(-0.171240819, -0.002368754),
    s21: complex(0.820739884, -0.094549333),
    lossDb: 0.764677,
    insertionLossDb: 0.829316,
    efficiency: 0.838557,
    trueLossDb: 0.832413,
  },
  {
    mhz: 14.2,
    s11: complex(-0.296139251, -0.212653821),
    s21: complex(0.679065278, -0.40096278),
    lossDb: 0.72169,
    insertionLossDb: 1.03139,
    efficiency: 0.846898,
    trueLossDb: 0.814678,
  },
  {
    mhz: 21.2,
    s11: complex(-0.446351145, -0.252945412),
    s21: complex(0.49732508, -0.543861403),
    lossDb: 0.662248,
    insertionLossDb: 1.32553,
    efficiency: 0.858569,
    trueLossDb: 0.786482,
  },
  {
    mhz: 28.4,
    s11: complex(-0.5592081, -0.208407913),
    s21: complex(0.328595629, -0.616994212),
    lossDb: 0.598911,
    insertionLossDb: 1.55498,
    efficiency: 0.871182,
    trueLossDb: 0.747209,
  },
] as const
