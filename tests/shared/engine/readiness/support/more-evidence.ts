import type { Evidence, KitState, TestFinding } from '#shared/engine/readiness/types.ts'
import { aTest, type When } from './evidence.ts'
import { aFinding } from './findings.ts'

/** A count that looked at every position; `found` names those where something else than the plan was there. */
export function count(
  kit: Pick<KitState, 'positions'> & { kit: { id: string } },
  when: When | string,
  found: Readonly<Record<string, number>> = {},
): Evidence {
  const findings = kit.positions.map(({ id, name, quantity }): TestFinding => {
    const value = found[id] ?? quantity
    return aFinding({
      measure: 'present',
      positionId: id,
      value,
      finding: value >= quantity ? 'pass' : 'fail',
      limit: `${quantity}`,
      text: value >= quantity ? `${name}: all there` : `${name}: ${value} of ${quantity}`,
    })
  })
  return aTest('count', kit.kit.id, when, findings)
}

export function inspection(itemId: string, when: When | string, wrong?: string): Evidence {
  return aTest('inspection', itemId, when, [
    aFinding({
      measure: 'serviceable',
      value: wrong === undefined ? 1 : 0,
      finding: wrong === undefined ? 'pass' : 'fail',
      text: wrong ?? 'serviceable',
    }),
  ])
}

export function calibration(itemId: string, when: When | string, passed = true): Evidence {
  return aTest('calibration', itemId, when, [
    aFinding({
      measure: 'calibration',
      finding: passed ? 'pass' : 'fail',
      text: passed ? 'within its limits' : 'outside its limits',
    }),
  ])
}

export function boot(itemId: string, when: When | string, boots = true): Evidence {
  return aTest('boot-and-update', itemId, when, [
    aFinding({
      measure: 'boots',
      value: boots ? 1 : 0,
      finding: boots ? 'pass' : 'fail',
      text: boots ? 'boots and is up to date' : 'does not boot',
    }),
  ])
}
