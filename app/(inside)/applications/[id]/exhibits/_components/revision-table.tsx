'use client'

import Link from 'next/link'
import { DocumentCell } from '@/app/(inside)/applications/[id]/exhibits/_components/document-cell'
import { dayWords, type Reader } from '@/app/(inside)/applications/[id]/exhibits/_components/reader'
import { RevisionActs } from '@/app/(inside)/applications/[id]/exhibits/_components/revision-acts'
import { type Column, DataTable } from '@/components/ui/data-table'
import { StateWord, type Tone } from '@/components/ui/state-word'
import { routes } from '@/lib/routes'
import type { ExhibitRevision } from '@/lib/schemas/exhibit'

interface RevisionTableProps {
  items: readonly ExhibitRevision[]
  reader: Reader
  /** When the page last asked, ms. */
  askedAt: number
}

/** The revisions of an exhibit, the latest first: who signed what, when, and the document. */
export function RevisionTable({ items, reader, askedAt }: RevisionTableProps) {
  return (
    <DataTable
      caption="Revisions of exhibit C"
      rows={items}
      rowKey={(row) => row.id}
      columns={columnsFor(reader, askedAt)}
    />
  )
}

function columnsFor(reader: Reader, askedAt: number): Column<ExhibitRevision>[] {
  return [
    {
      key: 'revision',
      header: 'Revision',
      phone: 'lead',
      className: 'sm:w-24',
      cell: (row) => <span className="font-semibold">Revision {row.revision}</span>,
    },
    {
      key: 'state',
      header: 'State',
      phone: 'bare',
      className: 'sm:w-52',
      cell: (row) => <StateWord tone={toneOf(row)}>{row.stateWords}</StateWord>,
    },
    { key: 'what', header: 'What is new', phone: 'bare', cell: (row) => <What row={row} /> },
    {
      key: 'signed',
      header: 'Prepared, checked, issued',
      phone: 'bare',
      className: 'sm:w-60',
      cell: (row) => <Signed row={row} reader={reader} />,
    },
    {
      key: 'document',
      header: 'Document',
      phone: 'bare',
      className: 'sm:w-44',
      cell: (row) => <DocumentCell row={row} askedAt={askedAt} mayMake={reader.mayPrepare} />,
    },
    {
      key: 'acts',
      header: <span className="sr-only">Acts</span>,
      phone: 'bare',
      align: 'end',
      className: 'sm:w-36',
      cell: (row) => <RevisionActs row={row} reader={reader} />,
    },
  ]
}

function toneOf({ state, outOfStep }: ExhibitRevision): Tone {
  if (state === 'superseded') return 'far'
  if (outOfStep) return 'soon'
  return state === 'issued' ? 'done' : 'plain'
}

function What({ row }: { row: ExhibitRevision }) {
  const { what, calculation, weatherReason, applicationId } = row
  return (
    <>
      <p>{what}</p>
      <p className="cap mt-0.5">
        <Link className="underline" href={routes.calculation(applicationId, calculation.no)}>
          calculation no. {calculation.no}
        </Link>
        , design revision {calculation.designNo}
        {weatherReason && `; synthetic year: ${weatherReason}`}
      </p>
    </>
  )
}

function Signed({ row, reader }: { row: ExhibitRevision; reader: Reader }) {
  const { preparedBy, preparedAt, checkedBy, checkedAt, checkNotes, issuedBy, issuedAt } = row
  return (
    <ul className="grid gap-0.5 text-sm">
      <li>
        <span className="cap">prepared </span>
        {preparedBy.name}, {dayWords(preparedAt, reader)}
      </li>
      {checkedBy && checkedAt && (
        <li>
          <span className="cap">checked </span>
          {checkedBy.name}, {dayWords(checkedAt, reader)}
          {checkNotes && <span className="text-ink-2 block">“{checkNotes}”</span>}
        </li>
      )}
      {issuedBy && issuedAt && (
        <li>
          <span className="cap">issued </span>
          {issuedBy.name}, {dayWords(issuedAt, reader)}
        </li>
      )}
    </ul>
  )
}
