import type { ResultValue } from '../../../../shared/schemas/record.ts'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { RESULT_KEYS } from '../../../../shared/trial/result.ts'
import { counted } from '../../../lib/words.ts'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { PlusMinus } from '../../../ui/plus-minus.tsx'
import type { Sources } from '../record-model.ts'
import { Source } from './source.tsx'

/** Every figure of the run with its ±, its formula and the readings it leads back to. */
export function FiguresTable({ sources }: { sources: Sources }) {
  const results = RESULT_KEYS.flatMap((key) => sources.record.results[key] ?? [])
  const missing = results.filter((r) => r.value === null)
  const columns: LedgerColumn<ResultValue>[] = [
    { key: 'figure', head: 'figure', tight: true, cell: (r) => <strong>{r.label}</strong> },
    { key: 'value', head: 'value', figures: true, cell: (r) => roundByUncertainty(r.value ?? 0, r.U).value },
    {
      key: 'U',
      head: '±',
      tight: true,
      cell: (r) => <PlusMinus U={r.U === null ? null : roundByUncertainty(r.value ?? 0, r.U).U} />,
    },
    { key: 'unit', head: 'unit', tight: true, cell: (r) => r.unit },
    { key: 'formula', head: 'formula', tight: true, cell: (r) => <span className="figures font-normal">{r.formula}</span> },
    { key: 'from', head: 'leads back to', cell: (r) => <LeadsBack sources={sources} result={r} /> },
  ]
  return (
    <section aria-labelledby="every-figure">
      <h2 id="every-figure" className="px-margin pt-3 pb-1 text-2">
        Every figure of this run
      </h2>
      <LedgerTable
        caption="Results with U, k = 2"
        columns={columns}
        groups={[{ key: 'known', rows: results.filter((r) => r.value !== null) }]}
        rowKey={(r) => r.key}
      />
      {missing.length > 0 && (
        <div className="px-margin py-2">
          <h3 className="text-1 font-[650]">Not computed</h3>
          <ul>
            {missing.map((r) => (
              <li key={r.key} className="border-b border-feint py-0.5">
                {r.label}: <span className="text-graphite">{r.reason?.text}</span>
              </li>
            ))}
          </ul>
        </div>
      )}
    </section>
  )
}

function LeadsBack({ sources, result }: { sources: Sources; result: ResultValue }) {
  const keys = result.from.filter((key) => sources.readings.has(key))
  if (keys.length === 0) return null
  return (
    <details>
      <summary className="word">{counted(keys.length, 'reading')}</summary>
      <ul className="pb-1">
        {keys.map((key) => (
          <Source key={key} sources={sources} reading={key} />
        ))}
      </ul>
      {result.assumes.length > 0 && <p className="label pb-1">taken for granted: {result.assumes.join('; ')}</p>}
    </details>
  )
}
