/** Box of every control one types or chooses in. */
export const CONTROL =
  'w-full min-w-0 rounded-r border border-edge bg-white px-2.5 py-[7px] text-base text-ink max-md:min-h-11 max-md:text-[1rem] ' +
  'hover:border-ink-soft aria-invalid:border-velvet aria-invalid:bg-velvet-wash/40 ' +
  '[&[readonly]]:border-hair [&[readonly]]:bg-transparent disabled:border-hair disabled:bg-ground disabled:text-ink-soft'
