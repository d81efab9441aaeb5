/**
 * Codes are drawn in whole steps of 1/200 inch, so that every edge falls on a dot of printers with 200, 400, 600 and
 * 1200 dots an inch: a module of uneven width is what readers stumble over. Found by decoding rendered pages.
 */
export const STEP_MM = 25.4 / 200

/** The largest whole number of steps that is not longer, mm. */
export function stepsDown(mm: number): number {
  return Math.floor(mm / STEP_MM + 1e-6) * STEP_MM
}

export function nearestStep(mm: number): number {
  return Math.round(mm / STEP_MM) * STEP_MM
}

/** The smallest module of whole steps that a phone reads at arm's length (0.5 mm, calculation sheet, section 13). */
export const SMALLEST_MODULE_MM = 4 * STEP_MM
