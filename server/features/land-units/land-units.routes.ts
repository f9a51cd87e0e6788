import { z } from 'zod'
import { UserError } from '../../../shared/errors.ts'
import { landUnitSchema, saveLandUnitSchema } from '../../../shared/schemas/land-unit.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { addLandUnit, listLandUnits, withdrawLandUnit } from '../../db/repositories/land-unit.ts'
import { type Route, route } from '../../http/route.ts'
import { writeTrail } from '../trail/trail.service.ts'

const said = (unit: { name: string; district: string; size_m2: number }) =>
  `1 ${unit.name} in ${unit.district} is ${unit.size_m2} m²`

export const landUnitRoutes: Route[] = [
  route({
    method: 'get',
    path: '/land-units',
    summary: 'Local units of land that a person confirmed',
    access: 'signed in',
    response: z.array(landUnitSchema),
    handle: ({ deps }) => listLandUnits(deps.source.manager),
  }),
  route({
    method: 'post',
    path: '/land-units',
    summary: 'Confirm a local unit of land for a district',
    access: ['admin'],
    body: saveLandUnitSchema,
    response: landUnitSchema,
    status: 201,
    handle: ({ deps, actor, body }) =>
      deps.source.transaction(async (db) => {
        const unit = await addLandUnit(db, body, actor.id)
        const text = `confirmed: ${said(unit)} (${unit.source})`
        await writeTrail(db, { actor, action: 'confirm', subject: 'land unit', subjectId: unit.id, text })
        return unit
      }),
  }),
  route({
    method: 'delete',
    path: '/land-units/:id',
    summary: 'Withdraw a local unit of land; figures made with it stand',
    access: ['admin'],
    params: z.object({ id: idSchema }),
    response: landUnitSchema,
    handle: ({ deps, actor, params }) =>
      deps.source.transaction(async (db) => {
        const unit = await withdrawLandUnit(db, params.id, actor.id)
        if (!unit) throw new UserError('not_found', 'No such unit of land is confirmed.')
        await writeTrail(db, {
          actor,
          action: 'withdraw',
          subject: 'land unit',
          subjectId: unit.id,
          text: `withdrawn: ${said(unit)}`,
        })
        return unit
      }),
  }),
]
