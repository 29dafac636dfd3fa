import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { boxesOverlap, type Box } from '@/components/drawing/geometry'
import { metrics } from '@/components/drawing/metrics'
import { layoutLine } from '@/components/line/layout-line'
import { layoutTall } from '@/components/line/layout-tall'
import type { LineModel, LineStep } from '@/components/line/model'

const DAY_MS = 86_400_000
const civil = (day: number) => new Date(day * DAY_MS).toISOString().slice(0, 10)
const dateOn = fc.integer({ min: 19_700, max: 23_500 }).map(civil)

const title = fc
  .array(
    fc.constantFrom('Deficiency', 'cured', 'report', 'of', 'facilities', 'Gate', '2', 'wmwmw'),
    {
      minLength: 1,
      maxLength: 7,
    },
  )
  .map((words) => words.join(' '))

const step: fc.Arbitrary<Omit<LineStep, 'key'>> = fc.record(
  {
    instance: fc.integer({ min: 1, max: 3 }),
    title,
    party: fc.constantFrom('ours' as const, 'theirs' as const, 'both' as const),
    kind: fc.constantFrom('step' as const, 'gate' as const),
    state: fc.constantFrom(
      'done' as const,
      'running' as const,
      'missed' as const,
      'open' as const,
      'ahead' as const,
      'not_needed' as const,
      'waived' as const,
    ),
    on: dateOn,
    onLabel: fc.constantFrom('10 Feb', '22 Sep, 3 BD over', '14 Apr 2027, forecast'),
    obligations: fc.array(fc.record({ title, done: fc.boolean() }), { maxLength: 6 }),
    tap: fc.boolean(),
    repeated: fc.boolean(),
  },
  { requiredKeys: ['instance', 'title', 'party', 'kind', 'state'] },
)

const clock = fc.record(
  {
    fromOn: dateOn,
    toOn: dateOn,
    label: fc.constantFrom('7 BD', '30 calendar days from receipt, 9 left'),
    note: fc.constant('missed: the request is withdrawn · start the wire by Thu 3 Dec'),
    tone: fc.constantFrom('soon' as const, 'far' as const, 'missed' as const, 'theirs' as const),
  },
  { requiredKeys: ['fromOn', 'toOn', 'label', 'tone'] },
)

const model: fc.Arbitrary<LineModel> = fc
  .record(
    { steps: fc.array(step, { minLength: 1, maxLength: 40 }), todayOn: dateOn, running: clock },
    { requiredKeys: ['steps', 'todayOn'] },
  )
  .map((drawn) => ({ ...drawn, steps: drawn.steps.map((s, i) => ({ ...s, key: `s${i}` })) }))

function overlapping(boxes: readonly Box[]): [Box, Box][] {
  return boxes.flatMap((a, i) =>
    boxes.slice(i + 1).flatMap((b) => (boxesOverlap(a, b) ? [[a, b] as [Box, Box]] : [])),
  )
}

function outside(boxes: readonly Box[], width: number, height: number): Box[] {
  return boxes.filter((b) => b.x < 0 || b.y < 0 || b.x + b.width > width || b.y + b.height > height)
}

const runs = { numRuns: 120 }

describe('the large step line', () => {
  const width = fc.integer({ min: 600, max: 1600 })

  it('keeps every label, the figure of the clock and the word today apart and on the sheet', () => {
    fc.assert(
      fc.property(model, width, (drawn, w) => {
        const layout = layoutLine(drawn, w, metrics)
        const boxes = [
          ...layout.labels.map((label) => label.box),
          layout.today.box,
          ...(layout.dimension === undefined ? [] : [layout.dimension.box]),
        ]
        expect(layout.labels).toHaveLength(drawn.steps.length)
        expect(overlapping(boxes)).toEqual([])
        expect(outside(boxes, layout.width, layout.height)).toEqual([])
      }),
      runs,
    )
  })

  it('keeps labels clear of the line and of the dimension line', () => {
    fc.assert(
      fc.property(model, width, (drawn, w) => {
        const layout = layoutLine(drawn, w, metrics)
        const { axisY, gateHalf } = layout
        const line = { x: 0, y: axisY - gateHalf, width: w, height: 2 * gateHalf }
        const { dimension } = layout
        const strip =
          dimension === undefined ? [] : [{ x: 0, y: dimension.y - 4, width: w, height: 8 }]
        const struck = layout.labels.filter((label) =>
          [line, ...strip].some((box) => boxesOverlap(label.box, box)),
        )
        expect(struck).toEqual([])
      }),
      runs,
    )
  })

  it('draws dated steps in the order of their dates, then the undated', () => {
    fc.assert(
      fc.property(model, width, (drawn, w) => {
        const { stops } = layoutLine(drawn, w, metrics)
        const xs = stops.map((stop) => stop.x)
        expect(xs).toEqual([...xs].sort((a, b) => a - b))
        const days = stops.map((stop) => stop.step.on ?? '9999-12-31')
        expect(days).toEqual([...days].sort())
        expect(Math.max(...xs)).toBeLessThanOrEqual(w)
      }),
      runs,
    )
  })

  it("stands today's rule between what was done before and what is due after", () => {
    fc.assert(
      fc.property(model, width, (drawn, w) => {
        const { stops, today } = layoutLine(drawn, w, metrics)
        for (const { step: s, x } of stops) {
          if (s.on !== undefined && s.on < drawn.todayOn) expect(x).toBeLessThanOrEqual(today.x)
          if (s.on === undefined || s.on > drawn.todayOn) expect(x).toBeGreaterThanOrEqual(today.x)
        }
      }),
      runs,
    )
  })
})

describe('the tall step line', () => {
  it('keeps rows apart and on the sheet down to 260 px', () => {
    fc.assert(
      fc.property(model, fc.integer({ min: 260, max: 480 }), (drawn, w) => {
        const layout = layoutTall(drawn, w, metrics)
        const boxes = layout.rows.map((row) => row.box)
        expect(boxes).toHaveLength(drawn.steps.length)
        expect(overlapping(boxes)).toEqual([])
        expect(outside(boxes, layout.width, layout.height)).toEqual([])
      }),
      runs,
    )
  })
})
