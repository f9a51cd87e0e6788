import { useQuery } from '@tanstack/react-query'
import { Link, useParams, useSearchParams } from 'react-router-dom'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { TrialRecord } from '../../../shared/schemas/record.ts'
import { bookQueries, filtersOf, useChallenge } from '../../features/book/book.queries.ts'
import { LeafSection } from '../../features/leaf/components/leaf-section.tsx'
import { Budget } from '../../features/record/components/budget.tsx'
import { ChallengeForm } from '../../features/record/components/challenge-form.tsx'
import { Depths } from '../../features/record/components/depths.tsx'
import { FiguresTable } from '../../features/record/components/figures-table.tsx'
import { Headline } from '../../features/record/components/headline.tsx'
import { RecordHistory } from '../../features/record/components/record-history.tsx'
import { RecordNotes } from '../../features/record/components/record-notes.tsx'
import { type OtherRun, Tape } from '../../features/record/components/tape.tsx'
import { sourcesOf } from '../../features/record/record-model.ts'
import { isNowhere } from '../../lib/api-error.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { dateText } from '../../lib/time.ts'
import { Glyph } from '../../ui/glyphs.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { NotFound } from './route-error.tsx'

export function Component() {
  const number = Number(useParams().number)
  const version = useSearchParams()[0].get('version')
  const record = useQuery(bookQueries.detail(number, version ? Number(version) : undefined))
  const title = `Record ${String(number).padStart(4, '0')}`
  if (isNowhere(record.error)) return <NotFound />
  if (record.error) {
    return (
      <Page title={title}>
        <ErrorState error={record.error} again={() => record.refetch()} />
      </Page>
    )
  }
  if (!record.data) {
    return (
      <Page title={title}>
        <Loading what="Opening the record" />
      </Page>
    )
  }
  return <RecordPage key={record.data.version} record={record.data} title={title} />
}

function RecordPage({ record, title }: { record: TrialRecord; title: string }) {
  const me = useMe()
  const challenge = useChallenge(record.number)
  const others = useOtherRuns(record)
  const layout = findLayout(record.layout, record.layoutVersion)
  const run = record.run && `plot ${record.run.plot}, run ${record.run.number}`
  const where = [record.place.name, record.trialDate && dateText(record.trialDate), run].filter(Boolean).join(', ')
  if (!layout) return <Page title={title}>The layout {record.layout} is not known to this page.</Page>
  const sources = sourcesOf(record, layout)
  const figure = record.results.l_per_ha
  const mayChallenge = (me.role === 'analyst' || me.role === 'admin') && record.state === 'entered'
  return (
    <Page
      title={title}
      over={<Entered record={record} title={title} />}
      sentence={`${record.tractor.name} with ${record.implement.name}, ${where}`}
      aside={
        <Link className="word" to={paths.readOut.to(record.number)}>
          Read-out
        </Link>
      }
    >
      {record.challenge && (
        <p className="border-b border-line bg-straw-pale px-margin py-1">
          <Glyph name="challenged" /> Challenged by {record.challenge.by}: “{record.challenge.reason}”
        </p>
      )}
      <Headline sources={sources} />
      {figure?.value != null && <Tape value={figure.value} U={figure.U} unit={figure.unit} others={others} />}
      <div className="grid grid-cols-[minmax(0,7fr)_minmax(0,5fr)] border-t border-line max-lg:grid-cols-1">
        <div className="border-r-[3px] border-double border-line max-lg:border-r-0">
          <FiguresTable sources={sources} />
          <Depths sources={sources} />
        </div>
        <div>
          <Budget sources={sources} />
          <LeafSection
            number={record.number}
            version={record.version}
            maySend={me.role === 'demonstrator' || me.role === 'admin'}
          />
          <RecordNotes record={record} layout={layout} />
          <RecordHistory history={record.history} />
          {mayChallenge && (
            <ChallengeForm
              pending={challenge.isPending}
              error={challenge.error}
              onChallenge={(reason) => challenge.mutate(reason)}
            />
          )}
        </div>
      </div>
    </Page>
  )
}

/** Runs of the same tractor and implement at the same place on the same day, with their litres a hectare. */
function useOtherRuns(record: TrialRecord): OtherRun[] {
  const { tractor, implement, place, trialDate } = record
  const named = tractor.id && implement.id && place.id && trialDate
  const filters = filtersOf(
    new URLSearchParams({
      tractor: tractor.id ?? '',
      implement: implement.id ?? '',
      place: place.id ?? '',
      from: trialDate ?? '',
      to: trialDate ?? '',
    }),
  )
  const runs = useQuery({ ...bookQueries.list(filters, ''), enabled: Boolean(named) })
  return (runs.data?.records ?? []).flatMap(({ number, results }) => {
    const value = results.l_per_ha?.value
    return number === record.number || value == null ? [] : [{ number, value }]
  })
}

/** Which limits judged it: those the product ships, or a version the office set. */
function limitsWords({ facts }: TrialRecord): string {
  const version = Number(facts.settingsVersion ?? 0)
  return version === 0 ? 'limits as shipped' : `limits version ${version}`
}

function Entered({ record, title }: { record: TrialRecord; title: string }) {
  const me = useMe()
  const sheet = record.sheetCode ? formatSheetCode(record.sheetCode) : 'without a code'
  const sheetPath =
    me.role === 'demonstrator'
      ? paths.mySheet.to(record.sheetId)
      : me.role === 'analyst'
        ? null
        : paths.deskSheet.to(record.sheetId)
  const others = record.versions.filter((v) => v.version !== record.version)
  return (
    <>
      {title}, version {record.version} <Glyph name={record.state === 'challenged' ? 'challenged' : 'entered'} /> entered{' '}
      {dateText(record.enteredAt)} by {record.enteredBy}, from sheet{' '}
      {sheetPath ? (
        <Link className="word figures" to={sheetPath}>
          {sheet}
        </Link>
      ) : (
        <span className="figures">{sheet}</span>
      )}
      ; rules {record.rulesVersion}, {limitsWords(record)}, formulas {record.formulaVersion}
      {others.map((v) => (
        <span key={v.version}>
          {' · '}
          <Link className="word" to={paths.record.to(record.number, v.version)}>
            version {v.version}
          </Link>
        </span>
      ))}
    </>
  )
}
