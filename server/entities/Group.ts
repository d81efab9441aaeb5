import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('groups')
export class Group {
  @PrimaryColumn('uuid')
  id: string

  @Column('text')
  name: string

  @Column('text', { name: 'short_name' })
  shortName: string

  /** IANA name: due dates are days in this zone. */
  @Column('text', { name: 'time_zone' })
  timeZone: string

  /** Printed on tags: where a lost thing goes. */
  @Column('text', { name: 'return_address', default: '' })
  returnAddress: string

  @Column('boolean', { default: false })
  demo: boolean

  @Column('timestamptz', { name: 'archived_at', nullable: true })
  archivedAt: Date | null

  @Column('timestamptz', { name: 'created_at' })
  createdAt: Date
}
