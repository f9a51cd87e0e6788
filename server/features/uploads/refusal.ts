/** Why a file is not accepted, in words for whoever sent it: what happened, what was kept, what to do. */
export interface Refusal {
  reason: string
}

export const refuse = (what: string, todo: string): Refusal => ({ reason: `${what} Nothing was kept. ${todo}` })

export const isRefusal = (found: unknown): found is Refusal => typeof found === 'object' && found !== null && 'reason' in found

const MB = 1_000_000
/** 31.2 MB; 12 kB. */
export const sizeText = (bytes: number) => (bytes >= MB ? `${(bytes / MB).toFixed(1)} MB` : `${Math.ceil(bytes / 1000)} kB`)

export const tooLarge = (what: string, bytes: number, most: number, todo: string): Refusal =>
  refuse(`This ${what} has ${sizeText(bytes)}; the most is ${sizeText(most)}.`, todo)
