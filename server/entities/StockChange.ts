import { Column, Entity, PrimaryColumn } from 'typeorm'

/** Only ever added: what came into a lot or went out of it. */
@Entity('stock_change')
export class StockChange {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'lot_id' })
  lotId: string

  /** An exact decimal with its sign, as text. */
  @Column('numeric', { precision: 12, scale: 3 })
  difference: string

  @Column('text')
  reason: string

  @Column('timestamptz', { name: 'changed_at' })
  changedAt: Date

  @Column('uuid', { name: 'changed_by', nullable: true })
  changedBy: string | null
}
