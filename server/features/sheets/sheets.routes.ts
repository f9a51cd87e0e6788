import { z } from 'zod'
import {
  enteredSchema,
  enterSheetSchema,
  listSheetsSchema,
  onVersionSchema,
  placeSheetSchema,
  sendBackSchema,
  setAsideSchema,
  settleDoubtSchema,
  settleReadingSchema,
  sheetListSchema,
  sheetSchema,
  unsettleSchema,
} from '../../../shared/schemas/sheet.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { listSheetRows } from '../../db/desk/sheet-rows.ts'
import { type Route, route } from '../../http/route.ts'
import { getSheet } from './change-sheet.ts'
import { sendBack, setAside, takeUp } from './desk.service.ts'
import { enterSheet } from './enter.service.ts'
import { letGo, takeInHand } from './hold.service.ts'
import { placeSheet } from './place.service.ts'
import { settleOneDoubt, settleOneReading, unsettle } from './settle.service.ts'

const DESK = ['clerk', 'admin'] as const
const READERS = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
const params = z.object({ id: idSchema })

export const sheetRoutes: Route[] = [
  route({
    method: 'get',
    path: '/sheets',
    summary: 'Sheets that arrived; a demonstrator sees their own, and those they sent a page of',
    access: READERS,
    query: listSheetsSchema,
    response: sheetListSchema,
    handle: async ({ deps, actor, query }) => {
      const own = actor.role === 'demonstrator' ? { demonstratorId: actor.id } : {}
      const { rows, next } = await listSheetRows(deps.source.manager, { ...query, ...own })
      return { sheets: rows, next }
    },
  }),
  route({
    method: 'get',
    path: '/sheets/:id',
    summary: 'A sheet with readings, doubts and history',
    access: READERS,
    params,
    response: sheetSchema,
    handle: ({ deps, actor, params }) => getSheet(deps, actor, params.id),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/take',
    summary: 'Take the sheet in hand for a minute, or renew it',
    access: DESK,
    params,
    response: sheetSchema,
    handle: ({ deps, actor, params }) => takeInHand(deps, actor, params.id),
  }),
  route({
    method: 'delete',
    path: '/sheets/:id/take',
    summary: 'Let go of the sheet',
    access: DESK,
    params,
    handle: async ({ deps, actor, params, res }) => {
      await letGo(deps, actor, params.id)
      res.status(204).end()
    },
  }),
  route({
    method: 'post',
    path: '/sheets/:id/settle-reading',
    summary: 'Keep, correct, mark unreadable or leave blank on purpose',
    access: DESK,
    params,
    body: settleReadingSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => settleOneReading(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/settle-doubt',
    summary: 'Let a doubt stand',
    access: DESK,
    params,
    body: settleDoubtSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => settleOneDoubt(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/unsettle',
    summary: 'Take a settlement back',
    access: DESK,
    params,
    body: unsettleSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => unsettle(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/send-back',
    summary: 'Send back to the demonstrator with the reason',
    access: DESK,
    params,
    body: sendBackSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => sendBack(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/set-aside',
    summary: 'A duplicate, or not a sheet',
    access: DESK,
    params,
    body: setAsideSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => setAside(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/take-up',
    summary: 'Take up again what was set aside or sent back',
    access: DESK,
    params,
    body: onVersionSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => takeUp(deps, actor, params.id, body.version),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/place',
    summary: 'Set the corners of a picture by hand, or key beside it',
    access: DESK,
    params,
    body: placeSheetSchema,
    response: sheetSchema,
    handle: ({ deps, actor, params, body }) => placeSheet(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/sheets/:id/enter',
    summary: 'Enter a settled sheet into the trial book',
    access: DESK,
    params,
    body: enterSheetSchema,
    response: enteredSchema,
    handle: ({ deps, actor, params, body }) => enterSheet(deps, actor, params.id, body.version, body.answer),
  }),
]
