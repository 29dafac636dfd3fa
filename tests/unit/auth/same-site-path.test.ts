import { expect, test } from 'vitest'
import { sameSitePath } from '@/lib/client/same-site-path'

test.each([
  ['/due', '/due'],
  ['/applications/1/clocks?open=1#top', '/applications/1/clocks?open=1#top'],
])('a path of this site is gone on to: %s', (from, expected) => {
  expect(sameSitePath(from)).toBe(expected)
})

test.each([
  ['https://elsewhere.test/'],
  ['//elsewhere.test/'],
  ['/\\elsewhere.test/'],
  ['/\t/elsewhere.test/'],
  ['/.//elsewhere.test/'],
  ['javascript:alert(1)'],
  ['due'],
  [''],
  [undefined],
])('anything else is dropped: %s', (from) => {
  expect(sameSitePath(from)).toBeUndefined()
})
