import { AppError } from '../../errors.ts'

/** Unique constraint -> the field of the body that broke it, and how to say so. */
const FIELDS: Readonly<Record<string, readonly [pointer: string, detail: string]>> = {
  item_designation: ['#/designation', 'Another item has that designation already.'],
  item_serial: ['#/serial', 'That serial number of that maker and model is taken already.'],
  kit_designation: ['#/designation', 'Another kit has that designation already, perhaps a retired one.'],
  kit_kind_code: ['#/code', 'Another kit kind has that code already.'],
  place_name: ['#/name', 'Another place has that name already.'],
  build_sheet_name: ['#/name', 'Another build sheet has that name already.'],
  batch_name: ['#/name', 'Another batch has that name already.'],
  consumable_name: ['#/name', 'Another consumable has that name already.'],
  consumable_lot_consumable_id_name_key: ['#/name', 'This consumable has a lot of that name already.'],
}

/** Runs a write; a broken unique constraint names its field, and an id used elsewhere is `id-taken`. */
export async function namingDuplicates<T>(write: () => Promise<T>): Promise<T> {
  try {
    return await write()
  } catch (error) {
    throw duplicate(error) ?? error
  }
}

function duplicate(error: unknown): AppError | undefined {
  const { code, constraint = '' } = databaseError(error)
  if (code !== '23505') return undefined
  if (constraint.endsWith('_pkey')) return idTaken()
  const field = FIELDS[constraint]
  if (!field) return undefined
  const [pointer, detail] = field
  return new AppError('already-exists', detail, { errors: [{ pointer, detail }] })
}

export function idTaken(): AppError {
  return new AppError('id-taken', 'Nothing was saved. Send it again under a new id.')
}

/** TypeORM wraps the driver's error; named statements throw it bare. */
function databaseError(error: unknown): { code?: string; constraint?: string } {
  const { driverError } = error as { driverError?: object }
  return driverError ?? (error as object)
}
