/**
 * The sources of doubt in a reading, as numbers with their origin. GUM is JCGM 100:2008; [P] is common practice or an
 * engineer's judgement, a default that may be set otherwise and no standard; [M] is a standard quoted from memory.
 */
export const SPREAD = {
  /** Laying, sag and pegs of one tape length, m (standard) [P]. */
  tapeLaying_m: 0.05,
  tapeLength_m: 30,
  /** Greatest error of a class II tape of 30 m: 0.3 + 0.2 · 30 mm (OIML R 35) [M]. */
  tapeClass_m: 0.0063,
  /** Steps the depth rule is written to, cm. */
  depthStep_cm: 0.5,
  /** Where the undisturbed surface is, half-width, cm [P]. */
  depthSurface_cm: 0.5,
  widthStep_m: 0.01,
  /** Reaction of the hand on a stopwatch, half-width, s; the same hand times every run, so it does not average out [P]. */
  reaction_s: 0.3,
  /** Setting a peg of the timed distance, m (standard) [P]. */
  peg_m: 0.05,
  /** Reading the way of counted wheel turns, m (standard) [P]. */
  wheelWay_m: 0.1,
  /** Filling to a line or to the jug's top mark, half-width, mL [P]. */
  lineSetting_ml: 20,
  /** Thermometer step, °C. */
  thermometerStep_c: 1,
  hydrometerStep_kgm3: 0.5,
  /** Balance under a jar [P], and under a soil sample, g. */
  balanceStep_g: 5,
  soilBalanceStep_g: 0.01,
  dynamometerStep_kn: 0.1,
  tachometerStep_rpm: 10,
  odometerStep_km: 0.1,
  /** Half-width of a load that was counted and not weighed, as a share of itself [P]. */
  countedLoad: 0.1,
  /** A deducted piece of plot is known to this share of itself [P]. */
  deduction: 0.05,
} as const

/** One reading to steps of `step`: rectangular, half-width step/2 (GUM F.2.2.1, 4.3.7). */
export const stepU = (step: number): number => step / Math.sqrt(12)

/** The difference of two readings to the same step: triangular, half-width `step` (GUM 4.3.9). */
export const stepDifferenceU = (step: number): number => step / Math.sqrt(6)

/** Anywhere within ± half (GUM 4.3.7). */
export const rectangularU = (half: number): number => half / Math.sqrt(3)

/** A length laid with the tape, m: its scale grows with the length, laying with each tape length begun. */
export function tapeU_m(length_m: number): number {
  const scale = rectangularU(SPREAD.tapeClass_m) * (length_m / SPREAD.tapeLength_m)
  const laying = SPREAD.tapeLaying_m * Math.sqrt(Math.max(1, Math.ceil(length_m / SPREAD.tapeLength_m)))
  return Math.hypot(scale, laying)
}

/**
 * Step a set of jar levels was read to: half a mark when any of them stands half-way between two, else a whole mark.
 */
export function jarStep_ml(levels: readonly number[], mark_ml: number): number {
  const half = mark_ml / 2
  return levels.some((level) => level % half === 0 && (level / half) % 2 !== 0) ? half : mark_ml
}
