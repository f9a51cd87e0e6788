import type { ResultValue } from '../../../../shared/schemas/record.ts'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { PlusMinus } from '../../../ui/plus-minus.tsx'

/** A figure with its ± in the straw cell; without a figure, why. */
export function Figure({ result, shown = true }: { result: ResultValue | undefined; shown?: boolean }) {
  if (!result) return <span className="text-graphite">–</span>
  if (result.value === null) {
    return (
      <span className="font-sans font-normal text-graphite" title={result.reason?.text}>
        {shown ? 'none' : (result.reason?.text ?? 'none')}
      </span>
    )
  }
  const { value, U } = roundByUncertainty(result.value, result.U)
  return (
    <span className="inline-flex items-baseline justify-end gap-1 whitespace-nowrap">
      <span>{value}</span>
      <PlusMinus U={U} />
    </span>
  )
}
