import { existsSync } from 'node:fs'
import { type Browser, chromium } from 'playwright-core'

const EXECUTABLE = '/usr/bin/chromium'

/** No calls home, and no name but the loopback's resolves: a page that needs the network fails here as in a field. */
const ALONE = [
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-default-apps',
  '--disable-domain-reliability',
  '--disable-sync',
  '--no-first-run',
  '--no-default-browser-check',
  '--metrics-recording-only',
  '--disable-dev-shm-usage',
  '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE localhost, EXCLUDE 127.0.0.1',
]

/**
 * Debian's Chromium, headless. The caller closes it.
 * @throws when it is not installed: `npm test` installs it
 */
export function openBrowser(): Promise<Browser> {
  if (!existsSync(EXECUTABLE))
    throw new Error(`${EXECUTABLE} is missing. Run "sudo apt-get install chromium", or "npm test", which does.`)
  // Chromium's sandbox refuses to work for root.
  const sandbox = process.getuid?.() === 0 ? ['--no-sandbox'] : []
  return chromium.launch({ executablePath: EXECUTABLE, args: [...sandbox, ...ALONE] })
}
