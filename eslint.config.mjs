import next from 'eslint-config-next/core-web-vitals'
import typescript from 'eslint-config-next/typescript'
import { rooms } from './lib/local/rooms.mjs'

const closed = rooms.filter((room) => room.may !== 'anything')

/** Folders a room must not import from: every room that its row does not name. */
function forbidden(room) {
  const allowed = (folder) =>
    room.folder === folder || room.may.some((open) => `${folder}/`.startsWith(`${open}/`))
  return rooms.map(({ folder }) => folder).filter((folder) => !allowed(folder))
}

const escape = (text) => text.replaceAll('.', '\\.')

function patternsOf(room) {
  const openInside = room.may.map((folder) => escape(folder.replace(/\.ts$/, '')))
  const except = [...openInside, escape(room.folder)].map((folder) => `${folder}(/|$)`).join('|')
  const walls = forbidden(room).map((folder) => {
    const name = escape(folder.replace(/\.ts$/, ''))
    return { regex: `^@/(?!${except})${name}(/|$)`, message: `${room.folder} may not import it.` }
  })
  const never = (room.never ?? []).map((name) => ({
    regex: name === 'node:' ? '^node:' : `^${escape(name)}(/|$)`,
    message: `${room.folder} must not load it.`,
  }))
  return [...walls, ...never]
}

/** One block per room, so that the editor shows a broken wall as it is typed. */
const walls = closed.map((room) => ({
  files: [room.folder.endsWith('.ts') ? room.folder : `${room.folder}/**/*.{ts,tsx}`],
  ignores: rooms
    .filter((inner) => inner !== room && inner.folder.startsWith(`${room.folder}/`))
    .map((inner) => `${inner.folder}/**`),
  rules: { 'no-restricted-imports': ['error', { patterns: patternsOf(room) }] },
}))

const noClock = ['Date.now()', 'new Date()', 'Math.random()']
const pure = {
  files: ['lib/domain/**/*.ts', 'templates/**/*.{ts,tsx}'],
  rules: {
    'no-restricted-syntax': [
      'error',
      {
        selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']",
        message: `Pure code takes the instant as an argument (${noClock.join(', ')} are out).`,
      },
      {
        selector: "NewExpression[callee.name='Date'][arguments.length=0]",
        message: 'Pure code takes the instant as an argument.',
      },
      {
        selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']",
        message: 'Pure code knows no randomness.',
      },
    ],
  },
}

const config = [
  { ignores: ['.local/**', '.next/**', 'coverage/**', 'drizzle/**', 'next-env.d.ts'] },
  ...next,
  ...typescript,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
      ],
      'import/no-anonymous-default-export': 'off',
    },
  },
  // `use…` in a test file is a set-up function of the suite, not a hook.
  {
    files: ['tests/**'],
    rules: { 'react-hooks/rules-of-hooks': 'off', 'react/jsx-key': 'off' },
  },
  ...walls,
  pure,
]

export default config
