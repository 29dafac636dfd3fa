import type { CivilDate } from '@/lib/domain/clocks/civil-date'
import type { RungSays } from '@/lib/domain/notices'
import { sayClosing, sayDue } from '@/lib/domain/obligations'
import { formatDate } from '@/lib/domain/format-date'
import { letter, type Letter, type LetterPart } from '@/templates/notices/_parts'

/** What a notice about a clock says. */
export interface ClockNotice {
  says: RungSays
  personName: string
  projectName: string
  requestNo: string | null
  title: string
  /** Short name of the organization that runs the procedure. */
  organizationName: string | null
  isOurs: boolean
  dueOn: CivilDate
  /** ISO instant; null where no hour is known. */
  dueAt: string | null
  zone: string
  today: CivilDate
  /** Business days after today, to the due date; 0 on it, negative once it is past. */
  businessDaysLeft: number
  /** Counted from a booked, forecast or presumed date. */
  provisional: boolean
  consequence: string
  firstAction: string | null
  /** Where the rule stands: document and section. */
  source: string
  applicationUrl: string
  acknowledgeUrl: string
}

/** The e-mail about a clock. */
export function clockNotice(notice: ClockNotice): Letter {
  const parts: LetterPart[] = [
    { kind: 'paragraph', text: opening(notice) },
    { kind: 'block', cells: cellsOf(notice) },
    {
      kind: 'paragraph',
      text: `${notice.isOurs ? 'If it is missed' : 'Meanwhile'}: ${notice.consequence}`,
    },
  ]
  if (notice.firstAction) parts.push({ kind: 'paragraph', text: `First: ${notice.firstAction}` })
  if (notice.provisional)
    parts.push({
      kind: 'note',
      text: 'The date is provisional: it is counted from a booked, forecast or presumed date.',
    })
  parts.push(
    { kind: 'link', label: 'Open the application', href: notice.applicationUrl },
    {
      kind: 'link',
      label: 'Acknowledge and set a next date',
      href: notice.acknowledgeUrl,
      look: 'plain',
    },
    {
      kind: 'note',
      text: `After an acknowledgment no notice about this clock goes out before its next date. The link is yours alone, please do not forward it. Rule: ${notice.source}. Check the date against the utility's own letter and procedure.`,
    },
  )
  return letter(subjectOf(notice), parts)
}

/** The subject line: how near, what, for which project. */
export function subjectOf(notice: ClockNotice): string {
  return `${nearness(notice)}: ${notice.title}, ${notice.projectName}`
}

function nearness(notice: ClockNotice): string {
  const { says, today, dueOn, businessDaysLeft: left } = notice
  if (!notice.isOurs) return today > dueOn ? 'Theirs is late' : 'Theirs is due'
  if (says === 'missed' || today > dueOn) return 'Missed'
  if (says === 'start') return `Start today, due ${formatDate(dueOn)}`
  if (today === dueOn) return `Due today, ${sayClosing(notice)}`
  return left === 0 ? `Due ${formatDate(dueOn)}` : `Due in ${countWords(left)}`
}

function countWords(businessDays: number): string {
  return `${businessDays} business day${businessDays === 1 ? '' : 's'}`
}

function opening(notice: ClockNotice): string {
  const { personName, organizationName, says } = notice
  const utility = organizationName ?? 'the utility'
  const sentences: Record<RungSays, string> = {
    start: `${personName}, this takes time to prepare: today is the day to start.`,
    ahead: `${personName}, a clock of yours is running.`,
    today: `${personName}, a clock of yours ends today.`,
    closing: `${personName}, a clock of yours closes within hours, and nothing is recorded yet.`,
    missed: `${personName}, a clock has run out and nothing is recorded. If it was done in time, record it with its date and hour.`,
    theirs_late: `${personName}, ${utility} owes this and it is late. Chase it, and log the call or e-mail.`,
    until_over: `${personName}, this clock was acknowledged until today, and it is still open.`,
  }
  return sentences[says]
}

function cellsOf(notice: ClockNotice): { caption: string; value: string }[] {
  const { title, projectName, requestNo, organizationName } = notice
  const request = requestNo ? `${projectName}, request ${requestNo}` : projectName
  return [
    { caption: notice.isOurs ? 'We owe' : 'They owe', value: title },
    { caption: 'Project', value: request },
    ...(organizationName ? [{ caption: 'Utility', value: organizationName }] : []),
    { caption: 'Due', value: sayDue(notice) },
    { caption: 'Left', value: leftWords(notice) },
  ]
}

function leftWords({ businessDaysLeft: left, says, today, dueOn }: ClockNotice): string {
  if (today > dueOn) return left === 0 ? 'past due' : `${countWords(-left)} past due`
  if (says === 'missed') return 'none: the hour has passed'
  if (today === dueOn) return 'today is the last day'
  return left === 0 ? 'no business day' : countWords(left)
}
