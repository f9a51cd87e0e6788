import type { ReactNode } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { Ink } from '../../../ui/ink.tsx'
import { PlusMinus } from '../../../ui/plus-minus.tsx'
import { pictureOf, repeatsOf, type Sources } from '../record-model.ts'

/** The figure the run was made for, set as the sum it is: the ink over the plot it was burned on. */
export function Headline({ sources }: { sources: Sources }) {
  const result = sources.record.results.l_per_ha
  if (!result) return null
  if (result.value === null) {
    return (
      <div className="px-margin py-4">
        <p className="text-5 leading-[39px] font-[760]">No litres a hectare.</p>
        <p className="mt-1 max-w-[640px] text-2 leading-[27px]">{result.reason?.text}</p>
      </div>
    )
  }
  const { value, U } = roundByUncertainty(result.value, result.U)
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-3 px-margin py-3">
      <div>
        <p className="text-8 leading-[108px] font-[800] tracking-tight max-sm:text-7 max-sm:leading-[66px]">{value}</p>
        <p className="flex items-baseline gap-1 text-2">
          <PlusMinus U={U} /> litres a hectare <span className="label">k = {result.k}: about 95 in 100</span>
        </p>
      </div>
      <span aria-hidden="true" className="text-6 font-[300] max-sm:hidden">
        =
      </span>
      <FuelOverArea sources={sources} />
    </div>
  )
}

function FuelOverArea({ sources }: { sources: Sources }) {
  const topups = repeatsOf(sources, 'topup_ml').map((r) => r.key)
  const sides = ['side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m', 'diag_ac_m'].filter((k) =>
    (sources.record.results.area_m2?.from ?? []).includes(k),
  )
  const area = sources.record.results.area_ha
  const fuel = sources.record.results.fuel_ml
  return (
    <div className="min-w-0">
      <div className="flex flex-wrap items-end gap-2">
        <Term sources={sources} cell="jar_start_ml" />
        {topups.map((key) => (
          <Signed key={key} sign="+">
            <Term sources={sources} cell={key} />
          </Signed>
        ))}
        <Signed sign="–">
          <Term sources={sources} cell="jar_end_ml" />
        </Signed>
        <span className="figures pb-0.5">= {fuel?.value ?? '–'} mL</span>
      </div>
      <div className="my-1 border-t-2 border-ink" />
      <div className="flex flex-wrap items-end gap-2">
        {sides.map((key, i) =>
          i === 0 ? (
            <Term key={key} sources={sources} cell={key} />
          ) : (
            <Signed key={key} sign={sides.length === 2 ? '×' : ','}>
              <Term sources={sources} cell={key} />
            </Signed>
          ),
        )}
        <span className="figures pb-0.5">= {area?.value === null || area === undefined ? '–' : area.value.toFixed(4)} ha</span>
      </div>
    </div>
  )
}

const Signed = ({ sign, children }: { sign: string; children: ReactNode }) => (
  <span className="flex items-end gap-2">
    <span className="pb-3 text-4" aria-hidden="true">
      {sign}
    </span>
    {children}
  </span>
)

/** A term of the sum: the ink with the value and its name under it. */
function Term({ sources, cell: key }: { sources: Sources; cell: string }) {
  const cell = sources.cells.get(key)
  const reading = sources.readings.get(key)
  if (!cell || !reading) return null
  const picture = pictureOf(sources, key)
  return (
    <span className="inline-flex flex-col">
      {picture && <Ink layout={sources.layout} cell={cell} picture={picture} scale={3} />}
      <span className={`figures ${reading.origin === 'person' ? 'text-pen' : ''} ${picture ? '' : 'text-3'}`}>
        {formatValue(cell, reading.value)}
      </span>
      <span className="label">{cell.label}</span>
    </span>
  )
}
