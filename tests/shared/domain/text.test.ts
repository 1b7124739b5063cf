import { describe, expect, it } from 'vitest'
import { lineSchema, proseSchema, wellFormed } from '#shared/domain/text.ts'

describe('wellFormed', () => {
  it('replaces lone surrogates and keeps pairs', () => {
    expect(wellFormed('a\uD83Db\uDE00c😀')).toBe('a\uFFFDb\uFFFDc😀')
  })
})

describe('lineSchema', () => {
  it('trims and refuses nothing at all', () => {
    expect(lineSchema().parse('  Night coat ')).toBe('Night coat')
    expect(lineSchema().safeParse('   ').success).toBe(false)
  })
})

describe('proseSchema', () => {
  it('keeps line breaks and ends at its limit', () => {
    expect(proseSchema(5).parse('a\nb')).toBe('a\nb')
    expect(proseSchema(5).safeParse('abcdef').success).toBe(false)
  })
})
