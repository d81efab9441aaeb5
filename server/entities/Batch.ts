import { Column, Entity } from 'typeorm'
import { RegistryRow } from './RegistryRow.ts'

@Entity('batch')
export class Batch extends RegistryRow {
  @Column('uuid', { name: 'build_sheet_id' })
  buildSheetId: string

  @Column('text')
  name: string

  @Column('text', { name: 'core_lot', default: '' })
  coreLot: string

  @Column('date', { name: 'built_on', nullable: true })
  builtOn: string | null

  @Column('uuid', { name: 'builder_id', nullable: true })
  builderId: string | null

  @Column('text', { default: '' })
  notes: string
}
