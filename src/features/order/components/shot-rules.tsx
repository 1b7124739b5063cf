import { X } from 'lucide-react'
import { useState } from 'react'
import type { BrokenRule } from '#shared/domain/order/rules.ts'
import type { Plan, PlannedShot } from '#shared/domain/plan/read-plan.ts'
import { Button, IconButton } from '#src/ui/button.tsx'
import type { OrderWriter } from '../use-order-writer.ts'
import { ruleSentence, shotsOfRule } from '../words.ts'
import { RuleForm } from './rule-form.tsx'

export type ShotRulesProps = {
  planned: PlannedShot
  plan: Plan
  writer: OrderWriter
  broken: readonly BrokenRule[]
  index: number
  startMin: number
}

/** The rules that hold for one shot, each in a sentence, and how to add one. */
export function ShotRules({ planned, plan, writer, broken, index, startMin }: ShotRulesProps) {
  const [isAdding, setIsAdding] = useState(false)
  const shotId = planned.shot.id
  const rules = plan.rules.filter(({ rule }) => shotsOfRule(rule).includes(shotId))
  return (
    <>
      {rules.length === 0 && !isAdding && <p className="text-sm text-ink-soft">None: this shot may stand anywhere.</p>}
      {rules.length > 0 && (
        <ul>
          {rules.map(({ id, rule }) => {
            const breach = broken.find(({ key }) => key === `rule:${id}`)
            const sentence = ruleSentence(rule, plan, shotId)
            return (
              <li
                key={id}
                className="flex items-start gap-2 border-t border-hair-soft py-1.5 text-base first:border-t-0 first:pt-0"
              >
                <span className="min-w-0 flex-1">
                  {sentence}
                  {breach && <span className="block text-xs font-semibold text-glow-ink">{breach.words}</span>}
                </span>
                {writer.mayPlan && (
                  <IconButton
                    label={`Remove the rule: ${sentence}`}
                    className="-my-1.5 size-8 max-md:size-11"
                    onClick={() => writer.removeRule(id)}
                  >
                    <X size={15} aria-hidden />
                  </IconButton>
                )}
              </li>
            )
          })}
        </ul>
      )}
      {isAdding ? (
        <RuleForm
          planned={planned}
          plan={plan}
          index={index}
          startMin={startMin}
          onCancel={() => setIsAdding(false)}
          onAdd={(rule) => {
            writer.addRule(rule)
            setIsAdding(false)
          }}
        />
      ) : (
        writer.mayPlan && (
          <Button size="small" className="self-start" onClick={() => setIsAdding(true)}>
            Add a rule
          </Button>
        )
      )}
    </>
  )
}
