import { z } from 'zod'
import { REGISTER_NAMES, REGISTERS, type RegisterName } from '../../../shared/schemas/register.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { listRegister } from '../../db/repositories/register.ts'
import { type Route, route } from '../../http/route.ts'
import { addToRegister, saveInRegister } from './registers.service.ts'

/** A register's three routes, each with that register's own columns. */
function routesOf(name: RegisterName): Route[] {
  const save: z.ZodObject = REGISTERS[name].save
  const row: z.ZodObject = REGISTERS[name].row
  return [
    route({
      method: 'get',
      path: `/registers/${name}`,
      summary: `The register of ${name}`,
      access: 'signed in',
      response: z.array(row),
      handle: ({ deps }) => listRegister(deps.source.manager, name),
    }),
    route({
      method: 'post',
      path: `/registers/${name}`,
      summary: `Add to the register of ${name}`,
      access: ['admin'],
      body: save,
      response: row,
      status: 201,
      handle: ({ deps, actor, body }) => addToRegister(deps, actor, name, body),
    }),
    route({
      method: 'put',
      path: `/registers/${name}/:id`,
      summary: `Change a row of the register of ${name}`,
      access: ['admin'],
      params: z.object({ id: idSchema }),
      body: save.extend({ version: z.number().int() }),
      response: row,
      handle: ({ deps, actor, params, body }) =>
        saveInRegister(deps, actor, name, params.id, { ...body, version: Number(body.version) }),
    }),
  ]
}

export const registerRoutes: Route[] = REGISTER_NAMES.flatMap(routesOf)
