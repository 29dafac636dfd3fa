'use client'

import { useRef, useState } from 'react'
import { readEml } from '@/lib/client/entries'
import { ProblemError } from '@/lib/client/fetcher'
import { newId } from '@/lib/client/new-id'
import type { Entry, EntryChoices } from '@/lib/schemas/entry'
import type { UploadedFile } from '@/lib/schemas/file'
import {
  fillFromEml,
  newDraft,
  replyDraft,
  reviseDraft,
  type EntryDraft,
  type FormIds,
} from './entry-draft'
import { useUploads } from './use-uploads'

function makeIds(): FormIds {
  const facts = new Map<string, string>()
  return {
    entry: newId(),
    factOf(applicationId) {
      const id = facts.get(applicationId) ?? newId()
      facts.set(applicationId, id)
      return id
    },
  }
}

/** The form of the page: what stands in it, its files, and how it is opened and closed. */
export function useEntryForm(applicationId: string, choices: EntryChoices, startsAt: Date | null) {
  const { organizations, zone } = choices
  const usualZone = organizations[0]?.zone ?? zone
  const fresh = (now = new Date()) => newDraft(organizations, now, usualZone)
  const [draft, setDraft] = useState(() => (startsAt ? fresh(startsAt) : null))
  const [ids, setIds] = useState(makeIds)
  const [note, setNote] = useState<string>()
  const uploads = useUploads()
  // Counts the forms, so that an answer that comes late does not fill the next one.
  const formNo = useRef(0)

  async function lookInside(file: UploadedFile, no: number) {
    if (!/\.eml$/i.test(file.name)) return
    try {
      const { sha256, name } = file
      const eml = await readEml({ sha256, name, zone: usualZone })
      if (formNo.current !== no) return
      uploads.attach(eml.attachments)
      setDraft((before) => before && fillFromEml(before, eml))
      if (eml.recordedAs) setNote('This e-mail is recorded already; look before you do it twice.')
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      if (formNo.current === no) setNote(`${error.message} It stays attached as a file.`)
    }
  }

  function add(files: readonly File[]) {
    const no = formNo.current
    uploads.add(files, (kept) => void lookInside(kept, no))
  }

  function show(next: EntryDraft | null) {
    formNo.current += 1
    uploads.clear()
    setIds(makeIds())
    setNote(undefined)
    setDraft(next)
  }

  return {
    draft,
    ids,
    note,
    uploads: { ...uploads, add },
    set: (part: Partial<EntryDraft>) => setDraft((before) => before && { ...before, ...part }),
    openNew: () => show(fresh()),
    openReply: (entry: Entry) => show(replyDraft(entry, fresh(), applicationId)),
    openRevision: (entry: Entry) => {
      show(reviseDraft(entry, applicationId))
      uploads.attach(entry.attachments)
    },
    /** Files dropped on the page open the form, or join what is typed already. */
    dropFiles: (files: File[]) => {
      if (!draft) show({ ...fresh(), channel: 'email', direction: 'in' })
      add(files)
    },
    close: () => show(null),
  }
}
