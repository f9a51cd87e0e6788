import type { ResultValue } from '../../../../shared/schemas/record.ts'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'

const reasonOf = (result: ResultValue) => result.reason?.text ?? 'no reason was kept'

/** A figure with its ± in the straw cell; without a figure, why. `main` is the figure the run was made for. */
export function Figure({ result, main = false }: { result: ResultValue | undefined; main?: boolean }) {
  if (!result) return <span className="text-graphite">–</span>
  if (result.value === null) {
    return (
      <span className="font-sans font-normal text-graphite">
        {main ? <span className="inline-block max-w-[150px] whitespace-normal">none: {reasonOf(result)}</span> : 'none'}
      </span>
    )
  }
  const { value, U } = roundByUncertainty(result.value, result.U)
  return (
    <span className="inline-flex items-baseline justify-end gap-1 whitespace-nowrap">
      <span>{value}</span>
      <span className={`inline-block w-[76px] px-0.5 text-left ${main ? 'bg-straw' : 'bg-straw-pale'}`}>{U && `± ${U}`}</span>
    </span>
  )
}
