import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { latestRuns } from '@/lib/client/latest-runs'

describe('runs asked for faster than they are done', () => {
  it('go one at a time, and only the newest that waits is sent', () => {
    const sent: number[] = []
    const shown: number[] = []
    const runs = latestRuns<number, number>(
      (_, input) => sent.push(input),
      (_, output) => shown.push(output),
    )
    for (const input of [10, 20, 30]) runs.ask(input)
    expect(sent).toEqual([10])
    runs.answered(1, 100)
    expect(sent).toEqual([10, 30])
    runs.answered(3, 300)
    expect(shown).toEqual([100, 300])
  })

  it('never show an older result after a newer, and end with the last asked', () => {
    const moves = fc.array(fc.boolean(), { minLength: 1, maxLength: 60 })
    fc.assert(
      fc.property(moves, (asks) => {
        const sent: { seq: number; input: number }[] = []
        const shown: number[] = []
        const runs = latestRuns<number, number>(
          (seq, input) => sent.push({ seq, input }),
          (_, output) => shown.push(output),
        )
        let asked = 0
        let answered = 0
        const answer = () => {
          const run = sent[answered]
          if (!run) return
          answered += 1
          runs.answered(run.seq, run.input)
        }
        for (const isAsk of asks) {
          if (isAsk) runs.ask(++asked)
          else answer()
        }
        while (answered < sent.length) answer()
        expect(shown).toEqual([...shown].sort((a, b) => a - b))
        expect(new Set(shown).size).toBe(shown.length)
        if (asked > 0) expect(shown.at(-1)).toBe(asked)
      }),
    )
  })

  it('that were forgotten are not shown when their answer comes', () => {
    const shown: number[] = []
    const runs = latestRuns<number, number>(
      () => undefined,
      (_, output) => shown.push(output),
    )
    runs.ask(1)
    runs.forget()
    runs.answered(1, 1)
    expect(shown).toEqual([])
  })
})
