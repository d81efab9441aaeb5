import { Column, Entity, PrimaryColumn } from 'typeorm'

/** Only ever added: a tag of this kit or item went into a PDF. */
@Entity('tag_print')
export class TagPrint {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'kit_id', nullable: true })
  kitId: string | null

  @Column('uuid', { name: 'item_id', nullable: true })
  itemId: string | null

  @Column('timestamptz', { name: 'printed_at' })
  printedAt: Date

  @Column('uuid', { name: 'printed_by', nullable: true })
  printedBy: string | null
}
