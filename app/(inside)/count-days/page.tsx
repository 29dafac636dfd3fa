import type { Metadata } from 'next'
import { CopyAccount } from '@/app/(inside)/count-days/_components/copy-account'
import { CountForm } from '@/app/(inside)/count-days/_components/count-form'
import { CountedDays } from '@/app/(inside)/count-days/_components/counted-days'
import { pageContext } from '@/lib/auth/page-person'
import { countQuery } from '@/lib/client/count-query'
import { localOf } from '@/lib/domain/clocks/zoned'
import { formatDate } from '@/lib/domain/format-date'
import { countInput } from '@/lib/schemas/count'
import { countClock, listCalendarChoices } from '@/lib/services/counting'

export const metadata: Metadata = { title: 'Day counter' }

interface Props {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

/** Any count of days by any calendar; the question stands in the address and can be shared. */
export default async function CountDaysPage({ searchParams }: Props) {
  const ctx = await pageContext()
  const query = await searchParams
  const todayOn = localOf(ctx.now.toISOString(), ctx.actor.zone).on
  const asked = countQuery(query)
  const parsed = asked ? countInput.safeParse(asked) : null
  const calendars = await listCalendarChoices(ctx)
  const answer = parsed?.success ? await countClock(ctx, parsed.data) : null
  const errors = parsed?.success === false ? parsed.error.issues : []
  const byField = Object.fromEntries(errors.map((issue) => [issue.path.join('.'), issue.message]))
  return (
    <>
      <h1>Day counter</h1>
      <p className="text-ink-2 mt-1 max-w-2xl">
        Counts by an organization’s calendar and shows each day that did not count. The address of
        this page keeps the question: send it to whoever asks.
      </p>
      <div className="mt-5 grid gap-8 lg:grid-cols-[minmax(0,26rem)_1fr]">
        <CountForm
          asked={asked ?? { start: todayOn, length: 10, unit: 'business_day' }}
          calendars={calendars}
          errors={byField}
        />
        {answer ? (
          <section aria-label="Result">
            <p className="cap">Due</p>
            <p className="text-title font-semibold">{formatDate(answer.dueOn)}</p>
            <p className="mt-3 max-w-prose">{answer.account}</p>
            <CopyAccount text={answer.account} />
            <CountedDays days={answer.derivation} />
          </section>
        ) : (
          <p className="text-ink-2">
            {errors.length > 0
              ? 'Some fields need another look; nothing was counted.'
              : 'Fill the form and press “Count” to see the date and how it came about.'}
          </p>
        )}
      </div>
    </>
  )
}
