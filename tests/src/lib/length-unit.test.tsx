// @vitest-environment jsdom
import { act, cleanup, render, screen } from '@testing-library/react'
import { afterEach, describe, expect, it } from 'vitest'
import {
  type LengthUnit,
  chooseLengthUnit,
  lengthLabel,
  lengthText,
  parseLength,
  useLengthUnit,
} from '#src/lib/length-unit.ts'

afterEach(() => {
  cleanup()
  chooseLengthUnit('m')
})

describe('parseLength', () => {
  // 1 ft = 0.3048 m and 1 in = 0.0254 m, exactly: NIST Special Publication 811 (2008), B.8.
  it.each<[string, LengthUnit, number]>([
    ['1.5', 'm', 1.5],
    ['1,5 m', 'ft', 1.5],
    ['150 cm', 'm', 1.5],
    ['1500mm', 'ft', 1.5],
    ['−0,35', 'm', -0.35],
    ['5', 'ft', 1.524],
    ['5.5', 'ft', 1.6764],
    ['5.5 ft', 'm', 1.6764],
    [`5' 6"`, 'm', 1.6764],
    ['5′6″', 'm', 1.6764],
    ['5’ 6”', 'ft', 1.6764],
    [`5'6''`, 'ft', 1.6764],
    ['5 ft 6 in', 'm', 1.6764],
    ["5' 6", 'ft', 1.6764],
    ['5 feet 6 1/2 inches', 'ft', 1.6891],
    ['5′ 6½″', 'ft', 1.6891],
    ['66"', 'm', 1.6764],
    ['½ ft', 'm', 0.1524],
    [`-2' 3"`, 'ft', -0.6858],
  ])('reads %s on a device in %s as %s m', (text, unit, metres) => {
    expect(parseLength(text, unit)).toBeCloseTo(metres, 9)
  })

  it.each(['', 'five feet', '5 6', `5" 6'`, '1/0 ft', '--3', '3 m 2', '1.2.3'])(
    'does not take “%s” for a length',
    (text) => {
      expect(parseLength(text, 'ft')).toBeUndefined()
    },
  )
})

describe('lengthText', () => {
  it('is read back as what it says, to half a centimetre or a twentieth of an inch', () => {
    for (let step = -400; step <= 400; step++) {
      const metres = step * 0.0317
      expect(Math.abs((parseLength(lengthText(metres, 'm'), 'm') ?? NaN) - metres)).toBeLessThanOrEqual(0.005001)
      expect(Math.abs((parseLength(lengthText(metres, 'ft'), 'ft') ?? NaN) - metres)).toBeLessThanOrEqual(0.0012701)
    }
  })
  it('writes the same words again after reading its own', () => {
    for (let tenths = -300; tenths <= 300; tenths++) {
      const words = lengthText(tenths * 0.00254, 'ft')
      expect(lengthText(parseLength(words, 'ft') ?? NaN, 'ft')).toBe(words)
    }
  })
  it('never says twelve inches', () => {
    expect(lengthText(1.82879, 'ft')).toBe("6'")
    expect(lengthText(0.0254 * 11.96, 'ft')).toBe("1'")
    expect(lengthText(0, 'ft')).toBe("0'")
    expect(lengthText(0.1, 'ft')).toBe('3.9"')
  })
})

describe('lengthLabel', () => {
  it('says metres to one or two decimals, feet to the inch or the half', () => {
    expect(lengthLabel(1.64, 'm')).toBe('1.6 m')
    expect(lengthLabel(1.95, 'm', true)).toBe('1.95 m')
    expect(lengthLabel(1.9, 'm', true)).toBe('1.9 m')
    expect(lengthLabel(1.6764, 'ft')).toBe('5′ 6″')
    expect(lengthLabel(1.6891, 'ft', true)).toBe('5′ 6½″')
    expect(lengthLabel(1.8287, 'ft')).toBe('6′ 0″')
    expect(lengthLabel(-0.6858, 'ft')).toBe('−2′ 3″')
    expect(lengthLabel(0.0127, 'ft', true)).toBe('0′ ½″')
  })
})

describe('useLengthUnit', () => {
  it('follows the choice on every part of the page, and keeps it on the device', () => {
    function Shown() {
      return <p>{useLengthUnit()}</p>
    }
    render(<Shown />)
    expect(screen.getByText('m')).toBeTruthy()
    act(() => chooseLengthUnit('ft'))
    expect(screen.getByText('ft')).toBeTruthy()
    expect(localStorage.getItem('sconce:length-unit')).toBe('ft')
  })
})
