import type { BookComparison } from '../../../../shared/schemas/book-comparison.ts'
import type { Analysis, TTest } from '../../../../shared/schemas/comparison.ts'
import { PlainTable } from '../../../ui/plot/plain-table.tsx'
import { dfText, figureText, inInterval, intervalText, meanText, minus, pText, squareText } from '../compare-words.ts'

const NAMES = { paired: 'Paired t', blocks: 'Blocks: treatment + block', 'one factor': 'Unlike fields: one factor' } as const
const figures = (head: string) => ({ head, figures: true })

/** Everything the sentence rests on, in tables. */
export function AnalysisTables({ comparison, analysis }: { comparison: BookComparison; analysis: Analysis }) {
  const { unit, of, warning } = comparison
  const { design } = analysis
  return (
    <section aria-label="Analysis" className="px-margin pt-2 pb-3">
      <p className="text-2 leading-[27px]">
        <strong>{NAMES[design.kind]}.</strong> {design.why}
      </p>
      {warning && <p className="my-0.5 max-w-[720px] border-l-[3px] border-ink pl-1">{warning}</p>}
      <p className="label">
        α {design.alpha}, two-sided; stated before any figure is looked at. Assumed: runs do not lean on each other, and what is
        left over is about normal.
      </p>
      <div className="mt-2 flex flex-wrap gap-x-10 gap-y-3">
        <div>
          <Means comparison={comparison} analysis={analysis} />
        </div>
        {analysis.tests.length > 0 && (
          <div>
            <Tests tests={analysis.tests} unit={unit} paired={design.kind === 'paired'} />
          </div>
        )}
        {analysis.squares && (
          <div>
            <PlainTable
              shown
              caption="Table of squares"
              columns={[{ head: 'source' }, figures('df'), figures('sum'), figures('mean'), figures('F'), figures('p')]}
              rows={analysis.squares.map(({ source, df, ss, ms, f, p }) => ({
                key: source,
                cells: [
                  source,
                  dfText(df),
                  squareText(ss),
                  squareText(ms),
                  f === null ? '' : f.toFixed(3),
                  p === null ? '' : pText(p),
                ],
              }))}
            />
            {analysis.welchF && (
              <p className="label pt-0.5">
                Welch’s F, spreads free to differ: {analysis.welchF.f.toFixed(3)} with {dfText(analysis.welchF.df1)} and{' '}
                {dfText(analysis.welchF.df2)} df, p {pText(analysis.welchF.p)}
              </p>
            )}
          </div>
        )}
        {analysis.pairwise.length > 0 && (
          <div>
            <Pairs analysis={analysis} unit={unit} />
          </div>
        )}
      </div>
      <Needed comparison={comparison} analysis={analysis} />
      <Outliers analysis={analysis} of={of} />
    </section>
  )
}

/** Each treatment by the figure compared, with depth and soil beside it. */
function Means({ comparison, analysis }: { comparison: BookComparison; analysis: Analysis }) {
  const { unit, beside, of } = comparison
  return (
    <PlainTable
      shown
      caption="Means"
      columns={[
        { head: of },
        figures('runs'),
        figures(unit),
        figures('s'),
        ...beside.map((b) => figures(b.key === 'depth_mean_cm' ? 'depth, cm' : b.unit)),
      ]}
      rows={analysis.groups.map(({ treatment, n, mean, sd, interval }) => ({
        key: treatment,
        cells: [
          treatment,
          n,
          interval ? inInterval(mean, interval) : figureText(mean, comparison.runU),
          sd === null ? '–' : sd.toPrecision(3),
          ...beside.map((b) => {
            const mean = b.means.find((m) => m.treatment === treatment)?.mean
            return mean === undefined ? '–' : meanText(mean)
          }),
        ],
      }))}
    />
  )
}

function Tests({ tests, unit, paired }: { tests: readonly TTest[]; unit: string; paired: boolean }) {
  return (
    <PlainTable
      shown
      caption={`${tests[0]!.first} − ${tests[0]!.second}`}
      columns={[
        { head: 'test' },
        figures(paired ? 'pairs' : 'runs'),
        figures(`gap, ${unit}`),
        figures(paired ? 's of the gaps' : 's, pooled'),
        figures('t'),
        figures('df'),
        figures('p'),
        figures('95 % interval'),
      ]}
      rows={tests.map((t) => ({
        key: t.method,
        cells: [
          t.method,
          t.n,
          inInterval(t.difference, t.interval),
          t.sd === null ? '–' : t.sd.toPrecision(3),
          minus(t.t.toFixed(2)),
          dfText(t.df),
          pText(t.p),
          intervalText(t.interval),
        ],
      }))}
    />
  )
}

function Pairs({ analysis, unit }: { analysis: Analysis; unit: string }) {
  const { lsd, hsd } = analysis
  return (
    <>
      <PlainTable
        shown
        caption="Pair by pair, by the pooled error"
        columns={[
          { head: 'pair' },
          figures(`gap, ${unit}`),
          figures('p alone'),
          figures('p, Tukey'),
          figures('p, Holm'),
          figures('95 % alone'),
          figures('95 % Tukey'),
        ]}
        rows={analysis.pairwise.map((pair) => ({
          key: `${pair.first}|${pair.second}`,
          cells: [
            `${pair.first} − ${pair.second}`,
            inInterval(pair.difference, pair.interval),
            pText(pair.p),
            pText(pair.pTukey),
            pText(pair.pHolm),
            intervalText(pair.interval),
            intervalText(pair.tukeyInterval),
          ],
        }))}
      />
      <p className="label pt-0.5">
        {hsd !== null && `Tukey’s least difference ${hsd.toPrecision(3)} ${unit}. `}
        {lsd !== null
          ? `For a pair alone ${lsd.toPrecision(3)} ${unit}.`
          : hsd === null
            ? 'No one least difference holds for all pairs: their errors differ, as where runs are not equally many.'
            : 'No least difference for pairs alone: F is not significant.'}
      </p>
    </>
  )
}

function Needed({ comparison: { unit, runU }, analysis: { replicates } }: { comparison: BookComparison; analysis: Analysis }) {
  return (
    <p className="pt-2">
      {replicates.needed.map(({ gap, n }) => (
        <span key={gap}>
          To see a gap of <span className="figures">{Number(gap.toPrecision(3))}</span> {unit} four times in five:{' '}
          <strong>{n === null ? 'more than 1000' : n}</strong> {replicates.unit}.{' '}
        </span>
      ))}
      {runU !== null && (
        <span className="label">
          ± of a run here: {runU.toPrecision(2)} {unit} (median U, k = 2). Computed by {replicates.method}.
        </span>
      )}
    </p>
  )
}

/** Shown, never dropped: a person may leave a run out, with a reason. */
function Outliers({ analysis: { outliers }, of }: { analysis: Analysis; of: string }) {
  const grubbs = outliers.grubbs.filter((g) => g.beyond)
  const said = [
    ...grubbs.map(
      (g) => `record ${g.id} of ${g.treatment} by Grubbs (G ${g.g.toFixed(3)}, limit ${g.critical.toFixed(3)} for ${g.n})`,
    ),
    ...outliers.robust.map((r) => `record ${r.id} of ${r.treatment} by its robust z (${minus(r.z.toFixed(1))}, limit 3.5)`),
  ]
  return (
    <p className="pt-1">
      {said.length === 0
        ? `No run stands far from its like within its ${of} (Grubbs from 6 runs, robust z from 5).`
        : `Far from their like, and counted all the same: ${said.join('; ')}.`}
    </p>
  )
}
