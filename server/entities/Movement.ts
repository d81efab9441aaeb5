import { Column, Entity, PrimaryColumn } from 'typeorm'

/** Only ever added: where an item went, and from where. */
@Entity('movement')
export class Movement {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'item_id' })
  itemId: string

  @Column('uuid', { name: 'from_kit_id', nullable: true })
  fromKitId: string | null

  @Column('uuid', { name: 'from_position_id', nullable: true })
  fromPositionId: string | null

  @Column('uuid', { name: 'from_place_id', nullable: true })
  fromPlaceId: string | null

  @Column('uuid', { name: 'to_kit_id', nullable: true })
  toKitId: string | null

  @Column('uuid', { name: 'to_position_id', nullable: true })
  toPositionId: string | null

  @Column('uuid', { name: 'to_place_id', nullable: true })
  toPlaceId: string | null

  @Column('timestamptz', { name: 'moved_at' })
  movedAt: Date

  @Column('text', { default: '' })
  reason: string

  @Column('uuid', { name: 'moved_by', nullable: true })
  movedBy: string | null
}
