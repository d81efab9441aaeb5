import { measureTagSheet, type TagSheetRound } from './tag-sheet.ts'
import { median, type BenchRow } from './report.ts'

const ROUNDS = 5

/** P1: 1,000 item labels against the barest page that holds the same codes and two lines of text. */
export async function benchTags(): Promise<BenchRow[]> {
  const rounds: TagSheetRound[] = []
  for (let round = 0; round < ROUNDS; round += 1) rounds.push(await measureTagSheet(round))
  const middle = (of: (round: TagSheetRound) => number) => median(rounds.map(of))
  return [
    {
      id: 'P1',
      what: '1,000 labels',
      measured: `${middle(({ ms }) => ms).toFixed(0)} ms`,
      floor: `${middle(({ floorMs }) => floorMs).toFixed(0)} ms`,
      ratio: middle(({ ms, floorMs }) => ms / floorMs),
      goal: '<= 1.5x vector_runs_raw',
    },
    {
      id: 'P1',
      what: 'a label',
      measured: `${Math.round(middle(({ bytes, labels }) => bytes / labels))} bytes`,
      floor: '',
      ratio: null,
      goal: '<= 400 bytes',
    },
    {
      id: 'P1',
      what: 'longest block',
      measured: `${middle(({ blockMs }) => blockMs).toFixed(0)} ms`,
      floor: '',
      ratio: null,
      goal: '<= 25 ms',
    },
  ]
}
