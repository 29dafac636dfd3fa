'use client'

import { useId } from 'react'
import { RadioField } from '@/components/ui/choice-fields'
import {
  DateField,
  SelectField,
  TextAreaField,
  TextField,
  TimeField,
} from '@/components/ui/text-fields'
import { isCivilDate } from '@/lib/domain/clocks/civil-date'
import { channels, type Channel } from '@/lib/domain/clocks/facts'
import { channelWords, usualVisibility, type Visibility } from '@/lib/domain/correspondence'
import { zoneName } from '@/lib/domain/format-date'
import type { EntryChoices } from '@/lib/schemas/entry'
import type { EntryDraft } from './entry-draft'

export interface EntryFieldsProps {
  draft: EntryDraft
  set: (part: Partial<EntryDraft>) => void
  organizations: EntryChoices['organizations']
  zone: string
  errorOf: (path: string) => string | undefined
}

/** How, which way, with whom and what: the part that a call needs. */
export function WhatFields({ draft, set, organizations, errorOf }: EntryFieldsProps) {
  const contactsId = useId()
  const organization = organizations.find((one) => one.id === draft.organizationId)
  function chooseOrganization(organizationId: string) {
    const next = organizations.find((one) => one.id === organizationId)
    const wasFilled = draft.parties === usualParties(organization)
    set({ organizationId, ...(wasFilled && { parties: usualParties(next) }) })
  }
  return (
    <>
      <SelectField
        name="channel"
        label="How"
        options={channels.map((channel) => ({ value: channel, label: channelWords[channel] }))}
        value={draft.channel}
        onChange={(event) => set({ channel: event.target.value as Channel })}
        error={errorOf('channel')}
      />
      <RadioField
        name="direction"
        label="Direction"
        options={[
          { value: 'out', label: 'Out, from us' },
          { value: 'in', label: 'In, from them' },
        ]}
        value={draft.direction}
        onChange={(event) => set({ direction: event.target.value === 'in' ? 'in' : 'out' })}
        error={errorOf('direction')}
      />
      <TextField
        name="subject"
        label="Subject"
        value={draft.subject}
        onChange={(event) => set({ subject: event.target.value })}
        error={errorOf('subject')}
        maxLength={300}
        autoFocus
      />
      <TextAreaField
        name="text"
        label="What was said or written"
        value={draft.text}
        onChange={(event) => set({ text: event.target.value })}
        error={errorOf('text')}
        rows={5}
        optional
      />
      {organizations.length > 1 && (
        <SelectField
          name="organizationId"
          label="Organization"
          options={organizations.map(({ id, name }) => ({ value: id, label: name }))}
          emptyLabel="None of them"
          value={draft.organizationId}
          onChange={(event) => chooseOrganization(event.target.value)}
          error={errorOf('organizationId')}
        />
      )}
      <TextField
        name="parties"
        label="With whom"
        list={contactsId}
        value={draft.parties}
        onChange={(event) => set({ parties: event.target.value })}
        error={errorOf('parties')}
        maxLength={300}
      />
      <datalist id={contactsId}>
        {organization?.contacts.map((contact) => (
          <option key={contact} value={contact} />
        ))}
      </datalist>
    </>
  )
}

function usualParties(organization: EntryChoices['organizations'][number] | undefined): string {
  return organization?.contacts[0] ?? organization?.name ?? ''
}

/** When it was, who may read it, and whether an answer is owed. */
export function WhenFields({ draft, set, zone, errorOf }: EntryFieldsProps) {
  const noon = `${isCivilDate(draft.on) ? draft.on : '2000-01-01'}T12:00:00Z`
  return (
    <>
      <DateField
        name="on"
        label="Date"
        value={draft.on}
        onChange={(event) => set({ on: event.target.value })}
        error={errorOf('on')}
      />
      <TimeField
        name="time"
        label="Hour"
        unit={zoneName(zone, noon)}
        value={draft.time}
        onChange={(event) => set({ time: event.target.value })}
        error={errorOf('time') ?? errorOf('zone')}
      />
      <SelectField
        name="visibility"
        label="Who may read it"
        options={[
          { value: 'internal', label: 'Internal: our company only' },
          { value: 'shareable', label: 'Shareable: may be shown outside' },
        ]}
        value={draft.visibility ?? usualVisibility(draft.channel)}
        onChange={(event) => set({ visibility: event.target.value as Visibility })}
        error={errorOf('visibility')}
      />
      <SelectField
        name="replyOwedBy"
        label="Reply owed"
        options={[
          { value: '', label: 'By nobody' },
          { value: 'us', label: 'By us' },
          { value: 'them', label: 'By them' },
        ]}
        value={draft.replyOwedBy}
        onChange={(event) => set({ replyOwedBy: event.target.value as EntryDraft['replyOwedBy'] })}
        error={errorOf('replyOwedBy')}
      />
      {draft.replyOwedBy && (
        <DateField
          name="replyOwedOn"
          label="By which day"
          value={draft.replyOwedOn}
          onChange={(event) => set({ replyOwedOn: event.target.value })}
          error={errorOf('replyOwedOn')}
        />
      )}
    </>
  )
}
