import { type ChangeEvent, type RefObject, useRef } from 'react'
import type { AddPictures } from '../use-add-pictures.ts'

export type PictureInputs = { files: RefObject<HTMLInputElement | null>; camera: RefObject<HTMLInputElement | null> }

export function usePictureInputs(): PictureInputs {
  const files = useRef<HTMLInputElement>(null)
  const camera = useRef<HTMLInputElement>(null)
  return { files, camera }
}

/** The hidden file fields that "Add pictures" and "Pin from camera" open. */
export function PictureInputFields({ files, camera, onAdd }: PictureInputs & { onAdd: AddPictures }) {
  const handle = (fromCamera: boolean) => (event: ChangeEvent<HTMLInputElement>) => {
    const chosen = [...(event.target.files ?? [])]
    // The same file may be chosen again.
    event.target.value = ''
    void onAdd(chosen, { fromCamera })
  }
  return (
    <>
      <input
        ref={files}
        type="file"
        accept="image/*"
        multiple
        hidden
        aria-label="Pictures to add"
        data-testid="add-pictures"
        onChange={handle(false)}
      />
      <input
        ref={camera}
        type="file"
        accept="image/*"
        capture="environment"
        hidden
        aria-label="Picture from the camera"
        onChange={handle(true)}
      />
    </>
  )
}
