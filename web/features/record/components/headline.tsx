import type { ReactNode } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { Ink } from '../../../ui/ink.tsx'
import { PlusMinus } from '../../../ui/plus-minus.tsx'
import { mainFigureOf, pictureOf, repeatsOf, type Sources } from '../record-model.ts'
import { PlotFigure } from './plot-figure.tsx'

/** The figure the run was made for, set as the sum it is: the ink over the plot it was burned on. */
export function Headline({ sources }: { sources: Sources }) {
  const result = mainFigureOf(sources.record)
  if (!result) return null
  const hectares = result.key === 'l_per_ha'
  if (result.value === null) {
    return (
      <div className="px-margin py-3">
        <p className="text-6 leading-[48px] font-[760] max-sm:text-5 max-sm:leading-[36px]">
          No litres {hectares ? 'a hectare' : 'an hour'}
        </p>
        <p className="mt-1 max-w-[640px] border-l-[3px] border-ink pl-2 text-2 leading-[27px]">{result.reason?.text}</p>
        <p className="label pt-1">The other figures stand; each says below what it was computed from.</p>
      </div>
    )
  }
  const { value, U } = roundByUncertainty(result.value, result.U)
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2 px-margin py-2">
      <div className="shrink-0">
        <p className="text-8 leading-[114px] font-[800] tracking-tight max-sm:text-7 max-sm:leading-[72px]">{value}</p>
        <p className="flex items-center gap-1.5 text-2">
          <span className="text-4 leading-[36px]">
            <PlusMinus U={U} />
          </span>
          <span className="leading-[21px]">
            litres {hectares ? 'a hectare' : 'an hour'}
            <span className="label block leading-[18px]">k = {result.k}: about 95 in 100</span>
          </span>
        </p>
      </div>
      {hectares && (
        <>
          <span aria-hidden="true" className="text-6 font-[300] max-lg:hidden">
            =
          </span>
          <FuelOverArea sources={sources} />
          <span className="text-3 font-[650] whitespace-nowrap max-lg:hidden">
            × 10<span className="label block font-normal">mL/m² to L/ha</span>
          </span>
        </>
      )}
    </div>
  )
}

function FuelOverArea({ sources }: { sources: Sources }) {
  const topups = repeatsOf(sources, 'topup_ml').map((r) => r.key)
  const { area_m2: area, fuel_ml: fuel } = sources.record.results
  return (
    <div className="min-w-0 max-sm:w-full">
      <div className="flex flex-wrap items-start gap-x-2 gap-y-1">
        <Term sources={sources} cell="jar_start_ml" />
        {topups.map((key) => (
          <Signed key={key} sign="+">
            <Term sources={sources} cell={key} />
          </Signed>
        ))}
        <Signed sign="−">
          <Term sources={sources} cell="jar_end_ml" />
        </Signed>
        <Total value={fuel?.value ?? null} unit="mL" />
      </div>
      <div className="my-1.5 border-t-2 border-ink" />
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <Area sources={sources} />
        <Total value={area?.value ?? null} unit="m²" />
        <PlotFigure sources={sources} />
      </div>
    </div>
  )
}

/** The plot as its shape is computed: length times breadth, or two triangles on the diagonal A–C. */
function Area({ sources }: { sources: Sources }) {
  const from = sources.record.results.area_m2?.from ?? []
  const term = (key: string) => <Term key={key} sources={sources} cell={key} small />
  if (from.includes('diag_ac_m')) {
    return (
      <div className="flex flex-wrap items-start gap-x-2 gap-y-1">
        <Triangle>{['side_ab_m', 'side_bc_m', 'diag_ac_m'].map(term)}</Triangle>
        <Signed sign="+">
          <Triangle>{['side_cd_m', 'side_da_m', 'diag_ac_m'].map(term)}</Triangle>
        </Signed>
      </div>
    )
  }
  const [first, ...others] = from.filter((key) => sources.cells.has(key))
  return (
    <div className="flex flex-wrap items-start gap-x-2 gap-y-1">
      {first && term(first)}
      {others.map((key) => (
        <Signed key={key} sign="×">
          {term(key)}
        </Signed>
      ))}
    </div>
  )
}

const Triangle = ({ children }: { children: ReactNode }) => (
  <span className="flex flex-wrap items-start gap-x-1.5">
    <span className="label max-sm:w-full">triangle</span>
    {children}
  </span>
)

const Signed = ({ sign, children }: { sign: string; children: ReactNode }) => (
  <span className="flex items-start gap-2">
    <span className="text-3 leading-[27px]">{sign}</span>
    {children}
  </span>
)

const Total = ({ value, unit }: { value: number | null; unit: string }) => (
  <span className="figures whitespace-nowrap">
    = {value === null ? '–' : Number(value.toFixed(1))} <span className="font-sans font-normal text-graphite">{unit}</span>
  </span>
)

/** A term of the sum: the ink with the value and its name under it; struck through what a person changed. */
function Term({ sources, cell: key, small = false }: { sources: Sources; cell: string; small?: boolean }) {
  const cell = sources.cells.get(key)
  const reading = sources.readings.get(key)
  if (!cell || !reading) return null
  const picture = pictureOf(sources, key)
  const corrected = reading.settlement === 'corrected'
  const byHand = corrected || reading.origin === 'person'
  return (
    <span className="inline-flex flex-col">
      {picture && <Ink layout={sources.layout} cell={cell} picture={picture} scale={small ? 2.6 : 3.2} />}
      <span className={`figures ${picture || small ? 'text-0' : 'text-3'}`}>
        {corrected && <s className="mr-1 font-normal text-graphite">{formatValue(cell, reading.readValue)}</s>}
        <span className={byHand ? 'text-pen' : ''}>{formatValue(cell, reading.value)}</span>
      </span>
      <span className={`label leading-[18px] ${byHand ? 'text-pen' : ''}`}>
        {cell.label}
        {corrected ? ', corrected' : ''}
      </span>
    </span>
  )
}
