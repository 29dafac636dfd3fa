import { startTransition, useEffect, useRef, useState } from 'react'
import type { YearAnswer, YearRequest } from '@/components/design/year-worker'
import { loadWeatherHours } from '@/lib/client/design'
import { ProblemError } from '@/lib/client/fetcher'
import { latestRuns, type LatestRuns } from '@/lib/client/latest-runs'
import type { Design } from '@/lib/domain/plant/design'
import type { DesignYear } from '@/lib/domain/plant/design-year'

export interface ShownYear {
  /** Number of the run: rises with every result that is shown. */
  seq: number
  year: DesignYear
  /** The design that these figures belong to. */
  design: Design
  weatherId: string
}

interface YearState {
  shown?: ShownYear
  /** Why the weather year could not be loaded. */
  problem?: string
}

type Runs = LatestRuns<Design, DesignYear | undefined>

/**
 * The year of a design, run in a worker while fields move. Results are shown in order and never an
 * older one after a newer; a design that is not valid (null) leaves the last figures standing.
 */
export function useYear(weatherId: string | undefined, design: Design | null): YearState {
  const [state, setState] = useState<YearState>({})
  const runs = useRef<Runs>(undefined)
  const latest = useRef(design)

  useEffect(() => {
    if (!weatherId) return
    const worker = new Worker(new URL('./year-worker.ts', import.meta.url), { type: 'module' })
    const controller = new AbortController()
    const sent = new Map<number, Design>()
    const send = (request: YearRequest) => worker.postMessage(request)
    const own: Runs = latestRuns(
      (seq, wanted) => {
        sent.set(seq, wanted)
        send({ kind: 'run', seq, design: wanted })
      },
      (seq, year) => {
        const ran = sent.get(seq)
        sent.clear()
        if (year && ran)
          startTransition(() => setState({ shown: { seq, year, design: ran, weatherId } }))
      },
    )
    worker.addEventListener('message', ({ data }: MessageEvent<YearAnswer>) =>
      own.answered(data.seq, data.year),
    )
    worker.addEventListener('error', () =>
      setState((before) => ({ ...before, problem: 'The figures could not be worked out here.' })),
    )
    loadWeatherHours(weatherId, controller.signal).then(
      (hours) => {
        worker.postMessage({ kind: 'weather', hours } satisfies YearRequest, [hours])
        runs.current = own
        if (latest.current) own.ask(latest.current)
      },
      (error: unknown) => {
        if (controller.signal.aborted) return
        const problem =
          error instanceof ProblemError ? error.message : 'The weather year did not come.'
        setState((before) => ({ ...before, problem }))
      },
    )
    return () => {
      controller.abort()
      worker.terminate()
      runs.current = undefined
    }
  }, [weatherId])

  useEffect(() => {
    latest.current = design
    if (design) runs.current?.ask(design)
  }, [design])

  return state
}
