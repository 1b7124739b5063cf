import { Caution } from './caution.tsx'

export type FormErrorProps = { children: string | null }

/** Why a form was not taken: said aloud when it appears. */
export function FormError({ children }: FormErrorProps) {
  return <div role="alert">{children !== null && <Caution tone="velvet">{children}</Caution>}</div>
}
