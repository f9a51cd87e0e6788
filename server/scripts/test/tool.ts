import { spawn } from 'node:child_process'

/**
 * Runs a tool of node_modules with our own Node, its output straight through.
 * @returns its exit code; 1 when a signal ended it
 */
export function runTool(args: string[], env: NodeJS.ProcessEnv = process.env): Promise<number> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, args, { env, stdio: 'inherit' })
    child.on('error', reject)
    child.on('close', (code) => resolve(code ?? 1))
  })
}
