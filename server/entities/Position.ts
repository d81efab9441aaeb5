import { Column, Entity, PrimaryColumn } from 'typeorm'
import type { Category } from '#shared/engine/vocabulary.ts'

/** One line of a load plan. Kept when it is removed: movements still name it. */
@Entity('position')
export class Position {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'kit_kind_id' })
  kitKindId: string

  @Column('int')
  ordinal: number

  @Column('text')
  name: string

  @Column('text')
  category: Category

  @Column('int', { default: 1 })
  quantity: number

  @Column('boolean')
  vital: boolean

  @Column('jsonb', { default: {} })
  requires: Record<string, unknown>

  @Column('timestamptz', { name: 'removed_at', nullable: true })
  removedAt: Date | null
}
