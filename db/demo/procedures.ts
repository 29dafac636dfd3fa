import type { DemoOrganization } from '@/db/demo/organizations'
import { libraryProcedures, type LibraryProcedure } from '@/lib/domain/clocks/library/all'
import { federalStudyProcess } from '@/lib/domain/clocks/library/study-process'

const cooperative = federalStudyProcess({
  key: 'tfec_study_process',
  title: 'Three Furrows study process, to 20 MW',
  entryDeposit: { title: 'Deposit: $10,000 and $1 per kWac', amountMinor: 1_990_000 },
  facilitiesReturnDays: 15,
  facilitiesDepositMinor: 2_500_000,
  calendarRoll: 'next_business_day',
})

/** The library and the invented utilities' own procedures. */
export const demoProcedures: LibraryProcedure[] = [
  ...libraryProcedures,
  { key: cooperative.key, title: cooperative.title, body: cooperative },
]

/** The library belongs to nobody; a utility's own procedure names its organization. */
export const procedureOwners: Record<string, DemoOrganization['key']> = {
  state_level_two: 'dml',
  tfec_study_process: 'tfec',
}
