'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { AcknowledgeDialog } from '@/components/due/acknowledge-dialog'
import type { ActedClock, MayAct } from '@/components/due/due-table'
import { PeopleChoices } from '@/components/due/people-choices'
import { Button } from '@/components/ui/button'
import { Menu, MenuItem, MenuRule } from '@/components/ui/menu'
import { useToast } from '@/components/ui/toast'
import { assignClock } from '@/lib/client/due'
import { ProblemError } from '@/lib/client/fetcher'

interface DueActsProps {
  clock: ActedClock
  may: MayAct
  todayOn: string
}

// Rows are many and their acts few: quieter than a button elsewhere.
const small = 'text-sm! font-medium!'

/** Acknowledge and assign: side by side in a table, behind one word on a phone. */
export function DueActs({ clock, may, todayOn }: DueActsProps) {
  const [isAcknowledging, setAcknowledging] = useState(false)
  const { assign, busy } = useAssign(clock)
  const mayAcknowledge = may.acknowledge && clock.isRunning && clock.dueOn !== null
  const of = `${clock.title}, ${clock.project}`
  const people = <PeopleChoices ownerId={clock.ownerId} onChoose={assign} />
  return (
    <>
      <div className="-mt-2 -mr-1.5 -mb-1 flex justify-end gap-1.5 whitespace-nowrap max-sm:hidden">
        {mayAcknowledge && (
          <Button
            look="quiet"
            className={small}
            aria-label={`Acknowledge: ${of}`}
            onClick={() => setAcknowledging(true)}
          >
            Acknowledge
          </Button>
        )}
        {may.assign && (
          <Menu
            trigger={
              <Button look="quiet" className={small} busy={busy} aria-label={`Assign: ${of}`}>
                Assign
              </Button>
            }
          >
            {people}
          </Menu>
        )}
      </div>
      <div className="-my-2 -mr-1.5 sm:hidden">
        <Menu
          trigger={
            <Button look="quiet" className={small} busy={busy} aria-label={`More for ${of}`}>
              More
            </Button>
          }
        >
          {mayAcknowledge && (
            <MenuItem onSelect={() => setAcknowledging(true)}>Acknowledge</MenuItem>
          )}
          {mayAcknowledge && may.assign && <MenuRule />}
          {may.assign && people}
        </Menu>
      </div>
      {isAcknowledging && (
        <AcknowledgeDialog
          clock={clock}
          todayOn={todayOn}
          onClose={() => setAcknowledging(false)}
        />
      )}
    </>
  )
}

function useAssign(clock: ActedClock) {
  const [busy, setBusy] = useState(false)
  const router = useRouter()
  const toast = useToast()

  async function assign(personId: string) {
    if (busy || personId === clock.ownerId) return
    setBusy(true)
    try {
      const { name } = await assignClock({ ...clock.key, personId })
      toast({ title: `Assigned to ${name}`, detail: `${clock.title}, ${clock.project}` })
      router.refresh()
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      toast({ title: 'Not assigned', detail: error.message, tone: 'missed' })
    } finally {
      setBusy(false)
    }
  }

  return { assign, busy }
}
