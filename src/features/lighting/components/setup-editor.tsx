import type { SetupReading } from '#shared/domain/lighting/readings.ts'
import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Room } from '#shared/domain/shoots/schema.ts'
import type { Kit } from '../use-kit.ts'
import type { SetupWriter } from '../use-setup-writer.ts'
import { BackgroundEditor } from './editors/background-editor.tsx'
import { CameraEditor } from './editors/camera-editor.tsx'
import { LightEditor } from './editors/light-editor.tsx'
import { PlaceEditor, type SitterChoice } from './editors/place-editor.tsx'
import { PropEditor } from './editors/prop-editor.tsx'

type SetupEditorProps = {
  chosenKey: string
  whole: WholeSetup
  reading: SetupReading
  kit: Kit
  writer: SetupWriter
  sitters: readonly SitterChoice[]
  /** Rooms of the shots that use the setup. */
  rooms: readonly Room[]
  mayWrite: boolean
  onChoose: (key: string | null) => void
  /** Whether the way back to the readings is shown here. */
  withBack: boolean
}

/** Whether a key still names something of the setup. */
export function isPartOf(whole: WholeSetup, key: string): boolean {
  const own = key.replace(/:aim$/, '')
  return (
    key === `${whole.setup.id}:camera` ||
    key === `${whole.setup.id}:background` ||
    [...whole.lights, ...whole.places, ...whole.props].some((item) => item.id === own)
  )
}

/** The editor of what is chosen. */
export function SetupEditor({ chosenKey, onChoose, withBack, ...rest }: SetupEditorProps) {
  const { whole } = rest
  const onGone = () => onChoose(null)
  const common = { ...rest, onBack: withBack ? onGone : null }
  if (chosenKey === `${whole.setup.id}:camera`) return <CameraEditor {...common} />
  if (chosenKey === `${whole.setup.id}:background`) return <BackgroundEditor {...common} />
  const own = chosenKey.replace(/:aim$/, '')
  const light = whole.lights.find((candidate) => candidate.id === own)
  if (light) return <LightEditor key={light.id} {...common} light={light} onChoose={onChoose} onGone={onGone} />
  const place = whole.places.find((candidate) => candidate.id === own)
  if (place) return <PlaceEditor key={place.id} {...common} place={place} onGone={onGone} />
  const prop = whole.props.find((candidate) => candidate.id === own)
  if (prop) return <PropEditor key={prop.id} {...common} prop={prop} onGone={onGone} />
  return null
}
