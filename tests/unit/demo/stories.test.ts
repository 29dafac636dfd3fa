import { describe, expect, it } from 'vitest'
import { demoCalendars } from '@/db/demo/calendars'
import { demoOrganizations } from '@/db/demo/organizations'
import { demoProjects } from '@/db/demo/projects'
import type { DemoProject } from '@/db/demo/story'
import { businessCalendar } from '@/lib/domain/clocks/calendar'
import { addDays } from '@/lib/domain/clocks/civil-date'
import type { Fact } from '@/lib/domain/clocks/facts'
import { demoProcedures } from '@/db/demo/procedures'
import { schedule } from '@/lib/domain/clocks/schedule'
import { businessDaysTo } from '@/lib/domain/clocks/standing'
import { instantOf } from '@/lib/domain/clocks/zoned'

const organizations = new Map(
  demoOrganizations.map((one) => {
    const { name, rules } = demoCalendars[one.calendar]
    return [one.key, { ...one, calendar: businessCalendar(name, rules) }]
  }),
)
const organizationOf = (project: DemoProject) => organizations.get(project.organization)!

function factsOf(project: DemoProject): Fact[] {
  const { zone } = organizationOf(project)
  return project.events
    .filter((event) => event.fact)
    .map((event, index) => {
      const {
        kind,
        step,
        instance = 1,
        outcome,
        sentOn,
        receivedOn,
        dueOn,
        channel,
        amountMinor,
      } = event.fact!
      const receivedAt =
        event.time && kind === 'happened' ? instantOf(event.on, event.time, zone) : undefined
      return {
        id: `${project.name}-${index}`,
        seq: index + 1,
        kind,
        step,
        instance,
        outcome,
        sentOn,
        receivedOn,
        receivedAt,
        dueOn,
        channel,
        amountMinor,
        body: event.fact!.sinceOn ? { sinceOn: event.fact!.sinceOn } : {},
        recordedAt: '2026-01-01T00:00:00Z',
      }
    })
}

function playedOn(project: DemoProject) {
  const body = demoProcedures.find((one) => one.key === project.procedure)!.body
  return schedule(body, { operator: organizationOf(project) }, factsOf(project))
}

const told = Array.from({ length: 400 }, (_, n) => addDays('2026-12-01', n)).flatMap((today) =>
  demoProjects(today).map((project) => ({ today, project, played: playedOn(project) })),
)

describe('the demo told on 400 consecutive days', () => {
  it('keeps each expected clock open within three business days of its offset', () => {
    for (const { today, project, played } of told) {
      const { calendar } = organizationOf(project)
      for (const wanted of project.expects) {
        const item = played.items.find(
          (one) =>
            one.step === wanted.step &&
            one.instance === (wanted.instance ?? 1) &&
            one.obligation === '',
        )
        const where = `${today} ${project.name} ${wanted.step}`
        expect(item?.status, where).toBe('open')
        expect(
          Math.abs(businessDaysTo(calendar, wanted.dueOn, item!.dueOn!)),
          where,
        ).toBeLessThanOrEqual(3)
      }
    }
  })

  it('strands no fact and records none on a closed day, out of order or in the future', () => {
    for (const { today, project, played } of told) {
      const where = `${today} ${project.name}`
      const { calendar } = organizationOf(project)
      expect(played.stranded, where).toEqual([])
      const days = project.events.map((event) => event.on)
      expect(
        days.filter((on) => calendar.closedBecause(on) !== null && on !== today),
        where,
      ).toEqual([])
      expect([...days].sort(), where).toEqual(days)
      expect(
        days.every((on) => on <= today),
        where,
      ).toBe(true)
    }
  })

  it('signs no agreement after its limit', () => {
    for (const { today, project, played } of told) {
      const signed = played.items.find((item) => item.step === 'sign' && item.obligation === '')
      expect(signed?.doneLate ?? false, `${today} ${project.name}`).toBe(false)
    }
  })
})

describe('the demo on Tue 1 Dec 2026', () => {
  it.each([
    ['Cold Spring Road', 'cure', 2, '2026-11-30'],
    ['Linnet Hollow', 'test_notice', 1, '2026-12-04'],
    ['Sable Orchard', 'accept_supplemental', 1, '2026-12-08'],
    ['Pike Hill Landing', 'final_accounting', 1, '2026-12-11'],
    ['Old Mill Ferry', 'completeness', 1, '2026-12-03'],
    ['Ferris Cut', 'transmission_study', 1, '2026-11-12'],
    ['Bellweather South', 'facilities_agreement', 1, '2026-12-03'],
  ])('%s: %s, round %i, is due %s', (name, step, instance, dueOn) => {
    const project = demoProjects('2026-12-01').find((one) => one.name === name)!
    const item = playedOn(project).items.find(
      (one) => one.step === step && one.instance === instance && one.obligation === '',
    )
    expect(item?.dueOn).toBe(dueOn)
  })
})
