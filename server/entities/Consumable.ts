import { Column, Entity } from 'typeorm'
import { RegistryRow } from './RegistryRow.ts'

@Entity('consumable')
export class Consumable extends RegistryRow {
  @Column('text')
  name: string

  @Column('text')
  unit: string

  /** An exact decimal, as text. */
  @Column('numeric', { precision: 12, scale: 3 })
  minimum: string

  @Column('uuid', { name: 'place_id', nullable: true })
  placeId: string | null

  @Column('text', { default: '' })
  notes: string
}
