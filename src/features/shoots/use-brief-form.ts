import { useCallback, useEffect, useRef, useState } from 'react'
import { useForm } from 'react-hook-form'
import type { Brief } from '#shared/domain/shoots/schema.ts'
import { type Draft, keepDraft, readDraft } from '#src/lib/drafts.ts'
import { BRIEF_FIELDS, type BriefField, type BriefValues, changeOf, problemOf, toValues } from './brief-fields.ts'
import { useChangeBrief } from './mutations.ts'

export type FieldState = { kind: 'quiet' } | { kind: 'saving' } | { kind: 'saved' } | { kind: 'failed'; why: string }

const QUIET: FieldState = { kind: 'quiet' }

/**
 * The brief's fields, each saved by itself when it is left. What the server has not taken stays in the field, is kept on
 * this device, and is sent again when the signal is back.
 */
export function useBriefForm(brief: Brief, shootId: string, userId: string) {
  const place = `brief:${shootId}`
  const [draft, setDraft] = useState<Draft>(() => readDraft(userId, place))
  const [states, setStates] = useState<Partial<Record<BriefField, FieldState>>>({})
  const form = useForm<BriefValues>({ defaultValues: { ...toValues(brief), ...draft } })
  const change = useChangeBrief(shootId)
  const { getValues, setValue } = form

  const shown = useRef(toValues(brief))
  // What others change appears at once, except in a field that holds something of one's own.
  useEffect(() => {
    const next = toValues(brief)
    for (const field of BRIEF_FIELDS) {
      if (getValues(field) === shown.current[field] && next[field] !== shown.current[field])
        setValue(field, next[field])
    }
    shown.current = next
  }, [brief, getValues, setValue])

  const setState = useCallback(
    (field: BriefField, state: FieldState) => setStates((before) => ({ ...before, [field]: state })),
    [],
  )

  const keep = useCallback(
    (field: BriefField, value: string | null) =>
      setDraft((before) => {
        const { [field]: _taken, ...others } = before
        const next = value === null ? others : { ...others, [field]: value }
        keepDraft(userId, place, next)
        return next
      }),
    [userId, place],
  )

  const save = (field: BriefField) => {
    const value = getValues(field)
    if (value === toValues(brief)[field]) {
      setState(field, QUIET)
      keep(field, null)
      return
    }
    const problem = problemOf(field, value)
    if (problem !== null) {
      setState(field, { kind: 'failed', why: problem })
      return
    }
    setState(field, { kind: 'saving' })
    change.mutate(changeOf(field, value, brief), {
      onSuccess: () => {
        setState(field, { kind: 'saved' })
        keep(field, null)
      },
      onError: (error) => {
        setState(field, { kind: 'failed', why: error.message })
        keep(field, value)
      },
    })
  }

  const saveDraft = useRef(() => undefined as void)
  useEffect(() => {
    saveDraft.current = () => {
      for (const field of BRIEF_FIELDS) if (draft[field] !== undefined) save(field)
    }
  })
  useEffect(() => {
    const handleOnline = () => saveDraft.current()
    handleOnline()
    window.addEventListener('online', handleOnline)
    return () => window.removeEventListener('online', handleOnline)
  }, [])

  return { form, save, stateOf: (field: BriefField): FieldState => states[field] ?? QUIET, change }
}

export type BriefForm = ReturnType<typeof useBriefForm>
