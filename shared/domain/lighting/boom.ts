import { counterweightKg } from './power.ts'
import { type Light } from './schema.ts'

/** Arm, counterweight arm and arm mass of a boom whose own are not known (assumptions). */
const ASSUMED = { reachM: 1.5, counterReachM: 0.5, armMassKg: 1 }
/** Bags of sand or shot that crews carry, kg (common practice, no source). */
const BAGS_KG = [10, 5] as const

export type BoomBalance = {
  loadKg: number
  /** Head to pivot, pivot to counterweight, mass of the arm. */
  reachM: number
  counterReachM: number
  armMassKg: number
  /** Which of the three are taken, not known. */
  assumed: (keyof typeof ASSUMED)[]
  /** What balances it at the counterweight's place, kg; 0 where the arm itself is enough. */
  counterweightKg: number
  /** The least bags of 5 and 10 kg that are not lighter: "a 10 kg and a 5 kg bag". */
  bags: string
}

/** What hangs on a light's support: head and modifier, kg. */
export function loadKgOf(light: Light): number {
  return light.unit.numbers.massKg.value + (light.modifier?.numbers.massKg.value ?? 0)
}

/** The least bags of 5 and 10 kg that are not lighter than a weight in kg: "two 10 kg bags", "no bag". */
export function bagWords(kg: number): string {
  const fives = Math.ceil(Math.max(0, kg) / 5 - 1e-9)
  const counts = [Math.floor(fives / 2), fives % 2] as const
  const words = counts.flatMap((count, index) => {
    const size = `${BAGS_KG[index] ?? 5} kg`
    if (count === 0) return []
    return [count === 1 ? `a ${size}` : `${COUNTS[count] ?? count} ${size}`]
  })
  if (words.length === 0) return 'no bag'
  return `${words.join(' and ')} ${counts[1] === 0 && counts[0] > 1 ? 'bags' : 'bag'}`
}
const COUNTS: Readonly<Record<number, string>> = { 2: 'two', 3: 'three', 4: 'four', 5: 'five', 6: 'six' }

/** How the boom of a light balances, by the law of the lever; null when it hangs on none. The maker's limits decide. */
export function boomBalanceOf(light: Light): BoomBalance | null {
  const numbers = light.support?.numbers
  if (numbers?.kind !== 'boom') return null
  const assumed: BoomBalance['assumed'] = []
  const own = (key: keyof typeof ASSUMED) => {
    const value = numbers[key]?.value
    if (value !== undefined && Number.isFinite(value) && (value > 0 || (key === 'armMassKg' && value === 0)))
      return value
    assumed.push(key)
    return ASSUMED[key]
  }
  const [reachM, counterReachM, armMassKg] = [own('reachM'), own('counterReachM'), own('armMassKg')]
  const loadKg = loadKgOf(light)
  const weightKg = Math.max(0, counterweightKg(loadKg, reachM, counterReachM, armMassKg))
  return { loadKg, reachM, counterReachM, armMassKg, assumed, counterweightKg: weightKg, bags: bagWords(weightKg) }
}
