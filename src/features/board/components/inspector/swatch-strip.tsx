export function SwatchStrip({ colours, label }: { colours: readonly string[]; label: string }) {
  return (
    <div role="img" aria-label={`${label}: ${colours.join(', ')}`} className="flex h-[26px]">
      {colours.map((colour, index) => (
        <i key={index} className="flex-1" style={{ background: colour }} />
      ))}
    </div>
  )
}
