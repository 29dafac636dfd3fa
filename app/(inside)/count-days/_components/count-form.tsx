import { Button } from '@/components/ui/button'
import { CheckboxField } from '@/components/ui/choice-fields'
import { DateField, NumberField, SelectField } from '@/components/ui/text-fields'
import type { CountQuestion } from '@/lib/client/count-query'
import { routes } from '@/lib/routes'

interface Props {
  asked: CountQuestion
  calendars: { key: string; name: string }[]
  errors: Record<string, string>
}

const units = [
  { value: 'business_day', label: 'business days' },
  { value: 'calendar_day', label: 'calendar days' },
  { value: 'month', label: 'months' },
  { value: 'year', label: 'years' },
]
const directions = [
  { value: 'after', label: 'after the day' },
  { value: 'before', label: 'at least so long before the day' },
]
const rolls = [
  { value: 'none', label: 'stays' },
  { value: 'next_business_day', label: 'rolls to the next business day' },
  { value: 'previous_business_day', label: 'rolls to the business day before' },
]
const receipts = [
  { value: 'as_is', label: 'counts from that day' },
  { value: 'next_business_day', label: 'is received the next business day' },
]

/** A form that needs no script: the answer is the page at the address it makes. */
export function CountForm({ asked, calendars, errors }: Props) {
  return (
    <form method="get" action={routes.countDays()} noValidate>
      <DateField name="start" label="From" defaultValue={asked.start} error={errors.start} />
      <NumberField name="length" label="Length" defaultValue={asked.length} error={errors.length} />
      <SelectField
        name="unit"
        label="Counted in"
        defaultValue={asked.unit}
        error={errors.unit}
        options={units}
      />
      <SelectField
        name="direction"
        label="Direction"
        defaultValue={asked.direction ?? 'after'}
        options={directions}
      />
      <SelectField
        name="calendar"
        label="By the calendar of"
        defaultValue={asked.calendar ?? 'federal'}
        error={errors.calendar}
        options={calendars.map(({ key, name }) => ({ value: key, label: name }))}
      />
      <SelectField
        name="roll"
        label="An end on a closed day"
        defaultValue={asked.roll ?? 'none'}
        options={rolls}
      />
      <SelectField
        name="receipt"
        label="A receipt on a closed day"
        defaultValue={asked.receipt ?? 'as_is'}
        options={receipts}
      />
      <CheckboxField
        name="includeStart"
        label="The day itself is day 1"
        value="1"
        defaultChecked={asked.includeStart}
      />
      <div className="mt-3">
        <Button type="submit" look="primary">
          Count
        </Button>
      </div>
    </form>
  )
}
