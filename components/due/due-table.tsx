import { clsx } from 'clsx'
import Link from 'next/link'
import type { ReactNode } from 'react'
import { clockKey, leftTone } from '@/components/applications/clock-words'
import { DueActs } from '@/components/due/due-acts'
import {
  dueLeft,
  dueLine,
  type DueScope,
  dueTitle,
  groupedRows,
  inHandWords,
  underDate,
} from '@/components/due/due-text'
import { LeftFigure } from '@/components/ui/left-figure'
import { RowOpener } from '@/components/ui/row-opener'
import { StateWord } from '@/components/ui/state-word'
import { formatDate } from '@/lib/domain/format-date'
import { routes } from '@/lib/routes'
import type { Due, DueRow } from '@/lib/schemas/application'

export interface MayAct {
  acknowledge: boolean
  assign: boolean
}

interface DueTableProps {
  due: Due
  scope: DueScope
  may: MayAct
}

const headers = ['Date', 'What', 'Project', 'Left', 'Held by'] as const

/** What is owed under its weeks: a ruled table, on a phone one block a row. */
export function DueTable({ due, scope, may }: DueTableProps) {
  const hasActs = may.acknowledge || may.assign
  return (
    <table
      role="table"
      className="w-full border-separate border-spacing-0 max-sm:block lg:table-fixed"
    >
      <caption className="sr-only">Owed, nearest first</caption>
      <Columns hasActs={hasActs} />
      <thead role="rowgroup" className="max-sm:sr-only">
        <tr role="row">
          {headers.map((header) => (
            <HeaderCell key={header}>{header}</HeaderCell>
          ))}
          {hasActs && (
            <HeaderCell>
              <span className="sr-only">Act</span>
            </HeaderCell>
          )}
        </tr>
      </thead>
      {groupedRows(due.rows, scope).map((group, index) => (
        <RowOpener key={group.key}>
          <tr role="row" className="max-sm:block">
            <th
              role="rowheader"
              scope="rowgroup"
              colSpan={hasActs ? 6 : 5}
              className={clsx(
                'border-rule border-b pb-2 text-left max-sm:block',
                index === 0 ? 'pt-4 max-sm:pt-0' : 'pt-7',
              )}
            >
              <h2 className="text-[1rem]">{group.heading}</h2>
            </th>
          </tr>
          {group.rows.map((row) => (
            <Row key={rowKeyOf(row)} row={row} todayOn={due.todayOn} may={may} />
          ))}
        </RowOpener>
      ))}
    </table>
  )
}

function HeaderCell({ children }: { children: ReactNode }) {
  return (
    <th
      role="columnheader"
      scope="col"
      className="border-ink bg-film text-th text-ink-2 sticky top-0 z-[1] border-b-[1.5px] py-2 pr-5 text-left font-medium font-stretch-[86%]"
    >
      {children}
    </th>
  )
}

function Columns({ hasActs }: { hasActs: boolean }) {
  return (
    <colgroup className="max-lg:hidden">
      <col className="w-32" />
      <col />
      <col className="w-[23%]" />
      <col className="w-32" />
      <col className="w-40" />
      {hasActs && <col className="w-52" />}
    </colgroup>
  )
}

function rowKeyOf(row: DueRow): string {
  return `${row.applicationId}/${clockKey(row)}/${row.rowKind}`
}

const cell = 'border-rule border-b py-3 align-top max-sm:border-0 max-sm:p-0 sm:not-last:pr-5'

function Row({ row, todayOn, may }: { row: DueRow; todayOn: string; may: MayAct }) {
  const inHand = inHandWords(row, todayOn)
  const tone = leftTone(row)
  return (
    <tr
      role="row"
      className={clsx(
        'border-rule hover:bg-sheet cursor-pointer',
        'max-sm:grid max-sm:grid-cols-[5.25rem_minmax(0,1fr)_auto] max-sm:gap-x-2 max-sm:border-b max-sm:py-3.5',
        inHand && 'text-ink-2',
      )}
    >
      <td role="cell" className={cell}>
        <span className="mono block whitespace-nowrap">{formatDate(row.on, row.on)}</span>
        <span className="cap block">{underDate(row, todayOn)}</span>
      </td>
      <td role="cell" className={cell}>
        <What row={row} todayOn={todayOn} inHand={inHand} />
      </td>
      <td role="cell" className={clsx(cell, 'max-sm:hidden')}>
        <span className="block font-medium">{row.project}</span>
        <span className="cap block">{requestWords(row)}</span>
      </td>
      <td role="cell" className={clsx(cell, 'max-sm:text-right')}>
        {inHand || !tone ? (
          <span className="text-ink-2 pt-1.5 whitespace-nowrap">{dueLeft(row)}</span>
        ) : (
          <LeftFigure tone={tone}>{dueLeft(row)}</LeftFigure>
        )}
      </td>
      <td role="cell" className={clsx(cell, 'max-sm:col-start-2 max-sm:self-center')}>
        <span className="text-sm">{row.owner?.name ?? roleWords(row)}</span>
      </td>
      {(may.acknowledge || may.assign) && (
        <td role="cell" className={clsx(cell, 'text-right')} data-screen-only>
          <DueActs clock={clockOf(row)} may={may} todayOn={todayOn} />
        </td>
      )}
    </tr>
  )
}

function What({ row, todayOn, inHand }: { row: DueRow; todayOn: string; inHand: string | null }) {
  const line = dueLine(row, todayOn)
  return (
    <>
      <Link
        data-row-link
        href={routes.clock(row.applicationId, row.step, row.instance)}
        className="text-lg font-semibold no-underline hover:underline"
      >
        {dueTitle(row)}
      </Link>
      <span className="text-ink-2 block text-sm sm:hidden">
        {row.project} · {requestWords(row)}
      </span>
      {line && !inHand && (
        <span className="block text-sm">
          <StateWord tone={line.tone}>{line.text}</StateWord>
        </span>
      )}
      {inHand && <span className="block text-sm">{inHand}</span>}
    </>
  )
}

function requestWords(row: DueRow): string {
  return row.requestNo ?? row.operator
}

function roleWords({ ownerRole, party }: DueRow): string {
  if (party !== 'applicant' && party !== 'both') return ownerRole ? `${ownerRole} follows up` : ''
  return ownerRole ? `any ${ownerRole}` : 'nobody yet'
}

/** What the acts need to name and send. */
function clockOf(row: DueRow) {
  const { applicationId, step, instance, obligation, project, zone, dueOn, statedDueOn } = row
  return {
    key: { applicationId, step, instance, obligation },
    title: dueTitle(row),
    project,
    zone,
    dueOn: !dueOn || (statedDueOn && statedDueOn < dueOn) ? statedDueOn : dueOn,
    isRunning: row.status === 'open',
    ownerId: row.owner?.id ?? '',
  }
}

export type ActedClock = ReturnType<typeof clockOf>
