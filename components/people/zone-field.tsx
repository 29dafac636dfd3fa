import { SelectField } from '@/components/ui/text-fields'

/** The zones of the United States as people say them, from the IANA time zone database. */
const zones: readonly (readonly [string, string])[] = [
  ['America/New_York', 'Eastern, New York'],
  ['America/Indiana/Indianapolis', 'Eastern, Indianapolis'],
  ['America/Chicago', 'Central, Chicago'],
  ['America/Denver', 'Mountain, Denver'],
  ['America/Phoenix', 'Mountain without daylight time, Phoenix'],
  ['America/Los_Angeles', 'Pacific, Los Angeles'],
  ['America/Anchorage', 'Alaska, Anchorage'],
  ['Pacific/Honolulu', 'Hawaii, Honolulu'],
  ['America/Puerto_Rico', 'Atlantic, Puerto Rico'],
  ['UTC', 'UTC'],
]

interface ZoneFieldProps {
  defaultValue: string
  error?: string
  stacked?: boolean
}

/** The zone that a person reads instants in; another zone than these stays if it is set already. */
export function ZoneField({ defaultValue, error, stacked }: ZoneFieldProps) {
  const isListed = zones.some(([zone]) => zone === defaultValue)
  const listed = isListed ? zones : [[defaultValue, defaultValue] as const, ...zones]
  return (
    <SelectField
      label="Time zone"
      name="zone"
      stacked={stacked}
      options={listed.map(([value, label]) => ({ value, label }))}
      defaultValue={defaultValue}
      hint="Hours are shown in it. A clock is counted in the utility’s zone."
      error={error}
    />
  )
}

/** A zone as people say it. */
export function zoneName(zone: string): string {
  return zones.find(([key]) => key === zone)?.[1] ?? zone
}
