import ts from 'typescript'
import { describe, expect, it } from 'vitest'
import { readTree } from '#tests/architecture/tree.ts'

// A file of shared with exported functions, and every verb of the server, has its test at the same path under tests.

/** Files whose test stands elsewhere, each with the reason. Keep it short. */
const exempt = new Map<string, string>([])

const testTexts = readTree(['tests/shared', 'tests/server'], /\.test\.tsx?$/)
const tests = new Set(testTexts.keys())

/** Small verbs of a feature may share one test file in the feature's folder; it counts for those it imports. */
function isTestedInFolder(path: string): boolean {
  const folder = `tests/${path.slice(0, path.lastIndexOf('/') + 1)}`
  return [...testTexts].some(([test, text]) => test.startsWith(folder) && text.includes(`from '#${path}'`))
}

type Callable = { firstParameter: string | undefined }

/** The functions and classes a file exports by declaration. */
function exportedFunctions(text: string): Callable[] {
  const source = ts.createSourceFile('file.ts', text, ts.ScriptTarget.Latest, true)
  return source.statements.flatMap((statement): Callable[] => {
    const modifiers = ts.canHaveModifiers(statement) ? (ts.getModifiers(statement) ?? []) : []
    if (!modifiers.some((modifier) => modifier.kind === ts.SyntaxKind.ExportKeyword)) return []
    if (ts.isClassDeclaration(statement)) return [{ firstParameter: undefined }]
    if (ts.isFunctionDeclaration(statement)) return [{ firstParameter: statement.parameters[0]?.name.getText() }]
    if (!ts.isVariableStatement(statement)) return []
    return statement.declarationList.declarations.flatMap(({ initializer }) =>
      initializer !== undefined && (ts.isArrowFunction(initializer) || ts.isFunctionExpression(initializer))
        ? [{ firstParameter: initializer.parameters[0]?.name.getText() }]
        : [],
    )
  })
}

/** A verb takes its world first. Look-ups that verbs share are tested through them. */
function isVerb(path: string, text: string): boolean {
  const isShared = /\/(routes|[^/]*-rows)\.ts$/.test(path)
  return !isShared && exportedFunctions(text).some(({ firstParameter }) => firstParameter === 'ctx')
}

function mirrorOf(path: string): string {
  return `tests/${path.replace(/\.tsx?$/, '.test.ts')}`
}

describe('the mirror', () => {
  it('has a test for every file of shared that exports a function', () => {
    const files = [...readTree(['shared'], /\.ts$/)]
      .filter(([, text]) => exportedFunctions(text).length > 0)
      .map(([path]) => path)
    expect(files.filter((path) => !exempt.has(path) && !tests.has(mirrorOf(path)))).toEqual([])
  })

  it('has a test for every verb', () => {
    const verbs = [...readTree(['server/features'], /\.ts$/)]
      .filter(([path, text]) => isVerb(path, text))
      .map(([path]) => path)
    expect(verbs.filter((path) => !exempt.has(path) && !tests.has(mirrorOf(path)) && !isTestedInFolder(path))).toEqual(
      [],
    )
  })

  it('exempts only files that are there and have no test of their own', () => {
    const files = readTree(['shared', 'server/features'], /\.ts$/)
    expect([...exempt.keys()].filter((path) => !files.has(path) || tests.has(mirrorOf(path)))).toEqual([])
  })
})

describe('exportedFunctions', () => {
  it('sees functions, arrow functions and classes, and no types, schemas or tables', () => {
    expect(exportedFunctions('export async function f(ctx: Ctx, x: number) {}')).toEqual([{ firstParameter: 'ctx' }])
    expect(exportedFunctions('export const f = (x: number) => x')).toEqual([{ firstParameter: 'x' }])
    expect(exportedFunctions('export class F {}')).toHaveLength(1)
    expect(exportedFunctions('function f() {}\nexport type F = () => void\nexport const table = [f]')).toEqual([])
  })
})
