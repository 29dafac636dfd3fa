import { designRunner, type DesignRunner, type DesignYear } from '@/lib/domain/plant/design-year'
import type { Design } from '@/lib/domain/plant/design'
import { unpackWeather } from '@/lib/domain/plant/weather-bytes'

/** What the page sends: the hours of a weather year, or a design to run on the last one. */
export type YearRequest =
  { kind: 'weather'; hours: ArrayBuffer } | { kind: 'run'; seq: number; design: Design }

export interface YearAnswer {
  seq: number
  /** Absent where the run failed. */
  year?: DesignYear
}

let runner: DesignRunner | undefined

function answer(request: YearRequest): YearAnswer | undefined {
  if (request.kind === 'weather') {
    runner = designRunner(unpackWeather(request.hours))
    return undefined
  }
  return { seq: request.seq, year: runner?.run(request.design) }
}

self.addEventListener('message', (event: MessageEvent<YearRequest>) => {
  const reply = answer(event.data)
  if (reply) self.postMessage(reply)
})
