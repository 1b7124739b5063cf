import type { PieceCosts } from '#shared/api/private.ts'
import { useShoot } from '#src/realtime/shoot-realtime.tsx'
import { Field } from '#src/ui/field.tsx'
import { NumberInput } from '#src/ui/number-input.tsx'
import { Select } from '#src/ui/select.tsx'
import { useSavePieceCost } from '../mutations.ts'
import { currencyDigits } from '../words.ts'
import { PanelSection } from '#src/ui/panel.tsx'
import { TextLine } from '#src/ui/text-line.tsx'

const CURRENCIES = ['GBP', 'EUR', 'USD', 'CHF', 'SEK', 'NOK', 'DKK', 'CAD', 'AUD', 'JPY'] as const

export type PieceCostProps = { pieceId: string; costs: PieceCosts }

/** Cost, deposit and size: for photographer and stylist alone. */
export function PieceCost({ pieceId, costs }: PieceCostProps) {
  const shoot = useShoot()
  const save = useSavePieceCost(shoot.id)
  const own = costs.pieces.find((one) => one.pieceId === pieceId)
  const { cost = null, deposit = null, size = '' } = own ?? {}
  const currency = cost?.currency ?? deposit?.currency ?? costs.pieces.find((one) => one.cost)?.cost?.currency ?? 'GBP'
  const digits = currencyDigits(currency)
  const toMoney = (amount: number | null, code = currency) =>
    amount === null ? null : { minor: Math.round(amount * 10 ** currencyDigits(code)), currency: code }
  const amountOf = (money: typeof cost) => (money === null ? null : money.minor / 10 ** digits)
  const give = (change: { cost?: typeof cost; deposit?: typeof cost; size?: string }) =>
    save.mutate({ pieceId, cost, deposit, size, ...change })
  return (
    <PanelSection title="For photographer and stylist only">
      <div className="grid grid-cols-[1fr_1fr_5.5rem] gap-3">
        <Field label="Cost">
          <NumberInput
            allowEmpty
            min={0}
            max={1e7}
            decimals={digits}
            value={amountOf(cost)}
            onChange={(amount) => give({ cost: toMoney(amount) })}
          />
        </Field>
        <Field label="Deposit">
          <NumberInput
            allowEmpty
            min={0}
            max={1e7}
            decimals={digits}
            value={amountOf(deposit)}
            onChange={(amount) => give({ deposit: toMoney(amount) })}
          />
        </Field>
        <Field label="Currency">
          <Select
            value={currency}
            options={[...new Set([currency, ...CURRENCIES])].map((code) => ({ value: code, label: code }))}
            onChange={(code) =>
              give({ cost: toMoney(amountOf(cost), code), deposit: toMoney(amountOf(deposit), code) })
            }
          />
        </Field>
      </div>
      <TextLine label="Size" value={size} maxLength={40} onChange={(next) => give({ size: next })} />
    </PanelSection>
  )
}
