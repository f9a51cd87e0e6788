/** The sun look: black on white, heavy rules, for a phone outdoors. A phone starts in it; the choice is kept. */
const KEY = 'sheafbook.light'

export type Light = 'sun' | 'office'

const isPhone = (): boolean => window.matchMedia('(pointer: coarse) and (max-width: 700px)').matches

export function currentLight(): Light {
  const kept = localStorage.getItem(KEY)
  if (kept === 'sun' || kept === 'office') return kept
  return isPhone() ? 'sun' : 'office'
}

export function showLight(light: Light): void {
  if (light === 'sun') document.documentElement.dataset.light = 'sun'
  else delete document.documentElement.dataset.light
}

export function keepLight(light: Light): void {
  localStorage.setItem(KEY, light)
  showLight(light)
}
