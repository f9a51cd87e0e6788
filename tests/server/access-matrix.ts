/**
 * Who may do what, written down once more and by hand: the test walks the mounted routes against this table, so a route that is
 * missing here, or that lets in one role too many, fails. Add a row for every new route.
 */
import type { Scope } from '../../shared/schemas/token.ts'
import type { Role } from '../../shared/schemas/user.ts'

/** What one demonstrator holds; the walk uses the signed-in demonstrator's and another's. */
export interface Holding {
  demonstrationId: string
  /** Printed for a run of it. */
  printedSheetId: string
  /** Arrived, read and at the desk. */
  sheetId: string
  uploadId: string
  pageId: string
  recordNumber: number
  /** A plan as it would be saved again. */
  plan: Record<string, unknown>
}

/** What belongs to nobody in particular. */
export interface Common {
  /** Somebody who may be changed and invited. */
  spareUserId: string
  signIn: { email: string; password: string }
  registerRow: Record<string, { id: string; body: Record<string, unknown> }>
}

type Make<T> = (own: Holding, common: Common) => T

export interface Rule {
  /** Roles that get in; `anyone` needs no session, `signed in` is every role. */
  may: 'anyone' | 'signed in' | readonly Role[]
  /** The scope that lets a token in, within what its maker may do; without it the route refuses every token. */
  token?: Scope
  /** The route names an object a demonstrator holds: another's is not there for them. */
  object?: true
  path?: Make<string>
  body?: Make<unknown>
  /** Answers that say "you are in, but this input does not fit"; without it a success is expected. */
  butAnswers?: readonly number[]
}

const DESK = ['clerk', 'admin'] as const
const SENDERS = ['demonstrator', 'clerk', 'admin'] as const
const BOOK = ['clerk', 'analyst', 'admin'] as const
const COMPARERS = ['analyst', 'admin'] as const
const PLANNERS = ['demonstrator', 'admin'] as const
const ADMIN = ['admin'] as const
const MAKERS = ['analyst', 'admin'] as const
const NOBODYS = '00000000-0000-4000-8000-000000000000'
const A_TOKEN = 'a-token-that-nobody-was-ever-given'
const GOOD_PASSWORD = 'clods break on the second pass'
/** The desk's writes on a version long gone: let in, then told that the sheet has changed. */
const STALE = 9999

const sheetWrite = (act: string, body: Record<string, unknown>): Rule => ({
  may: DESK,
  path: (own) => `/sheets/${own.sheetId}/${act}`,
  body: () => ({ version: STALE, ...body }),
  butAnswers: [412],
})

const registerRules = (name: string): Record<string, Rule> => ({
  [`GET /registers/${name}`]: { may: 'signed in' },
  [`POST /registers/${name}`]: { may: ADMIN, body: (_own, common) => common.registerRow[name]?.body, butAnswers: [409] },
  [`PUT /registers/${name}/:id`]: {
    may: ADMIN,
    path: (_own, common) => `/registers/${name}/${common.registerRow[name]?.id}`,
    body: (_own, common) => ({ ...common.registerRow[name]?.body, version: STALE }),
    butAnswers: [412],
  },
})

const demonstrationFile = (ending: string): Rule => ({
  may: SENDERS,
  object: true,
  path: (own) => `/demonstrations/${own.demonstrationId}/${ending}`,
})

const layoutFile = (ending: string): Rule => ({ may: 'signed in', path: () => `/layouts/tillage/${ending}` })

export const ACCESS: Record<string, Rule> = {
  'GET /health': { may: 'anyone' },
  'GET /openapi.json': { may: 'anyone' },
  'POST /session': { may: 'anyone', body: (_own, common) => common.signIn },
  'GET /session': { may: 'signed in' },
  'DELETE /session': { may: 'anyone' },
  'POST /password/request': { may: 'anyone', body: () => ({ email: 'nobody@fields.example' }), butAnswers: [202] },
  'GET /links/:token': { may: 'anyone', path: () => `/links/${A_TOKEN}`, butAnswers: [410] },
  'POST /password/set': { may: 'anyone', body: () => ({ token: A_TOKEN, password: GOOD_PASSWORD }), butAnswers: [410] },
  'POST /first-admin': {
    may: 'anyone',
    body: () => ({ token: A_TOKEN, password: GOOD_PASSWORD, name: 'Nobody', email: 'first@fields.example' }),
    butAnswers: [410],
  },

  'GET /users': { may: ADMIN },
  'POST /users': {
    may: ADMIN,
    body: () => ({ number: 9000, name: 'Sela Torp', email: 'sela@fields.example', role: 'clerk' }),
    butAnswers: [409],
  },
  'PATCH /users/:id': { may: ADMIN, path: (_own, common) => `/users/${common.spareUserId}`, body: () => ({ name: 'Sela Torp' }) },
  'POST /users/:id/invite': { may: ADMIN, path: (_own, common) => `/users/${common.spareUserId}/invite` },
  'GET /demonstrators': { may: 'signed in' },
  'GET /mails': { may: ADMIN },
  'GET /trail': { may: ADMIN },

  'GET /rules': { may: BOOK },
  // Made on a version long gone: let in, then told so.
  'POST /rules/limits': { may: ADMIN, body: () => ({ limits: {}, why: 'harvest', version: STALE }), butAnswers: [412] },
  'GET /land-units': { may: 'signed in' },
  'POST /land-units': {
    may: ADMIN,
    body: () => ({ name: 'bigha', district: 'Nether Vale', size_m2: 1337.8, source: 'land office' }),
    butAnswers: [409],
  },
  'DELETE /land-units/:id': { may: ADMIN, path: () => `/land-units/${NOBODYS}`, butAnswers: [404] },

  ...registerRules('places'),
  ...registerRules('tractors'),
  ...registerRules('implements'),
  ...registerRules('kits'),

  'GET /demonstrations': { may: 'signed in' },
  // Planning for another demonstrator is refused by its own test: here everybody plans for the one who holds the plan.
  'POST /demonstrations': { may: PLANNERS, body: (own) => own.plan },
  'GET /demonstrations/:id': { may: 'signed in', object: true, path: (own) => `/demonstrations/${own.demonstrationId}` },
  'PUT /demonstrations/:id': {
    may: PLANNERS,
    object: true,
    path: (own) => `/demonstrations/${own.demonstrationId}`,
    body: (own) => ({ ...own.plan, version: STALE }),
    butAnswers: [412],
  },
  'POST /demonstrations/:id/withdraw-consent': {
    may: PLANNERS,
    object: true,
    path: (own) => `/demonstrations/${own.demonstrationId}/withdraw-consent`,
    body: () => ({ reason: 'asked for by telephone' }),
    butAnswers: [409],
  },
  'GET /demonstrations/:id/sheets.pdf': demonstrationFile('sheets.pdf'),
  'GET /sheets/:id/sheet.pdf': { may: SENDERS, object: true, path: (own) => `/sheets/${own.printedSheetId}/sheet.pdf` },

  'GET /layouts': { may: 'signed in', token: 'book' },
  'GET /layouts/:key': { may: 'signed in', token: 'book', path: () => '/layouts/tillage' },
  'GET /layouts/:key/blank.pdf': layoutFile('blank.pdf'),
  'GET /layouts/:key/form.xlsx': layoutFile('form.xlsx'),
  'GET /layouts/:key/form.csv': layoutFile('form.csv'),
  'GET /layouts/:key/dictionary.csv': layoutFile('dictionary.csv'),

  // Without a file: let in, then told that there is none.
  'POST /uploads': { may: SENDERS, body: () => new FormData(), butAnswers: [400] },
  'GET /uploads': { may: SENDERS },
  'GET /uploads/:id': { may: SENDERS, object: true, path: (own) => `/uploads/${own.uploadId}` },
  'GET /pages/:id/picture': { may: 'signed in', token: 'book', object: true, path: (own) => `/pages/${own.pageId}/picture` },
  'GET /pages/:id/original': { may: 'signed in', token: 'book', object: true, path: (own) => `/pages/${own.pageId}/original` },

  'GET /sheets': { may: 'signed in' },
  'GET /sheets/:id': { may: 'signed in', object: true, path: (own) => `/sheets/${own.sheetId}` },
  'POST /sheets/:id/take': { may: DESK, path: (own) => `/sheets/${own.sheetId}/take`, butAnswers: [409] },
  'DELETE /sheets/:id/take': { may: DESK, path: (own) => `/sheets/${own.sheetId}/take` },
  'POST /sheets/:id/settle-reading': sheetWrite('settle-reading', { key: 'jar_start_ml', how: 'kept' }),
  'POST /sheets/:id/settle-doubt': sheetWrite('settle-doubt', { doubtId: '00000000-0000-4000-8000-000000000000', why: 'seen' }),
  'POST /sheets/:id/unsettle': sheetWrite('unsettle', { key: 'jar_start_ml' }),
  'POST /sheets/:id/send-back': sheetWrite('send-back', { reason: 'the jar end is blank' }),
  'POST /sheets/:id/set-aside': sheetWrite('set-aside', { reason: 'a copy' }),
  'POST /sheets/:id/take-up': sheetWrite('take-up', {}),
  'POST /sheets/:id/place': sheetWrite('place', { layout: 'tillage', layoutVersion: 1, sheetCode: null, corners: null }),
  'POST /sheets/:id/enter': sheetWrite('enter', {}),

  'GET /records': { may: 'signed in', token: 'book' },
  'GET /records.csv': { may: BOOK, token: 'book' },
  'GET /records.xlsx': { may: BOOK, token: 'book' },
  'GET /records.parquet': { may: BOOK, token: 'book' },
  'GET /records/dictionary.csv': { may: BOOK, token: 'book' },
  'GET /values': { may: BOOK, token: 'book' },
  'GET /values.csv': { may: BOOK, token: 'book' },
  'GET /values.xlsx': { may: BOOK, token: 'book' },
  'GET /values.parquet': { may: BOOK, token: 'book' },
  'GET /values/dictionary.csv': { may: BOOK, token: 'book' },
  'GET /datapackage.json': { may: BOOK, token: 'book' },
  'GET /datapackage.zip': { may: BOOK, token: 'book' },
  'GET /records/:number': { may: 'signed in', token: 'book', object: true, path: (own) => `/records/${own.recordNumber}` },
  'GET /comparisons': { may: COMPARERS },
  'GET /comparisons/exclusions': { may: COMPARERS },
  // Left out by whoever came first, and back again: both answers say "you are in".
  'POST /comparisons/exclusions': {
    may: COMPARERS,
    body: (own) => ({ number: own.recordNumber, reason: 'rain fell during the run' }),
    butAnswers: [409],
  },
  'POST /comparisons/exclusions/take-back': {
    may: COMPARERS,
    body: (own) => ({ number: own.recordNumber, reason: 'it was another plot' }),
    butAnswers: [409],
  },
  'POST /records/:number/challenge': {
    may: ['analyst', 'admin'],
    path: (own) => `/records/${own.recordNumber}/challenge`,
    body: () => ({ reason: 'slip looks too low' }),
    butAnswers: [409],
  },

  'GET /records/:number/leaf.pdf': { may: 'signed in', object: true, path: (own) => `/records/${own.recordNumber}/leaf.pdf` },
  'GET /records/:number/leaf': { may: 'signed in', object: true, path: (own) => `/records/${own.recordNumber}/leaf` },
  'POST /records/:number/leaf': {
    may: ['demonstrator', 'admin'],
    object: true,
    path: (own) => `/records/${own.recordNumber}/leaf`,
    butAnswers: [409],
  },

  'GET /changes': { may: BOOK, token: 'changes' },
  'GET /webhooks': { may: MAKERS, token: 'webhooks' },
  'POST /webhooks': {
    may: MAKERS,
    token: 'webhooks',
    body: () => ({ url: 'https://data.example/sheafbook', events: ['record.entered'] }),
  },
  'PATCH /webhooks/:id': {
    may: MAKERS,
    token: 'webhooks',
    path: () => `/webhooks/${NOBODYS}`,
    body: () => ({ state: 'paused' }),
    butAnswers: [404],
  },
  'DELETE /webhooks/:id': { may: MAKERS, token: 'webhooks', path: () => `/webhooks/${NOBODYS}`, butAnswers: [404] },
  'GET /webhooks/:id/deliveries': {
    may: MAKERS,
    token: 'webhooks',
    path: () => `/webhooks/${NOBODYS}/deliveries`,
    butAnswers: [404],
  },
  'GET /tokens': { may: MAKERS },
  'POST /tokens': { may: MAKERS, body: () => ({ name: 'nightly copy', scopes: ['book'], days: 30 }) },
  'POST /tokens/:id/revoke': { may: MAKERS, path: () => `/tokens/${NOBODYS}/revoke`, butAnswers: [404] },
}
