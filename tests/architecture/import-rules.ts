import { posix } from 'node:path'
import ts from 'typescript'
import type { Tree } from '#tests/architecture/tree.ts'

// Who may import whom. The table is in DEVELOPERS.md; each rule here is one row of it.

type Rule = {
  /** The files it is about. */
  from: RegExp
  /** What they may import of our own; files of the same rule may always import each other unless `apart`. */
  may: RegExp
  /** Packages they must not import; `all` but the ones that `packages` names. */
  not: RegExp
  reason: string
}

const impure = /^(node:|react|drizzle|express|pg$|pg\/|ws$|better-auth|@tanstack|#)/
const yjs = /^(yjs$|y-)/
const either = (...patterns: RegExp[]): RegExp => new RegExp(patterns.map((pattern) => pattern.source).join('|'))

const sharedBase = /^shared\/(ids\.ts|units\/|time\/)/
const sharedDomain = /^shared\/domain\//
const sharedAll = /^shared\//
const none = /^(?!)/

const rules: readonly Rule[] = [
  {
    from: sharedBase,
    may: sharedBase,
    not: /^(?!zod$)/,
    reason: 'ids, units and time import zod and each other',
  },
  {
    from: sharedDomain,
    may: either(sharedBase, sharedDomain),
    not: either(impure, yjs),
    reason: 'a domain imports ids, units, time and other domains; it knows no framework, no Yjs, no Node',
  },
  {
    from: /^shared\/(access|api)\//,
    may: either(sharedBase, sharedDomain, /^shared\/(access\/|api\/|realtime\/documents\.ts)/),
    not: either(impure, yjs),
    reason: 'access and api import ids, units, time, domains and the names of documents',
  },
  { from: /^shared\/realtime\//, may: sharedAll, not: impure, reason: 'shared/realtime imports shared and yjs' },
  {
    from: /^src\/ui\//,
    may: /^src\/(ui\/|lib\/(cn|picture-url|use-draft)\.ts)/,
    not: yjs,
    reason: 'ui imports react and of src/lib cn, picture-url and use-draft, and has no domain words',
  },
  {
    from: /^src\/lib\//,
    may: either(/^src\/lib\//, sharedAll),
    not: /^node:/,
    reason: 'lib imports shared, and nothing that stands on it',
  },
  {
    from: /^src\/realtime\//,
    may: either(/^src\/(realtime|lib)\//, sharedAll),
    not: /^node:/,
    reason: 'src/realtime imports src/lib and shared',
  },
  {
    from: /^src\/features\//,
    may: either(/^src\/(features|ui|lib|realtime|styles)\//, sharedAll),
    not: /^node:/,
    reason: 'a feature imports ui, lib, realtime and shared; the app composes features',
  },
  { from: /^src\//, may: either(/^src\//, sharedAll), not: /^node:/, reason: 'the client never imports the server' },
  {
    from: /^server\/db\//,
    may: either(/^server\/(db\/|errors\.ts)/, sharedAll),
    not: /^(express|ws$)/,
    reason: 'db knows drizzle and shared, not what is built on it',
  },
  {
    from: /^server\/features\/[^/]+\/routes\.ts$/,
    may: either(/^server\/(features|http|errors\.ts|context\.ts|env\.ts|adapters|auth)/, sharedAll),
    not: /^(drizzle|pg$)/,
    reason: 'routes import their own verbs, server/http and shared; no SQL',
  },
  {
    from: /^server\/features\//,
    may: either(/^server\/(features|db|access|adapters|auth)\//, /^server\/(errors|context|env)\.ts/, sharedAll),
    not: /^(express|ws$|supertest)/,
    reason: 'a verb knows no request, no response and no socket',
  },
  {
    from: /^server\/realtime\//,
    may: either(/^server\/(?!app\.ts|main\.ts|http\/|start)/, sharedAll),
    not: /^express/,
    reason: 'realtime imports verbs, auth and shared/realtime, not routes',
  },
  {
    from: /^server\/(app|main)\.ts$/,
    may: either(/^server\//, sharedAll),
    not: none,
    reason: 'the server never imports the client',
  },
  {
    from: /^server\//,
    may: either(/^server\/(?!app\.ts|main\.ts)/, sharedAll),
    not: none,
    reason: 'nothing in the server imports app.ts or main.ts, or the client',
  },
]

const featureOf = (path: string): string | undefined => /^(?:src|server)\/features\/([^/]+)\//.exec(path)?.[1]
const isRoutes = (path: string): boolean => /^server\/features\/[^/]+\/routes\.ts$/.test(path)

/** Why this file must not import that one; undefined when it may. `to` is a path from the root, or a package. */
export function reasonAgainst(from: string, to: { path: string } | { package: string }): string | undefined {
  const rule = rules.find((one) => one.from.test(from))
  if (rule === undefined) return undefined
  if ('package' in to) return rule.not.test(to.package) ? rule.reason : undefined
  if (!rule.may.test(to.path)) return rule.reason
  const [own, other] = [featureOf(from), featureOf(to.path)]
  if (own === undefined || other === undefined || own === other) return isVerbToRoutes(from, to.path)
  if (from.startsWith('src/')) return 'a feature does not import another; the app composes them'
  if (isRoutes(from)) return 'routes import the verbs of their own feature'
  return isVerbToRoutes(from, to.path)
}

function isVerbToRoutes(from: string, to: string): string | undefined {
  return isRoutes(to) && !/^server\/(app|main)\.ts$/.test(from) ? 'only app.ts imports routes' : undefined
}

/** Where an import of a file leads: a path from the root, or a package. */
export function resolveImport(from: string, specifier: string): { path: string } | { package: string } {
  const plain = specifier.replace(/\?.*$/, '')
  if (plain.startsWith('#')) return { path: plain.slice(1) }
  if (plain.startsWith('.')) return { path: posix.join(posix.dirname(from), plain) }
  return { package: plain }
}

/** Every import, re-export and dynamic import of a file, types included. */
export function importsOf(text: string): string[] {
  return ts.preProcessFile(text, true, true).importedFiles.map((file) => file.fileName)
}

/** One line for every import that breaks a rule. */
export function findBreaches(tree: Tree): string[] {
  const lines: string[] = []
  for (const [path, text] of tree) {
    for (const specifier of importsOf(text)) {
      const reason = reasonAgainst(path, resolveImport(path, specifier))
      if (reason !== undefined) lines.push(`${path} -> ${specifier}: ${reason}`)
    }
  }
  return lines
}

/** The files a file needs when it runs: type-only imports are gone by then, dynamic ones come later. */
export function staticImportsOf(text: string): string[] {
  const source = ts.createSourceFile('file.ts', text, ts.ScriptTarget.Latest, false)
  const specifiers: string[] = []
  for (const statement of source.statements) {
    if (!ts.isImportDeclaration(statement) && !ts.isExportDeclaration(statement)) continue
    if (statement.moduleSpecifier === undefined || !ts.isStringLiteral(statement.moduleSpecifier)) continue
    if (ts.isExportDeclaration(statement) ? statement.isTypeOnly : isTypeOnly(statement.importClause)) continue
    specifiers.push(statement.moduleSpecifier.text)
  }
  return specifiers
}

function isTypeOnly(clause: ts.ImportClause | undefined): boolean {
  if (clause === undefined) return false
  if (clause.phaseModifier === ts.SyntaxKind.TypeKeyword) return true
  const bindings = clause.namedBindings
  if (clause.name !== undefined || bindings === undefined || !ts.isNamedImports(bindings)) return false
  return bindings.elements.length > 0 && bindings.elements.every((element) => element.isTypeOnly)
}

/** Circles of files that need each other to run, each as `a -> b -> a`. */
export function findCircles(tree: Tree): string[] {
  const circles = new Set<string>()
  const done = new Set<string>()
  const visit = (path: string, trail: readonly string[]): void => {
    const at = trail.indexOf(path)
    if (at !== -1) {
      circles.add([...trail.slice(at), path].join(' -> '))
      return
    }
    const text = tree.get(path)
    if (text === undefined || done.has(path)) return
    for (const specifier of staticImportsOf(text)) {
      const target = resolveImport(path, specifier)
      if ('path' in target) visit(target.path, [...trail, path])
    }
    done.add(path)
  }
  for (const path of tree.keys()) visit(path, [])
  return [...circles]
}
