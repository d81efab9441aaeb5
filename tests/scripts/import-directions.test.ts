import { ESLint } from 'eslint'
import { describe, expect, it, vi } from 'vitest'

// Processes and linters take their time on a busy machine.
vi.setConfig({ testTimeout: 60_000 })

const eslint = new ESLint()

/** The messages of the import rule for a line of code as if it stood in `filePath`. */
async function importFaults(filePath: string, line: string): Promise<string[]> {
  const results = await eslint.lintText(`${line}\n`, { filePath })
  return results
    .flatMap(({ messages }) => messages)
    .flatMap(({ ruleId, message }) => (ruleId?.endsWith('no-restricted-imports') ? [message] : []))
}

describe('import directions', () => {
  it.each([
    ['src/views/board.ts', `import '#server/app.ts'`],
    ['src/views/board.ts', `import 'pg'`],
    ['shared/contracts/board.ts', `import '#server/errors.ts'`],
    ['shared/contracts/board.ts', `import '@/main.ts'`],
    ['shared/engine/board.ts', `import 'zod'`],
    ['shared/engine/board.ts', `import '../contracts/fields.ts'`],
    ['shared/engine/board.ts', `import '#shared/contracts/fields.ts'`],
    ['shared/engine/board.ts', `import 'node:fs'`],
    ['server/app-x.ts', `import '@/main.ts'`],
    ['server/services/board.ts', `import '#server/routes/index.ts'`],
    ['server/services/board.ts', `import '../routes/index.ts'`],
    ['server/services/board.ts', `import 'express'`],
    ['server/entities/Board.ts', `import '#server/services/board.ts'`],
    ['server/entities/Board.ts', `import '../services/board.ts'`],
  ])('refuses in %s: %s', async (filePath, line) => {
    expect(await importFaults(filePath, line)).toHaveLength(1)
  })

  it.each([
    ['src/views/board.ts', `import '#shared/engine/outcome.ts'`],
    ['shared/contracts/board.ts', `import '#shared/engine/outcome.ts'`],
    ['server/routes/board.ts', `import '#server/services/board.ts'`],
    ['server/services/board.ts', `import '#server/entities/Board.ts'`],
  ])('allows in %s: %s', async (filePath, line) => {
    expect(await importFaults(filePath, line)).toEqual([])
  })
})
