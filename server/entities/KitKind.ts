import { Column, Entity } from 'typeorm'
import type { KitPromise } from '#shared/engine/readiness/types.ts'
import { RegistryRow } from './RegistryRow.ts'

@Entity('kit_kind')
export class KitKind extends RegistryRow {
  @Column('text')
  code: string

  @Column('text')
  name: string

  @Column('boolean')
  station: boolean

  @Column('jsonb')
  promise: KitPromise
}
