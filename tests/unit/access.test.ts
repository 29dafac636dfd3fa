import { describe, expect, test } from 'vitest'
import {
  actions,
  can,
  jobActorNames,
  jobCan,
  roles,
  type Action,
  type Role,
} from '@/lib/domain/access'

const holders = (action: Action) => roles.filter((role) => can([role], action))

describe('who may do what', () => {
  test.each<[Action, Role[]]>([
    ['person.write', ['administrator']],
    ['organization.write', ['administrator']],
    ['calendar.write', ['administrator']],
    ['procedure.write', ['administrator']],
    ['application.create', ['developer']],
    ['fact.record', ['developer', 'engineer', 'liaison']],
    ['equipment.write', ['engineer']],
    ['calculation.freeze', ['engineer']],
    ['exhibit.check', ['engineer']],
    ['obligation.acknowledge', ['developer', 'engineer', 'liaison', 'executive']],
  ])('%s is for %j', (action, expected) => {
    expect(holders(action)).toEqual(expected)
  })

  test('everybody reads, and keeps an account of their own', () => {
    const reading = actions.filter((action) => action.endsWith('.read'))
    for (const action of [...reading, 'self.write'] as Action[]) {
      expect([action, holders(action)]).toEqual([action, [...roles]])
    }
  })

  test('an executive changes no record: reads, acknowledges, keeps an account', () => {
    const quiet =
      /\.read$|^self\.|^obligation\.acknowledge$|^calendar\.feed$|^clock\.count$|^plant\.estimate$/
    const changes = actions.filter((action) => can(['executive'], action) && !quiet.test(action))
    expect(changes).toEqual([])
  })

  test('a person without a role may do nothing', () => {
    expect(actions.filter((action) => can([], action))).toEqual([])
  })

  test('several roles together may do what each of them may', () => {
    for (const action of actions) {
      const together = can(['developer', 'administrator'], action)
      expect(together).toBe(can(['developer'], action) || can(['administrator'], action))
    }
  })

  test('what only a job may do no person may', () => {
    expect(holders('notice.send')).toEqual([])
    expect(holders('job.run')).toEqual([])
  })

  test('a job other than the demo writes no people, facts or procedures', () => {
    const never: Action[] = ['person.write', 'fact.record', 'procedure.write', 'self.write']
    const wrong = jobActorNames
      .filter((name) => name !== 'demo')
      .flatMap((name) => never.filter((action) => jobCan(name, action)))
    expect(wrong).toEqual([])
  })
})
