import { rulePageSchema, saveLimitsSchema } from '../../../shared/schemas/rules.ts'
import { type Route, route } from '../../http/route.ts'
import { readRules, setLimits } from './rules.service.ts'

export const ruleRoutes: Route[] = [
  route({
    method: 'get',
    path: '/rules',
    summary: 'Every rule in plain words, with its limits and how often it fired and was right',
    access: ['clerk', 'analyst', 'admin'],
    response: rulePageSchema,
    handle: ({ deps }) => readRules(deps.source.manager),
  }),
  route({
    method: 'post',
    path: '/rules/limits',
    summary: 'Set limits of the rules: a new version, which judges every sheet that is not entered yet',
    access: ['admin'],
    body: saveLimitsSchema,
    response: rulePageSchema,
    status: 201,
    handle: ({ deps, actor, body }) => setLimits(deps, actor, body),
  }),
]
