/**
 * How often a property is tried: always the same kits, so that a red test is red for everyone. Try others, and more,
 * with HALYARD_PROPERTY_RUNS and HALYARD_PROPERTY_SEED.
 */
export const RUNS = {
  numRuns: Number(process.env.HALYARD_PROPERTY_RUNS ?? 100),
  seed: Number(process.env.HALYARD_PROPERTY_SEED ?? 20_261_031),
}

/** Hundreds of kits judged at each moment that matters to them, on a busy machine. */
export const SLOW = { timeout: 120_000 }
