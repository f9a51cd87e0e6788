/**
 * The joint weighing of all readings of a sheet. Readings and ties make a graph; where it is a tree, passing messages along it
 * is exact. Where ties close a ring (clock orders that share start and end), some readings are held at each of their likely
 * values in turn, the tree that is left is weighed, and the answers are added up by their weight: exact as well.
 */
import { type Budget, type ChainResult, NotDecided, runChain } from './chain.ts'
import { MOST_LEFT_OUT, PRECISIONS } from './thresholds.ts'
import type { Factor } from './ties/compile.ts'
import type { Variable } from './variable.ts'

const MOST_COMBINATIONS = 400

interface JointResult {
  /** For every reading the probability of its options, `other` last; null where its group was not decided. */
  posteriors: Array<Float64Array | null>
  /** Probability that the result of a tie holds, fails, or was not claimed; null where not decided. */
  ties: Array<{ holds: number; fails: number } | null>
}

interface Group {
  readings: number[]
  factors: number[]
  held: number[]
  /** Its ties from the leaves to the root of every tree that is left. */
  order: number[]
}

export function weighJointly(
  variables: ReadonlyArray<Variable>,
  factors: ReadonlyArray<Factor>,
  budget: () => Omit<Budget, 'floor'>,
): JointResult {
  const alone = variables.map((v) => Float64Array.from([...v.options.map((o) => o.weight), v.otherWeight]))
  const result: JointResult = { posteriors: alone.map(normal), ties: factors.map(() => null) }
  const decide = (group: Group): boolean =>
    PRECISIONS.some(({ state, held }) => {
      try {
        weighGroup(group, variables, factors, alone, { ...budget(), floor: state }, held, result)
        return true
      } catch (error) {
        if (!(error instanceof NotDecided)) throw error
        return false
      }
    })
  for (const group of groupsOf(variables.length, factors)) {
    if (decide(group)) continue
    // Fewer ties at once know less and are weighed the sooner: those that close a ring are left out, and their results unjudged.
    const fewer = withoutRings(variables.length, factors, group.factors)
    const parts = fewer.length < group.factors.length ? groupsOf(variables.length, factors, fewer) : []
    const open = new Set(parts.length === 0 ? group.readings : parts.filter((part) => !decide(part)).flatMap((p) => p.readings))
    for (const reading of open) result.posteriors[reading] = null
  }
  return result
}

/** Of these ties those that close no ring with the ones before them. */
function withoutRings(count: number, factors: ReadonlyArray<Factor>, own: readonly number[]): number[] {
  const tree = roots(count)
  return own.filter((f) => {
    const { readings } = factors[f]!
    if (new Set(readings.map(tree.find)).size < readings.length) return false
    for (const reading of readings) tree.join(readings[0]!, reading)
    return true
  })
}

/** Groups of readings that hang together, each with the readings to hold so that no ring is left. */
function groupsOf(count: number, factors: ReadonlyArray<Factor>, own: readonly number[] = factors.map((_, f) => f)): Group[] {
  const whole = roots(count)
  const tree = roots(count)
  const held = new Set<number>()
  for (const f of own) {
    const { readings } = factors[f]!
    for (const reading of readings) whole.join(readings[0]!, reading)
    let first: number | null = null
    for (const reading of readings) {
      if (held.has(reading)) continue
      if (first === null) first = reading
      else if (tree.find(first) === tree.find(reading)) held.add(reading)
      else tree.join(first, reading)
    }
  }
  const groups = new Map<number, Group>()
  for (const f of own) {
    const root = whole.find(factors[f]!.readings[0]!)
    const group = groups.get(root) ?? { readings: [], factors: [], held: [], order: [] }
    group.factors.push(f)
    groups.set(root, group)
  }
  for (let reading = 0; reading < count; reading++) {
    const group = groups.get(whole.find(reading))
    group?.readings.push(reading)
    if (held.has(reading)) group?.held.push(reading)
  }
  for (const group of groups.values()) group.order = leavesFirst(group, factors, held)
  return [...groups.values()]
}

/** Ties in breadth-first order from a root of each tree, turned round. */
function leavesFirst(group: Group, factors: ReadonlyArray<Factor>, held: ReadonlySet<number>): number[] {
  const order: number[] = []
  const seen = new Set<number>()
  for (const root of group.factors) {
    if (seen.has(root)) continue
    seen.add(root)
    const queue = [root]
    for (let at = 0; at < queue.length; at++) {
      const free = new Set(factors[queue[at]!]!.readings.filter((r) => !held.has(r)))
      for (const f of group.factors) {
        if (seen.has(f) || !factors[f]!.readings.some((r) => free.has(r))) continue
        seen.add(f)
        queue.push(f)
      }
    }
    order.push(...queue)
  }
  return order.reverse()
}

function roots(count: number) {
  const parent = Array.from({ length: count }, (_, i) => i)
  const find = (i: number): number => {
    let root = i
    while (parent[root] !== root) root = parent[root]!
    parent[i] = root
    return root
  }
  const join = (a: number, b: number): void => {
    parent[find(a)] = find(b)
  }
  return { find, join }
}

function weighGroup(
  group: Group,
  variables: ReadonlyArray<Variable>,
  factors: ReadonlyArray<Factor>,
  alone: ReadonlyArray<Float64Array>,
  budget: Budget,
  heldFloor: number,
  result: JointResult,
): void {
  const sums = new Map(group.readings.map((r) => [r, new Float64Array(alone[r]!.length)]))
  const tieSums = new Map(group.factors.map((f) => [f, { holds: 0, fails: 0, silent: 0 }]))
  for (const weights of combinations(group.held, alone, heldFloor)) {
    const tree = passMessages(group, variables, factors, weights, budget)
    for (const [reading, belief] of tree.beliefs) addInto(sums.get(reading)!, belief, tree.weight)
    for (const [f, t] of tree.ties) {
      const into = tieSums.get(f)!
      const scale = tree.weight / (t.holds + t.fails + t.silent || 1)
      into.holds += t.holds * scale
      into.fails += t.fails * scale
      into.silent += t.silent * scale
    }
  }
  for (const [reading, sum] of sums) result.posteriors[reading] = normal(sum)
  for (const [f, t] of tieSums) {
    const all = t.holds + t.fails + t.silent
    result.ties[f] = all > 0 ? { holds: t.holds / all, fails: t.fails / all } : null
  }
}

/** All ways to hold the readings to hold, as weights with a single option left to each. */
function combinations(held: number[], alone: ReadonlyArray<Float64Array>, floor: number): Float64Array[][] {
  let out: Float64Array[][] = [[...alone]]
  for (const reading of held) {
    const weights = alone[reading]!
    const top = Math.max(...weights)
    const likely = [...weights.keys()].filter((k) => weights[k]! >= top * floor)
    if (out.length * likely.length > MOST_COMBINATIONS) throw new NotDecided()
    out = out.flatMap((before) =>
      likely.map((k) => {
        const only = new Float64Array(weights.length)
        only[k] = weights[k]!
        return before.map((w, r) => (r === reading ? only : w))
      }),
    )
  }
  return out
}

interface Tree {
  beliefs: Map<number, Float64Array>
  ties: Map<number, { holds: number; fails: number; silent: number }>
  /** Weight of everything this way of holding the held readings allows. */
  weight: number
}

/** Sum-product on the tree that is left when held readings have one option. */
function passMessages(
  group: Group,
  variables: ReadonlyArray<Variable>,
  factors: ReadonlyArray<Factor>,
  weights: ReadonlyArray<Float64Array>,
  budget: Budget,
): Tree {
  const held = new Set(group.held)
  const counts = new Map(group.readings.map((r) => [r, countsOf(variables[r]!)]))
  const touching = new Map(group.readings.map((r) => [r, group.factors.filter((f) => factors[f]!.readings.includes(r))]))
  const toReading = new Map<string, Float64Array>()
  const toTie = new Map<string, Float64Array>()
  const edge = (f: number, reading: number) => `${f} ${reading}`
  /** A reading's weights with the messages of all its ties but one. */
  const gather = (reading: number, but: number | null): Float64Array => {
    const out = Float64Array.from(weights[reading]!)
    if (held.has(reading)) return out
    for (const f of touching.get(reading)!) {
      const message = f === but ? undefined : toReading.get(edge(f, reading))
      if (message) for (let k = 0; k < out.length; k++) out[k]! *= message[k]!
    }
    return out
  }
  const runs = new Map<number, ChainResult>()
  const weigh = (f: number): void => {
    const { readings, chain } = factors[f]!
    const incoming = readings.map((r) => {
      const message = normal(gather(r, f))
      toTie.set(edge(f, r), message)
      return { counts: counts.get(r)!, weights: message }
    })
    const run = runChain(chain, incoming, budget)
    if (run.leftOut > MOST_LEFT_OUT) throw new NotDecided()
    runs.set(f, run)
    readings.forEach((reading, at) => {
      if (!held.has(reading)) toReading.set(edge(f, reading), normal(run.outgoing[at]!))
    })
  }
  // Towards the root and back: on a tree every message is then right.
  for (const f of group.order) weigh(f)
  for (const f of [...group.order].reverse().slice(1)) weigh(f)
  // The weight of a forest from its messages: ties and readings multiplied, what both counted divided out.
  let logWeight = 0
  for (const [f, run] of runs) {
    logWeight += Math.log(run.holds + run.fails + run.silent)
    for (const r of factors[f]!.readings) {
      if (!held.has(r)) logWeight -= Math.log(dot(toTie.get(edge(f, r))!, toReading.get(edge(f, r))!))
    }
  }
  for (const r of group.readings) logWeight += Math.log(total(gather(r, null)))
  const beliefs = new Map(group.readings.map((r) => [r, normal(gather(r, null))]))
  return { beliefs, ties: runs, weight: Math.exp(logWeight) }
}

const countsOf = (variable: Variable): Array<number | null | undefined> => [...variable.options.map((o) => o.count), undefined]

const total = (weights: ArrayLike<number>): number => {
  let sum = 0
  for (let k = 0; k < weights.length; k++) sum += weights[k]!
  return sum
}

const dot = (a: Float64Array, b: Float64Array): number => a.reduce((sum, x, k) => sum + x * b[k]!, 0)

function normal(weights: Float64Array): Float64Array {
  const sum = total(weights)
  return sum > 0 ? weights.map((w) => w / sum) : weights
}

function addInto(into: Float64Array, from: Float64Array, scale: number): void {
  for (let k = 0; k < into.length; k++) into[k]! += from[k]! * scale
}
