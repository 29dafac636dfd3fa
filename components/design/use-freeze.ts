import { useRef, useState } from 'react'
import { freeze, saveDesign } from '@/lib/client/design'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import type { Calculation, DesignBody, DesignRevision } from '@/lib/schemas/design'

export interface FreezeInput {
  applicationId: string
  projectId: string
  /** The revision the plant started from. */
  base?: DesignRevision
  design: DesignBody
  weatherId: string
  note: string
}

interface Freezing {
  problem?: ProblemError
  /** Saves the design if it differs from its revision, then freezes its figures. */
  press: (input: FreezeInput) => Promise<Calculation | undefined>
}

/** The press that freezes. A repeated press of the same plant is the same calculation. */
export function useFreeze(): Freezing {
  const ids = useRef({ of: '', revision: '', calculation: '' })
  const [problem, setProblem] = useState<ProblemError>()

  async function run(input: FreezeInput): Promise<Calculation> {
    const { applicationId, projectId, base, design, weatherId, note } = input
    const of = JSON.stringify([base?.no, design, weatherId, note])
    if (ids.current.of !== of) ids.current = { of, revision: newId(), calculation: newId() }
    const { revision, calculation } = ids.current
    const designRevisionId = isSaved(input)
      ? base!.id
      : (
          await saveDesign(projectId, {
            id: revision,
            baseNo: base?.no ?? 0,
            body: design,
            weatherId,
            note: note.trim() || undefined,
          })
        ).id
    return freeze(applicationId, { id: calculation, designRevisionId })
  }

  return {
    problem,
    async press(input) {
      setProblem(undefined)
      try {
        return await run(input)
      } catch (error) {
        if (!(error instanceof ProblemError)) throw error
        setProblem(error)
        return undefined
      }
    },
  }
}

/** Whether plant and weather are those of the revision they started from. */
export function isSaved({ base, design, weatherId }: Omit<FreezeInput, 'note'>): boolean {
  return base !== undefined && base.weatherId === weatherId && sameDesign(base.body, design)
}

/** The same values, whatever the order of their keys. */
export function sameDesign(a: unknown, b: unknown): boolean {
  if (a === b) return true
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false
  const [left, right] = [a as Record<string, unknown>, b as Record<string, unknown>]
  const keys = new Set([...Object.keys(left), ...Object.keys(right)])
  return [...keys].every((key) => sameDesign(left[key], right[key]))
}
