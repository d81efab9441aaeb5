import { computed, ref, watch, type MaybeRefOrGetter, toValue } from 'vue'
import type { BuildFiguresAnswer } from '#shared/contracts/build-figures.ts'
import { BUILD_MEASURES, type BuildMeasure } from '#shared/engine/builds/matching.ts'
import { measureWriter } from '@/format/build.ts'
import { useUnits } from './useUnits.ts'

/** The measures that a build has figures of, the one that is looked at, and how its figures are written. */
export function useBuildMeasure(figures: MaybeRefOrGetter<Pick<BuildFiguresAnswer, 'bands'>>) {
  const units = useUnits()
  const measures = computed(() =>
    BUILD_MEASURES.filter((measure) => toValue(figures).bands.some((band) => band.measure === measure)),
  )
  const measure = ref<BuildMeasure>('lossDb')
  watch(
    measures,
    (known) => {
      if (!known.includes(measure.value)) measure.value = known[0] ?? 'lossDb'
    },
    { immediate: true },
  )
  return {
    measures,
    measure,
    bands: computed(() => toValue(figures).bands.filter((band) => band.measure === measure.value)),
    write: computed(() => measureWriter(measure.value, units)),
  }
}
