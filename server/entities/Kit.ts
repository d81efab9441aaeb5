import { Column, Entity } from 'typeorm'
import type { Availability } from '#shared/engine/vocabulary.ts'
import { RegistryRow } from './RegistryRow.ts'

@Entity('kit')
export class Kit extends RegistryRow {
  @Column('text')
  tag: string

  @Column('text')
  designation: string

  @Column('uuid', { name: 'kit_kind_id' })
  kitKindId: string

  @Column('uuid', { name: 'home_place_id', nullable: true })
  homePlaceId: string | null

  @Column('uuid', { name: 'place_id', nullable: true })
  placeId: string | null

  @Column('text', { default: 'available' })
  availability: Availability

  @Column('text', { name: 'availability_reason', default: '' })
  availabilityReason: string

  @Column('date', { name: 'expected_return_on', nullable: true })
  expectedReturnOn: string | null

  @Column('uuid', { name: 'holder_id', nullable: true })
  holderId: string | null

  @Column('uuid', { name: 'responsible_id', nullable: true })
  responsibleId: string | null

  @Column('text', { name: 'seal_number', nullable: true })
  sealNumber: string | null

  @Column('boolean', { name: 'seal_matches', default: true })
  sealMatches: boolean

  @Column('text', { default: '' })
  notes: string
}
