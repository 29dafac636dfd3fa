import type { DesignFieldSpec } from '@/components/design/design-fields'
import { designBodySchema, type DesignBody } from '@/lib/schemas/design'

/** A design being typed: its values, and what stands in the fields where that is not their plain form. */
export interface DesignDraft {
  /** Numbers that cannot be read are NaN until they can. */
  body: DesignBody
  texts: Readonly<Record<string, string>>
}

export const draftOf = (body: DesignBody): DesignDraft => ({ body, texts: {} })

type Tree = Record<string, unknown>

/** The value at a path of dots, list positions included. */
export function valueAt(body: DesignBody, path: string): unknown {
  return path.split('.').reduce<unknown>((held, key) => (held as Tree | undefined)?.[key], body)
}

/** The design with another value at a path; what is not on the way is shared. */
export function withValue(body: DesignBody, path: string, value: unknown): DesignBody {
  return setIn(body, path.split('.'), value) as DesignBody
}

function setIn(held: unknown, [key, ...rest]: string[], value: unknown): unknown {
  if (key === undefined) return value
  if (Array.isArray(held))
    return held.map((one: unknown, index) =>
      String(index) === key ? setIn(one, rest, value) : one,
    )
  return { ...(held as Tree), [key]: setIn((held as Tree)[key], rest, value) }
}

/** A number as it is typed: thousands commas and the true minus sign are read; NaN for no number. */
export function numberOf(text: string): number {
  const plain = text.trim().replaceAll(',', '').replaceAll('−', '-')
  return plain === '' ? NaN : Number(plain)
}

/** What a field shows: as typed, or its value in the field's unit. */
export function textOf(draft: DesignDraft, field: DesignFieldSpec): string {
  const typed = draft.texts[field.path]
  if (typed !== undefined) return typed
  const value = valueAt(draft.body, field.path)
  if (typeof value !== 'number') return typeof value === 'string' ? value : ''
  return plainNumber(Number((value * (field.times ?? 1)).toPrecision(12)), field.digits ?? 0)
}

function plainNumber(value: number, digits: number): string {
  const text = Math.abs(value).toLocaleString('en-US', {
    minimumFractionDigits: digits,
    maximumFractionDigits: 10,
  })
  return value < 0 ? `−${text}` : text
}

/** The draft after a field was typed in. */
export function typed(draft: DesignDraft, field: DesignFieldSpec, text: string): DesignDraft {
  const value = field.isText ? text : numberOf(text) / (field.times ?? 1)
  return {
    body: withValue(draft.body, field.path, value),
    texts: { ...draft.texts, [field.path]: text },
  }
}

/** The draft with another choice or list, shown in its plain form. */
export function chosen(draft: DesignDraft, path: string, value: unknown): DesignDraft {
  const texts = Object.fromEntries(
    Object.entries(draft.texts).filter(([key]) => !key.startsWith(path)),
  )
  return { body: withValue(draft.body, path, value), texts }
}

export interface ReadDraft {
  /** Null while a field cannot be read or is out of its range. */
  design: DesignBody | null
  /** Found and allowed, by path. */
  errors: Readonly<Record<string, string>>
}

/** A draft checked with the schema that the server checks it with. */
export function readDraft({ body }: DesignDraft): ReadDraft {
  const parsed = designBodySchema.safeParse(body)
  if (parsed.success) return { design: parsed.data, errors: {} }
  const errors: Record<string, string> = {}
  for (const issue of parsed.error.issues) {
    const path = issue.path.join('.')
    errors[path] ??= sentence(
      Number.isNaN(valueAt(body, path)) ? noNumber(issue.message) : issue.message,
    )
  }
  return { design: null, errors }
}

const noNumber = (message: string) => message.replace(/^found \S+,/, 'found no number,')
const sentence = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}.`
