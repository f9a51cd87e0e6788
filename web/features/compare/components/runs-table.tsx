import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { BookComparison, ComparedFigure, ComparedRun } from '../../../../shared/schemas/book-comparison.ts'
import { RESULTS } from '../../../../shared/trial/result.ts'
import { paths } from '../../../lib/paths.ts'
import { dateText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { useExclusion } from '../compare.queries.ts'
import { figureText } from '../compare-words.ts'
import { recordName } from '../plot-rows.ts'
import { ReasonForm } from './reason-form.tsx'

const figureColumn = (key: ComparedFigure): LedgerColumn<ComparedRun> => ({
  key,
  head: (
    <>
      {RESULTS[key].label} <span className="figures font-normal">{RESULTS[key].unit}</span>
    </>
  ),
  figures: true,
  cell: ({ figures: { [key]: figure } }) => (figure ? figureText(figure.value, figure.U) : '–'),
})

/** Every run of the choice: those compared, and those left out with why. */
export function RunsTable({ comparison }: { comparison: BookComparison }) {
  const [inHand, setInHand] = useState<number | null>(null)
  const exclusion = useExclusion()
  const keys = [...new Set<ComparedFigure>([comparison.figure, 'depth_mean_cm', 'ml_per_m3'])]
  const columns: LedgerColumn<ComparedRun>[] = [
    {
      key: 'number',
      head: 'record',
      tight: true,
      stack: 'lead',
      cell: (run) => (
        <Link className="word figures" to={paths.record.to(run.number)}>
          {recordName(run.number)}
        </Link>
      ),
    },
    { key: 'of', head: comparison.of, cell: (run) => run.treatment || 'not named' },
    { key: 'where', head: 'where and when', cell: whereWords },
    ...keys.map(figureColumn),
    {
      key: 'out',
      head: 'in the comparison',
      cell: (run) => (
        <Standing
          run={run}
          open={inHand === run.number}
          exclusion={exclusion}
          onOpen={() => setInHand(run.number)}
          onClose={() => setInHand(null)}
        />
      ),
    },
  ]
  const out = comparison.runs.filter((run) => run.leftOut !== null).length
  return (
    <section aria-label="Runs">
      <h2 className="border-t border-line px-margin pt-2 text-2">
        {comparison.runs.length} runs, {out === 0 ? 'none' : out} left out
      </h2>
      <LedgerTable
        stacked
        caption="Runs of this choice, oldest first"
        columns={columns}
        groups={[{ key: 'all', rows: comparison.runs }]}
        rowKey={(run) => String(run.number)}
        quiet={(run) => run.leftOut !== null}
        inHand={(run) => inHand === run.number}
      />
    </section>
  )
}

const whereWords = ({ block, place, trialDate, implement, gear }: ComparedRun): string =>
  block ?? [place, trialDate && dateText(trialDate), implement, gear && `gear ${gear}`].filter(Boolean).join(', ')

interface StandingProps {
  run: ComparedRun
  open: boolean
  exclusion: ReturnType<typeof useExclusion>
  onOpen: () => void
  onClose: () => void
}

function Standing({ run, open, exclusion, onOpen, onClose }: StandingProps) {
  const act = run.excluded ? 'take back' : 'leave out'
  if (open)
    return (
      <ReasonForm
        label={run.excluded ? 'Why it belongs in' : 'Why it does not belong in'}
        act={run.excluded ? 'Take back' : 'Leave out'}
        pending={exclusion.isPending}
        error={exclusion.error}
        onReason={(reason) => exclusion.mutate({ act, number: run.number, reason }, { onSuccess: onClose })}
        onClose={onClose}
      />
    )
  return (
    <span className="flex flex-wrap items-baseline gap-x-2">
      {run.leftOut !== null && <span className="min-w-0">{run.leftOut}</span>}
      {(run.leftOut === null || run.excluded) && (
        <Button look="word" className="max-sm:min-h-[44px]" onClick={onOpen}>
          {act}
          <span className="away"> record {recordName(run.number)}</span>
        </Button>
      )}
    </span>
  )
}
