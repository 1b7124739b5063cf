import { Link } from 'react-router-dom'
import { LettersScreen } from '#src/features/mail/components/letters-screen.tsx'
import { Mark } from '#src/ui/mark.tsx'

export function Component() {
  return (
    <div className="min-h-dvh">
      <title>Letters · Sconce</title>
      <header className="flex flex-wrap items-center gap-x-3.5 gap-y-1 border-b border-hair bg-paper px-5 py-4 md:px-10">
        <Mark tone="paper" />
        <h1 className="text-2xl">Letters</h1>
        <span className="text-xs text-ink-soft">Kept on this machine, because no mail server is set</span>
        <Link to="/" className="ml-auto py-3 text-sm font-semibold text-velvet underline underline-offset-2">
          Go to your shoots
        </Link>
      </header>
      <main className="px-4 py-5 md:px-10">
        <LettersScreen />
      </main>
    </div>
  )
}
