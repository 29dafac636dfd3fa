import {
  codExtensionProcedure,
  modificationDetermination,
  suspension,
  technologyChange,
  transfer,
} from '@/lib/domain/clocks/library/attached'
import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { stateLevelTwo } from '@/lib/domain/clocks/library/level-two'
import { operatorPhases } from '@/lib/domain/clocks/library/operator-phases'
import { outlineProcedure } from '@/lib/domain/clocks/library/outline'
import { stateThreeLevels } from '@/lib/domain/clocks/library/state-levels'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'

export interface LibraryProcedure {
  key: string
  title: string
  body: ProcedureBody
}

const listed = (body: ProcedureBody): LibraryProcedure => ({
  key: body.key,
  title: body.title,
  body,
})

/** The procedures shipped with the product, each to be checked against the filed tariff. */
export const libraryProcedures: LibraryProcedure[] = [
  federalFastTrack(),
  federalStudyProcess(),
  stateLevelTwo(),
  federalCluster(),
  stateThreeLevels(),
  operatorPhases(),
  outlineProcedure(),
].map(listed)

/** Procedures attached to a request when something changes; none is filed as a request. */
export const attachedProcedures: LibraryProcedure[] = [
  modificationDetermination(),
  technologyChange(),
  codExtensionProcedure(),
  transfer(),
  suspension(),
].map(listed)
