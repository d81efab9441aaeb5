import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('consumable_lot')
export class ConsumableLot {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'consumable_id' })
  consumableId: string

  @Column('text', { default: '' })
  name: string

  /** An exact decimal, as text: the sum of all changes of this lot. */
  @Column('numeric', { precision: 12, scale: 3, default: 0 })
  quantity: string

  @Column('date', { name: 'use_by_on', nullable: true })
  useByOn: string | null

  @Column('text', { default: '' })
  condition: string

  @Column('timestamptz', { name: 'created_at' })
  createdAt: Date
}
