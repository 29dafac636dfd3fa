'use client'

import { useQueryClient } from '@tanstack/react-query'
import { useRouter } from 'next/navigation'
import { useRef, useState } from 'react'
import { entryKeys, recordEntry } from '@/lib/client/entries'
import { ProblemError, type ProblemField } from '@/lib/client/fetcher'
import { entryInput, type Entry, type EntryInputGiven } from '@/lib/schemas/entry'

interface RecordEntry {
  busy: boolean
  /** What was refused as a whole. */
  problem?: string
  fields: readonly ProblemField[]
  errorOf: (path: string) => string | undefined
  refuse: (fields: ProblemField[]) => void
  submit: (input: EntryInputGiven) => Promise<void>
}

/** Sends the form once at a time; what is typed stays after a refusal. */
export function useRecordEntry(onRecorded: (entry: Entry) => void): RecordEntry {
  const client = useQueryClient()
  const router = useRouter()
  const isRunning = useRef(false)
  const [busy, setBusy] = useState(false)
  const [problem, setProblem] = useState<string>()
  const [fields, setFields] = useState<readonly ProblemField[]>([])

  function refuse(faults: ProblemField[], whole?: string) {
    setFields(faults)
    setProblem(whole)
  }

  async function submit(input: EntryInputGiven) {
    if (isRunning.current) return
    const checked = entryInput.safeParse(input)
    if (!checked.success) {
      const { issues } = checked.error
      return refuse(issues.map(({ path, message }) => ({ path: path.join('.'), message })))
    }
    isRunning.current = true
    setBusy(true)
    refuse([])
    try {
      const entry = await recordEntry(input)
      await client.invalidateQueries({ queryKey: entryKeys.all })
      router.refresh()
      onRecorded(entry)
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      refuse([...error.fields], error.fields.length === 0 ? error.message : undefined)
    } finally {
      isRunning.current = false
      setBusy(false)
    }
  }

  return {
    busy,
    problem,
    fields,
    errorOf: (path) => fields.find((field) => field.path === path)?.message,
    refuse,
    submit,
  }
}
