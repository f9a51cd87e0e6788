import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { CannotStart } from '../../postgres/cannot-start.ts'

/** Everything the built web app is made of. */
const SOURCES = ['web', 'shared', 'index.html', 'vite.config.ts', 'tailwind.config.ts', 'tsconfig.json', 'package-lock.json']

/**
 * Whether the built web app is that of the present sources.
 * @param outDir where the build goes; its mark stands beside it
 */
export function webIsBuilt(outDir: string): boolean {
  const mark = markOf(outDir)
  return existsSync(join(outDir, 'index.html')) && existsSync(mark) && readFileSync(mark, 'utf8') === hashSources()
}

/**
 * Builds the web app into `outDir`.
 * @throws CannotStart with the builder's words
 */
export async function buildWeb(outDir: string): Promise<void> {
  const mark = markOf(outDir)
  const hash = hashSources()
  rmSync(mark, { force: true })
  await runVite(['build', '--outDir', outDir, '--emptyOutDir', '--logLevel', 'warn'])
  writeFileSync(mark, hash)
}

function markOf(outDir: string): string {
  return `${outDir}.sha256`
}

function hashSources(): string {
  const hash = createHash('sha256')
  for (const source of SOURCES)
    for (const file of listFiles(source)) hash.update(file).update('\0').update(readFileSync(file)).update('\0')
  return hash.digest('hex')
}

function listFiles(path: string): string[] {
  if (!existsSync(path)) return []
  if (!statSync(path).isDirectory()) return [path]
  return readdirSync(path)
    .sort()
    .flatMap((name) => listFiles(join(path, name)))
}

function runVite(args: string[]): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ['node_modules/vite/bin/vite.js', ...args], { stdio: ['ignore', 'pipe', 'pipe'] })
    let said = ''
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (piece: Buffer) => {
        said += piece.toString()
      })
    }
    const failed = () =>
      reject(
        new CannotStart(
          `The web app could not be built: ${said.trim()}`,
          'Undo the last change under web/ or shared/, then start again.',
        ),
      )
    child.on('error', failed)
    child.on('close', (code) => (code === 0 ? resolve() : failed()))
  })
}
