import { onBeforeUnmount, onMounted, readonly, shallowRef } from 'vue'

/** Enough for the first screen of a phone and of a desk. */
const FIRST = 10
const STEP = 8

/**
 * How many rows are drawn. `gradual`: the first screen comes first and the others in steps, so that a slow phone shows
 * something early and answers taps in between.
 */
export function useGradualRows(gradual: boolean, total: () => number) {
  const drawn = shallowRef(gradual ? FIRST : Infinity)
  let waiting: number | undefined

  function drawMore(): void {
    drawn.value = drawn.value + STEP < total() ? drawn.value + STEP : Infinity
    if (drawn.value < Infinity) waiting = window.setTimeout(drawMore)
  }

  onMounted(() => {
    if (gradual) waiting = window.setTimeout(drawMore)
  })
  onBeforeUnmount(() => window.clearTimeout(waiting))
  return readonly(drawn)
}
