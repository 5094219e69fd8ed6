/** Reads a value kept on the device; null where storage is off or empty. */
export function readLocal(key: string): string | null {
  try {
    return localStorage.getItem(key)
  }
  catch {
    return null
  }
}

/** Keeps a value on the device. False where storage is off or full: the page works without it. */
export function writeLocal(key: string, value: string): boolean {
  try {
    localStorage.setItem(key, value)
    return true
  }
  catch {
    return false
  }
}

export function removeLocal(key: string): void {
  try {
    localStorage.removeItem(key)
  }
  catch {
    // Nothing is kept where storage is off.
  }
}
