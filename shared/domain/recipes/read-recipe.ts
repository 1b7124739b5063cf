import type { z } from 'zod'
import {
  RECIPE_FORMAT,
  RECIPE_MAX_BYTES,
  RECIPE_MOST_NUMBER,
  RECIPE_VERSION,
  type Recipe,
  recipeSchema,
} from './schema.ts'

/** A recipe, or why there is none, in one plain sentence that names what is wrong and where. */
export type RecipeRead = { recipe: Recipe; problem: null } | { recipe: null; problem: string }

const refused = (problem: string): RecipeRead => ({ recipe: null, problem })

/** Why a file of this many bytes is not read at all; null when it may be a recipe. */
export function recipeTooLarge(bytes: number): string | null {
  if (bytes <= RECIPE_MAX_BYTES) return null
  const megabytes = (bytes / 1024 / 1024).toFixed(1)
  return `This file is too large for a recipe: ${megabytes} MB, where ${RECIPE_MAX_BYTES / 1024 / 1024} MB is the most. Nothing was changed.`
}

/** Reads the text of a file. What it holds beside a recipe's own fields is left out. */
export function readRecipe(text: string): RecipeRead {
  // At least one byte for each UTF-16 unit.
  const tooLarge = recipeTooLarge(text.length)
  if (tooLarge !== null) return refused(tooLarge)
  let content: unknown
  try {
    content = JSON.parse(text.replace(/^\uFEFF/, ''))
  } catch {
    return refused(
      'This file is not JSON, so there is no recipe in it; it may have been cut short. Nothing was changed.',
    )
  }
  return checkRecipe(content)
}

/** Reads what JSON held. */
export function checkRecipe(content: unknown): RecipeRead {
  if (typeof content !== 'object' || content === null || Array.isArray(content)) {
    return refused('This is JSON, but not a recipe: a recipe is an object with a format. Nothing was changed.')
  }
  const format = at(content, 'format')
  if (format !== RECIPE_FORMAT) {
    const what = format === undefined ? 'it names no format' : `its format is ${shown(format)}`
    return refused(`This is JSON, but not a recipe: ${what}, where “${RECIPE_FORMAT}” belongs. Nothing was changed.`)
  }
  const version = at(content, 'version')
  if (typeof version === 'number' && version > RECIPE_VERSION) {
    return refused(
      `This recipe was written by a newer Sconce (version ${version} of the format; this one reads version ${RECIPE_VERSION}). Nothing was changed; update and try again.`,
    )
  }
  const parsed = recipeSchema.safeParse(content)
  if (parsed.success) {
    const beyond = pathBeyond(parsed.data)
    if (!beyond) return { recipe: parsed.data, problem: null }
    return refused(
      `This recipe cannot be read: ${placeOf(beyond)} is ${shown(beyond.reduce<unknown>(at, parsed.data))}, more than anything here can be. Nothing was changed.`,
    )
  }
  const issues = parsed.error.issues.map(nearest)
  const [first] = issues
  const more = issues.length - 1
  const others = more === 0 ? '' : more === 1 ? ' One more place does not fit.' : ` ${more} more places do not fit.`
  return refused(
    `This recipe cannot be read: ${first ? sentence(first, content) : 'it is damaged'}.${others} Nothing was changed.`,
  )
}

/** Where the first number stands that is larger than any setup's, above or below zero. */
function pathBeyond(value: unknown): PropertyKey[] | null {
  if (typeof value === 'number') return Math.abs(value) > RECIPE_MOST_NUMBER ? [] : null
  if (typeof value !== 'object' || value === null) return null
  for (const [key, part] of Object.entries(value)) {
    const rest = pathBeyond(part)
    if (rest) return [Array.isArray(value) ? Number(key) : key, ...rest]
  }
  return null
}

type Issue = z.core.$ZodIssue

/** Where one of several shapes fits, what is wrong is what the nearest of them says. */
function nearest(issue: Issue): Issue {
  if (issue.code !== 'invalid_union') return issue
  const [best] = [...issue.errors].sort((a, b) => a.length - b.length)
  const [first] = best ?? []
  return first ? nearest({ ...first, path: [...issue.path, ...first.path] }) : issue
}

function at(value: unknown, key: PropertyKey): unknown {
  return typeof value === 'object' && value !== null && Object.hasOwn(value, key) ? Reflect.get(value, key) : undefined
}

/** A value as a sentence can show it. */
function shown(value: unknown): string {
  switch (typeof value) {
    case 'string':
      return `“${value.length > 40 ? `${value.slice(0, 40)}…` : value}”`
    case 'number':
      return String(value).replace('-', '−')
    case 'boolean':
      return String(value)
    default:
      return value === null ? 'nothing' : Array.isArray(value) ? 'a list' : 'something else'
  }
}

const LIST_WORDS: Readonly<Record<string, string>> = {
  lights: 'light',
  places: 'sitter',
  props: 'part of the set',
  gels: 'gel',
  zoom: 'zoom setting',
  metered: 'meter reading',
}

const FIELD_WORDS: Readonly<Record<string, string>> = {
  at: 'place',
  fNumber: 'f-number',
  iso: 'ISO',
  numbers: '',
  value: '',
  zM: 'distance',
  isOn: 'on or off',
  kitId: 'kit id',
}

/** A field's name as words, without its unit: "fullRecycleS" → "full recycle". */
function wordsOf(key: string): string {
  const known = FIELD_WORDS[key]
  if (known !== undefined) return known
  return key
    .replace(/(Mm|M|K|S|Deg|Kg)$/, '')
    .replace(/([A-Z])/g, ' $1')
    .toLowerCase()
}

const AXES = ['x', 'y', 'z']

/** "light 3, unit, flash colour": counted from one. */
function placeOf(path: readonly PropertyKey[]): string {
  return path
    .flatMap((key, index) => {
      if (typeof key === 'number') {
        const list = LIST_WORDS[String(path[index - 1])]
        return list === undefined ? (AXES[key] ?? String(key + 1)) : `${list} ${key + 1}`
      }
      const isList = LIST_WORDS[String(key)] !== undefined
      if (isList && typeof path[index + 1] === 'number') return []
      return isList ? `its ${String(key)}` : wordsOf(String(key))
    })
    .filter((word) => word !== '')
    .join(', ')
}

/** What is wrong and where, without a full stop. */
function sentence(issue: Issue, content: unknown): string {
  const where = placeOf(issue.path) || 'the whole'
  const value = issue.path.reduce<unknown>(at, content)
  switch (issue.code) {
    case 'too_small':
      return issue.origin === 'string'
        ? `${where} is empty`
        : `${where} is ${shown(value)} and has to be ${issue.inclusive ? 'at least' : 'more than'} ${shown(Number(issue.minimum))}`
    case 'too_big':
      if (issue.origin === 'array')
        return `${where} are ${Array.isArray(value) ? value.length : 'too many'} and may be at most ${String(issue.maximum)}`
      if (issue.origin === 'string') return `${where} is longer than ${String(issue.maximum)} characters`
      return `${where} is ${shown(value)} and has to be at most ${shown(Number(issue.maximum))}`
    case 'invalid_type':
      return value === undefined
        ? `${where} is missing`
        : `${where} is ${shown(value)} and has to be ${typeWord(issue.expected)}`
    case 'invalid_value':
      return value === undefined
        ? `${where} is missing`
        : `${where} is ${shown(value)}, and one of ${issue.values.map(shown).join(', ')} is known`
    default:
      return value === undefined
        ? `${where} is missing`
        : `${where} is ${shown(value)}, which is not what belongs there`
  }
}

function typeWord(expected: string): string {
  switch (expected) {
    case 'number':
    case 'int':
      return 'a number'
    case 'string':
      return 'text'
    case 'array':
    case 'tuple':
      return 'a list'
    case 'boolean':
      return 'true or false'
    default:
      return `a group of values`
  }
}
