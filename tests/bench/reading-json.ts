/** The part of the reader's JSON that the figures look at. */
import type { Facts } from '../../shared/reading/weigh/types.ts'
import type { Written } from '../simulator/scenario.ts'

export interface OneReading {
  value: Written
  state: 'clear' | 'in doubt'
  reasons?: ReadonlyArray<{ rule: string }>
  quad?: ReadonlyArray<readonly [number, number]> | null
}

export interface OnePage {
  sheet: string | null
  takeAgain: { code: string; advice: string } | null
  readings: Readonly<Record<string, OneReading>>
  ms: Readonly<Record<string, number>>
}

export interface BenchReader {
  read(bytes: Uint8Array, file: string, hooks?: { known?: Facts }): Promise<readonly OnePage[]>
  close(): Promise<void> | void
}
