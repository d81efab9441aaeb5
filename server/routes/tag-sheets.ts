import { countUnprintedTags, printTagSheet } from '#shared/contracts/tag-sheets.ts'
import type { AppContext } from '../context.ts'
import { countUnprinted } from '../services/tag-sheet/count-unprinted.ts'
import { printTags } from '../services/tag-sheet/print-tags.ts'
import { ANSWERED, type EndpointRouter } from './endpoint.ts'

export function tagSheetRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(countUnprintedTags, ({ by }) => countUnprinted(ctx, by))
  endpoints.add(printTagSheet, async ({ body, by, res }) => {
    const pdf = await printTags(ctx, by, body)
    res.set('Content-Type', printTagSheet.media)
    res.set('Content-Disposition', 'attachment; filename="tags.pdf"')
    res.set('Cache-Control', 'no-store')
    res.end(pdf)
    return ANSWERED
  })
}
