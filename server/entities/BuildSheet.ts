import { Column, Entity } from 'typeorm'
import type { Category } from '#shared/engine/vocabulary.ts'
import { RegistryRow } from './RegistryRow.ts'

@Entity('build_sheet')
export class BuildSheet extends RegistryRow {
  @Column('text')
  name: string

  @Column('text')
  category: Category

  @Column('jsonb')
  details: Record<string, unknown>

  @Column('jsonb', { default: {} })
  winding: Record<string, unknown>

  @Column('text', { default: '' })
  notes: string
}
