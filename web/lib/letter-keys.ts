/** Single-letter keys can be switched off for people whose speech software types them by accident. */
const KEY = 'sheafbook.letter-keys'

export const letterKeysOn = (): boolean => localStorage.getItem(KEY) !== 'off'

export const switchLetterKeys = (on: boolean): void => localStorage.setItem(KEY, on ? 'on' : 'off')
