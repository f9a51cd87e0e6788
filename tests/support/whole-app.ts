/** The product as people meet it: built web app, server, a worker process, the demo season's registers and people; no sheet yet. */
import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import type { Browser, Page } from 'playwright-core'
import { addPeople, fillRegisters, type People } from '../../server/demo/plan-season.ts'
import { startFakeSmtp } from '../../server/mail/fake.ts'
import { buildWeb, webIsBuilt } from '../../server/scripts/start/build-web.ts'
import { openBrowser } from './browser.ts'
import { startTestServer, type TestServer } from './server.ts'

const PASSWORD = 'a sheaf of oats for every test'
/** Kept between runs: it is built again only when a source of it changed. */
const WEB_DIR = '.data/test-web'

export interface WholeApp {
  server: TestServer
  people: People
  /** A browser window of its own, signed in. Every problem the page reports fails the test. */
  enter(number: number, size?: { width: number; height: number }): Promise<Page>
  /** What the pages complained of: script errors and refusals of the content policy. */
  complaints: string[]
  close(): Promise<void>
}

export async function startWholeApp(): Promise<WholeApp> {
  if (!webIsBuilt(WEB_DIR)) await buildWeb(WEB_DIR)
  const smtp = await startFakeSmtp({ port: 0, onMail: () => undefined })
  const server = await startTestServer({ WEB_DIR, SMTP_URL: smtp.url })
  const people = await addPeople(server.deps, PASSWORD)
  await fillRegisters(server.deps, people.get(401)!)
  const worker = startWorkerProcess(server)
  const browser = await openBrowser()
  const complaints: string[] = []
  return {
    server,
    people,
    complaints,
    enter: (number, size = { width: 1440, height: 900 }) => enter(browser, server.url, people, number, size, complaints),
    close: async () => {
      await browser.close()
      await stopProcess(worker)
      await server.close()
      await smtp.close()
    },
  }
}

function startWorkerProcess({ deps }: TestServer): ChildProcess {
  const { settings } = deps
  if (settings.store.kind !== 'folder') throw new Error('the tests keep files in a folder')
  return spawn(process.execPath, ['--import', 'tsx', 'worker/main.ts'], {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: {
      ...process.env,
      DATABASE_URL: settings.databaseUrl,
      STORAGE_DIR: settings.store.dir,
      SMTP_URL: settings.smtpUrl,
      LOG_LEVEL: 'silent',
    },
  })
}

async function stopProcess(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null) return
  child.kill('SIGTERM')
  await once(child, 'exit')
}

async function enter(
  browser: Browser,
  url: string,
  people: People,
  number: number,
  size: { width: number; height: number },
  complaints: string[],
): Promise<Page> {
  const context = await browser.newContext({ viewport: size, baseURL: url, acceptDownloads: true })
  const page = await context.newPage()
  page.on('pageerror', (error) => complaints.push(`${page.url()}: ${error.message}`))
  page.on('console', (message) => {
    if (/Content Security Policy/i.test(message.text())) complaints.push(`${page.url()}: ${message.text()}`)
  })
  await page.goto('/')
  await page.getByLabel('E-mail').fill(people.get(number)!.email)
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
  await page.getByRole('button', { name: 'Open the book' }).click()
  await page.getByRole('navigation', { name: 'Sections' }).waitFor()
  return page
}
