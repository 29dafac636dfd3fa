'use client'

import { useFactDesk } from '@/components/applications/fact-desk'
import { Button } from '@/components/ui/button'
import { Menu, MenuItem, MenuRule } from '@/components/ui/menu'
import type { ApplicationView } from '@/lib/schemas/application'

interface ApplicationMenuProps {
  standing: ApplicationView['standing']
  requestNo: string | null
}

/** What can be recorded about the request as a whole. */
export function ApplicationMenu({ standing, requestNo }: ApplicationMenuProps) {
  const open = useFactDesk()
  const isWithdrawn = standing === 'withdrawn'
  return (
    <div data-screen-only className="flex shrink-0 flex-wrap gap-2.5 max-sm:pt-4">
      {!isWithdrawn && (
        <Button
          look={standing === 'filed' ? 'primary' : 'plain'}
          onClick={() => open({ kind: 'happened' })}
        >
          Record an event
        </Button>
      )}
      <Menu trigger={<Button>More</Button>}>
        <MenuItem onSelect={() => open({ kind: 'changed', terms: ['requestNo'] })}>
          {requestNo ? 'Change the request number' : 'Record the request number'}
        </MenuItem>
        <MenuItem onSelect={() => open({ kind: 'changed' })}>Change the terms</MenuItem>
        <MenuRule />
        <MenuItem onSelect={() => open({ kind: 'stop' })}>Stop the clock</MenuItem>
        <MenuItem onSelect={() => open({ kind: 'resume' })}>Resume the clock</MenuItem>
        <MenuRule />
        {isWithdrawn ? (
          <MenuItem onSelect={() => open({ kind: 'reinstated' })}>Reinstate the request</MenuItem>
        ) : (
          <MenuItem onSelect={() => open({ kind: 'withdrawn' })}>Withdraw the request</MenuItem>
        )}
      </Menu>
    </div>
  )
}
