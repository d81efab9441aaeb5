import { CreateGroupsAndPeople1796000000000 } from './1796000000000-CreateGroupsAndPeople.ts'
import { CreateRegistry1796000100000 } from './1796000100000-CreateRegistry.ts'
import { CreateEvidence1796000200000 } from './1796000200000-CreateEvidence.ts'
import { CreateReadiness1796000300000 } from './1796000300000-CreateReadiness.ts'
import { CreateAttachments1796000400000 } from './1796000400000-CreateAttachments.ts'
import { AddWindingCards1796000500000 } from './1796000500000-AddWindingCards.ts'
import { AddSessionChecks1796000600000 } from './1796000600000-AddSessionChecks.ts'
import { AddExposureRecords1796000610000 } from './1796000610000-AddExposureRecords.ts'
import { CreateWhatIfs1796000700000 } from './1796000700000-CreateWhatIfs.ts'
import { AddReadinessJudged1796000800000 } from './1796000800000-AddReadinessJudged.ts'

export const migrations = [
  CreateGroupsAndPeople1796000000000,
  CreateRegistry1796000100000,
  CreateEvidence1796000200000,
  CreateReadiness1796000300000,
  CreateAttachments1796000400000,
  AddWindingCards1796000500000,
  AddSessionChecks1796000600000,
  AddExposureRecords1796000610000,
  CreateWhatIfs1796000700000,
  AddReadinessJudged1796000800000,
]
