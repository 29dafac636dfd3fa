import { federalCluster } from '@/lib/domain/clocks/library/cluster'
import { federalFastTrack } from '@/lib/domain/clocks/library/fast-track'
import { stateLevelTwo } from '@/lib/domain/clocks/library/level-two'
import { outlineProcedure } from '@/lib/domain/clocks/library/outline'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'

export interface LibraryProcedure {
  key: string
  title: string
  body: ProcedureBody
}

/** The procedures shipped with the product, each to be checked against the filed tariff. */
export const libraryProcedures: LibraryProcedure[] = [
  federalFastTrack(),
  federalStudyProcess(),
  stateLevelTwo(),
  federalCluster(),
  outlineProcedure(),
].map((body) => ({ key: body.key, title: body.title, body }))
