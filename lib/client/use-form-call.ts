import { type SyntheticEvent, useRef, useState } from 'react'
import { ProblemError, type ProblemField } from '@/lib/client/fetcher'

interface FormCall {
  onSubmit: (event: SyntheticEvent<HTMLFormElement>) => void
  busy: boolean
  /** What was refused as a whole; undefined where the faults are in fields. */
  problem?: ProblemError
  fields: readonly ProblemField[]
  /** The fault of one field. */
  errorOf: (path: string) => string | undefined
}

/**
 * Sends a form once at a time and keeps what was refused. `send` gets the form's values and its
 * element; what is typed stays in the fields after a refusal.
 */
export function useFormCall(
  send: (values: FormData, form: HTMLFormElement) => Promise<unknown>,
): FormCall {
  const isRunning = useRef(false)
  const [busy, setBusy] = useState(false)
  const [refusal, setRefusal] = useState<ProblemError>()

  async function run(form: HTMLFormElement) {
    if (isRunning.current) return
    isRunning.current = true
    setBusy(true)
    try {
      // What was refused stays in sight until the answer, so that nothing moves under the pointer.
      await send(new FormData(form), form)
      setRefusal(undefined)
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error
      setRefusal(error)
    } finally {
      isRunning.current = false
      setBusy(false)
    }
  }

  const fields = refusal?.fields ?? []
  return {
    onSubmit(event) {
      event.preventDefault()
      void run(event.currentTarget)
    },
    busy,
    problem: fields.length === 0 ? refusal : undefined,
    fields,
    errorOf: (path) => fields.find((field) => field.path === path)?.message,
  }
}

/** A form's value as text, empty where it has none. */
export function textOf(values: FormData, name: string): string {
  const value = values.get(name)
  return typeof value === 'string' ? value : ''
}
