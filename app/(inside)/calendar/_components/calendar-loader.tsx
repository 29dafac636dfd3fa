'use client'

import dynamic from 'next/dynamic'
import type { CalendarViewProps } from '@/app/(inside)/calendar/_components/calendar-view'
import { formatMonth } from '@/lib/domain/format-date'

// The calendar library is heavy and measures the page: it comes after the first paint.
const CalendarView = dynamic(
  () =>
    import('@/app/(inside)/calendar/_components/calendar-view').then(
      (module) => module.CalendarView,
    ),
  { ssr: false, loading: () => <p className="text-ink-2 mt-6">Drawing the calendar …</p> },
)

export function CalendarLoader(props: CalendarViewProps) {
  return (
    <>
      <h1>{formatMonth(props.on)}</h1>
      <CalendarView {...props} />
    </>
  )
}
