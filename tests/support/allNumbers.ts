/** Every number in a nested value, with its path. */
export function allNumbers(value: unknown, path = ''): [string, number][] {
  if (typeof value === 'number') return [[path, value]]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, inner]) => allNumbers(inner, path === '' ? key : `${path}.${key}`))
}
