/**
 * `npm test`: types, lint, unused code, then every test, with what they need installed first. All steps run even when
 * one fails, so that one run shows everything. The last line is `N passed, N failed`.
 */
import { existsSync, mkdirSync, rmSync } from 'node:fs'
import { findBinaries } from '../postgres/binaries.ts'
import { CannotStart } from '../postgres/cannot-start.ts'
import { startThrowAway } from '../postgres/throw-away.ts'
import { buildWeb, webIsBuilt } from './start/build-web.ts'
import { installFromDebian } from './start/debian.ts'
import { say, seconds, step } from './start/say.ts'
import { countResults, type Tally } from './test/tally.ts'
import { runTool } from './test/tool.ts'

const RESULTS = '.data/test'
const WEB = '.data/web'
const CHROMIUM = '/usr/bin/chromium'

const begin = Date.now()
const total: Tally = { passed: 0, failed: 0 }

try {
  await seeToTools()
  await runChecks()
  await runTests()
} catch (cause) {
  say(cause instanceof CannotStart ? cause.message : cause instanceof Error ? (cause.stack ?? cause.message) : String(cause))
  total.failed += 1
}
say(`Everything took ${seconds(begin)}.`)
say(`${total.passed} passed, ${total.failed} failed`)
process.exitCode = total.failed === 0 ? 0 : 1

async function seeToTools(): Promise<void> {
  const missing = [...(findBinaries() === null ? ['postgresql'] : []), ...(existsSync(CHROMIUM) ? [] : ['chromium'])]
  if (missing.length > 0)
    await step(`Installing ${missing.join(' and ')} from Debian`, () => installFromDebian(missing, missing.join(' and ')))
}

/** A check that fails counts as one failure; one that holds is no test and counts as nothing. */
async function runChecks(): Promise<void> {
  for (const [what, args] of [
    ['Types', ['node_modules/typescript/bin/tsc', '--noEmit']],
    ['Lint and format', ['node_modules/@biomejs/biome/bin/biome', 'check', '--error-on-warnings', '.']],
    ['Unused code', ['node_modules/knip/bin/knip.js', '--no-progress']],
  ] as const) {
    if ((await step(what, () => runTool([...args]))) !== 0) total.failed += 1
  }
}

async function runTests(): Promise<void> {
  rmSync(RESULTS, { recursive: true, force: true })
  mkdirSync(RESULTS, { recursive: true })
  if (!webIsBuilt(WEB)) await step('Building the web app', () => buildWeb(WEB))
  const cluster = await step('Starting a throw-away database', () => startThrowAway())
  try {
    const env = { ...process.env, TEST_DATABASE_URL: cluster.adminUrl }
    await runVitest('Unit, web, server and worker tests', ['unit', 'web', 'service'], env)
    // Alone: a browser beside other tests on two cores waits longer than a person would.
    await runVitest('Browser tests', ['browser'], env)
  } finally {
    await cluster.stop()
  }
}

async function runVitest(what: string, projects: string[], env: NodeJS.ProcessEnv): Promise<void> {
  const file = `${RESULTS}/${projects.join('-')}.json`
  const chosen = projects.flatMap((project) => ['--project', project])
  const args = [
    'node_modules/vitest/vitest.mjs',
    'run',
    ...chosen,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${file}`,
  ]
  const code = await step(what, () => runTool(args, env), { speaks: true })
  const tally = countResults(file, code)
  total.passed += tally.passed
  total.failed += tally.failed
}
