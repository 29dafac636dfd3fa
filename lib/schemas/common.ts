import { z } from 'zod'
import { isCivilDate } from '@/lib/domain/clocks/civil-date'

export const uuid = z.uuid({ error: (issue) => `Found ${show(issue.input)}; a UUID is needed.` })

/** `YYYY-MM-DD`, a real date. */
export const civilDateSchema = z
  .string({ error: (issue) => `Found ${show(issue.input)}; a date YYYY-MM-DD is needed.` })
  .refine(isCivilDate, {
    error: (issue) => `Found ${show(issue.input)}; a real date YYYY-MM-DD is needed.`,
  })

/** ISO 8601 with offset. */
export const instantSchema = z.iso.datetime({
  offset: true,
  error: (issue) =>
    `Found ${show(issue.input)}; an instant such as 2026-11-30T16:52:00-05:00 is needed.`,
})

export const shortText = (label: string, max = 200) =>
  z
    .string({ error: `${label} is missing.` })
    .trim()
    .min(1, `${label} is missing.`)
    .max(max, `${label} may have at most ${max} characters.`)

/** A found value as it may be shown in a message. */
export function show(value: unknown): string {
  if (value === undefined || value === '') return 'nothing'
  const text = typeof value === 'string' ? `"${value}"` : JSON.stringify(value)
  return text.length > 60 ? `${text.slice(0, 57)}…` : text
}
