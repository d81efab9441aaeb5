import { Batch } from './Batch.ts'
import { BuildSheet } from './BuildSheet.ts'
import { Consumable } from './Consumable.ts'
import { ConsumableLot } from './ConsumableLot.ts'
import { Credential } from './Credential.ts'
import { Group } from './Group.ts'
import { Item } from './Item.ts'
import { Kit } from './Kit.ts'
import { KitKind } from './KitKind.ts'
import { Member } from './Member.ts'
import { Movement } from './Movement.ts'
import { OneTimeLink } from './OneTimeLink.ts'
import { Place } from './Place.ts'
import { Position } from './Position.ts'
import { StockChange } from './StockChange.ts'
import { TagPrint } from './TagPrint.ts'

/** Every entity by name, no globs. */
export const entities = [
  Batch,
  BuildSheet,
  Consumable,
  ConsumableLot,
  Credential,
  Group,
  Item,
  Kit,
  KitKind,
  Member,
  Movement,
  OneTimeLink,
  Place,
  Position,
  StockChange,
  TagPrint,
]
