import ts from 'typescript'
import { isOneOf, mayImport, neverInTheWeb, roomOf, serverRooms } from '@/lib/local/rooms.mjs'
import { find, importsOf, parse, targetOf, type Source } from './read-source'

const starts = (path: string, folders: string[]) =>
  folders.some((folder) => path === folder || path.startsWith(`${folder}/`))

/** Imports that the room of the file does not allow, per lib/local/rooms.mjs. */
export function brokenWalls(source: Source): string[] {
  const room = roomOf(source.path)
  if (!room) return []
  return importsOf(source).flatMap(({ specifier }) => {
    const target = targetOf(source.path, specifier)
    const said = `${source.path} imports ${specifier}`
    if (target !== null) return mayImport(room, target) ? [] : [said]
    if (room.packages && !isOneOf(room.packages, specifier)) return [said]
    return isOneOf(room.never ?? [], specifier) ? [said] : []
  })
}

function calls(node: ts.Node, owner: string, method: string): boolean {
  return (
    ts.isPropertyAccessExpression(node) &&
    ts.isIdentifier(node.expression) &&
    node.expression.text === owner &&
    node.name.text === method
  )
}

function readsClockOrChance(node: ts.Node): boolean {
  if (calls(node, 'Date', 'now') || calls(node, 'Math', 'random')) return true
  if (calls(node, 'performance', 'now') || calls(node, 'crypto', 'randomUUID')) return true
  if (calls(node, 'DateTime', 'now') || calls(node, 'DateTime', 'local')) return true
  const made = ts.isNewExpression(node) || ts.isCallExpression(node)
  if (!made || !ts.isIdentifier(node.expression) || node.expression.text !== 'Date') return false
  return ts.isCallExpression(node) || (node.arguments ?? []).length === 0
}

/** Places in pure code that read the clock or roll dice. */
export function clockOrChance(source: Source): string[] {
  if (!starts(source.path, ['lib/domain', 'templates'])) return []
  return find(source, readsClockOrChance).map(({ line }) => `${source.path}:${line}`)
}

function callsFetch(node: ts.Node): boolean {
  if (!ts.isCallExpression(node)) return false
  const { expression } = node
  if (ts.isIdentifier(expression)) return expression.text === 'fetch'
  return ['globalThis', 'window', 'self'].some((owner) => calls(expression, owner, 'fetch'))
}

const mayFetch = ['lib/client', 'lib/local', 'tests', 'public']

/** Calls of fetch outside lib/client; web workers (*.worker.ts) reach the network by themselves. */
export function fetchOutsideClient(source: Source): string[] {
  if (starts(source.path, mayFetch) || /\.worker\.ts$/.test(source.path)) return []
  return find(source, callsFetch).map(({ line }) => `${source.path}:${line}`)
}

function isApiUrl(node: ts.Node): boolean {
  if (ts.isStringLiteralLike(node)) return node.text.startsWith('/api/')
  return ts.isTemplateExpression(node) && node.head.text.startsWith('/api/')
}

/** Addresses of our doors written by hand instead of taken from lib/routes.ts. */
export function handWrittenUrls(source: Source): string[] {
  if (!starts(source.path, ['components', 'app', 'lib/client'])) return []
  return find(source, isApiUrl).map(({ line }) => `${source.path}:${line}`)
}

const longest = 400

/** Code files past the limit; folders named `data` hold tables, not code. */
export function tooLong(source: Source): string[] {
  if (source.path.includes('/data/')) return []
  const lines = source.text.split('\n').length - 1
  return lines > longest ? [`${source.path}: ${lines} lines`] : []
}

/** Drawers named for nothing, and index files that only pass on what others export. */
export function drawersAndBarrels(source: Source): string[] {
  return /(^|\/)(index|utils?|helpers?|misc|types)\.(ts|tsx|mjs)$/.test(source.path)
    ? [source.path]
    : []
}

export function isMarkedForBrowser(source: Source): boolean {
  const [first] = parse(source).statements
  if (!first || !ts.isExpressionStatement(first)) return false
  return ts.isStringLiteral(first.expression) && first.expression.text === 'use client'
}

type House = Map<string, Source>

function sourceAt(house: House, target: string): Source | undefined {
  const endings = ['', '.ts', '.tsx', '/index.ts']
  return endings.map((ending) => house.get(target + ending)).find(Boolean)
}

/** Follows run-time imports from a file; `stop` names what ends a path as a complaint. */
function reach(
  house: House,
  start: Source,
  stop: (specifier: string, target: string | null) => boolean,
): string[] {
  const seen = new Set([start.path])
  const queue: { source: Source; trail: string }[] = [{ source: start, trail: start.path }]
  const found: string[] = []
  for (let next = queue.shift(); next; next = queue.shift()) {
    for (const { specifier, typeOnly, dynamic } of importsOf(next.source)) {
      const target = targetOf(next.source.path, specifier)
      if (typeOnly || (dynamic && target === null)) continue
      const trail = `${next.trail} -> ${target ?? specifier}`
      if (stop(specifier, target)) found.push(trail)
      const source = target === null ? undefined : sourceAt(house, target)
      if (!source || seen.has(source.path)) continue
      seen.add(source.path)
      queue.push({ source, trail })
    }
  }
  return found
}

const houseOf = (sources: Source[]): House => new Map(sources.map((one) => [one.path, one]))

/** Ways from a file marked 'use client' into a room that runs on a server only. */
export function serverCodeInBrowser(sources: Source[]): string[] {
  const house = houseOf(sources)
  const isServer = (_: string, target: string | null) =>
    target !== null && starts(target, serverRooms)
  return sources
    .filter((source) => starts(source.path, ['app', 'components', 'lib/client']))
    .filter(isMarkedForBrowser)
    .flatMap((source) => reach(house, source, isServer))
}

/** Ways from a page or handler to a package that stops the web server's build. */
export function rendererInTheWeb(sources: Source[]): string[] {
  const house = houseOf(sources)
  return sources
    .filter((source) => starts(source.path, ['app']))
    .flatMap((source) => reach(house, source, (name) => isOneOf(neverInTheWeb, name)))
}
