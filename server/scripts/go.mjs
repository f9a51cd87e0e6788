/**
 * Starts `npm start` and `npm test` on a machine where nothing is installed yet: plain Node, no packages.
 * Checks Node, installs what the lock file names when it is not there, then hands over to the script in TypeScript.
 */
import { spawn } from 'node:child_process'
import { existsSync, readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..')
const scripts = { start: 'server/scripts/start.ts', test: 'server/scripts/test.ts' }
const [command, ...rest] = process.argv.slice(2)

checkNode()
const script = scripts[command]
if (script === undefined) fail(`There is no command "${command}".`, 'Run "npm start" or "npm test".')
if (!packagesAreInstalled()) await installPackages()
process.exitCode = await run(process.execPath, ['--import', 'tsx', script, ...rest])

/** The range stands in package.json ("engines"), and is written there as >=A.B <C. */
function checkNode() {
  const wanted = readJson('package.json').engines.node
  const [, major, minor, below] = /^>=(\d+)\.(\d+) <(\d+)$/.exec(wanted).map(Number)
  const [haveMajor, haveMinor] = process.versions.node.split('.').map(Number)
  const oldEnough = haveMajor > major || (haveMajor === major && haveMinor >= minor)
  if (!oldEnough || haveMajor >= below)
    fail(`This is Node.js ${process.versions.node}; Sheafbook runs on ${wanted}.`, `Install Node.js ${major}.`)
}

/** Whether node_modules holds what the lock file names. npm writes its own list last, so a broken-off install has none. */
function packagesAreInstalled() {
  if (!existsSync(join(root, 'node_modules/.package-lock.json'))) return false
  const wanted = readJson('package-lock.json').packages
  const have = readJson('node_modules/.package-lock.json').packages
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === '') return true
    const found = have[path]
    // Binaries for other machines are optional and rightly absent.
    return found === undefined ? entry.optional === true : found.version === entry.version && found.integrity === entry.integrity
  })
}

async function installPackages() {
  const count = Object.keys(readJson('package-lock.json').packages).length - 1
  const begin = Date.now()
  console.log(`Installing ${count} packages from the lock file …`)
  const ticker = setInterval(() => console.log(`  still installing, ${Math.round((Date.now() - begin) / 1000)} s`), 10_000)
  const code = await runNpm(['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'])
  clearInterval(ticker)
  if (code !== 0)
    fail(
      `npm ci ended with ${code}; its reason stands above.`,
      'Check the network and the free disk space, then run the command again.',
    )
  console.log(`Packages installed in ${Math.round((Date.now() - begin) / 1000)} s.`)
}

/** The npm that started us when there is one: it knows the settings it was given. */
function runNpm(args) {
  const npm = process.env.npm_execpath
  return npm?.endsWith('.js') ? run(process.execPath, [npm, ...args]) : run('npm', args)
}

/** Runs a program to its end, passing on the signals that end us, and gives its exit code. */
function run(program, args) {
  return new Promise((resolve) => {
    const child = spawn(program, args, { cwd: root, stdio: 'inherit' })
    const pass = (signal) => child.kill(signal)
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, pass)
    const done = (code) => {
      for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.off(signal, pass)
      resolve(code)
    }
    child.on('error', (cause) => {
      console.error(`${program} could not be run: ${cause.message}`)
      done(1)
    })
    child.on('exit', (code, signal) => done(signal === null ? code : 1))
  })
}

function readJson(path) {
  return JSON.parse(readFileSync(join(root, path), 'utf8'))
}

function fail(what, remedy) {
  console.error(`${what} ${remedy}`)
  process.exit(1)
}
