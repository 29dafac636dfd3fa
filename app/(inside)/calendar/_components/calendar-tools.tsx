'use client'

import { useState } from 'react'
import { AddressDialog } from '@/app/(inside)/calendar/_components/address-dialog'
import { Button } from '@/components/ui/button'
import { LinkButton } from '@/components/ui/link-button'
import { Menu, MenuLink } from '@/components/ui/menu'
import { addMonths, civilDate, partsOf, type CivilDate } from '@/lib/domain/clocks/civil-date'
import { routes } from '@/lib/routes'
import type { CalendarFilter } from '@/lib/schemas/calendar-event'

interface Props {
  on: CivilDate
  todayOn: CivilDate
  shown: 'month' | 'agenda'
  filter: CalendarFilter
  organizations: { id: string; name: string }[]
}

const sideWords = { ours: 'Owed by us', theirs: 'Owed by utilities' }

/** Which days, which view, whose clocks: every choice is an address that can be kept. */
export function CalendarTools({ on, todayOn, shown, filter, organizations }: Props) {
  const [asks, setAsks] = useState(false)
  const { year, month } = partsOf(on)
  const first = civilDate(year, month, 1)
  const kept = { organizations: filter.organizations, side: filter.side }
  const at = (change: Record<string, string | undefined>) =>
    routes.calendar({ on, view: shown, ...kept, ...change })
  const chosen = organizations.find((one) => one.id === filter.organizations)
  return (
    <div data-screen-only className="mt-4 mb-4 flex flex-wrap items-center gap-2.5">
      <LinkButton href={at({ on: addMonths(first, -1) })}>Earlier</LinkButton>
      <LinkButton href={at({ on: todayOn })}>Today</LinkButton>
      <LinkButton href={at({ on: addMonths(first, 1) })}>Later</LinkButton>
      <span className="hidden grow sm:block" />
      <LinkButton href={at({ view: shown === 'month' ? 'agenda' : 'month' })}>
        {shown === 'month' ? 'Show as agenda' : 'Show as month'}
      </LinkButton>
      <Menu trigger={<Button look="plain">{chosen?.name ?? 'All organizations'}</Button>}>
        <MenuLink href={at({ organizations: undefined })}>All organizations</MenuLink>
        {organizations.map((one) => (
          <MenuLink key={one.id} href={at({ organizations: one.id })}>
            {one.name}
          </MenuLink>
        ))}
      </Menu>
      <Menu
        trigger={
          <Button look="plain">{filter.side ? sideWords[filter.side] : 'Both sides'}</Button>
        }
      >
        <MenuLink href={at({ side: undefined })}>Both sides</MenuLink>
        <MenuLink href={at({ side: 'ours' })}>{sideWords.ours}</MenuLink>
        <MenuLink href={at({ side: 'theirs' })}>{sideWords.theirs}</MenuLink>
      </Menu>
      <Button look="plain" onClick={() => setAsks(true)}>
        Private calendar address
      </Button>
      <AddressDialog open={asks} onOpenChange={setAsks} />
    </div>
  )
}
