import { readFileSync, readdirSync, statSync } from 'node:fs'
import path from 'node:path'
import ts from 'typescript'

export const root = path.resolve(import.meta.dirname, '../../..')

export interface Source {
  /** Path relative to the root, with slashes. */
  path: string
  text: string
}

const topFolders = ['app', 'components', 'db', 'lib', 'templates', 'tests']
const codeFile = /\.(ts|tsx|mjs|mts)$/

/** Every code file of the house, in the order of their paths. */
export function readHouse(): Source[] {
  const inFolders = topFolders.flatMap((folder) => {
    const full = path.join(root, folder)
    if (!statSync(full, { throwIfNoEntry: false })) return []
    const names = readdirSync(full, { recursive: true }) as string[]
    return names.map((name) => path.posix.join(folder, name))
  })
  const atRoot = readdirSync(root)
  return [...atRoot, ...inFolders]
    .filter((name) => codeFile.test(name) && name !== 'next-env.d.ts')
    .sort()
    .map((name) => ({ path: name, text: readFileSync(path.join(root, name), 'utf8') }))
}

export function parse(source: Source): ts.SourceFile {
  const kind = source.path.endsWith('x') ? ts.ScriptKind.TSX : ts.ScriptKind.TS
  return ts.createSourceFile(source.path, source.text, ts.ScriptTarget.ES2022, true, kind)
}

/** Every node of the file that `pick` keeps, with its line counted from 1. */
export function find(
  source: Source,
  pick: (node: ts.Node) => boolean,
): { node: ts.Node; line: number }[] {
  const file = parse(source)
  const found: { node: ts.Node; line: number }[] = []
  const visit = (node: ts.Node) => {
    if (pick(node)) {
      found.push({ node, line: file.getLineAndCharacterOfPosition(node.getStart()).line + 1 })
    }
    ts.forEachChild(node, visit)
  }
  visit(file)
  return found
}

export interface Import {
  specifier: string
  /** Erased by the compiler: reaches nothing at run time. */
  typeOnly: boolean
  /** Loaded by `import()` when called, not with the file. */
  dynamic: boolean
}

function isTypeOnly(node: ts.ImportDeclaration | ts.ExportDeclaration): boolean {
  if (ts.isExportDeclaration(node)) return node.isTypeOnly
  const clause = node.importClause
  if (!clause) return false
  if (clause.isTypeOnly) return true
  const named = clause.namedBindings
  if (clause.name || !named || !ts.isNamedImports(named)) return false
  return named.elements.length > 0 && named.elements.every((element) => element.isTypeOnly)
}

/** Imports and re-exports of a file, `import()` with a literal included. */
export function importsOf(source: Source): Import[] {
  const found: Import[] = []
  const visit = (node: ts.Node) => {
    const declared = ts.isImportDeclaration(node) || ts.isExportDeclaration(node)
    if (declared && node.moduleSpecifier && ts.isStringLiteral(node.moduleSpecifier)) {
      const { text: specifier } = node.moduleSpecifier
      found.push({ specifier, typeOnly: isTypeOnly(node), dynamic: false })
    }
    if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
      const [first] = node.arguments
      if (first && ts.isStringLiteralLike(first)) {
        found.push({ specifier: first.text, typeOnly: false, dynamic: true })
      }
    }
    ts.forEachChild(node, visit)
  }
  visit(parse(source))
  return found
}

/** Path relative to the root that a specifier points to, null for a package. */
export function targetOf(from: string, specifier: string): string | null {
  if (specifier.startsWith('@/')) return specifier.slice(2)
  if (specifier.startsWith('.')) return path.posix.join(path.posix.dirname(from), specifier)
  return null
}
