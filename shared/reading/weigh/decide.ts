/** From posteriors to clear or in doubt, with reasons in plain words. */
import type { TickCell } from '../../layouts/layout.ts'
import type { TickDist } from '../classes.ts'
import {
  CLEAR,
  CLEAR_BESIDE_A_WRONG_SUM,
  CLEAR_BY_INK_ALONE,
  DIGIT_ALLOWED,
  GAP_DOUBT,
  INK_ALLOWS,
  INK_UNDECIDED,
  TICK_CLEAR,
  VOID_DOUBT,
} from './thresholds.ts'
import type { Candidate, Reason, ReasonRule, Value, Weighed } from './types.ts'
import type { Option, Variable } from './variable.ts'
import type { Chosen, WrongSum } from './wrong-sum.ts'

const MOST_CANDIDATES = 5
const SHOWN_FROM = 0.001

/** What a comb or choice is taken as before it is decided whether that is clear. */
export function chosen(variable: Variable, posterior: Float64Array | null): Chosen {
  const weight = (o: Option, k: number) => posterior?.[k] ?? o.weight
  const option = variable.options[argMax(variable.options, weight)]!
  const inkBest = variable.options[argMax(variable.options, (o) => o.ink)]!
  return { value: option.value, byInk: option === inkBest || allowedByInk(option) }
}

/** Not what the ink reads best, but a plain second reading of it: the sum may rest on it, though a person looks at it. */
const allowedByInk = (option: Option): boolean => option.ink >= INK_ALLOWS && option.weakest >= DIGIT_ALLOWED

const percent = (p: number) => (p >= 0.9995 ? 'over 99.9 %' : p < 0.001 ? 'under 0.1 %' : `${Number((p * 100).toFixed(1))} %`)
const said = (value: Value) => (value === null ? 'blank' : String(value))

/**
 * @param posterior of the options, `other` last; null where the reading's group was not decided. @param unjudged it is the result
 * of a sum that was not weighed.
 */
export function decideComb(
  variable: Variable,
  posterior: Float64Array | null,
  unjudged: boolean,
  wrongSums: ReadonlyArray<WrongSum>,
): Weighed {
  const p = posterior ?? Float64Array.from(variable.options.map((o) => o.weight))
  const best = argMax(variable.options, (_, k) => p[k]!)
  const byInk = argMax(variable.options, (o) => o.ink)
  const value = variable.options[best]!
  const inkBest = variable.options[byInk]!
  // Knowledge may choose between what the ink allows, never replace it: a value a box denies is offered, not proposed.
  const denied = value !== inkBest && value.weakest < DIGIT_ALLOWED
  const least = p[best]! > value.ink ? CLEAR : CLEAR_BY_INK_ALONE
  const reasons: Reason[] = []
  const add = (rule: ReasonRule, text: string, cells = [variable.key]) => reasons.push({ rule, text, cells })

  if (variable.spoiled >= VOID_DOUBT) add('R01', `A box of ${variable.label} looks crossed out or written over.`)
  if (variable.gap >= GAP_DOUBT) add('Q55', `${variable.label} seems to have an empty box between or after its digits.`)
  // Plain ink stands by itself, but for the result of a sum that nobody has added up.
  if (unjudged || (posterior === null && p[best]! < least))
    add('R05', `${variable.label} was not weighed against the sheet's sums: there were too many ways to read them.`)
  // Plain ink whose sum does not hold is no question of reading: the wrong sum is the reason.
  const explained = wrongSums.some((sum) => sum.isResult) && value.ink >= CLEAR
  const inkFavours = value !== inkBest && value.ink < INK_UNDECIDED * inkBest.ink
  if (inkFavours) {
    add(
      'R03',
      `The ink of ${variable.label} reads ${said(inkBest.value)} (${percent(inkBest.ink)}); what else is known speaks for ${said(value.value)} (${percent(p[best]!)}).`,
    )
  } else if (!explained && (p[best]! < least || value.weakest < DIGIT_ALLOWED)) {
    add('R02', unsure(variable, p))
  }
  for (const sum of wrongSums) {
    if (sum.isResult) add('R04', wrongText(sum), sum.cells)
    else if (sum.fails && value.ink < CLEAR_BESIDE_A_WRONG_SUM) add('R04', besideText(variable, sum, value), sum.cells)
  }
  const candidates = candidatesOf(variable.options, p)
  return {
    value: denied ? inkBest.value : value.value,
    state: reasons.length === 0 ? 'clear' : 'in doubt',
    candidates: denied ? inkFirst(candidates, inkBest.value) : candidates,
    reasons,
    posterior: denied ? p[byInk]! : p[best]!,
  }
}

const inkFirst = (candidates: Candidate[], value: Value): Candidate[] => [
  ...candidates.filter((c) => c.value === value),
  ...candidates.filter((c) => c.value !== value),
]

function unsure(variable: Variable, p: ArrayLike<number>): string {
  const likely = candidatesOf(variable.options, p).slice(0, 3)
  return `${variable.label} reads ${likely.map((c) => `${said(c.value)} (${percent(c.p)})`).join(', ')}.`
}

const wrongText = ({ result, parts, fails }: WrongSum): string =>
  fails
    ? `Written: ${result}. That does not follow from ${parts}.`
    : `Written: ${result}. Whether it follows from ${parts} is not sure.`

const besideText = (variable: Variable, { result }: WrongSum, value: Option): string =>
  `${variable.label} reads ${said(value.value)} (${percent(value.ink)} by its ink), and the written ${result} does not follow from it.`

/** One of a choice, or none; two ticked or a spoiled tick is in doubt. */
export function decideChoice(variable: Variable, posterior: Float64Array | null): Weighed {
  const p = posterior ?? Float64Array.from(variable.options.map((o) => o.weight))
  const best = argMax(variable.options, (_, k) => p[k]!)
  const byInk = argMax(variable.options, (o) => o.ink)
  const value = variable.options[best]!
  const sure = best === byInk && p[best]! >= TICK_CLEAR && value.ink >= TICK_CLEAR
  const text = `${variable.label} has more than one option ticked, or a tick that is not plain.`
  return {
    value: value.value,
    state: sure ? 'clear' : 'in doubt',
    candidates: candidatesOf(variable.options, p),
    reasons: sure ? [] : [{ rule: 'R06', text, cells: [variable.key] }],
    posterior: p[best]!,
  }
}

export function decideTick(cell: TickCell, tick: TickDist): Weighed {
  const value = tick.ticked >= tick.empty
  const p = Math.max(tick.ticked, tick.empty)
  const sure = p >= TICK_CLEAR
  const candidates = [
    { value: true, p: tick.ticked, ink: tick.ticked },
    { value: false, p: tick.empty, ink: tick.empty },
  ].sort((a, b) => b.p - a.p)
  const text = `Whether ${cell.label} is ticked is not plain.`
  return {
    value,
    state: sure ? 'clear' : 'in doubt',
    candidates,
    reasons: sure ? [] : [{ rule: 'R06', text, cells: [cell.key] }],
    posterior: p,
  }
}

/** The likeliest values, and the one the ink alone favours even where knowledge speaks against it. */
function candidatesOf(options: ReadonlyArray<Option>, p: ArrayLike<number>): Candidate[] {
  const all = options.map((o, k) => ({ value: o.value, p: p[k]!, ink: o.ink }))
  const byInk = all[argMax(options, (o) => o.ink)]!
  const best = [...all].sort((a, b) => b.p - a.p).filter((c, k) => k === 0 || c.p >= SHOWN_FROM)
  const shown = best.slice(0, MOST_CANDIDATES)
  return shown.includes(byInk) ? shown : [...shown.slice(0, MOST_CANDIDATES - 1), byInk]
}

function argMax<T>(items: ReadonlyArray<T>, score: (item: T, k: number) => number): number {
  let best = 0
  items.forEach((item, k) => {
    if (score(item, k) > score(items[best]!, best)) best = k
  })
  return best
}
