'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { useFreeze } from '@/components/design/use-freeze'
import { Button } from '@/components/ui/button'
import { TextField } from '@/components/ui/text-fields'
import { useToast } from '@/components/ui/toast'
import { routes } from '@/lib/routes'
import type { DesignBody, DesignRevision } from '@/lib/schemas/design'

interface FreezeBarProps {
  input: {
    applicationId: string
    projectId: string
    base?: DesignRevision
    weatherId?: string
    /** Null while a field has to be mended. */
    design: DesignBody | null
  }
  nextNo: number
  isSaved: boolean
  mayFreeze: boolean
  faults: number
  canReset: boolean
  onReset: () => void
  /** Somebody else saved a later design. */
  onStale: () => void
}

/** The press that freezes the figures, and the one that takes the plant back. */
export function FreezeBar(props: FreezeBarProps) {
  const { input, nextNo, isSaved, mayFreeze, faults, canReset, onReset, onStale } = props
  const { design, weatherId } = input
  const [note, setNote] = useState('')
  const { press, problem } = useFreeze()
  const router = useRouter()
  const toast = useToast()
  const ready = design !== null && weatherId !== undefined

  async function freeze() {
    if (!ready) return
    const calculation = await press({ ...input, design, weatherId, note })
    if (!calculation) return
    toast({
      title: `Frozen: calculation no. ${calculation.no}`,
      detail: `On design revision ${calculation.designNo}, ${calculation.weatherName}`,
    })
    router.push(routes.calculation(input.applicationId, calculation.no))
    router.refresh()
  }

  return (
    <div className="mt-4" data-screen-only>
      {mayFreeze && !isSaved && (
        <TextField
          stacked
          optional
          name="note"
          label={`What changed since ${input.base ? `revision ${input.base.no}` : 'nothing'}`}
          value={note}
          maxLength={500}
          onChange={({ target }) => setNote(target.value)}
        />
      )}
      {problem && (
        <div role="alert" className="mt-3">
          <p className="text-late font-semibold">{problem.message}</p>
          {problem.status === 409 && (
            <Button look="quiet" className="mt-1" onClick={onStale}>
              Show what was saved
            </Button>
          )}
        </div>
      )}
      <div className="mt-3 flex flex-wrap items-center gap-2.5">
        {mayFreeze && (
          <Button look="primary" disabled={!ready} busyLabel="Freezing" onClick={freeze}>
            Freeze as no. {nextNo}
          </Button>
        )}
        <Button disabled={!canReset} onClick={onReset}>
          Reset
        </Button>
      </div>
      <p className="text-ink-2 mt-2 text-sm">
        {faults > 0
          ? `The figures are those of the last plant without a fault; ${faults === 1 ? 'one field is' : `${faults} fields are`} to be mended.`
          : mayFreeze
            ? isSaved
              ? 'The design is saved; freezing keeps its figures for good.'
              : 'Freezing saves the plant as the next design revision and keeps its figures for good.'
            : 'Move any field; nothing is saved. An engineer saves the design and freezes its figures.'}
      </p>
    </div>
  )
}
