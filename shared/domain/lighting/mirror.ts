import type { WholeSetup } from '#shared/domain/plan/read-plan.ts'
import type { Light, Point, Prop, SitterPlace } from './schema.ts'

/** The other sign, and 0 stays 0. */
function other(value: number): number {
  return value === 0 ? 0 : -value
}

function mirroredPoint([x, y, z]: Point): Point {
  return [other(x), y, z]
}

function mirroredLight(light: Light): Light {
  return { ...light, at: mirroredPoint(light.at), aim: mirroredPoint(light.aim) }
}

function mirroredPlace(place: SitterPlace): SitterPlace {
  return {
    ...place,
    at: [other(place.at[0]), place.at[1]],
    turnDeg: other(place.turnDeg),
    headTurnDeg: other(place.headTurnDeg),
  }
}

function mirroredProp(prop: Prop): Prop {
  return { ...prop, at: mirroredPoint(prop.at), turnDeg: other(prop.turnDeg) }
}

/**
 * A setup with left and right exchanged: camera, lights, sitters and props with their turns, walls. Ids, names and all
 * else stay. Mirrored twice it is as it was.
 */
export function mirrored(whole: WholeSetup): WholeSetup {
  const { setup } = whole
  const { camera, walled } = setup
  return {
    setup: {
      ...setup,
      camera: { ...camera, at: mirroredPoint(camera.at), aim: camera.aim && mirroredPoint(camera.aim) },
      walled: walled && { ...walled, leftM: walled.rightM, rightM: walled.leftM },
    },
    lights: whole.lights.map(mirroredLight),
    places: whole.places.map(mirroredPlace),
    props: whole.props.map(mirroredProp),
  }
}
