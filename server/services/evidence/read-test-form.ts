import { knownShape } from '#shared/contracts/known-for-test.ts'
import type { TestForm } from '#shared/contracts/test-form.ts'
import { limitsOf } from '#shared/engine/policy/limits.ts'
import {
  HEAT_COOLING_MINUTES,
  heatReadingMinutes,
  METHOD_CARDS,
} from '#shared/engine/procedures/method-cards.ts'
import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import { canBeTested, INSTRUMENTS } from '#shared/engine/procedures/subjects.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import type { Rule } from '#shared/engine/readiness/types.ts'
import { withArticle } from '#shared/engine/readiness/words.ts'
import { BANDS, type Band, type Procedure } from '#shared/engine/vocabulary.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { knownForTest } from './known-for-test.ts'
import { fittingInstruments, lastUsed } from './form-instruments.ts'
import { ruleOfTest } from './rule-of-test.ts'
import { testHistory } from './test-history.ts'
import { summariesOf } from './test-summaries.ts'
import { readItemSubject, type TestSubject } from './test-subject.ts'

interface FaceRow {
  [column: string]: unknown
  tag: string
  kit_id: string | null
  kit_designation: string | null
  promised: Band[] | null
}

const FACE: Statement = {
  name: 'test-form-item',
  text: `SELECT i.tag, i.kit_id, k.designation AS kit_designation, kk.promise -> 'bands' AS promised
    FROM item i LEFT JOIN kit k ON k.id = i.kit_id LEFT JOIN kit_kind kk ON kk.id = k.kit_kind_id WHERE i.id = $1`,
}
const RECENT: Statement = {
  name: 'test-form-recent',
  text: `SELECT id FROM test WHERE item_id = $1 AND procedure = $2 ORDER BY performed_at DESC, id DESC LIMIT 6`,
}
const RULE_WORDS: Statement = { name: 'rule-words', text: 'SELECT reason, source FROM rule WHERE id = $1' }

interface Asked {
  readonly itemId: string
  readonly procedure: Procedure
  /** The test that the new one corrects: it counts for nothing any more. */
  readonly corrects?: string | undefined
}

/** What a phone needs to run and judge one test, also after its signal is gone. */
export async function readTestForm(tx: GroupTx, wanted: Asked): Promise<TestForm> {
  const { itemId, procedure, corrects = null } = wanted
  const asked = { procedure, subjectId: itemId, performedAt: tx.now, corrects }
  const [subject, [face], recent, history, policies, today] = await Promise.all([
    readItemSubject(tx, itemId),
    tx.sql<FaceRow>(FACE, [itemId]),
    tx.sql<{ id: string }>(RECENT, [itemId, procedure]),
    testHistory(tx, asked),
    policiesOrFirst(tx),
    tx.today(),
  ])
  const { category } = subject
  if (!face || category === 'kit' || !canBeTested(category, procedure))
    throw new AppError('request-invalid', `This procedure is not done to ${withArticle(category)}.`)
  const policy = policyAt({ policies }, tx.now.getTime())
  if (!policy) throw new Error('A group without a policy')
  const ruleOn = (band: Band | null) => ruleOfTest(policy, { subject, procedure, on: today, band })
  const rule = ruleOn(null)
  const [instruments, last, tests, words] = await Promise.all([
    fittingInstruments(tx, INSTRUMENTS[procedure], policy),
    lastUsed(tx, procedure),
    summariesOf(
      tx,
      recent.map((row) => row.id),
    ),
    rule ? tx.sql<{ reason: string; source: string }>(RULE_WORDS, [rule.id]) : [],
  ])
  const number = policies.find(({ id }) => id === policy.id)?.number ?? 1
  return {
    item: {
      id: subject.id,
      designation: subject.designation,
      category,
      tag: face.tag,
      kit: kitOf(face),
      details: { ...subject.details },
    },
    procedure,
    judgedBy: {
      policyId: policy.id,
      policyNumber: number,
      policyName: policy.name,
      bandRegion: policy.settings.bandRegion ?? DEFAULT_REGION,
      rule: rule && words[0] ? ruleAnswer(rule, words[0]) : null,
    },
    bands: bandsOf(subject, rule, face.promised),
    methods: METHOD_CARDS[procedure].map((card) => ({
      ...card,
      steps: [...card.steps],
      cautions: [...card.cautions],
    })),
    lastMethod: last?.method ?? null,
    lastInstrument: instruments.find(({ id }) => id === last?.instrumentId) ?? null,
    instruments,
    known: knownShape.parse(knownForTest({ subject, history, policy, rule, accuracy: null })),
    heat: procedure === 'heat-test' ? heatOf(rule) : null,
    bandRules: procedure === 'heat-test' ? bandRules(rule, ruleOn) : {},
    recent: tests,
  }
}

function kitOf({ kit_id: id, kit_designation: designation }: FaceRow): TestForm['item']['kit'] {
  return id === null || designation === null ? null : { id, designation }
}

function ruleAnswer(rule: Rule, words: { reason: string; source: string }) {
  const { id, limits, intervalMonths, vital } = rule
  return { id, limits: { ...limits }, intervalMonths, vital, ...words }
}

/** What the item covers, else what its kit promises, else what the rule asks for: one of them is known. */
function bandsOf(subject: TestSubject, rule: Rule | undefined, promised: Band[] | null): Band[] {
  const asked = (rule?.applies.bands ?? []) as readonly Band[]
  const known = subject.facts.bands ?? (promised && promised.length > 0 ? promised : asked)
  return BANDS.filter((band) => known.includes(band))
}

function bandRules(rule: Rule | undefined, ruleOn: (band: Band) => Rule | undefined): TestForm['bandRules'] {
  const own = BANDS.flatMap((band) => {
    const found = ruleOn(band)
    if (!found || found.id === rule?.id) return []
    return [[band, { limits: { ...found.limits }, heat: heatOf(found) }] as const]
  })
  return Object.fromEntries(own)
}

function heatOf(rule: Rule | undefined): NonNullable<TestForm['heat']> {
  const { powerW, minutes, maxC, maxSwrChange } = limitsOf('heat-test', rule)
  return {
    powerW,
    minutes,
    stopC: maxC,
    maxSwrChange: maxSwrChange ?? null,
    readingMinutes: heatReadingMinutes(minutes),
    coolingMinutes: [...HEAT_COOLING_MINUTES],
  }
}
