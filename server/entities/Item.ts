import { Column, Entity } from 'typeorm'
import type { Accountability, Category, Condition } from '#shared/engine/vocabulary.ts'
import { RegistryRow } from './RegistryRow.ts'

@Entity('item')
export class Item extends RegistryRow {
  @Column('text')
  tag: string

  @Column('text')
  designation: string

  @Column('text')
  category: Category

  /** In a kit exactly when it is in a position; in a kit or in a place, never both. */
  @Column('uuid', { name: 'kit_id', nullable: true })
  kitId: string | null

  @Column('uuid', { name: 'position_id', nullable: true })
  positionId: string | null

  @Column('uuid', { name: 'place_id', nullable: true })
  placeId: string | null

  @Column('text', { default: '' })
  maker: string

  @Column('text', { default: '' })
  model: string

  @Column('text', { nullable: true })
  serial: string | null

  @Column('text', { default: 'durable' })
  accountability: Accountability

  @Column('text', { default: 'serviceable' })
  condition: Condition

  @Column('text', { name: 'condition_reason', default: '' })
  conditionReason: string

  @Column('uuid', { name: 'owner_id', nullable: true })
  ownerId: string | null

  @Column('jsonb')
  details: Record<string, unknown>

  @Column('uuid', { name: 'build_sheet_id', nullable: true })
  buildSheetId: string | null

  @Column('uuid', { name: 'batch_id', nullable: true })
  batchId: string | null

  @Column('date', { name: 'acquired_on', nullable: true })
  acquiredOn: string | null

  @Column('numeric', { name: 'weight_kg', precision: 7, scale: 3, nullable: true })
  weightKg: string | null

  @Column('text', { default: '' })
  notes: string
}
