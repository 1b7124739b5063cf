import { Tabs as Base } from 'radix-ui'
import type { ReactNode } from 'react'

export type Tab<Value extends string> = { value: Value; label: ReactNode; content: ReactNode }

export type TabsProps<Value extends string> = {
  label: string
  tabs: readonly Tab<Value>[]
  value: Value
  onChange: (value: Value) => void
}

export function Tabs<Value extends string>({ label, tabs, value, onChange }: TabsProps<Value>) {
  return (
    <Base.Root
      value={value}
      onValueChange={(next) => {
        const tab = tabs.find((candidate) => candidate.value === next)
        if (tab) onChange(tab.value)
      }}
    >
      <Base.List aria-label={label} className="flex gap-5 overflow-x-auto border-b border-hair">
        {tabs.map((tab) => (
          <Base.Trigger
            key={tab.value}
            value={tab.value}
            className="-mb-px border-b-2 border-transparent px-0.5 pt-1.5 pb-2 text-base font-semibold whitespace-nowrap text-ink-soft hover:text-ink data-[state=active]:border-velvet data-[state=active]:text-ink max-md:min-h-11 max-md:min-w-11"
          >
            {tab.label}
          </Base.Trigger>
        ))}
      </Base.List>
      {tabs.map((tab) => (
        <Base.Content key={tab.value} value={tab.value} className="pt-4 outline-none">
          {tab.content}
        </Base.Content>
      ))}
    </Base.Root>
  )
}
