/**
 * The transformer of the calculation sheet, sections 3 and 4 (ngspice): L1 4.3 uH on 2 turns with 240 ohm
 * across it, L2 = 49 L1 on 14 turns, k 0.994, windings of 0.05 and 1.0 ohm, 1 pF across the secondary, 100
 * pF across the primary; load 2450 ohm.
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

/** Section 4: the three traces and everything found from them. */
export const THREE_TERMINATIONS = [
  {
    mhz: 3.6,
    readings: {
      open: complex(0.5295946583, 0.4378698442),
      short: complex(-0.9958734268, 0.0464938204),
      load: complex(-0.1144387956, 0.1483828735),
    },
    s22: complex(-0.116411, 0.152844),
    p: complex(0.763253, 0.22475),
    efficiency: 0.8246102,
    simulatedEfficiency: 0.8246102,
    lossDb: 0.837513,
    gMax: 0.966261,
    intrinsicLossDb: 0.149057,
    swr: { load: 1.46119, open: 5.39322, short: 656.495 },
    openShortDistance: 1.57487,
    uEfficiency: 0.00857051,
    estimate: { openHalfReturnLossDb: 1.629, meanHalfReturnLossDb: 0.8213, twoResistorDb: 0.7453 },
    stray: { ignored: 0.82966, s22Size: 0.1136, corrected: 0.82461 },
  },
  {
    mhz: 7.1,
    readings: {
      open: complex(0.6494990649, -0.0969180877),
      short: complex(-0.9919807021, 0.0921805793),
      load: complex(-0.0920295701, -0.010476977),
    },
    s22: complex(-0.096371, -0.001223),
    p: complex(0.813096, -0.093865),
    efficiency: 0.82557911,
    simulatedEfficiency: 0.82557911,
    lossDb: 0.832413,
    gMax: 0.966265,
    intrinsicLossDb: 0.149037,
    swr: { load: 1.20416, open: 4.82564, short: 532.97 },
    openShortDistance: 1.65234,
    uEfficiency: 0.00810513,
    estimate: { openHalfReturnLossDb: 1.826, meanHalfReturnLossDb: 0.9213, twoResistorDb: 0.826 },
    stray: { ignored: 0.845073, s22Size: 0.221, corrected: 0.825579 },
  },
  {
    mhz: 14.2,
    readings: {
      open: complex(0.3829260267, -0.6136166009),
      short: complex(-0.9752045295, 0.1883089596),
      load: complex(-0.1355232402, -0.1710552349),
    },
    s22: complex(-0.148559, -0.148977),
    p: complex(0.661401, -0.431071),
    efficiency: 0.82895732,
    simulatedEfficiency: 0.82895732,
    lossDb: 0.814678,
    gMax: 0.966266,
    intrinsicLossDb: 0.149032,
    swr: { load: 1.55831, open: 6.22795, short: 293.945 },
    openShortDistance: 1.57721,
    uEfficiency: 0.00880068,
    estimate: { openHalfReturnLossDb: 1.407, meanHalfReturnLossDb: 0.7182, twoResistorDb: 0.6614 },
    stray: { ignored: 0.904715, s22Size: 0.5633, corrected: 0.828957 },
  },
  {
    mhz: 21.2,
    readings: {
      open: complex(0.0509739355, -0.7968068146),
      short: complex(-0.9436762249, 0.2909159914),
      load: complex(-0.2077289548, -0.2668580525),
    },
    s22: complex(-0.232435, -0.226209),
    p: complex(0.438714, -0.594606),
    efficiency: 0.83435681,
    simulatedEfficiency: 0.83435681,
    lossDb: 0.786482,
    gMax: 0.966267,
    intrinsicLossDb: 0.149031,
    swr: { load: 2.02196, open: 8.92239, short: 159.004 },
    openShortDistance: 1.47393,
    uEfficiency: 0.0102534,
    estimate: { openHalfReturnLossDb: 0.9776, meanHalfReturnLossDb: 0.5161, twoResistorDb: 0.4886 },
    stray: { ignored: 0.996354, s22Size: 0.8205, corrected: 0.834357 },
  },
  {
    mhz: 28.4,
    readings: {
      open: complex(-0.2306124718, -0.8254021247),
      short: complex(-0.8878037291, 0.4085862989),
      load: complex(-0.291404614, -0.3260315689),
    },
    s22: complex(-0.328599, -0.259042),
    p: complex(0.210126, -0.647716),
    efficiency: 0.841936,
    simulatedEfficiency: 0.841936,
    lossDb: 0.747209,
    gMax: 0.966267,
    intrinsicLossDb: 0.14903,
    swr: { load: 2.55416, open: 12.9873, short: 87.1513 },
    openShortDistance: 1.39808,
    uEfficiency: 0.0123786,
    estimate: { openHalfReturnLossDb: 0.6701, meanHalfReturnLossDb: 0.3849, twoResistorDb: 0.3717 },
    stray: { ignored: 1.11839, s22Size: 1.012, corrected: 0.841936 },
  },
] as const

/** Section 4: MHz, actual load ohm, its reflection at port 2, efficiency by the formula and as simulated. */
export const OTHER_LOADS = [
  [3.6, 1200, -0.342466, 0.903457, 0.903457],
  [3.6, 3300, 0.147826, 0.777996, 0.777996],
  [14.2, 1200, -0.342466, 0.903894, 0.903894],
  [14.2, 3300, 0.147826, 0.783832, 0.783832],
  [28.4, 1200, -0.342466, 0.904575, 0.904575],
  [28.4, 3300, 0.147826, 0.801596, 0.801596],
] as const
