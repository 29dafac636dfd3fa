/** Every address of the product: pages under `routes`, JSON and files under `api`. */

type Filter = Record<string, string | number | boolean | null | undefined>

/** Adds the filters that have a value; `?` only when there is one. */
export function withQuery(path: string, filter: Filter = {}): string {
  const query = new URLSearchParams()
  for (const [key, value] of Object.entries(filter)) {
    if (value !== undefined && value !== null && value !== '') query.set(key, String(value))
  }
  const text = query.toString()
  return text ? `${path}?${text}` : path
}

const part = encodeURIComponent

export const applicationTabs = [
  'sequence',
  'clocks',
  'design',
  'exhibits',
  'correspondence',
  'queue',
  'money',
  'files',
  'record',
] as const
export type ApplicationTab = (typeof applicationTabs)[number]

export const routes = {
  home: () => '/',
  due: (filter?: Filter) => withQuery('/due', filter),
  pipeline: (filter?: Filter) => withQuery('/pipeline', filter),
  newApplication: (filter?: Filter) => withQuery('/pipeline/new', filter),
  takeOver: (filter?: Filter) => withQuery('/pipeline/take-over', filter),
  calendar: (filter?: Filter) => withQuery('/calendar', filter),
  /** An application opens on its Sequence, which has no folder of its own. */
  application: (id: string, tab: ApplicationTab = 'sequence', filter?: Filter) =>
    withQuery(
      tab === 'sequence' ? `/applications/${part(id)}` : `/applications/${part(id)}/${tab}`,
      filter,
    ),
  /** The count of one clock, opened in the list of its application. */
  clock: (id: string, step: string, instance: number) => {
    const key = `${step}~${instance}`
    return `${withQuery(`/applications/${part(id)}/clocks`, { open: key })}#clock-${key}`
  },
  newFact: (id: string, filter?: Filter) =>
    withQuery(`/applications/${part(id)}/record-event`, filter),
  calculation: (applicationId: string, no: number) =>
    `/applications/${part(applicationId)}/design/calculations/${no}`,
  exhibit: (applicationId: string, exhibitId: string) =>
    `/applications/${part(applicationId)}/exhibits/${part(exhibitId)}`,
  countDays: (filter?: Filter) => withQuery('/count-days', filter),
  studyGroup: (id: string) => `/study-groups/${part(id)}`,
  queueLists: () => '/queue-lists',
  equipment: () => '/equipment',
  organizations: () => '/organizations',
  organization: (id: string) => `/organizations/${part(id)}`,
  notices: (filter?: Filter) => withQuery('/notices', filter),
  people: () => '/people',
  person: (id: string) => `/people/${part(id)}`,
  settings: () => '/me',
  signIn: (from?: string) => withQuery('/sign-in', { from }),
  forgotPassword: () => '/reset',
  resetPassword: (token: string) => `/reset/${part(token)}`,
  invitation: (token: string) => `/welcome/${part(token)}`,
  /** Opened from a notice: the secret speaks for its addressee. */
  acknowledge: (secret: string) => `/acknowledge/${part(secret)}`,
} as const

/** Pages that open without a session: the first segment of their address. */
export const openSegments: readonly string[] = ['sign-in', 'reset', 'welcome', 'acknowledge']

export const api = {
  auth: () => '/api/auth',
  csrf: () => '/api/auth/csrf',
  signIn: () => '/api/auth/callback/credentials',
  requestLink: () => '/api/one-time-links/request',
  acceptLink: () => '/api/one-time-links/accept',
  health: () => '/api/health',
  openapi: () => '/api/openapi.json',
  applications: (filter?: Filter) => withQuery('/api/applications', filter),
  application: (id: string) => `/api/applications/${part(id)}`,
  facts: (applicationId: string) => `/api/applications/${part(applicationId)}/facts`,
  milestones: (applicationId: string) => `/api/applications/${part(applicationId)}/milestones`,
  exhibits: (applicationId: string) => `/api/applications/${part(applicationId)}/exhibits`,
  exhibitDocument: (id: string) => `/api/exhibits/${part(id)}/document`,
  checkExhibit: (id: string) => `/api/exhibits/${part(id)}/check`,
  issueExhibit: (id: string) => `/api/exhibits/${part(id)}/issue`,
  makeExhibit: (id: string) => `/api/exhibits/${part(id)}/make`,
  groupFacts: (groupId: string) => `/api/study-groups/${part(groupId)}/facts`,
  obligations: (filter?: Filter) => withQuery('/api/obligations', filter),
  acknowledgements: () => '/api/acknowledgements',
  acknowledgementByLink: () => '/api/acknowledgements/by-link',
  assignments: () => '/api/assignments',
  entries: (filter?: Filter) => withQuery('/api/entries', filter),
  entry: (id: string) => `/api/entries/${part(id)}`,
  entryChoices: (applicationId: string) => withQuery('/api/entries/choices', { applicationId }),
  entryFromEml: () => '/api/entries/from-eml',
  repliesOwed: (filter?: Filter) => withQuery('/api/entries/replies-owed', filter),
  files: (filter?: Filter) => withQuery('/api/files', filter),
  /** A download by the id of the file's place. */
  file: (linkId: string) => `/api/files/${part(linkId)}`,
  projects: () => '/api/projects',
  organizations: () => '/api/organizations',
  organization: (id: string) => `/api/organizations/${part(id)}`,
  procedures: () => '/api/procedures',
  calendarEvents: (filter?: Filter) => withQuery('/api/calendar', filter),
  calendarFeed: (secret: string) => `/api/calendar/${part(secret)}.ics`,
  notices: (filter?: Filter) => withQuery('/api/notices', filter),
  people: () => '/api/people',
  person: (id: string) => `/api/people/${part(id)}`,
  personInvitation: (id: string) => `/api/people/${part(id)}/invitation`,
  me: () => '/api/me',
  ownPassword: () => '/api/me/password',
  calendarAddress: () => '/api/me/calendar-address',
  tokens: () => '/api/me/tokens',
  token: (id: string) => `/api/me/tokens/${part(id)}`,
  countClocks: () => '/api/clocks/count',
  weather: () => '/api/weather',
  syntheticWeather: () => '/api/weather/synthetic',
  weatherYear: (id: string) => `/api/weather/${part(id)}`,
  weatherHours: (id: string) => `/api/weather/${part(id)}/hours`,
  projectDesign: (projectId: string) => `/api/projects/${part(projectId)}/design`,
  calculations: (applicationId: string) => `/api/applications/${part(applicationId)}/calculations`,
  calculation: (applicationId: string, no: number) =>
    `/api/applications/${part(applicationId)}/calculations/${no}`,
  plantEstimate: () => '/api/plant/estimate',
  plantStrings: () => '/api/plant/strings',
  screens: () => '/api/grid/screens',
  gridSettings: () => '/api/grid/settings',
  interconnection: () => '/api/grid/interconnection',
  queueSnapshots: (utilityId: string) => `/api/queue-lists/${part(utilityId)}/snapshots`,
} as const
