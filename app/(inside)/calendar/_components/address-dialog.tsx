'use client'

import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Button } from '@/components/ui/button'
import { Dialog } from '@/components/ui/dialog'
import { useToast } from '@/components/ui/toast'
import { calendarAddress, endCalendarAddress, makeCalendarAddress } from '@/lib/client/calendar'

interface Props {
  open: boolean
  onOpenChange: (open: boolean) => void
}

/** The private iCal address: shown once when it is made, replaced or ended at any time. */
export function AddressDialog({ open, onOpenChange }: Props) {
  const client = useQueryClient()
  const toast = useToast()
  const { data } = useQuery({ ...calendarAddress(), enabled: open })
  const [address, setAddress] = useState<string | null>(null)
  const make = async () => {
    const made = await makeCalendarAddress()
    setAddress(made.address)
    await client.invalidateQueries({ queryKey: ['calendar-address'] })
  }
  const end = async () => {
    await endCalendarAddress()
    setAddress(null)
    await client.invalidateQueries({ queryKey: ['calendar-address'] })
    toast({ title: 'The private address no longer works.' })
  }
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Private calendar address"
      description="Any calendar program that subscribes to this address shows the clocks. Who has the address can read them without a sign-in, so keep it to yourself."
      footer={
        <>
          {data?.made && (
            <Button look="quiet" onClick={end}>
              End the address
            </Button>
          )}
          <Button look="primary" busyLabel="Making …" onClick={make}>
            {data?.made ? 'Make a new one' : 'Make the address'}
          </Button>
        </>
      }
    >
      {address ? (
        <>
          <label htmlFor="calendar-address" className="cap">
            Address, shown only now
          </label>
          <input
            id="calendar-address"
            readOnly
            value={address}
            onFocus={(focus) => focus.target.select()}
            className="mono border-rule bg-film mt-1 w-full border px-2 py-1.5"
          />
        </>
      ) : (
        <p>
          {data?.made
            ? 'An address is in use. It was shown when it was made; making a new one ends it.'
            : 'There is no address yet.'}
        </p>
      )}
    </Dialog>
  )
}
