import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('credential')
export class Credential {
  @PrimaryColumn('uuid', { name: 'member_id' })
  memberId: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  /** argon2id in its encoded form, with its settings and salt. */
  @Column('text', { name: 'password_hash' })
  passwordHash: string

  @Column('timestamptz', { name: 'changed_at' })
  changedAt: Date
}
