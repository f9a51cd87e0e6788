import { say } from './say.ts'

/** What has to be stopped, in reverse order of starting: those who use the database before the database. */
export class Stops {
  private readonly stops: (() => void | Promise<void>)[] = []
  private running: Promise<void> | undefined

  get begun(): boolean {
    return this.running !== undefined
  }

  /** Adds one more; when stopping has begun already it is stopped at once. */
  add(stop: () => void | Promise<void>): void {
    this.stops.push(stop)
    if (this.running !== undefined) this.running = this.running.then(() => this.runAll())
  }

  /** Stops everything once, however often it is asked, and ends the process. */
  async runAndExit(code: number, line?: string): Promise<never> {
    if (this.running === undefined) {
      if (line !== undefined) say(`\n${line}`)
      this.running = this.runAll()
    }
    let seen: Promise<void> | undefined
    while (seen !== this.running) {
      seen = this.running
      await seen
    }
    process.exit(code)
  }

  private async runAll(): Promise<void> {
    for (let stop = this.stops.pop(); stop !== undefined; stop = this.stops.pop()) {
      try {
        await stop()
      } catch (cause) {
        say(cause instanceof Error ? cause.message : String(cause))
      }
    }
  }
}
