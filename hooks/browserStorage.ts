/** The browser's storage, where it is allowed; elsewhere what is kept lives as long as the page. */
function storage(): Storage | null {
  try {
    return typeof window === 'undefined' ? null : window.localStorage
  } catch {
    return null // forbidden by the browser's settings
  }
}

export function readStored(key: string): string | null {
  return storage()?.getItem(key) ?? null
}

export function writeStored(key: string, text: string): void {
  try {
    storage()?.setItem(key, text)
  } catch {
    // Storage is full or forbidden: the page goes on with what it holds.
  }
}
