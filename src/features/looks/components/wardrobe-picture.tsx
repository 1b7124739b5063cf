import { useLocalPicture } from '#src/realtime/outbox/use-outbox.ts'
import { Picture, type PictureProps } from '#src/ui/picture.tsx'

/** A picture of a look, from this device while the server has not got it. */
export function WardrobePicture(props: Omit<PictureProps, 'localUrl'>) {
  return <Picture {...props} localUrl={useLocalPicture(props.uploadId)} />
}
