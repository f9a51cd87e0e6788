/** QR codes by zxing-wasm, whose program comes from the package: it would fetch it from the network. */
import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import type { CodeFinder } from '../../../shared/reading/locate/code-finder.ts'
import type { Grey } from '../../../shared/reading/pixels/grey.ts'

const require = createRequire(import.meta.url)

/** As a PGM file: zxing takes its bytes as grey, where ImageData would be spread to four channels and turned grey again. */
function asPgm({ width, height, data }: Grey): Uint8Array {
  const head = new TextEncoder().encode(`P5\n${width} ${height}\n255\n`)
  const file = new Uint8Array(head.length + data.length)
  file.set(head)
  file.set(data, head.length)
  return file
}

export async function createCodeFinder(): Promise<CodeFinder> {
  const { prepareZXingModule, readBarcodes } = await import('zxing-wasm/reader')
  const wasm = await readFile(require.resolve('zxing-wasm/reader/zxing_reader.wasm'))
  await prepareZXingModule({ overrides: { wasmBinary: new Uint8Array(wasm).buffer }, fireImmediately: true })
  return async (grey) => {
    const found = await readBarcodes(asPgm(grey), {
      formats: ['QRCode'],
      tryHarder: true,
      tryRotate: false,
      tryInvert: false,
      tryDownscale: false,
      maxNumberOfSymbols: 12,
    })
    return found
      .filter((code) => code.isValid && !code.isMirrored)
      .map(({ text, position: p }) => ({ text, corners: [p.topLeft, p.topRight, p.bottomRight, p.bottomLeft] as const }))
  }
}
