import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import type { TestToInsert } from './insert-test.ts'
import type { TestSubject } from './test-subject.ts'

interface Recorded {
  readonly subject: TestSubject
  readonly test: TestToInsert
}

/** A test stands in the history of the thing and of the kit that it sits in. */
export async function auditTest(tx: GroupTx, { subject, test }: Recorded): Promise<void> {
  const { body, judgement } = test
  const name = body.procedure.replaceAll('-', ' ')
  const findings = judgement.findings.filter(({ finding }) => finding === judgement.finding)
  const [first, ...more] = findings.map(({ band, text }) => (band === null ? text : `${band}: ${text}`))
  const found = [first, ...(more.length > 0 ? [`and ${more.length} more`] : [])].filter(Boolean).join(', ')
  const verb = body.supersedes ? 'corrected' : 'recorded'
  await record(tx, {
    action: body.supersedes ? 'test-corrected' : 'test-recorded',
    subjectType: subject.type,
    subjectId: subject.id,
    kitId: subject.kitId,
    summary: `${verb} the ${name} of ${subject.designation}: ${judgement.finding}${found ? `, ${found}` : ''}`,
    after: { testId: test.id, procedure: body.procedure, finding: judgement.finding },
  })
}
