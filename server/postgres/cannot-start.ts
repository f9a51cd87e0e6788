/** Something the machine lacks. The message says what happened and what to do, so it is printed without a stack. */
export class CannotStart extends Error {
  override readonly name = 'CannotStart'

  constructor(what: string, remedy: string, options?: ErrorOptions) {
    super(`${what} ${remedy}`, options)
  }
}
