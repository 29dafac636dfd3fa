import { z } from 'zod'
import {
  newApplicationInput,
  type ApplicationChoices,
  type NewApplicationInput,
  newProjectInput,
} from '@/lib/schemas/application'

/** What the form holds: texts as they were typed. */
export interface ApplicationDraft {
  projectKind: 'new' | 'known'
  projectId: string
  name: string
  town: string
  latitude: string
  longitude: string
  /** Null until it is typed: the name follows the project's. */
  entityName: string | null
  operatorId: string
  procedureRevisionId: string
  poi: string
  poiVoltageKv: string
  requestedMw: string
  dcMw: string
  technology: string
  onMainline: boolean
}

export const technologies = ['Solar', 'Solar with storage', 'Storage'] as const

export const emptyDraft: ApplicationDraft = {
  projectKind: 'new',
  projectId: '',
  name: '',
  town: '',
  latitude: '',
  longitude: '',
  entityName: null,
  operatorId: '',
  procedureRevisionId: '',
  poi: '',
  poiVoltageKv: '',
  requestedMw: '',
  dcMw: '',
  technology: 'Solar',
  onMainline: false,
}

export interface DraftFault {
  path: string
  message: string
}

type Checked = { input: NewApplicationInput; faults: [] } | { input: null; faults: DraftFault[] }

/** The number a text holds, thousands commas left out; undefined for none, NaN for anything else. */
export function decimalOf(text: string): number | undefined {
  const plain = text.trim().replace(/,(?=\d{3}(\D|$))/g, '')
  if (plain === '') return undefined
  return /^[-+]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : NaN
}

/** The project's name as chosen or typed. */
export function projectNameOf(
  draft: ApplicationDraft,
  projects: ApplicationChoices['projects'],
): string {
  if (draft.projectKind === 'new') return draft.name.trim()
  return projects.find(({ id }) => id === draft.projectId)?.name ?? ''
}

/** The company that applies: as typed, else "<Project> Solar, LLC". */
export function entityNameOf(
  draft: ApplicationDraft,
  projects: ApplicationChoices['projects'],
): string {
  if (draft.entityName !== null) return draft.entityName
  const name = projectNameOf(draft, projects)
  return name && `${name} Solar, LLC`
}

/** Procedures an organization can follow: its own first, then the library's; none without one. */
export function proceduresFor(
  operatorId: string,
  procedures: ApplicationChoices['procedures'],
): ApplicationChoices['procedures'] {
  if (!operatorId) return []
  const own = procedures.filter((one) => one.organizationId === operatorId)
  return [...own, ...procedures.filter((one) => one.organizationId === null)]
}

const restInput = newApplicationInput.omit({
  project: true,
  operatorId: true,
  procedureRevisionId: true,
})

/** The draft as the handler takes it, or every fault with the field it stands at. */
export function checkDraft(
  id: string,
  draft: ApplicationDraft,
  projects: ApplicationChoices['projects'],
): Checked {
  const { operatorId, procedureRevisionId } = draft
  const isNew = draft.projectKind === 'new'
  const project = isNew ? newProject(draft) : { id: draft.projectId }
  const rest = { id, entityName: entityNameOf(draft, projects), terms: termsOf(draft) }
  const faults = [
    ...(isNew ? faultsOf(newProjectInput, project, 'project.') : []),
    ...missing(!isNew && !draft.projectId, 'project.id', 'Choose a project.'),
    ...numberFaults(draft),
    ...faultsOf(restInput, rest),
    ...missing(!operatorId, 'operatorId', 'Choose the organization.'),
    ...missing(!procedureRevisionId, 'procedureRevisionId', 'Choose the procedure.'),
  ]
  const first = faults.filter((one, at) => faults.findIndex(({ path }) => path === one.path) === at)
  if (first.length > 0) return { input: null, faults: first }
  const input = { ...rest, project, operatorId, procedureRevisionId }
  return { input: newApplicationInput.parse(input), faults: [] }
}

function newProject(draft: ApplicationDraft) {
  return {
    name: draft.name,
    town: draft.town.trim() || undefined,
    latitude: decimalOf(draft.latitude),
    longitude: decimalOf(draft.longitude),
  }
}

function termsOf(draft: ApplicationDraft) {
  return {
    poi: draft.poi,
    poiVoltageKv: decimalOf(draft.poiVoltageKv),
    requestedMw: decimalOf(draft.requestedMw),
    dcMw: decimalOf(draft.dcMw),
    technology: draft.technology || undefined,
    onMainline: draft.onMainline,
  }
}

/** A text that is no number, with what was found. */
function numberFaults(draft: ApplicationDraft): DraftFault[] {
  const numbers = [
    ...(draft.projectKind === 'new'
      ? ([
          ['project.latitude', draft.latitude, '37.25'],
          ['project.longitude', draft.longitude, '-103.5'],
        ] as const)
      : []),
    ['terms.requestedMw', draft.requestedMw, '3.6'],
    ['terms.poiVoltageKv', draft.poiVoltageKv, '13.2'],
    ['terms.dcMw', draft.dcMw, '4.5'],
  ] as const
  return numbers
    .filter(([, text]) => Number.isNaN(decimalOf(text)))
    .map(([path, text, example]) => ({
      path,
      message: `Found "${text.trim()}"; a number such as ${example} is needed.`,
    }))
}

function faultsOf(schema: z.ZodType, value: unknown, prefix = ''): DraftFault[] {
  const result = schema.safeParse(value)
  if (result.success) return []
  return result.error.issues.map(({ path, message }) => ({
    path: `${prefix}${path.join('.')}`,
    message,
  }))
}

function missing(isMissing: boolean, path: string, message: string): DraftFault[] {
  return isMissing ? [{ path, message }] : []
}
