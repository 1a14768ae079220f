import type { View } from 'react-native'

/** Hands text to the browser as a file. */
export function saveText(name: string, type: string, text: string): void {
  const address = URL.createObjectURL(new Blob([text], { type }))
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  URL.revokeObjectURL(address)
}

/** The drawing inside `frame` as an SVG document of its own, on the given ground; null while nothing is drawn. */
export function svgText(frame: View | null, ground: string): string | null {
  const drawing = (frame as unknown as HTMLElement | null)?.querySelector('svg')
  if (!drawing) return null
  const copy = drawing.cloneNode(true) as SVGElement
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg')
  copy.style.background = ground
  return `<?xml version="1.0" encoding="UTF-8"?>\n${new XMLSerializer().serializeToString(copy)}\n`
}

/** RFC 4180: commas, quotes where needed, lines end in CR LF. */
export function csvText(header: readonly string[], rows: readonly (readonly (number | string | null)[])[]): string {
  const cell = (value: number | string | null) => {
    const text = value === null ? '' : String(value)
    return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
  }
  return [header, ...rows].map((row) => `${row.map(cell).join(',')}\r\n`).join('')
}
