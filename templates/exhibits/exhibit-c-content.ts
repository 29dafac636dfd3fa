import { monthlyOf, type MonthlyTable } from '@/templates/exhibits/exhibit-c-months'
import { elementRows, resultRows } from '@/templates/exhibits/exhibit-c-figures'
import { limitsOf } from '@/templates/exhibits/exhibit-c-limits'
import { calculationWords, methodRows } from '@/templates/exhibits/exhibit-c-methods'
import { exhibitTitles, type ExhibitSource, type Signature } from '@/lib/domain/exhibits'
import { formatShortDate } from '@/lib/domain/format-date'

/** One ruled line: what, its figure, and what stands beside it. */
export interface ContentRow {
  label: string
  value: string
  note: string
  /** Differs from the issued revision before. */
  changed?: boolean
}

export interface RevisionRow {
  no: string
  on: string
  prepared: string
  checked: string
  what: string
}

/** Every word and figure of Exhibit C, in the order it is read. */
export interface ExhibitCContent {
  title: string
  project: string
  requestNo: string
  revisionNo: number
  revision: string
  isDraft: boolean
  elements: ContentRow[]
  result: ContentRow[]
  monthly: MonthlyTable
  methods: ContentRow[]
  /** Which frozen calculation the figures are, with the whole hash. */
  calculation: string
  limits: { lead: string; text: string }[]
  revisions: RevisionRow[]
  /** Names the revision that bars of change compare with; null where there is none. */
  marks: string | null
  caution: string
  prepared: string
  checked: string
  /** The frozen inputs, shortened: `calculation no. 4, sha256 4f1c…9ab2`. */
  inputs: string
}

const CAUTION =
  'Estimate prepared for the interconnection application, not for construction. A licensed engineer has to review it; the utility’s requirements and local code come first. Hourly data understate clipping: see section 4.'

/**
 * The content of Exhibit C from a frozen calculation and the terms; `previous` is the issued
 * revision it is compared with.
 */
export function exhibitCContent(
  source: ExhibitSource,
  previous: ExhibitSource | null,
): ExhibitCContent {
  const { no, data } = source
  const elements = marked(elementRows(source), previous && elementRows(previous))
  const result = marked(resultRows(source), previous && resultRows(previous))
  const methods = marked(methodRows(source), previous && methodRows(previous))
  const changed = [...elements, ...result, ...methods].filter((row) => row.changed)
  const on = (data.checked ?? data.prepared).on
  return {
    title: exhibitTitles.C,
    project: data.project.name,
    requestNo: data.requestNo ?? 'no number yet',
    revisionNo: no,
    revision: `${no} · ${formatShortDate(on)}`,
    isDraft: data.checked === null,
    elements,
    result,
    monthly: monthlyOf(source.result),
    methods,
    calculation: calculationWords(source),
    limits: limitsOf(source),
    revisions: revisionRows(source, on),
    marks: previous && marksWords(changed, previous),
    caution: CAUTION,
    prepared: signatureWords(data.prepared),
    checked: data.checked ? signatureWords(data.checked) : 'not yet',
    inputs: `calculation no. ${data.calculation.no}, sha256 ${shortHash(data.calculation.sha256)}`,
  }
}

function marked(rows: ContentRow[], before: ContentRow[] | null): ContentRow[] {
  if (!before) return rows
  const known = new Map(before.map((row) => [row.label, `${row.value}|${row.note}`]))
  return rows.map((row) => ({
    ...row,
    changed: known.get(row.label) !== `${row.value}|${row.note}`,
  }))
}

function marksWords(changed: readonly ContentRow[], previous: ExhibitSource): string {
  const since = `revision ${previous.no}`
  if (changed.length === 0) return `No row differs from ${since}, the last one issued.`
  const labels = [...new Set(changed.map((row) => row.label))].join('; ')
  return `A bar at the left marks what differs from ${since}, the last one issued: ${labels}.`
}

function revisionRows({ no, data }: ExhibitSource, on: string): RevisionRow[] {
  const earlier = data.earlier.map((one) => ({
    no: String(one.no),
    on: formatShortDate(one.on),
    prepared: one.preparedBy,
    checked: one.wasIssued ? (one.checkedBy ?? 'not checked') : 'not issued',
    what: one.what,
  }))
  const own = {
    no: String(no),
    on: formatShortDate(on),
    prepared: data.prepared.name,
    checked: data.checked?.name ?? 'not yet',
    what: data.what,
  }
  return [...earlier, own]
}

function signatureWords({ name, on }: Signature): string {
  return `${name}, ${formatShortDate(on)}`
}

/** The ends of a SHA-256, enough to compare by eye. */
export function shortHash(sha256: string): string {
  return `${sha256.slice(0, 4)}…${sha256.slice(-4)}`
}
