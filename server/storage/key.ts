const KEY = /^[a-z0-9][a-z0-9._-]*(\/[a-z0-9][a-z0-9._-]*)*$/

/** Returns the key, or throws when it could lead out of the store: keys are made by our own code, so that is a fault. */
export function checkKey(key: string): string {
  if (key.length > 200 || !KEY.test(key)) throw new Error(`"${key}" is no storage key.`)
  return key
}
