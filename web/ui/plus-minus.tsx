/** The ± of a figure in its straw cell; hatched while a doubt stands on it. */
export function PlusMinus({ U, firm = true }: { U: string | null; firm?: boolean }) {
  if (U === null) return null
  return (
    <span
      className={`figures inline-block border border-ink/0 px-0.5 whitespace-nowrap text-ink ${firm ? 'bg-straw' : 'hatch-straw'}`}
    >
      <span className={firm ? '' : 'bg-straw-pale px-0.5'}>± {U}</span>
    </span>
  )
}
