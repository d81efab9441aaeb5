import { Column, PrimaryColumn } from 'typeorm'

/** What every row of the registry has: it is versioned, and retired instead of deleted. */
export abstract class RegistryRow {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('int', { default: 1 })
  version: number

  @Column('timestamptz', { name: 'created_at' })
  createdAt: Date

  @Column('timestamptz', { name: 'retired_at', nullable: true })
  retiredAt: Date | null

  @Column('text', { name: 'retired_reason', nullable: true })
  retiredReason: string | null
}
