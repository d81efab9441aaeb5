import { Column, Entity } from 'typeorm'
import { RegistryRow } from './RegistryRow.ts'

@Entity('place')
export class Place extends RegistryRow {
  @Column('text')
  name: string

  @Column('text', { default: '' })
  kind: string

  @Column('numeric', { name: 'min_c', precision: 5, scale: 1, nullable: true })
  minC: string | null

  @Column('numeric', { name: 'max_c', precision: 5, scale: 1, nullable: true })
  maxC: string | null

  @Column('text', { default: '' })
  access: string

  @Column('text', { name: 'key_holders', default: '' })
  keyHolders: string
}
