import { z } from 'zod'
import { exhibitStates } from '@/lib/domain/exhibits'
import { shortText, show, uuid } from '@/lib/schemas/common'
import { sha256Schema } from '@/lib/schemas/file'

/** The next revision of Exhibit C, from a frozen calculation. */
export const prepareExhibitInput = z.object({
  id: uuid,
  calculationNo: z
    .number({ error: (issue) => `Found ${show(issue.input)}; choose one of the calculations.` })
    .int('Choose one of the calculations.')
    .min(1, 'Choose one of the calculations.'),
  what: shortText('What is new in this revision', 240),
  /** Needed where the calculation ran on a synthetic year. */
  weatherReason: z.string().trim().max(240, 'At most 240 characters.').optional(),
})
export type PrepareExhibitInput = z.infer<typeof prepareExhibitInput>

export const checkExhibitInput = z.object({
  notes: shortText('What was checked, and against what', 1000),
})
export type CheckExhibitInput = z.infer<typeof checkExhibitInput>

const person = z.object({ id: z.string(), name: z.string() })

/** One revision of an exhibit; its id is the one under which the document is fetched. */
export const exhibitRevisionSchema = z.object({
  id: uuid,
  applicationId: uuid,
  letter: z.string(),
  title: z.string(),
  revision: z.number(),
  state: z.enum(exhibitStates),
  /** The state as a person reads it: "issued, out of step: design revision 4 of 30 Nov". */
  stateWords: z.string(),
  outOfStep: z.string().nullable(),
  what: z.string(),
  weatherReason: z.string().nullable(),
  calculation: z.object({ no: z.number(), sha256: sha256Schema, designNo: z.number() }),
  /** Whether the document is there: `waiting` while the worker makes it. */
  render: z.enum(['waiting', 'done', 'failed']),
  renderError: z.string().nullable(),
  /** Since when the worker has been asked. */
  renderSince: z.string(),
  document: z.object({ sha256: sha256Schema, size: z.number() }).nullable(),
  preparedBy: person,
  preparedAt: z.string(),
  checkedBy: person.nullable(),
  checkedAt: z.string().nullable(),
  checkNotes: z.string().nullable(),
  issuedBy: person.nullable(),
  issuedAt: z.string().nullable(),
})
export type ExhibitRevision = z.infer<typeof exhibitRevisionSchema>

/** Every revision of an application's exhibits, the latest first. */
export const exhibitListSchema = z.object({ items: z.array(exhibitRevisionSchema) })
export type ExhibitList = z.infer<typeof exhibitListSchema>
