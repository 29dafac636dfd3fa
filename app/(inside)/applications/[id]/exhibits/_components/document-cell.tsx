'use client'

import { useQueryClient } from '@tanstack/react-query'
import { shortHash } from '@/app/(inside)/applications/[id]/exhibits/_components/reader'
import { Button } from '@/components/ui/button'
import { formatBytes } from '@/components/ui/file-drop'
import { useToast } from '@/components/ui/toast'
import { exhibitKeys, makeExhibitAgain } from '@/lib/client/exhibits'
import { ProblemError } from '@/lib/client/fetcher'
import { api } from '@/lib/routes'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'

/** Longer than this is not usual, ms. */
const usualMs = 120_000

interface DocumentCellProps {
  row: ExhibitRevision
  askedAt: number
  mayMake: boolean
}

/** The document to take away with its hash, or how far its making is. */
export function DocumentCell({ row, askedAt, mayMake }: DocumentCellProps) {
  const { document, render, state } = row
  if (document)
    return (
      <>
        <a className="underline" href={api.exhibitDocument(row.id)} download>
          Download DOCX
        </a>
        <p className="cap mt-0.5">
          {formatBytes(document.size)},{' '}
          <span className="mono" title={`SHA-256 ${document.sha256}`}>
            sha256 {shortHash(document.sha256)}
          </span>
          {state === 'issued' && ', frozen'}
        </p>
      </>
    )
  if (state === 'superseded') return <span className="text-ink-2">none was made</span>
  if (render === 'failed')
    return (
      <div role="status">
        <p className="text-late font-medium">The document could not be made.</p>
        <p className="text-sm break-words">{row.renderError}</p>
        {mayMake && <MakeAgain row={row} />}
      </div>
    )
  const isLate = askedAt - Date.parse(row.renderSince) > usualMs
  return (
    <div role="status">
      <p>Making the document…</p>
      {isLate && <p className="cap mt-0.5">It takes longer than usual.</p>}
      {isLate && mayMake && <MakeAgain row={row} />}
    </div>
  )
}

function MakeAgain({ row }: { row: ExhibitRevision }) {
  const client = useQueryClient()
  const toast = useToast()
  async function make() {
    try {
      await makeExhibitAgain(row.id)
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      toast({ tone: 'missed', title: error.title, detail: error.message })
    }
    await client.invalidateQueries({ queryKey: exhibitKeys.ofApplication(row.applicationId) })
  }
  return (
    <Button look="quiet" busyLabel="Asking" onClick={make}>
      Make it again
    </Button>
  )
}
