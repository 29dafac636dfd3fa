const drawings = ['components/line', 'components/chart', 'components/drawing']

/**
 * The rooms of the house. The longest folder that a file lies in is its room. `may` lists what the
 * room imports besides itself; 'anything' lifts the wall. `packages` lists the only packages it may
 * load ('node:' stands for Node's own), `never` the packages it must not; both cover subpaths.
 * ESLint and tests/unit/house/walls.test.ts read this one table; the guide explains it.
 */
export const rooms = [
  { folder: 'lib/domain', may: [], packages: ['luxon', 'temporal-polyfill'] },
  { folder: 'lib/schemas', may: ['lib/domain'], packages: ['zod'] },
  {
    folder: 'lib/services',
    may: [
      ...['lib/domain', 'lib/schemas', 'lib/files', 'lib/queue', 'lib/routes.ts', 'db'],
      // Pure text of a mail whose one-time link must not be stored anywhere but in the outbox.
      'templates/notices',
    ],
    never: ['server-only', 'next', 'react', 'react-dom', 'docx', '@resvg/resvg-js'],
  },
  { folder: 'lib/http', may: ['lib/services', 'lib/auth', 'lib/schemas', 'lib/domain'] },
  {
    folder: 'lib/auth',
    may: ['lib/services', 'lib/domain', 'lib/schemas', 'lib/routes.ts', 'db'],
  },
  { folder: 'lib/client', may: ['lib/schemas', 'lib/domain', 'lib/routes.ts'], never: ['node:'] },
  { folder: 'lib/files', may: [], never: ['next', 'react', 'react-dom'] },
  { folder: 'lib/queue', may: ['db'], packages: ['zod', 'drizzle-orm'] },
  {
    folder: 'lib/worker',
    may: [
      ...['lib/services', 'lib/documents', 'lib/mail', 'lib/files', 'lib/queue'],
      ...['lib/domain', 'lib/schemas', 'lib/routes.ts', 'templates', 'db'],
    ],
    never: ['next'],
  },
  { folder: 'lib/documents', may: ['templates', 'lib/domain', ...drawings], never: ['next'] },
  { folder: 'lib/mail', may: ['templates', 'lib/domain', ...drawings], never: ['next'] },
  { folder: 'lib/local', may: 'anything' },
  { folder: 'lib/routes.ts', may: ['lib/domain'], packages: [] },
  { folder: 'db', may: ['lib/domain'] },
  { folder: 'db/demo', may: 'anything' },
  {
    folder: 'templates',
    may: ['lib/domain', ...drawings],
    packages: ['docx', 'react', 'luxon'],
  },
  { folder: 'components/ui', may: ['components/drawing/palette.ts'], never: ['node:'] },
  ...drawings.map((folder) => ({
    folder,
    may: ['lib/domain', ...drawings],
    packages: ['react'],
  })),
  {
    folder: 'components',
    may: ['components', 'lib/client', 'lib/schemas', 'lib/domain', 'lib/routes.ts'],
    never: ['node:', 'pg', 'drizzle-orm', 'graphile-worker'],
  },
  {
    folder: 'app',
    may: [
      ...['components', 'lib/http', 'lib/services', 'lib/auth', 'lib/client', 'lib/schemas'],
      ...['lib/domain', 'lib/files', 'lib/queue', 'lib/routes.ts', 'fonts'],
    ],
    never: ['pg', 'drizzle-orm', 'graphile-worker', 'docx', '@resvg/resvg-js'],
  },
  { folder: 'tests', may: 'anything' },
]

/** Rooms that run on a server only: no file marked 'use client' reaches one at run time. */
export const serverRooms = [
  ...['db', 'lib/services', 'lib/http', 'lib/auth', 'lib/files', 'lib/queue', 'lib/worker'],
  ...['lib/documents', 'lib/mail', 'lib/local'],
]

/** What must not be in the web server's import graph, since it stops its build. */
export const neverInTheWeb = ['react-dom/server']

const within = (folder, target) => target === folder || target.startsWith(`${folder}/`)

/** Room of a path relative to the root, null for files outside all rooms (configuration). */
export function roomOf(path) {
  const found = rooms.filter((room) => within(room.folder, path))
  return found.sort((a, b) => b.folder.length - a.folder.length)[0] ?? null
}

/** Whether a package specifier belongs to one of the names; 'node:' covers Node's own. */
export function isOneOf(names, specifier) {
  return names.some((name) =>
    name === 'node:' ? specifier.startsWith('node:') : within(name, specifier),
  )
}

/** Whether the room may import the file at this path, relative to the root. */
export function mayImport(room, path) {
  if (room.may === 'anything') return true
  if (roomOf(path) === room) return true
  return room.may.some((folder) => within(folder, path) || `${path}.ts` === folder)
}
