/** A design in the part of an address after #, which browsers never send to a server: JSON, deflated, in base64url. */
const LONGEST_LINK = 100_000 // characters
const LARGEST_TEXT = 256_000 // bytes, as much as the API takes

export async function encodeText(text: string): Promise<string> {
  const bytes = await pipe(
    new TextEncoder().encode(text),
    new CompressionStream('deflate-raw'),
    Number.POSITIVE_INFINITY,
  )
  const binary = Array.from(bytes, (byte) => String.fromCharCode(byte)).join('')
  return btoa(binary).replaceAll('+', '-').replaceAll('/', '_').replaceAll('=', '')
}

/** @throws RangeError when the text is no link of ours, is cut short, or unpacks to more than a design can be. */
export async function decodeText(code: string): Promise<string> {
  if (code.length > LONGEST_LINK) throw new RangeError('The link is longer than a design can be.')
  try {
    const binary = atob(code.replaceAll('-', '+').replaceAll('_', '/'))
    const bytes = Uint8Array.from(binary, (character) => character.charCodeAt(0))
    const text = await pipe(bytes, new DecompressionStream('deflate-raw'), LARGEST_TEXT)
    return new TextDecoder('utf-8', { fatal: true }).decode(text)
  } catch (error) {
    if (error instanceof RangeError) throw error
    throw new RangeError('The link is damaged or incomplete.')
  }
}

async function pipe(bytes: Uint8Array<ArrayBuffer>, through: GenericTransform, most: number): Promise<Uint8Array> {
  const reader = new Blob([bytes]).stream().pipeThrough<Uint8Array>(through).getReader()
  const chunks: Uint8Array[] = []
  let length = 0
  for (;;) {
    const { done, value } = await reader.read()
    if (done) break
    length += value.length
    if (length > most) {
      await reader.cancel()
      throw new RangeError('The link holds more than a design can be.')
    }
    chunks.push(value)
  }
  const whole = new Uint8Array(length)
  let at = 0
  for (const chunk of chunks) {
    whole.set(chunk, at)
    at += chunk.length
  }
  return whole
}

type GenericTransform = ReadableWritablePair<Uint8Array, BufferSource>
