import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { DigestGroup } from '@/lib/domain/digest'
import { formatDate } from '@/lib/domain/format-date'
import { letter, type Letter, type LetterPart } from '@/templates/notices/_parts'

export interface DigestLine {
  group: DigestGroup
  /** How near or late, in words: "2 BD". */
  left: string
  title: string
  projectName: string
  /** Date and hour in words. */
  due: string
}

export interface Digest {
  personName: string
  today: CivilDate
  lines: readonly DigestLine[]
  /** Clocks left out because they are acknowledged until a later day. */
  silentCount: number
  dueUrl: string
}

const headings: Record<DigestGroup, string> = {
  missed: 'Missed: record what was done, or cure it first.',
  near: 'Ours, within ten business days:',
  theirs_late: 'Theirs and late: chase them.',
}
const order: readonly DigestGroup[] = ['missed', 'near', 'theirs_late']

/** The e-mail of the morning: what a person holds, the most urgent first. */
export function digestLetter({ personName, today, lines, silentCount, dueUrl }: Digest): Letter {
  const groups = order
    .map((group) => ({ group, of: lines.filter((line) => line.group === group) }))
    .filter(({ of }) => of.length > 0)
  const parts: LetterPart[] = [
    { kind: 'paragraph', text: `${personName}, this is what you hold today.` },
    ...groups.flatMap(({ group, of }): LetterPart[] => [
      { kind: 'paragraph', text: headings[group] },
      { kind: 'block', cells: of.map(cellOf) },
    ]),
    { kind: 'link', label: 'Open Due', href: dueUrl },
  ]
  if (silentCount > 0) parts.push({ kind: 'note', text: silentWords(silentCount) })
  return letter(`Your clocks, ${formatDate(today)}: ${counted(groups)}`, parts)
}

function cellOf({ left, title, projectName, due }: DigestLine) {
  return { caption: left, value: `${title}, ${projectName}: ${due}` }
}

function silentWords(count: number): string {
  const clocks = count === 1 ? '1 more clock is' : `${count} more clocks are`
  return `${clocks} acknowledged until a later day and not listed.`
}

function counted(groups: readonly { group: DigestGroup; of: readonly DigestLine[] }[]): string {
  const words: Record<DigestGroup, string> = {
    missed: 'missed',
    near: 'near',
    theirs_late: 'of theirs late',
  }
  return groups.map(({ group, of }) => `${of.length} ${words[group]}`).join(', ')
}
