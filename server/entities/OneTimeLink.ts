import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('one_time_link')
export class OneTimeLink {
  @PrimaryColumn('uuid')
  id: string

  @Column('uuid', { name: 'group_id' })
  groupId: string

  @Column('uuid', { name: 'member_id' })
  memberId: string

  @Column('text')
  purpose: 'invitation' | 'password-reset' | 'reminders'

  /** SHA-256 of the token; the token itself is in the mail only. */
  @Column('bytea', { name: 'token_hash' })
  tokenHash: Buffer

  @Column('timestamptz', { name: 'created_at' })
  createdAt: Date

  @Column('timestamptz', { name: 'expires_at' })
  expiresAt: Date

  @Column('timestamptz', { name: 'used_at', nullable: true })
  usedAt: Date | null
}
