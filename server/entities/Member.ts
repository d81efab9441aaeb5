import { Column, Entity, PrimaryColumn } from 'typeorm'
import type { Role } from '#shared/contracts/roles.ts'

@Entity('member')
export class Member {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('text')
  name: string

  /** Unique among all present members of all groups, whatever its case: it is what one signs in with. */
  @Column('text', { nullable: true })
  email: string | null

  @Column('text', { nullable: true })
  phone: string | null

  @Column('text', { name: 'call_sign', nullable: true })
  callSign: string | null

  @Column('text', { name: 'licence_class', nullable: true })
  licenceClass: string | null

  @Column('date', { name: 'licence_expires_on', nullable: true })
  licenceExpiresOn: string | null

  @Column('text', { array: true })
  roles: Role[]

  @Column('text', { name: 'temperature_unit', default: 'C' })
  temperatureUnit: 'C' | 'F'

  @Column('text', { name: 'length_unit', default: 'm' })
  lengthUnit: 'm' | 'ft'

  @Column('boolean', { name: 'wants_reminders', default: true })
  wantsReminders: boolean

  @Column('text', { default: '' })
  notes: string

  @Column('int', { default: 1 })
  version: number

  @Column('timestamptz', { name: 'created_at' })
  createdAt: Date

  @Column('timestamptz', { name: 'removed_at', nullable: true })
  removedAt: Date | null
}
