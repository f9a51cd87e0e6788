/** A plot as a file that stands by itself: title in words, colours and faces by value, paper underneath. */

const TITLE_PX = 40
const MARGIN_PX = 16
const SVG = 'http://www.w3.org/2000/svg'
/** PNG pixels a plot pixel: sharp on paper. */
const SCALE = 3

function standalone(svg: SVGSVGElement, title: string): { text: string; width: number; height: number } {
  const look = getComputedStyle(document.documentElement)
  const { width: inner, height } = svg.viewBox.baseVal
  const width = inner + 2 * MARGIN_PX
  const tall = height + TITLE_PX + MARGIN_PX
  const whole = document.createElementNS(SVG, 'svg')
  for (const [name, value] of Object.entries({ xmlns: SVG, width, height: tall, viewBox: `0 0 ${width} ${tall}` }))
    whole.setAttribute(name, String(value))
  const ground = whole.appendChild(document.createElementNS(SVG, 'rect'))
  for (const [name, value] of Object.entries({ width, height: tall, fill: 'var(--paper)' }))
    ground.setAttribute(name, String(value))
  const head = whole.appendChild(document.createElementNS(SVG, 'text'))
  const place = { x: MARGIN_PX, y: 26, 'font-size': 16, 'font-weight': 700, 'font-family': 'var(--face)', fill: 'var(--ink)' }
  for (const [name, value] of Object.entries(place)) head.setAttribute(name, String(value))
  head.textContent = title
  const content = whole.appendChild(document.createElementNS(SVG, 'g'))
  content.setAttribute('transform', `translate(${MARGIN_PX} ${TITLE_PX})`)
  for (const child of svg.children) content.appendChild(child.cloneNode(true))
  for (const element of whole.querySelectorAll('*'))
    for (const attribute of element.attributes)
      attribute.value = attribute.value.replace(/var\((--[a-z-]+)\)/g, (_, name: string) => look.getPropertyValue(name).trim())
  return { text: new XMLSerializer().serializeToString(whole), width, height: tall }
}

function save(content: Blob, name: string): void {
  const address = URL.createObjectURL(content)
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  // The browser has begun to read it by then.
  setTimeout(() => URL.revokeObjectURL(address), 10_000)
}

export function downloadSvg(svg: SVGSVGElement, file: string, title: string): void {
  save(new Blob([standalone(svg, title).text], { type: 'image/svg+xml' }), `${file}.svg`)
}

/** @throws when the browser cannot draw it */
export async function downloadPng(svg: SVGSVGElement, file: string, title: string): Promise<void> {
  const { text, width, height } = standalone(svg, title)
  const address = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml' }))
  try {
    const picture = new Image()
    picture.src = address
    await picture.decode()
    const canvas = document.createElement('canvas')
    canvas.width = width * SCALE
    canvas.height = height * SCALE
    canvas.getContext('2d')?.drawImage(picture, 0, 0, canvas.width, canvas.height)
    const png = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'))
    if (!png) throw new Error('the browser gave no picture')
    save(png, `${file}.png`)
  } finally {
    URL.revokeObjectURL(address)
  }
}
