/** What the system says of running processes, by Linux's /proc. */
import { readdir, readFile } from 'node:fs/promises'

const TICKS_A_SECOND = 100

/** Fields of /proc/PID/stat after the name, which may hold spaces and brackets; null when the process is gone. */
async function statOf(pid: number): Promise<string[] | null> {
  const stat = await readFile(`/proc/${pid}/stat`, 'utf8').catch(() => null)
  return stat === null ? null : stat.slice(stat.lastIndexOf(')') + 2).split(' ')
}

/** A process and all that it started, oldest first. */
export async function familyOf(pid: number): Promise<number[]> {
  const parents = new Map<number, number>()
  for (const name of await readdir('/proc')) {
    const stat = /^\d+$/.test(name) ? await statOf(Number(name)) : null
    if (stat) parents.set(Number(name), Number(stat[1]))
  }
  const family = [pid]
  for (let i = 0; i < family.length; i += 1) {
    for (const [child, parent] of parents) if (parent === family[i]) family.push(child)
  }
  return family
}

/** Resident memory, MB of a million bytes; 0 when the process is gone. */
export async function residentMb(pid: number): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8').catch(() => '')
  return (Number(/VmRSS:\s+(\d+)/.exec(status)?.[1] ?? 0) * 1024) / 1e6
}

/** Processor time it has used so far, seconds. */
export async function cpuSeconds(pid: number): Promise<number> {
  const stat = await statOf(pid)
  return stat ? (Number(stat[11]) + Number(stat[12])) / TICKS_A_SECOND : 0
}
