/** Clock readings: their order, and midnight. */
import { clockMinutes, clockText, type Run, sinceStart } from '../trial/clock.ts'
import { stemOf } from './cells.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, leading } from './text.ts'

interface Moment {
  key: string
  at: number
  clock: string
}

type KnownRun = Extract<Run, { state: 'known' }>

/** How a clock reading is spoken of. */
const SPOKEN: Readonly<Record<string, string>> = {
  t_start: 'the start',
  t_end: 'the end',
  jar_start_t: 'the first jar reading',
  jar_end_t: 'the last jar reading',
}
const spoken = ({ key, clock }: Moment) => `${SPOKEN[key] ?? `top-up ${stemOf(key).n}`} at ${clock}`

function moment(ctx: CheckContext, run: KnownRun, key: string): Moment[] {
  const clock = ctx.text(key)
  const at = sinceStart(run, clock)
  return at === null || clock === null ? [] : [{ key, at, clock }]
}

const q01: Rule = {
  id: 'Q01',
  version: 1,
  name: 'clock order',
  severity: ['stop'],
  cells: ['t_start', 't_end', 'jar_start_t', 'jar_end_t', 'topup_t', 'stop_from', 'stop_to'],
  why: 'Start, jar, top-ups, jar, end: another order cannot have happened [P].',
  check: (ctx) => {
    const { run } = ctx
    if (run.state === 'impossible' && run.kind === 'no_time') {
      return [
        found('stop', run.cells, `Start and end are both ${clockText(run.start_min)}: no time passed.`, {
          t_start: clockText(run.start_min),
          t_end: clockText(run.end_min),
        }),
      ]
    }
    return run.state === 'known' ? [...outsideRun(ctx, run), ...outOfOrder(ctx, run), ...stopsAstray(ctx, run)] : []
  },
}

function outsideRun(ctx: CheckContext, run: KnownRun): Found[] {
  const slack = ctx.limit('clock_slack_min')
  const early = moment(ctx, run, 'jar_start_t').filter((m) => m.at < -slack)
  const late = moment(ctx, run, 'jar_end_t').filter((m) => m.at > run.gross_min + slack)
  const start = ctx.text('t_start') ?? ''
  const end = ctx.text('t_end') ?? ''
  return [
    ...early.map((m) =>
      found('stop', ['t_start', m.key], `Jar read at ${m.clock}, run started ${start}: more than ${slack} min apart.`, {
        t_start: start,
        [m.key]: m.clock,
      }),
    ),
    ...late.map((m) =>
      found('stop', ['t_end', m.key], `Jar read at ${m.clock}, run ended ${end}: more than ${slack} min apart.`, {
        t_end: end,
        [m.key]: m.clock,
      }),
    ),
  ]
}

function outOfOrder(ctx: CheckContext, run: KnownRun): Found[] {
  const poured = ctx.keys('topup_t').flatMap((key) => moment(ctx, run, key))
  // Where the jar's own clock is not on the sheet, start and end of the run hold the top-ups between them.
  const first = moment(ctx, run, 'jar_start_t')[0] ?? moment(ctx, run, 't_start')[0]
  const last = moment(ctx, run, 'jar_end_t')[0] ?? moment(ctx, run, 't_end')[0]
  const line = [...(first ? [first] : []), ...poured, ...(last ? [last] : [])]
  return line.flatMap((next, i) => {
    const before = line[i - 1]
    if (!before || before.at < next.at) return []
    return [
      found('stop', [before.key, next.key], `${leading(spoken(next))} does not come after ${spoken(before)}.`, {
        [before.key]: before.clock,
        [next.key]: next.clock,
      }),
    ]
  })
}

function stopsAstray(ctx: CheckContext, run: KnownRun): Found[] {
  const all = ctx.stops.flatMap((stop) =>
    stop.from_min === null || stop.to_min === null ? [] : [{ n: stop.n, from: stop.from_min, to: stop.to_min }],
  )
  const told = (n: number) => ({ from: ctx.text(`stop_from[${n}]`) ?? '', to: ctx.text(`stop_to[${n}]`) ?? '' })
  const cells = (n: number) => [`stop_from[${n}]`, `stop_to[${n}]`]
  const findings = all.flatMap(({ n, from, to }) => {
    const { from: a, to: b } = told(n)
    if (to < from) return [found('stop', cells(n), `Stop ${n} ends ${b}, before it began ${a}.`, { from: a, to: b })]
    if (from < 0 || to > run.gross_min) {
      const run_ = { t_start: ctx.text('t_start') ?? '', t_end: ctx.text('t_end') ?? '' }
      return [
        found(
          'stop',
          [...cells(n), 't_start', 't_end'],
          `Stop ${n}, ${a} to ${b}, lies outside the run ${run_.t_start} to ${run_.t_end}.`,
          { from: a, to: b, ...run_ },
        ),
      ]
    }
    return []
  })
  const sorted = all.filter((s) => s.to >= s.from).sort((x, y) => x.from - y.from)
  const overlaps = sorted.flatMap((stop, i) => {
    const before = sorted[i - 1]
    if (!before || stop.from >= before.to) return []
    return [
      found(
        'stop',
        [...cells(before.n), ...cells(stop.n)],
        `Stop ${stop.n} begins ${told(stop.n).from}, before stop ${before.n} ended ${told(before.n).to}.`,
        { from: told(stop.n).from, to: told(before.n).to },
      ),
    ]
  })
  return [...findings, ...overlaps]
}

const q02: Rule = {
  id: 'Q02',
  version: 1,
  name: 'twelve hour slip',
  severity: ['doubt', 'note'],
  cells: ['t_start', 't_end'],
  why: 'An end before the start is a 12 h clock, or a run over midnight [P].',
  check: ({ run, text }) => {
    const [start, end] = [text('t_start') ?? '', text('t_end') ?? '']
    if (run.state === 'known' && run.overMidnight) {
      return [
        found('note', run.cells, `Start ${start}, end ${end}: taken as a run over midnight, ${figure(run.gross_min, 0)} min.`, {
          t_start: start,
          t_end: end,
          minutes: run.gross_min,
        }),
      ]
    }
    if (run.state !== 'impossible' || run.kind !== 'twelve_hour') return []
    const offered = clockText(run.end_min + 12 * 60)
    return [
      found('doubt', run.cells, `End ${end} comes before start ${start}: ${offered} on a 24 h clock?`, {
        t_start: start,
        t_end: end,
        offered,
      }),
    ]
  },
}

/** Read far from the run it belongs to, but in order: the other half of Q01. */
const l05: Rule = {
  id: 'L05',
  version: 1,
  name: 'jar read far from the run',
  severity: ['doubt'],
  cells: ['t_start', 't_end', 'jar_start_t', 'jar_end_t'],
  why: 'The jar is read within 5 minutes of start and end, or the fuel is not that of the time [P].',
  check: (ctx) => {
    const { run } = ctx
    if (run.state !== 'known') return []
    const slack = ctx.limit('clock_slack_min')
    const late = moment(ctx, run, 'jar_start_t').filter((m) => m.at > slack)
    const early = moment(ctx, run, 'jar_end_t').filter((m) => m.at < run.gross_min - slack)
    const told = (key: string, m: Moment) =>
      found(
        'doubt',
        [key, m.key],
        `${leading(spoken(m))}, ${spoken({ key, at: 0, clock: ctx.text(key) ?? '' })}: more than ${slack} min apart.`,
        { [key]: ctx.text(key) ?? '', [m.key]: m.clock },
      )
    return [...late.map((m) => told('t_start', m)), ...early.map((m) => told('t_end', m))]
  },
}

/** A clock cell that holds no time of day, and a run longer than a day's work. */
const l06: Rule = {
  id: 'L06',
  version: 1,
  name: 'no time of day',
  severity: ['stop'],
  cells: ['t_start', 't_end', 'jar_start_t', 'jar_end_t', 'topup_t', 'stop_from', 'stop_to'],
  why: 'Hours to 23, minutes to 59, a run of 12 h at most [P].',
  check: (ctx) => {
    const { run } = ctx
    const wrong = l06.cells.flatMap(ctx.keys).filter((key) => ctx.text(key) !== null && clockMinutes(ctx.text(key)) === null)
    const none = wrong.map((key) =>
      found('stop', [key], `${ctx.label(key)} ${ctx.text(key)} is no time of day.`, { [key]: ctx.text(key) ?? '' }),
    )
    if (run.state !== 'impossible' || run.kind !== 'too_long') return none
    return [
      ...none,
      found('stop', run.cells, `Start ${ctx.text('t_start')}, end ${ctx.text('t_end')}: longer than 12 h.`, {
        t_start: ctx.text('t_start') ?? '',
        t_end: ctx.text('t_end') ?? '',
      }),
    ]
  },
}

export const clockRules: readonly Rule[] = [q01, q02, l05, l06]
