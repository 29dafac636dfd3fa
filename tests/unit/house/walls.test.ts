import { describe, expect, it } from 'vitest'
import { rooms } from '@/lib/local/rooms.mjs'
import * as rules from './house-rules'
import { importsOf, readHouse, type Source } from './read-source'

const house = readHouse()
const file = (path: string, text: string): Source => ({ path, text })

describe('the house as it stands', () => {
  it('has code to read in its rooms', () => {
    expect(house.length).toBeGreaterThan(50)
    expect(rooms.length).toBeGreaterThan(10)
  })

  it.each([
    ['no room imports past its walls', rules.brokenWalls],
    ['pure code reads no clock and rolls no dice', rules.clockOrChance],
    ['only lib/client fetches', rules.fetchOutsideClient],
    ['addresses of doors come from lib/routes.ts', rules.handWrittenUrls],
    ['no code file is past 400 lines', rules.tooLong],
    ['no barrel and no drawer named for nothing', rules.drawersAndBarrels],
  ])('%s', (_, rule) => {
    expect(house.flatMap(rule)).toEqual([])
  })

  it('no code for the browser reaches a room of the server', () => {
    expect(rules.serverCodeInBrowser(house)).toEqual([])
  })

  it('no page or handler reaches the renderer that stops the build', () => {
    expect(rules.rendererInTheWeb(house)).toEqual([])
  })
})

describe('the wall check catches a planted violation', () => {
  it.each([
    ['the domain importing the database', 'lib/domain/plant/sun.ts', '@/db/client'],
    ['the domain loading Node', 'lib/domain/money.ts', 'node:fs'],
    ['a schema importing a service', 'lib/schemas/fact.ts', '@/lib/services/facts'],
    ['a service importing the renderer', 'lib/services/exhibits.ts', '@/lib/documents/render'],
    ['a service loading server-only', 'lib/services/facts.ts', 'server-only'],
    ['a page importing the database', 'app/page.tsx', '@/db/client'],
    ['a page importing a worker', 'app/page.tsx', '@/lib/worker/send'],
    ['a control importing the domain', 'components/ui/button.tsx', '@/lib/domain/money'],
    ['a drawing loading a style library', 'components/line/step-line.tsx', 'clsx'],
    ['a view importing a service', 'components/due/table.tsx', '@/lib/services/due'],
    ['the queue importing a service', 'lib/queue/enqueue.ts', '@/lib/services/facts'],
    ['a wall passed by a relative path', 'lib/domain/money.ts', '../../db/client'],
    ['files importing a schema', 'lib/files/receive.ts', '@/lib/schemas/file'],
  ])('%s', (_, path, specifier) => {
    const complaint = [`${path} imports ${specifier}`]
    expect(rules.brokenWalls(file(path, `import x from '${specifier}'`))).toEqual(complaint)
    expect(rules.brokenWalls(file(path, `import type { X } from '${specifier}'`))).toEqual(
      complaint,
    )
    expect(rules.brokenWalls(file(path, `export { x } from '${specifier}'`))).toEqual(complaint)
    expect(rules.brokenWalls(file(path, `void import('${specifier}')`))).toEqual(complaint)
  })

  it.each([
    ['a service importing the database', 'lib/services/facts.ts', '@/db/client'],
    ['a neighbor in the same room', 'lib/domain/plant/sun.ts', './irradiance'],
    ['domain from domain', 'lib/domain/plant/sun.ts', '@/lib/domain/money'],
    ['a view taking an address', 'components/due/table.tsx', '@/lib/routes'],
    ['the demo using services', 'db/demo/seed.ts', '@/lib/services/facts'],
    ['a test using anything', 'tests/unit/x.test.ts', '@/db/client'],
  ])('and lets pass: %s', (_, path, specifier) => {
    expect(rules.brokenWalls(file(path, `import x from '${specifier}'`))).toEqual([])
  })

  it('an import named in a comment or a string is none', () => {
    const text = `// import x from '@/db/client'\nconst say = "import x from '@/db/client'"`
    expect(importsOf(file('lib/domain/money.ts', text))).toEqual([])
  })
})

describe('the clock check catches a planted violation', () => {
  it.each([
    'Date.now()',
    'new Date()',
    'new Date',
    'Date()',
    'Math.random()',
    'performance.now()',
    'DateTime.now()',
    'crypto.randomUUID()',
  ])('%s', (code) => {
    const text = `\nexport const value = ${code}`
    expect(rules.clockOrChance(file('lib/domain/money.ts', text))).toEqual([
      'lib/domain/money.ts:2',
    ])
    expect(rules.clockOrChance(file('templates/notices/due.ts', text))).toHaveLength(1)
    expect(rules.clockOrChance(file('lib/services/facts.ts', text))).toEqual([])
  })

  it('a date made from an argument is no clock', () => {
    expect(rules.clockOrChance(file('lib/domain/money.ts', 'new Date(instant)'))).toEqual([])
  })
})

describe('the other checks catch a planted violation', () => {
  it.each(['fetch("/x")', 'window.fetch("/x")', 'globalThis.fetch("/x")'])('%s', (code) => {
    const source = (path: string) => file(path, `await ${code}`)
    expect(rules.fetchOutsideClient(source('components/due/table.tsx'))).toHaveLength(1)
    expect(rules.fetchOutsideClient(source('app/page.tsx'))).toHaveLength(1)
    expect(rules.fetchOutsideClient(source('lib/client/fetcher.ts'))).toEqual([])
  })

  it.each(["'/api/health'", '`/api/applications/${id}`', '`/api/health`'])(
    'the address %s written by hand',
    (code) => {
      const text = `const address = ${code}`
      expect(rules.handWrittenUrls(file('components/due/table.tsx', text))).toHaveLength(1)
      expect(rules.handWrittenUrls(file('lib/routes.ts', text))).toEqual([])
    },
  )

  it('a file of 401 lines, while 400 pass and tables of data may be longer', () => {
    const lines = (count: number) => '\n'.repeat(count)
    expect(rules.tooLong(file('lib/a.ts', lines(401)))).toEqual(['lib/a.ts: 401 lines'])
    expect(rules.tooLong(file('lib/a.ts', lines(400)))).toEqual([])
    expect(rules.tooLong(file('lib/domain/data/a.ts', lines(401)))).toEqual([])
  })

  it.each(['lib/domain/index.ts', 'lib/utils.ts', 'components/ui/helpers.tsx', 'lib/a/types.ts'])(
    'the name %s',
    (path) => {
      expect(rules.drawersAndBarrels(file(path, ''))).toEqual([path])
    },
  )
})

describe('the browser check catches a planted violation', () => {
  const view = file('components/due/table.tsx', `'use client'\nimport { a } from '@/lib/client/a'`)
  const client = (text: string) => file('lib/client/a.ts', text)
  const service = file('lib/services/due.ts', '')

  it('a service reached through another file, with the way to it', () => {
    const far = [view, client(`import { b } from '../services/due'`), service]
    expect(rules.serverCodeInBrowser(far)).toEqual([
      'components/due/table.tsx -> lib/client/a -> lib/services/due',
    ])
  })

  it('a type of a service is erased and reaches nothing', () => {
    const text = `import type { B } from '../services/due'\nimport { type C } from '../services/due'`
    expect(rules.serverCodeInBrowser([view, client(text), service])).toEqual([])
  })

  it('a page that reaches react-dom/server through a shared file', () => {
    const page = file('app/page.tsx', `import { draw } from '@/lib/http/draw'`)
    const shared = file('lib/http/draw.ts', `import { renderToString } from 'react-dom/server'`)
    expect(rules.rendererInTheWeb([page, shared])).toHaveLength(1)
    const late = file('lib/http/draw.ts', `const x = await import('react-dom/server')`)
    expect(rules.rendererInTheWeb([page, late])).toEqual([])
  })
})
