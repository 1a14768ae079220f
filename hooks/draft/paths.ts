/** Reading and writing a document by path, `outputCapacitors.0.esr`, as the API's problem documents name fields. */
type Json = Record<string, unknown>

export function readPath(document: unknown, path: string): unknown {
  return path.split('.').reduce<unknown>((part, key) => (isObject(part) ? part[key] : undefined), document)
}

/** A copy of the document with one value set; sections that are missing are made. */
export function writePath<T>(document: T, path: string, value: unknown): T {
  const [key, ...rest] = path.split('.') as [string, ...string[]]
  const copy = Array.isArray(document) ? [...(document as unknown[])] : { ...(document as Json) }
  const target = copy as Json
  target[key] = rest.length === 0 ? value : writePath(isObject(target[key]) ? target[key] : {}, rest.join('.'), value)
  return copy as T
}

function isObject(value: unknown): value is Json {
  return typeof value === 'object' && value !== null
}
