/** Files that must not come in: made here byte by byte, so that each shows what is wrong with it. */
import { deflateRawSync, deflateSync } from 'node:zlib'
import sharp from 'sharp'

export interface HostileFile {
  what: string
  name: string
  bytes: Buffer
  /** Part of the reason that must be given. */
  reason: RegExp
}

const crcTable = Array.from({ length: 256 }, (_, n) => {
  let c = n
  for (let k = 0; k < 8; k += 1) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1
  return c >>> 0
})
const crc32 = (bytes: Buffer) =>
  (bytes.reduce((c, byte) => (crcTable[(c ^ byte) & 255] ?? 0) ^ (c >>> 8), 0xffffffff) ^ 0xffffffff) >>> 0

interface ZipEntry {
  name: string
  content: Buffer
  /** What the directory says of its size, if it lies. */
  declared?: number
  encrypted?: boolean
}

/** A zip file by APPNOTE 4.3 (local headers, central directory, end record), able to lie. */
export function zip(entries: ZipEntry[]): Buffer {
  const parts: Buffer[] = []
  const directory: Buffer[] = []
  let offset = 0
  for (const { name, content, declared = content.length, encrypted = false } of entries) {
    const packed = deflateRawSync(content)
    const common = Buffer.alloc(26)
    common.writeUInt16LE(20, 0)
    common.writeUInt16LE(encrypted ? 1 : 0, 2)
    common.writeUInt16LE(8, 4)
    common.writeUInt32LE(crc32(content), 10)
    common.writeUInt32LE(packed.length, 14)
    common.writeUInt32LE(declared, 18)
    common.writeUInt16LE(name.length, 22)
    const local = Buffer.concat([Buffer.from('PK\x03\x04', 'latin1'), common, Buffer.from(name), packed])
    const tail = Buffer.alloc(14)
    tail.writeUInt32LE(offset, 10)
    directory.push(Buffer.concat([Buffer.from('PK\x01\x02\x14\x00', 'latin1'), common, tail, Buffer.from(name)]))
    parts.push(local)
    offset += local.length
  }
  const central = Buffer.concat(directory)
  const end = Buffer.alloc(18)
  end.writeUInt16LE(entries.length, 4)
  end.writeUInt16LE(entries.length, 6)
  end.writeUInt32LE(central.length, 8)
  end.writeUInt32LE(offset, 12)
  return Buffer.concat([...parts, central, Buffer.from('PK\x05\x06', 'latin1'), end])
}

const TYPES: ZipEntry = { name: '[Content_Types].xml', content: Buffer.from('<Types/>') }
const BOOK: ZipEntry = { name: 'xl/workbook.xml', content: Buffer.from('<workbook/>') }

/** A PNG of `side` x `side` black pixels, one bit each: a megabyte or less for hundreds of millions of pixels. */
export function flatPng(side: number): Buffer {
  const chunk = (type: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(type), data])
    const ends = Buffer.alloc(8)
    ends.writeUInt32BE(data.length, 0)
    ends.writeUInt32BE(crc32(body), 4)
    return Buffer.concat([ends.subarray(0, 4), body, ends.subarray(4)])
  }
  const head = Buffer.alloc(13)
  head.writeUInt32BE(side, 0)
  head.writeUInt32BE(side, 4)
  head[8] = 1
  const rows = deflateSync(Buffer.alloc((Math.ceil(side / 8) + 1) * side))
  return Buffer.concat([
    Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'),
    chunk('IHDR', head),
    chunk('IDAT', rows),
    chunk('IEND', Buffer.alloc(0)),
  ])
}

/** A HEIC's boxes with a picture size, and nothing in it. */
function emptyHeic(side: number): Buffer {
  const ispe = Buffer.alloc(20)
  ispe.writeUInt32BE(20, 0)
  ispe.write('ispe', 4, 'latin1')
  ispe.writeUInt32BE(side, 12)
  ispe.writeUInt32BE(side, 16)
  const brand = Buffer.from('\x00\x00\x00\x18ftypheic\x00\x00\x00\x00mif1heic', 'latin1')
  return Buffer.concat([brand, ispe])
}

const PDF = '%PDF-1.4\n1 0 obj\n<< /Type /Catalog >>\nendobj\ntrailer\n<< /Root 1 0 R /Size 2 >>\nstartxref\n9\n%%EOF\n'

export async function hostileFiles(): Promise<HostileFile[]> {
  const photo = {
    create: { width: 900, height: 700, channels: 3, background: '#b0a48a', noise: { type: 'gaussian', mean: 120, sigma: 40 } },
  } as const
  const [jpeg, png, webp, moving, tiff, avif, gif] = await Promise.all([
    sharp(photo).jpeg().toBuffer(),
    sharp(photo).png().toBuffer(),
    sharp(photo).webp().toBuffer(),
    sharp(Buffer.concat([Buffer.alloc(4 * 20 * 20, 90), Buffer.alloc(4 * 20 * 20, 200)]), {
      raw: { width: 20, height: 40, channels: 4, pageHeight: 20 },
    })
      .webp({ loop: 0 })
      .toBuffer(),
    sharp(photo).tiff().toBuffer(),
    sharp({ create: { width: 64, height: 64, channels: 3, background: '#fff' } })
      .avif()
      .toBuffer(),
    sharp({ create: { width: 64, height: 64, channels: 3, background: '#fff' } })
      .gif()
      .toBuffer(),
  ])
  const zeros = Buffer.alloc(30_000_000)
  return [
    { what: 'an empty file', name: 'sheet.jpg', bytes: Buffer.alloc(0), reason: /is empty/ },
    {
      what: 'a picture larger than 25 MB',
      name: 'sheet.jpg',
      bytes: Buffer.concat([jpeg, Buffer.alloc(25_000_000, 7)]),
      reason: /has 2\d\.\d MB; the most is 25\.0 MB/,
    },
    {
      what: 'a program named as a photo',
      name: 'sheet.jpg',
      bytes: Buffer.from(`\x7fELF\x02\x01\x01${'\0'.repeat(200)}`, 'latin1'),
      reason: /of the kind "elf"/,
    },
    {
      what: 'a Windows program',
      name: 'sheet.exe',
      bytes: Buffer.from(`MZ${'\0'.repeat(300)}`, 'latin1'),
      reason: /kind "\.exe" is not taken/,
    },
    {
      what: 'a web page',
      name: 'sheet.html',
      bytes: Buffer.from('<html><script>alert(1)</script></html>'),
      reason: /"\.html" is not taken/,
    },
    {
      what: 'a web page named as a photo',
      name: 'sheet.jpg',
      bytes: Buffer.from('<html><script>alert(1)</script></html>'),
      reason: /^This is not a picture/,
    },
    {
      what: 'a drawing with a script in it',
      name: 'sheet.png',
      bytes: Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>'),
      reason: /This is not a picture/,
    },
    {
      what: 'a list of prices',
      name: 'prices.csv',
      bytes: Buffer.from('name,price\r\nplough,12\r\n'),
      reason: /not a CSV form of ours/,
    },
    {
      what: 'bytes without a meaning',
      name: 'sheet.jpg',
      bytes: Buffer.from(Array.from({ length: 4000 }, (_, i) => (i * 7919) % 251)),
      reason: /cannot be told|not taken/,
    },
    { what: 'a picture kind that is not read', name: 'sheet.avif', bytes: avif, reason: /not taken/ },
    { what: 'a moving picture', name: 'sheet.gif', bytes: gif, reason: /not taken/ },
    { what: 'a moving WebP', name: 'sheet.webp', bytes: moving, reason: /moving picture/ },
    {
      what: 'a JPEG cut off on the way',
      name: 'sheet.jpg',
      bytes: jpeg.subarray(0, Math.floor(jpeg.length * 0.6)),
      reason: /its end is missing/,
    },
    { what: 'a JPEG with nothing but its first bytes', name: 'sheet.jpg', bytes: jpeg.subarray(0, 16), reason: /damaged/ },
    {
      what: 'a PNG cut off on the way',
      name: 'sheet.png',
      bytes: png.subarray(0, Math.floor(png.length * 0.6)),
      reason: /its end is missing/,
    },
    {
      what: 'a WebP cut off on the way',
      name: 'sheet.webp',
      bytes: webp.subarray(0, Math.floor(webp.length * 0.6)),
      reason: /damaged/,
    },
    {
      what: 'a TIFF whose directory is gone',
      name: 'scan.tif',
      bytes: tiff.subarray(0, Math.floor(tiff.length / 2)),
      reason: /damaged/,
    },
    { what: 'a flood of pixels', name: 'sheet.png', bytes: flatPng(16_000), reason: /256 million pixels; the most is 50/ },
    {
      what: 'a HEIC that announces a flood of pixels',
      name: 'sheet.heic',
      bytes: emptyHeic(60_000),
      reason: /3600 million pixels/,
    },
    { what: 'a HEIC without a picture', name: 'sheet.heic', bytes: emptyHeic(0).subarray(0, 24), reason: /damaged/ },
    {
      what: 'a locked PDF',
      name: 'scan.pdf',
      bytes: Buffer.from(PDF.replace('/Root', '/Encrypt 5 0 R /Root')),
      reason: /locked \(encrypted\)/,
    },
    { what: 'a PDF cut off on the way', name: 'scan.pdf', bytes: Buffer.from(PDF.slice(0, 80)), reason: /its end is missing/ },
    {
      what: 'a workbook locked with a password',
      name: 'form.xlsx',
      bytes: Buffer.concat([Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]), Buffer.alloc(600)]),
      reason: /locked with a password/,
    },
    {
      what: 'a workbook whose parts are locked',
      name: 'form.xlsx',
      bytes: zip([TYPES, { ...BOOK, encrypted: true }]),
      reason: /locked with a password/,
    },
    {
      what: 'a zip file of something else',
      name: 'form.xlsx',
      bytes: zip([{ name: 'readme.txt', content: Buffer.from('hello') }]),
      reason: /not a workbook/,
    },
    {
      what: 'a workbook that unpacks a thousandfold',
      name: 'form.xlsx',
      bytes: zip([TYPES, BOOK, { name: 'xl/worksheets/sheet1.xml', content: zeros }]),
      reason: /would unpack from/,
    },
    {
      what: 'a workbook whose directory lies about a bomb',
      name: 'form.xlsx',
      bytes: zip([TYPES, BOOK, { name: 'xl/sharedStrings.xml', content: zeros, declared: 900 }]),
      reason: /damaged: it cannot be unpacked/,
    },
    {
      what: 'a workbook of too many parts',
      name: 'form.xlsx',
      bytes: zip([
        TYPES,
        BOOK,
        ...Array.from({ length: 300 }, (_, i) => ({ name: `xl/part${i}.xml`, content: Buffer.from('x') })),
      ]),
      reason: /has 302 parts/,
    },
    { what: 'a workbook cut off on the way', name: 'form.xlsx', bytes: zip([TYPES, BOOK]).subarray(0, 60), reason: /damaged/ },
    {
      what: 'a workbook with a path out of its folder',
      name: 'form.xlsx',
      bytes: zip([TYPES, BOOK, { name: '../../etc/passwd', content: Buffer.from('x') }]),
      reason: /damaged/,
    },
  ]
}
