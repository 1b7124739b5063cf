import { loadKgOf } from '#shared/domain/lighting/boom.ts'
import { sightsOf } from '#shared/domain/lighting/in-frame.ts'
import { LONG_LOAD_SHARE, type MainsLoad } from '#shared/domain/lighting/mains.ts'
import type { Supply } from '#shared/domain/lighting/power.ts'
import {
  counterweightWords,
  depthLabel,
  frameWords,
  popsWords,
  sightWords,
  sizeLabel,
  syncWords,
} from '#shared/domain/lighting/reading-words.ts'
import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import { type Light, isLamp } from '#shared/domain/lighting/schema.ts'
import type { SetupUse } from '#shared/domain/lighting/setup-use.ts'
import { shutterLabel } from '#shared/domain/lighting/stops.ts'
import type { Sync } from '#shared/domain/lighting/sync.ts'
import { fNumberLabel, inSentence, powerLabel } from '#shared/domain/lighting/words.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import { lightNames } from '#shared/domain/recipes/sheet.ts'
import { lengthLabel, useLengthUnit } from '#src/lib/length-unit.ts'
import { type InputRow, Workings, stated } from './how.tsx'
import { Group, Line, type OpenGroups } from './lines.tsx'

type KitGroupsProps = {
  whole: WholeSetup
  reading: SetupReading
  use: Pick<SetupUse, 'orientations' | 'frames'>
  nameOfPlace: (placeId: string) => string
  groups: OpenGroups
}

/** What the lens sees, what the units can, and what carries them. */
export function KitGroups({ whole, reading, use, nameOfPlace, groups }: KitGroupsProps) {
  const { supplies, booms, mains } = reading
  const crop = reading.framing[0]?.crop
  const slowest = Math.max(0, ...supplies.map(({ recycleS }) => recycleS))
  const carried = whole.lights.some((light) => light.support !== null)
  return (
    <>
      <Group title="Lens and frame" sum={crop} groups={groups}>
        <LensLines whole={whole} reading={reading} use={use} nameOfPlace={nameOfPlace} />
      </Group>
      {supplies.length > 0 && (
        <Group title="Pops and recycling" sum={`ready in ${slowest.toFixed(1)} s`} groups={groups}>
          {supplies.map((supply) => (
            <SupplyLine key={supply.lightId} whole={whole} supply={supply} frames={use.frames} />
          ))}
        </Group>
      )}
      {(carried || mains) && (
        <Group
          title="Stands, booms and mains"
          sum={mains ? `${Math.round(mains.watts)} W` : booms.length > 0 ? 'a boom to balance' : undefined}
          groups={groups}
        >
          <SupportLines whole={whole} reading={reading} />
          {mains && <MainsLine whole={whole} mains={mains} />}
        </Group>
      )}
    </>
  )
}

function LensLines({ whole, reading, use, nameOfPlace }: Omit<KitGroupsProps, 'groups'>) {
  const unit = useLengthUnit()
  const { camera } = whole.setup
  const { depth, framing, sync } = reading
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  return (
    <>
      {framing.map((frame) => (
        <Line
          key={frame.orientation}
          label={frameWords(frame.orientation)}
          value={sizeLabel(frame.widthM, frame.heightM, unit)}
          words={frame.words}
        >
          <Workings
            formula="d · h / f"
            inputs={[
              ['Lens, f', `${camera.focalMm} mm`],
              ['To the sitter along its axis, d', exact(frame.distanceM)],
              ['Edges above the floor there', `${exact(frame.bottomM)} and ${exact(frame.topM)}`],
            ]}
            note="36 × 24 mm. Names of crops by shares of body height (assumed)."
          />
        </Line>
      ))}
      <Line
        label="In focus"
        value={
          depth.farM === null ? `${lengthLabel(depth.nearM, unit)} on` : depthLabel(depth.farM - depth.nearM, unit)
        }
        words={
          depth.farM === null
            ? 'from there to infinity'
            : `${exact(depth.nearM)} to ${exact(depth.farM)} from the camera, focused on the eyes`
        }
      >
        <Workings
          formula="H = f²/(N·c) + f"
          inputs={[
            ['Lens', `${camera.focalMm} mm, ${fNumberLabel(camera.fNumber)}`],
            ['Camera to the eyes', exact(reading.cameraToSitterM)],
            ['Hyperfocal, H', exact(depth.hyperfocalM)],
          ]}
          note="Circle of confusion 0.030 mm on 36 × 24 mm. Near s(H − f)/(H + s − 2f), far s(H − f)/(H − s)."
        />
      </Line>
      {framing.map((frame) =>
        frame.sitters.map((sitter) => (
          <Line
            key={`${frame.orientation}:${sitter.placeId}`}
            label={
              framing.length > 1 ? `${nameOfPlace(sitter.placeId)}, ${frame.orientation}` : nameOfPlace(sitter.placeId)
            }
            value={exact(Math.min(sitter.leftM, sitter.rightM, sitter.topM)).replace('-', '−')}
            words={sitter.words}
          >
            <Workings
              formula="projected through the camera"
              inputs={[
                ['Free at the left', exact(sitter.leftM).replace('-', '−')],
                ['Free at the right', exact(sitter.rightM).replace('-', '−')],
                ['Free above', exact(sitter.topM).replace('-', '−')],
              ]}
              note="At the sitter’s own depth; below zero is cut. Width of a body is assumed."
            />
          </Line>
        )),
      )}
      <SightLines whole={whole} use={use} />
      {sync && <SyncLine sync={sync} />}
    </>
  )
}

function SightLines({ whole, use }: Pick<KitGroupsProps, 'whole' | 'use'>) {
  const unit = useLengthUnit()
  return sightsOf(whole, use.orientations).map(({ id, name, clearance }) => {
    const { marginM } = clearance
    return (
      <Line
        key={id}
        label={`${name.charAt(0).toUpperCase()}${name.slice(1)}`}
        value={lengthLabel(Math.abs(marginM), unit, true)}
        words={sightWords(clearance)}
        tone={marginM < 0 ? 'velvet' : 'ink'}
      >
        <Workings
          formula="corners projected through the camera"
          inputs={[['Margin at its own depth', lengthLabel(marginM, unit, true).replace('-', '−')]]}
          note="Head, stand, boom or panel, whichever comes nearest, over all orientations of the shots. Depth of a head and turn of a boom are assumed."
        />
      </Line>
    )
  })
}

function SyncLine({ sync }: { sync: Sync }) {
  const limit = shutterLabel(sync.limitS)
  return (
    <Line
      label="Shutter against sync"
      value={shutterLabel(sync.shutterS)}
      words={syncWords(sync)}
      tone={sync.isTooFast ? 'velvet' : 'ink'}
    >
      <Workings
        formula="shutter ≥ sync"
        inputs={[
          ['Shutter', shutterLabel(sync.shutterS)],
          ['Sync', limit, sync.isAssumed ? 'assumed: put your camera’s own in' : 'put in at the camera'],
        ]}
        note={
          sync.units.length > 0 ? sync.units.join(' ') : 'Modes of faster sync take light away: see the maker’s tables.'
        }
      />
    </Line>
  )
}

function named(whole: WholeSetup, lightId: string): { light: Light | undefined; name: string } {
  const index = whole.lights.findIndex((light) => light.id === lightId)
  return { light: whole.lights[index], name: lightNames(whole.lights)[index] ?? 'Light' }
}

function SupplyLine({ whole, supply, frames }: { whole: WholeSetup; supply: Supply; frames: number | null }) {
  const { light, name } = named(whole, supply.lightId)
  if (!light || isLamp(light.unit.numbers)) return null
  const { numbers } = light.unit
  const { pops, popsPerCharge, charges } = supply
  const pace = `ready again in ${supply.recycleS.toFixed(1)} s`
  const isShort = charges !== null && charges > 1
  const inputs: InputRow[] = [
    ['Power', powerLabel(light.power)],
    ['Frames of its shots', frames ?? 'no shot yet'],
    ...(popsPerCharge === null
      ? []
      : [['Full pops in a charge', popsPerCharge, stated(numbers.fullPops)] satisfies InputRow]),
    ['Full recycle', `${numbers.fullRecycleS.value} s`, stated(numbers.fullRecycleS)],
  ]
  return (
    <Line
      label={name}
      value={pops === null ? `${supply.recycleS.toFixed(1)} s` : popsWords(pops, popsPerCharge)}
      words={
        pops === null
          ? `${pace}; no shot uses this setup yet`
          : `full pops for ${frames} frames; ${pace}${isShort ? `; ${Math.ceil(charges)} charges or sets` : ''}`
      }
      tone={isShort ? 'velvet' : 'ink'}
    >
      <Workings
        formula="pops = frames × power; recycle = full recycle × power"
        inputs={inputs}
        note="Recycling in step with power is an assumption; cells give less when old or cold."
      />
    </Line>
  )
}

function SupportLines({ whole, reading }: Pick<KitGroupsProps, 'whole' | 'reading'>) {
  const unit = useLengthUnit()
  const exact = (metres: number) => lengthLabel(metres, unit, true)
  return whole.lights.flatMap((light) => {
    const { name } = named(whole, light.id)
    if (!light.support) return []
    const { numbers } = light.support
    const boom = reading.booms.find(({ lightId }) => lightId === light.id)
    const loadKg = loadKgOf(light)
    const isOver = loadKg > numbers.maxLoadKg.value || light.at[1] > numbers.maxHeightM.value + 0.05
    const mass: InputRow[] = [
      [light.unit.name, `${light.unit.numbers.massKg.value} kg`, stated(light.unit.numbers.massKg)],
      ...(light.modifier
        ? [
            [
              light.modifier.name,
              `${light.modifier.numbers.massKg.value} kg`,
              stated(light.modifier.numbers.massKg),
            ] satisfies InputRow,
          ]
        : []),
    ]
    return [
      <Line
        key={light.id}
        label={`${name} on its ${inSentence(light.support.name)}`}
        value={`${loadKg.toFixed(1)} kg`}
        words={`of ${numbers.maxLoadKg.value} kg; ${lengthLabel(light.at[1], unit)} of ${lengthLabel(numbers.maxHeightM.value, unit)} up`}
        tone={isOver ? 'velvet' : 'ink'}
      >
        <Workings
          formula="head + modifier"
          inputs={[
            ...mass,
            ['It carries', `${numbers.maxLoadKg.value} kg`, stated(numbers.maxLoadKg)],
            ['It goes to', exact(numbers.maxHeightM.value), stated(numbers.maxHeightM)],
          ]}
          note="The maker’s limits decide."
        />
      </Line>,
      ...(boom
        ? [
            <Line
              key={`${light.id}:boom`}
              label={`Counterweight of the ${name.toLowerCase()}`}
              value={`${boom.counterweightKg.toFixed(1)} kg`}
              words={counterweightWords(boom)}
            >
              <Workings
                formula="W = (w·a + m(a − b)/2) / b"
                inputs={[
                  ['Head, w', `${boom.loadKg.toFixed(1)} kg`],
                  ['Head to pivot, a', exact(boom.reachM), fromOf(boom.assumed.includes('reachM'))],
                  [
                    'Pivot to counterweight, b',
                    exact(boom.counterReachM),
                    fromOf(boom.assumed.includes('counterReachM')),
                  ],
                  ['Arm, m', `${boom.armMassKg} kg`, fromOf(boom.assumed.includes('armMassKg'))],
                ]}
                note="The boom maker’s limits and the venue’s rules decide. Bag the base too; nobody sits under it."
              />
            </Line>,
          ]
        : []),
    ]
  })
}

const fromOf = (isAssumed: boolean) => (isAssumed ? 'assumed' : 'the boom’s own')

function MainsLine({ whole, mains }: { whole: WholeSetup; mains: MainsLoad }) {
  const { circuit } = mains
  const isOver = circuit !== null && mains.watts > circuit.watts
  return (
    <Line
      label="On the mains"
      value={`${Math.round(mains.watts)} W`}
      words={
        circuit
          ? `${circuit.drawnA.toFixed(1)} A of ${circuit.amps} A; plan on ${Math.round(circuit.longWatts)} W for three hours or more`
          : 'Circuit not known: put in its voltage and rating at the background.'
      }
      tone={isOver ? 'velvet' : 'ink'}
    >
      <Workings
        formula="I = W / V"
        inputs={[
          ...mains.lights.map(({ lightId, watts }): InputRow => {
            const { light, name } = named(whole, lightId)
            const numbers = light?.unit.numbers
            const from = numbers && (isLamp(numbers) ? numbers.watts : numbers.mainsWatts)
            return [name, `${Math.round(watts)} W`, from ? stated(from) : undefined]
          }),
          ...(circuit
            ? ([
                ['Circuit', `${circuit.volts} V × ${circuit.amps} A`],
                ['For three hours or more', `${LONG_LOAD_SHARE * 100} %`, 'NEC 210.20(A); local code prevails'],
              ] satisfies InputRow[])
            : []),
        ]}
        note="All at full power, dimmed or not. A licensed electrician and the venue decide; this is no permit."
      />
    </Line>
  )
}
