import type { Role } from '../../shared/schemas/user.ts'
import { paths } from '../lib/paths.ts'
import type { FolioLink } from '../ui/folio.tsx'

const link = (to: string, words: string): FolioLink => ({ to, words })

const desk = link(paths.desk.to(), 'Desk')
const send = link(paths.send.to(), 'Send sheets')
const mySheets = link(paths.mySheets.to(), 'My sheets')
const book = link(paths.book.to(), 'Trial book')
const compare = link(paths.compare.to(), 'Compare')
const rules = link(paths.rules.to(), 'Rules')
const programs = link(paths.interface.to(), 'Interface')
const demonstrations = link(paths.demonstrations.to(), 'Demonstrations')

/** The sections each role works in; what a role may do is the server's to say. */
export const NAV: Record<Role, readonly FolioLink[]> = {
  demonstrator: [demonstrations, send, mySheets],
  clerk: [desk, send, book, rules],
  analyst: [book, compare, rules, programs],
  admin: [
    desk,
    book,
    compare,
    demonstrations,
    send,
    rules,
    link(paths.registers.to(), 'Registers'),
    link(paths.people.to(), 'People'),
    programs,
    link(paths.outbox.to(), 'Outbox'),
    link(paths.trail.to(), 'Trail'),
  ],
}

/** Where each role's day begins. */
export const HOME: Record<Role, string> = {
  demonstrator: paths.demonstrations.to(),
  clerk: paths.desk.to(),
  analyst: paths.book.to(),
  admin: paths.desk.to(),
}
