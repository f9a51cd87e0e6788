/** QR codes by zxing-wasm, whose program comes from the package: it would fetch it from the network. */
import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import type { CodeFinder } from '../../../shared/reading/locate/code-finder.ts'
import type { Grey } from '../../../shared/reading/pixels/grey.ts'

const require = createRequire(import.meta.url)

/** zxing turns RGBA to grey itself. */
function asImageData({ width, height, data }: Grey): ImageData {
  const rgba = new Uint32Array(width * height)
  for (let i = 0; i < data.length; i++) rgba[i] = 0xff000000 | (data[i]! * 0x010101)
  return { width, height, data: new Uint8ClampedArray(rgba.buffer), colorSpace: 'srgb' } as ImageData
}

export async function createCodeFinder(): Promise<CodeFinder> {
  const { prepareZXingModule, readBarcodes } = await import('zxing-wasm/reader')
  const wasm = await readFile(require.resolve('zxing-wasm/reader/zxing_reader.wasm'))
  await prepareZXingModule({ overrides: { wasmBinary: new Uint8Array(wasm).buffer }, fireImmediately: true })
  return async (grey) => {
    const found = await readBarcodes(asImageData(grey), {
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
